"""Workings of the first blind speed: of PRFs by their notches, of a stagger by its response."""

import cmath
import math

from pycore.workings.limits import canceller_limits, notch_parts
from pycore.workings.line import DEFINITION, DERIVED, Line, Working, each, put_in, shown

_ON_THE_EDGE = 1e-9


def blind_speed(computed, name):
    """Return the workings of the first blind speed.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        With the suggested notch in its parts, or the limits of the canceller, where there is surface clutter.
    """
    return _stagger(computed) if computed.is_stagger else _dwells(computed)


def _dwells(computed):
    blind, notch = computed.blind_speed_m_s.tolist(), computed.plan.notch_m_s.tolist()
    first = computed.first_blind_m_s
    lines = [
        Line(
            'v_b = λ/(2T)',
            put_in(each('λ', computed.plan.wavelength_m * 100, 'cm'), each('T', computed.plan.pri_s * 1e6, 'µs')),
            each('v_b', blind, 'm/s'),
            'Richards, Fundamentals of Radar Signal Processing, 2nd ed., sec. 5.3',
        ),
    ]
    who = 'no PRF has' if computed.m == 1 else f'fewer than {computed.m} PRFs have'
    formula = f'first speeds above the notch on which {who} |v − k v_b| ≥ notch'
    numbers = put_in(each('v_b', blind, 'm/s'), each('notch', notch, 'm/s'))
    value = None
    if first is None:
        lines.append(Line(formula, numbers, 'none within the coverage', DEFINITION))
    else:
        edge, value = _edge(first[0], blind, notch, computed.plan.speed_m_s)
        lines.append(Line(formula, numbers, f'{shown(first[0])} to {shown(first[1], "m/s")}', DEFINITION))
        lines.append(edge)
    parts, notes = notch_parts(computed)
    return Working((*lines, *parts), value, notes)


def _edge(start, blind, notch, speed_m_s):
    """Say which notch, or which end of the coverage, the first blind interval begins with."""
    for place, (period, half) in enumerate(zip(blind, notch, strict=True)):
        k = round((start + half) / period)
        value = k * period - half
        if k > 0 and abs(value - start) <= _ON_THE_EDGE * max(abs(start), period):
            numbers = put_in(f'k = {k}', f'v_b = {shown(period, "m/s")}', f'notch {shown(half, "m/s")}')
            return Line(f'it begins at k v_b − notch of PRF {place + 1}', numbers, shown(value, 'm/s')), value
    value = min((0.0, *(abs(end) for end in speed_m_s)), key=lambda end: abs(end - start))
    return Line('it begins where the wanted speeds do', shown(value, 'm/s'), shown(value, 'm/s')), value


def _stagger(computed):
    found, plan = computed.response, computed.plan
    weights = computed.echoes.weights
    lines = [
        Line(
            'response(v) = Σ over phases |Σ w_k exp(−j 4π v t_k/λ)|²/(phases × Σ w_k²)',
            put_in(
                each('T', plan.pri_s * 1e6, 'µs'),
                f'w = {", ".join(shown(weight) for weight in weights)}',
                f'λ = {shown(plan.wavelength_m[0] * 100, "cm")}',
            ),
            '0 dB is its mean over all speeds',
        ),
        _notch(found, plan),
        _first_below(computed, found, weights),
        *_true_first(found, plan),
    ]
    limits, notes = canceller_limits(computed)
    return Working((*lines, *limits), found.first_below_m_s, notes)


def _notch(found, plan):
    reached = f'{shown(found.notch_m_s, "m/s")}' if math.isfinite(found.notch_m_s) else 'nowhere'
    numbers = f'least response {shown(plan.response_min_db, "dB")}'
    return Line('the notch around zero ends where the response first reaches the least', numbers, reached, DEFINITION)


def _first_below(computed, found, weights):
    """Say where the response first falls below the least, and what it is there, straight from its definition."""
    at = found.first_below_m_s
    formula = 'first speed above the notch at which the response falls below the least'
    if at is None:
        numbers = f'looked for up to {shown(found.searched_to_m_s, "m/s")}'
        return Line(formula, numbers, 'none', DEFINITION)
    there = response_db(computed.plan, weights, at)
    return Line(formula, f'v = {shown(at, "m/s")}: {shown(round(there, 6), "dB")}', shown(at, 'm/s'), DEFINITION)


def response_db(plan, weights, speed_m_s):
    """Return a stagger's averaged response straight from its definition.

    Parameters
    ----------
    plan : Plan
        A stagger. [unitless]
    weights : sequence of float
        Weights of successive pulses. [unitless]
    speed_m_s : float
        Radial speed. [m/s]

    Returns
    -------
    response_db : float
        0 dB is the mean over all speeds. [dB]
    """
    pri, n, wavelength = plan.pri_s.tolist(), plan.n, float(plan.wavelength_m[0])
    total = 0.0
    for phase in range(n):
        times = [0.0]
        for k in range(len(weights) - 1):
            times.append(times[-1] + pri[(phase + k) % n])
        turn = -4j * math.pi * speed_m_s / wavelength
        total += abs(sum(w * cmath.exp(turn * t) for w, t in zip(weights, times, strict=True))) ** 2
    power = total / (n * sum(weight**2 for weight in weights))
    return 10.0 * math.log10(max(power, 1e-30))


def _true_first(found, plan):
    """Say where the response repeats, and how deep its deepest dip is."""
    counts = round(float(plan.wavelength_m[0]) * plan.clock_hz / (2.0 * found.true_first_blind_m_s))
    name = 'true first blind speed' if found.is_blind else 'speed at which the response repeats'
    whose = 'the PRIs' if plan.weights is None else 'all time differences of pulses with weight'
    yield Line(
        f'{name} = λ/(2g), g the greatest common divisor of {whose}',
        put_in(f'PRIs {", ".join(str(one) for one in plan.pri_counts)} counts', f'g = {counts} counts'),
        f'{shown(found.true_first_blind_m_s, "m/s")}, {shown(found.ratio_to_mean)} times that of the mean PRI',
        DERIVED,
    )
    if found.deepest_db is not None:
        yield Line(
            'deepest dip of the response over the wanted speeds beyond its rise',
            f'v = {shown(found.deepest_at_m_s, "m/s")}',
            shown(found.deepest_db, 'dB'),
            DEFINITION,
        )
