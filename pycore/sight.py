"""What a set of PRFs sees of a coverage: the clear spans and all that is asked of them.

The one record that visibility, holes, time out of sight and map are worked out
from, whatever made its spans: a set of dwells, or a stagger (N = M = 1).
"""

from dataclasses import dataclass, replace

import numpy as np

from pycore.patterns import Sweep, sweep
from pycore.spans import Spans
from pycore.visibility import visible_share


@dataclass(frozen=True, slots=True)
class Sight:
    """Clear spans of a plan, the spans of its floor, and the coverage they lie in.

    Parameters
    ----------
    ranges : Spans
        Clear ranges of every PRF. [m]
    speeds : Spans
        Clear radial speeds of every PRF. [m/s]
    floor_ranges : Spans
        Ranges clear with only the first opening in force (:mod:`pycore.floor`). [m]
    floor_speeds : Spans
        Speeds clear with only the notch around zero in force. [m/s]
    n : int
        Number of PRFs. [unitless]
    m : int
        Number that must be clear. [unitless]
    range_m : tuple of two floats
        The coverage's ranges. [m]
    speed_m_s : tuple of two floats
        The coverage's radial speeds, closing positive. [m/s]
    """

    ranges: Spans
    speeds: Spans
    floor_ranges: Spans
    floor_speeds: Spans
    n: int
    m: int
    range_m: tuple[float, float]
    speed_m_s: tuple[float, float]


def cut(spans, limits):
    """Return spans cut to a shorter axis.

    Parameters
    ----------
    spans : Spans
        Clear intervals of every PRF. [m or m/s]
    limits : tuple of two floats
        Lower and upper end, inside the axis that the spans were made for. [m or m/s]

    Returns
    -------
    spans : Spans
        What of them lies between the limits.
    """
    start, stop = np.maximum(spans.start, limits[0]), np.minimum(spans.stop, limits[1])
    some = start < stop
    return Spans(spans.prf[some], start[some], stop[some])


def within(sight, range_m, speed_m_s):
    """Return the same plan's sight of a region of its coverage.

    Parameters
    ----------
    sight : Sight
        The whole. [m and m/s]
    range_m : tuple of two floats
        The region's ranges, inside the coverage's. [m]
    speed_m_s : tuple of two floats
        The region's radial speeds, inside the coverage's. [m/s]

    Returns
    -------
    sight : Sight
        Of that region alone: its shares are shares of the region.
    """
    return replace(
        sight,
        ranges=cut(sight.ranges, range_m),
        speeds=cut(sight.speeds, speed_m_s),
        floor_ranges=cut(sight.floor_ranges, range_m),
        floor_speeds=cut(sight.floor_speeds, speed_m_s),
        range_m=range_m,
        speed_m_s=speed_m_s,
    )


def share(sight):
    """Return the visible share of a sight.

    Parameters
    ----------
    sight : Sight
        A plan and its coverage. [m and m/s]

    Returns
    -------
    share : float
        Seen by at least M of N. [unitless]
    """
    return visible_share(sight.ranges, sight.speeds, sight.n, sight.m, sight.range_m, sight.speed_m_s)


def floor(sight):
    """Return the share of a sight that no set of PRFs can see.

    Parameters
    ----------
    sight : Sight
        A plan and its coverage. [m and m/s]

    Returns
    -------
    share : float
        Blind with only first openings and notches around zero left. [unitless]
    """
    clear = visible_share(sight.floor_ranges, sight.floor_speeds, sight.n, sight.m, sight.range_m, sight.speed_m_s)
    return 1.0 - clear


def sweeps_with_floor(sight):
    """Return both axes, cut at the edges of the plan and of its floor alike.

    Parameters
    ----------
    sight : Sight
        A plan and its coverage. [m and m/s]

    Returns
    -------
    ranges, speeds : Sweep
        Bit i of a pattern is PRF i, bit N + i the same PRF with only its floor in force;
        neighbouring segments never carry the same pattern.
    """
    ranges = _both(sight.ranges, sight.floor_ranges, sight.n)
    speeds = _both(sight.speeds, sight.floor_speeds, sight.n)
    return _merged(sweep(ranges, sight.range_m)), _merged(sweep(speeds, sight.speed_m_s))


def _both(spans, floor_spans, n):
    """Join spans and the floor's, as PRFs 0 … N - 1 and N … 2 N - 1."""
    return Spans(
        np.concatenate((spans.prf, floor_spans.prf + n)),
        np.concatenate((spans.start, floor_spans.start)),
        np.concatenate((spans.stop, floor_spans.stop)),
    )


def _merged(swept):
    """Leave out edges at which no pattern changes (spans of one PRF that touch)."""
    changes = np.flatnonzero(swept.pattern[1:] != swept.pattern[:-1])
    first = np.append(0, changes + 1)
    return Sweep(np.append(swept.edges[first], swept.edges[-1]), swept.pattern[first])
