"""The followed target as every figure marks it: a ring where both its co-ordinates show, a line where one does."""

import math
from functools import cached_property

import numpy as np

from pycore.errors import InputError
from pycore.follow import follow


class Mark:
    """One target, followed through a plan when a figure first asks for it.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    range_m : float
        True range, not negative. [m]
    speed_m_s : float
        True radial speed, positive closing. [m/s]
    """

    def __init__(self, computed, range_m, speed_m_s):
        self.computed = computed
        self.range_m = float(range_m)
        self.speed_m_s = float(speed_m_s)
        self.target = {'range_km': round(range_m / 1e3, 12), 'speed_mps': speed_m_s}

    @cached_property
    def followed(self):
        """What each PRF and the set make of it."""
        return follow(self.computed, self.range_m, self.speed_m_s)


def marked(computed, target):
    """Return the target that a page follows.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    target : mapping or None
        ``range_km``, not negative, and ``speed_mps``. [km, m/s]

    Returns
    -------
    mark : Mark or None
        None where no target is followed.

    Raises
    ------
    InputError
        Where one of the two is no such number.
    """
    if target is None:
        return None
    for key, lowest in (('range_km', 0.0), ('speed_mps', -math.inf)):
        value = target.get(key)
        if not isinstance(value, int | float) or not (math.isfinite(value) and value >= lowest):
            rule = 'a number, not below 0' if lowest == 0.0 else 'a number'
            raise InputError(f'target.{key}', f'target.{key} must be {rule}; got {value!r}.')
    return Mark(computed, target['range_km'] * 1e3, target['speed_mps'])


def ring(mark, x, y):
    """Return the columns of a ring.

    Parameters
    ----------
    mark : Mark or None
        The target; none, no ring. [m, m/s]
    x, y : Axis
        Of range and of radial speed. [m, m/s]

    Returns
    -------
    columns : dict of float arrays
        x, y. [shown units]
    """
    if mark is None:
        return {'x': np.zeros(0), 'y': np.zeros(0)}
    return {'x': np.array([x.shown(mark.range_m)]), 'y': np.array([y.shown(mark.speed_m_s)])}


def upright(at, low, high):
    """Return the columns of a line across a figure, or of one across each of its lanes.

    Parameters
    ----------
    at : float array, shape L
        Where the lines stand; empty, no line. [shown unit]
    low, high : float or array, shape L
        Their ends. [any]

    Returns
    -------
    columns : dict of float arrays
        x, y0, y1. [shown unit, any]
    """
    x = np.atleast_1d(np.asarray(at, dtype=float))
    ends = (np.broadcast_to(np.asarray(end, dtype=float), x.shape).copy() for end in (low, high))
    return {'x': x, **dict(zip(('y0', 'y1'), ends, strict=True))}


def across(value, axis, ends):
    """Return the columns of a line through a whole figure at one value of an axis.

    Parameters
    ----------
    value : float or None
        Range or radial speed of the target; none, no line. [m or m/s]
    axis : Axis
        The axis that it is measured on. [m or m/s]
    ends : sequence of two floats
        Ends of the other axis. [any]

    Returns
    -------
    columns : dict of float arrays
        x, y0, y1. [shown unit, any]
    """
    return upright([] if value is None else [axis.shown(value)], *ends)
