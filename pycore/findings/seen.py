"""Findings on what is seen: the coverage, the must-see regions, the holes, and time out of sight."""

import math

from pycore.findings.finding import NOT_ASKED, Finding, at_least, at_most
from pycore.wording import (
    as_typed,
    as_typed_percent,
    between,
    count_word,
    in_range_unit,
    in_speed_unit,
    percent,
    plural,
    significant,
    trimmed,
    with_unit,
)

_LARGEST_HOLE = 'largest hole outside what no plan can see'
_AS_WIDE_AS = 1e-9
"""Fraction of an axis within which a hole counts as reaching its end."""


def looks(computed):
    """Say what has to see a target: ``at least 1 of the 2 PRFs``.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]

    Returns
    -------
    text : str
        Empty where there is a single look.
    """
    if computed.looks == 1:
        return ''
    if computed.m == computed.looks:
        return f' by {"both" if computed.looks == 2 else f"all {computed.looks}"} PRFs'
    return f' by at least {computed.m} of the {computed.looks} PRFs'


def visible(computed, units):
    """Return the finding on the share of the coverage that is seen.

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
    wanted = computed.plan.wanted.visible
    share, floor = computed.share, computed.floor_share
    within_reach = max(0.0, computed.excess_over_floor)
    detail = f'{percent(floor)} is what no plan can see'
    if within_reach > 1e-12:
        detail += f', {percent(within_reach)} another plan could'
    return Finding(
        'visible',
        f'coverage seen{looks(computed)}',
        share,
        percent(share, wanted),
        'share',
        wanted,
        '' if wanted is None else f'at least {as_typed_percent(wanted)}',
        at_least(share, wanted),
        detail,
        fault=f'{_only(share, wanted)} of the coverage is seen',
        spare=float('inf') if wanted is None else _spare_share(share, wanted),
        spare_text='' if wanted is None else f'the coverage seen, {percent(max(0.0, share - wanted))} to spare',
    )


def _spare_share(share, wanted):
    """Return how much of the permitted blindness is left, as a fraction of it."""
    return (share - wanted) / (1 - wanted) if wanted < 1 else float('inf')


def _only(share, wanted):
    """Say how little is seen."""
    return f'only {percent(share, wanted)}' if share > 0 else 'nothing'


def must_see(computed, units):
    """Return one finding for each must-see region, judged by the share of it that is seen.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units, with keys ``range`` and ``speed``. [unitless]

    Returns
    -------
    findings : list of Finding
        In the order of the plan.
    """
    return [_must_see(index, region, computed, units) for index, region in enumerate(computed.must_see)]


def _must_see(index, region, computed, units):
    name, wanted = region.name or f'region {index + 1}', region.wanted
    blind = blind_where(region.holes.listed, region.range_m, region.speed_m_s, computed, units)
    return Finding(
        f'must-see.{index}',
        f'part seen of the must-see region “{name}”',
        region.share,
        percent(region.share, wanted),
        'share',
        wanted,
        '' if wanted is None else 'all of it' if wanted == 1 else f'at least {as_typed_percent(wanted)}',
        at_least(region.share, wanted),
        blind,
        fault=f'{_only(region.share, wanted)} of “{name}” is seen' + (f' ({blind})' if blind else ''),
        spare=float('inf') if wanted is None else _spare_share(region.share, wanted),
        spare_text='' if wanted is None else f'“{name}”, {percent(max(0.0, region.share - wanted))} to spare',
    )


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
    plan = computed.plan
    limits = _hole_limits(plan.wanted, units)
    if not computed.holes.listed:
        met = True if limits else None
        return Finding('largest-hole', _LARGEST_HOLE, 0.0, 'none', 'share', _hole_wanted(plan.wanted), limits, met)
    hole = computed.holes.listed[0]
    where = hole_extent(hole, plan.range_m, plan.speed_m_s, units) or 'the whole coverage'
    count = computed.holes.count
    rest = f'{percent(hole.share)} of the coverage' + (f', the largest of {count_word(count)}' if count > 1 else '')
    return Finding(
        'largest-hole',
        _LARGEST_HOLE,
        hole.share,
        where,
        'share',
        _hole_wanted(plan.wanted),
        limits,
        None if not limits else not computed.holes.too_large,
        rest,
        fault=_too_large(computed.holes, plan, units),
    )


def _too_large(holes, plan, units):
    """Say how many holes are too large, and where the largest block of one lies."""
    count = holes.too_large or 0
    where = '' if holes.worst is None else hole_extent(holes.worst, plan.range_m, plan.speed_m_s, units)
    return f'{count_word(count)} {plural(count, "hole is", "holes are")} too large' + (f' ({where})' if where else '')


def _hole_limits(wanted, units):
    """Say how large a hole may be; empty where nothing was asked."""
    longest, widest = wanted.hole_m, wanted.hole_m_s
    parts = []
    if longest is not None:
        parts.append(f'{trimmed(in_range_unit(longest, units)[0])} {units["range"]} long')
    if widest is not None:
        parts.append(f'{trimmed(in_speed_unit(widest, units)[0])} {units["speed"]} wide')
    return (
        f'nowhere longer and wider than {" by ".join(parts)}'
        if len(parts) == 2
        else (f'nowhere more than {parts[0]}' if parts else '')
    )


def _hole_wanted(wanted):
    if wanted.hole_m is None and wanted.hole_m_s is None:
        return None
    return [None if wanted.hole_m is None else wanted.hole_m / 1e3, wanted.hole_m_s]


def unseen_inbound(computed, units):
    """Return the finding on the longest time that a steadily moving target stays unseen.

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
    wanted, inbound = computed.plan.wanted.unseen_s, computed.inbound
    label = 'longest time out of sight for a target flying along the beam'
    if not inbound.time_s > 0:
        return Finding('unseen-inbound', label, 0.0, 'none', 's', wanted, _seconds(wanted), at_most(0.0, wanted))
    if math.isinf(inbound.time_s):
        fault = 'a target at rest is never seen'
        met = None if wanted is None else False
        return Finding(
            'unseen-inbound', label, None, 'for ever', 's', wanted, _seconds(wanted), met, fault, fault=fault
        )
    speed, speed_unit = in_speed_unit(inbound.at_m_s, units)
    low, unit = in_range_unit(inbound.range_m[0], units)
    where = f'at {significant(speed)} {speed_unit}, ' + (
        'not seen at any range'
        if inbound.never
        else f'from {between(low, in_range_unit(inbound.range_m[1], units)[0], unit)}'
    )
    return Finding(
        'unseen-inbound',
        label,
        inbound.time_s,
        with_unit(inbound.time_s, 's', wanted),
        's',
        wanted,
        _seconds(wanted),
        at_most(inbound.time_s, wanted),
        where,
        fault=f'a target is out of sight for {with_unit(inbound.time_s, "s", wanted)}',
        **_spare_time(inbound.time_s, wanted, 'the time out of sight'),
    )


