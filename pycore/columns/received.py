"""The received share of an echo along the ranges of the coverage, as it is drawn under the lanes and said."""

import numpy as np

from pycore.columns.lanes import middles
from pycore.eclipsing import METRES_PER_SECOND_OF_DELAY, open_windows, received_share
from pycore.wording import THIN_SPACE, count_word, significant, trimmed

MOST_WITH_SHARE = 6
"""PRFs up to which the received share is drawn: with more, its lanes would be too low to read. [unitless]"""

_FROM, _HIGH = -0.44, 0.42
_FINEST_PX, _TICK_PX = 5.0, 24.0


def is_legible(plan, axis, width):
    """Return whether the received share can be read in a figure.

    Parameters
    ----------
    plan : Plan
        The plan. [SI]
    axis : Axis
        Of range. [m]
    width : float
        Of the plot. [px]

    Returns
    -------
    legible : bool
        Not with many PRFs, nor where it repeats every few pixels.
    """
    low, high = axis.limits
    repeat = float(plan.pri_s.min()) * METRES_PER_SECOND_OF_DELAY
    return plan.n <= MOST_WITH_SHARE and repeat / (high - low) * width >= _FINEST_PX


def received(plan, axis, legible):
    """Return the received share under the lanes of all PRFs.

    Parameters
    ----------
    plan : Plan
        The plan. [SI]
    axis : Axis
        Of range. [m]
    legible : bool
        Whether it is drawn at all. [unitless]

    Returns
    -------
    columns : dict
        ``received``: areas down to a base and their edges, parted by nan; ``least``: what counts as clear.
    """
    empty = np.zeros(0)
    if not legible:
        return {
            'received': {'x': empty, 'area': empty, 'edge': empty},
            'least': {'x0': empty, 'x1': empty, 'y': empty},
        }
    base = middles(plan.n)[0] + _FROM
    x, area, edge = [], [], []
    for at, (range_m, share) in zip(base, received_corners(plan), strict=True):
        x += [axis.shown(range_m[[0]]), axis.shown(range_m), axis.shown(range_m[[-1, -1]])]
        area += [[at], at + _HIGH * share, [at, np.nan]]
        edge += [[np.nan], at + _HIGH * share, [np.nan, np.nan]]
    least = base + _HIGH * plan.received_min if plan.received_min > 0 else empty
    return {
        'received': {'x': np.concatenate(x), 'area': np.concatenate(area), 'edge': np.concatenate(edge)},
        'least': {'x0': np.full(least.size, axis.ends[0]), 'x1': np.full(least.size, axis.ends[1]), 'y': least},
    }


def scale_ticks(n, px_per_lane):
    """Return where nought and one of the received share stand, and what they say.

    Parameters
    ----------
    n : int
        Number of PRFs. [unitless]
    px_per_lane : float
        Height of a lane. [px]

    Returns
    -------
    ticks : dict
        ``at`` and ``text``, rising; none where there is no room for both. [lanes]
    """
    if _HIGH * px_per_lane < _TICK_PX:
        return {'at': [], 'text': []}
    at = [edge for base in (middles(n)[0] + _FROM).tolist()[::-1] for edge in (base, base + _HIGH)]
    return {'at': at, 'text': ['0', '1'] * n}


def share_sentence(plan, legible):
    """Say what is drawn under the lanes, or why nothing is.

    Parameters
    ----------
    plan : Plan
        The plan. [SI]
    legible : bool
        Whether it is drawn. [unitless]

    Returns
    -------
    sentence : str
        With what counts as clear, and the eclipsing loss there.
    """
    if plan.n > MOST_WITH_SHARE:
        return f'The received share of the echo is not drawn for {count_word(plan.n)} PRFs.'
    if not legible:
        return 'The received share of the echo repeats too closely to be drawn.'
    drawn = f'Under {"the" if plan.n == 1 else "each"} lane: the received share of the echo'
    least = plan.received_min
    if not least:
        return f'{drawn}.'
    decibels = (20.0 if plan.eclipsing_loss == 'whole' else 10.0) * np.log10(1.0 / least)
    loss = f'{significant(decibels)}{THIN_SPACE}dB of eclipsing loss' if least < 1 else 'no eclipsing loss'
    return f'{drawn}; clear from {trimmed(least)} on (dashed; {loss}).'


def received_corners(plan):
    """Return the corners of every PRF's received share; between two of them it is straight.

    Parameters
    ----------
    plan : Plan
        The plan. [SI]

    Returns
    -------
    corners : list of (range_m, share), one for each PRI
        Float arrays of equal length, rising in range. [m, unitless]
    """
    return [_corners(plan, pri, pulse) for pri, pulse in zip(plan.pri_s.tolist(), plan.pulse_s.tolist(), strict=True)]


def _corners(plan, pri_s, pulse_s):
    """Return the corners of one PRF's received share, where the echo's start or end meets a window's edge."""
    windows = open_windows(pri_s, pulse_s, plan.recovery_s, plan.guard_s, plan.near)
    edges = np.array(windows).ravel()
    delays = [edges, edges - pulse_s]
    if plan.near is not None:
        delays += [edges - plan.near.sent_at_s, edges - plan.near.sent_at_s - plan.near.pulse_s]
    delay = np.unique(np.mod(np.concatenate(delays), pri_s)) if windows else np.zeros(1)
    low, high = plan.range_m
    first, last = (int(end // (pri_s * METRES_PER_SECOND_OF_DELAY)) for end in (low, high))
    range_m = np.add.outer(np.arange(first, last + 1) * pri_s, delay).ravel() * METRES_PER_SECOND_OF_DELAY
    change = [] if plan.near is None else [plan.near.to_range_m, np.nextafter(plan.near.to_range_m, np.inf)]
    range_m = np.sort(np.concatenate((range_m, [low, high], change)))
    range_m = range_m[(range_m >= low) & (range_m <= high)]
    share = received_share(range_m, pri_s, pulse_s, plan.recovery_s, plan.guard_s, plan.near)
    return range_m, share
