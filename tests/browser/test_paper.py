"""The note on paper: printed to PDF as Chromium prints it, and read back from there."""

import json
import re
import shutil
import subprocess
from pathlib import Path

import pytest
from playwright.sync_api import expect

from pycore import link

ROOT = Path(__file__).parents[2]
EXAMPLES = ROOT / 'webapp' / 'examples'
MARKING = 'FOR REVIEW <b>"ONLY"</b> \\ 2'
NOT_DRAWN = 'This figure was not computed yet'
SCREEN_PX_AN_INCH = 96
FIGURES = 8

pytestmark = pytest.mark.skipif(not shutil.which('pdftotext'), reason='poppler-utils reads the printed pages')


def marked(name, **head):
    plan = json.loads((EXAMPLES / f'{name}.json').read_text(encoding='utf-8'))['plan'] | {'marking': MARKING} | head

    return link.write(plan, remarks=bool(plan.get('remarks')))


class Printed:
    """Pages of a PDF: their text as it stands on them, their images."""

    def __init__(self, path):
        self.path = path
        self.pages = run('pdftotext', '-layout', path, '-').split('\f')[:-1]
        self.text = ' '.join(run('pdftotext', path, '-').split())

    def images(self):
        """Return page and resolution of every image."""
        rows = [row.split() for row in run('pdfimages', '-list', self.path).splitlines()[2:]]

        return [(int(row[0]), int(row[12])) for row in rows]


def run(*command):
    return subprocess.run([str(part) for part in command], check=True, capture_output=True, text=True).stdout


@pytest.fixture
def on_paper(note, tmp_path):
    """Return a function that prints what stands on the page now, as a browser's own menu does."""

    def printed(paper='A4'):
        note.page.pdf(path=tmp_path / 'note.pdf', format=paper)

        return Printed(tmp_path / 'note.pdf')

    return printed


@pytest.fixture
def with_print(note):
    """Return the note, and the list that grows when it asks the browser to print."""
    asked = []
    note.page.expose_function('print', lambda: asked.append(True))
    note.asked = asked

    return note


def printed_by_its_own_action(note):
    note.page.get_by_role('button', name='Print').click()
    waited(note)


def waited(note):
    for _ in range(600):
        if note.asked:
            return
        note.page.wait_for_timeout(50)
    pytest.fail('the page did not ask the browser to print')


def bare(text):
    return re.sub(r'\s+', '', text)


def captions(note):
    return note.page.locator('figure[data-figure]:visible figcaption').all_inner_texts()


@pytest.mark.parametrize('paper', ['A4', 'Letter'])
def test_the_print_holds_title_marking_findings_captions_cautions_and_link(with_print, on_paper, paper):
    note = with_print.open(marked('opening', remarks={'must-see.0': 'A second radar covers it.'})).ready()
    printed_by_its_own_action(note)
    pages = on_paper(paper)

    text = bare(pages.text)
    assert bare('Skerry approach radar, draft B') in text
    assert bare('not met, accepted: A second radar covers it.') in text
    assert bare('idealised models') in text
    assert bare(note.page.locator('#link-text').text_content()) in text
    shown = captions(note)
    assert len(shown) == FIGURES
    assert [caption for caption in shown if bare(caption) not in text] == []
    assert NOT_DRAWN not in pages.text


def test_every_page_carries_marking_and_number(with_print, on_paper):
    note = with_print.open(marked('opening')).ready()
    printed_by_its_own_action(note)
    pages = on_paper().pages

    for number, page in enumerate(pages, 1):
        assert page.count(MARKING) == 2
        assert f'page {number} of {len(pages)}' in page


@pytest.mark.parametrize('name', ['eight-prfs', 'four-pulse-stagger', 'heavy-rain'])
def test_figures_are_lines_and_letters_and_only_maps_have_cells_finer_than_a_screen(with_print, on_paper, name):
    note = with_print.open(marked(name)).ready()
    printed_by_its_own_action(note)
    pages = on_paper()

    assert len(pages.images()) <= 2  # the maps of blind zones and of detection
    assert max(dots for _, dots in pages.images()) > 1.8 * SCREEN_PX_AN_INCH
    assert NOT_DRAWN not in pages.text
    for axis in ('unambiguous range', 'apparent speed' if name != 'four-pulse-stagger' else 'response (dB)'):
        assert bare(axis) in bare(pages.text)


