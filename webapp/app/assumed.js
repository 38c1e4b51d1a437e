// After PRFs were pasted over the opening example: which of its numbers the verdict still leans on, until each is changed.

import { valueAt } from './keys.js';

export function assumedText({ plan, opening, clauses, keys, quantities }) {
  const paths = clauses.flatMap(({ pieces }) => pieces).map(({ key }) => key).filter(Boolean);
  const records = new Map(paths.map((path) => [keys.of(path), path.replace(/\.\d+$/, '')]));
  const leaning = [...records].filter(([key, path]) => key.kind !== 'numbers' && same(valueAt(plan, path), valueAt(opening, path)));
  if (!leaning.length) return '';
  const words = leaning.map(([key, path]) => `${key.label.slice(0, 1).toLowerCase()}${key.label.slice(1)} ${quantities.shown(key, valueAt(plan, path))}`);
  return `Assumed until you say otherwise: ${words.join('; ')}.`;
}

function same(one, other) {
  return JSON.stringify(one) === JSON.stringify(other);
}
