"""The meeting view and the choice of dark or light: as a person at a projector uses them."""

import pytest
from playwright.sync_api import expect

LAPTOP = {'width': 1366, 'height': 768}
ROOMS = [(1366, 768), (1920, 1080), (1024, 768)]


@pytest.fixture
def meeting(note):
    """Return the note in the meeting view, entered by its action, with the engine ready."""
    note.page.set_viewport_size(LAPTOP)
    note.open().ready()
    note.page.get_by_role('button', name='Meeting view').click()

    return note


def figure(note, number):
    return note.page.get_by_role('figure', name=f'Fig. {number}')


def test_one_figure_stands_with_the_plan_and_what_is_judged_and_nothing_scrolls(meeting):
    for width, height in ROOMS:
        meeting.page.set_viewport_size({'width': width, 'height': height})
        expect(figure(meeting, 1).locator('.plot')).to_be_in_viewport(ratio=1)
        expect(meeting.page.get_by_role('figure')).to_have_count(1)
        expect(meeting.number('radar.pulse_us')).to_be_in_viewport(ratio=1)
        expect(meeting.finding('dwell')).to_be_in_viewport(ratio=1)
        assert meeting.page.evaluate('document.documentElement.scrollHeight') <= height
        assert meeting.page.evaluate('document.documentElement.scrollWidth') <= width


def test_nothing_is_doubled(meeting):
    expect(meeting.page.locator('[data-key="radar.pulse_us"]')).to_have_count(1)
    expect(meeting.page.locator('[data-finding="dwell"]')).to_have_count(1)


def test_the_plan_is_24_px_high_and_its_numbers_are_live(meeting):
    size = meeting.page.locator('#paragraph').evaluate('(node) => getComputedStyle(node).fontSize')
    meeting.commit('radar.pulse_us', '200')

    assert float(size.removesuffix('px')) == pytest.approx(24, abs=0.5)
    expect(meeting.number('radar.pulse_us')).to_contain_text('200')


def test_page_keys_and_digits_choose_the_figure_and_arrows_do_not(meeting):
    meeting.page.keyboard.press('PageDown')
    expect(figure(meeting, 2)).to_be_visible()
    meeting.page.keyboard.press('PageUp')
    meeting.page.keyboard.press('PageUp')
    expect(figure(meeting, 1)).to_be_visible()
    meeting.page.keyboard.press('8')
    expect(figure(meeting, 8)).to_be_visible()
    meeting.page.keyboard.press('PageDown')
    for arrow in ('ArrowDown', 'ArrowRight', 'ArrowUp', 'ArrowLeft'):
        meeting.page.keyboard.press(arrow)
    expect(figure(meeting, 8)).to_be_visible()
    expect(meeting.page.get_by_role('figure')).to_have_count(1)


def test_with_a_number_in_focus_arrows_step_it_and_digits_are_typed(meeting):
    meeting.number('radar.pulse_us').focus()
    meeting.page.keyboard.press('ArrowUp')
    expect(meeting.number('radar.pulse_us')).to_have_text('1.1\u202fµs')
    meeting.page.keyboard.type('2')
    meeting.page.keyboard.press('Enter')

    expect(meeting.number('radar.pulse_us')).to_contain_text('2')
    expect(figure(meeting, 1)).to_be_visible()


def test_escape_leaves_and_the_focus_is_where_it_was(note):
    note.page.set_viewport_size(LAPTOP)
    note.open().ready()
    action = note.page.get_by_role('button', name='Meeting view')
    action.focus()
    note.page.keyboard.press('Enter')
    note.page.keyboard.press('PageDown')
    note.page.keyboard.press('Escape')

    expect(figure(note, 1)).to_be_visible()
    expect(note.page.get_by_role('region', name='Cautions')).to_be_visible()
    expect(action).to_be_focused()


def test_escape_in_an_open_number_puts_it_back_and_stays_in_the_meeting(meeting):
    meeting.number('radar.pulse_us').click()
    meeting.page.keyboard.type('9')
    meeting.page.keyboard.press('Escape')

    expect(meeting.number('radar.pulse_us')).to_have_text('1.0\u202fµs')
    expect(meeting.page.get_by_role('figure')).to_have_count(1)


def test_a_flipped_verdict_is_boxed_and_said(meeting):
    meeting.page.evaluate("""() => {
      const line = document.querySelector('[data-finding="dwell"]');
      const look = () => { if (line.matches('.flipped')) window.boxed = getComputedStyle(line).outlineColor; };
      new MutationObserver(look).observe(line, { attributes: true });
    }""")
    meeting.commit('waveform.pulses', '20')

    expect(meeting.page.get_by_role('status')).to_contain_text('no longer met')
    assert meeting.page.evaluate('window.boxed') == 'rgb(27, 35, 48)'
    expect(meeting.finding('dwell')).not_to_have_class('finding flipped')


def test_the_marking_stands_in_the_four_corners(note):
    note.page.set_viewport_size(LAPTOP)
    note.open('v=1&pri=980,860us&marking=For%20review&end=0000').ready()
    note.page.get_by_role('button', name='Meeting view').click()

    corners = note.page.evaluate("""() => [[document.body, '::before'], [document.body, '::after'],
      [document.getElementById('marking'), '::before']].map(([node, part]) => getComputedStyle(node, part).content)""")
    assert corners == ['"For review"'] * 3
    expect(note.page.locator('#marking')).to_have_text('For review')
    expect(note.page.locator('#marking')).to_be_visible()


def test_the_link_opens_in_the_meeting_view_at_the_same_figure_and_in_the_same_theme(meeting, chrome, site, watched):
    meeting.page.keyboard.press('3')
    meeting.page.get_by_role('button', name='Dark').click()
    meeting.page.wait_for_url('**present=eclipsed-ranges&theme=dark**')
    fresh = type(meeting)(watched(chrome, (site.address, 'data:', 'blob:'), viewport=LAPTOP), site.address)
    fresh.open(meeting.page.url.partition('#')[2]).ready()

    expect(figure(fresh, 3)).to_be_visible()
    expect(fresh.page.get_by_role('figure')).to_have_count(1)
    expect(fresh.root).to_have_css('background-color', 'rgb(20, 24, 30)')


def test_dark_and_light_follow_the_system_until_one_is_chosen(note):
    note.page.emulate_media(color_scheme='dark')
    note.open().ready()
    note.page.get_by_role('button', name='Light').click()
    expect(note.root).to_have_css('background-color', 'rgb(253, 252, 249)')
    note.page.wait_for_url('**theme=light**')
    note.page.get_by_role('button', name='Dark').click()
    expect(note.root).to_have_css('background-color', 'rgb(20, 24, 30)')
    note.page.emulate_media(color_scheme='light')

    expect(note.root).to_have_css('background-color', 'rgb(253, 252, 249)')
