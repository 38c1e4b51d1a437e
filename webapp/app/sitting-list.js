// The table of what was tried: time, what changed, what moved, and the words that act on a line. A row is kept while its line is,
// so that a remark is not lost while it is typed. `act(what, id, text)` hears what is done.

import { clock, movedOf, whatOf } from './minutes.js';
import { setText } from './number.js';

const at = (id) => document.getElementById(id);
const ACTS = [['return', 'Return to it'], ['compare', 'Compare with it'], ['remark', 'Remark'], ['remove', 'Remove']];

export function createSittingList({ act, most }) {
  const parts = { section: at('sitting'), body: at('sitting-lines'), left: at('sitting-left') };
  const rows = new Map();
  at('minutes-text').addEventListener('click', () => act('text'));
  at('minutes-markdown').addEventListener('click', () => act('markdown'));
  listen(parts.body, rows, act);
  setText(parts.left, `Only the last ${most} lines are kept; older ones are left out.`);

  return {
    update(lines, isCut) {
      parts.section.hidden = lines.length === 0;
      parts.left.hidden = !isCut;
      const kept = new Set(lines.map(({ id }) => id));
      for (const [id, { node }] of rows) {
        if (kept.has(id)) continue;
        node.remove();
        rows.delete(id);
      }
      for (const line of lines) {
        if (!rows.has(line.id)) rows.set(line.id, build(line));
        const row = rows.get(line.id);
        if (!row.node.isConnected) parts.body.append(row.node);
        fill(row, line);
      }
    },
  };
}

// One ear for all lines: a long sitting has no more listeners than a short one.
function listen(body, rows, act) {
  const idOf = ({ target }) => Number(target.closest('tr')?.dataset.line);
  body.addEventListener('click', (event) => {
    const { what } = event.target.dataset;
    if (what === 'remark') openField(rows.get(idOf(event)).field);
    else if (what) act(what, idOf(event));
  });
  body.addEventListener('change', (event) => act('remark', idOf(event), event.target.value.trim()));
  body.addEventListener('focusout', ({ target }) => { if (target.matches('.sitting-remark')) target.hidden = !target.value.trim(); });
  body.addEventListener('keydown', ({ key, target }) => { if (target.matches('.sitting-remark') && (key === 'Enter' || key === 'Escape')) target.blur(); });
}

function build({ id, at: time, remark }) {
  const node = document.createElement('tr');
  node.dataset.line = id;
  const cell = (tag) => node.appendChild(document.createElement(tag));
  const head = cell('th');
  head.scope = 'row';
  head.textContent = clock(time);
  const row = { node, what: cell('td'), moved: cell('td'), field: field(remark) };
  row.buttons = ACTS.map(([what, word]) => button(what, word));
  row.said = row.what.appendChild(document.createElement('span'));
  const acts = document.createElement('div');
  acts.className = 'sitting-acts';
  acts.append(...row.buttons);
  row.what.append(row.field, acts);
  return row;
}

function fill(row, line) {
  const what = whatOf(line);
  row.node.classList.toggle('taken-back', line.back);
  setText(row.said, what.slice(0, 1).toUpperCase() + what.slice(1));
  row.buttons.forEach((node, i) => node.setAttribute('aria-label', `${ACTS[i][1]}: ${what}`));
  const text = JSON.stringify(line.told?.findings ?? null);
  if (row.shown === text) return;
  row.shown = text;
  row.moved.replaceChildren(...moved(line.told));
}

function moved(told) {
  if (!told) return ['…'];
  if (!told.findings.length) return ['Nothing moved.'];
  return told.findings.map((one) => {
    const node = document.createElement('p');
    if (one.flipped) node.className = 'sitting-flipped';
    const values = document.createElement('span');
    values.textContent = one.text;
    node.append(`${one.sign}\u2002${one.label}: `, values, movedOf({ ...one, label: '', text: '' }).slice(': '.length));
    return node;
  });
}

// What is written beside a line; hidden while there is nothing.
function field(text) {
  const node = document.createElement('input');
  Object.assign(node, { type: 'text', value: text, maxLength: 300, placeholder: 'such as: asked by operations', hidden: !text, className: 'sitting-remark' });
  node.setAttribute('aria-label', 'Remark');
  return node;
}

function openField(node) {
  node.hidden = false;
  node.focus();
}

function button(what, word) {
  const node = document.createElement('button');
  node.type = 'button';
  node.className = 'quiet';
  node.dataset.what = what;
  node.textContent = word;
  return node;
}
