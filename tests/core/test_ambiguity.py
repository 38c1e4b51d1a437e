"""What one PRF confuses: folding stays inside its interval for every float, and whole intervals change nothing."""

import math
from fractions import Fraction

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore import ambiguity
from pycore.constants import SPEED_OF_LIGHT_M_S

WAVELENGTH_M = 0.1
ROUNDING = 1e-12  # of a product of a few floats

spans = st.floats(1e-3, 1e7)


@st.composite
def near_an_edge(draw):
    """An interval and a value a few floats away from a multiple of half of it, or anywhere."""
    span = draw(spans)
    if draw(st.booleans()):
        return span, draw(st.floats(-1e3, 1e3)) * span
    value = draw(st.integers(-40, 40)) * span / 2.0
    steps, toward = draw(st.integers(0, 4)), draw(st.sampled_from([-math.inf, math.inf]))
    for _ in range(steps):
        value = math.nextafter(value, toward)
    return span, value


@given(near_an_edge())
def test_an_apparent_speed_stays_in_its_half_open_interval_and_a_whole_number_of_folds_away(drawn):
    span, speed = drawn
    apparent = ambiguity.fold_speed(speed, span)
    assert -span / 2.0 <= apparent < span / 2.0
    assert ((Fraction(speed) - Fraction(float(apparent))) / Fraction(span)).denominator == 1


@given(near_an_edge())
def test_an_apparent_range_stays_in_its_half_open_interval(drawn):
    span, range_m = drawn
    apparent = ambiguity.fold_range(range_m, span)
    assert 0.0 <= apparent < span
    if range_m >= 0:
        assert ((Fraction(range_m) - Fraction(float(apparent))) / Fraction(span)).denominator == 1


def test_the_floats_that_a_plain_remainder_gets_wrong():
    assert ambiguity.fold_range(-1e-20, 150e3) == 0.0
    assert ambiguity.fold_speed(-1e-20, 60.0) == -1e-20
    assert ambiguity.fold_speed(math.nextafter(-30.0, -31.0), 60.0) == math.nextafter(30.0, 0.0)
    assert ambiguity.fold_speed(30.0, 60.0) == ambiguity.fold_speed(-30.0, 60.0) == -30.0


@given(st.floats(0.0, 0.999), st.integers(0, 50), st.integers(1, 10_000))
def test_moving_a_target_by_whole_intervals_leaves_its_apparent_range_and_counts_its_pulses(part, trips, counts):
    reach = float(ambiguity.unambiguous_range(counts * 1e-6))
    range_m = (part + trips) * reach
    apparent = ambiguity.fold_range(range_m, reach)
    off = abs(apparent - part * reach)
    assert min(off, reach - off) <= 60 * ROUNDING * reach
    assert ambiguity.pulses_since((trips + 0.5) * reach, reach) == trips


def test_arrays_are_folded_as_their_elements_are():
    speeds, spans_m_s = np.linspace(-200.0, 200.0, 401), np.linspace(20.0, 80.0, 401)
    each = [ambiguity.fold_speed(v, s) for v, s in zip(speeds.tolist(), spans_m_s.tolist(), strict=True)]
    assert ambiguity.fold_speed(speeds, spans_m_s).tolist() == each
    ranges = np.abs(speeds) * 1e3
    each = [ambiguity.fold_range(r, s) for r, s in zip(ranges.tolist(), spans_m_s.tolist(), strict=True)]
    assert ambiguity.fold_range(ranges, spans_m_s).tolist() == each
    each = [ambiguity.pulses_since(r, s) for r, s in zip(ranges.tolist(), spans_m_s.tolist(), strict=True)]
    assert ambiguity.pulses_since(ranges, spans_m_s).tolist() == each


@given(st.floats(1e-6, 1e-1), st.floats(1e-3, 100.0))
def test_range_and_blind_speed_trade_along_one_line(pri_s, wavelength_m):
    product = ambiguity.unambiguous_range(pri_s) * ambiguity.first_blind_speed(pri_s, wavelength_m)
    assert product == pytest.approx(ambiguity.trade_product(wavelength_m), rel=ROUNDING)
    assert ambiguity.nyquist_speed(pri_s, wavelength_m) * 2.0 == ambiguity.first_blind_speed(pri_s, wavelength_m)


def test_a_shortfall_of_one_is_the_last_that_a_single_prf_can_serve():
    span = float(ambiguity.trade_product(WAVELENGTH_M)) / 100e3
    assert ambiguity.shortfall(100e3, span, WAVELENGTH_M) == pytest.approx(1.0, rel=ROUNDING)
    low, high = ambiguity.single_prf_interval(100e3, span * (1 - 1e-9), WAVELENGTH_M)
    assert low == pytest.approx(high, rel=1e-8)
    assert ambiguity.single_prf_interval(100e3, span * (1 + 1e-9), WAVELENGTH_M) is None


@given(st.floats(1e3, 50e3), st.floats(1.0, 500.0), st.floats(0.0, 1.0))
def test_every_prf_of_the_interval_is_unambiguous_and_none_beside_it(range_m, span_m_s, part):
    interval = ambiguity.single_prf_interval(range_m, span_m_s, WAVELENGTH_M)
    if interval is None:
        assert ambiguity.shortfall(range_m, span_m_s, WAVELENGTH_M) > 1.0
        return
    low, high = interval
    for prf_hz, expected in [(low + part * (high - low), 'clear'), (low * 0.999, 'low'), (high * 1.001, 'high')]:
        reach = ambiguity.unambiguous_range(1.0 / prf_hz) * (1 + ROUNDING)
        blind = ambiguity.first_blind_speed(1.0 / prf_hz, WAVELENGTH_M) * (1 + ROUNDING)
        regime = ambiguity.regime(reach, blind, range_m, span_m_s)
        assert regime == expected or (expected != 'clear' and regime == 'medium')


def test_a_single_prf_that_leaves_nothing_blind_keeps_notch_and_eclipsing_out_of_the_coverage():
    # 0.1 m, 10 km, 0..300 m/s, notch 10 m/s, half of 4 us and 1 us of guard: v_b = 310 m/s, R_u = 10.45 km.
    low, high = ambiguity.single_clear_prf_interval(10e3, (0.0, 300.0), WAVELENGTH_M, 10.0, 3e-6)
    assert low == pytest.approx(6200.0)
    assert high == pytest.approx(SPEED_OF_LIGHT_M_S / 2.0 / (10e3 + 449.688687))


def test_speeds_of_both_signs_ask_for_a_blind_speed_as_wide_as_their_span():
    low, _ = ambiguity.single_clear_prf_interval(5e3, (-300.0, 300.0), WAVELENGTH_M, 10.0, 0.0)
    assert low == pytest.approx(2 * 600.0 / WAVELENGTH_M)


@pytest.mark.parametrize(
    ('reach', 'blind', 'expected'), [(100, 40, 'low'), (99, 50, 'high'), (99, 49, 'medium'), (100, 50, 'clear')]
)
def test_the_regime_depends_on_the_coverage(reach, blind, expected):
    assert ambiguity.regime(reach, blind, 100, 50) == expected
