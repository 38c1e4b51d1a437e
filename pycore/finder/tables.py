"""How much of an axis each PRI of a block is clear on, between any of the edges of others.

The running integral of a PRI's clear length has a closed form, because its clear
window repeats. A search asks for it again and again at the edges of the few PRIs
that it holds: one row for each edge, one column for each PRI of the block, kept
in a table of limited size.
"""

import numpy as np

from pycore.eclipsing import clear_comb, clear_ranges
from pycore.stagger import notch_clear_speeds, notch_comb

_MOST_TABLE_BYTES = 96_000_000


class Ruler:
    """One axis of a region, and how every PRI is clear along it.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]
    axis : pair of float
        Lower and upper end. [m or m/s]
    of_speed : bool
        Whether it is the axis of radial speed. [unitless]
    """

    def __init__(self, limits, axis, of_speed):
        self.limits, self.axis, self.of_speed = limits, axis, of_speed
        self._edges = {}

    def spans(self, kind, counts):
        """Return the clear spans of PRIs in one place.

        Parameters
        ----------
        kind : int
            Place. [unitless]
        counts : int array, shape C
            PRIs. [clock counts]

        Returns
        -------
        spans : Spans
            Exactly those that a plan of these PRIs would have. [m or m/s]
        """
        pri_s, each, place, limits = self._one(kind, counts)
        if self.of_speed:
            return notch_clear_speeds(place.wavelength_m / (2.0 * pri_s), place.notch_m_s * each, self.axis)
        shut = limits.recovery_s, limits.guard_s, limits.received_min
        return clear_ranges(pri_s, place.pulse_s * each, *shut, self.axis, limits.near)

    def edges(self, kind, count):
        """Return where one PRI becomes clear (+1) and blind (-1).

        Parameters
        ----------
        kind : int
            Place. [unitless]
        count : int
            PRI. [clock counts]

        Returns
        -------
        position : float array, shape E
            First all starts, then all stops. [m or m/s]
        step : int array, shape E
            1 or -1. [unitless]
        """
        found = self._edges.get((kind, count))
        if found is None:
            spans = self.spans(kind, np.array([count]))
            one = np.ones(spans.start.size, dtype=np.int64)
            found = np.concatenate((spans.start, spans.stop)), np.concatenate((one, -one))
            if len(self._edges) > 50_000:
                self._edges.clear()
            self._edges[kind, count] = found
        return found

    def integral(self, kind, counts):
        """Return a function that gives the clear length of each PRI up to any positions, but for a constant.

        Parameters
        ----------
        kind : int
            Place. [unitless]
        counts : int array, shape C
            PRIs. [clock counts]

        Returns
        -------
        integral : callable
            From positions, shape E, to lengths, shape (E, C). [m or m/s]
        """
        if self.limits.near is not None and not self.of_speed:
            return _looked_up(self.spans(kind, counts), len(counts), self.axis)
        pri_s, each, place, limits = self._one(kind, counts)
        if self.of_speed:
            return _repeating(notch_comb(place.wavelength_m / (2.0 * pri_s), place.notch_m_s * each))
        shut = limits.recovery_s, limits.guard_s, limits.received_min
        return _repeating(clear_comb(pri_s, place.pulse_s * each, *shut))

    def _one(self, kind, counts):
        pri_s = np.asarray(counts, dtype=np.int64) / float(self.limits.clock_hz)
        return pri_s, np.ones(pri_s.size), self.limits.places[kind], self.limits


def _repeating(comb):
    """Return the running integral of an interval that repeats, for each of C PRIs."""
    start, period = comb.start, comb.period
    long = np.maximum(comb.stop - start, 0.0)

    def lengths(position):
        since = np.subtract.outer(position, start)
        whole = np.floor(since / period)
        since -= whole * period
        np.minimum(since, long, out=since)
        whole *= long
        return np.add(since, whole, out=since)

    return lengths


def _looked_up(spans, columns, axis):
    """Return the running integral of any clear spans, for each of C PRIs."""
    low, high = axis
    # One PRI's axis after the other, so that one search serves all; the little that rounding shifts an end by does
    # not matter, because the integral has no jumps.
    shift = 2.0 * (high - low) * spans.prf
    start, length = spans.start - low + shift, spans.stop - spans.start
    before = np.append(0.0, length.cumsum())
    first = np.searchsorted(spans.prf, np.arange(columns))

    def lengths(position):
        place = np.add.outer(position - low, 2.0 * (high - low) * np.arange(columns))
        at = np.searchsorted(start, place, 'right')
        inside = at > first
        last = np.where(inside, at - 1, 0)
        part = np.minimum(place - start[last], length[last]) if start.size else place
        return np.where(inside, before[last] - before[first] + part, 0.0)

    return lengths


class Table:
    """Rows of a block's running integrals, at the ends of the axis and at the edges of the PRIs that were asked for.

    Parameters
    ----------
    ruler : Ruler
        The axis. [m or m/s]
    kind : int
        Place that the block's PRIs are for. [unitless]
    counts : int array, shape C
        The block. [clock counts]
    """

    def __init__(self, ruler, kind, counts):
        self._ruler, self._integral = ruler, ruler.integral(kind, counts)
        self._most = max(64, _MOST_TABLE_BYTES // (8 * max(len(counts), 1)))
        self.rows = np.empty((min(self._most, 512), len(counts)))
        self._forget()

    def _forget(self):
        self.rows[:2] = self._integral(np.array(self._ruler.axis))
        self._used, self._at = 2, {}

    def at(self, held):
        """Return which rows belong to the edges of some PRIs.

        Parameters
        ----------
        held : sequence of (int, int)
            Place and PRI of each. [unitless, clock counts]

        Returns
        -------
        rows : list of int array
            For each, the numbers of its rows, in the order of ``Ruler.edges``. [unitless]
        """
        if not self._make(held):
            self._forget()
            self._make(held)
        return [self._at[one] for one in held]

    def _make(self, held):
        """Make the rows that are missing, or say that there is no room for them."""
        for one in held:
            if one in self._at:
                continue
            position, _ = self._ruler.edges(*one)
            if self._at and self._used + position.size > self._most:
                return False
            self._grow(self._used + position.size)
            self.rows[self._used : self._used + position.size] = self._integral(position)
            self._at[one] = np.arange(self._used, self._used + position.size)
            self._used += position.size
        return True

    def _grow(self, needed):
        if needed > self.rows.shape[0]:
            more = np.empty((max(needed, min(2 * self.rows.shape[0], self._most)), self.rows.shape[1]))
            more[: self._used] = self.rows[: self._used]
            self.rows = more
