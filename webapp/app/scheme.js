// Light or dark: what the reader has chosen, else what the reader's system prefers. Figures are drawn and must be told.

import { setScheme } from './figures.js';
import { setText } from './number.js';

const DARK = matchMedia('(prefers-color-scheme: dark)');
const SCHEMES = ['light', 'dark'];

export function followScheme({ button, view }) {
  const system = () => (DARK.matches ? 'dark' : 'light');
  const chosen = () => (SCHEMES.includes(view.now.theme) ? view.now.theme : null);

  function apply() {
    if (chosen()) document.documentElement.dataset.theme = chosen();
    else delete document.documentElement.dataset.theme;
    setText(button, (chosen() ?? system()) === 'dark' ? 'Light' : 'Dark');
    setScheme(chosen() ?? system());
  }

  // To choose what the system prefers anyway is to follow it again.
  button.addEventListener('click', () => {
    const other = (chosen() ?? system()) === 'dark' ? 'light' : 'dark';
    view.choose('theme', other === system() ? null : other);
    apply();
  });
  DARK.addEventListener('change', apply);
  apply();
  return { update: apply };
}
