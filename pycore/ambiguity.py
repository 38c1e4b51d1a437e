"""What one PRF confuses: ranges a whole interval apart, speeds a whole blind speed apart.

Radial speed is positive when closing. Surveillance practice quotes the first
blind speed λ/(2T), weather practice the Nyquist speed ± λ/(4T): both are here,
by their names.
"""

import numpy as np

from pycore.constants import SPEED_OF_LIGHT_M_S


def wavelength(carrier_hz):
    """Return the wavelength of a carrier.

    Parameters
    ----------
    carrier_hz : float or array, shape S
        Carrier frequency. [Hz]

    Returns
    -------
    wavelength_m : float or array, shape S
        c / f. [m]
    """
    return SPEED_OF_LIGHT_M_S / carrier_hz


def unambiguous_range(pri_s):
    """Return the range whose echo arrives just as the next pulse leaves.

    Parameters
    ----------
    pri_s : float or array, shape S
        Time between pulse starts. [s]

    Returns
    -------
    range_m : float or array, shape S
        c T / 2 (derived here: out and back in one interval). [m]
    """
    return SPEED_OF_LIGHT_M_S * pri_s / 2.0


def first_blind_speed(pri_s, wavelength_m):
    """Return the speed that moves a target by half a wavelength from pulse to pulse.

    Parameters
    ----------
    pri_s : float or array, shape S
        Time between pulse starts. [s]
    wavelength_m : float or array, shape S
        Wavelength. [m]

    Returns
    -------
    speed_m_s : float or array, shape S
        λ / (2 T): the whole unambiguous span of radial speed. [m/s]

    References
    ----------
    M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., McGraw-Hill 2014, sec. 5.3 (e-book P. 349-350).
    """
    return wavelength_m / (2.0 * pri_s)


def nyquist_speed(pri_s, wavelength_m):
    """Return the largest speed of either sign that does not fold, as weather practice quotes it.

    Parameters
    ----------
    pri_s : float or array, shape S
        Time between pulse starts. [s]
    wavelength_m : float or array, shape S
        Wavelength. [m]

    Returns
    -------
    speed_m_s : float or array, shape S
        λ / (4 T), half the first blind speed. [m/s]
    """
    return first_blind_speed(pri_s, wavelength_m) / 2.0


def trade_product(wavelength_m):
    """Return what unambiguous range and first blind speed multiply to, whatever the PRF.

    Parameters
    ----------
    wavelength_m : float or array, shape S
        Wavelength. [m]

    Returns
    -------
    product_m2_s : float or array, shape S
        c λ / 4: a straight line of slope -1 on logarithmic axes. [m^2/s]

    References
    ----------
    Moisseev et al., J. Atmos. Oceanic Technol. 25(12), 2008, Introduction (there v_a r_a = c λ / 8, v_a the Nyquist
    speed).
    """
    return SPEED_OF_LIGHT_M_S * wavelength_m / 4.0


def fold_range(range_m, unambiguous_range_m):
    """Return the range at which an echo appears.

    Parameters
    ----------
    range_m : float or array, shape S
        True range. [m]
    unambiguous_range_m : float or array, shape S
        Unambiguous range. [m]

    Returns
    -------
    apparent_m : float or array, shape S
        R mod R_u, in [0, R_u) for every float. [m]
    """
    apparent = np.mod(range_m, unambiguous_range_m)
    # A tiny negative range leaves a remainder that rounds up to the whole interval: that is the start of the next.
    return np.where(apparent >= unambiguous_range_m, 0.0, apparent)[()]


def fold_speed(speed_m_s, blind_speed_m_s):
    """Return the radial speed at which a target appears.

    Parameters
    ----------
    speed_m_s : float or array, shape S
        True radial speed, positive closing. [m/s]
    blind_speed_m_s : float or array, shape S
        First blind speed. [m/s]

    Returns
    -------
    apparent_m_s : float or array, shape S
        In [-v_b/2, v_b/2) for every float. [m/s]
    """
    half = np.asarray(blind_speed_m_s) / 2.0
    # The remainder of a division is exact, and so is moving it by one interval where it is beyond half of it.
    remainder = np.fmod(speed_m_s, blind_speed_m_s)
    down = np.where(remainder >= half, remainder - blind_speed_m_s, remainder)
    return np.where(remainder < -half, remainder + blind_speed_m_s, down)[()]


