"""Every set there is, in slices: what proves that no better one exists.

All places but one run through the rising combinations of their PRIs; the last
place takes all longer PRIs of its kind at once. A set is met exactly once.
"""

from math import comb

import numpy as np

from pycore.finder.found import Ledger
from pycore.finder.search import Recorder


class Exhaustion:
    """A slice of all sets.

    Parameters
    ----------
    judge : Judge
        Holds sets against the limits; every place has a whole block. [mixed]
    first : int
        Number of the first combination of held PRIs. [unitless]
    count : int
        How many combinations belong to the slice. [unitless]
    """

    def __init__(self, judge, first, count):
        self.judge, self.ledger = judge, Ledger()
        self._record = Recorder(judge, self.ledger)
        self._groups = groups(judge)
        self._next, self._end = first, min(first + count, combinations(judge))

    def step(self):
        """Take one step.

        Returns
        -------
        more : bool
            Whether there is another step to take.
        """
        self.ledger.steps += 1
        if self._record.waiting:
            self._record.settle_waiting()
        elif self._next < self._end:
            self._score(self._next)
            self._next += 1
        return self._next < self._end or bool(self._record.waiting)

    def _score(self, number):
        """Score all sets of one combination of held PRIs."""
        judge, longer = self.judge, -1
        pris = dict(judge.limits.keep)
        for kind, places in reversed(self._groups):
            last = kind == self._groups[-1][0]
            block = judge.whole_block(kind)
            taken = places[:-1] if last else places
            number, rank = divmod(number, comb(len(block.counts), len(taken)))
            chosen = _combination(rank, len(block.counts), len(taken))
            pris.update(zip(taken, block.counts[chosen].tolist(), strict=True))
            longer = max(chosen, default=-1) if last else longer
        kind, places = self._groups[-1]
        self._last_place(pris, places[-1], kind, longer)

    def _last_place(self, pris, place, kind, longer):
        judge, block = self.judge, self.judge.whole_block(kind)
        held = [(judge.kinds[other], pri) for other, pri in sorted(pris.items())]
        apart = all(judge.legal(held[:i], *one[:1], np.array(one[1:]))[0] for i, one in enumerate(held))
        if not apart or longer + 1 >= len(block.counts):
            return
        if self.ledger.has_any and not judge.decoder.sieve(held, kind, block.counts)[longer + 1 :].any():
            self.ledger.tried += int(judge.legal(held, kind, block.counts)[longer + 1 :].sum())
            return
        weighed = judge.weigh(held, block)
        weighed.legal[: longer + 1] = False
        self._record.options(held, place, block, weighed)


def groups(judge):
    """Return the free places of each kind, the kind with the most PRIs last.

    Parameters
    ----------
    judge : Judge
        Holds sets against the limits. [mixed]

    Returns
    -------
    groups : list of (int, list of int)
        First place of the kind, and its free places; empty where all PRIs are kept. [unitless]
    """
    kept = dict(judge.limits.keep)
    free = {}
    for place, kind in enumerate(judge.kinds):
        if place not in kept:
            free.setdefault(kind, []).append(place)
    return sorted(free.items(), key=lambda group: (len(judge.choices[group[0]]), group[0]))


def sets(judge):
    """Return how many sets there are, whatever their decoding.

    Parameters
    ----------
    judge : Judge
        Holds sets against the limits. [mixed]

    Returns
    -------
    sets : int
        Sets of PRIs of which no two of one kind are equal. [unitless]
    """
    total = 1
    for kind, places in groups(judge):
        total *= comb(len(judge.choices[kind]), len(places))
    return total


def combinations(judge):
    """Return how many combinations of held PRIs there are.

    Parameters
    ----------
    judge : Judge
        Holds sets against the limits. [mixed]

    Returns
    -------
    combinations : int
        Steps that all sets take together. [unitless]
    """
    some = groups(judge)
    total = 1
    for kind, places in some:
        total *= comb(len(judge.choices[kind]), len(places) - (kind == some[-1][0]))
    return total


def _combination(rank, size, many):
    """Return the numbers of one combination, in rising order, by its place in lexicographic order."""
    chosen, at = [], 0
    for left in range(many, 0, -1):
        while rank >= (beyond := comb(size - at - 1, left - 1)):
            rank -= beyond
            at += 1
        chosen.append(at)
        at += 1
    return chosen
