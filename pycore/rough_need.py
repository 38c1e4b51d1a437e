"""The needed factor of :mod:`pycore.needed`, roughly and many times faster.

Where one strength is shared over the dwell, what M of N make of it against the
logarithm of factor times strength is one curve, sampled once for each row of
ratios; every factor only slides the law of the strengths along it. What is neglected moves all
rows nearly alike, so that their order is right much more closely than their values.
"""

import math

import numpy as np

from pycore.needed import needed_factor_log
from pycore.swerling import at_least, steady_curve

_STEP = 0.4  # of the logarithm of factor times strength
_FROM_ROOT = (
    2.5  # root of signal-to-noise from the threshold's, where a steady target is hardly or nearly always detected
)
_SLIDES = 12
_CLOSE = 0.01  # of a step: the next one would be about its square


def rough_factor_log(gain, m, threshold, case, wanted):
    """Return the logarithm of the factor that each row of signal-to-noise ratios needs.

    Parameters
    ----------
    gain : float array, shape V × N
        Signal-to-noise ratio of each CPI before the factor, of one output each. [unitless]
    m : int
        Number of CPIs that must detect the target. [unitless]
    threshold : float
        y of every CPI. [unitless]
    case : str
        ``swerling1`` or ``swerling3``: one strength for all CPIs. [unitless]
    wanted : float
        Wanted probability of detection. [unitless]

    Returns
    -------
    factor_log : float array, shape V
        inf where no factor is enough.
    """
    found = np.full(len(gain), np.inf)
    rows = np.flatnonzero((gain > 0.0).sum(axis=1) >= m)
    if not rows.size:
        return found
    some = gain[rows]
    mth = np.sort(some, axis=1)[:, -m]
    level_log = _levels(threshold)
    mean = np.exp(level_log)[:, None] * (some.T / mth)[:, None, :]  # N × levels × V
    detected = at_least(np.moveaxis(steady_curve(threshold)(mean), 0, -1), m)
    if (detected[0] > 0.5 * wanted).any():  # noise alone all but does it
        found[rows] = needed_factor_log(some, m, threshold, case, wanted)
    else:
        found[rows] = _slid(level_log, detected, _SHAPE[case], wanted) - np.log(mth)
    return found


_SHAPE = {'swerling1': 1, 'swerling3': 2}


def _levels(threshold):
    """Return logarithms of signal-to-noise between those that are hardly and nearly always detected."""
    root = math.sqrt(threshold)
    low, high = (2.0 * math.log(max(end, 0.1)) for end in (root - _FROM_ROOT, root + _FROM_ROOT))
    return np.linspace(low, high, math.ceil((high - low) / _STEP) + 1)


def _slid(level_log, detected, shape, wanted):
    """Return how far the strengths must slide along the curve until their average detects as wanted: Newton's way.

    ln(-ln P) falls about evenly with the logarithm of the factor. The curve's rise in each step is taken to be in
    the middle of the step; below the first level it stays, and above the last it is certain.
    """
    middle = np.append(0.5 * (level_log[1:] + level_log[:-1]), level_log[-1])[:, None]
    rise = np.concatenate((np.diff(detected, axis=0), 1.0 - detected[-1:]))
    goal = math.log(-math.log(wanted))
    # If the curve rose all at once, this would be it.
    factor_log = (rise * middle).sum(axis=0) / rise.sum(axis=0) - math.log(_weakest(shape, wanted))
    for _ in range(_SLIDES):
        strength = shape * np.exp(middle - factor_log)
        enough, rare = _exceeded(strength, shape), np.exp(-strength)
        chance = np.clip(detected[0] + (rise * enough).sum(axis=0), 1e-12, 1.0 - 1e-12)
        slope = np.maximum((rise * strength**shape * rare).sum(axis=0), 1e-12)
        step = (np.log(-np.log(chance)) - goal) * -chance * np.log(chance) / slope
        factor_log = factor_log + np.clip(step, -2.0, 2.0)
        if np.abs(step).max() < _CLOSE:
            break
    return factor_log


def _exceeded(strength, shape):
    """Return how probable a strength is exceeded, given in units of mean over shape."""
    return np.exp(-strength) if shape == 1 else (1.0 + strength) * np.exp(-strength)


def _weakest(shape, wanted):
    """Return the strength, against its mean, that is exceeded with a probability."""
    low, high = 0.0, 60.0
    for _ in range(40):
        middle = 0.5 * (low + high)
        low, high = (middle, high) if _exceeded(middle, shape) > wanted else (low, middle)
    return high / shape
