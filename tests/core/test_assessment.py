"""The assessment as plain data: its exact shape, and that one plan has one answer."""

import copy
import json
import math
from pathlib import Path

import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from pycore import api, link
from pycore.plan.reading import filled

EXAMPLES = {
    path.stem: json.loads(path.read_text('utf-8'))['plan']
    for path in sorted((Path(__file__).parents[2] / 'webapp' / 'examples').glob('*.json'))
}
OPENING = EXAMPLES['opening']
WEATHER = {'purpose': 'weather', 'waveform': {'pri_us': [800, 1000], 'pulses': 32}}
PLANS = {**EXAMPLES, 'weather': WEATHER, 'bare': {'waveform': {'pri_us': [1000]}}}

TOP = [
    *('pulsewright', 'plan', 'shortfall', 'prfs', 'visible', 'must_see', 'unseen', 'blind_speed', 'decode', 'dwell'),
    *('detection', 'holds_over', 'findings'),
]
SHAPE = {
    'visible': [
        *('share', 'floor_share', 'excess_over_floor', 'share_with_clutter', 'm', 'n', 'share_by_count'),
        *('share_if_one_lost', 'holes', 'hole_count'),
    ],
    'unseen': ['inbound_s', 'at_mps', 'range_km', 'never', 'crossing_s', 'crossing_scans'],
    'blind_speed': ['first_mps', 'first_below_mps', 'ratio_to_mean', 'deepest_db', 'deepest_at_mps', 'share_above'],
    'decode': ['range_km', 'speed_mps', 'exact_range_km', 'exact_speed_mps', 'blur_gates'],
    'dwell': ['available_ms', 'used_ms'],
    'detection': ['false_alarm_per_cpi', 'cells', 'false_per_scan', 'range_km_at_pd'],
}
PRF = [
    *('pri_us', 'pri_counts', 'prf_hz', 'unambiguous_range_km', 'blind_speed_mps', 'nyquist_mps', 'duty_pct', 'regime'),
    *('eclipsed_share', 'notched_share', 'cpi_ms', 'fill_ms', 'fill_needed', 'filter_width_mps'),
    *('notch_suggested_mps', 'gates', 'range_walk_gates', 'improvement_db'),
]
FINDING = ['name', 'met', 'text', 'value', 'wanted', 'unit', 'remark']
OF_TARGETS = [
    *('visible', 'largest-hole', 'unseen-inbound', 'unseen-crossing', 'blind-speed', 'decode-range', 'decode-speed'),
    *('dwell', 'duty', 'detection', 'range-walk'),
]
OF_WEATHER = ['nyquist', 'extended-nyquist', 'unfolding', 'velocity-error', 'second-trip', 'dwell', 'duty']


@pytest.fixture(scope='module')
def answers():
    return {name: api.assess(plan) for name, plan in PLANS.items()}


@pytest.mark.parametrize('name', PLANS)
def test_the_assessment_has_exactly_its_shape(name, answers):
    answer = answers[name]
    assert list(answer) == TOP
    for part, keys in SHAPE.items():
        assert list(answer[part]) == keys
    assert all(list(prf) == PRF for prf in answer['prfs'])
    assert all(list(finding) == FINDING for finding in answer['findings'])
    assert all(list(hole) == ['range_km', 'speed_mps', 'share'] for hole in answer['visible']['holes'])
    assert all(list(region) == ['name', 'share', 'holes'] for region in answer['must_see'])
    assert list(answer['detection']['range_km_at_pd']) == ['best', 'median', 'worst']


@pytest.mark.parametrize('name', PLANS)
def test_the_assessment_is_json_without_numbers_that_are_none(name, answers):
    assert json.loads(json.dumps(answers[name], allow_nan=False)) == answers[name]


@pytest.mark.parametrize('name', PLANS)
def test_the_plan_in_it_is_filled_and_gives_the_same_assessment_again(name, answers):
    assert answers[name]['plan'] == filled(PLANS[name])
    assert api.assess(answers[name]['plan']) == answers[name]


@pytest.mark.parametrize('name', PLANS)
def test_a_link_to_a_plan_gives_the_same_assessment(name, answers):
    opened = link.read_link(link.write(PLANS[name]))
    again = api.assess(opened.document)
    for answer in (again, answers[name]):
        answer['plan'] = {key: value for key, value in answer['plan'].items() if key not in ('remarks', 'notes')}
    assert again == answers[name]


@pytest.mark.parametrize('name', PLANS)
def test_findings_come_in_their_fixed_order(name, answers):
    names = [one['name'] for one in answers[name]['findings'] if not one['name'].startswith('must-see')]
    assert names == (OF_WEATHER if PLANS[name].get('purpose') == 'weather' else OF_TARGETS)


@pytest.mark.parametrize('name', PLANS)
def test_values_of_findings_are_those_of_the_assessment(name, answers):
    answer = answers[name]
    values = {one['name']: one['value'] for one in answer['findings']}
    assert values['dwell'] == answer['dwell']['used_ms']
    assert values['duty'] == pytest.approx(max(prf['duty_pct'] for prf in answer['prfs']) / 100, rel=1e-12)
    if PLANS[name].get('purpose') != 'weather':
        assert values['visible'] == answer['visible']['share']
        assert values['decode-range'] == answer['decode']['range_km']
        assert values['detection'] == answer['detection']['range_km_at_pd']['median']
        assert [values[f'must-see.{i}'] for i in range(len(answer['must_see']))] == [
            region['share'] for region in answer['must_see']
        ]


