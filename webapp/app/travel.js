// Undo and redo: the buttons, the keys, and what is said when a step is taken back. The steps themselves are the state's.

import { isOpen, isTouched } from './number.js';

export function createTravel({ state, status, page, buttons }) {
  const undo = () => tell(state.undo(), 'Redo', redo);
  const redo = () => tell(state.redo(), 'Undo', undo);

  function tell(step, word, act) {
    if (!step) return status.say(`Nothing to ${word === 'Redo' ? 'undo' : 'redo'}.`);
    page.bringIntoSight(step.key);
    return status.say(sentence(step), [word, act]);
  }

  function sentence({ key, name }) {
    const shown = key && page.shown(key);
    if (shown) return `${name} back to ${shown}.`;
    return `${name ?? 'The last step'}: taken ${state.now.future.at(-1)?.key === key ? 'back' : 'again'}.`;
  }

  buttons.undo.addEventListener('click', undo);
  buttons.redo.addEventListener('click', redo);
  addEventListener('keydown', (event) => {
    const way = wayOf(event);
    if (!way || ownUndo(event.target)) return;
    event.preventDefault();
    (way === 'undo' ? undo : redo)();
  });

  return {
    undo,
    update() {
      buttons.undo.disabled = state.now.past.length === 0;
      buttons.redo.disabled = state.now.future.length === 0;
    },
  };
}

function wayOf({ key, ctrlKey, metaKey, shiftKey, altKey }) {
  if (!(ctrlKey || metaKey) || altKey) return null;
  if (key.toLowerCase() === 'z') return shiftKey ? 'redo' : 'undo';
  return key.toLowerCase() === 'y' ? 'redo' : null;
}

// In an open field undo is the field's own until its text is the committed one.
function ownUndo(target) {
  if (target.classList?.contains('number')) return isOpen(target) && isTouched(target);
  return target.isContentEditable || ['TEXTAREA', 'INPUT'].includes(target.tagName);
}
