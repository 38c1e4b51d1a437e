"""Surface clutter, rain and other moving patches: how strong they are, and how they fold in range.

Each patch is Gaussian in speed about its own mean. Its clutter-to-noise ratio
is that of **one pulse** at the output of a filter matched to it, on the beam's
axis and not eclipsed, for the first PRF's carrier, pulse and bandwidth unless
the pulse it was measured with is given. Closing speeds are positive.
"""

import math
from dataclasses import dataclass

import numpy as np

from pycore.constants import SPEED_OF_LIGHT_M_S


@dataclass(frozen=True, slots=True)
class Clutter:
    """One patch of clutter: surface, rain, chaff, sea, an altitude return, a road.

    Parameters
    ----------
    name : str
        What it is called. [unitless]
    cnr_db : float
        One-pulse clutter-to-noise ratio at ``at_m``. [dB]
    at_m : float
        Range at which that holds. [m]
    range_m : tuple of two floats
        Nearest and farthest range it occupies. [m]
    speed_m_s : float
        Mean closing speed. [m/s]
    spread_m_s : float
        Standard deviation of its speed. [m/s]
    range_power : float
        It falls as R^-power: 3 for a surface seen at a low angle, 2 for a volume that fills the beam
        (both from memory, common practice). [unitless]
    at_pulse_s : float or None
        Pulse length that ``cnr_db`` was measured with; the first PRF's where None. [s]
    """

    name: str
    cnr_db: float
    at_m: float
    range_m: tuple[float, float]
    speed_m_s: float
    spread_m_s: float
    range_power: float
    at_pulse_s: float | None = None


def pulse_factor(clutter, pulse_s, bandwidth_hz, reference_pulse_s, reference_bandwidth_hz):
    """Return the clutter-to-noise ratio of a PRF against that of the reference pulse.

    Parameters
    ----------
    clutter : Clutter
        The patch. [unitless]
    pulse_s, bandwidth_hz : float or array, shape S
        The PRF's pulse length and bandwidth. [s, Hz]
    reference_pulse_s, reference_bandwidth_hz : float
        The first PRF's. [s, Hz]

    Returns
    -------
    factor : float or array, shape S
        (τ/τ_1)(B_1/B), a power ratio. Derived here: received energy goes with the pulse's energy and
        with the length of the gate, c/(2B), from which clutter comes.
    """
    measured_s = reference_pulse_s if clutter.at_pulse_s is None else clutter.at_pulse_s
    return np.asarray(pulse_s, dtype=float) / measured_s * (reference_bandwidth_hz / np.asarray(bandwidth_hz))


def clutter_to_noise(clutter, range_m, first_opening_m, factor=1.0):
    """Return a patch's one-pulse clutter-to-noise ratio where the clutter itself is.

    Parameters
    ----------
    clutter : Clutter
        The patch. [unitless]
    range_m : float or array, shape S
        Range of the clutter. [m]
    first_opening_m : float or array, shape S
        Range nearer than which the law is held constant. [m]
    factor : float or array, shape S
        Of :func:`pulse_factor`. [unitless]

    Returns
    -------
    ratio : float array, shape S
        Power ratio; 0 outside the patch's ranges.
    """
    range_m = np.asarray(range_m, dtype=float)
    low, high = clutter.range_m
    held_m = np.maximum(np.maximum(range_m, first_opening_m), math.ulp(1.0))
    ratio = 10.0 ** (clutter.cnr_db / 10.0) * factor * (clutter.at_m / held_m) ** clutter.range_power
    return np.where((range_m >= low) & (range_m <= high), ratio, 0.0)


def folded_clutter_to_noise(clutter, range_m, unambiguous_range_m, first_opening_m, factor=1.0):
    """Return what a patch puts into the gate of a target: all that it occupies at R + k R_u.

    Parameters
    ----------
    clutter : Clutter
        The patch. [unitless]
    range_m : float or array, shape S
        True range of the target. [m]
    unambiguous_range_m : float
        The PRF's unambiguous range R_u. [m]
    first_opening_m : float or array, shape S
        Range nearer than which the law is held constant. [m]
    factor : float or array, shape S
        Of :func:`pulse_factor`. [unitless]

    Returns
    -------
    ratio : float array, shape S
        Sum of the one-pulse power ratios over whole k, negative ones too.
    """
    nearest_m = np.mod(np.asarray(range_m, dtype=float), unambiguous_range_m)
    low, high = clutter.range_m
    trips = range(max(math.ceil(low / unambiguous_range_m) - 1, 0), math.floor(high / unambiguous_range_m) + 1)
    total = np.zeros(np.broadcast(nearest_m, first_opening_m, factor).shape)
    for trip in trips:
        total = total + clutter_to_noise(clutter, nearest_m + trip * unambiguous_range_m, first_opening_m, factor)
    return total


def fill_needed(delay_s, pri_s, pulse_s):
    """Return the fill pulses that an echo needs before the first pulse that counts.

    Parameters
    ----------
    delay_s : float
        Delay of the farthest echo that must be there in every pulse that counts. [s]
    pri_s : float array, shape N
        Intervals in sending order; the CPIs follow each other in a cycle. [s]
    pulse_s : float or array, shape N
        Pulse lengths. [s]

    Returns
    -------
    fill : int array, shape N
        The larger of the intervals that the echo takes to come back and those in which echoes of the PRF
        before still arrive: max(⌊t/T_i⌋, ⌈(t + τ - T_before)/T_i⌉, 0). Derived here.
    """
    pri_s = np.asarray(pri_s, dtype=float)
    own = np.floor(delay_s / pri_s)
    before = np.ceil((delay_s + pulse_s - np.roll(pri_s, 1)) / pri_s)
    return np.maximum(np.maximum(own, before), 0.0).astype(int)


def late_share(cpi, range_m):
    """Return the share of the counted pulses that an echo from beyond R_u is in.

    Parameters
    ----------
    cpi : Cpi
        Interval, pulses that count and fill pulses. [unitless]
    range_m : float or array, shape S
        True range of the target. [m]

    Returns
    -------
    share : float array, shape S
        (n - max(0, k - fill))/n, k = ⌊R/R_u⌋ intervals late; signal-to-noise goes with its square.
    """
    late = np.floor(np.asarray(range_m, dtype=float) / (0.5 * SPEED_OF_LIGHT_M_S * cpi.pri_s))
    missing = np.maximum(late - cpi.fill_pulses, 0.0)
    return np.maximum(cpi.pulses - missing, 0.0) / cpi.pulses


def altitude_return(height_m, platform_speed_m_s, look_deg):
    """Return where the echo from the ground straight below a platform stands.

    Parameters
    ----------
    height_m : float
        Height above the ground. [m]
    platform_speed_m_s : float
        Ground speed of the platform. [m/s]
    look_deg : float
        Angle of the beam from the track. [deg]

    Returns
    -------
    range_m, speed_m_s : float
        The height, and -V cos(look): the ground below does not close, and speeds are measured from the
        centre of the mainlobe clutter, which the radar holds at zero. Derived here.
    """
    return height_m, -platform_speed_m_s * math.cos(math.radians(look_deg))
