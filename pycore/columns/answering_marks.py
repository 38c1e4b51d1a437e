"""What is marked on a stagger's response: its limit, its notch, its deepest dip, its first fall and its blind speed."""

import numpy as np

from pycore.columns.named import names_at
from pycore.wording import THIN_SPACE, trimmed, with_unit

_LINE_DB = 7.0
"""What a name is high, as the response is drawn. [dB]"""


def inside(computed, axis, least):
    """Return the marked speeds that lie inside the axis, each with its name.

    Parameters
    ----------
    computed : Computed
        What the plan gives; a stagger. [SI]
    axis : Axis
        Of radial speed. [m/s]
    least : float
        Least response that counts. [dB]

    Returns
    -------
    marks : list of (float, str)
        Speed and name. [m/s]
    """
    found, (low, high) = computed.response, axis.limits
    fall = f'first below {trimmed(least)}{THIN_SPACE}dB'
    repeat = 'true first blind speed' if found.is_blind else 'response repeats'
    marks = [(found.first_below_m_s, fall), (found.true_first_blind_m_s, repeat)]
    return [(speed, name) for speed, name in marks if speed is not None and low < speed < high]


def dip(computed, axis):
    """Return the deepest dip, where there is one on the axis.

    Parameters
    ----------
    computed : Computed
        What the plan gives; a stagger. [SI]
    axis : Axis
        Of radial speed. [m/s]

    Returns
    -------
    columns : dict of float arrays
        x, y. [shown unit, dB]
    """
    found, (low, high) = computed.response, axis.limits
    here = found.deepest_db is not None and low <= found.deepest_at_m_s <= high
    places = [(found.deepest_at_m_s, found.deepest_db)] if here else []
    x, y = np.array(places, dtype=float).reshape(-1, 2).T
    return {'x': axis.shown(x), 'y': y}


def marked(computed, axis, least, low, high):
    """Return all marks of a stagger's response with their names, each beside what leaves it room.

    Parameters
    ----------
    computed : Computed
        What the plan gives; a stagger. [SI]
    axis : Axis
        Of radial speed. [m/s]
    least : float
        Least response that counts. [dB]
    low, high : float
        Ends of the axis of the response. [dB]

    Returns
    -------
    columns : dict
        ``speeds``, ``dip`` and ``names``.
    """
    found, own = inside(computed, axis, least), _own_names(computed, axis, least, low)
    x = np.array([float(axis.shown(speed)) for speed, _ in found])
    # Names stand at the top, one under the other, on the side of the line with more room.
    rows = high - 0.02 * (high - low) - 0.075 * (high - low) * np.arange(len(found))
    right_half = x > sum(axis.ends) / 2
    return {
        'dip': dip(computed, axis),
        'speeds': {'x': x, 'y0': np.full(x.size, low), 'y1': np.full(x.size, high)},
        'names': names_at(
            np.append(x, [at for at, *_ in own]),
            np.append(rows, [level for _, level, *_ in own]),
            [*(f'{name}, {axis.text(speed)}' for speed, name in found), *(text for _, _, text, *_ in own)],
            [*('top_right' if right else 'top_left' for right in right_half.tolist()), *(lean for *_, lean, _ in own)],
            np.append(np.where(right_half, -3.0, 3.0), [0.0 if 'right' in lean else 5.0 for *_, lean, _ in own]),
            np.append(np.zeros(x.size), [down for *_, down in own]),
        ),
    }


def _own_names(computed, axis, least, low):
    """Return what stands beside the limit, the deepest dip and the notch around zero: place, text, lean, offset."""
    found, (left, right) = computed.response, axis.ends
    names = [(right, least, f'blind below {trimmed(least)}{THIN_SPACE}dB', 'top_right', 2.0)]
    deepest = dip(computed, axis)
    for x, y in zip(deepest['x'].tolist(), deepest['y'].tolist(), strict=True):
        far = x > (left + right) / 2
        text = f'deepest dip, {with_unit(y, "dB")}'
        # A name that would lie across the limit's line stands under it.
        names.append((x, least if 0.0 < y - least < _LINE_DB else y, text, f'top_{"right" if far else "left"}', 3.0))
    edge = float(axis.shown(found.notch_m_s))
    if np.isfinite(edge) and left <= 0.0 <= right and left < edge < 0.7 * right:
        text = f'notch, {axis.text(found.notch_m_s)} either side'
        names.append((edge, low, text, 'bottom_left', -1.0))
    return names
