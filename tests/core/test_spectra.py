"""What filters hear along the apparent speed, as the figure draws it: against the bank, the cover and the target."""

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore import columns, spectra
from pycore.bank import centres, clutter_gain, target_gain
from pycore.columns.filter_lanes import lanes
from pycore.columns.mark import marked
from pycore.columns.view import seen
from pycore.computed import Computed
from pycore.covered import covered_half_width, leakage
from pycore.cpi import cpis
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS

ONE_PART_IN_A_THOUSAND = 1e-3
"""Courses are straight between their points."""

PLAN = {
    'radar': {'carrier_ghz': 2.8, 'pulse_us': 1.0, 'recovery_us': 1.0},
    'coverage': {'range_km': [2.0, 110.0], 'speed_mps': [0.0, 300.0]},
    'waveform': {'pri_us': [980.0, 860.0], 'pulses': 9, 'detect_m': 1},
    'doppler': {'notch_mps': 6.0, 'window': 'chebyshev', 'sidelobe_db': 40.0},
    'rain': [{'cnr_db': 25.0, 'at_km': 20.0, 'range_km': [15.0, 45.0], 'speed_mps': -10.0, 'spread_mps': 2.0}],
}


def one_cpi(pulses=9, window='chebyshev'):
    return cpis(980e-6, 0.107, 1e-6, 1e6, 6.0, pulses, 0, window, 40.0)[0]


@settings(max_examples=25, deadline=None)
@given(st.sampled_from([1, 2, 3, 9, 64, 700, 1500]), st.floats(-60, 60), st.sampled_from([0.3, 2.0, 8.0]))
def test_clutter_heard_at_a_filters_centre_is_what_the_bank_passes(pulses, speed, spread):
    cpi = one_cpi(pulses, 'hamming')
    course = spectra.around(cpi, spectra.passed(cpi, spread), speed, centres(cpi))
    exact = clutter_gain(cpi, speed, spread)
    np.testing.assert_allclose(course, exact, atol=0.03 * exact.max())


@pytest.mark.parametrize('pulses', [1, 2, 9, 64])
def test_the_shape_of_a_filter_is_its_gain_for_a_target_off_its_centre(pulses):
    cpi = one_cpi(pulses)
    offset = spectra.offsets(cpi)
    np.testing.assert_allclose(spectra.shape(cpi), target_gain(cpi, offset)[:, 0], atol=1e-9 * pulses)


def test_dotted_clutter_falls_below_the_noise_where_it_ceases_to_cover():
    cpi = one_cpi()
    half = covered_half_width(leakage(cpi, 2.0), 10**2.75)
    course = 10**2.75 * spectra.around(cpi, spectra.passed(cpi, 2.0), -10.0, np.array([-10.0 + half]))
    assert course[0] == pytest.approx(1.0, abs=0.02)


def test_the_target_stands_on_its_best_filter():
    computed = Computed(read(PLAN))
    mark = marked(computed, {'range_km': 30.0, 'speed_mps': 80.0})
    for lane, one in zip(lanes(computed, mark), mark.followed.prfs, strict=True):
        speed, power = lane.target
        assert 10 * np.log10(power) == pytest.approx(one.snr_db)
        assert np.interp(speed, lane.speed_m_s, lane.filter) == pytest.approx(power, rel=ONE_PART_IN_A_THOUSAND)


def test_of_many_prfs_the_one_that_hears_the_target_best_is_shown():
    many = {**PLAN, 'waveform': {'pri_us': [980.0, 860.0, 900.0, 735.0, 790.0], 'pulses': 9, 'detect_m': 2}}
    computed = Computed(read(many))
    mark = marked(computed, {'range_km': 60.0, 'speed_mps': 54.6})
    (lane,) = lanes(computed, mark)
    assert mark.followed.prfs[lane.prf].scnr_db == max(one.scnr_db for one in mark.followed.prfs)
    assert len(lanes(Computed(read(PLAN)), None)) == 2


def test_rain_at_another_gate_is_not_heard():
    computed = Computed(read(PLAN))
    size = {'width': 600, 'height': 300}
    near, far = (
        columns.picture(
            'doppler-filters', computed, SHOWN_UNITS, size, seen(computed, {'target': {'range_km': r, 'speed_mps': 80}})
        )
        for r in (30.0, 100.0)
    )
    assert "Rain, at the target's gate, covers" in near['caption']
    assert "Rain, at the target's gate, stays below the noise in every filter." in far['caption']
    assert np.isnan(far['columns']['clutter-edge']['y']).all()
