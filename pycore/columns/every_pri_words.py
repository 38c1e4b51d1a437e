"""The words of the strip over every PRI: which would see the target, which for longest, and what the plan's own do."""

import math

import numpy as np

from pycore.columns.prf_names import prf_names
from pycore.wording import capitalised, count_word, listed, percent, significant, with_unit

_FEW = 3
_ALIKE = 1e-6


def words(computed, mark, found, axis, units):
    """Return caption, short caption, summary and table of the strip over every PRI.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    mark : Mark or None
        The target that is followed. [m, m/s]
    found : Every or None
        What each PRI makes of it. [SI]
    axis : PriAxis
        Of the PRI. [s]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    words : dict
        caption, short, summary, table; empty without a target.
    """
    if found is None:
        return {'caption': '', 'short': '', 'summary': '', 'table': None}
    first = _share(found, axis)
    rest = [*_longest(found, axis), _own(computed, found, units), _ALONE]
    return {
        'caption': ' '.join([first, *rest]),
        'short': first,
        'summary': f'What every {_noun(axis)} from {axis.span()} would make of the target. {" ".join([first, *rest])}',
        'table': _table(found, axis),
    }


_ALONE = 'Each is taken alone, with carrier, pulse and notch of the first; clutter is left out.'


def _noun(axis):
    return 'PRF' if axis.is_frequency else 'PRI'


def _share(found, axis):
    """Say how many of the PRIs see the target."""
    clear = found.each.clear
    span = f'{_noun(axis)}s from {axis.span()}'
    if clear.all():
        return f'All {span} would see this target.'
    if not clear.any():
        blind = [
            name
            for name, some in (('eclipsed', found.each.range_clear), ('in the notch', found.each.speed_clear))
            if not some.any()
        ]
        why = f': it is {listed(blind)} on every one' if blind else ''
        return f'No {_noun(axis)} from {axis.span()} would see this target{why}.'
    return f'{percent(float(clear.mean()))} of the {span} would see this target.'


def _longest(found, axis):
    """Say which PRI keeps the target clear longest."""
    best = found.each.longest
    if best is None:
        return []
    until = float(found.each.until_blind_s[best])
    if math.isinf(until):
        return ['It stands still: those that see it go on seeing it.']
    name, alike = axis.name(float(found.each.pri_s[best])), found.each.until_blind_s >= until * (1.0 - _ALIKE)
    others = ' and others' if alike.sum() > 1 else ''
    return [f'The longest that it stays clear is {with_unit(until, "s")}, on {name}{others}.']


def _own(computed, found, units):
    """Say what the plan's own PRIs do."""
    names = prf_names(computed.plan, units)
    own, n = found.own, len(names)
    if n > _FEW:
        clear = int(own.clear.sum())
        which = 'all' if clear == n else count_word(clear) if clear else 'none'
        return f"Of the plan's own {count_word(n)}, the upright lines, {which} {'does' if clear < 2 else 'do'}."
    said = listed(f'{name} {_does(own, i)}' for i, name in enumerate(names))
    return f"The plan's own, {'the upright line' if n == 1 else 'the upright lines'}: {said}."


def _does(own, i):
    if own.clear[i]:
        until = float(own.until_blind_s[i])
        return 'does' if math.isinf(until) else f'does for {with_unit(until, "s")}'
    blind = [
        name for name, clear in (('eclipsed', own.range_clear[i]), ('in the notch', own.speed_clear[i])) if not clear
    ]
    return f'does not ({listed(blind)})'


def _table(found, axis):
    """Return one row for each run of PRIs that are alike."""
    each = found.each
    state = each.range_clear.astype(int) + 2 * each.speed_clear
    first = np.flatnonzero(np.diff(state, prepend=-1))
    last = np.append(first[1:], state.size) - 1
    said = ('eclipsed and in the notch', 'in the notch', 'eclipsed', 'seen')
    rows = []
    for start, stop in zip(first.tolist(), last.tolist(), strict=True):
        until = float(each.until_blind_s[start : stop + 1].max())
        longest = 'no end' if math.isinf(until) else significant(until) if state[start] == 3 else ''
        ends = [axis.name(float(each.pri_s[at])) for at in (start, stop)]
        rows.append([*ends, capitalised(said[state[start]]), longest])
    return {'head': [f'{_noun(axis)} from', 'to', 'The target is', 'At most for (s)'], 'rows': rows}
