"""Workings of how far range and speed decode: the separation at which too many PRFs cannot tell."""

from fractions import Fraction

from pycore.congruence import exact_span
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.decoding import blind_speeds
from pycore.decoding.blur import gate_counts, motion_counts, range_half_widths
from pycore.workings.line import DEFINITION, Line, Working, each, put_in, shown

_NOTE = 'A span is a separation of two hypotheses about one target; two targets can make ghosts nearer than it.'
_WITHOUT_ERROR = ('the shortest period', 'least common multiple of every {} of the periods, the smallest of them')
_EDGE = (
    'smallest separation D, beyond the first zone around zero, at which at least M PRFs cannot tell it from zero: '
    'it begins on one PRF at k P − w'
)


def decode_range(computed, name):
    """Return the workings of how far range decodes.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        The blur of each PRF, the edge where decoding ends, and the span without any error.
    """
    plan = computed.plan
    if computed.is_stagger:
        shortest = float(plan.pri_s.min())
        value = SPEED_OF_LIGHT_M_S * shortest / 2e3
        line = Line('R_u = cT/2 of the shortest interval', f'T = {shown(shortest * 1e6, "µs")}', shown(value, 'km'))
        return Working((line,), value, ('A stagger does not decode: beyond this an echo changes its gate.',))
    gates = gate_counts(plan.clock_hz, plan.bandwidth_hz.tolist())
    fastest = max(abs(end) for end in plan.speed_m_s)
    motion = motion_counts(plan.pri_counts, plan.pulses, plan.fill_pulses, fastest)
    widths = range_half_widths(computed.decode_blur, gates, *([motion] if plan.decode_motion else []))
    blur = Line(
        'w = blur × gate' + (' + 2 v/c × time from the first CPI to the last' if plan.decode_motion else ''),
        put_in(
            f'blur {shown(computed.decode_blur)} gates',
            each('gate', gates, 'counts'),
            f'motion {shown(motion, "counts")}' if plan.decode_motion else '',
        ),
        each('w', widths, 'counts'),
    )
    scale = SPEED_OF_LIGHT_M_S / (2.0 * plan.clock_hz)
    periods = [Fraction(int(count)) for count in plan.pri_counts]
    lines, value = _span(computed.decode_range, periods, widths, computed.m, scale, ('counts', 1e3, 'km'))
    return Working((blur, *lines), value, (_NOTE,))


def decode_speed(computed, name):
    """Return the workings of the span of speeds that decodes.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        Likewise, with blind speeds instead of intervals.
    """
    plan = computed.plan
    if computed.is_stagger:
        return Working((), None, ('A stagger does not decode speed.',))
    periods = blind_speeds(plan.pri_counts, plan.clock_hz, plan.carrier_hz.tolist())
    widths = [computed.decode_blur * one / int(n) for one, n in zip(periods, plan.pulses, strict=True)]
    blur = Line(
        'w = blur × filter, λ/(2nT)',
        put_in(
            f'blur {shown(computed.decode_blur)} filters', each('v_b', periods, 'm/s'), each('n', plan.pulses.tolist())
        ),
        each('w', widths, 'm/s'),
    )
    lines, value = _span(computed.decode_speed, periods, widths, computed.m, 1.0, ('m/s', 1.0, 'm/s'))
    note = 'A span is a separation of two hypotheses, twice what a figure of ± so many metres per second says.'
    return Working((blur, *lines), value, (note,))


def _span(span, periods, widths, m, scale, units):
    """Return the lines of one axis, and the span with blur in the finding's unit."""
    inner, divisor, unit = units
    exact = Line(
        'without any error: ' + _WITHOUT_ERROR[m > 1].format(m),
        each('P', periods, inner),
        f'{shown(exact_span(periods, m) * Fraction(1))} {inner} = {shown(span.exact / divisor, unit)}',
        DEFINITION,
    )
    if span.blurred is None:
        numbers = f'swept to {shown(span.swept_to / divisor, unit)}'
        return (exact, Line(_EDGE, numbers, 'none up to there')), None
    if span.blurred == 0:
        return (exact, Line('the first zone around zero has no end', each('w', widths, inner), shown(0, unit))), 0.0
    edge, value = _edge(span.blurred / scale, periods, widths, scale)
    rows = '; '.join(_row(place, *row, edge, inner) for place, row in enumerate(zip(periods, widths, strict=True)))
    result = f'D = {shown(edge)} {inner} = {shown(value / divisor, unit)}'
    return (exact, Line(f'{_EDGE}; M = {m}', rows, result)), value / divisor


def _edge(near, periods, widths, scale):
    """Return the edge k P − w that is the span, exact, and the same in metres or metres per second."""
    edges = []
    for period, width in zip(periods, widths, strict=True):
        k = round((near + float(width)) / float(period))
        edges.append(k * period - Fraction(width))
    edge = min(edges, key=lambda one: abs(float(one) - near))
    return edge, float(edge) * scale


def _row(place, period, width, edge, unit):
    """Say how near a separation is to a multiple of one PRF's period."""
    k = round(edge / period)
    off = abs(edge - k * period)
    return f'PRF {place + 1}: |D − {k} P| = {shown(off, unit)} {"≤" if off <= width else ">"} w'
