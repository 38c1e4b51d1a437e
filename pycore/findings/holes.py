"""The finding on the largest hole, and how holes are told in a sentence."""

from pycore.findings.finding import Finding
from pycore.wording import between, count_word, in_range_unit, in_speed_unit, percent, plural, trimmed

_LABEL = 'largest hole outside what no plan can see'
_AS_WIDE_AS = 1e-9
"""Fraction of an axis within which a hole counts as reaching its end."""


def largest_hole(computed, units):
    """Return the finding on the largest hole outside what no plan can see.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units, with keys ``range`` and ``speed``. [unitless]

    Returns
    -------
    finding : Finding
        Value, what was wanted, and the sentence.
    """
    plan, found = computed.plan, computed.holes
    limits = _limits(plan.wanted, units)
    asked = Finding(
        'largest-hole', _LABEL, 0.0, 'none', 'share', _wanted(plan.wanted), limits, True if limits else None
    )
    if not found.listed:
        return asked
    largest = found.listed[0]
    where = hole_extent(largest, plan.range_m, plan.speed_m_s, units) or 'the whole coverage'
    rest = f', the largest of {count_word(found.count)}' if found.count > 1 else ''
    return asked.reached(
        largest.share,
        where,
        met=not found.too_large if limits else None,
        detail=f'{percent(largest.share)} of the coverage{rest}',
        fault=_too_large(found, plan, units),
    )


def _too_large(holes, plan, units):
    """Say how many holes are too large, and where the largest block of one lies."""
    count = holes.too_large or 0
    where = '' if holes.worst is None else hole_extent(holes.worst, plan.range_m, plan.speed_m_s, units)
    return f'{count_word(count)} {plural(count, "hole is", "holes are")} too large' + (f' ({where})' if where else '')


def _limits(wanted, units):
    """Say how large a hole may be; empty where nothing was asked."""
    parts = []
    if wanted.hole_m is not None:
        parts.append(f'{trimmed(in_range_unit(wanted.hole_m, units)[0])} {units["range"]} long')
    if wanted.hole_m_s is not None:
        parts.append(f'{trimmed(in_speed_unit(wanted.hole_m_s, units)[0])} {units["speed"]} wide')
    if len(parts) == 2:
        return f'nowhere more than {" and ".join(parts)}'
    return f'nowhere more than {parts[0]}' if parts else ''


def _wanted(wanted):
    if wanted.hole_m is None and wanted.hole_m_s is None:
        return None
    return [None if wanted.hole_m is None else wanted.hole_m / 1e3, wanted.hole_m_s]


def blind_where(holes, range_m, speed_m_s, computed, units):
    """Say where the largest of some holes lies; empty where there is none.

    Parameters
    ----------
    holes : sequence of Hole
        Largest first. [unitless]
    range_m, speed_m_s : pair of float
        The region they lie in, to leave out an extent that is the whole of it. [m, m/s]
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    text : str
        Such as ``'both PRFs are blind from 56.3 to 60.6 m/s'``.
    """
    if not holes:
        return ''
    where = hole_extent(holes[0], range_m, speed_m_s, units)
    if len(holes) > 1:
        return f'the largest of {count_word(len(holes))} holes is {where}'
    return f'{_who_is_blind(computed)} from {where}' if where else f'{_who_is_blind(computed)} everywhere in it'


def _who_is_blind(computed):
    if computed.looks == 1:
        return 'it is blind'
    if computed.m == 1:
        return 'both PRFs are blind' if computed.looks == 2 else f'all {computed.looks} PRFs are blind'
    return f'fewer than {computed.m} PRFs see'


def hole_extent(hole, range_m, speed_m_s, units):
    """Say where a hole lies, leaving out an extent that fills its whole region.

    Parameters
    ----------
    hole : Hole
        With ``range_m`` and ``speed_m_s``. [m, m/s]
    range_m, speed_m_s : pair of float
        The region it lies in. [m, m/s]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    text : str
        Such as ``'40 to 52 km, 56.3 to 60.6 m/s'``.
    """
    parts = []
    if not _fills(hole.range_m, range_m):
        low, unit = in_range_unit(hole.range_m[0], units)
        parts.append(between(low, in_range_unit(hole.range_m[1], units)[0], unit))
    if not _fills(hole.speed_m_s, speed_m_s):
        low, unit = in_speed_unit(hole.speed_m_s[0], units)
        parts.append(between(low, in_speed_unit(hole.speed_m_s[1], units)[0], unit))
    return ', '.join(parts)


def _fills(inner, outer):
    slack = _AS_WIDE_AS * (outer[1] - outer[0])
    return inner[0] <= outer[0] + slack and inner[1] >= outer[1] - slack
