"""Regions of cells: joined across edges and not across corners, as an independent labelling has them."""

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from hypothesis.extra import numpy as hnp
from scipy import ndimage

from pycore import regions

GRIDS = hnp.arrays(bool, st.tuples(st.integers(1, 14), st.integers(1, 14)))


def labels(cells):
    some = regions.runs(cells)
    region, count = regions.connected(some, cells.shape[1])
    painted = np.zeros(cells.shape, dtype=int)
    for row, start, stop, name in zip(some.row, some.start, some.stop, region, strict=True):
        painted[row, start:stop] = name + 1
    return painted, count


def same_partition(one, other):
    pairs = set(zip(one.ravel().tolist(), other.ravel().tolist(), strict=True))
    return len(pairs) == len({a for a, _ in pairs}) == len({b for _, b in pairs})


@settings(max_examples=200, deadline=None)
@given(GRIDS)
def test_regions_are_joined_across_edges_and_not_across_corners(cells):
    painted, count = labels(cells)
    expected, expected_count = ndimage.label(cells)
    assert count == expected_count
    assert same_partition(painted, expected)


@pytest.mark.parametrize('share', [0.4, 0.6, 0.9])
def test_regions_that_wind_through_a_large_grid_are_followed_to_their_ends(share):
    cells = np.random.default_rng(5).random((400, 300)) < share
    painted, count = labels(cells)
    expected, expected_count = ndimage.label(cells)
    assert count == expected_count
    assert same_partition(painted, expected)


def test_a_spiral_is_one_region():
    cells = np.array(
        [list(row) for row in ('1111111', '0000001', '1111101', '1000101', '1011101', '1000001', '1111111')]
    )
    assert labels(cells == '1')[1] == 1


def test_a_chessboard_has_as_many_regions_as_cells():
    assert labels(np.indices((8, 8)).sum(axis=0) % 2 == 0)[1] == 32


def test_a_grid_in_many_blocks_of_rows_has_the_runs_of_the_whole(monkeypatch):
    cells = np.random.default_rng(3).random((41, 17)) < 0.5
    whole = regions.runs(cells)
    monkeypatch.setattr(regions, '_CELLS_AT_ONCE', 40)
    parts = regions.runs(cells)
    assert [part.tolist() for part in (parts.row, parts.start, parts.stop)] == [
        part.tolist() for part in (whole.row, whole.start, whole.stop)
    ]


def test_no_cells_make_no_region():
    assert labels(np.zeros((3, 4), dtype=bool))[1] == 0


@settings(max_examples=100, deadline=None)
@given(GRIDS, st.integers(1, 5))
def test_a_window_of_rows_is_true_where_each_of_its_rows_is(cells, tall):
    first = np.arange(max(cells.shape[0] - tall + 1, 1))
    last = np.minimum(first + tall, cells.shape[0])
    expected = [cells[a:b].all(axis=0).tolist() for a, b in zip(first, last, strict=True)]
    assert regions.all_through(cells, first, last).tolist() == expected
