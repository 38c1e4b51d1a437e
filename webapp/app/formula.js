// A formula of the workings, set as it is read aloud: letters in italics, subscripts and superscripts where they belong.
// Knows how the core writes formulas as text (`v_b`, `p^k`, `Σ_{k≥M}`), nothing of what they mean.

const TOKEN = /_\{([^}]*)\}|_([A-Za-z0-9]+)|\^\(([^)]*)\)|\^([A-Za-z0-9]+)|(S\/N|k?m\/[sh])|([0-9][0-9.]*\s?K\b)|([A-Za-zα-ωΓ-Ω]+)/gu;
const UPRIGHT = new Set(['a', 'A', 'I', 'dB', 'Hz', 'ms', 'Σ', 'π', 'of']);
const GREEK = /[α-ω]/u;
const NAMED = /^([^=]{1,40}?)( [=≤≥<>] )/u; // what stands before a sign of equality is a name or a formula

// Nodes for a whole formula: every single letter in it is a quantity.
export function formula(text) {
  return pieces(text).map(node);
}

// Nodes for numbers that were put in, or that came out: only what stands before "=" is a formula; units stay upright.
export function putIn(text) {
  const nodes = [];
  text.split('; ').forEach((part, i) => {
    if (i) nodes.push('; ');
    let rest = part;
    for (let found = NAMED.exec(rest); found; found = NAMED.exec(rest)) {
      nodes.push(...formula(found[1]), found[2]);
      rest = rest.slice(found[0].length);
    }
    nodes.push(rest);
  });
  return nodes;
}

function pieces(text) {
  const found = [];
  let at = 0;
  for (const match of text.matchAll(TOKEN)) {
    if (match.index > at) found.push({ text: text.slice(at, match.index) });
    found.push(...piece(match));
    at = match.index + match[0].length;
  }
  return at < text.length ? [...found, { text: text.slice(at) }] : found;
}

function piece([whole, subBraced, sub, supBraced, sup, ratio, kelvin, letters]) {
  const low = subBraced ?? sub;
  const high = supBraced ?? sup;
  if (low !== undefined) return [{ tag: 'sub', inner: low.length > 3 && !subBraced ? [{ text: low }] : pieces(low) }];
  if (high !== undefined) return [{ tag: 'sup', inner: pieces(high) }];
  return ratio || kelvin ? [{ text: whole }] : quantities(letters);
}

// A sentence may begin with A, and no quantity here is called so. Letters without a space between them are one quantity after another (`cT`, `qτ`); a word is a word.
function quantities(letters) {
  if (UPRIGHT.has(letters)) return [{ text: letters }];
  const product = letters.length === 1 || (letters.length === 2 && /^[a-z][A-Z]$/.test(letters)) || (letters.length < 4 && GREEK.test(letters));
  if (!product) return [{ text: letters }];
  return [...letters].map((letter) => (UPRIGHT.has(letter) ? { text: letter } : { tag: 'i', inner: [{ text: letter }] }));
}

function node({ text, tag, inner }) {
  if (!tag) return text;
  const made = document.createElement(tag);
  made.append(...inner.map(node));
  return made;
}
