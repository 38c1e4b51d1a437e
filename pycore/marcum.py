"""Detection of a steady signal in noise after a square law: Marcum's Q and its generalisation.

One output of a filter is complex Gaussian noise of power 1 with a steady signal
of power x in it. The sum of m such outputs' powers passes a threshold y with

    Q_m(√(2x), √(2y)) = Σ_k Poisson(k; x) · P(Poisson(y) < m + k),

x the sum of the m signal-to-noise ratios: every term is positive, so nothing
cancels. (J. I. Marcum, "A statistical theory of target detection by pulsed radar",
RAND RM-754, 1947, from memory; the series is derived here from the Poisson mixture
of central chi-square distributions.)
"""

import math

import numpy as np

_CERTAIN = 7.0  # beyond √y + 7 in √x a miss is rarer than exp(-49): it rounds to 1
_TERMS_AT_ONCE = 2_000_000


def detection_probability(signal_to_noise, threshold, outputs=1):
    """Return the probability that a steady signal passes a threshold.

    Parameters
    ----------
    signal_to_noise : float or array, shape S
        Sum of the signal-to-noise ratios of all outputs, at least 0. [unitless]
    threshold : float
        y, against the noise power of one output; -ln(false alarm) where there is one output. [unitless]
    outputs : int
        Independent outputs whose powers are added. [unitless]

    Returns
    -------
    probability : float array, shape S
        To about 1e-12 of its value; the false-alarm probability where there is no signal.
    """
    return _passes(signal_to_noise, threshold, [outputs])[..., 0]


def detection_and_slope(signal_to_noise, threshold, outputs=1):
    """Return the same, and how fast it rises with the signal-to-noise ratio.

    Parameters
    ----------
    signal_to_noise : float or array, shape S
        Sum of the signal-to-noise ratios of all outputs, at least 0. [unitless]
    threshold : float
        y, against the noise power of one output. [unitless]
    outputs : int
        Independent outputs whose powers are added. [unitless]

    Returns
    -------
    probability, slope : float arrays, shape S
        dQ_m/dx = Q_{m+1} - Q_m, from the series' terms (derived here).
    """
    passes = _passes(signal_to_noise, threshold, [outputs, outputs + 1])
    return passes[..., 0], passes[..., 1] - passes[..., 0]


def _passes(signal_to_noise, threshold, outputs):
    """Return the probability for each number of outputs, shape S × numbers."""
    signal = np.asarray(signal_to_noise, dtype=float)
    flat = np.minimum(signal.ravel(), (math.sqrt(threshold) + _CERTAIN) ** 2)
    if not flat.size:
        return np.zeros((*signal.shape, len(outputs)))
    most = flat.max()
    counts = np.arange(math.ceil(most + 12.0 * math.sqrt(most) + 40.0))
    passed = np.stack([poisson_below(threshold, number + counts) for number in outputs], axis=1)
    log_factorial = np.array([math.lgamma(count + 1.0) for count in counts])
    step = max(_TERMS_AT_ONCE // len(counts), 1)
    parts = [_mixed(flat[i : i + step], counts, log_factorial, passed) for i in range(0, flat.size, step)]
    return np.minimum(np.concatenate(parts), 1.0).reshape(*signal.shape, len(outputs))


def _mixed(signal, counts, log_factorial, passed):
    """Return Σ_k Poisson(k; signal) passed_k for each signal."""
    tiny = np.maximum(signal, math.ulp(0.0))[:, None]
    return np.exp(counts * np.log(tiny) - tiny - log_factorial) @ passed


def poisson_below(mean, counts):
    """Return the probability that a Poisson number lies below each of some rising counts.

    Parameters
    ----------
    mean : float
        Mean, above 0. [unitless]
    counts : int array, shape K
        Rising counts. [unitless]

    Returns
    -------
    probability : float array, shape K
        P(number < count), also the probability that m = count outputs of noise pass a threshold of ``mean``.
    """
    whole = np.arange(int(counts[-1]) if len(counts) else 0)
    log_factorial = np.array([math.lgamma(number + 1.0) for number in whole])
    below = np.concatenate(([0.0], np.cumsum(np.exp(whole * math.log(mean) - mean - log_factorial))))
    return np.minimum(below[np.asarray(counts, dtype=int)], 1.0)


def threshold(false_alarm, outputs=1):
    """Return the threshold that noise alone passes with a given probability.

    Parameters
    ----------
    false_alarm : float
        Probability for one CPI, above 0 and below 1. [unitless]
    outputs : int
        Independent outputs whose powers are added. [unitless]

    Returns
    -------
    threshold : float
        y, against the noise power of one output; -ln(false alarm) for one. [unitless]
    """
    if outputs == 1:
        return -math.log(false_alarm)
    low, high = 0.0, outputs + 8.0 * math.sqrt(outputs) - 2.0 * math.log(false_alarm) + 40.0
    for _ in range(100):
        middle = 0.5 * (low + high)
        passes = float(poisson_below(middle, [outputs])[0])
        low, high = (middle, high) if passes > false_alarm else (low, middle)
    return 0.5 * (low + high)
