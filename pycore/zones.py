"""The map of blind zones for the eye, and why one range and speed is seen or not.

A cell of the map is sampled exactly, at its centre: no cell is a mean of its
surroundings, and the map's figures never feed the shares (those are exact,
:mod:`pycore.visibility`).
"""

from dataclasses import dataclass

import numpy as np

# Two bits for each PRF, so that two spans of one PRF that touch in the very point asked about cannot carry over.
_BITS_PER_PRF = 2
_LOW_BITS = 0x5555_5555


@dataclass(frozen=True, slots=True)
class Stretch:
    """The interval of one axis, clear or blind on one PRF, that holds a point.

    Parameters
    ----------
    clear : bool
        Whether the PRF is clear at the point. [unitless]
    start : float
        Lower end: a blind edge, or the end of the axis. [m or m/s]
    stop : float
        Upper end. [m or m/s]
    first : bool
        Whether it reaches the lower end of the axis. [unitless]
    last : bool
        Whether it reaches the upper end of the axis. [unitless]
    """

    clear: bool
    start: float
    stop: float
    first: bool
    last: bool


@dataclass(frozen=True, slots=True)
class Why:
    """Why one PRF sees a target or does not.

    Parameters
    ----------
    prf : int
        Index of the PRF. [unitless]
    clear : bool
        Whether the target is clear on it. [unitless]
    reasons : tuple of str
        Any of ``'eclipsed'``, ``'notch'``, ``'clutter'``; empty where clear. [unitless]
    range_m : Stretch
        Clear or eclipsed ranges about the target. [m]
    speed_m_s : Stretch
        Clear or blind speeds about the target; with clutter where clutter is given. [m/s]
    """

    prf: int
    clear: bool
    reasons: tuple[str, ...]
    range_m: Stretch
    speed_m_s: Stretch


def centres(limits, count):
    """Return the centres of equal cells along an axis.

    Parameters
    ----------
    limits : tuple of two floats
        Lower and upper end of the axis. [m or m/s]
    count : int
        Number of cells. [unitless]

    Returns
    -------
    centre : float array, shape count
        Rising. [m or m/s]
    """
    low, high = limits
    return low + (high - low) * ((np.arange(count) + 0.5) / count)


def clear_marks(spans, at):
    """Return which PRFs are clear at some points of an axis.

    Parameters
    ----------
    spans : Spans
        Clear intervals of every PRF, closed at both ends. [m or m/s]
    at : float array, shape A
        Points. [m or m/s]

    Returns
    -------
    marks : uint32 array, shape A
        Bit 2 i is set where PRF i is clear. (Every second bit: AND two of them and count the bits.)
    """
    bit = 1 << (_BITS_PER_PRF * spans.prf.astype(np.int64))
    entered = _sum_of_bits(spans.start, bit, at, 'right')
    left = _sum_of_bits(spans.stop, bit, at, 'left')
    inside = entered - left
    return ((inside | inside >> 1) & _LOW_BITS).astype(np.uint32)


def _sum_of_bits(edge, bit, at, side):
    """Return for each point the sum of the bits whose edge it has passed."""
    order = edge.argsort()
    total = np.zeros(edge.size + 1, dtype=np.int64)
    np.cumsum(bit[order], out=total[1:])
    return total[edge[order].searchsorted(at, side)]


def count_map(ranges, speeds, range_at_m, speed_at_m_s):
    """Return how many PRFs are clear in every cell of a map.

    Parameters
    ----------
    ranges : Spans
        Clear ranges of every PRF. [m]
    speeds : Spans
        Clear radial speeds of every PRF. [m/s]
    range_at_m : float array, shape R
        Ranges of the cells' centres. [m]
    speed_at_m_s : float array, shape V
        Speeds of the cells' centres. [m/s]

    Returns
    -------
    count : uint8 array, shape (V, R)
        Number of clear PRFs; one row for each speed, one column for each range.
    """
    on_range = clear_marks(ranges, range_at_m)
    on_speed = clear_marks(speeds, speed_at_m_s)
    return np.bitwise_count(on_speed[:, None] & on_range)


