"""What a search for staggers holds against its limits: the least response of many cycles at a time.

Averaged over the phases of the cycle, the response depends on the weights only
through their autocorrelation, and on the PRIs through the sums of 1, 2 … K - 1
PRIs that follow each other (derived in :mod:`pycore.response`). Many cycles that
share most of these sums are scored together on a grid of speeds, and the valley
about the least grid point is read off a parabola; what is kept is then worked
out exactly.
"""

import numpy as np

from pycore.crossings import clear_speeds, deepest_dip, first_notch, first_peak
from pycore.eclipsing import METRES_PER_SECOND_OF_DELAY, clear_ranges, first_opening
from pycore.finder.choices import choices
from pycore.finder.decode import pulses_of
from pycore.finder.shortfalls import hole_share, short_of
from pycore.floor import floor_ranges, floor_speeds
from pycore.holes import holes
from pycore.patterns import sweep
from pycore.response import repeat_counts, staggered_response
from pycore.sight import Sight, share, within
from pycore.spans import Spans
from pycore.stagger import wanted_magnitudes
from pycore.unseen import inbound

_PER_PERIOD = 16
"""Grid points in the shortest period of the response. [unitless]"""

_MOST_TABLED = 6_000_000
"""Cosines that are kept. [unitless]"""


class StaggerJudge:
    """Holds cycles of PRIs against limits.

    Parameters
    ----------
    limits : Limits
        What binds the search, with a ``stagger``; checked. [mixed]
    """

    def __init__(self, limits):
        self.limits, self.cycle = limits, limits.stagger
        self.choices = {0: choices(limits, 0)}
        weights = np.array(self.cycle.weights, dtype=float)
        products = [float(weights[:-k] @ weights[k:]) for k in range(1, weights.size)]
        self._amplitude = 2.0 * np.array(products) / float(weights @ weights)
        self._grid = self._speeds()
        self._tables = self._cosines()

    def _place(self):
        return self.limits.places[0]

    def _speeds(self):
        """Return the speeds of the grid."""
        low, high = self.wanted_m_s
        longest = self._amplitude.size * min(self.limits.pri_counts[1], self.cycle.mean_counts[1] * self.cycle.spread)
        step = self._place().wavelength_m * float(self.limits.clock_hz) / (2.0 * longest) / _PER_PERIOD
        return np.linspace(low, high, max(3, int((high - low) / step) + 2)) if low < high else np.zeros(0)

    @property
    def wanted_m_s(self):
        """Speeds whose least response is looked for: given, or from where the mean PRI's response is highest. [m/s]"""
        if self.cycle.dip_m_s is not None:
            return self.cycle.dip_m_s
        low, high = wanted_magnitudes(self.limits.speed_m_s)
        longest = min(self.cycle.mean_counts[1], self.limits.pri_counts[1])
        risen = self._place().wavelength_m * float(self.limits.clock_hz) / (4.0 * longest)
        return max(low, risen), high

    def _cosines(self):
        """Return, for sums of 1, 2 … PRIs, the cosines of each sum over the grid; None where they are too many."""
        low, high = self.limits.pri_counts
        rows = sum(k * (high - low) + 1 for k in range(1, self._amplitude.size + 1))
        if rows * self._grid.size > _MOST_TABLED:
            return None
        sums = [np.arange(k * low, k * high + 1) for k in range(1, self._amplitude.size + 1)]
        return [np.cos(self._angle(one)) for one in sums]

    def _angle(self, counts):
        per_count = 4.0 * np.pi / (self._place().wavelength_m * float(self.limits.clock_hz))
        return np.multiply.outer(counts * per_count, self._grid)

    def dips(self, cycles):
        """Return the least response of many cycles, nearly.

        Parameters
        ----------
        cycles : int array, shape (C, N)
            PRIs in sending order. [clock counts]

        Returns
        -------
        power : float array, shape C
            Least power response over the wanted speeds; 1 where none is wanted. [unitless]
        """
        many, n = cycles.shape
        if not self._grid.size:
            return np.ones(many)
        power, sums = np.ones((many, self._grid.size)), np.zeros_like(cycles)
        for k, amplitude in enumerate(self._amplitude):
            sums = sums + np.roll(cycles, -k, axis=1)
            if amplitude:
                for phase in range(n):
                    power += amplitude / n * self._cosine(k, sums[:, phase])
        return _valley(power)

    def _cosine(self, k, sums):
        """Return the cosines of sums of k + 1 PRIs, one row where all are the same."""
        if (sums == sums[0]).all():
            sums = sums[:1]
        if self._tables is None:
            return np.cos(self._angle(sums))
        return self._tables[k][sums - (k + 1) * self.limits.pri_counts[0]]

    def dip_db(self, pris):
        """Return the least response of one cycle over the wanted speeds.

        Parameters
        ----------
        pris : tuple of int, length N
            In sending order. [clock counts]

        Returns
        -------
        dip_db : float
            Exact; where no speeds were given, beyond the rise out of the first notch. 0 where none is wanted. [dB]
        """
        response = self.response(pris)
        low, high = self.wanted_m_s
        if self.cycle.dip_m_s is None:
            repeat = repeat_counts(pris, self.cycle.weights if self.cycle.user_weights else None)
            true_first = self._place().wavelength_m * float(self.limits.clock_hz) / (2.0 * repeat)
            notch = first_notch(response, self.cycle.response_min_db, true_first)
            low, high = wanted_magnitudes(self.limits.speed_m_s)
            low = max(low, first_peak(response, notch, true_first)) if np.isfinite(notch) else low
        depth, _ = deepest_dip(response, low, high)
        return 0.0 if np.isnan(depth) else depth

    def response(self, pris):
        """Return the response of one cycle.

        Parameters
        ----------
        pris : tuple of int, length N
            In sending order. [clock counts]

        Returns
        -------
        response : Response
            Averaged over the phases.
        """
        return staggered_response(pris, self.limits.clock_hz, self.cycle.weights, self._place().wavelength_m)

    def legal(self, cycles):
        """Return which cycles keep to the PRIs allowed, their spread, their mean and their least difference.

        Parameters
        ----------
        cycles : int array, shape (C, N)
            PRIs in sending order. [clock counts]

        Returns
        -------
        legal : bool array, shape C
            For each cycle.
        """
        rising = np.sort(cycles, axis=1)
        mean, (least, most) = cycles.mean(axis=1), self.cycle.mean_counts
        legal = (mean >= least - 1e-9) & (mean <= most + 1e-9)
        legal &= rising[:, -1] <= rising[:, 0] * (self.cycle.spread * (1 + 1e-12))
        legal &= (np.diff(rising, axis=1) >= self.limits.apart_counts).all(axis=1)
        return legal & self.choices[0].hold(cycles).all(axis=1)

    def in_order(self, pris):
        """Return a cycle as it is listed: from the first of its rotations, forwards or backwards, which are all alike.

        Parameters
        ----------
        pris : sequence of int, length N
            In sending order. [clock counts]

        Returns
        -------
        pris : tuple of int, length N
            The same cycle. [clock counts]
        """
        both = (tuple(map(int, pris)), tuple(map(int, pris[::-1])))
        return min(one[k:] + one[:k] for one in both for k in range(len(one)))

    def time_of(self, pris):
        """Return the time that one CPI takes.

        Parameters
        ----------
        pris : tuple of int, length N
            In sending order. [clock counts]

        Returns
        -------
        time_s : float
            (n + fill) times the mean PRI. [s]
        """
        mean_s = sum(pris) / len(pris) / float(self.limits.clock_hz)
        return float((pulses_of(self._place(), np.float64(mean_s)) + self._place().fill_pulses) * mean_s)

    def sight(self, pris):
        """Return what one cycle sees of the coverage.

        Parameters
        ----------
        pris : tuple of int, length N
            In sending order. [clock counts]

        Returns
        -------
        sight : Sight
            One verdict: clear on every interval, short of the smallest unambiguous range, and above the response.
        """
        limits, place, response = self.limits, self._place(), self.response(pris)
        pri_s, each = np.array(pris) / float(limits.clock_hz), np.ones(len(pris))
        shut = limits.recovery_s, limits.guard_s, limits.received_min
        swept = sweep(clear_ranges(pri_s, place.pulse_s * each, *shut, limits.range_m, limits.near), limits.range_m)
        # Beyond the smallest unambiguous range an echo changes its gate from pulse to pulse.
        end_m = float(pri_s.min()) * METRES_PER_SECOND_OF_DELAY
        clear = (swept.pattern == (1 << len(pris)) - 1) & (swept.edges[:-1] < end_m)
        stop = np.minimum(swept.edges[1:][clear], end_m)
        ranges = Spans(np.zeros(stop.size, dtype=np.intp), swept.edges[:-1][clear], stop)
        notch = first_notch(response, self.cycle.response_min_db, place.wavelength_m * float(limits.clock_hz))
        opening = first_opening(limits.recovery_s, limits.received_min, np.array([place.pulse_s]))
        return Sight(
            ranges,
            clear_speeds(response, self.cycle.response_min_db, limits.speed_m_s),
            floor_ranges(opening, limits.range_m),
            floor_speeds(np.array([notch]), limits.speed_m_s),
            1,
            1,
            limits.range_m,
            limits.speed_m_s,
        )

    def settle(self, pris, dip_db):
        """Return the shortfalls of one cycle.

        Parameters
        ----------
        pris : tuple of int, length N
            In sending order. [clock counts]
        dip_db : float
            Its least response. [dB]

        Returns
        -------
        short : dict of float
            For every limit that binds, as parts of them. [unitless]
        """
        limits, short = self.limits, {}
        if limits.time_s is not None:
            short['time'] = float(short_of(-self.time_of(pris), -limits.time_s))
        if self.cycle.dip_db is not None:
            short['dip'] = float(short_of(dip_db, self.cycle.dip_db))
        judged = limits.visible, limits.hole_m, limits.hole_m_s, limits.unseen_s
        if limits.must_see or any(limit is not None for limit in judged):
            short.update(self._seen(self.sight(pris)))
        return short

    def _seen(self, seen):
        limits = self.limits
        short = {'visible': float(short_of(share(seen), limits.visible))}
        for i, part in enumerate(limits.must_see):
            short[f'must-see.{i}'] = float(short_of(share(within(seen, part.range_m, part.speed_m_s)), part.visible))
        if limits.hole_m is not None or limits.hole_m_s is not None:
            short['hole'] = hole_share(holes(seen, limits.hole_m, limits.hole_m_s))
        if limits.unseen_s is not None:
            time_s = inbound(seen).time_s
            short['unseen'] = 0.0 if np.isnan(time_s) else float(short_of(-min(time_s, 1e9), -limits.unseen_s))
        return short


def _valley(power):
    """Return the least value of each row, by the parabola through its least point and the two beside it."""
    at = power.argmin(axis=1)
    inner = at.clip(1, power.shape[1] - 2)
    row = np.arange(power.shape[0])
    left, middle, right = (power[row, inner + side] for side in (-1, 0, 1))
    bend = left - 2.0 * middle + right
    deeper = middle - (right - left) ** 2 / (8.0 * np.where(bend > 1e-300, bend, np.inf))
    return np.where(at == inner, np.maximum(deeper, 0.0), power[row, at])
