// The cautions of a plan: what it calls for itself, then the three that always stand. The core says them.

export function createCautions(list) {
  return {
    update(sentences) {
      if (sentences.length === list.children.length && sentences.every((text, i) => list.children[i].textContent === text)) return;
      list.replaceChildren(...sentences.map((text) => {
        const item = document.createElement('li');
        item.textContent = text;
        return item;
      }));
    },
  };
}
