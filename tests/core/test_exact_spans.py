"""Spans without error that no radar will ever need are said to be more than a round number, and kept in full."""

import json
from pathlib import Path

import pytest

from pycore import api, columns
from pycore.computed import Computed
from pycore.exact_spans import FARTHEST_M, exact_span_text
from pycore.plan.reading import read
from pycore.wording import DISTANCE, SHOWN_UNITS, THIN_SPACE

EXAMPLE = Path(__file__).parents[2] / 'webapp' / 'examples' / 'sixteen-prfs.json'


@pytest.fixture(scope='module')
def eleven():
    plan = json.loads(EXAMPLE.read_text(encoding='utf-8'))['plan']
    plan['waveform']['detect_m'] = 11
    return plan


@pytest.mark.parametrize(
    ('span_m', 'unit', 'said'),
    [
        (6.321e6, 'km', '6320 km'),
        (1e9, 'km', '1 000 000 km'),
        (1.001e9, 'km', 'more than 1 000 000 km'),
        (6.68e19, 'km', 'more than 1 000 000 km'),
        (6.68e19, 'nmi', 'more than 500 000 nmi'),
    ],
)
def test_a_span_beyond_a_million_kilometres_is_only_more(span_m, unit, said):
    assert exact_span_text(span_m, FARTHEST_M, DISTANCE[unit], unit).replace(THIN_SPACE, ' ') == said


def test_eleven_of_sixteen_say_no_light_years_and_the_data_keep_them(eleven):
    found = {one['name']: one for one in api.note(eleven)['findings']}
    assert found['decode-range']['detail'].endswith(f'more than 1{THIN_SPACE}000{THIN_SPACE}000{THIN_SPACE}km')
    assert api.assess(eleven)['decode']['exact_range_km'] > 1e15
    names = columns.picture('decoding', Computed(read(eleven)), SHOWN_UNITS)['columns']['span-names']['text']
    assert names[0].replace(THIN_SPACE, ' ') == 'to more than 1 000 000 km'
