"""Figure: the speeds at which each PRF is blind, or how a stagger answers at each speed; or a map over what is moved.

Sources: for dwells ``lanes``, ``notches`` (of each PRF), ``unseen`` (clear on fewer
than M); for a stagger ``response``, ``threshold``, ``below`` (where the response is
too low), ``speeds`` (marked speeds), ``dip`` and their names; of the kept plan ``kept-lanes``,
``kept-blind`` and ``kept-unseen``, or ``kept-response``; for a map ``map``, ``own``, ``true-blind``
(:mod:`pycore.columns.speed_map`); ``target``. Those of the other kinds are empty.
"""

from functools import partial

import numpy as np

from pycore.columns import answering, speed_map
from pycore.columns.axes import speed_axis
from pycore.columns.blind_parts import avoidable, gaps, outside, within, zones
from pycore.columns.kept_lanes import NO_LANES, beside
from pycore.columns.lanes import lane_bars, lane_range, lane_ticks, middles
from pycore.columns.looks import looks
from pycore.columns.mark import across
from pycore.columns.prf_names import prf_names
from pycore.columns.speed_rows import offered, shown_up
from pycore.columns.speed_scales import choice, scale
from pycore.columns.view import WHOLE
from pycore.columns.zone_sentences import zones_sentence
from pycore.wording import THIN_SPACE, listed, percent, significant

NAME, TITLE = 'blind-speeds', 'Blind speeds'

_KEPT_AT = -0.41
_NO_BARS = {'y': np.zeros(0), 'left': np.zeros(0), 'right': np.zeros(0)}


def picture(computed, units, size=None, view=WHOLE):
    """Return the figure of blind speeds.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    size : mapping or None
        Width and height of the plot, for a map. [px]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    picture : dict
        Columns, ranges, labels, ticks and words.
    """
    axis, up = speed_axis(computed.plan.speed_m_s, units), shown_up(computed, view.up)
    answer = _own(computed, axis, units, view.kept) if up == 'own' else _map(computed, axis, units, up, size, view.kept)
    label, ticks = scale(computed, axis, view.axis, moves=up)
    answer['labels']['x'], answer['ticks']['x'] = label, ticks
    answer['choices'] = [choice(view.axis), _choice_up(computed, units, up)]
    answer['columns']['target'] = across(view.mark and view.mark.speed_m_s, axis, answer['ranges']['y'])
    return answer


def _choice_up(computed, units, up):
    pairs = [list(pair) for pair in offered(computed, units)]
    return {'name': 'up', 'said': 'Up the axis', 'now': up, 'of': pairs}


def _own(computed, axis, units, kept):
    answer = (_of_stagger if computed.is_stagger else _of_dwells)(computed, axis, units, kept)
    answer['columns'] |= speed_map.nothing()
    return answer


def _map(computed, axis, units, up, size, kept):
    answer = {'title': TITLE, **speed_map.picture(computed, axis, units, up, size, kept)}
    empty = {'lanes': _NO_BARS, 'notches': _NO_BARS, 'unseen': _NO_BARS, **NO_LANES, **answering.nothing()}
    answer['columns'] = {**empty, **answer['columns']}
    return answer


def _of_stagger(computed, axis, units, kept):
    answer = answering.picture(computed, axis, kept)
    answer['columns'] |= {'lanes': _NO_BARS, 'notches': _NO_BARS, 'unseen': _NO_BARS, **NO_LANES}
    return {'title': TITLE, **answer, 'units': {'x': axis.unit}}


def _of_dwells(computed, axis, units, kept):
    plan = computed.plan
    names = prf_names(plan, units)
    notches = gaps(computed.prf_speeds, plan.n, plan.speed_m_s)
    unseen = zones(computed.speed_sweep, plan.n, plan.m)
    counted = f'{plan.m} of {plan.n}' if plan.n > 1 else None
    thin = beside(computed, kept, 1, axis, plan.n > 1, _KEPT_AT)
    return {
        'title': TITLE,
        **_words(computed, axis, names, notches, unseen, thin, units),
        'columns': {**_lanes(plan, axis, notches, unseen), **thin.columns, **answering.nothing()},
        'ranges': {'x': axis.ends, 'y': thin.lower(lane_range(plan.n, plan.n > 1))},
        'labels': {'x': axis.label, 'y': ''},
        'units': {'x': axis.unit},
        'ticks': {'y': thin.ticks(lane_ticks(names, counted))},
    }


