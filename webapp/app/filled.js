// A plan with every key: what a link gives, and the defaults of the table of keys for the rest. Nothing is checked here.

export function filledPlan(document, keys, { optional_records: optional, link_lists: lists }) {
  const plan = { pulsewright: 1, remarks: {} };
  for (const key of keys) {
    const [list, rest] = key.path.split('[].');
    if (rest !== undefined) fillRecords(plan, document, list, rest, key);
    else if (!within(key.path, optional, document)) fill(plan, document, key.path.split('.'), key.default);
  }
  for (const path of [...optional, ...Object.values(lists)]) {
    const value = at(document, path) ?? null;
    if (value === null) fill(plan, {}, path.split('.'), path === 'must_see' ? [] : null);
  }
  return plan;
}

function fillRecords(plan, document, list, name, key) {
  const given = document[list];
  if (!given) return;
  plan[list] ??= Array.isArray(given) ? given.map(() => ({})) : {};
  const pairs = Array.isArray(given) ? given.map((record, i) => [plan[list][i], record]) : [[plan[list], given]];
  for (const [record, source] of pairs) record[name] = source[name] === undefined ? key.default : source[name];
}

// Whether a key belongs to a record that is not there.
function within(path, optional, document) {
  return optional.some((record) => path.startsWith(`${record}.`) && (at(document, record) ?? null) === null);
}

function fill(plan, source, [name, ...rest], value) {
  if (!rest.length) plan[name] = source?.[name] === undefined ? value : source[name];
  else fill((plan[name] ??= {}), source?.[name], rest, value);
}

function at(document, path) {
  return path.split('.').reduce((value, name) => value?.[name], document);
}
