"""The figures as Bokeh documents, built once when the page is built; afterwards only their data change."""

from bokeh.embed import json_item

from webapp.figures import (
    blind_speeds,
    blind_zones,
    decoding,
    detection,
    doppler_filters,
    dwell,
    eclipsed_ranges,
    every_pri,
    trade_line,
    trade_off,
)

_IN_ORDER = (blind_zones, trade_line, eclipsed_ranges, blind_speeds, decoding, doppler_filters, detection, dwell)
_MODULES = {module.NAME: module for module in (*_IN_ORDER, trade_off, every_pri)}


def drawn(name, picture):
    """Return a figure of a plan as a Bokeh model.

    Parameters
    ----------
    name : str
        One of ``pycore.columns.FIGURES``, or the trade-off of found plans. [unitless]
    picture : dict
        What the core gives for it. [shown units]

    Returns
    -------
    figure : bokeh figure
        Figure, sources, ranges, axes and the heading over the y axis have names.
    """
    return _MODULES[name].build(picture)


def build(name, picture):
    """Return a figure as the JSON that the page embeds.

    Parameters
    ----------
    name : str
        One of ``pycore.columns.FIGURES``. [unitless]
    picture : dict
        What the core gives for it. [shown units]

    Returns
    -------
    item : dict
        For ``figures.js``.
    """
    return json_item(drawn(name, picture))
