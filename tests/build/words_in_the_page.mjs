// The page's own reader of links and its own words for a plan, run on cases from standard input; answers as JSON.

import { readFileSync } from 'node:fs';
import { createKeys } from '../../webapp/app/keys.js';
import { openedPlan } from '../../webapp/app/link.js';
import { createQuantities } from '../../webapp/app/quantities.js';
import { createSentence } from '../../webapp/app/sentence.js';

const { opening, sentences, links } = JSON.parse(readFileSync(0, 'utf8'));
const keys = createKeys(opening.keys);

function words({ plan, units }) {
  const quantities = createQuantities(opening.grammar, units);
  const clauses = createSentence({ grammar: opening.grammar, keys, quantities })(plan);
  return clauses.map(({ pieces }) => pieces.map(plain).join('').trim()).join(' ');
}

function plain(piece) {
  if (piece.rail) return `${piece.rail.map((cell) => cell.map(plain).join(', ')).join('; ')}.`;
  return piece.do ? '' : `${piece.before ?? ''}${piece.shown ?? piece.text}${piece.after ?? ''}`;
}

console.log(JSON.stringify({
  sentences: sentences.map(words),
  links: await Promise.all(links.map((link) => openedPlan(link, opening))),
}));
