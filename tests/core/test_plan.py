"""The plan as it is read: SI units, exact counts, and one plain sentence for whatever cannot be used."""

import copy
import json
import math
from fractions import Fraction
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore.errors import InputError
from pycore.plan.document import shown
from pycore.plan.keys import KEYS
from pycore.plan.reading import filled, read

OPENING = json.loads((Path(__file__).parents[2] / 'webapp/examples/opening.json').read_text('utf-8'))['plan']
EXAMPLES = sorted((Path(__file__).parents[2] / 'webapp/examples').glob('*.json'))


def opening(**changes):
    """The opening plan with some keys changed: ``radar__pulse_us=2``."""
    plan = copy.deepcopy(OPENING)
    for path, value in changes.items():
        *records, name = path.split('__')
        here = plan
        for part in records:
            here = here[part]
        here[name] = value
    return plan


def refusal(document):
    with pytest.raises(InputError) as refused:
        read(document)
    message = refused.value.message
    assert message.endswith('.')
    assert '\n' not in message
    assert len(message) < 260
    return refused.value


def test_the_opening_plan_is_read_into_si_units():
    plan = read(OPENING)
    assert plan.pri_s.tolist() == [980e-6, 860e-6]
    assert plan.pri_counts == (9800, 8600)
    assert plan.carrier_hz.tolist() == [2.8e9, 2.8e9]
    assert plan.carrier_exact_hz == (Fraction(2_800_000_000),) * 2
    assert plan.clock_hz == 10e6
    assert plan.pulse_s.tolist() == [1e-6, 1e-6]
    assert plan.range_m == (2e3, 110e3)
    assert plan.speed_m_s == (0, 300)
    assert plan.duty_limit == 0.1
    assert plan.wanted.visible == 0.95
    assert plan.must_see[0].range_m == (4e3, 30e3)
    assert plan.must_see[0].visible == 1
    assert plan.surface.range_m == (0, 40e3)
    assert plan.time_on_target_s == pytest.approx(1.4 / 72, rel=1e-15)
    assert plan.scan_period_s == 5
    assert plan.m == 1
    assert plan.n == 2


@pytest.mark.parametrize('path', EXAMPLES, ids=lambda path: path.stem)
def test_every_worked_example_is_a_plan_with_a_title_and_one_sentence_that_invites(path):
    example = json.loads(path.read_text('utf-8'))
    assert set(example) == {'name', 'invite', 'plan'}
    assert example['name'] == path.stem
    assert example['invite'].endswith('.')
    assert example['invite'].replace('Fig. ', 'figure ').count('. ') == 0
    assert read(example['plan']).title


def test_there_are_ten_worked_examples():
    assert len(EXAMPLES) >= 10


def test_only_the_intervals_are_required():
    assert read({'waveform': {'pri_us': [1000]}}).n == 1


@pytest.mark.parametrize('document', [{}, {'waveform': {}}, {'waveform': None}, {'radar': {}}])
def test_a_plan_without_intervals_is_refused_by_their_name(document):
    assert refusal(document).field == 'waveform.pri_us'


PER_PRF = (
    'radar.carrier_ghz',
    'radar.pulse_us',
    'radar.bandwidth_mhz',
    'doppler.notch_mps',
    'waveform.pulses',
    'waveform.fill_pulses',
)


@given(st.data(), st.integers(1, 16))
def test_a_list_of_equal_numbers_gives_exactly_what_the_one_number_gives(data, n):
    scalar = filled({'waveform': {'pri_us': [900.0 + 10 * i for i in range(n)]}})
    as_list = copy.deepcopy(scalar)
    for path in PER_PRF:
        if data.draw(st.booleans()):
            record, name = path.split('.')
            as_list[record][name] = [scalar[record][name]] * n
    one, other = read(scalar), read(as_list)
    for name in ('carrier_hz', 'pulse_s', 'bandwidth_hz', 'notch_m_s', 'pulses', 'fill_pulses', 'wavelength_m'):
        np.testing.assert_array_equal(getattr(one, name), getattr(other, name))
        assert getattr(one, name).dtype == getattr(other, name).dtype
        assert getattr(one, name).shape == (n,)
    assert one.carrier_exact_hz == other.carrier_exact_hz


