"""Where a stagger's response crosses a level and dips: against a fine grid of the response itself."""

import math

import numpy as np
import pytest
from hypothesis import assume, example, given
from hypothesis import strategies as st

from pycore.crossings import clear_speeds, deepest_dip, first_fall, first_notch, first_peak, half_period
from pycore.response import binomial_weights, staggered_response

CLOCK_HZ, LAMBDA = 1e6, 0.1
ROUNDING_DB = 1e-6

cycles = st.lists(st.integers(700, 1500), min_size=1, max_size=6)
weightings = st.one_of(
    st.sampled_from([1, 2, 3]).map(binomial_weights),
    st.sampled_from([(1.0, 1.0, 0.5), (1.0, -1.0, -1.0, 1.0), (0.2, -0.9, 0.9, -0.2), (1.0, 0.0, -1.0)]),
)
levels = st.floats(-25.0, 3.0)


def a_response(pri_counts=(1000, 1200, 1080, 1240), weights=(1, -2, 1)):
    return staggered_response(pri_counts, CLOCK_HZ, weights, LAMBDA)


@given(cycles, weightings, levels, st.floats(-300.0, 200.0), st.floats(1.0, 300.0))
@example([1011, 1085], (1, -1), -16.0, 0.0, 48.0)  # a dip that one step spans
def test_clear_speeds_are_those_whose_response_is_high_enough(pri_counts, weights, least_db, low, wide):
    response = a_response(pri_counts, weights)
    limits = (low, low + wide)
    spans = clear_speeds(response, least_db, limits)
    grid = np.linspace(*limits, 400)
    inside = ((grid[:, None] >= spans.start) & (grid[:, None] <= spans.stop)).any(axis=1)
    high_enough = response.decibels(grid) >= least_db
    # where the two differ the grid has met an edge, or a dip or rise narrower than one bracketing step
    differ = np.flatnonzero(inside != high_enough)
    odd, runs = grid[differ], np.split(differ, np.flatnonzero(np.diff(differ) > 1) + 1)
    slack = response.curvature * response.step_m_s**2 / 8.0
    assert np.all(np.abs(response.power(odd) - 10 ** (least_db / 10)) <= slack)
    assert max(np.ptp(grid[run]) if run.size else 0.0 for run in runs) <= response.step_m_s


@given(cycles, weightings, levels, st.floats(-300.0, 200.0), st.floats(1.0, 300.0))
def test_clear_speeds_rise_do_not_overlap_and_stay_on_the_axis(pri_counts, weights, least_db, low, wide):
    spans = clear_speeds(a_response(pri_counts, weights), least_db, (low, low + wide))
    assert not spans.prf.any()
    assert np.all(spans.start < spans.stop)
    assert np.all(spans.stop[:-1] <= spans.start[1:] + 1e-11)
    assert np.all((spans.start >= low) & (spans.stop <= low + wide))


@given(cycles, weightings, levels)
def test_clear_speeds_are_even(pri_counts, weights, least_db):
    response = a_response(pri_counts, weights)
    ahead, astern = (clear_speeds(response, least_db, limits) for limits in ((0.0, 137.0), (-137.0, 0.0)))
    np.testing.assert_allclose(ahead.start, -astern.stop[::-1], atol=1e-9)
    np.testing.assert_allclose(ahead.stop, -astern.start[::-1], atol=1e-9)


def test_beyond_half_a_period_clear_speeds_are_its_mirror_image_and_repeat():
    response = a_response((40, 50), (1, -1))  # common divisor 10 counts: repeats with 5000 m/s
    assert half_period(response) == pytest.approx(2500.0)
    near = clear_speeds(response, -10.0, (0.0, 2500.0))
    far = clear_speeds(response, -10.0, (10_000.0, 12_500.0))
    mirrored = clear_speeds(response, -10.0, (2500.0, 5000.0))
    np.testing.assert_allclose(far.start - 10_000.0, near.start, atol=1e-8)
    np.testing.assert_allclose(5000.0 - mirrored.stop[::-1], near.start, atol=1e-8)


