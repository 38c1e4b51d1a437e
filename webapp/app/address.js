// The page's address: reads the fragment, replaces it after a pause as the plan changes, adds an entry for a jump.
// Where the history refuses (some frames), the fragment is set; where that refuses too, the plan lives in memory only.

const PAUSE_MS = 400;

export function createAddress(onOpened) {
  let own = fragment();
  let timer = 0;
  let isJump = false;
  const opened = () => {
    if (fragment() === own) return;
    clearTimeout(timer);
    own = fragment();
    onOpened(own);
  };
  addEventListener('hashchange', opened);
  addEventListener('popstate', opened);
  const put = (text, method) => {
    if (text === fragment()) return;
    own = text;
    try {
      history[method](null, '', `#${text}`);
    } catch {
      setHash(text);
    }
  };
  return {
    opened: own,
    // The next link that is shown is a jump: it gets an entry of its own.
    jump: () => { isJump = true; },
    show(text) {
      clearTimeout(timer);
      if (isJump) {
        isJump = false;
        put(text, 'pushState');
        return;
      }
      timer = setTimeout(put, PAUSE_MS, text, 'replaceState');
    },
    add(text) {
      clearTimeout(timer);
      put(text, 'pushState');
    },
    whole: (text) => `${location.href.replace(/#.*$/s, '')}#${text}`,
  };
}

function fragment() {
  return location.hash.replace(/^#/, '');
}

function setHash(text) {
  try {
    location.hash = text;
  } catch {
    // nothing to be done: "Copy link" still gives the plan
  }
}
