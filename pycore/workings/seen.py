"""Workings of what is seen: the coverage, must-see regions and holes."""

import math

import numpy as np

from pycore import patterns, visibility
from pycore.wording import count_word, plural
from pycore.workings.line import DEFINITION, Line, Working, each, interval, put_in, shown


def visible(computed, name):
    """Return the workings of the share of the coverage that is seen.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        Where each PRF is clear, the shares by number of clear PRFs, their sum, and the floor.
    """
    plan = computed.plan
    lines, value = _share(computed, plan.range_m, plan.speed_m_s)
    return Working((*lines[:-1], _floor(computed), lines[-1]), value, _share_notes(computed))


def must_see(computed, name):
    """Return the workings of the share of a must-see region that is seen.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Such as ``'must-see.0'``. [unitless]

    Returns
    -------
    working : Working
        As for the coverage, over the region.
    """
    region = computed.plan.must_see[int(name.partition('.')[2])]
    lines, value = _share(computed, region.range_m, region.speed_m_s)
    return Working(tuple(lines), value, _share_notes(computed))


def _share_notes(computed):
    notes = ('Clutter is not counted here; it only ever takes away from this share.',)
    if computed.is_stagger:
        return (*notes, 'One CPI, one verdict: a range is clear only where every interval of the cycle is.')
    return notes


def _share(computed, range_m, speed_m_s):
    """Return the lines that lead to a share of any region, and that share."""
    part = computed.sight_of(range_m, speed_m_s)
    sweeps = patterns.sweep(part.ranges, range_m), patterns.sweep(part.speeds, speed_m_s)
    shares = visibility.share_by_count(visibility.pattern_shares(*sweeps, part.n), part.n)
    value = math.fsum(shares[part.m :].tolist())
    where = f'over {interval(range_m, 1e3, "km")}, {interval(speed_m_s, 1.0, "m/s")}'
    lines = [
        _clear_ranges(computed, range_m),
        _clear_speeds(computed, part, speed_m_s),
        Line(
            'share with k clear = Σ (length in range × length in speed of every pair of patterns in which k PRFs are '
            'clear in both)/area',
            where,
            '; '.join(f'{k} clear: {shown(share * 100, "%")}' for k, share in enumerate(shares.tolist())),
        ),
        Line(
            f'share seen = sum of the shares with at least {part.m} clear',
            '; '.join(shown(share * 100, '%') for share in shares[part.m :].tolist()),
            shown(value * 100, '%'),
            DEFINITION,
        ),
    ]
    return lines, value


def _clear_ranges(computed, range_m):
    """Say where each PRF receives enough, and how much of the ranges that leaves."""
    plan = computed.plan
    spans, _ = computed.prf_spans(range_m, plan.speed_m_s)
    clear = np.bincount(spans.prf, spans.stop - spans.start, plan.n) / (range_m[1] - range_m[0])
    numbers = put_in(
        each('T', plan.pri_s * 1e6, 'µs'),
        each('τ', plan.pulse_s * 1e6, 'µs'),
        f'recovery {shown(plan.recovery_s * 1e6, "µs")}',
        f'guard {shown(plan.guard_s * 1e6, "µs")}',
        f'q = {shown(plan.received_min)}',
        ''
        if plan.near is None
        else f'near pulse {shown(plan.near.pulse_s * 1e6, "µs")} to {shown(plan.near.to_range_m / 1e3, "km")}',
    )
    formula = 'clear in range: c/2 (recovery + qτ) ≤ R − k cT/2 ≤ c/2 (T − guard − qτ)'
    if plan.near is not None:
        formula += '; up to the end of the near pulse likewise with its own echo'
    return Line(formula, numbers, each('clear part of the ranges', 100 * clear, '%'))


def _clear_speeds(computed, part, speed_m_s):
    """Say at which speeds each PRF, or the stagger, is clear."""
    plan = computed.plan
    clear = np.bincount(part.speeds.prf, part.speeds.stop - part.speeds.start, part.n) / (speed_m_s[1] - speed_m_s[0])
    result = each('clear part of the speeds', 100 * clear, '%')
    if computed.is_stagger:
        numbers = f'least response {shown(plan.response_min_db, "dB")}'
        return Line('clear in speed: averaged response ≥ least response', numbers, result, DEFINITION)
    numbers = put_in(each('v_b = λ/(2T)', computed.blind_speed_m_s, 'm/s'), each('notch', plan.notch_m_s, 'm/s'))
    return Line('clear in speed: |v − k v_b| ≥ notch for every whole k', numbers, result, DEFINITION)


def _floor(computed):
    """Say what no plan can see with this pulse and notch."""
    notch = [computed.response.notch_m_s] if computed.is_stagger else computed.plan.notch_m_s
    numbers = put_in(
        each('first opening c/2 (recovery + qτ)', computed.first_opening_m / 1e3, 'km'),
        each('notch around zero', notch, 'm/s') if np.isfinite(notch).all() else 'the response never reaches the least',
    )
    formula = 'floor = blind share with every interval and every blind speed out of the way'
    return Line(formula, numbers, shown(100 * computed.floor_share, '%'))


def largest_hole(computed, name):
    """Return the workings of the largest hole.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        What the holes add up to, and the largest of them with its box.
    """
    plan, found = computed.plan, computed.holes
    total = math.fsum(hole.share for hole in found.listed)
    sums = Line(
        'holes together = 1 − share seen − floor',
        put_in(f'seen {shown(100 * computed.share, "%")}', f'floor {shown(100 * computed.floor_share, "%")}'),
        f'{shown(100 * computed.excess_over_floor, "%")}; the {len(found.listed)} listed {shown(100 * total, "%")}',
        DEFINITION,
    )
    if not found.listed:
        return Working((sums,), 0.0)
    largest = max(found.listed, key=lambda hole: hole.share)
    (low, high), (slow, fast) = largest.range_m, largest.speed_m_s
    area = (plan.range_m[1] - plan.range_m[0]) * (plan.speed_m_s[1] - plan.speed_m_s[0])
    box = Line(
        'its box = extent in range × extent in speed/area of the coverage',
        put_in(interval((low, high), 1e3, 'km'), interval((slow, fast), 1.0, 'm/s')),
        shown(100 * (high - low) * (fast - slow) / area, '%'),
        DEFINITION,
    )
    own = Line(
        'its own area: segments of the two sweeps that hang together across edges',
        f'{count_word(found.count)} {plural(found.count, "hole")}',
        shown(100 * largest.share, '%'),
    )
    return Working((sums, box, own), largest.share, _size_notes(plan))


def _size_notes(plan):
    if plan.wanted.hole_m is None and plan.wanted.hole_m_s is None:
        return ()
    return ('A hole is too large where a rectangle inside it is both longer and wider than is allowed.',)
