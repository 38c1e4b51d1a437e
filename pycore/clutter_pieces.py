"""Clutter on the coverage: pieces of the range axis, and the speeds that are left clear on each.

The range axis is cut where a patch begins and ends in the gates of a PRF, its
images a whole number of R_u away included; inside a piece the speeds that
clutter covers do not change, so that the visible share has an exact value.
"""

import math

import numpy as np

from pycore.clutter import clutter_to_noise
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.covered import covered_half_width, leakage
from pycore.spans import Spans
from pycore.visibility import Piece


def clear_pieces(cpis, patches, first_opening_m, factor, clear, range_m, speed_m_s):
    """Return the coverage in pieces of range, each with the speeds that notch and clutter leave clear.

    Parameters
    ----------
    cpis : sequence of Cpi, length N
        The PRFs. [unitless]
    patches : sequence of Clutter, length P
        Surface and rain. [unitless]
    first_opening_m : float array, shape N
        Range nearer than which the clutter's laws are held constant. [m]
    factor : float array, shape N × P
        Of :func:`pycore.clutter.pulse_factor`. [unitless]
    clear : Spans
        Speeds that the notches leave clear. [m/s]
    range_m, speed_m_s : tuples of two floats
        The coverage; where a near pulse serves a part of it, that part. [m, m/s]

    Returns
    -------
    pieces : tuple of Piece
        Together the whole range axis, neighbours unlike; pieces that are alike share one ``Spans``.
    """
    reach_m = np.array([0.5 * SPEED_OF_LIGHT_M_S * cpi.pri_s for cpi in cpis])
    edges, ratio = range_pieces(patches, reach_m, first_opening_m, factor, range_m)
    width = half_widths(cpis, patches, ratio)
    left, pieces = _SpeedsLeft(cpis, patches, clear, speed_m_s), []
    for low, high, half in zip(edges[:-1].tolist(), edges[1:].tolist(), width, strict=True):
        speeds = left.of(half)
        if pieces and pieces[-1].speeds is speeds:
            low = pieces.pop().range_m[0]
        pieces.append(Piece((low, high), speeds))
    return tuple(pieces)


def half_widths(cpis, patches, ratio):
    """Return how far from its speed each patch covers on each PRF, piece by piece.

    Parameters
    ----------
    cpis : sequence of Cpi, length N
        The PRFs. [unitless]
    patches : sequence of Clutter, length P
        The patches. [unitless]
    ratio : float array, shape K × N × P
        One-pulse clutter-to-noise ratio on each piece. [unitless]

    Returns
    -------
    half_width_m_s : float array, shape K × N × P
        h; at half of v_b no filter is clear of the patch. [m/s]
    """
    width = np.zeros(ratio.shape)
    for prf, patch in np.ndindex(*ratio.shape[1:]):
        leak = leakage(cpis[prf], patches[patch].spread_m_s)
        values, place = np.unique(ratio[:, prf, patch], return_inverse=True)
        width[:, prf, patch] = covered_half_width(leak, values)[place]
    return width


class _SpeedsLeft:
    """The clear speeds of all PRFs without those that the patches cover; each PRF's and each set's worked out once."""

    def __init__(self, cpis, patches, clear, speed_m_s):
        self._blind_m_s = [cpi.blind_speed_m_s for cpi in cpis]
        self._clear = [clear.of(prf) for prf in range(len(cpis))]
        self._middle_m_s = np.array([patch.speed_m_s for patch in patches])
        self._axis_m_s = speed_m_s
        self._known, self._known_of_prf = {}, {}

    def of(self, half):
        """Return the Spans that half widths, shape N × P, leave."""
        if half.tobytes() not in self._known:
            parts = [self._of_prf(prf, one) for prf, one in enumerate(half)]
            owner = np.repeat(np.arange(len(parts)), [len(start) for start, _ in parts])
            ends = (np.concatenate(ends) for ends in zip(*parts, strict=True))
            self._known[half.tobytes()] = Spans(owner, *ends)
        return self._known[half.tobytes()]

    def _of_prf(self, prf, half):
        key = prf, half.tobytes()
        if key not in self._known_of_prf:
            covered = covered_spans(self._middle_m_s, half, self._blind_m_s[prf], self._axis_m_s)
            self._known_of_prf[key] = left_clear(self._clear[prf], covered)
        return self._known_of_prf[key]


