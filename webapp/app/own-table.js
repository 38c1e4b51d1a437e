// Comparing with a table of the reader's own: pasted, typed or opened as a file, and held against the plan by the core.

import { createDisclosure } from './disclosure.js';
import { createOnDemand } from './on-demand.js';
import { tableOf } from './table.js';

const TYPED_MS = 300; // after the last key
const LARGEST = 20e6; // bytes of a file; a table of as many lines as can be read has less
const IN_THE_FIELD = 200000; // characters; a longer table is held, not shown
const at = (id) => document.getElementById(id);

export function createOwnTable({ engine, plan, units, isBusy }) {
  const [field, said, chosen] = [at('own-table'), at('own-said'), at('own-file')];
  let [text, timer] = ['', 0];
  const open = createDisclosure(at('own-open'), at('own-body'), () => part.refresh());
  const part = createOnDemand({
    isWanted: () => open.isOpen() && text.trim() !== '',
    args: () => ({ plan: plan(), text, units: units() }),
    ask: (args) => engine.ask('agreement', args),
    show: ({ sentences, head, rows, cells, agree }) => {
      tell(sentences.join(' '));
      const listed = cells - agree > rows.length ? `The first ${rows.length} cells that do not agree` : 'Cells that do not agree';
      at('own-cells').replaceChildren(...(rows.length ? [tableOf(head, rows, { caption: listed })] : []));
    },
    fail: (message) => {
      tell(message);
      at('own-cells').replaceChildren();
    },
    isBusy,
  });
  const tell = (sentence) => { said.textContent = sentence; };

  function take(next) {
    text = next;
    if (text.trim()) part.refresh();
    else {
      tell('');
      at('own-cells').replaceChildren();
    }
  }

  async function openFile(file) {
    if (!file) return;
    if (file.size > LARGEST) return tell(`“${file.name}” has ${Math.round(file.size / 1e6)} MB: a table of range, speed and seen may have 20.`);
    const contents = await file.text();
    field.value = contents.length > IN_THE_FIELD || contents.includes('\0') ? '' : contents;
    field.placeholder = field.value ? '' : file.name;
    take(contents);
  }

  field.addEventListener('input', () => {
    clearTimeout(timer);
    timer = setTimeout(() => take(field.value), TYPED_MS);
  });
  at('own-choose').addEventListener('click', () => chosen.click());
  chosen.addEventListener('change', () => {
    openFile(chosen.files[0]);
    chosen.value = '';
  });
  return { refresh: part.refresh };
}
