// A table of words: a heading for each column and, where asked, one for each row. The core wrote the words.

export function tableOf(head, rows, { caption = '', rowHeads = true } = {}) {
  const table = document.createElement('table');
  if (caption) table.appendChild(document.createElement('caption')).textContent = caption;
  table.appendChild(document.createElement('thead')).append(lineOf(head, () => 'col'));
  table.appendChild(document.createElement('tbody')).append(...rows.map((cells) => lineOf(cells, (place) => (rowHeads && place === 0 ? 'row' : ''))));
  return table;
}

function lineOf(cells, scopeAt) {
  const row = document.createElement('tr');
  row.append(...cells.map((text, place) => {
    const scope = scopeAt(place);
    const cell = document.createElement(scope ? 'th' : 'td');
    if (scope) cell.scope = scope;
    cell.textContent = text ?? '';
    return cell;
  }));
  return row;
}
