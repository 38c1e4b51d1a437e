"""Findings on time out of sight: flying along the beam, and crossing it."""

import math

from pycore.findings.finding import NOT_ASKED, Finding, at_most
from pycore.wording import as_typed, between, converted, in_range_unit, in_speed_unit, significant, trimmed, with_unit


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
    wanted, found = computed.plan.wanted.unseen_s, computed.inbound
    label = 'longest time out of sight for a target flying along the beam'
    asked = Finding('unseen-inbound', label, None, '', 's', wanted, _seconds(wanted))
    if not found.time_s > 0:
        return asked.reached(0.0, 'none', met=at_most(0.0, wanted))
    if math.isinf(found.time_s):
        fault = 'a target at rest is never seen'
        return asked.reached(None, 'for ever', met=_never(wanted), detail=fault, fault=fault)
    return asked.reached(
        *(found.time_s, with_unit(found.time_s, 's', wanted)),
        met=at_most(found.time_s, wanted),
        detail=_where(found, units),
        fault=f'a target is out of sight for {with_unit(found.time_s, "s", wanted)}',
        **_spare(found.time_s, wanted, 'the time out of sight'),
    )


def _where(found, units):
    """Say at which speed a target is out of sight for longest, and from where to where."""
    speed, unit = in_speed_unit(found.at_m_s, units)
    if found.never:
        return f'at {significant(speed)} {unit}, not seen at any range'
    low, high = (in_range_unit(end, units)[0] for end in found.range_m)
    return f'at {significant(speed)} {unit}, from {between(low, high, units["range"])}'


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
    track = f'{_input(*in_speed_unit(crossing.speed_m_s, units))} at {_input(*in_range_unit(crossing.range_m, units))}'
    label = f'a crossing track, {track}, stays in the notch'
    asked = Finding('unseen-crossing', label, None, '', 's', wanted, _seconds(wanted))
    seconds = computed.crossing_s
    if math.isinf(seconds):
        fault = 'a crossing track never leaves the notch'
        return asked.reached(
            None, 'for ever', met=_never(wanted), detail='it is never faster than the notch', fault=fault
        )
    scans = computed.in_scans(seconds)
    return asked.reached(
        *(seconds, with_unit(seconds, 's', wanted)),
        met=at_most(seconds, wanted),
        detail='' if scans is None else f'{significant(scans)} scans',
        fault=f'a crossing track stays in the notch for {with_unit(seconds, "s", wanted)}',
        **_spare(seconds, wanted, 'the crossing track'),
    )


def _input(value, unit):
    return f'{trimmed(converted(value))} {unit}'


def _never(wanted):
    """Return the verdict on a time that has no end."""
    return None if wanted is None else False


def _seconds(wanted):
    return '' if wanted is None else f'at most {as_typed(wanted, "s")}'


def _spare(seconds, wanted, what):
    if not wanted:
        return {}
    return {'spare': (wanted - seconds) / wanted, 'spare_text': f'{what}, {with_unit(wanted - seconds, "s")} to spare'}
