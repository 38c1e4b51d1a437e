// The Also line: what is off its default and stands nowhere else in the paragraph, so that nothing is hidden.

import { valueAt } from './keys.js';
import { numberPiece } from './pieces.js';

export function alsoPieces(plan, clauses, context) {
  const { grammar, keys, fill } = context;
  const own = grammar.also.filter(({ path, is }) => isSaid(valueAt(plan, path) ?? null, is));
  const items = own.map(({ text }) => fill(text, plan));
  const alive = [...clauses.map(({ pieces }) => pieces), ...items].flat().filter(({ key }) => key).map(({ key }) => key);
  const spoken = new Set([...alive, ...own.map(({ path }) => path)].map((path) => keys.of(path)));
  const off = keys.table.filter((key) => !spoken.has(key) && isOffDefault(key, plan, grammar));
  items.push(...off.map((key) => item(key, plan, context)));
  if (!items.length) return [];
  return [{ text: 'Also: ' }, ...items.flatMap((pieces, i) => (i ? [{ text: '; ' }, ...pieces] : pieces)), { text: '.' }];
}

function isSaid(value, is) {
  return is ? is.includes(value) : value !== null;
}

function isOffDefault(key, plan, { not_in_also: elsewhere, optional_records: optional, judged }) {
  if (!key.group || key.group === judged || key.path.includes('[]')) return false;
  if (elsewhere.some((name) => key.path === name || key.path.startsWith(`${name}.`))) return false;
  if (optional.some((name) => key.path.startsWith(`${name}.`) && (valueAt(plan, name) ?? null) === null)) return false;
  const value = valueAt(plan, key.path) ?? null;
  return JSON.stringify(value) !== JSON.stringify(key.default) && !(key.per_prf && Array.isArray(value));
}

function item(key, plan, context) {
  const label = key.label.slice(0, 1).toLowerCase() + key.label.slice(1);
  const value = valueAt(plan, key.path) ?? null;
  if (key.kind === 'choice') return [{ text: context.quantities.shown(key, value) }];
  if (value === true) return [{ text: label }];
  if (['number', 'count'].includes(key.kind) && value !== null) return [{ text: `${label} ` }, numberPiece(key.path, plan, context)];
  return [{ text: `${label} ${context.quantities.shown(key, value)}` }];
}