@pytest.mark.parametrize('name', PLANS)
def test_shares_add_up(name, answers):
    seen = answers[name]['visible']
    assert math.fsum(seen['share_by_count']) == pytest.approx(1.0, abs=1e-12)
    assert math.fsum(seen['share_by_count'][seen['m'] :]) == pytest.approx(seen['share'], abs=1e-12)
    assert seen['share'] + seen['floor_share'] + seen['excess_over_floor'] == pytest.approx(1.0, abs=1e-9)
    if seen['hole_count'] <= 50:
        holes = math.fsum(hole['share'] for hole in seen['holes'])
        assert holes == pytest.approx(seen['excess_over_floor'], abs=1e-9)


def test_the_opening_example_fails_in_its_one_plain_way(answers):
    answer = answers['opening']
    assert answer['visible']['share'] == pytest.approx(0.9654, abs=5e-5)  # formats.md: 96.54 %
    assert answer['must_see'][0]['share'] == pytest.approx(0.9375, abs=5e-5)
    low, high = answer['must_see'][0]['holes'][0]['speed_mps']
    assert (round(low, 2), round(high, 2)) == (56.25, 60.63)
    assert answer['decode']['range_km'] == pytest.approx(128.8, abs=0.05)
    assert (answer['dwell']['used_ms'], round(answer['dwell']['available_ms'], 2)) == (18.4, 19.44)
    assert [one['name'] for one in answer['findings'] if one['met'] is False] == ['must-see.0']


def test_one_press_mends_the_opening_example():
    plan = copy.deepcopy(OPENING)
    plan['waveform']['pri_us'] = [735, 881]
    answer = api.assess(plan)
    assert all(one['met'] is not False for one in answer['findings'])
    assert answer['visible']['share'] == pytest.approx(0.98, abs=1e-9)  # the floor exactly
    assert answer['dwell']['used_ms'] == pytest.approx(16.16, abs=1e-9)


@pytest.mark.parametrize('name', ['bare', 'opening', 'four-pulse-stagger'])
def test_of_a_stagger_and_of_dwells_the_fields_hold_what_they_say(name, answers):
    answer = answers[name]
    if name == 'four-pulse-stagger':
        first, last = answer['blind_speed']['first_mps']
        assert first == last == pytest.approx(5081.228, abs=0.001)  # λ/(2 × 10 µs)
        assert (answer['visible']['n'], answer['visible']['m']) == (1, 1)
        assert answer['decode']['speed_mps'] is None
        assert answer['decode']['range_km'] == min(prf['unambiguous_range_km'] for prf in answer['prfs'])
        assert {prf['notched_share'] for prf in answer['prfs']} == {1 - answer['blind_speed']['share_above']}
    else:
        others = [value for key, value in answer['blind_speed'].items() if key != 'first_mps']
        assert others == [None] * 5
        assert (answer['visible']['n'], answer['visible']['m']) == (len(answer['prfs']), 1)


def test_what_has_no_value_is_null():
    answer = api.assess({'waveform': {'pri_us': [1000]}, 'radar': {'scan_rpm': None}})
    assert answer['dwell']['available_ms'] is None
    assert answer['unseen']['crossing_s'] is None
    assert answer['detection']['false_per_scan'] is None
    assert answer['prfs'][0]['notch_suggested_mps'] is answer['prfs'][0]['improvement_db'] is None
    assert answer['holds_over'] is None


PER_PRF = {
    'radar.carrier_ghz': st.sampled_from([1.3, 2.8, 9.37]),
    'radar.pulse_us': st.sampled_from([0.5, 1, 7.3]),
    'radar.bandwidth_mhz': st.sampled_from([0.7, 1, 5]),
    'doppler.notch_mps': st.sampled_from([0, 6, 12.5]),
    'waveform.pulses': st.sampled_from([1, 9, 16]),
    'waveform.fill_pulses': st.sampled_from([0, 1, 3]),
}


@settings(max_examples=12, deadline=None, suppress_health_check=[HealthCheck.too_slow])
@given(st.fixed_dictionaries(PER_PRF), st.lists(st.sampled_from([700, 860, 980.1]), min_size=1, max_size=3))
def test_a_list_of_equal_numbers_gives_exactly_the_answer_of_the_one_number(values, pris):
    plans = []
    for many in (False, True):
        plan = {**copy.deepcopy(OPENING), 'waveform': {**OPENING['waveform'], 'pri_us': pris, 'detect_m': 1}}
        for path, value in values.items():
            record, name = path.split('.')
            plan[record] = {**plan[record], name: [value] * len(pris) if many else value}
        plans.append(plan)
    one, listed = (api.assess(plan) for plan in plans)
    one.pop('plan'), listed.pop('plan')
    assert one == listed


def test_the_order_of_dwells_does_not_change_what_is_seen():
    plan = copy.deepcopy(EXAMPLES['eight-prfs'])
    one = api.assess(plan)
    plan['waveform']['pri_us'].reverse()
    other = api.assess(plan)
    assert other['visible']['share'] == pytest.approx(one['visible']['share'], abs=1e-12)
    assert other['decode'] == one['decode']


def test_assessing_a_plan_leaves_it_as_it_was():
    before = copy.deepcopy(OPENING)
    api.assess(OPENING)
    assert before == OPENING
