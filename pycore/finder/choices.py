"""Which PRIs may take a place: an arithmetic progression of clock counts, with gaps."""

from dataclasses import dataclass
from math import ceil, floor, gcd, lcm

import numpy as np

from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.decoding.blur import gate_counts, typed_decimal


@dataclass(frozen=True, slots=True)
class Choices:
    """The PRIs that may take a place, in rising order, without a list of them.

    Parameters
    ----------
    first : tuple of int, length G
        Lowest PRI of each unbroken run. [clock counts]
    count : tuple of int, length G
        How many PRIs each run has. [unitless]
    step : int
        Difference of neighbours within a run. [clock counts]
    """

    first: tuple[int, ...]
    count: tuple[int, ...]
    step: int

    def __len__(self):
        return sum(self.count)

    def counts(self, index):
        """Return PRIs by their number.

        Parameters
        ----------
        index : int array, shape S
            From 0 to one less than there are. [unitless]

        Returns
        -------
        counts : int array, shape S
            PRIs. [clock counts]
        """
        index = np.asarray(index, dtype=np.int64)
        before = np.cumsum((0, *self.count), dtype=np.int64)
        run = np.searchsorted(before, index, 'right') - 1
        return np.array(self.first, dtype=np.int64)[run] + (index - before[run]) * self.step

    def hold(self, counts):
        """Return which lengths are among the PRIs.

        Parameters
        ----------
        counts : int array, shape S
            Any lengths. [clock counts]

        Returns
        -------
        held : bool array, shape S
            True where a PRI may be so long.
        """
        first, count = (np.array(part, dtype=np.int64) for part in (self.first, self.count))
        run = np.searchsorted(first, counts, 'right') - 1
        since = np.asarray(counts) - first[run]
        return (run >= 0) & (since % self.step == 0) & (since // self.step < count[run])

    def below(self, counts):
        """Return how many of the PRIs are below a length.

        Parameters
        ----------
        counts : int
            Any length. [clock counts]

        Returns
        -------
        below : int
            Number of PRIs, which is the number of the first one not below. [unitless]
        """
        runs = zip(self.first, self.count, strict=True)
        return sum(min(max(-((first - counts) // self.step), 0), count) for first, count in runs)


def choices(limits, place):
    """Return which PRIs may take one place.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]
    place : int
        Number of the place. [unitless]

    Returns
    -------
    choices : Choices
        PRIs inside the interval, on the steps, in whole gates where asked, longer than the pulse, within the duty
        limit, and outside what is to be avoided; none where nothing is left.
    """
    low, high = _interval(limits, limits.places[place])
    start, step = _steps(limits, limits.places[place])
    if start is None:
        return Choices((), (), 1)
    runs = [(low, high)]
    for a, b in limits.avoid:
        runs = [part for c, d in runs for part in ((c, min(d, a - 1)), (max(c, b + 1), d)) if part[0] <= part[1]]
    firsts = [(start + -((start - c) // step) * step, d) for c, d in sorted(runs)]
    some = [(first, (d - first) // step + 1) for first, d in firsts if first <= d]
    return Choices(tuple(first for first, _ in some), tuple(count for _, count in some), step)


def _interval(limits, place):
    """Return the shortest and the longest PRI that pulse and duty let a place have."""
    low, high = limits.pri_counts
    near_s = limits.near.pulse_s if limits.near else 0.0
    clock = float(limits.clock_hz)
    # A PRI is longer than its pulse; a duty on its limit is within it, whatever the last bit of a quotient says.
    low = max(low, floor(place.pulse_s * clock * (1 + 1e-12)) + 1)
    if limits.duty_limit is not None:
        low = max(low, ceil((place.pulse_s + near_s) * clock / limits.duty_limit * (1 - 1e-12)))
    if limits.stagger is not None and limits.decode != 'none' and limits.decode_m is not None:
        low = max(low, shortest_for_range(limits.decode_m, clock))
    return low, high


def shortest_for_range(range_m, clock_hz):
    """Return the shortest PRI whose unambiguous range reaches a range.

    Parameters
    ----------
    range_m : float
        Range. [m]
    clock_hz : float
        Timing clock. [Hz]

    Returns
    -------
    counts : int
        PRI. [clock counts]
    """
    return ceil(2.0 * range_m / SPEED_OF_LIGHT_M_S * clock_hz * (1 - 1e-12))


def _steps(limits, place):
    """Return one PRI that lies on the steps and in whole gates, and how far on the next one is; None for none."""
    start, step = limits.pri_counts[0], limits.step_counts
    if not limits.whole_gates:
        return start, step
    # k counts are a whole number of gates p/q where k is a multiple of p (p and q without common factor).
    (gate,) = gate_counts(limits.clock_hz, (place.bandwidth_hz,))
    gate = typed_decimal(gate).numerator
    common = gcd(step, gate)
    if start % common:
        return None, None
    more = -(start // common) * pow(step // common, -1, gate // common) % (gate // common) if gate > common else 0
    return start + more * step, lcm(step, gate)
