"""Figure: the number of clear PRFs over range and radial speed.

Against a kept plan: only what is lost and gained. Sources: ``map`` (classes, see
:mod:`pycore.columns.classes`), ``regions`` and ``region-names`` (must-see), ``holes`` (their
numbers), ``target`` (the followed one). The colours of the classes
belong to the page, so that only its palette changes with its scheme.
"""

import numpy as np

from pycore import zones
from pycore.columns.axes import range_axis, speed_axis
from pycore.columns.classes import changes, classes
from pycore.columns.compared_words import compared_words
from pycore.columns.kept import sight_over
from pycore.columns.mark import ring
from pycore.columns.named import names_at
from pycore.columns.view import WHOLE, shown_part
from pycore.columns.zone_words import words

NAME, TITLE = 'blind-zones', 'Blind zones'

SIZE = {'width': 560, 'height': 320}
"""Cells of the map where the page has not said how large its plot is. [px]"""

MOST_NUMBERED = 9
"""Holes that carry their number in the figure. [unitless]"""

_FEWEST, _MOST = 16, 400_000
_AT_THE_END = 0.94
_DISC = 17
_WAYS = ((12.0, -12.0), (-12.0, -12.0), (12.0, 12.0), (-12.0, 12.0))


def picture(computed, units, size=None, view=WHOLE):
    """Return the figure of blind zones.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    size : mapping or None
        Width and height of the plot; ``fine``, cells along each side of a pixel, is more than one for paper. [px]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    picture : dict
        Columns, ranges, labels, ticks and words.
    """
    whole = range_axis(computed.plan.range_m, units), speed_axis(computed.plan.speed_m_s, units)
    x, y = part = view.part(NAME, *whole)
    size = size or SIZE
    if view.kept is not None:
        return _compared(computed, view, whole, part, size)
    count, with_clutter = _counted(computed, part, *_cells_for(size))
    numbers, boxes = _numbers(computed, x, y, _Blind(computed, part, count))
    return _figure(
        part,
        words(computed, *whole, shown_part(*whole, part)),
        {
            'map': {'image': _image(computed, part, size, count, with_clutter), **_frame(x, y)},
            **_regions(computed, x, y),
            'holes': numbers,
            'target': ring(view.mark, x, y),
        },
        boxes,
    )


def _compared(computed, view, whole, part, size):
    """Return the figure of what is lost and gained: must-see regions and the target stay, holes have no number."""
    x, y = part
    at = [zones.centres(axis.limits, cells) for axis, cells in zip(part, _cells_for(size), strict=True)]
    other = sight_over(view.kept, computed.plan)
    seen, kept = (zones.count_map(one.ranges, one.speeds, *at) >= one.m for one in (computed.sight, other))
    return _figure(
        part,
        compared_words(computed, view.kept, *whole, shown_part(*whole, part)),
        {
            'map': {'image': changes(seen, kept), **_frame(x, y)},
            **_regions(computed, x, y),
            'holes': names_at([], [], [], []),
            'target': ring(view.mark, x, y),
        },
        [],
    )


def _figure(part, said, columns, boxes):
    x, y = part
    return {
        'title': TITLE,
        **said,
        'columns': columns,
        'ranges': {'x': x.ends, 'y': y.ends},
        'labels': {'x': x.label, 'y': y.label},
        'units': {'x': x.unit, 'y': y.unit},
        'holes': boxes,
        'ticks': {},
    }


def _frame(x, y):
    (left, right), (bottom, top) = x.ends, y.ends
    return {
        name: np.array([value])
        for name, value in zip(('x', 'y', 'dw', 'dh'), (left, bottom, right - left, top - bottom), strict=True)
    }


def _image(computed, part, size, count, with_clutter):
    """Return the class of every cell, counted anew where a pixel holds several."""
    fine = int(size.get('fine', 1))
    if fine > 1:
        count, with_clutter = _counted(computed, part, *(fine * cells for cells in _cells_for(size)))
    return classes(count, computed.looks, computed.m, with_clutter, fine)


def _counted(computed, part, width, height):
    """Return the clear PRFs in every cell, and the count with clutter."""
    seen = computed.sight
    at_range, at_speed = (zones.centres(axis.limits, cells) for axis, cells in zip(part, (width, height), strict=True))
    count = zones.count_map(seen.ranges, seen.speeds, at_range, at_speed)
    return count, _with_clutter(computed, at_range, at_speed)


def _with_clutter(computed, at_range, at_speed):
    """Return the number of PRFs that clutter leaves clear as well; none without clutter, or of a stagger."""
    if computed.is_stagger or not computed.echoes.patches:
        return None
    return zones.count_map_of_pieces(computed.sight.ranges, computed.echoes.pieces, at_range, at_speed)


