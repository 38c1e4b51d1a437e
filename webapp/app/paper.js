// The figures as they are printed: drawn anew for paper while nobody edits, kept, and put into the page when it is printed.
// A print never shows a figure of another plan: what is not ready says so. *Print* and Ctrl+P wait; a browser's menu cannot.

import { drawing, placeFor } from './vectors.js';

const IDLE_MS = 8000; // after the last answer: who edits must not wait for a drawing that may never be printed
const LATE_MS = 400; // from here on it is said that the figures are being drawn
const TRIES = 4; // an edit in the middle begins again

export function createPaper({ items, figures, engine, engineState, names, shown, write, status }) {
  const first = shown().stamp;
  const kept = new Map();
  let timer = 0;
  let running = null;

  const isCurrent = (name) => kept.get(name)?.stamp === shown().stamp;
  const missing = () => names().filter((name) => !isCurrent(name) || (kept.get(name).coarse && engineState() === 'ready'));

  // Of the plan that the page opens with a figure's own document is the drawing; any other plan's the engine computes.
  async function make(name) {
    const { stamp, request } = shown();
    const size = { [name]: await placeFor(name, items[name]) };
    const coarse = engineState() !== 'ready';
    if (coarse && stamp !== first) return false;
    const picture = coarse ? figures[name] : (await engine.ask('note', { ...request, edits: [], figures: [name], size })).figures[name];
    if (shown().stamp !== stamp) return false;
    kept.set(name, { stamp, coarse, picture, svg: await drawing(name, coarse ? null : picture) });
    return true;
  }

  async function makeAll(pause) {
    for (let left = TRIES * names().length; left > 0 && missing().length; left -= 1) {
      await pause();
      if (!(await make(missing()[0])) && engineState() !== 'ready') return;
    }
  }

  function prepare(pause = () => {}) {
    running ??= makeAll(pause).catch(() => {}).finally(() => { running = null; });
    return running;
  }

  async function printNow() {
    const late = setTimeout(() => status.say('The figures are being drawn for paper …'), LATE_MS);
    if (shown().stamp !== first) await engine.ready.catch(() => {});
    await running;
    await prepare();
    clearTimeout(late);
    status.clear();
    print();
  }

  addEventListener('keydown', (event) => {
    if (event.key.toLowerCase() !== 'p' || !(event.ctrlKey || event.metaKey) || event.altKey || event.shiftKey) return;
    event.preventDefault();
    printNow();
  });
  addEventListener('beforeprint', () => names().forEach((name) => put(name, isCurrent(name) ? kept.get(name) : null, write)));
  addEventListener('afterprint', () => document.querySelectorAll('.on-paper').forEach((node) => node.remove()));

  return {
    printNow,
    // Something else may be shown now: the drawings follow when the page has come to rest.
    changed() {
      clearTimeout(timer);
      timer = setTimeout(() => { if (!document.hidden) prepare(idle); }, IDLE_MS);
    },
  };
}

function put(name, drawingOf, write) {
  const figure = document.querySelector(`figure[data-figure="${name}"]`);
  figure.querySelector('.on-paper')?.remove();
  const place = document.createElement('div');
  place.className = 'on-paper';
  if (drawingOf) {
    write(name, drawingOf.picture);
    place.append(document.importNode(new DOMParser().parseFromString(drawingOf.svg, 'image/svg+xml').documentElement, true));
  } else {
    place.classList.add('not-drawn');
    place.textContent = 'This figure was not computed yet when the note was printed. The note’s own Print waits for it.';
  }
  figure.querySelector('.plot').append(place);
}

function idle() {
  return new Promise((resolve) => { (globalThis.requestIdleCallback ?? setTimeout)(resolve); });
}
