"""Blocks of candidates for the last place of a set, and what they are worth."""

from dataclasses import dataclass

import numpy as np

from pycore.finder.found import TIME_STEPS
from pycore.finder.shortfalls import DIGITS


@dataclass(frozen=True, slots=True)
class Block:
    """Candidates for a place, and the tables they are scored with.

    Parameters
    ----------
    kind : int
        Place that they are for. [unitless]
    counts : int array, shape C
        PRIs. [clock counts]
    time_s : float array, shape C
        What one of them takes with its pulses. [s]
    tables : tuple of pairs of Table
        For the coverage and for each must-see region. [m, m/s]
    """

    kind: int
    counts: np.ndarray
    time_s: np.ndarray
    tables: tuple


@dataclass(frozen=True, slots=True)
class Weighed:
    """All sets that some held PRIs make with one candidate.

    Parameters
    ----------
    legal : bool array, shape C
        Far enough from the PRIs that are held. [unitless]
    decodes : bool array, shape C
        False where it surely does not decode. [unitless]
    score : float array, shape C
        Blind share beyond the floor, rounded. [unitless]
    short : float array, shape (K, C)
        Shortfall of each limit of ``Judge.weighed``. [unitless]
    time_s : float array, shape C
        Time used. [s]
    """

    legal: np.ndarray
    decodes: np.ndarray
    score: np.ndarray
    short: np.ndarray
    time_s: np.ndarray

    @property
    def total(self):
        """Sum of the shortfalls, shape C, rounded."""
        return self.short.sum(axis=0).round(DIGITS)


@dataclass(frozen=True, slots=True)
class Times:
    """The times that sets can use, in equal parts.

    Parameters
    ----------
    shortest, longest : float
        Ends. [s]
    """

    shortest: float
    longest: float

    def step(self, time_s):
        """Return which part a time belongs to.

        Parameters
        ----------
        time_s : float array, shape S
            Times used. [s]

        Returns
        -------
        step : int array, shape S
            From 0 to ``TIME_STEPS`` - 1. [unitless]
        """
        part = (time_s - self.shortest) / max(self.longest - self.shortest, 1e-300)
        return (part * TIME_STEPS).clip(0, TIME_STEPS - 1).astype(np.intp)
