"""Findings on time on target, duty and range walk."""

from pycore.findings.finding import Finding, at_most
from pycore.wording import as_typed, as_typed_percent, percent, significant, with_unit


def dwell(computed, units):
    """Return the finding on the time that the set uses of the time on target.

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
    used, available = computed.time_used_s * 1e3, computed.plan.time_on_target_s
    if available is None:
        label = 'time used by one set of CPIs with their fill pulses'
        return Finding('dwell', label, used, with_unit(used, 'ms'), 'ms', detail='no time on target is given')
    available *= 1e3
    spare = available - used
    sets = int(available / used + 1e-9)
    return Finding(
        'dwell',
        f'time used of the {with_unit(available, "ms")} that the beam rests on a target',
        used,
        with_unit(used, 'ms', available),
        'ms',
        available,
        f'at most {with_unit(available, "ms")}',
        at_most(used, available),
        f'{sets} whole sets fit' if sets > 1 else '',
        fault=f'the set takes {with_unit(used, "ms", available)} of the {with_unit(available, "ms")} on target',
        spare=spare / available,
        spare_text=f'the time on target, {with_unit(spare, "ms")} to spare',
    )


def duty(computed, units):
    """Return the finding on the largest duty of the set.

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
    limit, largest = computed.plan.duty_limit, computed.duty_largest
    mean = percent(computed.duty_mean)
    return Finding(
        'duty',
        'largest duty of the set' if computed.plan.n > 1 else 'duty',
        largest,
        percent(largest, limit),
        'share',
        limit,
        '' if limit is None else f'at most {as_typed_percent(limit)}',
        at_most(largest, limit),
        f'{mean} on average over the set' if computed.plan.n > 1 else '',
        fault=f'the duty reaches {percent(largest, limit)}',
        spare=float('inf') if not limit else (limit - largest) / limit,
        spare_text='' if not limit else f'the duty, {significant((limit - largest) * 100)} % to spare',
    )


def range_walk(computed, units):
    """Return the finding on how many gates the fastest target crosses within one CPI.

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
    wanted = computed.plan.wanted.range_walk_gates
    worst = float(max(computed.range_walk_gates))
    return Finding(
        'range-walk',
        'range walk of the fastest target within one CPI',
        worst,
        with_unit(worst, 'gates', wanted),
        'gates',
        wanted,
        '' if wanted is None else f'at most {as_typed(wanted, "gates")}',
        at_most(worst, wanted),
        f'{significant(computed.range_walk_set_gates)} gates over the whole set' if computed.plan.n > 1 else '',
        fault=f'the fastest target walks through {with_unit(worst, "gates", wanted)}',
    )
