"""What apparent values say: where the targets could be, and where the PRFs agree that they are.

Works on one axis at a time: range with its unambiguous ranges, or radial
speed, closing positive, with its blind speeds.
"""

from dataclasses import dataclass

import numpy as np

_ONE_EDGE = 1e-9
"""Edges closer than this part of the largest value are one edge. [unitless]"""


@dataclass(frozen=True, slots=True)
class Agreement:
    """Stretches of one axis on which enough PRFs agree, in rising order.

    Parameters
    ----------
    start : float array, shape K
        Where enough begin to agree. [m or m/s]
    stop : float array, shape K
        Where they cease to. [m or m/s]
    best : float array, shape K
        Middle of the first part of it on which most agree. [m or m/s]
    support : int array, shape K
        How many agree there. [unitless]
    """

    start: np.ndarray
    stop: np.ndarray
    best: np.ndarray
    support: np.ndarray


def unfolded(apparent, period, axis):
    """Return every true value within the axis that shows as an apparent one.

    Parameters
    ----------
    apparent : float
        Apparent range or speed on one PRF. [m or m/s]
    period : float
        Its unambiguous range or its first blind speed. [m or m/s]
    axis : tuple of float, length 2
        Lowest and highest value looked for. [m or m/s]

    Returns
    -------
    candidates : float array, shape K
        ``apparent + k period`` within the axis, rising; empty where there is none. [m or m/s]
    """
    low, high = axis
    k = np.arange(np.floor((low - apparent) / period), np.ceil((high - apparent) / period) + 1)
    candidates = apparent + k * period
    return candidates[(candidates >= low) & (candidates <= high)]


def comb(apparent, period, half_width, axis):
    """Return the intervals around the unfolded candidates of one PRF, cut to the axis and joined where they overlap.

    Parameters
    ----------
    apparent : float or float array, shape K
        Apparent values on one PRF, one for each echo. [m or m/s]
    period : float
        Its unambiguous range or its first blind speed. [m or m/s]
    half_width : float
        How far from a candidate the true value may lie. [m or m/s]
    axis : tuple of float, length 2
        Lowest and highest value. [m or m/s]

    Returns
    -------
    start, stop : float array, shape J
        Disjoint, rising. [m or m/s]
    """
    low, high = axis
    beyond = low - half_width, high + half_width
    centres = [unfolded(each, period, beyond) for each in np.atleast_1d(apparent)]
    centre = np.sort(np.concatenate([*centres, np.empty(0)]))
    start, stop = np.maximum(centre - half_width, low), np.minimum(centre + half_width, high)
    start, stop = start[stop > start], stop[stop > start]
    fresh = np.flatnonzero(start[1:] > stop[:-1])  # all are equally long, so a later one also ends later
    return start[np.concatenate([[0], fresh + 1])[: start.size]], stop[np.concatenate([fresh, [-1]])[: start.size]]


def agreement(combs, m):
    """Return where the combs of at least M PRFs overlap: decoding by coincidence.

    Parameters
    ----------
    combs : sequence of (start, stop) pairs of float arrays, length N
        From :func:`comb`. [m or m/s]
    m : int
        How many PRFs must agree. [unitless]

    Returns
    -------
    places : Agreement
        Stretches that only touch are two.

    References
    ----------
    M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., McGraw-Hill 2014, p. 417-418 (e-book pages).
    """
    edges, masks = patterns(combs)
    count = np.bitwise_count(masks)
    enough = np.concatenate([[False], count >= m, [False]])
    first, last = np.flatnonzero(enough[1:] & ~enough[:-1]), np.flatnonzero(enough[:-1] & ~enough[1:])
    if first.size == 0:
        return Agreement(*(np.empty(0),) * 3, np.empty(0, dtype=int))
    best = np.array([a + np.argmax(count[a:b]) for a, b in zip(first, last, strict=True)])
    return Agreement(edges[first], edges[last], (edges[best] + edges[best + 1]) / 2, count[best].astype(int))


def patterns(combs):
    """Return the edges of all combs and, between each edge and the next, which PRFs cover the stretch.

    Parameters
    ----------
    combs : sequence of (start, stop) pairs of float arrays, length N
        From :func:`comb`. [m or m/s]

    Returns
    -------
    edges : float array, shape E + 1
        Rising; those closer than a billionth of the largest are one. [m or m/s]
    masks : int array, shape E
        Bit i is set where PRF i covers the stretch. [unitless]
    """
    edges = np.unique(np.concatenate([np.empty(0), *(ends for pair in combs for ends in pair)]))
    if edges.size:  # gates that line up leave edges a rounding apart, which are one
        edges = edges[np.concatenate([[True], np.diff(edges) > _ONE_EDGE * np.abs(edges).max()])]
    middles = (edges[1:] + edges[:-1]) / 2
    masks = np.zeros(middles.size, dtype=np.int64)
    for prf, (start, stop) in enumerate(combs):
        inside = np.searchsorted(start, middles) > np.searchsorted(stop, middles)
        masks |= inside.astype(np.int64) << prf
    return edges, masks
