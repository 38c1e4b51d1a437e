"""The page opens wherever it lies: from a server, as a file, in a sandboxed frame; and says why where it cannot."""

import pytest
from playwright.sync_api import expect

FRAME = """<!doctype html><title>A wiki</title><link rel="icon" href="data:,">
<iframe {attributes} width="1000" height="800"></iframe>"""


def in_frame(note, site, attributes):
    """Open a page that shows the note in a sandboxed frame, and go on in there."""
    site.pages['/wiki'] = FRAME.format(attributes=f'sandbox="allow-scripts" {attributes}')
    return note.open(path='wiki').inside(note.page.frame_locator('iframe'))


def test_from_a_server_an_edit_is_answered(note):
    note.open().ready().commit('radar.pulse_us', '1.2')


def test_only_the_files_of_the_page_are_asked_for(note, site):
    note.open().ready()

    assert {path for path in site.asked if not path.startswith('/') or path.count('/') > 1} == set()
    assert len(site.asked) == len(set(site.asked))


def test_once_ready_no_network_is_needed(note):
    note.open().ready()
    note.page.context.set_offline(True)

    note.commit('radar.pulse_us', '1.2')


@pytest.mark.parametrize('script_type', ['text/plain', 'application/octet-stream', 'text/html'])
def test_a_server_that_sends_scripts_under_another_type_is_good_enough(note, site, script_type):
    site.script_type = script_type

    note.open().ready()


def test_the_single_file_opened_from_disk_answers_an_edit(single):
    single.open().ready().commit('radar.pulse_us', '1.2')


def test_the_hosted_page_opened_from_disk_is_ready(single):
    single.address = single.address.replace('pulsewright.html', 'index.html')

    single.open().ready()


@pytest.mark.parametrize('path', ['pulsewright.html', 'index.html'])
def test_in_a_sandboxed_frame_an_edit_is_answered(note, site, path):
    in_frame(note, site, f'src="/{path}"').ready().commit('radar.pulse_us', '1.2')


def test_the_opening_findings_are_there_before_the_engine(note):
    note.page.route('**/wasm-*.js', lambda route: None)  # the engine never gets its binary
    note.open()

    expect(note.finding('visible')).to_have_attribute('data-met', 'true')
    expect(note.root).to_have_attribute('data-engine', 'starting')


def test_with_webassembly_switched_off_the_note_stays_and_says_why(launch, site, watched, note):
    note.page = watched(launch('--js-flags=--jitless'), (site.address, 'data:', 'blob:'))
    note.inside(note.page).open()

    expect(note.root).to_have_attribute('data-engine', 'failed')
    expect(note.page.get_by_text('WebAssembly is switched off')).to_be_visible()
    expect(note.finding('visible')).to_have_attribute('data-met', 'true')


def test_a_part_that_is_missing_is_named(note, site):
    note.page.route('**/numpy-*.js', lambda route: route.fulfill(status=200, body='', content_type='text/javascript'))
    note.open()

    expect(note.root).to_have_attribute('data-engine', 'failed')
    expect(note.page.get_by_text('arrived incomplete')).to_be_visible()


def test_a_damaged_part_is_named(note):
    def cut(route):
        body = route.fetch().text()
        route.fulfill(status=200, body=body[: len(body) // 2] + '");', content_type='text/javascript')

    note.page.route('**/numpy-*.js', cut)
    note.open()

    expect(note.root).to_have_attribute('data-engine', 'failed')
    expect(note.page.get_by_text('is damaged')).to_be_visible()


def test_with_scripts_switched_off_a_sentence_says_so(chrome, site, watched, note):
    note.page = watched(chrome, (site.address, 'data:'), java_script_enabled=False)
    note.inside(note.page).open()

    expect(note.page.locator('noscript p')).to_be_visible()
