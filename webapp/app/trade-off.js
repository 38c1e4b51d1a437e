// The figure of what found plans give up for what. Its points are picked by pointer or with the arrow keys; a picked point is a
// row of the list. Knows the figure's frame; figures.js draws it.

import { geometry, mount, update } from './figures.js';
import { setText } from './number.js';
import { pointIn } from './pointing.js';

const NAME = 'trade-off';
const REACH_PX = 24;

export function createTradeOff({ node, item, onPick, onAgainst }) {
  const [plot, reading, label, caption, select] = ['.plot', '.figure-reading', '.figure-name', '.figure-caption', 'select'].map((part) => node.querySelector(part));
  const state = { picture: null, rows: [], chosen: null, mounted: null };
  select.append(...[['time', 'time used'], ['decode', 'how far ranges decode'], ['lost', 'one PRF lost'], ['hole', 'the worst hole']].map(([name, text]) => new Option(text, name)));
  select.addEventListener('change', () => onAgainst(select.value));

  // The point nearest to a place, in pixels; none where none is near.
  function nearest(x, y, reach = REACH_PX) {
    if (!state.picture || x === null) return null;
    const { points, ranges } = state.picture;
    const scale = (ends, size) => size / (ends[1] - ends[0]);
    const [sx, sy] = [scale(ranges.x, plot.clientWidth), scale(ranges.y, plot.clientHeight)];
    const far = [...points.x].map((at, i) => Math.hypot((at - x) * sx, (points.y[i] - y) * sy));
    const best = far.reduce((least, value, i) => (value < (far[least] ?? Infinity) ? i : least), -1);
    return best >= 0 && far[best] <= reach ? best : null;
  }

  function read(i) {
    setText(reading, i === null ? '' : `${i + 1}: ${state.rows[i].intervals}; ${state.rows[i].seen} seen, ${state.rows[i].time}`);
  }

  // Points from left to right, for the arrow keys.
  function neighbour(by) {
    const { x, y } = state.picture.points;
    const order = [...x.keys()].filter((i) => Number.isFinite(x[i])).sort((one, other) => x[one] - x[other] || y[one] - y[other]);
    const at = order.indexOf(state.chosen);
    return at < 0 ? order[0] : order[Math.min(Math.max(at + by, 0), order.length - 1)];
  }

  plot.addEventListener('keydown', (event) => {
    const by = { ArrowRight: 1, ArrowUp: 1, ArrowLeft: -1, ArrowDown: -1 }[event.key];
    if (!state.picture || (!by && event.key !== 'Enter')) return;
    event.preventDefault();
    if (by) onPick(neighbour(by), false);
    else if (state.chosen !== null) onPick(state.chosen, true);
  });
  const pointed = {
    drags: () => false,
    onPick: (x, y) => { const i = nearest(x, y); if (i !== null) onPick(i, false); },
    onHover: (x, y) => read(nearest(x, y) ?? state.chosen),
  };

  return {
    against: () => select.value,
    async show(picture, rows) {
      Object.assign(state, { picture, rows });
      setText(label, `${picture.title}.`);
      setText(caption, picture.caption);
      state.mounted ??= mount(NAME, plot, item).then(() => pointIn(plot, geometry(NAME), pointed));
      await state.mounted;
      update(NAME, picture);
      node.classList.remove('pending');
    },
    select(i) {
      state.chosen = i;
      if (!state.picture) return;
      const { points } = state.picture;
      const at = i !== null && Number.isFinite(points.x[i]) ? [i] : [];
      state.picture.columns.chosen = { x: at.map((k) => points.x[k]), y: at.map((k) => points.y[k]) };
      read(i);
      state.mounted?.then(() => update(NAME, state.picture));
    },
  };
}
