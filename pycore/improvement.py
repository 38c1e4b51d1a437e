"""MTI improvement factor: by how much a canceller raises signal against Gaussian clutter around zero.

I = (Σw²)/(wᵀ ρ w), ρ(τ) = exp(-8π² σ² τ²/λ²): the gain averaged over all target
speeds over the gain for clutter of spread σ. Over a staggered cycle the residue
wᵀ ρ w is averaged over the phases at which the cycle can start.
"""

import math
from fractions import Fraction

import numpy as np

_SERIES_UP_TO = 2.0  # of a t², t half the weights' length: beyond it the plain form has lost nothing that matters
_SMALLEST_TERM = 1e-19


def improvement_factor(pri_counts, clock_hz, weights, wavelength_m, spread_m_s):
    """Return the improvement factor of a canceller on Gaussian clutter around zero speed.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        Intervals of the cycle in sending order; one for a constant PRF. [clock counts]
    clock_hz : float
        Timing clock. [Hz]
    weights : sequence of float, length W
        Weights of successive pulses. [unitless]
    wavelength_m : float
        Wavelength. [m]
    spread_m_s : float
        Standard deviation of the clutter's speed. [m/s]

    Returns
    -------
    improvement : float
        Power ratio; ``inf`` where nothing of the clutter is left.

    References
    ----------
    M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., McGraw-Hill 2014, e-book P. 359-361 (Gaussian
    clutter, average gain Σw²); the quadratic form is derived here.
    """
    exact = [Fraction(str(float(weight))) for weight in weights]
    left = residue(pri_counts, exact, 8.0 * (math.pi * spread_m_s / (wavelength_m * clock_hz)) ** 2)
    return float(sum(weight**2 for weight in exact)) / left if left > 0.0 else math.inf


def residue(pri_counts, weights, decay):
    """Return what a canceller leaves of clutter, averaged over the phases of the cycle.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        Intervals of the cycle. [clock counts]
    weights : sequence of Fraction, length W
        Weights of successive pulses, as the decimals that were typed. [unitless]
    decay : float
        a of ρ(t) = exp(-a t²). [1/counts^2]

    Returns
    -------
    residue : float
        wᵀ ρ w, never negative.

    Notes
    -----
    Where a t² is small wᵀ ρ w is the small difference of large numbers. It is then summed as
    Σ_n (2a)^n/n! (Σ_k w_k t_k^n exp(-a t_k²))² (derived here from ρ = exp(-a t_k²) exp(2 a t_k t_l) exp(-a t_l²)), the
    inner sums by their power series, whose moments Σ w t^j are exact: what cancels, cancels exactly.
    """
    parts = []
    for times in _centred_twice(pri_counts, len(weights)):
        # The centred times come doubled, so as to be whole.
        small = decay / 4.0 * max(times) ** 2 <= _SERIES_UP_TO
        parts.append((_by_squares if small else _plainly)(times, weights, decay / 4.0))
    return math.fsum(parts) / len(parts)


def _centred_twice(pri_counts, pulses):
    """Return twice the pulses' times about their middle, whole counts, for every phase of the cycle."""
    n = len(pri_counts)
    for phase in range(n):
        times = [0]
        for k in range(pulses - 1):
            times.append(times[-1] + int(pri_counts[(phase + k) % n]))
        yield [2 * time - times[-1] for time in times]


