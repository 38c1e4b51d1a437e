"""What the receiver misses because it is shut: while the radar sends, recovers, or guards the next pulse.

An echo from range R starts at delay t = 2R/c after its pulse and lasts the pulse
length. In every interval the receiver is shut from the pulse's start until the
pulse and the recovery are over, and for a guard time before the next pulse. The
received share is the part of the echo that falls into the open receiver; as a
function of delay it is piecewise linear and repeats with the PRI.
"""

from dataclasses import dataclass

import numpy as np

from pycore.combs import Comb, repeated
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.spans import Spans

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


def _open_time(windows, pri_s, until_s):
    """Return how long the receiver was open from 0 until some time, over any number of intervals."""
    whole = np.floor_divide(until_s, pri_s)
    rest = until_s - whole * pri_s
    each = [np.clip(rest - opens, 0.0, closes - opens) for opens, closes in windows]
    return whole * sum(closes - opens for opens, closes in windows) + sum(each, np.zeros_like(rest))


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
    Beyond ``near.to_range_m`` the long echo may straddle the near pulse: both received parts count.
    """
    range_m = np.asarray(range_m, dtype=float)
    windows = open_windows(pri_s, pulse_s, recovery_s, guard_s, near)
    delay = range_m / METRES_PER_SECOND_OF_DELAY
    share = _share(windows, pri_s, delay, pulse_s)
    if near is not None:
        by_near = _share(windows, pri_s, delay + near.sent_at_s, near.pulse_s)
        share = np.where(range_m <= near.to_range_m, by_near, share)
    return share[()]


def _share(windows, pri_s, start_s, length_s):
    """Return the part of an echo that falls into open windows."""
    received = _open_time(windows, pri_s, start_s + length_s) - _open_time(windows, pri_s, start_s)
    return np.clip(received / length_s, 0.0, 1.0)


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
        return _with_near_pulse(pri_s, pulse_s, recovery_s, guard_s, received_min, range_m, near)
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


def _with_near_pulse(pri_s, pulse_s, recovery_s, guard_s, received_min, range_m, near):
    """Join, for each PRF, the ranges clear by the near pulse and those clear by the long one."""
    low, high = range_m
    change = min(max(near.to_range_m, low), high)
    parts = []
    for pri, pulse in zip(pri_s.tolist(), pulse_s.tolist(), strict=True):
        windows = open_windows(pri, pulse, recovery_s, guard_s, near)
        by_near = _clear(windows, pri, near.pulse_s, received_min, near.sent_at_s, (low, change))
        by_long = _clear(windows, pri, pulse, received_min, 0.0, (change, high))
        parts.append(_joined([*by_near, *by_long]))
    prf = np.arange(len(parts)).repeat([len(part) for part in parts])
    flat = np.array([span for part in parts for span in part]).reshape(-1, 2)
    return Spans(prf, flat[:, 0], flat[:, 1])


def _joined(spans):
    """Join intervals that touch; they come in rising order."""
    joined = []
    for start, stop in spans:
        if joined and start <= joined[-1][1]:
            joined[-1][1] = max(stop, joined[-1][1])
        else:
            joined.append([start, stop])
    return joined


def _clear(windows, pri_s, pulse_s, received_min, sent_at_s, range_m):
    """Return the clear ranges of one echo of one PRF from the corners of its received share.

    Between two neighbouring corners, which lie where the echo's start or end meets a
    window's edge, the share is linear: a crossing of the least share is exact.
    """
    low, high = range_m
    if not windows or not low < high:
        return []
    edges = np.array(windows).ravel()
    corners = np.unique(np.mod(np.concatenate((edges, edges - pulse_s, [0.0])) - sent_at_s, pri_s))
    corners = np.append(corners, pri_s)
    share = _share(windows, pri_s, corners + sent_at_s, pulse_s)
    spans = _above(corners, share, received_min)
    scale = METRES_PER_SECOND_OF_DELAY
    within = [
        repeated(np.array([a * scale]), np.array([b * scale]), np.array([pri_s * scale]), range_m) for a, b in spans
    ]
    return sorted(
        (start, stop) for part in within for start, stop in zip(part.start.tolist(), part.stop.tolist(), strict=True)
    )


def _above(corners, share, least):
    """Return the intervals on which a piecewise linear share is at least (and above 0) some least share."""
    spans = []
    for left, right, a, b in zip(corners, corners[1:], share, share[1:], strict=False):
        top, bottom = max(a, b), min(a, b)
        if top < least or top <= 1e-15:
            continue
        if bottom >= least:
            spans.append((left, right))
            continue
        cross = left + (right - left) * (least - a) / (b - a)
        spans.append((cross, right) if b > a else (left, cross))
    return [span for span in spans if span[1] > span[0]]


def eclipsing_loss(share, form='whole'):
    """Return the loss in signal-to-noise of a partly received echo.

    Parameters
    ----------
    share : float or array, shape S
        Received share. [unitless]
    form : str
        ``'whole'``: the filter spans the whole pulse, noise and threshold are those of an open receiver,
        20 log10(1/ε). ``'part'``: only the received part is integrated, or noise and echo are blanked alike,
        10 log10(1/ε). [unitless]

    Returns
    -------
    loss_db : float or array, shape S
        Infinite where nothing is received. [dB]
    """
    factor = {'whole': 20.0, 'part': 10.0}[form]
    share = np.asarray(share, dtype=float)
    heard = share > 0
    return np.where(heard, -factor * np.log10(np.where(heard, share, 1.0)), np.inf)[()]


def mean_eclipsing_loss(duty, form='whole'):
    """Return the eclipsing loss averaged over all delays of an interval, as a power ratio and then in dB.

    Parameters
    ----------
    duty : float or array, shape S
        Pulse length over interval, the receiver open whenever the radar does not send; up to 1/2. [unitless]
    form : str
        ``'whole'`` averages ε², ``'part'`` averages ε. [unitless]

    Returns
    -------
    loss_db : float or array, shape S
        -10 log10(1 - 4 d / 3) or -10 log10(1 - d). [dB]

    Notes
    -----
    Derived here: over one interval ε is 1 for the part 1 - 2 d and falls and rises linearly over d each.
    """
    lost = {'whole': 4.0 / 3.0, 'part': 1.0}[form]
    return -10.0 * np.log10(1.0 - lost * np.asarray(duty, dtype=float))[()]
