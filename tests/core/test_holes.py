"""Holes: the same regions that polygons make, with exact edges and areas that add up."""

import dataclasses
import itertools

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy import ndimage

from pycore import holes, sight
from pycore.spans import Spans

# Edges closer than this part of an axis are one edge.
ONE_EDGE = 1e-9


def blind_polygons(polygons, seen):
    """Parts of the floor's own sight that the plan does not see, joined where only rounding parts them."""
    blind = polygons.seen_by_any_plan(seen).difference(polygons.seen(seen))
    shrunk = blind.buffer(ONE_EDGE, join_style='mitre').buffer(-2 * ONE_EDGE, join_style='mitre')
    parts = [part for part in getattr(shrunk, 'geoms', [shrunk]) if not part.is_empty]
    return [part.buffer(ONE_EDGE, join_style='mitre') for part in parts]


def on_unit_square(hole, seen):
    (a, b), (c, d) = hole.range_m, hole.speed_m_s
    across, up = np.ptp(seen.range_m), np.ptp(seen.speed_m_s)
    return np.array([(a - seen.range_m[0]) / across, (c - seen.speed_m_s[0]) / up, (b - seen.range_m[0]) / across,
                     (d - seen.speed_m_s[0]) / up])  # fmt: skip


@settings(max_examples=80, deadline=None)
@given(data=st.data())
def test_areas_of_all_holes_add_up_to_what_the_floor_does_not_explain(plain, data):
    seen = plain.sight(data.draw(plain.plans()))
    found = holes.holes(seen)
    assert found.share == pytest.approx(1.0 - sight.share(seen) - sight.floor(seen), abs=10 * ONE_EDGE)
    if found.count <= holes.MOST_LISTED:
        assert sum(hole.share for hole in found.listed) == pytest.approx(found.share, abs=1e-12)


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_holes_are_the_connected_parts_of_the_blind_polygons(plain, polygons, data):
    seen = plain.sight(data.draw(plain.plans(most_prfs=8, most_intervals=2.0)))
    found, parts = holes.holes(seen), blind_polygons(polygons, seen)
    assert found.count == len(parts)
    parts.sort(key=lambda part: -part.area)
    assert [hole.share for hole in found.listed] == pytest.approx(
        [part.area for part in parts[: holes.MOST_LISTED]], abs=20 * ONE_EDGE
    )


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_the_extents_of_a_hole_are_the_bounds_of_its_polygon(plain, polygons, data):
    seen = plain.sight(data.draw(plain.plans(most_prfs=8, most_intervals=2.0)))
    bounds = np.array([part.bounds for part in blind_polygons(polygons, seen)]).reshape(-1, 4)
    for hole in holes.holes(seen).listed:
        assert np.abs(bounds - on_unit_square(hole, seen)).max(axis=1).min() < 10 * ONE_EDGE


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_largest_holes_come_first(plain, data):
    seen = plain.sight(data.draw(plain.plans()))
    shares = [hole.share for hole in holes.holes(seen).listed]
    assert all(later <= earlier + 1e-12 for earlier, later in itertools.pairwise(shares))


def drawn(*rows, range_edges=None, speed_edges=None):
    """A sight whose holes are the squares marked #: each row of range has a PRF of its own that sees the rest of it."""
    r = np.arange(len(rows) + 1.0) if range_edges is None else range_edges
    v = np.arange(len(rows[0]) + 1.0) if speed_edges is None else speed_edges
    n = len(rows)
    seen = [(i, j) for i, row in enumerate(rows) for j, mark in enumerate(row) if mark != '#']
    at = np.array(seen, dtype=int).reshape(-1, 2)
    every = np.arange(n)
    ranges = Spans(every, r[:-1], r[1:])
    speeds = Spans(at[:, 0], v[at[:, 1]], v[at[:, 1] + 1])
    floor = [Spans(every, np.full(n, axis[0]), np.full(n, axis[-1])) for axis in (r, v)]
    return sight.Sight(ranges, speeds, *floor, n, 1, (r[0], r[-1]), (v[0], v[-1]))


def test_two_blind_squares_that_share_a_corner_are_two_holes():
    found = holes.holes(drawn('#.', '.#'))
    assert [(hole.range_m, hole.speed_m_s, hole.share) for hole in found.listed] == [
        ((0.0, 1.0), (0.0, 1.0), 0.25),
        ((1.0, 2.0), (1.0, 2.0), 0.25),
    ]


def test_a_hole_around_the_corner_has_its_own_area_and_the_extents_of_the_whole():
    (hole,) = holes.holes(drawn('#..', '#..', '###')).listed
    assert (hole.range_m, hole.speed_m_s) == ((0.0, 3.0), (0.0, 3.0))
    assert hole.share == pytest.approx(5 / 9)


