// The figures on the screen: embedded once, afterwards only their data, ends, labels and colours change. With vectors.js
// the only file that knows how BokehJS is used. It knows neither plans nor the page: what it shows comes as a picture from the core.

import { bokeh } from './bokeh.js';

const SCHEMES = ['light', 'dark']; // the order of the colours in a model's tags
const RING = 'target'; // the source of the followed target
const NUMBERS = 'holes'; // that of the holes' numbers
const UNCOMPARED = { check_eq: false }; // a map is new with nearly every edit: to compare its cells takes half as long as to draw it

const mounted = new Map();
let scheme = 'light';
const factors = new Map(); // of figures that are shown larger than they were made
const DRAWN_LARGER = ['text_font_size', 'major_label_text_font_size', 'axis_label_text_font_size', 'line_width', 'size'];

// Embed a figure's document in an element; it is as large as the element from then on.
export async function mount(name, element, item) {
  const Bokeh = await bokeh();
  element.style.visibility = 'hidden'; // not seen in the other scheme first
  const manager = await Bokeh.embed.embed_item(item, element);
  const [view] = manager.roots;
  const models = [...view.model.references()];
  mounted.set(name, { element, view, models, named: namesOf(models), said: {}, holds: {}, held: false });
  repaint(models, scheme);
  scale(mounted.get(name), factors.get(name) ?? 1);
  withoutTabStop(view);
  element.style.visibility = '';
}

// Show another picture of the same figure. Columns are typed arrays or lists; an image is a typed array with a `shape`.
// `holds` gives the ends between which an axis measures what it says; beyond them lies another part of the figure.
// A picture without ranges brings columns only. A ring that is being dragged stays where the hand is. The promise of a whole
// picture ends when it is painted.
export function update(name, { columns, ranges, labels, ticks, holds = {} }) {
  const figure = mounted.get(name);
  if (ranges) figure.view.pause();
  if (ranges) setAxes(name, figure, { ranges, labels, ticks, holds });
  for (const [source, data] of Object.entries(columns)) {
    if (source === RING && figure.held) continue;
    figure.named.get(`${name}/${source}`).setv({ data: columnsOf(data) }, data.image ? UNCOMPARED : {});
  }
  return ranges ? paintedOnce(figure.view) : null;
}

// Give the models of a figure, wherever it is drawn, all that a picture says.
export function fill(name, figure, { columns, ...axes }) {
  setAxes(name, figure, axes);
  for (const [source, data] of Object.entries(columns)) figure.named.get(`${name}/${source}`).data = columnsOf(data);
}

function setAxes(name, figure, { ranges, labels, ticks, holds }) {
  const { named, said } = figure;
  figure.holds = holds;
  for (const side of ['x', 'y']) {
    const [start, end] = ranges[side];
    named.get(`${name}/${side}`).setv({ start, end });
    if (differs(said, `${side}-ticks`, ticks[side])) setTicks(named.get(`${name}/${side}-axis`), ticks[side]);
  }
  if (differs(said, 'labels', labels)) {
    named.get(`${name}/x-axis`).axis_label = labels.x;
    named.get(`${name}/y-label`).text = labels.y;
  }
}

// Where the words beside an axis have become wider, the canvas keeps ticks of before until it is painted once more.
function repaintIfMoved(view) {
  const { left } = view.frame.bbox;
  requestAnimationFrame(() => requestAnimationFrame(() => { if (view.frame.bbox.left !== left) view.request_paint(); }));
}

// Put a figure's ring where a hand has dragged it; with null the next picture places it again.
export function holdRing(name, at) {
  const figure = mounted.get(name);
  figure.held = Boolean(at);
  if (at) figure.named.get(`${name}/${RING}`).data = { x: [at[0]], y: [at[1]] };
}

export function setScheme(name) {
  scheme = name;
  for (const { models } of mounted.values()) repaint(models, scheme);
}

// Letters and lines of a figure larger than they were made, or as they were with a factor of one.
export function enlarge(name, factor) {
  factors.set(name, factor);
  if (mounted.has(name)) scale(mounted.get(name), factor);
}

// Width and height of each figure's plot, without its axes, in CSS pixels: what a map is computed for.
export function sizes() {
  return Object.fromEntries([...mounted].map(([name, { view }]) => {
    const { width, height } = view.frame.bbox;
    return [name, { width: Math.round(width), height: Math.round(height) }];
  }));
}

