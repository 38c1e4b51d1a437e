// What stands under an opened finding: how it comes about, step by step, and how far each input can move. The core wrote both.
// Knows how they look and that they may still be on their way; asks nobody.

import { formula, putIn } from './formula.js';
import { setText } from './number.js';

const WAITING = '…';

export function createWorkings(label) {
  const node = document.createElement('div');
  node.className = 'workings';
  node.setAttribute('role', 'group');
  node.setAttribute('aria-label', `How it comes about: ${label}`);
  const part = (tag, className) => {
    const child = document.createElement(tag);
    child.className = className;
    node.append(child);
    return child;
  };
  const parts = { margin: part('p', 'margin-sentence'), list: part('div', 'margin-list'), steps: part('ol', 'steps'), notes: part('ul', 'workings-notes') };
  const notes = { margins: [], steps: [] };
  const fillNotes = () => fill(parts.notes, [...notes.steps, ...notes.margins].map((text) => element('li', '', text)));
  return {
    node,
    // What stands here belongs to an earlier plan until it is worked out again.
    wait() {
      setText(parts.margin, WAITING);
      node.classList.add('earlier');
    },
    showSteps({ lines, notes: said }) {
      fill(parts.steps, lines.map(step));
      notes.steps = said;
      fillNotes();
      node.classList.remove('earlier');
    },
    showMargins({ sentence, head, rows, notes: said }) {
      setText(parts.margin, sentence);
      fill(parts.list, rows.length > 1 ? [marginTable(head, rows)] : []);
      notes.margins = said;
      fillNotes();
    },
    fail(sentence) {
      setText(parts.margin, sentence);
      fill(parts.list, []);
    },
  };
}

function step({ formula: text, numbers, result, source }) {
  const item = document.createElement('li');
  item.append(
    element('span', 'step-formula', ...formula(text)),
    element('span', 'step-numbers', ...putIn(numbers)),
    element('span', 'step-result', ...putIn(result)),
    element('span', 'step-source', source),
  );
  return item;
}

function marginTable(head, rows) {
  const table = document.createElement('table');
  table.append(element('caption', '', 'How far each input can move alone'));
  const row = (tag, scope) => (cells) => {
    const line = document.createElement('tr');
    line.append(...cells.map((text, i) => {
      const cell = element(i ? tag : 'th', '', text);
      if (cell.tagName === 'TH') cell.scope = i ? 'col' : scope;
      return cell;
    }));
    return line;
  };
  const top = document.createElement('thead');
  const body = document.createElement('tbody');
  top.append(row('th', 'col')(head));
  body.append(...rows.map(row('td', 'row')));
  table.append(top, body);
  return table;
}

function element(tag, className, ...inner) {
  const made = document.createElement(tag);
  if (className) made.className = className;
  made.append(...inner);
  return made;
}

function fill(node, children) {
  node.replaceChildren(...children);
  node.hidden = !children.length;
}
