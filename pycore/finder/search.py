"""One slice of a search: descents from random sets, one place at a time.

A step holds all PRIs but one, scores every candidate for the last place, and
takes the best. Where no place gains any more, a few places are drawn anew and
the descent goes on from there; after some such kicks in vain it starts afresh.
Sets grow from nothing one PRI at a time, so that they decode from the start.
"""

from dataclasses import dataclass

import numpy as np

from pycore.finder.blocks import Block, Weighed
from pycore.finder.descent import Descent
from pycore.finder.shortfalls import DIGITS

_STARTS = 12
"""Starts in vain after which a slice gives up on decoding and finds out how near to it sets come. [unitless]"""

_KICKS = 8
"""Kicks in vain after which a descent starts afresh. [unitless]"""

_SETTLED_AT_ONCE = 4
"""Sets that are looked at in full in one step of a descent, where that is called for. [unitless]"""


class Recorder:
    """Enters into a ledger what a step has weighed.

    Parameters
    ----------
    judge : Judge
        Holds sets against the limits. [mixed]
    ledger : Ledger
        Where it is entered. [unitless]
    """

    def __init__(self, judge, ledger):
        self.judge, self.ledger, self.waiting = judge, ledger, []
        self._times = judge.times()

    def options(self, held, place, block, weighed):
        """Enter all sets of a step and return the best of those that decode.

        Parameters
        ----------
        held : sequence of (int, int), length N - 1
            Place and PRI of each. [unitless, clock counts]
        place : int
            The last place. [unitless]
        block : Block
            Candidates for it. [mixed]
        weighed : Weighed
            What they are worth. [unitless]

        Returns
        -------
        options : list of (float, float, int)
            Sum of shortfalls, score and PRI, best first: only the best where nothing had to be settled. Where sets
            must be looked at in full, only a few are; the others that may be kept are ``waiting``. [unitless,
            unitless, clock counts]
        """
        step = _Step(held, place, block, weighed, weighed.total)
        self.ledger.tried += int(np.count_nonzero(weighed.legal))
        if not self.ledger.has_any:
            self._misses(step)
        some = np.flatnonzero(weighed.legal & weighed.decodes)
        if not some.size:
            return []
        if self.judge.settles:
            order = some[np.lexsort((some, weighed.score[some], step.total[some]))]
            later = order[_SETTLED_AT_ONCE:]
            self.waiting = [(step, i) for i in later[step.total[later] == 0.0].tolist()]
            return sorted(self._settled(step, i) for i in order[:_SETTLED_AT_ONCE].tolist())
        self._keep(step, some[step.total[some] == 0.0])
        best = _first(step.total, weighed.score, some)
        return [(float(step.total[best]), float(weighed.score[best]), int(block.counts[best]))]

    def settle_waiting(self):
        """Look at a few more sets in full, of those that may still be kept."""
        taken = 0
        while self.waiting and taken < _SETTLED_AT_ONCE:
            step, i = self.waiting.pop(0)
            if step.weighed.score[i] <= self.ledger.worst_kept:
                self._settled(step, i)
                taken += 1

    def _settled(self, step, i):
        """Look at one set in full and enter it."""
        pris, score = self._pris(step, i), float(step.weighed.score[i])
        short = {name: value for name, value in self.judge.settle(pris).items() if value > 0.0}
        whole = round(float(step.total[i]) + sum(short.values()), DIGITS)
        if whole == 0.0:
            self.ledger.keep(score, pris)
            part = int(self._times.step(step.weighed.time_s[i : i + 1])[0])
            self.ledger.keep_at_time(part, score, pris)
        elif not self.ledger.has_any:
            if step.total[i] == 0.0 and len(short) == 1:
                self.ledger.miss(next(iter(short)), whole, score, pris)
            self.ledger.near(whole, score, pris)
        return whole, score, int(step.block.counts[i])

    def _keep(self, step, met):
        """Enter the sets that meet every limit, and the best of each part of the times."""
        score = step.weighed.score
        for i in met[score[met] <= self.ledger.worst_kept].tolist():
            self.ledger.keep(score[i], self._pris(step, i))
        part = self._times.step(step.weighed.time_s[met])
        better = np.flatnonzero(score[met] <= self.ledger.beats_at_time(part))
        for at in np.unique(part[better]).tolist():
            mine = met[better][part[better] == at]
            for i in mine[score[mine] == score[mine].min()].tolist():
                self.ledger.keep_at_time(at, score[i], self._pris(step, i))

    def _misses(self, step):
        """Enter the nearest sets that miss only one limit, and the nearest that miss any."""
        weighed, score = step.weighed, step.weighed.score
        if not weighed.legal.any():
            return
        # What does not decode misses the whole of a limit, as long as nobody has looked how far it does.
        total = np.where(weighed.decodes, step.total, step.total + 1.0)
        best = _first(total, score, np.flatnonzero(weighed.legal))
        if 0.0 < total[best] <= self.ledger.nearest_so_far and step.total[best] > 0.0:
            short = sum(self.judge.settle(self._pris(step, best)).values()) if self.judge.settles else 0.0
            self.ledger.near(round(float(total[best]) + short, DIGITS), score[best], self._pris(step, best))
        missed = np.count_nonzero(weighed.short, axis=0)
        for name, short in zip(self.judge.weighed, weighed.short.round(DIGITS), strict=True):
            only = (missed == 1) & (short > 0.0) & (short <= self.ledger.missed_by(name))
            self._one_missed(step, name, short, np.flatnonzero(weighed.legal & weighed.decodes & only))
        self._decode_misses(step, np.flatnonzero(weighed.legal & ~weighed.decodes & (step.total == 0.0)))

    def _one_missed(self, step, name, short, only):
        """Enter the nearest of the sets that miss one limit by what blocks are held against."""
        order = only[np.lexsort((only, step.weighed.score[only], short[only]))]
        for i in order[:_SETTLED_AT_ONCE].tolist():
            pris = self._pris(step, i)
            if not self.judge.settles or not any(self.judge.settle(pris).values()):
                self.ledger.miss(name, short[i], step.weighed.score[i], pris)
                return

    def _decode_misses(self, step, only):
        """Enter the sets that come nearest to decoding, of those that meet everything else."""
        decoder, score = self.judge.decoder, step.weighed.score
        if not only.size:
            return
        if decoder.wanted_m_s is None:
            # Only what decodes farther than any before is looked at in full.
            reached = decoder.wanted_counts * (1.0 - min(self.ledger.missed_by('decode'), 1.0))
            farther = decoder.wanted_counts_from(reached)
            only = only[decoder.sieve(step.held, step.block.kind, step.block.counts[only], farther)]
        for i in only[np.argsort(score[only], kind='stable')][: 4 * _SETTLED_AT_ONCE].tolist():
            pris = self._pris(step, i)
            short = round(decoder.short(pris), DIGITS)
            others = {name: value for name, value in self.judge.settle(pris).items() if name != 'decode'}
            if 0.0 < short <= self.ledger.missed_by('decode') and not any(others.values()):
                self.ledger.miss('decode', short, score[i], pris)

    def _pris(self, step, i):
        """Return the set that the held PRIs and one candidate make."""
        pris = [pri for _, pri in step.held]
        return self.judge.in_order([*pris[: step.place], int(step.block.counts[i]), *pris[step.place :]])


