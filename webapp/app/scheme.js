// Light or dark: the theme that was asked for, else what the reader's system prefers. Figures are drawn on canvas and must be told.

import { setScheme } from './figures.js';

const DARK = matchMedia('(prefers-color-scheme: dark)');

export function followScheme() {
  const apply = () => setScheme(document.documentElement.dataset.theme ?? (DARK.matches ? 'dark' : 'light'));
  DARK.addEventListener('change', apply);
  apply();
}
