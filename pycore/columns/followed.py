"""One target followed through, in words for the page: a sentence, and a table of what each PRF makes of it."""

import math

from pycore.columns.axes import range_axis, speed_axis
from pycore.columns.looks import all_of
from pycore.columns.prf_names import prf_names
from pycore.wording import capitalised, count_word, listed, percent, plural, significant, with_unit

REASONS = {'eclipsed': 'eclipsed', 'notch': 'in the notch', 'clutter': 'under clutter'}
"""Why a PRF does not see a target, as it stands after ``is``. [unitless]"""

_MOST_GHOSTS = 3
_LEAST = 0.0005
_RANGE, _SPEED, _CHANCE = 'Appears at ({x})', 'Apparent speed ({y})', 'Probability of detection'


def words(mark, units):
    """Return all that a page shows of a followed target.

    Parameters
    ----------
    mark : Mark
        The target. [m, m/s]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    target : dict
        ``range_km`` and ``speed_mps``; ``text``, two or three sentences, and ``rest``, the same
        after range and speed; ``seen``; ``head`` and ``rows`` of the table.
    """
    plan = mark.computed.plan
    x, y = range_axis(plan.range_m, units), speed_axis(plan.speed_m_s, units)
    parts = _parts(mark.computed)
    rest = ' '.join([_verdict(mark), *_outside(mark, x, y), _detected(mark), *_ghosts(mark, x, y)])
    return {
        **mark.target,
        'text': f'A target at {place(mark, x, y)}, {rest}',
        'rest': rest,
        'seen': mark.followed.seen,
        'head': [part.format(x=x.unit, y=y.unit) for part in parts],
        'rows': [
            [cells[part] for part in parts]
            for cells in (
                _cells(one, name, x, y) for one, name in zip(mark.followed.prfs, prf_names(plan, units), strict=True)
            )
        ],
    }


def place(mark, x, y):
    """Return where a target is and how it moves, in words.

    Parameters
    ----------
    mark : Mark
        The target. [m, m/s]
    x, y : Axis
        Of range and of radial speed. [m, m/s]

    Returns
    -------
    text : str
        Such as ``'84.2 km, closing at 183 m/s'``.
    """
    return f'{x.text(mark.range_m)}, {moving(mark.speed_m_s, y)}'


def moving(speed_m_s, axis):
    """Return how a target moves along the beam, in words.

    Parameters
    ----------
    speed_m_s : float
        Radial speed, positive closing. [m/s]
    axis : Axis
        Of radial speed. [m/s]

    Returns
    -------
    text : str
        Closing or receding, or without radial speed.
    """
    if speed_m_s == 0:
        return 'without radial speed'
    return f'{"closing" if speed_m_s > 0 else "receding"} at {axis.text(abs(speed_m_s))}'


def _verdict(mark):
    computed, found = mark.computed, mark.followed
    lead = f'is {"seen" if found.seen else "not seen"}'
    if computed.is_stagger:
        return f'{lead} by the stagger.'
    if computed.plan.n == 1:
        why = '' if found.seen else f': it is {listed(REASONS[reason] for reason in found.prfs[0].reasons)}'
        return f'{lead}{why}.'
    n = computed.plan.n
    clear = (
        'no PRF'
        if not found.clear
        else all_of(n)
        if found.clear == n
        else f'{count_word(found.clear)} of the {count_word(n)}'
    )
    clear += ' PRFs' if found.clear else ''
    return f'{lead}: it is clear on {clear} and must be on {count_word(computed.m)}.'


def _detected(mark):
    return f'By its strength it is detected with probability {_chance(mark.followed.probability)}.'


def _ghosts(mark, x, y):
    """Say what else the PRFs that see the target would take it for."""
    ghosts = mark.followed.ghosts
    if ghosts is None:
        return []
    if not ghosts:
        return ['Nothing else in the coverage would be taken for it.']
    where = [f'{x.interval(*ghost.range_m)} with {y.interval(*ghost.speed_m_s)}' for ghost in ghosts[:_MOST_GHOSTS]]
    if len(ghosts) > _MOST_GHOSTS:
        return [f'{capitalised(count_word(len(ghosts)))} ghosts in the coverage, such as {where[0]}.']
    return [f'{capitalised(count_word(len(ghosts)))} {plural(len(ghosts), "ghost")}: {listed(where)}.']


def _outside(mark, x, y):
    """Say where the target lies outside the coverage."""
    inside = [low <= value <= high for value, (low, high) in ((mark.range_m, x.limits), (mark.speed_m_s, y.limits))]
    return [] if all(inside) else ['It lies outside the coverage.']


def _parts(computed):
    """Return the table's columns; the intervals of a stagger have no verdict of their own."""
    if computed.is_stagger:
        return ['PRF', _RANGE, 'Received']
    signal = ['Clutter at its gate', 'S/N (dB)', 'S/(N + C) (dB)'] if computed.echoes.patches else ['S/N (dB)']
    return ['PRF', _RANGE, _SPEED, 'Received', 'Notch', *signal, _CHANCE, 'Seen']


def _cells(one, name, x, y):
    """Return what one PRF makes of the target, by column."""
    heard = [f'{patch} {with_unit(level, "dB")}' for patch, level in one.clutter_db.items()]
    return {
        'PRF': name,
        _RANGE: significant(float(x.shown(one.apparent_range_m))),
        _SPEED: significant(float(y.shown(one.apparent_speed_m_s))),
        'Received': percent(one.received),
        'Notch': 'in it' if one.in_notch else 'clear',
        'Clutter at its gate': listed(heard) or 'none',
        'S/N (dB)': _decibels(one.snr_db),
        'S/(N + C) (dB)': _decibels(one.scnr_db),
        _CHANCE: _chance(one.probability),
        'Seen': f'no, {listed(REASONS[reason] for reason in one.reasons)}' if one.reasons else 'yes',
    }


def _chance(probability):
    if _LEAST <= probability <= 1.0 - _LEAST:
        return significant(probability)
    return f'below {_LEAST}' if probability < _LEAST else f'above {1.0 - _LEAST}'


def _decibels(level):
    return significant(level) if math.isfinite(level) else 'none'
