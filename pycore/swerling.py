"""Detection after M of N when the target's strength fluctuates, and how that hangs together over a dwell.

One CPI gives one coherent sample. *Steady*: the same strength always. *Swerling
1 and 3*: one strength for the whole dwell, a new one on the next scan. *Swerling
2 and 4*: a new one on every CPI. Strengths are exponential (1, 2) or chi-square
with four degrees of freedom (3, 4), of mean 1. (P. Swerling, "Probability of
detection for fluctuating targets", RAND RM-1217, 1954, from memory.)
"""

import math
from functools import lru_cache

import numpy as np

from pycore.marcum import detection_and_slope

CASES = ('steady', 'swerling1', 'swerling2', 'swerling3', 'swerling4')
"""Names of the fluctuation cases."""

FINE_STEP = 0.1
"""Step of the averages over strength, in its logarithm: they are then right to 1e-9. [unitless]"""
COARSE_STEP = 0.4
"""The same for a map that is looked at: right to about 1e-3. [unitless]"""

_NODES = 1200
_AT_ONCE = 60_000
_SHAPE = {'swerling1': 1, 'swerling2': 1, 'swerling3': 2, 'swerling4': 2}


class SteadyCurve:
    """A steady target's probability of detection against signal-to-noise, for one threshold.

    Cubic pieces through exact values and slopes, even in the root of the
    signal-to-noise ratio; right to 1e-10.

    Parameters
    ----------
    threshold : float
        y, against the noise power of one output. [unitless]
    outputs : int
        Independent outputs whose powers are added. [unitless]
    """

    __slots__ = ('_pieces', '_step')

    def __init__(self, threshold, outputs=1):
        root, self._step = np.linspace(0.0, math.sqrt(threshold) + 7.0, _NODES + 1, retstep=True)
        value, slope = detection_and_slope(root**2, threshold, outputs)
        slope *= 2.0 * root * self._step  # against the root, in steps
        rise = np.diff(value)
        square = 3.0 * rise - 2.0 * slope[:-1] - slope[1:]
        cube = slope[:-1] + slope[1:] - 2.0 * rise
        self._pieces = np.stack((value[:-1], slope[:-1], square, cube))

    def __call__(self, signal_to_noise):
        """Return the probability at each signal-to-noise ratio (sum over the outputs)."""
        place = np.minimum(np.sqrt(signal_to_noise) / self._step, _NODES * (1.0 - 1e-15))
        index = place.astype(np.intp)
        place = place - index
        found = self._pieces[3].take(index)
        for part in (2, 1, 0):
            found *= place
            found += self._pieces[part].take(index)
        return found


@lru_cache(maxsize=16)
def steady_curve(threshold, outputs=1):
    """Return the :class:`SteadyCurve` of a threshold, made once.

    Parameters
    ----------
    threshold : float
        y, against the noise power of one output. [unitless]
    outputs : int
        Independent outputs whose powers are added. [unitless]

    Returns
    -------
    curve : SteadyCurve
        To be called with signal-to-noise ratios.
    """
    return SteadyCurve(threshold, outputs)


@lru_cache(maxsize=16)
def strengths(shape, step=FINE_STEP):
    """Return strengths and their weights for averages over a fluctuating target.

    Parameters
    ----------
    shape : int
        1 for the exponential, 2 for four degrees of freedom. [unitless]
    step : float
        Step in the logarithm of the strength. [unitless]

    Returns
    -------
    strength, weight : float arrays, shape K
        Weights sum to 1; the lowest strength stands for all below it.

    Notes
    -----
    Derived here: with u = e^t the average is the integral over all t of a smooth function that dies away at
    both ends, for which equal steps converge faster than any power of the step.
    """
    t = np.arange(math.log(1e-11) / shape, math.log(45.0), step)
    strength = np.exp(t)
    density = np.exp(shape * (t + math.log(shape) - strength)) / math.gamma(shape)
    weight = density * step
    weight[0] += 1.0 - weight.sum()
    return strength, weight


