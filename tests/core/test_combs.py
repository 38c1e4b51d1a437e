"""Intervals that repeat, against plain loops over every period."""

import math

import numpy as np
from hypothesis import given
from hypothesis import strategies as st

from pycore.combs import repeated

ROUNDING = 1e-9  # of lengths of order 1000


@st.composite
def drawn_combs(draw):
    """Starts, stops and periods of 1 to 6 PRFs; some never clear, some clear over a whole period; and an axis."""
    n = draw(st.integers(1, 6))
    period = [draw(st.floats(0.5, 90.0)) for _ in range(n)]
    start = [draw(st.sampled_from([0.0, 0.25, 0.5, 1.5])) * p for p in period]
    length = [draw(st.sampled_from([-0.1, 0.0, 0.3, 0.5, 1.0])) * p for p in period]
    low = draw(st.one_of(st.floats(-200.0, 200.0), st.sampled_from([start[0], start[0] + length[0], period[0], 0.0])))
    high = low + draw(st.one_of(st.floats(0.01, 300.0), st.just(period[0])))
    return np.array(start), np.array(start) + np.array(length), np.array(period), (low, high)


def by_loops(start, stop, period, limits):
    """Every interval that has a part inside the limits, cut to them."""
    low, high = limits
    if stop <= start:
        return []
    first, last = math.floor((low - stop) / period) - 1, math.ceil((high - start) / period) + 1
    cut = [(max(start + k * period, low), min(stop + k * period, high)) for k in range(first, last + 1)]
    return [(a, b) for a, b in cut if a < b]


@given(drawn_combs())
def test_repeated_intervals_are_those_of_every_period_cut_to_the_axis(comb):
    start, stop, period, limits = comb
    found = repeated(start, stop, period, limits)
    for prf in range(period.size):
        expected = by_loops(start[prf], stop[prf], period[prf], limits)
        assert list(zip(*(ends.tolist() for ends in found.of(prf)), strict=True)) == expected


@given(drawn_combs())
def test_repeated_intervals_rise_within_each_prf_and_prfs_follow_each_other(comb):
    found = repeated(*comb)
    assert np.all(np.diff(found.prf) >= 0)
    same = np.diff(found.prf) == 0
    assert np.all(found.start[1:][same] >= found.stop[:-1][same] - ROUNDING)
    assert np.all(found.start < found.stop)


@given(drawn_combs(), st.integers(-50, 50))
def test_moving_the_axis_by_whole_periods_moves_the_intervals(comb, periods):
    start, stop, period, (low, high) = (*(values[:1] for values in comb[:3]), comb[3])
    here = repeated(start, stop, period, (low, high))
    shift = periods * period[0]
    there = repeated(start, stop, period, (low + shift, high + shift))
    # an interval thinner than rounding may come or go at the ends of the axis
    thick = [[(a, b) for a, b in zip(some.start, some.stop, strict=True) if b - a > ROUNDING] for some in (here, there)]
    np.testing.assert_allclose(np.array(thick[1]) - shift, np.array(thick[0]), atol=ROUNDING)


def test_no_prf_is_clear_where_its_interval_is_empty_or_backwards():
    found = repeated(np.array([1.0, 2.0]), np.array([1.0, 1.5]), np.array([3.0, 3.0]), (0.0, 30.0))
    assert found.prf.size == 0


def test_an_axis_without_length_has_no_intervals():
    assert repeated(np.array([0.0]), np.array([1.0]), np.array([2.0]), (0.5, 0.5)).prf.size == 0
