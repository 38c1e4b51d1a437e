"""The visible share of constant PRFs straight from their combs, without cutting them into spans.

The quickest way from a plan's numbers to its exact share, for whoever asks for
many of them: the same lengths, sums and result as :mod:`pycore.visibility`.
"""

from functools import lru_cache
from math import ceil, floor

import numpy as np

from pycore.patterns import lengths_between
from pycore.visibility import share_from_lengths


def comb_lengths(comb, limits):
    """Return the length of each pattern of clear PRFs between the limits of an axis.

    Parameters
    ----------
    comb : Comb
        The clear interval of each PRF in its period. [m or m/s]
    limits : tuple of two floats
        Lower and upper end of the axis. [m or m/s]

    Returns
    -------
    length : float array, shape 2^N
        As ``patterns.clear_lengths``. [m or m/s]
    """
    low, high = limits
    n, stop = comb.period.size, np.maximum(comb.start, comb.stop)
    first, last = ((low - stop) / comb.period).min(), ((high - comb.start) / comb.period).max()
    shift = comb.period[:, None] * np.arange(floor(first), ceil(last) + 1)
    edge = np.empty((2, *shift.shape))
    np.add(comb.start[:, None], shift, out=edge[0])
    np.add(stop[:, None], shift, out=edge[1])
    # Every PRF has as many intervals as the one with most; those outside shrink to nothing at an end of the axis.
    np.maximum(edge, low, out=edge)
    np.minimum(edge, high, out=edge)
    return lengths_between(edge.ravel(), _switches(n).repeat(shift.shape[1]), n)


@lru_cache
def _switches(n):
    """Return the bits of N PRFs, switched on and then switched off."""
    bit = 1 << np.arange(n, dtype=np.intp)
    return np.concatenate((bit, -bit))


def visible_share_of_combs(ranges, speeds, m, range_m, speed_m_s):
    """Return the share of the coverage that at least M of N constant PRFs see, exactly.

    Parameters
    ----------
    ranges : Comb
        Clear ranges of every PRF (``eclipsing.clear_comb``). [m]
    speeds : Comb
        Clear radial speeds of every PRF (``stagger.notch_comb``). [m/s]
    m : int
        Number that must be clear, at least 1. [unitless]
    range_m : tuple of two floats
        The coverage's ranges. [m]
    speed_m_s : tuple of two floats
        The coverage's radial speeds. [m/s]

    Returns
    -------
    share : float
        As ``visibility.visible_share`` of the spans.
    """
    area = (range_m[1] - range_m[0]) * (speed_m_s[1] - speed_m_s[0])
    lengths = comb_lengths(ranges, range_m), comb_lengths(speeds, speed_m_s)
    return share_from_lengths(*lengths, ranges.period.size, m, area)