def at_least(probability, m):
    """Return the probability that at least M of N independent events happen, their probabilities unequal.

    Parameters
    ----------
    probability : float array, shape S × N
        Probability of each event. [unitless]
    m : int
        Number that must happen, 1 to N. [unitless]

    Returns
    -------
    probability : float array, shape S
        Of the Poisson binomial distribution; only sums of products, so that small values keep their digits.
    """
    events = np.moveaxis(np.asarray(probability, dtype=float), -1, 0)
    so_far = [np.ones(events.shape[1:])]  # probabilities of none, one, two, ... so far; the last one of M or more
    for count, happens in enumerate(events):
        fails = 1.0 - happens
        if count < m:
            so_far.append(so_far[-1] * happens)
        else:
            so_far[m] += so_far[m - 1] * happens
        for k in range(min(count, m - 1), 0, -1):
            so_far[k] *= fails
            so_far[k] += so_far[k - 1] * happens
        so_far[0] = so_far[0] * fails
    return so_far[m]


def cpi_probability(signal_to_noise, threshold, case, outputs=1):
    """Return the probability of detection of one CPI, averaged over its target's strengths.

    Parameters
    ----------
    signal_to_noise : float or array, shape S
        Mean signal-to-noise ratio, summed over the outputs. [unitless]
    threshold : float
        y, against the noise power of one output. [unitless]
    case : str
        One of ``CASES``. [unitless]
    outputs : int
        Independent outputs of the CPI that share its strength. [unitless]

    Returns
    -------
    probability : float array, shape S
        Closed forms where there is one output: exp(-y/(1 + x)), and (1 + 2xy/(2 + x)²) exp(-2y/(2 + x)).
    """
    mean = np.asarray(signal_to_noise, dtype=float)
    if case == 'steady':
        return steady_curve(threshold, outputs)(mean)
    if outputs > 1:
        return _averaged(mean[..., None], 1, steady_curve(threshold, outputs), *strengths(_SHAPE[case]))
    if _SHAPE[case] == 1:
        return np.exp(-threshold / (1.0 + mean))
    return (1.0 + 2.0 * mean * threshold / (2.0 + mean) ** 2) * np.exp(-2.0 * threshold / (2.0 + mean))


def set_probability(signal_to_noise, m, threshold, case, outputs=1, step=FINE_STEP):
    """Return the probability that a target is detected on at least M of the N CPIs of a dwell.

    Parameters
    ----------
    signal_to_noise : float array, shape S × N
        Mean signal-to-noise ratio of each CPI, summed over its outputs. [unitless]
    m : int
        Number of CPIs that must detect it. [unitless]
    threshold : float
        y, the same in every CPI. [unitless]
    case : str
        One of ``CASES``. [unitless]
    outputs : int
        Independent outputs of each CPI. [unitless]
    step : float
        ``FINE_STEP`` or, for a map, ``COARSE_STEP``. [unitless]

    Returns
    -------
    probability : float array, shape S
        Where the strength is shared over the dwell, M of N for a given strength and then the average over it.
    """
    mean = np.asarray(signal_to_noise, dtype=float)
    if case in ('swerling1', 'swerling3') and mean.shape[-1] > 1:
        return _averaged(mean, m, steady_curve(threshold, outputs), *strengths(_SHAPE[case], step))
    return at_least(cpi_probability(mean, threshold, case, outputs), m)


def _averaged(mean, m, curve, strength, weight):
    """Return the average over strength of M of N for a given strength, a block of cells at a time."""
    cells = mean.reshape(-1, mean.shape[-1])
    step = max(_AT_ONCE // (strength.size * cells.shape[1]), 1)
    average = np.empty(len(cells))
    for first in range(0, len(cells), step):
        some = cells[first : first + step].T[:, None, :]
        passed = curve(strength[:, None] * some)  # N × strengths × cells: each CPI's values lie together
        average[first : first + step] = weight @ at_least(np.moveaxis(passed, 0, -1), m)
    return average.reshape(mean.shape[:-1])
