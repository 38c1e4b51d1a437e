"""What no plan can see: the nearest ranges and the slowest speeds, and nothing else."""

import numpy as np
import pytest

from pycore.floor import floor_ranges, floor_share, floor_speeds

# Sums and products of a few numbers near one.
ROUNDING = 1e-14


def ends(spans):
    return list(zip(spans.prf.tolist(), spans.start.tolist(), spans.stop.tolist(), strict=True))


def test_the_floor_is_the_near_strip_and_the_notch_around_zero():
    share = floor_share(np.array([10.0]), np.array([2.0]), 1, (0.0, 100.0), (-10.0, 10.0))
    assert share == pytest.approx(1 - 0.9 * 0.8, abs=ROUNDING)


def test_of_two_prfs_the_later_opening_counts_when_both_are_needed():
    first, notch = np.array([10.0, 30.0]), np.array([2.0, 1.0])
    shares = [floor_share(first, notch, m, (0.0, 100.0), (0.0, 10.0)) for m in (1, 2)]
    # One of two: 90 × 8 and 70 × 9, both on 70 × 8, of 1000. Both: 70 × 8.
    assert shares == pytest.approx([1 - (720 + 630 - 560) / 1000, 1 - 560 / 1000], abs=ROUNDING)


def test_a_coverage_that_starts_beyond_opening_and_notch_has_no_floor():
    assert floor_share(np.array([10.0]), np.array([2.0]), 1, (10.0, 20.0), (2.0, 5.0)) == pytest.approx(0, abs=ROUNDING)


def test_a_coverage_within_the_first_opening_or_the_notch_is_all_floor():
    assert floor_share(np.array([10.0]), np.array([2.0]), 1, (0.0, 10.0), (5.0, 9.0)) == 1.0
    assert floor_share(np.array([10.0]), np.array([2.0]), 1, (20.0, 30.0), (-2.0, 2.0)) == 1.0


def test_an_opening_nearer_than_the_coverage_starts_with_it():
    assert ends(floor_ranges(np.array([5.0, 30.0]), (10.0, 20.0))) == [(0, 10.0, 20.0)]


def test_opening_speeds_count_below_the_notch_as_closing_ones_above():
    assert ends(floor_speeds(np.array([2.0, 9.0]), (-8.0, 5.0))) == [(0, -8.0, -2.0), (0, 2.0, 5.0)]


def test_a_near_pulse_brings_the_floor_nearer_as_far_as_it_serves():
    assert ends(floor_ranges(np.array([30.0]), (0.0, 100.0), 5.0, 20.0)) == [(0, 5.0, 20.0), (0, 30.0, 100.0)]
    assert ends(floor_ranges(np.array([30.0]), (0.0, 100.0), 5.0, 50.0)) == [(0, 5.0, 50.0), (0, 50.0, 100.0)]
    assert ends(floor_ranges(np.array([30.0]), (0.0, 40.0), 5.0, 50.0)) == [(0, 5.0, 40.0)]
