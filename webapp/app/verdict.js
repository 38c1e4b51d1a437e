// The verdict line: how many findings are not met, and why. The core wrote it in two parts; the first is set strong.

import { setText } from './number.js';

export function createVerdict(line) {
  const lead = line.appendChild(document.createElement('strong'));
  line.append(' ');
  const rest = line.appendChild(document.createElement('span'));
  return {
    update({ lead: count, rest: why, met }) {
      line.dataset.met = String(met);
      setText(lead, count);
      setText(rest, why);
    },
    clear() {
      line.removeAttribute('data-met');
      setText(lead, '');
      setText(rest, '…');
    },
  };
}
