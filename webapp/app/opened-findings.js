// Which findings are opened, and what they show: asked of the engine after the pause, in slices that let an edit in between.
// Knows the plan's state and the engine; how workings look is workings.js's.

const SLICE_MS = 50; // how long the verdicts of one slice may keep the engine; an edit waits little longer than that
const MOST_TRIES = 200;

export function createOpenedFindings({ engine, plan, units, isBusy }) {
  const opened = new Map();
  let run = { isGoing: false };

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
    let pace = { tries: 1, besides: null };
    while (!answer.done) {
      const start = performance.now();
      answer = await engine.ask('margins_in_words', { ...given, so_far: answer.so_far, tries: pace.tries });
      if (isOld()) return null;
      pace = paced(pace, performance.now() - start);
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

// As many verdicts as fit into a slice. What a slice costs besides them (reading the plan, taking up the walk) is not counted:
// it was measured with a single one, and slices of nothing else would never end.
function paced({ tries, besides }, took) {
  if (besides === null) return { tries: 2, besides: took };
  const each = Math.max(took - besides, 0.5) / tries;
  return { tries: Math.max(1, Math.min(MOST_TRIES, 2 * tries, Math.round(SLICE_MS / each))), besides: Math.min(besides, took) };
}
