"""What the axis of the blind speeds can be read in: the speed itself, its Doppler frequency, or blind speeds.

Only ticks and label change. A place on the axis stays the speed that it is, so that
whatever is picked, marked or compared there needs to know nothing of the choice.
"""

import numpy as np

from pycore.columns.axes import round_ticks
from pycore.wording import THIN_SPACE, trimmed

SCALES = {
    'speed': 'radial speed',
    'doppler': 'Doppler frequency',
    'ratio': 'blind speeds of the mean PRI',
}
"""The choices, each with the words that offer it. [unitless]"""

_KILO_FROM_HZ = 3000.0


def scale(computed, axis, chosen, moves='own'):
    """Return how an axis of radial speed is labelled.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    axis : Axis
        Of radial speed. [m/s]
    chosen : str
        One of ``SCALES``. [unitless]
    moves : str
        What goes up the axis; where the scale moves with it, the label says that it is this plan's. [unitless]

    Returns
    -------
    label : str
        What stands beside the axis.
    ticks : dict
        ``at``, in the shown unit of speed, and ``text``.
    """
    label, one = {'speed': _speed, 'doppler': _doppler, 'ratio': _ratio}[chosen](computed, axis, moves)
    at, text = round_ticks(*(axis.shown(end) * axis.si / one for end in axis.limits))
    return label, {'at': [float(value * one / axis.si) for value in at], 'text': text}


def _speed(_, axis, __):
    """Return the label, and one step of its unit. [m/s]"""
    return axis.label, axis.si


def _doppler(computed, axis, moves):
    """Return the same for the Doppler frequency, at the first carrier where there are several."""
    carriers = computed.plan.carrier_hz
    per_hz = float(computed.plan.wavelength_m[0]) / 2.0
    kilo = max(map(abs, axis.limits)) / per_hz >= _KILO_FROM_HZ
    same = np.ptp(carriers) == 0 and moves != 'carrier'
    at = '' if same else f' at {trimmed(float(carriers[0]) / 1e9)}{THIN_SPACE}GHz'
    return f'Doppler frequency{at} ({"kHz" if kilo else "Hz"})', per_hz * (1e3 if kilo else 1.0)


def _ratio(computed, _, moves):
    """Return the same for blind speeds of a PRF at the mean PRI, at the first carrier."""
    plan = computed.plan
    first = float(plan.wavelength_m[0]) / (2.0 * float(plan.pri_s.mean()))
    whose = 'this plan’s' if moves in ('pri', 'carrier') else 'the'
    return f'radial speed, in first blind speeds of {whose} mean PRI', first


def choice(chosen):
    """Return what a page needs to offer the choice.

    Parameters
    ----------
    chosen : str
        The one that is shown. [unitless]

    Returns
    -------
    choice : dict
        ``name`` in the view, ``said``, ``now``, and ``of``: pairs of value and words.
    """
    return {'name': 'axis', 'said': 'Along the axis', 'now': chosen, 'of': [list(pair) for pair in SCALES.items()]}