def _by_squares(times, weights, decay):
    """Return wᵀ ρ w as a sum of squares of series in exact moments."""
    longest = max(times) or 1
    x = decay * longest**2
    # A canceller of many delays has its first terms in the later ones of the series.
    alternating = _series(-x, len(times) // 2 + 4)
    moments = _moments(times, weights, longest)
    known = [next(moments) for _ in range(2 * len(alternating))]
    total, factor, order, quiet = 0.0, 1.0, 0, 0
    while quiet < 3:
        inner = math.fsum(term * known[2 * m] for m, term in enumerate(alternating))
        total += factor * inner**2
        order += 1
        factor *= 2.0 * x / order
        known = [*known[1:], next(moments)]
        # Every second term of a symmetric set vanishes, and so do the first ones of a good canceller.
        quiet = quiet + 1 if factor <= _SMALLEST_TERM * total or factor == 0.0 else 0
    return total


def _moments(times, weights, longest):
    """Yield Σ w (t/longest)^j for j = 0, 1, ..., exact until it is rounded once."""
    below = math.lcm(*(weight.denominator for weight in weights))
    terms = [int(weight * below) for weight in weights]
    while True:
        yield sum(terms) / below
        terms = [term * time for term, time in zip(terms, times, strict=True)]
        below *= longest


def _series(x, least):
    """Return the terms x^m/m! of the exponential as far as they count, and no fewer than so many."""
    terms = [1.0]
    while len(terms) < least or abs(terms[-1]) > _SMALLEST_TERM:
        terms.append(terms[-1] * x / len(terms))
    return terms


def _plainly(times, weights, decay):
    """Return wᵀ ρ w as it stands, less the part that vanishes with the sum of the weights."""
    t, w = np.array(times, dtype=float), np.array([float(weight) for weight in weights])
    still = float(sum(weights)) ** 2
    return max(float(w @ np.expm1(-decay * (t[:, None] - t[None, :]) ** 2) @ w) + still, 0.0)


def small_spread_limit(delays, spread_s):
    """Return what the improvement of a binomial canceller at a constant PRF tends to for a small spread.

    Parameters
    ----------
    delays : int
        Number of delays. [unitless]
    spread_s : float
        s = 2π σ_f T = 4π σ T/λ, the spread in phase from pulse to pulse. [rad]

    Returns
    -------
    improvement : float
        2/s², 2/s⁴, (4/3)/s⁶ for 1, 2, 3 delays; a power ratio.

    Notes
    -----
    Derived here: |2 sin(φ/2)|^2d tends to φ^2d, whose mean over a Gaussian is (2d - 1)!! s^2d, and Σw² = C(2d, d).
    """
    return math.comb(2 * delays, delays) / (math.prod(range(1, 2 * delays, 2)) * spread_s ** (2 * delays))


def scanning_spread(wavelength_m, time_on_target_s):
    """Return the spread of speed that a scanning beam gives to clutter that stands still.

    Parameters
    ----------
    wavelength_m : float or array, shape S
        Wavelength. [m]
    time_on_target_s : float
        Time between the one-way half-power points of the beam. [s]

    Returns
    -------
    spread_m_s : float or array, shape S
        √(ln 2)/π · λ/(2 t) = 0.265 λ/(2 t). [m/s]

    References
    ----------
    Skolnik, Barton (from memory). Derived here: the two-way voltage of a Gaussian beam is exp(-4 ln 2 (u/t)²) in time
    u, a Gaussian of standard deviation s = t/√(8 ln 2), so that its spectrum in power has 1/(2√2 π s) = √(ln 2)/(π t).
    """
    return math.sqrt(math.log(2.0)) / math.pi * wavelength_m / (2.0 * time_on_target_s)


def scanning_limit(delays, hits):
    """Return the handbook's limit that scanning sets to the improvement of a binomial canceller; an approximation.

    Parameters
    ----------
    delays : int
        Number of delays. [unitless]
    hits : float
        Pulses between the one-way half-power points of the beam. [unitless]

    Returns
    -------
    improvement : float
        n²/1.386, n⁴/3.844, n⁶/15.99 for 1, 2, 3 delays; a power ratio.

    References
    ----------
    Shrader, *Radar Handbook*, MTI chapter (from memory; 1.388 and 3.853 there). Derived here as
    :func:`small_spread_limit` at s = 2√(ln 2)/n.
    """
    return small_spread_limit(delays, 2.0 * math.sqrt(math.log(2.0)) / hits)


def stagger_limit(hits, ratio):
    """Return the handbook's limit that staggering sets to the improvement of any canceller; an approximation.

    Parameters
    ----------
    hits : float
        Pulses between the one-way half-power points of the beam. [unitless]
    ratio : float
        γ, the longest interval over the shortest, above 1. [unitless]

    Returns
    -------
    improvement : float
        (2.5 n/(γ - 1))²; a power ratio. Only for the workings: it can be several dB off either way.

    References
    ----------
    Shrader, *Radar Handbook*, MTI chapter (from memory).
    """
    return (2.5 * hits / (ratio - 1.0)) ** 2


def stagger_limit_of_spread(wavelength_m, prf_hz, spread_m_s, ratio):
    """Return the same limit for clutter of a given spread of speed; an approximation.

    Parameters
    ----------
    wavelength_m : float
        Wavelength. [m]
    prf_hz : float
        Mean PRF. [Hz]
    spread_m_s : float
        Standard deviation of the clutter's speed. [m/s]
    ratio : float
        γ, the longest interval over the shortest, above 1. [unitless]

    Returns
    -------
    improvement : float
        (0.33 λ f/((γ - 1) σ))²; a power ratio.

    References
    ----------
    Shrader, *Radar Handbook*, MTI chapter (from memory).
    """
    return (0.33 * wavelength_m * prf_hz / ((ratio - 1.0) * spread_m_s)) ** 2
