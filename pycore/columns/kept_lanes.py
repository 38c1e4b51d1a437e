"""Thin lanes of the kept plan under those of the present one: below each, or one below all where PRFs differ in number.

Sources: ``kept-lanes`` (a bar along each), ``kept-blind`` (of each PRF), ``kept-unseen``
(where the kept plan has too few).
"""

from dataclasses import dataclass

import numpy as np

from pycore.columns.axes import Axis
from pycore.columns.kept import blind_on, is_alike, same_coverage
from pycore.columns.lanes import lane_bars, middles
from pycore.columns.prf_names import prf_names
from pycore.computed import Computed
from pycore.spans import Spans

ALONE_AT = -0.34
"""Middle of the one lane of a kept plan whose PRFs are not as many as the present plan's. [lanes]"""
_ROOM = 0.46
_NO_BARS = {'y': np.zeros(0), 'left': np.zeros(0), 'right': np.zeros(0)}
NO_LANES = {'kept-lanes': _NO_BARS, 'kept-blind': _NO_BARS, 'kept-unseen': _NO_BARS}
"""The columns where nothing is kept."""
_CLOSE = 0.0005
"""Part of an axis up to which two lengths read as the same. [unitless]"""


@dataclass(frozen=True, slots=True)
class Beside:
    """The kept plan along one axis of the present coverage.

    Parameters
    ----------
    kept : Computed or None
        What the kept plan gives. [SI]
    axis : Axis
        The axis. [m or m/s]
    alike : bool
        Whether each PRF has a thin lane of its own. [unitless]
    same_coverage : bool
        Whether both plans are to see the same. [unitless]
    blind : Spans or None
        Where each of its PRFs is blind. [m or m/s]
    zones : float array, shape (Z, 2)
        Where it has too few. [m or m/s]
    columns : dict
        The thin lanes.
    """

    kept: Computed | None
    axis: Axis
    alike: bool
    same_coverage: bool
    blind: Spans | None
    zones: np.ndarray
    columns: dict

    @property
    def at_the_foot(self):
        """Whether there is one thin lane below all."""
        return self.kept is not None and not self.alike

    def lower(self, ends):
        """Return the ends of the axis across the lanes, with room for a lane below all."""
        return [ends[0] - _ROOM, ends[1]] if self.at_the_foot else ends

    def ticks(self, ticks):
        """Return the lanes' names, the kept plan's own below all among them."""
        if not self.at_the_foot:
            return ticks
        return {'at': [ALONE_AT, *ticks['at']], 'text': ['kept plan', *ticks['text']]}

    def sentences(self, zones, counted=''):
        """Say what the thin lanes are, and how much is lost now and with the kept plan.

        Parameters
        ----------
        zones : float array, shape (Z, 2)
            Where the present plan has too few. [m or m/s]
        counted : str
            What is counted that other sentences leave aside, such as ``'the notch around zero'``. [unitless]

        Returns
        -------
        sentences : list of str
            None where nothing is kept.
        """
        if self.kept is None:
            return []
        thin = 'Thin, below each lane' if self.alike and self.kept.plan.n > 1 else 'Thin, below'
        over = '' if self.same_coverage else ", over this plan's coverage"
        now, then = (float(np.diff(some).sum()) for some in (zones, self.zones))
        if now == then == 0.0:
            return [f'{thin}: the kept plan{over}; like this one it loses nothing.']
        over += f', {counted} counted' if counted else ''
        lengths = [self.axis.text(length) if length else 'nothing' for length in (now, then)]
        if abs(now - then) <= _CLOSE * (self.axis.limits[1] - self.axis.limits[0]) and lengths[0] == lengths[1]:
            return [f'{thin}: the kept plan{over}, which loses as much in all, {lengths[0]}.']
        return [f'{thin}: the kept plan{over}, which loses {lengths[1]} in all, against {lengths[0]} now.']

    def table(self, table, rows, units):
        """Return the figure's table with rows for the kept plan's PRFs.

        Parameters
        ----------
        table : dict
            The present plan's. [unitless]
        rows : callable
            Makes the rows of a plan from what it gives, its PRFs' names, and where they are blind. [unitless]
        units : mapping
            Units that the reader prefers. [unitless]

        Returns
        -------
        table : dict
            With further rows.
        """
        if self.kept is None:
            return table
        names = [f'kept: {name}' for name in prf_names(self.kept.plan, units)]
        return {**table, 'rows': [*table['rows'], *rows(self.kept, names, self.blind)]}


def beside(computed, kept, which, axis, with_top, offset):
    """Return the kept plan's thin lanes along one axis.

    Parameters
    ----------
    computed, kept : Computed
        What the present plan gives, and what the kept one does; ``kept`` may be ``None``. [SI]
    which : int
        0 for range, 1 for speed. [unitless]
    axis : Axis
        The axis. [m or m/s]
    with_top : bool
        Whether there is a lane that counts. [unitless]
    offset : float
        Where a thin lane's middle lies, from that of its lane. [lanes]

    Returns
    -------
    beside : Beside
        Without columns that hold anything where nothing is kept.
    """
    if kept is None:
        return Beside(None, axis, False, True, None, np.zeros((0, 2)), NO_LANES)
    blind, zones = blind_on(kept, computed.plan, which)
    alike = is_alike(computed, kept)
    return Beside(
        kept,
        axis,
        alike,
        same_coverage(computed, kept),
        blind,
        zones,
        _each(axis, blind, zones, computed.plan.n, with_top, offset) if alike else _alone(axis, zones),
    )


def _each(axis, blind, zones, n, with_top, offset):
    """Return a thin lane below each."""
    middle, top = middles(n)
    middle, top = middle + offset, np.array([top + offset])
    return {
        'kept-lanes': lane_bars(np.append(middle, top) if with_top else middle, axis),
        'kept-blind': lane_bars(middle, axis, blind.prf, blind.start, blind.stop),
        'kept-unseen': _zones(top, axis, zones if with_top else zones[:0]),
    }


def _alone(axis, zones):
    """Return one thin lane below all."""
    at = np.array([ALONE_AT])
    return {**NO_LANES, 'kept-lanes': lane_bars(at, axis), 'kept-unseen': _zones(at, axis, zones)}


def _zones(at, axis, zones):
    return lane_bars(at, axis, np.zeros(len(zones), dtype=int), zones[:, 0], zones[:, 1])
