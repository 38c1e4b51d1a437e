// The reader's units: what is shown, never what the plan is. A link may carry them (`units=nmi,kt,Hz`); else those chosen
// in this sitting hold, and at first the core's own. `now` is one object for good, which whoever shows numbers reads.

const SITTING = 'pulsewright-units';

export function createUnits({ shown, choices, in_link: inLink }) {
  const now = { ...shown, ...asked(sitting(), inLink) };
  const watchers = [];
  const take = (more) => {
    const changed = Object.keys(more).some((name) => now[name] !== more[name]);
    Object.assign(now, more);
    remember(now, inLink);
    if (changed) watchers.forEach((watch) => watch());
  };
  return {
    now,
    choices,
    watch: (watcher) => watchers.push(watcher),
    choose: (name, unit) => take({ [name]: unit }),
    // Units that a link does not name stay as they are shown here, unless it names others.
    fromLink: (text) => {
      const words = text.match(/(?:^|[#&])units=([^&]*)/)?.[1];
      if (words !== undefined) take({ ...shown, ...asked(words, inLink) });
    },
  };
}

function asked(words, inLink) {
  return Object.fromEntries(words.split(',').filter((word) => Object.hasOwn(inLink, word)).map((word) => inLink[word]));
}

// A sitting is this tab's; in some frames nothing can be remembered.
function sitting() {
  try {
    return sessionStorage.getItem(SITTING) ?? '';
  } catch {
    return '';
  }
}

function remember(now, inLink) {
  const words = Object.entries(inLink).filter(([, [name, unit]]) => now[name] === unit).map(([word]) => word);
  try {
    sessionStorage.setItem(SITTING, words.join(','));
  } catch {
    // then the link alone carries them
  }
}
