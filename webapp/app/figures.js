// The figures on the screen: embedded once, afterwards only their data, ends, labels and colours change. The only file that
// knows how BokehJS is used. It knows neither plans nor the page: what it shows comes as a picture from the core.

import { bokeh } from './bokeh.js';

const SCHEMES = ['light', 'dark']; // the order of the colours in a model's tags

const mounted = new Map();
const listeners = { pick: () => {}, hover: () => {} };
const own = new Map(); // listeners of one figure, instead of those of all
let scheme = 'light';

// Embed a figure's document in an element; it is as large as the element from then on.
export async function mount(name, element, item) {
  const Bokeh = await bokeh();
  element.style.visibility = 'hidden'; // not seen in the other scheme first
  const manager = await Bokeh.embed.embed_item(item, element);
  const [view] = manager.roots;
  const models = [...view.model.references()];
  mounted.set(name, { element, view, models, named: namesOf(models), said: {}, holds: {} });
  repaint(models);
  withoutTabStop(view);
  listen(name, element);
  element.style.visibility = '';
}

// Show another picture of the same figure. Columns are typed arrays or lists; an image is a typed array with a `shape`.
// `holds` gives the ends between which an axis measures what it says; beyond them lies another part of the figure.
export function update(name, { columns, ranges, labels, ticks, holds = {} }) {
  const { named, said } = mounted.get(name);
  mounted.get(name).holds = holds;
  for (const side of ['x', 'y']) {
    const [start, end] = ranges[side];
    named.get(`${name}/${side}`).setv({ start, end });
    if (differs(said, `${side}-ticks`, ticks[side])) setTicks(named.get(`${name}/${side}-axis`), ticks[side]);
  }
  if (differs(said, 'labels', labels)) {
    named.get(`${name}/x-axis`).axis_label = labels.x;
    named.get(`${name}/y-label`).text = labels.y;
  }
  for (const [source, data] of Object.entries(columns)) named.get(`${name}/${source}`).data = columnsOf(data);
  repaintIfMoved(mounted.get(name).view);
}

// Where the words beside an axis have become wider, the canvas keeps ticks of before until it is painted once more.
function repaintIfMoved(view) {
  const { left } = view.frame.bbox;
  requestAnimationFrame(() => requestAnimationFrame(() => { if (view.frame.bbox.left !== left) view.request_paint(); }));
}

export function setScheme(name) {
  scheme = name;
  for (const { models } of mounted.values()) repaint(models);
}

// The callbacks get (figure, x, y) in the units on the axes; on leaving the plot, hover gets (figure, null, null).
export function onPick(callback) {
  listeners.pick = callback;
}

export function onHover(callback) {
  listeners.hover = callback;
}

// One figure's own callbacks get (x, y), or (null, null) on leaving.
export function listenTo(name, { pick, hover }) {
  own.set(name, { pick: (_, x, y) => pick(x, y), hover: (_, x, y) => hover(x, y) });
}

// Width and height of each figure's plot, without its axes, in CSS pixels: what a map is computed for.
export function sizes() {
  return Object.fromEntries([...mounted].map(([name, { view }]) => {
    const { width, height } = view.frame.bbox;
    return [name, { width: Math.round(width), height: Math.round(height) }];
  }));
}

function namesOf(models) {
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

function repaint(models) {
  const at = SCHEMES.indexOf(scheme);
  for (const model of models) {
    const paint = model.tags?.[0]?.paint;
    if (paint) model.setv(Object.fromEntries(Object.entries(paint).map(([property, colours]) => [property, colours[at]])));
  }
}

// The canvas has no use of the keyboard: what a figure offers to it, the page offers.
function withoutTabStop(view) {
  const parts = (root) => [...root.querySelectorAll('*')].flatMap((node) => [node, ...(node.shadowRoot ? parts(node.shadowRoot) : [])]);
  for (const node of parts(view.el.shadowRoot)) if (node.tabIndex === 0) node.tabIndex = -1;
}

function listen(name, element) {
  const at = (event) => placeOf(mounted.get(name), event);
  const tell = () => own.get(name) ?? listeners;
  let inside = false;
  element.addEventListener('click', (event) => {
    const place = at(event);
    if (place) tell().pick(name, ...place);
  });
  element.addEventListener('pointermove', (event) => {
    const place = at(event);
    if (place || inside) tell().hover(name, ...(place ?? [null, null]));
    inside = Boolean(place);
  });
  element.addEventListener('pointerleave', () => {
    if (inside) tell().hover(name, null, null);
    inside = false;
  });
}

// Where in the plot a pointer is, or null beside it; null on an axis that does not hold there.
function placeOf({ view: { el, frame }, holds }, { clientX, clientY }) {
  const { left, top } = el.getBoundingClientRect();
  const [sx, sy] = [clientX - left, clientY - top];
  if (!frame.bbox.contains(sx, sy)) return null;
  return [within(holds.x, frame.x_scale.invert(sx)), within(holds.y, frame.y_scale.invert(sy))];
}

function within(ends, value) {
  return ends && (value < ends[0] || value > ends[1]) ? null : value;
}