def _cells_for(size):
    """Return the sides of the map: the plot's own, halved until the map can follow a drag."""
    width, height = (max(int(size[side]), _FEWEST) for side in ('width', 'height'))
    while width * height > _MOST:
        width, height = max(width // 2, _FEWEST), max(height // 2, _FEWEST)
    return width, height


class _Blind:
    """Cells of a map that are blind and outside the floor, looked at piece by piece."""

    def __init__(self, computed, part, count):
        seen, (height, width), (x, y) = computed.sight, count.shape, part
        self.blind, self.m = count < seen.m, seen.m
        self.on_range = zones.clear_marks(seen.floor_ranges, zones.centres(x.limits, width))
        self.on_speed = zones.clear_marks(seen.floor_speeds, zones.centres(y.limits, height))

    def within(self, rows, columns):
        could = np.bitwise_count(self.on_speed[rows, None] & self.on_range[columns]) >= self.m
        return self.blind[rows, columns] & could


def _regions(computed, x, y):
    """Return the must-see regions and where their names stand: above each where there is room, else inside its top."""
    found = computed.must_see
    left, right, bottom, top = (
        axis.shown(np.array([getattr(region, key)[end] for region in found], dtype=float))
        for axis, key, end in ((x, 'range_m', 0), (x, 'range_m', 1), (y, 'speed_m_s', 0), (y, 'speed_m_s', 1))
    )
    room = top <= y.ends[0] + 0.9 * (y.ends[1] - y.ends[0])
    late = left > x.ends[0] + 0.6 * (x.ends[1] - x.ends[0])
    anchor = [
        f'{"bottom" if above else "top"}_{"right" if end else "left"}' for above, end in zip(room, late, strict=True)
    ]
    text = [region.name or f'region {i + 1}' for i, region in enumerate(found)]
    offset = np.where(late, -2.0, 2.0), np.where(room, -4.0, 4.0)
    return {
        'regions': {'left': left, 'right': right, 'bottom': bottom, 'top': top},
        'region-names': names_at(np.where(late, right, left), top, text, anchor, *offset),
    }


def _numbers(computed, x, y, blind):
    """Return where the holes' numbers stand, inside each or towards the right end of a long one, and their ends."""
    height, width = blind.blind.shape
    numbered = _in_part(computed.holes.listed, x, y)
    spots = [_spot(hole, x, y, blind) for _, hole in numbered]
    at = np.array([(column, row) for column, row, _ in spots]).reshape(-1, 2)
    beside = _beside(at, [small for *_, small in spots], (width, height))
    text = [str(number) for number, _ in numbered]
    at = _centre(at[:, 0], x.ends, width), _centre(at[:, 1], y.ends, height)
    boxes = [
        {'x': [end / 1e3 for end in hole.range_m], 'y': list(hole.speed_m_s), 'number': number}
        for number, hole in numbered
    ]
    return names_at(*at, text, ['center'] * len(spots), *beside.T), boxes


def _in_part(holes, x, y):
    """Return the holes that show, with their numbers in the whole list; only so many carry one."""
    shown = [
        (place + 1, hole)
        for place, hole in enumerate(holes)
        if hole.range_m[0] < x.limits[1]
        and hole.range_m[1] > x.limits[0]
        and hole.speed_m_s[0] < y.limits[1]
        and hole.speed_m_s[1] > y.limits[0]
    ]
    return shown[:MOST_NUMBERED]


def _beside(at, small, size):
    """Return how far each number is moved: off a hole that it would hide, off those before it, into the map."""
    moved = np.zeros((len(small), 2))
    for i in np.flatnonzero(small).tolist():
        # Offsets count down the screen, cells up.
        placed = at[:i] + moved[:i] * (1, -1)
        clear = [
            way for way in _WAYS if not (np.abs(placed - at[i] - way * np.array((1, -1))).max(axis=1) < _DISC).any()
        ]
        moved[i] = clear[0] if clear else _WAYS[0]
    inside = np.clip(at + moved * (1, -1), _DISC / 1.7, np.array(size) - _DISC / 1.7)
    return (inside - at) * (1, -1)


def _spot(hole, x, y, blind):
    """Return a cell inside a hole, in its longest row of cells, and whether a number there would hide the hole."""
    height, width = blind.blind.shape
    columns, rows = _cells(hole.range_m, x.limits, width), _cells(hole.speed_m_s, y.limits, height)
    inside = blind.within(rows, columns)
    if not inside.any():
        return (columns.start + columns.stop - 1) / 2, (rows.start + rows.stop - 1) / 2, True
    lengths = inside.sum(axis=1)
    longest = np.flatnonzero(lengths == lengths.max())
    row = longest[longest.size // 2]
    cells = np.flatnonzero(inside[row])
    far = cells.size > 0.6 * width
    column = cells[int(cells.size * (_AT_THE_END if far else 0.5))]
    return column + columns.start, row + rows.start, max(inside.shape) < 1.5 * _DISC


def _cells(ends, limits, count):
    """Return the cells that an interval takes part in."""
    low, high = ((end - limits[0]) / (limits[1] - limits[0]) * count for end in ends)
    return slice(max(int(low), 0), min(int(np.ceil(high)), count))


def _centre(cell, ends, count):
    return ends[0] + (ends[1] - ends[0]) * (cell + 0.5) / count
