"""The words of the figure of blind zones: holes first, then what dark and pale stand for."""

from dataclasses import replace

from pycore.columns.blind_parts import avoidable
from pycore.wording import capitalised, count_word, percent, plural

_MOST_IN_SUMMARY = 8


def words(computed, x, y):
    """Return caption, short caption, summary and table of the blind zones.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    x, y : Axis
        Of range and of radial speed. [m, m/s]

    Returns
    -------
    words : dict
        caption, short, summary, table.
    """
    x = _from_the_first_opening(computed, x)
    first = _holes_sentence(computed.holes, x, y)
    return {
        'caption': f'{first} {key_sentence(computed.looks, computed.m)}',
        'short': first,
        'summary': _summary(computed, x, y),
        'table': _table(computed.holes, x, y),
    }


def _from_the_first_opening(computed, x):
    """Return the axis without the ranges that no plan can see: a hole that fills the rest is at every range."""
    _, floor = avoidable(computed.sight, 0)
    if len(floor) and floor[0, 0] <= x.limits[0] and floor[0, 1] < x.limits[1]:
        return replace(x, limits=(float(floor[0, 1]), x.limits[1]))
    return x


def key_sentence(n, m):
    """Say what the tones of the map stand for.

    Parameters
    ----------
    n : int
        Number of PRFs. [unitless]
    m : int
        Number that must be clear. [unitless]

    Returns
    -------
    sentence : str
        From the darkest to the page's own colour.
    """
    if n == 1:
        return 'Hatched: not seen; plain: seen.'
    parts = ['Hatched: seen by no PRF']
    if m > 1:
        parts.append(f'brown: by {_from_to(1, m - 1)}, too few')
    if m < n:
        parts.append(f'pale: by {"just " if m > 1 else ""}{count_word(m)}')
    if m < n - 1:
        parts.append(f'paler: by {_from_to(m + 1, n - 1)}')
    parts.append(f'plain: by {"both" if n == 2 else f"all {count_word(n)}"}')
    return '; '.join(parts) + '.'


def _from_to(low, high):
    """Return ``one``, ``one or two`` or ``one to three``."""
    if low == high:
        return count_word(low)
    return f'{count_word(low)} {"or" if high == low + 1 else "to"} {count_word(high)}'


def _holes_sentence(holes, x, y):
    """Name the holes: none, one, two, or how many and the largest."""
    if not holes.count:
        return 'There is no hole: all that another plan could see is seen.'
    where = [_where(hole, x, y) for hole in holes.listed[:2]]
    if holes.count == 1:
        return f'One hole, {where[0]}; {percent(holes.share)} of the coverage.'
    if holes.count == 2:
        return f'Two holes, {percent(holes.share)} of the coverage: 1, {where[0]}; 2, {where[1]}.'
    return capitalised(
        f'{count_word(holes.count)} holes, {percent(holes.share)} of the coverage; the largest is {where[0]}.'
    )


def _where(hole, x, y):
    """Say where a hole lies, an axis that it fills as ``at every``."""
    speed = y.interval(*hole.speed_m_s)
    if _fills(hole.range_m, x) and _fills(hole.speed_m_s, y):
        return 'at every range and speed'
    if _fills(hole.range_m, x):
        return f'{speed} at every range'
    distance = x.interval(*hole.range_m)
    return f'{distance} at every speed' if _fills(hole.speed_m_s, y) else f'{distance} and {speed}'


def _fills(ends, axis):
    slack = 1e-9 * (axis.limits[1] - axis.limits[0])
    return ends[0] <= axis.limits[0] + slack and ends[1] >= axis.limits[1] - slack


def _summary(computed, x, y):
    """Describe the whole map for someone who does not see it."""
    whole = replace(x, limits=tuple(computed.plan.range_m))
    n, holes = computed.looks, computed.holes
    shares = [percent(max(float(share), 0.0)) for share in computed.visible.by_count]
    if n == 1:
        counts = f'{shares[1]} of it is seen'
    else:
        counts = ', '.join(f'by {count_word(i) if i else "none"} {share}' for i, share in enumerate(shares))
        counts = (
            f'{percent(computed.share)} of it is seen by at least {count_word(computed.m)} of {count_word(n)}; {counts}'
        )
    listed = '; '.join(f'{i + 1}, {_where(hole, x, y)}' for i, hole in enumerate(holes.listed[:_MOST_IN_SUMMARY]))
    more = f' The largest {plural(len(holes.listed[:_MOST_IN_SUMMARY]), "hole", "holes")}: {listed}.' if listed else ''
    return (
        f'Map of the number of PRFs that see a target, over range, {whole.span()}, and radial speed, {y.span()}. '
        f'{counts}. {percent(computed.floor_share)} is what no plan can see. {_holes_sentence(holes, x, y)}{more}'
    )


def _table(holes, x, y):
    """Return one row for each listed hole."""
    rows = [
        [str(i + 1), x.interval(*hole.range_m), y.interval(*hole.speed_m_s), percent(hole.share)]
        for i, hole in enumerate(holes.listed)
    ]
    return {'head': ['Hole', 'Range', 'Radial speed', 'Share of the coverage'], 'rows': rows}
