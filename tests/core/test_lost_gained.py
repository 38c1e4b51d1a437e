"""What one plan loses and gains against another: held against every cell, and against both visible shares."""

from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore import sight
from pycore.lost_gained import lost_gained

ROUNDING = 1e-9
MERGED_EDGES = 1e-6
"""Edges of two plans that nearly meet count as one; the plain way keeps the sliver between them."""


@st.composite
def pairs(draw, plain):
    """Two drawn plans over the coverage of the first."""
    one, other = draw(plain.plans(most_prfs=8)), draw(plain.plans(most_prfs=8))
    return one, replace(other, range_m=one.range_m, speed_m_s=one.speed_m_s)


def cell_by_cell(plain, one, other):
    """Areas by the definitions, in the middle of each cell that both plans' edges cut."""
    spans = [(plain.sight(plan).ranges, plain.sight(plan).speeds) for plan in (one, other)]
    middles, lengths = [], []
    for axis, limits in ((0, one.range_m), (1, one.speed_m_s)):
        edges = np.unique(np.concatenate([limits, *(np.concatenate((of[axis].start, of[axis].stop)) for of in spans)]))
        middles.append((edges[1:] + edges[:-1]) / 2)
        lengths.append(np.diff(edges) / (limits[1] - limits[0]))
    seen = []
    for plan in (one, other):
        on_range, on_speed = plain.clear_at(plan, *middles)
        seen.append((on_range[:, :, None] & on_speed[:, None, :]).sum(axis=0) >= plan.m)
    area = np.multiply.outer(*lengths)
    return area[seen[1] & ~seen[0]].sum(), area[seen[0] & ~seen[1]].sum()


def test_lost_and_gained_are_those_of_every_cell(plain):
    @settings(max_examples=60, deadline=None)
    @given(pairs(plain))
    def hold(pair):
        found = lost_gained(*map(plain.sight, pair))
        lost, gained = cell_by_cell(plain, *pair)
        assert found.lost == pytest.approx(lost, abs=MERGED_EDGES)
        assert found.gained == pytest.approx(gained, abs=MERGED_EDGES)

    hold()


def test_what_is_gained_less_what_is_lost_is_the_difference_of_the_visible_shares(plain):
    @settings(max_examples=60, deadline=None)
    @given(pairs(plain))
    def hold(pair):
        one, other = map(plain.sight, pair)
        found = lost_gained(one, other)
        assert found.gained - found.lost == pytest.approx(sight.share(one) - sight.share(other), abs=MERGED_EDGES)
        assert found.both + found.gained == pytest.approx(sight.share(one), abs=MERGED_EDGES)
        assert found.lost + found.gained + found.both + found.neither == pytest.approx(1.0, abs=ROUNDING)

    hold()


def test_a_plan_loses_and_gains_nothing_against_itself(plain):
    @settings(max_examples=30, deadline=None)
    @given(plain.plans())
    def hold(plan):
        found = lost_gained(plain.sight(plan), plain.sight(plan))
        assert (found.lost, found.gained) == (0.0, 0.0)

    hold()


def test_what_one_plan_gains_the_other_loses(plain):
    @settings(max_examples=30, deadline=None)
    @given(pairs(plain))
    def hold(pair):
        there, back = lost_gained(*map(plain.sight, pair)), lost_gained(*map(plain.sight, reversed(pair)))
        assert (there.lost, there.gained) == pytest.approx((back.gained, back.lost), abs=ROUNDING)

    hold()
