"""Figure: what every PRI around the plan's own would make of the followed target, each PRI alone.

Three strips over the PRI: for how long the target stays clear, whether it is eclipsed
or in the notch, and how much of its echo is received. Sources: ``until`` (time until
it is blind), ``lanes``, ``blind`` (bars in two lanes), ``received`` (share), ``own``
(the plan's PRIs), ``names``, ``longest``.
"""

import math
from dataclasses import dataclass

import numpy as np

from pycore.columns.every_pri_words import words
from pycore.columns.mark import upright
from pycore.columns.named import names_at
from pycore.columns.pri_axis import pri_axis
from pycore.columns.view import WHOLE
from pycore.follow import each_of, strip
from pycore.wording import significant

NAME, TITLE = 'every-pri', 'Every PRI for this target'

SIZE = {'width': 1100}
"""The plot where the page has not said how large it is. [px]"""

_NAME_PX = 42.0

_RECEIVED, _NOTCH, _ECLIPSED, _UNTIL = (0.0, 0.8), (1.2, 1.5), (1.65, 1.95), (2.4, 3.6)
_TOP = 3.95


@dataclass(frozen=True, slots=True)
class Every:
    """All that the figure shows and says.

    Parameters
    ----------
    each, own : EveryPri
        Of the PRIs of the strip, and of the plan's own. [SI]
    edges_s : float array, shape C + 1
        Between the PRIs of the strip. [s]
    """

    each: object
    own: object
    edges_s: np.ndarray


def picture(computed, units, size=None, view=WHOLE):
    """Return the figure of every PRI.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    size : mapping or None
        Width of the plot, by which names find room. [px]
    view : View
        What the reader has chosen to look at; without a target the figure is empty. [unitless]

    Returns
    -------
    picture : dict
        Columns, ranges, labels, ticks and words.
    """
    found = None if view.mark is None else _every(computed, view.mark)
    limits = (0.5 * float(min(computed.plan.pri_s)), 2.0 * float(max(computed.plan.pri_s)))
    axis = pri_axis(units, limits if found is None else (float(found.edges_s[0]), float(found.edges_s[-1])))
    most = _most(found)
    return {
        'title': TITLE,
        **words(computed, view.mark, found, axis, units),
        'columns': _columns(found, axis, most, (size or SIZE)['width']),
        'ranges': {'x': axis.ends, 'y': [-0.08, _TOP]},
        'labels': {'x': axis.label, 'y': 'stays clear for (s)'},
        'units': {'x': axis.unit},
        'ticks': {'y': _ticks(most)},
    }


def _every(computed, mark):
    each = strip(computed, mark.range_m, mark.speed_m_s)
    pri = each.pri_s
    middles = 0.5 * (pri[1:] + pri[:-1])
    edges = np.concatenate((pri[:1], middles, pri[-1:]))
    return Every(each, each_of(computed, computed.plan.pri_s, mark.range_m, mark.speed_m_s), edges)


def _most(found):
    """Return the longest time that any PRI keeps the target clear; 0 where none does, inf where it stands still."""
    return 0.0 if found is None else float(found.each.until_blind_s.max(initial=0.0))


def _ticks(most):
    if most == 0.0:
        at, text = [_UNTIL[0]], ['0']
    else:
        at, text = list(_UNTIL), ['0', significant(most, 2) if math.isfinite(most) else 'no end']
    lanes = [sum(_NOTCH) / 2, sum(_ECLIPSED) / 2]
    return {'at': [*_RECEIVED, *lanes, *at], 'text': ['0', '1', 'notch', 'eclipsed', *text]}


def _columns(found, axis, most, width):
    if found is None:
        return _nothing()
    blind = [_bars(~clear, found, axis) for clear in (found.each.speed_clear, found.each.range_clear)]
    left, right = axis.ends
    middles = [sum(lane) / 2 for lane in (_NOTCH, _ECLIPSED)]
    return {
        'until': _area(found, axis, _UNTIL[0], _until(found.each, most)),
        'received': _area(found, axis, _RECEIVED[0], _RECEIVED[0] + _RECEIVED[1] * found.each.received),
        'lanes': {'y': np.array(middles), 'left': np.full(2, left), 'right': np.full(2, right)},
        'blind': {
            'y': np.repeat(middles, [len(bars) for bars in blind]),
            **dict(zip(('left', 'right'), np.concatenate(blind).T, strict=True)),
        },
        'own': upright(axis.shown(found.own.pri_s), -0.08, _UNTIL[1] + 0.1),
        **_named(found, axis, most, width),
    }


def _nothing():
    empty = np.zeros(0)
    line = {'x': empty, 'top': empty, 'base': empty}
    return {
        'until': line,
        'received': line,
        'lanes': {'y': empty, 'left': empty, 'right': empty},
        'blind': {'y': empty, 'left': empty, 'right': empty},
        'own': upright([], 0.0, 1.0),
        'longest': {'x': empty, 'y': empty},
        'names': names_at(empty, empty, [], []),
    }


def _until(each, most):
    """Return the height of the upper strip at each PRI."""
    low, high = _UNTIL
    if most == 0.0:
        return np.full(each.pri_s.size, low)
    part = each.clear.astype(float) if math.isinf(most) else each.until_blind_s / most
    return low + (high - low) * part


def _area(found, axis, base, top):
    """Return an area of steps: each PRI stands for all up to the middle between it and its neighbours."""
    x = np.repeat(axis.shown(found.edges_s), 2)[1:-1]
    return {'x': x, 'top': np.repeat(top, 2), 'base': np.full(x.size, base)}


def _bars(marked, found, axis):
    """Return the ends of the runs of PRIs that are marked, in the shown unit and rising."""
    steps = np.diff(np.concatenate(([0], marked.astype(np.int8), [0])))
    ends = [axis.shown(found.edges_s[np.flatnonzero(way * steps > 0)]) for way in (1, -1)]
    return np.sort(np.column_stack(ends), axis=1)


def _named(found, axis, most, width):
    """Return the names of the plan's PRIs and of the lowest strip, and the PRI that keeps the target clear longest."""
    own = np.array(_roomy(found.own.pri_s, axis, width))
    best = found.each.longest
    at = np.zeros(0, dtype=int) if best is None or math.isinf(most) else np.array([best])
    return {
        'longest': {'x': axis.shown(found.each.pri_s[at]), 'y': _until(found.each, most)[at]},
        'names': names_at(
            [axis.ends[0], *axis.shown(own).tolist()],
            [_RECEIVED[1], *[_UNTIL[1] + 0.1] * own.size],
            ['received share', *map(axis.digits, own.tolist())],
            ['bottom_left', *['bottom_center'] * own.size],
            [-2.0, *[0.0] * own.size],
            [-3.0, *[-1.0] * own.size],
        ),
    }


def _roomy(pri_s, axis, width):
    """Return the plan's PRIs whose names have room beside those before them; the caption names the others."""
    left, right = axis.ends
    kept = []
    for pri in sorted(set(pri_s.tolist())):
        if all(abs(axis.shown(pri) - axis.shown(other)) / (right - left) * width > _NAME_PX for other in kept):
            kept.append(pri)
    return kept
