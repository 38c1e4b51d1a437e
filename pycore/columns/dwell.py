"""Figure: how the time on target is spent, CPI by CPI.

One lane along the time from the set's first pulse. Sources: ``time`` (what the beam
gives), ``fill`` and ``counted`` (pulses sent ahead, and those that count), ``over``
(beyond the time on target), ``again`` (further sets that fit), ``pulses`` (each one,
where there is room), ``names`` (in the CPIs that have room), ``end`` and ``end-name``
(the time on target), ``kept-fill`` and ``kept-counted`` (the kept plan's set), ``target`` (the
CPIs that see the followed one).
"""

import numpy as np

from pycore.columns.axes import Axis
from pycore.columns.dwell_words import words
from pycore.columns.named import names_at
from pycore.columns.prf_names import prf_names
from pycore.columns.view import WHOLE
from pycore.dwell import sets_that_fit, timeline

NAME, TITLE = 'dwell', 'Dwell'

LANE = 0.3, 0.72
"""Lower and upper end of the lane; the whole figure is 1 high. [unitless]"""

WIDTH_PX = 560
"""Width of the plot where the page has not said it. [px]"""

KEPT_LANE = -0.17, -0.06
"""Lower and upper end of the thin lane of a kept plan. [unitless]"""

_LOWEST_WITH_KEPT = -0.24
_PULSES = 0.08, 0.22
_TARGET_AT, _NAME_AT = LANE[0], 0.98
_MARGIN = 0.004
_PX_PER_PULSE, _PX_PER_LETTER = 3.0, 7.0
_MOST_AGAIN = 40


def picture(computed, units, size=None, view=WHOLE):
    """Return the figure of the dwell.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    size : mapping or None
        Width of the plot. [px]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    picture : dict
        Columns, ranges, labels, ticks and words.
    """
    cpis = timed(computed)
    given = computed.plan.time_on_target_s
    others = None if view.kept is None else timed(view.kept)
    ends = [cpis.stop_s[-1], given or 0.0, *([] if others is None else [others.stop_s[-1]])]
    axis = time_axis(float(max(ends)))
    names = _names_of(computed, units)
    px_per_s = (size or {}).get('width', WIDTH_PX) / axis.limits[1]
    return {
        'title': TITLE,
        **words(computed, cpis, axis, names, view.mark, view.kept and (view.kept, others, _names_of(view.kept, units))),
        'columns': {
            **_bars(cpis, axis, given),
            **_kept(others, axis),
            'pulses': _pulses(computed, axis, px_per_s),
            'names': _names(cpis, axis, names, px_per_s),
            **_end(axis, given),
            'target': _seeing(cpis, axis, view.mark),
        },
        'ranges': {
            'x': [-_MARGIN * axis.ends[1], (1.0 + _MARGIN) * axis.ends[1]],
            'y': [0.0 if others is None else _LOWEST_WITH_KEPT, 1.0],
        },
        'labels': {'x': axis.label, 'y': ''},
        'units': {'x': axis.unit},
        'ticks': {'y': {'at': [], 'text': []}},
    }


def _names_of(computed, units):
    return ['stagger'] if computed.is_stagger else prf_names(computed.plan, units)


def timed(computed):
    """Return when the CPIs are sent; a stagger is one.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]

    Returns
    -------
    timeline : Timeline
        One entry for each CPI. [s]
    """
    plan = computed.plan
    if not computed.is_stagger:
        return timeline(plan.pri_s, plan.pulses, plan.fill_pulses, plan.time_on_target_s)
    sent = np.resize(plan.pri_s, int(plan.fill_pulses[0] + plan.pulses[0]))
    fill = sent[: int(plan.fill_pulses[0])].sum()
    counted = np.array([sent.sum() - fill])
    return timeline(counted, np.ones(1), fill / counted, plan.time_on_target_s)


def time_axis(end_s):
    """Return an axis of time in the unit that suits its length.

    Parameters
    ----------
    end_s : float
        Its end. [s]

    Returns
    -------
    axis : Axis
        In µs below a millisecond, in s from ten seconds on, otherwise in ms.
    """
    unit, si = ('µs', 1e-6) if end_s < 1e-3 else ('ms', 1e-3) if end_s < 10.0 else ('s', 1.0)
    return Axis('time', unit, si, (0.0, end_s))


