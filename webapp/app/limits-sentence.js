// The limits of the search as a sentence on the page: text, live numbers, choices in the line, words that add a limit.
// Draws what the core has written in pieces; each number stays the same element, so that the focus outlives every answer.

import { quietButton } from './fields.js';
import { createNumbers, setNumber } from './number.js';
import { lay } from './paragraph.js';

export function createLimitsSentence({ node, wants, refused, limits, keys }) {
  const numberFor = createNumbers();
  const choices = new Map();
  const words = new Map();

  function nodeFor(piece) {
    if (piece.key) return numberFor(piece.key);
    if (piece.choice) return choiceFor(piece);
    if (piece.set || piece.do) return wordFor(piece);
    return piece.text;
  }

  function choiceFor({ choice, value, options }) {
    if (!choices.has(choice)) {
      const select = document.createElement('select');
      select.className = 'in-line';
      select.setAttribute('aria-label', keys.of(choice).label);
      select.append(...options.map(([name, text]) => new Option(text, name)));
      select.addEventListener('change', () => limits.commit({ key: choice, value: select.value }));
      choices.set(choice, select);
    }
    const select = choices.get(choice);
    if (select.value !== value) select.value = value;
    return select;
  }

  function wordFor({ set, value, text, do: action }) {
    const name = set ?? action;
    if (!words.has(name)) words.set(name, { value, button: quietButton(text, null, () => (set ? limits.commit({ key: set, value: words.get(name).value }) : limits.asPlan())) });
    words.get(name).value = value;
    return words.get(name).button;
  }

  return {
    draw() {
      const { said } = limits.now;
      lay(node, joined(said.pieces).map(nodeFor));
      for (const { key } of said.pieces.filter((piece) => piece.key)) setNumber(numberFor(key), limits.look(key));
      wants.textContent = said.wants;
      refused.update([
        ...limits.now.refused.map(({ key, message }) => ({ key, label: keys.of(key).label, message, still: limits.now.said.pieces.find((piece) => piece.key === key)?.shown })),
        ...(said.blocked ? [{ key: '', label: '', message: said.blocked, still: '' }] : []),
      ]);
    },
  };
}

// Neighbouring texts are one, so that a line of them can break and be read as a whole.
function joined(pieces) {
  const out = [];
  for (const piece of pieces) {
    if ('text' in piece && !piece.set && !piece.do && out.at(-1)?.isText) out.at(-1).text += piece.text;
    else out.push('text' in piece && !piece.set && !piece.do ? { text: piece.text, isText: true } : piece);
  }
  return out;
}
