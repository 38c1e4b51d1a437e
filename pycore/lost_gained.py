"""What one plan sees of a coverage that another one does not: exactly, without a grid.

Both axes are cut at every edge of either plan; each segment carries both plans'
patterns. A plan sees the product of two segments where enough of its PRFs are in both
patterns, so the shares are sums of products of lengths over pairs of patterns. (Derived
here; pairs are met one by one, as two sets of sixteen PRFs have too many subsets for a table.)
"""

from dataclasses import dataclass

import numpy as np

from pycore.patterns import sweep
from pycore.spans import Spans

_PAIRS_AT_ONCE = 400_000


@dataclass(frozen=True, slots=True)
class LostGained:
    """Shares of a coverage's area; together they make 1.

    Parameters
    ----------
    lost : float
        Seen by the other plan and not by this one. [unitless]
    gained : float
        Seen by this one and not by the other. [unitless]
    both : float
        Seen by both. [unitless]
    neither : float
        Seen by none of the two. [unitless]
    """

    lost: float
    gained: float
    both: float
    neither: float


def lost_gained(sight, other):
    """Return what a plan loses and gains against another one.

    Parameters
    ----------
    sight : Sight
        The plan over a coverage. [m and m/s]
    other : Sight
        The other plan over the same coverage. [m and m/s]

    Returns
    -------
    shares : LostGained
        A share that is nought is exactly 0.
    """
    on_range = _met(sight.ranges, other.ranges, sight.n, sight.range_m)
    on_speed = _met(sight.speeds, other.speeds, sight.n, sight.speed_m_s)
    total = np.zeros(4)
    rows = max(1, _PAIRS_AT_ONCE // max(on_speed[2].size, 1))
    for first in range(0, on_range[2].size, rows):
        part = tuple(column[first : first + rows] for column in on_range)
        total += _shares(part, on_speed, sight.m, other.m)
    # Lengths are parts of their axes; rounding is shared out so that the four make one.
    neither, gained, lost, both = (total / total.sum()).tolist()
    return LostGained(lost, gained, both, neither)


def _met(spans, others, n, limits):
    """Return the different pairs of patterns along an axis, and the length of each."""
    together = Spans(
        np.concatenate((spans.prf, others.prf + n)),
        np.concatenate((spans.start, others.start)),
        np.concatenate((spans.stop, others.stop)),
    )
    swept = sweep(together, limits)
    pattern, place = np.unique(swept.pattern, return_inverse=True)
    length = np.bincount(place, np.diff(swept.edges) / (limits[1] - limits[0]), pattern.size)
    return pattern & (1 << n) - 1, pattern >> n, length


def _shares(on_range, on_speed, m, other_m):
    """Return the area seen by neither, by the plan alone, by the other alone and by both."""
    seen = np.bitwise_count(on_range[0][:, None] & on_speed[0]) >= m
    code = seen + 2 * (np.bitwise_count(on_range[1][:, None] & on_speed[1]) >= other_m)
    area = np.multiply.outer(on_range[2], on_speed[2])
    return np.bincount(code.ravel(), area.ravel(), 4)
