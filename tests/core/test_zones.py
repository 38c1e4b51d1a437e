"""The map for the eye tells at each cell's centre what is true there, and why."""

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore import zones
from pycore.spans import Spans
from pycore.visibility import Piece, visible_share


def away_from_edges(spans, at, limits):
    """Points at which a remainder and a multiple cannot disagree by rounding."""
    edges = np.concatenate((spans.start, spans.stop, limits))
    return np.abs(at[:, None] - edges).min(axis=1) > 1e-9 * np.ptp(limits)


@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_each_cell_counts_the_prfs_that_are_clear_at_its_centre(plain, data):
    plan = data.draw(plain.plans())
    seen = plain.sight(plan)
    ranges, speeds = zones.centres(plan.range_m, 61), zones.centres(plan.speed_m_s, 47)
    on_range, on_speed = plain.clear_at(plan, ranges, speeds)
    expected = np.einsum('nr,nv->vr', on_range.astype(int), on_speed.astype(int))
    cells = zones.count_map(seen.ranges, seen.speeds, ranges, speeds)
    assert (cells.dtype, cells.shape) == (np.uint8, (47, 61))
    sure = np.ix_(
        away_from_edges(seen.speeds, speeds, plan.speed_m_s), away_from_edges(seen.ranges, ranges, plan.range_m)
    )
    assert cells[sure].tolist() == expected[sure].tolist()


def test_cells_are_of_equal_width_and_sampled_in_their_middle():
    assert zones.centres((10.0, 20.0), 5).tolist() == [11.0, 13.0, 15.0, 17.0, 19.0]


def test_a_centre_exactly_on_an_edge_is_clear():
    spans = Spans(np.array([0, 0, 1]), np.array([1.0, 5.0, 3.0]), np.array([3.0, 7.0, 5.0]))
    marks = zones.clear_marks(spans, np.array([0.0, 1.0, 2.0, 3.0, 4.0, 5.0, 6.0, 7.0, 8.0]))
    assert (marks & 1).tolist() == [0, 1, 1, 1, 0, 1, 1, 1, 0]
    assert (marks >> 2 & 1).tolist() == [0, 0, 0, 1, 1, 1, 0, 0, 0]


def test_where_two_spans_of_one_prf_touch_it_is_clear_once():
    spans = Spans(np.array([0, 0]), np.array([0.0, 2.0]), np.array([2.0, 4.0]))
    assert zones.clear_marks(spans, np.array([1.0, 2.0, 3.0])).tolist() == [1, 1, 1]


def test_sixteen_prfs_that_are_all_clear_count_sixteen():
    spans = Spans(np.arange(16), np.zeros(16), np.ones(16))
    assert zones.count_map(spans, spans, np.array([0.5]), np.array([0.5])).tolist() == [[16]]


def test_a_fine_map_has_the_exact_visible_share_within_its_own_error(plain):
    each = np.ones(8)
    pri_s = np.array([51, 53, 60, 63, 67, 84, 89, 93]) * 1e-6
    plan = plain.Plan(pri_s, 1e-6 * each, 0.03 * each, 17 * each, 1e-5, 0.0, 0.5, 3, (0.0, 185200.0), (0.0, 1500.0))
    seen = plain.sight(plan)
    cells = zones.count_map(
        seen.ranges, seen.speeds, zones.centres(plan.range_m, 1500), zones.centres(plan.speed_m_s, 1500)
    )
    exact = visible_share(seen.ranges, seen.speeds, 8, 3, plan.range_m, plan.speed_m_s)
    assert (cells >= 3).mean() == pytest.approx(exact, abs=1e-3)


def test_a_map_of_pieces_takes_each_range_with_its_own_speeds():
    ranges = Spans(np.array([0]), np.array([0.0]), np.array([10.0]))
    slow, fast = (Spans(np.array([0]), np.array([a]), np.array([a + 5.0])) for a in (0.0, 5.0))
    pieces = [Piece((0.0, 4.0), slow), Piece((4.0, 8.0), fast)]
    cells = zones.count_map_of_pieces(ranges, pieces, np.array([1.0, 5.0, 9.0]), np.array([2.0, 8.0]))
    assert cells.tolist() == [[1, 0, 0], [0, 1, 0]]


