// The findings, in the core's order: sign and word, sentence, number, what was wanted, and the engineer's own remark.
// Knows how a finding looks; the core wrote its words. `onRemark(name, text)` hears what is written under one,
// `onOpen(name, shows)` that one was opened, and with null that it was closed.

import { setText } from './number.js';
import { remarkLine } from './remarks.js';
import { createWorkings } from './workings.js';

const SIGNS = { true: ['✓', 'met'], false: ['✗', 'not met'], accepted: ['✗', 'accepted'], none: ['○', 'for information'] };
const FLIP_SHOWN_MS = 2000;

export function createFindings(list, onRemark, onOpen) {
  const items = new Map();
  return {
    update(findings) {
      const shown = findings.map((finding) => {
        if (!items.has(finding.name)) items.set(finding.name, item(finding, onRemark, onOpen));
        return fill(items.get(finding.name), finding);
      });
      if (shown.length !== list.children.length || shown.some((node, i) => node !== list.children[i])) list.replaceChildren(...shown);
    },
    // While an opened link is not computed yet, no number of any other plan may stand here.
    clear() {
      const waiting = document.createElement('li');
      waiting.textContent = '…';
      list.replaceChildren(waiting);
      for (const { node } of items.values()) delete node.dataset.met; // another plan's verdict does not flip
    },
  };
}

export function metOf({ met, accepted }) {
  if (met === null || met === undefined) return 'none';
  return accepted ? 'accepted' : String(met);
}

function item({ name, label }, onRemark, onOpen) {
  const node = document.createElement('li');
  node.className = 'finding';
  node.dataset.finding = name;
  const part = (tag, className, parent = node) => {
    const child = document.createElement(tag);
    child.className = className;
    parent.append(child);
    return child;
  };
  const mark = part('span', 'finding-mark');
  const text = part('span', 'finding-text');
  const number = part('span', 'finding-value');
  const parts = {
    mark,
    label: part('span', 'finding-label', text),
    detail: part('span', 'finding-detail', text),
    value: part('b', '', number),
    wanted: part('span', 'finding-wanted', number),
    how: part('button', 'quiet finding-how', number),
    remark: remarkLine(name, onRemark),
  };
  node.append(parts.remark.node);
  disclose(node, parts.how, { name, label, onOpen });
  return { node, parts, timer: 0 };
}

// How it comes about is built when it is first opened; closed, a finding costs nothing.
function disclose(node, button, { name, label, onOpen }) {
  let workings = null;
  Object.assign(button, { type: 'button', textContent: 'How it comes about' });
  button.setAttribute('aria-label', `How it comes about: ${label}`);
  button.setAttribute('aria-expanded', 'false');
  button.addEventListener('click', () => {
    const open = button.getAttribute('aria-expanded') !== 'true';
    button.setAttribute('aria-expanded', String(open));
    workings ??= createWorkings(label);
    if (open) node.append(workings.node);
    else workings.node.remove();
    onOpen(name, open ? workings : null);
  });
}

function fill(entry, finding) {
  const { node, parts } = entry;
  const met = metOf(finding);
  const [sign, word] = SIGNS[met];
  if (node.dataset.met && node.dataset.met !== met) flip(entry);
  node.dataset.met = met;
  node.dataset.value = written(finding.value);
  parts.mark.dataset.sign = sign;
  setText(parts.mark, word);
  setText(parts.label, `${finding.label.slice(0, 1).toUpperCase()}${finding.label.slice(1)}`);
  setText(parts.detail, finding.detail ? `; ${finding.detail}` : '');
  setText(parts.value, finding.value_text ?? '');
  setText(parts.wanted, finding.wanted_text ? `wanted ${finding.wanted_text}` : '');
  parts.remark.update(finding);
  return node;
}

// Full precision, in the plan's units; the shortest text that reads back as the same number.
function written(value) {
  if (value === null || value === undefined) return '';
  return Array.isArray(value) ? value.join(' ') : String(value);
}

// A flipped verdict is marked for two seconds by a bar, not by blinking.
function flip(entry) {
  clearTimeout(entry.timer);
  entry.node.classList.add('flipped');
  entry.timer = setTimeout(() => entry.node.classList.remove('flipped'), FLIP_SHOWN_MS);
}
