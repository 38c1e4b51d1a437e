"""Which sets of a search decode as far as is wanted, and how far each does.

A confusion needs M PRFs that cannot tell, so that every set that decodes is made
of smaller sets that decode: a search may grow its sets one PRI at a time. What is
asked of all candidates at once is a sieve that never drops a set that decodes;
``decodes`` then settles single sets in exact fractions.
"""

from fractions import Fraction
from itertools import combinations
from math import ceil, comb

import numpy as np

from pycore.congruence import exact_span
from pycore.decoding import blind_speeds, range_span, speed_span
from pycore.decoding.blur import LIGHT_M_S, default_blur, gate_counts, motion_counts, range_half_widths, typed_decimal
from pycore.decoding.limits import decodes, last_place, last_place_exactly
from pycore.decoding.sweep import first_confusion

_MOST_REMEMBERED = 5_000
"""Groups of PRIs whose sieves are remembered; where there may be more, none are. [unitless]"""


def pulses_of(place, pri_s):
    """Return how many pulses count on PRIs of one place.

    Parameters
    ----------
    place : Place
        What belongs to the PRI. [mixed]
    pri_s : float array, shape C
        PRIs. [s]

    Returns
    -------
    pulses : int array, shape C
        As given, or as many as fit into the CPI time, at least one. [unitless]
    """
    if place.cpi_s is None:
        return np.full(np.shape(pri_s), place.pulses, dtype=np.int64)
    return np.maximum(np.floor(place.cpi_s / pri_s * (1 + 1e-12)), 1).astype(np.int64)


