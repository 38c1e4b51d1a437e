// How the plan differs from the kept one: a sentence, the inputs that differ, then the findings, those that are the same closed
// away. Every word is the core's. Knows how it looks; keeping.js knows what its actions do.

import { setText } from './number.js';
import { fillTable } from './rows.js';

const at = (id) => document.getElementById(id);

export function createComparison() {
  const parts = { section: at('compare'), summary: at('compare-summary'), inputs: at('compare-inputs'), findings: at('compare-findings'), rest: at('compare-rest'), same: at('compare-same'), sameSaid: at('compare-same-said'), flip: at('compare-flip') };
  let shown = '';

  function update(found) {
    parts.section.hidden = !found;
    const text = JSON.stringify(found && { ...found, plan: null });
    if (!found || text === shown) return; // an edit that moves nothing here costs nothing here
    shown = text;
    setText(parts.summary, found.summary);
    parts.inputs.hidden = found.inputs.length === 0;
    fillTable(parts.inputs, ['Input', 'Kept plan', 'Present plan'], found.inputs.map(({ label, plan, other }) => [label, other || 'none', plan || 'none']));
    const same = found.findings.filter(({ change }) => change === 'same');
    const rows = (some) => some.map((one) => [capital(one.label), one.other_text || 'not judged', { text: one.value_text || 'not judged', note: one.flipped }, { text: `${one.sign}\u2002${one.word}`, mark: one.change }]);
    const head = ['Finding', 'Kept plan', 'Present plan', 'Change'];
    const differ = found.findings.filter(({ change }) => change !== 'same');
    parts.findings.hidden = differ.length === 0;
    fillTable(parts.findings, head, rows(differ));
    parts.rest.hidden = same.length === 0;
    setText(parts.sameSaid, same.length === 1 ? 'One finding is the same' : `${same.length} findings are the same`);
    fillTable(parts.same, head, rows(same));
  }

  return {
    update,
    flipped: (isKeptShown) => setText(parts.flip, isKeptShown ? 'Show the present plan' : 'Show the kept plan'),
    onActs({ flip, swap, stop }) {
      parts.flip.addEventListener('click', flip);
      at('compare-swap').addEventListener('click', swap);
      at('compare-stop').addEventListener('click', stop);
    },
  };
}

function capital(text) {
  return text.slice(0, 1).toUpperCase() + text.slice(1);
}
