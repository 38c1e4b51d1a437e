// Rows of tables that people read: a head of column names, cells of text, a row's own name as its head.

// Fill a table; `rows` are lists of cells, the first of each names its row. A cell is text, or {text, note, mark}.
export function fillTable(table, head, rows) {
  const names = document.createElement('thead');
  names.append(row(head.map((text) => cell('th', text, 'col'))));
  const body = document.createElement('tbody');
  body.append(...rows.map(([name, ...cells]) => row([cell('th', name, 'row'), ...cells.map((text) => cell('td', text))])));
  const caption = table.querySelector('caption');
  table.replaceChildren(...(caption ? [caption] : []), names, body);
}

function row(cells) {
  const node = document.createElement('tr');
  node.append(...cells);
  return node;
}

function cell(tag, content, scope) {
  const { text, note = '', mark = '' } = typeof content === 'string' ? { text: content } : content;
  const node = document.createElement(tag);
  if (scope) node.scope = scope;
  if (mark) node.dataset.change = mark;
  node.append(text);
  if (note) node.appendChild(document.createElement('span')).textContent = note;
  return node;
}
