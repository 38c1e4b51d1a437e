"""Which ranges each PRF receives enough of: exact edges, for all PRFs at once.

A range is clear on a PRF where the received share (see ``receiver``) is at least
the plan's least received share, and more than nothing.
"""

import numpy as np

from pycore.combs import Comb, repeated
from pycore.eclipsing_losses import eclipsing_loss, mean_eclipsing_loss, mean_received, whole_share
from pycore.near_ranges import clear_with_near_pulse
from pycore.receiver import (
    METRES_PER_SECOND_OF_DELAY,
    NearPulse,
    near_echo_is_back,
    near_pulse_fits,
    open_windows,
    received_share,
)

__all__ = [
    'METRES_PER_SECOND_OF_DELAY',
    'NearPulse',
    'clear_comb',
    'clear_ranges',
    'eclipsing_loss',
    'first_opening',
    'mean_eclipsing_loss',
    'mean_received',
    'near_echo_is_back',
    'near_pulse_fits',
    'open_windows',
    'received_share',
    'whole_share',
]


def clear_comb(pri_s, pulse_s, recovery_s, guard_s, received_min):
    """Return the clear ranges of each PRF as one interval that repeats with its unambiguous range.

    Parameters
    ----------
    pri_s : float array, shape N
        Intervals. [s]
    pulse_s : float array, shape N
        Pulse lengths, each shorter than its interval. [s]
    recovery_s, guard_s : float
        Times that the receiver stays shut after and before a pulse. [s]
    received_min : float
        Least received share, 0 to 1; at 0 anything above nothing counts. [unitless]

    Returns
    -------
    ranges : Comb
        No interval where recovery, guard and pulse leave too little of one open. [m]

    Notes
    -----
    Derived here: of an echo [t, t + τ] at least q τ lies inside an open window [a, b] that is at least q τ long for
    t from a - (1 - q) τ to b - q τ.
    """
    needed = received_min * pulse_s
    start, stop = recovery_s + needed, pri_s - guard_s - needed
    # The window itself must be open at all, and long enough for the needed part of the pulse.
    open_s = pri_s - guard_s - pulse_s - recovery_s
    stop = np.where((open_s > 0) & (open_s >= needed), stop, start)
    scale = METRES_PER_SECOND_OF_DELAY
    return Comb(start * scale, stop * scale, pri_s * scale)


def clear_ranges(pri_s, pulse_s, recovery_s, guard_s, received_min, range_m, near=None):
    """Return the ranges at which each PRF receives enough of an echo.

    Parameters
    ----------
    pri_s : float array, shape N
        Intervals. [s]
    pulse_s : float array, shape N
        Pulse lengths, each shorter than its interval. [s]
    recovery_s, guard_s : float
        Times that the receiver stays shut after and before a pulse. [s]
    received_min : float
        Least received share, 0 to 1; at 0 anything above nothing counts. [unitless]
    range_m : pair of float
        Limits of the range axis. [m]
    near : NearPulse or None
        A second pulse that serves the near ranges. [s]

    Returns
    -------
    ranges : Spans
        Exact edges, cut to the axis; none where recovery, guard and pulse fill the interval. [m]
    """
    if near is not None:
        return clear_with_near_pulse(pri_s, pulse_s, recovery_s, guard_s, received_min, range_m, near)
    comb = clear_comb(pri_s, pulse_s, recovery_s, guard_s, received_min)
    return repeated(comb.start, comb.stop, comb.period, range_m)


def first_opening(recovery_s, received_min, pulse_s, near=None):
    """Return the range from which on a PRF receives enough, however long its interval.

    Parameters
    ----------
    recovery_s : float
        Time that the receiver stays shut after a pulse. [s]
    received_min : float
        Least received share. [unitless]
    pulse_s : float array, shape N
        Pulse lengths. [s]
    near : NearPulse or None
        A second pulse that serves the near ranges. [s]

    Returns
    -------
    range_m : float array, shape N
        c (recovery + received_min τ) / 2, τ the near pulse where that reaches so far. [m]
    """
    opening = METRES_PER_SECOND_OF_DELAY * (recovery_s + received_min * np.asarray(pulse_s))
    if near is None:
        return opening
    by_near = METRES_PER_SECOND_OF_DELAY * (recovery_s + received_min * near.pulse_s)
    return np.minimum(opening, by_near) if by_near <= near.to_range_m else opening
