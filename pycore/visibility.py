"""How much of the coverage M of N PRFs see: exactly, without a grid.

A target at range R and radial speed v is clear on PRF i where R lies in one of
the PRF's clear range spans *and* v in one of its clear speed spans; it is
visible where at least M of the N PRFs are clear. Both axes are cut at every
edge into segments; a segment carries a pattern of N bits, bit i set where PRF i
is clear. The share of the coverage that belongs to each *set* of clear PRFs
follows from the two tables of lengths, without looking at a single cell:

    F(S) = length on which all PRFs of S are clear = sum of L(P) over P that contain S
    area on which all of S are clear               = F_range(S) F_speed(S)
    area on which exactly S are clear              = Moebius inversion of that over supersets

(Derived here: clear on all of S is one condition on range and another, independent, on speed.)
"""

from dataclasses import dataclass
from functools import lru_cache

import numpy as np

from pycore.patterns import clear_lengths, exactly, lengths, over_supersets, sweep
from pycore.spans import Spans


@dataclass(frozen=True, slots=True)
class Piece:
    """An interval of ranges in which the clear speeds are its own, as clutter makes them.

    Parameters
    ----------
    range_m : tuple of two floats
        Lower and upper end of the interval. [m]
    speeds : Spans
        Clear speeds of every PRF inside it. [m/s]
    """

    range_m: tuple[float, float]
    speeds: Spans


@dataclass(frozen=True, slots=True)
class Visible:
    """What a plan sees of its coverage, as shares of the coverage's area.

    Parameters
    ----------
    share : float
        Seen by at least M PRFs. [unitless]
    by_count : float array, shape N + 1
        Seen by exactly 0, 1 … N PRFs. [unitless]
    if_one_lost : float
        Seen by at least M of those left when the PRF that costs most is lost; 0 where N = M. [unitless]
    """

    share: float
    by_count: np.ndarray
    if_one_lost: float


@lru_cache
def _bit_counts(n):
    """Return the number of PRFs in each of the 2^N sets."""
    return np.bitwise_count(np.arange(1 << n))


@lru_cache
def _enough(n, m):
    """Return 1.0 for each of the 2^N sets that holds at least M PRFs, else 0.0."""
    return (_bit_counts(n) >= m).astype(float)


@lru_cache
def _held_up_by(n, m):
    """Return, for each PRF, 1.0 for the sets of exactly M PRFs that it belongs to, shape (N, 2^N)."""
    sets = np.arange(1 << n)
    return ((_bit_counts(n) == m) & (sets >> np.arange(n)[:, None] & 1)).astype(float)


def pattern_shares(range_sweep, speed_sweep, n):
    """Return the share of the area on which exactly each set of PRFs is clear.

    Parameters
    ----------
    range_sweep : Sweep
        Ranges. [m]
    speed_sweep : Sweep
        Radial speeds. [m/s]
    n : int
        Number of PRFs. [unitless]

    Returns
    -------
    share : float array, shape 2^N
        Indexed by the set's bits; sums to 1. At N = 16 it errs by about 1e-13.
    """
    table = np.empty((2, 1 << n))
    table[0] = lengths(range_sweep, n)
    table[1] = lengths(speed_sweep, n)
    on_range, on_speed = over_supersets(table, n)
    return exactly(on_range * on_speed, n)


def pattern_shares_of_pieces(range_sweep, pieces, speed_m_s, n):
    """Return the same where the clear speeds change from one interval of ranges to the next.

    Parameters
    ----------
    range_sweep : Sweep
        Ranges of the whole coverage. [m]
    pieces : sequence of Piece
        Intervals that together make the whole range axis; pieces that share one
        ``Spans`` object of speeds are worked out together. [m and m/s]
    speed_m_s : tuple of two floats
        Limits of the speed axis. [m/s]
    n : int
        Number of PRFs. [unitless]

    Returns
    -------
    share : float array, shape 2^N
        Indexed by the set's bits; sums to 1.
    """
    edges, alike = range_sweep.edges, {}
    for piece in pieces:
        length = np.diff(edges.clip(*piece.range_m)) / (edges[-1] - edges[0])
        speeds, so_far = alike.get(id(piece.speeds), (piece.speeds, 0.0))
        alike[id(piece.speeds)] = speeds, so_far + length
    share = np.zeros(1 << n)
    for speeds, length in alike.values():
        part = length > 0
        share += _met(range_sweep.pattern[part], length[part], sweep(speeds, speed_m_s), n)
    return share