@pytest.mark.parametrize(
    ('changes', 'field', 'words'),
    [
        ({'radar__pulse_us': 0}, 'radar.pulse_us', ['Pulse length must be from 0.01 to 10', 'got 0']),
        ({'radar__pulse_us': -2}, 'radar.pulse_us', ['got −2']),
        ({'radar__pulse_us': 'abc'}, 'radar.pulse_us', ['Pulse length', '“abc”']),
        ({'radar__pulse_us': ''}, 'radar.pulse_us', ['got nothing']),
        ({'radar__pulse_us': '1.0'}, 'radar.pulse_us', ['“1.0”']),
        ({'radar__pulse_us': True}, 'radar.pulse_us', ['got true']),
        ({'radar__pulse_us': None}, 'radar.pulse_us', ['got none']),
        ({'radar__pulse_us': math.nan}, 'radar.pulse_us', ['not a number']),
        ({'radar__pulse_us': math.inf}, 'radar.pulse_us', ['infinity']),
        ({'radar__pulse_us': {}}, 'radar.pulse_us', ['an object']),
        ({'radar__pulse_us': 10**5000}, 'radar.pulse_us', ['a huge number']),
        ({'radar__pulse_us': 'x' * 10**6}, 'radar.pulse_us', ['x…”']),
        ({'radar__pulse_us': 860.0}, 'radar.pulse_us', ['shorter', '860 µs']),
        ({'radar__pulse_us': [1.0, 900.0]}, 'radar.pulse_us.1', ['shorter', '860 µs']),
        ({'radar__pulse_us': [1.0, 1.0, 1.0]}, 'radar.pulse_us', ['2', '3']),
        ({'radar__pulse_us': []}, 'radar.pulse_us', ['a list of 0']),
        ({'radar__pulse_us': [1.0, False]}, 'radar.pulse_us.1', ['got false']),
        ({'radar__carrier_ghz': 301}, 'radar.carrier_ghz', ['0.003 to 300 GHz', '301']),
        ({'waveform__pri_us': [980, 0]}, 'waveform.pri_us.1', ['PRI', 'µs', 'got 0']),
        ({'waveform__pri_us': []}, 'waveform.pri_us', ['1 to 16']),
        ({'waveform__pri_us': 980}, 'waveform.pri_us', ['1 to 16', '980']),
        ({'waveform__pri_us': [980.0] * 17}, 'waveform.pri_us', ['1 to 16', '17']),
        ({'waveform__pri_us': [980.05, 860]}, 'waveform.pri_us.0', ['10 MHz clock', '980.05', '980 and 980.1']),
        ({'waveform__pulses': 9.5}, 'waveform.pulses', ['whole number', '9.5']),
        ({'waveform__pulses': 4097}, 'waveform.pulses', ['1 to 4096', '4097']),
        ({'waveform__pulses': True}, 'waveform.pulses', ['got true']),
        ({'waveform__detect_m': 3}, 'waveform.detect_m', ['2', 'got 3']),
        ({'waveform__detect_m': 0}, 'waveform.detect_m', ['from 1']),
        ({'waveform__kind': 'staggered'}, 'waveform.kind', ['dwells or stagger', 'nearest: stagger']),
        ({'waveform__kind': ['stagger']}, 'waveform.kind', ['dwells or stagger']),
        ({'coverage__range_km': [110, 2]}, 'coverage.range_km', ['110', '2']),
        ({'coverage__range_km': [2, 2]}, 'coverage.range_km', ['2']),
        ({'coverage__range_km': [2]}, 'coverage.range_km', ['two numbers']),
        ({'coverage__range_km': 'far'}, 'coverage.range_km', ['two numbers']),
        ({'coverage__speed_mps': [-20001, 0]}, 'coverage.speed_mps.0', ['−20']),
        ({'doppler__weights': [0, 0]}, 'doppler.weights', ['two']),
        ({'doppler__weights': [1]}, 'doppler.weights', ['2 to 16']),
        ({'wanted__decode_range': 1}, 'wanted.decode_range', ['true or false', 'got 1']),
        ({'title': 'x' * 121}, 'title', ['120', '121']),
        ({'title': 7}, 'title', ['text']),
        ({'title': None}, 'title', ['none']),
        ({'marking': 'm' * 81}, 'marking', ['80']),
        ({'remarks': {'visibel': 'x'}}, 'remarks', ['visible']),
        ({'remarks': {'visible': 'x' * 401}}, 'remarks.visible', ['400']),
        ({'remarks': []}, 'remarks', ['object']),
        ({'rain': [{}] * 5}, 'rain', ['4', '5']),
        ({'rain': 'heavy'}, 'rain', ['“heavy”']),
        ({'must_see': {}}, 'must_see', ['list']),
        ({'surface': [1]}, 'surface', ['object']),
        ({'radar': 5}, 'radar', ['object', '5']),
        ({'radr': {}}, 'radr', ['radar']),
        ({'radar__puls_us': 1}, 'radar.puls_us', ['radar.pulse_us']),
        ({'pulsewright': 2}, 'pulsewright', ['1', '2']),
        ({'pulsewright': True}, 'pulsewright', ['true']),
        ({'radar__near_pulse': {'sent_at_us': 0.5}}, 'radar.near_pulse.sent_at_us', ['0.5']),
    ],
)
def test_what_cannot_be_used_is_named_with_its_rule_and_what_came(changes, field, words):
    refused = refusal(opening(**changes))
    assert refused.field == field
    assert [word for word in words if word not in refused.message] == []


