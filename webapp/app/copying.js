// Copying text: the clipboard where the browser allows it, an old command where it does not, a field to select from at last.

export async function copyText(text) {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    return copyBySelection(text);
  }
}

function copyBySelection(text) {
  const field = document.createElement('textarea');
  field.value = text;
  field.className = 'out-of-sight';
  const focused = document.activeElement;
  document.body.append(field);
  field.select();
  const copied = document.execCommand('copy');
  field.remove();
  focused?.focus?.({ preventScroll: true });
  return copied;
}

// What is copied of the plan reads as one paragraph: cells of the rail in a row, words that act left out.
export function copyAsSentence(node) {
  node.addEventListener('copy', (event) => {
    const selection = getSelection();
    if (!node.contains(selection.anchorNode) || !node.contains(selection.focusNode) || !selection.rangeCount) return;
    const copied = selection.getRangeAt(0).cloneContents();
    for (const quiet of copied.querySelectorAll('.quiet')) quiet.remove();
    event.clipboardData.setData('text/plain', copied.textContent.replace(/ +/g, ' ').trim());
    event.preventDefault();
  });
}
