"""The table of conventions: what the pocket calculator shows is what the core gives."""

import math
import re

import pytest

from pycore import api
from pycore.conventions import CONVENTIONS, conventions

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
