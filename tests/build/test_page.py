"""Assembling the two outputs."""

import base64
import hashlib
import re
from dataclasses import replace

import pytest

from webapp.building import page
from webapp.building.payload import encoded
from webapp.building.stop import Stop

TEMPLATE = """<!doctype html>
<html lang="en"><head><meta charset="utf-8">
<!-- build: policy -->
<link rel="icon" href="data:,">
<!-- build: style -->
</head><body><!-- build: opening -->
<!-- build: scripts -->
</body></html>
"""


@pytest.fixture
def contents():
    """Return small contents of every kind."""
    return page.Contents(
        template=TEMPLATE,
        style='body { color: black }\n',
        opening='{"title":"</script><script>alert(1)</script>"}',
        licences='licence\n',
        library='first();',
        app='second();',
        parts={'bokeh': encoded(b'first();'), 'wasm': encoded(b'binary')},
    )


def policy(text):
    """Return the policy of a page as a dictionary of its directives."""
    content = re.search(r'Content-Security-Policy" content="([^"]*)"', text)[1]
    return {words[0]: words[1:] for words in map(str.split, content.split(';'))}


def outputs(contents):
    """Return both pages."""
    return [page.hosted(contents)['index.html'], page.single(contents)]


def test_nothing_may_be_requested_and_no_text_becomes_code(contents):
    for text in outputs(contents):
        rules = policy(text)
        assert rules['default-src'] == rules['connect-src'] == rules['base-uri'] == ["'none'"]
        assert rules['worker-src'] == ['data:']
        assert not {"'unsafe-eval'", "'unsafe-inline'", 'data:', 'blob:', '*'} & set(rules['script-src'])


def source_of(text):
    """Return a script as a policy names it."""
    return f"'sha256-{base64.b64encode(hashlib.sha256(text.encode()).digest()).decode()}'"


def test_the_single_file_runs_exactly_its_own_script_and_the_library_that_it_unpacks(contents):
    text = page.single(contents)
    scripts = re.findall(r'<script>(.*?)</script>', text, re.DOTALL)

    assert scripts == ['\nsecond();\n']
    assert policy(text)['script-src'] == [source_of(scripts[0]), source_of('first();'), "'wasm-unsafe-eval'"]


def test_no_text_of_the_data_ends_its_element(contents):
    for text in outputs(contents):
        assert '<script>alert' not in text
        assert r'\u003c/script>\u003cscript>alert(1)' in text


def test_the_data_and_the_library_stand_before_the_script_that_reads_them(contents):
    text = page.single(contents)

    marks = ['id="opening"', 'id="part-bokeh"', 'second()', 'id="part-wasm"']

    assert marks == sorted(marks, key=text.index)


def test_a_script_that_changes_changes_its_name_and_no_other(contents):
    before, after = (set(page.hosted(replace(contents, app=app))) for app in ('second();', 'third();'))

    assert len(before - after) == len(after - before) == 1


def test_the_same_contents_give_the_same_bytes(contents):
    assert page.hosted(contents) == page.hosted(contents)
    assert page.single(contents) == page.single(contents)
    assert encoded(b'binary') == encoded(b'binary')


def test_every_script_that_the_hosted_page_names_is_beside_it(contents):
    files = page.hosted(contents)
    named = re.findall(r'[\w-]+\.js', files['index.html'])

    assert set(named) == {name for name in files if name.endswith('.js')}
    assert files[next(name for name in named if name.startswith('wasm'))].startswith('PULSEWRIGHT.deliver("wasm","')


def test_licences_are_in_both_outputs(contents):
    assert page.hosted(contents)['licences.txt'] == 'licence\n'
    assert 'id="licences">\nlicence\n<' in page.single(contents)


@pytest.mark.parametrize('broken', [TEMPLATE.replace('<!-- build: style -->', ''), TEMPLATE + '<!-- build: other -->'])
def test_a_template_without_exactly_its_marks_stops_the_build(broken):
    with pytest.raises(Stop, match='policy, style, opening, scripts'):
        page.whole(broken)
