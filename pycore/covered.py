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
_SMALLEST = 1e-300
_MOST_STEPS = 60
_CLOSE = 1e-13  # of v_b


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
        turn : float or array, shape S
            Offset over v_b. [unitless]

        Returns
        -------
        passed : float or array, shape S
            Share of the clutter's one-pulse power, against the noise's.
        """
        angle = np.multiply.outer(turn, 2.0 * np.pi * np.arange(1, len(self.coefficients)))
        return self.coefficients[0] + 2.0 * (np.cos(angle) @ self.coefficients[1:])

    def slope_at(self, turn):
        """Return how fast the share passed changes with the offset.

        Parameters
        ----------
        turn : float or array, shape S
            Offset over v_b. [unitless]

        Returns
        -------
        slope : float or array, shape S
            Of the share passed, for one turn.
        """
        turns = 2.0 * np.pi * np.arange(1, len(self.coefficients))
        return -2.0 * (np.sin(np.multiply.outer(turn, turns)) @ (turns * self.coefficients[1:]))


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
    clutter_to_noise : float or array, shape S
        One-pulse power ratio C. [unitless]

    Returns
    -------
    half_width_m_s : float or array, shape S
        h: 0 where no filter is above the noise, v_b/2 where every filter is. [m/s]
    """
    # C × passed > 1, put the other way about: no ratio is too small to be turned over.
    level = 1.0 / np.maximum(np.asarray(clutter_to_noise, dtype=float), _SMALLEST)
    crossing = _crossing(leak, level.ravel(), *_last_falls(leak, level.ravel()))
    return crossing.reshape(level.shape)[()] * leak.blind_speed_m_s


def _crossing(leak, level, low, high):
    """Return where the response crosses a level between two offsets: Newton's steps, halvings where they lead out."""
    turn = 0.5 * (low + high)
    for _ in range(_MOST_STEPS):
        over = leak.at(turn) - level
        low, high = np.where(over > 0.0, turn, low), np.where(over > 0.0, high, turn)
        slope = leak.slope_at(turn)
        aim = turn - over / np.where(slope < 0.0, slope, -math.inf)
        after = np.where((aim > low) & (aim < high), aim, 0.5 * (low + high))
        if np.all(np.abs(after - turn) <= _CLOSE):
            return after
        turn = after
    return turn


def _last_falls(leak, level):
    """Return offsets, in turns, between which the response falls below each level for good; 0, 0 if it never does."""
    passed = leak.passed
    step = 0.5 / (len(passed) - 1)
    loudest_beyond = np.maximum.accumulate(passed[::-1])  # rising: from half of v_b inward
    last = len(passed) - 1 - np.searchsorted(loudest_beyond, level, side='right')
    low, high = np.maximum(last, 0) * step, np.minimum((last + 1) * step, 0.5)
    low = np.where(last == len(passed) - 1, high, low)
    tops, guess = _tops(passed)
    hidden = (guess > (1.0 - _GUESS_ERROR) * level[:, None]) & (tops > last[:, None] + 1)
    for one in np.flatnonzero(hidden.any(axis=1)).tolist():
        low[one], high[one] = _beside_a_top(leak, level[one], tops[hidden[one]], (low[one], high[one]), step)
    return low, high


def _tops(passed):
    """Return where a sampled response has tops, and a guess of their heights from a parabola through three points."""
    left, inner, right = passed[:-2], passed[1:-1], passed[2:]
    bend = np.minimum(left - 2.0 * inner + right, -math.ulp(1.0))
    guess = inner - (right - left) ** 2 / (8.0 * bend)
    at = np.flatnonzero((inner >= left) & (inner >= right))
    return at + 1, guess[at]


def _beside_a_top(leak, level, tops, otherwise, step):
    """Return the fall beside the last sidelobe that reaches a level between two samples."""
    for top in tops[::-1].tolist():
        turn, height = _vertex(leak, (top - 1) * step, (top + 1) * step)
        if height > level:
            return turn, (top + 1) * step
    return otherwise


def _vertex(leak, low, high):
    """Return the highest point of one sidelobe and its height, by golden section."""
    golden = 0.5 * (math.sqrt(5.0) - 1.0)
    for _ in range(40):
        left, right = high - golden * (high - low), low + golden * (high - low)
        low, high = (left, high) if leak.at(left) < leak.at(right) else (low, right)
    middle = 0.5 * (low + high)
    return middle, leak.at(middle)
