"""The plan that was kept to compare with, as the figures of the present plan need it: over the present coverage."""

from functools import lru_cache

from pycore.columns.blind_parts import gaps, zones
from pycore.lost_gained import lost_gained
from pycore.patterns import sweep


def is_alike(computed, kept):
    """Return whether each PRF of the present plan has one of the kept plan's to stand beside.

    Parameters
    ----------
    computed, kept : Computed
        What the present plan gives, and what the kept one does. [SI]

    Returns
    -------
    alike : bool
        As many PRFs, and both dwells or both a stagger.
    """
    return computed.plan.n == kept.plan.n and computed.is_stagger == kept.is_stagger


def sight_over(kept, plan):
    """Return what the kept plan sees of the present plan's coverage.

    Parameters
    ----------
    kept : Computed
        What the kept plan gives. [SI]
    plan : Plan
        The present plan. [unitless]

    Returns
    -------
    sight : Sight
        Worked out once, until the coverage changes.
    """
    return _sight(kept, tuple(plan.range_m), tuple(plan.speed_m_s))


@lru_cache(maxsize=2)
def _sight(kept, range_m, speed_m_s):
    return kept.sight_of(range_m, speed_m_s)


def difference(computed, kept):
    """Return the shares of the present coverage that were lost and gained.

    Parameters
    ----------
    computed, kept : Computed
        What the present plan gives, and what the kept one does. [SI]

    Returns
    -------
    shares : LostGained
        By eclipsing and notch only.
    """
    return lost_gained(computed.sight, sight_over(kept, computed.plan))


def same_coverage(computed, kept):
    """Return whether both plans are to see the same ranges and speeds.

    Parameters
    ----------
    computed, kept : Computed
        What the present plan gives, and what the kept one does. [SI]

    Returns
    -------
    same : bool
        Whether shares of the two mean the same whole.
    """
    one, other = computed.plan, kept.plan
    return tuple(one.range_m) == tuple(other.range_m) and tuple(one.speed_m_s) == tuple(other.speed_m_s)


def blind_on(kept, plan, axis):
    """Return where each PRF of the kept plan is blind along one axis of the present coverage, and where the set is.

    Parameters
    ----------
    kept : Computed
        What the kept plan gives. [SI]
    plan : Plan
        The present plan. [unitless]
    axis : int
        0 for range, 1 for speed. [unitless]

    Returns
    -------
    gaps : Spans
        Of each PRF. [m or m/s]
    zones : float array, shape (Z, 2)
        Ends of the stretches on which the kept plan has too few. [m or m/s]
    """
    return _blind(kept, tuple(plan.range_m), tuple(plan.speed_m_s), axis)


@lru_cache(maxsize=4)
def _blind(kept, range_m, speed_m_s, axis):
    limits = (range_m, speed_m_s)[axis]
    own = kept.prf_spans(range_m, speed_m_s)[axis]
    seen = _sight(kept, range_m, speed_m_s)
    swept = sweep((seen.ranges, seen.speeds)[axis], limits)
    return gaps(own, kept.plan.n, limits), zones(swept, kept.looks, kept.m)
