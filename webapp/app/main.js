// The composition root: the only file that knows every part. A hand commits an edit to the state, the state is asked of the
// engine, the answer is painted; nothing flows the other way.

import { createAddress } from './address.js';
import { createAsking } from './asking.js';
import { createComparison } from './compare.js';
import { createConventions } from './conventions.js';
import { listenToDragging } from './dragging.js';
import { newestOf, startEngine } from './engine.js';
import { enlarge, sizes } from './figures.js';
import { createFollowed, handsFor } from './followed.js';
import { createHandOver } from './hand-over.js';
import { createFinder } from './finder.js';
import { createHands } from './hands.js';
import { createHead } from './head.js';
import { createKeeping } from './keeping.js';
import { createKeys } from './keys.js';
import { eitherHands } from './limits.js';
import { openedPlan } from './link.js';
import { createMeeting } from './meeting.js';
import { createOpenedFindings } from './opened-findings.js';
import { createOwnTable } from './own-table.js';
import { createPage } from './page.js';
import { createPaper } from './paper.js';
import { packedPart } from './payload.js';
import { createPoint } from './point.js';
import { createQuantities } from './quantities.js';
import { flipped } from './quiet.js';
import { createSitting } from './sitting.js';
import { createState } from './state.js';
import { createStatus } from './status.js';
import { followScheme } from './scheme.js';
import { createStrip } from './strip.js';
import { createTravel } from './travel.js';
import { createTyped } from './typed-number.js';
import { listenToTyping } from './typing.js';
import { createUnits } from './units.js';
import { createUnitsLine } from './units-line.js';
import { createView } from './view.js';

const root = document.documentElement;
const opening = JSON.parse(document.getElementById('opening').textContent);
const keys = createKeys(opening.keys);
const units = createUnits(opening.units);
const quantities = createQuantities(opening.grammar, units.now);
const typed = createTyped(opening.units, quantities);
const status = createStatus(document.getElementById('status'));
const state = createState(opening.answer.plan);
const view = createView();
const address = createAddress(openLink);
const hands = createHands({ state, keys, quantities, typed, status, families: opening.units.families, redraw: () => page.redraw(), onAnswered: (count, act) => waiting.push({ count, act }), focus: (path, typing) => page.focus(path, typing) });
const lazily = { ask: (...given) => engine.ask(...given) }; // it starts below
const followed = createFollowed({ keys: opening.followed, view, state, quantities, typed, engine: lazily, status, redraw: () => page.redraw() });
const point = createPoint({ view, state, quantities, followed, keys: opening.followed, engine: lazily, show: (name, text) => page.pictures.read(name, text) });
const page = createPage({ opening, keys, quantities, typed, state, hands, followed, point, choose: view.choose, ask: () => asking.ask(), onOpen: (name, shows) => (shows ? opened.open(name, shows) : opened.close(name)) });
const travel = createTravel({ state, status, page, buttons: { undo: document.getElementById('undo'), redo: document.getElementById('redo') } });
const head = createHead({ opening, state, status, address, hands, page, keys, quantities, isOpening: () => asking.isOpening(), openExample, print: () => paper.printNow() });
const comparison = createComparison();
const keeping = createKeeping({ state, status, address, comparison });
let findings = opening.answer.findings;
let beforeRun = null; // the findings before the run of edits that is going on
let isKept = false; // whether these are the kept plan's
let waiting = []; // what is to be done when the answer to an edit stands on the page

// The engine waits until the note is painted: on a busy machine both would be late.
let painted = null;
const first = new Promise((resolve) => { painted = resolve; });
const engine = startEngine({ payload: (name) => first.then(() => packedPart(name)), onFail: failed });
const asking = createAsking({ engine, state, view, figures: page.pictures.visible, sizes, units: () => ({ ...units.now }), onLate: head.late, onAnswer: answered, onLook: looked, onFault: fault });
const finder = createFinder({ opening, engine, more: () => startEngine(), newest: newestOf(engine.ask), plan: () => state.now.plan, pending: () => state.now.pending.length > 0, quantities, typed, units: () => ({ ...units.now }), status, take: takePlan });
const allHands = handsFor(eitherHands(hands, finder.limits, finder.owns), followed);

const given = { engine, plan: () => state.now.plan, units: () => quantities.units, isBusy: () => state.now.pending.length > 0 || asking.isOpening() };
const opened = createOpenedFindings(given);
const handOver = createHandOver({ ...given, status, opened: opening.answer.plan });
const onRequest = [opened, handOver, createConventions(given), createOwnTable(given)]; // worked out when the edits pause
const sitting = createSitting({ ...given, state, status, whole: address.whole, keep: keeping.keep, first: opening.answer.plan });
const paper = createPaper({ items: opening.items, figures: opening.answer.figures, engine, engineState: () => root.dataset.engine, names: printedFigures, shown, write: page.pictures.write, status });

// How a link says that the page is to be shown; where it says nothing, the page stays as it is.
function shownAs(text) {
  return Object.fromEntries([...new URLSearchParams(text)].filter(([item]) => item === 'theme' || item === 'present'));
}

function shownFigures() {
  return opening.order[state.now.plan.waveform.kind];
}

// Those that stand elsewhere in the note are printed where they are shown.
function printedFigures() {
  return [...document.querySelectorAll('figure[data-figure]')].filter((figure) => !figure.closest('[hidden]')).map((figure) => figure.dataset.figure);
}

