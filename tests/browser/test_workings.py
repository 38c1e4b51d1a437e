"""What stands under a finding: how it comes about and how far each input can move, opened as a reader does."""

import re

import pytest
from playwright.sync_api import expect

MARGINS_MS = 60_000


@pytest.fixture
def opened(note):
    """Return the note on a laptop, its engine ready."""
    note.page.set_viewport_size({'width': 1366, 'height': 900})

    return note.open().ready()


def test_a_finding_opens_to_its_formula_its_numbers_its_result_and_its_source(opened):
    opened.finding('blind-speed').get_by_role('button', name='How it comes about').click()
    steps = opened.finding('blind-speed').get_by_role('listitem')

    expect(steps.first).to_contain_text('vb = λ/(2T)')
    expect(steps.first).to_contain_text('T = 980 and 860\u202fµs')
    expect(steps.first).to_contain_text('vb = 54.626906 and 62.249265\u202fm/s')
    expect(steps.first).to_contain_text('Richards')


def test_letters_of_a_formula_are_set_in_italics_and_words_are_not(opened):
    opened.finding('blind-speed').get_by_role('button', name='How it comes about').click()
    formula = opened.finding('blind-speed').get_by_role('listitem').first.locator('.step-formula')

    expect(formula.locator('i')).to_have_text(['v', 'b', 'λ', 'T'])
    expect(formula.locator('sub')).to_have_text('b')
    words = opened.finding('blind-speed').get_by_role('listitem').nth(1).locator('.step-formula')
    expect(words.locator('i')).to_have_text(['v', 'k', 'v', 'b'])


def test_a_met_finding_says_how_far_its_tightest_input_can_move(opened):
    finding = opened.finding('decode-range')
    finding.get_by_role('button', name='How it comes about').click()

    sentence = 'PRI 2 may shrink to 734.9\u202fµs before this is no longer met.'
    expect(finding.get_by_text(sentence)).to_be_visible(timeout=MARGINS_MS)
    table = finding.get_by_role('table', name='How far each input can move alone')
    expect(table.get_by_role('row', name=re.compile('The far end of the range 110'))).to_contain_text('128\u202fkm')


def test_a_finding_that_is_not_met_says_what_would_cure_it(opened):
    finding = opened.finding('must-see.0')
    finding.get_by_role('button', name='How it comes about').click()

    cure = 'This is met when PRI 2 shrinks to 803.4\u202fµs.'
    expect(finding.get_by_text(cure)).to_be_visible(timeout=MARGINS_MS)
    opened.commit('waveform.pri_us.1', '803.4')
    expect(finding).to_have_attribute('data-met', 'true')


def test_a_finding_for_information_says_that_nothing_is_judged(opened):
    finding = opened.finding('largest-hole')
    finding.get_by_role('button', name='How it comes about').click()

    expect(finding).to_contain_text('nothing is judged')
    expect(finding.get_by_role('table')).to_have_count(0)


def test_with_the_keyboard_a_finding_is_opened_and_closed(opened):
    button = opened.finding('dwell').get_by_role('button', name='How it comes about')
    button.focus()
    opened.page.keyboard.press('Enter')
    expect(button).to_have_attribute('aria-expanded', 'true')
    expect(opened.finding('dwell')).to_contain_text('Σ (n + fill) T')

    opened.page.keyboard.press('Enter')
    expect(button).to_have_attribute('aria-expanded', 'false')
    expect(opened.finding('dwell').get_by_role('listitem')).to_have_count(0)


def test_after_an_edit_an_open_finding_is_worked_out_again(opened):
    finding = opened.finding('dwell')
    finding.get_by_role('button', name='How it comes about').click()
    expect(finding).to_contain_text('cannot rise: at 10', timeout=MARGINS_MS)

    opened.commit('waveform.pulses', '8')
    expect(finding).not_to_contain_text('cannot rise: at 10')
    expect(finding).to_contain_text('n = 8')
    expect(finding).to_contain_text('The number of pulses may rise to 9 before', timeout=MARGINS_MS)


def test_while_margins_are_worked_out_an_edit_gets_in_between(opened):
    opened.page.get_by_role('button', name='Examples').click()
    opened.page.get_by_role('link', name=re.compile('stagger', re.IGNORECASE)).first.click()
    finding = opened.finding('blind-speed')
    expect(finding).to_contain_text('the response falls below')
    finding.get_by_role('button', name='How it comes about').click()
    expect(finding).to_contain_text('response(v)')

    opened.commit('radar.pulse_us', '1.7')
    expect(finding.locator('.margin-sentence')).to_have_text('…')


def test_a_plan_that_holds_over_carriers_shows_the_worst_and_where_and_how_it_was_searched(note):
    plan = 'v=1&pri=980,860us&pulses=9&fill=1&want-visible=95pct&over-carrier=2.7..2.9GHz&holds=yes'
    note.open(plan).ready()
    finding = note.finding('visible')

    expect(finding).to_contain_text('over 2.7 to 2.9\u202fGHz', timeout=MARGINS_MS)
    finding.get_by_role('button', name='How it comes about').click()
    expect(finding).to_contain_text('65 points and of finer ones around it', timeout=MARGINS_MS)


def test_opened_workings_print_and_closed_ones_do_not(opened):
    opened.finding('dwell').get_by_role('button', name='How it comes about').click()
    expect(opened.finding('dwell')).to_contain_text('Σ (n + fill) T')
    opened.page.emulate_media(media='print')

    expect(opened.finding('dwell').get_by_text('time on target = ')).to_be_visible()
    expect(opened.finding('dwell').get_by_role('button')).to_have_count(0)
    expect(opened.finding('duty').get_by_role('listitem')).to_have_count(0)
