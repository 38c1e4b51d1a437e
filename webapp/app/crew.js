// The search for better plans over one worker or several: slices are handed out by their number, each run in short steps, so
// that whatever else is asked of an engine gets through between two of them. Knows the search's messages, nothing of the page.
// What slices have found is kept here as the engine wrote it, so any worker can list what others have found.

const STEP_MS = { own: 25, further: 100 }; // between two steps the page's own engine answers edits; a further one need not
const FOLD_AT = 12; // whole slices, after which they are put together at the next list

// `more()` starts one more engine for the search alone, or gives null; `count` is how many of those there may be.
export function createCrew({ engine, more, count, onProgress, onEnd, onFault }) {
  let hunt = null;
  let spare = [];

  async function begin(plan, asked, seed = 1) {
    hunt = { terms: { plan, asked, seed }, members: [], done: [], tried: 0, next: 0, whole: 0, slices: null, best: null, running: false };
    const mine = hunt;
    const first = await join(mine, engine);
    mine.slices = first.facts.slices;
    return mine;
  }

  async function join(mine, worker) {
    const member = { worker, number: null, tried: 0, idle: true, ms: worker === engine ? STEP_MS.own : STEP_MS.further };
    member.facts = await worker.ask('find begin', mine.terms);
    mine.members.push(member);
    return member;
  }

  function resume() {
    const mine = hunt;
    mine.running = true;
    mine.turn = (mine.turn ?? 0) + 1;
    for (const member of mine.members) work(mine, member);
    if (mine.members.length === 1) recruit(mine);
  }

  // Further workers take over as they become ready; the page's own engine then goes back to the page.
  function recruit(mine) {
    while (spare.length < count) spare.push(more());
    spare.forEach(async (worker) => {
      try {
        await worker.ready;
        if (mine !== hunt || worker.gone) return;
        const member = await join(mine, worker);
        mine.members[0].leaving = true;
        if (mine.running) work(mine, member);
      } catch {
        // no memory for another one: the engine that is there goes on alone
      }
    });
  }

  async function work(mine, member) {
    if (!member.idle) return;
    member.idle = false;
    try {
      while (mine === hunt && mine.running && take(mine, member)) await step(mine, member);
    } catch (error) {
      if (mine === hunt && !member.worker.gone) onFault(error);
    }
    member.idle = true;
    if (mine === hunt && mine.running && mine.members.every(({ idle, number }) => idle && number === null)) end(mine);
  }

  // Whether there is a slice for this worker: the one it has, or the next.
  function take(mine, member) {
    if (member.number !== null) return true;
    if (member.leaving || (mine.slices !== null && mine.next >= mine.slices)) return false;
    member.number = mine.next;
    mine.next += 1;
    return true;
  }

  async function step(mine, member) {
    const { tried, best, value, text, found } = await member.worker.ask('find run', { number: member.number, ms: member.ms });
    if (mine !== hunt) return;
    member.tried = tried;
    if (best !== undefined && (mine.best === null || best < mine.best.score)) mine.best = { score: best, value, text };
    if (found) finish(mine, member, found);
    onProgress(told(mine));
  }

  function finish(mine, member, found) {
    mine.done.push(found);
    mine.tried += found.tried;
    mine.whole += 1;
    Object.assign(member, { number: null, tried: 0 });
  }

  function told(mine) {
    return { tried: mine.tried + mine.members.reduce((sum, { tried }) => sum + tried, 0), best: mine.best };
  }

  function end(mine) {
    mine.running = false;
    onEnd(mine);
  }

  // The ranked list of all that was found so far, slices under way included, worked out by a worker that the page can spare.
  async function list(given) {
    const mine = hunt;
    const parts = await Promise.all(mine.members.filter(({ number }) => number !== null).map(({ worker }) => worker.ask('find part')));
    const whole = mine.done.length;
    const answer = await lister(mine).ask('find list', { parts: [...mine.done, ...parts.filter(Boolean)], taken: mine.whole, ...given });
    if (whole > FOLD_AT && !parts.some(Boolean)) mine.done.splice(0, whole, answer.merged);
    return mine === hunt ? answer : null;
  }

  const lister = ({ members }) => members.at(-1).worker;

  // The further workers end; what they had found of a slice stays, and that slice counts as done.
  async function dismiss() {
    const mine = hunt;
    for (const member of mine?.members.slice(1) ?? []) {
      const part = member.number === null ? null : await member.worker.ask('find part').catch(() => null);
      if (part) finish(mine, member, part);
    }
    if (!mine || mine.running) return;
    mine.members.splice(1);
    if (mine.members[0]) mine.members[0].leaving = false;
    for (const worker of spare) Object.assign(worker, { gone: true }).end();
    spare = [];
  }

  return {
    begin,
    resume,
    list,
    dismiss,
    stop: () => { if (hunt) hunt.running = false; },
    use: (plan, pris) => lister(hunt).ask('find use', { plan, pris }),
    get running() { return Boolean(hunt?.running); },
  };
}

// How many further workers this device can bear: each needs some 60 MB and a core of its own.
export function workersToSpare({ deviceMemory, hardwareConcurrency = 1 }) {
  const memory = deviceMemory ?? (hardwareConcurrency >= 4 ? 4 : 1); // not every browser says
  return memory >= 4 ? Math.min(3, hardwareConcurrency - 1) : 0;
}
