"""The note as it is read: on the first screen, in print order, with the keyboard alone, copied into a report."""

import pytest
from playwright.sync_api import expect

LAPTOP = {'width': 1366, 'height': 768}
FIRST_SCREEN_PX = 640  # what a browser's own bars leave of a laptop's screen


@pytest.fixture
def opened(note):
    """Return the note on a laptop, as it opens."""
    note.page.set_viewport_size(LAPTOP)

    return note.open()


def bottom(locator):
    box = locator.bounding_box()

    return box['y'] + box['height']


def test_plan_verdict_and_chief_figure_stand_together_on_the_first_screen(opened):
    figure = opened.page.get_by_role('figure', name='Fig. 1 Blind zones')
    expect(figure.locator('canvas').first).to_be_visible()

    assert bottom(figure.locator('figcaption')) <= FIRST_SCREEN_PX
    assert bottom(opened.page.get_by_role('region', name='The plan, in words')) <= FIRST_SCREEN_PX
    assert bottom(opened.page.get_by_text('findings is not met')) <= FIRST_SCREEN_PX


def test_the_sentence_copied_reads_as_it_stands(opened):
    opened.page.context.grant_permissions(['clipboard-read', 'clipboard-write'])
    opened.page.locator('#paragraph').evaluate('(node) => getSelection().selectAllChildren(node)')
    opened.page.keyboard.press('Control+c')

    copied = opened.page.evaluate('navigator.clipboard.readText()').replace('\u202f', ' ')
    assert copied.startswith(
        'A 2.8 GHz radar sends 1.0 µs pulses at intervals of 980 and 860 µs, 9 on each after 1 fill pulse. '
        'It listens again 1.0 µs after each pulse. It must see from 2 to 110 km and from 0 to 300 m/s (closing).'
    )
    assert 'Add rain' not in copied


def test_with_a_later_figure_in_view_the_pulse_can_be_changed_and_the_verdict_read(opened):
    opened.ready()
    opened.page.get_by_role('figure', name='Fig. 4').scroll_into_view_if_needed()
    opened.page.mouse.wheel(0, 300)

    expect(opened.page.get_by_text('findings is not met')).to_be_in_viewport()
    opened.commit('radar.pulse_us', '1.7')
    expect(opened.number('radar.pulse_us')).to_be_in_viewport()
    expect(opened.page.get_by_role('figure', name='Fig. 4')).to_be_in_viewport()


def test_when_the_paragraph_sticks_nothing_of_it_is_doubled_and_nothing_moves(opened):
    for name in ('Fig. 1', 'Fig. 2', 'Fig. 3', 'Fig. 4'):
        expect(opened.page.get_by_role('figure', name=name).get_by_text('As a table')).to_be_visible()
    height = opened.page.evaluate('document.documentElement.scrollHeight')
    opened.page.get_by_role('figure', name='Fig. 4').scroll_into_view_if_needed()
    expect(opened.page.locator('.plan.stuck')).to_be_visible()

    expect(opened.page.locator('[data-key="radar.pulse_us"]')).to_have_count(1)
    assert opened.page.evaluate('document.documentElement.scrollHeight') == height
    assert opened.page.locator('.plan.stuck').bounding_box()['height'] < 90


def test_a_figure_that_comes_into_view_shows_the_present_plan(opened):
    opened.ready().commit('radar.pulse_us', '200')
    figure = opened.page.get_by_role('figure', name='Fig. 3')
    figure.scroll_into_view_if_needed()

    expect(figure).to_contain_text('eclipsed')


def test_with_the_keyboard_alone_a_number_is_found_changed_and_left(opened):
    opened.ready()
    pulse = opened.number('radar.pulse_us')
    for _ in range(20):
        opened.page.keyboard.press('Tab')
        if pulse.evaluate('(node) => node === document.activeElement'):
            break
    opened.page.keyboard.type('1.7')
    opened.page.keyboard.press('Tab')

    expect(opened.root).to_have_attribute('data-shown', '1')
    expect(pulse).to_have_text('1.7\u202fµs')
    expect(opened.number('waveform.pri_us.0')).to_be_focused()


def test_every_number_of_the_sentence_is_a_spin_button_with_a_name_and_a_unit(opened):
    pulse = opened.page.get_by_role('spinbutton', name='Pulse length')

    expect(pulse).to_have_attribute('aria-valuetext', '1.0\u202fµs')
    expect(pulse).to_have_attribute('aria-valuenow', '1')


