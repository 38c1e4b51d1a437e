// Reads a link for display only, driven by the table of keys, so that its sentence stands before the engine does.
// What cannot be read is left at its default here; what is cut, edited or refused the core finds and says.

import { filledPlan } from './filled.js';
import { readItem } from './link-items.js';

const SEE = ['coverage.range_km', 'coverage.speed_mps'];
const STAND_IN_PRI_US = [1000];

export async function openedPlan(text, { grammar, keys, units }) {
  try {
    const items = await itemsOf(text);
    const document = {};
    const announces = ([name]) => name in grammar.link_records || name in grammar.link_lists;
    for (const item of [...items.filter(announces), ...items.filter((other) => !announces(other))]) take(document, item, { grammar, keys, units });
    document.waveform = { ...document.waveform, pri_us: document.waveform?.pri_us ?? STAND_IN_PRI_US };
    return filledPlan(document, keys, grammar);
  } catch {
    return null; // the sentence then waits for the core
  }
}

async function itemsOf(text) {
  const parts = text.slice(text.lastIndexOf('#') + 1).split('&').map((part) => part.split(/=(.*)/s));
  const items = await Promise.all(parts.map(async ([name, value = '']) => (name === 'z' ? itemsOf(await inflated(value)) : [[name, value]])));
  return items.flat();
}

async function inflated(text) {
  const binary = atob(text.replaceAll('-', '+').replaceAll('_', '/'));
  const bytes = Uint8Array.from(binary, (character) => character.charCodeAt(0));
  return new Response(new Blob([bytes]).stream().pipeThrough(new DecompressionStream('deflate-raw'))).text();
}

function take(document, [name, text], { grammar, keys, units }) {
  if (name in grammar.link_records) put(document, grammar.link_records[name], text === 'yes' ? {} : null);
  else if (name in grammar.link_lists) put(document, grammar.link_lists[name], records(text));
  else if (name === 'see') {
    SEE.forEach((path, i) => put(document, path, readItem(keyAt(keys, path), text.split(',')[i], { grammar, units })));
  } else {
    const place = placeOf(name, grammar, keys);
    if (place) put(document, place.path, readItem(place.key, text, { grammar, units }));
  }
}

function records(text) {
  return text === 'yes' ? {} : Array.from({ length: Math.min(Number(text) || 0, 8) }, () => ({}));
}

function keyAt(keys, path) {
  return keys.find((key) => key.path === path);
}

// `must1-range` is a part of the first record of a list; `rain-cnr` of the one that stands alone.
function placeOf(name, { link_lists: lists }, keys) {
  const [, list, index, rest] = name.match(/^([a-z]+)(\d*)-(.+)$/) ?? [];
  if (list in lists) {
    const key = keys.find(({ path, short }) => path.startsWith(`${lists[list]}[].`) && short === rest);
    return key && { key, path: key.path.replace('[]', index ? `.${index - 1}` : '') };
  }
  const key = keys.find(({ path, short }) => short === name && !path.includes('[]'));
  return key && { key, path: key.path };
}

// A place that was not announced is left out, as is what could not be read.
function put(document, path, value) {
  if (value === undefined) return;
  const names = path.split('.');
  let here = document;
  for (const name of names.slice(0, -1)) {
    if (Array.isArray(here) && !(name in here)) return;
    here[name] ??= {};
    here = here[name];
  }
  here[names.at(-1)] = value;
}
