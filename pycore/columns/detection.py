"""Figure: the probability of detection over range and radial speed, and under it along the range.

The y axis is the radial speed; the curves lie in a strip under the map, on ticks of
their own. Sources: ``map`` (steps of probability), ``frame`` (around the map and the
strip), ``wanted`` (the wanted probability), ``best``, ``median``, ``worst`` (curves),
``kept`` (the kept plan's median), ``names``, ``heading`` (of the strip), ``target``.
"""

from dataclasses import dataclass
from functools import lru_cache

import numpy as np

from pycore import detected, zones
from pycore.columns.axes import range_axis, round_ticks, speed_axis
from pycore.columns.detection_words import marked, words
from pycore.columns.mark import ring
from pycore.columns.named import names_at
from pycore.columns.view import WHOLE, shown_part
from pycore.wording import trimmed

NAME, TITLE = 'detection', 'Detection'

SIZE = {'width': 560, 'height': 320}
"""The plot where the page has not said how large it is. [px]"""

STEPS = ('hardly', 'seldom', 'often', 'enough', 'surely')
"""Steps of the probability, rising; the last two are at least what is wanted. [unitless]"""

_MAP = 0.58
_GAP, _STRIP = 0.15, 0.27
_CELLS = 40_000
_CLUTTERED = 0.6
_SMALLEST_PX = 2.0
_POINTS = 181
_TICK_PX = 13.0
_NAMED_AT = {'best': 0.5, 'worst': 0.3}


@dataclass(frozen=True, slots=True)
class _Strip:
    """Where the curves lie on the axis of speed: ``low`` is probability nought, ``high`` one. [shown unit]"""

    low: float
    high: float

    def at(self, probability):
        return self.low + (self.high - self.low) * np.asarray(probability, dtype=float)


def steps(wanted):
    """Return the edges between the steps of probability.

    Parameters
    ----------
    wanted : float
        Wanted probability of detection. [unitless]

    Returns
    -------
    edges : float array, shape 4
        A tenth and a half of what is wanted, that itself, and the middle between it and certainty.
    """
    return np.array([0.1 * wanted, 0.5 * wanted, wanted, (1.0 + wanted) / 2.0])


def picture(computed, units, size=None, view=WHOLE):
    """Return the figure of detection.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    size : mapping or None
        Width and height of the plot; with ``fine`` above one the map for paper has more cells, and the words are still
        those of the screen. [px]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    picture : dict
        Columns, ranges, labels, ticks and words.
    """
    whole = range_axis(computed.plan.range_m, units), speed_axis(computed.plan.speed_m_s, units)
    x, y = part = view.part(NAME, *whole)
    bottom, top = y.ends
    span = top - bottom
    strip = _Strip(bottom - (_GAP + _STRIP) / _MAP * span, bottom - _GAP / _MAP * span)
    wanted = computed.plan.target.pd_wanted
    size = size or SIZE
    found = probabilities(computed, {**size, 'fine': 1}, part)
    return {
        'title': TITLE,
        **words(computed, *whole, found, shown_part(*whole, part), view.kept),
        'marked': marked(view.mark),
        'columns': {
            'map': {'image': _classes(_finer(computed, size, part, found), wanted), **_frame(x, y)},
            **_strip_of(computed, x, strip, wanted),
            'kept': _kept(view.kept, x, strip),
            'frame': _frames(x, y, strip),
            'target': ring(view.mark, x, y),
        },
        'ranges': {'x': x.ends, 'y': [strip.low, top]},
        'labels': {'x': x.label, 'y': y.label},
        'units': {'x': x.unit, 'y': y.unit},
        'holds': {'y': y.ends},
        'ticks': {'y': _ticks(y, strip, wanted, size['height'])},
    }


def probabilities(computed, size, part):
    """Return the probability in every cell of a map that fits a plot.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    size : mapping
        Width and height of the whole plot; ``fine`` divides the cells further. [px]
    part : pair of Axis
        Ranges and radial speeds of the map. [m, m/s]

    Returns
    -------
    probability : float array, shape V × R
        One row for each speed. The more PRFs, the coarser the cells: the work stays the same.
    """
    width, height = max(size['width'], 16.0), max(_MAP * size['height'], 16.0)
    fine = size.get('fine', 1)
    most = _CELLS / max(computed.looks, 1) * (_CLUTTERED if computed.echoes.patches else 1.0)
    cell = max(np.sqrt(width * height / most), _SMALLEST_PX) / fine
    at_range = zones.centres(part[0].limits, max(int(width / cell), 8))
    at_speed = zones.centres(part[1].limits, max(int(height / cell), 8))
    return detected.probability_over(computed, at_range, at_speed).T


