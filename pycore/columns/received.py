"""The received share of an echo along the ranges of the coverage, corner by corner."""

import numpy as np

from pycore.eclipsing import METRES_PER_SECOND_OF_DELAY, open_windows, received_share


def received_corners(plan):
    """Return the corners of every PRF's received share; between two of them it is straight.

    Parameters
    ----------
    plan : Plan
        The plan. [SI]

    Returns
    -------
    corners : list of (range_m, share), one for each PRI
        Float arrays of equal length, rising in range. [m, unitless]
    """
    return [_corners(plan, pri, pulse) for pri, pulse in zip(plan.pri_s.tolist(), plan.pulse_s.tolist(), strict=True)]


def _corners(plan, pri_s, pulse_s):
    """Return the corners of one PRF's received share, where the echo's start or end meets a window's edge."""
    windows = open_windows(pri_s, pulse_s, plan.recovery_s, plan.guard_s, plan.near)
    edges = np.array(windows).ravel()
    delays = [edges, edges - pulse_s]
    if plan.near is not None:
        delays += [edges - plan.near.sent_at_s, edges - plan.near.sent_at_s - plan.near.pulse_s]
    delay = np.unique(np.mod(np.concatenate(delays), pri_s)) if windows else np.zeros(1)
    low, high = plan.range_m
    first, last = (int(end // (pri_s * METRES_PER_SECOND_OF_DELAY)) for end in (low, high))
    range_m = np.add.outer(np.arange(first, last + 1) * pri_s, delay).ravel() * METRES_PER_SECOND_OF_DELAY
    change = [] if plan.near is None else [plan.near.to_range_m, np.nextafter(plan.near.to_range_m, np.inf)]
    range_m = np.sort(np.concatenate((range_m, [low, high], change)))
    range_m = range_m[(range_m >= low) & (range_m <= high)]
    share = received_share(range_m, pri_s, pulse_s, plan.recovery_s, plan.guard_s, plan.near)
    return range_m, share
