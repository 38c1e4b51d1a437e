// A number of the note: text that is a spin button. Knows how one looks in each state; not what its plan says.
// One element for each key, kept for good, so that focus stays on it through every repaint.

const THIN_SPACES = /[\u00a0\u2009\u202f]/g;

export function createNumbers() {
  const elements = new Map();
  return (key) => {
    if (!elements.has(key)) elements.set(key, element(key));
    return elements.get(key);
  };
}

function element(key) {
  const number = document.createElement('span');
  number.className = 'number';
  number.dataset.key = key;
  number.tabIndex = 0;
  number.setAttribute('role', 'spinbutton');
  return number;
}

// `look` is {shown, value, label, lowest, highest, waiting, refused, invalid, plain}; an open field keeps what is being typed.
export function setNumber(number, look) {
  const text = look.refused ?? look.shown;
  if (!number.classList.contains('open')) setText(number, text);
  else if (!isTouched(number)) refill(number, text);
  number.classList.toggle('waiting', Boolean(look.waiting));
  number.classList.toggle('words', Boolean(look.words));
  number.classList.toggle('plain', Boolean(look.plain));
  setAttributes(number, look.plain ? PLAIN : {
    role: look.words ? 'textbox' : 'spinbutton',
    tabindex: '0',
    'aria-label': look.label,
    'aria-valuenow': spelt(look.value),
    'aria-valuetext': look.words ? null : look.waiting ? `${text}, waiting for the engine` : text,
    'aria-valuemin': spelt(look.lowest),
    'aria-valuemax': spelt(look.highest),
    'aria-invalid': look.invalid ? 'true' : null,
    'aria-describedby': look.invalid ? look.reason ?? 'refused' : null,
  });
}

// Digits only: what reads a page aloud knows no powers of ten.
function spelt(value) {
  if (!Number.isFinite(value)) return null;
  return /e/.test(value) ? value.toLocaleString('en-US', { useGrouping: false, maximumFractionDigits: 20 }) : value;
}

const PLAIN = Object.fromEntries(['role', 'tabindex', 'aria-label', 'aria-valuenow', 'aria-valuetext', 'aria-valuemin',
  'aria-valuemax', 'aria-invalid', 'aria-describedby'].map((name) => [name, null]));

function setAttributes(node, attributes) {
  for (const [name, value] of Object.entries(attributes)) {
    if (value === null || value === undefined) node.removeAttribute(name);
    else if (node.getAttribute(name) !== String(value)) node.setAttribute(name, value);
  }
}

export function setText(node, text) {
  if (node.textContent !== text) node.textContent = text;
}

// The field is the number itself, made editable: same place, same type, same width.
export function openField(number, text) {
  number.style.minWidth = `${number.getBoundingClientRect().width}px`;
  number.classList.add('open');
  number.contentEditable = 'plaintext-only';
  if (number.contentEditable !== 'plaintext-only') number.contentEditable = 'true';
  number.spellcheck = false;
  number.focus();
  if (text === undefined) selectAll(number);
  else {
    number.textContent = text;
    touch(number, true);
    getSelection().selectAllChildren(number);
    getSelection().collapseToEnd();
  }
}

export function closeField(number) {
  number.removeAttribute('contenteditable');
  number.classList.remove('open');
  number.style.minWidth = '';
  delete number.dataset.committed;
  touch(number, false);
}

export function fieldText(number) {
  return number.textContent.replace(THIN_SPACES, ' ').trim();
}

export function isOpen(number) {
  return number.classList.contains('open');
}

// Touched: something was typed since the field was opened or last committed.
export function touch(number, touched) {
  number.toggleAttribute('data-touched', touched);
}

export function isTouched(number) {
  return number.hasAttribute('data-touched');
}

function refill(number, text) {
  if (number.textContent === text) return;
  number.textContent = text;
  if (document.activeElement === number) selectAll(number);
}

export function selectAll(number) {
  getSelection().selectAllChildren(number);
}
