"""The visible share is exact: held against grids, polygons and its own laws."""

import numpy as np
import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from pycore import sight
from pycore.floor import floor_share
from pycore.patterns import clear_lengths, exactly, lengths, over_supersets, sweep
from pycore.spans import Spans
from pycore.visibility import (
    Piece,
    pattern_shares,
    pattern_shares_of_pieces,
    share_by_count,
    share_if_one_lost,
    visible,
    visible_share,
)

# Areas from two exact ways of adding up the same rectangles, on a unit square.
ROUNDING = 1e-12
# The area that one edge may move, since edges closer than this part of the axis are one.
ONE_EDGE = 1e-9


def sweeps(seen):
    return sweep(seen.ranges, seen.range_m), sweep(seen.speeds, seen.speed_m_s)


def without(spans, lost):
    keep = spans.prf != lost
    prf = spans.prf[keep]
    return Spans(prf - (prf > lost), spans.start[keep], spans.stop[keep])


def share_of(seen, m, lost=None):
    ranges, speeds, n = seen.ranges, seen.speeds, seen.n
    if lost is not None:
        ranges, speeds, n = without(ranges, lost), without(speeds, lost), n - 1
    return visible_share(ranges, speeds, n, m, seen.range_m, seen.speed_m_s)


@settings(max_examples=40, deadline=None)
@given(data=st.data())
def test_the_exact_share_is_a_fine_grids_within_the_grids_own_error(plain, data):
    plan = data.draw(plain.plans())
    cells = 700
    at = (np.arange(cells) + 0.5) / cells
    ranges = plan.range_m[0] + np.ptp(plan.range_m) * at
    speeds = plan.speed_m_s[0] + np.ptp(plan.speed_m_s) * at
    on_range, on_speed = plain.clear_at(plan, ranges, speeds)
    count = sum(np.multiply.outer(a, b).astype(np.int8) for a, b in zip(on_range, on_speed, strict=True))
    seen = plain.sight(plan)
    # Every edge crosses one row or column of cells and misjudges at most half of each.
    edges = sum(swept.edges.size for swept in sweeps(seen))
    assert share_of(seen, plan.m) == pytest.approx((count >= plan.m).mean(), abs=0.5 * edges / cells)


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_the_exact_share_is_the_area_of_polygons(plain, polygons, data):
    seen = plain.sight(data.draw(plain.plans(most_intervals=2.5)))
    edges = sum(swept.edges.size for swept in sweeps(seen))
    assert sight.share(seen) == pytest.approx(polygons.seen(seen).area, abs=ROUNDING * edges + ONE_EDGE)


@settings(max_examples=40, deadline=None)
@given(data=st.data())
def test_the_floor_is_the_area_that_polygons_of_endless_intervals_leave(plain, polygons, data):
    plan = data.draw(plain.plans())
    seen = plain.sight(plan)
    expected = 1.0 - polygons.seen_by_any_plan(seen).area
    assert sight.floor(seen) == pytest.approx(expected, abs=ONE_EDGE)
    by_arrays = floor_share(plan.first_opening_m, plan.notch_m_s, plan.m, plan.range_m, plan.speed_m_s)
    assert by_arrays == sight.floor(seen)


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_a_plan_never_sees_more_than_the_floor_leaves(plain, data):
    seen = plain.sight(data.draw(plain.plans()))
    assert sight.share(seen) <= 1.0 - sight.floor(seen) + ONE_EDGE


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_adding_a_prf_never_lowers_the_visible_share_at_the_same_m(plain, data):
    seen = plain.sight(data.draw(plain.plans()))
    assume(seen.n > 1)
    m = data.draw(st.integers(1, seen.n - 1))
    added = data.draw(st.integers(0, seen.n - 1))
    assert share_of(seen, m) >= share_of(seen, m, lost=added) - ONE_EDGE


@settings(max_examples=40, deadline=None)
@given(data=st.data())
def test_raising_m_never_raises_the_visible_share(plain, data):
    seen = plain.sight(data.draw(plain.plans()))
    shares = [share_of(seen, m) for m in range(1, seen.n + 1)]
    assert all(np.diff(shares) <= ROUNDING)


