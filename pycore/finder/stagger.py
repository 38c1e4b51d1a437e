"""One slice of a search for staggers: descents by two PRIs at a time, one longer by what the other is shorter."""

from dataclasses import replace
from itertools import combinations

import numpy as np

from pycore.eclipsing import METRES_PER_SECOND_OF_DELAY
from pycore.finder.cycle import StaggerJudge
from pycore.finder.decode import pulses_of
from pycore.finder.descent import Descent
from pycore.finder.report import Better, tightest
from pycore.finder.shortfalls import DIGITS
from pycore.holes import holes
from pycore.patterns import sweep
from pycore.sight import floor, share, within
from pycore.unseen import inbound
from pycore.visibility import pattern_shares, visible

__all__ = ['StaggerDescent', 'StaggerJudge', 'stagger_better']

_KICKS = 12
"""Kicks in vain after which a descent starts afresh. [unitless]"""

_AT_ONCE = 512
"""Most lengths of one PRI that are tried in a step. [unitless]"""

_SWAPS = (-1, -1)


class StaggerDescent(Descent):
    """A slice of a seeded search for staggers.

    Parameters
    ----------
    judge : StaggerJudge
        Holds cycles against the limits. [mixed]
    seed : int
        Of the whole search. [unitless]
    number : int
        Of the slice. [unitless]
    """

    def __init__(self, judge, seed, number):
        super().__init__(judge, seed, number)
        self._depth = np.inf

    def _begin(self):
        """Draw a cycle, and bring its mean to where it must be."""
        some, limits = self.judge.choices[0], self.judge.limits
        least, most = self.judge.cycle.mean_counts
        low, high = some.counts(np.array([0, len(some) - 1])).tolist()
        first, last = max(least, low), max(min(most, high), max(least, low))
        mean = first + (last - first) * self._chance.part()
        side = np.sqrt(self.judge.cycle.spread)
        ends = some.below(int(max(low, mean / side))), some.below(int(min(high, mean * side))) + 1
        many = max(min(ends[1], len(some)), ends[0] + 1) - ends[0]
        drawn = ends[0] + (self._chance.parts(limits.n) * many).astype(np.int64)
        pris = some.counts(drawn.clip(0, len(some) - 1))
        pris[list(self._kept)] = list(self._kept.values())
        self._start(self._levelled(pris))
        self._base, self._kicks = None, 0

    def _levelled(self, pris):
        """Move PRIs, one after the other, until the mean is within its limits."""
        some, (least, most) = self.judge.choices[0], self.judge.cycle.mean_counts
        for _ in range(8 * pris.size):
            missing = max(least * pris.size - pris.sum(), 0) + min(most * pris.size - pris.sum(), 0)
            if abs(missing) < 1e-6:
                break
            place = self._chance.below(pris.size)
            if place not in self._kept:
                part = missing if self._chance.part() < 0.5 else missing * self._chance.part()
                at = some.below(int(round(pris[place] + part)))
                pris[place] = some.counts(np.array([min(at, len(some) - 1)]))[0]
        return pris

    def _start(self, pris):
        legal = self.judge.legal(pris[None])[0]
        self._pris = pris if legal else None
        self._depth = -np.inf
        if legal:
            free = [place for place in range(pris.size) if place not in self._kept]
            self._moves = [*combinations(free, 2), *((place, -1) for place in free)]
            self._moves += [_SWAPS] if pris.size > 3 else []
            self._queue = self._shuffled()

    def _shuffled(self):
        return self._chance.shuffled(self._moves)

    def _improve(self, move):
        """Try all that one move can do, and take the best if it gains."""
        cycles = self._swapped() if move == _SWAPS else self._shifted(*move)
        cycles = cycles[self.judge.legal(cycles)] if cycles.size else cycles
        if not cycles.size:
            return
        self.ledger.tried += cycles.shape[0]
        depth = self.judge.dips(cycles).round(DIGITS)
        best = int(depth.argmax())
        if depth[best] > self._depth:
            changed = (cycles[best] != self._pris).any()
            self._depth, self._pris = float(depth[best]), cycles[best]
            if changed:
                self._queue = self._shuffled()

    def _shifted(self, place, partner):
        """Return all cycles in which one PRI is another and its partner, if it has one, makes up for it."""
        some, own = self.judge.choices[0], int(self._pris[place])
        if len(some) <= _AT_ONCE:
            lengths = some.counts(np.arange(len(some)))
        else:
            part = len(some) / (_AT_ONCE // 2)
            drawn = ((np.arange(_AT_ONCE // 2) + self._chance.parts(_AT_ONCE // 2)) * part).astype(np.int64)
            at = some.below(own)
            near = np.arange(max(at - _AT_ONCE // 4, 0), min(at + _AT_ONCE // 4, len(some)))
            lengths = some.counts(np.union1d(drawn.clip(0, len(some) - 1), near))
        cycles = np.repeat(self._pris[None], lengths.size, axis=0)
        cycles[:, place] = lengths
        if partner >= 0:
            cycles[:, partner] -= lengths - own
        return cycles

    def _swapped(self):
        """Return all cycles in which two PRIs have changed places."""
        free = [place for place in range(self._pris.size) if place not in self._kept]
        cycles = np.repeat(self._pris[None], len(free) * (len(free) - 1) // 2, axis=0)
        for row, (one, other) in zip(cycles, combinations(free, 2), strict=True):
            row[[one, other]] = row[[other, one]]
        return cycles

    def _turn(self):
        """At the end of a descent: enter it, then kick the better of this cycle and the last, or start afresh."""
        self._enter()
        if self._base is None or self._depth > self._base[0]:
            self._base, self._kicks = (self._depth, self._pris.copy()), 0
        else:
            self._kicks += 1
        if self._kicks >= _KICKS:
            self._begin()
            return
        kicked = self._base[1].copy()
        free = [place for place in range(kicked.size) if place not in self._kept]
        for _ in range(2):
            if len(free) > 1:
                one, other = self._chance.shuffled(free)[:2]
                shift = (self._chance.below(41) - 20) * self.judge.choices[0].step
                kicked[one], kicked[other] = kicked[one] + shift, kicked[other] - shift
        if self.judge.legal(kicked[None])[0]:
            self._start(kicked)

    def _enter(self):
        """Work a cycle out exactly and enter it."""
        pris = self.judge.in_order(self._pris)
        dip_db = self.judge.dip_db(pris)
        short = {name: value for name, value in self.judge.settle(pris, dip_db).items() if value > 0.0}
        score, whole = round(-dip_db, 9), round(sum(short.values()), DIGITS)
        if not short:
            self.ledger.keep(score, pris)
            self.ledger.end(score, pris)
            return
        if len(short) == 1:
            self.ledger.miss(next(iter(short)), whole, score, pris)
        self.ledger.near(whole, score, pris)


def stagger_better(judge, pris):
    """Return what one stagger gives.

    Parameters
    ----------
    judge : StaggerJudge
        Holds cycles against the limits. [mixed]
    pris : tuple of int, length N
        In sending order. [clock counts]

    Returns
    -------
    better : Better
        In full, with ``dip_db``.
    """
    limits, seen = judge.limits, judge.sight(pris)
    got = visible(pattern_shares(sweep(seen.ranges, seen.range_m), sweep(seen.speeds, seen.speed_m_s), 1), 1, 1)
    unseen_floor, hole, hidden = floor(seen), holes(seen, limits.hole_m, limits.hole_m_s), inbound(seen)
    pri_s = tuple(pri / float(limits.clock_hz) for pri in pris)
    near_s = limits.near.pulse_s if limits.near else 0.0
    reach_m = min(pri_s) * METRES_PER_SECOND_OF_DELAY
    values = Better(
        pris,
        pri_s,
        (int(pulses_of(limits.places[0], np.float64(sum(pri_s) / limits.n))),) * limits.n,
        got.share,
        unseen_floor,
        max(0.0, 1.0 - got.share - unseen_floor),
        got.if_one_lost,
        tuple(share(within(seen, part.range_m, part.speed_m_s)) for part in limits.must_see),
        hole.listed[0] if hole.listed else None,
        None if np.isnan(hidden.time_s) else float(hidden.time_s),
        reach_m,
        None,
        reach_m,
        None,
        judge.time_of(pris),
        max((limits.places[0].pulse_s + near_s) / pri for pri in pri_s),
        None,
        judge.dip_db(pris),
    )
    return replace(values, tightest=tightest(limits, values))
