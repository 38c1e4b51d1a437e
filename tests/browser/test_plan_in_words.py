"""The plan is written, grown and rearranged in words, as a person does it."""

import re

import pytest
from playwright.sync_api import expect

FIRST, SECOND = 'waveform.pri_us.0', 'waveform.pri_us.1'


@pytest.fixture
def live(note):
    """Return the note with its engine ready."""
    return note.open().ready()


def do(note, name):
    """Do an action in words; what it needs is opened first."""
    button = note.page.get_by_role('button', name=name, exact=True)
    if not button.is_visible():
        note.page.get_by_role('button', name='More to add').click()
    before = note.shown()
    button.click()
    expect(note.root).to_have_attribute('data-shown', str(before + 1))


def paragraph(note):
    return note.page.locator('#paragraph')


@pytest.mark.parametrize(
    ('add', 'says', 'key', 'remove'),
    [
        ('Add a near pulse', 'a near pulse of', 'radar.near_pulse.to_km', 'Remove the near pulse'),
        ('Add a platform', 'a platform at', 'platform.speed_mps', 'Remove the platform'),
        (
            'Add the radar equation',
            'by the radar equation',
            'target.radar_equation.rcs_m2',
            'Remove the radar equation',
        ),
        (
            'Add a span of carriers to hold over',
            'over carriers from 2.74 to 2.86',
            'holds_over.carrier_ghz.0',
            'Remove the span of carriers',
        ),
        ('Add weather to measure', 'weather is to be measured', 'weather.snr_db', 'Remove the weather'),
        ('Add a must-see region', 'must be seen of region 1', 'must_see.1.range_km.1', None),
    ],
)
def test_what_a_plan_may_have_is_added_in_words_and_removed_where_it_stands(live, add, says, key, remove):
    do(live, add)

    expect(paragraph(live)).to_contain_text(says)
    expect(live.number(key)).to_be_visible()
    expect(live.page.get_by_role('button', name=add, exact=True)).to_have_count(
        1 if remove is None else 0
    )  # up to four regions, one of the rest
    if remove:
        do(live, remove)
    else:
        live.page.get_by_role('button', name='Remove this region').last.click()
    expect(paragraph(live)).not_to_contain_text(says)


def test_rain_is_added_patch_by_patch_named_and_taken_away(live):
    do(live, 'Add rain')
    expect(paragraph(live)).to_contain_text('It rains from 15 to 45')
    do(live, 'Add another patch of moving clutter')
    expect(paragraph(live)).to_contain_text('Patch 2 from 15 to 45')
    live.commit('rain.1.name', 'chaff')

    expect(paragraph(live)).to_contain_text('Chaff from 15 to 45')
    live.page.get_by_role('button', name='Remove this patch').first.click()
    expect(paragraph(live)).to_contain_text('It rains from 15 to 45')
    do(live, 'No rain')
    expect(paragraph(live)).to_contain_text('No rain is assumed.')


def test_a_region_is_renamed_in_the_sentence_and_its_finding_follows(live):
    live.number('must_see.0.name').press('Enter')
    live.page.keyboard.type('base turn')
    live.page.keyboard.press('Enter')

    expect(live.finding('must-see.0')).to_contain_text('“base turn”')
    live.page.keyboard.press('Escape')
    live.page.keyboard.press('Control+z')
    expect(live.finding('must-see.0')).to_contain_text('“final approach”')


def test_dwells_and_a_stagger_each_keep_their_own_numbers(live):
    do(live, 'Stagger the intervals from pulse to pulse instead')
    expect(live.page.get_by_role('status')).to_contain_text('kept while this page is open')
    expect(paragraph(live)).to_contain_text('at intervals that repeat 980 and 860')
    live.commit(FIRST, '950')
    do(live, 'Send each interval as a CPI of its own instead')
    expect(live.number(FIRST)).to_have_text('980')
    live.commit('waveform.pulses', '12')
    live.commit(SECOND, '1163 Hz')  # which says something else
    do(live, 'Stagger the intervals from pulse to pulse instead')

    expect(live.number(FIRST)).to_have_text('950')
    expect(live.number('waveform.pulses')).to_have_text('9')
    expect(live.page.get_by_role('status')).not_to_contain_text('kept while')


def test_a_quantity_is_split_by_prf_and_joined_again(live):
    do(live, 'On each PRF its own pulse length')
    expect(paragraph(live)).to_contain_text('as stands under it')
    live.commit('radar.pulse_us.1', '2')
    expect(live.number('radar.pulse_us.0')).to_have_text('1.0\u202fµs')
    do(live, 'The same on all PRFs: pulse length')

    expect(live.number('radar.pulse_us')).to_have_text('1.0\u202fµs')
    expect(live.page.get_by_role('status')).to_contain_text('Pulse length is now 1.0\u202fµs on every PRF.')


