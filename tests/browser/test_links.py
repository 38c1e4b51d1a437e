"""A link opens the same plan and the same numbers; a cut one is announced; nothing in one is ever executed."""

import json
from pathlib import Path

import pytest
from playwright.sync_api import expect

from pycore import link

ROOT = Path(__file__).parents[2]
SENTENCES = json.loads((ROOT / 'tests' / 'core' / 'sentences.json').read_text(encoding='utf-8'))
OPENING = json.loads((ROOT / 'webapp' / 'examples' / 'opening.json').read_text(encoding='utf-8'))['plan']
NASTY = '<img src=x onerror="document.title=1"><script>document.title=2</script>'

COPIED = """() => {
  const paragraph = document.getElementById('paragraph');
  getSelection().selectAllChildren(paragraph);
  const event = new ClipboardEvent('copy', { clipboardData: new DataTransfer(), bubbles: true });
  paragraph.dispatchEvent(event);
  return event.clipboardData.getData('text/plain');
}"""


@pytest.fixture
def without_engine(note):
    """Return a function that opens a link in a note whose engine never arrives."""
    note.page.route('**/wasm-*.js', lambda route: None)

    def open_link(fragment):
        note.page.goto('about:blank')
        note.page.goto(f'{note.address}#{fragment}', wait_until='commit')
        return note

    return open_link


def values(note):
    """Return the values that the findings carry, by name."""
    items = note.page.locator('[data-finding]').all()

    return {item.get_attribute('data-finding'): item.get_attribute('data-value') for item in items}


def plan_with(**head):
    return {**OPENING, **head}


def test_the_address_follows_an_edit(note):
    note.open().ready().commit('radar.pulse_us', '1.7')

    expect(note.page).to_have_url(
        f'{note.address}#{link.write({**OPENING, "radar": {**OPENING["radar"], "pulse_us": 1.7}})}'
    )


def test_a_link_opened_in_a_fresh_browser_shows_the_same_plan_and_the_same_numbers(note, site, chrome, watched):
    note.open().ready().commit('radar.pulse_us', '1.7')
    expect(note.finding('detection')).not_to_have_attribute('data-value', '')
    note.page.wait_for_url('**/#v=1*')
    fresh = type(note)(watched(chrome, (site.address, 'data:', 'blob:')), site.address)
    fresh.open(note.page.url.partition('#')[2]).ready()

    expect(fresh.finding('detection')).not_to_have_attribute('data-value', '')
    assert values(fresh) == values(note)
    assert fresh.page.evaluate(COPIED) == note.page.evaluate(COPIED)


def test_an_opened_link_shows_its_sentence_at_once_and_no_number_of_another_plan(without_engine):
    note = without_engine(link.write({'waveform': {'pri_us': [735, 881]}, 'radar': {'carrier_ghz': 9.4}}))

    expect(note.number('waveform.pri_us.1')).to_have_text('881\u202fµs')
    expect(note.number('radar.carrier_ghz')).to_have_text('9.4\u202fGHz')
    expect(note.page.locator('[data-value]')).to_have_count(0)
    expect(note.page.get_by_text('56.2 to 60.6')).to_have_count(0)


def test_the_sentence_before_the_engine_is_the_one_that_the_core_says(without_engine):
    cases = [case for case in SENTENCES if not case['units']]
    for case in cases:
        note = without_engine(link.write(case['plan']))
        expect(note.page.locator('#paragraph')).not_to_be_empty()

        assert note.page.evaluate(COPIED) == case['text'], case['name']
    assert len(cases) > 8


def test_an_address_changed_by_hand_opens_the_other_plan(note):
    note.open().ready()
    note.page.evaluate('(text) => { location.hash = text; }', link.write({'waveform': {'pri_us': [735, 881]}}))

    expect(note.number('waveform.pri_us.1')).to_have_text('881\u202fµs')
    expect(note.finding('visible')).to_have_attribute('data-met', 'none')


def test_back_returns_from_an_example_to_the_plan_before(note):
    note.open().ready().commit('radar.pulse_us', '1.7')
    note.page.wait_for_url('**/#v=1*')
    note.page.get_by_role('button', name='Examples').click()
    note.page.get_by_role('dialog', name='Worked examples').get_by_role('link').nth(1).click()
    expect(note.number('radar.pulse_us')).not_to_have_text('1.7\u202fµs')
    note.page.go_back()

    expect(note.number('radar.pulse_us')).to_have_text('1.7\u202fµs')


@pytest.mark.parametrize('kept', [0.3, 0.6, 0.95])
def test_a_cut_link_is_announced_as_cut_and_what_it_holds_is_loaded(note, kept):
    whole = link.write(OPENING)
    note.open(whole[: int(len(whole) * kept)]).ready()

    expect(note.page.get_by_text('This link was cut')).to_be_visible()


def test_a_link_edited_by_hand_loads_and_says_so(note):
    note.open(link.write(OPENING).replace('pulses=9', 'pulses=8')).ready()

    expect(note.page.get_by_text('This link was edited by hand')).to_be_visible()
    expect(note.number('waveform.pulses')).to_have_text('8')


def test_a_link_with_an_impossible_number_names_it(note):
    note.open(link.write(OPENING).replace('pulses=9', 'pulses=0')).ready()

    expect(note.page.get_by_text('Pulses must be')).to_be_visible()


def test_markup_and_script_in_a_link_are_text(note):
    plan = plan_with(title=NASTY[:120], marking=NASTY[:80], remarks={'must-see.0': NASTY})
    note.open(link.write(plan, remarks=True)).ready()

    expect(note.page.get_by_role('heading', level=1)).to_have_text(NASTY[:120])
    expect(note.finding('must-see.0')).to_contain_text(NASTY)
    expect(note.page.locator('img')).to_have_count(0)
    expect(note.page).to_have_title(f'{NASTY[:120]} · Pulsewright')


def test_the_link_is_copied_with_what_it_gives_away(note):
    note.page.context.grant_permissions(['clipboard-read', 'clipboard-write'])
    note.open().ready().commit('radar.pulse_us', '1.7')
    note.page.get_by_role('button', name='Copy link').click()

    expect(note.page.get_by_role('status')).to_contain_text('It contains the whole plan')
    assert 'pulse=1.7us' in note.page.evaluate('navigator.clipboard.readText()')
