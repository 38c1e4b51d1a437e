// The smallest parts of the sentence: a live number, a list of them, neighbouring texts joined.

import { valueAt } from './keys.js';

export function numberPiece(path, plan, { keys, quantities }, bare = false) {
  const [key, value] = [keys.of(path), valueAt(plan, path) ?? null];
  if (typeof value === 'string') return { text: value.slice(0, 1).toUpperCase() + value.slice(1) };
  return { key: path, shown: bare && value !== null ? quantities.digitsOf(key, value) : quantities.shown(key, value) };
}

export function listPieces(path, plan, context) {
  const count = valueAt(plan, path).length;
  return Array.from({ length: count }, (_, i) => i).flatMap((i) => [
    ...(i ? [{ text: i === count - 1 ? ' and ' : ', ' }] : []),
    numberPiece(`${path}.${i}`, plan, context, i < count - 1),
  ]);
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
