"""Intervals on one axis, each belonging to one PRF: the common coin of eclipsing, stagger and visibility."""

from dataclasses import dataclass

import numpy as np


@dataclass(frozen=True, slots=True)
class Spans:
    """Closed intervals on a range or speed axis on which a PRF is clear.

    Within one PRF they are disjoint and in rising order; every interval is
    already cut to the axis it lies on.

    Parameters
    ----------
    prf : int array, shape K
        Index of the PRF that an interval belongs to. [unitless]
    start : float array, shape K
        Lower ends. [m or m/s]
    stop : float array, shape K
        Upper ends, above the lower ones. [m or m/s]
    """

    prf: np.ndarray
    start: np.ndarray
    stop: np.ndarray

    def of(self, prf):
        """Return the ``(start, stop)`` arrays of one PRF."""
        mine = self.prf == prf
        return self.start[mine], self.stop[mine]
