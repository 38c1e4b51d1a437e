// The plan in words, as sentence.py says it: the same small interpreter of the same clauses, so that the sentence of an
// opened link stands before Python does. Pieces are {text}, {key, shown}, {do, text, at?, name?} and {rail: cells of lines}.

import { alsoPieces } from './also.js';
import { valueAt } from './keys.js';
import { joined, listPieces, numberPiece } from './pieces.js';

const FEW = 4;
const SLOT = /\{([^}]*)\}/g;

export function createSentence({ grammar, keys, quantities }) {
  const lists = keys.perPrf;
  const context = { grammar, keys, quantities, lists, fill };

  function fill(template, plan) {
    const pieces = [];
    let at = 0;
    for (const slot of template.matchAll(SLOT)) {
      pieces.push({ text: template.slice(at, slot.index) }, ...slotPieces(slot[1], plan, context));
      at = slot.index + slot[0].length;
    }
    return joined([...pieces, { text: template.slice(at) }]);
  }

  return function clauses(plan) {
    const known = facts(plan, context);
    const out = [];
    const taken = new Set();
    for (const { id, short, when, text } of grammar.clauses) {
      if (taken.has(id) || Object.entries(when).some(([fact, values]) => !values.includes(known[fact]))) continue;
      taken.add(id);
      out.push({ id, short, pieces: fill(text, plan) });
      if (id === 'sees') out.push(...each('must-see', 'must_see', plan, regionOf(grammar), context));
    }
    if (known.rain === 'several') out.push(...each('rain', 'rain', plan, () => grammar.patch, context));
    const also = alsoPieces(plan, out, context);
    return also.length ? [...out, { id: 'also', short: false, pieces: joined(also) }] : out;
  };
}

function facts(plan, { keys, quantities, lists }) {
  const n = plan.waveform.pri_us.length;
  const many = (path) => (Array.isArray(valueAt(plan, path)) ? 'list' : 'one');
  return {
    kind: plan.waveform.kind,
    count: n === 1 ? 'one' : n <= FEW ? 'few' : 'many',
    differs: lists.some((path) => many(path) === 'list') ? 'yes' : 'no',
    carrier: many('radar.carrier_ghz'),
    pulse: many('radar.pulse_us'),
    notch: many('doppler.notch_mps'),
    pulses: many('waveform.pulses'),
    fill: many('waveform.fill_pulses'),
    weights: plan.doppler.weights === null ? 'none' : 'given',
    rain: !plan.rain || plan.rain.length === 0 ? 'none' : Array.isArray(plan.rain) ? 'several' : 'one',
    as: ['Hz', 'kHz'].includes(quantities.unitOf(keys.of('waveform.pri_us'))) ? 'prf' : 'pri',
  };
}

// One clause for each record of a list.
function each(name, path, plan, template, { fill }) {
  return plan[path].map((record, i) => {
    const text = template(record).replaceAll('@', `${path}.${i}`).replaceAll('#', i);
    return { id: `${name}-${i}`, short: false, pieces: fill(text, plan) };
  });
}

function regionOf({ region, region_reported: reported }) {
  return ({ visible_pct: wanted }) => (wanted === null ? reported : region);
}

function slotPieces(slot, plan, context) {
  if (slot.startsWith('list ')) return listPieces(slot.slice(5), plan, context);
  if (slot.startsWith('do ')) return [doPiece(...slot.slice(3).split('|'))];
  if (slot.startsWith('goes ')) return [{ text: goes(valueAt(plan, slot.slice(5))) }];
  if (slot === 'rail') return [{ rail: railCells(plan, context) }];
  if (slot in WORDS) return [{ text: WORDS[slot](plan) }];
  if (slot.includes('?')) return [{ text: wordFor(plan, ...slot.split('?')) }];
  return [numberPiece(...slot.split('|').toSpliced(1, 0, plan, context))];
}

// `remove-rain.2` is done to the third patch.
function doPiece(deed, text, name) {
  const [action, place] = deed.split('.');
  return { do: action, text, ...(place ? { at: Number(place) } : {}), ...(name ? { name } : {}) };
}

function wordFor(plan, path, forms) {
  const [one, many] = forms.split('|');
  return valueAt(plan, path) === 1 ? one : many;
}

function railCells(plan, context) {
  const { grammar, keys, quantities, lists } = context;
  const key = keys.of('waveform.pri_us');
  const other = quantities.as({ pri: ['Hz', 'kHz'].includes(quantities.unitOf(key)) ? 'us' : 'Hz' });
  const differing = lists.filter((path) => Array.isArray(valueAt(plan, path)));
  return plan.waveform.pri_us.map((pri, i) => [
    numberPiece(`waveform.pri_us.${i}`, plan, context),
    { text: other.shown(key, pri) },
    ...differing.map((path) => differingLine(`${path}.${i}`, grammar.rail[path], plan, context)),
  ]);
}

function differingLine(path, [before, one, many] = ['', '', ''], plan, context) {
  return { ...numberPiece(path, plan, context), before, after: valueAt(plan, path) === 1 ? one : many };
}

function goes(speed) {
  return speed > 0 ? 'closing' : speed < 0 ? 'receding' : 'standing still';
}

function way({ coverage: { speed_mps: [low, high] } }) {
  return low >= 0 ? 'closing' : high <= 0 ? 'receding' : 'closing above zero, receding below';
}

const WORDS = {
  n: (plan) => String(plan.waveform.pri_us.length),
  way,
  ground: (plan) => (plan.platform ? 'the mainlobe clutter' : 'still ground'),
};
