// The plan's paragraph on the page: clauses of text, numbers, a rail and quiet words that act. Repainted in place, so that
// focus, selection and an open field outlive every answer. What it says comes from sentence.js.

import { quietButton } from './fields.js';
import { setText } from './number.js';

const RAIL_ACTIONS = [{ do: 'add-pri', text: '+', name: 'Add a PRI' }, { do: 'sort-pris', text: 'Sort', name: 'Sort the PRIs' }];

export function createParagraph({ node, numberFor, act }) {
  const parts = new Map();
  const buttons = new Map();

  function nodeFor(piece) {
    if (piece.key) return numberFor(piece.key);
    if (piece.do) return buttonFor(piece);
    return piece.rail ? railFor(piece.rail) : piece.text;
  }

  function buttonFor({ do: action, text, at, name }) {
    const id = `${action} ${at ?? ''}`;
    if (!buttons.has(id)) buttons.set(id, quietButton(text, name, () => act(action, at === undefined ? {} : { index: at })));
    setText(buttons.get(id), text);
    buttons.get(id).setAttribute('aria-label', name ?? text);
    return buttons.get(id);
  }

  function railFor(cells) {
    const rail = partFor('rail', 'rail');
    lay(rail, [...cells.map(cellFor), ...RAIL_ACTIONS.map(buttonFor)]);
    return rail;
  }

  // The first line of a cell is the interval; the copy of a rail reads as a list.
  function cellFor(lines, i, all) {
    const cell = partFor(`cell ${i}`, 'rail-cell');
    const end = partFor(`end ${i}`, 'rail-end');
    setText(end, i === all.length - 1 ? '.' : '; ');
    lay(cell, [...lines.flatMap((line, row) => [commaFor(i, row), lineFor(line, i, row)]).slice(1), end]);
    return cell;
  }

  function lineFor({ key, text, before, after }, i, row) {
    const line = partFor(`line ${i} ${row}`, key ? 'rail-line' : 'rail-other');
    lay(line, key ? [before, numberFor(key), after].filter(Boolean) : [text]);
    return line;
  }

  function commaFor(i, row) {
    const comma = partFor(`comma ${i} ${row}`, 'rail-end');
    setText(comma, ', ');
    return comma;
  }

  function partFor(id, className) {
    if (!parts.has(id)) parts.set(id, element('span', className));
    return parts.get(id);
  }

  function clauseFor({ id, short, pieces }) {
    const clause = partFor(`clause ${id}`, id === 'also' ? 'also' : '');
    clause.dataset.clause = id;
    clause.dataset.short = short;
    lay(clause, pieces.map(nodeFor));
    return clause;
  }

  return {
    update(said) {
      const focused = document.activeElement;
      lay(node, said.flatMap((clause, i) => (i ? [' ', clauseFor(clause)] : [clauseFor(clause)])));
      if (focused !== document.activeElement && node.contains(focused)) focused.focus({ preventScroll: true });
    },
  };
}

// Give a node these children, strings as text nodes; what is already right is not touched.
export function lay(node, wanted) {
  wanted.forEach((child, i) => {
    const present = node.childNodes[i];
    if (typeof child !== 'string') {
      if (present !== child) node.insertBefore(child, present ?? null);
    } else if (present?.nodeType !== Node.TEXT_NODE) node.insertBefore(document.createTextNode(child), present ?? null);
    else if (present.data !== child) present.data = child;
  });
  while (node.childNodes.length > wanted.length) node.lastChild.remove();
}

function element(tag, className) {
  const node = document.createElement(tag);
  if (className) node.className = className;
  return node;
}
