// All quantities that the sentence does not say, in tables under the core's six headings. A number here is the same element
// as in the sentence, so none stands twice. Knows kinds of keys (number, choice, flag, text ...), no key by name.

import { choiceField, flagField, quietButton, textField } from './fields.js';
import { placesOf, valueAt } from './keys.js';
import { lay } from './paragraph.js';

const FIELDS = { choice: choiceField, flag: flagField, text: textField };

export function createKeysTable({ box, place, keys, numberFor, commit }) {
  const groups = new Map();
  const rows = new Map();
  const rowAt = (key, path) => {
    if (!rows.has(path)) rows.set(path, row(key, path, commit));
    return rows.get(path);
  };

  return {
    isOpen: () => box.open,
    onToggle: (act) => box.addEventListener('toggle', act),
    update(plan, said) {
      if (!box.open) return;
      const nodes = new Map(keys.table.map(({ group }) => [group, []]));
      for (const key of keys.table) {
        for (const path of key.group ? placesOf(key, plan) : []) {
          const parts = partsOf(key, path, valueAt(plan, path));
          if (!parts.some((part) => said.has(part))) nodes.get(key.group).push(fill(rowAt(key, path), parts, plan, numberFor));
        }
      }
      lay(place, [...nodes].filter(([, list]) => list.length).map(([name, list]) => group(groups, name, list)));
    },
  };
}

// A number for each element of a list or end of an interval; one for the rest.
function partsOf({ kind }, path, value) {
  return Array.isArray(value) && !FIELDS[kind] ? value.map((item, i) => `${path}.${i}`) : [path];
}

function fill({ key, path, node, cell, field, none, without }, parts, plan, numberFor) {
  const value = valueAt(plan, path);
  without.hidden = !key.nullable || value === null || value === '';
  if (field) field.update(value);
  else if (value === null) lay(cell, ['none ', none]);
  else lay(cell, [...parts.flatMap((part, i) => (i ? [key.kind === 'interval' ? ' to ' : ', ', numberFor(part)] : [numberFor(part)])), ' ', without]);
  return node;
}

function row(key, path, commit) {
  const node = document.createElement('tr');
  const head = node.appendChild(document.createElement('th'));
  const cell = node.appendChild(document.createElement('td'));
  const help = document.createElement('span');
  head.scope = 'row';
  help.className = 'help';
  help.textContent = key.help ?? '';
  head.append(key.label, help);
  const field = FIELDS[key.kind]?.(key, path, (edit) => commit({ key: path, ...edit }));
  const none = quietButton('Give one', `${key.label}: give one`, () => commit({ key: path, value: startOf(key) }));
  const without = quietButton('None', `${key.label}: none`, () => commit({ key: path, value: null }));
  if (field) cell.append(field.node, ' ', without);
  return { key, path, node, cell, field, none, without };
}

// Where a quantity begins that had no value: its default, else where the core says that such a one begins.
function startOf({ default: usual, start }) {
  return usual ?? start;
}

function group(groups, name, rows) {
  if (!groups.has(name)) {
    const node = document.createElement('section');
    node.appendChild(document.createElement('h2')).textContent = name;
    const body = node.appendChild(document.createElement('table')).appendChild(document.createElement('tbody'));
    body.parentNode.setAttribute('aria-label', name);
    groups.set(name, { node, body });
  }
  lay(groups.get(name).body, rows);
  return groups.get(name).node;
}
