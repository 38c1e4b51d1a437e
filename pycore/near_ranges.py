"""Clear ranges of a radar that sends a second, short pulse in every interval for the near ranges."""

import numpy as np

from pycore.combs import repeated
from pycore.receiver import METRES_PER_SECOND_OF_DELAY, near_pulse_fits, open_windows, share_in
from pycore.spans import Spans

_NO_SHARE = 1e-10  # of an echo: what rounding can make of nothing, and of the difference of two equal shares


def clear_with_near_pulse(pri_s, pulse_s, recovery_s, guard_s, received_min, range_m, near):
    """Return the ranges at which each PRF receives enough of the near pulse's or of the long pulse's echo.

    Parameters
    ----------
    pri_s, pulse_s : float array, shape N
        Intervals and long pulses. [s]
    recovery_s, guard_s : float
        Times that the receiver stays shut after and before a pulse. [s]
    received_min : float
        Least received share, 0 to 1; at 0 anything above nothing counts. [unitless]
    range_m : pair of float
        Limits of the range axis. [m]
    near : NearPulse
        The near pulse. [s]

    Returns
    -------
    ranges : Spans
        Exact edges, cut to the axis. [m]
    """
    low, high = range_m
    change = min(max(near.to_range_m, low), high)
    parts = []
    for pri, pulse in zip(pri_s.tolist(), pulse_s.tolist(), strict=True):
        windows = open_windows(pri, pulse, recovery_s, guard_s, near)
        heard = windows if near_pulse_fits(near, pri, guard_s) else []
        by_near = _clear(heard, pri, near.pulse_s, received_min, near.sent_at_s, (low, change))
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
    corners = np.unique(np.concatenate(([0.0], corners, [pri_s])))
    share = share_in(windows, pri_s, corners + sent_at_s, pulse_s)
    scale = METRES_PER_SECOND_OF_DELAY
    within = np.array(_above(corners, share, received_min)).reshape(-1, 2) * scale
    found = repeated(within[:, 0], within[:, 1], np.full(len(within), pri_s * scale), range_m)
    return sorted(zip(found.start.tolist(), found.stop.tolist(), strict=True))


def _above(corners, share, least):
    """Return the intervals on which a piecewise linear share is at least (and above 0) some least share."""
    spans = []
    for left, right, a, b in zip(corners, corners[1:], share, share[1:], strict=False):
        top, bottom = max(a, b), min(a, b)
        if top < least - _NO_SHARE or top <= _NO_SHARE:
            continue
        if bottom >= least - _NO_SHARE:
            spans.append((left, right))
        elif top > least + _NO_SHARE:
            cross = left + (right - left) * (least - a) / (b - a)
            spans.append((cross, right) if b > a else (left, cross))
    return [span for span in spans if span[1] > span[0]]
