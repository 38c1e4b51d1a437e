"""What lies behind the marks of the trade line: the regimes that the coverage makes, and the carriers' names."""

import numpy as np

from pycore.columns.named import names_at
from pycore.wording import THIN_SPACE, trimmed

_REGIMES = (
    ('clear', 'bottom_left', 4.0, -3.0),
    ('low PRF', 'top_left', 4.0, 3.0),
    ('medium PRF', 'top_right', -4.0, 3.0),
    ('high PRF', 'bottom_right', -4.0, -3.0),
)
"""Name of each regime, and how it leans on the corner that the coverage asks for. [px]"""

_CLOSE = 0.17
"""Part of an axis within which names would meet. [unitless]"""

_UNDER_BANDS = 18.0
"""How far names at the top stand under those of the bands. [px]"""

_ALONG = 0.82
"""Part of a line, as drawn, after which its name stands. [unitless]"""


def regions(plan, reach, speed, x, y):
    """Return what one PRF would have to reach, and the regimes that part there.

    Parameters
    ----------
    plan : Plan
        The plan. [SI]
    reach, speed : float array, shape N
        Unambiguous range and first blind speed of the PRFs. [shown units]
    x, y : Axis
        Of unambiguous range and of first blind speed. [m, m/s]

    Returns
    -------
    columns : dict
        ``asked``, the region that is clear in range and in speed; ``regimes``, the two lines that part the figure;
        ``regime-names``, around the point where they cross.
    """
    far, wide = x.shown(plan.range_m[1]), y.shown(plan.speed_m_s[1] - plan.speed_m_s[0])
    (left, right), (bottom, top) = x.ends, y.ends
    box = zip(('left', 'bottom', 'right', 'top'), (far, wide, right, top), strict=True)
    text, anchor, dx, dy = zip(*_REGIMES, strict=True)
    level = np.full(4, wide)
    if _is_taken(reach, speed, far, wide, x, y):
        # Where the plan's own marks stand at the crossing, the names go to the ends of the line across the range.
        level = np.array([top, bottom, bottom, top])
        anchor = ['top_left', 'bottom_left', 'bottom_right', 'top_right']
        dy = [_UNDER_BANDS, -3.0, -3.0, _UNDER_BANDS]
    return {
        'asked': {name: np.array([value]) for name, value in box},
        'regimes': {
            'x0': np.array([far, left]),
            'y0': np.array([bottom, wide]),
            'x1': np.array([far, right]),
            'y1': np.array([top, wide]),
        },
        'regime-names': names_at(np.full(4, far), level, text, anchor, dx, dy),
    }


def _is_taken(reach, speed, far, wide, x, y):
    """Return whether a PRF's mark stands so close to a point that their names would meet."""
    (left, right), (bottom, top) = x.ends, y.ends
    along = np.abs(np.log(reach / far)) / np.log(right / left)
    up = np.abs(np.log(speed / wide)) / np.log(top / bottom)
    return bool(((along < _CLOSE) & (up < _CLOSE)).any())


def carrier_names(plan, product, x, y):
    """Return the names of the lowest and the highest carrier, towards the ends of their lines.

    Parameters
    ----------
    plan : Plan
        The plan. [SI]
    product : float array, shape C
        Range times speed of each carrier, in rising order of the carriers. [shown units]
    x, y : Axis
        Of unambiguous range and of first blind speed. [m, m/s]

    Returns
    -------
    columns : dict
        As :func:`pycore.columns.named.names_at` returns them: the lower carrier's above its line, the other's below.
    """
    carriers = np.unique(plan.carrier_hz)
    ends = [0, -1][: carriers.size]
    (left, right), (bottom, top) = x.ends, y.ends
    first, last = np.maximum(product[ends] / top, left), np.minimum(product[ends] / bottom, right)
    at = first * (last / first) ** _ALONG
    # A falling line leaves room on its right above it, and on its left below it.
    return names_at(
        at,
        product[ends] / at,
        [f'{trimmed(float(carriers[i]) / 1e9)}{THIN_SPACE}GHz' for i in ends],
        ['bottom_left', 'top_right'][: len(ends)],
        [2.0, -2.0][: len(ends)],
        [0.0, 0.0][: len(ends)],
    )
