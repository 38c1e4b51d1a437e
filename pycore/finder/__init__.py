"""A search for better plans: slices of steps that any machine can take, and a list that comes out the same.

A search is a row of slices. What a slice finds follows from the limits, the seed
and its number alone, so that slices can be taken one after the other, or by any
executor of ``concurrent.futures``, and merged: the list depends on how many steps
were taken and not on who took them. Nothing here reads a clock: whoever has
patience calls ``step`` again.

    search = Search(limits, seed=1)
    while search.step() and patience:
        ...
    search.ranked(10)
"""

from copy import copy
from functools import lru_cache
from math import inf

from pycore.finder.exhaustion import Exhaustion, combinations, groups, sets
from pycore.finder.found import Found, merged
from pycore.finder.judge import Judge
from pycore.finder.limits import check
from pycore.finder.report import better, marked
from pycore.finder.search import SetDescent
from pycore.finder.stagger import StaggerDescent, StaggerJudge, stagger_better

SLICE_STEPS = 300
"""Steps of one slice; of one that goes through all sets, held PRIs whose sets it goes through. [unitless]"""

MOST_SETS = 1_000_000
"""So many sets are gone through one by one; of more, a seeded search looks for the best. [unitless]"""


@lru_cache(maxsize=2)
def judge_of(limits):
    """Return what holds sets against limits, with its tables; kept for the next slice.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]

    Returns
    -------
    judge : Judge or StaggerJudge
        Its memory changes how quick it is, never what it says.
    """
    return Judge(check(limits)) if limits.stagger is None else StaggerJudge(check(limits))


def proves(limits):
    """Return whether a search goes through all sets there are.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]

    Returns
    -------
    proves : bool
        True where they are few enough; the search then ends by itself, and its best set is the best.
    """
    judge = judge_of(limits)
    if limits.stagger is not None or not groups(judge) or not all(len(some) for some in judge.choices.values()):
        return False
    return sets(judge) <= MOST_SETS and all(judge.whole_block(kind) is not None for kind in judge.choices)


