// Between the state and the engine: one request for all that is on the screen; what comes back goes to the state.
// Knows when an answer is late, and that the engine may not be there yet or never will be.

const LATE_MS = 150; // the running line appears
const LONG_MS = 1000; // and the word "computing"
const PAUSE_MS = 800; // after the last edit of a run: what takes long is worked out then

export function createAsking({ engine, state, view, figures, sizes, units, onLate, onAnswer, onLook, onFault }) {
  let opened = null; // a link's text, until the engine has read it
  let waits = 0;
  let timers = [];
  let pause = 0;
  let passed = false; // whether a look has taken the place of a note that waited

  const late = (how) => onLate(how);
  const rest = () => {
    timers.forEach(clearTimeout);
    late('');
  };

  // What is worked out in a pause is findings; the figures stand already, and an edit must not wait for them.
  function ask(deep = false) {
    clearTimeout(pause);
    passed = false;
    const request = { ...state.request(), opened };
    const args = { edits: request.edits.map(plain), figures: deep ? [] : figures(), size: sizes(), units: units(), view: view.now, deep };
    if (waits === 0) timers = [setTimeout(late, LATE_MS, 'late'), setTimeout(late, LONG_MS, 'long')];
    waits += 1;
    engine.newest('note', opened === null ? { ...args, plan: request.plan } : { ...args, opened })
      .then((answer) => { if (answer) take(request, answer, deep); else passed = true; }, (error) => onFault(error, request))
      .finally(() => {
        waits -= 1;
        if (waits === 0) rest();
      });
  }

  // Where the plan stays and only the way of looking at it changes: `changed` are the figures of which another part is seen.
  // An edit that waits brings the new view along; a note that a look has replaced is asked for again.
  function look(changed = []) {
    if (opened !== null || state.now.pending.length) return ask();
    const seen = figures();
    const args = { plan: state.now.plan, figures: seen.filter((name) => changed.includes(name)), marked: seen.filter((name) => !changed.includes(name)) };
    const { epoch } = state.now;
    return engine.newest('look', { ...args, size: sizes(), units: units(), view: view.now }).then((answer) => {
      if (!answer) return;
      if (epoch === state.now.epoch && !state.now.pending.length) onLook(answer);
      if (passed) ask();
    }, onFault);
  }

  function take(request, answer, deep) {
    if (!state.settle(request, answer)) return;
    if (request.opened === opened) opened = null;
    onAnswer(answer, { ...request, deep });
    clearTimeout(pause);
    if (!deep) pause = setTimeout(ask, PAUSE_MS, true);
  }

  return {
    ask,
    look,
    open: (text) => { opened = text; },
    isOpening: () => opened !== null,
  };
}

// The core needs the edit as it was made; its number, run and name are the state's own.
function plain({ count, run, name, ...edit }) {
  return edit;
}
