// The value of one item of a link, for display: as link_items.py reads it, in binary numbers instead of exact ones.

const NUMBER = /^-?\d{1,40}(\.\d{1,40})?(e-?\d{1,3})?/;
const SURE_DIGITS = 15; // a conversion is rounded so that 2800 MHz is 2.8 GHz

// Undefined where it cannot be read.
export function readItem(key, text, { grammar, units }) {
  if (text === undefined) return undefined;
  if (text === 'none') return null;
  if (key.kind === 'flag') return text === 'yes';
  if (['text', 'choice'].includes(key.kind)) return decoded(text);
  const family = units.families[key.family] ?? { '': 1 };
  const read = (parts) => readList(key, parts, family, grammar.link_units);
  if (key.kind === 'interval') return read(text.split('..'));
  if (key.kind === 'numbers' || text.includes(',')) return read(text.split(','));
  return read([text])?.[0];
}

function decoded(text) {
  try {
    return decodeURIComponent(text);
  } catch {
    return text;
  }
}

// Numbers without a unit share the next one that has one.
function readList(key, parts, family, spellings) {
  const values = [];
  let unit = key.unit ? null : '';
  for (const part of [...parts].reverse()) {
    const digits = part.match(NUMBER)?.[0];
    const spelled = digits === undefined ? '' : part.slice(digits.length);
    if (spelled) unit = spellings[spelled] ?? spelled;
    if (digits === undefined || !(unit in family)) return undefined;
    values.unshift(inKeyUnit(key, Number(digits), unit, family));
  }
  return values;
}

function inKeyUnit(key, value, unit, family) {
  if (unit === key.unit) return value;
  const frequency = key.family === 'pri' && unit.endsWith('Hz');
  const converted = frequency ? 1 / (value * family[unit]) / family[key.unit] : (value * family[unit]) / family[key.unit];
  return Number(converted.toPrecision(SURE_DIGITS));
}
