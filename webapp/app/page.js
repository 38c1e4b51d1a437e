// All parts of the page and how they are repainted: from the state after every edit, from an answer when one has come.

import { createFindings } from './findings.js';
import { createKeysTable } from './keys-table.js';
import { createLooks } from './looks.js';
import { createNumbers, openField, setNumber, setText } from './number.js';
import { createParagraph } from './paragraph.js';
import { createPictures } from './pictures.js';
import { createRefused } from './refused.js';
import { createSentence } from './sentence.js';
import { stickWhenPassed } from './sticky.js';
import { createTitle } from './title.js';
import { createVerdict } from './verdict.js';

const at = (id) => document.getElementById(id);
const engineState = () => document.documentElement.dataset.engine;

export function createPage({ opening, keys, quantities, state, hands, ask }) {
  const numberFor = createNumbers();
  const looks = createLooks({ state, keys, quantities, engineState });
  const sentence = createSentence({ grammar: opening.grammar, keys, quantities });
  const paragraph = createParagraph({ node: at('paragraph'), numberFor, act: (action) => hands.act(action) });
  const verdict = createVerdict(at('verdict'));
  const findings = createFindings(at('findings'), (name, text) => hands.act('remark', { finding: name, text }));
  const refused = createRefused(at('refused'), hands.putBack);
  const title = createTitle(at('title'), { longest: keys.of('title').longest, commit: (text) => hands.commit({ key: 'title', text }) });
  const pictures = createPictures({ chief: at('chief'), rest: at('figures'), items: opening.items, onSeen: () => seen() });
  const table = createKeysTable({ box: at('quantities'), place: at('quantities-tables'), keys, numberFor, commit: hands.commit });
  let painted = 0;
  let painting = Promise.resolve();

  function redraw() {
    const said = withActions(sentence(state.now.plan)).map((clause) => (table.isOpen() && clause.id === 'also' ? asText(clause) : clause));
    paragraph.update(said);
    const pieces = said.flatMap((clause) => clause.pieces).flatMap((piece) => piece.rail?.flat() ?? [piece]);
    const shown = new Map(pieces.filter(({ key }) => key).map(({ key, shown: text }) => [key, text]));
    table.update(state.now.plan, shown);
    for (const number of document.querySelectorAll('.number')) setNumber(number, looks.look(number.dataset.key, shown.get(number.dataset.key)));
    const refusals = looks.refusals();
    refused.update(refusals);
    const stale = refusals.length ? `shows ${refusals.map(({ still }) => still).join(', ')}` : '';
    setText(at('findings-stale'), stale);
    at('findings-stale').hidden = !stale;
    pictures.stale(stale);
    title.update(state.now.plan.title);
    if (engineState() === 'failed') stop();
    setText(at('marking'), state.now.plan.marking ?? '');
    at('marking').hidden = !state.now.plan.marking;
  }

  // Without an engine nothing can be changed: what could be typed into is plain text from now on.
  function stop() {
    title.stop();
    for (const field of document.querySelectorAll('#first-line *, #quantities-tables :is(input, select)')) field.disabled = true;
  }

  function seen() {
    if (pictures.outdated(painted)) ask();
  }

  table.onToggle(redraw);
  stickWhenPassed({ place: at('plan-place'), plan: at('plan'), verdict: at('verdict'), verdictPlace: at('verdict-place') });

  return {
    redraw,
    pictures,
    said: () => sentence(state.now.plan),
    shown: (path) => (keys.of(path) ? looks.look(path).shown : ''),
    focus(path, typing) {
      const number = document.querySelector(`[data-key="${CSS.escape(path)}"]`);
      if (number && typing) openField(number);
      else number?.focus();
    },
    bringIntoSight(path) {
      const number = path && document.querySelector(`[data-key="${CSS.escape(path)}"]`);
      number?.scrollIntoView({ block: 'nearest' });
    },
    // Words at once; figures one answer after the other, each in its own frame.
    paint(answer, count) {
      painted = count;
      verdict.update(answer.verdict);
      findings.update(answer.findings);
      pictures.arrange(opening.order[answer.plan.waveform.kind]);
      painting = painting.then(() => pictures.show(answer.figures, count));
      return painting.then(nextFrame);
    },
    clear() {
      verdict.clear();
      findings.clear();
      pictures.clear();
    },
  };
}

// A rail has its own actions; shorter plans get the way to one more PRI at their end.
function withActions(clauses) {
  const rail = clauses.some(({ pieces }) => pieces.some((piece) => piece.rail));
  const add = { id: 'add', short: false, pieces: [{ do: 'add-pri', text: 'Add a PRI' }] };
  const also = clauses.findIndex(({ id }) => id === 'also');
  return rail ? clauses : clauses.toSpliced(also < 0 ? clauses.length : also, 0, add);
}

// A number that is off its default stands in the open table; the line above then names it without being a second one.
function asText({ pieces, ...clause }) {
  return { ...clause, pieces: pieces.map(({ shown, text }) => ({ text: shown ?? text })) };
}

function nextFrame() {
  return new Promise((resolve) => { requestAnimationFrame(() => requestAnimationFrame(resolve)); });
}
