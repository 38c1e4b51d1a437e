// The lines below the paragraph: one for each number that was refused, with the way back.
// The core wrote the sentence; this file sets the label apart and knows what "Put back" does.

// `tell` says what holds as long as a number is refused.
export function createRefused(box, putBack, tell = (still) => `Everything below still shows ${still}.`) {
  return {
    update(refused) {
      const signature = JSON.stringify(refused.map(({ key, message, still }) => [key, message, still]));
      if (box.dataset.shown === signature) return;
      box.dataset.shown = signature;
      box.hidden = refused.length === 0;
      box.replaceChildren(...refused.map((refusal) => line(refusal, putBack, tell)));
    },
  };
}

function line({ key, label, message, still }, putBack, tell) {
  const node = document.createElement('p');
  const [name, rest] = message.startsWith(label) ? [label, message.slice(label.length)] : ['', message];
  if (name) node.append(strong(name));
  node.append(rest);
  if (still) {
    node.append(` ${tell(still)}`);
    const back = document.createElement('button');
    back.type = 'button';
    back.textContent = `Put back ${still}`;
    back.addEventListener('click', () => putBack(key));
    node.append(back);
  }
  return node;
}

function strong(text) {
  const node = document.createElement('strong');
  node.textContent = text;
  return node;
}
