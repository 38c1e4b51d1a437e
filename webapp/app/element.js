// One element of the page with what stands in it.

export function element(tag, className, ...inner) {
  const made = document.createElement(tag);
  if (className) made.className = className;
  made.append(...inner);
  return made;
}
