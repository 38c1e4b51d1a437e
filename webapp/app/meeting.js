// The meeting view: one figure as large as the screen lets it be, the plan in a line above it, what is judged in a line below.
// The same elements as ever, only laid out by meeting.css; the chosen figure is part of how the page is looked at.

const READ_AT_PX = 760; // of width, where a figure's letters and lines are as large as they were made
const SETTLED_MS = 120; // in which a figure takes another size
const STEPS = { PageDown: 1, PageUp: -1 };
const ARROWS = ['ArrowUp', 'ArrowDown', 'ArrowLeft', 'ArrowRight'];
const TYPED_INTO = '.number, input, select, textarea, [contenteditable]:focus, dialog';

export function createMeeting({ view, names, enlarge, status, actions, ask }) {
  const root = document.documentElement;
  let before = null; // what had the focus, and where the page was
  let shown = null;

  const isOn = () => root.classList.contains('meeting');

  function lay() {
    const wanted = names().includes(view.now.present) ? view.now.present : null;
    if (wanted && !isOn()) open();
    if (!wanted && isOn()) close();
    if (wanted !== shown) present(wanted);
    if (isOn()) actions.place.textContent = `Fig. ${names().indexOf(shown) + 1} of ${names().length}`;
  }

  function open() {
    before = { focused: document.activeElement, top: scrollY };
    root.classList.add('meeting');
    actions.enter.textContent = 'Leave the meeting view';
    status.say('Page Down and Page Up, or 1 to 8, choose the figure; Escape leaves.');
  }

  function close() {
    root.classList.remove('meeting');
    actions.enter.textContent = 'Meeting view';
    scrollTo(0, before.top);
    if (before.focused?.isConnected) before.focused.focus({ preventScroll: true });
    status.clear();
  }

  function present(name) {
    for (const figure of document.querySelectorAll('figure[data-figure]')) figure.classList.toggle('presented', figure.dataset.figure === name);
    if (shown) enlarge(shown, 1);
    if (name) enlarge(name, Math.min(Math.max(innerWidth / READ_AT_PX, 1), 2.5)); // to be read from the back of a room
    shown = name;
    requestAnimationFrame(() => setTimeout(ask, SETTLED_MS)); // a map is computed for the size that its figure has taken
  }

  function choose(name) {
    view.choose('present', name ?? null);
    lay();
  }

  function step(by) {
    const at = names().indexOf(shown) + by;
    if (at >= 0 && at < names().length) choose(names()[at]);
  }

  actions.enter.addEventListener('click', () => choose(isOn() ? null : names()[0]));
  actions.earlier.addEventListener('click', () => step(-1));
  actions.later.addEventListener('click', () => step(1));
  // Before anything else hears them: a figure that has the focus would move its target.
  addEventListener('keydown', (event) => {
    if (!isOn() || event.ctrlKey || event.metaKey || event.altKey || event.target.closest?.('dialog')) return;
    const inField = event.target.closest?.(TYPED_INTO);
    if (event.key in STEPS) step(STEPS[event.key]);
    else if (event.key === 'Escape' && !event.target.closest?.('.open, [aria-invalid="true"], textarea, #strip')) choose(null);
    else if (inField || !(ARROWS.includes(event.key) || names()[event.key - 1])) return;
    else if (names()[event.key - 1]) choose(names()[event.key - 1]);
    event.preventDefault();
    event.stopPropagation();
  }, true);

  return { update: lay };
}
