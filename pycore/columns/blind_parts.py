"""Blind parts of an axis: of each PRF, and of the set as a whole."""

import numpy as np

from pycore.patterns import EDGE_TOLERANCE
from pycore.sight import sweeps_with_floor
from pycore.spans import Spans


def gaps(spans, n, limits):
    """Return what the clear spans of each PRF leave of an axis.

    Parameters
    ----------
    spans : Spans
        Clear intervals of every PRF. [m or m/s]
    n : int
        Number of PRFs. [unitless]
    limits : tuple of two floats
        Ends of the axis. [m or m/s]

    Returns
    -------
    gaps : Spans
        Blind intervals of every PRF, in rising order.
    """
    every = np.arange(n)
    prf = np.concatenate((every, spans.prf))
    start = np.concatenate((np.full(n, float(limits[0])), spans.stop))
    stop = np.concatenate((np.full(n, float(limits[1])), spans.start))
    # Between two neighbouring clear spans of a PRF lies one gap: the k-th end belongs to the k-th beginning.
    start, stop = start[np.lexsort((start, prf))], stop[np.lexsort((stop, prf))]
    some = stop - start > EDGE_TOLERANCE * (limits[1] - limits[0])
    return Spans(np.sort(prf)[some], start[some], stop[some])


def runs(swept, marked):
    """Return the stretches of a swept axis whose segments are marked.

    Parameters
    ----------
    swept : Sweep
        The axis. [m or m/s]
    marked : bool array, shape E
        One mark for each segment. [unitless]

    Returns
    -------
    zones : float array, shape (Z, 2)
        Their ends, neighbours joined. [m or m/s]
    """
    steps = np.diff(np.concatenate(([0], marked.astype(np.int8), [0])))
    return np.column_stack((swept.edges[np.flatnonzero(steps > 0)], swept.edges[np.flatnonzero(steps < 0)]))


def zones(swept, n, m):
    """Return where fewer than M of N PRFs are clear.

    Parameters
    ----------
    swept : Sweep
        One axis; bits above the lowest N are not looked at. [m or m/s]
    n : int
        Number of PRFs. [unitless]
    m : int
        Number that must be clear. [unitless]

    Returns
    -------
    zones : float array, shape (Z, 2)
        Their ends. [m or m/s]
    """
    return runs(swept, np.bitwise_count(swept.pattern & (1 << n) - 1) < m)


def outside(limits, floor):
    """Return how much of an axis lies outside some zones.

    Parameters
    ----------
    limits : tuple of two floats
        Ends of the axis. [m or m/s]
    floor : float array, shape (F, 2)
        Zones. [m or m/s]

    Returns
    -------
    length : float
        What they leave. [m or m/s]
    """
    return float(limits[1] - limits[0] - np.diff(floor).sum())


def within(gaps, floor, limits):
    """Return whether all gaps of all PRFs lie within some zones.

    Parameters
    ----------
    gaps : Spans
        Blind intervals. [m or m/s]
    floor : float array, shape (F, 2)
        Zones, rising. [m or m/s]
    limits : tuple of two floats
        Ends of the axis. [m or m/s]

    Returns
    -------
    within : bool
        True also where there is no gap.
    """
    slack = EDGE_TOLERANCE * (limits[1] - limits[0])
    inside = (gaps.start[:, None] >= floor[:, 0] - slack) & (gaps.stop[:, None] <= floor[:, 1] + slack)
    return bool(inside.any(axis=1).all())


def avoidable(sight, axis):
    """Return where fewer than M PRFs are clear although another plan could be, and where none could.

    Parameters
    ----------
    sight : Sight
        A plan and its coverage. [m and m/s]
    axis : int
        0 for range, 1 for speed. [unitless]

    Returns
    -------
    zones, floor : float arrays, shapes (Z, 2) and (F, 2)
        Ends of both kinds. [m or m/s]
    """
    swept = sweeps_with_floor(sight)[axis]
    clear = np.bitwise_count(swept.pattern & (1 << sight.n) - 1)
    could = np.bitwise_count(swept.pattern >> sight.n) >= sight.m
    return runs(swept, (clear < sight.m) & could), runs(swept, ~could)
