"""What stands in the way of a better plan, in sentences: for limits that no set meets."""

from dataclasses import dataclass, replace

import numpy as np

from pycore.finder.choices import choices
from pycore.wording import (
    SHOWN_UNITS,
    against,
    capitalised,
    count_word,
    in_range_unit,
    in_speed_unit,
    listed,
    percent,
    plural,
    trimmed,
    with_unit,
)


@dataclass(frozen=True, slots=True)
class Obstacle:
    """A limit that stands in the way, and the set that comes nearest to it.

    Parameters
    ----------
    name : str
        ``time``, ``visible``, ``must-see.0`` …, ``decode``, ``hole``, ``unseen``, ``dip``; ``pri`` where no PRIs are
        left to choose from, ``apart`` where so many do not fit. [unitless]
    text : str
        One sentence. [unitless]
    pris : tuple of int or None
        The nearest set, which meets everything else. [clock counts]
    """

    name: str
    text: str
    pris: tuple[int, ...] | None


def obstacles(search, units=None):
    """Return which limits stand in the way.

    Parameters
    ----------
    search : Search
        A search that has found no set that meets every limit. [mixed]
    units : mapping or None
        Shown units, with keys ``range`` and ``speed``; ``None`` for the usual ones. [unitless]

    Returns
    -------
    obstacles : list of Obstacle
        Nearest to being met first; empty where there is a set that meets all, or where nothing has been tried yet.
    """
    units = units or SHOWN_UNITS
    nothing = _nothing_to_choose(search.limits) or _too_many(search)
    if nothing is not None:
        return [nothing]
    found = search.found
    if found.best:
        return []
    if found.misses:
        nearest = sorted(found.misses.items(), key=lambda one: (one[1].short, one[0]))
        return [Obstacle(name, _alone(search, name, missed, units), missed.pris) for name, missed in nearest]
    return [] if found.nearest is None else [_together(search, found.nearest, units)]


def verdict(search, units=None):
    """Return one sentence that says that no set meets every limit, and why; empty where one does.

    Parameters
    ----------
    search : Search
        A search. [mixed]
    units : mapping or None
        As in ``obstacles``. [unitless]

    Returns
    -------
    text : str
        "No two PRFs …" once all sets have been gone through, otherwise how many were tried. [unitless]
    """
    standing = obstacles(search, units)
    if not standing:
        return ''
    first = standing[0]
    if first.name in ('pri', 'apart'):
        return first.text
    n, m = search.limits.n, 'meets' if search.limits.n == 1 or search.limits.stagger else 'meet'
    what = f'{plural(n, "PRF", "PRFs")}' if search.limits.stagger is None else f'stagger of {count_word(n)} intervals'
    if search.proved:
        who = f'No {what} {m}' if search.limits.stagger or n == 1 else f'No {count_word(n)} {what} {m}'
    else:
        who = f'None of the {trimmed(search.tried, 12)} sets tried meets'
    return f'{who} all limits: {first.text[:1].lower()}{first.text[1:]}'


def _nothing_to_choose(limits):
    """Say which limit leaves no PRI to choose from."""
    empty = [place for place in sorted(set(limits.kinds)) if not len(choices(limits, place))]
    if not empty:
        return None
    place = empty[0]
    interval = _pri_interval(limits)
    without = {
        'the duty limit': replace(limits, duty_limit=None),
        'the intervals to avoid': replace(limits, avoid=()),
        'the whole range gates': replace(limits, whole_gates=False),
        'the range that a stagger must reach without ambiguity': replace(limits, decode='none'),
    }
    reasons = [reason for reason, freer in without.items() if len(choices(freer, place))]
    reason = listed(reasons) if reasons else 'the pulse, the duty limit and the intervals to avoid together'
    verb = 'leave' if len(reasons) > 1 or reason.endswith(('gates', 'avoid', 'together')) else 'leaves'
    return Obstacle('pri', f'{capitalised(reason)} {verb} no PRI {interval} to choose from.', None)


def _too_many(search):
    """Say that so many PRIs so far apart do not fit into the interval."""
    limits = search.limits
    if len(set(limits.kinds)) > 1 or not limits.apart_counts:
        return None
    some = search.judge.choices[0]
    at, fit = 0, 0
    while at < len(some) and fit < limits.n:
        (pri,) = some.counts(np.array([at])).tolist()
        fit, at = fit + 1, some.below(pri + limits.apart_counts)
    if fit >= limits.n:
        return None
    apart_us = _us(limits, limits.apart_counts)
    many = f'{count_word(fit)} {plural(fit, "PRI fits", "PRIs fit")}'
    text = f'No more than {many} {_pri_interval(limits)} at least {apart_us} apart; {count_word(limits.n)} are wanted.'
    return Obstacle('apart', text, None)


