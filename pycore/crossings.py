"""Where a stagger's response crosses the least response that counts, and where it dips deepest.

Crossings are bracketed on a grid of whole steps (1/16 of the speed that folds
the longest time difference of the weights) and then bisected; a dip that falls
below and rises again within one step can be missed.
"""

import numpy as np

from pycore.combs import repeated
from pycore.response import QUIETEST
from pycore.spans import Spans

_BISECTIONS = 48
_SAME_POWER = 1e-12  # powers closer than this are equal but for rounding
_FIRST_STEPS, _MOST_STEPS = 256, 16384


def _bisected(response, below, above, least):
    """Return speeds between ``below`` (response under ``least``) and ``above`` (not under it) that part the two."""
    below, above = np.array(below, dtype=float), np.array(above, dtype=float)
    for _ in range(_BISECTIONS):
        middle = (below + above) / 2.0
        under = response.power(middle) < least
        below, above = np.where(under, middle, below), np.where(under, above, middle)
    return above


def first_notch(response, least_db, to_m_s):
    """Return how far the notch around zero reaches.

    Parameters
    ----------
    response : Response
        A canceller's response. [unitless]
    least_db : float
        Least response that counts. [dB]
    to_m_s : float
        Where to stop looking, if not at half of the speed that the response repeats with. [m/s]

    Returns
    -------
    speed_m_s : float
        Lowest speed at which the response reaches ``least_db``; 0 where it does so at rest, ``inf`` where nowhere.
        [m/s]
    """
    if 10.0 ** (least_db / 10.0) > 1.0 + np.abs(response.amplitude).sum():
        return np.inf
    return _first(response, least_db, 0.0, min(to_m_s, half_period(response)), falling=False)


def first_fall(response, least_db, from_m_s, to_m_s):
    """Return the first speed at which the response falls below what counts.

    Parameters
    ----------
    response : Response
        A canceller's response. [unitless]
    least_db : float
        Least response that counts. [dB]
    from_m_s : float
        Where the response has first reached it: the edge of the notch around zero. [m/s]
    to_m_s : float
        Where to stop looking, if not at half of the speed that the response repeats with. [m/s]

    Returns
    -------
    speed_m_s : float
        ``inf`` where it nowhere falls. [m/s]

    Notes
    -----
    The response is even and repeats, so it is a mirror image about half of what it repeats with: where it does not
    fall up to there, it first falls where the image of the notch around zero begins.
    """
    half = half_period(response)
    found = _first(response, least_db, from_m_s, min(to_m_s, half), falling=True)
    if np.isfinite(found) or to_m_s < half or from_m_s == 0.0:
        return found
    return 2.0 * half - from_m_s


def half_period(response):
    """Return the speed about which the response is a mirror image of itself.

    Parameters
    ----------
    response : Response
        A canceller's response. [unitless]

    Returns
    -------
    speed_m_s : float
        Half of what it repeats with. [m/s]
    """
    return response.repeats_m_s / 2.0


def _first(response, least_db, from_m_s, to_m_s, falling):
    """Return the first crossing beyond a speed, downwards or upwards, block by block."""
    least, step = 10.0 ** (least_db / 10.0), response.step_m_s
    index, block = (int(np.floor(from_m_s / step)) + 1 if falling else 0), _FIRST_STEPS
    while index * step <= to_m_s + step:
        speeds = np.arange(index, index + block) * step
        hit = np.flatnonzero((response.power(speeds) < least) == falling)
        if hit.size:
            at = speeds[hit[0]]
            return _refined(response, at, max(at - step, from_m_s if falling else 0.0), least, falling, to_m_s)
        index, block = index + block, min(2 * block, _MOST_STEPS)
    return np.inf


def _refined(response, at, before, least, falling, to_m_s):
    """Return the crossing between two speeds one step apart, ``inf`` where it lies too far out."""
    if at == 0.0:
        return 0.0
    found = float(_bisected(response, at, before, least) if falling else _bisected(response, before, at, least))
    return found if found <= to_m_s else np.inf


