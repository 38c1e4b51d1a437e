// Numbers as the page shows and steps them, as shown.py does before the core is there: the shortest decimal that reads back
// the same, in the reader's unit. Only display: what a typed text means is the core's to say.

import { finestOf, stepOf, stepped } from './steps.js';

const MINUS = '\u2212';
const NARROW = '\u202f';
const TYPED_DIGITS = 6; // so near to so many digits it was typed in the shown unit, and stands as it was typed
const TYPED_WITHIN = 1e-11;

export function createQuantities(grammar, units) {
  const { other_units: others, family_choice: choice, figures } = grammar;
  const unitOf = (key) => {
    const wanted = units[choice[key.family]];
    const unit = wanted === 'us' ? 'µs' : wanted;
    return others[key.unit]?.[unit] ? unit : key.unit;
  };
  const howOf = (key) => others[key.unit]?.[unitOf(key)];
  const inShown = (key, value) => {
    const how = howOf(key);
    if (!how) return value;
    return rounded('over' in how ? how.over / value : value / how.divide, figures[choice[key.family]]);
  };
  const digitsOf = (key, value) => (howOf(key) ? digits(inShown(key, value)) : digits(value, key.decimals));
  // The other way: what a number on an axis is in the plan's unit.
  const fromShown = (key, value) => Number((value * (howOf(key)?.divide ?? 1)).toPrecision(12));
  const withUnit = (text, key) => `${text}${['', '°'].includes(unitOf(key)) ? '' : NARROW}${unitOf(key)}`; // degrees close up
  const shown = (key, value) => {
    if (value === null || value === undefined) return 'none';
    if (typeof value === 'boolean') return value ? 'yes' : 'no';
    if (typeof value === 'string') return key.words?.[key.choices.indexOf(value)] ?? value;
    const list = Array.isArray(value) ? value : [value];
    return withUnit(list.map((one) => digitsOf(key, one)).join(key.kind === 'interval' ? ' to ' : ', '), key);
  };
  // Arrow steps are of the unit that is shown; `size` is 'step' or 'finest'.
  const step = (key, from, count, size, plan) => stepped({ key, how: howOf(key), figures: figures[choice[key.family]], shown: inShown(key, from), from, count, finest: size === 'finest', plan });
  return { units, unitOf, digitsOf, fromShown, shown, stepped: step, stepOf, finestOf, limit, as: (more) => createQuantities(grammar, { ...units, ...more }) };
}

function rounded(number, figures) {
  const typed = Number(number.toPrecision(TYPED_DIGITS));
  if (Math.abs(number - typed) <= TYPED_WITHIN * Math.abs(number)) return typed;
  const places = Math.max(0, figures - 1 - Math.floor(Math.log10(Math.abs(number))));
  return Number(number.toFixed(Math.min(places, 100)));
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

function limit(key, high) {
  const end = high ? key.highest : key.lowest;
  return `${key.label} ends at ${digits(end, key.decimals)}${key.unit ? `${NARROW}${key.unit}` : ''}.`;
}
