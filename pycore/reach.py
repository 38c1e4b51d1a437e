"""How far a wanted probability of detection reaches: best, median and worst over the wanted speeds.

Limited by noise alone: nothing eclipsed, no clutter. Straddling is exact, the
best usable filter being taken at each speed.
"""

import math
from dataclasses import dataclass

import numpy as np

from pycore.speed_samples import best_gain, sampled_speeds
from pycore.swerling import set_probability

_STRENGTH_STEP = 0.2


@dataclass(frozen=True, slots=True)
class Reach:
    """The ranges to which a wanted probability of detection holds.

    Parameters
    ----------
    best, median, worst : float
        Over the wanted speeds, by length of speed; nan where it is not reached. [m]
    speed_m_s : float array, shape V
        Speeds looked at. [m/s]
    length_m_s : float array, shape V
        Length of the speed axis that each stands for. [m/s]
    range_m : float array, shape V
        Range at each speed; nan where it is not reached. [m]
    """

    best: float
    median: float
    worst: float
    speed_m_s: np.ndarray
    length_m_s: np.ndarray
    range_m: np.ndarray


def reach(cpis, strength_m4, m, threshold, case, wanted, first_opening_m, range_max_m, speed_m_s):
    """Return how far a target is detected with the wanted probability.

    Parameters
    ----------
    cpis : sequence of Cpi, length N
        The PRFs. [unitless]
    strength_m4 : float array, shape N
        The target's strength on each, beam shape taken off. [m⁴]
    m : int
        Number of CPIs that must detect it. [unitless]
    threshold : float
        y of every CPI. [unitless]
    case : str
        One of ``swerling.CASES``. [unitless]
    wanted : float
        Wanted probability of detection. [unitless]
    first_opening_m : float array, shape N
        First opening of each PRF; the M-th smallest is the nearest range looked at. [m]
    range_max_m : float
        Far end of the coverage; four times it is the farthest range looked at. [m]
    speed_m_s : tuple of two floats
        The wanted speeds. Those inside the notch around zero on more than N - M PRFs are left out. [m/s]

    Returns
    -------
    reach : Reach
        Over speeds an eighth of the narrowest filter apart, and in every gap between the edges of notches.
    """
    speed, length = sampled_speeds(cpis, m, speed_m_s)
    gain = np.stack([best_gain(cpi, speed) for cpi in cpis], axis=1) * np.asarray(strength_m4)
    nearest_m = float(np.sort(first_opening_m)[m - 1])
    return reach_over(speed, length, gain, m, threshold, case, wanted, (nearest_m, 4.0 * range_max_m))


def reach_over(speed_m_s, length_m_s, strength_m4, m, threshold, case, wanted, limits_m, outputs=1):
    """Return the same for any processing, from the strength behind it at each speed.

    Parameters
    ----------
    speed_m_s, length_m_s : float arrays, shape V
        Speeds, and the length of the speed axis that each stands for. [m/s]
    strength_m4 : float array, shape V × N
        Signal-to-noise ratio behind the processing times R⁴; for a stagger, the target's strength times the
        averaged response times the outputs. [m⁴]
    m : int
        Number of CPIs that must detect it. [unitless]
    threshold : float
        y of every CPI. [unitless]
    case : str
        One of ``swerling.CASES``. [unitless]
    wanted : float
        Wanted probability of detection. [unitless]
    limits_m : tuple of two floats
        Nearest and farthest range looked at. [m]
    outputs : int
        Independent outputs of each CPI whose powers are added. [unitless]

    Returns
    -------
    reach : Reach
        Not reached where even the nearest range has too little; the farthest range where that still has enough.
    """
    factor = _needed_factor(strength_m4, m, threshold, case, wanted, outputs)
    range_m = np.minimum(factor**-0.25, limits_m[1])
    range_m = np.where(range_m >= limits_m[0], range_m, np.nan)
    return Reach(*_by_length(range_m, length_m_s), speed_m_s, length_m_s, range_m)


