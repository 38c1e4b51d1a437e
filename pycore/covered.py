"""Speeds that clutter covers: how far its spectrum stands above the noise, and on which ranges.

A patch of one-pulse clutter-to-noise C covers speed v on a PRF where
|v - v_clutter - j v_b| < h for some whole j; h is the smallest offset from which
on C (wᴴRw)/(wᴴw) stays at or below 1, up to half of v_b. As h does not change
inside a piece of the range axis, the visible share stays exact.
"""

import math
from dataclasses import dataclass

import numpy as np

from pycore.bank import lag_weights

_POINTS_PER_FILTER = 32
_GUESS_ERROR = 1e-4  # a parabola through three of those points misses a sidelobe's top by less than 1e-5 of it


@dataclass(frozen=True, slots=True)
class Leakage:
    """What a CPI's filters let through of clutter, against their offset from it.

    Parameters
    ----------
    coefficients : float array, shape n
        Of :func:`pycore.bank.lag_weights`. [unitless]
    passed : float array, shape K
        The share passed at K offsets from 0 to half of v_b, evenly. [unitless]
    blind_speed_m_s : float
        v_b, after which the share repeats. [m/s]
    """

    coefficients: np.ndarray
    passed: np.ndarray
    blind_speed_m_s: float

    def at(self, turn):
        """Return the share passed at an offset.

        Parameters
        ----------
        turn : float
            Offset over v_b. [unitless]

        Returns
        -------
        passed : float
            Share of the clutter's one-pulse power, against the noise's.
        """
        lags = np.arange(1, len(self.coefficients))
        return self.coefficients[0] + 2.0 * float(np.cos(2.0 * np.pi * turn * lags) @ self.coefficients[1:])


def leakage(cpi, spread_m_s):
    """Return how a CPI's filters pass Gaussian clutter of a given spread.

    Parameters
    ----------
    cpi : Cpi
        Pulses and window. [unitless]
    spread_m_s : float
        Standard deviation of the clutter's speed. [m/s]

    Returns
    -------
    leakage : Leakage
        The share passed by a filter against its offset.
    """
    coefficients = lag_weights(cpi, spread_m_s)
    half = coefficients.copy()
    half[0] *= 0.5
    passed = 2.0 * np.fft.rfft(half, 2 * _POINTS_PER_FILTER * cpi.pulses).real
    return Leakage(coefficients, passed, cpi.blind_speed_m_s)


def covered_half_width(leak, clutter_to_noise):
    """Return the offset from a patch's speed from which on its residue stays below the noise.

    Parameters
    ----------
    leak : Leakage
        The CPI's filters on this patch. [unitless]
    clutter_to_noise : float
        One-pulse power ratio C. [unitless]

    Returns
    -------
    half_width_m_s : float
        h: 0 where no filter is above the noise, v_b/2 where every filter is. [m/s]
    """
    low, high = _last_fall(leak, clutter_to_noise)
    # One step of the sampled response, halved so often, is far below 1e-9 of a blind speed.
    for _ in range(36):
        middle = 0.5 * (low + high)
        low, high = (middle, high) if clutter_to_noise * leak.at(middle) > 1.0 else (low, middle)
    return min(high, 0.5) * leak.blind_speed_m_s


def _last_fall(leak, ratio):
    """Return two offsets, in turns, between which the residue falls below the noise for good; 0, 0 if it never does."""
    passed = leak.passed * ratio
    step = 0.5 / (len(passed) - 1)
    above = np.flatnonzero(passed > 1.0)
    last = int(above[-1]) if above.size else -1
    left, inner, right = passed[:-2], passed[1:-1], passed[2:]
    bend = np.minimum(left - 2.0 * inner + right, -math.ulp(1.0))
    guess = inner - (right - left) ** 2 / (8.0 * bend)
    tops = np.flatnonzero((inner >= left) & (inner >= right) & (guess > 1.0 - _GUESS_ERROR)) + 1
    for top in tops[tops > last + 1][::-1]:
        turn, height = _vertex(leak, (top - 1) * step, (top + 1) * step)
        if ratio * height > 1.0:
            return turn, (top + 1) * step
    return max(last, 0) * step, (last + 1) * step


def _vertex(leak, low, high):
    """Return the highest point of one sidelobe and its height, by golden section."""
    golden = 0.5 * (math.sqrt(5.0) - 1.0)
    for _ in range(40):
        left, right = high - golden * (high - low), low + golden * (high - low)
        low, high = (left, high) if leak.at(left) < leak.at(right) else (low, right)
    middle = 0.5 * (low + high)
    return middle, leak.at(middle)
