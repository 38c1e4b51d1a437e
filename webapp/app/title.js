// The title, edited where it stands: a click or Enter makes it a field, Enter or leaving it commits, Escape puts it back.

import { setText } from './number.js';

export function createTitle(heading, { label, longest, commit }) {
  let text = '';
  const restore = () => setText(heading, text);
  heading.contentEditable = 'plaintext-only';
  if (heading.contentEditable !== 'plaintext-only') heading.contentEditable = 'true';
  heading.spellcheck = false;
  heading.dataset.placeholder = 'Untitled plan';
  heading.setAttribute('aria-label', label);

  heading.addEventListener('keydown', (event) => {
    if (event.key !== 'Enter' && event.key !== 'Escape') return;
    event.preventDefault();
    if (event.key === 'Escape') restore();
    heading.blur();
  });
  heading.addEventListener('blur', () => {
    const typed = heading.textContent.replace(/\s+/g, ' ').trim().slice(0, longest);
    setText(heading, typed);
    if (typed !== text) commit(typed);
  });

  return {
    stop: () => { heading.contentEditable = 'false'; },
    update(next) {
      text = next ?? '';
      if (document.activeElement !== heading) restore();
      document.title = text ? `${text} · Pulsewright` : 'Pulsewright';
    },
  };
}