def _lanes(plan, axis, notches, unseen):
    middle, top = middles(plan.n)
    every, bars = (np.append(middle, top), unseen) if plan.n > 1 else (middle, unseen[:0])
    return {
        'lanes': lane_bars(every, axis),
        'notches': lane_bars(middle, axis, notches.prf, notches.start, notches.stop),
        'unseen': lane_bars(np.array([top]), axis, np.zeros(len(bars), dtype=int), bars[:, 0], bars[:, 1]),
    }


def _words(computed, axis, names, notches, unseen, thin, units):
    said = looks(computed.looks, computed.m, 'blind')
    found, floor = avoidable(computed.sight, 1)
    where = 'outside the notch around zero' if len(floor) else ''
    everywhere, whole = within(notches, floor, axis.limits), outside(axis.limits, floor)
    first = zones_sentence(found, axis, 'speed', said, everywhere, whole, where)
    against = thin.sentences(unseen, 'the notch around zero' if len(floor) else '')
    return {
        'caption': ' '.join([first, _first_blind_speeds(computed, axis), *against]),
        'short': first,
        'summary': ' '.join([_summary(computed, axis, names, unseen), *against]),
        'table': thin.table(_table(computed, axis, names, notches), partial(_rows, axis), units),
    }


def _first_blind_speeds(computed, axis):
    """Say where the single PRFs have their first blind speeds, and what weather practice would call it."""
    speeds, first = np.unique(axis.shown(computed.blind_speed_m_s), return_index=True)
    if speeds.size == 1:
        lead = 'The first blind speed is' if computed.plan.n == 1 else 'Each PRF has its first blind speed at'
        shown = significant(speeds[0])
    elif speeds.size <= 3:
        lead, shown = (
            'The PRFs have their first blind speeds at',
            listed(significant(speed) for speed in speeds[first.argsort()]),
        )
    else:
        lead, shown = (
            'The PRFs have their first blind speeds',
            f'from {significant(speeds[0])} to {significant(speeds[-1])}',
        )
    return f'{lead} {shown}{THIN_SPACE}{axis.unit}.'


def _summary(computed, axis, names, unseen):
    """Describe the whole figure for someone who does not see it."""
    lost = ', '.join(
        f'{name} {percent(float(share))}' for name, share in zip(names, computed.notched_shares, strict=True)
    )
    said = '; '.join(axis.interval(*zone) for zone in unseen[:12])
    more = f'; and {len(unseen) - 12} more' if len(unseen) > 12 else ''
    counted = f'Clear on too few: {said}{more}.' if said else 'No speed is clear on too few.'
    return (
        f'One lane for each PRF along the radial speed, {axis.span()}, dark in the Doppler notch and its repeats; '
        f'on top the lane that counts. Blind part of the speeds: {lost}. {counted}'
    )


def _table(computed, axis, names, notches):
    """Return one row for each PRF: first blind speed, Nyquist speed, what it loses, and its blind speeds."""
    head = ['PRF', f'First blind speed ({axis.unit})', f'Nyquist speed ({axis.unit})', 'Blind', 'Blind speeds']
    return {'head': head, 'rows': _rows(axis, computed, names, notches)}


def _rows(axis, computed, names, notches):
    rows, whole = [], axis.limits[1] - axis.limits[0]
    for prf, name in enumerate(names):
        start, stop = notches.of(prf)
        found = [axis.interval(*zone) for zone in zip(start[:6].tolist(), stop[:6].tolist(), strict=True)]
        more = [f'{start.size - 6} more'] if start.size > 6 else []
        blind = float(axis.shown(computed.blind_speed_m_s[prf]))
        lost = percent(float((stop - start).sum()) / whole)
        nyquist = f'±{THIN_SPACE}{significant(blind / 2)}'
        rows.append([name, significant(blind), nyquist, lost, '; '.join(found + more) or 'none'])
    return rows
