"""By what all signal-to-noise ratios of a dwell must be multiplied to be detected with a wanted probability."""

import math
from functools import lru_cache

import numpy as np

from pycore.swerling import set_probability

STRENGTH_STEP = 0.2
"""Step of the averages over strength, in its logarithm. [unitless]"""

_SLACK = 1e-6  # of the brackets, for their own rounding
_HALVINGS = 7


def needed_factor_log(gain, m, threshold, case, wanted, outputs=1):
    """Return the logarithm of the factor that each row of signal-to-noise ratios needs.

    Parameters
    ----------
    gain : float array, shape V × N
        Signal-to-noise ratio of each CPI before the factor. [unitless]
    m : int
        Number of CPIs that must detect the target. [unitless]
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
    factor_log : float array, shape V
        To 1e-8 of the depth ln(-ln P); inf where no factor is enough.
    """
    found = np.full(len(gain), np.inf)
    rows = np.flatnonzero((gain > 0.0).sum(axis=1) >= m)
    if rows.size:
        law = m, threshold, case, wanted, outputs
        found[rows] = _alone(gain[rows], *law) if gain.shape[1] == 1 else _between(gain[rows], *law)
    return found


def _alone(gain, m, *law):
    """One CPI: all rows need the same."""
    return equal_need(1, m, *law) - np.log(gain[:, 0])


def _between(gain, m, *law):
    """Several CPIs: no less than if all were as strong as the strongest, no more than if only the M strongest were."""
    ranked = np.sort(gain, axis=1)
    low = equal_need(gain.shape[1], m, *law) - np.log(ranked[:, -1]) - _SLACK
    high = equal_need(m, m, *law) - np.log(ranked[:, -m]) + _SLACK
    return _closed_in(gain, low, high, m, *law)


def _closed_in(gain, low, high, m, threshold, case, wanted, outputs):
    """Return the factors' logarithms between two brackets: the secant in ln(-ln P), nearly a line against them."""
    goal = math.log(-math.log(wanted))
    left, right = (_depth(gain, end, m, threshold, case, outputs) - goal for end in (low, high))
    was_below = np.full(len(gain), 2)  # neither side yet
    for _ in range(60):
        at = np.clip(low + (high - low) * left / np.where(left > right, left - right, 1.0), low, high)
        value = _depth(gain, at, m, threshold, case, outputs) - goal
        if np.all((np.abs(value) < 1e-8) | (high - low < 1e-9)):
            break
        below = value > 0.0
        again = below == was_below  # the end that stays twice is believed half as much (the Illinois rule)
        right = np.where(below, np.where(again, 0.5 * right, right), value)
        left = np.where(below, value, np.where(again, 0.5 * left, left))
        low, high, was_below = np.where(below, at, low), np.where(below, high, at), below
    return at


def _depth(gain, factor_log, m, threshold, case, outputs):
    """Return ln(-ln P)."""
    mean = gain * np.exp(factor_log)[:, None]
    found = set_probability(mean, m, threshold, case, outputs, STRENGTH_STEP)
    return np.log(-np.log(np.clip(found, 1e-300, 1.0 - 1e-16)))


@lru_cache(maxsize=64)
def equal_need(n, m, threshold, case, wanted, outputs=1):
    """Return the logarithm of the signal-to-noise ratio that each of N equal CPIs needs.

    Parameters
    ----------
    n, m : int
        Number of CPIs, and how many must detect the target. [unitless]
    threshold : float
        y of every CPI. [unitless]
    case : str
        One of ``swerling.CASES``. [unitless]
    wanted : float
        Wanted probability of detection. [unitless]
    outputs : int
        Independent outputs of each CPI. [unitless]

    Returns
    -------
    need_log : float
        Of the ratio summed over the outputs of one CPI. [unitless]
    """
    one, goal = np.ones((1, n)), math.log(-math.log(wanted))
    low, high = np.array([math.log(1e-9)]), np.array([math.log(1e18)])
    for _ in range(_HALVINGS):
        middle = 0.5 * (low + high)
        enough = _depth(one, middle, m, threshold, case, outputs)[0] < goal
        low, high = (low, middle) if enough else (middle, high)
    return float(_closed_in(one, low, high, m, threshold, case, wanted, outputs)[0])
