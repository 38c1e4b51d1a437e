"""Where a stagger's response crosses the least response that counts, and where it dips deepest.

Crossings are bracketed on a grid of whole steps (1/16 of the speed that folds
the longest time difference of the weights) and then bisected; a dip that falls
below and rises again within one step can be missed.
"""

import numpy as np

from pycore.spans import Spans

_BISECTIONS = 48
_STEPS_AT_ONCE = 4096


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
        Where to stop looking. [m/s]

    Returns
    -------
    speed_m_s : float
        Lowest speed at which the response reaches ``least_db``; 0 where it does so at rest, ``inf`` where nowhere.
        [m/s]
    """
    return _first(response, least_db, 0.0, to_m_s, falling=False)


def first_fall(response, least_db, from_m_s, to_m_s):
    """Return the first speed at which the response falls below what counts.

    Parameters
    ----------
    response : Response
        A canceller's response. [unitless]
    least_db : float
        Least response that counts. [dB]
    from_m_s : float
        Where the response has first reached it. [m/s]
    to_m_s : float
        Where to stop looking. [m/s]

    Returns
    -------
    speed_m_s : float
        ``inf`` where it nowhere falls. [m/s]
    """
    return _first(response, least_db, from_m_s, to_m_s, falling=True)


def _first(response, least_db, from_m_s, to_m_s, falling):
    """Return the first crossing beyond a speed, downwards or upwards, block by block."""
    least, step = 10.0 ** (least_db / 10.0), response.step_m_s
    index = int(np.floor(from_m_s / step)) + 1 if falling else 0
    while index * step <= to_m_s + step:
        speeds = np.arange(index, index + _STEPS_AT_ONCE) * step
        hit = np.flatnonzero((response.power(speeds) < least) == falling)
        if hit.size:
            at = speeds[hit[0]]
            return _refined(response, at, max(at - step, from_m_s if falling else 0.0), least, falling, to_m_s)
        index += _STEPS_AT_ONCE
    return np.inf


def _refined(response, at, before, least, falling, to_m_s):
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
        speeds = np.arange(index, index + _STEPS_AT_ONCE + 1) * step
        power = response.power(speeds)
        falls = np.flatnonzero((power[1:] < power[:-1]) & (speeds[:-1] >= from_m_s))
        if falls.size:
            return float(min(speeds[falls[0]], to_m_s))
        index += _STEPS_AT_ONCE
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
    low, high = speed_m_s
    least, step = 10.0 ** (least_db / 10.0), response.step_m_s
    inner = np.arange(int(np.floor(low / step)) + 1, int(np.ceil(high / step))) * step
    grid = np.concatenate(([low], inner, [high]))
    under = response.power(grid) < least
    change = np.flatnonzero(under[1:] != under[:-1])
    below, above = np.where(under[change], (grid[change], grid[change + 1]), (grid[change + 1], grid[change]))
    edges = np.concatenate(([low], _bisected(response, below, above, least), [high]))
    first_clear = int(under[0])
    start, stop = edges[first_clear:-1:2], edges[first_clear + 1 :: 2]
    some = stop > start
    return Spans(np.zeros(int(some.sum()), dtype=np.intp), start[some], stop[some])


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
    step = response.step_m_s
    inner = np.arange(int(np.floor(from_m_s / step)) + 1, int(np.ceil(to_m_s / step))) * step
    grid = np.concatenate(([from_m_s], inner, [to_m_s]))
    power = response.power(grid)
    # A true minimum lies at most a little lower than the grid's own; only valleys near the lowest are refined.
    near = np.flatnonzero(power <= max(4.0 * power.min(), power.min() + 1e-3))
    low, high = grid[np.maximum(near - 1, 0)], grid[np.minimum(near + 1, grid.size - 1)]
    at = _valley(response, low, high)
    depth = response.power(at)
    best = np.flatnonzero(depth <= depth.min() * (1.0 + 1e-9))[0]
    return float(10.0 * np.log10(max(depth[best], 1e-30))), float(at[best])


def _valley(response, low, high):
    """Return the speed of the least response between each pair of speeds, by thirds."""
    for _ in range(60):
        third = (high - low) / 3.0
        left, right = low + third, high - third
        lower = response.power(left) <= response.power(right)
        low, high = np.where(lower, low, left), np.where(lower, right, high)
    return (low + high) / 2.0