def count_map_of_pieces(ranges, pieces, range_at_m, speed_at_m_s):
    """Return the same map where the clear speeds change from one interval of ranges to the next.

    Parameters
    ----------
    ranges : Spans
        Clear ranges of every PRF. [m]
    pieces : sequence of visibility.Piece
        Intervals of ranges, each with the speeds that are clear in it; a range
        that two of them share is taken as the later one's. [m and m/s]
    range_at_m : float array, shape R
        Ranges of the cells' centres. [m]
    speed_at_m_s : float array, shape V
        Speeds of the cells' centres. [m/s]

    Returns
    -------
    count : uint8 array, shape (V, R)
        Number of clear PRFs; 0 at ranges in no piece.
    """
    on_range = clear_marks(ranges, range_at_m)
    on_speed, at_speed = {}, np.zeros((np.size(speed_at_m_s), np.size(range_at_m)), dtype=np.uint32)
    for piece in pieces:
        inside = (range_at_m >= piece.range_m[0]) & (range_at_m <= piece.range_m[1])
        if id(piece.speeds) not in on_speed:
            on_speed[id(piece.speeds)] = clear_marks(piece.speeds, speed_at_m_s)
        at_speed[:, inside] = on_speed[id(piece.speeds)][:, None]
    return np.bitwise_count(at_speed & on_range)


def stretch(spans, prf, limits, at):
    """Return the clear or blind interval of one PRF that holds a point.

    Parameters
    ----------
    spans : Spans
        Clear intervals of every PRF. [m or m/s]
    prf : int
        Index of the PRF. [unitless]
    limits : tuple of two floats
        Lower and upper end of the axis. [m or m/s]
    at : float
        The point, inside the limits. [m or m/s]

    Returns
    -------
    stretch : Stretch
        Its ends are exact edges.
    """
    start, stop = spans.of(prf)
    low, high = limits
    holds = np.flatnonzero((start <= at) & (at <= stop))
    if holds.size:
        a, b = start[holds[0]], stop[holds[-1]]
    else:
        a = stop[stop < at].max(initial=low)
        b = start[start > at].min(initial=high)
    return Stretch(bool(holds.size), float(a), float(b), bool(a <= low), bool(b >= high))


def why(ranges, speeds, n, range_limits_m, speed_limits_m_s, range_m, speed_m_s, with_clutter=None):
    """Return for each PRF why a target is seen on it or not.

    Parameters
    ----------
    ranges : Spans
        Clear ranges of every PRF. [m]
    speeds : Spans
        Speeds of every PRF that are clear of the notch. [m/s]
    n : int
        Number of PRFs. [unitless]
    range_limits_m : tuple of two floats
        The coverage's ranges. [m]
    speed_limits_m_s : tuple of two floats
        The coverage's radial speeds. [m/s]
    range_m : float
        Range of the target. [m]
    speed_m_s : float
        Radial speed of the target. [m/s]
    with_clutter : Spans or None
        Speeds of every PRF that are clear of the notch and of clutter at this range. [m/s]

    Returns
    -------
    why : tuple of Why
        One for each PRF.
    """
    answers = []
    for prf in range(n):
        at_range = stretch(ranges, prf, range_limits_m, range_m)
        at_speed = stretch(speeds, prf, speed_limits_m_s, speed_m_s)
        reasons = [] if at_range.clear else ['eclipsed']
        reasons += [] if at_speed.clear else ['notch']
        if at_speed.clear and with_clutter is not None:
            at_speed = stretch(with_clutter, prf, speed_limits_m_s, speed_m_s)
            reasons += [] if at_speed.clear else ['clutter']
        answers.append(Why(prf, not reasons, tuple(reasons), at_range, at_speed))
    return tuple(answers)
