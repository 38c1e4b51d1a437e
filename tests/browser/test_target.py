"""One target is set, moved, typed and dropped as a person does it, and every figure, the table and the link follow."""

import re

import pytest
from playwright.sync_api import expect

LAPTOP = {'width': 1366, 'height': 900}
RANGE, SPEED = 'followed.range_km', 'followed.speed_mps'


@pytest.fixture
def live(note):
    """Return the note on a laptop with its engine ready."""
    note.page.set_viewport_size(LAPTOP)

    return note.open().ready()


def plot(note, title):
    """Return a figure's plot, which has the keyboard's focus."""
    return note.page.get_by_role('figure', name=title).get_by_role('application')


def section(note):
    return note.page.get_by_role('region', name='One target, followed through')


def number(note, name):
    return section(note).get_by_role('spinbutton', name=name, exact=True)


def value(note, name):
    return float(number(note, name).get_attribute('aria-valuenow'))


def click_at(note, title, across, up):
    """Click in a figure, at a part of its plot's width and height."""
    box = spot(note, title, across, up)
    note.page.mouse.click(*box)


def spot(note, title, across, up):
    figure = plot(note, title)
    figure.scroll_into_view_if_needed()
    box = figure.bounding_box()

    return box['x'] + across * box['width'], box['y'] + up * box['height']


def follow(note, range_km, speed_mps):
    """Follow the target that is offered, then type both numbers."""
    section(note).get_by_role('button', name=re.compile('^follow one at')).click()
    for name, text in (('Range of the target', range_km), ('Radial speed of the target', speed_mps)):
        number(note, name).click()
        note.page.keyboard.type(text)
        note.page.keyboard.press('Enter')
    expect(section(note)).to_contain_text('PRFs')


def test_before_there_is_a_target_the_page_invites_to_set_one(live):
    expect(section(live)).to_contain_text('Click in any figure to follow one target through the plan')
    expect(section(live).get_by_role('table')).to_be_hidden()


def test_a_click_in_the_map_sets_the_target_there_and_the_table_says_what_each_prf_makes_of_it(live):
    click_at(live, 'Fig. 1', 0.5, 0.4)
    expect(section(live).get_by_role('row')).to_have_count(3)
    expect(section(live)).to_contain_text('is clear on')
    assert 40 < value(live, 'Range of the target') < 75
    assert 100 < value(live, 'Radial speed of the target') < 250


def test_a_click_in_a_figure_of_ranges_keeps_the_speed(live):
    follow(live, '60', '183')
    expect(number(live, 'Radial speed of the target')).to_have_attribute('aria-valuenow', '183')
    click_at(live, 'Fig. 3', 0.85, 0.5)
    expect(number(live, 'Range of the target')).not_to_have_attribute('aria-valuenow', '60')
    assert value(live, 'Range of the target') > 80
    assert value(live, 'Radial speed of the target') == 183


def test_a_first_click_in_a_figure_of_speeds_takes_the_middle_of_the_ranges(live):
    click_at(live, 'Fig. 4', 0.5, 0.5)
    expect(section(live).get_by_role('table')).to_be_visible()
    assert value(live, 'Range of the target') == 56


def test_a_click_among_the_filters_means_the_true_speed_next_to_the_targets(live):
    follow(live, '60', '183')
    click_at(live, 'Fig. 6', 0.6, 0.4)
    expect(number(live, 'Radial speed of the target')).not_to_have_attribute('aria-valuenow', '183')
    assert abs(value(live, 'Radial speed of the target') - 183) < 32


def test_the_ring_is_dragged_and_everything_else_stays(live):
    click_at(live, 'Fig. 1', 0.4, 0.5)
    expect(section(live).get_by_role('table')).to_be_visible()
    before = value(live, 'Range of the target')
    mouse = live.page.mouse
    mouse.move(*spot(live, 'Fig. 1', 0.4, 0.5))
    mouse.down()
    mouse.move(*spot(live, 'Fig. 1', 0.6, 0.4), steps=8)
    mouse.up()
    expect(section(live)).not_to_contain_text(f'{before:g} km')
    assert value(live, 'Range of the target') > before + 10

    mouse.move(*spot(live, 'Fig. 1', 0.25, 0.7))
    mouse.down()
    mouse.move(*spot(live, 'Fig. 1', 0.8, 0.2), steps=8)
    middle = value(live, 'Range of the target')
    mouse.up()
    assert middle > before + 10