def range_pieces(patches, unambiguous_range_m, first_opening_m, factor, range_m):
    """Return where on the range axis clutter begins and ends in the gates, and how strong it is there.

    Parameters
    ----------
    patches : sequence of Clutter, length P
        Patches of clutter. [unitless]
    unambiguous_range_m : float array, shape N
        Unambiguous range of each PRF. [m]
    first_opening_m : float array, shape N
        Range nearer than which the laws are held constant. [m]
    factor : float array, shape N × P
        Of :func:`pycore.clutter.pulse_factor`. [unitless]
    range_m : tuple of two floats
        The axis: the coverage, or the part of it that one pulse serves. [m]

    Returns
    -------
    edges : float array, shape K + 1
        Ends of the pieces. [m]
    ratio : float array, shape K × N × P
        One-pulse clutter-to-noise ratio on each piece.

    Notes
    -----
    A patch falls into the gates of targets at its own ranges and at those a whole number of R_u away; each such
    image counts as strong as at its own near edge, and images that overlap add up. So a longer or stronger patch
    never covers less (derived here), and the value is never below that of the gate.
    """
    images = [
        (prf, patch, *image)
        for prf, reach_m in enumerate(unambiguous_range_m)
        for patch, clutter in enumerate(patches)
        for image in _images(clutter, reach_m, first_opening_m[prf], factor[prf, patch], range_m)
    ]
    edges = _edges([end for image in images for end in image[2:4]], range_m)
    ratio = np.zeros((len(edges) - 1, len(unambiguous_range_m), len(patches)))
    for prf, patch, start_m, stop_m, strength in images:
        first, last = np.searchsorted(0.5 * (edges[1:] + edges[:-1]), (start_m, stop_m))
        ratio[first:last, prf, patch] += strength
    return edges, ratio


def _images(clutter, reach_m, first_opening_m, factor, range_m):
    """Return (start, stop, strength) of a patch at every whole number of R_u from its own place."""
    (near, far), (low, high) = clutter.range_m, range_m
    for trip in range(math.ceil((near - high) / reach_m), math.floor((far - low) / reach_m) + 1):
        start, stop = max(near - trip * reach_m, low), min(far - trip * reach_m, high)
        if start < stop:
            source_m = min(max(start + trip * reach_m, near), far)
            yield start, stop, float(clutter_to_noise(clutter, source_m, first_opening_m, factor))


def _edges(ends, range_m):
    """Return the ends in rising order from one end of the axis to the other; closer than 1e-9 of it is one."""
    low, high = range_m
    inside = np.unique(np.clip(np.array([low, *ends]), low, high))
    gap = 1e-9 * (high - low)
    kept = inside[np.concatenate(([True], np.diff(inside) > gap))]
    return np.concatenate((kept[kept < high - gap], [high]))


def covered_spans(speed_m_s, half_width_m_s, blind_speed_m_s, axis_m_s):
    """Return the speeds that patches of clutter cover on one PRF.

    Parameters
    ----------
    speed_m_s : float array, shape P
        Mean closing speeds of the patches. [m/s]
    half_width_m_s : float array, shape P
        Of :func:`pycore.covered.covered_half_width`. [m/s]
    blind_speed_m_s : float
        The PRF's first blind speed. [m/s]
    axis_m_s : tuple of two floats
        The coverage's speeds. [m/s]

    Returns
    -------
    start, stop : float arrays, shape K
        Rising and disjoint, cut to the axis. [m/s]
    """
    low, high = axis_m_s
    parts = [np.empty((0, 2))]
    for speed, half in zip(speed_m_s, half_width_m_s, strict=True):
        if half >= 0.5 * blind_speed_m_s:
            return np.array([float(low)]), np.array([float(high)])
        first = math.floor((low - half - speed) / blind_speed_m_s) + 1
        turns = np.arange(first, math.ceil((high + half - speed) / blind_speed_m_s) + 1)
        middle = speed + turns * blind_speed_m_s
        parts.append(np.clip(np.stack((middle - half, middle + half), axis=1), low, high))
    spans = np.concatenate(parts)
    return _joined(*spans[spans[:, 0] < spans[:, 1]].T)


def _joined(start, stop):
    """Return the union of intervals as rising and disjoint ones."""
    order = np.argsort(start, kind='stable')
    start, reach = start[order], np.maximum.accumulate(stop[order])
    first = np.concatenate(([True], start[1:] > reach[:-1]))[: len(start)]
    last = np.concatenate((first[1:], [True]))[: len(start)]
    return start[first], reach[last]


def left_clear(clear, covered):
    """Return what is left of clear spans when covered ones are taken away.

    Parameters
    ----------
    clear, covered : tuple of two float arrays
        Starts and stops, each rising and disjoint. [m/s]

    Returns
    -------
    start, stop : float arrays, shape K
        Rising and disjoint. [m/s]
    """
    edges = np.unique(np.concatenate((*clear, *covered)))
    middle = 0.5 * (edges[1:] + edges[:-1])
    kept = np.concatenate(([False], _inside(middle, *clear) & ~_inside(middle, *covered), [False]))
    return edges[np.flatnonzero(kept[1:] & ~kept[:-1])], edges[np.flatnonzero(kept[:-1] & ~kept[1:])]


def _inside(value, start, stop):
    """Return which values lie inside rising and disjoint intervals."""
    return np.searchsorted(start, value, side='right') > np.searchsorted(stop, value, side='right')
