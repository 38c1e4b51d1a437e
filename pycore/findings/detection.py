"""The finding on how far the target is detected."""

from pycore.findings.finding import Finding, at_least
from pycore.wording import as_typed, in_range_unit, significant, trimmed, with_unit


def detection(computed, units):
    """Return the finding on the range at which the target is detected, over half of the wanted speeds.

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
    wanted_m = plan.wanted.detect_m
    label = f'range at which the target is detected with probability {trimmed(plan.target.pd_wanted)}'
    wanted_text = '' if wanted_m is None else f'at least {as_typed(*in_range_unit(wanted_m, units))}'
    wanted = None if wanted_m is None else wanted_m / 1e3
    if not computed.with_echoes and wanted_m is None:
        return Finding('detection', label, None, '…', 'km')
    reached = computed.echoes.reached_km()
    median = reached['median']
    if median is None:
        met = None if wanted_m is None else False
        return Finding(
            'detection',
            label,
            None,
            'not reached',
            'km',
            wanted,
            wanted_text,
            met,
            _spread(reached, units),
            fault=f'the target is not detected at half of the speeds with probability {trimmed(plan.target.pd_wanted)}',
        )
    shown, unit = in_range_unit(median * 1e3, units)
    limit = None if wanted_m is None else in_range_unit(wanted_m, units)[0]
    return Finding(
        'detection',
        label,
        median,
        with_unit(shown, unit, limit),
        'km',
        wanted,
        wanted_text,
        at_least(median, wanted),
        _spread(reached, units),
        fault=f'the target is detected only to {with_unit(shown, unit, limit)}',
        spare=float('inf') if wanted is None else (median - wanted) / wanted,
        spare_text='' if wanted is None else f'the detection range, {with_unit(shown - limit, unit)} to spare',
    )


def _spread(reached, units):
    """Say which speeds the value is of, and how far the best and the worst of them reach."""
    best, worst = (
        'not reached' if reached[name] is None else significant(in_range_unit(reached[name] * 1e3, units)[0])
        for name in ('best', 'worst')
    )
    return f'at half of the wanted speeds, by noise alone; best {best}, worst {worst}'
