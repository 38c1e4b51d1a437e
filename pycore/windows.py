"""The windows that weight the pulses of a CPI, made with numpy alone.

All windows here are symmetric (first weight equal to the last), as published
processing losses are stated for them; the periodic form of the same name gives
other numbers.

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
