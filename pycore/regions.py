"""Connected regions of a grid of cells: runs along the rows, joined from row to row.

Cells that share an edge belong together; cells that only share a corner do not.
Nothing is done cell by cell: every row is taken as runs of true cells, and runs
of neighbouring rows that overlap are joined by union-find over the runs, hooking
every root under a smaller one and then shortening all chains at once, until
nothing changes.
"""

from dataclasses import dataclass

import numpy as np

_CELLS_AT_ONCE = 2_000_000


@dataclass(frozen=True, slots=True)
class Runs:
    """Runs of true cells, row by row.

    Parameters
    ----------
    row : int array, shape K
        Rising. [unitless]
    start : int array, shape K
        First column. [unitless]
    stop : int array, shape K
        Column after the last. [unitless]
    """

    row: np.ndarray
    start: np.ndarray
    stop: np.ndarray


def blocks(shape):
    """Return slices of rows of not too many cells, so that no passing array grows beyond some megabytes.

    Parameters
    ----------
    shape : tuple of two ints
        Rows and columns. [unitless]

    Returns
    -------
    rows : list of slice
        Together all rows.
    """
    step = max(1, _CELLS_AT_ONCE // shape[1])
    return [slice(row, min(row + step, shape[0])) for row in range(0, shape[0], step)]


def runs(cells):
    """Return the runs of true cells in every row.

    Parameters
    ----------
    cells : bool array, shape (rows, columns)
        The grid; at least one row. [unitless]

    Returns
    -------
    runs : Runs
        In rising order of row and column.
    """
    found = []
    for rows in blocks(cells.shape):
        padded = np.zeros((rows.stop - rows.start, cells.shape[1] + 2), dtype=bool)
        padded[:, 1:-1] = cells[rows]
        at = np.flatnonzero(padded[:, 1:] != padded[:, :-1])
        row, column = np.divmod(at, cells.shape[1] + 1)
        found.append((row[::2] + rows.start, column[::2], column[1::2]))
    return Runs(*(np.concatenate(part) for part in zip(*found, strict=True)))


def connected(some, columns):
    """Return which region each run belongs to.

    Parameters
    ----------
    some : Runs
        All runs of a grid. [unitless]
    columns : int
        Columns of the grid. [unitless]

    Returns
    -------
    region : int array, shape K
        Number of each run's region, from 0.
    count : int
        How many regions there are.
    """
    below, above = _overlaps(some, columns + 1)
    root = np.arange(some.row.size)
    while True:
        one, other = root[below], root[above]
        apart = one != other
        if not apart.any():
            break
        below, above, one, other = below[apart], above[apart], one[apart], other[apart]
        np.minimum.at(root, np.maximum(one, other), np.minimum(one, other))
        while (root[root] != root).any():
            root = root[root]
    heads, region = np.unique(root, return_inverse=True)
    return region, heads.size


def _overlaps(some, width):
    """Pair every run with those of the next row that share more than a corner with it."""
    first = np.searchsorted(some.row * width + some.stop, (some.row + 1) * width + some.start, 'right')
    after = np.searchsorted(some.row * width + some.start, (some.row + 1) * width + some.stop, 'left')
    many = after - first
    below = np.repeat(np.arange(many.size), many)
    above = np.arange(below.size) + np.repeat(first - many.cumsum() + many, many)
    return below, above


def run_at(some, columns, row, column):
    """Return the run that holds each of some true cells.

    Parameters
    ----------
    some : Runs
        All runs of a grid. [unitless]
    columns : int
        Columns of the grid. [unitless]
    row, column : int array, shape Q
        True cells. [unitless]

    Returns
    -------
    run : int array, shape Q
        Index of the run.
    """
    width = columns + 1
    return np.searchsorted(some.row * width + some.start, row * width + column, 'right') - 1


def all_through(cells, first, last):
    """Return in which columns every cell of a window of rows is true.

    Parameters
    ----------
    cells : bool array, shape (rows, columns)
        The grid. [unitless]
    first, last : int array, shape W
        First row of each window and the row after its last, both rising. [unitless]

    Returns
    -------
    true : bool array, shape (W, columns)
        One row for each window.
    """
    top = first[0]
    count = np.zeros((last[-1] - top + 1, cells.shape[1]), dtype=np.int32)
    np.cumsum(cells[top : last[-1]], axis=0, out=count[1:])
    return count[last - top] - count[first - top] == (last - first)[:, None]
