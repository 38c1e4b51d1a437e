"""How far an input can move before a verdict flips."""

import functools
import json
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore import api
from pycore.computed import Computed
from pycore.errors import InputError
from pycore.findings import findings, named
from pycore.margins import margins
from pycore.margins.inputs import MATTERS, Input, inputs_of
from pycore.margins.plans import Tried, moved
from pycore.margins.steps import outward
from pycore.plan.keys import BY_PATH
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS

EXAMPLES = {
    path.stem: json.loads(path.read_text('utf-8'))['plan']
    for path in (Path(__file__).parents[2] / 'webapp' / 'examples').glob('*.json')
}
OPENING = EXAMPLES['opening']
AS_CLOSE = 1e-8  # the bisection stops at a billionth of the input


@functools.cache
def opening():
    """The opening example and its plans with one input moved, shared by the tests."""
    plan = read(OPENING)
    return plan, Tried(plan.document)


@functools.cache
def opening_margins(name):
    plan, tried = opening()
    return margins(plan, name, tried)


def rows_of(document, name):
    if document is OPENING:
        return {one.key: one.row for one in opening_margins(name)}
    return {row['key']: row for row in api.margins_of(document, name)['margins']}


def met(document, name, path, value):
    return named(Computed(read(moved(document, path, value))), name, SHOWN_UNITS).met


def test_the_time_on_target_flips_where_the_arithmetic_of_the_dwell_says():
    rows = rows_of(OPENING, 'dwell')
    assert rows['radar.beamwidth_deg']['from'] == pytest.approx(18.4e-3 * 6 * 12, rel=AS_CLOSE)
    assert rows['radar.scan_rpm']['to'] == pytest.approx(1.4 / (6 * 18.4e-3), rel=AS_CLOSE)
    assert rows['waveform.pri_us.0']['to'] == 1084.4  # (19 444.4 - 8600)/10 = 1084.44, a tenth of a microsecond a count
    assert rows['waveform.pulses']['to'] == rows['waveform.pulses']['value'] == 9


def test_the_duty_flips_where_the_pulse_is_a_tenth_of_the_shortest_interval():
    rows = rows_of(OPENING, 'duty')
    assert rows['radar.pulse_us']['to'] == pytest.approx(86.0, rel=AS_CLOSE)
    assert rows['waveform.pri_us.1']['from'] == 10.0
    assert rows['radar.duty_limit_pct']['from'] == pytest.approx(100 / 860, abs=2e-7)  # met to within 1e-9


def test_the_wanted_share_can_rise_to_what_is_seen():
    share = named(Computed(read(OPENING)), 'visible', SHOWN_UNITS).value
    assert rows_of(OPENING, 'visible')['wanted.visible_pct']['to'] == pytest.approx(100 * share, rel=AS_CLOSE)


@pytest.mark.parametrize('name', ['visible', 'must-see.0', 'decode-range', 'dwell', 'duty'])
def test_inside_its_margin_a_verdict_stands_and_just_outside_it_flips(name):
    plan = opening()[0]
    now = named(Computed(plan), name, SHOWN_UNITS).met
    for one in opening_margins(name):
        whole = isinstance(one.low if one.low is not None else one.high, int) and 'pri' not in one.key
        by = 0.1 if 'pri_us' in one.key else 1 if whole else 1e-6 * abs(one.value) or 1e-6
        for end, way in ((one.low, -1), (one.high, 1)):
            if end is not None:
                assert met(plan.document, name, one.key, end) is now
                assert met(plan.document, name, one.key, round(end + way * by, 9)) is not now


def test_margins_come_tightest_first():
    found = opening_margins('visible')
    assert [one.tightness for one in found] == sorted(one.tightness for one in found)
    assert found[0].key == 'waveform.detect_m'  # one PRF more that must see, and the coverage is lost


def test_a_finding_that_is_not_judged_has_no_margins():
    assert api.margins_of(OPENING, 'largest-hole')['margins'] == []


def test_a_finding_that_is_not_there_is_refused_by_name():
    with pytest.raises(InputError, match='no finding “must-see.3”'):
        api.margins_of(OPENING, 'must-see.3')


def test_a_finding_that_is_not_met_is_told_how_far_to_its_cure():
    rows = rows_of({**OPENING, 'waveform': {**OPENING['waveform'], 'fill_pulses': 3}}, 'dwell')
    assert rows['waveform.fill_pulses']['from'] == 2  # 1 fits: 20.24 ms with 2, 18.4 ms with 1
    assert rows['radar.scan_rpm']['from'] == pytest.approx(1.4 / (6 * 22.08e-3), rel=AS_CLOSE)


@pytest.mark.parametrize('plan', EXAMPLES.values(), ids=EXAMPLES)
def test_every_finding_says_which_inputs_can_matter(plan):
    computed = Computed(read(plan), with_echoes=False)
    for finding in findings(computed, SHOWN_UNITS):
        assert inputs_of(computed.plan.document, finding.name)


