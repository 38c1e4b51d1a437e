// A heading that opens what stands under it. `onToggle(open)` hears of it; what is closed is not shown.

export function createDisclosure(button, body, onToggle = () => {}) {
  const isOpen = () => button.getAttribute('aria-expanded') === 'true';
  const set = (open) => {
    button.setAttribute('aria-expanded', String(open));
    body.classList.toggle('closed', !open);
  };
  set(isOpen());
  button.addEventListener('click', () => {
    set(!isOpen());
    onToggle(isOpen());
  });
  return { isOpen };
}