@settings(max_examples=40, deadline=None)
@given(data=st.data())
def test_shares_by_count_add_up_to_the_coverage_and_from_m_on_to_the_visible_share(plain, data):
    seen = plain.sight(data.draw(plain.plans()))
    found = visible(pattern_shares(*sweeps(seen), seen.n), seen.n, seen.m)
    assert found.by_count.size == seen.n + 1
    assert found.by_count.sum() == pytest.approx(1.0, abs=ROUNDING)
    assert found.by_count[seen.m :].sum() == pytest.approx(found.share, abs=ROUNDING)


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_the_quick_share_is_the_share_of_the_sweeps(plain, data):
    seen = plain.sight(data.draw(plain.plans()))
    swept = visible(pattern_shares(*sweeps(seen), seen.n), seen.n, seen.m)
    edges = sum(axis.edges.size for axis in sweeps(seen))
    assert sight.share(seen) == pytest.approx(swept.share, abs=edges * ONE_EDGE)


@settings(max_examples=40, deadline=None)
@given(data=st.data())
def test_the_share_with_one_lost_is_the_worst_of_all_plans_with_one_taken_away(plain, data):
    seen = plain.sight(data.draw(plain.plans(most_prfs=8)))
    lost = share_if_one_lost(pattern_shares(*sweeps(seen), seen.n), seen.n, seen.m)
    worst = min(share_of(seen, seen.m, lost=prf) for prf in range(seen.n)) if seen.n > seen.m else 0.0
    assert lost == pytest.approx(worst, abs=seen.n * ONE_EDGE)


def test_losing_a_prf_when_all_are_needed_leaves_nothing():
    assert share_if_one_lost(np.full(4, 0.25), 2, 2) == 0.0


@settings(max_examples=40, deadline=None)
@given(data=st.data())
def test_pieces_of_range_with_the_same_speeds_give_the_whole(plain, data):
    seen = plain.sight(data.draw(plain.plans(most_prfs=8)))
    cuts = sorted(data.draw(st.lists(st.floats(*seen.range_m), max_size=4)))
    ends = [seen.range_m[0], *cuts, seen.range_m[1]]
    again = Spans(seen.speeds.prf, seen.speeds.start, seen.speeds.stop)
    pieces = [
        Piece((a, b), data.draw(st.sampled_from([seen.speeds, again]))) for a, b in zip(ends, ends[1:], strict=False)
    ]
    whole = pattern_shares(*sweeps(seen), seen.n)
    parts = pattern_shares_of_pieces(sweeps(seen)[0], pieces, seen.speed_m_s, seen.n)
    assert parts == pytest.approx(whole, abs=ROUNDING)


@settings(max_examples=30, deadline=None)
@given(data=st.data())
def test_pieces_with_speeds_of_their_own_add_up_to_the_shares_of_each_alone(plain, data):
    near, far = data.draw(plain.plans(most_prfs=5)), data.draw(plain.plans(most_prfs=5))
    n, one = near.n, plain.sight(near)
    other = sight.cut(plain.sight(far).speeds, near.speed_m_s)
    other = Spans(other.prf[other.prf < n], other.start[other.prf < n], other.stop[other.prf < n])
    middle = sum(near.range_m) / 2
    pieces = [Piece((near.range_m[0], middle), one.speeds), Piece((middle, near.range_m[1]), other)]
    table = pattern_shares_of_pieces(sweep(one.ranges, near.range_m), pieces, near.speed_m_s, n)
    halves = 0.0
    for piece in pieces:
        ranges = sight.cut(one.ranges, piece.range_m)
        halves += 0.5 * visible_share(ranges, piece.speeds, n, near.m, piece.range_m, near.speed_m_s)
    assert share_by_count(table, n)[near.m :].sum() == pytest.approx(halves, abs=20 * ONE_EDGE)


@pytest.mark.parametrize('n', [1, 2, 3, 4, 5, 8, 9, 13])
def test_sums_over_supersets_are_what_they_say(n):
    table = np.random.default_rng(n).random(1 << n)
    sets = np.arange(1 << n)
    chosen = np.random.default_rng(1).choice(1 << n, size=min(1 << n, 64), replace=False)
    expected = [table[(sets & one) == one].sum() for one in chosen]
    assert over_supersets(table, n)[chosen] == pytest.approx(expected, rel=1e-12)


