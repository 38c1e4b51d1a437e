// Between the state and the engine: one request for all that is on the screen; what comes back goes to the state.
// Knows when an answer is late, and that the engine may not be there yet or never will be.

const LATE_MS = 150; // the running line appears
const LONG_MS = 1000; // and the word "computing"
const PAUSE_MS = 800; // after the last edit of a run: what takes long is worked out then

export function createAsking({ engine, state, view, figures, sizes, units, onLate, onAnswer, onFault }) {
  let opened = null; // a link's text, until the engine has read it
  let waits = 0;
  let timers = [];
  let pause = 0;

  const late = (how) => onLate(how);
  const rest = () => {
    timers.forEach(clearTimeout);
    late('');
  };

  function ask(deep = false) {
    clearTimeout(pause);
    const request = { ...state.request(), opened };
    const args = { edits: request.edits.map(plain), figures: figures(), size: sizes(), units: units(), view: view.now, deep };
    if (waits === 0) timers = [setTimeout(late, LATE_MS, 'late'), setTimeout(late, LONG_MS, 'long')];
    waits += 1;
    engine.newest('note', opened === null ? { ...args, plan: request.plan } : { ...args, opened })
      .then((answer) => { if (answer) take(request, answer, deep); }, (error) => onFault(error, request))
      .finally(() => {
        waits -= 1;
        if (waits === 0) rest();
      });
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
    open: (text) => { opened = text; },
    isOpening: () => opened !== null,
  };
}

// The core needs the edit as it was made; its number, run and name are the state's own.
function plain({ count, run, name, ...edit }) {
  return edit;
}
