// A figure from the keyboard: arrows move a cross-hair over its plot, Enter sets the target there, N goes from hole to hole.
// Knows pixels and the figure's geometry; the cross-hair is kept in the axes' units, so that it stays where it is in the plan.

const STEPS = 100; // cells along an axis
const WAYS = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, -1], ArrowDown: [0, 1] };

export function createCrosshair(element, geometry, { onMove, onPick, onLeave }) {
  const node = document.createElement('div');
  node.className = 'crosshair';
  node.append(line('upright'), line('level'));
  let at = null; // in the axes' units
  let hole = -1;

  element.addEventListener('focus', () => { if (element.matches(':focus-visible')) show(); });
  element.addEventListener('blur', () => {
    node.remove();
    onLeave();
  });
  element.addEventListener('keydown', (event) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const act = WAYS[event.key] ? () => step(WAYS[event.key], event.shiftKey ? 10 : 1) : keys[event.key];
    if (!act) return;
    act();
    event.preventDefault();
  });

  const keys = {
    Enter: () => { show(); onPick(...geometry.at(...pixels())); },
    n: () => toHole(1),
    N: () => toHole(-1),
  };

  // It begins at the target, else in the middle.
  function pixels() {
    const { left, top, width, height } = geometry.box();
    const [sx, sy] = at ? geometry.place(...at) : geometry.ring() ?? [left + width / 2, top + height / 2];
    return [Math.min(Math.max(sx, left), left + width), Math.min(Math.max(sy, top), top + height)];
  }

  function step([across, down], count) {
    const { width, height } = geometry.box();
    const [sx, sy] = pixels();
    hole = -1;
    put([sx + across * count * width / STEPS, sy + down * count * height / STEPS]);
  }

  function put([sx, sy]) {
    const { left, top, width, height } = geometry.box();
    at = geometry.whole(Math.min(Math.max(sx, left), left + width), Math.min(Math.max(sy, top), top + height));
    show();
  }

  function toHole(by) {
    const holes = geometry.numbers();
    if (!holes.length) return show();
    hole = hole < 0 && by < 0 ? holes.length - 1 : (hole + by + holes.length) % holes.length;
    put(holes[hole].spot);
  }

  function show() {
    const [sx, sy] = pixels();
    const { left, top, width, height } = geometry.box();
    place(node.children[0], { left: sx, top, height });
    place(node.children[1], { left, top: sy, width });
    element.append(node);
    onMove(...geometry.at(sx, sy));
  }

  return {
    refresh: () => { if (node.isConnected) show(); },
    // Where it stands, while it is seen.
    now: () => (node.isConnected ? geometry.at(...pixels()) : null),
  };
}

function line(className) {
  const node = document.createElement('i');
  node.className = className;
  return node;
}

function place(node, sides) {
  for (const [side, value] of Object.entries(sides)) node.style[side] = `${value}px`;
}
