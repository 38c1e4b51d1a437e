// The one state of the note: the last good plan, the edits that it has not answered yet, those it refused, and undo.
// Also the plan that is kept to compare with; while it is shown, the present one is laid aside. Knows nothing of the page or the engine. Edits are {key, text}, {key, value} or {do: ...}, as the core takes them.

const DEPTH = 200; // undo steps

export function createState(plan) {
  const watchers = [];
  const state = { plan, pending: [], refused: [], kept: null, aside: null, travelled: false, past: [], future: [], epoch: 0, count: 0, lost: new Set() };
  const changed = (cause) => watchers.forEach((watch) => watch(cause));
  return {
    now: state,
    watch: (watcher) => watchers.push(watcher),
    commit: (edit, run) => {
      if (state.aside) return changed('resting');
      commit(state, edit, run);
      return changed('edit');
    },
    putBack: (key) => { state.refused = state.refused.filter((edit) => edit.key !== key); changed('put back'); },
    keep: (kept) => { home(state); state.kept = kept; changed('kept'); },
    flip: () => { if (!home(state)) layAside(state); changed('flip'); },
    swap: (name) => { swap(state, name); changed('open'); },
    undo: () => travel(state, state.past, state.future, changed),
    redo: () => travel(state, state.future, state.past, changed),
    takeBack: (run) => { if (state.past.at(-1)?.run === run) takeBack(state, changed); },
    begin: (first) => { state.plan = first; changed('begin'); },
    open: (next, name) => { open(state, next, name); changed('open'); },
    settle: (request, answer) => settle(state, request, answer, changed),
    // How many edits up to this one were committed: what was refused was not, and what makes it possible commits both as one.
    committed: (count) => count - [...state.lost].filter((lost) => lost <= count).length,
    request: () => ({ plan: state.plan, edits: [...state.pending, ...state.refused], epoch: state.epoch, count: state.count }),
  };
}

// A run (a drag, arrow steps without a pause) is one step of undo, and only its newest value waits.
function commit(state, edit, run) {
  state.count += 1;
  state.travelled = false;
  if (!run || state.past.at(-1)?.run !== run) {
    state.past = [...state.past, { ...moment(state), key: edit.key, name: edit.name, run, at: state.count }].slice(-DEPTH);
  }
  state.future = [];
  const others = state.pending.filter((other) => !run || other.run !== run);
  state.pending = [...others, { ...edit, run, count: state.count }];
  state.refused = state.refused.filter((other) => other.key !== edit.key || !edit.key);
}

function open(state, plan, name) {
  home(state);
  state.count += 1;
  state.past = [...state.past, { ...moment(state), name, at: state.count }].slice(-DEPTH);
  Object.assign(state, { plan, pending: [], refused: [], future: [], epoch: state.epoch + 1, travelled: false });
}

// The kept plan and the present one change places; undo puts both back.
function swap(state, name) {
  home(state);
  const { plan, kept } = state;
  open(state, kept, name);
  state.past.at(-1).kept = kept;
  state.kept = plan;
}

// The kept plan is looked at; what the present one waits for waits with it.
function layAside(state) {
  const { plan, pending, refused, kept } = state;
  Object.assign(state, { aside: { plan, pending, refused }, plan: kept, pending: [], refused: [], epoch: state.epoch + 1 });
}

function home(state) {
  if (!state.aside) return false;
  Object.assign(state, { ...state.aside, aside: null, epoch: state.epoch + 1 });
  return true;
}

function moment({ plan, pending }) {
  return { plan, pending };
}

function travel(state, from, to, changed) {
  home(state);
  const step = from.at(-1);
  if (!step) return null;
  from.pop();
  to.push({ ...step, ...moment(state), ...('kept' in step ? { kept: state.kept } : {}) });
  if ('kept' in step) state.kept = step.kept;
  Object.assign(state, { plan: step.plan, pending: step.pending, refused: [], epoch: state.epoch + 1, count: state.count + 1, travelled: true });
  changed('travel');
  return step;
}

function takeBack(state, changed) {
  const step = state.past.pop();
  Object.assign(state, { plan: step.plan, pending: step.pending, epoch: state.epoch + 1, count: state.count + 1 });
  changed('travel');
}

// What an answer included is no longer pending; what came since still is. An answer from before a jump is dropped.
function settle(state, request, answer, changed) {
  if (request.epoch !== state.epoch) return false;
  const came = (edit) => edit.count > request.count;
  const refusals = answer.refused.map(({ edit, message }) => ({ ...sentFor(request, edit), message }));
  const replaced = new Set(state.pending.filter(came).map((edit) => edit.key));
  state.plan = answer.plan;
  state.pending = state.pending.filter(came);
  // A refused step is told and forgotten; a refused text stays where it was typed.
  state.refused = refusals.filter((edit) => edit.text !== undefined && edit.key && !replaced.has(edit.key));
  forgetRefused(state, refusals);
  changed('answer');
  return true;
}

function sentFor({ edits }, { key, text, value }) {
  return edits.findLast((edit) => edit.key === key && edit.text === text && edit.value === value) ?? {};
}

// What was refused has changed nothing, so there is nothing to undo.
function forgetRefused(state, refusals) {
  const counts = new Set(refusals.map((edit) => edit.count));
  for (const count of counts) state.lost.add(count);
  state.past = state.past.filter((step) => !counts.has(step.at));
}
