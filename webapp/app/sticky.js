// The plan's paragraph sticks to the top, short, once it has been scrolled past: the same elements, with the verdict
// and with what was refused, so that a reason is in sight wherever the number is typed.
// A place-holder keeps the height, so nothing moves. Knows only where things are.

export function stickWhenPassed({ place, plan, verdict, verdictPlace, refused }) {
  const stick = (stuck) => {
    if (plan.classList.contains('stuck') === stuck) return;
    place.style.height = stuck ? `${place.getBoundingClientRect().height}px` : '';
    const focused = document.activeElement;
    plan.classList.toggle('stuck', stuck);
    document.documentElement.classList.toggle('stuck-plan', stuck);
    (stuck ? plan : verdictPlace).append(verdict);
    if (stuck) plan.append(refused);
    else place.after(refused);
    if (focused !== document.activeElement) focused.focus?.({ preventScroll: true });
  };
  new IntersectionObserver(([entry]) => stick(!entry.isIntersecting && entry.boundingClientRect.bottom <= 0)).observe(place);
  addEventListener('beforeprint', () => stick(false));
}
