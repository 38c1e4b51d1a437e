// "A better plan": the limits in words, the search, what it found and what becomes of it. Brings the finder's parts together;
// the search itself runs in the crew's workers, and what is taken becomes the plan through `take`.

import { createCrew, workersToSpare } from './crew.js';
import { createProgress } from './finder-progress.js';
import { createFoundPlans } from './found-plans.js';
import { createKeys } from './keys.js';
import { createLimits } from './limits.js';
import { createLimitsSentence } from './limits-sentence.js';
import { setText } from './number.js';
import { createRefused } from './refused.js';
import { createTradeOff } from './trade-off.js';

const LIST_EVERY_MS = { alone: 6000, spared: 2500 }; // a list takes its worker some tenths of a second
const KEEP_MS = 30000; // further workers are kept for so long after the last search
const at = (id) => document.getElementById(id);

export function createFinder({ opening, engine, more, newest, plan, pending, quantities, typed, units, status, take }) {
  const keys = createKeys(opening.finder.keys);
  const section = at('finder');
  const hook = (name) => section.querySelector(`[data-finder="${name}"]`);
  const [start, stop] = [hook('start'), hook('stop')];
  const limits = createLimits({ ask: newest, plan, keys, quantities, typed, families: opening.units.families, units, status, opening: opening.finder.said, onChange: () => draw() });
  const refused = createRefused(at('finder-refused'), limits.putBack, (still) => `The search takes ${still}.`);
  const sentence = createLimitsSentence({ node: at('finder-limits'), offers: at('finder-offers'), wants: at('finder-wants'), refused, limits, keys });
  const progress = createProgress(hook('progress'));
  const plans = createFoundPlans({ place: hook('plans'), colours: opening.finder.colours, onSelect: (i) => select(i), onUse: use });
  const trade = createTradeOff({ node: at('trade-off'), item: opening.items['trade-off'], onPick: select, onAgainst: () => list() });
  const crew = createCrew({ engine, more, count: workersToSpare(navigator), onProgress: told, onEnd: ended, onFault: fault });
  const run = { told: { tried: 0, best: null }, listed: 0, listing: null, shown: null, asked: null, dismiss: 0, seen: false, mine: null };

  const signature = () => JSON.stringify([limits.now.asked, plan()]);

  function draw() {
    sentence.draw();
    const isOn = crew.running;
    stop.hidden = !isOn;
    start.hidden = isOn;
    setText(start, run.asked === signature() && run.resumable ? 'Go on' : 'Find plans');
    start.disabled = document.documentElement.dataset.engine !== 'ready' || Boolean(limits.now.said.blocked) || limits.now.refused.length > 0;
    drawFor();
  }

  // The list stays when plan or limits change, and says what it is for.
  function drawFor() {
    const isOther = run.asked !== null && run.asked !== signature();
    setText(at('finder-for'), isOther ? `These are for the limits and the plan as they were: ${run.words}` : '');
    at('finder-for').hidden = !isOther;
  }

  async function begin() {
    clearTimeout(run.dismiss);
    const isNew = run.asked !== signature() || !run.resumable;
    try {
      if (isNew) await afresh();
    } catch (error) {
      return say(error.message);
    }
    run.resumable = true;
    progress.begin(isNew);
    crew.resume();
    return draw();
  }

  async function afresh() {
    const words = limits.now.said.pieces.filter((piece) => piece.key || !piece.set).map(({ shown, text, options, value, do: action }) => (action ? '' : shown ?? text ?? options.find(([name]) => name === value)[1])).join('').trim();
    const asked = signature();
    const terms = [plan(), limits.now.asked];
    await crew.begin(...terms);
    Object.assign(run, { asked, words, told: { tried: 0, best: null }, listed: 0, shown: null });
    plans.clear();
    say('');
    at('finder-found').hidden = true;
  }

  function told(now) {
    run.told = now;
    if (!crew.running) return;
    progress.told(now);
    if (hook('plans').matches(':hover, :focus-within')) return; // a row stays under the hand
    const patience = workersToSpare(navigator) ? LIST_EVERY_MS.spared : LIST_EVERY_MS.alone;
    if (now.best && now.best.score !== run.shown && !run.listing && !pending() && performance.now() - run.listed > patience) list();
  }

  function halt() {
    crew.stop();
    rest();
  }

  function ended() {
    run.resumable = false;
    rest();
  }

  function rest() {
    progress.end(run.told);
    draw();
    list();
    clearTimeout(run.dismiss);
    run.dismiss = setTimeout(() => { if (!crew.running) crew.dismiss(); }, KEEP_MS);
  }

  async function list() {
    if (run.listing) {
      run.again = true;
      return run.listing;
    }
    run.listing = work();
    await run.listing.catch(fault);
    run.listing = null;
    run.listed = performance.now();
    if (run.again) {
      run.again = false;
      return list();
    }
    return null;
  }

  async function work() {
    const { best } = run.told;
    const answer = await crew.list({ units: units(), against: trade.against(), chosen: null });
    if (!answer) return;
    run.shown = best?.score ?? null;
    hook('plans').dataset.tried = answer.merged.tried;
    if (!crew.running) progress.end({ ...run.told, tried: Math.max(run.told.tried, answer.merged.tried) }); // a list asked for before the stop may come after it
    const kept = run.rows?.[plans.chosen]?.pris.join();
    run.rows = answer.rows;
    at('finder-found').hidden = answer.rows.length === 0;
    say(answer.verdict || (answer.proved ? 'All sets have been gone through: the first of the list is the best there is.' : ''));
    plans.show(answer);
    if (!answer.rows.length) return;
    await trade.show(answer.trade, answer.rows);
    const again = answer.rows.findIndex(({ pris }) => pris.join() === kept);
    if (again >= 0) select(again);
    else trade.select(null);
  }

  function select(i, isFocused) {
    plans.select(i, isFocused);
    trade.select(i);
  }

  async function use({ pris, intervals }) {
    try {
      const { plan: next, link } = await crew.use(plan(), pris);
      run.mine ??= plan();
      take(next, link, `The found plan (${intervals})`);
      status.say(`The plan is now ${intervals}.`, ['Back to mine', back]);
      at('finder-back').hidden = false;
    } catch (error) {
      say(error.message);
    }
  }

  async function back() {
    if (!run.mine) return;
    const mine = run.mine;
    run.mine = null;
    at('finder-back').hidden = true;
    take(mine, null, 'Your own plan');
  }

  function say(text) {
    setText(at('finder-said'), text);
    at('finder-said').hidden = !text;
  }

  function fault(error) {
    crew.stop();
    draw();
    say(`The search had to stop: ${error.message}`);
  }

  start.addEventListener('click', begin);
  stop.addEventListener('click', halt);
  at('finder-back').addEventListener('click', back);
  new IntersectionObserver((entries) => {
    run.seen = entries.at(-1).isIntersecting;
    if (run.seen) limits.follow();
  }, { rootMargin: '400px' }).observe(section);
  draw();

  return {
    limits,
    owns: (path) => String(path).startsWith('find.'),
    // Units have changed: all words are said anew.
    relist() {
      limits.follow();
      if (run.rows) list();
    },
    // The plan has been answered: what comes from it in the sentence changes with it, while the part is in sight.
    follow() {
      draw();
      if (run.seen) limits.follow();
    },
  };
}
