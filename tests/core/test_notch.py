"""The suggested notch: its parts, and what is left of the clutter at its edge."""

import math

import numpy as np
import pytest

from pycore import filters
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.cpi import cpis
from pycore.notch import platform_spread, suggested_notch

LAMBDA = SPEED_OF_LIGHT_M_S / 2.8e9


def a_cpi(window='chebyshev', pulses=9):
    return cpis(980e-6, LAMBDA, 1e-6, 1e6, 6.0, pulses, 1, window, 40.0)[0]


def test_the_parts_of_a_notch_add_up():
    notch = suggested_notch(10**4.5, 0.3, 0.4, 0.5, 1.77, 6.0)
    assert notch.spread_m_s == pytest.approx(math.sqrt(0.3**2 + 0.4**2 + 0.5**2))
    assert notch.filter_m_s == pytest.approx(1.77 * 6.0)
    assert notch.notch_m_s == pytest.approx(notch.clutter_m_s + notch.filter_m_s)


def test_where_the_clutter_part_ends_a_gaussian_line_is_down_to_the_noise():
    notch = suggested_notch(1e4, 0.5, 0.0, 0.0, 0.0, 6.0)
    assert 1e4 * math.exp(-0.5 * (notch.notch_m_s / 0.5) ** 2) == pytest.approx(1.0)


@pytest.mark.parametrize('ratio', [0.0, 0.3, 1.0])
def test_clutter_below_the_noise_asks_for_the_filter_alone(ratio):
    notch = suggested_notch(ratio, 0.3, 0.4, 0.5, 1.77, 6.0)
    assert notch.notch_m_s == notch.filter_m_s


def test_notches_of_several_prfs_are_those_of_each_alone():
    ratios, widths = np.array([0.5, 1e3, 1e5]), np.array([6.0, 7.0, 8.0])
    together = suggested_notch(ratios, 0.3, 0.4, 0.5, 1.77, widths).notch_m_s
    alone = [suggested_notch(a, 0.3, 0.4, 0.5, 1.77, b).notch_m_s for a, b in zip(ratios, widths, strict=True)]
    assert together.tolist() == alone


def test_a_chebyshev_filter_of_40_db_and_9_pulses_is_down_after_1_77_filters_and_a_uniform_one_after_1():
    assert filters.lobe_edge(a_cpi().weights) == pytest.approx(1.77, abs=0.005)
    assert filters.lobe_edge(a_cpi('rectangular').weights) == 1.0


@pytest.mark.parametrize('look_deg', [30.0, -90.0, 150.0])
def test_a_platform_spreads_clutter_as_the_beam_weights_its_closing_speeds(look_deg):
    # the two-way power of a Gaussian beam over the closing speeds V cos(angle), narrow beam
    off_deg = np.linspace(-3.0, 3.0, 20001)
    power = 2.0 ** (-8.0 * (off_deg / 0.7) ** 2)
    speed = 200.0 * np.cos(np.radians(look_deg + off_deg))
    mean = (power * speed).sum() / power.sum()
    spread = math.sqrt((power * (speed - mean) ** 2).sum() / power.sum())
    assert platform_spread(200.0, look_deg, 0.7) == pytest.approx(spread, rel=1e-4)


def test_a_platform_looking_along_its_track_spreads_nothing():
    assert platform_spread(200.0, 0.0, 1.4) == 0.0
