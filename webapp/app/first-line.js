// On the opening example the first line is a field: PRFs or PRIs, typed or pasted, make a plan at once.
// What the verdict then leans on without having been told stands under it until the next plan is opened.

export function createFirstLine({ form, assumed, onPaste }) {
  const field = form.querySelector('input');
  form.addEventListener('submit', (event) => {
    event.preventDefault();
    if (field.value.trim()) onPaste(field.value);
  });
  // A field of one line would join the lines of a spreadsheet column into one number.
  field.addEventListener('paste', (event) => {
    const text = event.clipboardData?.getData('text/plain') ?? '';
    if (!/[\n\t]/.test(text.trim())) return;
    event.preventDefault();
    field.value = text.trim().replace(/\s*[\n\r]+\s*/g, '; ');
    onPaste(text);
  });
  return {
    update({ offered, said }) {
      form.hidden = !offered;
      assumed.hidden = !said;
      if (assumed.textContent !== said) assumed.textContent = said;
    },
  };
}