def test_the_browsers_own_print_holds_all_figures_once_the_page_has_come_to_rest(note, on_paper):
    note.open(marked('opening')).ready()
    for _ in range(60):
        pages = on_paper()
        if NOT_DRAWN not in pages.text:
            break
        note.page.wait_for_timeout(500)

    assert NOT_DRAWN not in pages.text
    assert [caption for caption in captions(note) if bare(caption) not in bare(pages.text)] == []


def test_a_figure_that_is_not_ready_says_so_and_shows_no_other_plans(with_print, on_paper):
    note = with_print.open(marked('opening')).ready()
    printed_by_its_own_action(note)
    note.commit('radar.pulse_us', '200')
    pages = on_paper()

    assert pages.text.count(NOT_DRAWN) == FIGURES
    assert 'Every range is clear on both PRFs' not in pages.text


def test_control_p_waits_for_the_figures_of_the_last_edit(with_print, on_paper):
    note = with_print.open().ready().commit('radar.pulse_us', '200')
    note.page.keyboard.press('Control+p')
    waited(note)
    pages = on_paper()

    assert NOT_DRAWN not in pages.text
    expect(note.page.get_by_role('figure', name='Fig. 3')).to_contain_text('eclipsed')
    assert [caption for caption in captions(note) if bare(caption) not in bare(pages.text)] == []


def test_a_followed_target_is_printed_with_its_table_and_every_pri(with_print, on_paper):
    note = with_print.open(f'{marked("opening").rpartition("&end=")[0]}&target=57km,150mps&end=0000').ready()
    printed_by_its_own_action(note)
    pages = on_paper()

    shown = captions(note)
    assert len(shown) == FIGURES + 1
    assert [caption for caption in shown if bare(caption) not in bare(pages.text)] == []
    assert NOT_DRAWN not in pages.text


def test_a_refused_number_is_named_on_paper_with_what_the_print_shows(with_print, on_paper):
    note = with_print.open().ready()
    note.number('radar.pulse_us').click()
    note.page.keyboard.type('abc')
    note.page.keyboard.press('Enter')
    expect(note.page.get_by_role('group', name='Numbers that were refused')).to_be_visible()
    printed_by_its_own_action(note)
    text = on_paper().text

    assert 'refused: Pulse length' in text
    assert 'Everything below still shows 1.0 µs' in text.replace('\u202f', ' ')
    assert 'Put back' not in text


def test_a_dark_page_prints_ink_on_paper(with_print, on_paper, tmp_path):
    with_print.page.emulate_media(color_scheme='dark')
    note = with_print.open().ready()
    printed_by_its_own_action(note)
    pages = on_paper()
    run('pdftoppm', '-r', '20', '-gray', pages.path, tmp_path / 'page')

    for page in tmp_path.glob('page*'):
        grey = page.read_bytes()[-20_000:]
        assert sum(value > 200 for value in grey) > 0.6 * len(grey)


def test_nothing_that_can_be_pressed_is_printed(with_print, on_paper):
    note = with_print.open().ready()
    printed_by_its_own_action(note)
    text = on_paper().text

    for word in ('Undo', 'Copy link', 'As a table', 'Add rain', 'All other quantities', 'Say why', 'can be typed'):
        assert word not in text


def test_without_an_engine_the_opening_note_prints_with_its_figures(with_print, on_paper):
    with_print.page.route('**/wasm-*.js', lambda route: None)
    note = with_print.open()
    expect(note.page.get_by_role('figure', name='Fig. 1 Blind zones')).to_be_visible()
    printed_by_its_own_action(note)

    assert NOT_DRAWN not in on_paper().text
