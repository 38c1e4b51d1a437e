"""What is at one point of the map of blind speeds, in one line: of the plan as that row moves it."""

import math

import numpy as np

from pycore.columns.axes import speed_axis
from pycore.columns.looks import all_of
from pycore.columns.speed_rows import up_axis
from pycore.moved_plan import Moved
from pycore.wording import THIN_SPACE, count_word, trimmed, with_unit

_FIGURES = 4
_LOWEST_DB = -150.0


def here_moved_words(computed, up, x, y, units):
    """Return what is at one point of the map.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    up : str
        What is moved up the axis, as ``shown_up`` gives it. [unitless]
    x : float or None
        Radial speed. [shown unit]
    y : float or None
        Height of the point; ``None``, the plan's own row. [shown unit]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    text : str
        Such as ``'183 m/s at a mean PRI of 905 µs: clear on one of two.'``; empty without a speed.
    """
    if x is None:
        return ''
    axis, moving = speed_axis(computed.plan.speed_m_s, units), up_axis(computed, units, up)
    at = min(max(moving.own if y is None else y, moving.limits[0]), moving.limits[1])
    row = moving.text(at, lambda value: trimmed(value, _FIGURES))
    found = _found(computed, moving.moved(np.array([at])), x * axis.si)
    return f'{trimmed(x, _FIGURES)}{THIN_SPACE}{axis.unit} at a {moving.noun} of {row}: {found}.'


def _found(computed, factors, speed_m_s):
    moved, plan = Moved(computed.plan), computed.plan
    if computed.is_stagger:
        power = float(moved.powers(factors, (speed_m_s, speed_m_s), 1)[0, 0])
        level = 10.0 * math.log10(power) if power > 0.0 else _LOWEST_DB
        side = 'above' if level >= plan.response_min_db else 'below'
        return f'response {with_unit(max(level, _LOWEST_DB), "dB")}, {side} the least'
    clear = int(moved.clear_counts(factors, np.array([speed_m_s]))[0, 0])
    if plan.n == 1:
        return 'clear' if clear else 'in the notch'
    if clear in (0, plan.n):
        return f'{"clear" if clear else "in the notch"} on {all_of(plan.n)}'
    return f'clear on {count_word(clear)} of {count_word(plan.n)}'
