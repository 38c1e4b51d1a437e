"""A stagger whose intervals are scaled or spread, row by row: its response in every cell, with few sines.

The response is a sum of cosines (:mod:`pycore.response`). Along a row of evenly spaced
speeds the angle of each grows by the same step from cell to cell, so that cos(a + b) = cos a cos b
- sin a sin b takes the row from the angles of every block and those within a block: exact, and a
product of small matrices instead of a cosine for each cell.
"""

from dataclasses import dataclass

import numpy as np

_BLOCK = 24
_ROUNDING = 1e-13
_AT_ONCE = 1_000_000
_SAMPLES = (256, 1024)


@dataclass(frozen=True, slots=True)
class Spread:
    """A canceller over a cycle of intervals that can be scaled, and spread about their mean.

    Parameters
    ----------
    mean_s : float array, shape D
        Time differences of weighted pulses, were all intervals the mean one. [s]
    off_s : float array, shape D
        What the stagger adds to each. [s]
    amplitude : float array, shape D
        Amplitude of each one's cosine. [unitless]
    """

    mean_s: np.ndarray
    off_s: np.ndarray
    amplitude: np.ndarray

    def differences(self, scale, spread):
        """Return the time differences of many rows.

        Parameters
        ----------
        scale : float array, shape R
            What all intervals are multiplied by. [unitless]
        spread : float array, shape R
            What each interval's distance from the mean is multiplied by. [unitless]

        Returns
        -------
        difference_s : float array, shape (R, D)
            Not rounded to the timing clock. [s]
        """
        return scale[:, None] * (self.mean_s + spread[:, None] * self.off_s)


def spread_of(pri_s, weights):
    """Return a canceller over a cycle of intervals that can be moved.

    Parameters
    ----------
    pri_s : float array, shape N
        Intervals of the cycle in sending order. [s]
    weights : sequence of float, length 2 to 16
        Weights of successive pulses. [unitless]

    Returns
    -------
    spread : Spread
        Averaged over the N phases of the cycle; equal differences stand once.
    """
    weights, n, mean = np.asarray(weights, dtype=float), len(pri_s), float(np.mean(pri_s))
    first, second = np.triu_indices(weights.size, 1)
    used = (weights[first] != 0) & (weights[second] != 0)
    first, second = first[used], second[used]
    off = np.array([[pri_s[(phase + k) % n] - mean for k in range(weights.size - 1)] for phase in range(n)])
    off = np.concatenate((np.zeros((n, 1)), off.cumsum(axis=1)), axis=1)
    each = 2.0 * weights[first] * weights[second] / (weights @ weights) / n
    # Whole picoseconds tell differences apart that rounding has not made equal.
    steps = np.broadcast_to(second - first, (n, first.size))
    keys = np.column_stack((steps.ravel(), np.rint((off[:, second] - off[:, first]).ravel() * 1e12)))
    alike, at, place = np.unique(keys, axis=0, return_index=True, return_inverse=True)
    amplitude = np.bincount(place.ravel(), np.broadcast_to(each, steps.shape).ravel(), len(alike))
    return Spread(mean * alike[:, 0], (off[:, second] - off[:, first]).ravel()[at], amplitude)


def row_powers(difference_s, amplitude, wavelength_m, first_m_s, step_m_s, count):
    """Return the response of every row at evenly spaced speeds.

    Parameters
    ----------
    difference_s : float array, shape (R, D)
        Time differences of each row. [s]
    amplitude : float array, shape D
        Amplitude of each one's cosine. [unitless]
    wavelength_m : float array, shape R
        Wavelength of each row. [m]
    first_m_s, step_m_s : float
        The first speed and the step to the next. [m/s]
    count : int
        Number of speeds. [unitless]

    Returns
    -------
    power : float array, shape (R, count)
        1 is the mean over all speeds. [unitless]
    """
    turn = 4.0 * np.pi * difference_s / wavelength_m[:, None]
    rows = max(1, _AT_ONCE // (amplitude.size * count // _BLOCK + 1))
    parts = [_power(turn[i : i + rows], amplitude, first_m_s, step_m_s, count) for i in range(0, len(turn), rows)]
    power = np.concatenate(parts)
    return np.where(power > _ROUNDING, power, 0.0)


def _power(turn, amplitude, first, step, count):
    blocks = -(-count // _BLOCK)
    start = turn[:, None, :] * (first + step * _BLOCK * np.arange(blocks))[:, None]
    inner = turn[:, :, None] * (step * np.arange(_BLOCK))
    left = np.concatenate((amplitude * np.cos(start), -amplitude * np.sin(start)), axis=2)
    right = np.concatenate((np.cos(inner), np.sin(inner)), axis=1)
    return 1.0 + (left @ right).reshape(len(turn), -1)[:, :count]


def below_shares(difference_s, amplitude, wavelength_m, least_db, speed_m_s):
    """Return the share of the speeds, outside the notch around zero, at which the response is too low, for every row.

    Parameters
    ----------
    difference_s : float array, shape (R, D)
        Time differences of each row. [s]
    amplitude : float array, shape D
        Amplitude of each one's cosine. [unitless]
    wavelength_m : float array, shape R
        Wavelength of each row. [m]
    least_db : float
        Response from which on a speed counts as clear. [dB]
    speed_m_s : tuple of two floats
        Limits of the radial speeds. [m/s]

    Returns
    -------
    share : float array, shape R
        Sampled at 1/16 of the speed that folds the longest difference, or finer, but at no more than 1024 speeds;
        nan where the notch takes all of them.
    """
    low, high = speed_m_s
    top = max(abs(low), abs(high))
    finest = (wavelength_m / (2.0 * np.abs(difference_s).max(axis=1))).min() / 16.0
    count = int(np.clip(np.ceil(top / finest), *_SAMPLES))
    at = top * (np.arange(count) + 0.5) / count
    power = row_powers(difference_s, amplitude, wavelength_m, at[0], top / count, count)
    clear = power >= 10.0 ** (least_db / 10.0)
    # A magnitude that both signs of the wanted speeds have counts twice.
    weight = ((at >= low) & (at <= high)).astype(float) + ((-at >= low) & (-at <= high))
    outside = np.logical_or.accumulate(clear, axis=1)
    whole = outside @ weight
    return np.where(whole > 0, ((outside & ~clear) @ weight) / np.maximum(whole, 1e-30), np.nan)