@settings(max_examples=40, deadline=None)
@given(data=st.data())
def test_a_map_of_alike_pieces_is_the_plain_map(plain, data):
    seen = plain.sight(data.draw(plain.plans()))
    middle = data.draw(st.floats(*seen.range_m))
    pieces = [Piece((seen.range_m[0], middle), seen.speeds), Piece((middle, seen.range_m[1]), seen.speeds)]
    at = zones.centres(seen.range_m, 31), zones.centres(seen.speed_m_s, 29)
    assert (
        zones.count_map_of_pieces(seen.ranges, pieces, *at).tolist()
        == zones.count_map(seen.ranges, seen.speeds, *at).tolist()
    )


def asked(plain, plan, range_m, speed_m_s, with_clutter=None):
    seen = plain.sight(plan)
    return zones.why(seen.ranges, seen.speeds, plan.n, plan.range_m, plan.speed_m_s, range_m, speed_m_s, with_clutter)


@settings(max_examples=80, deadline=None)
@given(data=st.data())
def test_the_reasons_for_a_cell_are_those_of_its_count(plain, data):
    plan = data.draw(plain.plans())
    seen = plain.sight(plan)
    range_m, speed_m_s = data.draw(st.floats(*plan.range_m)), data.draw(st.floats(*plan.speed_m_s))
    answers = asked(plain, plan, range_m, speed_m_s)
    count = zones.count_map(seen.ranges, seen.speeds, np.array([range_m]), np.array([speed_m_s]))
    assert sum(answer.clear for answer in answers) == count[0, 0]
    for answer in answers:
        assert answer.clear == (not answer.reasons)
        assert ('eclipsed' in answer.reasons) != answer.range_m.clear
        assert ('notch' in answer.reasons) != answer.speed_m_s.clear


@settings(max_examples=80, deadline=None)
@given(data=st.data())
def test_the_stretch_about_a_point_reaches_to_the_next_edges_and_no_further(plain, data):
    plan = data.draw(plain.plans())
    spans, at = plain.sight(plan).ranges, data.draw(st.floats(*plan.range_m))
    for prf in range(plan.n):
        found = zones.stretch(spans, prf, plan.range_m, at)
        start, stop = spans.of(prf)
        assert found.start <= at <= found.stop
        assert found.clear == bool(((start <= at) & (at <= stop)).any())
        edges = np.concatenate((start, stop))
        if not found.clear:
            assert not ((found.start < edges) & (edges < found.stop)).any()
        assert found.start in (*edges, plan.range_m[0])
        assert found.stop in (*edges, plan.range_m[1])


def opening_pair(plain):
    """Two PRFs at 2.8 GHz with the notch at 6 m/s, as the opening plan has them."""
    each = np.ones(2)
    return plain.Plan(
        np.array([980e-6, 860e-6]), 1e-6 * each, 299_792_458.0 / 2.8e9 * each, 6 * each, 1e-6, 0.0, 0.5, 1,
        (2e3, 110e3), (0.0, 300.0),
    )  # fmt: skip


def test_a_speed_blind_on_both_prfs_says_in_which_notch_it_lies_on_each(plain):
    first, second = asked(plain, opening_pair(plain), 20e3, 58.0)
    assert first.reasons == second.reasons == ('notch',)
    # v_b is 54.63 and 62.25 m/s; six on either side of each.
    assert (first.speed_m_s.start, first.speed_m_s.stop) == pytest.approx((48.63, 60.63), abs=0.01)
    assert (second.speed_m_s.start, second.speed_m_s.stop) == pytest.approx((56.25, 68.25), abs=0.01)


def test_clutter_is_the_reason_only_where_the_notch_is_not(plain):
    nothing = Spans(np.array([], dtype=int), np.array([]), np.array([]))
    plan = opening_pair(plain)
    assert asked(plain, plan, 20e3, 58.0, nothing)[0].reasons == ('notch',)
    answer = asked(plain, plan, 20e3, 30.0, nothing)[0]
    assert answer.reasons == ('clutter',)
    assert (answer.speed_m_s.first, answer.speed_m_s.last) == (True, True)
