"""Lanes along one axis: one for each PRF in sending order, and on top the one that counts.

Lane heights are in lanes: PRF i stands between n - 1 - i and n - i, the top lane a
gap above them.
"""

import numpy as np

GAP = 0.3
"""Space between the PRFs' lanes and the top one. [lanes]"""

_LEAST_PX = 11.5
"""Height of a lane in which a name of its own can be read. [px]"""


def middles(n):
    """Return where the PRFs' lanes and the top lane have their middles.

    Parameters
    ----------
    n : int
        Number of PRFs. [unitless]

    Returns
    -------
    middle : float array, shape N
        From the first PRF, which is uppermost, down. [lanes]
    top : float
        Of the top lane. [lanes]
    """
    return n - 0.5 - np.arange(n), n + GAP + 0.5


def lane_range(n, with_top):
    """Return the ends of the axis across the lanes.

    Parameters
    ----------
    n : int
        Number of PRFs. [unitless]
    with_top : bool
        Whether there is a top lane. [unitless]

    Returns
    -------
    ends : list of two floats
        Lower and upper end. [lanes]
    """
    return [-0.12, n + (1.0 + GAP if with_top else 0.0) + 0.12]


def lane_bars(middle, axis, prf=None, start=None, stop=None):
    """Return the columns of bars that lie in lanes; without ``prf``, one over the whole length of each lane.

    Parameters
    ----------
    middle : float array, shape N
        Middles of the lanes. [lanes]
    axis : Axis
        The axis along them. [m or m/s]
    prf : int array, shape B
        Lane of each bar. [unitless]
    start, stop : float array, shape B
        Its ends. [m or m/s]

    Returns
    -------
    columns : dict of float arrays
        y, left, right. [lanes, shown unit]
    """
    if prf is None:
        low, high = axis.limits
        prf, start, stop = np.arange(middle.size), np.full(middle.size, low), np.full(middle.size, high)
    return {
        'y': np.asarray(middle, dtype=float)[prf],
        'left': axis.shown(np.asarray(start, dtype=float)),
        'right': axis.shown(np.asarray(stop, dtype=float)),
    }


def room_ticks(names, top_name, px_per_lane):
    """Return the same as :func:`lane_ticks`, every second PRF left out where their names would meet.

    Parameters
    ----------
    names : sequence of str
        The PRFs' names. [unitless]
    top_name : str or None
        The top lane's name. [unitless]
    px_per_lane : float
        Height of a lane. [px]

    Returns
    -------
    ticks : dict
        ``at`` and ``text``, from the bottom up. [lanes]
    """
    ticks, n = lane_ticks(names, top_name), len(names)
    if px_per_lane >= _LEAST_PX:
        return ticks
    # The first PRF, which is uppermost, always has its name.
    kept = [i for i in range(len(ticks['at'])) if i >= n or (n - 1 - i) % 2 == 0]
    return {key: [ticks[key][i] for i in kept] for key in ('at', 'text')}


def lane_ticks(names, top_name):
    """Return where the lanes' names stand and what they say.

    Parameters
    ----------
    names : sequence of str
        The PRFs' names. [unitless]
    top_name : str or None
        The top lane's name. [unitless]

    Returns
    -------
    ticks : dict
        ``at`` and ``text``, from the bottom up. [lanes]
    """
    middle, top = middles(len(names))
    at, text = middle.tolist()[::-1], list(names)[::-1]
    return {'at': at + ([top] if top_name else []), 'text': text + ([top_name] if top_name else [])}