def _finer(computed, size, part, found):
    return probabilities(computed, size, part) if size.get('fine', 1) > 1 else found


def _classes(found, wanted):
    return np.searchsorted(steps(wanted), found, side='right').astype(np.uint8)


def _frame(x, y):
    (left, right), (bottom, top) = x.ends, y.ends
    return {
        name: np.array([value])
        for name, value in zip(('x', 'y', 'dw', 'dh'), (left, bottom, right - left, top - bottom), strict=True)
    }


def _frames(x, y, strip):
    (left, right), (bottom, top) = x.ends, y.ends
    return {
        'left': np.full(2, left),
        'right': np.full(2, right),
        'bottom': np.array([bottom, strip.low]),
        'top': np.array([top, strip.high]),
    }


def _ticks(y, strip, wanted, height):
    """Return round speeds beside the map, and nought, what is wanted and one beside the strip."""
    at, text = round_ticks(*y.ends)
    room = min(wanted, 1.0 - wanted) * _STRIP * height > _TICK_PX
    chances = [0.0, wanted, 1.0] if room else [0.0, 1.0]
    return {'at': [*strip.at(chances).tolist(), *at], 'text': [*map(trimmed, chances), *text]}


def _strip_of(computed, x, strip, wanted):
    """Return the curves of the best, the median and the worst speed, with their names."""
    range_m = np.linspace(*x.limits, _POINTS)
    curves = curves_of(computed, range_m)
    shown = x.shown(range_m)
    named = [_name(name, shown, curves[name], x) for name in _NAMED_AT if name in curves]
    named = [one for one in named if one]
    (left, right) = x.ends
    nothing = {'x': np.zeros(0), 'y': np.zeros(0)}
    return {
        **{
            name: {'x': shown, 'y': strip.at(curves[name])} if name in curves else nothing
            for name in ('best', 'median', 'worst')
        },
        'wanted': {'x0': np.array([left]), 'x1': np.array([right]), 'y': strip.at([wanted])},
        'names': names_at(
            [at for at, *_ in named],
            strip.at([chance for _, chance, *_ in named]),
            [text for *_, text, _, _ in named],
            [anchor for *_, anchor, _ in named],
            [move for *_, move in named],
        ),
        'heading': names_at([left], [strip.high], ['probability of detection'], ['bottom_left'], -2.0, -3.0),
    }


def _kept(kept, x, strip):
    """Return the kept plan's curve at its median speed."""
    curve = None if kept is None else _median(kept, tuple(x.limits))
    if curve is None:
        return {'x': np.zeros(0), 'y': np.zeros(0)}
    return {'x': x.shown(np.linspace(*x.limits, _POINTS)), 'y': strip.at(curve)}


@lru_cache(maxsize=2)
def _median(kept, limits):
    """Return the probability along the range at the median speed, kept while neither the plan nor the range changes."""
    return curves_of(kept, np.linspace(*limits, _POINTS)).get('median')


def _name(name, at, curve, x):
    """Return where a curve's name stands, on its open side where it falls; none where the curve stays up."""
    below = np.flatnonzero(curve < _NAMED_AT[name])
    if not below.size:
        return None
    part = (at[below[0]] - x.ends[0]) / (x.ends[1] - x.ends[0])
    if name == 'best':
        return (at[below[0]], _NAMED_AT[name], 'best speed', 'bottom_left', 2.0) if part < 0.85 else None
    if part > 0.2:
        return at[below[0]], _NAMED_AT[name], 'worst speed', 'top_right', -2.0
    return (x.ends[0], 0.16, 'worst speed', 'center_left', 4.0) if part == 0 else None


def curves_of(computed, range_m):
    """Return the probability along the range at the best, the median and the worst speed, by noise alone.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    range_m : float array, shape R
        Ranges. [m]

    Returns
    -------
    curves : dict of float array, shape R
        ``best``, ``median`` and ``worst``, as the reach ranks them; empty where no speed is outside the floor.
    """
    reach = computed.echoes.reach
    if reach is None or not len(reach.speed_m_s):
        return {}
    chosen = list(reach.places)
    found = detected.probability_along(computed, range_m, reach.speed_m_s[chosen])
    return dict(zip(('best', 'median', 'worst'), found.T, strict=True))
