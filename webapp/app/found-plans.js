// The ranked list of found plans: a table whose rows can be selected and taken. The core wrote its words and its pictures.

import { quietButton } from './fields.js';
import { smallPicture } from './small-picture.js';

const FIRST = 6; // rows that stand there at once

export function createFoundPlans({ place, colours, onSelect, onUse }) {
  let rows = [];
  let isWhole = false;
  const all = quietButton('', null, () => { isWhole = true; unfold(); });

  function unfold() {
    rows.forEach((row, i) => { row.hidden = !isWhole && i >= FIRST; });
    all.hidden = isWhole || rows.length <= FIRST;
    all.textContent = `All ${rows.length} plans`;
  }

  let chosen = null;

  function show({ rows: found, own, heads }) {
    rows = found.map((row, i) => rowFor(row, heads, i));
    const table = document.createElement('table');
    const head = table.createTHead().insertRow();
    head.append(...['blind zones', 'intervals', ...heads.map(([, text]) => text), ''].map(headCell));
    const body = table.createTBody();
    if (own) body.append(ownRow(own, heads));
    body.append(...rows);
    const scrolled = place.scrollLeft;
    place.replaceChildren(table, all);
    unfold();
    place.scrollLeft = scrolled;
  }

  function rowFor(row, heads, i) {
    const node = filled(row, heads, `${i + 1}`);
    const use = quietButton('Use this plan', `Use this plan: ${row.intervals}`, (event) => {
      event.stopPropagation();
      onUse(row);
    });
    node.insertCell().append(use);
    node.tabIndex = 0;
    node.addEventListener('click', () => onSelect(i));
    node.addEventListener('keydown', (event) => {
      if (event.target !== node || event.key !== 'Enter') return;
      event.preventDefault();
      onSelect(i);
    });
    return node;
  }

  function ownRow(own, heads) {
    const node = filled(own, heads, 'now');
    node.className = 'own';
    node.insertCell().append('the plan now');
    return node;
  }

  return {
    show,
    select(i, isFocused = false) {
      chosen = i;
      if (i >= FIRST && rows[i]?.hidden) {
        isWhole = true;
        unfold();
      }
      rows.forEach((row, at) => {
        row.classList.toggle('chosen', at === i);
        row.setAttribute('aria-current', String(at === i));
      });
      if (isFocused) rows[i]?.focus();
      else rows[i]?.scrollIntoView({ block: 'nearest' });
    },
    get chosen() { return chosen; },
    clear: () => {
      place.replaceChildren();
      rows = [];
      chosen = null;
      isWhole = false;
    },
  };

  function filled(row, heads, number) {
    const node = document.createElement('tr');
    const picture = node.insertCell();
    picture.append(smallPicture(row.image, colours, `Blind zones with ${row.intervals}`));
    const name = document.createElement('th');
    name.scope = 'row';
    name.append(row.intervals);
    name.dataset.number = number;
    node.append(name);
    for (const [key, text] of heads) {
      const cell = node.insertCell();
      cell.textContent = row[key];
      cell.dataset.label = text;
      cell.dataset.value = valueOf(row.found, key);
    }
    return node;
  }
}

function headCell(text) {
  const cell = document.createElement('th');
  cell.scope = 'col';
  cell.textContent = text;
  return cell;
}

const VALUES = { seen: 'visible_share', excess: 'excess_over_floor', dip: 'dip_db', time: 'used_ms', lost: 'share_if_one_lost', decode: 'decode_range_km' };

function valueOf(found, key) {
  const value = found[VALUES[key]];
  return value === undefined || value === null ? '' : String(value);
}