@pytest.mark.parametrize('document', [None, [], 'plan', 5, True, [OPENING]])
def test_what_is_no_object_is_refused_as_a_whole(document):
    assert 'object' in refusal(document).message


def test_a_thousand_million_intervals_are_refused_without_being_looked_at():
    class Endless(list):
        def __len__(self):
            return 10**9

        def __iter__(self):
            raise AssertionError('looked at')

    assert '1 to 16' in refusal(opening(waveform__pri_us=Endless())).message


def test_markup_in_an_unknown_key_comes_back_as_short_text():
    refused = refusal({'<script>' + 'x' * 1000: 1})
    assert len(refused.message) < 160
    assert '<script>' in refused.message


@pytest.mark.parametrize('key', [key for key in KEYS if key.kind in ('number', 'count')], ids=lambda key: key.path)
def test_bools_text_and_lists_are_no_numbers(key):
    base = filled(
        {'waveform': {'pri_us': [1000.0]}, 'surface': {}, 'rain': {}, 'platform': {}, 'crossing': {}, 'weather': {}}
    )
    base['must_see'] = [filled(OPENING)['must_see'][0]]
    base['radar']['near_pulse'], base['target']['radar_equation'] = {}, {}
    for wrong in (True, '1', {}, [[1]], math.nan, -math.inf):
        plan = copy.deepcopy(base)
        here = plan
        *records, name = key.path.replace('must_see[]', 'must_see.0').replace('[]', '').split('.')
        for part in records:
            here = here[int(part)] if isinstance(here, list) else here[part]
        here[name] = wrong
        assert key.label in refusal(plan).message


@given(st.integers(1, 10**9), st.sampled_from([0.001, 0.5, 1.0, 7.5, 10.0, 33.333, 62.5, 100.0, 1000.0]))
def test_an_interval_on_the_clock_is_exactly_so_many_counts(count, clock_mhz):
    pri_us = float(Fraction(count) / Fraction(str(clock_mhz)))
    if not 0.1 <= pri_us <= 1e6:
        return
    plan = read({'waveform': {'pri_us': [pri_us]}, 'radar': {'clock_mhz': clock_mhz, 'pulse_us': 0.01, 'guard_us': 0}})
    assert plan.pri_counts == (count,)
    assert plan.pri_s[0] == pytest.approx(float(Fraction(count) / Fraction(str(clock_mhz)) / 10**6), rel=3e-16)


