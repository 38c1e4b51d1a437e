"""Time out of sight: never longer at any speed tried, and reached at the speed named."""

import itertools
from math import inf, isnan, nan

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore import sight, unseen
from pycore.floor import floor_ranges, floor_speeds
from pycore.spans import Spans

# A speed just off an edge that keeps its side of it, as part of the speed axis.
JUST_OFF = 1e-7


def longest_hidden(plan, seen, speed_m_s):
    """Walk along the range axis at one speed, from edge to edge."""
    on_speed = plan_clear_in_speed(seen, speed_m_s)
    edges = np.unique(np.concatenate((seen.range_m, seen.ranges.start, seen.ranges.stop)))
    longest = here = 0.0
    for a, b in itertools.pairwise(edges):
        middle, clear = (a + b) / 2, 0
        for prf in on_speed:
            start, stop = seen.ranges.of(prf)
            clear += bool(((start < middle) & (middle < stop)).any())
        here = 0.0 if clear >= plan.m and b - a > 1e-9 * np.ptp(seen.range_m) else here + b - a
        longest = max(longest, here)
    return longest


def plan_clear_in_speed(seen, speed_m_s):
    return [prf for prf in range(seen.n) if any(a <= speed_m_s <= b for a, b in zip(*seen.speeds.of(prf), strict=True))]


def outside_floor(plan, speed_m_s):
    """Some range is far enough, and the speed fast enough, on M PRFs."""
    return sum((abs(speed_m_s) >= plan.notch_m_s) & (plan.first_opening_m < plan.range_m[1])) >= plan.m


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_no_speed_stays_out_of_sight_longer_than_the_worst(plain, data):
    plan = data.draw(plain.plans(most_prfs=6, most_intervals=2.0))
    seen = plain.sight(plan)
    worst = unseen.inbound(seen)
    off = JUST_OFF * np.ptp(seen.speed_m_s)
    edges = np.concatenate((seen.speeds.start, seen.speeds.stop))
    tried = np.concatenate((edges - off, edges + off, np.linspace(*seen.speed_m_s, 23)[1:-1]))
    for speed in tried[(tried > seen.speed_m_s[0]) & (tried < seen.speed_m_s[1]) & (np.abs(tried) > off)]:
        if outside_floor(plan, speed):
            time = longest_hidden(plan, seen, speed) / abs(speed)
            assert time <= worst.time_s * (1 + 1e-6) + 1e-9


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_the_worst_time_is_reached_at_the_speed_and_ranges_named(plain, data):
    plan = data.draw(plain.plans(most_prfs=6, most_intervals=2.0))
    seen = plain.sight(plan)
    worst = unseen.inbound(seen)
    if isnan(worst.time_s):
        middles = np.linspace(*seen.speed_m_s, 301)
        assert not any(outside_floor(plan, speed) for speed in middles[1:-1])
    elif 0 < worst.time_s < inf:
        assert np.ptp(worst.range_m) == pytest.approx(worst.time_s * abs(worst.at_m_s), rel=1e-9)
        outwards = worst.at_m_s + np.sign(worst.at_m_s) * JUST_OFF * np.ptp(seen.speed_m_s)
        assert longest_hidden(plan, seen, outwards) == pytest.approx(np.ptp(worst.range_m), rel=1e-6)
        assert worst.never == (np.ptp(worst.range_m) == np.ptp(seen.range_m))


def one_prf(ranges, speeds, range_m=(0.0, 100.0), speed_m_s=(-10.0, 10.0), notch_m_s=1.0):
    """A sight of one PRF from (start, stop) pairs, with a floor of one notch about zero."""
    every = [Spans(np.zeros(len(part), dtype=int), *np.array(part, dtype=float).T) for part in (ranges, speeds)]
    floor = floor_ranges(np.zeros(1), range_m), floor_speeds(np.array([notch_m_s]), speed_m_s)
    return sight.Sight(*every, *floor, 1, 1, range_m, speed_m_s)


def test_an_inbound_target_is_out_of_sight_for_the_interval_over_its_speed():
    worst = unseen.inbound(one_prf([(0, 40), (70, 100)], [(1, 10), (-10, -1)]))
    assert (worst.time_s, worst.at_m_s, worst.range_m, worst.never) == (30.0, 1.0, (40.0, 70.0), False)


def test_an_outbound_target_counts_with_its_speed_turned_positive():
    worst = unseen.inbound(one_prf([(0, 40), (70, 100)], [(-10, -2)], speed_m_s=(-10.0, -2.0)))
    assert (worst.time_s, worst.at_m_s) == (15.0, -2.0)


def test_a_speed_that_is_seen_at_no_range_takes_the_whole_coverage():
    worst = unseen.inbound(one_prf([(0, 40), (45, 100)], [(1, 4), (5, 10), (-10, -1)]))
    assert (worst.time_s, worst.at_m_s, worst.never) == (25.0, 4.0, True)
    assert worst.never_m_s == ((4.0, 5.0),)


