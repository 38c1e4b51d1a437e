"""Weather radars on two PRFs: speeds unfolded together, how often that fails, and echoes of the second trip.

Speeds are radial, closing positive. Weather practice quotes the Nyquist speed,
± λ/(4T), which is half of the first blind speed.
"""

import math
from dataclasses import dataclass

import numpy as np


@dataclass(frozen=True, slots=True)
class TwoPrf:
    """A pair of PRFs whose speeds are unfolded together.

    Parameters
    ----------
    m, n : int
        Shorter and longer PRI as a ratio in lowest terms. [unitless]
    nyquist_short_m_s, nyquist_long_m_s : float
        Nyquist speeds of the shorter and the longer PRI. [m/s]
    nyquist_m_s : float
        Extended Nyquist speed: m times the shorter's, n times the longer's. [m/s]
    level_m_s : float
        Distance of neighbouring levels of the difference of the two estimates. [m/s]
    """

    m: int
    n: int
    nyquist_short_m_s: float
    nyquist_long_m_s: float
    nyquist_m_s: float
    level_m_s: float


def two_prf(pri_counts, clock_hz, wavelength_m):
    """Return what two PRIs do together.

    Parameters
    ----------
    pri_counts : pair of int
        The two PRIs, in either order, not equal. [clock counts]
    clock_hz : int or Fraction
        Timing clock. [Hz]
    wavelength_m : float
        Wavelength, the same for both. [m]

    Returns
    -------
    pair : TwoPrf
        With T1 : T2 = m : n in lowest terms, T1 the shorter, and u = T1/m, unambiguous to ± λ/(4u).

    References
    ----------
    S. M. Torres, Y. F. Dubel and D. S. Zrnic, J. Atmos. Oceanic Technol. 21(9), 1389, 2004 (abstract): the two Nyquist
    speeds times m and n give the common one. Levels derived here: with true speed v the estimates differ by
    2 v_a (k2/n - k1/m), whole multiples of 2 v_a/(mn).
    """
    short, long = sorted(int(pri) for pri in pri_counts)
    u = math.gcd(short, long)
    nyquist_m_s = wavelength_m * float(clock_hz) / (4.0 * u)
    m, n = short // u, long // u
    return TwoPrf(m, n, nyquist_m_s / m, nyquist_m_s / n, nyquist_m_s, 2.0 * nyquist_m_s / (m * n))


def unfold(short_m_s, long_m_s, pair):
    """Return the speed that two folded estimates stand for.

    Parameters
    ----------
    short_m_s : float or array, shape S
        Estimate on the shorter PRI, folded. [m/s]
    long_m_s : float or array, shape S
        Estimate on the longer PRI, folded. [m/s]
    pair : TwoPrf
        The two PRFs. [unitless]

    Returns
    -------
    speed_m_s : float or array, shape S
        The shorter's estimate, unfolded into [-v_a, v_a) by whole multiples of its blind speed. [m/s]

    Notes
    -----
    Derived here: the difference's nearest level q satisfies q = m k2 - n k1, so that k1 = -q/n modulo m. The fold is
    right while the two errors differ by less than half a level, v_N1/n.
    """
    level = np.rint((np.asarray(short_m_s) - long_m_s) / pair.level_m_s)
    folds = np.mod(-level * pow(pair.n, -1, pair.m), pair.m)
    speed_m_s = short_m_s + 2.0 * folds * pair.nyquist_short_m_s
    turned = np.mod(speed_m_s + pair.nyquist_m_s, 2.0 * pair.nyquist_m_s) - pair.nyquist_m_s
    return np.where(turned >= pair.nyquist_m_s, -pair.nyquist_m_s, turned)[()]


def unfolding_failure(pair, deviation_short_m_s, deviation_long_m_s):
    """Return how often noise makes the unfolding pick a wrong fold.

    Parameters
    ----------
    pair : TwoPrf
        The two PRFs. [unitless]
    deviation_short_m_s : float
        Standard deviation of the shorter PRI's estimate. [m/s]
    deviation_long_m_s : float
        Standard deviation of the longer PRI's estimate. [m/s]

    Returns
    -------
    probability : float
        erfc((v_N1/n)/(√2 σ)), σ² the sum of the two variances: the errors, Gaussian and independent, differ by more
        than half a level (derived here). [unitless]
    """
    deviation_m_s = math.hypot(deviation_short_m_s, deviation_long_m_s)
    half_level_m_s = pair.nyquist_short_m_s / pair.n
    return math.erfc(half_level_m_s / (math.sqrt(2.0) * deviation_m_s)) if deviation_m_s > 0 else 0.0


def second_trip(range_m, unambiguous_range_m, trips=2):
    """Return the ranges whose echoes overlay the coverage on each PRF, having missed one interval or more.

    Parameters
    ----------
    range_m : tuple of float, length 2
        Coverage. [m]
    unambiguous_range_m : float array, shape N
        Unambiguous range of each PRF. [m]
    trips : int
        Up to which trip; 2 is the second. [unitless]

    Returns
    -------
    overlays : float array, shape (N, trips - 1, 2)
        From and to: what lies short of the unambiguous range, one interval or more further out. nan where all of the
        coverage lies beyond it; what does is late itself. [m]
    """
    ru = np.asarray(unambiguous_range_m, dtype=float)[:, None]
    low, high = range_m
    late = np.where(low < ru, np.arange(1, trips) * ru, np.nan)
    return np.stack([low + late, np.minimum(high, ru) + late], axis=-1)
