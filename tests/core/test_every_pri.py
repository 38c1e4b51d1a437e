"""The strip over every PRI: its bars, its area and its words say what each PRI alone makes of the followed target."""

import json
import re
from pathlib import Path

import numpy as np
import pytest

from pycore import api, columns
from pycore.columns.view import seen
from pycore.computed import Computed
from pycore.follow import each_of, strip
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS, THIN_SPACE

PLAN = {
    'radar': {'carrier_ghz': 2.8, 'pulse_us': 1.0, 'recovery_us': 1.0},
    'coverage': {'range_km': [2.0, 110.0], 'speed_mps': [0.0, 300.0]},
    'waveform': {'pri_us': [980.0, 860.0], 'pulses': 9, 'detect_m': 1},
    'doppler': {'notch_mps': 6.0},
}
EXAMPLES = sorted((Path(__file__).parents[2] / 'webapp' / 'examples').glob('*.json'))
WRONG = re.compile(rf'nan|\binf\b|None|  | ,|\.\.|[{{}}]|{THIN_SPACE}{THIN_SPACE}')


def pictured(plan=PLAN, range_km=84.2, speed_mps=183.0, size=None, **units):
    computed = Computed(read(plan))
    view = seen(computed, {'target': {'range_km': range_km, 'speed_mps': speed_mps}})
    return columns.picture('every-pri', computed, {**SHOWN_UNITS, **units}, size, view)


def plain(text):
    return text.replace(THIN_SPACE, ' ')


def test_the_notch_lane_is_dark_where_a_whole_number_of_half_wavelengths_is_flown_in_one_interval():
    # 183 m/s is blind where 2 · 183 · T / 0.10707 m is whole, to within 6 m/s: about T = 877.6 µs for three.
    blind = pictured()['columns']['blind']
    inside = [(a, b) for a, b in zip(blind['left'], blind['right'], strict=True) if a < 877.6 < b]
    assert inside
    assert inside[0][0] == pytest.approx(3 * 0.107069 / (2 * 189) * 1e6, abs=4)
    assert inside[0][1] == pytest.approx(3 * 0.107069 / (2 * 177) * 1e6, abs=4)


def test_bars_and_clear_times_cover_every_pri_once():
    found = pictured()['columns']
    each = strip(Computed(read(PLAN)), 84.2e3, 183.0)
    dark = np.zeros(each.pri_s.size, dtype=bool)
    for left, right in zip(found['blind']['left'], found['blind']['right'], strict=True):
        dark |= (each.pri_s * 1e6 > left) & (each.pri_s * 1e6 < right)
    np.testing.assert_array_equal(dark, ~each.clear)


def test_the_caption_says_what_the_plans_own_pris_do_and_for_how_long():
    # 84.2 km at 183 m/s: the first 1.5 µs after a pulse, 0.2998 km, are reached after 83.9 km / 183 m/s = 458.5 s.
    caption = plain(pictured()['caption'])
    assert "The plan's own, the upright lines: 980 µs does for 459 s and 860 µs does not (in the notch)." in caption
    assert re.match(r'\d+\.\d % of the PRIs from 430\.1 to 1960 µs would see this target\.', caption)


def test_a_target_that_no_pri_sees_is_said_to_be_so():
    assert 'No PRI from 430.1 to 1960 µs would see this target: it is in the notch on every one.' in plain(
        pictured(speed_mps=0.0)['caption']
    )


def test_a_target_that_stands_still_outside_the_notch_stays_clear_without_end():
    still = {**PLAN, 'doppler': {'notch_mps': 0.0}}
    found = pictured(still, speed_mps=0.0)
    assert 'It stands still' in found['caption']
    assert 'no end' in found['ticks']['y']['text']


def test_as_frequencies_the_axis_rises_and_the_words_say_prf():
    found = pictured(pri='Hz')
    assert found['labels']['x'] == 'PRF (Hz)'
    low, high = found['ranges']['x']
    assert (low, high) == pytest.approx((510.2, 2325), rel=1e-3)
    bars = found['columns']['blind']
    assert (bars['left'] < bars['right']).all()
    assert 'of the PRFs from' in found['caption']


def test_names_that_would_lie_on_each_other_are_left_to_the_caption():
    assert pictured()['columns']['names']['text'][1:] == ['860', '980']
    assert pictured(size={'width': 280})['columns']['names']['text'][1:] == ['860']


@pytest.mark.parametrize('path', EXAMPLES, ids=lambda path: path.stem)
@pytest.mark.parametrize(('range_km', 'speed_mps'), [(0.0, 0.0), (20.3, -40.0), (333.3, 900.0)])
def test_the_words_are_whole_for_every_example(path, range_km, speed_mps):
    plan = json.loads(path.read_text('utf-8'))['plan']
    found = pictured(plan, range_km, speed_mps)
    for text in (found['caption'], found['summary'], found['short']):
        assert text.endswith('.')
        assert not WRONG.search(text), text
    assert all(len(row) == len(found['table']['head']) for row in found['table']['rows'])


def test_without_a_target_the_figure_is_empty():
    computed = Computed(read(PLAN))
    found = columns.picture('every-pri', computed, SHOWN_UNITS)
    assert found['caption'] == ''
    assert all(len(values) == 0 for source in found['columns'].values() for values in source.values())


def test_the_plans_own_pris_are_taken_as_the_strip_takes_them():
    computed = Computed(read(PLAN))
    every = strip(computed, 84.2e3, 183.0)
    again = each_of(computed, every.pri_s, 84.2e3, 183.0)
    np.testing.assert_array_equal(every.until_blind_s, again.until_blind_s)


def test_only_what_is_on_the_screen_is_computed():
    assert api.look(PLAN, marked=['dwell'], view={'target': {'range_km': 50, 'speed_mps': 80}})['figures'].keys() == {
        'dwell'
    }