def test_escape_puts_a_dragged_ring_back(live):
    click_at(live, 'Fig. 1', 0.4, 0.5)
    expect(section(live).get_by_role('table')).to_be_visible()
    before = value(live, 'Range of the target')
    live.page.mouse.move(*spot(live, 'Fig. 1', 0.4, 0.5))
    live.page.mouse.down()
    live.page.mouse.move(*spot(live, 'Fig. 1', 0.7, 0.4), steps=5)
    expect(number(live, 'Range of the target')).not_to_have_attribute('aria-valuenow', f'{before:g}')
    live.page.keyboard.press('Escape')
    live.page.mouse.up()
    assert abs(value(live, 'Range of the target') - before) < 0.5


def test_the_wheel_changes_neither_target_nor_part(live):
    click_at(live, 'Fig. 1', 0.4, 0.5)
    expect(section(live).get_by_role('table')).to_be_visible()
    before = value(live, 'Range of the target')
    live.page.mouse.wheel(0, 200)
    expect(live.page.get_by_role('figure', name='Fig. 1').get_by_role('button', name='Whole coverage')).to_be_hidden()
    assert value(live, 'Range of the target') == before


def test_the_numbers_are_stepped_by_arrow_keys_and_undo_does_not_concern_them(live):
    follow(live, '60', '183')
    expect(number(live, 'Radial speed of the target')).to_have_attribute('aria-valuenow', '183')
    number(live, 'Range of the target').press('Escape')
    number(live, 'Range of the target').press('ArrowUp')
    number(live, 'Range of the target').press('Shift+ArrowUp')
    expect(number(live, 'Range of the target')).to_have_attribute('aria-valuenow', '71')
    expect(number(live, 'Range of the target')).to_be_focused()
    expect(live.page.get_by_role('button', name='Undo')).to_be_disabled()


def test_a_number_is_typed_with_its_unit_and_a_wrong_one_stays_with_its_reason(live):
    follow(live, '30 nmi', '−120')
    expect(number(live, 'Range of the target')).to_have_text('55.56\u202fkm')
    expect(section(live)).to_contain_text('(receding)')

    number(live, 'Range of the target').click()
    live.page.keyboard.type('far')
    live.page.keyboard.press('Enter')
    refused = section(live).get_by_role('group', name='Numbers of the target that were refused')
    expect(refused).to_contain_text('Range of the target must be from 0 to 100')
    expect(number(live, 'Range of the target')).to_have_attribute('aria-invalid', 'true')
    expect(number(live, 'Range of the target')).to_have_text('far')
    refused.get_by_role('button').click()
    expect(number(live, 'Range of the target')).to_have_text('55.56\u202fkm')
    expect(refused).to_be_hidden()


def test_the_target_is_dropped(live):
    follow(live, '60', '183')
    section(live).get_by_role('button', name='No target').click()
    expect(section(live)).to_contain_text('Click in any figure')
    expect(live.page).not_to_have_url(re.compile('target='))


def test_a_copied_link_opens_with_its_target_and_an_example_without(live):
    follow(live, '84.2', '183')
    expect(live.page).to_have_url(re.compile('target=84.2km,183mps'))
    live.page.goto('about:blank', wait_until='commit')
    live.page.go_back()
    live.ready()
    expect(number(live, 'Range of the target')).to_have_text('84.2\u202fkm')
    expect(section(live).get_by_role('row')).to_have_count(3)
    live.page.get_by_role('button', name='Examples').click()
    live.page.get_by_role('dialog').get_by_role('link').or_(live.page.get_by_role('dialog').get_by_role('button')).nth(
        1
    ).click()
    expect(section(live)).to_contain_text('Click in any figure')


def test_an_edit_of_the_plan_follows_the_target_through_the_new_plan(live):
    follow(live, '60', '183')
    expect(section(live)).to_contain_text('no, in the notch')
    live.commit('waveform.pri_us.1', '700')
    expect(section(live)).not_to_contain_text('no, in the notch')


