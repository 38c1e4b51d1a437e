"""When the receiver is open within an interval, and which part of an echo it then takes in.

An echo from range R starts at delay t = 2R/c after its pulse and lasts the pulse
length. In every interval the receiver is shut from the pulse's start until the
pulse and the recovery are over, and for a guard time before the next pulse. The
received share is the part of the echo that falls into the open receiver; as a
function of delay it is piecewise linear and repeats with the PRI.
"""

from dataclasses import dataclass

import numpy as np

from pycore.constants import SPEED_OF_LIGHT_M_S

METRES_PER_SECOND_OF_DELAY = SPEED_OF_LIGHT_M_S / 2.0
"""Range that belongs to one second of delay, out and back. [m/s]"""


@dataclass(frozen=True, slots=True)
class NearPulse:
    """A second, short pulse in every interval, which serves the near ranges.

    Parameters
    ----------
    pulse_s : float
        Its length. [s]
    sent_at_s : float
        When it starts, after the start of the long pulse. [s]
    to_range_m : float
        Ranges up to this are seen with its echo, those beyond with the long pulse's. [m]
    """

    pulse_s: float
    sent_at_s: float
    to_range_m: float


def open_windows(pri_s, pulse_s, recovery_s, guard_s, near=None):
    """Return when the receiver of one PRF is open, within the interval that starts with its pulse.

    Parameters
    ----------
    pri_s, pulse_s, recovery_s, guard_s : float
        Interval, pulse, and the times that the receiver stays shut after and before a pulse. [s]
    near : NearPulse or None
        A second pulse, for which the receiver is shut likewise. [s]

    Returns
    -------
    windows : list of (float, float)
        Opening and closing times; only windows that are open at all. [s]
    """
    edges = [pulse_s + recovery_s, pri_s - guard_s]
    if near is not None:
        edges[1:1] = [near.sent_at_s - guard_s, near.sent_at_s + near.pulse_s + recovery_s]
    pairs = zip(edges[::2], edges[1::2], strict=True)
    return [
        (max(opens, pulse_s + recovery_s), min(closes, pri_s - guard_s))
        for opens, closes in pairs
        if min(closes, pri_s - guard_s) > max(opens, pulse_s + recovery_s)
    ]


def share_in(windows, pri_s, start_s, length_s):
    """Return the part of an echo that falls into open windows.

    Parameters
    ----------
    windows : list of (float, float)
        When the receiver opens and closes in the interval that starts at 0. [s]
    pri_s : float
        Interval that they repeat with. [s]
    start_s : float array, shape S
        When the echo starts. [s]
    length_s : float
        How long it is. [s]

    Returns
    -------
    share : float array, shape S
        From 0 to 1. [unitless]
    """
    start = np.mod(start_s, pri_s)
    received = np.zeros_like(start)
    for opens, closes in windows:
        for later in pri_s * np.arange(length_s // pri_s + 2):
            # Counted from the echo's own start: what is received whole then counts as exactly 1.
            last = np.minimum(closes + later - start, length_s)
            received += np.maximum(last - np.maximum(opens + later - start, 0.0), 0.0)
    return np.minimum(received / length_s, 1.0)


def received_share(range_m, pri_s, pulse_s, recovery_s, guard_s, near=None):
    """Return the part of an echo that one PRF receives.

    Parameters
    ----------
    range_m : float or array, shape S
        Range of the target, not negative. [m]
    pri_s, pulse_s, recovery_s, guard_s : float
        Interval, pulse, and the times that the receiver stays shut after and before a pulse. [s]
    near : NearPulse or None
        A second pulse that serves the near ranges. [s]

    Returns
    -------
    share : float or array, shape S
        From 0 (not received) to 1 (received whole). [unitless]

    Notes
    -----
    Beyond ``near.to_range_m`` the long echo may straddle the near pulse: both received parts count. A near pulse for
    which an interval has no room is not sent in it: nothing is then received up to ``near.to_range_m``.
    """
    range_m = np.asarray(range_m, dtype=float)
    windows = open_windows(pri_s, pulse_s, recovery_s, guard_s, near)
    delay = range_m / METRES_PER_SECOND_OF_DELAY
    share = share_in(windows, pri_s, delay, pulse_s)
    if near is not None:
        by_near = share_in(windows, pri_s, delay + near.sent_at_s, near.pulse_s) * near_pulse_fits(near, pri_s, guard_s)
        share = np.where(range_m <= near.to_range_m, by_near, share)
    return share[()]


def near_pulse_fits(near, pri_s, guard_s):
    """Return whether an interval has room for the near pulse.

    Parameters
    ----------
    near : NearPulse
        The near pulse. [s]
    pri_s : float or array, shape N
        Intervals. [s]
    guard_s : float
        Time that the receiver is shut before a pulse. [s]

    Returns
    -------
    fits : bool or array, shape N
        Where it is over before the guard of the next long pulse.
    """
    return near.sent_at_s + near.pulse_s <= pri_s - guard_s


def near_echo_is_back(near, pri_s, guard_s):
    """Return whether the near pulse's farthest echo is over before the guard time of the next pulse.

    Parameters
    ----------
    near : NearPulse
        The near pulse. [s]
    pri_s : float or array, shape N
        Intervals. [s]
    guard_s : float
        Time that the receiver is shut before a pulse. [s]

    Returns
    -------
    is_back : bool or array, shape N
        Derived here: it ends at sent_at + 2 to/c + τ, which must not be after T - guard; a billionth of the
        interval is left to rounding.
    """
    ends = near.sent_at_s + near.to_range_m / METRES_PER_SECOND_OF_DELAY + near.pulse_s
    return ends <= pri_s * (1.0 + 1e-9) - guard_s
