"""What a CPI's filters hear along the apparent speed: clutter as a filter steered there passes it, and their shapes.

All levels are ratios to the noise of one filter; speeds are closing, folded about zero.
"""

import numpy as np

from pycore.bank import lag_weights

_FINEST, _COARSEST = 64, 2
_MOST = 800


def _points_per_filter(pulses):
    return int(np.clip(_MOST // pulses, _COARSEST, _FINEST))


def offsets(cpi):
    """Return offsets from a speed at which :func:`passed` and :func:`shape` are given.

    Parameters
    ----------
    cpi : Cpi
        Pulses and window, n pulses that count. [unitless]

    Returns
    -------
    offset_m_s : float array, shape K
        Even, from 0 to half of v_b. [m/s]
    """
    count = _points_per_filter(cpi.pulses) * cpi.pulses // 2 * 2
    return np.arange(count // 2 + 1) / count * cpi.blind_speed_m_s


def passed(cpi, spread_m_s):
    """Return what a filter passes of Gaussian clutter, against its offset from the clutter's mean speed.

    Parameters
    ----------
    cpi : Cpi
        Pulses and window. [unitless]
    spread_m_s : float
        Standard deviation of the clutter's speed. [m/s]

    Returns
    -------
    passed : float array, shape K
        Share of its one-pulse clutter-to-noise ratio, at :func:`offsets`. Not below 0.
    """
    half = lag_weights(cpi, spread_m_s)
    half[0] *= 0.5
    count = 2 * (len(offsets(cpi)) - 1)
    # A transform of fewer points than there are lags would cut them off: they are folded onto it first.
    return np.maximum(2.0 * np.fft.rfft(_folded(half, count)).real, 0.0)


def shape(cpi):
    """Return what a filter makes of a target's one-pulse signal-to-noise, against the target's offset from its centre.

    Parameters
    ----------
    cpi : Cpi
        Pulses and window. [unitless]

    Returns
    -------
    gain : float array, shape K
        |wᴴs|²/wᴴw at :func:`offsets`.
    """
    count = 2 * (len(offsets(cpi)) - 1)
    heard = np.fft.rfft(_folded(cpi.weights, count))
    return (heard.real**2 + heard.imag**2) / (cpi.weights**2).sum()


def _folded(values, count):
    padded = np.zeros(-(-len(values) // count) * count)
    padded[: len(values)] = values
    return padded.reshape(-1, count).sum(axis=0)


def around(cpi, values, centre_m_s, speed_m_s):
    """Return a course against offset at given speeds around a centre.

    Parameters
    ----------
    cpi : Cpi
        Whose blind speed the course repeats after. [unitless]
    values : float array, shape K
        Of :func:`passed` or :func:`shape`. [unitless]
    centre_m_s : float
        Mean speed of the clutter, or centre of the filter. [m/s]
    speed_m_s : float array, shape V
        Speeds. [m/s]

    Returns
    -------
    values : float array, shape V
        Straight between the points. [unitless]
    """
    blind = cpi.blind_speed_m_s
    turn = (speed_m_s - centre_m_s) / blind
    return np.interp(np.abs(turn - np.round(turn)) * blind, offsets(cpi), values)