def test_figures_off_the_screen_show_the_target_when_they_are_scrolled_to(live):
    click_at(live, 'Fig. 1', 0.5, 0.4)
    expect(section(live).get_by_role('table')).to_be_visible()
    dwell = live.page.get_by_role('figure', name='Fig. 8')
    dwell.scroll_into_view_if_needed()
    expect(dwell).to_contain_text('Ringed')


def test_the_line_under_a_figure_says_why_it_is_blind_there(live):
    figure = live.page.get_by_role('figure', name='Fig. 1')
    live.page.mouse.move(*spot(live, 'Fig. 1', 0.7, 0.88))
    expect(figure).to_contain_text(re.compile(r'km, .*m/s: '))
    box = figure.locator('.figure-reading').bounding_box()
    live.page.mouse.move(*spot(live, 'Fig. 1', 0.5, 0.3))
    expect(figure.locator('.figure-reading')).to_contain_text(re.compile('clear|notch'))
    assert figure.locator('.figure-reading').bounding_box()['height'] == box['height']
    live.page.mouse.move(5, 5)
    expect(figure.locator('.figure-reading')).to_have_text('')


def test_with_the_keyboard_alone_a_cross_hair_goes_to_a_hole_and_sets_the_target_there(live):
    chief = plot(live, 'Fig. 1')
    chief.focus()
    live.page.keyboard.press('ArrowRight')
    reading = live.page.get_by_role('figure', name='Fig. 1').locator('.figure-reading')
    expect(reading).to_contain_text('km')
    expect(reading).to_have_attribute('aria-live', 'polite')
    expect(chief.locator('.crosshair')).to_be_visible()
    live.page.keyboard.press('n')
    expect(reading).to_contain_text('in the notch on both')
    live.page.keyboard.press('Enter')
    expect(section(live)).to_contain_text('is not seen: it is clear on no PRF')
    expect(chief).to_be_focused()
    live.page.keyboard.press('Tab')
    expect(chief.locator('.crosshair')).to_have_count(0)


def test_arrows_move_by_a_hundredth_of_the_axis_and_shift_by_ten(live):
    live.page.keyboard.press('Tab')
    plot(live, 'Fig. 1').focus()
    live.page.keyboard.press('ArrowUp')
    reading = live.page.get_by_role('figure', name='Fig. 1').locator('.figure-reading')
    expect(reading).to_contain_text('153')
    live.page.keyboard.press('Shift+ArrowUp')
    expect(reading).to_contain_text('183')


def test_closer_looks_at_a_sixteenth_around_the_target_and_back_at_the_whole(live):
    follow(live, '60', '183')
    expect(number(live, 'Radial speed of the target')).to_have_attribute('aria-valuenow', '183')
    figure = live.page.get_by_role('figure', name='Fig. 1')
    figure.get_by_role('button', name='Closer').click()
    expect(figure).to_contain_text('The map shows 46.5 to 73.5\u202fkm and 146 to 220\u202fm/s of it.')
    figure.get_by_role('button', name='Whole coverage').click()
    expect(figure).not_to_contain_text('The map shows')


def test_the_number_of_a_hole_goes_closer_to_that_hole(live):
    figure = live.page.get_by_role('figure', name='Fig. 1')
    plot(live, 'Fig. 1').focus()
    live.page.keyboard.press('n')
    lines = figure.locator('.crosshair > *')
    upright, level = lines.first.bounding_box(), lines.last.bounding_box()
    live.page.mouse.click(upright['x'] + 0.7, level['y'] + 0.7)
    expect(figure).to_contain_text(re.compile('The map shows 2.* to 110.*km and 5.* to 6.*m/s of it'))
    expect(section(live)).to_contain_text('Click in any figure')


def test_on_a_phone_each_prf_is_one_block_and_nothing_scrolls_sideways(note):
    note.page.set_viewport_size({'width': 390, 'height': 844})
    note.open().ready()
    follow(note, '60', '183')
    assert note.page.evaluate('document.documentElement.scrollWidth') <= 390
    expect(section(note).get_by_text('no, in the notch')).to_be_visible()
