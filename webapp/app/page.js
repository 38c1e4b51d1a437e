// All parts of the page and how they are repainted: from the state after every edit, from an answer when one has come.

import { createAdding } from './adding.js';
import { copyAsSentence } from './copying.js';
import { createFindings } from './findings.js';
import { createKeysTable } from './keys-table.js';
import { createLooks } from './looks.js';
import { createNumbers, openField, setNumber, setText } from './number.js';
import { createPageBoxes } from './page-boxes.js';
import { createParagraph } from './paragraph.js';
import { createPictures } from './pictures.js';
import { createRefused } from './refused.js';
import { createSentence } from './sentence.js';
import { shownByKey, spoken } from './spoken.js';
import { createCautions } from './cautions.js';
import { stickWhenPassed } from './sticky.js';
import { createTarget } from './target.js';
import { createTitle } from './title.js';
import { createVerdict } from './verdict.js';

const at = (id) => document.getElementById(id);
const engineState = () => document.documentElement.dataset.engine;

export function createPage({ opening, keys, quantities, typed, state, hands, followed, point, ask, onOpen, choose }) {
  const numberFor = createNumbers();
  const looks = createLooks({ state, keys, quantities, typed, engineState });
  const sentence = createSentence({ grammar: opening.grammar, keys, quantities });
  const paragraph = createParagraph({ node: at('paragraph'), numberFor, act: (action, given) => hands.act(action, given) });
  const verdict = createVerdict(at('verdict'));
  const findings = createFindings(at('findings'), (name, text) => hands.act('remark', { finding: name, text }), onOpen);
  const refused = createRefused(at('refused'), hands.putBack);
  const title = createTitle(at('title'), { label: keys.of('title').label, longest: keys.of('title').longest, commit: (text) => hands.commit({ key: 'title', text }) });
  const pictures = createPictures({ chief: at('chief'), rest: at('figures'), items: opening.items, titles: opening.titles, apart: { 'every-pri': at('every-pri') }, onSeen: () => seen(), point, choose });
  const target = createTarget({ place: at('target'), followed, quantities, keys: opening.followed, engineState });
  const table = createKeysTable({ box: at('quantities'), place: at('quantities-tables'), keys, numberFor, commit: hands.commit });
  const adding = createAdding({ node: at('adding'), keys, hands });
  const boxes = createPageBoxes();
  const redraws = { running: false, wanted: false };
  let painted = 0;
  let painting = Promise.resolve();

  // Moving a number that has the focus makes it leave, which asks for another redraw in the middle of this one.
  function redraw() {
    redraws.wanted = true;
    if (redraws.running) return;
    redraws.running = true;
    while (redraws.wanted) {
      redraws.wanted = false;
      draw();
    }
    redraws.running = false;
  }

  function draw() {
    const said = spoken(sentence(state.now.plan), table.isOpen());
    paragraph.update(said);
    pictures.arrange(opening.order[state.now.plan.waveform.kind]);
    const shown = shownByKey(said);
    table.update(state.now.plan, shown);
    for (const number of document.querySelectorAll('.number')) if (keys.of(number.dataset.key)) setNumber(number, looks.look(number.dataset.key, shown.get(number.dataset.key)));
    adding.update(state.now.plan);
    const refusals = looks.refusals();
    refused.update(refusals);
    const stale = refusals.length ? `shows ${refusals.map(({ still }) => still).join(', ')}` : '';
    setText(at('findings-stale'), stale);
    at('findings-stale').hidden = !stale;
    pictures.stale(stale);
    title.update(state.now.plan.title);
    target.redraw();
    if (engineState() === 'failed') stop();
    boxes.update(state.now.plan);
    for (const node of [document.body, at('marking')]) node.dataset.marking = state.now.plan.marking ?? '';
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
  copyAsSentence(at('plan'));
  const cautions = createCautions(at('cautions'));
  stickWhenPassed({ place: at('plan-place'), plan: at('plan'), verdict: at('verdict'), verdictPlace: at('verdict-place'), refused: at('refused') });

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
      cautions.update(answer.cautions);
      target.answered(answer.target);
      painting = painting.then(() => pictures.show(answer.figures, count)).then(() => pictures.mark(painted));
      return painting.then(onScreen);
    },
    outdate: () => pictures.outdate(),
    look(answer) {
      target.answered(answer.target);
      painting = painting.then(() => pictures.look(answer.figures, painted));
      return painting.then(onScreen);
    },
    clear() {
      verdict.clear();
      target.answered(null);
      findings.clear();
      pictures.clear();
    },
  };
}

// What has been painted by now is on the screen once the next frame is out; a message comes after that frame, not in it.
function onScreen() {
  return new Promise((resolve) => {
    const { port1, port2 } = new MessageChannel();
    port1.onmessage = () => { port1.close(); resolve(); };
    requestAnimationFrame(() => port2.postMessage(null));
  });
}