def unseen_crossing(computed, units):
    """Return the finding on how long a crossing track stays inside the notch.

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
    wanted, crossing = computed.plan.wanted.unseen_s, computed.plan.crossing
    if crossing is None:
        return Finding('unseen-crossing', 'crossing track in the notch', None, NOT_ASKED, 's')
    speed, speed_unit = in_speed_unit(crossing.speed_m_s, units)
    distance, unit = in_range_unit(crossing.range_m, units)
    label = f'a crossing track, {trimmed(speed)} {speed_unit} at {trimmed(distance)} {unit}, stays in the notch'
    seconds = computed.crossing_s
    if math.isinf(seconds):
        met = None if wanted is None else False
        return Finding(
            'unseen-crossing',
            label,
            None,
            'for ever',
            's',
            wanted,
            _seconds(wanted),
            met,
            'it is never faster than the notch',
            fault='a crossing track never leaves the notch',
        )
    scans = computed.in_scans(seconds)
    return Finding(
        'unseen-crossing',
        label,
        seconds,
        with_unit(seconds, 's', wanted),
        's',
        wanted,
        _seconds(wanted),
        at_most(seconds, wanted),
        '' if scans is None else f'{significant(scans)} scans',
        fault=f'a crossing track stays in the notch for {with_unit(seconds, "s", wanted)}',
        **_spare_time(seconds, wanted, 'the crossing track'),
    )


def _seconds(wanted):
    return '' if wanted is None else f'at most {as_typed(wanted, "s")}'


def _spare_time(seconds, wanted, what):
    if not wanted:
        return {}
    return {'spare': (wanted - seconds) / wanted, 'spare_text': f'{what}, {with_unit(wanted - seconds, "s")} to spare'}
