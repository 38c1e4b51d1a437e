// Which findings are opened, and what they show: asked of the engine after the pause, in slices that let an edit in between.
// Knows the plan's state and the engine; how workings look is workings.js's.

const SLICE_MS = 60; // how long one slice may keep the engine; an edit waits no longer than that
const MOST_TRIES = 200;

export function createOpenedFindings({ engine, plan, units, isBusy }) {
  const opened = new Map();
  let run = { isGoing: false };
  let tries = 4;

  // One run works through all that is open, and takes in what is opened meanwhile; an edit makes it stop.
  async function refresh() {
    if (run.isGoing) return;
    const mine = { isGoing: true };
    run = mine;
    const isOld = () => mine !== run || isBusy();
    const key = JSON.stringify([plan(), units()]);
    for (const [name, entry] of opened) {
      if (isOld()) break;
      if (entry.key !== key && await workOut(name, entry.shows, isOld)) entry.key = key;
    }
    mine.isGoing = false;
  }

  async function workOut(name, shows, isOld) {
    const given = { plan: plan(), finding: name };
    try {
      const steps = await engine.ask('workings', given);
      if (isOld()) return false;
      shows.showSteps(steps);
      const margins = await inSlices({ ...given, units: units() }, isOld);
      if (margins) shows.showMargins(margins);
      return margins !== null;
    } catch (error) {
      shows.fail(`This could not be worked out: ${error.message}`);
      return true;
    }
  }

  async function inSlices(given, isOld) {
    let answer = { done: false, so_far: null };
    while (!answer.done) {
      const start = performance.now();
      answer = await engine.ask('margins_in_words', { ...given, so_far: answer.so_far, tries });
      if (isOld()) return null;
      tries = paced(tries, performance.now() - start);
    }
    return answer;
  }

  return {
    refresh,
    // After an edit what is open waits; it is worked out again when the edits pause.
    wait() {
      run = { isGoing: false };
      for (const entry of opened.values()) {
        entry.key = '';
        entry.shows.wait();
      }
    },
    open(name, shows) {
      opened.set(name, { shows, key: '' });
      shows.wait();
      refresh();
    },
    close: (name) => opened.delete(name),
  };
}

// As many verdicts as fit into a slice, from what the last one took.
function paced(tries, took) {
  return Math.max(1, Math.min(MOST_TRIES, Math.round(tries * Math.min(2, SLICE_MS / Math.max(took, 1)))));
}
