"""The table of conventions: what the pocket calculator shows is what the core gives."""

import json
import math
import re
from pathlib import Path

import pytest

from pycore import api
from pycore.checks_here import check_here
from pycore.computed import Computed
from pycore.conventions import CONVENTIONS, conventions
from pycore.plan.reading import read

EXAMPLES = {
    path.stem: json.loads(path.read_text('utf-8'))['plan']
    for path in sorted((Path(__file__).parents[2] / 'webapp' / 'examples').glob('*.json'))
}
FUNCTIONS = {'log': math.log10, 'exp': math.exp, 'π': math.pi}


def calculated(check):
    """Work a check out as a pocket calculator would: what stands before the first comma that is not in digits."""
    text = re.split(r', (?=[^0-9])', check)[0]
    text = text.replace('×', '*').replace('−', '-').replace('²', '**2').replace('^', '**')
    text = re.sub(r'(?<=\d) (?=\d{3})', '', text)
    text = re.sub(r'√\(', 'sqrt(', text)
    return eval(text, {'__builtins__': {}}, {**FUNCTIONS, 'sqrt': math.sqrt})


@pytest.mark.parametrize('one', CONVENTIONS, ids=lambda one: one.name)
def test_the_check_gives_its_result_on_a_pocket_calculator(one):
    assert f'{calculated(one.inputs):.{one.digits}g}' == f'{one.result:.{one.digits}g}'


@pytest.mark.parametrize('one', CONVENTIONS, ids=lambda one: one.name)
def test_the_core_gives_what_the_check_shows(one):
    assert f'{float(one.compute()):.{one.digits}g}' == f'{one.result:.{one.digits}g}'


def test_every_convention_is_named_once_and_told_in_a_sentence():
    names = [one.name for one in CONVENTIONS]
    assert len(names) == len(set(names)) > 20
    assert all(one.text.endswith('.') for one in CONVENTIONS)


def test_the_table_is_plain_data():
    assert api.ACTIONS['conventions']() == conventions()
    assert set(conventions()[0]) == {'name', 'text', 'check', 'result', 'unit'}


@pytest.mark.parametrize('plan', EXAMPLES.values(), ids=EXAMPLES)
def test_with_the_numbers_of_a_plan_the_pocket_calculator_gives_what_the_core_gives(plan):
    computed = Computed(read(plan))
    checks = [found for one in CONVENTIONS if (found := check_here(computed, one.name))]
    assert len(checks) >= 8
    for text, result in checks:
        assert calculated(text) == pytest.approx(result, rel=1e-6, abs=1e-6)


def test_a_check_that_a_plan_has_no_numbers_for_is_that_of_an_example():
    rows = {row['name']: row for row in api.conventions_of(EXAMPLES['opening'])['rows']}
    assert rows['True first blind speed']['here'] is False
    assert rows['Time used']['check'] == '(9 + 1) × 980 + (9 + 1) × 860'
    assert rows['Time used']['result'] == '18\u202f400\u202fµs'
    assert rows['Time used']['here'] is True


def test_what_the_models_leave_out_is_told_in_whole_sentences():
    said = api.conventions_of(EXAMPLES['opening'])['left_out']
    assert len(said) > 6
    assert all(sentence.endswith('.') for sentence in said)


def test_a_very_small_result_keeps_its_digits():
    rows = {row['name']: row for row in api.conventions_of(EXAMPLES['opening'])['rows']}
    assert rows['False alarm']['result'] == '5.0000013e−07'  # 1 − √(1 − 1e-6)
