"""Whether sets of PRFs decode as far as is wanted, for many sets at a time and no further than needed.

A search holds all PRFs but one and asks which candidates may take the last
place. The held ones leave stretches of separation in which one PRF more that
cannot tell would be one too many; a candidate is good where no interval of its
comb touches one of them. Answers are those of :mod:`pycore.decoding.sweep`.
"""

import math
from fractions import Fraction
from itertools import combinations

import numpy as np

from pycore.congruence import exact_span
from pycore.decoding.sweep import first_confusion, ordered_edges

_AT_ONCE = 1_000_000
"""Pairs of candidate and stretch that are looked at together. [unitless]"""


def decodes(periods, half_widths, m, wanted):
    """Return whether one set decodes as far as is wanted, looking no further than that.

    Parameters
    ----------
    periods : sequence of int or Fraction, length N
        PRIs or blind speeds. [any]
    half_widths : sequence of int or Fraction, length N
        Blur of each; all 0 where the exact span is asked for. [same as periods]
    m : int
        How many PRFs must see the target. [unitless]
    wanted : int or Fraction
        Separation up to which the set must decode. [same as periods]

    Returns
    -------
    decodes : bool
        True where the span is at least what is wanted.
    """
    if not any(half_widths):
        return exact_span(periods, m, below=wanted) is None
    span = first_confusion(periods, half_widths, m, wanted)
    return span is None or span >= wanted


def last_place_exactly(held_counts, candidate_counts, m, wanted_counts):
    """Return which candidates make a set whose exact span is at least what is wanted.

    Parameters
    ----------
    held_counts : sequence of int, length N - 1
        PRIs that are held. [clock counts]
    candidate_counts : int array, shape C
        PRIs for the last place. [clock counts]
    m : int
        How many PRFs must see the target. [unitless]
    wanted_counts : int or Fraction
        Delay up to which the set must decode. [clock counts]

    Returns
    -------
    decodes : bool array, shape C
        True where the set of N decodes.
    """
    candidates = np.asarray(candidate_counts, dtype=np.int64)
    wanted = math.ceil(wanted_counts)
    if len(held_counts) >= m and exact_span(held_counts, m, below=wanted) is not None:
        return np.zeros(candidates.shape, dtype=bool)
    multiples = {math.lcm(*(int(pri) for pri in few)) for few in combinations(held_counts, m - 1)}
    short = np.array(sorted(multiple for multiple in multiples if multiple < wanted), dtype=np.int64)
    # lcm(a, T) = a · (T / gcd) stays below wanted · T, far inside 64 bits for any clock
    return (np.lcm(short[:, None], candidates) >= wanted).all(axis=0)


def last_place(held_counts, held_half_widths, candidate_counts, candidate_half_width, m, wanted_counts):
    """Return which candidates make a set whose span with blur is at least what is wanted.

    Parameters
    ----------
    held_counts : sequence of int, length N - 1
        PRIs that are held. [clock counts]
    held_half_widths : sequence of Fraction, length N - 1
        Their blur, above 0. [clock counts]
    candidate_counts : int array, shape C
        PRIs for the last place. [clock counts]
    candidate_half_width : Fraction
        Blur of whichever takes it, above 0. [clock counts]
    m : int
        How many PRFs must see the target. [unitless]
    wanted_counts : int or Fraction
        Delay up to which the set must decode. [clock counts]

    Returns
    -------
    decodes : bool array, shape C
        True where the set of N decodes.
    """
    candidates = np.asarray(candidate_counts, dtype=np.int64)
    widths = [Fraction(width) for width in (*held_half_widths, candidate_half_width)]
    scale = math.lcm(*(width.denominator for width in widths))
    wanted = math.ceil(Fraction(wanted_counts) * scale)
    shortest = min([int(candidates.min(initial=1 << 40)), *map(int, held_counts)])
    longest = max([int(candidates.max(initial=1)), *map(int, held_counts)])
    apart = all(shortest - width >= max(widths) for width in widths)
    if not apart or (wanted + longest * scale).bit_length() > 61:
        sets = ([*map(int, held_counts), int(last)] for last in candidates)
        return np.array([decodes(periods, widths, m, wanted_counts) for periods in sets], dtype=bool)

    start, stop, count = _stretches(held_counts, widths[:-1], scale, m, sorted(widths)[-m], wanted)
    if (count >= m).any():
        return np.zeros(candidates.shape, dtype=bool)
    return ~_touched(start, stop, candidates * scale, int(candidate_half_width * scale))


def _stretches(held_counts, half_widths, scale, m, zone, wanted):
    """Return where m - 1 or more of the held PRFs cannot tell, between the first zone's end and what is wanted."""
    combs = [(Fraction(int(pri) * scale), width * scale) for pri, width in zip(held_counts, half_widths, strict=True)]
    owner, tooth, entering = ordered_edges(combs, Fraction(0), Fraction(wanted))
    period, width = (np.array([int(comb[part]) for comb in combs], dtype=np.int64) for part in (0, 1))
    edge = tooth * period[owner] + np.where(entering, -width[owner], width[owner])
    count = len(combs) + np.cumsum(np.concatenate([[0], np.where(entering, 1, -1)]))
    start = np.maximum(np.concatenate([[0], edge]), int(zone * scale))
    stop = np.minimum(np.concatenate([edge, [wanted]]), wanted)
    kept = (count >= m - 1) & (start < stop)
    return start[kept], stop[kept], count[kept]


def _touched(start, stop, period, half_width):
    """Return for which periods some interval k P ± w, k from 1, overlaps a stretch (start, stop)."""
    touched = np.zeros(period.shape, dtype=bool)
    block = max(_AT_ONCE // max(start.size, 1), 1)
    for first in range(0, period.size, block):
        p = period[first : first + block, None]
        tooth = np.maximum((start - half_width) // p + 1, 1)  # the first interval that ends beyond start
        touched[first : first + block] = (tooth * p - half_width < stop).any(axis=1)
    return touched
