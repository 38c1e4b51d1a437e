"""Workings of the time on target, the duty and the range walk."""

from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.workings.line import COMMON, DEFINITION, Line, Working, each, put_in, shown


def dwell(computed, name):
    """Return the workings of the time that one set takes.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        Σ (n + fill) T against the time on target.
    """
    plan, pri = computed.plan, computed.plan.pri_s * 1e3
    sent = plan.pulses + plan.fill_pulses
    numbers = put_in(each('T', pri, 'ms'), each('n', plan.pulses), each('fill', plan.fill_pulses))
    if computed.is_stagger:
        value = float(sent[0] * pri.sum() / plan.n)
        formula = '(n + fill) × mean T'
    else:
        value = float(sum(count * time for count, time in zip(sent.tolist(), pri.tolist(), strict=True)))
        formula = 'Σ (n + fill) T'
    return Working((*_available(plan), Line(formula, numbers, shown(value, 'ms'), DEFINITION)), value)


def _available(plan):
    """Say where the time on target comes from."""
    if plan.time_on_target_s is None:
        return ()
    result = shown(plan.time_on_target_s * 1e3, 'ms')
    if plan.dwell_s is not None:
        return (Line('time on target, as given', result, result, DEFINITION),)
    numbers = put_in(f'beamwidth {shown(plan.beamwidth_deg, "°")}', f'{shown(plan.scan_rpm, "rpm")}')
    return (Line('time on target = beamwidth/(6 × turns a minute)', numbers, result),)


def duty(computed, name):
    """Return the workings of the largest duty.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        τ/T of each PRF, the largest, and the mean over the set.
    """
    plan = computed.plan
    near = 0.0 if plan.near is None else plan.near.pulse_s
    numbers = put_in(
        each('τ', plan.pulse_s * 1e6, 'µs'),
        f'near pulse {shown(near * 1e6, "µs")}' if near else '',
        each('T', plan.pri_s * 1e6, 'µs'),
    )
    duties = [(pulse + near) / pri for pulse, pri in zip(plan.pulse_s.tolist(), plan.pri_s.tolist(), strict=True)]
    formula = '(τ + near pulse)/T' if near else 'τ/T'
    lines = (
        Line(formula, numbers, each('duty', [100 * one for one in duties], '%'), DEFINITION),
        Line('mean = time sent/time used, fill pulses included', numbers, shown(100 * computed.duty_mean, '%'), COMMON),
        Line('largest of the set', each('duty', [100 * one for one in duties], '%'), shown(100 * max(duties), '%')),
    )
    return Working(lines, max(duties))


def range_walk(computed, name):
    """Return the workings of the range walk.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        v n T over one gate, c/(2B), the largest of the set.
    """
    plan = computed.plan
    fastest = max(abs(end) for end in plan.speed_m_s)
    pri = [float(plan.pri_s.mean())] * plan.n if computed.is_stagger else plan.pri_s.tolist()
    gate = [SPEED_OF_LIGHT_M_S / (2.0 * bandwidth) for bandwidth in plan.bandwidth_hz.tolist()]
    walks = [fastest * pulses * time / deep for pulses, time, deep in zip(plan.pulses.tolist(), pri, gate, strict=True)]
    numbers = put_in(
        f'v = {shown(fastest, "m/s")}',
        each('n', plan.pulses),
        each('mean T' if computed.is_stagger else 'T', [time * 1e6 for time in pri], 'µs'),
        each('gate', gate, 'm'),
    )
    lines = (
        Line('one gate = c/(2B)', each('B', plan.bandwidth_hz / 1e6, 'MHz'), each('gate', gate, 'm'), COMMON),
        Line('v n T/gate, the largest of the set', numbers, shown(max(walks), 'gates')),
    )
    return Working(lines, max(walks), ('Acceleration is left out.',))
