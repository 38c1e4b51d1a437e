// Fields for keys that are not numbers: a choice, a yes or no, a text. Each is {node, update(value)} and tells its edit.

export function choiceField(key, path, commit) {
  const node = labelled('select', key, path);
  node.append(...key.choices.map((choice, i) => new Option(key.words?.[i] ?? choice, choice)));
  node.addEventListener('change', () => commit({ value: node.value }));
  return { node, update: (value) => { if (document.activeElement !== node) node.value = value; } };
}

export function flagField(key, path, commit) {
  const node = labelled('input', key, path);
  node.type = 'checkbox';
  node.addEventListener('change', () => commit({ value: node.checked }));
  return { node, update: (value) => { node.checked = Boolean(value); } };
}

export function textField(key, path, commit) {
  const node = labelled('input', key, path);
  let shown = '';
  Object.assign(node, { type: 'text', autocomplete: 'off' });
  if (key.longest) node.maxLength = key.longest;
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

export function quietButton(word, label, act) {
  const node = document.createElement('button');
  Object.assign(node, { type: 'button', className: 'quiet', textContent: word });
  if (label) node.setAttribute('aria-label', label);
  node.addEventListener('click', act);
  return node;
}

function labelled(tag, key, path) {
  const node = document.createElement(tag);
  node.setAttribute('aria-label', key.label);
  node.dataset.key = path;
  return node;
}
