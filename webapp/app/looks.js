// How each number looks now: the last good plan's value, or what a pending edit says it will be, or a refused text.
// Knows the state and the keys; draws nothing.

import { valueAt } from './keys.js';

const LONGEST_SHOWN = 200; // characters of a refused text

export function createLooks({ state, keys, quantities, typed, engineState }) {
  function pendingShown(path, key) {
    const edit = state.now.pending.findLast((pending) => pending.key === path);
    if (!edit) return undefined;
    return edit.text ?? quantities.shown(key, edit.value);
  }

  // In a table the first end of an interval leaves the unit to the second.
  function alone(path, key, value) {
    return key?.kind === 'interval' && path.endsWith('.0') ? quantities.digitsOf(key, value) : quantities.shown(key, value);
  }

  // What the sentence shows for a path: `said` is its own way of showing (a list shares one unit).
  function look(path, said) {
    const key = keys.of(path);
    const value = valueAt(state.now.plan, path);
    const refusal = state.now.refused.find((edit) => edit.key === path);
    const pair = state.now.refused.some((edit) => otherEnd(edit.key) === path && isWithin(key, edit.text));
    const pending = pendingShown(path, key);
    return {
      shown: pending ?? said ?? alone(path, key, value),
      value,
      label: key?.label ?? path,
      words: key?.kind === 'text',
      lowest: key?.lowest,
      highest: key?.highest,
      waiting: pending !== undefined && engineState() !== 'ready',
      refused: refusal && clipped(refusal.text),
      invalid: Boolean(refusal) || pair, // of two ends that do not agree either may be the wrong one
      plain: engineState() === 'failed' || state.now.aside !== null,
    };
  }

  // An end of an interval that is possible by itself was refused because of the other one.
  function isWithin(key, text) {
    const value = typed(key, text);
    return key?.kind === 'interval' && value >= key.lowest && value <= key.highest;
  }

  // One line for each refused number: the core's sentence, and what everything below still shows.
  function refusals() {
    return state.now.refused.map(({ key: path, message }) => {
      const key = keys.of(path);
      return { key: path, label: key?.label ?? path, message, still: quantities.shown(key, valueAt(state.now.plan, path)) };
    });
  }

  return { look, refusals };
}

// What was typed stands as it was typed; of a book, its beginning.
function clipped(text) {
  return text.length > LONGEST_SHOWN ? `${text.slice(0, LONGEST_SHOWN)}…` : text;
}

function otherEnd(path) {
  return path.replace(/\.[01]$/, (end) => (end === '.0' ? '.1' : '.0'));
}
