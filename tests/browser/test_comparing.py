"""A plan is kept, another one is tried against it, both are flipped, swapped and sent on as one link."""

import re

import pytest
from playwright.sync_api import expect

from pycore import link

PULSE = 'radar.pulse_us'


def button(note, name):
    return note.page.get_by_role('button', name=name, exact=True).first


def keep(note):
    button(note, 'Keep to compare').click()
    return note


def section(note):
    return note.page.get_by_role('region', name='Compared with the kept plan')


def row(note, name):
    return section(note).get_by_role('row').filter(has=note.page.get_by_role('rowheader', name=name))


def which(note):
    return note.page.locator('#which')


@pytest.fixture
def compared(note):
    """Return a note whose pulse was made longer after its plan was kept."""
    return keep(note.open().ready()).commit(PULSE, '+20%')


def test_nothing_is_compared_until_a_plan_is_kept(note):
    note.open().ready()
    expect(section(note)).to_be_hidden()
    expect(which(note)).to_be_hidden()


def test_what_differs_is_told_inputs_first_then_findings_with_sign_and_word(compared):
    expect(row(compared, 'Pulse length').get_by_role('cell')).to_have_text(['1.0 µs', '1.2 µs'])
    expect(row(compared, 'Largest duty of the set').get_by_role('cell')).to_have_text(
        ['0.116 %', '0.140 %', re.compile('−.*worse')]
    )
    tables = section(compared).get_by_role('table')
    expect(tables.nth(0)).to_have_accessible_name('Inputs that differ')
    expect(tables.nth(1)).to_have_accessible_name('Findings that differ')
    expect(section(compared)).to_contain_text('One input differs; one finding is worse')


def test_the_map_then_shows_only_what_is_lost_and_gained(compared):
    compared.commit('waveform.pri_us.1', '790')
    chief = compared.page.locator('#chief figcaption')
    expect(chief).to_contain_text(re.compile(r'Against the kept plan: lost [\d.]+.%, gained [\d.]+.% of the coverage'))


def test_key_c_flips_the_whole_page_and_the_line_under_the_title_says_which_plan_it_is(compared):
    page = compared.page
    page.locator('#verdict').click()
    page.keyboard.press('c')
    expect(which(compared)).to_contain_text('The kept plan is shown.')
    expect(compared.number(PULSE)).to_have_text('1.0 µs')
    expect(compared.finding('duty')).to_contain_text('0.116')
    page.keyboard.press('c')
    expect(which(compared)).to_contain_text('The present plan is shown')
    expect(compared.number(PULSE)).to_have_text('1.2 µs')
    expect(compared.finding('duty')).to_contain_text('0.140')


def test_the_button_flips_as_the_key_does(compared):
    button(compared, 'Show the kept plan').click()
    expect(compared.number(PULSE)).to_have_text('1.0 µs')
    button(compared, 'Show the present plan').click()
    expect(compared.number(PULSE)).to_have_text('1.2 µs')


def test_a_c_that_is_typed_into_a_field_flips_nothing(compared):
    compared.number(PULSE).click()
    compared.number(PULSE).press('c')
    expect(which(compared)).to_contain_text('The present plan is shown')
    compared.number(PULSE).press('Escape')


def test_the_kept_plan_cannot_be_changed_while_it_is_shown_and_the_page_says_so(compared):
    button(compared, 'Show the kept plan').click()
    expect(compared.number(PULSE)).not_to_have_attribute('role', 'spinbutton')
    compared.page.get_by_role('heading', level=1).click()
    compared.page.keyboard.type('x')
    compared.page.keyboard.press('Enter')
    expect(compared.page.get_by_role('status')).to_contain_text('cannot be changed')
    button(compared, 'Show the present plan').click()
    expect(compared.number(PULSE)).to_have_attribute('role', 'spinbutton')
    expect(compared.page.get_by_role('heading', level=1)).to_have_text('Skerry approach radar, draft B')


def test_the_address_stays_that_of_the_present_plan_while_the_kept_one_is_shown(compared):
    expect(compared.page).to_have_url(re.compile('pulse=1.2us.*with='))
    before = compared.page.url
    button(compared, 'Show the kept plan').click()
    expect(compared.finding('duty')).to_contain_text('0.116')
    compared.page.wait_for_timeout(600)  # longer than the address waits
    assert compared.page.url == before


def test_swapping_is_one_step_of_undo_and_one_entry_of_the_history(compared):
    expect(compared.page).to_have_url(re.compile('pulse=1.2us.*with='))
    entries = compared.page.evaluate('history.length')
    button(compared, 'Swap').click()
    expect(compared.number(PULSE)).to_have_text('1.0 µs')
    expect(row(compared, 'Pulse length').get_by_role('cell')).to_have_text(['1.2 µs', '1.0 µs'])
    expect(row(compared, 'Largest duty of the set')).to_contain_text('better')
    assert compared.page.evaluate('history.length') == entries + 1
    button(compared, 'Undo').click()
    expect(compared.number(PULSE)).to_have_text('1.2 µs')
    expect(row(compared, 'Pulse length').get_by_role('cell')).to_have_text(['1.0 µs', '1.2 µs'])


def test_going_back_after_a_swap_opens_both_plans_as_they_were(compared):
    expect(compared.page).to_have_url(re.compile('pulse=1.2us.*with='))
    button(compared, 'Swap').click()
    expect(compared.page).not_to_have_url(re.compile('pulse=1.2us'))
    compared.page.go_back()
    expect(compared.number(PULSE)).to_have_text('1.2 µs')
    expect(row(compared, 'Pulse length').get_by_role('cell')).to_have_text(['1.0 µs', '1.2 µs'])


def test_stop_comparing_leaves_the_present_plan_alone(compared):
    button(compared, 'Stop comparing').click()
    expect(section(compared)).to_be_hidden()
    expect(which(compared)).to_be_hidden()
    expect(compared.number(PULSE)).to_have_text('1.2 µs')
    expect(compared.page).to_have_url(re.compile('pulse=1.2us(?!.*with=)'))


def test_a_link_opens_both_plans(compared, site, chrome, watched):
    expect(compared.page).to_have_url(re.compile('pulse=1.2us.*with='))
    fragment = compared.page.url.partition('#')[2]
    fresh = type(compared)(watched(chrome, (site.address, 'data:', 'blob:')), site.address)
    fresh.open(fragment).ready()
    expect(row(fresh, 'Pulse length').get_by_role('cell')).to_have_text(['1.0 µs', '1.2 µs'])
    assert link.read_link(fragment).document['radar']['pulse_us'] == 1.2


def test_an_example_is_opened_while_another_plan_is_kept(note):
    keep(note.open().ready())
    button(note, 'Examples').click()
    note.page.get_by_role('link', name=re.compile('stagger')).first.click()
    expect(note.page.get_by_role('heading', level=1)).to_contain_text('stagger')
    expect(row(note, 'Kind')).to_contain_text('dwells')
    expect(which(note)).to_contain_text('another is kept')


def test_undoing_what_came_before_keeping_does_not_stop_the_comparison(note):
    note.open().ready().commit(PULSE, '1.4')
    keep(note)
    button(note, 'Undo').click()
    expect(row(note, 'Pulse length').get_by_role('cell')).to_have_text(['1.4 µs', '1.0 µs'])