// On the canvas once, when all its sources are taken in, which they are a few promises later. Left to itself, the view would
// paint in the next frame what has come by then, and perhaps again in the one after it.
async function paintedOnce(view) {
  await tasksDone();
  view.unpause(true);
  if (view.is_paused) return; // another picture is already on its way
  view.invalidate_painters();
  repaintIfMoved(view);
  view.repaint();
}

function tasksDone() {
  return new Promise((resolve) => {
    const { port1, port2 } = new MessageChannel();
    port1.onmessage = () => { port1.close(); resolve(); };
    port2.postMessage(null);
  });
}

export function namesOf(models) {
  return new Map(models.filter(({ name }) => name).map((model) => [model.name, model]));
}

// Whether something is said otherwise than last time; it is remembered.
function differs(said, what, value) {
  const text = JSON.stringify(value ?? null);
  if (said[what] === text) return false;
  said[what] = text;
  return true;
}

function setTicks(axis, ticks) {
  if (!ticks) return; // the axis finds its own
  axis.ticker.ticks = ticks.at;
  axis.major_label_overrides = new Map(ticks.at.map((at, i) => [at, ticks.text[i]]));
}

function columnsOf(data) {
  return Object.fromEntries(Object.entries(data).map(([key, column]) => [key, column.shape ? [image(column)] : column]));
}

function image(pixels) {
  const { ndarray } = globalThis.Bokeh.require('core/util/ndarray');
  return ndarray(pixels, { shape: pixels.shape, dtype: 'uint8' });
}

function repaint(models, inScheme) {
  const at = SCHEMES.indexOf(inScheme);
  for (const model of models) {
    const paint = model.tags?.[0]?.paint;
    if (paint) model.setv(Object.fromEntries(Object.entries(paint).map(([property, colours]) => [property, colours[at]])));
  }
}

function scale(figure, factor) {
  figure.made ??= new Map(figure.models.map((model) => [model, DRAWN_LARGER.filter((property) => property in model).map((property) => [property, model[property]])]));
  for (const [model, properties] of figure.made) model.setv(Object.fromEntries(properties.map(([property, value]) => [property, larger(value, factor)])));
}

// A number, a length such as "12px", or either as the one value of a column.
function larger(value, factor) {
  if (typeof value === 'number') return value * factor;
  if (typeof value === 'string' && value.endsWith('px')) return `${Number.parseFloat(value) * factor}px`;
  return value && typeof value === 'object' && 'value' in value ? { ...value, value: larger(value.value, factor) } : value;
}

// The canvas has no use of the keyboard: what a figure offers to it, the page offers.
function withoutTabStop(view) {
  const parts = (root) => [...root.querySelectorAll('*')].flatMap((node) => [node, ...(node.shadowRoot ? parts(node.shadowRoot) : [])]);
  for (const node of parts(view.el.shadowRoot)) if (node.tabIndex === 0) node.tabIndex = -1;
}

// Where things are in a figure, in CSS pixels of its element and in the units on its axes.
export function geometry(name) {
  const { element, view, named } = mounted.get(name);
  const shift = () => {
    const [inner, outer] = [view.el.getBoundingClientRect(), element.getBoundingClientRect()];
    return [inner.left - outer.left, inner.top - outer.top];
  };
  return {
    box() {
      const [dx, dy] = shift();
      const { left, top, width, height } = view.frame.bbox;
      return { left: left + dx, top: top + dy, width, height };
    },
    // null on an axis that does not hold there.
    at(sx, sy) {
      const { holds } = mounted.get(name);
      const [x, y] = this.whole(sx, sy);
      return [within(holds.x, x), within(holds.y, y)];
    },
    // In the axes' units, wherever it is.
    whole(sx, sy) {
      const [dx, dy] = shift();
      return [view.frame.x_scale.invert(sx - dx), view.frame.y_scale.invert(sy - dy)];
    },
    place(x, y) {
      const [dx, dy] = shift();
      return [view.frame.x_scale.compute(x) + dx, view.frame.y_scale.compute(y) + dy];
    },
    ring() {
      const { x, y } = named.get(`${name}/${RING}`)?.data ?? {};
      return x?.length === 1 && y?.length === 1 ? this.place(x[0], y[0]) : null;
    },
    // The numbers of holes, as far as they are moved off their places.
    numbers() {
      const { x = [], y = [], dx, dy } = named.get(`${name}/${NUMBERS}`)?.data ?? {};
      return Array.from(x, (at, i) => {
        const [sx, sy] = this.place(at, y[i]);
        return { spot: [sx, sy], shown: [sx + dx[i], sy + dy[i]] };
      });
    },
  };
}

function within(ends, value) {
  return ends && (value < ends[0] || value > ends[1]) ? null : value;
}