def pulses_since(range_m, unambiguous_range_m):
    """Return how many later pulses have left when an echo returns.

    Parameters
    ----------
    range_m : float or array, shape S
        True range. [m]
    unambiguous_range_m : float or array, shape S
        Unambiguous range. [m]

    Returns
    -------
    count : int array, shape S
        floor(R / R_u): 0 for the first time around, 1 for the second. [unitless]
    """
    return np.floor_divide(range_m, unambiguous_range_m).astype(int)[()]


def shortfall(range_max_m, speed_span_m_s, wavelength_m):
    """Return how many times over a single PRF falls short of a coverage.

    Parameters
    ----------
    range_max_m : float
        Farthest range wanted. [m]
    speed_span_m_s : float
        Span of radial speeds wanted, highest less lowest. [m/s]
    wavelength_m : float or array, shape S
        Wavelength. [m]

    Returns
    -------
    times : float or array, shape S
        4 R S / (c λ); up to 1 a single PRF can be unambiguous in both. [unitless]
    """
    return range_max_m * speed_span_m_s / trade_product(wavelength_m)


def regime(unambiguous_range_m, blind_speed_m_s, range_max_m, speed_span_m_s):
    """Return the regime of a PRF for a coverage.

    Parameters
    ----------
    unambiguous_range_m : float
        Unambiguous range. [m]
    blind_speed_m_s : float
        First blind speed. [m/s]
    range_max_m : float
        Farthest range wanted. [m]
    speed_span_m_s : float
        Span of radial speeds wanted. [m/s]

    Returns
    -------
    regime : str
        ``'low'`` (unambiguous in range), ``'high'`` (in speed), ``'clear'`` (in both), ``'medium'`` (in neither).

    References
    ----------
    M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., McGraw-Hill 2014, e-book P. 408.
    """
    far, fast = unambiguous_range_m >= range_max_m, blind_speed_m_s >= speed_span_m_s
    return {(True, False): 'low', (False, True): 'high', (True, True): 'clear', (False, False): 'medium'}[far, fast]


def single_prf_interval(range_max_m, speed_span_m_s, wavelength_m):
    """Return the PRFs at which a single one is unambiguous in range and in speed.

    Parameters
    ----------
    range_max_m : float
        Farthest range wanted, above 0. [m]
    speed_span_m_s : float
        Span of radial speeds wanted. [m/s]
    wavelength_m : float
        Wavelength. [m]

    Returns
    -------
    prf_hz : (float, float) or None
        From 2 S / λ (so that v_b ≥ S) to c / (2 R) (so that R_u ≥ R); ``None`` where the shortfall is above 1.
        Derived here. [Hz]
    """
    lowest, highest = 2.0 * speed_span_m_s / wavelength_m, SPEED_OF_LIGHT_M_S / (2.0 * range_max_m)
    return (lowest, highest) if lowest <= highest else None


def single_clear_prf_interval(range_m, speed_m_s, wavelength_m, notch_m_s, lost_s):
    """Return the PRFs at which a single one leaves nothing blind but the first opening and the notch around zero.

    Parameters
    ----------
    range_m : float
        Farthest range wanted. [m]
    speed_m_s : pair of float
        Limits of the radial speeds wanted. [m/s]
    wavelength_m : float
        Wavelength. [m]
    notch_m_s : float
        Half width of the notch. [m/s]
    lost_s : float
        What the end of an interval loses: received_min · τ + guard. [s]

    Returns
    -------
    prf_hz : (float, float) or None
        So that v_b is at least the span and at least the fastest speed plus the notch, and R_u at least
        R + c (received_min τ + guard) / 2; ``None`` where there is none. Derived here. [Hz]
    """
    low, high = speed_m_s
    widest = max(high - low, abs(low) + notch_m_s, abs(high) + notch_m_s)
    return single_prf_interval(range_m + SPEED_OF_LIGHT_M_S * lost_s / 2.0, widest, wavelength_m)
