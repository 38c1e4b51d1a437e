"""The Doppler filter bank of one CPI: windows, and what a window costs and keeps.

A bank of n filters is the discrete Fourier transform of n pulses, weighted by
a window. All windows here are symmetric (first weight equal to the last), as
published processing losses are stated for them; the periodic form of the same
name gives other numbers. Offsets from a filter's centre are counted in
*filters*: one filter is lambda/(2 n T).

References
----------
Hann, Hamming and Blackman: F. J. Harris, "On the use of windows for harmonic
analysis with the discrete Fourier transform", Proc. IEEE 66(1), 51-83, 1978
(coefficients from memory).
"""

import math

import numpy as np

from pycore.errors import InputError

_COSINE_TERMS = {'hann': (0.5, 0.5), 'hamming': (0.54, 0.46), 'blackman': (0.42, 0.5, 0.08)}
WINDOWS = ('rectangular', 'hann', 'hamming', 'blackman', 'chebyshev', 'taylor')
"""Names of the windows that a plan may choose."""

_POINTS_PER_FILTER = 32
_LEVEL = 1e-14  # what rounding may raise a flat response by; Hann's window of three is one pulse, flat


def window(name, pulses, sidelobe_db=40.0):
    """Return the weights that a filter bank gives to the pulses of a CPI.

    Parameters
    ----------
    name : str
        One of ``WINDOWS``. [unitless]
    pulses : int
        Pulses in the CPI, at least 1. [unitless]
    sidelobe_db : float
        Depth of the sidelobes below the main lobe, for Chebyshev and Taylor. [dB]

    Returns
    -------
    weights : float array, shape n
        Symmetric weights. One or two pulses are uniform, as Hann's and
        Blackman's two weights would both be nought.
    """
    if name not in WINDOWS:
        raise InputError('doppler.window', f'doppler.window must be one of {", ".join(WINDOWS)}; got {name}.')
    if pulses <= 2 or name == 'rectangular':
        return np.ones(pulses)
    if name == 'chebyshev':
        return chebyshev(pulses, sidelobe_db)
    if name == 'taylor':
        return taylor(pulses, sidelobe_db, taylor_terms(pulses, sidelobe_db))
    return _cosine_sum(_COSINE_TERMS[name], pulses)


def _cosine_sum(terms, pulses):
    """Return Σ (-1)^j a_j cos(2π j k/(n - 1)), with the ends held at nought or above."""
    phase = 2.0 * np.pi * np.arange(pulses) / (pulses - 1)
    weights = sum((-1) ** j * term * np.cos(j * phase) for j, term in enumerate(terms))
    return np.maximum(weights, 0.0)


def chebyshev(pulses, sidelobe_db):
    """Return Dolph's window: every sidelobe at the same level, the main lobe as narrow as that allows.

    Parameters
    ----------
    pulses : int
        Pulses, at least 2. [unitless]
    sidelobe_db : float
        Depth of the sidelobes. [dB]

    Returns
    -------
    weights : float array, shape n
        Largest weight 1.

    References
    ----------
    C. L. Dolph, "A current distribution for broadside arrays ...", Proc. IRE 34(6), 1946 (from memory):
    the zero-phase spectrum is T_{n-1}(x0 cos(θ/2)), T_{n-1}(x0) = 10^(depth/20). Derived here: that spectrum
    sampled at the n filters and transformed back about the window's middle.
    """
    order = pulses - 1
    stretch = math.cosh(math.acosh(10.0 ** (sidelobe_db / 20.0)) / order)
    angle = 2.0 * np.pi * np.arange(pulses) / pulses
    spectrum = _chebyshev_polynomial(order, stretch * np.cos(angle / 2.0))
    weights = np.fft.ifft(spectrum * np.exp(-0.5j * order * angle)).real
    weights = weights + weights[::-1]
    return weights / weights.max()


def _chebyshev_polynomial(order, x):
    """Return T_order(x) of the first kind, on either side of ±1."""
    size = np.abs(x)
    inside = np.cos(order * np.arccos(np.minimum(size, 1.0)))
    outside = np.cosh(order * np.arccosh(np.maximum(size, 1.0)))
    return np.where(size <= 1.0, inside, outside) * np.where(x < 0.0, (-1.0) ** order, 1.0)


def taylor_terms(pulses, sidelobe_db):
    """Return Taylor's n-bar: how many sidelobes next to the main lobe are held level.

    Parameters
    ----------
    pulses : int
        Pulses. [unitless]
    sidelobe_db : float
        Depth of the sidelobes. [dB]

    Returns
    -------
    terms : int
        Smallest whole number ≥ 2A² + 1/2, A = arccosh(10^(depth/20))/π; at most n/2, at least 1.

    References
    ----------
    T. T. Taylor, "Design of line-source antennas ...", IRE Trans. AP-3, 1955 (from memory): the least n-bar
    for which the zeros stay in order.
    """
    spacing = math.acosh(10.0 ** (sidelobe_db / 20.0)) / math.pi
    return max(min(math.ceil(2.0 * spacing**2 + 0.5), pulses // 2), 1)


def taylor(pulses, sidelobe_db, terms):
    """Return Taylor's window: the first sidelobes nearly level, the others falling away.

    Parameters
    ----------
    pulses : int
        Pulses. [unitless]
    sidelobe_db : float
        Depth of the level sidelobes. [dB]
    terms : int
        n-bar; 1 gives uniform weights. [unitless]

    Returns
    -------
    weights : float array, shape n
        1 at the window's middle (between two pulses where n is even).

    References
    ----------
    T. T. Taylor, as for :func:`taylor_terms`: the pattern's zeros are at σ √(A² + (i - ½)²) for i < n-bar and
    at whole numbers from there on, σ² = n-bar²/(A² + (n-bar - ½)²); its values at whole offsets m < n-bar are
    the Fourier coefficients of the weights.
    """
    pattern = _taylor_pattern(math.acosh(10.0 ** (sidelobe_db / 20.0)) / math.pi, terms)
    place = (np.arange(pulses) - 0.5 * (pulses - 1)) / pulses
    harmonics = np.arange(1, terms)
    weights = 1.0 + 2.0 * np.cos(2.0 * np.pi * np.outer(place, harmonics)) @ pattern
    return weights / (1.0 + 2.0 * pattern.sum())


def _taylor_pattern(spacing, terms):
    """Return the pattern's values at the offsets 1 … n-bar - 1, its peak being 1."""
    offset = np.arange(1, terms, dtype=float)
    widening = terms**2 / (spacing**2 + (terms - 0.5) ** 2)
    zeros = widening * (spacing**2 + (offset - 0.5) ** 2)
    wanted = np.prod(1.0 - offset[:, None] ** 2 / zeros[None, :], axis=1)
    others = 1.0 - offset[:, None] ** 2 / offset[None, :] ** 2
    np.fill_diagonal(others, 1.0)
    # sin(πx)/(πx) divided by its own zeros 1 … n-bar - 1 tends to (-1)^(m+1)/2 over the product at x = m
    return (-1.0) ** (offset + 1) * wanted / (2.0 * np.prod(others, axis=1))


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
