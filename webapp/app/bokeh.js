// Brings BokehJS into the page when the first figure wants it: it travels packed, and the page's policy knows it by its hash.

import { partOfPage } from './payload.js';

let running = null;

export function bokeh() {
  running ??= partOfPage('bokeh').then(run);
  return running;
}

function run(bytes) {
  const script = document.createElement('script');
  script.textContent = new TextDecoder().decode(bytes);
  document.head.append(script); // which runs it
  return globalThis.Bokeh;
}