@pytest.mark.parametrize('n', [1, 2, 3, 4, 5, 8, 9, 13, 16])
def test_the_inversion_over_supersets_gives_back_the_table(n):
    table = np.random.default_rng(n).random((2, 1 << n))
    assert exactly(over_supersets(table, n), n) == pytest.approx(table, abs=1e-9)


def test_at_sixteen_prfs_the_inversion_agrees_with_adding_up_every_cell(plain):
    pri_s = np.array([51, 53, 57, 60, 63, 67, 71, 73, 77, 80, 84, 87, 89, 91, 93, 97]) * 1e-6
    each = np.ones(16)
    plan = plain.Plan(pri_s, 1e-6 * each, 0.03 * each, 17 * each, 1e-5, 0.0, 0.5, 5, (0.0, 185200.0), (0.0, 1500.0))
    seen = plain.sight(plan)
    ranges, speeds = sweeps(seen)
    count = np.bitwise_count(ranges.pattern[:, None] & speeds.pattern)
    area = np.multiply.outer(np.diff(ranges.edges) / 185200.0, np.diff(speeds.edges) / 1500.0)
    direct = np.bincount(count.ravel(), area.ravel(), 17)
    # Rounding of 65 536 signed terms; plain inclusion and exclusion would err by some 1e-11.
    assert share_by_count(pattern_shares(ranges, speeds, 16), 16) == pytest.approx(direct, abs=2e-13)


def test_edges_closer_than_a_billionth_of_the_axis_are_one_edge():
    spans = Spans(np.array([0, 1, 1]), np.array([0.0, 4e-10, 5.0]), np.array([4.0, 4.0 + 5e-10, 10.0]))
    swept = sweep(spans, (0.0, 10.0))
    assert swept.pattern.tolist() == [3, 0, 2]
    assert swept.edges == pytest.approx([0.0, 4.0, 5.0, 10.0], abs=2e-9)


def test_a_prf_that_is_never_clear_and_one_that_always_is_are_told_apart():
    swept = sweep(Spans(np.array([1]), np.array([2.0]), np.array([7.0])), (2.0, 7.0))
    assert lengths(swept, 2).tolist() == [0.0, 0.0, 1.0, 0.0]


def test_spans_of_one_prf_that_touch_do_not_carry_over_into_the_next_prf():
    swept = sweep(Spans(np.array([0, 0]), np.array([0.0, 3.0]), np.array([3.0, 8.0])), (0.0, 10.0))
    assert lengths(swept, 2).tolist() == pytest.approx([0.2, 0.8, 0.0, 0.0])


@pytest.mark.parametrize('overlap', [0.0, 1e-15, -1e-15])
def test_spans_of_the_last_prf_that_touch_keep_the_table_in_its_size(overlap):
    touching = Spans(np.array([1, 1]), np.array([0.0, 3.0 - overlap]), np.array([3.0, 8.0]))
    assert clear_lengths(touching, 2).tolist() == pytest.approx([0.0, 0.0, 8.0, 0.0])


def test_a_coverage_no_prf_sees_is_wholly_blind():
    none = Spans(np.array([], dtype=int), np.array([]), np.array([]))
    assert visible_share(none, none, 3, 1, (0.0, 1.0), (0.0, 1.0)) == 0.0


def test_two_prfs_by_hand():
    ranges = Spans(np.array([0, 1]), np.array([0.0, 5.0]), np.array([6.0, 10.0]))
    speeds = Spans(np.array([0, 1]), np.array([0.0, 1.0]), np.array([2.0, 4.0]))
    # PRF 0 sees 6 × 2 of 40, PRF 1 sees 5 × 3, both see 1 × 1.
    by_count = share_by_count(pattern_shares(sweep(ranges, (0, 10)), sweep(speeds, (0, 4)), 2), 2)
    assert by_count.tolist() == pytest.approx([14 / 40, 25 / 40, 1 / 40])
