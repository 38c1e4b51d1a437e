// All parts of the page and how they are repainted: from the state after every edit, from an answer when one has come.

import { createFindings } from './findings.js';
import { createKeysTable } from './keys-table.js';
import { createLooks } from './looks.js';
import { createNumbers, setNumber, setText } from './number.js';
import { createParagraph } from './paragraph.js';
import { createPictures } from './pictures.js';
import { createRefused } from './refused.js';
import { createSentence } from './sentence.js';
import { stickWhenPassed } from './sticky.js';
import { createTitle } from './title.js';
import { createVerdict } from './verdict.js';

const at = (id) => document.getElementById(id);

export function createPage({ opening, keys, quantities, state, hands, ask, act }) {
  const numberFor = createNumbers();
  const looks = createLooks({ state, keys, quantities, engineState: () => document.documentElement.dataset.engine });
  const sentence = createSentence(opening, quantities);
  const paragraph = createParagraph({ node: at('paragraph'), numberFor, act });
  const verdict = createVerdict(at('verdict'));
  const findings = createFindings(at('findings'), (name, text) => hands.commit({ key: `remarks.${name}`, text }));
  const refused = createRefused(at('refused'), hands.putBack);
  const title = createTitle(at('title'), { longest: keys.of('title').highest, commit: (text) => hands.commit({ key: 'title', text }) });
  const pictures = createPictures({ chief: at('chief'), rest: at('figures'), items: opening.items, onSeen: () => seen() });
  const table = createKeysTable({ box: at('quantities'), place: at('quantities-tables'), keys, numberFor, commit: hands.commit, give: hands.give });
  let painted = 0;
  let painting = Promise.resolve();

  function redraw() {
    const said = sentence.clauses(state.now.plan, table.isOpen());
    paragraph.update(said);
    const shown = new Map(said.flatMap(({ pieces }) => pieces.flatMap((piece) => piece.cells ?? [piece])).filter(({ key }) => key).map(({ key, shown: text }) => [key, text]));
    table.update(state.now.plan, shown);
    for (const number of document.querySelectorAll('.number')) setNumber(number, looks.look(number.dataset.key, shown.get(number.dataset.key)));
    const refusals = looks.refusals();
    refused.update(refusals);
    const stale = refusals.length ? `shows ${refusals.map(({ still }) => still).join(', ')}` : '';
    setText(at('findings-stale'), stale);
    at('findings-stale').hidden = !stale;
    pictures.stale(stale);
    title.update(state.now.plan.title);
    setText(at('marking'), state.now.plan.marking ?? '');
    at('marking').hidden = !state.now.plan.marking;
  }

  function seen() {
    if (pictures.outdated(painted)) ask();
  }

  table.onToggle(redraw);
  stickWhenPassed({ place: at('plan-place'), plan: at('plan'), verdict: at('verdict'), verdictPlace: at('verdict-place') });

  return {
    redraw,
    pictures,
    shown: (path) => (keys.of(path) ? looks.look(path).shown : ''),
    bringIntoSight(path) {
      const number = path && document.querySelector(`[data-key="${CSS.escape(path)}"]`);
      number?.scrollIntoView({ block: 'nearest' });
    },
    // Words at once; figures one answer after the other, each in its own frame.
    paint(answer, count) {
      painted = count;
      verdict.update(answer.verdict);
      findings.update(answer.findings);
      pictures.arrange(Object.keys(opening.items), answer.plan);
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

function nextFrame() {
  return new Promise((resolve) => { requestAnimationFrame(() => requestAnimationFrame(resolve)); });
}
