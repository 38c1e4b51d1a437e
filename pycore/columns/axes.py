"""Axes in the units that the reader prefers: the one place where a figure leaves SI."""

import math
from dataclasses import dataclass

from pycore.shown import FIGURES
from pycore.wording import DISTANCE, SPEED, THIN_SPACE, between, significant, trimmed, with_unit

_SAME = 1e-9
"""Part of an axis within which a point counts as lying on its end."""


@dataclass(frozen=True, slots=True)
class Axis:
    """One axis of a figure.

    Parameters
    ----------
    name : str
        What it measures, in the trade's words. [unitless]
    unit : str
        Unit that is shown. [unitless]
    si : float
        One shown unit in SI. [m or m/s]
    limits : tuple of two floats
        Its ends. [m or m/s]
    """

    name: str
    unit: str
    si: float
    limits: tuple[float, float]

    @property
    def label(self):
        """What stands beside the axis."""
        return f'{self.name} ({self.unit})'

    @property
    def ends(self):
        """Its ends as a list, in the shown unit."""
        return [float(self.shown(end)) for end in self.limits]

    def shown(self, value):
        """Return a value or an array in the shown unit."""
        return value / self.si

    def text(self, value):
        """Return a value with its unit, to three figures."""
        return with_unit(self.shown(value), self.unit)

    def interval(self, low, high):
        """Return an interval in words; an end that is the axis' own is written as it was typed."""
        ends = self.shown(low), self.shown(high)
        if self._at_end(low) and self._at_end(high):
            return f'{self._typed(low)} to {self._typed(high)}{THIN_SPACE}{self.unit}'
        return between(*ends, self.unit)

    def span(self):
        """Return the whole axis in words."""
        return self.interval(*self.limits)

    def wanted(self, value):
        """Return a value of the plan as it was typed, with its unit."""
        return f'{self._typed(value)}{THIN_SPACE}{self.unit}'

    def _typed(self, value):
        """Return all digits in the plan's own unit, three figures in another."""
        shown = self.shown(value)
        return trimmed(shown) if self.unit in ('km', 'm/s') else significant(shown)

    def _at_end(self, value):
        slack = _SAME * (self.limits[1] - self.limits[0])
        return any(abs(value - end) <= slack for end in self.limits)


def range_axis(limits_m, units, name='range'):
    """Return an axis of range.

    Parameters
    ----------
    limits_m : tuple of two floats
        Its ends. [m]
    units : mapping
        Units that the reader prefers. [unitless]
    name : str
        What it measures. [unitless]

    Returns
    -------
    axis : Axis
        In km or nmi.
    """
    return Axis(name, units['range'], DISTANCE[units['range']], tuple(limits_m))


def speed_axis(limits_m_s, units, name='radial speed'):
    """Return an axis of radial speed.

    Parameters
    ----------
    limits_m_s : tuple of two floats
        Its ends. [m/s]
    units : mapping
        Units that the reader prefers. [unitless]
    name : str
        What it measures. [unitless]

    Returns
    -------
    axis : Axis
        In m/s, km/h or kt.
    """
    return Axis(name, units['speed'], SPEED[units['speed']], tuple(limits_m_s))


def interval_name(pri_s, units):
    """Return what a pulse repetition interval is called: the interval itself, or its frequency.

    Parameters
    ----------
    pri_s : float
        Interval. [s]
    units : mapping
        Units that the reader prefers, with key ``pri``. [unitless]

    Returns
    -------
    text : str
        Such as ``'980 µs'`` or ``'1020.4 Hz'``.
    """
    unit = units['pri']
    value = {'us': 1e6 * pri_s, 'ms': 1e3 * pri_s, 'Hz': 1.0 / pri_s, 'kHz': 1e-3 / pri_s}[unit]
    text = trimmed(value, FIGURES['pri']) if unit in ('Hz', 'kHz') else trimmed(value)
    return f'{text}{THIN_SPACE}{"µs" if unit == "us" else unit}'


def decade_ticks(low, high):
    """Return round numbers, such as 1, 2 and 5 in every decade, between two ends of a logarithmic axis.

    Parameters
    ----------
    low, high : float
        Its ends, above 0, in the shown unit. [any]

    Returns
    -------
    at : list of float
        Where the ticks stand. [any]
    text : list of str
        What stands beside them.
    """
    decades = range(math.floor(math.log10(low)), math.ceil(math.log10(high)) + 1)
    digits = (1, 2, 3, 5, 7) if high < 12 * low else (1, 2, 5) if high < 3000 * low else (1,)
    at = [digit * 10.0**decade for decade in decades for digit in digits]
    kept = [value for value in at if low <= value <= high]
    return kept, [trimmed(value) for value in kept]


def round_ticks(low, high, most=6):
    """Return round numbers, evenly spaced, between two ends of a linear axis.

    Parameters
    ----------
    low, high : float
        Its ends, in the shown unit. [any]
    most : int
        Most steps between them. [unitless]

    Returns
    -------
    at : list of float
        Where the ticks stand. [any]
    text : list of str
        What stands beside them.
    """
    rough = (high - low) / most
    decade = 10.0 ** math.floor(math.log10(rough))
    step = next(decade * digit for digit in (1, 2, 5, 10) if decade * digit >= rough * (1 - _SAME))
    at = [number * step for number in range(math.ceil(low / step - _SAME), math.floor(high / step + _SAME) + 1)]
    return at, [trimmed(value) for value in at]