def test_the_cells_of_a_rail_are_added_moved_sorted_and_removed_from_the_keyboard(live):
    do(live, 'On each PRF its own pulses')
    live.commit('waveform.pulses.1', '12')
    live.number(SECOND).focus()
    live.page.keyboard.press('Alt+ArrowLeft')
    expect(live.number(FIRST)).to_have_text('860\u202fµs')
    expect(live.number(FIRST)).to_be_focused()
    expect(live.number('waveform.pulses.0')).to_have_text('12')
    do(live, 'Add a PRI')
    expect(live.number('waveform.pri_us.2')).to_be_focused()
    live.page.keyboard.type('700')
    live.page.keyboard.press('Enter')
    expect(live.number('waveform.pri_us.2')).to_have_text('700\u202fµs')
    do(live, 'Sort the PRIs')
    expect(live.number(FIRST)).to_have_text('700\u202fµs')
    live.number(FIRST).press('Delete')
    live.page.keyboard.press('Delete')

    expect(live.number(FIRST)).to_have_text('860\u202fµs')
    expect(live.number('waveform.pri_us.2')).to_have_count(0)


def test_a_column_pasted_into_a_pri_is_the_whole_list(live):
    live.page.evaluate(
        """(text) => {
          const clipboardData = new DataTransfer();
          clipboardData.setData('text/plain', text);
          const number = document.querySelector('[data-key="waveform.pri_us.1"]');
          number.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }));
        }""",
        'PRF (Hz)\n1000\n1250\n1600\n',
    )

    expect(live.number('waveform.pri_us.2')).to_have_text('625\u202fµs')
    expect(live.page.get_by_role('status')).to_contain_text('Three PRFs in Hz taken.')


def test_words_stand_for_choices(live):
    live.page.get_by_text('All other quantities').click()
    live.page.get_by_label('Window', exact=True).select_option('Dolph-Chebyshev window')

    expect(paragraph(live)).to_contain_text('Also: Dolph-Chebyshev window, sidelobes 40\u202fdB down')


def test_on_a_phone_a_cell_is_moved_and_removed_in_the_strip(chrome, site, watched):
    page = watched(chrome, (site.address, 'data:', 'blob:'), viewport={'width': 390, 'height': 844}, has_touch=True)
    page.goto(site.address)
    expect(page.locator('html')).to_have_attribute('data-engine', 'ready', timeout=60_000)
    page.locator(f'[data-key="{FIRST}"]').tap()
    page.get_by_role('button', name='Move later').tap()

    expect(page.locator(f'[data-key="{FIRST}"]')).to_have_text('860')
    page.locator(f'[data-key="{FIRST}"]').tap()
    page.get_by_role('group', name='Number', exact=True).get_by_role('button', name='Remove').tap()
    expect(page.locator('#paragraph')).to_have_text(re.compile('every 980'))


PASTE = """([selector, text]) => {
  const clipboardData = new DataTransfer();
  clipboardData.setData('text/plain', text);
  const pasted = new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true });
  document.querySelector(selector).dispatchEvent(pasted);
}"""
TEN_THOUSAND = '\n'.join(str(900 + i % 97) for i in range(10_000))
JUNK = ''.join(chr(code) for code in range(1, 50_000) if not 0xD800 <= code < 0xE000)


@pytest.mark.parametrize('text', [TEN_THOUSAND, JUNK], ids=['ten thousand numbers', 'junk'])
@pytest.mark.parametrize('selector', ['#paste', f'[data-key="{FIRST}"]', '[data-key="radar.pulse_us"]'])
def test_whatever_is_pasted_is_answered_in_one_sentence_and_the_rest_stays_live(live, selector, text):
    value = live.finding('visible').get_attribute('data-value')
    live.page.evaluate(PASTE, [selector, text])
    if selector == '#paste' and not text.isascii():
        live.page.locator('#paste').fill(text)
        live.page.keyboard.press('Enter')
    told = live.page.locator('#status, #refused').filter(has_text=re.compile('must be|understood'))

    expect(told).to_have_count(1)
    expect(live.finding('visible')).to_have_attribute('data-value', value)
    live.commit('doppler.notch_mps', '8')
    expect(live.finding('visible')).not_to_have_attribute('data-value', value)


@pytest.mark.parametrize(
    'text', ['NaN', '1e999', '\U0001f6f0\ufe0f', '\u05e9\u05dc\u05d5\u05dd \u202e123', '\x01\x7f1', '1 2 3', '--3']
)
def test_nonsense_stays_as_it_was_typed_on_its_line(live, text):
    line = live.number('waveform.pulses').bounding_box()['height']
    live.number('waveform.pulses').click()
    live.number('waveform.pulses').fill(text)
    live.page.keyboard.press('Tab')

    expect(live.number('waveform.pulses')).to_have_attribute('aria-invalid', 'true')
    expect(live.number('waveform.pulses')).to_have_text(text)
    assert live.number('waveform.pulses').bounding_box()['height'] < 1.5 * line  # it stays on its line
