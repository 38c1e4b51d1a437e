"""Figure: what the Doppler filters of each PRF hear along the apparent speed.

One lane for each PRF, or for one of many; levels in dB above the noise of a filter.
Sources: ``lanes``, ``notch`` (bars along the foot of a lane), ``noise`` (0 dB),
``ground`` and ``rain`` (as a filter steered there passes them) with ``clutter-edge``,
``lobes`` (every filter outside the notch), ``filter`` (the one that hears the target
best, whole), ``kept-filter`` (that of the kept plan), ``names``,
``rotor`` and ``rotor-folded`` (strips of its rotor's lines) with ``rotor-name``,
``target`` (its apparent speed) and ``level`` (its level in that filter). Of a stagger: its
canceller over the true speed.
"""

from functools import lru_cache

import numpy as np

from pycore.columns.axes import speed_axis
from pycore.columns.filter_lanes import lanes
from pycore.columns.filter_words import words
from pycore.columns.kept import is_alike
from pycore.columns.mark import Mark, upright
from pycore.columns.named import names_at
from pycore.columns.prf_names import prf_names
from pycore.columns.rotor_lines import strips
from pycore.columns.view import WHOLE

NAME, TITLE = 'doppler-filters', 'Doppler filters'

SIZE = {'width': 560, 'height': 280}
"""The plot where the page has not said how large it is. [px]"""

_LOWEST_DB, _LEAST_TOP_DB, _ROOM_DB = -30.0, 30.0, 6.0
_FLOOR = 10.0 ** (_LOWEST_DB / 10.0)
_HIGH = 0.86
_BAR = 0.045
_ROTOR, _ROTOR_GAP = 0.055, 0.015
_NEAR_AN_END = 0.06
_LEFT = 0.3
_PX_PER_LOBE, _PX_PER_TICK = 3.5, 30.0


class _Scale:
    """Where a level stands: lane k from the top of n fills the unit below n - k, up to a gap."""

    def __init__(self, count, top_db):
        self.count, self.top_db = count, top_db

    def foot(self, lane):
        return float(self.count - 1 - lane)

    def at(self, lane, power):
        with_floor = 10.0 * np.log10(np.maximum(power, _FLOOR))
        return self.level(lane, np.minimum(with_floor, self.top_db))

    def level(self, lane, level_db):
        return self.foot(lane) + _HIGH * (level_db - _LOWEST_DB) / (self.top_db - _LOWEST_DB)


def picture(computed, units, size=None, view=WHOLE):
    """Return the figure of the Doppler filters.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    size : mapping or None
        Width and height of the plot. [px]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    picture : dict
        Columns, ranges, labels, ticks and words.
    """
    size = size or SIZE
    heard = lanes(computed, view.mark)
    name = 'radial speed' if computed.is_stagger else 'apparent speed'
    axis = speed_axis(
        (min(lane.speed_m_s[0] for lane in heard), max(lane.speed_m_s[-1] for lane in heard)), units, name
    )
    every = prf_names(computed.plan, units)
    names = [every[lane.prf] for lane in heard]
    others = _kept_lanes(view.kept, computed, heard, view.mark)
    scale = _Scale(len(heard), _top([*heard, *others.values()]))
    return {
        'title': TITLE,
        **words(computed, heard, axis, every, view.mark, None if view.kept is None else len(others)),
        'columns': {
            **_grounds(heard, axis, scale),
            **_clutter(computed, heard, axis, scale),
            **_filters(heard, axis, scale, size['width']),
            'kept-filter': _kept_filters(others, axis, scale),
            'names': _names(computed, heard, axis, scale, names),
            **_rotor(computed, heard, axis, scale),
            **_target(heard, axis, scale),
        },
        'ranges': {'x': axis.ends, 'y': [-0.03, len(heard) - 1 + _HIGH + 0.06]},
        'labels': {'x': axis.label, 'y': 'level in a filter (dB above its noise)'},
        'units': {'x': axis.unit},
        'folds': [] if computed.is_stagger else [axis.shown(float(lane.cpi.blind_speed_m_s)) for lane in heard],
        'ticks': {'y': _ticks(scale, size['height'])},
    }


