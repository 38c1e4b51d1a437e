"""By how much a set misses a limit: what a search goes by until it meets them all.

A *shortfall* is the part of what was wanted that is missing, and 0 where it is met.
"""

import numpy as np

MET_WITHIN = 1e-9
"""A share counts as reached, and a time as kept, that is so near. [unitless]"""

DIGITS = 12
"""Scores and shortfalls are rounded to so many decimals before they are compared. [unitless]"""


def hole_share(found):
    """Return how much of the coverage lies in holes that are too large.

    Parameters
    ----------
    found : Holes
        Judged. [m, m/s]

    Returns
    -------
    share : float
        0 where there is none, and never 0 where there is one, though it may be too small to be listed. [unitless]
    """
    large = sum(hole.share for hole in found.listed if hole.too_large)
    return max(float(large), 1e-6) if found.too_large else 0.0


def short_of(got, wanted):
    """Return by how much a limit is missed, as a part of it.

    Parameters
    ----------
    got : float or array, shape S
        What there is. [any]
    wanted : float or None
        Least that is wanted; of what must not be too large, both negative. ``None`` for no limit. [same]

    Returns
    -------
    short : float or array, shape S
        0 where it is met. [unitless]
    """
    if wanted is None:
        return np.zeros(np.shape(got))
    missing = wanted - np.asarray(got)
    scale = max(abs(wanted), 1e-300)
    return np.where(missing > MET_WITHIN * scale, missing / scale, 0.0)
