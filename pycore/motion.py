"""What a target's own motion does to its echo: rotor lines that fold, and Doppler inside the pulse.

Radial speed is positive when closing. How far a target walks in range is in ``dwell``.
"""

import numpy as np

from pycore.constants import SPEED_OF_LIGHT_M_S


def rotor_folds_onto_body(own_spread_m_s, blind_speed_m_s, filter_width_m_s=0.0):
    """Return on which PRFs a rotor's or propeller's lines come down on the body that carries it.

    Parameters
    ----------
    own_spread_m_s : float
        How far to either side of the body its lines reach. [m/s]
    blind_speed_m_s : float array, shape N
        First blind speeds, after which speeds repeat. [m/s]
    filter_width_m_s : float array, shape N
        Width of the Doppler filter that the body stands in. [m/s]

    Returns
    -------
    folds : bool array, shape N
        Where the lines reach a blind speed away, to within half a filter. Derived here: a line at v + v_b looks as
        one at v.
    """
    return own_spread_m_s >= np.asarray(blind_speed_m_s) - np.asarray(filter_width_m_s) / 2.0


def turns_in_a_pulse(speed_m_s, wavelength_m, pulse_s):
    """Return how far a target's Doppler turns the phase while one pulse passes over it.

    Parameters
    ----------
    speed_m_s : float or array, shape S
        Radial speed, positive closing. [m/s]
    wavelength_m : float or array, shape S
        Wavelength. [m]
    pulse_s : float or array, shape S
        Pulse length. [s]

    Returns
    -------
    turns : float or array, shape S
        |f_d| τ with f_d = 2 v/λ; from a quarter on a matched filter begins to miss it (common practice). [unitless]
    """
    return np.abs(2.0 * np.asarray(speed_m_s) / wavelength_m * pulse_s)[()]


def chirp_range_shift(speed_m_s, wavelength_m, pulse_s, bandwidth_hz):
    """Return how far Doppler moves the compressed echo of a linear chirp.

    Parameters
    ----------
    speed_m_s : float or array, shape S
        Radial speed, positive closing. [m/s]
    wavelength_m : float or array, shape S
        Wavelength. [m]
    pulse_s : float or array, shape S
        Pulse length. [s]
    bandwidth_hz : float or array, shape S
        Swept bandwidth. [Hz]

    Returns
    -------
    shift_m : float or array, shape S
        c f_d τ/(2 B): a rising chirp of a closing target looks nearer by this, a falling one farther. [m]

    Notes
    -----
    Derived here: a frequency offset f_d and a delay of f_d τ/B cannot be told apart along a sweep of B in τ.
    """
    doppler_hz = 2.0 * np.asarray(speed_m_s) / wavelength_m
    return (SPEED_OF_LIGHT_M_S / 2.0 * doppler_hz * pulse_s / bandwidth_hz)[()]
