"""Lines of the target's own rotor or propeller among the Doppler filters: where they land, and on which PRFs they fold.

They reach so far to either side of the body; what lands a blind speed away is folded.
Without a followed target the body stands still, as something that hovers does.
"""

import math

import numpy as np

from pycore.columns.looks import all_of
from pycore.columns.named import names_at
from pycore.wording import THIN_SPACE, count_word, listed, trimmed

_FEW = 3
_NONE = {side: np.zeros(0) for side in ('left', 'right', 'bottom', 'top')}


def strips(computed, heard, axis, foot, height):
    """Return the strips along the lanes, those of the lines where they are and those of folded ones, and their name.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    heard : sequence of Lane
        What the lanes show. [unitless]
    axis : Axis
        Of apparent speed. [m/s]
    foot : sequence of float, as many as lanes
        Where the strip stands in each lane. [lanes]
    height : float
        Height of a strip. [lanes]

    Returns
    -------
    columns : dict
        ``rotor`` and ``rotor-folded``, each with left, right, bottom, top, and ``rotor-name``. [shown unit, lanes]
    """
    spread = computed.plan.target.own_spread_m_s
    if not spread or computed.is_stagger:
        return {'rotor': _NONE, 'rotor-folded': _NONE, 'rotor-name': names_at([], [], [], [])}
    found = {'rotor': [], 'rotor-folded': []}
    for lane, bottom in zip(heard, foot, strict=True):
        for fold, low, high in _pieces(lane, spread):
            name = 'rotor-folded' if fold else 'rotor'
            found[name].append((axis.shown(low), axis.shown(high), bottom, bottom + height))
    left, _, _, top = found['rotor'][0]
    return {
        **{name: dict(zip(_NONE, np.reshape(pieces, (-1, 4)).T.copy(), strict=True)) for name, pieces in found.items()},
        'rotor-name': names_at([left], [top], ['rotor lines'], ['bottom_left'], 2.0, -1.0),
    }


def _pieces(lane, spread):
    """Yield how often each piece of the lines is folded, and its ends within the lane."""
    half, body = 0.5 * float(lane.cpi.blind_speed_m_s), lane.target[0] if lane.target else 0.0
    # Where they fill the lane more than once, more folds would show nothing new.
    low, high = max(body - spread, body - 4.0 * half), min(body + spread, body + 4.0 * half)
    for fold in range(math.floor(low / half / 2.0 + 0.5), math.ceil(high / half / 2.0 - 0.5) + 1):
        a, b = max(low - 2.0 * half * fold, -half), min(high - 2.0 * half * fold, half)
        if a < b:
            yield fold, a, b


def rotor_words(computed, names, axis, mark):
    """Say what the strips are, and on which PRFs the lines fold onto the body.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    names : sequence of str, length N
        Names of all PRFs. [unitless]
    axis : Axis
        Of apparent speed. [m/s]
    mark : Mark or None
        The target that is followed. [m, m/s]

    Returns
    -------
    sentences : list of str
        One, or none where the target has no such lines.
    """
    folds = computed.rotor_folds
    if folds is None:
        return []
    reach = f'{trimmed(axis.shown(computed.plan.target.own_spread_m_s))}{THIN_SPACE}{axis.unit}'
    body = 'the target' if mark is not None else 'a body that stands still'
    on = 'fold onto the body' if computed.plan.n == 1 else f'fold onto the body on {_prfs(names, folds)}'
    if not folds.any():
        on = 'do not fold onto the body'
    return [
        f'Striped, leaning where folded: lines of a rotor or propeller, {reach} to either side of {body}; they {on}.'
    ]


def _prfs(names, folds):
    every, at = len(names), np.flatnonzero(folds).tolist()
    if len(at) == every:
        return f'{all_of(every)} PRFs'
    return listed(names[i] for i in at) if len(at) <= _FEW else f'{count_word(len(at))} of the {count_word(every)} PRFs'
