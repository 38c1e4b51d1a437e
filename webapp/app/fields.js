// Fields for keys that are not numbers: a choice, a yes or no, a text. Each is {node, update(value)} and tells its edit.

export function choiceField(key, commit) {
  const node = labelled('select', key);
  node.append(...key.choices.map((choice) => new Option(choice, choice)));
  node.addEventListener('change', () => commit({ value: node.value }));
  return { node, update: (value) => { if (document.activeElement !== node) node.value = value; } };
}

export function flagField(key, commit) {
  const node = labelled('input', key);
  node.type = 'checkbox';
  node.addEventListener('change', () => commit({ value: node.checked }));
  return { node, update: (value) => { node.checked = Boolean(value); } };
}

export function textField(key, commit) {
  const node = labelled('input', key);
  let shown = '';
  Object.assign(node, { type: 'text', autocomplete: 'off' });
  if (key.highest) node.maxLength = key.highest;
  node.addEventListener('change', () => commit({ text: node.value }));
  node.addEventListener('keydown', (event) => {
    if (event.key === 'Escape') node.value = shown;
  });
  return {
    node,
    update(value) {
      shown = value ?? '';
      if (document.activeElement !== node) node.value = shown;
    },
  };
}

function labelled(tag, key) {
  const node = document.createElement(tag);
  node.setAttribute('aria-label', key.label);
  node.dataset.key = key.path;
  return node;
}
