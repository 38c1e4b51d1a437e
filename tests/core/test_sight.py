"""A plan's sight of its coverage, of a region of it, and of the plan that the note opens with."""

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore import eclipsing, holes, sight, stagger, unseen
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.floor import floor_ranges, floor_speeds
from pycore.spans import Spans

# Percentages that are printed with two decimals.
LAST_FIGURE = 0.005e-2
ONE_EDGE = 1e-9


def s_band_pair(*pri_us):
    """The opening plan's radar and coverage: 2.8 GHz, 1 us, recovery 1 us, half received, notch 6 m/s, one of two."""
    pri_s, each, limits = np.array(pri_us) * 1e-6, np.ones(2), ((2e3, 110e3), (0.0, 300.0))
    blind_speed = SPEED_OF_LIGHT_M_S / 2.8e9 / (2 * pri_s)
    return sight.Sight(
        eclipsing.clear_ranges(pri_s, 1e-6 * each, 1e-6, 0.0, 0.5, limits[0]),
        stagger.notch_clear_speeds(blind_speed, 6.0 * each, limits[1]),
        floor_ranges(0.5 * SPEED_OF_LIGHT_M_S * 1.5e-6 * each, limits[0]),
        floor_speeds(6.0 * each, limits[1]),
        2, 1, *limits,
    )  # fmt: skip


FINAL_APPROACH = (4e3, 30e3), (40.0, 110.0)


def test_the_opening_plan_sees_96_54_percent_and_93_75_of_the_final_approach():
    seen = s_band_pair(980.0, 860.0)
    assert sight.share(seen) == pytest.approx(96.54e-2, abs=LAST_FIGURE)
    assert sight.share(sight.within(seen, *FINAL_APPROACH)) == pytest.approx(93.75e-2, abs=LAST_FIGURE)


def test_the_opening_plan_has_one_hole_where_both_prfs_are_blind():
    (hole,) = holes.holes(sight.within(s_band_pair(980.0, 860.0), *FINAL_APPROACH)).listed
    assert hole.speed_m_s == pytest.approx((56.25, 60.63), abs=0.005)
    assert hole.range_m == FINAL_APPROACH[0]


def test_the_opening_plan_never_sees_the_speeds_of_its_hole():
    (never,) = unseen.inbound(s_band_pair(980.0, 860.0)).never_m_s
    assert never == pytest.approx((56.25, 60.63), abs=0.005)


def test_735_and_881_us_see_all_that_any_plan_can():
    seen = s_band_pair(735.0, 881.0)
    assert sight.share(seen) == pytest.approx(98.00e-2, abs=LAST_FIGURE)
    assert sight.share(seen) == pytest.approx(1.0 - sight.floor(seen), abs=1e-14)
    assert holes.holes(seen).count == 0


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_the_projects_own_spans_are_those_of_the_plain_definition(plain, data):
    plan = data.draw(plain.plans())
    expected = plain.sight(plan)
    ranges = eclipsing.clear_ranges(
        plan.pri_s, plan.pulse_s, plan.recovery_s, plan.guard_s, plan.received_min, plan.range_m
    )
    speeds = stagger.notch_clear_speeds(plan.blind_speed_m_s, plan.notch_m_s, plan.speed_m_s)
    own = sight.Sight(
        ranges, speeds, expected.floor_ranges, expected.floor_speeds, plan.n, plan.m, plan.range_m, plan.speed_m_s
    )
    assert sight.share(own) == pytest.approx(sight.share(expected), abs=20 * ONE_EDGE)


def test_a_window_shorter_than_the_part_of_the_pulse_that_is_needed_is_never_clear():
    # Found by the test above: of 30 us, 0.58 us are open, and a quarter of 7.5 us is needed.
    clear = eclipsing.clear_ranges(np.array([30e-6]), np.array([7.5e-6]), 14.62e-6, 7.3e-6, 0.25, (0.0, 4500.0))
    assert clear.start.size == 0


def test_spans_are_cut_to_a_region_and_those_outside_it_left_out():
    spans = Spans(np.array([0, 0, 1]), np.array([0.0, 4.0, 8.0]), np.array([3.0, 6.0, 9.0]))
    part = sight.cut(spans, (2.0, 5.0))
    assert [part.prf.tolist(), part.start.tolist(), part.stop.tolist()] == [[0, 0], [2.0, 4.0], [3.0, 5.0]]


def test_the_share_of_a_coverage_is_made_of_the_shares_of_its_quarters():
    seen = s_band_pair(980.0, 860.0)
    quarters = [((2e3, 40e3), (40e3, 110e3)), ((0.0, 57.0), (57.0, 300.0))]
    whole = sum(sight.share(sight.within(seen, r, v)) * np.ptp(r) * np.ptp(v) for r in quarters[0] for v in quarters[1])
    assert whole / (108e3 * 300.0) == pytest.approx(sight.share(seen), abs=1e-12)


def test_touching_spans_of_one_prf_leave_no_edge_between_them():
    spans = Spans(np.array([0, 0]), np.array([0.0, 3.0]), np.array([3.0, 10.0]))
    whole = Spans(np.array([0]), np.array([0.0]), np.array([10.0]))
    seen = sight.Sight(spans, whole, whole, whole, 1, 1, (0.0, 10.0), (0.0, 10.0))
    ranges, _ = sight.sweeps_with_floor(seen)
    assert ranges.edges.tolist() == [0.0, 10.0]
    assert ranges.pattern.tolist() == [3]
