// The line under a figure: where the pointer or the cross-hair is, and what is there. The place stands at once; what is
// there the core says, one question at a time and only the newest, so that no edit waits for more than one of them.

import { newestOf } from './engine.js';

const PATIENCE_MS = 120; // the place alone stands after this

export function createReading({ engine, plan, units, up, isReady, show }) {
  const newest = newestOf(engine.ask);
  let wanted = null;
  let timer = 0;

  return (figure, x, y, place) => {
    clearTimeout(timer);
    wanted = { figure, x, y };
    if (x === null && y === null) return show(figure, '');
    if (!isReady()) return show(figure, place);
    const asked = wanted;
    timer = setTimeout(() => asked === wanted && show(figure, place), PATIENCE_MS);
    return newest('here', { plan: plan(), figure, x, y, units: units(), up: up() }).then((answer) => {
      if (!answer || asked !== wanted) return;
      clearTimeout(timer);
      show(figure, answer.text || place);
    }, () => show(figure, place)); // a plan that has just been left has nothing to say
  };
}