@pytest.mark.parametrize(
    ('off', 'allowed'), [('0.0000009', True), ('-0.0000009', True), ('0.0000011', False), ('0.5', False)]
)
def test_an_interval_may_stand_a_millionth_of_a_count_off_the_clock(off, allowed):
    pri_us = float((Fraction(1000) + Fraction(off)) / 10)
    document = {'waveform': {'pri_us': [pri_us]}}
    if allowed:
        assert read(document).pri_counts == (1000,)
    else:
        assert 'clock' in refusal(document).message


@pytest.mark.parametrize('n', [1, 16])
def test_legal_extremes_are_plans(n):
    base = {'waveform': {'pri_us': [0.2] * n, 'pulses': 4096, 'fill_pulses': 0}}
    assert read({**base, 'radar': {'carrier_ghz': 0.003, 'pulse_us': 0.1}}).n == n
    assert read({**base, 'radar': {'carrier_ghz': 300.0, 'pulse_us': 0.01, 'recovery_us': 1e6}}).n == n
    assert read({**base, 'radar': {'pulse_us': 0.1}, 'coverage': {'range_km': [0, 1e5]}}).range_m[1] == 1e8


def test_a_stagger_has_one_value_for_its_whole_cpi():
    stagger = opening(waveform__kind='stagger', radar__pulse_us=[1.0, 2.0])
    assert 'stagger' in refusal(stagger).message
    assert read(opening(waveform__kind='stagger', radar__pulse_us=[1.0, 1.0])).kind == 'stagger'


def test_reading_a_plan_leaves_the_document_as_it_was():
    before = copy.deepcopy(OPENING)
    read(OPENING)
    filled(OPENING)
    assert before == OPENING


def test_filling_a_filled_plan_changes_nothing():
    plan = filled({'waveform': {'pri_us': [980, 860]}, 'rain': [{}], 'platform': {}})
    assert filled(plan) == plan


@given(
    st.recursive(
        st.none() | st.booleans() | st.integers() | st.floats() | st.text(max_size=8),
        lambda inner: (
            st.lists(inner, max_size=3)
            | st.dictionaries(
                st.sampled_from([key.path.split('.')[0] for key in KEYS] + [key.path.split('.')[-1] for key in KEYS]),
                inner,
                max_size=4,
            )
        ),
        max_leaves=12,
    )
)
def test_any_json_is_a_plan_or_refused_in_one_sentence(document):
    try:
        read(document)
    except InputError as refused:
        message = refused.message
    else:
        message = 'A plan.'
    assert message.endswith('.')
    assert '\n' not in message


@pytest.mark.parametrize(
    ('value', 'text'),
    [('a' * 41, '“' + 'a' * 40 + '…”'), (None, 'none'), ([1, 2], 'a list of 2'), (12345.678, '12 345.678')],
)
def test_what_came_is_shown_short(value, text):
    assert shown(value).replace('\N{NARROW NO-BREAK SPACE}', ' ') == text


def test_a_plan_for_weather_has_weather_to_be_judged_by():
    assert filled({'waveform': {'pri_us': [1000]}, 'purpose': 'weather'})['weather']['width_mps'] == 2
    assert filled({'waveform': {'pri_us': [1000]}})['weather'] is None


def test_a_list_for_the_only_interval_is_its_one_number():
    plan = filled({'waveform': {'pri_us': [1000], 'pulses': [9]}, 'radar': {'pulse_us': [2.5]}})
    assert plan['waveform']['pulses'] == 9
    assert plan['radar']['pulse_us'] == 2.5
    refusal({'waveform': {'pri_us': [1000, 900], 'pulses': [9]}})
