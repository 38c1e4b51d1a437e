"""Findings for a weather plan: Nyquist, its extension, unfolding, error of the speed, second trip."""

import math

from pycore import pulse_pair, weather
from pycore.findings.finding import Finding, at_least, at_most
from pycore.wording import as_typed, between, in_range_unit, in_speed_unit, listed, percent, significant, with_unit


def nyquist(computed, units):
    """Return the finding on the Nyquist speed of a single PRF, the largest of the set.

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
    speeds = [in_speed_unit(float(blind) / 2, units)[0] for blind in computed.blind_speed_m_s]
    largest, unit = in_speed_unit(float(computed.blind_speed_m_s.max()) / 2, units)
    every = f'± {listed(significant(speed) for speed in speeds)} {unit}' if len(speeds) > 1 else ''
    return Finding(
        'nyquist',
        'largest Nyquist speed of a single PRF',
        float(computed.blind_speed_m_s.max()) / 2,
        f'± {with_unit(largest, unit)}',
        'm/s',
        detail=f'the PRFs alone: {every}' if every else _coherence(computed),
    )


def _coherence(computed):
    """Say whether echoes hold together from pulse to pulse."""
    plan = computed.plan
    ratio = float(
        max(pulse_pair.coherence(plan.pri_s, plan.document['weather']['width_mps'], float(plan.wavelength_m[0])))
    )
    holds = 'hold together' if ratio <= 1 else 'do not hold together'
    return f'echoes {holds} from pulse to pulse (π times the width over the Nyquist speed is {significant(ratio)})'


def _pair(computed):
    """Return the two PRFs that unfold together, or ``None`` where there are not two on one carrier."""
    plan = computed.plan
    counts = sorted(set(plan.pri_counts))
    if len(counts) != 2 or len(set(plan.carrier_hz.tolist())) > 1:
        return None
    return weather.two_prf(counts, plan.clock_hz, float(plan.wavelength_m[0]))


_NO_PAIR = 'speeds are unfolded by exactly two different PRIs on one carrier'


def extended_nyquist(computed, units):
    """Return the finding on the Nyquist speed of both PRFs together.

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
    wanted = computed.plan.document['weather']['wanted_mps']
    text = '' if wanted is None else f'at least ± {as_typed(*in_speed_unit(wanted, units))}'
    asked = Finding('extended-nyquist', 'Nyquist speed of two PRFs together', None, 'none', 'm/s', wanted, text)
    pair = _pair(computed)
    if pair is None:
        return asked.reached(None, 'none', met=_not_without(wanted), detail=_NO_PAIR, fault=_NO_PAIR)
    speed, unit = in_speed_unit(pair.nyquist_m_s, units)
    limit = None if wanted is None else in_speed_unit(wanted, units)[0]
    shown = f'± {with_unit(speed, unit, limit)}'
    return asked.reached(
        *(pair.nyquist_m_s, shown),
        met=at_least(pair.nyquist_m_s, wanted),
        detail=f'the PRIs are as {pair.m} to {pair.n}',
        fault=f'speeds unfold only to {shown}',
        spare=float('inf') if not wanted else (pair.nyquist_m_s - wanted) / wanted,
        spare_text='' if not wanted else f'the extended Nyquist speed, {with_unit(speed - limit, unit)} to spare',
    )


def _not_without(wanted):
    """Return the verdict where there is no value to judge."""
    return None if wanted is None else False


def _deviations(computed):
    """Return the standard error of the speed on each PRF, shape N."""
    plan, asked = computed.plan, computed.plan.document['weather']
    snr = 10.0 ** (asked['snr_db'] / 10.0)
    rows = zip(plan.pulses.tolist(), plan.pri_s.tolist(), plan.wavelength_m.tolist(), strict=True)
    return [
        pulse_pair.pulse_pair_deviation(pulses, pri, asked['width_mps'], snr, wavelength) if pulses > 1 else math.inf
        for pulses, pri, wavelength in rows
    ]


def unfolding(computed, units):
    """Return the finding on how often unfolding picks a wrong fold.

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
    pair, label = _pair(computed), 'unfolding that picks a wrong fold'
    if pair is None:
        return Finding('unfolding', label, None, 'none', 'share', detail=_NO_PAIR)
    by_count = dict(zip(computed.plan.pri_counts, _deviations(computed), strict=True))
    short, long = (by_count[count] for count in sorted(by_count))
    failure = 1.0 if math.isinf(short) or math.isinf(long) else weather.unfolding_failure(pair, short, long)
    half, unit = in_speed_unit(pair.nyquist_short_m_s / pair.n, units)
    return Finding(
        'unfolding',
        label,
        failure,
        percent(failure),
        'share',
        detail=f'it holds while the two errors differ by less than {with_unit(half, unit)}',
    )


def velocity_error(computed, units):
    """Return the finding on the standard error of the mean speed, the largest of the set.

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
    wanted = computed.plan.document['weather']['error_mps']
    text = '' if wanted is None else f'at most {as_typed(*in_speed_unit(wanted, units))}'
    asked = Finding('velocity-error', 'standard error of the mean speed', None, 'no end', 'm/s', wanted, text)
    worst = max(_deviations(computed))
    if math.isinf(worst):
        fault = 'the echoes do not hold together from pulse to pulse'
        return asked.reached(None, 'no end', met=_not_without(wanted), detail=fault, fault=fault)
    speed, unit = in_speed_unit(worst, units)
    limit = None if wanted is None else in_speed_unit(wanted, units)[0]
    return asked.reached(
        *(worst, with_unit(speed, unit, limit)),
        met=at_most(worst, wanted),
        detail=_coherence(computed),
        fault=f'the standard error of the speed is {with_unit(speed, unit, limit)}',
        spare=float('inf') if not wanted else (wanted - worst) / wanted,
        spare_text='' if not wanted else f'the error of the speed, {with_unit(limit - speed, unit)} to spare',
    )


def second_trip(computed, units):
    """Return the finding on the ranges whose echoes overlay the coverage one interval late.

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
    overlays = weather.second_trip(plan.range_m, computed.unambiguous_range_m)[:, 0]
    reach = float(computed.unambiguous_range_m.min())
    shown = []
    for low, high in overlays.tolist():
        if not math.isnan(low):
            start, unit = in_range_unit(low, units)
            shown.append(between(start, in_range_unit(high, units)[0], unit))
    different = list(dict.fromkeys(shown))
    return Finding(
        'second-trip',
        'second-trip echoes come from',
        reach / 1e3,
        listed(different) if len(different) <= 2 else f'{different[0]} and {len(different) - 1} more',
        'km',
        detail='ranges that overlay the coverage, on each PRF',
    )
