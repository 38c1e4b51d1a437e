"""The holes of a plan: regions of the coverage that it could see and does not.

A hole is a connected region, outside the floor, that fewer than M PRFs see.
Regions that touch along an edge are one hole; regions that only share a corner
are two. All edges are the exact ones of the sweep.
"""

from dataclasses import dataclass

import numpy as np

from pycore.patterns import EDGE_TOLERANCE
from pycore.regions import all_through, blocks, connected, run_at, runs
from pycore.sight import sweeps_with_floor

MOST_LISTED = 50
"""Holes that are listed one by one, largest first. [unitless]"""


@dataclass(frozen=True, slots=True)
class Hole:
    """One connected region, outside the floor, that fewer than M PRFs see.

    Parameters
    ----------
    range_m : tuple of two floats
        Exact extent in range. [m]
    speed_m_s : tuple of two floats
        Exact extent in radial speed. [m/s]
    share : float
        Its own area, not its bounding box', as part of the whole. [unitless]
    too_large : bool or None
        Whether a rectangle beyond both limits fits inside it; None where no limit is given. [unitless]
    """

    range_m: tuple[float, float]
    speed_m_s: tuple[float, float]
    share: float
    too_large: bool | None


@dataclass(frozen=True, slots=True)
class Rectangle:
    """A range and speed interval that lies wholly inside a hole.

    Parameters
    ----------
    range_m : tuple of two floats
        Extent in range. [m]
    speed_m_s : tuple of two floats
        Extent in radial speed. [m/s]
    """

    range_m: tuple[float, float]
    speed_m_s: tuple[float, float]


@dataclass(frozen=True, slots=True)
class Holes:
    """All holes of a coverage or of a region of it.

    Parameters
    ----------
    listed : tuple of Hole
        At most ``MOST_LISTED`` of them, largest area first. [m and m/s]
    count : int
        How many there are. [unitless]
    share : float
        Area of all of them: 1 - visible share - floor. [unitless]
    too_large : int or None
        How many are too large; None where no limit is given. [unitless]
    worst : Rectangle or None
        The largest rectangle met with that is beyond both limits. [m and m/s]
    """

    listed: tuple[Hole, ...]
    count: int
    share: float
    too_large: int | None
    worst: Rectangle | None


@dataclass(frozen=True, slots=True)
class _Grid:
    """The coverage between its edges: rows of range, columns of speed, true where a hole is."""

    range_edges: np.ndarray
    speed_edges: np.ndarray
    blind: np.ndarray


def holes(sight, hole_m=None, hole_m_s=None):
    """Return the holes of a plan in its coverage.

    Parameters
    ----------
    sight : Sight
        A plan and its coverage, or a must-see region (``sight.within``). [m and m/s]
    hole_m : float or None
        A hole is too large where it is somewhere longer than this … [m]
    hole_m_s : float or None
        … and, in the same place, wider than this; a limit that is None counts as 0. [m/s]

    Returns
    -------
    holes : Holes
        Not judged where both limits are None.
    """
    grid = _grid(sight)
    blind = runs(grid.blind)
    hole, count = connected(blind, grid.blind.shape[1])
    judged = hole_m is not None or hole_m_s is not None
    large, worst = _too_large(grid, blind, hole, hole_m or 0.0, hole_m_s or 0.0) if judged else (None, None)
    area, box = _areas(grid, blind, hole, count), _boxes(grid, blind, hole, count)
    order = np.lexsort((box[:, 2], box[:, 0], -area.round(12)))[:MOST_LISTED]
    listed = tuple(
        Hole(tuple(box[i, :2].tolist()), tuple(box[i, 2:].tolist()), float(area[i]), i in large if judged else None)
        for i in order.tolist()
    )
    return Holes(listed, count, float(area.sum()), len(large) if judged else None, worst)


def _grid(sight):
    """Find the cells that fewer than M PRFs see although M of them could without their ambiguities."""
    ranges, speeds = sweeps_with_floor(sight)
    seen = [(swept.pattern & (1 << sight.n) - 1).astype(np.uint16) for swept in (ranges, speeds)]
    could = [(swept.pattern >> sight.n).astype(np.uint16) for swept in (ranges, speeds)]
    blind = np.empty((ranges.pattern.size, speeds.pattern.size), dtype=bool)
    for rows in blocks(blind.shape):
        blind[rows] = np.bitwise_count(seen[0][rows, None] & seen[1]) < sight.m
        blind[rows] &= np.bitwise_count(could[0][rows, None] & could[1]) >= sight.m
    return _Grid(ranges.edges, speeds.edges, blind)


def _areas(grid, blind, hole, count):
    """Return the area of each hole as part of the whole."""
    long = np.diff(grid.range_edges)[blind.row]
    wide = grid.speed_edges[blind.stop] - grid.speed_edges[blind.start]
    whole = np.ptp(grid.range_edges) * np.ptp(grid.speed_edges)
    return np.bincount(hole, long * wide, count) / whole


def _boxes(grid, blind, hole, count):
    """Return range from and to, speed from and to, of each hole."""
    box = np.empty((count, 4))
    box[:, ::2], box[:, 1::2] = np.inf, -np.inf
    np.minimum.at(box[:, 0], hole, grid.range_edges[blind.row])
    np.maximum.at(box[:, 1], hole, grid.range_edges[blind.row + 1])
    np.minimum.at(box[:, 2], hole, grid.speed_edges[blind.start])
    np.maximum.at(box[:, 3], hole, grid.speed_edges[blind.stop])
    return box


def _too_large(grid, blind, hole, hole_m, hole_m_s):
    """Find the holes in which a rectangle beyond both limits fits, and the largest such rectangle met with."""
    large, worst, worst_area = set(), None, 0.0
    for first, last, start, stop in _rectangles(grid, hole_m, hole_m_s):
        large.update(hole[run_at(blind, grid.blind.shape[1], first, start)].tolist())
        long = grid.range_edges[last] - grid.range_edges[first]
        area = long * (grid.speed_edges[stop] - grid.speed_edges[start])
        best = area.argmax()
        if area[best] > worst_area:
            worst, worst_area = (first[best], last[best], start[best], stop[best]), area[best]
    return large, _rectangle(grid, worst)


def _rectangles(grid, hole_m, hole_m_s):
    """Give blind rectangles just longer than one limit and wider than the other, as rows and columns.

    A rectangle can be grown until it begins at an edge; of the rows from there on, those are
    enough that just exceed the length. Where all of them are blind, a run wide enough decides.
    What is as long as the limit, but for the edges' own tolerance, is not longer.
    """
    beyond_m = hole_m + EDGE_TOLERANCE * np.ptp(grid.range_edges)
    beyond_m_s = hole_m_s + EDGE_TOLERANCE * np.ptp(grid.speed_edges)
    last = np.searchsorted(grid.range_edges, grid.range_edges[:-1] + beyond_m, 'right')
    starts = np.flatnonzero(last < grid.range_edges.size)
    for block in blocks((starts.size, grid.blind.shape[1])):
        first = starts[block]
        through = runs(all_through(grid.blind, first, last[first]))
        fits = grid.speed_edges[through.stop] - grid.speed_edges[through.start] > beyond_m_s
        if fits.any():
            row = first[through.row[fits]]
            yield row, last[row], through.start[fits], through.stop[fits]


def _rectangle(grid, corners):
    """Turn rows and columns into a rectangle."""
    if corners is None:
        return None
    ranges, speeds = grid.range_edges[list(corners[:2])], grid.speed_edges[list(corners[2:])]
    return Rectangle(tuple(ranges.tolist()), tuple(speeds.tolist()))
