// Which part of a map is looked at: four times closer, around a hole, or the whole coverage again. In the plan's units; the
// core computes the part at the screen's resolution.

const CLOSER = 4;
const CLOSEST = 1 / 4096; // of the coverage
const ROOM = 0.35; // around a hole, of its own extent on each side
const SIDES = ['x', 'y'];

export function createZooming({ view, coverage }) {
  const choose = (name, part) => {
    const { [name]: _, ...others } = view.now.zoom ?? {};
    const zoom = part ? { ...others, [name]: part } : others;
    view.choose('zoom', Object.keys(zoom).length ? zoom : null);
  };
  const whole = () => {
    const { range_km: x, speed_mps: y } = coverage();
    return { x, y };
  };
  const part = (name) => view.now.zoom?.[name] ?? whole();

  return {
    whole: (name) => choose(name, null),
    // Around a place, which is nearest to the middle that the coverage lets it be.
    closer(name, at) {
      const now = part(name);
      choose(name, each((side) => {
        const [low, high] = now[side];
        const middle = at?.[side] ?? (low + high) / 2;
        return inside(whole()[side], middle, (high - low) / CLOSER);
      }));
    },
    around(name, box) {
      choose(name, each((side) => {
        const [low, high] = box[side];
        return inside(whole()[side], (low + high) / 2, (1 + 2 * ROOM) * (high - low));
      }));
    },
  };
}

function each(of) {
  return Object.fromEntries(SIDES.map((side) => [side, of(side)]));
}

function inside([lowest, highest], middle, wanted) {
  const span = Math.min(Math.max(wanted, CLOSEST * (highest - lowest)), highest - lowest);
  const low = Math.min(Math.max(middle - span / 2, lowest), highest - span);
  return [low, low + span];
}
