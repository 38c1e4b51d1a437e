// The plan in words, as sentence.py says it: the same small interpreter of the same clauses, so that the sentence of an
// opened link stands before Python does. Pieces are {text}, {key, shown}, {do, text} and {rail: cells of lines}.

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
    }
    out.push(...patches(plan, known, context));
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

function patches(plan, known, { grammar, fill }) {
  if (known.rain !== 'several') return [];
  return plan.rain.map((patch, i) => {
    const end = i === plan.rain.length - 1 ? ' {do remove-rain|No rain}' : '';
    return { id: `rain-${i}`, short: false, pieces: fill(grammar.patch.replaceAll('@', `rain.${i}`) + end, plan) };
  });
}

function slotPieces(slot, plan, context) {
  if (slot.startsWith('list ')) return listPieces(slot.slice(5), plan, context);
  if (slot.startsWith('do ')) return [doPiece(...slot.slice(3).split('|'))];
  if (slot.startsWith('goes ')) return [{ text: goes(valueAt(plan, slot.slice(5))) }];
  if (slot === 'rail') return [{ rail: railCells(plan, context) }];
  if (slot in WORDS) return [{ text: WORDS[slot](plan) }];
  if (slot.includes('?')) return [{ text: wordFor(plan, ...slot.split('?')) }];
  const [path, bare] = slot.split('|');
  return [numberPiece(path, plan, context, Boolean(bare))];
}

function doPiece(action, text) {
  return { do: action, text };
}

function wordFor(plan, path, forms) {
  const [one, many] = forms.split('|');
  return valueAt(plan, path) === 1 ? one : many;
}

function railCells(plan, context) {
  const { keys, quantities, lists } = context;
  const key = keys.of('waveform.pri_us');
  const other = quantities.as({ pri: ['Hz', 'kHz'].includes(quantities.unitOf(key)) ? 'us' : 'Hz' });
  const differing = lists.filter((path) => Array.isArray(valueAt(plan, path)));
  return plan.waveform.pri_us.map((pri, i) => [
    numberPiece(`waveform.pri_us.${i}`, plan, context),
    { text: other.shown(key, pri) },
    ...differing.map((path) => numberPiece(`${path}.${i}`, plan, context)),
  ]);
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
