// What a hand on a number does to the plan: commit, step, put back, remove. Typing, dragging and the strip all come here.
// Steps are decimal, stop at the key's limits and say why; arrow steps without a pause are one run, one step of undo.

import { valueAt } from './keys.js';

const RUN_PAUSE_MS = 1200;

export function createHands({ state, keys, quantities, status, redraw }) {
  const run = { path: '', at: 0, name: '' };

  function runOf(path) {
    const now = performance.now();
    if (run.path !== path || now - run.at > RUN_PAUSE_MS) run.name = `${path} ${now}`;
    Object.assign(run, { path, at: now });
    return run.name;
  }

  function value(path) {
    const pending = state.now.pending.findLast((edit) => edit.key === path);
    return pending ? pending.value ?? quantities.plain(pending.text) : valueAt(state.now.plan, path);
  }

  function step(path, { count, size, from = value(path), run: drag }) {
    const key = keys.of(path);
    if (typeof from !== 'number') return;
    const next = quantities.stepped(key, from, count, size, state.now.plan);
    const held = Math.min(Math.max(next, key.lowest ?? -Infinity), key.highest ?? Infinity);
    if (held !== next) status.say(quantities.limit(key, next > held));
    if (held !== value(path)) state.commit({ key: path, value: held, name: key.label }, drag ?? runOf(path));
    else redraw();
  }

  return {
    step,
    value,
    commit: (edit) => {
      run.path = '';
      state.commit({ ...edit, name: keys.of(edit.key)?.label });
    },
    putBack: (path) => state.putBack(path),
    takeBack: (name) => state.takeBack(name),
    refusedText: (path) => state.now.refused.find((edit) => edit.key === path)?.text,
    remove(path) {
      const [, list, index] = path.match(/^(.*)\.(\d+)$/) ?? [];
      if (!keys.of(list ?? path)?.counts) return false;
      state.commit({ do: 'remove-pri', at: Number(index), name: 'Removing one' });
      return true;
    },
    redraw,
  };
}
