// What pointing in a figure means, whatever the hand: the line under it, the target, a closer look. Knows plan units and view.

import { createReading } from './reading.js';
import { createZooming } from './zooming.js';

export function createPoint({ view, state, quantities, followed, keys, engine, show }) {
  const zooming = createZooming({ view, coverage: () => state.now.plan.coverage });
  const isReady = () => document.documentElement.dataset.engine === 'ready';
  const read = createReading({ engine, plan: () => state.now.plan, units: () => quantities.units, up: () => view.now.up ?? null, isReady, show });
  const [range, speed] = keys;

  function inPlanUnits({ x, y }) {
    return { x: quantities.fromShown(range, x), y: y === null ? null : quantities.fromShown(speed, y) };
  }

  function target() {
    const now = view.now.target;
    return now ? { x: now[range.path.split('.')[1]], y: now[speed.path.split('.')[1]] } : null;
  }

  return {
    read,
    pick: followed.setAt,
    closer: (name, at) => zooming.closer(name, at ? inPlanUnits(at) : target()),
    whole: zooming.whole,
    hole: zooming.around,
    // Of which figures another part is looked at than before.
    changed(before) {
      const [now, then] = [view.now.zoom ?? {}, before ?? {}];
      return Object.keys({ ...now, ...then }).filter((name) => JSON.stringify(now[name]) !== JSON.stringify(then[name]));
    },
  };
}
