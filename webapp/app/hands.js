// What a hand on a number does to the plan: commit, step, put back, remove. Typing, dragging and the strip all come here.
// Steps are decimal, stop at the key's limits and say why; arrow steps without a pause are one run, one step of undo.

import { valueAt } from './keys.js';

const RUN_PAUSE_MS = 1200;
const LIST = 'waveform.pri_us';
const KEPT = ['waveform', 'radar', 'doppler']; // where dwells and a stagger each have numbers of their own
const NAMES = { 'add-pri': 'Adding a PRI', 'remove-pri': 'Removing a PRI', 'move-pri': 'Moving a PRI', 'sort-pris': 'Sorting the PRIs', 'paste-pris': 'Your own PRIs', 'add-rain': 'Adding rain', 'remove-rain': 'Taking the rain away', split: 'One for each PRF', join: 'One for all PRFs', 'set-kind': 'Dwells or stagger', remark: 'The remark' };

export function createHands({ state, keys, quantities, typed, status, families, redraw, onAnswered, focus }) {
  let kept = {};
  state.watch((cause) => { if (['open', 'begin'].includes(cause)) kept = {}; });
  const run = { path: '', at: 0, name: '' };

  function runOf(path) {
    const now = performance.now();
    if (run.path !== path || now - run.at > RUN_PAUSE_MS) run.name = `${path} ${now}`;
    Object.assign(run, { path, at: now });
    return run.name;
  }

  function value(path) {
    const pending = state.now.pending.findLast((edit) => edit.key === path);
    if (keys.of(path)?.kind === 'text') return pending?.text ?? valueAt(state.now.plan, path);
    return pending ? pending.value ?? typed(keys.of(path), pending.text) : valueAt(state.now.plan, path);
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

  // An action on the list of PRIs; `place` is the one that has the focus when it is done, a new one is the last.
  function act(action, given = {}, place = action === 'add-pri' ? -1 : null) {
    run.path = '';
    state.commit({ do: action, ...given, name: NAMES[action] ?? nameOf(action) });
    if (place !== null) onAnswered(state.now.count, () => focus(`${LIST}.${place < 0 ? state.now.plan.waveform.pri_us.length - 1 : place}`, place < 0));
  }

  // Dwells and a stagger each keep their own numbers while the page shows this plan.
  function switchKind() {
    if (state.now.pending.length) return onAnswered(state.now.count, switchKind);
    const { plan } = state.now;
    const [from, to] = plan.waveform.kind === 'stagger' ? ['stagger', 'dwells'] : ['dwells', 'stagger'];
    kept[from] = Object.fromEntries(KEPT.map((name) => [name, plan[name]]));
    return act('set-kind', { kind: to, ...(kept[to] ? { kept: kept[to] } : {}) });
  }

  // What the strip shows of a number.
  function entry(path) {
    const key = keys.of(path);
    return { name: key.label, words: key.kind === 'text', cell: placeOf(path) !== null && state.now.plan.waveform.pri_us.length > 1, units: units(key), shown: { digits: key.kind === 'text' ? value(path) : quantities.digitsOf(key, value(path)), unit: quantities.unitOf(key) } };
  }

  const units = ({ family }) => Object.keys(families[family] ?? {}).filter(Boolean);

  return {
    step,
    entry,
    value,
    commit: (edit) => {
      run.path = '';
      const shownIn = edit.text === undefined ? {} : { units: { ...quantities.units } }; // it means what it meant when it was typed
      state.commit({ ...edit, ...shownIn, name: keys.of(edit.key)?.label });
    },
    putBack: (path) => state.putBack(path),
    typed: (path, text) => typed(keys.of(path), text),
    takeBack: (name) => state.takeBack(name),
    refusedText: (path) => state.now.refused.find((edit) => edit.key === path)?.text,
    remove(path) {
      const index = placeOf(path);
      if (index === null) return false;
      act('remove-pri', { index }, Math.max(0, Math.min(index, state.now.plan.waveform.pri_us.length - 2)));
      return true;
    },
    move(path, by) {
      const [index, count] = [placeOf(path), state.now.plan.waveform.pri_us.length];
      const to = index + by;
      if (index === null || to < 0 || to >= count) return;
      act('move-pri', { index, to }, to);
    },
    act,
    switchKind,
    isPri: (path) => placeOf(path) !== null,
    redraw,
  };
}

// `add-near-pulse` is told as "Adding the near pulse".
function nameOf(action) {
  const [deed, ...words] = action.split('-');
  const said = { add: 'Adding the', remove: 'Removing the' }[deed];
  return said ? `${said} ${words.join(' ')}` : 'The last step';
}

function placeOf(path) {
  const [, index] = path.match(/^waveform\.pri_us\.(\d+)$/) ?? [];
  return index === undefined ? null : Number(index);
}
