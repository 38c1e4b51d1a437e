"""What every radar engineer knows, as numbers of our own. No source is claimed: common practice.

Filters behind heavy rain, and a target that moves by whole blind speeds, are in test_filters_published.
"""

import numpy as np
import pytest

from pycore import ambiguity, stagger
from pycore.eclipsing import clear_ranges

KNOT_M_S = 1852 / 3600


def ambiguities(carrier_hz, prf_hz):
    """Unambiguous range and first blind speed."""
    wavelength_m = ambiguity.wavelength(carrier_hz)
    return ambiguity.unambiguous_range(1 / prf_hz), ambiguity.first_blind_speed(1 / prf_hz, wavelength_m)


def test_an_s_band_radar_near_1_khz_is_unambiguous_to_150_km_and_to_some_tens_of_metres_a_second():
    # common practice; the figures computed here
    reach_m, blind_m_s = ambiguities(2.9e9, 1100.0)
    assert reach_m == pytest.approx(136.27e3, abs=5.0)
    assert blind_m_s == pytest.approx(56.86, abs=0.005)
    assert blind_m_s / KNOT_M_S == pytest.approx(110.5, abs=0.05)


@pytest.mark.parametrize(
    ('carrier_hz', 'prf_hz', 'range_max_m', 'regime'),
    [(2.9e9, 1100.0, 110e3, 'low'), (10e9, 10e3, 100e3, 'medium')],
)
def test_terminal_radars_are_ambiguous_in_speed_and_nose_radars_in_both(carrier_hz, prf_hz, range_max_m, regime):
    # common practice; speeds of ± 150 m/s
    assert ambiguity.regime(*ambiguities(carrier_hz, prf_hz), range_max_m, 300.0) == regime


def test_two_prfs_a_tenth_apart_show_on_one_what_a_blind_speed_hides_on_the_other():
    # common practice: 980 us and a tenth less, S band, notch 2 m/s: the first blind speeds do not overlap
    blind = ambiguity.first_blind_speed(np.array([980e-6, 882e-6]), ambiguity.wavelength(2.8e9))
    spans = stagger.notch_clear_speeds(blind, np.array([2.0, 2.0]), (0.0, 300.0))
    for prf, other in ((0, 1), (1, 0)):
        start, stop = spans.of(other)
        assert np.any((start <= blind[prf]) & (blind[prf] <= stop))


def test_two_prfs_a_tenth_apart_show_on_one_what_the_other_eclipses():
    # common practice: the second pulse of one PRF falls into the open receiver of the other
    pri_s = np.array([980e-6, 882e-6])
    reach = ambiguity.unambiguous_range(pri_s)
    spans = clear_ranges(pri_s, np.full(2, 1e-6), 1e-6, 0.0, 0.5, (2e3, 160e3))
    start, stop = spans.of(1)
    assert np.any((start < reach[0]) & (reach[0] < stop))


def test_rain_that_recedes_looks_like_a_fast_closing_target():
    # common practice: blind speed 60 m/s, rain at -12 m/s and a target at 48 m/s share one apparent speed
    assert ambiguity.fold_speed(np.array([-12.0, 48.0]), 60.0).tolist() == [-12.0, -12.0]


def test_a_target_moving_by_whole_half_wavelengths_from_pulse_to_pulse_looks_still():
    # common practice: multiples of λ·PRF/2
    blind = ambiguity.first_blind_speed(0.5e-3, 0.125)  # exact in binary: 125 m/s
    assert ambiguity.fold_speed(np.arange(-3, 4) * blind, blind).tolist() == [0.0] * 7
