// The head of the note and its actions in words: where the plan comes from, what was said of its link, copy, print, examples.

import { assumedText } from './assumed.js';
import { copyText } from './copying.js';
import { createExamples } from './examples.js';
import { createFirstLine } from './first-line.js';
import { differing } from './keys.js';
import { setText } from './number.js';

const LONG_FOR_CHAT = 1900; // characters of a link; some chats cut what is longer
const at = (id) => document.getElementById(id);

export function createHead({ opening, state, status, address, hands, page, keys, quantities, isOpening, openExample, print }) {
  let origin = opening.answer.plan;
  let link = address.opened || opening.answer.link;
  let pasted = false;
  const firstLine = createFirstLine({ form: at('first-line'), assumed: at('assumed'), onPaste: paste });
  createExamples({ button: at('examples'), sheet: at('examples-sheet'), list: at('examples-list'), examples: opening.examples, open: openExample });
  at('copy-link').addEventListener('click', () => copyLink(address.whole(link), status));
  at('print').addEventListener('click', () => print());
  setText(at('foot'), `Pulsewright ${opening.version}, computation ${opening.checksum.slice(0, 8)}. Nothing leaves this page: it asks no server for anything.`);

  function paste(text) {
    pasted = true;
    hands.act('paste-pris', { text });
  }

  function standing() {
    const { plan, pending, aside } = state.now;
    if (aside) return [decided(plan.decided), 'as it was kept; its numbers rest while it is shown'].join(' · ');
    const changed = differing(plan, origin) + (pending.length && differing(plan, origin) === 0 ? 1 : 0);
    return [
      decided(plan.decided),
      isOpening() ? '' : changed ? `${changed} ${changed === 1 ? 'input differs' : 'inputs differ'} from what was opened` : 'as it was opened',
    ].filter(Boolean).join(' · ');
  }

  function update() {
    setText(at('standing-said'), standing());
    setText(at('standing-now'), [engineWord(state.now.pending.length), 'everything underlined can be typed, stepped or dragged'].filter(Boolean).join(' · '));
    const untouched = !state.now.aside && !address.opened && differing(state.now.plan, opening.answer.plan) === 0;
    const said = pasted && !untouched ? assumedText({ plan: state.now.plan, opening: opening.answer.plan, clauses: page.said(), keys, quantities }) : '';
    firstLine.update({ offered: untouched, said });
    setText(at('link-text'), address.whole(link));
  }

  return {
    update,
    late: (how) => {
      at('running').hidden = !how || document.documentElement.dataset.engine !== 'ready';
      at('running').dataset.how = how;
    },
    answered(answer) {
      link = answer.link;
      update();
    },
    opened(answer) {
      origin = answer.plan;
      pasted = false;
      announce(sentenceOf(answer.opened));
    },
    failed(reason) {
      announce(`The numbers cannot be changed here: ${reason}. The note, its link and copying still work; open it in another browser to change the plan.`);
      update();
    },
  };
}

function engineWord(waiting) {
  const words = { starting: waiting ? 'waiting for the engine' : 'engine starting', static: 'engine starting', failed: 'not computing' };
  return words[document.documentElement.dataset.engine] ?? '';
}

function decided({ by, on, as } = {}) {
  return [as ?? 'draft', by && `by ${by}`, on].filter(Boolean).join(', ');
}

function announce(sentence) {
  setText(at('announcement'), sentence);
  at('announcement').hidden = !sentence;
}

// A cut link is announced as cut; one that was edited by hand loads and is named quietly.
function sentenceOf({ cut, edited, said, refused }) {
  return [
    cut && 'This link was cut: its end is missing. What could be read is shown; the rest stands at its defaults.',
    !cut && edited && 'This link was edited by hand after it was made.',
    ...said,
    ...refused.map(({ message }) => message),
  ].filter(Boolean).join(' ');
}

async function copyLink(address, status) {
  const long = address.length > LONG_FOR_CHAT ? ' It is long: some chats will cut it.' : '';
  if (await copyText(address)) status.say(`The link is copied. It contains the whole plan, and whoever stores it has it.${long}`, ['Show it', () => showLink(address, long)]);
  else showLink(address, `This browser does not let the page copy: select the link and copy it.${long}`);
}

function showLink(address, said) {
  setText(at('link-said'), said);
  at('link-field').value = address;
  at('link-sheet').showModal();
  at('link-field').select();
}
