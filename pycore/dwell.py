"""How the time on target is spent: CPIs, fill pulses, duty, gates, filters and the load they make."""

from dataclasses import dataclass

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


@dataclass(frozen=True, slots=True)
class Timeline:
    """When the CPIs of one set are sent, from the start of the first.

    Parameters
    ----------
    start_s : float array, shape N
        First pulse of each CPI, fill pulses included. [s]
    counted_s : float array, shape N
        First pulse that counts. [s]
    stop_s : float array, shape N
        End of each CPI's last interval. [s]
    rest_s : float or None
        Time on target that is left; below 0 where the set does not fit, ``None`` where no time is given. [s]
    """

    start_s: np.ndarray
    counted_s: np.ndarray
    stop_s: np.ndarray
    rest_s: float | None


def timeline(pri_s, pulses, fill_pulses, time_on_target_s=None):
    """Return when each CPI of a set is sent.

    Parameters
    ----------
    pri_s : float array, shape N
        Intervals in sending order. [s]
    pulses, fill_pulses : int array, shape N
        Pulses that count, and those sent ahead of them. [unitless]
    time_on_target_s : float or None
        Time that there is. [s]

    Returns
    -------
    timeline : Timeline
        One entry for each CPI.
    """
    fill_s, counted_s = np.multiply(fill_pulses, pri_s), np.multiply(pulses, pri_s)
    stop = np.cumsum(fill_s + counted_s)
    start = np.concatenate(([0.0], stop[:-1]))
    rest = None if time_on_target_s is None else float(time_on_target_s - stop[-1])
    return Timeline(start, start + fill_s, stop, rest)


def sets_that_fit(time_on_target_s, time_used_s):
    """Return how many whole sets of CPIs fit into the time on target.

    Parameters
    ----------
    time_on_target_s, time_used_s : float
        Time that there is, and that one set takes. [s]

    Returns
    -------
    count : int
        A set that takes the time to the last billionth fits. [unitless]
    """
    return int(time_on_target_s / time_used_s * (1.0 + 1e-9))


def largest_duty(sent_s, pri_s):
    """Return the largest duty of a set.

    Parameters
    ----------
    sent_s : float array, shape N
        Time that is sent in each interval, a near pulse included. [s]
    pri_s : float array, shape N
        Intervals. [s]

    Returns
    -------
    duty : float
        Largest Σ τ/T. [unitless]
    """
    return float(np.max(np.divide(sent_s, pri_s)))


def mean_duty(sent_s, pri_s, sent_pulses):
    """Return the duty of a whole set, fill pulses included.

    Parameters
    ----------
    sent_s : float array, shape N
        Time that is sent in each interval, a near pulse included. [s]
    pri_s : float array, shape N
        Intervals. [s]
    sent_pulses : int array, shape N
        Intervals of each kind that are sent: fill pulses and those that count; all equal in a stagger. [unitless]

    Returns
    -------
    duty : float
        Time sent over time used. [unitless]
    """
    return float(np.multiply(sent_pulses, sent_s).sum() / np.multiply(sent_pulses, pri_s).sum())


def cells_per_second(gate_counts, pulses, time_used_s):
    """Return the load that a set makes for the signal processor.

    Parameters
    ----------
    gate_counts : int array, shape N
        Gates in each interval. [unitless]
    pulses : int array, shape N
        Pulses that count, as many as there are Doppler filters. [unitless]
    time_used_s : float
        Time of one set. [s]

    Returns
    -------
    rate : float
        Gates times filters of all CPIs, over the time used. [1/s]
    """
    # As floats: whole numbers of a browser's engine end at 2^31, and a million gates times 4096 filters lie beyond.
    return float(np.multiply(gate_counts, pulses, dtype=float).sum() / time_used_s)


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
