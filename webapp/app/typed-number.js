// A first guess at a typed number, in the plan's unit: good enough to step from or to hold against a limit. What is computed
// comes from the core, which reads the same text exactly.

const NUMBER = /^\s*([+\-\u2212]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:e[+-]?\d+)?)\s*(.*?)\s*$/is;

export function createTyped({ families, spellings, alone }, quantities) {
  const unitIn = (text, family, name) => {
    const one = alone[name]?.[text] ?? text;
    return [one, spellings[one], spellings[one.toLowerCase()]].find((unit) => unit in family);
  };
  // Undefined where it cannot be read.
  return (key, text) => {
    const [, number, word] = String(text).match(NUMBER) ?? [];
    if (number === undefined || !key) return undefined;
    const family = families[key.family] ?? {};
    const unit = word ? unitIn(word, family, key.family) : quantities.unitOf(key);
    const value = Number(number.replace('\u2212', '-').replace(',', '.'));
    return Number.isFinite(value) ? inPlanUnit(key, value, unit, family) : undefined;
  };
}

function inPlanUnit(key, value, unit, family) {
  if (unit === key.unit) return value;
  if (!(unit in family)) return undefined;
  const base = value * family[unit];
  const over = key.family === 'pri' && unit.endsWith('Hz');
  const converted = (over ? 1 / base : base) / family[key.unit];
  return Number.isFinite(converted) ? Number(converted.toPrecision(12)) : undefined;
}
