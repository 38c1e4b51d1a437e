// The hand-over: the timing table, its sums, how it is copied, and what changed since the plan that was opened.

import { copyText } from './copying.js';
import { createDisclosure } from './disclosure.js';
import { setText } from './number.js';
import { createOnDemand } from './on-demand.js';
import { tableOf } from './table.js';

const at = (id) => document.getElementById(id);
const CHANGED = ['Input', 'as opened', 'now'];

export function createHandOver({ engine, plan, units, status, isBusy, opened }) {
  let origin = opened;
  let answer = null;
  const part = createOnDemand({
    isWanted: () => true, // it is short, and it prints whether or not it is open
    args: () => ({ plan: plan(), opened: origin, units: units() }),
    ask: (args) => engine.ask('hand_over', args),
    show: (next) => { answer = next; show(next); },
    fail: (message) => setText(at('timing-sums'), `The timing table could not be worked out: ${message}`),
    isBusy,
  });
  createDisclosure(at('timing-open'), at('timing-body'));
  at('copy-timing-csv').addEventListener('click', () => copy('csv', 'The timing table is copied as CSV.'));
  at('copy-timing-text').addEventListener('click', () => copy('text', 'The timing table is copied as text.'));

  async function copy(form, said) {
    if (!answer) status.say('The timing table is not worked out yet.');
    else if (await copyText(answer[form])) status.say(said);
    else status.say('This browser does not let the page copy: select the table and copy it.');
  }

  return {
    refresh: part.refresh,
    // After an edit nothing of the earlier plan may be read, copied or printed as if it were this one's.
    wait() {
      part.forget();
      answer = null;
      setText(at('timing-sums'), '…');
      at('timing-table').replaceChildren();
      at('changed').replaceChildren();
      at('changed-heading').hidden = true;
    },
    opened: (first) => { origin = first; },
  };
}

function show({ head, rows, sentences, changed }) {
  setText(at('timing-sums'), sentences.join(' '));
  at('timing-table').replaceChildren(tableOf(head, rows, { caption: 'Timing table', rowHeads: false }));
  at('changed').replaceChildren(...(changed.length ? [tableOf(CHANGED, changed, { caption: 'What changed' })] : ['Nothing has changed since the plan that was opened.']));
  at('changed-heading').hidden = !changed.length;
}
