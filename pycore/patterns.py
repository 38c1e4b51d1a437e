"""The pattern of clear PRFs along one axis, and sums over sets of PRFs.

An axis is cut at every edge of every PRF's clear spans; each segment carries a
pattern of N bits, bit i set where PRF i is clear. A table over all 2^N sets of
PRFs (index = pattern) then holds how much of the axis belongs to each of them.
"""

from dataclasses import dataclass
from functools import lru_cache

import numpy as np

EDGE_TOLERANCE = 1e-9
"""Edges closer than this part of their axis are one edge. [unitless]"""

_BITS_AT_ONCE = 4

# In 64 bits, though a browser's engine counts in 32 unless told otherwise: sixteen PRFs and their floors need 33.
_BIT = 1 << np.arange(32, dtype=np.int64)


@dataclass(frozen=True, slots=True)
class Sweep:
    """One axis of the coverage, cut wherever a PRF becomes clear or blind.

    Parameters
    ----------
    edges : float array, shape E + 1
        Rising edges, from the lower limit of the axis to the upper one. [m or m/s]
    pattern : int array, shape E
        For each segment between two edges: bit i is set where PRF i is clear. [unitless]
    """

    edges: np.ndarray
    pattern: np.ndarray


def sweep(spans, limits):
    """Return an axis cut at every edge of the clear spans.

    Parameters
    ----------
    spans : Spans
        Clear intervals of all PRFs, inside the limits. [m or m/s]
    limits : tuple of two floats
        Lower and upper end of the axis. [m or m/s]

    Returns
    -------
    sweep : Sweep
        Segments with the pattern of PRFs that are clear on them; segments
        shorter than ``EDGE_TOLERANCE`` of the axis are left out, their length
        given to a neighbour.
    """
    low, high = limits
    count = spans.start.size
    edge = np.empty(2 * count + 2)
    edge[0], edge[1 : count + 1], edge[count + 1 : -1], edge[-1] = low, spans.start, spans.stop, high
    # Within one PRF spans are disjoint, so a running sum of bits switched on and off never carries into a neighbour.
    step = np.zeros(2 * count + 2, dtype=np.int64)
    step[1 : count + 1] = bit = _BIT[spans.prf]
    np.negative(bit, out=step[count + 1 : -1])
    order = edge.argsort()
    edge = edge[order]
    # The segment after the upper end does not exist; its edge stays.
    keep = np.ones(edge.size, dtype=bool)
    np.greater(edge[1:] - edge[:-1], EDGE_TOLERANCE * (high - low), out=keep[:-1])
    edges = edge[keep]
    edges[0] = low
    return Sweep(edges, step[order].cumsum()[keep][:-1])


def lengths(swept, n):
    """Return how much of an axis belongs to each pattern of clear PRFs.

    Parameters
    ----------
    swept : Sweep
        The axis. [m or m/s]
    n : int
        Number of PRFs. [unitless]

    Returns
    -------
    share : float array, shape 2^N
        Part of the axis on which exactly the PRFs of the index' bits are clear; sums to 1.
    """
    edges = swept.edges
    share = (edges[1:] - edges[:-1]) / (edges[-1] - edges[0])
    return np.bincount(swept.pattern.astype(np.intp, copy=False), share, 1 << n)


def clear_lengths(spans, n):
    """Return the length of each pattern of clear PRFs straight from the spans, the quick way.

    Parameters
    ----------
    spans : Spans
        Clear intervals of every PRF. [m or m/s]
    n : int
        Number of PRFs. [unitless]

    Returns
    -------
    length : float array, shape 2^N
        As ``lengths`` of a sweep, but in the axis' own unit, with the shortest segments left
        as they are and the stretches at both ends, on which no PRF is clear, left out. [m or m/s]
    """
    bit = _BIT[spans.prf]
    return lengths_between(np.concatenate((spans.start, spans.stop)), np.concatenate((bit, -bit)), n)


def lengths_between(edge, step, n):
    """Return the length of each pattern from edges in any order, each with the bit that it switches on or off.

    Parameters
    ----------
    edge : float array, shape K
        Where something changes. [m or m/s]
    step : int array, shape K
        2^i where PRF i becomes clear, -2^i where it becomes blind. [unitless]
    n : int
        Number of PRFs. [unitless]

    Returns
    -------
    length : float array, shape 2^N
        Between the first edge and the last. [m or m/s]
    """
    order = edge.argsort()
    edge = edge[order]
    # Edges in the same place come in any order, and the running sum may pass through patterns
    # that do not exist; they have no length, but must not point outside the table.
    pattern = step[order].cumsum()[:-1] & (1 << n) - 1
    return np.bincount(pattern.astype(np.intp, copy=False), edge[1:] - edge[:-1], 1 << n)


def over_supersets(table, n):
    """Return for each set of PRFs the sum of a table over all sets that contain it.

    Parameters
    ----------
    table : float array, shape (…, 2^N)
        One value for each set of PRFs, bits of the index. [any]
    n : int
        Number of PRFs. [unitless]

    Returns
    -------
    sums : float array, shape (…, 2^N)
        ``sums[S] = sum of table[P] over P containing S``.
    """
    return _each_group(table, n, 1.0)


def exactly(table, n):
    """Return what ``over_supersets`` was made from: Moebius inversion over supersets.

    Parameters
    ----------
    table : float array, shape (…, 2^N)
        Sums over supersets. [any]
    n : int
        Number of PRFs. [unitless]

    Returns
    -------
    parts : float array, shape (…, 2^N)
        One value for each exact set of PRFs.
    """
    return _each_group(table, n, -1.0)


def _each_group(table, n, sign):
    """Apply [[1, sign], [0, 1]] along every bit of the last axis, a few bits at a time.

    A few bits at a time because each call of numpy costs more than the sums themselves
    for the usual eight PRFs. Every step takes the lowest bits to the top, so that after
    the last one they are all in their places again.
    """
    shape = np.shape(table)
    for bits in _groups(n):
        table = _bit_matrix(bits, sign) @ table.reshape(*shape[:-1], -1, 1 << bits).swapaxes(-1, -2)
    return table.reshape(shape)


@lru_cache
def _groups(n):
    """Split N bits into as few groups of at most four as there can be, about equal."""
    parts = -(-n // _BITS_AT_ONCE)
    return tuple(n * (i + 1) // parts - n * i // parts for i in range(parts))


@lru_cache
def _bit_matrix(bits, sign):
    """Return the Kronecker power of [[1, sign], [0, 1]]."""
    matrix = np.ones((1, 1))
    for _ in range(bits):
        matrix = np.kron(matrix, np.array([[1.0, sign], [0.0, 1.0]]))
    return matrix
