"""What no plan can see: the floor under the blind share.

With every interval so long that only the first opening matters, and every blind
speed so far away that only the notch around zero matters, a plan still cannot
see the nearest ranges and the slowest speeds. The floor is the blind share of
that plan, worked out by the same code as the plan's own.
"""

import numpy as np

from pycore.spans import Spans
from pycore.visibility import visible_share


def floor_ranges(first_opening_m, range_m, near_opening_m=None, near_to_m=None):
    """Return the ranges that PRFs with endless intervals would see.

    Parameters
    ----------
    first_opening_m : float array, shape N
        Range from which on enough of the echo comes after the pulse: c (recovery + received_min pulse) / 2. [m]
    range_m : tuple of two floats
        The coverage's ranges. [m]
    near_opening_m : float or None
        The same of a near pulse; None without one. [m]
    near_to_m : float or None
        Range up to which the near pulse serves, and the long one does not. [m]

    Returns
    -------
    ranges : Spans
        From each PRF's first opening to the end of the coverage; with a near pulse,
        from that one's opening as far as it serves, and the long pulse's part beyond.
    """
    low, high = range_m
    opening = np.asarray(first_opening_m, dtype=float)
    parts = [(opening, np.full(opening.size, float(high)))]
    if near_opening_m is not None:
        near = np.full(opening.size, float(near_opening_m)), np.full(opening.size, min(float(near_to_m), high))
        parts = [near, (np.maximum(opening, near_to_m), parts[0][1])]
    start = np.maximum(np.concatenate([a for a, _ in parts]), low)
    stop = np.concatenate([b for _, b in parts])
    some = start < stop
    return Spans(np.tile(np.arange(opening.size), len(parts))[some], start[some], stop[some])


def floor_speeds(notch_m_s, speed_m_s):
    """Return the speeds that PRFs with endless blind speeds would see.

    Parameters
    ----------
    notch_m_s : float array, shape N
        Half width of the notch around zero. [m/s]
    speed_m_s : tuple of two floats
        The coverage's radial speeds. [m/s]

    Returns
    -------
    speeds : Spans
        Below and above each PRF's notch around zero. [m/s]
    """
    low, high = speed_m_s
    notch = np.asarray(notch_m_s, dtype=float)
    every = np.arange(notch.size)
    start = np.concatenate((np.full(notch.size, float(low)), notch.clip(low, high)))
    stop = np.concatenate(((-notch).clip(low, high), np.full(notch.size, float(high))))
    some = start < stop
    return Spans(np.concatenate((every, every))[some], start[some], stop[some])


def floor_share(first_opening_m, notch_m_s, m, range_m, speed_m_s):
    """Return the share of the coverage that no set of PRFs can see with these pulses and notches.

    Parameters
    ----------
    first_opening_m : float array, shape N
        First opening of each PRF. [m]
    notch_m_s : float array, shape N
        Half width of each PRF's notch; of a stagger, the first crossing of its least response. [m/s]
    m : int
        Number of PRFs that must be clear. [unitless]
    range_m : tuple of two floats
        The coverage's ranges. [m]
    speed_m_s : tuple of two floats
        The coverage's radial speeds. [m/s]

    Returns
    -------
    share : float
        Blind share of the same plan with only the first openings and the notches around zero left.
    """
    ranges, speeds = floor_ranges(first_opening_m, range_m), floor_speeds(notch_m_s, speed_m_s)
    return 1.0 - visible_share(ranges, speeds, np.size(notch_m_s), m, range_m, speed_m_s)
