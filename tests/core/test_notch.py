"""The suggested notch: each part against the picture that it comes from."""

import math

import numpy as np
import pytest

from pycore.computed import Computed
from pycore.filters import lobe_edge
from pycore.notch import platform_spread, suggested_notch
from pycore.plan.reading import read
from pycore.windows import window


def test_a_platform_spreads_clutter_by_the_slope_of_speed_over_a_gaussian_beam():
    # Power-weighted spread of V cos(look + angle) over the two-way beam, 200 m/s at 30 degrees, 2.5 degrees wide.
    angle = np.radians(np.linspace(-10.0, 10.0, 20001))
    power = np.exp(-8 * math.log(2) * (angle / math.radians(2.5)) ** 2)
    speed = 200.0 * np.cos(math.radians(30.0) + angle)
    mean = np.average(speed, weights=power)
    spread = math.sqrt(np.average((speed - mean) ** 2, weights=power))
    assert platform_spread(200.0, 30.0, 2.5) == pytest.approx(spread, rel=3e-3)
    assert platform_spread(200.0, -30.0, 2.5) == platform_spread(200.0, 30.0, 2.5)


def test_looking_along_the_track_a_platform_adds_nothing():
    assert platform_spread(200.0, 0.0, 2.5) == 0.0


def test_the_suggestion_adds_the_clutter_down_to_the_noise_and_a_filter_to_its_sidelobes():
    found = suggested_notch(10**4.5, 0.3, 0.4, 1.2, 1.77, 6.0)
    assert found.spread_m_s == pytest.approx(1.3)
    assert math.exp(-(found.clutter_m_s**2) / (2 * 1.3**2)) * 10**4.5 == pytest.approx(1.0)
    assert found.filter_m_s == pytest.approx(10.62)
    assert found.notch_m_s == pytest.approx(found.clutter_m_s + found.filter_m_s)


def test_clutter_below_the_noise_asks_for_no_room_of_its_own():
    assert suggested_notch(0.5, 0.3, 0.0, 0.0, 1.0, 6.0).notch_m_s == 6.0


def test_each_prf_of_a_list_gets_the_suggestion_that_it_gets_alone():
    width = np.array([6.0, 7.0])
    together = suggested_notch(1e4, 0.3, 0.0, np.array([1.0, 1.0]), 1.77, width).notch_m_s
    assert together.tolist() == [float(suggested_notch(1e4, 0.3, 0.0, 1.0, 1.77, one).notch_m_s) for one in width]


@pytest.mark.parametrize(('name', 'filters'), [('rectangular', 1.0), ('chebyshev', 1.77)])
def test_a_nine_pulse_filter_is_down_to_its_sidelobes_where_the_handbooks_say(name, filters):
    assert lobe_edge(window(name, 9, 40.0)) == pytest.approx(filters, abs=0.005)


@pytest.mark.parametrize(('pri_us', 'from_km'), [(980.0, 2.0), (300.0, 0.224844)])
def test_beyond_its_unambiguous_range_a_plan_meets_the_nearest_clutter(pri_us, from_km):
    # 980 us reach 147 km, beyond the coverage: clutter from 2 km on; 300 us reach 45 km: clutter from the first opening
    plan = read(
        {
            'radar': {'pulse_us': 1.0, 'recovery_us': 1.0},
            'coverage': {'range_km': [2.0, 110.0], 'speed_mps': [0.0, 300.0]},
            'waveform': {'pri_us': [pri_us], 'received_min': 0.5},
            'surface': {'cnr_db': 45.0, 'at_km': 10.0, 'to_km': 40.0, 'range_power': 3.0},
        }
    )
    found = Computed(plan).echoes.suggested_notch
    ratio = 10**4.5 * (10.0 / from_km) ** 3
    assert found.clutter_m_s == pytest.approx(found.spread_m_s * math.sqrt(2 * math.log(ratio)), rel=1e-6)
