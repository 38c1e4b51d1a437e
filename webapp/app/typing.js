// Typing a number in its place, and stepping it with the arrow keys. Knows keys and clicks; the plan only through `plan`.
// `plan` is {commit(edit, run), putBack(key), refusedText(key), step(key, count, size, from), isRail(key), ...}.

import { closeField, fieldText, isOpen, isTouched, openField, selectAll, touch } from './number.js';

const SEVERAL = /\d[^\n\r\t;,]*(?:[\n\r\t;]|,\s)\s*\S/;
const LONG = 400; // characters of a paste that is no number
const STARTS_A_NUMBER = /^[\d.,+\-\u2212]$/;

export function listenToTyping(root, plan) {
  const on = (type, act) => root.addEventListener(type, (event) => {
    const number = event.target.closest?.('.number[role]');
    if (number) act(number, event);
  });
  on('keydown', (number, event) => key(number, event, plan));
  on('paste', (number, event) => pasted(number, event, plan));
  on('input', (number) => touch(number, true));
  // A new number is typed over the one that Enter has just committed: the first press leaves it selected.
  on('mousedown', (number, event) => { if (isOpen(number) && wasCommitted(number)) event.preventDefault(); });
  on('focusout', (number) => leave(number, plan));
  on('click', (number, event) => {
    if (isOpen(number) || plan.wasDragged()) return;
    if (event.pointerType === 'touch') plan.strip.open(number);
    else openField(number);
  });
}

function key(number, event, plan) {
  if (event.isComposing) return;
  const action = isOpen(number) ? openKeys[event.key] : closedKeys[event.key];
  if (arrows(number, event, plan) || (action && action(number, event, plan) !== false)) event.preventDefault();
  else if (!isOpen(number) && starts(number, event.key) && !event.ctrlKey && !event.metaKey) {
    openField(number, event.key);
    event.preventDefault();
  }
}

// A number is begun by what a number begins with, a name by any character.
function starts(number, pressed) {
  return number.classList.contains('words') ? pressed.length === 1 && pressed !== ' ' : STARTS_A_NUMBER.test(pressed);
}

const openKeys = {
  Enter: (number, event, plan) => {
    commitField(number, plan);
    selectAll(number);
    number.dataset.committed = '';
  },
  Escape: (number, event, plan) => {
    closeField(number);
    plan.putBack(number.dataset.key);
  },
  Delete: removeEmpty,
  Backspace: removeEmpty,
};

const closedKeys = {
  ArrowLeft: (number, event, plan) => event.altKey && plan.move(number.dataset.key, -1),
  ArrowRight: (number, event, plan) => event.altKey && plan.move(number.dataset.key, 1),
  Enter: (number) => openField(number),
  F2: (number) => openField(number),
  Escape: (number, event, plan) => plan.putBack(number.dataset.key),
  Backspace: (number) => openField(number, ''),
  Delete: (number) => openField(number, ''),
};

// Arrow: one step; Shift ten; Alt the finest. A typed number that is not committed yet is stepped from.
function arrows(number, event, plan) {
  if (!['ArrowUp', 'ArrowDown'].includes(event.key) || event.ctrlKey || event.metaKey) return false;
  const size = event.altKey ? 'finest' : 'step';
  const count = (event.key === 'ArrowUp' ? 1 : -1) * (event.shiftKey && !event.altKey ? 10 : 1);
  const from = isTouched(number) ? plan.typed(number.dataset.key, fieldText(number)) : undefined;
  touch(number, false);
  plan.step(number.dataset.key, { count, size, from });
  return true;
}

// What nobody would type is not laid out to be read: it is committed at once, to be answered in a sentence.
function commitLong(number, text, plan) {
  closeField(number);
  plan.commit({ key: number.dataset.key, text });
}

// Several PRIs, such as a spreadsheet's column, are the whole list, wherever in it they are pasted.
function pasted(number, event, plan) {
  const text = event.clipboardData?.getData('text/plain') ?? '';
  const isList = plan.isPri(number.dataset.key) && SEVERAL.test(text.trim());
  if (!isList && text.length < LONG) return;
  event.preventDefault();
  if (!isList) return commitLong(number, text, plan);
  closeField(number);
  plan.act('paste-pris', { text });
}

function commitField(number, plan) {
  if (!isTouched(number)) return;
  touch(number, false);
  plan.commit({ key: number.dataset.key, text: fieldText(number) });
}

// Delete on an empty cell of the rail removes it.
function removeEmpty(number, event, plan) {
  if (fieldText(number) !== '' || !plan.isPri(number.dataset.key)) return false;
  closeField(number);
  return plan.remove(number.dataset.key);
}

function wasCommitted(number) {
  const committed = 'committed' in number.dataset && !isTouched(number);
  delete number.dataset.committed;
  return committed;
}

function leave(number, plan) {
  if (!isOpen(number)) return;
  commitField(number, plan);
  closeField(number);
  plan.redraw();
}
