"""Ambiguities against published values, each with its source beside it.

[R14]  M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., McGraw-Hill 2014; pages of the e-book.
[WDTB] NOAA/NWS Warning Decision Training Branch, DLOC Topic 3 Lesson 1, *WSR-88D Fundamentals*.
[NSSL] NSSL slides "Staggered PRT practical considerations" (Torres et al.).
Textbooks take light as 3e8 m/s, 6.9e-4 too fast: what enters through it is compared to one part in a thousand.
"""

import pytest

from pycore import ambiguity, dwell
from pycore.constants import SPEED_OF_LIGHT_M_S

TEXTBOOK_C = 1e-3  # relative
KNOT_M_S = 1852.0 / 3600.0
LAST_DIGIT = 0.5


def test_a_kilohertz_at_ten_centimetres():
    # [WDTB] 3-4, eq. 9: PRF 1000 Hz, 0.105 m: 26.25 m/s, about 51 kt.
    speed = ambiguity.nyquist_speed(1e-3, 0.105)
    assert speed == pytest.approx(26.25, rel=1e-12)
    assert speed / KNOT_M_S == pytest.approx(51.0, abs=LAST_DIGIT)


def test_where_medium_prf_begins_and_ends():
    # [R14] p. 408, fig. 5.35: 10 GHz, 60 km, ±150 m/s: below 2.5 kHz unambiguous in range, above 20 kHz in Doppler.
    wavelength = float(ambiguity.wavelength(10e9))
    for prf_hz, regime in [(2490, 'low'), (2510, 'medium'), (19900, 'medium'), (20100, 'high')]:
        reach = ambiguity.unambiguous_range(1 / prf_hz)
        blind = ambiguity.first_blind_speed(1 / prf_hz, wavelength)
        assert ambiguity.regime(reach, blind, 60e3, 300.0) == regime
    assert ambiguity.unambiguous_range(1 / 2500.0) == pytest.approx(60e3, rel=TEXTBOOK_C)
    assert ambiguity.first_blind_speed(1 / 20e3, wavelength) == pytest.approx(300.0, rel=TEXTBOOK_C)
    assert ambiguity.shortfall(60e3, 300.0, wavelength) == pytest.approx(20e3 / 2.5e3, rel=2 * TEXTBOOK_C)
    assert ambiguity.single_prf_interval(60e3, 300.0, wavelength) is None


def test_the_prf_that_puts_the_first_blind_speed_at_400_metres_per_second():
    # [R14] p. 349-350, the 1 GHz line of fig. 5.11: 2667 /s. (That it is the 1 GHz line is inferred.)
    blind = ambiguity.first_blind_speed(1 / 2667.0, ambiguity.wavelength(1e9))
    assert blind == pytest.approx(400.0, rel=TEXTBOOK_C)
    assert ambiguity.unambiguous_range(1 / 2667.0) == pytest.approx(56.2e3, rel=TEXTBOOK_C)


@pytest.mark.parametrize(
    ('prf_hz', 'reach_km', 'span_m_s'), [(2e3, 74.95, 29.98), (10e3, 14.99, 149.9), (30e3, 4.997, 449.7)]
)
def test_three_prfs_at_ten_gigahertz(prf_hz, reach_km, span_m_s):
    # [R14] p. 408-409, table 5.3: inputs read, values computed.
    assert ambiguity.unambiguous_range(1 / prf_hz) / 1e3 == pytest.approx(reach_km, rel=2e-4)
    blind = ambiguity.first_blind_speed(1 / prf_hz, ambiguity.wavelength(10e9))
    assert blind == pytest.approx(span_m_s, rel=2e-4)
    assert 2 * blind / ambiguity.wavelength(10e9) == pytest.approx(prf_hz, rel=1e-12)


def test_range_times_nyquist_speed_depends_on_the_wavelength_alone():
    # Moisseev et al., J. Atmos. Oceanic Technol. 25(12), 2008, Introduction: v_a r_a = c λ/8.
    for pri_s in (3.1e-3, 1e-3, 7.8e-4):
        product = ambiguity.nyquist_speed(pri_s, 0.11) * ambiguity.unambiguous_range(pri_s)
        assert product == pytest.approx(SPEED_OF_LIGHT_M_S * 0.11 / 8, rel=1e-12)


def test_four_hundred_knots_at_three_gigahertz():
    # M. I. Skolnik, Encyclopaedia Britannica, "radar": about 4.1 kHz. The PRF whose first blind speed this is.
    prf_hz = 2 * 400 * KNOT_M_S / ambiguity.wavelength(3e9)
    assert prf_hz == pytest.approx(4.1e3, abs=50.0)
    assert ambiguity.first_blind_speed(1 / prf_hz, ambiguity.wavelength(3e9)) == pytest.approx(400 * KNOT_M_S)


def test_blind_speed_in_knots():
    # Skolnik, Introduction to Radar Systems, MTI chapter (from memory): v = 0.97 λ f_p.
    assert ambiguity.first_blind_speed(1e-3, 0.1) / KNOT_M_S == pytest.approx(0.97 * 0.1 * 1000, abs=0.5)


def test_a_wind_profiler_that_adds_pulses_up():
    # MU radar, Earth, Planets and Space 2018, doi 10.1186/s40623-018-0979-1, table 1: 46.5 MHz, 400 us, 32 pulses added
    # up in each of 3 beams and 5 frequencies: 8.4 m/s, 2.60 Hz, a profile every 6.144 s, 24.57 s in all.
    interval = 400e-6 * 32 * 3 * 5
    speed = ambiguity.nyquist_speed(interval, ambiguity.wavelength(46.5e6))
    assert speed == pytest.approx(8.4, abs=0.05)
    assert 2 * speed / ambiguity.wavelength(46.5e6) == pytest.approx(2.60, abs=0.005)
    assert interval * 128 == pytest.approx(24.57, abs=0.01)
    assert interval * 32 == pytest.approx(6.144, abs=0.0005)


@pytest.mark.parametrize(
    ('pri_s', 'range_m', 'last_digit_m'),
    [(1.67e-6, 250.0, 1.0), (5.12e-3, 3072 * 250.0, 750.0), (1.53e-3, 230e3, 750.0), (3.07e-3, 460e3, 750.0)],
)
def test_intervals_that_a_weather_radar_is_designed_by(pri_s, range_m, last_digit_m):
    # [NSSL]: 250 m and 1.67 us, 3072 bins and 5.12 ms, 230 km and 1.53 ms, 460 km and 3.07 ms.
    assert ambiguity.unambiguous_range(pri_s) == pytest.approx(range_m, abs=last_digit_m)


def test_a_duty_of_a_fifth_of_a_percent_bounds_the_shortest_interval():
    # [NSSL]: 1.57 us at 0.2 % duty; the source rounds 785 us to the 780 us of its shortest interval.
    assert dwell.largest_duty([1.57e-6, 1.57e-6], [3.1e-3, 780e-6]) == pytest.approx(0.002, rel=0.01)


def test_a_target_blind_at_one_interval_in_range_and_speed_and_clear_at_another():
    # [R14] p. 395-396, fig. 5.28: 10 GHz, 30 km, 300 m/s; 100 us: at 0 of the interval and of the speed; 120 us: 80 us
    # and 50 m/s (c = 3e8, taken out here by counting in delay and in units of λ).
    assert ambiguity.fold_range(200.0, 100.0) == 0.0
    assert ambiguity.fold_range(200.0, 120.0) == 80.0
    assert ambiguity.fold_speed(300.0, 150.0) == 0.0
    assert ambiguity.fold_speed(300.0, 125.0) == 50.0
