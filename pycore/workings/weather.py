"""Workings of a weather plan's findings."""

import math

from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.workings.line import DEFINITION, Line, Working, each, put_in, shown

_TORRES = 'Torres, Dubel and Zrnic, J. Atmos. Oceanic Technol. 21(9), 2004; levels derived here'
_NO_PAIR = 'Speeds are unfolded by exactly two different PRIs on one carrier.'


def nyquist(computed, name):
    """Return the workings of the largest Nyquist speed of a single PRF.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        λ/(4T), the largest.
    """
    plan = computed.plan
    speeds = [wave / (4.0 * pri) for wave, pri in zip(plan.wavelength_m.tolist(), plan.pri_s.tolist(), strict=True)]
    numbers = put_in(each('λ', plan.wavelength_m * 100, 'cm'), each('T', plan.pri_s * 1e6, 'µs'))
    lines = (
        Line('v_N = λ/(4T), half the first blind speed', numbers, each('v_N', speeds, 'm/s'), DEFINITION),
        Line('largest of the set', each('v_N', speeds, 'm/s'), f'± {shown(max(speeds), "m/s")}', DEFINITION),
        _coherence(computed),
    )
    return Working(lines, max(speeds))


def _coherence(computed):
    """Say whether echoes hold together from pulse to pulse."""
    width = computed.plan.document['weather']['width_mps']
    ratios = [math.pi * width / (blind / 2.0) for blind in computed.blind_speed_m_s.tolist()]
    return Line(
        'echoes hold together while π σ_v ≤ v_N',
        f'σ_v = {shown(width, "m/s")}',
        each('π σ_v/v_N', ratios),
        'Doviak and Zrnic, Doppler Radar and Weather Observations (from memory)',
    )


def _pair(plan):
    """Return the two PRIs in lowest terms and the Nyquist speed of the shorter; ``None`` where there are not two."""
    counts = sorted({int(count) for count in plan.pri_counts})
    if len(counts) != 2 or len(set(plan.carrier_hz.tolist())) > 1:
        return None
    common = math.gcd(*counts)
    return counts[0] // common, counts[1] // common, float(plan.wavelength_m[0]) * plan.clock_hz / (4.0 * counts[0])


def extended_nyquist(computed, name):
    """Return the workings of the Nyquist speed of both PRFs together.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        m v_N1, with T1 : T2 as m : n.
    """
    pair = _pair(computed.plan)
    if pair is None:
        return Working((), None, (_NO_PAIR,))
    m, n, short = pair
    numbers = put_in(f'T1 : T2 = {m} : {n}', f'v_N1 = {shown(short, "m/s")}')
    return Working((Line('v_N1 × m = v_N2 × n', numbers, f'± {shown(m * short, "m/s")}', _TORRES),), m * short)


def unfolding(computed, name):
    """Return the workings of how often unfolding picks a wrong fold.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        erfc((v_N1/n)/(√2 σ)).
    """
    pair = _pair(computed.plan)
    if pair is None:
        return Working((), None, (_NO_PAIR,))
    _, n, short = pair
    by_count = dict(zip(computed.plan.pri_counts, deviations(computed), strict=True))
    both = [by_count[count] for count in sorted(by_count)]
    sigma = math.hypot(*both)
    value = 1.0 if math.isinf(sigma) else math.erfc(short / n / (math.sqrt(2.0) * sigma)) if sigma > 0 else 0.0
    lines = (
        Line('levels of the difference lie 2 v_N1/n apart; half of that', f'n = {n}', shown(short / n, 'm/s'), _TORRES),
        Line('σ = √(σ_1² + σ_2²), by pulse pairs', each('σ_i', both, 'm/s'), shown(sigma, 'm/s')),
        Line('erfc((v_N1/n)/(√2 σ))', put_in(shown(short / n, 'm/s'), shown(sigma, 'm/s')), f'{value:.6g}'),
    )
    return Working(lines, value, (_PULSE_PAIR,))


_PULSE_PAIR = 'Pulse-pair errors are to first order: understated where a dwell holds fewer than ten independent echoes.'


def deviations(computed):
    """Return the standard error of the mean speed on each PRF, straight from its sum.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]

    Returns
    -------
    deviation_m_s : list of float
        One for each PRF, infinite where there is no pair or no correlation. [m/s]
    """
    plan = computed.plan
    asked = plan.document['weather']
    rows = zip(plan.pulses.tolist(), plan.pri_s.tolist(), plan.wavelength_m.tolist(), strict=True)
    return [_deviation(*row, asked['width_mps'], 10.0 ** (asked['snr_db'] / 10.0)) for row in rows]


def _deviation(pulses, pri, wavelength, width, snr):
    """Sum (M − |m|)(r_m² − r_{m+1} r_{m−1}) with the signal at 1, noise at lag 0."""
    a = 8.0 * (math.pi * width * pri / wavelength) ** 2
    if pulses < 2 or a > 300.0:
        return math.inf
    pairs = pulses - 1
    # r_m² − r_{m+1} r_{m−1} of a Gaussian correlation is r_m² (1 − exp(−2a)); a narrow one does not cancel so.
    total = -math.expm1(-2.0 * a) * math.fsum(
        (pairs - abs(m)) * math.exp(-2.0 * a * m * m) for m in range(1 - pairs, pairs)
    )
    total += pairs * (2.0 / snr + 1.0 / snr**2) - 2.0 * (pairs - 1) * math.exp(-4.0 * a) / snr
    return wavelength / (4.0 * math.pi * pri) * math.sqrt(total / (2.0 * pairs**2 * math.exp(-2.0 * a)))


def velocity_error(computed, name):
    """Return the workings of the standard error of the mean speed.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        Of pulse pairs on each PRF, the largest.
    """
    plan, asked = computed.plan, computed.plan.document['weather']
    each_error = deviations(computed)
    worst = max(each_error)
    numbers = put_in(
        f'σ_v = {shown(asked["width_mps"], "m/s")}',
        f'S/N = {shown(asked["snr_db"], "dB")}',
        each('n', plan.pulses.tolist()),
        each('T', plan.pri_s * 1e6, 'µs'),
    )
    shown_errors = 'no end' if math.isinf(worst) else each('σ', each_error, 'm/s')
    line = Line(
        'var v = (λ/4πT)² Σ_{|m|<M} (M − |m|)(r_m² − r_{m+1} r_{m−1})/(2 M² S² ρ(T)²), M = n − 1 pairs',
        numbers,
        shown_errors,
    )
    largest = Line('largest of the set', shown_errors, 'no end' if math.isinf(worst) else shown(worst, 'm/s'))
    return Working((line, largest, _coherence(computed)), None if math.isinf(worst) else worst, (_PULSE_PAIR,))


def second_trip(computed, name):
    """Return the workings of where echoes of the second trip come from.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        One unambiguous range further out than the coverage, from the shortest PRI.
    """
    plan = computed.plan
    shortest = float(plan.pri_s.min())
    value = SPEED_OF_LIGHT_M_S * shortest / 2e3
    low, high = plan.range_m
    lines = (
        Line('R_u = cT/2 of the shortest PRI', f'T = {shown(shortest * 1e6, "µs")}', shown(value, 'km'), DEFINITION),
        Line(
            'they overlay the coverage from one R_u further out',
            f'{shown(low / 1e3)} to {shown(high / 1e3, "km")}',
            f'{shown(low / 1e3 + value)} to {shown(min(high / 1e3, value) + value, "km")}',
        ),
    )
    return Working(lines, value, ('Whether there is weather to make them is not asked.',))