def _bars(cpis, axis, given):
    """Return the parts of the lane."""
    start, counted, stop = (axis.shown(edge) for edge in (cpis.start_s, cpis.counted_s, cpis.stop_s))
    some = counted > start
    used, there = float(cpis.stop_s[-1]), given or 0.0
    sets = min(sets_that_fit(there, used), _MOST_AGAIN)
    again = np.arange(1, sets) * used
    over = np.array([there]) if given is not None and used > there * (1.0 + 1e-9) else np.zeros(0)
    return {
        'time': _bar(np.zeros(int(given is not None)), axis.shown(there)),
        'fill': _bar(start[some], counted[some]),
        'counted': _bar(counted, stop),
        'over': _bar(axis.shown(over), axis.shown(used)),
        'again': _bar(axis.shown(again), axis.shown(again + used)),
    }


def _kept(cpis, axis):
    """Return the parts of the thin lane of a kept plan."""
    if cpis is None:
        return {'kept-fill': _bar([], []), 'kept-counted': _bar([], [])}
    start, counted, stop = (axis.shown(edge) for edge in (cpis.start_s, cpis.counted_s, cpis.stop_s))
    some = counted > start
    return {'kept-fill': _bar(start[some], counted[some]), 'kept-counted': _bar(counted, stop)}


def _bar(left, right):
    left = np.asarray(left, dtype=float)
    return {'left': left, 'right': np.broadcast_to(np.asarray(right, dtype=float), left.shape).copy()}


def _pulses(computed, axis, px_per_s):
    """Return where each pulse is sent, the ones that count taller; none where they would run together."""
    plan = computed.plan
    sent = plan.fill_pulses + plan.pulses
    total = int(sent[0] if computed.is_stagger else sent.sum())
    shortest = float(plan.pri_s.min())
    if shortest * px_per_s < _PX_PER_PULSE:
        return {'x': np.zeros(0), 'y0': np.zeros(0), 'y1': np.zeros(0)}
    each = np.resize(plan.pri_s, total) if computed.is_stagger else np.repeat(plan.pri_s, sent)
    at = np.concatenate(([0.0], np.cumsum(each)[:-1]))
    number = np.concatenate([np.arange(count) for count in (sent[:1] if computed.is_stagger else sent)])
    fill = np.resize(plan.fill_pulses[:1], total) if computed.is_stagger else np.repeat(plan.fill_pulses, sent)
    low, high = _PULSES
    return {
        'x': axis.shown(at),
        'y0': np.full(total, low),
        'y1': np.where(number < fill, (low + high) / 2.0, high),
    }


def _names(cpis, axis, names, px_per_s):
    """Return the CPIs' names in the middle of their pulses that count, where there is room."""
    room = (cpis.stop_s - cpis.counted_s) * px_per_s
    fits = [width > _PX_PER_LETTER * len(name) for width, name in zip(room.tolist(), names, strict=True)]
    middle = axis.shown((cpis.counted_s + cpis.stop_s) / 2.0)[fits]
    text = [name for name, fit in zip(names, fits, strict=True) if fit]
    return names_at(middle, np.full(len(text), sum(LANE) / 2.0), text, ['center'] * len(text))


def _end(axis, given):
    """Return the end of the time on target, and its name on the side that has room."""
    at = np.zeros(0) if given is None else np.array([axis.shown(given)])
    right = given is not None and given > 0.5 * axis.limits[1]
    text = [] if given is None else [f'time on target {axis.text(given)}']
    return {
        'end': {'x': at, 'y0': np.full(at.size, LANE[0] - 0.06), 'y1': np.full(at.size, 1.0)},
        'end-name': names_at(
            at,
            np.full(at.size, _NAME_AT),
            text,
            ['top_right' if right else 'top_left'] * len(text),
            -4.0 if right else 4.0,
        ),
    }


def _seeing(cpis, axis, mark):
    """Return a mark on every CPI that sees the followed target."""
    if mark is None:
        return {'x': np.zeros(0), 'y': np.zeros(0)}
    found = mark.followed
    sees = [found.seen] if mark.computed.is_stagger else [not one.reasons for one in found.prfs]
    x = axis.shown((cpis.counted_s + cpis.stop_s) / 2.0)[sees]
    return {'x': x, 'y': np.full(x.size, _TARGET_AT)}