def first_peak(response, from_m_s, to_m_s):
    """Return where the response stops rising for the first time.

    Parameters
    ----------
    response : Response
        A canceller's response. [unitless]
    from_m_s, to_m_s : float
        Where to start and to stop looking. [m/s]

    Returns
    -------
    speed_m_s : float
        To one step; ``to_m_s`` where it only rises. [m/s]
    """
    step, index = response.step_m_s, int(np.floor(from_m_s / response.step_m_s))
    while index * step <= to_m_s:
        speeds = np.arange(index, index + _FIRST_STEPS + 1) * step
        power = response.power(speeds)
        falls = np.flatnonzero((power[1:] < power[:-1]) & (speeds[:-1] >= from_m_s))
        if falls.size:
            return float(min(speeds[falls[0]], to_m_s))
        index += _FIRST_STEPS
    return to_m_s


def clear_speeds(response, least_db, speed_m_s):
    """Return the speeds at which the response is at least what counts.

    Parameters
    ----------
    response : Response
        A canceller's response. [unitless]
    least_db : float
        Least response that counts. [dB]
    speed_m_s : pair of float
        Limits of the speed axis. [m/s]

    Returns
    -------
    speeds : Spans
        All of PRF 0: a stagger gives one verdict. [m/s]
    """
    half = half_period(response)
    if max(abs(speed_m_s[0]), abs(speed_m_s[1])) <= half:
        start, stop = _above(response, least_db, speed_m_s)
        return Spans(np.zeros(start.size, dtype=np.intp), start, stop)
    # One half period, its mirror image, and both repeated.
    start, stop = _above(response, least_db, (0.0, half))
    start, stop = np.concatenate((start, 2.0 * half - stop)), np.concatenate((stop, 2.0 * half - start))
    found = repeated(start, stop, np.full(start.size, 2.0 * half), speed_m_s)
    order = np.argsort(found.start, kind='stable')
    return Spans(np.zeros(order.size, dtype=np.intp), found.start[order], found.stop[order])


def _above(response, least_db, limits):
    """Return where intervals on which the response is at least what counts start and stop."""
    low, high = limits
    least, step = 10.0 ** (least_db / 10.0), response.step_m_s
    grid = _grid(low, high, step)
    under = response.power(grid) < least
    change = np.flatnonzero(under[1:] != under[:-1])
    below, above = np.where(under[change], (grid[change], grid[change + 1]), (grid[change + 1], grid[change]))
    edges = np.concatenate(([low], _bisected(response, below, above, least), [high]))
    first_clear = int(under[0])
    start, stop = edges[first_clear:-1:2], edges[first_clear + 1 :: 2]
    some = stop > start
    return start[some], stop[some]


def _grid(low, high, step):
    """Return an interval's ends and the whole steps between them."""
    inner = np.arange(int(np.floor(low / step)) + 1, int(np.ceil(high / step))) * step
    return np.concatenate(([low], inner, [high]))


def deepest_dip(response, from_m_s, to_m_s):
    """Return the deepest dip of the response between two speeds.

    Parameters
    ----------
    response : Response
        A canceller's response. [unitless]
    from_m_s, to_m_s : float
        Interval, ends included. [m/s]

    Returns
    -------
    depth_db : float
        Least response; nan where the interval is empty. [dB]
    at_m_s : float
        Lowest speed at which it occurs; nan likewise. [m/s]
    """
    if not from_m_s <= to_m_s:
        return np.nan, np.nan
    grid = _grid(from_m_s, to_m_s, response.step_m_s)
    power = response.power(grid)
    before, after = np.append(np.inf, power[:-1]), np.append(power[1:], np.inf)
    # Half a step from a minimum the response has risen by no more than its greatest curvature allows.
    rise = response.curvature * response.step_m_s**2 / 8.0
    near = np.flatnonzero((power <= before) & (power <= after) & (power <= power.min() + rise))
    at = _valley(response, grid[np.maximum(near - 1, 0)], grid[np.minimum(near + 1, grid.size - 1)])
    depth = response.power(at)
    best = np.flatnonzero(depth <= depth.min() + _SAME_POWER)[0]
    return float(10.0 * np.log10(max(depth[best], QUIETEST))), float(at[best])


def _valley(response, low, high):
    """Return the speed of the least response between each pair of speeds, by thirds."""
    for _ in range(60):
        third = (high - low) / 3.0
        left, right = low + third, high - third
        lower = response.power(left) <= response.power(right)
        low, high = np.where(lower, low, left), np.where(lower, right, high)
    return (low + high) / 2.0
