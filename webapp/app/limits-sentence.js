// The limits of the search as a sentence on the page: text, live numbers, choices in the line, words that add a limit.
// Draws what the core has written in pieces; each number stays the same element, so that the focus outlives every answer.

import { quietButton } from './fields.js';
import { createNumbers, setNumber } from './number.js';
import { lay } from './paragraph.js';

export function createLimitsSentence({ node, offers, wants, refused, limits, keys }) {
  const numberFor = createNumbers();
  const choices = new Map();
  const words = new Map();

  function nodeFor(piece) {
    if (piece.key) return numberFor(piece.key);
    if (piece.choice) return choiceFor(piece);
    if (piece.set || piece.do) return wordFor(piece);
    return piece.text;
  }

  function choiceFor({ choice, value, options, tail }) {
    if (!choices.has(choice)) {
      const whole = document.createElement('span');
      whole.className = 'kept';
      const select = document.createElement('select');
      select.className = 'in-line';
      select.setAttribute('aria-label', keys.of(choice).label);
      select.append(...options.map(([name, text]) => new Option(text, name)));
      select.addEventListener('change', () => limits.commit({ key: choice, value: select.value }));
      choices.set(choice, { whole, select });
    }
    const { whole, select } = choices.get(choice);
    if (select.value !== value) select.value = value;
    lay(whole, [select, tail]);
    return whole;
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
      const isOffer = (piece) => Boolean(piece.set ?? piece.do);
      lay(node, joined(said.pieces.filter((piece) => !isOffer(piece))).map(nodeFor));
      lay(offers, said.pieces.filter(isOffer).map(nodeFor));
      for (const { key } of said.pieces.filter((piece) => piece.key)) setNumber(numberFor(key), limits.look(key));
      wants.textContent = said.wants;
      refused.update([
        ...limits.now.refused.map(({ key, message }) => ({ key, label: keys.of(key).label, message, still: limits.now.said.pieces.find((piece) => piece.key === key)?.shown })),
        ...(said.blocked ? [{ key: '', label: '', message: said.blocked, still: '' }] : []),
      ]);
    },
  };
}

// Neighbouring texts are one; the sign after a choice stays on its line.
function joined(pieces) {
  const out = [];
  for (const piece of pieces) {
    const last = out.at(-1);
    if (piece.text === undefined) out.push({ ...piece, tail: '' });
    else if (last?.choice && !last.tail && /^[,.]/.test(piece.text)) {
      last.tail = piece.text.slice(0, 1);
      out.push({ text: piece.text.slice(1) });
    } else if (last?.text !== undefined) last.text += piece.text;
    else out.push({ text: piece.text });
  }
  return out;
}