def _alone(search, name, missed, units):
    """Say how near the best set comes that misses only one limit."""
    pris = ', '.join(trimmed(pri / float(search.limits.clock_hz) * 1e6, 9) for pri in missed.pris)
    what = _missed(search, name, search.better(missed.pris), units)
    return f'With everything else met, the nearest {what} (PRIs {pris} \N{MICRO SIGN}s).'


def _together(search, missed, units):
    """Say what the nearest set misses, where every set misses more than one limit."""
    values, limits = search.better(missed.pris), search.limits
    names = [name for name, part in _shortfalls(search, missed.pris).items() if part > 0.0]
    pris = ', '.join(trimmed(pri / float(limits.clock_hz) * 1e6, 9) for pri in missed.pris)
    parts = listed([_missed(search, name, values, units) for name in names])
    return Obstacle(
        '+'.join(names), f'The nearest misses more than one: it {parts} (PRIs {pris} \N{MICRO SIGN}s).', missed.pris
    )


def _shortfalls(search, pris):
    """Return every shortfall of one set by name."""
    judge = search.judge
    if search.limits.stagger is not None:
        return judge.settle(pris, judge.dip_db(pris))
    values = search.better(pris)
    short = {
        'time': _over(values.time_s, search.limits.time_s),
        'visible': _under(values.visible_share, search.limits.visible),
    }
    for i, (part, got) in enumerate(zip(search.limits.must_see, values.must_see, strict=True)):
        short[f'must-see.{i}'] = _under(got, part.visible)
    return {**short, **judge.settle(pris)}


def _over(used, most):
    return 0.0 if most is None or used <= most * (1 + 1e-9) else 1.0


def _under(got, least):
    return 0.0 if least is None or got >= least - 1e-9 else 1.0


def _missed(search, name, values, units):
    """Say what one set reaches of one limit, and what was wanted."""
    limits = search.limits
    if name == 'time':
        got, limit = values.time_s * 1e3, limits.time_s * 1e3
        return f'takes {with_unit(got, "ms", limit)} where {with_unit(limit, "ms")} are there'
    if name == 'visible':
        got = percent(values.visible_share, limits.visible)
        return f'sees {got} of the coverage where {percent(limits.visible)} is wanted'
    if name.startswith('must-see'):
        part = limits.must_see[int(name.partition('.')[2])]
        got = values.must_see[int(name.partition('.')[2])]
        return f'sees {percent(got, part.visible)} of {part.name} where {percent(part.visible)} is wanted'
    if name == 'hole':
        hole = values.largest_hole
        size, unit = in_range_unit(hole.range_m[1] - hole.range_m[0], units)
        wide, speed_unit = in_speed_unit(hole.speed_m_s[1] - hole.speed_m_s[0], units)
        return (
            f'has a hole beyond what is tolerated, its largest {with_unit(size, unit)} by {with_unit(wide, speed_unit)}'
        )
    if name == 'unseen':
        got, wanted = with_unit(values.unseen_s, 's', limits.unseen_s), with_unit(limits.unseen_s, 's')
        return f'loses sight of a target for {got} where {wanted} are allowed'
    if name == 'dip':
        got, wanted = against(values.dip_db, limits.stagger.dip_db), with_unit(limits.stagger.dip_db, 'dB')
        return f'dips to {got} where {wanted} are wanted'
    return _missed_decoding(limits, values, units)


def _missed_decoding(limits, values, units):
    exact = limits.decode == 'exact'
    reach_m, reach_m_s = (values.exact_m, values.exact_m_s) if exact else (values.decode_m, values.decode_m_s)
    range_part, speed_part = _part(reach_m, limits.decode_m), _part(reach_m_s, limits.decode_m_s)
    if range_part <= speed_part:
        got, unit = in_range_unit(reach_m, units)
        wanted, _ = in_range_unit(limits.decode_m, units)
        return f'decodes only to {against(got, wanted)} of the {with_unit(wanted, unit)} wanted'
    got, unit = in_speed_unit(reach_m_s, units)
    wanted, _ = in_speed_unit(limits.decode_m_s, units)
    return f'decodes speeds over only {against(got, wanted)} of the {with_unit(wanted, unit)} wanted'


def _part(reached, wanted):
    """Return which part of what is wanted is reached."""
    return 1.0 if wanted is None or reached is None else reached / wanted


def _pri_interval(limits):
    low, high = limits.pri_counts
    return f'from {_us(limits, low)[:-3]} to {_us(limits, high)}'


def _us(limits, counts):
    return f'{trimmed(counts / float(limits.clock_hz) * 1e6, 9)} \N{MICRO SIGN}s'
