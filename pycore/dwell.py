"""How the time on target is spent: CPIs, fill pulses, gates, filters, and how far a target moves meanwhile."""

import numpy as np

from pycore.constants import SPEED_OF_LIGHT_M_S


def time_on_target(beamwidth_deg, scan_rpm):
    """Return how long a turning beam rests on a target.

    Parameters
    ----------
    beamwidth_deg : float
        One-way 3 dB beamwidth in azimuth. [deg]
    scan_rpm : float
        Turns of the antenna. [1/min]

    Returns
    -------
    time_s : float
        beamwidth / (6 rpm) (derived here: 6 degrees a second for each turn a minute). [s]
    """
    return beamwidth_deg / (6.0 * scan_rpm)


def time_used(pri_s, pulses, fill_pulses):
    """Return how long one set of CPIs takes with its fill pulses.

    Parameters
    ----------
    pri_s : float array, shape N
        Intervals. [s]
    pulses, fill_pulses : int array, shape N
        Pulses that count, and those sent ahead of them, on each PRF. [unitless]

    Returns
    -------
    time_s : float
        Σ (n + fill) T. [s]
    """
    return float(((pulses + fill_pulses) * pri_s).sum())


def filter_width(pri_s, pulses, wavelength_m):
    """Return the width of a Doppler filter in radial speed.

    Parameters
    ----------
    pri_s : float array, shape N
        Intervals. [s]
    pulses : int array, shape N
        Pulses that count. [unitless]
    wavelength_m : float array, shape N
        Wavelengths. [m]

    Returns
    -------
    width_m_s : float array, shape N
        λ / (2 n T), the spacing of the filters. [m/s]
    """
    return wavelength_m / (2.0 * pulses * pri_s)


def gates(pri_s, pulse_s, recovery_s, guard_s, bandwidth_hz):
    """Return how many whole range gates fit into the open receiver of each interval.

    Parameters
    ----------
    pri_s, pulse_s : float array, shape N
        Intervals and pulses. [s]
    recovery_s, guard_s : float
        Times that the receiver stays shut after and before a pulse. [s]
    bandwidth_hz : float array, shape N
        Bandwidths; a gate is 1/B. [Hz]

    Returns
    -------
    count : int array, shape N
        0 where the receiver never opens. [unitless]
    """
    open_gates = (pri_s - pulse_s - recovery_s - guard_s) * bandwidth_hz
    # A whole number of gates must not be lost to the last bit of a product of decimals.
    return np.maximum(np.floor(open_gates + 1e-9), 0.0).astype(np.intp)


def range_walk(speed_m_s, time_s, bandwidth_hz):
    """Return how many gates a target crosses in a time.

    Parameters
    ----------
    speed_m_s : float
        Radial speed, either sign. [m/s]
    time_s : float or array, shape N
        Time. [s]
    bandwidth_hz : float or array, shape N
        Bandwidth; a gate is c/(2B) deep. [Hz]

    Returns
    -------
    gates : float or array, shape N
        |v| t over one gate. [unitless]
    """
    return abs(speed_m_s) * time_s * 2.0 * bandwidth_hz / SPEED_OF_LIGHT_M_S
