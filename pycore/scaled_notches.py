"""A set of constant PRFs moved as a whole, row by row: how many are clear at a speed, and what is blind in each row.

Every row is the same plan with all its first blind speeds multiplied by one factor,
as when its intervals or its carriers are scaled together; the notches stay as they are.
"""

import math
from fractions import Fraction

import numpy as np

from pycore.constants import SPEED_OF_LIGHT_M_S

_SAME = 1e-9
"""Part of the speed axis within which a blind rest is rounding. [unitless]"""


def clear_counts(blind_speed_m_s, notch_m_s, speed_m_s):
    """Return how many PRFs are clear in every cell of a map.

    Parameters
    ----------
    blind_speed_m_s : float array, shape (R, N)
        First blind speeds, one row of the map after the other. [m/s]
    notch_m_s : float array, shape N
        Half widths of the notches; half a blind speed or more leaves nothing. [m/s]
    speed_m_s : float array, shape V
        Radial speeds of the cells' centres. [m/s]

    Returns
    -------
    count : uint8 array, shape (R, V)
        Number of clear PRFs; a speed at the edge of a notch is clear.
    """
    count = np.zeros((blind_speed_m_s.shape[0], speed_m_s.size), dtype=np.uint8)
    for blind, notch in zip(blind_speed_m_s.T[..., None], notch_m_s.tolist(), strict=True):
        turns = speed_m_s / blind
        turns -= np.rint(turns)
        np.abs(turns, out=turns)
        count += (turns >= notch / blind) & (notch < 0.5 * blind)
    return count


def blind_shares(blind_speed_m_s, notch_m_s, m, speed_m_s):
    """Return the share of the speeds, outside the notch around zero, that fewer than M PRFs see, for every row.

    Parameters
    ----------
    blind_speed_m_s : float array, shape (R, N)
        First blind speeds, one row after the other. [m/s]
    notch_m_s : float array, shape N
        Half widths of the notches. [m/s]
    m : int
        Number of PRFs that must be clear. [unitless]
    speed_m_s : tuple of two floats
        Limits of the radial speeds. [m/s]

    Returns
    -------
    share : float array, shape R
        Exact from the notches' edges; nan where the notch around zero takes all of them.
    """
    low, high = speed_m_s
    at, step = _edges(blind_speed_m_s, notch_m_s, (low, high))
    order = at.argsort(axis=1, kind='stable')
    at = np.take_along_axis(at, order, axis=1)
    in_notch = np.take_along_axis(step, order, axis=1).cumsum(axis=1)[:, :-1]
    # Within the M-th smallest notch around zero fewer than M can be clear: those speeds no set of PRFs sees.
    rest = float(np.sort(notch_m_s)[m - 1])
    outside = np.diff(at, axis=1) - np.diff(np.clip(at, -rest, rest), axis=1)
    blind = (outside * (in_notch > notch_m_s.size - m)).sum(axis=1)
    whole = (high - low) - (np.clip(high, -rest, rest) - np.clip(low, -rest, rest))
    rounding = _SAME * (high - low)
    if whole <= rounding:
        return np.full(len(blind), np.nan)
    return np.where(blind > rounding, blind / whole, 0.0)


def _edges(blind_speed_m_s, notch_m_s, limits):
    """Return where every row enters a notch (+1) and leaves it (-1), cut to the axis."""
    rows, n = blind_speed_m_s.shape
    # Which multiples fall on the axis, of the smallest blind speed and of the largest.
    ends = np.divide.outer(limits, (blind_speed_m_s.min(), blind_speed_m_s.max()))
    k = np.arange(math.floor(ends[0].min()) - 1, math.ceil(ends[1].max()) + 2)
    # Notches that meet leave nothing: each then reaches to the middle between two blind speeds.
    half = np.minimum(notch_m_s, 0.5 * blind_speed_m_s)[..., None]
    middle = blind_speed_m_s[..., None] * k
    edges = np.concatenate((middle - half, middle + half), axis=2).reshape(rows, -1)
    step = np.tile(np.repeat(np.array([1, -1], dtype=np.int16), k.size), n)
    return np.clip(edges, *limits), np.broadcast_to(step, edges.shape)


def common_blind_speed(pri_counts, clock_hz, carrier_hz):
    """Return the first speed at which every PRF has a blind speed.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        Intervals. [clock counts]
    clock_hz : float
        Timing clock. [Hz]
    carrier_hz : sequence of Fraction, length N
        Carriers as the decimals that were typed. [Hz]

    Returns
    -------
    speed_m_s : float
        c/(2 g), g the greatest common divisor of carrier × interval over the PRFs. [m/s]

    Notes
    -----
    Derived here: PRF i is blind at k c/(2 f_i T_i), so at v all are where 2 v f_i T_i / c is whole for every i.
    """
    turns = [Fraction(carrier) * int(count) for carrier, count in zip(carrier_hz, pri_counts, strict=True)]
    whole = math.lcm(*(turn.denominator for turn in turns))
    divisor = Fraction(math.gcd(*(int(turn * whole) for turn in turns)), whole)
    return SPEED_OF_LIGHT_M_S * float(clock_hz) / (2.0 * float(divisor))
