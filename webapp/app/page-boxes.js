// What stands at the head and the foot of every printed page: the marking, the title, "page n of m". A style of its own,
// because the boxes in a page's margin are styled and not written. Knows how text is quoted in a style.

export function createPageBoxes() {
  const style = document.head.appendChild(document.createElement('style'));
  return {
    update({ title, marking }) {
      const [head, mark] = [quoted(title ?? ''), quoted(marking ?? '')];
      style.textContent = `@page { @top-center { content: ${mark} } @bottom-center { content: ${mark} } @bottom-left { content: ${head} } }`;
    },
  };
}

// Every character that is no letter, digit or blank as its code: no text can end the string.
function quoted(text) {
  return `"${[...text].map((one) => (/[\p{L}\p{N} ]/u.test(one) ? one : `\\${one.codePointAt(0).toString(16)} `)).join('')}"`;
}
