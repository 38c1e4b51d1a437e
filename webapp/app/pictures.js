// The figures' frames: number, caption, text summary, and which of them are on the screen. What is drawn is figures.js's.
// A figure that is not on the screen is neither embedded nor computed; `onSeen()` tells that one has come into view.
// `point` hears what a hand does in one: {read, pick, drag, closer, whole, hole}.

import { createCrosshair } from './crosshair.js';
import { geometry, holdRing, mount, update } from './figures.js';
import { buildFrame } from './frame.js';
import { setText } from './number.js';
import { pointIn } from './pointing.js';

const NEAR = '240px'; // a figure this close to the screen counts as on it

export function createPictures({ chief, rest, apart = {}, items, titles, onSeen, point, choose }) {
  const frames = new Map();
  const inView = new IntersectionObserver((entries) => {
    for (const { target, isIntersecting } of entries) frames.get(target.dataset.figure).seen = isIntersecting;
    if (entries.some(({ isIntersecting }) => isIntersecting)) onSeen();
  }, { rootMargin: NEAR });

  const frameFor = (name) => {
    if (!frames.has(name)) {
      const frame = buildFrame(name, choose, (how) => (how === 'closer' ? point.closer(name, middleOf(frame)) : point.whole(name)));
      frames.set(name, frame);
      inView.observe(frame.node);
    }
    return frames.get(name);
  };

  // What a hand does in a plot, in the units on its axes.
  function listen(name, frame) {
    const where = geometry(name);
    const read = (x, y) => point.read(name, x, y, place(frame.picture.units ?? {}, { x, y }));
    const measures = () => frame.picture.measures ?? {};
    const pick = (x, y) => point.pick(measures(), { x, y }, fineness(where, x, y), foldAt(frame.picture, y));
    frame.cross = createCrosshair(frame.plot, where, { onMove: read, onPick: pick, onLeave: () => read(null, null) });
    pointIn(frame.plot, where, {
      drags: () => Object.keys(measures()).length === 2, // a ring, and not a line
      onPick: pick,
      onHover: read,
      onNumber: (i) => point.hole(name, frame.picture.holes[i]),
      onDrag(at, ends) {
        if (at) holdRing(name, at);
        if (at) pick(...at);
        if (ends) holdRing(name, null);
      },
    });
  }

  return {
    // Figures stand in the core's order; the first is the chief one and stands beside the plan.
    arrange(names) {
      names.forEach((name, i) => {
        const { node, label } = frameFor(name);
        const place = i === 0 ? chief : rest;
        if (node.parentNode !== place || place.children[i === 0 ? 0 : i - 1] !== node) place.insertBefore(node, place.children[i === 0 ? 0 : i - 1] ?? null);
        setText(label, `Fig. ${i + 1} ${titles[name]}.`);
      });
      for (const [name, place] of Object.entries(apart)) {
        const { node, label } = frameFor(name);
        if (node.parentNode !== place) place.append(node);
        setText(label, `${titles[name]}.`);
      }
    },
    // Of a figure that is off the screen only the words, where its drawing is made for paper.
    write: (name, picture) => caption(frameFor(name), picture),
    visible: () => [...frames].filter(([, frame]) => frame.seen).map(([name]) => name),
    mark: (count) => { for (const { node, count: drawn } of frames.values()) node.classList.toggle('outdated', drawn !== count); },
    outdated: (count) => [...frames].some(([, frame]) => frame.seen && frame.count !== count),
    // None of them shows what is wanted now: those off the screen are asked for when they come into sight.
    outdate: () => { for (const frame of frames.values()) frame.count = -1; },
    async show(pictures, count) {
      for (const [name, picture] of Object.entries(pictures)) await draw(frameFor(name), name, picture, items[name], count, listen);
    },
    read: (name, text) => setText(frameFor(name).reading, text),
    // Where only the view has changed: what is not in this answer is of the view before.
    async look(pictures, count) {
      for (const [name, frame] of frames) if (!(name in pictures)) frame.count = -1;
      for (const [name, picture] of Object.entries(pictures)) await draw(frameFor(name), name, picture, items[name], count, listen);
    },
    clear() {
      for (const frame of frames.values()) {
        frame.count = -1;
        frame.node.classList.add('pending');
        for (const part of [frame.caption, frame.marked, frame.summary]) setText(part, '');
      }
    },
    stale: (text) => { for (const { shows } of frames.values()) setText(shows, text); },
  };
}

async function draw(frame, name, picture, item, count, listen) {
  if (picture.ranges) Object.assign(frame, { picture, count });
  caption(frame, picture);
  frame.mounted ??= mount(name, frame.plot, item).then(() => listen(name, frame));
  await frame.mounted;
  if (picture.columns) await update(name, picture);
  frame.cross.refresh();
  frame.node.classList.remove('pending');
}

// Where the cross-hair is; null where it is not seen.
function middleOf({ cross }) {
  const at = cross?.now() ?? null;
  return at && { x: at[0], y: at[1] };
}

// By what the speeds of a lane repeat, counted from the top; nothing where they are true ones.
function foldAt({ folds = [] }, y) {
  return folds.length ? folds[Math.min(Math.max(folds.length - 1 - Math.floor(y), 0), folds.length - 1)] : null;
}

// How much of each axis a pixel is.
function fineness(where, x, y) {
  const [sx, sy] = where.place(x ?? 0, y ?? 0);
  const [right, up] = where.whole(sx + 1, sy + 1);
  return { x: right - (x ?? 0), y: up - (y ?? 0) };
}

// Where a pointer is in a plot, in the axes' own units.
function place(units, at) {
  const axes = ['x', 'y'].filter((side) => units[side] && at[side] !== null);
  return axes.map((side) => `${Number(at[side].toPrecision(4))}\u202f${units[side]}`.replace('-', '\u2212')).join(', ');
}

function caption(frame, { caption: text, marked, summary, table, zoomed, choices }) {
  setText(frame.marked, marked ?? '');
  if (text === undefined) return;
  setText(frame.caption, text);
  setText(frame.summary, summary ?? '');
  frame.table.update(table);
  frame.choices.update(choices);
  frame.zoom.hidden = zoomed === null || zoomed === undefined;
  frame.whole.hidden = !zoomed;
}