def test_all_other_quantities_stand_under_six_headings_and_can_be_changed(opened):
    opened.ready()
    opened.page.get_by_text('All other quantities').click()

    expect(opened.page.get_by_role('table', name='What it is judged by')).to_be_visible()
    opened.commit('radar.guard_us', '0.5')
    opened.page.mouse.wheel(0, -9000)  # the paragraph, shorter while it sticks to the top, is whole again in its place
    expect(opened.page.get_by_text('guard 0.5')).to_be_visible()
    opened.page.get_by_text('All other quantities').click()
    expect(opened.page.locator('#paragraph').get_by_role('spinbutton', name='Guard')).to_have_text('0.5\u202fµs')


def test_a_wanted_value_is_given_and_taken_away(opened):
    opened.ready()
    opened.page.get_by_text('All other quantities').click()
    opened.page.get_by_role('button', name='Coverage seen, at least: none').click()

    expect(opened.finding('visible')).to_have_attribute('data-met', 'none')


def test_a_choice_switches_to_a_stagger_whose_chief_figure_is_the_blind_speeds(opened):
    opened.ready()
    opened.page.get_by_text('All other quantities').click()
    opened.page.get_by_role('combobox', name='Kind').select_option('stagger')

    expect(opened.page.locator('#paragraph')).to_contain_text('intervals that repeat')
    expect(opened.page.get_by_role('figure', name='Fig. 1 Blind speeds')).to_be_in_viewport()


def test_the_title_is_edited_where_it_stands(opened):
    opened.ready()
    title = opened.page.get_by_role('heading', level=1)
    title.fill('Skerry, draft C')
    title.press('Enter')

    expect(opened.page).to_have_title('Skerry, draft C · Pulsewright')
    expect(opened.root).to_have_attribute('data-shown', '1')


def test_the_cautions_are_always_there(opened):
    cautions = opened.page.get_by_role('region', name='Cautions')
    for words in ('planning figures from idealised models', 'licence', 'Radiated power can injure'):
        expect(cautions).to_contain_text(words)


def test_the_dark_page_follows_the_system(note):
    note.page.emulate_media(color_scheme='dark')
    note.open()

    expect(note.root).to_have_css('background-color', 'rgb(20, 24, 30)')


def test_on_a_phone_nothing_is_wider_than_the_screen_and_a_tap_opens_the_strip(chrome, site, watched, note):
    page = watched(
        chrome, (site.address, 'data:', 'blob:'), viewport={'width': 390, 'height': 844}, has_touch=True, is_mobile=True
    )
    phone = type(note)(page, site.address).open().ready()
    assert page.evaluate('document.documentElement.scrollWidth') <= 390

    phone.number('radar.pulse_us').tap()
    strip = page.get_by_role('group', name='Number')
    strip.get_by_role('textbox').fill('1.7')
    strip.get_by_role('button', name='Done').click()
    expect(phone.number('radar.pulse_us')).to_have_text('1.7\u202fµs')


def test_in_print_the_note_stands_without_what_is_interactive(opened):
    opened.page.emulate_media(media='print')

    expect(opened.page.get_by_role('navigation', name='Actions')).to_be_hidden()
    expect(opened.page.get_by_text('not met; no reason given')).to_be_visible()
    expect(opened.page.get_by_role('region', name='Cautions')).to_be_visible()


def test_a_refused_number_gives_its_reason_in_sight_when_the_paragraph_has_been_scrolled_past(opened):
    opened.ready()
    opened.page.evaluate('window.scrollTo(0, document.body.scrollHeight)')
    expect(opened.page.locator('#plan.stuck')).to_be_visible()
    opened.number('radar.pulse_us').click()
    opened.page.keyboard.type('abc')
    opened.page.keyboard.press('Enter')

    expect(opened.page.get_by_role('group', name='Numbers that were refused')).to_be_in_viewport()


def test_a_plan_carries_its_own_cautions_beside_the_three_that_always_stand(opened):
    opened.ready()
    cautions = opened.page.get_by_role('region', name='Cautions').get_by_role('listitem')

    expect(cautions).to_have_count(4)
    expect(cautions.first).to_contain_text('the notch is narrower than the Doppler filters reject')
    opened.commit('doppler.notch_mps', '16')
    expect(cautions).to_have_count(3)
