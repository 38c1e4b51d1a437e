"""How far a plan agrees with a table of range, speed and seen, cell by cell, and why it does not."""

import numpy as np

from pycore import zones
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.wording import DISTANCE, SPEED, THIN_SPACE, capitalised, count_word, listed, percent, plural, trimmed

FIRST = 20
"""So many of the cells that disagree are listed. [unitless]"""
_EDGE_M_S = 0.1


def agreement(computed, table):
    """Return how far a plan agrees with a table, in words, and the first cells in which it does not.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    table : Table
        The table. [m, m/s]

    Returns
    -------
    agreement : dict
        ``cells``, ``agree``, ``sentences``, ``head``, ``rows`` (line, range, speed, what the table and what the plan
        says, why).
    """
    in_range, in_speed = _clear(computed, table.range_m, table.speed_m_s)
    here = _seen(computed, in_range, in_speed)
    wrong = np.flatnonzero(here != table.seen)
    cells, agree = int(here.size), int(here.size - wrong.size)
    rows = [
        _row(computed, table, place, in_range[:, place], in_speed[:, place], here[place]) for place in wrong[:FIRST]
    ]
    return {
        'cells': cells,
        'agree': agree,
        'sentences': _sentences(computed, table, here, wrong),
        'head': ['line', f'range ({table.units[0]})', f'speed ({table.units[1]})', 'your table', 'here', 'why'],
        'rows': rows,
    }


def _clear(computed, range_m, speed_m_s):
    """Return on which PRFs each cell is clear in range and in speed: two bool arrays, N × R."""
    plan = computed.plan
    region = (min(range_m.min(), plan.range_m[0]), max(range_m.max(), plan.range_m[1]))
    speeds = (min(speed_m_s.min(), plan.speed_m_s[0]), max(speed_m_s.max(), plan.speed_m_s[1]))
    in_range, in_speed = computed.prf_spans(region, speeds)
    if computed.is_stagger:
        in_speed = computed.sight_of(region, speeds).speeds  # one response for all intervals
    return _marked(in_range, range_m, plan.n), _marked(in_speed, speed_m_s, computed.looks).repeat(
        plan.n // computed.looks, axis=0
    )


def _marked(spans, at, n):
    """Return in which spans of each PRF points lie: bool, shape N × R."""
    every_second_bit = 2 * np.arange(n, dtype=np.uint32)[:, None]
    return (zones.clear_marks(spans, at) >> every_second_bit & np.uint32(1)).astype(bool)


def _seen(computed, in_range, in_speed):
    """Return whether each cell is seen: on M PRFs, or by a stagger on all of its intervals."""
    wanted = computed.plan.n if computed.is_stagger else computed.m
    return (in_range & in_speed).sum(axis=0) >= wanted


def _sentences(computed, table, here, wrong):
    """Say how many agree, which way the others differ, and how many of those lie at an edge."""
    cells, units = _counted(here.size), f'range in {table.units[0]}, speed in {table.units[1]}'
    if not wrong.size:
        all_of_them = 'The one cell agrees' if here.size == 1 else f'All {cells} cells agree'
        return [f'{all_of_them} with the plan.', f'Read as {units}, seen. Clutter is not counted.']
    hidden = int(np.count_nonzero(table.seen[wrong]))
    parts = [(hidden, 'seen in your table and not here'), (int(wrong.size) - hidden, 'seen here and not in your table')]
    ways = listed([f'{_counted(count)} {plural(count, "is", "are")} {what}' for count, what in parts if count])
    alike = 'None' if wrong.size == here.size else capitalised(_counted(here.size - wrong.size))
    of_them = f'{cells} {plural(here.size, "cell")} {"agrees" if wrong.size == here.size - 1 else "agree"}'
    said = [f'{alike} of {of_them}, {percent(1 - wrong.size / here.size)}; {ways}.']
    edge = int(np.count_nonzero(_at_an_edge(computed, table, here, wrong)))
    if edge:
        where = f'half a gate in range or {_EDGE_M_S}{THIN_SPACE}m/s in speed'
        said.append(f'{capitalised(_counted(edge))} of these {plural(edge, "lies", "lie")} within {where} of an edge.')
    said.append(f'Read as {units}, seen. Clutter is not counted.')
    return said


def _at_an_edge(computed, table, here, wrong):
    """Return which of the cells that disagree would agree a little nearer, farther, slower or faster."""
    gate = 0.25 * SPEED_OF_LIGHT_M_S / float(np.max(computed.plan.bandwidth_hz))
    close = np.zeros(wrong.size, dtype=bool)
    for by_m, by_m_s in ((gate, 0.0), (-gate, 0.0), (0.0, _EDGE_M_S), (0.0, -_EDGE_M_S)):
        ranges = np.maximum(table.range_m[wrong] + by_m, 0.0)
        close |= _seen(computed, *_clear(computed, ranges, table.speed_m_s[wrong] + by_m_s)) != here[wrong]
    return close


def _row(computed, table, place, in_range, in_speed, here):
    """Return one cell that disagrees, with what each PRF makes of it."""
    units = DISTANCE.get(table.units[0], 1.0), SPEED[table.units[1]]
    at = [trimmed(one[place] / scale) for one, scale in zip((table.range_m, table.speed_m_s), units, strict=True)]
    words = {True: 'seen', False: 'not seen'}
    return [
        str(table.line[place]),
        *at,
        words[bool(table.seen[place])],
        words[bool(here)],
        _why(computed, in_range, in_speed),
    ]


def _why(computed, in_range, in_speed):
    """Say what stands in the way on each interval, those of a kind together."""
    kinds = {}
    for index, pri_s in enumerate(computed.plan.pri_s.tolist()):
        kinds.setdefault(_kind(computed, in_range[index], in_speed[index]), []).append(trimmed(pri_s * 1e6))
    return '; '.join(f'{listed(pris)}{THIN_SPACE}µs {kind}' for kind, pris in kinds.items())


def _kind(computed, in_range, in_speed):
    blind = 'below the least response' if computed.is_stagger else 'in the notch'
    if in_range and in_speed:
        return 'clear'
    return ' and '.join(word for word, clear in (('eclipsed', in_range), (blind, in_speed)) if not clear)


def _counted(count):
    return count_word(count) if count < 13 and count else trimmed(float(count), 9)
