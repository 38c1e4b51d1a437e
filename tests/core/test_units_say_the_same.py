"""Findings, cautions and captions in every unit say the quantities that ``assess --json`` prints."""

import itertools
import json
import re
from pathlib import Path

import pytest

from pycore.assessment import assessment
from pycore.cautions import cautions
from pycore.columns import FIGURES, picture
from pycore.computed import Computed
from pycore.holds_over import judged
from pycore.link.reader_units import CHOICES
from pycore.plan.reading import read
from pycore.wording import DISTANCE, MINUS, SHOWN_UNITS, SPEED

EXAMPLES = sorted((Path(__file__).parents[2] / 'webapp' / 'examples').glob('*.json'))
ALL_UNITS = [dict(zip(CHOICES, units, strict=True)) for units in itertools.product(*CHOICES.values())]
SOME_UNITS = [
    {'range': 'nmi', 'speed': 'kt', 'pri': 'Hz'},
    {'range': 'km', 'speed': 'km/h', 'pri': 'kHz'},
    {'range': 'nmi', 'speed': 'km/h', 'pri': 'ms'},
]
NUMBER = rf'{MINUS}?\d+(?:\u202f\d{{3}})*(?:\.\d+)?'
BEFORE = r'(?<!probability )(?<![\d.])'  # "with probability 0.8 to 102 km" is no interval
QUANTITY = re.compile(
    rf'{BEFORE}({NUMBER})((?:(?:, | and | or | to |, and ){NUMBER})*)\u202f(km/h|km|nmi|m/s|kt|µs|ms|Hz|kHz|%)(?![\w/])'
)
NOT_COMPARED = r'(?<=[:;] )\d+, | \([^()]* without error\)'
"""The number of a hole, and what is said only where it looks different from what stands before it."""
OTHER_VALUE = ('largest-hole', 'second-trip')
"""Findings whose value stands in the detail, the places it leads to in the text."""
SI = {
    **DISTANCE,
    **SPEED,
    **{'µs': 1e-6, 'ms': 1e-3, 'Hz': 1.0, 'kHz': 1e3, '%': 0.01, 'share': 1.0, 's': 1.0, 'gates': 1.0},
}
"""What one of each unit is in SI; a share is a fraction. [any]"""
FIGURES_AT_LEAST = 3  # of what the page rounds


@pytest.fixture(scope='module', params=EXAMPLES, ids=lambda path: path.stem)
def computed(request):
    return Computed(read(json.loads(request.param.read_text('utf-8'))['plan']), with_echoes=True)


def number(text):
    """Return a shown number and half of what its last figure can hide."""
    plain = text.replace('\u202f', '').replace(MINUS, '-')
    whole, _, part = plain.lstrip('-').partition('.')
    unsure = 10.0 ** -len(part) if part else 10.0 ** max(0, len(whole) - FIGURES_AT_LEAST)

    return float(plain), 0.5 * unsure


def quantities(text):
    """Return all quantities of a text, lists and both ends of intervals too, as (least, most) in SI, in their order."""
    found = []
    for match in QUANTITY.finditer(re.sub(NOT_COMPARED, '', text)):
        unit = match[3]
        for value, unsure in map(number, re.findall(NUMBER, match[1] + match[2])):
            ends = sorted(((value - unsure) * SI[unit], (value + unsure) * SI[unit]))
            # A PRF is the PRI that it is one over.
            found.append(tuple(sorted(1 / end for end in ends)) if unit.endswith('Hz') else tuple(ends))
    return found


def agree(one, other):
    """Say whether two shown quantities can be one and the same."""
    slack = 1e-9 * max(map(abs, (*one, *other)))

    return one[0] <= other[1] + slack and other[0] <= one[1] + slack


def assert_same_quantities(text, other):
    ours, theirs = quantities(text), quantities(other)
    assert len(ours) == len(theirs), (text, other)
    assert [pair for pair in zip(ours, theirs, strict=True) if not agree(*pair)] == [], (text, other)


@pytest.mark.parametrize('units', ALL_UNITS, ids=lambda units: ' '.join(units.values()))
def test_every_finding_shows_the_value_that_is_printed_in_every_unit(computed, units):
    printed = {one['name']: one for one in assessment(computed)['findings']}
    for finding in judged(computed, units):
        value, unit = printed[finding.name]['value'], printed[finding.name]['unit']
        shown = quantities(finding.value_text)
        assert (finding.value, finding.unit) == (value, unit)
        if value is None or not shown or finding.name in OTHER_VALUE:
            continue
        first = (value[0] if isinstance(value, list) else value) * SI[unit]
        assert agree(shown[0], (first, first)), (finding.value_text, value, unit)


@pytest.mark.parametrize('units', ALL_UNITS, ids=lambda units: ' '.join(units.values()))
def test_findings_and_cautions_say_the_same_quantities_in_every_unit(computed, units):
    for finding, other in zip(judged(computed, SHOWN_UNITS), judged(computed, units), strict=True):
        assert_same_quantities(finding.text, other.text)
    for caution, other in zip(cautions(computed, SHOWN_UNITS), cautions(computed, units), strict=True):
        assert_same_quantities(caution, other)


@pytest.mark.parametrize('units', SOME_UNITS, ids=lambda units: ' '.join(units.values()))
@pytest.mark.parametrize('name', FIGURES)
def test_captions_say_the_same_quantities_in_every_unit(computed, name, units):
    size = {'width': 60, 'height': 40}
    ours, theirs = picture(name, computed, SHOWN_UNITS, size), picture(name, computed, units, size)

    assert_same_quantities(ours['caption'], theirs['caption'])
    assert_same_quantities(ours.get('summary') or '', theirs.get('summary') or '')
