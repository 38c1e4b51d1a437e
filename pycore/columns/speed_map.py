"""The map of blind speeds: speed across, and up the axis what is moved about the plan.

Sources: ``map`` (the classes of :mod:`pycore.columns.classes` for dwells, after them the steps of a stagger's
response), ``own`` (the plan's own row), ``true-blind`` (lines). Every cell is sampled exactly, at its centre.
"""

import math

import numpy as np

from pycore import zones
from pycore.columns.axes import speed_axis
from pycore.columns.classes import NAMES, classes
from pycore.columns.mark import across
from pycore.columns.named import names_at
from pycore.columns.speed_map_words import words
from pycore.columns.speed_rows import shown_up, up_axis
from pycore.moved_plan import Moved

STEPS = ('hardly', 'seldom', 'often', 'enough', 'surely')
"""Steps of a stagger's response, below and from the least one; their codes follow those of the classes. [unitless]"""

STEP_DB = 10.0
"""From one step to the next; the middle edge is the least response. [dB]"""

SIZE = {'width': 560, 'height': 300}
"""Cells of the map where the page has not said how large its plot is. [px]"""

_FEWEST, _MOST = 16, 260_000
_LINE_POINTS = 65
_MOST_LINES = 24


def nothing():
    """Return the columns of a figure that is no map.

    Returns
    -------
    columns : dict
        All of them, empty.
    """
    empty = np.zeros(0)
    return {
        'map': {name: [] for name in ('image', 'x', 'y', 'dw', 'dh')},
        'own': {'x0': empty, 'x1': empty, 'y': empty},
        'true-blind': {'x': empty, 'y': empty},
    }


def is_map(computed, view):
    """Return whether a view shows the map: it stays as it is where only the followed target moves.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    is_map : bool
        False where the plan's own rows or curve are shown.
    """
    return shown_up(computed, view.up) != 'own'


def marked(computed, units, view):
    """Return the columns of the followed target on a map.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    columns : dict of float arrays
        x, y0, y1; empty where no target is followed. [shown units]
    """
    ends = up_axis(computed, units, shown_up(computed, view.up)).limits
    return across(view.mark and view.mark.speed_m_s, speed_axis(computed.plan.speed_m_s, units), ends)


def picture(computed, axis, units, up, size, kept):
    """Return columns, ranges, labels, ticks and words of a map.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    axis : Axis
        Of radial speed. [m/s]
    units : mapping
        Units that the reader prefers. [unitless]
    up : str
        What is moved up the axis. [unitless]
    size : mapping or None
        Width and height of the plot. [px]
    kept : Computed or None
        What the kept plan gives, which a map does not draw. [SI]

    Returns
    -------
    picture : dict
        As a figure's, without its title.
    """
    moving = up_axis(computed, units, up)
    moved = Moved(computed.plan)
    lines = _true_blind(moved, moving, axis)
    return {
        **words(computed, moved, axis, moving, up, has_lines=lines['x'].size > 0, has_kept=kept is not None),
        'columns': {
            'map': {'image': _image(computed, moved, axis, moving, size or SIZE), **_frame(axis, moving)},
            'own': {name: np.array([end]) for name, end in zip(('x0', 'x1'), axis.ends, strict=True)}
            | {'y': np.array([moving.own])},
            'true-blind': lines,
            'names': _own_name(axis, moving),
        },
        'ranges': {'x': axis.ends, 'y': list(moving.limits)},
        'labels': {'x': axis.label, 'y': moving.label},
        'units': {'x': axis.unit, 'y': moving.unit},
        'ticks': {'y': moving.ticks},
    }


def _frame(axis, moving):
    (left, right), (bottom, top) = axis.ends, moving.limits
    sides = (left, bottom, right - left, top - bottom)
    return {name: np.array([side]) for name, side in zip(('x', 'y', 'dw', 'dh'), sides, strict=True)}


def _image(computed, moved, axis, moving, size):
    """Return the code of every cell, the lowest row first."""
    width, height = _cells_for(size)
    factors = moving.moved(moving.centres(height))
    if not computed.is_stagger:
        counts = moved.clear_counts(factors, zones.centres(axis.limits, width))
        return classes(counts, computed.looks, computed.m)
    edges = computed.plan.response_min_db + STEP_DB * np.array([-2.0, -1.0, 0.0, 1.0])
    found = moved.powers(factors, axis.limits, width)
    # Counting the edges that are passed is quicker than looking each cell up.
    code = np.full(found.shape, len(NAMES), dtype=np.uint8)
    for edge in (10.0 ** (edges / 10.0)).tolist():
        code += found >= edge
    return code


def _cells_for(size):
    """Return the sides of the map: the plot's own, divided until the map can follow a drag."""
    width, height = (max(int(size[side]), _FEWEST) for side in ('width', 'height'))
    part = math.ceil(math.sqrt(width * height / _MOST))
    return max(width // part, _FEWEST), max(height // part, _FEWEST)


def _true_blind(moved, moving, axis):
    """Return the lines at which all PRFs, or the stagger, are truly blind, short of where they would fill the map."""
    at = np.linspace(*moving.limits, _LINE_POINTS)
    first = moved.true_blind_m_s(moving.moved(at))
    low, high = axis.limits
    if first is None or (high - low) / first.min() > _MOST_LINES:
        return {'x': np.zeros(0), 'y': np.zeros(0)}
    k = np.arange(math.floor(low / first.min()), math.ceil(high / first.min()) + 1)
    lines = first * k[k != 0, None]
    inside = lines[((lines >= low) & (lines <= high)).any(axis=1)]
    x = np.where((inside >= low) & (inside <= high), axis.shown(inside), np.nan)
    # A gap after each line keeps them apart.
    x, y = (np.column_stack((part, np.full(len(inside), np.nan))) for part in (x, np.broadcast_to(at, x.shape)))
    return {'x': x.ravel(), 'y': y.ravel()}


def _own_name(axis, moving):
    """Write the plan's own value on its row, where there is room above it or below."""
    low, high = moving.limits
    above = moving.own < low + 0.85 * (high - low)
    text = f'this plan, {moving.own_text}'
    anchor = f'{"bottom" if above else "top"}_right'
    return names_at([axis.ends[1]], [moving.own], [text], [anchor], -4.0, -3.0 if above else 3.0)