def _kept_lanes(kept, computed, heard, mark):
    """Return the kept plan's lanes by the place of the lane that each belongs into."""
    if kept is None or not is_alike(computed, kept):
        return {}
    found = {lane.prf: lane for lane in _heard_of(kept, None if mark is None else (mark.range_m, mark.speed_m_s))}
    return {place: found[lane.prf] for place, lane in enumerate(heard) if lane.prf in found}


@lru_cache(maxsize=2)
def _heard_of(kept, target):
    """Return the kept plan's lanes, worked out once for a target."""
    return lanes(kept, None if target is None else Mark(kept, *target))


def _kept_filters(others, axis, scale):
    """Return the filters of the kept plan that match the whole ones, cut to the axis."""
    courses = []
    for place, lane in others.items():
        inside = (lane.speed_m_s >= axis.limits[0]) & (lane.speed_m_s <= axis.limits[1])
        if np.isfinite(lane.filter).all():
            courses.append((axis.shown(lane.speed_m_s[inside]), scale.at(place, lane.filter[inside])))
    return _joined(courses)


def _top(heard):
    """Return the level at the top of every lane: room over the strongest of all. [dB]"""
    most = [1.0]
    for lane in heard:
        most += [lane.clutter.max(initial=1.0), np.nan_to_num(lane.filter).max(initial=1.0)]
    return float(np.ceil(max(_LEAST_TOP_DB, 10.0 * np.log10(max(most)) + _ROOM_DB) / 10.0) * 10.0)


def _ticks(scale, height):
    """Return levels 20 dB apart in every lane, or only that of the noise where lanes are low."""
    px = height / scale.count * _HIGH / (scale.top_db - _LOWEST_DB)
    step = next((step for step in (10, 20, 40) if step * px > _PX_PER_TICK), 60)
    levels = [level for level in range(-step * 3, int(scale.top_db) + 1, step) if _LOWEST_DB <= level <= scale.top_db]
    at = [(scale.level(lane, level), level) for lane in reversed(range(scale.count)) for level in levels]
    return {'at': [place for place, _ in at], 'text': [str(level).replace('-', '\N{MINUS SIGN}') for _, level in at]}


def _grounds(heard, axis, scale):
    """Return the lanes themselves, the noise in them and the notches along their feet."""
    left = np.array([axis.shown(lane.speed_m_s[0]) for lane in heard])
    right = np.array([axis.shown(lane.speed_m_s[-1]) for lane in heard])
    foot = np.array([scale.foot(lane) for lane in range(len(heard))])
    notch = [min(lane.cpi.notch_m_s, 0.5 * lane.cpi.blind_speed_m_s) if lane.cpi else 0.0 for lane in heard]
    some = np.array(notch) > 0.0
    half = axis.shown(np.array(notch))[some]
    return {
        'lanes': {'left': left, 'right': right, 'bottom': foot, 'top': foot + _HIGH},
        'noise': {'x0': left, 'x1': right, 'y': np.array([scale.level(lane, 0.0) for lane in range(len(heard))])},
        'notch': {'left': -half, 'right': half, 'bottom': foot[some], 'top': foot[some] + _BAR},
    }


def _rotor(computed, heard, axis, scale):
    """Return the strips of the target's rotor lines, above the notches."""
    foot = [scale.foot(place) + _BAR + _ROTOR_GAP for place in range(len(heard))]
    return strips(computed, heard, axis, foot, _ROTOR)


