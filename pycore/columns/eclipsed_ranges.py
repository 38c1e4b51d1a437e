"""Figure: which ranges each PRF receives, how much of the echo, and which of them enough PRFs receive.

Sources: ``lanes`` (a bar along each lane), ``eclipsed`` (on each PRF), ``unseen``
(on fewer than M), ``received`` (the received share, its area and its edge) with
``least`` (what counts as clear); ``kept-lanes``, ``kept-blind`` and ``kept-unseen`` (of the
kept plan, in place of the share); ``target``.
"""

from functools import partial

import numpy as np

from pycore.columns.axes import range_axis
from pycore.columns.blind_parts import avoidable, gaps, outside, within, zones
from pycore.columns.kept_lanes import beside
from pycore.columns.lanes import lane_bars, lane_range, lane_ticks, middles
from pycore.columns.looks import cycle_looks, looks
from pycore.columns.mark import across
from pycore.columns.prf_names import prf_names
from pycore.columns.received import is_legible, received, scale_ticks, share_sentence
from pycore.columns.view import WHOLE
from pycore.columns.zone_sentences import zones_sentence
from pycore.wording import count_word, percent, significant

NAME, TITLE = 'eclipsed-ranges', 'Eclipsed ranges'

SIZE = {'width': 560, 'height': 270}
"""The plot where the page has not said how large it is. [px]"""

SHARED, ALONE = 0.34, 0.62
"""Height of a bar that has the share under it, and of one that has not. [lanes]"""

_BAR_AT = 0.26
_KEPT_AT = -0.41


def picture(computed, units, size=None, view=WHOLE):
    """Return the figure of eclipsed ranges.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    size : mapping or None
        Width and height of the plot, which say whether the received share can be read. [px]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    picture : dict
        Columns, ranges, labels, ticks and words.
    """
    plan, axis = computed.plan, range_axis(computed.plan.range_m, units)
    names = prf_names(plan, units)
    eclipsed = gaps(computed.prf_ranges, plan.n, plan.range_m)
    unseen = zones(computed.range_sweep, computed.looks, computed.m)
    counted = None if plan.n == 1 else 'all intervals' if computed.is_stagger else f'{plan.m} of {plan.n}'
    thin, size = beside(computed, view.kept, 0, axis, counted is not None, _KEPT_AT), size or SIZE
    lanes = thin.lower(lane_range(plan.n, counted is not None))
    shared = view.kept is None and is_legible(plan, axis, size['width'])
    ticks = _ticks(plan.n, lane_ticks(names, counted), lanes, size['height'] if shared else 0.0)
    return {
        'title': TITLE,
        **_words(computed, axis, names, eclipsed, unseen, shared, thin, units),
        'columns': {
            **_columns(computed, axis, eclipsed, unseen, counted is not None, shared),
            **thin.columns,
            'target': across(view.mark and view.mark.range_m, axis, lanes),
        },
        'ranges': {'x': axis.ends, 'y': lanes},
        'labels': {'x': axis.label, 'y': 'received share under each lane' if shared else ''},
        'units': {'x': axis.unit},
        'ticks': {'y': thin.ticks(ticks)},
    }


def _ticks(n, ticks, lanes, height):
    """Return the lanes' names, each beside its bar, and nought and one beside the shares where there is room."""
    if not height:
        return ticks
    names = {'at': [at + _BAR_AT for at in ticks['at'][:n]] + ticks['at'][n:], 'text': ticks['text']}
    scale = scale_ticks(n, height / (lanes[1] - lanes[0]))
    return {'at': [*scale['at'], *names['at']], 'text': [*scale['text'], *names['text']]}


def _columns(computed, axis, eclipsed, unseen, with_top, shared):
    n = computed.plan.n
    middle, top = middles(n)
    at = middle + (_BAR_AT if shared else 0.0)
    every = np.append(at, top) if with_top else at
    bars = unseen if with_top else unseen[:0]
    found = {
        'lanes': lane_bars(every, axis),
        'eclipsed': lane_bars(at, axis, eclipsed.prf, eclipsed.start, eclipsed.stop),
        'unseen': lane_bars(np.array([top]), axis, np.zeros(len(bars), dtype=int), bars[:, 0], bars[:, 1]),
    }
    for columns in found.values():
        columns['height'] = np.full(columns['y'].size, SHARED if shared else ALONE)
    return {**found, **received(computed.plan, axis, shared)}


