"""How far a set decodes without any error, said as an engineer would: beyond what matters, only that it is more.

The least common multiple of many intervals can be light years; the data keep it in full.
"""

import math

from pycore.wording import with_unit

FARTHEST_M, FASTEST_M_S = 1e9, 1e6
"""A million km and a million m/s: beyond them a span is only said to be more. [m, m/s]"""


def exact_span_text(span, most, one, unit):
    """Return a span without error in words.

    Parameters
    ----------
    span : float
        The span. [m or m/s]
    most : float
        ``FARTHEST_M`` or ``FASTEST_M_S``. [m or m/s]
    one : float
        One shown unit. [m or m/s]
    unit : str
        That unit. [unitless]

    Returns
    -------
    text : str
        Such as ``'6321 km'``, or ``'more than 1 000 000 km'``, in another unit a round number below that.
    """
    if span <= most:
        return with_unit(span / one, unit)
    # Rounded down, so that it is true.
    decade = 10.0 ** math.floor(math.log10(most / one))
    return f'more than {with_unit(math.floor(most / one / decade) * decade, unit)}'
