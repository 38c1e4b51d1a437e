"""Response of a canceller over pulses whose intervals repeat in a cycle (stagger).

The power response |Σ w_k exp(-j 4π v t_k / λ)|², averaged over the phases at which
the cycle can start and divided by Σ w_k², is a sum of cosines, one for each
distinct time difference of two weighted pulses:

    response(v) = 1 + Σ_d a_d cos(4π v d / λ)

(derived here by multiplying the square out). It is even in v, its mean over all
speeds is 1 (0 dB), and its differences d are whole counts of the timing clock.
"""

from dataclasses import dataclass
from math import comb, gcd

import numpy as np

QUIETEST = 1e-30
"""Power below which a response is shown as -300 dB. [unitless]"""

_ROUNDING = 1e-13  # what rounding can leave of a sum of cosines that cancel: nothing, on every machine alike
_AT_ONCE = 2_000_000


@dataclass(frozen=True, slots=True)
class Response:
    """A canceller's average power response as a sum of cosines.

    Parameters
    ----------
    counts : int array, shape D
        Distinct time differences above 0. [clock counts]
    amplitude : float array, shape D
        Amplitude of each one's cosine. [unitless]
    clock_hz : float
        Timing clock. [Hz]
    wavelength_m : float
        Wavelength. [m]
    longest_counts : int
        Longest time between two weighted pulses. [clock counts]
    """

    counts: np.ndarray
    amplitude: np.ndarray
    clock_hz: float
    wavelength_m: float
    longest_counts: int

    def power(self, speed_m_s):
        """Return the response as a power ratio.

        Parameters
        ----------
        speed_m_s : float or array, shape S
            Radial speed. [m/s]

        Returns
        -------
        power : float or array, shape S
            1 is the mean over all speeds. [unitless]
        """
        speed = np.asarray(speed_m_s, dtype=float)
        per_speed = 4.0 * np.pi / (self.wavelength_m * self.clock_hz) * self.counts
        rows = max(1, _AT_ONCE // max(1, self.counts.size))
        flat = speed.ravel()
        parts = [
            np.cos(np.multiply.outer(flat[i : i + rows], per_speed)) @ self.amplitude for i in range(0, flat.size, rows)
        ]
        total = 1.0 + (np.concatenate(parts) if parts else flat)
        return np.where(total > _ROUNDING, total, 0.0).reshape(speed.shape)[()]

    def decibels(self, speed_m_s):
        """Return the response in decibels.

        Parameters
        ----------
        speed_m_s : float or array, shape S
            Radial speed. [m/s]

        Returns
        -------
        response_db : float or array, shape S
            0 dB is the mean over all speeds; not below -300. [dB]
        """
        return 10.0 * np.log10(np.maximum(self.power(speed_m_s), QUIETEST))

    @property
    def step_m_s(self):
        """Step at which crossings are looked for: 1/16 of the speed that folds the longest difference. [m/s]"""
        return self.wavelength_m * self.clock_hz / (2.0 * self.longest_counts) / 16.0

    @property
    def repeats_m_s(self):
        """Speed that the response repeats with, from the exact greatest common divisor of its differences. [m/s]"""
        return self.wavelength_m * self.clock_hz / (2.0 * int(np.gcd.reduce(self.counts)))

    @property
    def curvature(self):
        """Upper bound of the second derivative of the power: Σ |a_d| (4π d/λ)². [s^2/m^2]"""
        turn = 4.0 * np.pi * self.counts / (self.wavelength_m * self.clock_hz)
        return float(np.abs(self.amplitude) @ turn**2)


def binomial_weights(delays):
    """Return the weights of a binomial canceller.

    Parameters
    ----------
    delays : int
        Number of delays, 1 to 3 (one more pulse than that). [unitless]

    Returns
    -------
    weights : tuple of int
        Such as (1, -2, 1).
    """
    return tuple((-1) ** k * comb(delays, k) for k in range(delays + 1))


def _differences(pri_counts, used):
    """Return the time differences of the weighted pulses for every phase, shape (N, pairs), and the pairs."""
    n, pulses = len(pri_counts), used[-1] + 1
    cycle = np.array([[pri_counts[(phase + k) % n] for k in range(pulses - 1)] for phase in range(n)], dtype=np.int64)
    times = np.concatenate((np.zeros((n, 1), dtype=np.int64), cycle.cumsum(axis=1)), axis=1)
    first, second = np.triu_indices(len(used), 1)
    used = np.array(used)
    return times[:, used[second]] - times[:, used[first]], (used[first], used[second])


def staggered_response(pri_counts, clock_hz, weights, wavelength_m):
    """Return the response of a canceller over a cycle of intervals.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        Intervals of the cycle in sending order. [clock counts]
    clock_hz : float
        Timing clock. [Hz]
    weights : sequence of float, length 2 to 16
        Weights of successive pulses. [unitless]
    wavelength_m : float
        Wavelength. [m]

    Returns
    -------
    response : Response
        Averaged over the N phases of the cycle.
    """
    weights = np.asarray(weights, dtype=float)
    differences, (first, second) = _differences(pri_counts, _used(weights))
    each = 2.0 * weights[first] * weights[second] / (weights @ weights) / len(pri_counts)
    counts, place = np.unique(differences, return_inverse=True)
    amplitude = np.bincount(place.ravel(), np.broadcast_to(each, differences.shape).ravel(), counts.size)
    return Response(counts, amplitude, float(clock_hz), float(wavelength_m), int(differences.max()))


def _used(weights):
    """Return the places of the weights that are not 0."""
    return np.flatnonzero(weights).tolist()


def repeat_counts(pri_counts, weights=None):
    """Return the time whose inverse the response repeats with.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        Intervals of the cycle. [clock counts]
    weights : sequence of float or None
        Weights; ``None`` for a binomial canceller. [unitless]

    Returns
    -------
    counts : int
        Greatest common divisor of the intervals, or of all time differences of pulses with non-zero weight over all
        phases; exact. [clock counts]
    """
    if weights is None:
        return gcd(*(int(count) for count in pri_counts))
    differences, _ = _differences(pri_counts, _used(np.asarray(weights, dtype=float)))
    return gcd(*(int(count) for count in np.unique(differences)))
