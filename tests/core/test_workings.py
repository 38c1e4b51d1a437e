"""Workings: each finding once more, from the numbers that are shown."""

import json
import math
from pathlib import Path

import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from pycore import api
from pycore.computed import Computed
from pycore.errors import InputError
from pycore.findings import findings
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS
from pycore.workings import working

EXAMPLES = {
    path.stem: json.loads(path.read_text('utf-8'))['plan']
    for path in (Path(__file__).parents[2] / 'webapp' / 'examples').glob('*.json')
}
OPENING = EXAMPLES['opening']
ODD = {
    'one PRI': {'waveform': {'pri_us': [1000]}},
    'weather': {'purpose': 'weather', 'waveform': {'pri_us': [800, 1000], 'pulses': 32}},
    'weather without a pair': {'purpose': 'weather', 'waveform': {'pri_us': [800, 900, 1000], 'pulses': 1}},
    'never open': {'waveform': {'pri_us': [10, 12], 'fill_pulses': 3}, 'radar': {'recovery_us': 20}},
    'a crossing far out': {'waveform': {'pri_us': [1000, 870]}, 'crossing': {'speed_mps': 90, 'at_km': 200}},
    'a crossing near by': {
        'waveform': {'pri_us': [1000, 870]},
        'crossing': {'speed_mps': 9, 'at_km': 1},
        'coverage': {'range_km': [2, 50]},
    },
    'a slow crossing': {'waveform': {'pri_us': [1000, 870]}, 'crossing': {'speed_mps': 3, 'at_km': 20}},
    'near pulse': {
        'waveform': {'pri_us': [400, 450], 'decode_motion': True, 'detect_m': 2},
        'radar': {'pulse_us': 60, 'near_pulse': {}},
    },
    'stagger by weights': {
        'waveform': {'pri_us': [1000, 1100], 'kind': 'stagger'},
        'doppler': {'weights': [1, -1.5, 0.5]},
        'surface': {},
        'crossing': {},
        'target': {'radar_equation': {}},
    },
    'stagger of few pulses': {'waveform': {'pri_us': [1000, 1100], 'kind': 'stagger', 'pulses': 2}},
    'platform': {'waveform': {'pri_us': [61, 70, 83], 'detect_m': 2}, 'platform': {}, 'surface': {}},
    'no blur': {'waveform': {'pri_us': [980, 860], 'decode_blur_gates': 0}},
}
PLANS = {**EXAMPLES, **ODD}


def agree(value, other):
    if value is None or other is None:
        return value is other
    return math.isclose(value, other, rel_tol=1e-9, abs_tol=1e-12)


@pytest.mark.parametrize('document', PLANS.values(), ids=PLANS)
def test_the_result_of_every_working_is_the_value_of_its_finding(document):
    computed = Computed(read(document))
    for finding in findings(computed, SHOWN_UNITS):
        found = working(computed, finding.name)
        assert agree(found.value, finding.value), finding.name
        for line in found.lines:
            assert all((line.formula, line.numbers, line.result, line.source)), line
        assert found.lines or found.notes


@st.composite
def documents(draw):
    n = draw(st.integers(1, 4))
    kind = draw(st.sampled_from(['dwells', 'stagger']))
    pris = draw(st.lists(st.integers(300, 15_000), min_size=n, max_size=n))
    speeds = sorted(draw(st.lists(st.integers(-300, 600), min_size=2, max_size=2, unique=True)))
    ranges = sorted(draw(st.lists(st.integers(0, 300), min_size=2, max_size=2, unique=True)))
    return {
        'radar': {
            'carrier_ghz': draw(st.sampled_from([1.3, 2.8, 9.4])),
            'pulse_us': draw(st.sampled_from([0.5, 1, 20])),
            'bandwidth_mhz': draw(st.sampled_from([0.5, 1, 1.7])),
            'guard_us': draw(st.sampled_from([0, 1.5])),
        },
        'coverage': {'range_km': ranges, 'speed_mps': speeds},
        'waveform': {
            'kind': kind,
            'pri_us': [one / 10 for one in pris],
            'pulses': draw(st.sampled_from([1, 4, 9])),
            'fill_pulses': draw(st.integers(0, 2)),
            'detect_m': draw(st.integers(1, n)),
            'decode_motion': draw(st.booleans()),
        },
        'doppler': {'notch_mps': draw(st.sampled_from([0, 3, 8.5, 40]))},
        'crossing': {'speed_mps': draw(st.sampled_from([2, 60, 250])), 'at_km': draw(st.sampled_from([1, 30, 400]))},
    }


@settings(max_examples=25, deadline=None, suppress_health_check=[HealthCheck.too_slow])
@given(documents())
def test_of_any_plan_the_workings_give_what_the_findings_say(document):
    computed = Computed(read(document), with_echoes=False)
    for finding in findings(computed, SHOWN_UNITS):
        if finding.name != 'detection':  # is held to its finding above; it takes long
            found = working(computed, finding.name)
            assert agree(found.value, finding.value), finding.name


def test_the_workings_of_a_time_on_target_can_be_checked_by_hand():
    lines = api.workings_of(OPENING, 'dwell')['lines']
    assert [line['result'].replace('\N{NARROW NO-BREAK SPACE}', ' ') for line in lines] == ['19.444444 ms', '18.4 ms']
    assert lines[1]['formula'] == 'Σ (n + fill) T'


def test_a_notch_is_suggested_in_its_parts():
    lines = {line['formula'][:15]: line for line in api.workings_of(OPENING, 'blind-speed')['lines']}
    parts = lines['suggested notch']['numbers'] + lines['spread of groun']['numbers']
    for part in ('surface', 'scanning', 'platform', '√(2 ln CNR)', 'x λ/(2nT)'):
        assert part in parts
    found = Computed(read(OPENING)).echoes.suggested_notch
    assert f'{max(found.notch_m_s):.4f}'[:6] in lines['suggested notch']['result']


def test_the_handbook_limits_of_a_stagger_are_called_approximations():
    answer = api.workings_of(EXAMPLES['four-pulse-stagger'], 'blind-speed')
    limits = [line for line in answer['lines'] if line['formula'].startswith('limit by')]
    assert len(limits) == 2
    assert all('approximation' in line['source'] for line in limits)
    assert any('approximations' in note for note in answer['notes'])


def test_a_plan_that_holds_over_an_interval_says_how_that_is_searched():
    held = {**OPENING, 'holds_over': {'carrier_ghz': [2.7, 2.9]}}
    assert any('65 points' in note for note in api.workings_of(held, 'visible')['notes'])


@pytest.mark.parametrize('name', ['nonsense', 'nyquist', 'must-see.1', None, 3])
def test_a_finding_that_the_plan_does_not_have_is_refused(name):
    with pytest.raises(InputError, match='has no finding'):
        api.workings_of(OPENING, name)


def test_workings_are_plain_data():
    for finding in api.assess(OPENING)['findings']:
        json.dumps(api.workings_of(OPENING, finding['name']), allow_nan=False)
