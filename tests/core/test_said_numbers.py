"""What captions, tables and findings say is what ``assess --json`` gives: the same numbers, for every worked example.

The numbers are read out of the sentences as a reader would, not formatted anew: an own rounding cannot hide a mistake.
"""

import functools
import json
import re
from pathlib import Path

import pytest

from pycore import api, columns

FOLDER = Path(__file__).parents[2] / 'webapp' / 'examples'
EXAMPLES = {path.stem: json.loads(path.read_text('utf-8'))['plan'] for path in sorted(FOLDER.glob('*.json'))}
NAMES = list(EXAMPLES)
SCALE = {'%': 0.01, 'km': 1.0, 'nmi': 1.852, 'm/s': 1.0, 'kt': 1852 / 3600, 'ms': 1.0}
UNITS = {'metric': {}, 'nautical': {'range': 'nmi', 'speed': 'kt', 'pri': 'Hz'}}
COUNTS = 'one two three four five six seven eight nine ten eleven twelve'
WORDS = {word: i + 1 for i, word in enumerate(COUNTS.split())}
HALF_A_DIGIT = 5.001e-3  # three significant figures: half of the last one against the smallest number they show


@functools.cache
def assessed(name):
    return api.assess(EXAMPLES[name])


@functools.cache
def shown(name, units='metric'):
    return api.note(plan=EXAMPLES[name], figures=list(columns.FIGURES), deep=True, units=UNITS[units])


def plain(text):
    return text.replace('\N{NARROW NO-BREAK SPACE}', ' ').replace('\N{MINUS SIGN}', '-')


def numbers(text):
    """All numbers of a text; narrow spaces between thousands belong to them."""
    return [
        float(found.replace(' ', ''))
        for found in re.findall(r'-?\d{1,3}(?: \d{3})+(?!\d)|-?\d+(?:\.\d+)?', plain(text))
    ]


def says(text, value, unit=None):
    """Whether a text says a value, to three figures."""
    one = SCALE[unit] if unit else 1.0
    return any(number * one == pytest.approx(value, rel=HALF_A_DIGIT, abs=1e-12) for number in numbers(text))


def caption(name, figure, units='metric'):
    return shown(name, units)['figures'][figure]['caption']


def rows(name, figure, units='metric'):
    return shown(name, units)['figures'][figure]['table']['rows']


@pytest.mark.parametrize('units', UNITS)
@pytest.mark.parametrize('name', NAMES)
def test_the_trade_line_gives_ranges_speeds_and_regimes_of_every_prf(name, units):
    distance, speed = ('km', 'm/s') if units == 'metric' else ('nmi', 'kt')
    for row, prf in zip(rows(name, 'trade-line', units), assessed(name)['prfs'], strict=True):
        assert says(row[1], prf['unambiguous_range_km'], distance)
        assert says(row[2], prf['blind_speed_mps'], speed)
        assert says(row[3], prf['nyquist_mps'], speed)
        assert row[4] == prf['regime']
    assert says(caption(name, 'trade-line'), assessed(name)['shortfall']) or assessed(name)['shortfall'] <= 1


@pytest.mark.parametrize('name', NAMES)
def test_lanes_lose_what_the_assessment_says(name):
    for row, prf in zip(rows(name, 'eclipsed-ranges'), assessed(name)['prfs'], strict=True):
        assert says(row[2], prf['eclipsed_share'], '%')
    if EXAMPLES[name]['waveform']['kind'] == 'dwells':
        for row, prf in zip(rows(name, 'blind-speeds'), assessed(name)['prfs'], strict=True):
            assert says(row[3], prf['notched_share'], '%')


@pytest.mark.parametrize('units', UNITS)
@pytest.mark.parametrize('name', NAMES)
def test_the_holes_are_those_of_the_assessment(name, units):
    found, said = assessed(name)['visible'], caption(name, 'blind-zones', units)
    count, holes = found['hole_count'], found['holes']
    if not count:
        assert said.startswith('There is no hole')
        return
    first = said.split(' ')[0].lower()
    assert WORDS.get(first, first if not first.isdigit() else int(first)) == count
    assert says(said, found['excess_over_floor'], '%')
    distance, speed = ('km', 'm/s') if units == 'metric' else ('nmi', 'kt')
    for row, hole in zip(rows(name, 'blind-zones', units), holes, strict=True):
        assert all(says(row[1], end, distance) for end in hole['range_km'])
        assert all(says(row[2], end, speed) for end in hole['speed_mps'])
        assert says(row[3], hole['share'], '%')


@pytest.mark.parametrize('name', NAMES)
def test_a_staggers_response_is_said_as_it_is_assessed(name):
    found, said = assessed(name)['blind_speed'], caption(name, 'blind-speeds')
    if EXAMPLES[name]['waveform']['kind'] == 'stagger':
        assert all(
            says(said, found[key]) for key in ('first_below_mps', 'ratio_to_mean', 'deepest_db', 'deepest_at_mps')
        )
        assert says(said, found['share_above'], '%')


@pytest.mark.parametrize('name', NAMES)
def test_decoding_and_dwell_are_said_as_they_are_assessed(name):
    found = assessed(name)
    if found['decode']['range_km'] is not None:
        assert says(caption(name, 'decoding'), found['decode']['range_km'])
    if found['decode']['speed_mps'] is not None:
        assert says(caption(name, 'decoding'), found['decode']['speed_mps'])
    assert says(caption(name, 'dwell'), found['dwell']['used_ms'])
    assert says(caption(name, 'dwell'), found['dwell']['available_ms'])


@pytest.mark.parametrize('units', UNITS)
@pytest.mark.parametrize('name', NAMES)
def test_ranges_of_detection_are_said_as_they_are_assessed(name, units):
    distance = 'km' if units == 'metric' else 'nmi'
    for row, value in zip(rows(name, 'detection', units), detected(name), strict=True):
        assert row[1] == 'not reached' if value is None else says(row[1], value, distance)


def detected(name):
    reached = assessed(name)['detection']['range_km_at_pd']
    return [reached[key] for key in ('best', 'median', 'worst')]


@pytest.mark.parametrize('name', NAMES)
def test_every_finding_says_its_own_value(name):
    for finding in assessed(name)['findings']:
        # A second trip is said by the ranges that it brings, which begin farther out than its value, the repeat.
        if finding['value'] and finding['name'] != 'second-trip' and finding['unit'] in ('km', 'm/s', 'share', 's'):
            unit = '%' if finding['unit'] == 'share' else None
            assert says(finding['text'], finding['value'], unit) or 'under 0.001' in plain(finding['text'])


@pytest.mark.parametrize('name', NAMES)
def test_the_page_shows_the_findings_of_the_assessment(name):
    assert [finding['text'] for finding in shown(name)['findings']] == [
        finding['text'] for finding in assessed(name)['findings']
    ]
