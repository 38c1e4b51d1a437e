"""One slice of a search: descents from random sets, one place at a time.

A step holds all PRIs but one, scores every candidate for the last place, and
takes the best. Where no place gains any more, a few places are drawn anew and
the descent goes on from there; after some such kicks in vain it starts afresh.
Sets grow from nothing one PRI at a time, so that they decode from the start.
"""

import numpy as np

from pycore.finder_found import Ledger
from pycore.finder_judge import DIGITS

_STARTS = 12
"""Starts in vain after which a slice gives up on decoding and finds out how near to it sets come. [unitless]"""

_KICKS = 8
"""Kicks in vain after which a descent starts afresh. [unitless]"""

_SETTLED_AT_ONCE = 6
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
        self.judge, self.ledger = judge, ledger
        self._times = judge.times()

    def options(self, held, place, block, weighed, most=None):
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
        most : int or None
            Sets that are looked at in full; ``None`` for all that may be kept. [unitless]

        Returns
        -------
        options : list of (float, float, int)
            Sum of shortfalls, score and PRI, best first: only the best where nothing had to be settled. [unitless,
            unitless, clock counts]
        """
        self.ledger.tried += int(np.count_nonzero(weighed.legal))
        total = weighed.total
        if not self.ledger.has_any:
            self._misses(held, place, block, weighed, total)
        some = np.flatnonzero(weighed.legal & weighed.decodes)
        if not some.size:
            return []
        if self.judge.settles:
            return self._settled(held, place, block, weighed, some, most)
        met = some[total[some] == 0.0]
        for i in met[weighed.score[met] <= self.ledger.worst_kept].tolist():
            self.ledger.keep(weighed.score[i], self._pris(held, place, block.counts[i]))
        self._by_time(held, place, block, weighed, met)
        best = _first(total, weighed.score, some)
        return [(float(total[best]), float(weighed.score[best]), int(block.counts[best]))]

    def _settled(self, held, place, block, weighed, some, most):
        """Look at the most promising sets in full."""
        total = weighed.total
        order = some[np.lexsort((some, weighed.score[some], total[some]))]
        if most is None:
            order = order[(total[order] == 0.0) & (weighed.score[order] <= self.ledger.worst_kept)]
        options = []
        for i in order[:most].tolist():
            pris = self._pris(held, place, block.counts[i])
            short = self.judge.settle(pris)
            whole = round(float(total[i]) + sum(short.values()), DIGITS)
            options.append((whole, float(weighed.score[i]), int(block.counts[i])))
            self._enter(i, pris, weighed, short, whole)
        return sorted(options)

    def _enter(self, i, pris, weighed, short, whole):
        score = float(weighed.score[i])
        if whole == 0.0:
            self.ledger.keep(score, pris)
            self._keep_at_time(i, pris, weighed)
            return
        missed = {name: value for name, value in short.items() if value > 0.0}
        cheap = zip(self.judge.weighed, weighed.short[:, i].tolist(), strict=True)
        missed.update((name, value) for name, value in cheap if value > 0.0)
        if len(missed) == 1 and not self.ledger.has_any:
            self.ledger.miss(next(iter(missed)), whole, score, pris)
        self.ledger.near(whole, score, pris)

    def _by_time(self, held, place, block, weighed, met):
        """Keep the best set of each part of the times."""
        step = self._times.step(weighed.time_s[met])
        better = np.flatnonzero(weighed.score[met] <= self.ledger.beats_at_time(step))
        for at in np.unique(step[better]).tolist():
            mine = met[better][step[better] == at]
            for i in mine[weighed.score[mine] == weighed.score[mine].min()].tolist():
                self.ledger.keep_at_time(at, weighed.score[i], self._pris(held, place, block.counts[i]))

    def _keep_at_time(self, i, pris, weighed):
        step = int(self._times.step(weighed.time_s[i : i + 1])[0])
        self.ledger.keep_at_time(step, weighed.score[i], pris)

    def _misses(self, held, place, block, weighed, total):
        """Enter the nearest sets that miss only one limit, and the nearest that miss any."""
        legal, worth = weighed.legal & weighed.decodes, weighed.score
        some = np.flatnonzero(legal)
        if some.size and not self.judge.settles:
            best = _first(total, worth, some)
            if 0.0 < total[best] <= self.ledger.nearest_so_far:
                self.ledger.near(total[best], worth[best], self._pris(held, place, block.counts[best]))
            missed = np.count_nonzero(weighed.short, axis=0)
            for name, short in zip(self.judge.weighed, weighed.short.round(DIGITS), strict=True):
                only = np.flatnonzero(legal & (missed == 1) & (short > 0.0) & (short <= self.ledger.missed_by(name)))
                if only.size:
                    best = _first(short, worth, only)
                    self.ledger.miss(name, short[best], worth[best], self._pris(held, place, block.counts[best]))
        only = np.flatnonzero(weighed.legal & ~weighed.decodes & (total == 0.0))
        if only.size:
            self._decode_misses(held, place, block, worth, only)

    def _decode_misses(self, held, place, block, worth, only):
        """Enter the sets that come nearest to decoding, of those that meet everything else."""
        decoder, nearest = self.judge.decoder, self.ledger.missed_by('decode')
        if decoder.wanted_counts is None:
            farther = np.ones(only.size, dtype=bool)
        else:
            # Only what decodes farther than any before is looked at in full.
            reached = decoder.wanted_counts * max(1.0 - min(nearest, 1.0), 0.0)
            farther = decoder.sieve(held, block.kind, block.counts[only], decoder.wanted_counts_from(reached))
        for i in only[farther][np.argsort(worth[only[farther]], kind='stable')][: 4 * _SETTLED_AT_ONCE].tolist():
            pris = self._pris(held, place, block.counts[i])
            short = round(decoder.short(pris), DIGITS)
            if 0.0 < short <= self.ledger.missed_by('decode'):
                self.ledger.miss('decode', short, worth[i], pris)
                self.ledger.near(short, worth[i], pris)

    def _pris(self, held, place, count):
        """Return the set that the held PRIs and one candidate make."""
        pris = [pri for _, pri in held]
        return self.judge.in_order([*pris[:place], int(count), *pris[place:]])


def _first(total, score, some):
    """Return the best of some sets: least shortfall, then least score, then the shortest PRI."""
    least = some[total[some] == total[some].min()]
    return least[score[least].argmin()]


class Descent:
    """A slice of a seeded search.

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
        self.judge, self.ledger = judge, Ledger()
        self._record = Recorder(judge, self.ledger)
        self._rng = np.random.Generator(np.random.PCG64(np.random.SeedSequence(seed, spawn_key=(number,))))
        kept = dict(judge.limits.keep)
        self._kept = kept
        self._free = [place for place in range(judge.limits.n) if place not in kept]
        self._pris, self._key, self._queue = None, None, []
        self._base, self._kicks, self._failed = None, 0, 0

    def step(self):
        """Take one step.

        Returns
        -------
        more : bool
            True: a descent never ends by itself.
        """
        self.ledger.steps += 1
        if self._pris is None:
            self._begin()
        elif self._queue:
            self._improve(self._queue.pop())
        else:
            self._turn()
        return True

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
        some = self.judge.drawn_counts(kind, self._rng)
        may = self.judge.legal(held, kind, some)
        if strict and self.judge.decoder.judges and may.any():
            may &= self.judge.decoder.sieve(held, kind, some)
        left = np.flatnonzero(may)
        return int(some[left[self._rng.integers(left.size)]]) if left.size else None

    def _shuffled(self, places):
        return self._rng.permutation(places).tolist()

    def _improve(self, place):
        """Take the best PRI for one place, if it gains."""
        kind = self.judge.kinds[place]
        held = [(self.judge.kinds[q], pri) for q, pri in enumerate(self._pris) if q != place]
        around = self._pris[place]
        block = self.judge.drawn_block(kind, self._rng, around)
        if place in self._kept:
            block = self.judge.block(kind, np.array([around]))
        weighed = self.judge.weigh(held, block)
        options = self._record.options(held, place, block, weighed, _SETTLED_AT_ONCE)
        if options and options[0][:2] < self._key:
            self._key, self._pris[place] = options[0][:2], options[0][2]
            if options[0][2] != around:
                self._queue = self._shuffled([other for other in self._free if other != place])

    def _turn(self):
        """At the end of a descent: kick the better of this set and the last, or start afresh."""
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
        many = min(2 + int(self._rng.integers(2)), len(self._free))
        drawn = self._shuffled(self._free)[:many]
        left = {place: pri for place, pri in enumerate(pris) if place not in drawn}
        for place in drawn:
            count = self._drawn(left, place, self._failed < _STARTS)
            left[place] = pris[place] if count is None else count
        self._start([left[place] for place in range(len(pris))])
