// What a hand does to the followed target: sets it in a figure, types or steps its two numbers, drops it. The plan's own
// numbers go through hands.js; these change the view only, so undo does not concern them.

const PREFIX = 'followed.';
const RANGE = 'range_km';
const SPEED = 'speed_mps';
const OF = { range: RANGE, speed: SPEED };

export function createFollowed({ keys, view, state, quantities, typed: read, engine, status, redraw }) {
  const typed = new Map(); // by path: a text that the core has not answered, or has refused
  const before = new Map(); // by run: what a drag began with
  const byPath = new Map(keys.map((key) => [key.path, key]));
  const nameOf = (path) => path.slice(PREFIX.length);
  const now = () => view.now.target ?? null;
  const value = (path) => now()?.[nameOf(path)];

  function middle() {
    const { range_km: ranges, speed_mps: speeds } = state.now.plan.coverage;
    const half = ([low, high]) => Number(((low + high) / 2).toPrecision(3));
    return { [RANGE]: half(ranges), [SPEED]: half(speeds) };
  }

  // What is not given stays; what there is none of yet is the middle of the coverage.
  function set(given) {
    const next = { ...middle(), ...now() };
    for (const [name, number] of Object.entries(given)) {
      const { lowest, highest } = byPath.get(PREFIX + name);
      next[name] = Math.min(Math.max(number, lowest), highest);
      typed.delete(PREFIX + name);
    }
    view.choose('target', next);
    redraw();
  }

  // A place in a figure, in the units on its axes; `fine` is how much of them a pixel is. Where a speed is an apparent one,
  // which repeats by `fold`, the true one next to the present target's is meant.
  function setAt(measures, place, fine, fold) {
    const given = {};
    for (const [side, what] of Object.entries(measures)) {
      const key = byPath.get(PREFIX + OF[what]);
      const plain = (shown) => quantities.fromShown(key, shown);
      if (place[side] === null) continue;
      const at = plain(roundedTo(place[side], fine[side]));
      const present = value(key.path) ?? middle()[OF[what]];
      given[OF[what]] = fold ? Number((at + Math.round((present - at) / plain(fold)) * plain(fold)).toPrecision(6)) : at;
    }
    if (Object.keys(given).length) set(given);
  }

  function step(path, { count, size, from = value(path) ?? middle()[nameOf(path)], run }) {
    if (run && !before.has(run)) before.set(run, now());
    const key = byPath.get(path);
    const next = quantities.stepped(key, from, count, size, state.now.plan);
    const held = Math.min(Math.max(next, key.lowest), key.highest);
    if (held !== next) status.say(quantities.limit(key, next > held));
    set({ [nameOf(path)]: held });
  }

  async function commit({ key: path, text }) {
    typed.set(path, { text });
    redraw();
    try {
      const answer = await engine.ask('typed-target', { name: nameOf(path), text, current: value(path) ?? null, units: quantities.units });
      if (typed.get(path)?.text === text) set({ [nameOf(path)]: answer.value });
    } catch (error) {
      if (typed.get(path)?.text === text) typed.set(path, { text, message: error.message });
      redraw();
    }
  }

  return {
    middle,
    set,
    setAt,
    step,
    commit,
    value,
    typed: (path, text) => read(byPath.get(path), text),
    drop() {
      typed.clear();
      view.choose('target', null);
      redraw();
    },
    owns: (path) => path?.startsWith(PREFIX),
    putBack: (path) => { typed.delete(path); redraw(); },
    refusedText: (path) => (typed.get(path)?.message ? typed.get(path).text : undefined),
    remove: () => false,
    move: () => false,
    isRun: (run) => before.has(run),
    takeBack(run) {
      view.choose('target', before.get(run));
      redraw();
    },
    entry(path) {
      const key = byPath.get(path);
      const units = key.unit === 'km' ? ['km', 'nmi', 'm'] : ['m/s', 'km/h', 'kt'];
      return { name: key.label, units, shown: { digits: quantities.digitsOf(key, value(path)), unit: quantities.unitOf(key) } };
    },
    look(path, { waiting, plain }) {
      const key = byPath.get(path);
      const { text, message } = typed.get(path) ?? {};
      const shown = text !== undefined && !message ? text : quantities.shown(key, value(path));
      return {
        ...{ shown, value: value(path), label: key.label, lowest: key.lowest, highest: key.highest, plain },
        ...{ waiting: waiting && text !== undefined, refused: message && text, invalid: Boolean(message), reason: 'target-refused' },
      };
    },
    refusals: () => [...typed].filter(([, { message }]) => message).map(([path, { message }]) => {
      const key = byPath.get(path);
      return { key: path, label: key.label, message, still: quantities.shown(key, value(path)) };
    }),
  };
}

// The plan's hands and the target's as one: a number belongs to one of them by its key.
export function handsFor(plan, followed) {
  const of = (path) => (followed.owns(path) ? followed : plan);
  const both = ['step', 'entry', 'value', 'typed', 'putBack', 'refusedText', 'remove', 'move'].map((name) => [name, (path, ...given) => of(path)[name](path, ...given)]);
  return {
    ...plan,
    ...Object.fromEntries(both),
    commit: (edit, run) => of(edit.key).commit(edit, run),
    takeBack: (run) => (followed.isRun(run) ? followed : plan).takeBack(run),
  };
}

// To the decade that a pixel is: 84.2 and not 84.23817.
function roundedTo(value, fine) {
  const decade = Math.floor(Math.log10(Math.abs(fine) || 1));
  return Number((Math.round(value / 10 ** decade) * 10 ** decade).toFixed(Math.max(0, -decade)));
}