def enough_over_half(length_m_s, mean, m, threshold, case, wanted, outputs=1):
    """Return whether a wanted probability of detection is reached over half of the speeds.

    Parameters
    ----------
    length_m_s : float array, shape V
        Length of the speed axis that each speed stands for. [m/s]
    mean : float array, shape V × N
        Signal-to-noise ratio behind the processing. [unitless]
    m : int
        Number of CPIs that must detect it. [unitless]
    threshold : float
        y of every CPI. [unitless]
    case : str
        One of ``swerling.CASES``. [unitless]
    wanted : float
        Wanted probability of detection. [unitless]
    outputs : int
        Independent outputs of each CPI whose powers are added. [unitless]

    Returns
    -------
    enough : bool
        ``False`` where there are no speeds.
    """
    if not len(length_m_s):
        return False
    found = set_probability(mean, m, threshold, case, outputs, _STRENGTH_STEP)
    return bool(length_m_s[found >= wanted].sum() >= 0.5 * length_m_s.sum())


def _needed_factor(gain, m, threshold, case, wanted, outputs):
    """Return by what each row of signal-to-noise must be multiplied to reach a probability; inf if by nothing.

    Between two brackets (all N as strong as the strongest; only M left, as weak as the M-th), the secant in
    ln(-ln P) against the logarithm of the factor.
    """
    factor = np.full(len(gain), np.inf)
    rows = np.flatnonzero((gain > 0.0).sum(axis=1) >= m)
    if not rows.size:
        return factor
    some = gain[rows]
    ranked = np.sort(some, axis=1)
    goal = math.log(-math.log(wanted))
    low = _equal_need(gain.shape[1], m, threshold, case, wanted, outputs) - np.log(ranked[:, -1]) - 1e-6
    high = _equal_need(m, m, threshold, case, wanted, outputs) - np.log(ranked[:, -m]) + 1e-6
    left, right = (_depth(some, end, m, threshold, case, outputs) - goal for end in (low, high))
    was_below = np.full(len(some), 2)  # neither side yet
    for _ in range(60):
        at = np.clip(low + (high - low) * left / np.where(left > right, left - right, 1.0), low, high)
        value = _depth(some, at, m, threshold, case, outputs) - goal
        if np.all((np.abs(value) < 1e-8) | (high - low < 1e-9)):
            break
        below = value > 0.0
        again = below == was_below  # the end that stays twice is believed half as much (the Illinois rule)
        right = np.where(below, np.where(again, 0.5 * right, right), value)
        left = np.where(below, value, np.where(again, 0.5 * left, left))
        low, high, was_below = np.where(below, at, low), np.where(below, high, at), below
    factor[rows] = np.exp(at)
    return factor


def _equal_need(n, m, threshold, case, wanted, outputs):
    """Return the logarithm of the signal-to-noise ratio that each of N equal CPIs needs."""
    low, high = math.log(1e-9), math.log(1e18)
    for _ in range(45):
        middle = 0.5 * (low + high)
        found = set_probability(np.full(n, math.exp(middle)), m, threshold, case, outputs, _STRENGTH_STEP)
        low, high = (low, middle) if found > wanted else (middle, high)
    return 0.5 * (low + high)


def _depth(gain, factor_log, m, threshold, case, outputs):
    """Return ln(-ln P), which falls about evenly with the logarithm of the factor."""
    mean = gain * np.exp(factor_log)[:, None]
    found = set_probability(mean, m, threshold, case, outputs, _STRENGTH_STEP)
    return np.log(-np.log(np.clip(found, 1e-300, 1.0 - 1e-16)))


def _by_length(range_m, length_m_s):
    """Return the best, the median and the worst range by length of speed; what is not reached comes last."""
    if not len(range_m):
        return math.nan, math.nan, math.nan
    order = np.argsort(-np.nan_to_num(range_m, nan=-1.0), kind='stable')
    so_far = np.cumsum(length_m_s[order])
    middle = order[np.searchsorted(so_far, 0.5 * so_far[-1])]
    return float(range_m[order[0]]), float(range_m[middle]), float(range_m[order[-1]])
