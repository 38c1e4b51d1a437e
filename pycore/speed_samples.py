"""Speeds to look at: between all edges of notches, and finely enough for every filter."""

import math

import numpy as np

from pycore.bank import centres, outside_notch, target_gain

_PER_FILTER = 8
_MOST_SPEEDS = 1024
_ELEMENTS_AT_ONCE = 500_000
_PER_SPACING = 16
_TERMS = 14


def sampled_speeds(cpis, m, speed_m_s):
    """Return speeds between all edges of notches, and the length that each stands for.

    Parameters
    ----------
    cpis : sequence of Cpi, length N
        The PRFs. [unitless]
    m : int
        Number of CPIs that must detect. [unitless]
    speed_m_s : tuple of two floats
        The wanted speeds. [m/s]

    Returns
    -------
    speed_m_s, length_m_s : float arrays, shape V
        Rising speeds outside the floor, and lengths. [m/s]
    """
    low, high = speed_m_s
    edges = np.unique(np.concatenate(([low, high], *(_notch_edges(cpi, low, high) for cpi in cpis))))
    narrowest = min(cpi.blind_speed_m_s / cpi.pulses for cpi in cpis)
    step = max(narrowest / _PER_FILTER, (high - low) / _MOST_SPEEDS)
    count = np.maximum(np.ceil(np.diff(edges) / step), 1.0).astype(int)
    length = np.repeat(np.diff(edges) / count, count)
    place = np.concatenate([np.arange(number) + 0.5 for number in count])
    speed = np.repeat(edges[:-1], count) + place * length
    seen = np.abs(speed) >= np.sort([cpi.notch_m_s for cpi in cpis])[m - 1]
    return speed[seen], length[seen]


def _notch_edges(cpi, low, high):
    """Return the edges of a PRF's notches within an interval of speeds."""
    blind = cpi.blind_speed_m_s
    middle = np.arange(math.floor(low / blind), math.ceil(high / blind) + 1) * blind
    edges = np.concatenate((middle - cpi.notch_m_s, middle + cpi.notch_m_s))
    return edges[(edges > low) & (edges < high)]


def best_gain(cpi, speed_m_s):
    """Return the gain of the best usable filter at each speed, in noise alone.

    Parameters
    ----------
    cpi : Cpi
        Pulses, window and notch. [unitless]
    speed_m_s : float array, shape V
        Closing speeds. [m/s]

    Returns
    -------
    gain : float array, shape V
        Against one pulse; 0 inside the notch.
    """
    usable = outside_notch(cpi, centres(cpi))
    if not usable.any():
        return np.zeros(len(speed_m_s))
    place = speed_m_s / cpi.blind_speed_m_s * cpi.pulses
    nearest = np.rint(place)
    gain = _passed(cpi, place - nearest)
    # Where the nearest filter passes more than any filter does from farther off, it is the best; seldom it is not.
    sure = usable[nearest.astype(np.intp) % cpi.pulses] & (gain > _loudest_beside(cpi))
    gain[~sure] = _best_of_all(cpi, usable, speed_m_s[~sure])
    return gain * outside_notch(cpi, speed_m_s)


def _passed(cpi, offset):
    """Return what a filter makes of a target at most half a filter's spacing away from its centre.

    |wᴴs| is Σ w_k cos(a_k), a_k at most π/2: fourteen terms of the cosine's series are all that a float holds.
    """
    square = (2.0 * np.pi * (np.arange(cpi.pulses) - 0.5 * (cpi.pulses - 1)) / cpi.pulses) ** 2
    terms, power = [], np.array(cpi.weights, dtype=float)
    for order in range(_TERMS):
        terms.append(power.sum())
        power = power * square / -((2 * order + 1) * (2 * order + 2))
    level = np.zeros(len(offset))
    for term in reversed(terms):
        level = level * offset**2 + term
    return level**2 / (cpi.weights**2).sum()


def _loudest_beside(cpi):
    """Return the most that a filter passes from half a filter's spacing on, and a little more than was looked at."""
    response = np.abs(np.fft.rfft(cpi.weights, 2 * _PER_SPACING * cpi.pulses)) ** 2 / (cpi.weights**2).sum()
    return 1.001 * response[_PER_SPACING:].max()


def _best_of_all(cpi, usable, speed_m_s):
    step = max(_ELEMENTS_AT_ONCE // cpi.pulses, 1)
    blocks = [speed_m_s[first : first + step] for first in range(0, len(speed_m_s), step)]
    gains = [target_gain(cpi, block)[:, usable].max(axis=1) for block in blocks]
    return np.concatenate([*gains, np.empty(0)])
