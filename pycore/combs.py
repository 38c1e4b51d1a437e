"""Intervals that repeat: one interval in every period, cut to an axis, for all PRFs at once."""

from dataclasses import dataclass

import numpy as np

from pycore.spans import Spans


@dataclass(frozen=True, slots=True)
class Comb:
    """One clear interval in every period, for each of N PRFs, on an axis without ends.

    Parameters
    ----------
    start : float array, shape N
        Lower end in the period that begins at 0. [m or m/s]
    stop : float array, shape N
        Upper end; a PRF whose upper end is not above its lower one is never clear. [m or m/s]
    period : float array, shape N
        What it repeats with. [m or m/s]
    """

    start: np.ndarray
    stop: np.ndarray
    period: np.ndarray


def repeated(start, stop, period, limits):
    """Return an interval that repeats with each PRF's own period, cut to the limits of an axis.

    Parameters
    ----------
    start : float array, shape N
        Lower end in the period that begins at 0. [m or m/s]
    stop : float array, shape N
        Upper end, no more than one period above the lower one; a PRF whose upper
        end is not above its lower one has none. [same]
    period : float array, shape N
        What it repeats with. [same]
    limits : pair of float
        Lower and upper end of the axis. [same]

    Returns
    -------
    spans : Spans
        The intervals of every PRF inside the limits, in rising order within each PRF.
    """
    low, high = limits
    first = np.floor((low - stop) / period).astype(np.intp)
    counts = np.ceil((high - start) / period).astype(np.intp) - first + 1
    counts[(counts < 0) | (stop <= start)] = 0
    prf = np.arange(counts.size).repeat(counts)
    # Numbered through over all PRFs, less where each one's own numbers begin.
    shift = ((first + counts - counts.cumsum())[prf] + np.arange(prf.size)) * period[prf]
    begin = np.maximum(start[prf] + shift, low)
    end = np.minimum(stop[prf] + shift, high)
    some = begin < end
    return Spans(prf[some], begin[some], end[some])
