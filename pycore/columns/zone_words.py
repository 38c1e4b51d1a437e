"""The words of the figure of blind zones: holes first, then what dark and pale stand for."""

from dataclasses import dataclass, replace

from pycore.columns.axes import Axis
from pycore.columns.blind_parts import avoidable
from pycore.wording import capitalised, count_word, listed, percent, plural

_MOST_IN_SUMMARY = 8
_NOTHING = 1e-9
_MOSTLY = 0.8
"""Part of its box from which on a hole is said to be where its box is. [unitless]"""


@dataclass(frozen=True, slots=True)
class _Place:
    """The coverage, as holes are placed in it.

    Parameters
    ----------
    x, y : Axis
        Of range and radial speed, cut to what any plan could see. [m, m/s]
    area : float
        Of the whole coverage. [m²/s]
    """

    x: Axis
    y: Axis
    area: float


def words(computed, x, y, also=()):
    """Return caption, short caption, summary and table of the blind zones.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    x, y : Axis
        Of range and of radial speed. [m, m/s]
    also : sequence of str
        Sentences that end the caption. [unitless]

    Returns
    -------
    words : dict
        caption, short, summary, table.
    """
    (near, far), (slow, fast) = x.limits, y.limits
    seeable = _outside_the_floor(computed, x, 0), _outside_the_floor(computed, y, 1)
    place = _Place(*seeable, (far - near) * (fast - slow))
    first = _holes_sentence(computed.holes, place)
    return {
        'caption': ' '.join([first, key_sentence(computed.looks, computed.m), *_clutter(computed), *also]),
        'short': first,
        'summary': f'{_counts(computed, x, y)} {first}{_listed(computed.holes, place)}'
        + ''.join(f' {sentence}' for sentence in [*_clutter(computed), *also]),
        'table': _table(computed.holes, x, y),
    }


def _outside_the_floor(computed, axis, which):
    """Return an axis cut to what any plan could see: a hole that fills that much is at every range or speed."""
    _, floor = avoidable(computed.sight, which)
    low, high = axis.limits
    if len(floor) and floor[0, 0] <= low:
        low = min(float(floor[0, 1]), high)
    if len(floor) and floor[-1, 1] >= high:
        high = max(float(floor[-1, 0]), low)
    return replace(axis, limits=(low, high)) if low < high else axis


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


def _holes_sentence(holes, place):
    """Name the holes: none, one, two, or how many and the largest."""
    if not holes.count:
        return 'There is no hole: all that another plan could see is seen.'
    where = [_where(hole, place) for hole in holes.listed[:2]]
    if holes.count == 1:
        return f'One hole, {where[0]}; {percent(holes.share)} of the coverage.'
    if holes.count == 2:
        return f'Two holes, {percent(holes.share)} of the coverage: 1, {where[0]}; 2, {where[1]}.'
    lead = f'{count_word(holes.count)} holes, {percent(holes.share)} of the coverage'
    return capitalised(f'{lead}; 1, the largest, is {where[0]}.')


def _where(hole, place):
    """Say where a hole lies, or what it runs through where its own area is little of its box."""
    (near, far), (slow, fast) = hole.range_m, hole.speed_m_s
    full = hole.share * place.area > _MOSTLY * (far - near) * (fast - slow)
    if _fills(hole.range_m, place.x) and _fills(hole.speed_m_s, place.y):
        return 'at every range and speed' if full else 'spread over all ranges and speeds'
    return _box(hole, place) if full else f'spread over {_box(hole, place)}'


def _box(hole, place):
    """Say the extent of a hole, an axis that it fills as ``at every``."""
    if _fills(hole.range_m, place.x):
        return f'{place.y.interval(*hole.speed_m_s)} at every range'
    distance = place.x.interval(*hole.range_m)
    if _fills(hole.speed_m_s, place.y):
        return f'{distance} at every speed'
    return f'{distance} and {place.y.interval(*hole.speed_m_s)}'


def _fills(ends, axis):
    slack = 1e-9 * (axis.limits[1] - axis.limits[0])
    return ends[0] <= axis.limits[0] + slack and ends[1] >= axis.limits[1] - slack


def _counts(computed, x, y):
    """Say what the map shows and how much of it is seen by how many, for someone who does not see it."""
    n = computed.looks
    shares = [percent(max(float(share), 0.0)) for share in computed.visible.by_count]
    said = f'{shares[1]} of it is seen' if n == 1 else _shares(computed, n, shares)
    return (
        f'Map of the number of PRFs that see a target, over range, {x.span()}, and radial speed, {y.span()}. '
        f'{said}. {percent(computed.floor_share)} is what no plan can see.'
    )


def _shares(computed, n, shares):
    counts = ', '.join(f'by {count_word(i) if i else "none"} {share}' for i, share in enumerate(shares))
    enough = f'at least {count_word(computed.m)} of {count_word(n)}'
    return f'{percent(computed.share)} of it is seen by {enough}: {counts}'


def _clutter(computed):
    """Say what clutter takes of what eclipsing and notch leave."""
    if computed.is_stagger or not computed.echoes.patches:
        return []
    names = dict.fromkeys(patch.name or 'a patch' for patch in computed.echoes.patches)
    lost = computed.share - computed.echoes.share_with_clutter
    if lost <= _NOTHING:
        return [f'{capitalised(listed(names))} {plural(len(names), "covers", "cover")} nothing more.']
    stand = f'where {listed(names)} {plural(len(names), "stands", "stand")} above the noise'
    return [f'Dotted: another {percent(lost)} {stand}.']


def _listed(holes, place):
    """List the largest holes, where the sentence before has not named them all."""
    if holes.count <= 2:
        return ''
    some = holes.listed[:_MOST_IN_SUMMARY]
    return f' The largest: {"; ".join(f"{i + 1}, {_where(hole, place)}" for i, hole in enumerate(some))}.'


def _table(holes, x, y):
    """Return one row for each listed hole."""
    rows = [
        [str(i + 1), x.interval(*hole.range_m), y.interval(*hole.speed_m_s), percent(hole.share)]
        for i, hole in enumerate(holes.listed)
    ]
    return {'head': ['Hole', 'Range', 'Radial speed', 'Share of the coverage'], 'rows': rows}
