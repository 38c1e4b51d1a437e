"""The plan that a set of PRIs makes: what it sees, and what no set could."""

import numpy as np

from pycore.eclipsing import clear_ranges, first_opening
from pycore.floor import floor_ranges, floor_speeds
from pycore.sight import Sight, floor
from pycore.spans import Spans
from pycore.stagger import notch_clear_speeds


def sight_of(limits, pris):
    """Return what one set of dwells sees of the coverage.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]
    pris : sequence of int, length N
        PRIs in the order of the places. [clock counts]

    Returns
    -------
    sight : Sight
        That of the plan with these PRIs.
    """
    pri_s = np.array(pris, dtype=np.int64) / float(limits.clock_hz)
    pulse, notch, wavelength = _each(limits)
    shut = limits.recovery_s, limits.guard_s, limits.received_min
    ranges = clear_ranges(pri_s, pulse, *shut, limits.range_m, limits.near)
    speeds = notch_clear_speeds(wavelength / (2.0 * pri_s), notch, limits.speed_m_s)
    return Sight(ranges, speeds, *floor_spans(limits), limits.n, limits.m, limits.range_m, limits.speed_m_s)


def floor_of(limits):
    """Return the share of the coverage that no set can see.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]

    Returns
    -------
    share : float
        The same for all sets of dwells, because places keep their pulses and notches. [unitless]
    """
    none = Spans(np.zeros(0, dtype=np.intp), np.zeros(0), np.zeros(0))
    return floor(Sight(none, none, *floor_spans(limits), limits.n, limits.m, limits.range_m, limits.speed_m_s))


def floor_spans(limits):
    """Return the ranges and speeds clear with only first openings and notches around zero left.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]

    Returns
    -------
    ranges, speeds : Spans
        For each place. [m, m/s]
    """
    pulse, notch, _ = _each(limits)
    opening = first_opening(limits.recovery_s, limits.received_min, pulse)
    near = ()
    if limits.near is not None:
        short = np.array([limits.near.pulse_s])
        near = first_opening(limits.recovery_s, limits.received_min, short)[0], limits.near.to_range_m
    return floor_ranges(opening, limits.range_m, *near), floor_speeds(notch, limits.speed_m_s)


def _each(limits):
    """Return pulse, notch and wavelength of every place."""
    fields = [(place.pulse_s, place.notch_m_s, place.wavelength_m) for place in limits.places]
    return np.array(fields).T
