"""How far a wanted probability of detection reaches: best, median and worst over the wanted speeds.

Limited by noise alone: nothing eclipsed, no clutter. Straddling is exact, the
best usable filter being taken at each speed.
"""

import math
from dataclasses import dataclass

import numpy as np

from pycore.needed import needed_factor_log
from pycore.rough_need import rough_factor_log
from pycore.speed_samples import best_gain, sampled_speeds

_SHARED = ('swerling1', 'swerling3')
_DOUBT = 0.0015  # of the logarithm of the needed factor, at first
_NEAREST_M = 1e-3


@dataclass(frozen=True, slots=True)
class Reach:
    """The ranges to which a wanted probability of detection holds.

    Parameters
    ----------
    best, median, worst : float
        Over the wanted speeds, by length of speed; nan where it is not reached. [m]
    places : tuple of three int
        Where these three lie among the speeds looked at; empty where no speed is outside the floor. [unitless]
    speed_m_s : float array, shape V
        Speeds looked at. [m/s]
    length_m_s : float array, shape V
        Length of the speed axis that each stands for. [m/s]
    """

    best: float
    median: float
    worst: float
    places: tuple[int, ...]
    speed_m_s: np.ndarray
    length_m_s: np.ndarray


def reach(cpis, strength_m4, m, threshold, case, wanted, first_opening_m, range_max_m, speed_m_s):
    """Return how far a target is detected with the wanted probability.

    Parameters
    ----------
    cpis : sequence of Cpi, length N
        The PRFs. [unitless]
    strength_m4 : float array, shape N
        The target's strength on each, beam shape taken off. [m⁴]
    m : int
        Number of CPIs that must detect it. [unitless]
    threshold : float
        y of every CPI. [unitless]
    case : str
        One of ``swerling.CASES``. [unitless]
    wanted : float
        Wanted probability of detection. [unitless]
    first_opening_m : float array, shape N
        First opening of each PRF; the M-th smallest is the nearest range looked at. [m]
    range_max_m : float
        Far end of the coverage; four times it is the farthest range looked at. [m]
    speed_m_s : tuple of two floats
        The wanted speeds. Those inside the notch around zero on more than N - M PRFs are left out. [m/s]

    Returns
    -------
    reach : Reach
        Over speeds an eighth of the narrowest filter apart, and in every gap between the edges of notches.
    """
    speed, length = sampled_speeds(cpis, m, speed_m_s)
    gain = np.stack([best_gain(cpi, speed) for cpi in cpis], axis=1) * np.asarray(strength_m4)
    nearest_m = float(np.sort(first_opening_m)[m - 1])
    return reach_over(speed, length, gain, m, threshold, case, wanted, (nearest_m, 4.0 * range_max_m))


def reach_over(speed_m_s, length_m_s, strength_m4, m, threshold, case, wanted, limits_m, outputs=1):
    """Return the same for any processing, from the strength behind it at each speed.

    Parameters
    ----------
    speed_m_s, length_m_s : float arrays, shape V
        Speeds, and the length of the speed axis that each stands for. [m/s]
    strength_m4 : float array, shape V × N
        Signal-to-noise ratio behind the processing times R⁴; for a stagger, the target's strength times the
        averaged response times the outputs. [m⁴]
    m : int
        Number of CPIs that must detect it. [unitless]
    threshold : float
        y of every CPI. [unitless]
    case : str
        One of ``swerling.CASES``. [unitless]
    wanted : float
        Wanted probability of detection. [unitless]
    limits_m : tuple of two floats
        Nearest and farthest range looked at. [m]
    outputs : int
        Independent outputs of each CPI whose powers are added. [unitless]

    Returns
    -------
    reach : Reach
        Not reached where even the nearest range has too little; the farthest range where that still has enough.

    Notes
    -----
    Where the needed factor is slow to find it is found roughly at all speeds, and exactly at those that could have
    one of the three ranks: within three times the spread of the errors that were met, their mean taken off all.
    """
    law = m, threshold, case, wanted
    if strength_m4.shape[1] == 1 or case not in _SHARED:
        factor_log = needed_factor_log(strength_m4, *law, outputs)
        return _ranked(speed_m_s, length_m_s, factor_log, limits_m)
    factor_log = rough_factor_log(strength_m4, *law)
    known, doubt = np.isinf(factor_log), _DOUBT
    while True:
        found = _ranked(speed_m_s, length_m_s, factor_log, limits_m)
        rows = np.flatnonzero(_near_a_rank(found, factor_log, limits_m, doubt) & ~known)
        if not rows.size:
            return found
        exact = needed_factor_log(strength_m4[rows], *law)
        off = exact - factor_log[rows]
        known[rows], doubt = True, max(doubt, 3.0 * float(np.ptp(off)))
        factor_log[~known] += off.mean()
        factor_log[rows] = exact


def _near_a_rank(found, factor_log, limits_m, doubt):
    """Return which speeds could yet take the place of the best, the median or the worst."""
    most, least = (-4.0 * math.log(max(end, _NEAREST_M)) for end in limits_m)
    # What is beyond a limit for certain has its value already.
    between = (factor_log > least - doubt) & (factor_log < most + doubt)
    near = np.zeros(len(factor_log), dtype=bool)
    for rank in factor_log[list(found.places)].tolist():
        near |= (factor_log >= rank - doubt) & (factor_log <= rank + doubt)
    return between & near


def _ranked(speed_m_s, length_m_s, factor_log, limits_m):
    """Return the reach from the factor that each speed needs."""
    range_m = np.minimum(np.exp(-0.25 * factor_log), limits_m[1])
    range_m = np.where(range_m >= limits_m[0], range_m, np.nan)
    places = _by_length(range_m, length_m_s)
    ends = (float(range_m[place]) for place in places) if places else (math.nan,) * 3
    return Reach(*ends, places, speed_m_s, length_m_s)


def _by_length(range_m, length_m_s):
    """Return the places of the best, the median and the worst by length of speed; what is not reached comes last."""
    if not len(range_m):
        return ()
    order = np.argsort(-np.nan_to_num(range_m, nan=-1.0), kind='stable')
    so_far = np.cumsum(length_m_s[order])
    return int(order[0]), int(order[np.searchsorted(so_far, 0.5 * so_far[-1])]), int(order[-1])


def enough_over_half(length_m_s, mean, m, threshold, case, wanted, outputs=1):
    """Return whether a wanted probability of detection is reached over half of the speeds.

    Parameters
    ----------
    length_m_s : float array, shape V
        Length of the speed axis that each speed stands for. [m/s]
    mean : float array, shape V × N
        Signal-to-noise ratio behind the processing. [unitless]
    m : int
        Number of CPIs that must detect it. [unitless]
    threshold : float
        y of every CPI. [unitless]
    case : str
        One of ``swerling.CASES``. [unitless]
    wanted : float
        Wanted probability of detection. [unitless]
    outputs : int
        Independent outputs of each CPI whose powers are added. [unitless]

    Returns
    -------
    enough : bool
        ``False`` where there are no speeds.
    """
    if not len(length_m_s):
        return False
    found = reach_over(length_m_s, length_m_s, mean, m, threshold, case, wanted, (0.0, math.inf), outputs)
    return found.median >= 1.0
