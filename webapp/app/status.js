// The one polite live region: what an edit did, what was undone. Quiet while a run of edits goes on; gone after a while.

const QUIET_MS = 800; // after the last edit of a run
const SHOWN_MS = 9000;

export function createStatus(region) {
  let [speak, hide] = [0, 0];
  const clear = () => region.replaceChildren();
  region.addEventListener('focusin', () => clearTimeout(hide));
  region.addEventListener('focusout', () => { hide = setTimeout(clear, SHOWN_MS); });

  function show(sentence, actions) {
    region.replaceChildren(sentence, ...actions.map(([word, act]) => button(word, act)));
    clearTimeout(hide);
    hide = setTimeout(clear, SHOWN_MS);
  }

  return {
    say(sentence, ...actions) {
      clearTimeout(speak);
      if (sentence) show(sentence, actions);
    },
    sayWhenQuiet(sentence, onQuiet = () => {}) {
      clearTimeout(speak);
      speak = setTimeout(() => {
        onQuiet();
        if (sentence) show(sentence, []);
      }, QUIET_MS);
    },
    clear,
  };
}

function button(word, act) {
  const node = document.createElement('button');
  node.type = 'button';
  node.textContent = word;
  node.addEventListener('click', act);
  return node;
}
