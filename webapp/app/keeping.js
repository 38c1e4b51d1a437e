// Keeping a plan to compare with: the word that keeps it, the line under the title that says which plan is shown, key C, swap and
// stop. Knows the state; what differs the core says, and compare.js shows it.

import { isOpen, setText } from './number.js';

const at = (id) => document.getElementById(id);

export function createKeeping({ state, status, address, comparison }) {
  const parts = { keep: at('keep'), which: at('which'), said: at('which-said'), flip: at('which-flip') };
  const present = () => state.now.aside?.plan ?? state.now.plan;

  function keep(plan = present(), said = 'The present plan is kept: change it, and what differs stands under the plan.') {
    state.keep(plan);
    status.say(said, ['Stop comparing', stop]);
  }

  function flip() {
    if (!state.now.kept) return;
    state.flip();
    status.say(state.now.aside ? 'The kept plan is shown.' : 'The present plan is shown.');
  }

  function swap() {
    address.jump();
    state.swap('Swapping with the kept plan');
    status.say('The kept plan is the present one now, and the other is kept.');
  }

  function stop() {
    if (!state.now.kept) return;
    const { kept } = state.now;
    state.keep(null);
    parts.keep.focus();
    status.say('Nothing is compared any more.', ['Compare again', () => state.keep(kept)]);
  }

  parts.keep.addEventListener('click', () => keep());
  parts.flip.addEventListener('click', flip);
  comparison.onActs({ flip, swap, stop });
  addEventListener('keydown', (event) => {
    if (!state.now.kept || !isFlip(event) || isTypedInto(event.target) || document.querySelector('dialog[open]')) return;
    event.preventDefault();
    flip();
  });

  return {
    keep,
    rests: () => status.say('The kept plan is shown, and it cannot be changed.', ['Show the present plan', flip]),
    update() {
      const { kept, aside } = state.now;
      document.documentElement.toggleAttribute('data-kept-shown', Boolean(aside));
      parts.which.hidden = !kept;
      setText(parts.keep, kept ? 'Keep this one instead' : 'Keep to compare');
      parts.keep.disabled = Boolean(aside);
      setText(parts.said, aside ? 'The kept plan is shown.' : 'The present plan is shown; another is kept.');
      setText(parts.flip, aside ? 'Show the present plan' : 'Show the kept plan');
      comparison.flipped(Boolean(aside));
      if (!kept) comparison.update(null);
    },
  };
}

function isFlip({ key, ctrlKey, metaKey, altKey, repeat }) {
  return key.toLowerCase() === 'c' && !ctrlKey && !metaKey && !altKey && !repeat;
}

function isTypedInto(target) {
  if (target.classList?.contains('number')) return isOpen(target);
  return target.isContentEditable || ['TEXTAREA', 'INPUT', 'SELECT'].includes(target.tagName);
}
