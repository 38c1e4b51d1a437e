"""The classes of the map of blind zones: what each cell is, never which colour it has.

Fewer than M clear PRFs is dark (none: hatched at 45 degrees), at least M is light;
the blind side of the M-of-N edge is drawn as a line. What clutter covers of that light
part is dotted.
"""

from functools import lru_cache

import numpy as np

NONE, NONE_HATCH, TOO_FEW, TOO_FEW_EDGE, JUST_ENOUGH, MORE, ALL, DOT = range(8)
"""Clear on none; its hatch; on too few; their edge; on exactly M; on more; on all N; under clutter. [unitless]"""

LOST, LOST_HATCH, GAINED, GAINED_DOT, STILL_BLIND = range(8, 13)
"""Against a kept plan: seen only by it, and its cross-hatching; seen only now, and its dots; by neither. [unitless]"""

NAMES = ('none', 'none-hatch', 'too-few', 'too-few-edge', 'just-enough', 'more', 'all', 'dot')
NAMES += ('lost', 'lost-hatch', 'gained', 'gained-dot', 'still-blind')
"""The classes' names, in the order of their codes. [unitless]"""

PITCH = 7
"""Distance of the hatch lines along a row. [px]"""

DOT_PITCH = 12
"""Distance of the dots along a row and between every second row. [px]"""

_DOT = 2
_CROSS_PITCH = 8
_GAINED_PITCH = 8


@lru_cache
def _class_of_count(n, m):
    """Return the class of every number of clear PRFs, as a table that bytes are translated by."""
    table = np.full(256, MORE, dtype=np.uint8)
    table[:m], table[m], table[n], table[0] = TOO_FEW, JUST_ENOUGH, ALL, NONE
    return table.tobytes()


def classes(count, n, m, with_clutter=None, fine=1):
    """Return the class of every cell.

    Parameters
    ----------
    count : uint8 array, shape (V, R)
        Number of clear PRFs. [unitless]
    n : int
        Number of PRFs. [unitless]
    m : int
        Number that must be clear. [unitless]
    with_clutter : uint8 array, shape (V, R), or None
        Number of PRFs that are clear of clutter too; none where there is no clutter. [unitless]
    fine : int
        Cells along each side of a pixel: hatch and dots stay as large as they are. [unitless]

    Returns
    -------
    code : uint8 array, shape (V, R)
        Index into ``NAMES``.
    """
    # Translating bytes is several times faster than looking each cell up in an array.
    code = np.frombuffer(bytearray(count.tobytes()).translate(_class_of_count(n, m)), np.uint8).reshape(count.shape)
    blind = count < m
    inner = np.ones_like(blind)
    inner[1:] &= blind[:-1]
    inner[:-1] &= blind[1:]
    inner[:, 1:] &= blind[:, :-1]
    inner[:, :-1] &= blind[:, 1:]
    row, column = (np.arange(cells) // fine % PITCH for cells in count.shape)
    code[(code == NONE) & inner & (row[:, None] == column)] = NONE_HATCH
    if m > 1:
        code[(code == TOO_FEW) & ~inner] = TOO_FEW_EDGE
    if with_clutter is not None:
        lost = (with_clutter < m) & ~blind
        code[lost & _dots(count.shape, fine)] = DOT
    return code


def changes(seen, kept):
    """Return the class of every cell against a kept plan: only what differs is marked.

    Parameters
    ----------
    seen, kept : bool array, shape (V, R)
        Whether the present plan sees the cell, and whether the kept one does. [unitless]

    Returns
    -------
    code : uint8 array, shape (V, R)
        Index into ``NAMES``: ``lost`` cross-hatched, ``gained`` dotted, ``still-blind``, and ``all`` for the rest.
    """
    code = np.full(seen.shape, ALL, dtype=np.uint8)
    code[~seen & ~kept] = STILL_BLIND
    lost, gained = kept & ~seen, seen & ~kept
    cross, dots = _marks(seen.shape)
    code[lost], code[gained] = LOST, GAINED
    code[lost & cross], code[gained & dots] = LOST_HATCH, GAINED_DOT
    return code


@lru_cache(maxsize=4)
def _marks(shape):
    """Return two lattices: lines at 45 degrees both ways, and dots, every second row of them moved by half a step."""
    row, column = np.arange(shape[0])[:, None], np.arange(shape[1])
    cross = ((row + column) % _CROSS_PITCH == 0) | ((row - column) % _CROSS_PITCH == 0)
    moved = column + (row // (_GAINED_PITCH // 2)) % 2 * (_GAINED_PITCH // 2)
    return cross, (row % (_GAINED_PITCH // 2) < _DOT) & (moved % _GAINED_PITCH < _DOT)


@lru_cache(maxsize=4)
def _dots(shape, fine):
    """Return a lattice of dots, every second row of them moved by half a step; kept, as a map keeps its size."""
    row, column = np.arange(shape[0])[:, None] // fine, np.arange(shape[1]) // fine
    moved = column + (row // (DOT_PITCH // 2)) % 2 * (DOT_PITCH // 2)
    return (row % (DOT_PITCH // 2) < _DOT) & (moved % DOT_PITCH < _DOT)
