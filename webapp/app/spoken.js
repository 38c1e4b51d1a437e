// What the page makes of the sentence: which of its numbers stand elsewhere just now.

export function spoken(clauses, tableIsOpen) {
  return clauses.map((clause) => (tableIsOpen && clause.id === 'also' ? asText(clause) : clause));
}

export function shownByKey(clauses) {
  const pieces = clauses.flatMap((clause) => clause.pieces).flatMap((piece) => piece.rail?.flat() ?? [piece]);
  return new Map(pieces.filter(({ key }) => key).map(({ key, shown }) => [key, shown]));
}

// A number that is off its default stands in the open table; the line above then names it without being a second one.
function asText({ pieces, ...clause }) {
  return { ...clause, pieces: pieces.map((piece) => (piece.do ? piece : { text: piece.shown ?? piece.text })) };
}