def test_speeds_never_seen_are_one_interval_whichever_prf_is_blind_in_its_parts():
    whole = Spans(np.array([0, 1]), np.array([0.0, 0.0]), np.array([100.0, 100.0]))
    speeds = Spans(np.array([0, 0, 1, 1]), np.array([1.0, 5.0, 1.0, 7.0]), np.array([4.0, 10.0, 5.0, 10.0]))
    floor = floor_ranges(np.zeros(2), (0.0, 100.0)), floor_speeds(np.ones(2), (0.0, 10.0))
    seen = sight.Sight(whole, speeds, *floor, 2, 2, (0.0, 100.0), (0.0, 10.0))
    assert unseen.inbound(seen).never_m_s == ((4.0, 7.0),)


def test_a_slow_target_can_be_hidden_longer_than_one_that_is_never_seen():
    worst = unseen.inbound(one_prf([(0, 40), (90, 100)], [(1, 4), (5, 10), (-10, -1)]))
    assert (worst.time_s, worst.at_m_s, worst.never) == (50.0, 1.0, False)
    assert worst.never_m_s == ((4.0, 5.0),)


def test_speeds_within_the_notch_around_zero_are_not_held_against_the_plan():
    worst = unseen.inbound(one_prf([(0, 100)], [(1, 10), (-10, -1)]))
    assert (worst.time_s, worst.never, worst.never_m_s) == (0.0, False, ())
    assert all(isnan(end) for end in worst.range_m)


def test_where_every_wanted_speed_is_in_the_floor_there_is_no_answer():
    worst = unseen.inbound(one_prf([(0, 100)], [(0.0, 0.5)], speed_m_s=(-0.5, 0.5)))
    assert isnan(worst.time_s)
    assert not worst.never


def test_without_a_notch_a_target_at_rest_in_an_eclipsed_range_is_hidden_for_ever():
    worst = unseen.inbound(one_prf([(0, 40), (70, 100)], [(-10, 10)], notch_m_s=0.0))
    assert (worst.time_s, worst.at_m_s) == (inf, 0.0)
    hardly_moving = one_prf([(0, 40), (70, 100)], [(1e-320, 10)], speed_m_s=(1e-320, 10.0), notch_m_s=0.0)
    assert unseen.inbound(hardly_moving).time_s == inf


def test_the_hidden_ranges_of_one_speed_are_given_with_their_edges():
    seen = one_prf([(0, 40), (70, 100)], [(1, 4), (5, 10)])
    assert unseen.hidden_ranges(seen, 3.0).tolist() == [[40.0, 70.0]]
    assert unseen.hidden_ranges(seen, 4.5).tolist() == [[0.0, 100.0]]


# Half a hundredth of a second, the last figure printed for the worked case.
LAST_FIGURE_S = 0.005
ANYWHERE = (0.0, 1e6)


def test_a_crossing_target_at_80_m_s_and_20_km_is_in_a_notch_of_8_m_s_for_50_25_s():
    assert unseen.crossing(80.0, 20e3, [8.0], 1, ANYWHERE) == pytest.approx(50.25, abs=LAST_FIGURE_S)


@settings(max_examples=50, deadline=None)
@given(
    st.floats(20, 900), st.floats(1e3, 9e4), st.floats(0.5, 60), st.sampled_from([(0.0, 1e5), (3e4, 6e4), (5e3, 2e4)])
)
def test_a_crossing_lasts_as_long_as_a_target_followed_along_its_track(speed, distance, notch, range_m):
    if speed <= notch * 1.05:
        assert unseen.crossing(notch, distance, [notch], 1, (0.0, 1e5)) == (inf if distance < 1e5 else 0.0)
        return
    expected = unseen.crossing(speed, distance, [notch], 1, range_m)
    time = np.linspace(0, 1e5 / speed, 200_001)
    reach = np.hypot(distance, speed * time)
    hidden = (speed**2 * time / reach < notch) & (reach >= range_m[0]) & (reach <= range_m[1])
    step = time[1]
    # Seen from the closest point on; the other half is its mirror image, one piece with it if that point counts.
    assert hidden.sum() * step * (2 if distance >= range_m[0] else 1) == pytest.approx(expected, abs=4 * step)


def test_with_a_notch_for_each_prf_the_m_th_smallest_decides():
    notches = [9.0, 3.0, 5.0]
    times = [unseen.crossing(80.0, 20e3, notches, m, ANYWHERE) for m in (1, 2, 3)]
    assert times == [unseen.crossing(80.0, 20e3, [notch], 1, ANYWHERE) for notch in (3.0, 5.0, 9.0)]


def test_a_crossing_outside_the_coverage_costs_nothing_and_without_a_notch_none_does():
    assert unseen.crossing(80.0, 20e3, [8.0], 1, (0.0, 20e3)) == 0.0
    assert unseen.crossing(80.0, 20e3, [0.0], 1, ANYWHERE) == 0.0


def test_a_time_out_of_sight_is_told_in_scans_where_the_antenna_turns():
    assert unseen.scans(50.0, 5.0) == 10.0
    assert unseen.scans(50.0, None) is None
    assert isnan(unseen.scans(nan, 5.0))
