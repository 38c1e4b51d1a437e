"""The template and the style are put together from small files."""

import re

import pytest

from webapp.building import sheets
from webapp.building.places import WEBAPP
from webapp.building.stop import Stop


@pytest.fixture
def folder(tmp_path):
    """Return a folder with a template of one part."""
    (tmp_path / 'parts').mkdir()
    (tmp_path / 'index.html').write_text('<main>\n  <!-- part: head -->\n</main>\n')
    (tmp_path / 'parts' / 'head.html').write_text('<h1>\n  Note\n</h1>\n')
    return tmp_path


def test_a_part_stands_in_its_place_as_deep_as_its_name(folder):
    assert sheets.template(folder) == '<main>\n  <h1>\n    Note\n  </h1>\n</main>\n'


def test_a_part_that_is_not_there_stops_the_build(folder):
    (folder / 'parts' / 'head.html').unlink()
    with pytest.raises(Stop, match='head'):
        sheets.template(folder)


def test_a_part_that_no_one_names_stops_the_build(folder):
    (folder / 'parts' / 'tail.html').write_text('<p></p>')
    with pytest.raises(Stop, match='tail'):
        sheets.template(folder)


def test_the_base_comes_first_and_print_wins(tmp_path):
    for name in ('print', 'head', 'base', 'strip', 'actions'):
        (tmp_path / f'{name}.css').write_text(f'.{name} {{}}\n')
    assert re.findall(r'\w+', sheets.style(tmp_path)) == ['base', 'actions', 'head', 'strip', 'print']


def test_the_pages_own_template_has_an_element_for_each_id_once():
    html = sheets.template(WEBAPP / 'page')
    ids = [piece.split('"')[0] for piece in html.split(' id="')[1:]]
    assert len(ids) == len(set(ids)) > 20
