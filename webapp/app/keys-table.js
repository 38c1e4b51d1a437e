// All quantities that the sentence does not say, in tables under the core's six headings. A number here is the same element
// as in the sentence, so none stands twice. Knows kinds of keys (number, choice, flag, text ...), no key by name.

import { setText } from './number.js';
import { valueAt } from './keys.js';
import { choiceField, flagField, textField } from './fields.js';

const FIELDS = { choice: choiceField, flag: flagField, text: textField };

export function createKeysTable({ box, place, keys, numberFor, commit, give }) {
  const groups = new Map();
  const rows = keys.table.filter((key) => key.kind !== 'record').map((key) => row(key, commit, give));
  for (const entry of rows) {
    if (!groups.has(entry.key.group)) groups.set(entry.key.group, group(entry.key.group, place));
    groups.get(entry.key.group).body.append(entry.node);
  }

  return {
    isOpen: () => box.open,
    onToggle: (act) => box.addEventListener('toggle', act),
    update(plan, said) {
      for (const entry of rows) {
        const parts = partsOf(entry.key, plan);
        entry.node.hidden = parts === null || parts.some((path) => said.has(path));
        if (!entry.node.hidden && box.open) fill(entry, parts, plan, numberFor);
      }
      for (const { node, body } of groups.values()) node.hidden = [...body.children].every((child) => child.hidden);
    },
  };
}

// The paths of a key's numbers in this plan; null where the key has no place in it (a part of something that is not there).
function partsOf({ path, kind }, plan) {
  const parent = path.includes('.') ? valueAt(plan, path.replace(/\.[^.]*$/, '')) : plan;
  if (parent === null || parent === undefined || Array.isArray(parent)) return null;
  const value = valueAt(plan, path);
  if (FIELDS[kind] || value === null) return [path];
  return Array.isArray(value) ? value.map((item, i) => `${path}.${i}`) : [path];
}

function fill({ key, cell, field, none, without }, parts, plan, numberFor) {
  const value = valueAt(plan, key.path);
  without.hidden = !key.nullable || value === null;
  if (field) field.update(value);
  else if (value === null) cell.replaceChildren('none ', none);
  else place(cell, [...parts.flatMap((path, i) => [i ? (key.kind === 'interval' ? ' to ' : ', ') : '', numberFor(path)]), ' ', without]);
}

function place(cell, nodes) {
  const kept = nodes.filter((node) => node !== '');
  const same = kept.length === cell.childNodes.length && kept.every((node, i) => (typeof node === 'string' ? cell.childNodes[i].data === node : cell.childNodes[i] === node));
  if (!same) cell.replaceChildren(...kept);
}

function row(key, commit, give) {
  const node = document.createElement('tr');
  const head = node.appendChild(document.createElement('th'));
  const cell = node.appendChild(document.createElement('td'));
  const help = document.createElement('span');
  head.scope = 'row';
  help.className = 'help';
  setText(help, key.help ?? '');
  head.append(key.label, help);
  const field = FIELDS[key.kind]?.(key, (edit) => commit({ key: key.path, ...edit }));
  const none = button('Give one', `Give one: ${key.label}`, () => give(key));
  const without = button('None', `None: ${key.label}`, () => commit({ key: key.path, value: null }));
  if (field) cell.append(field.node, ' ', without);
  return { key, node, cell, field, none, without };
}

function button(word, label, act) {
  const node = document.createElement('button');
  Object.assign(node, { type: 'button', className: 'quiet', textContent: word });
  node.setAttribute('aria-label', label);
  node.addEventListener('click', act);
  return node;
}

function group(name, place) {
  const node = document.createElement('section');
  const heading = node.appendChild(document.createElement('h3'));
  const body = node.appendChild(document.createElement('table')).appendChild(document.createElement('tbody'));
  heading.textContent = name;
  body.parentNode.setAttribute('aria-label', name);
  place.append(node);
  return { node, body };
}
