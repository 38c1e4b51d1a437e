"""What else a set of PRFs would take one target for: the other places in the coverage that M or more of them support.

A ghost needs the same PRFs in range and in speed (closing positive). Where the
set's spans reach beyond the coverage there are none.
"""

from dataclasses import dataclass

import numpy as np

from pycore.candidates import comb, patterns


@dataclass(frozen=True, slots=True)
class Ghost:
    """A place in the coverage that M or more PRFs take for the target.

    Parameters
    ----------
    range_m : tuple of float, length 2
        From, to. [m]
    speed_m_s : tuple of float, length 2
        From, to. [m/s]
    prfs : tuple of int
        PRFs that support it, where most do. [unitless]
    """

    range_m: tuple[float, float]
    speed_m_s: tuple[float, float]
    prfs: tuple[int, ...]


def ghosts(target, axes, periods, half_widths, m, seen=None):
    """Return the other places in the coverage that M or more PRFs take for one target.

    Parameters
    ----------
    target : tuple of float, length 2
        Range and radial speed. [m, m/s]
    axes : pair of tuples of float, length 2
        The coverage's range and speed. [m, m/s]
    periods : pair of sequences of float, length N
        Unambiguous ranges and first blind speeds. [m, m/s]
    half_widths : pair of sequences of float, length N
        Blur in range and in speed. [m, m/s]
    m : int
        How many PRFs must agree. [unitless]
    seen : sequence of bool or None, length N
        PRFs that see the target; all unless given. [unitless]

    Returns
    -------
    ghosts : tuple of Ghost
        By range, then speed. One ghost is all that lies in one stretch of range and one of speed on each of which M
        PRFs agree; the target's own is left out.
    """
    seen = [True] * len(periods[0]) if seen is None else seen
    ranges, speeds = (_axis_runs(*parts, m, seen) for parts in zip(target, axes, periods, half_widths, strict=True))
    shared = ranges.masks[:, None] & speeds.masks[None, :]
    support = np.bitwise_count(shared)
    rows, columns = np.nonzero(support >= m)
    group = ranges.runs[rows] * (speeds.runs.max(initial=0) + 1) + speeds.runs[columns]
    other = (ranges.runs[rows] != ranges.own) | (speeds.runs[columns] != speeds.own)
    order = np.lexsort((-support[rows, columns].astype(int), group))
    order = order[other[order]]
    rows, columns, group = rows[order], columns[order], group[order]
    first = np.flatnonzero(np.diff(group, prepend=-1))
    if first.size == 0:
        return ()
    ends = [ends for part, cells in ((ranges, rows), (speeds, columns)) for ends in _extent(part, cells, first)]
    masks = shared[rows[first], columns[first]]
    return tuple(
        Ghost((a, b), (c, d), tuple(prf for prf in range(len(seen)) if int(mask) >> prf & 1))
        for a, b, c, d, mask in zip(*ends, masks, strict=True)
    )


@dataclass(frozen=True, slots=True)
class _Runs:
    """Pieces of one axis on which enough PRFs take a place for the target, and the run that each belongs to."""

    start: np.ndarray
    stop: np.ndarray
    masks: np.ndarray
    runs: np.ndarray
    own: int


def _axis_runs(value, axis, periods, half_widths, m, seen):
    """Return the pieces of one axis on which M PRFs agree; ``own`` is the run of the target, -1 outside the axis."""
    blank = np.empty(0), np.empty(0)
    pairs = zip(periods, half_widths, seen, strict=True)
    edges, masks = patterns([comb(value, p, w, axis) if see else blank for p, w, see in pairs])
    enough = np.bitwise_count(masks) >= m
    runs = np.cumsum(enough & ~np.concatenate([[False], enough[:-1]]))[enough] - 1
    start, stop = edges[:-1][enough], edges[1:][enough]
    own = runs[(start <= value) & (value <= stop)].max(initial=-1)
    return _Runs(start, stop, masks[enough], runs, int(own))


def _extent(part, cells, first):
    """Return the ends, along one axis, of groups of cells that follow each other from the given firsts."""
    starts, stops = np.minimum.reduceat(part.start[cells], first), np.maximum.reduceat(part.stop[cells], first)
    return starts.tolist(), stops.tolist()