function actionsOf(...pairs) {
  return Object.fromEntries(pairs.map((pair) => pair.split(':')).map(([name, id]) => [name, document.getElementById(id)]));
}

// All that the figures depend on, as a request and as a stamp to tell one state of the note from another.
function shown() {
  const chosen = Object.entries(view.now).filter(([name, value]) => value !== null && !['theme', 'present'].includes(name)); // those change no figure
  const request = { plan: state.now.plan, units: { ...units.now }, view: Object.fromEntries(chosen) };
  return { request, stamp: JSON.stringify(request) };
}

function answered(answer, request) {
  const isOther = request.opened || isKept !== Boolean(state.now.aside);
  tellFlipped(isOther ? null : findings, answer.findings);
  findings = answer.findings;
  isKept = Boolean(state.now.aside);
  const told = answer.refused.filter(({ edit }) => edit.text === undefined || edit.do).map(({ message }) => message);
  if (answer.said.length + told.length) status.say([...told, ...answer.said].join(' '));
  for (const { act } of waiting.filter(({ count }) => count <= request.count)) act();
  waiting = waiting.filter(({ count }) => count > request.count);
  if (request.opened !== null) {
    view.adopt({ target: answer.opened.target, ...answer.opened.choices });
    head.opened(answer);
    handOver.opened(answer.plan);
    if (answer.kept) state.keep(answer.kept.plan);
  }
  if (!state.now.aside) present(answer, request);
  if (request.deep) onRequest.forEach((part) => part.refresh());
  finder.follow();
  const shown = state.committed(request.count);
  paper.changed();
  page.paint(answer, request.count).then(() => { root.dataset.shown = Math.max(shown, Number(root.dataset.shown)); });
}

// After a run of edits: what flipped since it began, and nothing where another plan was opened.
function tellFlipped(before, after) {
  beforeRun = before && (beforeRun ?? before);
  status.sayWhenQuiet(flipped(beforeRun, after), () => { beforeRun = null; });
}

// What holds of the present plan only, not of the kept one while that is shown.
function present(answer, request) {
  head.answered(answer);
  address.show(answer.link);
  comparison.update(answer.kept);
  sitting.answered(answer, request);
}

function looked(answer) {
  if (!state.now.aside) {
    head.answered(answer);
    address.show(answer.link);
  }
  page.look(answer).then(() => { root.dataset.looked = Number(root.dataset.looked ?? 0) + 1; });
}

function fault(error) {
  if (root.dataset.engine !== 'failed') status.say(`This could not be computed: ${error.message}`, ['Undo', travel.undo]);
}

function failed(reason) {
  root.dataset.engine = 'failed';
  head.failed(reason);
  page.redraw();
}

// A link stands as a sentence at once; its numbers come from the engine, never from another plan.
async function openLink(text, name = 'The link') {
  const plan = await readLink(text);
  state.open(plan ?? state.now.plan, name);
}

async function readLink(text) {
  units.fromLink(text);
  view.adopt({ target: null, zoom: null, axis: null, up: null });
  view.adopt(shownAs(text));
  theme.update();
  page.clear();
  asking.open(text);
  return openedPlan(text, opening);
}

function openExample({ link, title }) {
  address.add(link);
  openLink(link, title);
}

// A plan as a whole: one step of undo, one entry of the history.
function takePlan(plan, link, name) {
  if (link) address.add(link);
  state.open(plan, name);
}

state.watch((cause) => {
  view.now.kept = state.now.aside ? null : state.now.kept;
  page.redraw();
  keeping.update();
  if (cause === 'resting') return keeping.rests();
  if (cause === 'flip' || cause === 'kept') page.outdate();
  travel.update();
  head.update();
  if (cause !== 'answer') [opened, handOver].forEach((part) => part.wait());
  meeting.update();
  if (cause === 'travel') asking.open(null);
  if (cause !== 'answer') asking.ask();
  return null;
});

view.watch((name, before) => {
  if (name === 'target') asking.look();
  else if (name === 'zoom') asking.look(point.changed(before));
  else asking.ask();
});
units.watch(() => {
  page.outdate();
  page.redraw();
  head.update();
  asking.ask();
  finder.relist();
});
createUnitsLine({ button: document.getElementById('units'), line: document.getElementById('units-line'), units });

const wasDragged = listenToDragging(document.body, allHands);
const strip = createStrip(document.getElementById('strip'), allHands);
listenToTyping(document.body, { ...allHands, wasDragged, strip });
const theme = followScheme({ button: document.getElementById('theme'), view });
const meeting = createMeeting({ view, names: shownFigures, enlarge, status, ask: () => asking.ask(), actions: actionsOf('enter:meeting', 'earlier:earlier-figure', 'later:later-figure', 'place:figure-place') });
page.redraw();
head.update();

async function begin() {
  root.dataset.engine = 'starting';
  if (address.opened) state.begin(await readLink(address.opened) ?? opening.answer.plan);
  else await page.paint(opening.answer, 0);
  painted();
  paper.changed();
  await engine.ready;
  root.dataset.engine = 'ready';
  paper.changed();
  page.redraw();
  finder.follow();
  head.update();
  handOver.refresh();
}

begin().catch(() => {}); // a failed start is told by onFail
