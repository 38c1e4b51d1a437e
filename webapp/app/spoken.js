// What the page adds to the sentence: the way to one more PRI, and which of its numbers stand elsewhere just now.

export function spoken(clauses, tableIsOpen) {
  return withActions(clauses).map((clause) => (tableIsOpen && clause.id === 'also' ? asText(clause) : clause));
}

export function shownByKey(clauses) {
  const pieces = clauses.flatMap((clause) => clause.pieces).flatMap((piece) => piece.rail?.flat() ?? [piece]);
  return new Map(pieces.filter(({ key }) => key).map(({ key, shown }) => [key, shown]));
}

// A rail has its own actions; shorter plans get the way to one more PRI at their end.
function withActions(clauses) {
  const rail = clauses.some(({ pieces }) => pieces.some((piece) => piece.rail));
  const add = { id: 'add', short: false, pieces: [{ do: 'add-pri', text: 'Add a PRI' }] };
  const also = clauses.findIndex(({ id }) => id === 'also');
  return rail ? clauses : clauses.toSpliced(also < 0 ? clauses.length : also, 0, add);
}

// A number that is off its default stands in the open table; the line above then names it without being a second one.
function asText({ pieces, ...clause }) {
  return { ...clause, pieces: pieces.map(({ shown, text }) => ({ text: shown ?? text })) };
}
