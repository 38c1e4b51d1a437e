"""Workings of time out of sight: flying along the beam, and crossing it."""

import math

from pycore.workings.line import DEFINITION, Line, Working, each, interval, put_in, shown

_CROSSING = 'derived here from the closing speed of a straight track, V² t/√(d² + V² t²)'


def unseen_inbound(computed, name):
    """Return the workings of the longest time out of sight of a target flying along the beam.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        The longest hidden interval over the slowest speed that it holds for.
    """
    found = computed.inbound
    if not found.time_s > 0:
        line = Line('time = hidden length/|v|', 'no length is hidden outside the floor', 'none')
        return Working((line,), 0.0)
    length, speed = found.range_m[1] - found.range_m[0], abs(found.at_m_s)
    value = length / speed if speed > 0 else None
    numbers = put_in(interval(found.range_m, 1e3, 'km'), f'|v| = {shown(speed, "m/s")}')
    line = Line('time = hidden length/|v|', numbers, 'for ever' if value is None else shown(value, 's'))
    return Working(
        (line,),
        value,
        ('Between two edges of the speed axis the hidden ranges are the same, so the slowest speed is the worst.',),
    )


def unseen_crossing(computed, name):
    """Return the workings of the time that a crossing track stays in the notch.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        2 n d/(V √(V² − n²)), cut to the coverage.
    """
    plan = computed.plan
    if plan.crossing is None:
        return Working((), None, ('No crossing track is given.',))
    notches = [computed.response.notch_m_s] if computed.is_stagger else sorted(plan.notch_m_s.tolist())
    n, v, d = notches[computed.m - 1], plan.crossing.speed_m_s, plan.crossing.range_m
    which = Line(
        'n = how far the response’s notch around zero reaches'
        if computed.is_stagger
        else 'n = the M-th smallest notch',
        put_in(f'M = {computed.m}', each('notch', notches, 'm/s') if math.isfinite(n) else 'no end'),
        shown(n, 'm/s') if math.isfinite(n) else 'no end',
        DEFINITION,
    )
    return _crossing(which, n, v, d, plan.range_m)


def _crossing(which, n, v, d, range_m):
    """Put numbers into the formula of a crossing track."""
    numbers = put_in(*(f'{letter} = {shown(one, "m/s")}' for letter, one in (('n', n), ('V', v)) if math.isfinite(one)))
    numbers = put_in(numbers, f'd = {shown(d / 1e3, "km")}')
    if d >= range_m[1] or n <= 0:
        return Working((which, Line('inside the notch within the coverage', numbers, 'never')), 0.0)
    if v <= n:
        return Working((which, Line('V ≤ n: never faster than the notch', numbers, 'for ever')), None)
    in_notch = 2 * n * d / (v * math.sqrt((v - n) * (v + n)))
    inside = [2 * math.sqrt(max(end**2 - d**2, 0.0)) / v for end in range_m]
    value = min(in_notch, inside[1]) if d >= range_m[0] else max(0.0, min(in_notch, inside[1]) - inside[0]) / 2
    formula = (
        'whichever is shorter' if d >= range_m[0] else 'whichever is shorter, less the time nearer than it, on one side'
    )
    lines = (
        which,
        Line('in the notch for 2 n d/(V √(V² − n²))', numbers, shown(in_notch, 's'), _CROSSING),
        Line(
            'inside a range R for 2 √(R² − d²)/V',
            put_in(numbers, each('R', [end / 1e3 for end in range_m], 'km')),
            each('time', inside, 's'),
        ),
        Line(formula, put_in(shown(in_notch, 's'), each('inside', inside, 's')), shown(value, 's')),
    )
    return Working(lines, value, ('Only the notch around zero counts.',))
