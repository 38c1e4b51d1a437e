"""Where a set of PRFs first takes one target for another: an edge sweep in exact fractions.

PRF i cannot tell a separation D from zero when ``|D - k P_i| < w_i`` for some
whole k: the separations form a comb of open intervals about the multiples of
its period.

          w                     P - w   P + w              2P - w
    ======)-----------------------(=======)-----------------(====
    0     leaves                enters    leaves

The sweep counts the open intervals that each separation lies in. Periods and
half-widths share any unit; nothing is rounded, so an answer on an edge is the
edge itself.
"""

import math
from fractions import Fraction
from itertools import combinations

import numpy as np

_FIRST_EDGES, _MOST_EDGES = 1024, 65_536
"""Edges in the first window of the sweep, where most sets answer, and in the longest. [unitless]"""
_KEY_BITS = 61
"""Bits that a position may need in int64, a bit for the kind of edge and one for the sign left free. [unitless]"""


def first_confusion(periods, half_widths, m, limit):
    """Return the smallest separation, beyond the first zone around zero, that too many PRFs cannot tell from zero.

    Parameters
    ----------
    periods : sequence of int or Fraction, length N
        Separation that each PRF never sees: its PRI, or its blind speed. Above 0. [any]
    half_widths : sequence of int or Fraction, length N
        Half the width of each interval of the comb. Above 0. [same as periods]
    m : int
        How many PRFs must be unable to tell. [unitless]
    limit : int or Fraction
        Where the sweep ends. [same as periods]

    Returns
    -------
    separation : Fraction or None
        An edge ``k P_i - w_i``; 0 where the first zone does not end; None where
        there is none up to the limit.

    Notes
    -----
    The intervals are open. Where one is left and another entered at the same
    point, neither holds the point, so leaving comes before entering. The first
    zone is all that hangs together with zero; where the blur is so wide that
    it runs into the next interval of a comb, that interval belongs to it.
    """
    always = [2 * w > p for p, w in zip(periods, half_widths, strict=True)]
    m -= sum(always)
    if m <= 0:
        return Fraction(0)
    combs = [(Fraction(p), Fraction(w)) for p, w, on in zip(periods, half_widths, always, strict=True) if not on]
    if len(combs) < m:
        return None
    # at least one whole interval, so that a zone that has no end shows as such and is not taken for a clean sweep
    found = _swept(combs, m, max(Fraction(limit), *(period for period, _ in combs)))
    return found if found is not None and found <= limit else None


def _swept(combs, m, limit):
    """Return the first edge at which m of the combs hold again after fewer did, or None; 0 where m always hold."""
    holding, away = len(combs), False
    for start, stop in _windows(combs, limit):
        owner, tooth, entering = ordered_edges(combs, start, stop)
        counts = holding + np.cumsum(np.where(entering, 1, -1))
        outside = np.flatnonzero(counts < m)
        if away or outside.size:
            first = 0 if away else outside[0]
            again = first + np.flatnonzero(counts[first:] >= m)
            if again.size:
                period, width = combs[owner[again[0]]]
                return int(tooth[again[0]]) * period - width
            away = True
        holding = counts[-1] if counts.size else holding
    return None if away else Fraction(0)


def _windows(combs, limit):
    """Yield the stretches (start, stop] of the sweep, short ones first, none with more edges than fit in memory."""
    shortest = min(period for period, _ in combs)
    start, edges = Fraction(0), _FIRST_EDGES
    while start < limit:
        stop = min(start + shortest * (edges // (2 * len(combs)) or 1), limit)
        yield start, stop
        start, edges = stop, min(4 * edges, _MOST_EDGES)


def ordered_edges(combs, start, stop):
    """Return the edges in (start, stop] in the sweep's order.

    Parameters
    ----------
    combs : sequence of (Fraction, Fraction), length N
        Each PRF's period and half-width, in exact fractions of one unit. [any, the same for all]
    start, stop : Fraction
        Where the sweep begins, not included, and ends. [same]

    Returns
    -------
    owner, multiple : int array, shape E
        Whose edge it is, and at which multiple of its period.
    enters : bool array, shape E
        Whether the zone is entered there; at one point leaving comes before entering.
    """
    periods, widths, denominators = _on_grids(combs)
    bits = max((math.lcm(a, b) for a, b in combinations(set(denominators), 2)), default=max(denominators)).bit_length()
    kind = _integer_kind(stop, max(period for period, _ in combs), denominators, bits)
    p, w, d = (np.array(values, dtype=kind) for values in (periods, widths, denominators))

    owner_in, tooth_in = _teeth(combs, start, stop, 1)
    owner_out, tooth_out = _teeth(combs, start, stop, -1)
    enters = _position(tooth_in.astype(kind) * p[owner_in] - w[owner_in], d[owner_in], bits)
    leaves = _position(tooth_out.astype(kind) * p[owner_out] + w[owner_out], d[owner_out], bits)

    order = np.argsort(np.concatenate([2 * leaves, 2 * enters + 1]), kind='stable')
    owner, tooth = np.concatenate([owner_out, owner_in]), np.concatenate([tooth_out, tooth_in])
    return owner[order], tooth[order], order >= leaves.size


def _teeth(combs, start, stop, side):
    """Return owner and multiple k of every edge ``k P - side w`` in (start, stop]."""
    first = np.array([math.floor((start + side * w) / p) + 1 for p, w in combs])
    count = np.array([math.floor((stop + side * w) / p) + 1 for p, w in combs]) - first
    owner = np.repeat(np.arange(len(combs)), count)
    return owner, np.arange(owner.size) + np.repeat(first - (np.cumsum(count) - count), count)


def _on_grids(combs):
    """Return whole numbers p, w, d of each comb with period p/d and half-width w/d."""
    denominators = [math.lcm(p.denominator, w.denominator) for p, w in combs]
    periods = [int(p * d) for (p, _), d in zip(combs, denominators, strict=True)]
    widths = [int(w * d) for (_, w), d in zip(combs, denominators, strict=True)]
    return periods, widths, denominators


def _integer_kind(stretch, longest, denominators, bits):
    """Return int64 where every step of the sweep fits into it, Python's own integers where not."""
    largest = max(denominators)
    reach = stretch + longest
    fits = math.ceil(reach * 2**bits).bit_length() <= _KEY_BITS and math.ceil(reach * largest).bit_length() <= 62
    return np.int64 if fits and largest < 1 << 50 else object


def _position(numerator, denominator, bits):
    """Return floor(2^bits × numerator/denominator) by long division, a few bits at a time.

    Edges of two combs lie on the grids 1/d and 1/e, so that two that differ do
    so by 1/lcm(d, e) at least. With 2^bits no smaller than that lcm the whole
    numbers returned are in the order of the fractions, and equal only where they are.
    """
    quotient, rest = numerator // denominator, numerator % denominator
    step = 62 - int(np.max(denominator, initial=1)).bit_length() if quotient.dtype != object else bits
    while bits > 0:
        shift = min(step, bits)
        rest = rest << shift
        quotient = (quotient << shift) + rest // denominator
        rest = rest % denominator
        bits -= shift
    return quotient
