// The one line under a finding: why it is acceptable, or what will be done. Written in place; it goes with the plan.

import { setText } from './number.js';

const LONGEST = 400; // characters, as the plan allows

export function remarkLine(name, onRemark) {
  const node = document.createElement('span');
  node.className = 'finding-remark';
  const said = document.createElement('span');
  const write = document.createElement('button');
  write.type = 'button';
  write.className = 'quiet';
  node.append(said, ' ', write);
  const line = { node, said, write, remark: '', label: name, name, onRemark };
  write.addEventListener('click', () => edit(line));
  return { node, update: (finding) => update(line, finding) };
}

function update(line, { remark, remark_text: text, label, met }) {
  line.remark = remark ?? '';
  line.label = label ?? line.name;
  const shown = text ?? line.remark;
  setText(line.said, shown);
  setText(line.write, line.remark ? 'Change' : met === false ? 'Say why' : 'Add a remark');
  line.write.setAttribute('aria-label', `${line.write.textContent}: ${line.label}`);
  line.node.classList.toggle('bare', !line.remark);
}

function edit(line) {
  const field = document.createElement('textarea');
  Object.assign(field, { rows: 1, maxLength: LONGEST, value: line.remark });
  field.setAttribute('aria-label', `Remark: ${line.label}`);
  let settled = false;
  const end = (keep) => {
    if (settled) return;
    settled = true;
    const text = field.value.trim();
    field.replaceWith(line.said, ' ', line.write);
    if (keep && text !== line.remark) line.onRemark(line.name, text);
  };
  field.addEventListener('keydown', (event) => {
    if (event.key === 'Escape' || (event.key === 'Enter' && !event.shiftKey)) {
      event.preventDefault();
      end(event.key === 'Enter');
      line.write.focus();
    }
  });
  field.addEventListener('blur', () => end(true));
  line.node.replaceChildren(field);
  field.focus();
  field.select();
}
