"""What a search has found: the best sets, the best for each time used, and how near the others came.

Found records of different slices are merged in any order to the same record, so
that it does not matter who searched which slice.
"""

from dataclasses import dataclass, field
from heapq import nsmallest

import numpy as np

KEPT = 100
"""Sets that are kept, best first. [unitless]"""

TIME_STEPS = 16
"""Parts of the times that sets can use, the best set of each of which is kept. [unitless]"""


@dataclass(frozen=True, slots=True)
class Miss:
    """The set that comes nearest to a limit and meets all others.

    Parameters
    ----------
    short : float
        Shortfall. [unitless]
    score : float
        Its score. [unitless]
    pris : tuple of int
        Its PRIs. [clock counts]
    """

    short: float
    score: float
    pris: tuple[int, ...]


@dataclass(frozen=True, slots=True)
class Found:
    """What a search, or a slice of one, has found. Scores: lower is better.

    Parameters
    ----------
    best : tuple of (float, tuple of int)
        Sets that meet every limit, with their scores: at most ``KEPT``, best first. [unitless, clock counts]
    ends : tuple of (float, tuple of int)
        Where descents ended, likewise: good sets that are not all neighbours of the best. [unitless, clock counts]
    by_time : dict of int to (float, tuple of int)
        Best of each part of the times that sets can use. [unitless, clock counts]
    misses : dict of str to Miss
        For each limit, the nearest of the sets that miss only this one; empty once a set meets all. [unitless]
    nearest : Miss or None
        The set whose shortfalls add up to the least, whichever they are; likewise. [unitless]
    tried : int
        Sets scored. [unitless]
    steps : int
        Steps taken. [unitless]
    """

    best: tuple = ()
    ends: tuple = ()
    by_time: dict = field(default_factory=dict)
    misses: dict = field(default_factory=dict)
    nearest: Miss | None = None
    tried: int = 0
    steps: int = 0


class Ledger:
    """Where one slice enters what it finds."""

    def __init__(self):
        self._sets, self._worst, self._ends = {}, np.inf, {}
        self._at_time, self._time_sets = np.full(TIME_STEPS, np.inf), {}
        self._misses, self._nearest = {}, None
        self.tried, self.steps = 0, 0

    @property
    def has_any(self):
        """Whether some set meets every limit."""
        return bool(self._sets)

    @property
    def worst_kept(self):
        """Score that a set must beat to be kept while the list is full. [unitless]"""
        return self._worst

    def missed_by(self, name):
        """Return the smallest shortfall of a limit among sets that miss only this one; ``inf`` for none.

        Parameters
        ----------
        name : str
            The limit. [unitless]

        Returns
        -------
        short : float
            Shortfall. [unitless]
        """
        return self._misses[name].short if name in self._misses else np.inf

    @property
    def nearest_so_far(self):
        """Smallest sum of shortfalls met with; ``inf`` before any. [unitless]"""
        return np.inf if self._nearest is None else self._nearest.short

    def keep(self, score, pris):
        """Enter a set that meets every limit.

        Parameters
        ----------
        score : float
            Its score, rounded. [unitless]
        pris : tuple of int, length N
            In the order of the places, rising among places that are alike. [clock counts]
        """
        self._sets[pris] = min(float(score), self._sets.get(pris, np.inf))
        if len(self._sets) >= 2 * KEPT:
            self._sets = {pris: score for score, pris in _best(self._sets)}
            self._worst = max(self._sets.values())

    def end(self, score, pris):
        """Enter a set that meets every limit and that no change of one place makes better.

        Parameters
        ----------
        score : float
            Its score, rounded. [unitless]
        pris : tuple of int, length N
            As in ``keep``. [clock counts]
        """
        self._ends[pris] = min(float(score), self._ends.get(pris, np.inf))
        if len(self._ends) >= 2 * KEPT:
            self._ends = {pris: score for score, pris in _best(self._ends)}

    def beats_at_time(self, step):
        """Return the score to beat for each part of the times, shape S.

        Parameters
        ----------
        step : int array, shape S
            Part of the times, 0 to ``TIME_STEPS`` - 1. [unitless]

        Returns
        -------
        score : float array, shape S
            ``inf`` where there is none yet. [unitless]
        """
        return self._at_time[step]

    def keep_at_time(self, step, score, pris):
        """Enter a set that meets every limit as the best of its part of the times, if it is.

        Parameters
        ----------
        step : int
            Part of the times. [unitless]
        score : float
            Its score. [unitless]
        pris : tuple of int, length N
            As in ``keep``. [clock counts]
        """
        entry = float(score), pris
        if step not in self._time_sets or entry < self._time_sets[step]:
            self._time_sets[step], self._at_time[step] = entry, score

    def miss(self, name, short, score, pris):
        """Enter a set that misses one limit and meets all others.

        Parameters
        ----------
        name : str
            The limit. [unitless]
        short : float
            Its shortfall, rounded. [unitless]
        score : float
            The set's score. [unitless]
        pris : tuple of int, length N
            As in ``keep``. [clock counts]
        """
        self._misses[name] = _nearer(self._misses.get(name), Miss(float(short), float(score), pris))

    def near(self, short, score, pris):
        """Enter a set that misses any limits, as the nearest so far, if it is.

        Parameters
        ----------
        short : float
            Sum of its shortfalls, rounded. [unitless]
        score : float
            The set's score. [unitless]
        pris : tuple of int, length N
            As in ``keep``. [clock counts]
        """
        self._nearest = _nearer(self._nearest, Miss(float(short), float(score), pris))

    def found(self):
        """Return all that was entered.

        Returns
        -------
        found : Found
            So far. [unitless]
        """
        misses, nearest = ({}, None) if self._sets else (dict(self._misses), self._nearest)
        best, ends = tuple(_best(self._sets)), tuple(_best(self._ends))
        return Found(best, ends, dict(self._time_sets), misses, nearest, self.tried, self.steps)


def merged(some):
    """Return what several slices have found together.

    Parameters
    ----------
    some : iterable of Found
        In any order. [unitless]

    Returns
    -------
    found : Found
        The same, whatever the order. [unitless]
    """
    ledger, parts = Ledger(), list(some)
    for part in parts:
        for score, pris in part.best:
            ledger.keep(score, pris)
        for score, pris in part.ends:
            ledger.end(score, pris)
        for step, (score, pris) in part.by_time.items():
            ledger.keep_at_time(step, score, pris)
        for name, missed in part.misses.items():
            ledger.miss(name, missed.short, missed.score, missed.pris)
        if part.nearest is not None:
            ledger.near(part.nearest.short, part.nearest.score, part.nearest.pris)
    ledger.tried, ledger.steps = sum(part.tried for part in parts), sum(part.steps for part in parts)
    return ledger.found()


def _best(sets):
    return nsmallest(KEPT, ((score, pris) for pris, score in sets.items()))


def _nearer(one, other):
    if one is None:
        return other
    return min(one, other, key=lambda missed: (missed.short, missed.score, missed.pris))