def test_no_hole_is_none_and_the_count_goes_on_beyond_the_fifty_listed():
    assert holes.holes(drawn('..', '..')) == holes.Holes((), 0, 0.0, None, None)
    chessboard = ['#.' * 8 if row % 2 else '.#' * 8 for row in range(16)]
    found = holes.holes(drawn(*chessboard))
    assert (len(found.listed), found.count) == (50, 128)


def test_a_hole_is_too_large_only_where_it_is_long_and_wide_in_the_same_place():
    around_the_corner = drawn('#...', '#...', '####')
    assert holes.holes(around_the_corner, 2.0, 2.0).too_large == 0
    assert holes.holes(around_the_corner, 2.0, 0.5).too_large == 1
    assert holes.holes(around_the_corner, 0.5, 3.0).worst.speed_m_s == (0.0, 4.0)


def test_a_hole_exactly_as_long_as_allowed_is_allowed():
    pillar = drawn('.#.', '.#.', '...')
    assert holes.holes(pillar, 2.0, None).too_large == 0
    assert holes.holes(pillar, 2.0 - 1e-6, None).too_large == 1


def test_without_any_limit_no_hole_is_judged():
    found = holes.holes(drawn('#.', '..'))
    assert (found.too_large, found.listed[0].too_large, found.worst) == (None, None, None)


def rectangle_fits(blind, long, wide, hole_m, hole_m_s):
    """Try every rectangle of cells, and return those that are too large."""
    rows, columns = blind.shape
    for a, b in itertools.combinations(range(rows + 1), 2):
        for c, d in itertools.combinations(range(columns + 1), 2):
            if blind[a:b, c:d].all() and long[b] - long[a] > hole_m and wide[d] - wide[c] > hole_m_s:
                yield a, c


@settings(max_examples=100, deadline=None)
@given(
    st.integers(1, 6).flatmap(
        lambda wide: st.lists(st.text('##.', min_size=wide, max_size=wide), min_size=1, max_size=6)
    ),
    st.sampled_from([None, 0.0, 0.7, 1.0, 1.6, 2.5]),
    st.sampled_from([None, 0.0, 0.7, 1.0, 1.6, 2.5]),
)
def test_the_holes_that_are_too_large_are_those_in_which_some_rectangle_is(rows, hole_m, hole_m_s):
    long = np.cumsum([0.0, 1.0, 0.6, 1.0, 1.5, 0.4, 1.0])[: len(rows) + 1]
    wide = np.cumsum([0.0, 0.6, 1.0, 1.0, 0.5, 1.5, 0.7])[: len(rows[0]) + 1]
    blind = np.array([[mark == '#' for mark in row] for row in rows])
    found = holes.holes(drawn(*rows, range_edges=long, speed_edges=wide), hole_m, hole_m_s)
    if hole_m is None and hole_m_s is None:
        assert found.too_large is None
        return
    where = ndimage.label(blind)[0]
    expected = {where[cell] for cell in rectangle_fits(blind, long, wide, (hole_m or 0) + 1e-8, (hole_m_s or 0) + 1e-8)}
    assert found.too_large == len(expected) == sum(hole.too_large for hole in found.listed)
    assert (found.worst is not None) == bool(expected)


@settings(max_examples=30, deadline=None)
@given(data=st.data())
def test_a_region_has_the_holes_of_the_coverage_cut_to_it(plain, data):
    seen = plain.sight(data.draw(plain.plans(most_prfs=6)))
    part = [sorted((data.draw(st.floats(0, 0.45)), data.draw(st.floats(0.55, 1)))) for _ in range(2)]
    ranges, speeds = (
        tuple(axis[0] + np.ptp(axis) * np.array(ends))
        for axis, ends in zip((seen.range_m, seen.speed_m_s), part, strict=True)
    )
    region = sight.within(seen, ranges, speeds)
    assert holes.holes(region).share == pytest.approx(1.0 - sight.share(region) - sight.floor(region), abs=1e-8)
    for hole in holes.holes(region).listed:
        assert ranges[0] <= hole.range_m[0] < hole.range_m[1] <= ranges[1]
        assert speeds[0] <= hole.speed_m_s[0] < hole.speed_m_s[1] <= speeds[1]


def test_counting_in_32_bits_as_a_browsers_engine_does_gives_the_same_holes(plain):
    each = np.ones(16)
    pri_s = np.array([51, 53, 57, 60, 63, 67, 71, 73, 77, 80, 84, 87, 89, 91, 93, 97]) * 1e-6
    plan = plain.Plan(pri_s, 1e-6 * each, 0.03 * each, 17 * each, 1e-5, 0.0, 0.5, 7, (0.0, 185200.0), (0.0, 1500.0))
    seen = plain.sight(plan)
    names = ('ranges', 'speeds', 'floor_ranges', 'floor_speeds')
    narrow = {
        name: Spans(spans.prf.astype(np.int32), spans.start, spans.stop)
        for name, spans in ((name, getattr(seen, name)) for name in names)
    }
    assert holes.holes(dataclasses.replace(seen, **narrow)) == holes.holes(seen)
