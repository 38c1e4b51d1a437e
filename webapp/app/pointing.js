// Pointing in a figure with mouse, pen or finger: a click, the pointer's place, and the ring, which is the one thing that drags.
// Knows pixels and the figure's geometry; what a place means is for who listens.

const RING_PX = 16;
const NUMBER_PX = 13; // a hand needs 24 across
const BEGIN_PX = 3;

export function pointIn(element, geometry, { drags, onPick, onHover, onDrag, onNumber }) {
  let drag = null;
  let dragged = false;
  let inside = false;
  const placeOf = ({ clientX, clientY }) => {
    const { left, top } = element.getBoundingClientRect();
    return [clientX - left, clientY - top];
  };
  const isRing = (event) => drags() && near(geometry.ring(), placeOf(event), RING_PX);

  element.addEventListener('pointerdown', (event) => {
    dragged = false;
    if (event.button !== 0 || !isRing(event)) return;
    drag = { pointer: event.pointerId, from: placeOf(event), ring: geometry.ring(), begun: false };
  });
  element.addEventListener('pointermove', (event) => {
    if (drag?.pointer === event.pointerId) move(event);
    else hover(event);
  });
  for (const type of ['pointerup', 'pointercancel']) element.addEventListener(type, end);
  // The drawing library may have captured the pointer before: that loss, which bubbles from inside, ends nothing.
  element.addEventListener('lostpointercapture', (event) => { if (event.target === element) end(event); });
  element.addEventListener('pointerleave', () => { if (!drag) leave(); });
  element.addEventListener('click', click);
  // A finger on the ring moves it and not the page.
  element.addEventListener('touchstart', (event) => { if (isRing(event.touches[0])) event.preventDefault(); }, { passive: false });
  element.ownerDocument.addEventListener('keydown', (event) => {
    if (!drag?.begun || event.key !== 'Escape') return;
    onDrag(geometry.at(...drag.ring), true);
    drag = null;
    event.preventDefault();
    event.stopPropagation();
  }, true);

  function move(event) {
    const at = placeOf(event);
    if (!drag.begun && !near(drag.from, at, BEGIN_PX)) {
      drag.begun = dragged = true;
      element.setPointerCapture(drag.pointer);
    }
    if (drag.begun) onDrag(geometry.at(...held(geometry.box(), at)), false);
  }

  function end(event) {
    if (!drag || event.pointerId !== drag.pointer) return;
    if (drag.begun) onDrag(null, true);
    drag = null;
  }

  function hover(event) {
    const at = placeOf(event);
    if (!isIn(geometry.box(), at)) return leave();
    inside = true;
    const number = numberAt(geometry, at) !== null;
    element.dataset.over = isRing(event) ? 'ring' : number ? 'number' : 'plot';
    onHover(...geometry.at(...at));
  }

  function leave() {
    delete element.dataset.over;
    if (inside) onHover(null, null);
    inside = false;
  }

  function click(event) {
    const at = placeOf(event);
    if (dragged || !isIn(geometry.box(), at)) return;
    const number = numberAt(geometry, at);
    if (number !== null && !isRing(event)) onNumber(number);
    else onPick(...geometry.at(...at));
  }
}

function numberAt(geometry, at) {
  const found = geometry.numbers().findIndex(({ shown }) => near(shown, at, NUMBER_PX));
  return found < 0 ? null : found;
}

function near(one, other, most) {
  return one !== null && Math.hypot(one[0] - other[0], one[1] - other[1]) <= most;
}

function isIn({ left, top, width, height }, [sx, sy]) {
  return sx >= left && sx <= left + width && sy >= top && sy <= top + height;
}

// The ring stays in the plot, however far the hand goes.
function held({ left, top, width, height }, [sx, sy]) {
  return [Math.min(Math.max(sx, left), left + width), Math.min(Math.max(sy, top), top + height)];
}
