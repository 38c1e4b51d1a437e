"""What a search holds against its limits: whole blocks of candidates cheaply, single sets in full.

Every limit has a *shortfall*: by how much a set misses it, as a part of what was
wanted, and 0 where it is met. A search goes by the sum of them first and by the
score second, so that it finds its way to sets that meet everything, and knows how
near the best of the others came.
"""

import numpy as np

from pycore.finder.blocks import Block, Times, Weighed
from pycore.finder.choices import choices
from pycore.finder.decode import Decoder, pulses_of
from pycore.finder.scores import Scorer
from pycore.finder.shortfalls import DIGITS, hole_share, short_of
from pycore.finder.sight import floor_of, sight_of
from pycore.holes import holes
from pycore.unseen import inbound

_MOST_AT_ONCE = 2_048
"""Candidates that are looked at in one step. [unitless]"""


class Judge:
    """Holds sets of PRIs against limits.

    Parameters
    ----------
    limits : Limits
        What binds the search; checked. [mixed]
    """

    def __init__(self, limits):
        self.limits, self.kinds = limits, limits.kinds
        self.choices = {kind: choices(limits, kind) for kind in set(self.kinds)}
        self.decoder = Decoder(limits, sum(len(some) for some in self.choices.values()))
        self.floor_share = floor_of(limits)
        regions = [(limits.range_m, limits.speed_m_s), *((part.range_m, part.speed_m_s) for part in limits.must_see)]
        self._scorers = [Scorer(limits, *region) for region in regions]
        self._wanted = [limits.visible, *(part.visible for part in limits.must_see)]
        self._whole, self._each_time = {}, {}

    @property
    def weighed(self):
        """Names of the limits that whole blocks are held against, in the order of ``Weighed.short``."""
        return ('time', 'visible', *(f'must-see.{i}' for i in range(len(self.limits.must_see))))

    @property
    def settles(self):
        """Whether single sets must be looked at in full before they count."""
        limits = self.limits
        return bool(
            self.decoder.wanted_m_s is not None
            or (self.decoder.wanted_counts is not None and limits.decode_motion)
            or limits.hole_m is not None
            or limits.hole_m_s is not None
            or limits.unseen_s is not None
        )

    def whole_block(self, kind):
        """Return all candidates for a place as one block; ``None`` where they are too many for that.

        Parameters
        ----------
        kind : int
            Place. [unitless]

        Returns
        -------
        block : Block or None
            Kept, so that its tables serve the whole search.
        """
        if kind not in self._whole:
            some = self.choices[kind]
            fits = len(some) <= _MOST_AT_ONCE
            self._whole[kind] = self.block(kind, some.counts(np.arange(len(some)))) if fits else None
        return self._whole[kind]

    def drawn_block(self, kind, chance, around):
        """Return some of the candidates for a place: drawn over all of them, and those around a PRI.

        Parameters
        ----------
        kind : int
            Place. [unitless]
        chance : Chance
            What draws. [unitless]
        around : int
            PRI. [clock counts]

        Returns
        -------
        block : Block
            The whole block where there is one.
        """
        whole = self.whole_block(kind)
        if whole is not None:
            return whole
        some, reach = self.choices[kind], _MOST_AT_ONCE // 4
        at = some.below(around)
        near = some.counts(np.arange(max(at - reach, 0), min(at + reach, len(some))))
        return self.block(kind, np.union1d(self.drawn_counts(kind, chance), near))

    def drawn_counts(self, kind, chance):
        """Return candidates for a place without tables: all of them, or some drawn over all of them.

        Parameters
        ----------
        kind : int
            Place. [unitless]
        chance : Chance
            What draws. [unitless]

        Returns
        -------
        counts : int array, shape C
            PRIs, rising. [clock counts]
        """
        some = self.choices[kind]
        if len(some) <= _MOST_AT_ONCE:
            return some.counts(np.arange(len(some)))
        # One from each of equal parts, so that no part of the interval is left out.
        part = len(some) / (_MOST_AT_ONCE // 2)
        drawn = ((np.arange(_MOST_AT_ONCE // 2) + chance.parts(_MOST_AT_ONCE // 2)) * part).astype(np.int64)
        return some.counts(np.unique(drawn.clip(0, len(some) - 1)))

    def block(self, kind, counts):
        """Return a block of candidates with fresh tables.

        Parameters
        ----------
        kind : int
            Place that they are for. [unitless]
        counts : int array, shape C
            PRIs. [clock counts]

        Returns
        -------
        block : Block
            For scoring.
        """
        return Block(
            kind, counts, self._time(kind, counts), tuple(scorer.tables(kind, counts) for scorer in self._scorers)
        )

    def _time(self, kind, counts):
        place, pri_s = self.limits.places[kind], counts / float(self.limits.clock_hz)
        return (pulses_of(place, pri_s) + place.fill_pulses) * pri_s

    def _one_time(self, kind, pri):
        """Return what one PRI takes with its pulses, remembered. [s]"""
        if (kind, pri) not in self._each_time:
            if len(self._each_time) > 100_000:
                self._each_time.clear()
            self._each_time[kind, pri] = float(self._time(kind, np.array([pri]))[0])
        return self._each_time[kind, pri]

    def times(self):
        """Return the parts of the times that sets can use.

        Returns
        -------
        times : Times
            From the shortest to the longest set, or to the time on target. [s]
        """
        ends = [self.choices[kind].counts(np.array([0, len(self.choices[kind]) - 1])) for kind in self.kinds]
        shortest, longest = sum(self._time(kind, two) for kind, two in zip(self.kinds, ends, strict=True)).tolist()
        return Times(shortest, longest if self.limits.time_s is None else min(longest, self.limits.time_s))

    def time_of(self, pris):
        """Return the time that one set uses.

        Parameters
        ----------
        pris : sequence of int, length N
            PRIs in the order of the places. [clock counts]

        Returns
        -------
        time_s : float
            With fill pulses. [s]
        """
        pairs = zip(self.kinds, pris, strict=True)
        return sum(self._one_time(*pair) for pair in pairs)

    def legal(self, held, kind, counts):
        """Return which candidates are far enough from the PRIs that are held.

        Parameters
        ----------
        held : sequence of (int, int)
            Place and PRI of each. [unitless, clock counts]
        kind : int
            Place that the candidates are for. [unitless]
        counts : int array, shape C
            Candidates. [clock counts]

        Returns
        -------
        legal : bool array, shape C
            Two PRIs of places that are alike always differ.
        """
        legal = np.ones(len(counts), dtype=bool)
        for other, count in held:
            apart = max(self.limits.apart_counts, int(other == kind))
            if apart:
                legal &= np.abs(counts - count) >= apart
        return legal

    def weigh(self, held, block):
        """Hold all sets that some PRIs make with the candidates of a block against the limits.

        Parameters
        ----------
        held : sequence of (int, int), length N - 1
            Place and PRI of each. [unitless, clock counts]
        block : Block
            Candidates for the last place. [mixed]

        Returns
        -------
        weighed : Weighed
            For each candidate.
        """
        share = [scorer.shares(held, tables) for scorer, tables in zip(self._scorers, block.tables, strict=True)]
        time_s = block.time_s + sum(self._one_time(*one) for one in held)
        limit_s = self.limits.time_s
        late = time_s * 0.0 if limit_s is None else short_of(-time_s, -limit_s)
        short = np.stack([late, *(short_of(got, wanted) for got, wanted in zip(share, self._wanted, strict=True))])
        score = (1.0 - self.floor_share - share[0]).round(DIGITS) + 0.0
        return Weighed(
            self.legal(held, block.kind, block.counts),
            self.decoder.sieve(held, block.kind, block.counts),
            score,
            short,
            time_s,
        )

    def in_order(self, pris):
        """Return a set with the PRIs of places that are alike in rising order.

        Parameters
        ----------
        pris : sequence of int, length N
            PRIs in the order of the places. [clock counts]

        Returns
        -------
        pris : tuple of int, length N
            The same plan. [clock counts]
        """
        if len(self.choices) == 1:
            return tuple(sorted(pris))
        rising = {
            kind: iter(sorted(p for k, p in zip(self.kinds, pris, strict=True) if k == kind)) for kind in self.kinds
        }
        return tuple(next(rising[kind]) for kind in self.kinds)

    def settle(self, pris):
        """Return the shortfalls of one set that only a full look at it shows.

        Parameters
        ----------
        pris : tuple of int, length N
            PRIs in the order of the places. [clock counts]

        Returns
        -------
        short : dict of float
            For ``decode``, ``hole`` and ``unseen``, as far as they bind. [unitless]
        """
        limits, short = self.limits, {}
        if self.decoder.judges:
            short['decode'] = 0.0 if self.decoder.decodes(pris) else 1.0
        if limits.hole_m is None and limits.hole_m_s is None and limits.unseen_s is None:
            return short
        seen = sight_of(limits, pris)
        if limits.hole_m is not None or limits.hole_m_s is not None:
            short['hole'] = hole_share(holes(seen, limits.hole_m, limits.hole_m_s))
        if limits.unseen_s is not None:
            time_s = inbound(seen).time_s
            short['unseen'] = 0.0 if np.isnan(time_s) else float(short_of(-min(time_s, 1e9), -limits.unseen_s))
        return short
