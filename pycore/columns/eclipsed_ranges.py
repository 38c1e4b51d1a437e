"""Figure: which ranges each PRF receives, how much of the echo, and which of them enough PRFs receive.

Sources: ``lanes`` (a bar along each lane), ``eclipsed`` (on each PRF), ``unseen``
(on fewer than M), ``received`` (the received share, its area and its edge), ``target``.
"""

import numpy as np

from pycore.columns.axes import interval_name, range_axis
from pycore.columns.blind_parts import avoidable, gaps, outside, within, zones
from pycore.columns.lanes import lane_bars, lane_range, lane_ticks, middles
from pycore.columns.looks import cycle_looks, looks
from pycore.columns.mark import across
from pycore.columns.received import received_corners
from pycore.columns.view import WHOLE
from pycore.columns.zone_sentences import zones_sentence
from pycore.wording import count_word, percent, significant

NAME, TITLE = 'eclipsed-ranges', 'Eclipsed ranges'

MOST_WITH_SHARE = 6
"""PRFs up to which the received share is drawn as well: with more, its lanes would be too low to read. [unitless]"""

_SHARE_FROM, _SHARE_HIGH = -0.47, 0.2


def picture(computed, units, size=None, view=WHOLE):
    """Return the figure of eclipsed ranges.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    size : mapping or None
        Not used: nothing here depends on the size. [px]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    picture : dict
        Columns, ranges, labels, ticks and words.
    """
    plan, axis = computed.plan, range_axis(computed.plan.range_m, units)
    names = [interval_name(pri, units) for pri in plan.pri_s.tolist()]
    eclipsed = gaps(computed.prf_ranges, plan.n, plan.range_m)
    unseen = zones(computed.range_sweep, computed.looks, computed.m)
    counted = None if plan.n == 1 else 'all intervals' if computed.is_stagger else f'{plan.m} of {plan.n}'
    lanes = lane_range(plan.n, counted is not None)
    return {
        'title': TITLE,
        **_words(computed, axis, names, eclipsed, unseen),
        'columns': {
            **_columns(computed, axis, eclipsed, unseen, counted is not None),
            'target': across(view.mark and view.mark.range_m, axis, lanes),
        },
        'ranges': {'x': axis.ends, 'y': lanes},
        'labels': {'x': axis.label, 'y': ''},
        'units': {'x': axis.unit},
        'ticks': {'y': lane_ticks(names, counted)},
    }


def _columns(computed, axis, eclipsed, unseen, with_top):
    n = computed.plan.n
    middle, top = middles(n)
    every = np.append(middle, top) if with_top else middle
    bars = unseen if with_top else unseen[:0]
    return {
        'lanes': lane_bars(every, axis),
        'eclipsed': lane_bars(middle, axis, eclipsed.prf, eclipsed.start, eclipsed.stop),
        'unseen': lane_bars(np.array([top]), axis, np.zeros(len(bars), dtype=int), bars[:, 0], bars[:, 1]),
        'received': _received(computed.plan, axis, middle),
    }


def _received(plan, axis, middle):
    """Return the received share of all PRFs under their bars, parted by nan: areas down to a base, and their edges."""
    if plan.n > MOST_WITH_SHARE:
        return {'x': np.zeros(0), 'area': np.zeros(0), 'edge': np.zeros(0)}
    x, area, edge = [], [], []
    for at, (range_m, share) in zip(middle + _SHARE_FROM, received_corners(plan), strict=True):
        x += [axis.shown(range_m[[0]]), axis.shown(range_m), axis.shown(range_m[[-1, -1]])]
        area += [[at], at + _SHARE_HIGH * share, [at, np.nan]]
        edge += [[np.nan], at + _SHARE_HIGH * share, [np.nan, np.nan]]
    return {'x': np.concatenate(x), 'area': np.concatenate(area), 'edge': np.concatenate(edge)}


def _words(computed, axis, names, eclipsed, unseen):
    said = cycle_looks() if computed.is_stagger else looks(computed.looks, computed.m, 'eclipsed')
    found, floor = avoidable(computed.sight, 0)
    where, whole, everywhere = _beyond(floor, axis), outside(axis.limits, floor), within(eclipsed, floor, axis.limits)
    found, where = _within_the_cycle(computed, axis, found, where)
    sentences = [zones_sentence(found, axis, 'range', said, everywhere, whole, where)]
    if computed.is_stagger:
        sentences += _beyond_the_cycle(computed, axis)
    elif computed.plan.n > 1 and not everywhere:
        sentences += _worst(computed, names)
    if computed.plan.n <= MOST_WITH_SHARE:
        sentences.append(f'Under {"the" if computed.plan.n == 1 else "each"} lane: the received share of the echo.')
    return {
        'caption': ' '.join(sentences),
        'short': sentences[0],
        'summary': _summary(computed, axis, names, eclipsed, unseen),
        'table': _table(computed, axis, names, eclipsed),
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
    rows = []
    for prf, name in enumerate(names):
        start, stop = eclipsed.of(prf)
        found = [axis.interval(*zone) for zone in zip(start[:6].tolist(), stop[:6].tolist(), strict=True)]
        more = [f'{start.size - 6} more'] if start.size > 6 else []
        reach = significant(float(axis.shown(computed.unambiguous_range_m[prf])))
        lost = percent(float(computed.eclipsed_shares[prf]))
        rows.append([name, reach, lost, '; '.join(found + more) or 'none'])
    return {'head': ['PRF', f'Unambiguous range ({axis.unit})', 'Eclipsed', 'Eclipsed ranges'], 'rows': rows}
