"""A descent as every seeded search goes it: begin, improve one move after another, turn when none gains."""

from pycore.finder.chance import Chance
from pycore.finder.found import Ledger


class Descent:
    """What the descents of sets and of staggers share; how each begins, improves and turns is its own.

    Parameters
    ----------
    judge : Judge or StaggerJudge
        Holds plans against the limits. [mixed]
    seed : int
        Of the whole search. [unitless]
    number : int
        Of the slice. [unitless]
    """

    def __init__(self, judge, seed, number):
        self.judge, self.ledger = judge, Ledger()
        self._chance = Chance(seed, number)
        self._kept = dict(judge.limits.keep)
        self._pris, self._queue = None, []
        self._base, self._kicks = None, 0

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
