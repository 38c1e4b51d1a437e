// The figures' frames: number, caption, text summary, and which of them are on the screen. What is drawn is figures.js's.
// A figure that is not on the screen is neither embedded nor computed; `onSeen()` tells that one has come into view.

import { mount, onHover, update } from './figures.js';
import { createFigureChoices } from './figure-choices.js';
import { createFigureTable } from './figure-table.js';
import { setText } from './number.js';

const NEAR = '240px'; // a figure this close to the screen counts as on it

export function createPictures({ chief, rest, items, titles, onSeen, choose }) {
  const frames = new Map();
  const inView = new IntersectionObserver((entries) => {
    for (const { target, isIntersecting } of entries) frames.get(target.dataset.figure).seen = isIntersecting;
    if (entries.some(({ isIntersecting }) => isIntersecting)) onSeen();
  }, { rootMargin: NEAR });

  const frameFor = (name) => {
    if (!frames.has(name)) {
      const frame = build(name, choose);
      frames.set(name, frame);
      inView.observe(frame.node);
    }
    return frames.get(name);
  };

  onHover((name, x, y) => setText(frames.get(name).reading, place(frames.get(name).units, { x, y })));

  return {
    // Figures stand in the core's order; the first is the chief one and stands beside the plan.
    arrange(names) {
      names.forEach((name, i) => {
        const { node, label } = frameFor(name);
        const place = i === 0 ? chief : rest;
        if (node.parentNode !== place || place.children[i === 0 ? 0 : i - 1] !== node) place.insertBefore(node, place.children[i === 0 ? 0 : i - 1] ?? null);
        setText(label, `Fig. ${i + 1} ${titles[name]}.`);
      });
    },
    visible: () => [...frames].filter(([, frame]) => frame.seen).map(([name]) => name),
    mark: (count) => { for (const { node, count: drawn } of frames.values()) node.classList.toggle('outdated', drawn !== count); },
    outdated: (count) => [...frames].some(([, frame]) => frame.seen && frame.count !== count),
    // None of them shows what is wanted now: those off the screen are asked for when they come into sight.
    outdate: () => { for (const frame of frames.values()) frame.count = -1; },
    async show(pictures, count) {
      for (const [name, picture] of Object.entries(pictures)) await draw(frameFor(name), name, picture, items[name], count);
    },
    clear() {
      for (const frame of frames.values()) {
        frame.count = -1;
        frame.node.classList.add('pending');
        for (const part of [frame.caption, frame.summary]) setText(part, '');
      }
    },
    stale: (text) => { for (const { shows } of frames.values()) setText(shows, text); },
  };
}

async function draw(frame, name, picture, item, count) {
  caption(frame, picture);
  frame.units = picture.units ?? {};
  frame.count = count;
  frame.mounted ??= mount(name, frame.plot, item);
  await frame.mounted;
  if (picture.columns) update(name, picture);
  frame.node.classList.remove('pending');
}

// Where a pointer is in a plot, in the axes' own units.
function place(units, at) {
  const axes = ['x', 'y'].filter((side) => units[side] && at[side] !== null);
  return axes.map((side) => `${Number(at[side].toPrecision(4))}\u202f${units[side]}`.replace('-', '\u2212')).join(', ');
}

function caption(frame, { caption: text, summary, table, choices }) {
  setText(frame.caption, text);
  setText(frame.summary, summary ?? '');
  frame.table.update(table);
  frame.choices.update(choices);
}

function build(name, choose) {
  const node = document.createElement('figure');
  node.className = 'figure pending';
  node.dataset.figure = name;
  const part = (tag, className, parent = node) => {
    const child = document.createElement(tag);
    child.className = className;
    parent.append(child);
    return child;
  };
  const plot = part('div', 'plot');
  const reading = part('p', 'figure-reading');
  const choices = createFigureChoices(choose);
  node.append(choices.node);
  const words = part('figcaption', '');
  const label = part('span', 'figure-name', words);
  words.append(' ');
  const text = part('span', 'figure-caption', words);
  words.append(' ');
  const shows = part('span', 'figure-shows', words);
  const summary = part('p', 'out-of-sight');
  const table = createFigureTable();
  node.append(table.node);
  return { node, plot, reading, choices, label, caption: text, shows, summary, table, seen: false, mounted: null, count: -1 };
}