@given(cycles, st.sampled_from([1, 2, 3]), st.floats(-25.0, -3.0))
def test_the_notch_around_zero_ends_where_the_response_first_reaches_the_level(pri_counts, delays, least_db):
    response = a_response(pri_counts, binomial_weights(delays))
    notch = first_notch(response, least_db, math.inf)
    assume(math.isfinite(notch))
    assert response.decibels(notch) == pytest.approx(least_db, abs=ROUNDING_DB)
    assert np.all(response.decibels(np.linspace(0.0, notch, 50)[:-1]) < least_db)


@given(cycles, st.sampled_from([1, 2, 3]), st.floats(-25.0, -3.0))
def test_the_first_fall_is_where_the_response_comes_down_through_the_level(pri_counts, delays, least_db):
    response = a_response(pri_counts, binomial_weights(delays))
    notch = first_notch(response, least_db, 500.0)
    assume(math.isfinite(notch))
    fall = first_fall(response, least_db, notch, 500.0)
    between = np.linspace(notch, min(fall, 500.0), 200)[1:-1]
    slack = response.curvature * response.step_m_s**2 / 8.0
    assert np.all(response.power(between) >= 10 ** (least_db / 10) - slack)
    if math.isfinite(fall):
        assert response.decibels(fall) == pytest.approx(least_db, abs=1e-4)
        assert response.power(fall * (1 + 1e-9)) <= response.power(fall)


def test_a_constant_prf_falls_where_its_blind_speed_comes_near():
    # 1000 us at 0.1 m: blind at 50 m/s; one delay, 2 sin²: -10 dB is at asin(√0.05)/π of it
    response, edge = a_response((1000,), (1, -1)), math.asin(math.sqrt(0.05)) / math.pi * 50.0
    notch = first_notch(response, -10.0, 1e3)
    assert notch == pytest.approx(edge, rel=1e-12)
    assert first_fall(response, -10.0, notch, 1e3) == pytest.approx(50.0 - edge, rel=1e-12)


def test_a_level_that_is_never_reached_has_no_notch_edge():
    response = a_response((1000,), (1, -1))
    assert first_notch(response, 3.5, 1e3) == math.inf
    assert clear_speeds(response, 3.5, (0.0, 500.0)).start.size == 0


def test_weights_that_pass_what_stands_still_have_no_notch_around_zero():
    response = a_response((1000,), (1.0, 1.0))
    assert first_notch(response, -10.0, 1e3) == 0.0
    fall = first_fall(response, -10.0, 0.0, 1e3)
    assert fall == pytest.approx(25.0 - math.asin(math.sqrt(0.05)) / math.pi * 50.0, rel=1e-12)


@given(cycles, weightings, st.floats(0.0, 200.0), st.floats(1.0, 400.0))
def test_no_speed_of_the_interval_is_deeper_than_the_deepest_dip(pri_counts, weights, low, wide):
    response = a_response(pri_counts, weights)
    depth_db, at = deepest_dip(response, low, low + wide)
    deepest = 10 ** (depth_db / 10)
    assert low <= at <= low + wide
    assert response.power(at) == pytest.approx(deepest, abs=1e-12)
    assert response.power(np.linspace(low, low + wide, 3000)).min() >= deepest - 1e-9


def test_the_deepest_dip_is_told_at_the_lowest_speed_where_it_occurs():
    response = a_response((1000,), (1, -1))  # nulls at 50, 100, 150 m/s
    depth_db, at = deepest_dip(response, 20.0, 170.0)
    assert at == pytest.approx(50.0, abs=1e-4)  # thirds of a flat valley
    assert depth_db < -140.0


def test_an_empty_interval_has_no_dip():
    assert all(math.isnan(value) for value in deepest_dip(a_response(), 3.0, 2.0))


def test_an_interval_without_length_dips_where_it_is():
    depth_db, at = deepest_dip(a_response(), 30.0, 30.0)
    assert at == 30.0
    assert depth_db == pytest.approx(a_response().decibels(30.0))


def test_the_first_peak_of_a_constant_prf_is_half_its_blind_speed():
    response = a_response((1000,), (1, -1))
    assert first_peak(response, 5.0, 1e3) == pytest.approx(25.0, abs=response.step_m_s)
    assert first_peak(response, 5.0, 10.0) == 10.0
