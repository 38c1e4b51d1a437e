"""What the figures show: named columns, axes, captions, summaries and tables, one module for each figure."""

from pycore.columns import (
    blind_speeds,
    blind_zones,
    decoding,
    detection,
    doppler_filters,
    dwell,
    eclipsed_ranges,
    every_pri,
    speed_map,
    trade_line,
)
from pycore.columns.axes import range_axis, speed_axis
from pycore.columns.mark import ring
from pycore.columns.places import MEASURES, ZOOMED
from pycore.columns.view import WHOLE

_IN_ORDER = (blind_zones, trade_line, eclipsed_ranges, blind_speeds, decoding, doppler_filters, detection, dwell)
_MODULES = {module.NAME: module for module in (*_IN_ORDER, every_pri)}

FIGURES = tuple(module.NAME for module in _IN_ORDER)
"""Names of the numbered figures, in the order in which a note of dwells shows them. [unitless]"""

APART = (every_pri.NAME,)
"""Names of figures that stand elsewhere in the note and carry no number. [unitless]"""


def order(kind):
    """Return the figures in the order in which a note shows them: the chief one first.

    Parameters
    ----------
    kind : str
        ``'dwells'`` or ``'stagger'``. [unitless]

    Returns
    -------
    names : tuple of str
        Blind zones are the chief figure of dwells, blind speeds that of a stagger.
    """
    if kind != 'stagger':
        return FIGURES
    swap = {blind_zones.NAME: blind_speeds.NAME, blind_speeds.NAME: blind_zones.NAME}
    return tuple(swap.get(name, name) for name in FIGURES)


def picture(name, computed, units, size=None, view=WHOLE):
    """Return one figure of a plan.

    Parameters
    ----------
    name : str
        One of ``FIGURES``. [unitless]
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers, by ``range``, ``speed``, ``pri``. [unitless]
    size : mapping or None
        Width and height of its plot. [px]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    picture : dict
        ``title``; ``caption``, ``short`` (one line), ``summary`` (for a screen reader), ``table`` (``head``, ``rows``);
        ``columns`` by source; ``ranges``, ``labels``, ``units`` and fixed ``ticks`` by axis; what its axes measure
        of a target; whether only a part is shown (``None`` where it cannot be).
    """
    return {
        **_MODULES[name].picture(computed, units, size, view),
        'measures': MEASURES.get(name, {}),
        'zoomed': None if name not in ZOOMED else name in view.zoom,
    }


def marking(name, computed, units, size=None, view=WHOLE):
    """Return what of a figure changes where only the followed target does.

    Parameters
    ----------
    name : str
        One of ``FIGURES``. [unitless]
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    size : mapping or None
        Width and height of its plot. [px]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    picture : dict
        Of a map only the columns of the ring, as the map stays; of the others the whole figure, which costs little.
    """
    if name == blind_speeds.NAME and speed_map.is_map(computed, view):
        return {'columns': {'target': speed_map.marked(computed, units, view)}}
    if name not in ZOOMED:
        return picture(name, computed, units, size, view)
    x, y = range_axis(computed.plan.range_m, units), speed_axis(computed.plan.speed_m_s, units)
    sentence = {'marked': detection.marked(view.mark)} if name == detection.NAME else {}
    return {'columns': {'target': ring(view.mark, x, y)}, **sentence}
