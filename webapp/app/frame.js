// One figure's frame: plot, the line under it with its actions, number and caption, text summary, table.

import { quietButton } from './fields.js';
import { createFigureChoices } from './figure-choices.js';
import { createFigureTable } from './figure-table.js';

export function buildFrame(name, choose, onZoom) {
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
  const zoom = part('div', 'figure-zoom');
  const reading = part('p', 'figure-reading');
  const closer = quietButton('Closer', null, () => onZoom('closer'));
  const whole = quietButton('Whole coverage', null, () => onZoom('whole'));
  zoom.append(closer, whole);
  zoom.hidden = true;
  const choices = createFigureChoices(choose);
  node.append(choices.node);
  const words = part('figcaption', '');
  const label = part('span', 'figure-name', words);
  words.append(' ');
  const text = part('span', 'figure-caption', words);
  words.append(' ');
  const marked = part('span', 'figure-marked', words);
  words.append(' ');
  const shows = part('span', 'figure-shows', words);
  const summary = part('p', 'out-of-sight');
  const table = createFigureTable();
  node.append(table.node);
  focusable(name, { plot, reading, label, summary });
  return { node, plot, reading, choices, zoom, closer, whole, label, caption: text, marked, shows, summary, table, picture: {}, seen: false, mounted: null, count: -1 };
}

// The keyboard works in a plot as the pointer does; the line under it speaks while the keyboard is there.
function focusable(name, { plot, reading, label, summary }) {
  Object.assign(label, { id: `${name}-label` });
  Object.assign(summary, { id: `${name}-summary` });
  Object.assign(plot, { tabIndex: 0 });
  const attributes = { role: 'application', 'aria-roledescription': 'figure', 'aria-labelledby': `${name}-label ${name}-summary`, 'aria-describedby': 'figure-keys' };
  for (const [key, value] of Object.entries(attributes)) plot.setAttribute(key, value);
  plot.addEventListener('focus', () => reading.setAttribute('aria-live', 'polite'));
  plot.addEventListener('blur', () => reading.removeAttribute('aria-live'));
}
