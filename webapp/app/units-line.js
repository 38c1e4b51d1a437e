// The line of units under the head's actions: one sentence whose words are chosen between. Knows words, no conversion.

const SAID = {
  range: { words: 'Ranges in', label: 'Unit of ranges' },
  speed: { words: 'speeds in', label: 'Unit of speeds' },
  pri: { words: 'pulse intervals as', label: 'Unit of pulse intervals' },
};
const SHOWN = { us: 'PRI in µs', ms: 'PRI in ms', Hz: 'PRF in Hz', kHz: 'PRF in kHz' };

export function createUnitsLine({ button, line, units }) {
  const radios = Object.entries(SAID).flatMap(([name, said], i) => {
    const group = document.createElement('span');
    Object.assign(group, { className: 'units-group' });
    group.setAttribute('role', 'radiogroup');
    group.setAttribute('aria-label', said.label);
    group.append(`${said.words} `);
    const made = units.choices[name].map((unit) => radio(group, name, unit, units));
    line.append(...(i ? ['; ', group] : [group]));
    return made;
  });
  line.append('.');
  button.addEventListener('click', () => {
    line.hidden = !line.hidden;
    button.setAttribute('aria-expanded', String(!line.hidden));
    if (!line.hidden) line.querySelector('input:checked').focus();
  });
  line.addEventListener('keydown', (event) => {
    if (event.key !== 'Escape') return;
    button.click();
    button.focus();
  });
  const update = () => radios.forEach(({ input, name, unit }) => { input.checked = units.now[name] === unit; });
  units.watch(update);
  update();
}

function radio(group, name, unit, units) {
  const label = document.createElement('label');
  const input = document.createElement('input');
  Object.assign(input, { type: 'radio', name: `unit-${name}`, value: unit });
  input.addEventListener('change', () => units.choose(name, unit));
  label.append(input, SHOWN[unit] ?? unit);
  group.append(label, ' ');
  return { input, name, unit };
}
