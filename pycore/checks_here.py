"""The conventions' checks with the numbers of the plan at hand, fit to be typed into a pocket calculator.

Each check is an expression and what the core gives for the same thing; where
a plan does not have what a convention is about, there is none. Where PRFs
differ, the first one is taken.
"""

import math

import numpy as np

from pycore import ambiguity, unseen
from pycore.clutter import clutter_to_noise
from pycore.conventions import CONVENTIONS
from pycore.detection import false_alarm_per_cpi
from pycore.dwell import time_on_target
from pycore.left_out import LEFT_OUT
from pycore.target import one_pulse_signal, reference_strength
from pycore.wording import trimmed
from pycore.workings.line import shown


def check_here(computed, name):
    """Return a convention's check for a plan.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the convention. [unitless]

    Returns
    -------
    check : tuple of (str, float) or None
        The expression, and what the core gives, in the convention's own unit.
    """
    return _CHECKS[name](computed) if name in _CHECKS else None


def conventions_here(computed):
    """Return what the models leave out, and the table of conventions with the plan's own numbers.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]

    Returns
    -------
    shown : dict
        ``left_out``, sentences; ``rows``, each with ``name``, ``text``, ``check``, ``result`` with its unit, and
        ``here``: whether the numbers are the plan's, or those of an example.
    """
    return {'left_out': list(LEFT_OUT), 'rows': [_row(computed, one) for one in CONVENTIONS]}


def _row(computed, one):
    found = check_here(computed, one.name)
    check, result = (one.inputs, one.result) if found is None else found
    return {
        'name': one.name,
        'text': one.text,
        'check': check,
        'result': shown(result, one.unit),
        'here': found is not None,
    }


def _n(value):
    """Return a number as it is typed into a calculator."""
    return trimmed(float(value), 9).replace('\N{NARROW NO-BREAK SPACE}', '')


def _pri_us(computed):
    return _n(computed.plan.pri_s[0] * 1e6)


def _carrier(computed):
    return f'299792458/{_n(computed.plan.carrier_hz[0] / 1e9)}e9'


def _light(computed):
    far_m = ambiguity.unambiguous_range(float(computed.plan.pri_s[0]))
    return f'299792.458 × {_pri_us(computed)}e-6/2', far_m / 1e3


def _prf(computed):
    return f'1/{_pri_us(computed)}e-6', 1.0 / float(computed.plan.pri_s[0])


def _blind_speed(computed):
    return f'{_carrier(computed)}/(2 × {_pri_us(computed)}e-6)', float(computed.blind_speed_m_s[0])


def _nyquist(computed):
    return f'{_carrier(computed)}/(4 × {_pri_us(computed)}e-6)', float(computed.blind_speed_m_s[0]) / 2.0


def _folded(computed):
    blind, fast = float(computed.blind_speed_m_s[0]), computed.plan.speed_m_s[1]
    times = math.floor(fast / blind + 0.5)
    return f'{_n(fast)} − {_n(times)} × {_n(blind)}', float(ambiguity.fold_speed(fast, blind))


def _notch(computed):
    if computed.is_stagger:
        return None
    notch, blind = float(computed.plan.notch_m_s[0]), float(computed.blind_speed_m_s[0])
    return f'(2 × {_n(notch)})/{_n(blind)}', min(2.0 * notch / blind, 1.0)


def _opening(computed):
    plan = computed.plan
    if plan.near is not None:
        return None
    times = f'{_n(plan.recovery_s * 1e6)} + {_n(plan.received_min)} × {_n(plan.pulse_s[0] * 1e6)}'
    return f'149.896229 × ({times})', float(computed.first_opening_m[0])


def _floor(computed):
    plan = computed.plan
    (near, far), (slow, fast) = plan.range_m, plan.speed_m_s
    if plan.near is not None or slow < 0:
        return None
    notch = computed.response.notch_m_s if computed.is_stagger else float(np.sort(plan.notch_m_s)[computed.m - 1])
    opening = float(np.sort(computed.first_opening_m)[-1 if computed.is_stagger else computed.m - 1])
    if not (math.isfinite(notch) and notch < fast and opening < far) or _mixed(plan, computed):
        return None
    ranges = f'({_n(far / 1e3)} − {_n(max(near, opening) / 1e3)})/({_n(far / 1e3)} − {_n(near / 1e3)})'
    speeds = f'({_n(fast)} − {_n(max(slow, notch))})/({_n(fast)} − {_n(slow)})'
    return f'1 − {ranges} × {speeds}', float(computed.floor_share)


