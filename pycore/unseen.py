"""How long a target stays out of sight: flying straight in, or crossing.

*Inbound* (or outbound, at a negative speed): at one radial speed the ranges that
fewer than M PRFs see form intervals, and the target needs an interval's length
over its speed to cross it. Between two edges of the speed axis the intervals do
not depend on the speed, so the slowest speed of each pattern is its worst
(derived here), and the answer is exact.

*Crossing*: a straight track passes through the notch around zero about its
closest point.
"""

from dataclasses import dataclass
from math import inf, sqrt

import numpy as np

from pycore.patterns import EDGE_TOLERANCE, sweep
from pycore.regions import runs
from pycore.sight import sweeps_with_floor


@dataclass(frozen=True, slots=True)
class Inbound:
    """The longest time that a target of a steady radial speed stays out of sight.

    Parameters
    ----------
    time_s : float
        Worst over the wanted speeds outside the floor; nan where every wanted speed is in the floor,
        inf where a target at rest is hidden. [s]
    at_m_s : float
        Radial speed at which that is reached (the worst speeds begin there); nan likewise. [m/s]
    range_m : tuple of two floats
        Ranges between which it is then hidden; nan where nothing is hidden. [m]
    never : bool
        Whether a target of that speed is seen at no range at all. [unitless]
    never_m_s : tuple of tuples of two floats
        All intervals of wanted speeds, outside the floor, that are seen at no range. [m/s]
    """

    time_s: float
    at_m_s: float
    range_m: tuple[float, float]
    never: bool
    never_m_s: tuple[tuple[float, float], ...]


def inbound(sight):
    """Return the longest time out of sight at any wanted radial speed outside the floor.

    Parameters
    ----------
    sight : Sight
        A plan and its coverage. [m and m/s]

    Returns
    -------
    inbound : Inbound
        Exact, for speeds of both signs.
    """
    ranges, speeds = sweeps_with_floor(sight)
    own = (1 << sight.n) - 1
    wanted = _outside_floor(ranges.pattern >> sight.n, speeds.pattern >> sight.n, sight.m)
    low, high, pattern = speeds.edges[:-1][wanted], speeds.edges[1:][wanted], speeds.pattern[wanted] & own
    if not low.size:
        return Inbound(np.nan, np.nan, (np.nan, np.nan), False, ())
    sets, which = np.unique(pattern, return_inverse=True)
    start, stop = _longest_hidden(ranges.edges, ranges.pattern & own, sets, sight.m)
    length, never = (stop - start)[which], ((start <= sight.range_m[0]) & (stop >= sight.range_m[1]))[which]
    rest = EDGE_TOLERANCE * (sight.speed_m_s[1] - sight.speed_m_s[0])
    slowest = np.where(low > rest, low, np.where(high < -rest, high, 0.0))
    time = _time(length, np.abs(slowest))
    worst = np.lexsort((-slowest, np.abs(slowest), -time))[0]
    hidden = (float(start[which[worst]]), float(stop[which[worst]])) if length[worst] > 0 else (np.nan, np.nan)
    return Inbound(float(time[worst]), float(slowest[worst]), hidden, bool(never[worst]), _joined(low, high, never))


def _outside_floor(range_floor, speed_floor, m):
    """Say of each segment of speed whether M PRFs would see it somewhere without their ambiguities."""
    nearest_to_none = np.unique(range_floor)
    return (np.bitwise_count(nearest_to_none[:, None] & speed_floor) >= m).any(axis=0)


def _longest_hidden(edges, pattern, sets, m):
    """Return, for each set of PRFs clear in speed, the longest interval of ranges that fewer than M see."""
    hidden = runs(np.bitwise_count(sets[:, None] & pattern) < m)
    length = edges[hidden.stop] - edges[hidden.start]
    start, stop = np.full(sets.size, edges[0]), np.full(sets.size, edges[0])
    order = np.lexsort((-hidden.start, length))
    # Of several writes to one place the last stands: the longest interval, and of equals the nearest.
    start[hidden.row[order]] = edges[hidden.start[order]]
    stop[hidden.row[order]] = edges[hidden.stop[order]]
    return start, stop


def _time(length_m, speed_m_s):
    """Divide, with no time for no length and no end for a target at rest."""
    moving = speed_m_s > 0
    time = np.where(length_m > 0, inf, 0.0)
    time[moving] = length_m[moving] / speed_m_s[moving]
    return time


def _joined(low, high, never):
    """Return the intervals of the marked segments, neighbours joined."""
    joined = []
    for a, b in zip(low[never].tolist(), high[never].tolist(), strict=True):
        if joined and joined[-1][1] == a:
            joined[-1] = joined[-1][0], b
        else:
            joined.append((a, b))
    return tuple(joined)


def hidden_ranges(sight, speed_m_s):
    """Return the ranges that fewer than M PRFs see at one radial speed.

    Parameters
    ----------
    sight : Sight
        A plan and its coverage. [m and m/s]
    speed_m_s : float
        Radial speed inside the coverage; on an edge, what holds just above it. [m/s]

    Returns
    -------
    hidden : float array, shape (K, 2)
        Start and stop of each interval. [m]
    """
    ranges, speeds = sweep(sight.ranges, sight.range_m), sweep(sight.speeds, sight.speed_m_s)
    at = min(speeds.edges.searchsorted(speed_m_s, 'right') - 1, speeds.pattern.size - 1)
    hidden = runs(np.bitwise_count(ranges.pattern & speeds.pattern[at])[None] < sight.m)
    return np.stack((ranges.edges[hidden.start], ranges.edges[hidden.stop]), axis=1)


def crossing(speed_m_s, at_m, notch_m_s, m, range_m):
    """Return how long a target that crosses stays in the notch around zero.

    Parameters
    ----------
    speed_m_s : float
        Speed along the straight track. [m/s]
    at_m : float
        Distance at which the track passes. [m]
    notch_m_s : float array, shape N
        Half width of each PRF's notch around zero; of a stagger, the first crossing of its least response. [m/s]
    m : int
        Number of PRFs that must be clear: the M-th smallest notch decides. [unitless]
    range_m : tuple of two floats
        The coverage's ranges, to which the track is cut. [m]

    Returns
    -------
    time_s : float
        Longest time on end; 0 where the track stays outside the coverage, inf ("for ever")
        where the whole speed is within the notch. [s]

    Notes
    -----
    Derived here: at time t from the closest point the range is r = sqrt(d^2 + V^2 t^2) and the radial
    speed V^2 t / r; it equals n at |t| = n d / (V sqrt(V^2 - n^2)).
    """
    notch = float(np.sort(np.atleast_1d(notch_m_s))[m - 1])
    low, high = range_m
    if at_m >= high or notch <= 0:
        return 0.0
    if speed_m_s <= notch:
        return inf
    slow_until = notch * at_m / (speed_m_s * sqrt((speed_m_s - notch) * (speed_m_s + notch)))
    inside_until = sqrt((high - at_m) * (high + at_m)) / speed_m_s
    until = min(slow_until, inside_until)
    if at_m >= low:
        return 2.0 * until
    return max(0.0, until - sqrt((low - at_m) * (low + at_m)) / speed_m_s)


def scans(time_s, scan_period_s):
    """Return a time out of sight in turns of the antenna.

    Parameters
    ----------
    time_s : float
        Time. [s]
    scan_period_s : float or None
        Time of one turn; None where the antenna does not turn. [s]

    Returns
    -------
    scans : float or None
        Turns; None where the antenna does not turn.
    """
    return None if scan_period_s is None else time_s / scan_period_s