def slices(limits):
    """Return how many slices a search has.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]

    Returns
    -------
    slices : int or None
        ``None`` for a search without end.
    """
    if not proves(limits):
        return None
    # The first slice is a descent, so that something good is there from the start.
    return 1 + -(-combinations(judge_of(limits)) // SLICE_STEPS)


def begun(limits, seed, number):
    """Return one slice, ready for its steps.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]
    seed : int
        Of the whole search. [unitless]
    number : int
        Of the slice, from 0. [unitless]

    Returns
    -------
    slice : SetDescent, Exhaustion or StaggerDescent
        Has ``step()`` and ``ledger``.
    """
    judge = judge_of(limits)
    if limits.stagger is not None:
        return StaggerDescent(judge, seed, number)
    if number and proves(limits):
        return Exhaustion(judge, (number - 1) * SLICE_STEPS, SLICE_STEPS)
    return SetDescent(judge, seed, number)


def run_slice(limits, seed, number, steps=None):
    """Take one slice from its beginning: what an executor maps over the numbers of slices.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]
    seed : int
        Of the whole search. [unitless]
    number : int
        Of the slice, from 0. [unitless]
    steps : int or None
        Fewer than a whole slice for the last one of a search of so many steps; ``None`` for all. [unitless]

    Returns
    -------
    found : Found
        To be merged with those of the others.
    """
    one = begun(limits, seed, number)
    most = inf if steps is None else steps
    while one.ledger.steps < most and goes_on(one):
        pass
    return one.ledger.found()


def goes_on(one):
    """Take one step of a slice.

    Parameters
    ----------
    one : SetDescent, Exhaustion or StaggerDescent
        From ``begun``. [mixed]

    Returns
    -------
    goes_on : bool
        Whether there is another step to take in this slice.
    """
    # All sets of a block are gone through, whatever that takes.
    most = inf if isinstance(one, Exhaustion) else SLICE_STEPS
    return one.step() and one.ledger.steps < most


class Search:
    """A search in one process: slice after slice, one step at a time.

    Parameters
    ----------
    limits : Limits
        What binds the search; ``InputError`` where no search can start from it. [mixed]
    seed : int
        Same limits, seed and steps: same list. [unitless]
    """

    def __init__(self, limits, seed=1):
        self.limits, self.seed = check(limits), int(seed)
        self.judge, self.proves = judge_of(limits), proves(limits)
        self._slices = 0 if self._hopeless() else slices(limits)
        self._done, self._number, self._slice = Found(), 0, None
        self._known = {}

    def _hopeless(self):
        """Whether some place has no PRI to choose from."""
        return not all(len(some) for some in self.judge.choices.values())

    @property
    def ended(self):
        """Whether there is no step left to take."""
        return self._slices is not None and self._number >= self._slices

    @property
    def proved(self):
        """Whether all sets have been gone through, so that the best listed is the best there is."""
        return self.proves and self.ended

    def step(self):
        """Take one step; a few milliseconds.

        Returns
        -------
        more : bool
            Whether there is another one to take. Calling again later goes on where it stopped.
        """
        if self.ended:
            return False
        if self._slice is None:
            self._slice = begun(self.limits, self.seed, self._number)
        if not goes_on(self._slice):
            self.add(self._slice.ledger.found())
            self._slice = None
        return not self.ended

    def add(self, found):
        """Take in the next slice, done here or elsewhere.

        Parameters
        ----------
        found : Found
            Of the slice with number ``next_slice``. [unitless]
        """
        self._done, self._number = merged((self._done, found)), self._number + 1

    @property
    def next_slice(self):
        """Number of the slice that is being taken, or that is next."""
        return self._number

    def with_parts(self, parts, taken):
        """Return a search that knows what others have found so far, some of it in slices that are still under way.

        Parameters
        ----------
        parts : iterable of Found
            Of whole slices and of parts of them, in any order. [unitless]
        taken : int
            How many slices are whole. [unitless]

        Returns
        -------
        search : Search
            For its lists.
        """
        other = copy(self)
        other._done, other._number = merged((self._done, *parts)), self._number + taken
        return other

    @property
    def found(self):
        """All that was found so far, as Found."""
        return self._done if self._slice is None else merged((self._done, self._slice.ledger.found()))

    @property
    def tried(self):
        """Sets scored so far."""
        return self._done.tried + (0 if self._slice is None else self._slice.ledger.tried)

    @property
    def steps(self):
        """Steps taken so far."""
        return self._done.steps + (0 if self._slice is None else self._slice.ledger.steps)

    def ranked(self, most=10, unlike_counts=0):
        """Return the best sets found, with what each gives.

        Parameters
        ----------
        most : int
            How many. [unitless]
        unlike_counts : int
            A set is left out when none of its PRIs differs by more than this from those of a better one; 0 leaves
            none out. [clock counts]

        Returns
        -------
        ranked : list of Better
            Best first.
        """
        found, chosen = self.found, []
        for _, pris in sorted({*found.best, *found.ends}):
            if len(chosen) == most:
                break
            if all(_apart(pris, other) > unlike_counts for other in chosen):
                chosen.append(pris)
        return marked([self.better(pris) for pris in dict.fromkeys(chosen)])

    def trade_off(self, most=40):
        """Return the sets to choose between: the best ones, and the best for each time used.

        Parameters
        ----------
        most : int
            How many of the best to look at. [unitless]

        Returns
        -------
        some : list of Better
            Those that no other beats have ``on_front``; by time used, then by score.
        """
        found = self.found
        pris = {pris for _, pris in (*found.best[:most], *found.ends[:most], *found.by_time.values())}
        some = marked([self.better(each) for each in sorted(pris)])
        return sorted(some, key=lambda one: (round(one.time_s, 12), round(one.excess_over_floor, 12), one.pri_counts))

    def better(self, pris):
        """Return what one set gives, in full.

        Parameters
        ----------
        pris : tuple of int, length N
            PRIs in the order of the places. [clock counts]

        Returns
        -------
        better : Better
            Equal to what assessing the plan says; worked out once.
        """
        if pris not in self._known:
            each = better if self.limits.stagger is None else stagger_better
            self._known[pris] = each(self.judge, pris)
        return self._known[pris]


def _apart(one, other):
    """Return the largest difference of PRIs in the same place."""
    return max(abs(a - b) for a, b in zip(one, other, strict=True))
