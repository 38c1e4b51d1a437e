// The limits of the search, as the reader changes them: what is asked for, what is not answered yet, what was refused.
// A hand on one of their numbers comes here, as one on the plan's numbers goes to hands.js; the core takes or refuses it.

const RUN_PAUSE_MS = 400; // a plan that is being edited changes the sentence when the hand rests

export function createLimits({ ask, plan, keys, quantities, typed, families, units, status, opening, onChange }) {
  const state = { asked: {}, said: opening, pending: [], refused: [], count: 0, before: null };
  let timer = 0;

  function commit(edit) {
    state.count += 1;
    state.pending = [...state.pending.filter(({ key, text }) => text !== undefined || edit.text !== undefined || key !== edit.key), { ...edit, count: state.count }];
    state.refused = state.refused.filter(({ key }) => key !== edit.key);
    onChange();
    read();
  }

  async function read() {
    const count = state.count;
    const edits = state.pending.map(({ key, text, value, do: action }) => (action ? { do: action } : text === undefined ? { key, value } : { key, text }));
    const answer = await ask('find limits', { plan: plan(), asked: state.asked, edits, units: units() });
    if (!answer) return;
    state.asked = answer.asked;
    state.said = answer;
    state.pending = state.pending.filter((edit) => edit.count > count);
    const typed = answer.refused.filter(({ edit }) => edit.text !== undefined).map(({ edit, message }) => ({ key: edit.key, text: edit.text, message }));
    for (const { edit, message } of answer.refused) if (edit.text === undefined) status.say(message);
    state.refused = [...state.refused.filter(({ key }) => !edits.some((edit) => edit.key === key)), ...typed];
    onChange();
  }

  const pieceOf = (path) => state.said.pieces.find(({ key }) => key === path);

  function value(path) {
    const pending = state.pending.findLast(({ key }) => key === path);
    return pending ? pending.value ?? typed(keys.of(path), pending.text) : pieceOf(path)?.value;
  }

  function shown(path) {
    const pending = state.pending.findLast(({ key }) => key === path);
    const key = keys.of(path);
    if (!pending) return pieceOf(path)?.shown ?? '';
    if (pending.text !== undefined) return pending.text;
    return path.endsWith('.0') ? quantities.digitsOf(key, pending.value) : quantities.shown(key, pending.value);
  }

  function step(path, { count, size, from = value(path), run }) {
    const key = keys.of(path);
    if (typeof from !== 'number') return;
    if (run && state.before?.run !== run) state.before = { run, path, value: value(path) };
    const next = quantities.stepped(key, from, count, size, plan());
    const held = Math.min(Math.max(next, key.lowest), key.highest);
    if (held !== next) status.say(quantities.limit(key, next > held));
    if (held !== value(path)) commit({ key: path, value: held });
    else onChange();
  }

  return {
    now: state,
    step,
    value,
    look: (path) => {
      const key = keys.of(path);
      const refused = state.refused.find((edit) => edit.key === path);
      return { shown: shown(path), value: value(path), label: key.label, lowest: key.lowest, highest: key.highest, refused: refused?.text, invalid: Boolean(refused) };
    },
    // The plan has changed, and what comes from it changes with it.
    follow() {
      clearTimeout(timer);
      timer = setTimeout(read, RUN_PAUSE_MS);
    },
    typed: (path, text) => typed(keys.of(path), text),
    asPlan: () => commit({ do: 'as-the-plan' }),
    commit,
    entry: (path) => {
      const key = keys.of(path);
      return { name: key.label, units: Object.keys(families[key.family] ?? {}).filter(Boolean), shown: { digits: quantities.digitsOf(key, value(path) ?? 0), unit: quantities.unitOf(key) } };
    },
    putBack(path) {
      state.refused = state.refused.filter(({ key }) => key !== path);
      onChange();
    },
    takeBack(run) {
      if (state.before?.run !== run) return false;
      commit({ key: state.before.path, value: state.before.value });
      return true;
    },
    refusedText: (path) => state.refused.find(({ key }) => key === path)?.text,
    remove: () => false,
    move: () => {},
    redraw: onChange,
  };
}

// Hands for all numbers of the page: those whose key `isOthers` knows go to the others.
export function eitherHands(hands, others, isOthers) {
  const names = Object.keys(hands).filter((name) => name in others);
  const routed = names.map((name) => [name, (first, ...rest) => (isOthers(first?.key ?? first) ? others : hands)[name](first, ...rest)]);
  return {
    ...hands,
    ...Object.fromEntries(routed),
    takeBack: (run) => others.takeBack(run) || hands.takeBack(run),
    redraw() {
      hands.redraw();
      others.redraw();
    },
  };
}
