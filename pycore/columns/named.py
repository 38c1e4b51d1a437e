"""Columns of text inside a figure."""

import numpy as np


def names_at(x, y, text, anchor, dx=0.0, dy=0.0):
    """Return the columns of some names.

    Parameters
    ----------
    x, y : float array, shape T
        Points that they belong to. [shown unit]
    text : list of str
        What they say. [unitless]
    anchor : list of str
        Which corner or side of each text lies at its point, such as ``'bottom_left'``. [unitless]
    dx, dy : float or array
        How far it is moved off the point, rightwards and downwards. [px]

    Returns
    -------
    columns : dict
        x, y, text, anchor, dx, dy.
    """
    count = len(text)
    return {
        'x': np.asarray(x, dtype=float).reshape(count),
        'y': np.asarray(y, dtype=float).reshape(count),
        'text': list(text),
        'anchor': list(anchor),
        'dx': np.broadcast_to(np.asarray(dx, dtype=float), count).copy(),
        'dy': np.broadcast_to(np.asarray(dy, dtype=float), count).copy(),
    }