def _mixed(plan, computed):
    """Whether PRFs differ in both their notch and their first opening: the floor is then not one rectangle."""
    return np.ptp(plan.notch_m_s) > 0 and np.ptp(computed.first_opening_m) > 0


def _crossing(computed):
    plan = computed.plan
    if plan.crossing is None or computed.is_stagger:
        return None
    v, d, n = plan.crossing.speed_m_s, plan.crossing.range_m, float(np.sort(plan.notch_m_s)[computed.m - 1])
    time_s = unseen.crossing(v, d, plan.notch_m_s, computed.m, (0.0, math.inf))
    if not (0 < n < v and math.isfinite(time_s)):
        return None
    return f'2 × {_n(n)} × {_n(d)}/({_n(v)} × √({_n(v)}² − {_n(n)}²))', float(time_s)


def _true_first(computed):
    if not computed.is_stagger:
        return None
    counts = math.gcd(*computed.plan.pri_counts)
    shared_us = counts / computed.plan.clock_hz * 1e6
    return f'{_carrier(computed)}/(2 × {_n(shared_us)}e-6)', float(computed.response.true_first_blind_m_s)


def _filter(computed):
    if computed.is_stagger:
        return None
    blind, pulses = float(computed.blind_speed_m_s[0]), int(computed.plan.pulses[0])
    return f'{_n(blind)}/{pulses}', blind / pulses


def _signal(computed):
    plan, target = computed.plan, computed.plan.target
    if target.radar_equation is not None or plan.pulse_s[0] != (target.at_pulse_s or plan.pulse_s[0]):
        return None
    far, at = plan.range_m[1], target.at_m
    strength = reference_strength(target.snr_db, at, plan.pulse_s[:1], plan.wavelength_m[:1])[0]
    text = f'{_n(target.snr_db)} − 40 × log({_n(far / 1e3)}/{_n(at / 1e3)})'
    return text, 10.0 * math.log10(float(one_pulse_signal(strength, far, 0.0)))


def _rain(computed):
    patch = next((one for one in computed.plan.patches if one.name == 'rain'), None)
    if patch is None:
        return None
    far = patch.range_m[1]
    given = f'{_n(patch.cnr_db)} − 20 × log({_n(far / 1e3)}/{_n(patch.at_m / 1e3)})'
    return given, 10.0 * math.log10(float(clutter_to_noise(patch, far, 0.0)))


def _false_alarm(computed):
    overall, n, m = computed.plan.target.false_alarm, computed.looks, computed.m
    if m not in (1, n):
        return None
    text = f'1 − (1 − {overall:g})^(1/{n})' if m == 1 else f'{overall:g}^(1/{n})'
    return text, float(false_alarm_per_cpi(overall, n, m))


def _on_target(computed):
    plan = computed.plan
    if plan.scan_rpm is None or plan.dwell_s is not None:
        return None
    text = f'{_n(plan.beamwidth_deg)}/(6 × {_n(plan.scan_rpm)})'
    return text, float(time_on_target(plan.beamwidth_deg, plan.scan_rpm))


def _used(computed):
    plan = computed.plan
    if computed.is_stagger:
        return None
    each = zip(plan.pulses.tolist(), plan.fill_pulses.tolist(), (plan.pri_s * 1e6).tolist(), strict=True)
    return ' + '.join(f'({n} + {fill}) × {_n(pri)}' for n, fill, pri in each), 1e6 * float(computed.time_used_s)


_CHECKS = {
    'Speed of light': _light,
    'PRI and PRF': _prf,
    'Radial speed': _folded,
    'First blind speed': _blind_speed,
    'Nyquist speed': _nyquist,
    'Notch': _notch,
    'First opening': _opening,
    'Floor': _floor,
    'Time out of sight': _crossing,
    'True first blind speed': _true_first,
    'Filter width': _filter,
    'Signal-to-noise': _signal,
    'Clutter-to-noise': _rain,
    'False alarm': _false_alarm,
    'Time on target': _on_target,
    'Time used': _used,
}
