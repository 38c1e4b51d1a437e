// What stands under an opened finding: how it comes about, step by step, and how far each input can move. The core wrote both.
// Knows how they look and that they may still be on their way; asks nobody.

import { element } from './element.js';
import { formula, putIn } from './formula.js';
import { setText } from './number.js';
import { tableOf } from './table.js';

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
      fill(parts.list, rows.length > 1 ? [tableOf(head, rows, { caption: 'How far each input can move alone' })] : []);
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

function fill(node, children) {
  node.replaceChildren(...children);
  node.hidden = !children.length;
}