@dataclass(frozen=True, slots=True)
class _Step:
    """All sets of one step: the held PRIs, the last place, its candidates, what they are worth."""

    held: list
    place: int
    block: Block
    weighed: Weighed
    total: np.ndarray


def _first(total, score, some):
    """Return the best of some sets: least shortfall, then least score, then the shortest PRI."""
    least = some[total[some] == total[some].min()]
    return least[score[least].argmin()]


class SetDescent(Descent):
    """A slice of a seeded search; it does not end by itself.

    Parameters
    ----------
    judge : Judge
        Holds sets against the limits. [mixed]
    seed : int
        Of the whole search. [unitless]
    number : int
        Of the slice. [unitless]
    """

    def __init__(self, judge, seed, number):
        super().__init__(judge, seed, number)
        self._record = Recorder(judge, self.ledger)
        self._free = [place for place in range(judge.limits.n) if place not in self._kept]
        self._key, self._failed = None, 0

    def _begin(self):
        """Draw a set, one PRI at a time, each so that what there is so far decodes."""
        pris = dict(self._kept)
        strict = self._failed < _STARTS
        for place in self._shuffled(self._free) if self._free else []:
            count = self._drawn(pris, place, strict)
            if count is None:
                self._failed += 1
                return
            pris[place] = count
        self._start([pris[place] for place in range(self.judge.limits.n)])
        self._base, self._kicks = None, 0

    def _start(self, pris):
        self._pris, self._key = pris, (np.inf, np.inf)
        self._queue = self._shuffled(self._free or [0])

    def _drawn(self, pris, place, strict):
        """Draw a PRI for one place that goes with those that are there; None where none does."""
        held = [(self.judge.kinds[other], count) for other, count in sorted(pris.items())]
        kind = self.judge.kinds[place]
        some = self.judge.drawn_counts(kind, self._chance)
        may = self.judge.legal(held, kind, some)
        if strict and self.judge.decoder.judges and may.any():
            may &= self.judge.decoder.sieve(held, kind, some)
        left = np.flatnonzero(may)
        return int(some[left[self._chance.below(left.size)]]) if left.size else None

    def _shuffled(self, places):
        return self._chance.shuffled(places)

    def _improve(self, place):
        """Take the best PRI for one place, if it gains."""
        kind = self.judge.kinds[place]
        held = [(self.judge.kinds[q], pri) for q, pri in enumerate(self._pris) if q != place]
        around = self._pris[place]
        block = self.judge.drawn_block(kind, self._chance, around)
        if place in self._kept:
            block = self.judge.block(kind, np.array([around]))
        weighed = self.judge.weigh(held, block)
        options = self._record.options(held, place, block, weighed)
        if options and options[0][:2] < self._key:
            self._key, self._pris[place] = options[0][:2], options[0][2]
            if options[0][2] != around:
                self._queue = self._shuffled([other for other in self._free if other != place])

    def _turn(self):
        """At the end of a descent: enter it, then kick the better of this set and the last, or start afresh."""
        if self._key[0] == 0.0:
            self.ledger.end(self._key[1], self.judge.in_order(self._pris))
        if self._base is None or self._key < self._base[0]:
            self._base, self._kicks = (self._key, list(self._pris)), 0
        else:
            self._kicks += 1
        if self._kicks >= _KICKS or len(self._free) < 2 or self._key[0] == np.inf:
            self._pris = None
            self._begin()
        else:
            self._kick(list(self._base[1]))

    def _kick(self, pris):
        """Draw a few places anew."""
        many = min(2 + self._chance.below(2), len(self._free))
        drawn = self._shuffled(self._free)[:many]
        left = {place: pri for place, pri in enumerate(pris) if place not in drawn}
        for place in drawn:
            count = self._drawn(left, place, self._failed < _STARTS)
            left[place] = pris[place] if count is None else count
        self._start([left[place] for place in range(len(pris))])
