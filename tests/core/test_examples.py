"""The worked examples: plans that an engineer would believe; doing what each invites to shows what it says."""

import functools
import json
from pathlib import Path

import pytest

from pycore import api
from pycore.wording import THIN_SPACE

FOLDER = Path(__file__).parents[2] / 'webapp' / 'examples'
EXAMPLES = {path.stem: json.loads(path.read_text('utf-8')) for path in sorted(FOLDER.glob('*.json'))}
LONGEST_LINK = 1900  # characters; what mail programs and chat windows pass on whole
MOST_NOT_MET = 1


@functools.cache
def note(name, *edits):
    """The note of an example after some edits ``(key, typed text)``."""
    typed = [{'key': key, 'text': text} for key, text in edits]
    said = api.note(plan=EXAMPLES[name]['plan'], edits=typed, figures=['blind-zones', 'eclipsed-ranges'], deep=True)
    assert said['refused'] == []
    return said


def findings(name, *edits):
    return {finding['name']: finding for finding in note(name, *edits)['findings']}


def zones(name, *edits):
    return note(name, *edits)['figures']['blind-zones']['caption'].replace(THIN_SPACE, ' ')


@pytest.mark.parametrize('name', EXAMPLES)
def test_a_worked_example_is_nearly_good_and_its_link_can_be_sent(name):
    found = findings(name)
    judged = [finding['met'] for finding in found.values() if finding['met'] is not None]
    assert len(judged) >= 3
    assert judged.count(False) <= MOST_NOT_MET
    assert len(note(name)['link']) <= LONGEST_LINK


def test_there_are_worked_examples_over_bands_and_uses():
    plans = [example['plan'] for example in EXAMPLES.values()]
    carriers = [plan['radar']['carrier_ghz'] for plan in plans]
    assert len(plans) >= 10
    assert len({round(value, 1) for value in carriers if isinstance(value, float)}) >= 8
    assert {plan['waveform']['kind'] for plan in plans} == {'dwells', 'stagger'}
    assert {len(plan['waveform']['pri_us']) for plan in plans} >= {1, 2, 3, 4, 5, 8, 16}
    assert any(plan.get('purpose') == 'weather' for plan in plans)


def test_opening_two_other_intervals_bring_the_final_approach_into_sight():
    edits = ('waveform.pri_us.0', '735'), ('waveform.pri_us.1', '881')
    assert [found['met'] for found in findings('opening').values()].count(False) == 1
    assert note('opening', *edits)['verdict']['met']


def test_one_clear_prf_is_not_unambiguous_to_two_and_a_half_kilometres():
    edit = ('coverage.range_km.1', '2.5')
    assert findings('one-clear-prf')['decode-range']['met']
    assert not findings('one-clear-prf', edit)['decode-range']['met']


def test_long_range_a_near_pulse_that_serves_to_five_kilometres_leaves_a_gap():
    edit = ('radar.near_pulse.to_km', '5')
    assert 'Every range is clear' in note('long-range')['figures']['eclipsed-ranges']['caption']
    assert '7.94 to 8.69' in note('long-range', edit)['figures']['eclipsed-ranges']['caption']


def test_coastal_a_faster_sea_takes_more_of_the_coverage():
    assert dotted('coastal', ('rain.0.speed_mps', '5')) > dotted('coastal') > 0


def test_heavy_rain_stronger_rain_takes_much_more_of_the_coverage():
    assert dotted('heavy-rain', ('rain.0.cnr_db', '40')) > 1.5 * dotted('heavy-rain')


def dotted(name, *edits):
    """Share of the coverage that clutter takes, as the caption says it. [%]"""
    before, _ = zones(name, *edits).split(' % where ')
    return float(before.rsplit(' ', 1)[1])


def test_two_carriers_one_carrier_for_both_loses_the_departure_path():
    edits = ('radar.carrier_ghz.0', '2.7'), ('radar.carrier_ghz.1', '2.7')
    assert note('two-carriers')['verdict']['met']
    assert not findings('two-carriers', *edits)['must-see.0']['met']


def test_four_pulse_stagger_a_higher_least_response_loses_a_speed():
    edit = ('doppler.response_min_db', '−9')
    assert findings('four-pulse-stagger')['blind-speed']['met']
    assert findings('four-pulse-stagger', edit)['blind-speed']['value'] == pytest.approx(40.3, abs=0.1)


def test_three_delay_stagger_two_delays_narrow_the_notch_and_leave_more_of_the_ground():
    fewer = figures('three-delay-stagger', ('doppler.delays', '2'))
    before = figures('three-delay-stagger')
    assert '8.11' in before['blind-speeds']['caption']
    assert '5.68' in fewer['blind-speeds']['caption']
    assert ground(fewer) > ground(before)


def figures(name, *edits):
    typed = [{'key': key, 'text': text} for key, text in edits]
    wanted = ['blind-speeds', 'doppler-filters']
    return api.note(plan=EXAMPLES[name]['plan'], edits=typed, figures=wanted, deep=True)['figures']


def ground(pictures):
    """Level of the ground behind the canceller, as drawn."""
    return pictures['doppler-filters']['columns']['clutter-edge']['y'][0]


def test_two_prf_weather_a_wider_span_costs_wrong_folds():
    edit = ('waveform.pri_us.1', '1050')
    before, after = findings('two-prf-weather'), findings('two-prf-weather', edit)
    assert after['extended-nyquist']['value'] > before['extended-nyquist']['value']
    assert after['unfolding']['value'] > 3 * before['unfolding']['value']


def test_counter_drone_longer_rotor_lines_fold_onto_the_body_on_one_prf():
    folds = [line for line in note('counter-drone', ('target.own_spread_mps', '90'))['cautions'] if 'rotor' in line]
    assert [line[:8] for line in folds] == ['On PRF 2']
    assert not any('rotor' in line for line in note('counter-drone')['cautions'])


def test_eight_prfs_a_pulse_twice_as_long_is_forbidden_by_the_duty_and_not_by_the_coverage():
    found = findings('eight-prfs', ('radar.pulse_us', '12'))
    assert [name for name, finding in found.items() if finding['met'] is False] == ['duty']


def test_high_prf_a_longer_pulse_makes_the_eclipsed_stripes_grow():
    found = findings('high-prf', ('radar.pulse_us', '1.6'))
    assert not found['visible']['met']
    assert findings('high-prf')['visible']['met']


def test_sixteen_prfs_eleven_needed_lose_the_coverage():
    found = findings('sixteen-prfs', ('waveform.detect_m', '11'))
    assert [name for name, finding in found.items() if finding['met'] is False] == ['visible']


def test_every_example_has_its_deed_tested_here():
    tested = ' '.join(name for name in globals() if name.startswith('test_')).replace('_', '-')
    assert [name for name in EXAMPLES if f'test-{name}-' not in tested] == []
