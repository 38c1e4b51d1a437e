"""Figure: what a PRF gives in range against what it gives in speed.

On logarithmic axes all PRFs of one carrier lie on a line of slope -1, those of a
band in a strip. Sources: ``edges`` (of the bands), ``band`` (the strips that the
plan's carriers lie in), ``band-names``, ``lines`` (one for each carrier) and
``carrier-names``, ``asked`` (what one PRF would have to reach), ``regimes`` and
``regime-names`` (low, medium, high and clear for this coverage), ``prfs`` and
``prf-names``, ``kept`` and ``kept-lines`` (the kept plan's PRFs and carriers), ``target``
(a PRF further out and higher up would show the followed target without ambiguity).
"""

import numpy as np

from pycore import ambiguity, bands
from pycore.columns.axes import decade_ticks, range_axis, speed_axis
from pycore.columns.mark import ring
from pycore.columns.named import names_at
from pycore.columns.prf_names import prf_names
from pycore.columns.trade_regions import carrier_names, regions
from pycore.columns.trade_words import words
from pycore.columns.view import WHOLE

NAME, TITLE = 'trade-line', 'Trade line'

_ROOM = 2.2
"""Factor between the outermost mark and the end of the axis. [unitless]"""


def picture(computed, units, size=None, view=WHOLE):
    """Return the figure of the trade between unambiguous range and first blind speed.

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
    x, y = _axes(computed, units, view.kept)
    names = prf_names(computed.plan, units)
    kept_names = [] if view.kept is None else prf_names(view.kept.plan, units)
    ticks = {
        side: dict(zip(('at', 'text'), decade_ticks(*axis.ends), strict=True)) for side, axis in (('x', x), ('y', y))
    }
    shown = x.shown(computed.unambiguous_range_m), y.shown(computed.blind_speed_m_s)
    return {
        'title': TITLE,
        **words(computed, x, y, names, view.kept, kept_names),
        'columns': {
            **_bands(computed.plan, x, y),
            **regions(computed.plan, *shown, x, y),
            **_prfs(computed, x, y, names),
            **_kept(view.kept, computed, x, y),
            'target': _target(view.mark, x, y),
        },
        'ranges': {'x': x.ends, 'y': y.ends},
        'labels': {'x': x.label, 'y': f'{y.label}, twice the Nyquist speed'},
        'units': {'x': x.unit, 'y': y.unit},
        'ticks': ticks,
    }


def _axes(computed, units, kept):
    """Return axes with room around the PRFs of the plan and of the kept one, and the corner of what is asked for."""
    low, high = computed.plan.speed_m_s
    plans = [computed] if kept is None else [computed, kept]
    ranges = np.concatenate([*(one.unambiguous_range_m for one in plans), [computed.plan.range_m[1]]])
    speeds = np.concatenate([*(one.blind_speed_m_s for one in plans), [high - low]])
    x, y = ((float(values.min()) / _ROOM, float(values.max()) * _ROOM) for values in (ranges, speeds))
    return range_axis(x, units, 'unambiguous range'), speed_axis(y, units, 'first blind speed')


def _target(mark, x, y):
    """Return the ring of the target, which a logarithmic axis has no place for at range or speed nought."""
    here = mark is not None and x.limits[0] < mark.range_m and y.limits[0] < mark.speed_m_s
    return ring(mark if here else None, x, y)


def _kept(kept, computed, x, y):
    """Return the kept plan's PRFs, and the lines of its carriers that the present plan has not."""
    if kept is None:
        nothing = np.zeros(0)
        return {'kept': {'x': nothing, 'y': nothing}, 'kept-lines': _line(nothing, x)}
    other = np.setdiff1d(kept.plan.carrier_hz, computed.plan.carrier_hz)
    return {
        'kept': {'x': x.shown(kept.unambiguous_range_m), 'y': y.shown(kept.blind_speed_m_s)},
        'kept-lines': _line(_product(other, x, y), x),
    }


def _product(frequency_hz, x, y):
    """Return range times speed of one frequency, in the shown units."""
    return ambiguity.trade_product(ambiguity.wavelength(np.asarray(frequency_hz))) / (x.si * y.si)


def _line(product, x):
    """Return the ends of trade lines that cross the whole figure."""
    left, right = x.ends
    return {
        'x0': np.full(product.size, left),
        'y0': product / left,
        'x1': np.full(product.size, right),
        'y1': product / right,
    }


def _bands(plan, x, y):
    """Return the bands' edges and names, the strips of the plan's own bands, and its carriers' lines."""
    edges = sorted({edge for band in bands.BANDS for edge in (band.low_hz, band.high_hz)})
    own = [band for band in bands.BANDS if any(band.low_hz <= carrier <= band.high_hz for carrier in plan.carrier_hz)]
    left, right = x.ends
    outer, inner = (_product([getattr(band, end) for band in own], x, y) for end in ('low_hz', 'high_hz'))
    carriers = _product(np.unique(plan.carrier_hz), x, y)
    strips = np.column_stack((inner / left, inner / right, outer / right, outer / left))
    return {
        'edges': _line(_product(edges, x, y), x),
        'band': {'xs': [[left, right, right, left] for _ in own], 'ys': strips.tolist()},
        'band-names': _band_names(plan, x, y),
        'lines': _line(carriers, x),
        'carrier-names': carrier_names(plan, carriers, x, y),
    }


def _free_middle(band, carrier_hz):
    """Return the middle of the widest part of a band between its edges and the plan's carriers, as drawn."""
    inside = carrier_hz[(carrier_hz > band.low_hz) & (carrier_hz < band.high_hz)]
    cuts = np.log(np.sort(np.concatenate(([band.low_hz, band.high_hz], inside))))
    widest = np.diff(cuts).argmax()
    return float(np.exp(cuts[widest : widest + 2].mean()))


def _band_names(plan, x, y):
    """Return the bands' letters where the middles of their strips enter the figure, at its left side or its top."""
    (left, right), (bottom, top) = x.ends, y.ends
    product = _product([_free_middle(band, plan.carrier_hz) for band in bands.BANDS], x, y)
    from_left = product / left < top
    at_x = np.where(from_left, left, product / top)
    at_y = np.where(from_left, product / left, top)
    shown = (at_x < right / 1.1) & (at_y > bottom * 1.1)
    anchor = ['center_left' if side else 'top_center' for side in from_left[shown].tolist()]
    text = [band.name for band, here in zip(bands.BANDS, shown.tolist(), strict=True) if here]
    beside = from_left[shown]
    return names_at(at_x[shown], at_y[shown], text, anchor, np.where(beside, 4.0, 0.0), np.where(beside, 0.0, 2.0))


def _prfs(computed, x, y, names):
    """Return the PRFs' marks and the names of the shortest and the longest interval, on either side of the line."""
    reach, speed = x.shown(computed.unambiguous_range_m), y.shown(computed.blind_speed_m_s)
    short, long = int(reach.argmin()), int(reach.argmax())
    named = [short, long] if reach[long] > reach[short] else [long]
    return {
        'prfs': {'x': reach, 'y': speed},
        'prf-names': names_at(
            reach[named],
            speed[named],
            [names[i] for i in named],
            ['top_right', 'bottom_left'][-len(named) :],
            [-4.0, 4.0][-len(named) :],
            [3.0, -3.0][-len(named) :],
        ),
    }
