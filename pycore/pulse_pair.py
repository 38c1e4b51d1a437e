"""How well pulse pairs measure the speed of weather, and whether its echoes hold together from pulse to pulse.

Speeds are radial, closing positive; the spectrum is Gaussian.
"""

import math

import numpy as np


def correlation_exponent(pri_s, width_m_s, wavelength_m):
    """Return -ln of the correlation of two echoes one PRI apart, for a Gaussian spectrum.

    Parameters
    ----------
    pri_s : float or array, shape S
        PRI. [s]
    width_m_s : float or array, shape S
        Spectrum width: standard deviation of the radial speeds. [m/s]
    wavelength_m : float
        Wavelength. [m]

    Returns
    -------
    exponent : float or array, shape S
        8 π² σ² T²/λ². [unitless]
    """
    return 8.0 * np.square(np.pi * width_m_s * pri_s / wavelength_m)


def pulse_pair_deviation(pulses, pri_s, width_m_s, snr, wavelength_m):
    """Return the standard deviation of a speed measured by pulse pairs.

    Parameters
    ----------
    pulses : int
        Pulses in the dwell, at least 2. [unitless]
    pri_s : float
        PRI. [s]
    width_m_s : float
        Spectrum width. [m/s]
    snr : float
        Signal-to-noise of one pulse, a power ratio. [unitless]
    wavelength_m : float
        Wavelength. [m]

    Returns
    -------
    deviation_m_s : float
        To first order in the errors; infinite where the correlation is lost altogether. It understates where the
        dwell holds fewer than about ten independent echoes, 4√π σ_v T/λ times the pulses. [m/s]

    Notes
    -----
    Derived here, to first order in the errors, for complex Gaussian echoes whose covariance is r_m = S ρ(mT), one more
    at m = 0: over M = pulses - 1 pairs,
    var v = (λ/4πT)² Σ_|m|<M (M - |m|)(r_m² - r_{m+1} r_{m-1}) / (2 M² S² ρ(T)²).
    With ρ(mT) = exp(-a m²) the terms are S² ρ(mT)² (1 - exp(-2a)), and noise adds 2 S + 1 at m = 0 and -S ρ(2T) at
    m = ±1; written so, a narrow spectrum does not cancel.
    """
    a = float(correlation_exponent(pri_s, width_m_s, wavelength_m))
    if a > 300.0 or snr <= 0:
        return math.inf
    pairs = int(pulses) - 1
    lag = np.arange(1, pairs)
    weighted = pairs + 2.0 * np.sum((pairs - lag) * np.exp(np.maximum(-2.0 * a * np.square(lag), -700.0)))
    spread = -math.expm1(-2.0 * a) * weighted
    noise = pairs * (2.0 / snr + 1.0 / snr**2) - (2.0 * (pairs - 1) * math.exp(max(-4.0 * a, -700.0)) / snr)
    variance = (spread + noise) / (2.0 * pairs**2 * math.exp(-2.0 * a))
    return wavelength_m / (4.0 * math.pi * pri_s) * math.sqrt(variance)


def coherence(pri_s, width_m_s, wavelength_m):
    """Return how the spectrum width compares with the Nyquist speed.

    Parameters
    ----------
    pri_s : float or array, shape S
        PRI. [s]
    width_m_s : float or array, shape S
        Spectrum width. [m/s]
    wavelength_m : float
        Wavelength. [m]

    Returns
    -------
    ratio : float or array, shape S
        π σ_v / v_N. Up to 1 the echoes stay coherent from pulse to pulse. [unitless]

    References
    ----------
    R. J. Doviak and D. S. Zrnic, *Doppler Radar and Weather Observations* (from memory): λ/(2T) ≥ 2πσ_v.
    """
    return 4.0 * np.pi * width_m_s * pri_s / wavelength_m
