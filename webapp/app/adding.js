// The quiet line under the plan: what can be added to it, what may differ by PRF, and the other way to send the intervals.
// Knows which deeds there are and when each can be done; what they do is the core's.

import { quietButton } from './fields.js';
import { valueAt } from './keys.js';

const MOST_PRIS = 16;
const FEW_PRIS = 4; // more stand in a rail, which has its own way to one more
const MOST_RECORDS = 4; // patches of rain, must-see regions

const none = (path) => (plan) => (valueAt(plan, path) ?? null) === null;
const patches = ({ rain }) => (Array.isArray(rain) ? rain.length : rain ? 1 : 0);
const isRail = (plan, lists) => plan.waveform.pri_us.length > FEW_PRIS || lists.some((path) => Array.isArray(valueAt(plan, path)));

const FIRST = [
  { do: 'add-pri', words: 'a PRI', offered: (plan, lists) => plan.waveform.pri_us.length < MOST_PRIS && !isRail(plan, lists) },
  { do: 'add-rain', words: 'another patch of moving clutter', offered: (plan) => patches(plan) > 0 && patches(plan) < MOST_RECORDS },
  { do: 'add-near-pulse', words: 'a near pulse', offered: none('radar.near_pulse') },
  { do: 'add-must-see', words: 'a must-see region', offered: ({ must_see: regions }) => regions.length < MOST_RECORDS },
  { do: 'add-surface', words: 'ground clutter', offered: none('surface') },
  { do: 'add-platform', words: 'a platform', offered: none('platform') },
];
const MORE = [
  { do: 'add-crossing', words: 'a crossing target', offered: none('crossing') },
  { do: 'add-over-carrier', words: 'a span of carriers to hold over', offered: none('holds_over.carrier_ghz') },
  { do: 'add-over-rain', words: 'a span of rain speeds to hold over', offered: (plan) => patches(plan) > 0 && none('holds_over.rain_mps')(plan) },
  { do: 'add-weather', words: 'weather to measure', offered: none('weather') },
  { do: 'add-radar-equation', words: 'the radar equation', offered: none('target.radar_equation') },
];

export function createAdding({ node, keys, hands }) {
  const lists = keys.perPrf;
  const add = ({ do: action, words, offered }) => ({ button: quietButton(words, `Add ${words}`, () => hands.act(action)), offered });
  const differ = (name, act, offered) => lists.map((path) => {
    const label = keys.of(path).label.toLowerCase();
    return { button: quietButton(label, `${name} ${label}`, () => hands.act(act, { key: path })), offered: (plan) => offered(plan, path) };
  });
  const more = quietButton('More', 'More to add', () => show(more.getAttribute('aria-expanded') !== 'true'));
  const kind = quietButton('', '', () => hands.switchKind());
  const lines = [
    line(node, 'Add', [...FIRST.map(add), { button: more, offered: () => true }]),
    line(node, 'Add', MORE.map(add), 'more'),
    line(node, 'On each PRF its own', differ('On each PRF its own', 'split', maySplit), 'more'),
    line(node, 'The same on all PRFs', differ('The same on all PRFs:', 'join', (plan, path) => Array.isArray(valueAt(plan, path)))),
    line(node, '', [{ button: kind, offered: () => true }], 'more'),
  ];
  const show = (open) => {
    more.setAttribute('aria-expanded', String(open));
    more.textContent = open ? 'Less' : 'More';
    more.setAttribute('aria-label', open ? 'Less to add' : 'More to add');
    node.classList.toggle('open', open);
  };
  show(false);
  return {
    update(plan) {
      kind.textContent = plan.waveform.kind === 'stagger' ? 'Send each interval as a CPI of its own instead' : 'Stagger the intervals from pulse to pulse instead';
      for (const { box, items } of lines) {
        for (const { button, offered } of items) button.hidden = !offered(plan, lists);
        box.hidden = items.every(({ button }) => button.hidden);
      }
    },
  };
}

function maySplit(plan, path) {
  const { kind, pri_us: pris } = plan.waveform;
  return kind === 'dwells' && pris.length > 1 && !Array.isArray(valueAt(plan, path));
}

function line(node, words, items, className = '') {
  const box = document.createElement('p');
  box.className = `adding-line ${className}`;
  if (words) box.append(`${words} `);
  for (const { button } of items) box.append(button, ' ');
  node.append(box);
  return { box, items };
}
