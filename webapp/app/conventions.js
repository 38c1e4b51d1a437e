// Assumptions and conventions: what the model leaves out, and a table of conventions with a check by pocket calculator for each.

import { createDisclosure } from './disclosure.js';
import { element } from './element.js';
import { formula } from './formula.js';
import { createOnDemand } from './on-demand.js';

const at = (id) => document.getElementById(id);

export function createConventions({ engine, plan, isBusy }) {
  const opens = ['left-out', 'conventions'].map((id) => createDisclosure(at(`${id}-open`), at(`${id}-body`), () => part.refresh()));
  const part = createOnDemand({
    isWanted: () => opens.some(({ isOpen }) => isOpen()),
    args: () => ({ plan: plan() }),
    ask: (args) => engine.ask('conventions_here', args),
    show: (answer) => {
      at('left-out').replaceChildren(...answer.left_out.map((text) => element('li', '', text)));
      at('conventions-table').replaceChildren(tableOfChecks(answer.rows));
    },
    fail: (message) => at('conventions-table').replaceChildren(`This could not be worked out: ${message}`),
    isBusy,
  });
  return { refresh: part.refresh };
}

// A check that has nothing of this plan in it says so: its numbers are an example's.
function tableOfChecks(rows) {
  const table = document.createElement('table');
  table.append(element('caption', '', 'Conventions'));
  table.appendChild(document.createElement('thead')).append(element('tr', '', ...['Convention', 'Into the calculator', 'It shows'].map((text) => {
    const cell = element('th', '', text);
    cell.scope = 'col';
    return cell;
  })));
  const body = table.appendChild(document.createElement('tbody'));
  for (const { name, text, check, result, here } of rows) {
    const head = element('th', '', element('b', '', name), ' ', element('span', 'convention-text', ...formula(text)));
    head.scope = 'row';
    body.append(element('tr', '', head, element('td', 'check', check, ...(here ? [] : [element('span', 'for-instance', 'for instance')])), element('td', 'shows', result)));
  }
  return table;
}
