"""Figure: what found plans give up for what: the share above the floor against a quantity of the reader's choice.

Sources: ``front`` (a line through the plans that no other beats in these two),
``others`` (the rest), ``best`` (those on the line), ``own`` and ``own-name`` (the
plan as it is), ``chosen`` (the plan whose row is selected). The number of a point is
that of its row.
"""

import numpy as np

from pycore.columns.axes import round_ticks
from pycore.columns.named import names_at
from pycore.finder.front import front
from pycore.wording import in_range_unit

NAME, TITLE = 'trade-off', 'What is given up for what'

AGAINST = ('time', 'decode', 'lost', 'hole')
"""Quantities that may stand on the axis: time used, decoding, one PRF lost, area of the worst hole. [unitless]"""

_LABELS = {
    'time': 'time used (ms)',
    'lost': 'blind with one PRF lost (%)',
    'hole': 'area of the worst hole (% of the coverage)',
}
_ROOM = 0.08


def picture(some, own, against, units, chosen=None):
    """Return the figure.

    Parameters
    ----------
    some : sequence of Better
        Listed plans, in the order of their rows. [mixed]
    own : Better or None
        What the plan itself gives. [mixed]
    against : str
        One of ``AGAINST``. [unitless]
    units : mapping
        Units that the reader prefers. [unitless]
    chosen : int or None
        Number of the row that is selected. [unitless]

    Returns
    -------
    picture : dict
        Columns, ranges, labels, ticks and words, and ``points`` (x and y of every row, NaN for none).
    """
    label, low_is_good, place = _axis(against, some, units)
    points = np.array([(place(one), _worth(one)) for one in some], dtype=float).reshape(-1, 2)
    mine = np.array([(place(own), _worth(own))] if own is not None else [], dtype=float).reshape(-1, 2)
    stagger = any(one.dip_db is not None for one in (*some, own) if one is not None)
    shown = np.isfinite(points).all(axis=1)
    sign = (1.0 if low_is_good else -1.0), (-1.0 if stagger else 1.0)
    on_front = np.zeros(len(points), dtype=bool)
    on_front[shown] = front(points[shown] * sign)
    line = points[on_front][np.lexsort(points[on_front].T[::-1])]
    mine = mine[np.isfinite(mine).all(axis=1)]
    at = points[[chosen]] if chosen is not None and chosen < len(points) and shown[chosen] else points[:0]
    ranges = [_ends(np.concatenate((points[shown][:, side], mine[:, side])), side, stagger) for side in (0, 1)]
    late = mine[:, 0] > sum(ranges[0]) / 2
    y_label = 'least response (dB)' if stagger else 'blind above the floor (%)'
    return {
        'title': TITLE,
        'caption': _caption(len(line), int(shown.sum()), y_label, label),
        'columns': {
            'front': _xy(line),
            'others': _xy(points[shown & ~on_front]),
            'best': _xy(points[on_front]),
            'own': _xy(mine),
            'own-name': names_at(
                *mine.T,
                ['the plan now'] * len(mine),
                ['right' if end else 'left' for end in late],
                np.where(late, -9.0, 9.0),
            ),
            'chosen': _xy(at),
        },
        'points': {'x': points[:, 0], 'y': points[:, 1]},
        'ranges': {'x': ranges[0], 'y': ranges[1]},
        'labels': {'x': label, 'y': y_label},
        'ticks': {side: _ticks(ends) for side, ends in zip('xy', ranges, strict=True)},
    }


def _ticks(ends):
    at, text = round_ticks(*ends)
    return {'at': at, 'text': text}


def _axis(against, some, units):
    """Return the label of a quantity, whether less of it is better, and how to read it off a plan."""
    if against == 'decode':
        _, unit = in_range_unit(1.0, units)
        return f'ranges decode to ({unit})', False, lambda one: _reach(one, units)
    places = {
        'time': lambda one: one.time_s * 1e3,
        'lost': lambda one: 100.0 * (1.0 - one.share_if_one_lost),
        'hole': lambda one: 0.0 if one.largest_hole is None else 100.0 * one.largest_hole.share,
    }
    return _LABELS[against], True, places[against]


def _reach(one, units):
    """Return how far a plan decodes; NaN where nothing was confused as far as was looked."""
    return np.nan if one.decode_m is None else in_range_unit(one.decode_m, units)[0]


def _worth(one):
    return one.dip_db if one.dip_db is not None else 100.0 * max(one.excess_over_floor, 0.0)


def _xy(points):
    return {'x': points[:, 0].copy(), 'y': points[:, 1].copy()}


def _ends(values, side, stagger):
    """Return the ends of an axis with some room around its values; a share begins at nothing."""
    if not values.size:
        return [0.0, 1.0]
    low, high = float(values.min()), float(values.max())
    room = _ROOM * (high - low) or _ROOM * abs(high) or 1.0
    if side and not stagger:
        return [-0.04 * (high or 1.0), high + (_ROOM * high or 1.0)]
    return [low - room, high + room]


def _caption(best, count, y_label, label):
    """Say how many of the listed plans no other listed one beats in both quantities."""
    if not count:
        return 'No plan is listed yet.'
    y, x = y_label.rpartition(' (')[0], label.rpartition(' (')[0]
    if count == 1:
        return f'One plan is listed: {y} against {x}.'
    what = 'One plan is' if best == 1 else f'{best} plans are'
    return f'{what} on the line: no other of the {count} listed betters both {y} and {x}.'
