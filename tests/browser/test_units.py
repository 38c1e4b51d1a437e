"""The reader's units: chosen in words, followed by the whole page and the link, and never a change of the plan."""

import re

import pytest
from playwright.sync_api import expect

FAR = 'coverage.range_km.1'
FAST = 'coverage.speed_mps.1'
FIRST = 'waveform.pri_us.0'


@pytest.fixture
def live(note):
    """Return the note with its engine ready."""
    return note.open().ready()


def choose(note, *units):
    """Choose units by their words in the head."""
    note.page.get_by_role('button', name='Units').click()
    for unit in units:
        note.page.get_by_role('radio', name=unit, exact=True).check(force=True)  # the word is what is seen and hit


def test_the_whole_page_follows_the_units_and_the_findings_keep_their_values(live):
    value = live.finding('decode-range').get_attribute('data-value')
    choose(live, 'nmi', 'kt', 'PRF in Hz')

    expect(live.number(FAR)).to_have_text('59.4\u202fnmi')
    expect(live.number(FAST)).to_have_text('583\u202fkt')
    expect(live.page.locator('#paragraph')).to_contain_text('at PRFs of 1020.4 and 1162.8\u202fHz')
    expect(live.finding('decode-range')).to_contain_text('69.6\u202fnmi')
    expect(live.finding('decode-range')).to_have_attribute('data-value', value)
    expect(live.page.locator('#verdict')).to_contain_text('109 to 118\u202fkt')
    expect(live.page.get_by_role('figure').first).to_contain_text('109 to 118\u202fkt at every range')
    expect(live.page.get_by_text('as it was opened')).to_be_visible()
    expect(live.page.get_by_role('button', name='Undo').first).to_be_disabled()


def test_figures_that_come_into_sight_later_are_in_the_chosen_units(live):
    last = live.page.get_by_role('figure').last
    last.scroll_into_view_if_needed()
    expect(last).not_to_have_class('pending')
    live.page.evaluate('scrollTo(0, 0)')
    choose(live, 'kt')
    figure = live.page.locator('[data-figure="blind-speeds"]')
    figure.scroll_into_view_if_needed()

    expect(figure).to_contain_text('kt')
    expect(figure).not_to_contain_text('m/s')


def test_the_table_of_quantities_is_in_the_chosen_units_too(live):
    live.page.get_by_text('All other quantities').click()
    choose(live, 'km/h')

    expect(live.page.get_by_role('spinbutton', name='Crossing speed')).to_have_text('288\u202fkm/h')


def test_a_link_carries_the_units(live):
    choose(live, 'nmi', 'PRF in kHz')
    expect(live.page).to_have_url(re.compile('units=nmi,kHz'))
    fragment = live.page.url.partition('#')[2]
    live.page.evaluate('sessionStorage.clear()')
    live.page.goto('about:blank')
    live.open(fragment)

    expect(live.number(FAR)).to_have_text('59.4\u202fnmi')  # before the engine has started
    live.ready()
    live.page.get_by_role('button', name='Units').click()
    expect(live.page.get_by_role('radio', name='PRF in kHz')).to_be_checked()
    expect(live.page.locator('#announcement')).to_be_hidden()


def test_the_units_are_remembered_for_the_sitting(live):
    choose(live, 'nmi')
    live.page.goto('about:blank')
    live.open()

    expect(live.number(FAR)).to_have_text('59.4\u202fnmi')


def test_units_that_a_link_asks_for_and_nobody_knows_are_named(note):
    note.open('v=1&pri=980,860us&units=nmi,furlong&end=0000').ready()

    expect(note.page.locator('#announcement')).to_contain_text('units that this page does not show: “furlong”')
    expect(note.number(FAR)).to_have_text('59.4\u202fnmi')


@pytest.mark.parametrize(
    ('key', 'text', 'became'),
    [(FAR, '60', '60\u202fnmi'), (FAR, '100 km', '54\u202fnmi'), (FAST, '600', '600\u202fkt'), (FIRST, '1000', '1000')],
)
def test_a_number_without_a_unit_is_meant_in_the_one_that_is_shown(live, key, text, became):
    choose(live, 'nmi', 'kt', 'PRF in Hz')
    live.commit(key, text)

    expect(live.number(key)).to_have_text(became)


def test_a_text_that_was_refused_keeps_the_unit_it_was_typed_in(live):
    live.number('coverage.range_km.0').click()
    live.page.keyboard.type('120')
    live.page.keyboard.press('Enter')
    expect(live.number('coverage.range_km.0')).to_have_attribute('aria-invalid', 'true')
    choose(live, 'nmi')
    live.commit(FAR, '140 km')

    expect(live.number('coverage.range_km.0')).to_have_text('64.8')


@pytest.mark.parametrize(
    ('unit', 'key', 'press', 'became'),
    [
        ('nmi', FAR, 'ArrowUp', '59.5\u202fnmi'),
        ('nmi', FAR, 'Shift+ArrowDown', '58.4\u202fnmi'),
        ('kt', FAST, 'ArrowUp', '584\u202fkt'),
        ('PRF in Hz', FIRST, 'ArrowUp', '1020.5'),
        ('PRF in Hz', FIRST, 'Alt+ArrowDown', '1020.3'),
        ('PRI in ms', FIRST, 'ArrowDown', '0.9799'),
    ],
)
def test_a_step_is_one_in_the_last_figure_that_is_shown(live, unit, key, press, became):
    choose(live, unit)
    live.number(key).focus()
    live.page.keyboard.press(press)

    expect(live.number(key)).to_have_text(became)
    expect(live.root).to_have_attribute('data-shown', '1')


def test_a_step_of_a_prf_moves_it_by_a_clock_count_at_least(live):
    live.page.get_by_text('All other quantities').click()
    live.commit('radar.clock_mhz', '1')
    choose(live, 'PRF in Hz')
    live.number(FIRST).focus()
    for _ in range(3):
        live.page.keyboard.press('ArrowUp')

    expect(live.number(FIRST)).to_have_text('1023.5')  # 977 µs


def test_the_line_of_units_opens_and_closes_from_the_keyboard(live):
    units = live.page.get_by_role('button', name='Units')
    units.press('Enter')

    expect(live.page.get_by_role('radio', name='km', exact=True)).to_be_focused()
    live.page.keyboard.press('ArrowRight')
    expect(live.number(FAR)).to_have_text('59.4\u202fnmi')
    expect(live.page.get_by_role('radio', name='nmi')).to_be_focused()
    live.page.keyboard.press('Escape')
    expect(units).to_be_focused()
    expect(live.page.get_by_role('radio', name='nmi')).to_be_hidden()
