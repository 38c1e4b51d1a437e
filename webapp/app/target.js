// The part of the page that follows one target: a sentence with two live numbers, and what each PRF makes of it.
// Knows how it looks; the core wrote its words.

import { quietButton } from './fields.js';
import { createNumbers, setNumber, setText } from './number.js';
import { createRefused } from './refused.js';

const RANGE = 'followed.range_km';
const SPEED = 'followed.speed_mps';

export function createTarget({ place, followed, quantities, keys, engineState }) {
  const numberFor = createNumbers();
  const part = (name) => place.querySelector(`[data-part="${name}"]`);
  const refused = createRefused(part('refused'), followed.putBack);
  const sense = document.createElement('span');
  const rest = document.createElement('span');
  const offer = quietButton('', null, () => followed.set({}));
  part('invitation').append('Click in any figure to follow one target through the plan, or ', offer, '.');
  part('sentence').append('A target at ', numberFor(RANGE), ' with a radial speed of ', numberFor(SPEED), sense, ' ', rest, ' ', quietButton('No target', null, followed.drop));
  let answered = null;

  function redraw() {
    const isSet = followed.value(RANGE) !== undefined;
    part('invitation').hidden = isSet;
    part('followed').hidden = !isSet;
    const state = { waiting: engineState() !== 'ready', plain: engineState() === 'failed' };
    if (isSet) for (const path of [RANGE, SPEED]) setNumber(numberFor(path), followed.look(path, state));
    else setText(offer, offered(followed.middle()));
    offer.disabled = state.plain;
    const speed = followed.value(SPEED);
    setText(sense, speed > 0 ? ' (closing)' : speed < 0 ? ' (receding)' : '');
    refused.update(followed.refusals());
  }

  function offered(middle) {
    const shown = (path) => quantities.shown(keys.find((key) => key.path === path), middle[path.split('.')[1]]);
    return `follow one at ${shown(RANGE)} and ${shown(SPEED)}`;
  }

  return {
    redraw,
    // What an answer says of the target that it was asked about; null without one.
    answered(target) {
      answered = target;
      place.dataset.seen = target ? String(target.seen) : '';
      setText(rest, target?.rest ?? '');
      if (target) fill(part('table'), target);
      redraw();
    },
    now: () => answered,
  };
}

function fill(table, { head, rows }) {
  const cell = (tag, text, name) => {
    const node = document.createElement(tag);
    node.textContent = text;
    if (name) node.dataset.head = name;
    return node;
  };
  const top = document.createElement('tr');
  top.append(...head.map((text) => Object.assign(cell('th', text), { scope: 'col' })));
  const body = rows.map((cells) => {
    const row = document.createElement('tr');
    row.append(...cells.map((text, i) => (i ? cell('td', text, head[i]) : Object.assign(cell('th', text), { scope: 'row' }))));
    row.dataset.seen = String(!/^no/.test(cells[head.indexOf('Seen')] ?? ''));
    return row;
  });
  table.tHead.replaceChildren(top);
  table.tBodies[0].replaceChildren(...body);
}
