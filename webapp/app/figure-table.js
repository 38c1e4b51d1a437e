// A figure's data as a table, on request: built when it is opened, filled anew while it stays open.

export function createFigureTable() {
  const node = document.createElement('details');
  node.className = 'figure-table';
  node.appendChild(document.createElement('summary')).textContent = 'As a table';
  const table = node.appendChild(document.createElement('div')).appendChild(document.createElement('table'));
  let data = null;
  const fill = () => {
    if (!node.open || !data) return;
    const head = document.createElement('thead');
    const body = document.createElement('tbody');
    head.append(line('th', data.head));
    body.append(...data.rows.map((cells) => line('td', cells)));
    table.replaceChildren(head, body);
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

function line(tag, cells) {
  const row = document.createElement('tr');
  row.append(...cells.map((text) => {
    const cell = document.createElement(tag);
    cell.textContent = text ?? '';
    if (tag === 'th') cell.scope = 'col';
    return cell;
  }));
  return row;
}
