// What can be chosen in a figure, as words in a line under it; the core names the choices and the one that is shown.
// Knows neither the figure nor what a choice means: a choice is told by its name and value.

export function createFigureChoices(choose) {
  const node = document.createElement('div');
  node.className = 'figure-choices';
  node.hidden = true;
  let said = '';
  return {
    node,
    update(choices = []) {
      const text = JSON.stringify(choices);
      if (text === said) return;
      const focus = node.contains(document.activeElement) ? document.activeElement.dataset.value : null;
      said = text;
      node.hidden = !choices.length;
      node.replaceChildren(...choices.map((choice) => line(choice, choose)));
      if (focus) node.querySelector(`[data-value="${CSS.escape(focus)}"]`)?.focus();
    },
  };
}

function line({ name, said, now, of }, choose) {
  const group = document.createElement('p');
  group.setAttribute('role', 'group');
  group.setAttribute('aria-label', said);
  const label = document.createElement('span');
  label.textContent = `${said}: `;
  group.append(label, ...of.map(([value, words]) => {
    const button = document.createElement('button');
    button.type = 'button';
    button.className = 'quiet';
    button.dataset.value = value;
    button.textContent = words;
    button.setAttribute('aria-pressed', String(value === now));
    button.addEventListener('click', () => choose(name, value));
    return button;
  }));
  return group;
}
