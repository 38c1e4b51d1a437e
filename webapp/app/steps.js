// How far one step of an arrow key or a drag goes, in the unit that is shown. Steps are decimal, and a PRI's end on the clock.
// Knows keys and the plan's clock; nothing of the page.

const COARSE_ABOVE_US = 200; // a PRI above this is stepped by its key's step, below by a tenth of it
const SURE_DIGITS = 12; // a converted step is rounded so that 60 nmi and one is 61 nmi

// `how` says how the plan's unit becomes the shown one (none where it is the shown one), `shown` is the value in it.
export function stepped({ key, how, figures, shown, from, count, finest, plan }) {
  const next = how ? inPlanUnit(how, shown + count * shownStep(shown, figures, finest)) : plainStep(key, from, count, finest, plan);
  return key.family === 'pri' ? onClock(next, from, how?.over ? -count : count, finest, plan) : next;
}

// In another unit: one in the last figure that is shown, or a tenth of it.
function shownStep(shown, figures, finest) {
  const place = shown === 0 ? 0 : Math.min(0, Math.floor(Math.log10(Math.abs(shown))) - figures + 1);
  return 10 ** (place - (finest ? 1 : 0));
}

function inPlanUnit(how, shown) {
  const value = Number(shown.toPrecision(SURE_DIGITS));
  if ('over' in how) return value > 0 ? Number((how.over / value).toPrecision(SURE_DIGITS)) : Infinity;
  return Number((value * how.divide).toPrecision(SURE_DIGITS));
}

function plainStep(key, from, count, finest, plan) {
  const step = finest ? finestOf(key, plan) : stepOf(key, from);
  const places = Math.max(placesOf(from), placesOf(step));
  return Number((from + count * step).toFixed(Math.min(places, 12)));
}

export function stepOf({ family, step }, from) {
  return family === 'pri' && from <= COARSE_ABOVE_US ? step / 10 : step;
}

// One count of the clock for times, a tenth of a step for the rest; counts have nothing finer than one.
export function finestOf({ family, kind, unit, step }, plan) {
  if (kind === 'count') return step;
  if (unit === 'µs' && ['pri', 'time'].includes(family)) return Number((1 / plan.radar.clock_mhz).toPrecision(SURE_DIGITS));
  return step / 10;
}

// To the nearest count of the clock, and never less than one count for each step.
function onClock(next, from, count, finest, plan) {
  if (!Number.isFinite(next)) return next;
  const clock = plan.radar.clock_mhz;
  const least = Math.round(from * clock) + count;
  const counts = Math.round(next * clock);
  const far = finest || Math.abs(counts - from * clock) < Math.abs(count) ? least : counts;
  return Number((far / clock).toPrecision(SURE_DIGITS));
}

function placesOf(value) {
  const [mantissa, exponent = '0'] = String(value).split('e');
  return Math.max(0, (mantissa.split('.')[1] ?? '').length - Number(exponent));
}
