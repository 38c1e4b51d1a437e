// A figure's data as a table, on request: built when it is opened, filled anew while it stays open.

import { tableOf } from './table.js';

export function createFigureTable() {
  const node = document.createElement('details');
  node.className = 'figure-table';
  node.appendChild(document.createElement('summary')).textContent = 'As a table';
  const place = node.appendChild(document.createElement('div'));
  let data = null;
  const fill = () => {
    if (node.open && data) place.replaceChildren(tableOf(data.head, data.rows, { rowHeads: false }));
  };
  node.addEventListener('toggle', fill);
  return {
    node,
    update(next) {
      data = next ?? null;
      node.hidden = !data;
      fill();
    },
  };
}
