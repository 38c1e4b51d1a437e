// The worked examples: a list of links, each with one sentence that invites. Opening one is a step that can be undone.

export function createExamples({ button, sheet, list, examples, open }) {
  list.replaceChildren(...examples.map((example) => item(example, (event) => {
    event.preventDefault();
    sheet.close();
    open(example);
  })));
  button.addEventListener('click', () => sheet.showModal());
}

function item({ title, invite, link }, act) {
  const node = document.createElement('li');
  const anchor = document.createElement('a');
  anchor.href = `#${link}`;
  anchor.textContent = title;
  anchor.addEventListener('click', act);
  const invitation = document.createElement('span');
  invitation.textContent = invite ?? '';
  node.append(anchor, invitation);
  return node;
}
