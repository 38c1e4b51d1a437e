// How far the search is: sets tried, how many a second, the best so far and the curve that led there. Draws, computes nothing.

const [WIDTH, HEIGHT, EDGE] = [120, 24, 2];
const RATE_OVER_MS = 2000;
const DRAW_MS = 100;

export function createProgress(node) {
  const [path, text] = [node.querySelector('path'), node.querySelector('span')];
  const run = { worked: 0, began: 0, curve: [], counts: [], drawn: 0 };

  const elapsed = () => run.worked + (run.began ? performance.now() - run.began : 0);

  function draw(told, isOver) {
    node.hidden = false;
    node.dataset.tried = told.tried;
    node.dataset.rate = Math.round(rate());
    node.dataset.best = told.best?.value ?? '';
    const best = told.best ? `; best so far: ${told.best.text}` : '; none meets every limit yet';
    text.textContent = `${grouped(told.tried)} sets tried, ${isOver ? `${(elapsed() / 1000).toFixed(1)}\u202fs` : `${grouped(rounded(rate()))} a second`}${best}`;
    path.setAttribute('d', curveOf(run.curve, elapsed()));
  }

  // Sets a second over the last two seconds.
  function rate() {
    const [first, last] = [run.counts[0], run.counts.at(-1)];
    return last && last.at > first.at ? (1000 * (last.tried - first.tried)) / (last.at - first.at) : 0;
  }

  return {
    begin(isNew) {
      if (isNew) Object.assign(run, { worked: 0, curve: [] });
      Object.assign(run, { began: performance.now(), counts: [], drawn: 0 });
    },
    told(told) {
      const at = elapsed();
      run.counts = [...run.counts.filter((count) => count.at > at - RATE_OVER_MS), { at, tried: told.tried }];
      if (told.best && told.best.score !== run.curve.at(-1)?.score) run.curve.push({ at, score: told.best.score });
      if (at - run.drawn < DRAW_MS && run.drawn) return;
      run.drawn = at;
      draw(told, false);
    },
    end(told) {
      run.worked = elapsed();
      run.began = 0;
      draw(told, true);
    },
    hide: () => { node.hidden = true; },
    elapsed,
  };
}

// Steps down from the first find to the best, along the time.
function curveOf(curve, now) {
  if (!curve.length) return '';
  const [worst, best] = [curve[0].score, curve.at(-1).score];
  const x = (at) => (EDGE + ((WIDTH - 2 * EDGE) * at) / Math.max(now, 1)).toFixed(1);
  const y = (score) => (worst > best ? EDGE + ((HEIGHT - 2 * EDGE) * (worst - score)) / (worst - best) : HEIGHT - EDGE).toFixed(1);
  return `M${curve.map(({ at, score }, i) => `${i ? `H${x(at)}V` : `${x(at)} `}${y(score)}`).join('')}H${x(now)}`;
}

function rounded(value) {
  const place = 10 ** Math.max(0, Math.floor(Math.log10(Math.max(value, 1))) - 1);
  return Math.round(value / place) * place;
}

function grouped(value) {
  return String(Math.round(value)).replace(/\B(?=(\d{3})+(?!\d))/g, '\u202f');
}
