// Dragging a number sideways with mouse or pen: 4 px a step, Shift ten, Alt the finest, Escape puts it back.
// One drag is one run, so one step of undo. Line breaks are kept until release, so that the number stays under the hand.

import { isOpen } from './number.js';

const PIXELS_A_STEP = 4;

export function listenToDragging(root, plan) {
  let drag = null;
  let dragged = false;

  root.addEventListener('mousedown', (event) => {
    const number = draggable(event.target);
    if (number && event.button === 0) event.preventDefault(); // no selection of text; focus comes with the click
  });
  root.addEventListener('pointerdown', (event) => {
    dragged = false;
    const number = draggable(event.target);
    if (!number || event.button !== 0 || event.pointerType === 'touch') return;
    drag = { number, pointer: event.pointerId, x: event.clientX, at: event.clientX, begun: false, run: `drag ${event.timeStamp}` };
  });
  root.addEventListener('pointermove', (event) => {
    if (drag && event.pointerId === drag.pointer) dragged = move(drag, event, plan) || dragged;
  });
  for (const type of ['pointerup', 'pointercancel', 'lostpointercapture']) {
    root.addEventListener(type, () => { drag = end(drag); });
  }
  root.ownerDocument.addEventListener('keydown', (event) => {
    if (!drag?.begun || event.key !== 'Escape') return;
    plan.takeBack(drag.run);
    drag = end(drag);
    event.preventDefault();
    event.stopPropagation();
  }, true);

  return () => dragged;
}

function draggable(target) {
  const number = target.closest?.('.number[role="spinbutton"]');
  return number && !isOpen(number) ? number : null;
}

function move(drag, event, plan) {
  if (!drag.begun && Math.abs(event.clientX - drag.x) < PIXELS_A_STEP) return false;
  if (!drag.begun) begin(drag);
  const count = Math.trunc((event.clientX - drag.at) / PIXELS_A_STEP);
  if (count) {
    drag.at += count * PIXELS_A_STEP;
    const size = event.altKey ? 'finest' : 'step';
    plan.step(drag.number.dataset.key, { count: count * (event.shiftKey && !event.altKey ? 10 : 1), size, run: drag.run });
  }
  return true;
}

function begin(drag) {
  const { number } = drag;
  drag.begun = true;
  number.setPointerCapture(drag.pointer);
  number.focus({ preventScroll: true });
  const { width } = number.getBoundingClientRect();
  Object.assign(number.style, { display: 'inline-block', width: `${width}px` });
  document.documentElement.classList.add('dragging');
}

function end(drag) {
  if (drag?.begun) {
    Object.assign(drag.number.style, { display: '', width: '' });
    document.documentElement.classList.remove('dragging');
  }
  return null;
}