def _words(computed, axis, names, eclipsed, unseen, shared, thin, units):
    said = cycle_looks() if computed.is_stagger else looks(computed.looks, computed.m, 'eclipsed')
    found, floor = avoidable(computed.sight, 0)
    where, whole, everywhere = _beyond(floor, axis), outside(axis.limits, floor), within(eclipsed, floor, axis.limits)
    found, where = _within_the_cycle(computed, axis, found, where)
    sentences = [zones_sentence(found, axis, 'range', said, everywhere, whole, where)]
    if computed.is_stagger:
        sentences += _beyond_the_cycle(computed, axis)
    elif computed.plan.n > 1 and not everywhere:
        sentences += _worst(computed, names)
    against = thin.sentences(unseen, 'what lies before the first opening' if len(floor) else '')
    sentences += against if thin.kept else [share_sentence(computed.plan, shared)]
    return {
        'caption': ' '.join(sentences),
        'short': sentences[0],
        'summary': ' '.join([_summary(computed, axis, names, eclipsed, unseen), *against]),
        'table': thin.table(_table(computed, axis, names, eclipsed), partial(_rows, axis), units),
    }


def _beyond(floor, axis):
    """Return the clause for the ranges before the first opening, where the coverage begins within them."""
    return (
        f'from the first opening at {axis.text(floor[0, 1])} on' if len(floor) and floor[0, 1] < axis.limits[1] else ''
    )


def _worst(computed, names):
    """Say which PRF loses most, unless each loses everything."""
    shares = computed.eclipsed_shares
    if shares.min() >= 1 - 1e-12:
        return []
    if np.ptp(shares) <= 1e-9:
        return [f'Each PRF loses {percent(float(shares[0]))} of the ranges.']
    worst = int(shares.argmax())
    return [f'The most, {percent(float(shares[worst]))} of the ranges, is lost on {names[worst]}.']


def _within_the_cycle(computed, axis, found, where):
    """Leave out the zone that reaches beyond the shortest interval of a stagger: it has a sentence of its own."""
    shortest = float(computed.unambiguous_range_m.min())
    if not computed.is_stagger or shortest >= axis.limits[1]:
        return found, where
    found = found[found[:, 1] < shortest]
    return found, f'{where} and up to {axis.text(shortest)}' if where else f'up to {axis.text(shortest)}'


def _beyond_the_cycle(computed, axis):
    """Say from which range on a stagger sees nothing, where the coverage reaches so far."""
    shortest = float(computed.unambiguous_range_m.min())
    if shortest >= axis.limits[1]:
        return []
    return [f'From {axis.text(shortest)} on an echo changes its gate from pulse to pulse and is not seen.']


def _summary(computed, axis, names, eclipsed, unseen):
    """Describe the whole figure for someone who does not see it."""
    lost = ', '.join(
        f'{name} {percent(float(share))}' for name, share in zip(names, computed.eclipsed_shares, strict=True)
    )
    zones_said = '; '.join(axis.interval(*zone) for zone in unseen[:12])
    more = f'; and {count_word(len(unseen) - 12)} more' if len(unseen) > 12 else ''
    counted = f'Clear on too few: {zones_said}{more}.' if zones_said else 'No range is clear on too few.'
    return (
        f'One lane for each PRF along the range, {axis.span()}, dark where an echo is eclipsed, with the received '
        f'share under it; on top the lane that counts. Eclipsed part of the ranges: {lost}. {counted}'
    )


def _table(computed, axis, names, eclipsed):
    """Return one row for each PRF: its unambiguous range, what it loses, and its zones."""
    head = ['PRF', f'Unambiguous range ({axis.unit})', 'Eclipsed', 'Eclipsed ranges']
    return {'head': head, 'rows': _rows(axis, computed, names, eclipsed)}


def _rows(axis, computed, names, eclipsed):
    rows, whole = [], axis.limits[1] - axis.limits[0]
    for prf, name in enumerate(names):
        start, stop = eclipsed.of(prf)
        found = [axis.interval(*zone) for zone in zip(start[:6].tolist(), stop[:6].tolist(), strict=True)]
        more = [f'{start.size - 6} more'] if start.size > 6 else []
        reach = significant(float(axis.shown(computed.unambiguous_range_m[prf])))
        lost = percent(float((stop - start).sum()) / whole)
        rows.append([name, reach, lost, '; '.join(found + more) or 'none'])
    return rows
