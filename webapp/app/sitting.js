// Tried in this sitting: one line for every committed change, a run or a drag one line. Holds the plans before and after each; what
// changed and what moved the core says, while nobody waits for it. Lives in the page only. sitting-list.js knows how it looks.

import { copyText } from './copying.js';
import { clock, markdownOf, textOf } from './minutes.js';
import { createSittingList } from './sitting-list.js';

const MOST = 200; // lines; the oldest go first

export function createSitting({ engine, state, status, units, whole, keep, isBusy, first }) {
  const lines = [];
  const list = createSittingList({ act, most: MOST });
  let last = first;
  let count = 0;
  let left = false; // whether lines were left out
  let telling = null;

  const show = () => list.update(lines, left);

  function answered(answer, request) {
    const [before, after] = [last, answer.plan];
    last = after;
    const isStart = request.opened !== null && state.now.past.length === 0; // the note was opened with it
    if (!isStart && !same(before, after)) note(before, after, request);
    if (request.deep && lines.some(({ told }) => !told)) tell();
  }

  function note(before, after, request) {
    if (takenBack(before, after)) return show();
    const { run, name } = request.edits.at(-1) ?? {};
    const line = lines.at(-1);
    if (run && line?.run === run) Object.assign(line, { after, told: null });
    else add({ before, after, run, name: request.edits.length ? name : state.now.past.at(-1)?.name ?? 'A step taken back' });
    if (run && same(lines.at(-1).before, after)) lines.pop(); // a drag that came back to where it began
    return show();
  }

  // Undo marks the line that it takes back, redo gives it back: neither is a change of its own.
  function takenBack(before, after) {
    const line = lines.findLast((one) => (one.back ? same(one.before, before) && same(one.after, after) : same(one.after, before) && same(one.before, after)));
    if (!line || state.now.pending.length || !isTravel()) return false;
    line.back = !line.back;
    return true;
  }

  const isTravel = () => state.now.travelled;

  function add(line) {
    count += 1;
    lines.push({ id: count, at: new Date(), remark: '', told: null, back: false, ...line });
    if (lines.length > MOST) left = Boolean(lines.shift());
  }

  // One line after the other, so that an edit never waits for more than one; `all` waits for none.
  function tell(all = false) {
    telling ??= (async () => {
      for (let line = untold(); line && (all || !isBusy()); line = untold()) {
        const { after } = line;
        const told = await engine.ask('moved', { plan: after, before: line.before, units: units() });
        if (line.after === after) line.told = told;
      }
    })().catch(() => {}).finally(() => { telling = null; show(); });
    return telling;
  }

  const untold = () => lines.findLast(({ told }) => !told);

  async function act(what, id, text) {
    const line = lines.find((one) => one.id === id);
    if (what === 'text' || what === 'markdown') return copy(what);
    if (what === 'remark') line.remark = text;
    if (what === 'remove') lines.splice(lines.indexOf(line), 1);
    if (what === 'return') state.open(line.after, `Back to what was tried at ${clock(line.at)}`);
    if (what === 'compare') keep(line.after, `Compared with what was tried at ${clock(line.at)}.`);
    return show();
  }

  async function copy(what) {
    while (untold()) await tell(true);
    const text = (what === 'text' ? textOf : markdownOf)(lines.map((line) => ({ ...line, time: clock(line.at), address: whole(line.told.link) })));
    const copied = await copyText(text);
    status.say(copied ? `${lines.length} ${lines.length === 1 ? 'line is' : 'lines are'} copied, each with its link.` : 'This browser does not let the page copy.');
  }

  return { answered };
}

function same(one, other) {
  return one === other || JSON.stringify(one) === JSON.stringify(other);
}
