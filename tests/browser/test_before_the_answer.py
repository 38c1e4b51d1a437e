"""What is on the screen before the answer: while the engine starts, while it computes, and where it never comes."""

import pytest
from playwright.sync_api import expect

from pycore import link

SLOWED = """(() => {
  const send = Worker.prototype.postMessage;
  Worker.prototype.postMessage = function (message, ...rest) {
    const wait = 'id' in message ? (window.slowedMs ?? 0) : 0;
    if (wait) setTimeout(() => send.call(this, message, ...rest), wait);
    else send.call(this, message, ...rest);
  };
})()"""
OTHER = {'waveform': {'pri_us': [735, 881]}, 'radar': {'carrier_ghz': 9.4}}


@pytest.fixture
def without_engine(note):
    """Return the note whose engine never gets its binary."""
    note.page.route('**/wasm-*.js', lambda route: None)

    return note


@pytest.fixture
def slowed(note):
    """Return a function that opens the note and makes every answer from then on late."""

    def opened(by_ms):
        note.page.add_init_script(SLOWED)
        note.open().ready()
        expect(note.page.locator('#running')).to_be_hidden()
        note.page.wait_for_timeout(1500)  # what is worked out after the start has been
        note.page.evaluate('(by) => { window.slowedMs = by; }', by_ms)
        return note

    return opened


def step(note):
    note.number('radar.pulse_us').focus()
    note.page.keyboard.press('ArrowUp')


def test_the_opening_plan_is_all_there_and_the_engine_is_said_quietly_to_start(without_engine):
    note = without_engine.open()

    expect(note.page.locator('#standing')).to_contain_text('engine starting')
    expect(note.finding('dwell')).to_have_attribute('data-met', 'true')
    expect(note.page.get_by_role('figure', name='Fig. 1 Blind zones').locator('canvas').first).to_be_visible()
    expect(note.page.locator('#running')).to_be_hidden()


def test_an_opened_link_shows_dots_for_findings_and_computing_for_figures_with_no_caption(without_engine):
    note = without_engine
    note.page.goto(f'{note.address}#{link.write(OTHER)}', wait_until='commit')

    expect(note.number('waveform.pri_us.1')).to_have_text('881\u202fµs')
    expect(note.page.locator('#findings')).to_have_text('…')
    figure = note.page.get_by_role('figure', name='Fig. 1 Blind zones')
    expect(figure.locator('.figure-caption')).to_have_text('')
    computing = "(node) => getComputedStyle(node, '::after').content"
    assert figure.locator('.plot').evaluate(computing) == '"computing"'


def test_of_edits_before_the_engine_the_newest_wins_and_is_marked_as_waiting(note):
    held = []
    note.page.route('**/wasm-*.js', lambda route: held.append(route))
    note.open()
    for text in ('1.4', '1.7'):
        note.number('radar.pulse_us').click()
        note.number('radar.pulse_us').fill(text)
        note.page.keyboard.press('Enter')
    expect(note.page.locator('#standing')).to_contain_text('waiting for the engine')
    expect(note.number('radar.pulse_us')).to_have_attribute('aria-valuetext', '1.7, waiting for the engine')
    held[0].continue_()

    note.ready()
    expect(note.number('radar.pulse_us')).to_contain_text('1.7')
    expect(note.page.locator('#standing')).not_to_contain_text('waiting for the engine')


def test_a_late_answer_leaves_the_old_picture_at_full_strength_under_a_running_line(slowed):
    note = slowed(by_ms=4000)
    step(note)

    expect(note.page.locator('#running')).to_have_attribute('data-how', 'late')
    expect(note.page.locator('#running')).to_be_visible()
    plot = note.page.get_by_role('figure', name='Fig. 1 Blind zones').locator('.plot > *').first
    expect(plot).to_be_visible()
    expect(plot).to_have_css('opacity', '1')


def test_after_a_second_the_word_computing_is_there_until_the_answer_is(slowed):
    note = slowed(by_ms=4000)
    step(note)
    line = note.page.locator('#running')

    expect(line).to_have_attribute('data-how', 'long')
    assert line.evaluate("(node) => getComputedStyle(node, '::after').content") == '"computing"'
    note.page.evaluate('() => { window.slowedMs = 0; }')
    expect(line).to_be_hidden()


def test_where_the_engine_fails_numbers_are_text_and_the_link_can_still_be_copied(note):
    note.page.context.grant_permissions(['clipboard-read', 'clipboard-write'])
    note.page.route('**/numpy-*.js', lambda route: route.fulfill(body='', content_type='text/javascript'))
    note.open(link.write(OTHER))
    expect(note.root).to_have_attribute('data-engine', 'failed')

    expect(note.page.get_by_role('spinbutton')).to_have_count(0)
    expect(note.number('waveform.pri_us.1')).to_have_text('881\u202fµs')
    expect(note.page.get_by_text('open it in another browser')).to_be_visible()
    note.page.get_by_role('button', name='Copy link').click()
    expect(note.page.get_by_role('status')).to_contain_text('The link is copied')
    assert 'pri=735,881us' in note.page.evaluate('navigator.clipboard.readText()')
