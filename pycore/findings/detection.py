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
    plan, wanted_m = computed.plan, computed.plan.wanted.detect_m
    probability = trimmed(plan.target.pd_wanted)
    label = f'range at which the target is detected with probability {probability}'
    if not computed.with_echoes and wanted_m is None:
        return Finding('detection', label, None, '…', 'km')
    text = '' if wanted_m is None else f'at least {as_typed(*in_range_unit(wanted_m, units))}'
    reached = computed.echoes.reached_km()
    asked = Finding(
        *('detection', label, None, 'not reached', 'km', None if wanted_m is None else wanted_m / 1e3, text),
        detail=_spread(reached, units),
    )
    if reached['median'] is None:
        fault = f'the target is not detected at half of the speeds with probability {probability}'
        return asked.reached(None, 'not reached', met=None if wanted_m is None else False, fault=fault)
    return _median(asked, reached['median'], units)


def _median(asked, median_km, units):
    """Return the finding with the range that half of the wanted speeds reach."""
    wanted = asked.wanted
    shown, unit = in_range_unit(median_km * 1e3, units)
    limit = None if wanted is None else in_range_unit(wanted * 1e3, units)[0]
    return asked.reached(
        *(median_km, with_unit(shown, unit, limit)),
        met=at_least(median_km, wanted),
        fault=f'the target is detected only to {with_unit(shown, unit, limit)}',
        spare=float('inf') if not wanted else (median_km - wanted) / wanted,
        spare_text='' if not wanted else f'the detection range, {with_unit(shown - limit, unit)} to spare',
    )


def _spread(reached, units):
    """Say which speeds the value is of, and how far the best and the worst of them reach."""
    best, worst = (
        'not reached' if reached[name] is None else significant(in_range_unit(reached[name] * 1e3, units)[0])
        for name in ('best', 'worst')
    )
    return f'at half of the wanted speeds, by noise alone; best {best}, worst {worst}'
