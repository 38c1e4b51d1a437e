"""What a window makes of the filters of a bank: gain, loss, width, straddling, sidelobes.

A bank of n filters is the discrete Fourier transform of n pulses, weighted by
a window. Offsets from a filter's centre are counted in *filters*: one filter
is lambda/(2 n T).
"""

import math

import numpy as np

_POINTS_PER_FILTER = 32
_LEVEL = 1e-14  # what rounding may raise a flat response by; Hann's window of three is one pulse, flat


def processing_gain(weights):
    """Return by how much a filter raises signal-to-noise for a target at its centre.

    Parameters
    ----------
    weights : float array, shape n
        Window. [unitless]

    Returns
    -------
    gain : float
        (Σw)²/Σw², a power ratio: n for uniform weights.

    References
    ----------
    M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., 2014, P. 372-373.
    """
    return float(weights.sum() ** 2 / (weights**2).sum())


def processing_loss_db(weights):
    """Return what a window costs in signal-to-noise at the filter's centre.

    Parameters
    ----------
    weights : float array, shape n
        Window. [unitless]

    Returns
    -------
    loss_db : float
        10 log10 of n Σw²/(Σw)², nought for uniform weights. [dB]
    """
    return 10.0 * math.log10(len(weights) / processing_gain(weights))


def response(weights, offset_filters):
    """Return a filter's amplitude at an offset from its centre, 1 at the centre.

    Parameters
    ----------
    weights : float array, shape n
        Symmetric window. [unitless]
    offset_filters : float or array, shape S
        Offset in filters, lambda/(2 n T) each. [unitless]

    Returns
    -------
    amplitude : float array, shape S
        Zero-phase amplitude (real, may be negative), as the window is symmetric about its middle.
    """
    place = (np.arange(len(weights)) - 0.5 * (len(weights) - 1)) / len(weights)
    turns = np.multiply.outer(np.asarray(offset_filters, dtype=float), place)
    return np.cos(2.0 * np.pi * turns) @ weights / weights.sum()


def straddle_loss_db(weights):
    """Return the largest loss of a target between two filters.

    Parameters
    ----------
    weights : float array, shape n
        Window. [unitless]

    Returns
    -------
    loss_db : float
        Loss half a filter from the centre, 3.92 for many uniform pulses. [dB]

    References
    ----------
    M. A. Richards, as above, P. 375-376.
    """
    return max(-20.0 * math.log10(float(response(weights, 0.5))), 0.0)


def half_power_width(weights):
    """Return the full width of a filter between its half-power points.

    Parameters
    ----------
    weights : float array, shape n
        Window. [unitless]

    Returns
    -------
    width_filters : float
        Width in filters; n, the whole span of unambiguous speed, where the filter never falls that far.
    """
    return 2.0 * _first_down_to(weights, math.sqrt(0.5))


def sidelobe_level_db(weights):
    """Return how far the highest sidelobe lies below the main lobe, the level that a window reaches.

    Parameters
    ----------
    weights : float array, shape n
        Window. [unitless]

    Returns
    -------
    depth_db : float
        Depth, positive below the main lobe; infinite where there is no sidelobe. [dB]
    """
    offset, size = _sampled(weights)
    inner = _first_minimum(size)
    if inner >= len(size) - 1:
        return math.inf
    top = inner + int(np.argmax(size[inner:]))
    highest = _peak_between(weights, offset[top - 1], offset[min(top + 1, len(offset) - 1)])
    return -20.0 * math.log10(highest) if highest > 1e-15 else math.inf


def lobe_edge(weights):
    """Return how far from its centre a filter is first down to its own sidelobe level.

    Parameters
    ----------
    weights : float array, shape n
        Window. [unitless]

    Returns
    -------
    edge_filters : float
        Offset in filters; at most n/2, where the next image of the filter begins.

    Notes
    -----
    Uniform weights are taken to their first null, 1 filter: sidelobes 13 dB down are no rejection to rest a
    notch on. A Chebyshev window of 40 dB and 9 pulses has 1.77.
    """
    if np.ptp(weights) == 0.0:
        return min(1.0, 0.5 * len(weights))
    depth_db = sidelobe_level_db(weights)
    if math.isinf(depth_db):
        return 0.5 * len(weights)
    return _first_down_to(weights, 10.0 ** (-depth_db / 20.0))


def _sampled(weights):
    """Return offsets from 0 to n/2 and the size of the response there, by a padded transform."""
    length = 2 * _POINTS_PER_FILTER * len(weights)
    size = np.abs(np.fft.rfft(weights, length)) / weights.sum()
    return np.arange(len(size)) * len(weights) / length, size


def _first_minimum(size):
    """Return the index where the main lobe ends, the last index if it never does."""
    rising = np.flatnonzero(np.diff(size) > _LEVEL)
    return int(rising[0]) if rising.size else len(size) - 1


def _peak_between(weights, low, high):
    """Return the largest size of the response within one lobe, by golden section."""
    golden = 0.5 * (math.sqrt(5.0) - 1.0)
    for _ in range(45):
        left, right = high - golden * (high - low), low + golden * (high - low)
        if abs(response(weights, left)) < abs(response(weights, right)):
            low = left
        else:
            high = right
    return abs(float(response(weights, 0.5 * (low + high))))


def _first_down_to(weights, amplitude):
    """Return the first offset where the response is down to an amplitude, n/2 where it never is."""
    offset, size = _sampled(weights)
    below = np.flatnonzero(size <= amplitude)
    if not below.size:
        return 0.5 * len(weights)
    high = offset[below[0]]
    low = offset[max(below[0] - 1, 0)]
    for _ in range(60):
        middle = 0.5 * (low + high)
        low, high = (middle, high) if abs(response(weights, middle)) > amplitude else (low, middle)
    return float(high)