class Decoder:
    """How the sets of one search decode.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]
    choices : int
        How many PRIs there are to choose from, over all places. [unitless]
    """

    def __init__(self, limits, choices):
        self.limits = limits
        judged = limits.decode != 'none' and limits.stagger is None
        per_m = 2 * typed_decimal(limits.clock_hz) / LIGHT_M_S
        self.wanted_counts = typed_decimal(limits.decode_m) * per_m if judged and limits.decode_m else None
        self.wanted_m_s = typed_decimal(limits.decode_m_s) if judged and limits.decode_m_s else None
        self.gates = gate_counts(limits.clock_hz, [place.bandwidth_hz for place in limits.places])
        self._remembers = comb(choices, max(limits.m - 1, 1)) <= _MOST_REMEMBERED
        self._sieves, self._settled = {}, {}

    @property
    def judges(self):
        """Whether anything is asked of decoding."""
        return self.wanted_counts is not None or self.wanted_m_s is not None

    def sieve(self, held, kind, counts, wanted_counts=None):
        """Return which candidates for one more place can make a set that decodes.

        Parameters
        ----------
        held : sequence of (int, int)
            Place and PRI of those that are held. [unitless, clock counts]
        kind : int
            Place that the candidates are for. [unitless]
        counts : int array, shape C
            Candidates; ``None`` as ``wanted_counts`` only with the search's own block. [clock counts]
        wanted_counts : Fraction or None
            Another delay to decode up to than the limits', in which case speeds are not looked at. [clock counts]

        Returns
        -------
        may : bool array, shape C
            False only where the set does not decode.
        """
        may = np.ones(len(counts), dtype=bool)
        if len(held) < self.limits.m - 1:
            return may
        wanted = self.wanted_counts if wanted_counts is None else wanted_counts
        if wanted is not None:
            may &= self._in_range(held, kind, counts, wanted)
        if wanted_counts is None and self.wanted_m_s is not None and may.any():
            may &= self._in_speed(held, kind, counts)
        return may

    def _in_range(self, held, kind, counts, wanted):
        if self.limits.decode == 'exact' or self.limits.blur_gates is not None:
            return self._with_blur(held, kind, counts, wanted, self.limits.blur_gates)
        held_whole = all((Fraction(count) / self.gates[place]).denominator == 1 for place, count in held)
        if not held_whole:
            return self._with_blur(held, kind, counts, wanted, Fraction(1))
        gate = self.gates[kind]
        whole = np.asarray(counts) % gate.numerator == 0
        may = np.zeros(len(counts), dtype=bool)
        if whole.any():
            may |= whole & self._with_blur(held, kind, counts, wanted, Fraction(1, 2))
        if not whole.all():
            may |= ~whole & self._with_blur(held, kind, counts, wanted, Fraction(1))
        return may

    def _with_blur(self, held, kind, counts, wanted, blur):
        """Apply the range rule at one blur, by remembered sieves of M - 1 PRIs where there are few of these."""
        m = self.limits.m
        if not self._remembers or len(held) < m or wanted is not self.wanted_counts:
            return self._sieved(held, kind, counts, wanted, blur)
        known = self._sieves.setdefault((kind, float(blur or 0), len(counts), int(counts[0]), int(counts[-1])), {})
        held, may = sorted(held), np.ones(len(counts), dtype=bool)
        for group in combinations(held, m):
            if not self._group_decodes(known, group, kind, counts, blur):
                return ~may
        for group in combinations(held, m - 1):
            may &= self._group_sieve(known, group, kind, counts, blur)
        return may

    def _group_sieve(self, known, group, kind, counts, blur):
        """Return the sieve of M - 1 PRIs, worked out once."""
        found = known.get(group)
        if found is None:
            found = known[group] = self._sieved(group, kind, counts, self.wanted_counts, blur)
        return found

    def _group_decodes(self, known, group, kind, counts, blur):
        """Return whether M PRIs decode: from the sieve of all but the last where that is one of the candidates."""
        found = known.get(group)
        if found is None:
            other, last = group[-1]
            at = int(np.searchsorted(counts, last))
            if other == kind and at < len(counts) and counts[at] == last:
                found = self._group_sieve(known, group[:-1], kind, counts, blur)[at]
            else:
                found = self._sieved(group[:-1], other, np.array([last]), self.wanted_counts, blur)[0]
            known[group] = found
        return found

    def _sieved(self, held, kind, counts, wanted, blur):
        pris = [count for _, count in held]
        if self.limits.decode == 'exact' or blur == 0:
            return last_place_exactly(pris, counts, self.limits.m, wanted)
        widths = range_half_widths(blur, [self.gates[place] for place, _ in held])
        (width,) = range_half_widths(blur, [self.gates[kind]])
        if not held:
            # One PRF alone confuses from its first interval on.
            return np.asarray(counts) >= ceil(max(wanted + width, 2 * width))
        return last_place(pris, widths, counts, width, self.limits.m, wanted)

    def _in_speed(self, held, kind, counts):
        """Sieve by the speed rule in floating point, a little short of what it forbids."""
        wanted, m = float(self.wanted_m_s), self.limits.m
        held_period, held_width = self._speed_combs([place for place, _ in held], np.array([c for _, c in held]))
        period, width = self._speed_combs([kind] * len(counts), np.asarray(counts))
        if not held_width.size or not held_width.all():
            return np.ones(period.size, dtype=bool)
        start, stop = _stretches(held_period, held_width, m - 1, wanted)
        widths = np.sort(held_width)[::-1]
        # The first zone ends at the M-th largest of all widths.
        ends = np.minimum(widths[m - 2], width) if m > 1 else width
        zone = np.maximum(widths[m - 1], ends) if widths.size >= m else ends
        narrow = width - 1e-12 * wanted
        first = np.maximum(start, zone[:, None])
        tooth = np.maximum(np.floor((first - narrow[:, None]) / period[:, None]) + 1, 1)
        touches = (tooth * period[:, None] - narrow[:, None] < stop) & (first < stop)
        return ~touches.any(axis=1)

    def _speed_combs(self, places, counts):
        """Return blind speeds and how far from their multiples each cannot tell, in floating point."""
        limits = self.limits
        pri_s = counts / float(limits.clock_hz)
        carrier = np.array([limits.places[place].carrier_hz for place in places])
        period = float(LIGHT_M_S) / (2.0 * carrier * pri_s)
        if limits.decode == 'exact':
            return period, np.zeros(period.size)
        pulses = np.array([pulses_of(limits.places[p], s) for p, s in zip(places, pri_s, strict=True)])
        # Half a filter at least, whichever rule holds for the whole set.
        return period, float(limits.blur_gates or Fraction(1, 2)) * period / pulses

    def decodes(self, pris):
        """Return whether one set decodes as far as is wanted, exactly.

        Parameters
        ----------
        pris : tuple of int, length N
            PRIs in the order of the places. [clock counts]

        Returns
        -------
        decodes : bool
            In range and in speed, whichever are asked for.
        """
        if not self.judges:
            return True
        if pris not in self._settled:
            if len(self._settled) > 20_000:
                self._settled.clear()
            self._settled[pris] = self._decodes_range(pris) and self._decodes_speed(pris)
        return self._settled[pris]

    def _decodes_range(self, pris):
        return self.wanted_counts is None or decodes(pris, self._range_widths(pris), self.limits.m, self.wanted_counts)

    def _decodes_speed(self, pris):
        if self.wanted_m_s is None:
            return True
        return decodes(*self._speed_rule(pris), self.limits.m, self.wanted_m_s)

    def _speed_rule(self, pris):
        """Return blind speeds and half-widths of one set, in exact fractions."""
        periods = blind_speeds(pris, self.limits.clock_hz, [place.carrier_hz for place in self.limits.places])
        if self.limits.decode == 'exact':
            return periods, [0] * len(periods)
        return periods, [self.blur(pris) * p / n for p, n in zip(periods, self.pulses(pris), strict=True)]

    def wanted_counts_from(self, reached):
        """Return the delay that sets must decode to which are to decode farther than some delay.

        Parameters
        ----------
        reached : float
            Any delay. [clock counts]

        Returns
        -------
        counts : Fraction
            A little more, and not above what is wanted. [clock counts]
        """
        return min(Fraction(float(reached) * (1 + 1e-9) + 1e-9).limit_denominator(10**6), self.wanted_counts)

    def short(self, pris):
        """Return by how much one set falls short of decoding as far as is wanted.

        Parameters
        ----------
        pris : tuple of int, length N
            PRIs in the order of the places. [clock counts]

        Returns
        -------
        short : float
            The larger part that is missing, in range or in speed; 0 where nothing is. [unitless]
        """
        m, missing = self.limits.m, [0.0]
        if self.wanted_counts is not None:
            span = _reach(pris, self._range_widths(pris), m, self.wanted_counts)
            missing.append(float(1 - span / self.wanted_counts))
        if self.wanted_m_s is not None:
            span = _reach(*self._speed_rule(pris), m, self.wanted_m_s)
            missing.append(float(1 - span / self.wanted_m_s))
        return max(missing)

    def _range_widths(self, pris):
        if self.limits.decode == 'exact':
            return [0] * len(pris)
        low, high = self.limits.speed_m_s
        fills = [place.fill_pulses for place in self.limits.places]
        motion = motion_counts(pris, self.pulses(pris), fills, max(abs(low), abs(high)))
        return range_half_widths(self.blur(pris), self.gates, *([motion] if self.limits.decode_motion else []))

    def blur(self, pris):
        """Return the blur of one set.

        Parameters
        ----------
        pris : tuple of int, length N
            PRIs in the order of the places. [clock counts]

        Returns
        -------
        blur_gates : Fraction
            As given, or by the rule. [gates]
        """
        given = self.limits.blur_gates
        return default_blur(pris, self.gates) if given is None else typed_decimal(given)

    def pulses(self, pris):
        """Return how many pulses count on each PRI of one set.

        Parameters
        ----------
        pris : tuple of int, length N
            PRIs in the order of the places. [clock counts]

        Returns
        -------
        pulses : tuple of int, length N
            Pulses. [unitless]
        """
        clock = float(self.limits.clock_hz)
        return tuple(
            int(pulses_of(place, np.float64(pri / clock))) for place, pri in zip(self.limits.places, pris, strict=True)
        )

    def spans(self, pris):
        """Return how far one set decodes.

        Parameters
        ----------
        pris : tuple of int, length N
            PRIs in the order of the places. [clock counts]

        Returns
        -------
        ranges, speeds : DecodeSpan
            With blur, and exact. [m, m/s]
        """
        limits, blur = self.limits, self.blur(pris)
        low, high = limits.speed_m_s
        fills = [place.fill_pulses for place in limits.places]
        motion = motion_counts(pris, self.pulses(pris), fills, max(abs(low), abs(high)))
        widths = range_half_widths(blur, self.gates, *([motion] if limits.decode_motion else []))
        carriers = [place.carrier_hz for place in limits.places]
        ranges = range_span(pris, limits.clock_hz, limits.m, widths, limits.range_m[1])
        return ranges, speed_span(pris, limits.clock_hz, carriers, self.pulses(pris), blur, limits.m, high - low)


def _reach(periods, half_widths, m, wanted):
    """Return how far a set decodes, but no farther than is wanted."""
    if not any(half_widths):
        span = exact_span(periods, m, below=wanted)
    else:
        span = first_confusion(periods, half_widths, m, wanted)
    return wanted if span is None else min(Fraction(span), wanted)


def _stretches(period, width, least, limit):
    """Return where at least so many combs hold, beyond nothing and up to a limit."""
    teeth = [np.arange(int(limit / p) + 2) for p in period]
    enter = np.concatenate([k * p - w for k, p, w in zip(teeth, period, width, strict=True)])
    leave = np.concatenate([k * p + w for k, p, w in zip(teeth, period, width, strict=True)])
    edge = np.concatenate((leave, enter))
    order = edge.argsort(kind='stable')
    holding = np.where(order < leave.size, -1, 1).cumsum()
    edge = edge[order]
    stop = np.minimum(edge[1:], limit)
    some = (holding[:-1] >= least) & (edge[:-1] < stop)
    return edge[:-1][some], stop[some]