def test_every_key_of_the_table_is_a_number_of_the_plan():
    for paths in MATTERS.values():
        assert {BY_PATH[path].kind for path in paths} <= {'number', 'count', 'interval', 'numbers'}


@pytest.mark.parametrize(
    ('finding', 'path', 'value'),
    [
        ('decode-range', 'radar.pulse_us', 7.0),
        ('dwell', 'coverage.range_km.1', 60.0),
        ('duty', 'radar.carrier_ghz', 3.3),
        ('visible', 'waveform.pulses', 30),
        ('must-see.0', 'coverage.range_km.1', 60.0),
        ('visible', 'surface.cnr_db', 70.0),
    ],
)
def test_an_input_that_is_not_walked_does_not_move_the_finding(finding, path, value):
    document = read(OPENING).document
    assert path not in [one.path for one in inputs_of(document, finding)]
    before, after = (
        named(Computed(read(one)), finding, SHOWN_UNITS).value for one in (document, moved(document, path, value))
    )
    assert before == after


ENTRIES = st.builds(
    lambda low, wide, part, kind: _entry(low, low + wide, part, kind),
    st.sampled_from([-200.0, -20_000.0, 0.0, 1e-4, 0.01, 1.0]),
    st.sampled_from([20.0, 400.0, 40_000.0]),
    st.floats(0.0, 1.0),
    st.sampled_from(['free', 'count', 'clock']),
)


def _entry(low, high, part, kind):
    value = low + part * (high - low)
    if kind == 'free' or low < 0:
        return Input('x', 'x', '', value, low, high, None, False)
    quantum = 1 if kind == 'count' else 0.1
    low, high = max(1, round(low)), round(high) + 2
    count = round((low + part * (high - low)) / quantum)
    return Input('x', 'x', '', round(count * quantum, 10), low, high, quantum, kind == 'count')


@given(ENTRIES, st.sampled_from([-1, 1]))
def test_a_walk_moves_away_from_its_value_and_ends_at_the_limit(entry, way):
    steps = list(outward(entry, way))
    limit = entry.lowest if way < 0 else entry.highest
    if not steps:
        assert entry.value == limit
        return
    away = [way * step for step in [entry.value, *steps]]
    assert away == sorted(set(away))
    assert steps[-1] == limit
    assert len(steps) < 220


@given(ENTRIES, st.sampled_from([-1, 1]))
def test_a_walk_leaves_no_gap_wider_than_a_step(entry, way):
    if entry.quantum is not None:
        return
    values = [entry.value, *outward(entry, way)]
    if entry.lowest < 0:
        step = (entry.highest - entry.lowest) / 64
        assert all(abs(b - a) <= step * 1.0001 for a, b in zip(values, values[1:], strict=False))
    else:
        lowest = entry.lowest or entry.highest * 1e-6
        factor = (entry.highest / lowest) ** (1 / 64)
        large = [max(one, lowest) for one in values]
        assert all(max(a, b) / min(a, b) <= factor * 1.0001 for a, b in zip(large, large[1:], strict=False))


def test_a_walk_ends_where_the_plan_is_refused():
    tried = Tried(read(OPENING).document)
    assert tried.verdict('visible', 'radar.pulse_us', 900.0) == 'refused'
    assert rows_of(OPENING, 'decode-range')['waveform.pri_us.0']['to'] is None


def test_margins_are_in_the_assessment_only_where_they_are_asked_for():
    plan = {'waveform': {'pri_us': [1000]}}
    assert 'margins' not in api.assess(plan)
    asked = api.assess(plan, margins=True)['margins']
    assert list(asked) == ['dwell', 'duty']
    assert asked == {name: api.margins_of(plan, name)['margins'] for name in asked}
    json.dumps(asked, allow_nan=False)


@pytest.mark.parametrize('name', [name for name, plan in EXAMPLES.items() if plan.get('purpose') != 'weather'])
@pytest.mark.parametrize('wanted', [0.1, 30.0, 50.0, 55.9, 56.1, 60.0, 70.0, 102.2, 102.3, 5000.0])
def test_the_quick_verdict_on_detection_is_that_of_the_finding(name, wanted):
    document = {**EXAMPLES[name], 'wanted': {**EXAMPLES[name]['wanted'], 'detect_km': wanted}}
    computed = Computed(read(document), with_echoes=False)
    assert computed.echoes.half_reach(wanted * 1e3) is named(computed, 'detection', SHOWN_UNITS).met


def test_of_a_canceller_without_outputs_nothing_is_detected():
    plan = {'waveform': {'pri_us': [1000, 1100], 'kind': 'stagger', 'pulses': 2}, 'wanted': {'detect_km': 5}}
    computed = Computed(read(plan), with_echoes=False)
    assert computed.echoes.half_reach(5e3) is named(computed, 'detection', SHOWN_UNITS).met is False
