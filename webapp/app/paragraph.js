// The plan's paragraph on the page: clauses of text, numbers, a rail and quiet words that act. Repainted in place, so that
// focus, selection and an open field outlive every answer. What it says comes from sentence.js.

import { setText } from './number.js';

export function createParagraph({ node, numberFor, act }) {
  const clauses = new Map();
  const buttons = new Map();

  function nodeFor(piece) {
    if (piece.key) return numberFor(piece.key);
    if (piece.action) return buttonFor(piece);
    return piece.cells ? railFor(piece) : null;
  }

  function buttonFor({ action, text, label }) {
    if (!buttons.has(action)) buttons.set(action, button(() => act(action)));
    const found = buttons.get(action);
    setText(found, text);
    if (label) found.setAttribute('aria-label', label);
    return found;
  }

  function railFor({ cells, actions }) {
    const rail = railOf(clauses);
    lay(rail, [...cells.map((cell) => cellFor(rail, cell)), ...actions.map(buttonFor)]);
    return rail;
  }

  function cellFor(rail, { key, notes }) {
    const number = numberFor(key);
    const cell = number.closest('.rail-cell') ?? element('span', 'rail-cell');
    lay(cell, [number, ...notes.map((note, i) => noteFor(cell, note, i))]);
    return cell;
  }

  function noteFor(cell, note, i) {
    if (note.key) return numberFor(note.key);
    const found = cell.querySelectorAll('.rail-other')[i] ?? element('span', 'rail-other');
    setText(found, note.text);
    return found;
  }

  function clauseFor({ id, short, pieces, className }) {
    if (!clauses.has(id)) clauses.set(id, element('span', className ?? ''));
    const clause = clauses.get(id);
    clause.dataset.clause = id;
    clause.dataset.short = short;
    lay(clause, pieces.map((piece) => nodeFor(piece) ?? piece.text));
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

function railOf(clauses) {
  if (!clauses.has('rail')) clauses.set('rail', element('span', 'rail'));
  return clauses.get('rail');
}

function element(tag, className) {
  const node = document.createElement(tag);
  if (className) node.className = className;
  return node;
}

function button(act) {
  const node = element('button', 'quiet');
  node.type = 'button';
  node.addEventListener('click', act);
  return node;
}
