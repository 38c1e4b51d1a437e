"""The parts after the figures: hand-over, assumptions and conventions, and a table of the reader's own."""

import re

import pytest
from playwright.sync_api import expect


@pytest.fixture
def opened(note):
    """Return the note on a laptop, its engine ready, allowed to read what it copies."""
    note.page.set_viewport_size({'width': 1366, 'height': 900})
    note.page.context.grant_permissions(['clipboard-read', 'clipboard-write'])

    return note.open().ready()


def hand_over(note):
    return note.page.get_by_role('region', name='Hand-over')


def conventions(note):
    return note.page.get_by_role('region', name='Assumptions and conventions')


def own_table(note):
    conventions(note).get_by_role('button', name='Compare with a table of yours').click()

    return note.page.get_by_label('Range, speed, and whether it is seen')


def test_parts_stand_in_the_order_of_a_note(opened):
    names = ['What it can do', 'The figures', 'Hand-over', 'Assumptions and conventions', 'Cautions']
    tops = [opened.page.get_by_role('region', name=name, exact=True).bounding_box()['y'] for name in names]

    assert tops == sorted(tops)


def test_the_timing_table_opens_in_whole_counts_with_its_sums(opened):
    expect(hand_over(opened)).to_contain_text('One set takes 184\u202f000 counts of the 10\u202fMHz clock')
    expect(hand_over(opened).get_by_role('table')).to_have_count(0)
    hand_over(opened).get_by_role('button', name='Timing table').click()

    rows = hand_over(opened).get_by_role('table', name='Timing table').get_by_role('row')
    expect(rows).to_have_count(3)
    expect(rows.nth(1)).to_contain_text('9800')
    expect(rows.nth(2)).to_contain_text('8600')


def test_the_timing_table_follows_the_plan(opened):
    hand_over(opened).get_by_role('button', name='Timing table').click()
    opened.commit('waveform.pri_us.1', '861')

    expect(hand_over(opened).get_by_role('row').nth(2)).to_contain_text('8610')
    expect(hand_over(opened)).to_contain_text('One set takes 184\u202f100 counts')


def test_right_after_an_edit_nothing_of_the_earlier_plan_is_handed_over(opened):
    expect(hand_over(opened)).to_contain_text('One set takes 184\u202f000 counts')
    opened.commit('waveform.pri_us.1', '861')
    opened.page.get_by_role('button', name='Undo').click()

    expect(hand_over(opened)).not_to_contain_text('184\u202f100')
    expect(hand_over(opened)).to_contain_text('One set takes 184\u202f000 counts')


def test_the_timing_table_is_copied_as_csv_and_as_text(opened):
    hand_over(opened).get_by_role('button', name='Timing table').click()
    hand_over(opened).get_by_role('button', name='Copy as CSV').click()
    expect(opened.page.get_by_text('copied as CSV')).to_be_visible()
    head, first, *_ = opened.page.evaluate('navigator.clipboard.readText()').split('\n')
    assert head.startswith('pri_counts,pri_us,prf_hz')
    assert first.startswith('9800,980.0,1020.4081632653')

    hand_over(opened).get_by_role('button', name='Copy as text').click()
    expect(opened.page.get_by_text('copied as text')).to_be_visible()
    assert 'One set takes 184 000 counts' in opened.page.evaluate('navigator.clipboard.readText()')


def test_what_changed_since_the_plan_that_was_opened_is_listed(opened):
    expect(hand_over(opened)).to_contain_text('Nothing has changed since the plan that was opened.')
    opened.commit('radar.pulse_us', '1.2')

    changed = hand_over(opened).get_by_role('table', name='What changed')
    expect(changed.get_by_role('row', name='Pulse length 1.0\u202fµs 1.2\u202fµs')).to_be_visible()


def test_conventions_are_closed_and_open_to_checks_with_the_numbers_of_the_plan(opened):
    expect(conventions(opened).get_by_role('table')).to_have_count(0)
    conventions(opened).get_by_role('button', name='Conventions, each with a check').click()

    row = conventions(opened).get_by_role('row', name=re.compile('^Time used'))
    expect(row).to_contain_text('(9 + 1) × 980 + (9 + 1) × 860')
    expect(row).to_contain_text('18\u202f400\u202fµs')
    opened.commit('waveform.pulses', '8')
    expect(row).to_contain_text('(8 + 1) × 980 + (8 + 1) × 860')


def test_what_the_models_leave_out_is_told_when_it_is_opened(opened):
    conventions(opened).get_by_role('button', name='What the models leave out').click()

    expect(conventions(opened).get_by_role('listitem')).to_have_count(9)
    expect(conventions(opened)).to_contain_text('the horizon hides nothing')


def test_a_pasted_table_is_held_against_the_plan(opened):
    own_table(opened).fill('range (km); speed (m/s); seen\n10;57;1\n10;30;1\n2,5;200;1')

    expect(conventions(opened)).to_contain_text('Two of three cells agree, 66.7\u202f%')
    row = conventions(opened).get_by_role('table', name='Cells that do not agree').get_by_role('row').nth(1)
    expect(row).to_contain_text('980 and 860\u202fµs in the notch')
    expect(row).to_contain_text('not seen')


def test_a_line_that_cannot_be_read_is_told_with_its_number(opened):
    own_table(opened).fill('10;57;1\n10;fast;1')

    expect(conventions(opened)).to_contain_text('Line 2: speed must be a number; got “fast”.')


def test_an_opened_file_of_ten_thousand_lines_is_answered(opened, tmp_path):
    lines = ['range_km,speed_mps,seen', *(f'{5 + place % 100},{place / 100},1' for place in range(10_000))]
    file = tmp_path / 'mine.csv'
    file.write_text('\n'.join(lines), 'utf-8')
    own_table(opened)
    opened.page.locator('#own-file').set_input_files(file)

    expect(conventions(opened)).to_contain_text(re.compile('of 10\u202f000 cells agree'))
    expect(conventions(opened).get_by_role('table', name='The first 20 cells that do not agree')).to_be_visible()


def test_a_file_that_is_no_table_is_answered_in_one_sentence(opened, tmp_path):
    file = tmp_path / 'mine.xlsx'
    file.write_bytes(b'PK\x03\x04' + bytes(range(256)) * 400)
    own_table(opened)
    opened.page.locator('#own-file').set_input_files(file)

    expect(conventions(opened)).to_contain_text('This is not a table as text: save it as CSV')


def test_the_comparison_follows_the_plan_while_it_is_open(opened):
    own_table(opened).fill('10;57;0')
    expect(conventions(opened)).to_contain_text('The one cell agrees with the plan.')
    opened.commit('waveform.pri_us.1', '735')

    expect(conventions(opened)).to_contain_text('None of one cell agree')


def test_in_print_the_timing_table_stands_and_closed_conventions_do_not(opened):
    expect(hand_over(opened)).to_contain_text('One set takes')
    opened.page.emulate_media(media='print')

    expect(opened.page.get_by_role('table', name='Timing table')).to_be_visible()
    expect(opened.page.get_by_role('heading', name='Assumptions and conventions')).to_be_hidden()
    expect(opened.page.get_by_role('button', name='Copy as CSV')).to_be_hidden()


def test_opened_conventions_print(opened):
    conventions(opened).get_by_role('button', name='Conventions, each with a check').click()
    expect(conventions(opened).get_by_role('table')).to_be_visible()
    opened.page.emulate_media(media='print')

    expect(conventions(opened).get_by_role('table')).to_be_visible()
