// What the page knows of the plan's keys: the core's own table, looked up by the path of a number.
// A path may name a part: `coverage.range_km.1`, `waveform.pri_us.0`, `radar.pulse_us.2`, `must_see.0.range_km.1`.

export function createKeys(table) {
  const byPath = new Map(table.map((key) => [key.path, key]));
  // In the table `[]` stands for the elements of a list of records; a part's own number is not written there.
  const of = (path) => {
    const whole = path.replace(/\.\d+(?=\.)/g, '[]').replace(/\.\d+$/, '');
    return byPath.get(whole) ?? byPath.get(whole.replace('.', '[].')) ?? null;
  };
  // One value for each PRF: first what is sent, then how often.
  const lists = table.filter((key) => key.per_prf);
  const perPrf = [...lists.filter(({ kind }) => kind !== 'count'), ...lists.filter(({ kind }) => kind === 'count')].map(({ path }) => path);
  return { table, of, perPrf };
}

// The places that a key has in a plan: several for a list of records, none where the record is not there.
export function placesOf({ path }, plan) {
  const [list, rest] = path.split('[].');
  if (rest === undefined) return valueAt(plan, path) === undefined ? [] : [path];
  const records = valueAt(plan, list);
  if (Array.isArray(records)) return records.map((record, i) => `${list}.${i}.${rest}`);
  return records ? [`${list}.${rest}`] : [];
}

export function valueAt(document, path) {
  return path.split('.').reduce((value, part) => value?.[part], document);
}

// How many inputs of one plan differ from another's.
export function differing(one, other) {
  if (isBranch(one) && isBranch(other)) {
    const names = new Set([...Object.keys(one), ...Object.keys(other)]);
    return [...names].reduce((count, name) => count + differing(one[name], other[name]), 0);
  }
  return JSON.stringify(one) === JSON.stringify(other) ? 0 : 1;
}

function isBranch(value) {
  return value !== null && typeof value === 'object' && !Array.isArray(value);
}
