// Numbers as the page shows and steps them, as shown.py does before the core is there: the shortest decimal that reads back
// the same, in the reader's unit. Only display: what a typed text means is the core's to say.

const MINUS = '\u2212';
const NARROW = '\u202f';
const CONVERTED_DIGITS = 5;
const COARSE_ABOVE_US = 200; // a PRI above this is stepped by its key's step, below by a tenth of it

export function createQuantities({ other_units: others, family_choice: choice }, units) {
  const unitOf = (key) => {
    const wanted = units[choice[key.family]];
    const unit = wanted === 'us' ? 'µs' : wanted;
    return others[key.unit]?.[unit] ? unit : key.unit;
  };
  const digitsOf = (key, value) => {
    const how = others[key.unit]?.[unitOf(key)];
    if (!how) return digits(value, key.decimals);
    const number = 'over' in how ? how.over / value : value / how.divide;
    return digits(Number(number.toPrecision(CONVERTED_DIGITS)));
  };
  const withUnit = (text, key) => `${text}${['', '°'].includes(unitOf(key)) ? '' : NARROW}${unitOf(key)}`; // degrees close up
  const shown = (key, value) => {
    if (value === null || value === undefined) return 'none';
    if (typeof value === 'boolean') return value ? 'yes' : 'no';
    if (typeof value === 'string') return value;
    const list = Array.isArray(value) ? value : [value];
    return withUnit(list.map((one) => digitsOf(key, one)).join(key.kind === 'interval' ? ' to ' : ', '), key);
  };
  return { units, unitOf, digitsOf, shown, plain, stepped, limit, as: (more) => createQuantities({ other_units: others, family_choice: choice }, { ...units, ...more }) };
}

function digits(value, decimals = 0) {
  const text = decimal(Math.abs(value));
  const places = (text.split('.')[1] ?? '').length;
  const full = places < decimals && !text.includes('e') ? Math.abs(value).toFixed(decimals) : text;
  return `${value < 0 ? MINUS : ''}${full}`;
}

// As Python writes it: powers of ten below 0.0001 and from 10^16 on.
function decimal(value) {
  if (value === 0 || (value >= 1e-4 && value < 1e16)) return String(value);
  const [mantissa, exponent] = value.toExponential().split('e');
  return `${mantissa}e${exponent[0]}${exponent.slice(1).padStart(2, '0')}`;
}

// A first guess at a typed number, good enough to step from; nothing is computed with it.
function plain(text) {
  return Number.parseFloat(String(text).replace(MINUS, '-').replace(',', '.'));
}

function stepped(key, from, count, size, plan) {
  const step = size === 'finest' ? finest(key, plan) : stepOf(key, from);
  const places = Math.max(placesOf(from), placesOf(step));
  return Number((from + count * step).toFixed(Math.min(places, 12)));
}

function stepOf({ family, step }, from) {
  return family === 'pri' && from <= COARSE_ABOVE_US ? step / 10 : step;
}

// One count of the clock for times, a tenth of a step for the rest; counts have nothing finer than one.
function finest({ family, kind, unit, step }, plan) {
  if (kind === 'count') return step;
  if (unit === 'µs' && ['pri', 'time'].includes(family)) return Number((1 / plan.radar.clock_mhz).toPrecision(12));
  return step / 10;
}

function placesOf(value) {
  const [mantissa, exponent = '0'] = String(value).split('e');
  return Math.max(0, (mantissa.split('.')[1] ?? '').length - Number(exponent));
}

function limit(key, high) {
  const end = high ? key.highest : key.lowest;
  return `${key.label} ends at ${digits(end, key.decimals)}${key.unit ? `${NARROW}${key.unit}` : ''}.`;
}