def _met(range_pattern, range_share, speed_sweep, n):
    """Return the pattern shares of a few segments of range against all of speed, met one by one."""
    speed_share = lengths(speed_sweep, n)
    speed_pattern = speed_share.nonzero()[0]
    both = range_pattern.astype(np.intp)[:, None] & speed_pattern
    area = np.multiply.outer(range_share, speed_share[speed_pattern])
    return np.bincount(both.ravel(), area.ravel(), 1 << n)


def share_by_count(pattern_share, n):
    """Return the share of the area by the number of clear PRFs.

    Parameters
    ----------
    pattern_share : float array, shape 2^N
        Share of each exact set of PRFs. [unitless]
    n : int
        Number of PRFs. [unitless]

    Returns
    -------
    share : float array, shape N + 1
        Seen by exactly 0, 1 … N PRFs; sums to 1.
    """
    return np.bincount(_bit_counts(n), pattern_share, n + 1)


def share_if_one_lost(pattern_share, n, m):
    """Return the visible share when the PRF that costs most is lost.

    Parameters
    ----------
    pattern_share : float array, shape 2^N
        Share of each exact set of PRFs. [unitless]
    n : int
        Number of PRFs. [unitless]
    m : int
        Number that must be clear. [unitless]

    Returns
    -------
    share : float
        Seen by at least M of the other N - 1; 0 where N = M.

    Notes
    -----
    Derived here: what is lost with PRF i is where exactly M are clear and i is one of them.
    """
    return float(_enough(n, m) @ pattern_share - (_held_up_by(n, m) @ pattern_share).max())


def visible(pattern_share, n, m):
    """Return all that the pattern shares say about M of N.

    Parameters
    ----------
    pattern_share : float array, shape 2^N
        Share of each exact set of PRFs. [unitless]
    n : int
        Number of PRFs. [unitless]
    m : int
        Number that must be clear. [unitless]

    Returns
    -------
    visible : Visible
        Share, share by number of clear PRFs, share with the worst one lost.
    """
    share = float(_enough(n, m) @ pattern_share)
    return Visible(share, share_by_count(pattern_share, n), share_if_one_lost(pattern_share, n, m))


def visible_share(ranges, speeds, n, m, range_m, speed_m_s):
    """Return the share of the coverage that at least M of N PRFs see, exactly and as quickly as can be.

    Parameters
    ----------
    ranges : Spans
        Clear ranges of every PRF. [m]
    speeds : Spans
        Clear radial speeds of every PRF. [m/s]
    n : int
        Number of PRFs. [unitless]
    m : int
        Number that must be clear, at least 1. [unitless]
    range_m : tuple of two floats
        The coverage's ranges. [m]
    speed_m_s : tuple of two floats
        The coverage's radial speeds. [m/s]

    Returns
    -------
    share : float
        Between 0 and 1, but for rounding.
    """
    area = (range_m[1] - range_m[0]) * (speed_m_s[1] - speed_m_s[0])
    return share_from_lengths(clear_lengths(ranges, n), clear_lengths(speeds, n), n, m, area)


def share_from_lengths(range_length_m, speed_length_m_s, n, m, area):
    """Return the share of an area that at least M of N PRFs see from the lengths of the patterns on its two axes.

    Parameters
    ----------
    range_length_m : float array, shape 2^N
        Length of each pattern of clear PRFs; that of no PRF does not matter. [m]
    speed_length_m_s : float array, shape 2^N
        Likewise. [m/s]
    n : int
        Number of PRFs. [unitless]
    m : int
        Number that must be clear, at least 1. [unitless]
    area : float
        The whole. [m²/s]

    Returns
    -------
    share : float
        Between 0 and 1, but for rounding.
    """
    table = np.empty((2, 1 << n))
    table[0], table[1] = range_length_m, speed_length_m_s
    on_range, on_speed = over_supersets(table, n)
    return float(_enough(n, m) @ exactly(on_range * on_speed, n)) / area
