"""How a stagger answers at each speed: the part of the figure of blind speeds that dwells do not have."""

import numpy as np

from pycore.columns.answering_marks import inside, marked
from pycore.columns.blind_parts import gaps
from pycore.columns.named import names_at
from pycore.crossings import clear_speeds
from pycore.wording import THIN_SPACE, percent, significant, trimmed, with_unit

LOWEST_DB, HIGHEST_DB = -50.0, 10.0
"""Response at the bottom and the top of the figure, unless the least response asks for more. [dB]"""

_FEWEST, _MOST, _PER_STEP = 480, 1920, 1.0
_BAR_DB = 2.2
_ROOM_DB = 7.0
"""Room above the curve for the names of marked speeds. [dB]"""
_MOST_REPEATS = 200


def nothing():
    """Return the columns of a plan that is no stagger.

    Returns
    -------
    columns : dict
        All of them, empty.
    """
    empty = np.zeros(0)
    return {
        'response': {'x': empty, 'y': empty},
        'kept-response': {'x': empty, 'y': empty},
        'threshold': {'x0': empty, 'x1': empty, 'y': empty},
        'below': {'y': empty, 'left': empty, 'right': empty, 'height': empty},
        'speeds': {'x': empty, 'y0': empty, 'y1': empty},
        'dip': {'x': empty, 'y': empty},
        'names': names_at(empty, empty, [], []),
    }


def picture(computed, axis, kept=None):
    """Return columns, ranges, ticks and words of a stagger's response.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    axis : Axis
        Of radial speed. [m/s]
    kept : Computed or None
        What the kept plan gives. [SI]

    Returns
    -------
    picture : dict
        As a figure's, without its title.
    """
    least = float(computed.plan.response_min_db)
    low, high = min(LOWEST_DB, least - 20.0), max(HIGHEST_DB, least + 6.0)
    high += _ROOM_DB if inside(computed, axis, least) else 0.0
    step = 10 if high - low <= 80 else 20
    at = list(range(int(np.ceil(low / step)) * step, int(high) + 1, step))
    return {
        **_words(computed, axis, least, kept),
        'columns': {**_columns(computed, axis, least, low, high), 'kept-response': _kept_curve(kept, axis, low)},
        'ranges': {'x': axis.ends, 'y': [low, high]},
        'labels': {'x': axis.label, 'y': 'response (dB)'},
        'ticks': {'y': {'at': [float(value) for value in at], 'text': [significant(float(value), 2) for value in at]}},
    }


def _columns(computed, axis, least, low, high):
    speeds = _sampled(computed.response, axis.limits)
    level = computed.response.response.decibels(speeds)
    blind = gaps(computed.response.clear_speeds, 1, axis.limits)
    left, right = axis.ends
    count = blind.start.size
    return {
        'response': {'x': axis.shown(speeds), 'y': np.maximum(level, low - 10.0)},
        'threshold': {'x0': np.array([left]), 'x1': np.array([right]), 'y': np.array([least])},
        'below': {
            'y': np.full(count, low + _BAR_DB / 2),
            'left': axis.shown(blind.start),
            'right': axis.shown(blind.stop),
            'height': np.full(count, _BAR_DB),
        },
        **marked(computed, axis, least, low, high),
    }


def _kept_curve(kept, axis, low):
    """Return the kept stagger's response over the same speeds; none where the kept plan is a set of dwells."""
    if kept is None or not kept.is_stagger:
        return {'x': np.zeros(0), 'y': np.zeros(0)}
    speeds = _sampled(kept.response, axis.limits)
    return {'x': axis.shown(speeds), 'y': np.maximum(kept.response.response.decibels(speeds), low - 10.0)}


def _sampled(found, limits):
    """Return speeds close enough together for the curve, and among them those at which it repeats its zero."""
    steps = (limits[1] - limits[0]) / found.response.step_m_s
    even = np.linspace(*limits, int(np.clip(_PER_STEP * steps, _FEWEST, _MOST)) + 1)
    first, last = np.ceil(limits[0] / found.true_first_blind_m_s), np.floor(limits[1] / found.true_first_blind_m_s)
    if last - first > _MOST_REPEATS:
        return even
    return np.sort(np.concatenate((even, np.arange(first, last + 1) * found.true_first_blind_m_s)))


def _words(computed, axis, least, kept):
    found, limit = computed.response, f'{trimmed(least)}{THIN_SPACE}dB'
    sentences = [_first_fall(found, axis, limit), _repeat(found, axis), *_deepest(found, axis)]
    share = f'{percent(found.share_above)} of the speeds, {axis.span()}, stand at or above {limit}.'
    said = ' '.join([*sentences, share, *_dashed(kept, axis)])
    return {
        'caption': said,
        'short': sentences[0],
        'summary': f'Response of the stagger in decibels over the radial speed, {axis.span()}. {said}',
        'table': _table(computed, axis, kept),
    }


def _dashed(kept, axis):
    """Say what the dashed curve is, and what it reaches over the same speeds."""
    if kept is None:
        return []
    if not kept.is_stagger:
        return ['The kept plan is a set of dwells and has no response.']
    blind = _too_low(kept, axis)
    share = 1.0 - float((blind.stop - blind.start).sum()) / (axis.limits[1] - axis.limits[0])
    least = f'{trimmed(kept.plan.response_min_db)}{THIN_SPACE}dB'
    return [f'Dashed: the kept plan, at or above {least} over {percent(share)} of the same speeds.']


def _too_low(computed, axis):
    """Return the speeds of an axis at which a stagger's response is too low."""
    clear = clear_speeds(computed.response.response, computed.plan.response_min_db, axis.limits)
    return gaps(clear, 1, axis.limits)


def _first_fall(found, axis, limit):
    if not np.isfinite(found.notch_m_s):
        return f'The response never reaches {limit}.'
    if found.first_below_m_s is None:
        return f'Outside the notch around zero, the response never falls below {limit}.'
    beyond = f', beyond the notch around zero, {axis.text(found.notch_m_s)} wide to either side'
    fall = f'The response first falls below {limit} at {axis.text(found.first_below_m_s)}'
    return f'{fall}{beyond if found.notch_m_s > 0 else ""}.'


def _repeat(found, axis):
    what = 'The true first blind speed is' if found.is_blind else 'The response repeats at'
    ratio = significant(found.ratio_to_mean)
    return f'{what} {axis.text(found.true_first_blind_m_s)}, {ratio} times that of the mean PRI.'


def _deepest(found, axis):
    if found.deepest_db is None:
        return []
    return [f'The deepest dip is {with_unit(found.deepest_db, "dB")} at {axis.text(found.deepest_at_m_s)}.']


def _table(computed, axis, kept):
    """Return the speeds at which the response is too low, and those of the kept plan after them."""
    rows = _rows(computed, axis)
    head = [f'Response too low from ({axis.unit})', f'to ({axis.unit})']
    if kept is None or not kept.is_stagger:
        return {'head': head, 'rows': rows}
    both = [*(['this plan', *row] for row in rows), *(['kept plan', *row] for row in _rows(kept, axis))]
    return {'head': ['Plan', *head], 'rows': both}


def _rows(computed, axis):
    blind = _too_low(computed, axis)
    pairs = zip(axis.shown(blind.start).tolist(), axis.shown(blind.stop).tolist(), strict=True)
    return [[significant(start, 4), significant(stop, 4)] for start, stop in pairs]
