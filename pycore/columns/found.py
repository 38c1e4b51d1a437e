"""What a found plan gives, as a row of the page's list: words, numbers, and a small picture of its blind zones."""

import numpy as np

from pycore import zones
from pycore.columns.axes import interval_name
from pycore.columns.classes import classes
from pycore.finder.plan import as_found
from pycore.finder.sight import sight_of
from pycore.wording import THIN_SPACE, in_range_unit, in_speed_unit, percent, with_unit

PICTURE = {'width': 132, 'height': 66}
"""Cells of the small picture, which are its pixels. [px]"""

_TIGHTEST = {
    'time': 'time on target',
    'duty': 'duty',
    'visible': 'visible share',
    'unseen': 'time out of sight',
    'decode-range': 'range decoding',
    'decode-speed': 'speed decoding',
}


def heads(limits):
    """Return what the columns of the list are called, in order, by the names that ``row`` gives its words.

    Parameters
    ----------
    limits : Limits
        What bound the search. [mixed]

    Returns
    -------
    heads : list of pair of str
        Name and heading.
    """
    stagger = limits.stagger is not None
    first = [('dip', 'dips to'), ('seen', 'seen')] if stagger else [('seen', 'seen'), ('excess', 'above the floor')]
    lost = [] if stagger or limits.n == 1 else [('lost', 'with one PRF lost')]
    reach = 'reaches' if stagger else 'decodes'
    return [
        *first,
        ('hole', 'worst hole'),
        ('decode', reach),
        ('time', 'time used'),
        *lost,
        ('tightest', 'least to spare'),
    ]


def row(better, limits, units):
    """Return one found plan in words, and its numbers.

    Parameters
    ----------
    better : Better
        A found set. [mixed]
    limits : Limits
        What bound the search. [mixed]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    row : dict
        ``pris`` (in clock counts), ``intervals`` (one after the other), the words of ``heads``, ``found`` (all its
        numbers), ``on_front``.
    """
    return {
        'pris': list(better.pri_counts),
        'intervals': _intervals(better.pri_s, units),
        'seen': percent(better.visible_share, limits.visible),
        'excess': percent(better.excess_over_floor if better.excess_over_floor > 1e-12 else 0.0),
        'dip': None if better.dip_db is None else with_unit(better.dip_db, 'dB'),
        'hole': _hole(better.largest_hole, units),
        'decode': _decode(better, limits, units),
        'time': with_unit(better.time_s * 1e3, 'ms', None if limits.time_s is None else limits.time_s * 1e3),
        'lost': percent(better.share_if_one_lost),
        'tightest': _tightest(better.tightest, limits),
        'on_front': better.on_front,
        'found': as_found(better, limits.clock_hz),
    }


def _intervals(pri_s, units):
    """Write intervals one after the other, their unit once."""
    names = [interval_name(pri, units).rsplit(THIN_SPACE, 1) for pri in pri_s]
    return f'{", ".join(digits for digits, _ in names)}{THIN_SPACE}{names[0][1]}'


def _hole(hole, units):
    if hole is None:
        return 'none'
    long, unit = in_range_unit(hole.range_m[1] - hole.range_m[0], units)
    wide, speed_unit = in_speed_unit(hole.speed_m_s[1] - hole.speed_m_s[0], units)
    return f'{with_unit(long, unit)} by {with_unit(wide, speed_unit)}'


def _decode(better, limits, units):
    """Say how far range decodes, and over which span speed does where that is asked for."""
    exact = limits.decode == 'exact'
    reach_m, span_m_s = (better.exact_m, better.exact_m_s) if exact else (better.decode_m, better.decode_m_s)
    reach = 'any range' if reach_m is None else with_unit(*in_range_unit(reach_m, units))
    if limits.decode_m_s is None:
        return reach
    span = 'any speed' if span_m_s is None else with_unit(*in_speed_unit(span_m_s, units))
    return f'{reach}, {span}'


def _tightest(tightest, limits):
    if tightest is None:
        return 'nothing binds'
    name, part = tightest
    region = name.startswith('must-see') and limits.must_see[int(name.partition('.')[2])].name
    return f'{region or _TIGHTEST[name]}, {percent(max(part, 0.0))}'


def image(limits, pris, sight=None):
    """Return the small picture of a set's blind zones.

    Parameters
    ----------
    limits : Limits
        What bound the search. [mixed]
    pris : sequence of int, length N
        PRIs in the order of the places. [clock counts]
    sight : Sight or None
        Of a stagger; worked out from the PRIs where it is not given. [m, m/s]

    Returns
    -------
    image : uint8 array, shape (V, R)
        Classes of :mod:`pycore.columns.classes`; the lowest speed first.
    """
    seen = sight_of(limits, pris) if sight is None else sight
    at_range = zones.centres(seen.range_m, PICTURE['width'])
    at_speed = zones.centres(seen.speed_m_s, PICTURE['height'])
    return np.ascontiguousarray(classes(zones.count_map(seen.ranges, seen.speeds, at_range, at_speed), seen.n, seen.m))
