"""Detection: what false alarms ask for, and how much signal that needs."""

import math
from functools import lru_cache

import numpy as np

from pycore.marcum import threshold
from pycore.swerling import at_least, set_probability


def false_alarm_per_cpi(overall, n, m):
    """Return the false-alarm probability of one CPI that gives the overall one after M of N.

    Parameters
    ----------
    overall : float
        Probability for one cell of range and speed after M of N, above 0 and below 1. [unitless]
    n, m : int
        Number of CPIs, all alike in this, and how many must agree. [unitless]

    Returns
    -------
    probability : float
        p with Σ_{k≥M} C(N, k) p^k (1 - p)^(N - k) = overall, to rounding.
    """
    low, high = math.log(overall) - math.log(math.comb(n, m)) - 1.0, 0.0
    for _ in range(70):
        middle = 0.5 * (low + high)
        low, high = (low, middle) if at_least(np.full(n, math.exp(middle)), m) > overall else (middle, high)
    return math.exp(0.5 * (low + high))


@lru_cache(maxsize=64)
def set_threshold(overall, n, m, outputs=1):
    """Return the threshold of every CPI for an overall false-alarm probability.

    Parameters
    ----------
    overall : float
        Probability for one cell after M of N. [unitless]
    n, m : int
        Number of CPIs, and how many must agree. [unitless]
    outputs : int
        Independent outputs of each CPI whose powers are added. [unitless]

    Returns
    -------
    threshold : float
        y, against the noise power of one output. [unitless]
    """
    return threshold(false_alarm_per_cpi(overall, n, m), outputs)


def signal_needed_db(wanted, n, m, overall, case, outputs=1):
    """Return the signal-to-noise ratio that each of N equal CPIs needs.

    Parameters
    ----------
    wanted : float
        Wanted probability of detection after M of N. [unitless]
    n, m : int
        Number of CPIs, and how many must detect the target. [unitless]
    overall : float
        False-alarm probability of one cell after M of N. [unitless]
    case : str
        One of ``swerling.CASES``. [unitless]
    outputs : int
        Independent outputs of each CPI whose powers are added. [unitless]

    Returns
    -------
    needed_db : float
        Mean signal-to-noise ratio of a CPI, summed over its outputs. [dB]
    """
    level = set_threshold(overall, n, m, outputs)
    low, high = -60.0, 160.0
    for _ in range(50):
        middle = 0.5 * (low + high)
        found = set_probability(np.full(n, 10.0 ** (middle / 10.0)), m, level, case, outputs)
        low, high = (low, middle) if found > wanted else (middle, high)
    return 0.5 * (low + high)


def coverage_cells(range_m, speed_m_s, gate_m, filter_width_m_s):
    """Return how many cells of range and speed the coverage has.

    Parameters
    ----------
    range_m, speed_m_s : tuples of two floats
        The coverage. [m, m/s]
    gate_m : float or array, shape N
        Length of a gate, c/(2B). [m]
    filter_width_m_s : float or array, shape N
        Width of a filter, lambda/(2nT). [m/s]

    Returns
    -------
    cells : int
        Gates × filters, both whole and of the finest PRF.
    """
    gates = math.ceil((range_m[1] - range_m[0]) / np.min(gate_m) * (1.0 - 1e-12))
    filters = math.ceil((speed_m_s[1] - speed_m_s[0]) / np.min(filter_width_m_s) * (1.0 - 1e-12))
    return max(gates, 1) * max(filters, 1)


def sets_per_scan(scan_period_s, time_on_target_s, used_s):
    """Return how many sets of CPIs are sent in one turn of the antenna.

    Parameters
    ----------
    scan_period_s : float
        Time of one turn. [s]
    time_on_target_s : float
        Time in which the beam turns by its width. [s]
    used_s : float
        Time of one set. [s]

    Returns
    -------
    sets : float
        Beamwidths in a turn × whole sets in each, at least one. Expected false reports of a scan are this times
        cells times the overall false-alarm probability.
    """
    return scan_period_s / time_on_target_s * max(math.floor(time_on_target_s / used_s * (1.0 + 1e-12)), 1)
