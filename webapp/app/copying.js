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
