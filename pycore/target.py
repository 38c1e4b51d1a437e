"""What a target returns: its strength on each PRF, and what eclipsing and the beam's shape leave of it.

Signal-to-noise goes by energy, never by 1/bandwidth. A target's strength on a
PRF is a single number K with the unit m⁴: one-pulse signal-to-noise is K/R⁴.
"""

import math

import numpy as np

from pycore.constants import BOLTZMANN_J_K, REFERENCE_TEMPERATURE_K


def reference_strength(snr_db, at_m, pulse_s, wavelength_m, at_pulse_s=None):
    """Return a target's strength on each PRF from one signal-to-noise ratio at one range.

    Parameters
    ----------
    snr_db : float
        One-pulse signal-to-noise ratio on the first PRF's carrier. [dB]
    at_m : float
        Range at which that holds. [m]
    pulse_s, wavelength_m : float arrays, shape N
        Pulse length and wavelength of each PRF. [s, m]
    at_pulse_s : float or None
        Pulse length that ``snr_db`` was measured with; the first PRF's where None. [s]

    Returns
    -------
    strength_m4 : float array, shape N
        S R⁴ (τ_i/τ_1)(λ_i/λ_1)²: energy, and the square of the wavelength at the same antenna gain. [m⁴]
    """
    pulse_s, wavelength_m = np.broadcast_arrays(np.atleast_1d(pulse_s), np.atleast_1d(wavelength_m))
    measured_s = pulse_s[0] if at_pulse_s is None else at_pulse_s
    return 10.0 ** (snr_db / 10.0) * at_m**4 * (pulse_s / measured_s) * (wavelength_m / wavelength_m[0]) ** 2


def radar_equation_strength(peak_w, gain_db, rcs_m2, noise_figure_db, losses_db, pulse_s, wavelength_m):
    """Return a target's strength on each PRF from the radar equation.

    Parameters
    ----------
    peak_w : float
        Peak power. [W]
    gain_db : float
        Antenna gain on the beam's axis, the same both ways. [dB]
    rcs_m2 : float
        Radar cross-section. [m²]
    noise_figure_db, losses_db : float
        Noise figure and all other losses. [dB]
    pulse_s, wavelength_m : float arrays, shape N
        Pulse length and wavelength of each PRF. [s, m]

    Returns
    -------
    strength_m4 : float array, shape N
        P τ G² λ² σ/((4π)³ k 290 K F L). [m⁴]

    References
    ----------
    The radar range equation in terms of pulse energy (common practice).
    """
    energy_j = peak_w * np.asarray(pulse_s, dtype=float)
    power = 10.0 ** ((2.0 * gain_db - noise_figure_db - losses_db) / 10.0)
    noise_j = BOLTZMANN_J_K * REFERENCE_TEMPERATURE_K
    return energy_j * power * np.asarray(wavelength_m) ** 2 * rcs_m2 / ((4.0 * math.pi) ** 3 * noise_j)


def one_pulse_signal(strength_m4, range_m, first_opening_m):
    """Return the one-pulse signal-to-noise ratio over range, not eclipsed.

    Parameters
    ----------
    strength_m4 : float or array, shape S
        Of :func:`reference_strength` or :func:`radar_equation_strength`. [m⁴]
    range_m : float or array, shape S
        Range. [m]
    first_opening_m : float or array, shape S
        Range nearer than which the law is held constant. [m]

    Returns
    -------
    ratio : float array, shape S
        Power ratio.
    """
    return strength_m4 / np.maximum(np.maximum(range_m, first_opening_m), math.ulp(1.0)) ** 4


def received_power(share, form='whole'):
    """Return the power that eclipsing leaves of an echo's signal-to-noise.

    Parameters
    ----------
    share : float or array, shape S
        Received share of the echo. [unitless]
    form : str
        ``'whole'`` or ``'part'``, as for :func:`pycore.eclipsing.eclipsing_loss`. [unitless]

    Returns
    -------
    power : float array, shape S
        ε² or ε, nought where nothing is received.
    """
    return np.asarray(share, dtype=float) ** {'whole': 2, 'part': 1}[form]


def beam_offsets(pri_s, pulses, fill_pulses, time_on_target_s):
    """Return how far from the beam's axis each CPI is when the set is centred on the target.

    Parameters
    ----------
    pri_s : float array, shape N
        Intervals in sending order. [s]
    pulses, fill_pulses : int or array, shape N
        Pulses that count, and pulses sent before them. [unitless]
    time_on_target_s : float
        Time in which the beam turns by its one-way half-power width. [s]

    Returns
    -------
    offset : float array, shape N
        From the set's middle to the middle of the pulses that count. [one-way half-power beamwidths]
    """
    pri_s = np.asarray(pri_s, dtype=float)
    counted_s, fill_s = pri_s * pulses, pri_s * fill_pulses
    start_s = np.cumsum(counted_s + fill_s) - counted_s
    return (start_s + 0.5 * counted_s - 0.5 * (counted_s + fill_s).sum()) / time_on_target_s


def beam_loss_db(offset):
    """Return what a CPI loses because the beam points beside the target.

    Parameters
    ----------
    offset : float or array, shape S
        Of :func:`beam_offsets`. [one-way half-power beamwidths]

    Returns
    -------
    loss_db : float array, shape S
        80 log10(2) u² = 24.08 u². Derived here: a Gaussian beam falls to a half at u = ½ one way, so its power
        is 2^(-4u²) one way and 2^(-8u²) both ways. [dB]
    """
    return 80.0 * math.log10(2.0) * np.asarray(offset, dtype=float) ** 2
