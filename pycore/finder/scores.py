"""Exact visible shares of all sets that differ in one place, scored together.

With all PRFs but one held, both axes fall into segments with known patterns of
clear PRFs. A set sees what at least M of the held see, and also what exactly
M - 1 of them see where the PRF in the last place is clear as well:

    share(c) = held by M or more + Σ over pairs of patterns (P, Q) with M - 1 PRFs in both of  range_c(P) speed_c(Q)

range_c(P) is the length on which the held show pattern P and c is clear; it is a
sum of differences of c's running integral. (Derived here.) All terms are
positive, so that nothing is lost by cancelling.
"""

import numpy as np

from pycore.finder.tables import Ruler, Table

_WIDE = 128
"""Columns from which on adding up row by row beats one sum over all. [unitless]"""


class Scorer:
    """Shares of one region, for many candidates at a time.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]
    range_m, speed_m_s : pair of float
        The region. [m, m/s]
    """

    def __init__(self, limits, range_m, speed_m_s):
        self._m = limits.m
        self._rulers = Ruler(limits, range_m, False), Ruler(limits, speed_m_s, True)
        self._area = (range_m[1] - range_m[0]) * (speed_m_s[1] - speed_m_s[0])

    def tables(self, kind, counts):
        """Return the tables of a block of candidates, which scoring it again and again is quick with.

        Parameters
        ----------
        kind : int
            Place that they are for. [unitless]
        counts : int array, shape C
            PRIs. [clock counts]

        Returns
        -------
        tables : pair of Table
            Range and speed. [m, m/s]
        """
        return tuple(Table(ruler, kind, counts) for ruler in self._rulers)

    def shares(self, held, tables):
        """Return the visible share of every set that the held PRFs make with one candidate.

        Parameters
        ----------
        held : sequence of (int, int), length N - 1
            Place and PRI of each. [unitless, clock counts]
        tables : pair of Table
            Of the candidates. [m, m/s]

        Returns
        -------
        share : float array, shape C
            Exact, but for rounding. [unitless]
        """
        ranges, speeds = (
            _patterns(ruler, table, held, self._m - 1) for ruler, table in zip(self._rulers, tables, strict=True)
        )
        both = np.bitwise_count(ranges.pattern[:, None] & speeds.pattern)
        already = ranges.length @ (both >= self._m) @ speeds.length
        more = (both == self._m - 1).astype(float) @ speeds.clear
        return (already + np.einsum('pc,pc->c', ranges.clear, more)) / self._area


class _Patterns:
    """The patterns met on an axis: how long each is, and how much of it every candidate is clear on."""

    __slots__ = ('clear', 'length', 'pattern')

    def __init__(self, pattern, length, clear):
        self.pattern, self.length, self.clear = pattern, length, clear


def _patterns(ruler, table, held, least):
    """Cut an axis at the edges of the held PRFs and add up by pattern; patterns of fewer PRFs are left out."""
    row, position, pattern = _cut(ruler, table, held)
    length = position[1:] - position[:-1]
    kept = np.flatnonzero((length > 0.0) & (np.bitwise_count(pattern) >= least))
    kept = kept[pattern[kept].argsort(kind='stable')]
    pattern, length = pattern[kept], length[kept]
    first = np.flatnonzero(np.append(True, pattern[1:] != pattern[:-1]))[: pattern.size]
    clear = table.rows.take(row[kept + 1], axis=0)
    clear -= table.rows.take(row[kept], axis=0)
    return _Patterns(pattern[first], np.add.reduceat(length, first) if first.size else length, _summed(clear, first))


def _cut(ruler, table, held):
    """Return, in the order of the axis, the table's row at each edge, where it lies, and the patterns between."""
    edges = [ruler.edges(*one) for one in held]
    row = np.concatenate([np.arange(1), *table.at(held), np.arange(1, 2)])
    position = np.concatenate([ruler.axis[:1], *(position for position, _ in edges), ruler.axis[1:]])
    step = np.concatenate([np.zeros(1, dtype=np.int64), *(sign << bit for bit, (_, sign) in enumerate(edges))])
    order = position.argsort(kind='stable')
    # The upper end of the axis comes last whatever else ends there; it changes nothing.
    pattern = np.append(step, 0)[order].cumsum()[:-1]
    return row[order], position[order], pattern


def _summed(rows, first):
    """Add up runs of rows that begin at ``first``."""
    columns = rows.shape[1]
    total = np.empty((first.size, columns))
    if not first.size:
        return total
    if columns < _WIDE:
        run = np.zeros(rows.shape[0], dtype=np.intp)
        run[first[1:]] = columns
        at = run.cumsum()[:, None] + np.arange(columns)
        return np.bincount(at.ravel(), rows.ravel(), total.size).reshape(total.shape)
    last = [*first[1:].tolist(), rows.shape[0]]
    for out, start, stop in zip(total, first.tolist(), last, strict=True):
        np.add.reduce(rows[start:stop], axis=0, out=out)
    return total
