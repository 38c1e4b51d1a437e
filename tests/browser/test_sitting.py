"""Tried in this sitting: a line for every change, what it moved, and the minutes that are made of the lines."""

import re

import pytest
from playwright.sync_api import expect

from pycore import link

PULSE = 'radar.pulse_us'
GATHER = """() => {
  window.copied = [];
  const writeText = async (text) => { window.copied.push(text); };
  Object.defineProperty(navigator, 'clipboard', { value: { writeText } });
}"""


def lines(note):
    return note.page.locator('#sitting-lines').get_by_role('row')


def act(note, what, at=0):
    lines(note).nth(at).get_by_role('button', name=re.compile(f'^{what}: ')).click()


@pytest.fixture
def tried(note):
    """Return a note in which a longer pulse was tried by a fifth."""
    note.open().ready().commit(PULSE, '+20%')
    expect(lines(note)).to_have_count(1)
    expect(lines(note).first).to_contain_text('worse')
    return note


def copied(note, name):
    note.page.evaluate(GATHER)
    note.page.get_by_role('button', name=name).click()
    expect(note.page.get_by_role('status')).to_contain_text('copied')
    return note.page.evaluate('window.copied.at(-1)')


def test_nothing_was_tried_when_the_note_is_opened(note):
    note.open().ready()
    expect(note.page.get_by_role('region', name='Tried in this sitting')).to_be_hidden()


def test_a_fifth_more_is_a_line_with_both_values_and_what_it_moved(tried):
    line = lines(tried).first
    expect(line).to_contain_text('Pulse length 1.0 → 1.2 µs')
    expect(line).to_contain_text('largest duty of the set: 0.116 → 0.140 %, worse')
    expect(line.get_by_role('rowheader')).to_have_text(re.compile(r'^\d\d:\d\d$'))
    expect(tried.page.get_by_role('region', name='Tried in this sitting')).to_contain_text('live in this page only')


def test_a_run_of_arrow_steps_is_one_line(note):
    note.open().ready()
    number = note.number(PULSE)
    number.focus()
    for _ in range(5):
        number.press('ArrowUp')
    expect(lines(note)).to_have_count(1)
    expect(lines(note).first).to_contain_text('Pulse length 1.0 → 1.5 µs')


def test_a_verdict_that_flips_is_said_in_the_line(note):
    note.open().ready().commit('doppler.notch_mps', '9')
    expect(lines(note).first).to_contain_text('no longer met')


def test_a_line_is_returned_to_and_that_is_a_line_too(tried):
    tried.commit(PULSE, '2')
    expect(lines(tried)).to_have_count(2)
    act(tried, 'Return to it')
    expect(tried.number(PULSE)).to_have_text('1.2 µs')
    expect(lines(tried)).to_have_count(3)


def test_the_plan_of_a_line_is_compared_with(tried):
    tried.commit(PULSE, '2')
    act(tried, 'Compare with it')
    table = tried.page.get_by_role('table', name='Inputs that differ')
    expect(table.get_by_role('cell')).to_have_text(['1.2 µs', '2.0 µs'])


def test_undo_takes_the_line_back_and_redo_gives_it_back(tried):
    tried.page.get_by_role('button', name='Undo').first.click()
    expect(lines(tried).first).to_contain_text('(taken back)')
    expect(lines(tried)).to_have_count(1)
    tried.page.get_by_role('button', name='Redo').first.click()
    expect(lines(tried).first).not_to_contain_text('(taken back)')
    expect(lines(tried)).to_have_count(1)


def test_a_line_is_removed(tried):
    act(tried, 'Remove')
    expect(tried.page.get_by_role('region', name='Tried in this sitting')).to_be_hidden()
    expect(tried.number(PULSE)).to_have_text('1.2 µs')


def test_the_minutes_as_text_hold_each_line_its_remark_and_its_link(tried):
    act(tried, 'Remark')
    tried.page.get_by_role('textbox', name='Remark').fill('asked by operations')
    tried.page.keyboard.press('Enter')
    text = copied(tried, 'Copy for the minutes, as text')
    assert re.search(r'^\d\d:\d\d  pulse length 1\.0 → 1\.2.µs$', text, re.MULTILINE)
    assert re.search(r'largest duty of the set: 0\.116 → 0\.140.%, worse', text)
    assert 'Remark: asked by operations' in text
    address = re.search(r'http\S+#(\S+)', text)[1]
    assert link.read_link(address).document['radar']['pulse_us'] == 1.2


def test_the_minutes_as_a_table_keep_a_bar_in_a_remark_inside_its_cell(tried):
    act(tried, 'Remark')
    tried.page.get_by_role('textbox', name='Remark').fill('A | B')
    tried.page.keyboard.press('Enter')
    head, rule, row = copied(tried, 'as a Markdown table').split('\n')
    assert head == '| Time | What changed | What moved | Remark | Link |'
    assert set(rule) <= set('| -')
    assert len(re.split(r'(?<!\\)\|', row)) == len(head.split('|'))
    assert r'A \| B' in row


def test_what_was_tried_is_gone_when_the_page_is_opened_again(tried):
    tried.page.reload()
    tried.ready()
    expect(lines(tried)).to_have_count(0)


def test_opening_an_example_is_a_line(note):
    note.open().ready()
    note.page.get_by_role('button', name='Examples').click()
    note.page.get_by_role('link', name=re.compile('stagger')).first.click()
    expect(lines(note)).to_have_count(1)
    expect(lines(note).first).to_contain_text('more inputs')
