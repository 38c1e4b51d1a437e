// The smallest parts of the sentence: a live number, a list of them, neighbouring texts joined.

import { valueAt } from './keys.js';

const UNNAMED = 'what has no name';

// `how` is 'bare' (no unit), 'no' (a count that is "no" when it is nought) or 'name' (a text as it was typed).
export function numberPiece(path, plan, { keys, quantities }, how = '') {
  const [key, value] = [keys.of(path), valueAt(plan, path) ?? null];
  if (key.kind === 'choice') return { text: quantities.shown(key, value) };
  if (typeof value === 'string') return { key: path, shown: how === 'name' ? value || UNNAMED : capital(value || UNNAMED) };
  if (how === 'no' && value === 0) return { key: path, shown: 'no' };
  return { key: path, shown: how === 'bare' && value !== null ? quantities.digitsOf(key, value) : quantities.shown(key, value) };
}

export function listPieces(path, plan, context) {
  const count = valueAt(plan, path).length;
  return Array.from({ length: count }, (_, i) => i).flatMap((i) => [
    ...(i ? [{ text: i === count - 1 ? ' and ' : ', ' }] : []),
    numberPiece(`${path}.${i}`, plan, context, i < count - 1 ? 'bare' : ''),
  ]);
}

function capital(text) {
  return text.slice(0, 1).toUpperCase() + text.slice(1);
}

export function joined(pieces) {
  const out = [];
  for (const piece of pieces) {
    const isText = Object.keys(piece).length === 1 && 'text' in piece;
    if (isText && out.length && Object.keys(out.at(-1)).length === 1 && 'text' in out.at(-1)) out.push({ text: out.pop().text + piece.text });
    else if (piece.text !== '') out.push(piece);
  }
  return out;
}