def _clutter(computed, heard, axis, scale):
    """Return the area of each patch down to the foot of its lane, ground apart from what moves, and all edges."""
    found = {'ground': [], 'rain': []}
    edges = []
    for place, lane in enumerate(heard):
        x = axis.shown(lane.speed_m_s)
        for patch, power in zip(computed.echoes.patches, lane.clutter, strict=True):
            y = scale.at(place, power)
            kind = 'ground' if patch is computed.plan.surface else 'rain'
            foot = scale.foot(place)
            found[kind].append((np.concatenate((x[:1], x, x[-1:])), np.concatenate(([foot], y, [foot]))))
            edges.append((x, np.where(power > _FLOOR, y, np.nan)))
    return {**{kind: _joined(parts) for kind, parts in found.items()}, 'clutter-edge': _joined(edges)}


def _joined(parts):
    """Return several courses as one, parted by nan."""
    gap = np.array([np.nan])
    columns = [np.concatenate([np.concatenate((part[i], gap)) for part in parts] or [np.zeros(0)]) for i in (0, 1)]
    return {'x': columns[0], 'y': columns[1]}


def _filters(heard, axis, scale, width):
    """Return the main lobe of every filter where there is room for them, and one filter whole."""
    px = width / (axis.limits[1] - axis.limits[0])
    lobes, whole = [], []
    for place, lane in enumerate(heard):
        x = axis.shown(lane.speed_m_s)
        if np.isfinite(lane.filter).all():
            whole.append((x, scale.at(place, lane.filter)))
        if lane.cpi is None or lane.cpi.blind_speed_m_s / lane.cpi.pulses * px < _PX_PER_LOBE:
            continue
        offset, power = lane.lobe
        y = scale.at(place, power)
        for centre in lane.centre_m_s.tolist():
            at = centre + offset
            inside = (at >= lane.speed_m_s[0]) & (at <= lane.speed_m_s[-1])
            lobes.append((axis.shown(at[inside]), y[inside]))
    return {'lobes': _joined(lobes), 'filter': _joined(whole)}


def _names(computed, heard, axis, scale, names):
    """Return the PRFs' names in a free corner of their lanes, and the patches' names where they are strongest."""
    x, y, text, anchor = [], [], [], []
    crowded = any(np.argmax(power) < _LEFT * power.size for lane in heard for power in lane.clutter)
    for place, (lane, name) in enumerate(zip(heard, names, strict=True)):
        if not computed.is_stagger and computed.plan.n > 1:
            x.append(axis.shown(lane.speed_m_s[-1 if crowded else 0]))
            y.append(scale.foot(place) + _HIGH)
            text.append(name)
            anchor.append('top_right' if crowded else 'top_left')
        for patch, power in zip(computed.echoes.patches, lane.clutter, strict=True):
            top = int(np.argmax(power))
            if power[top] > 1.0:
                x.append(axis.shown(lane.speed_m_s[top]))
                y.append(float(scale.at(place, power[top])))
                text.append(patch.name or 'patch')
                anchor.append(_lean(lane, top))
    return names_at(x, y, text, anchor)


def _lean(lane, top):
    """Return how a patch's name lies at its top, so that it stays in its lane."""
    part = top / max(lane.speed_m_s.size - 1, 1)
    return 'top_left' if part < _NEAR_AN_END else 'top_right' if part > 1 - _NEAR_AN_END else 'top_center'


def _target(heard, axis, scale):
    """Return the target's line in every lane, and its level in its best filter."""
    marked = [(place, *lane.target) for place, lane in enumerate(heard) if lane.target]
    x = axis.shown(np.array([speed for _, speed, _ in marked]))
    foot = np.array([scale.foot(place) for place, *_ in marked])
    heard_at_all = [(at, scale.at(place, power)) for at, (place, _, power) in zip(x, marked, strict=True) if power > 0]
    return {
        'target': upright(x, foot, foot + _HIGH),
        'level': {
            'x': np.array([at for at, _ in heard_at_all]),
            'y': np.array([float(level) for _, level in heard_at_all]),
        },
    }
