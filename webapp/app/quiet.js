// What the live region says after a run of edits: only verdicts that flipped. Knows findings before and after, no page.

import { metOf } from './findings.js';

export function flipped(before, after) {
  const was = new Map((before ?? []).map((finding) => [finding.name, metOf(finding)]));
  const changed = after.filter((finding) => was.has(finding.name) && was.get(finding.name) !== metOf(finding));
  return changed.map((finding) => `${capital(finding.label ?? finding.name)}: ${WORDS[metOf(finding)]}, ${finding.value_text}.`).join(' ');
}

const WORDS = { true: 'now met', false: 'no longer met', accepted: 'not met, accepted', none: 'for information' };

function capital(text) {
  return `${text.slice(0, 1).toUpperCase()}${text.slice(1)}`;
}
