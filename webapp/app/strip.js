// On touch a tap opens the number in a strip above the keyboard: −, field, +, sign, unit, Done. Numbers are not dragged there.
// Knows the strip and where the keyboard is; what a key's units and steps are it asks of `plan`.

export function createStrip(strip, plan) {
  const field = strip.querySelector('input');
  const unit = strip.querySelector('select');
  const label = strip.querySelector('.strip-label');
  let number = null;
  let typed = false;

  function open(tapped) {
    number = tapped;
    const { name, units, shown, words, cell } = plan.entry(number.dataset.key);
    for (const button of strip.querySelectorAll('[data-for="cell"]')) button.hidden = !cell;
    for (const button of strip.querySelectorAll('[data-for="number"]')) button.hidden = words;
    field.inputMode = words ? 'text' : 'decimal';
    label.textContent = name;
    unit.replaceChildren(...units.map((text) => new Option(text, text)));
    unit.hidden = units.length < 2;
    fill(shown);
    strip.hidden = false;
    number.classList.add('held');
    field.focus();
    field.select();
  }

  function fill({ digits, unit: shownUnit }) {
    typed = false;
    field.value = digits;
    if (shownUnit) unit.value = shownUnit;
  }

  function commit() {
    if (number && typed) plan.commit({ key: number.dataset.key, text: textOf(field.value.trim(), unit) });
    typed = false;
  }

  function close() {
    if (!number) return;
    commit();
    number.classList.remove('held');
    strip.hidden = true;
    number = null;
  }

  // What is done to a cell of the rail; the strip closes, for the cell may have gone.
  function then(act) {
    const path = number.dataset.key;
    close();
    act(path);
  }

  const acts = {
    down: () => plan.step(number.dataset.key, { count: -1, size: 'step' }),
    up: () => plan.step(number.dataset.key, { count: 1, size: 'step' }),
    sign: () => {
      field.value = /^[-\u2212]/.test(field.value) ? field.value.slice(1) : `\u2212${field.value}`;
      typed = true;
      commit();
    },
    done: close,
    remove: () => then((path) => plan.remove(path)),
    earlier: () => then((path) => plan.move(path, -1)),
    later: () => then((path) => plan.move(path, 1)),
  };

  strip.addEventListener('click', (event) => {
    const act = event.target.closest('[data-strip]')?.dataset.strip;
    if (act && act !== 'done') commit();
    if (act) acts[act]();
  });
  field.addEventListener('input', () => { typed = true; });
  unit.addEventListener('change', commit); // chosen before typing it is meant for what will be typed
  field.addEventListener('keydown', (event) => {
    if (event.key === 'Enter') close();
    if (event.key === 'Escape') { typed = false; close(); }
  });
  strip.addEventListener('focusout', ({ relatedTarget }) => { if (!strip.contains(relatedTarget)) commit(); });
  addEventListener('pointerdown', ({ target }) => { if (number && !strip.contains(target) && target !== number) close(); });
  for (const type of ['resize', 'scroll']) globalThis.visualViewport?.addEventListener(type, () => keepAbove(strip));

  return { open, update: () => { if (number && !typed) fill(plan.entry(number.dataset.key).shown); } };
}

// An empty field has no unit either: emptying a PRI removes it.
function textOf(text, unit) {
  return text && !unit.hidden ? `${text} ${unit.value}` : text;
}

function keepAbove(strip) {
  const { height, offsetTop } = visualViewport;
  strip.style.bottom = `${Math.max(0, innerHeight - height - offsetTop)}px`;
}
