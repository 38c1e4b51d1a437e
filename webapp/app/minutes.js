// The lines of a sitting for the minutes: as plain text, and as a table in Markdown; each line with its link. Joins the core's words.

export function textOf(lines) {
  return lines.map((line) => [
    `${line.time}  ${whatOf(line)}`,
    ...line.told.findings.map((one) => `       ${movedOf(one)}`),
    ...(line.remark ? [`       Remark: ${line.remark}`] : []),
    `       ${line.address}`,
  ].join('\n')).join('\n');
}

export function markdownOf(lines) {
  const rows = lines.map((line) => [line.time, whatOf(line), line.told.findings.map(movedOf).join('; ') || 'nothing moved', line.remark, `[link](${line.address})`]);
  return [['Time', 'What changed', 'What moved', 'Remark', 'Link'], ['---', '---', '---', '---', '---'], ...rows].map((cells) => `| ${cells.map(inCell).join(' | ')} |`).join('\n');
}

export function whatOf({ told, name, back }) {
  const what = told ? told.what ?? name : `${name} …`;
  return `${what}${back ? ' (taken back)' : ''}`;
}

export function movedOf({ label, text, word, flipped }) {
  return `${label}: ${text}, ${word}${flipped ? `, ${flipped}` : ''}`;
}

export function clock(at) {
  return `${String(at.getHours()).padStart(2, '0')}:${String(at.getMinutes()).padStart(2, '0')}`;
}

// A bar would end the cell, a line end the row.
function inCell(text) {
  return text.replaceAll('\\', '\\\\').replaceAll('|', '\\|').replace(/\s*\n\s*/g, ' ');
}
