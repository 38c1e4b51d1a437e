"""Everything that one plan gives, each part computed once, when it is first asked for.

The one place where a plan meets the physics: findings, figures and the
assessment all read from here, so that nothing is worked out twice and what
nobody asks for costs nothing. Holds no mathematics of its own.
"""

from dataclasses import dataclass
from functools import cached_property

import numpy as np

from pycore import ambiguity, decoding, dwell, eclipsing, floor, holes, patterns, sight, stagger, unseen, visibility
from pycore.crossings import clear_speeds
from pycore.decoding.blur import default_blur, gate_counts, motion_counts, range_half_widths
from pycore.echoes import Echoes
from pycore.motion import rotor_folds_onto_body
from pycore.spans import Spans


@dataclass(frozen=True, slots=True)
class MustSeeSight:
    """What is seen of one must-see region.

    Parameters
    ----------
    name : str
        As the plan names it. [unitless]
    range_m, speed_m_s : pair of float
        The region, inside the coverage. [m, m/s]
    share : float
        Part of it that is seen. [unitless]
    holes : Holes
        Where it is not. [m, m/s]
    wanted : float or None
        Share that was asked for. [unitless]
    """

    name: str
    range_m: tuple[float, float]
    speed_m_s: tuple[float, float]
    share: float
    holes: holes.Holes
    wanted: float | None


class Computed:
    """What a plan gives.

    Parameters
    ----------
    plan : Plan
        The plan, checked and in SI units. [unitless]
    with_echoes : bool
        Whether findings may ask for clutter and detection even where nothing is judged by them. [unitless]
    """

    def __init__(self, plan, with_echoes=True):
        self.plan = plan
        self.with_echoes = with_echoes

    @cached_property
    def echoes(self):
        """Clutter and detection of the same plan."""
        return Echoes(self)

    @property
    def is_stagger(self):
        """Whether the PRIs follow each other pulse by pulse inside one CPI."""
        return self.plan.kind == 'stagger'

    @property
    def looks(self):
        """How many verdicts there are on one target: one for each PRF, or one for a stagger."""
        return 1 if self.is_stagger else self.plan.n

    @property
    def m(self):
        """How many of the looks must be clear."""
        return 1 if self.is_stagger else self.plan.m

    # --- ambiguity -----------------------------------------------------------------------------------------------

    @cached_property
    def unambiguous_range_m(self):
        """Unambiguous range of each PRI, shape N. [m]"""
        return ambiguity.unambiguous_range(self.plan.pri_s)

    @cached_property
    def blind_speed_m_s(self):
        """First blind speed of each PRI, shape N. [m/s]"""
        return ambiguity.first_blind_speed(self.plan.pri_s, self.plan.wavelength_m)

    @cached_property
    def shortfall(self):
        """How many times over a single PRF falls short of the coverage, on the longest wavelength of the plan."""
        low, high = self.plan.speed_m_s
        return float(ambiguity.shortfall(self.plan.range_m[1], high - low, max(self.plan.wavelength_m)))

    @cached_property
    def regimes(self):
        """Regime of each PRF for this coverage: low, medium, high or clear."""
        low, high = self.plan.speed_m_s
        pairs = zip(self.unambiguous_range_m, self.blind_speed_m_s, strict=True)
        return [ambiguity.regime(span, speed, self.plan.range_m[1], high - low) for span, speed in pairs]

    # --- where each PRF is clear ---------------------------------------------------------------------------------

    @cached_property
    def prf_ranges(self):
        """Clear ranges of each PRI on its own, as Spans. [m]"""
        return self._prf_ranges(self.plan.range_m)

    def _prf_ranges(self, range_m):
        plan = self.plan
        return eclipsing.clear_ranges(
            plan.pri_s, plan.pulse_s, plan.recovery_s, plan.guard_s, plan.received_min, range_m, plan.near
        )

    @cached_property
    def prf_speeds(self):
        """Clear speeds of each PRI on its own, by its notch, as Spans. [m/s]"""
        return stagger.notch_clear_speeds(self.blind_speed_m_s, self.plan.notch_m_s, self.plan.speed_m_s)

    @cached_property
    def rotor_folds(self):
        """On which PRFs lines of the target's rotor or propeller fold onto its body, shape N; ``None`` without any."""
        spread = self.plan.target.own_spread_m_s
        if not spread or self.is_stagger:
            return None
        return rotor_folds_onto_body(spread, self.blind_speed_m_s, self.blind_speed_m_s / self.plan.pulses)

    @cached_property
    def response(self):
        """The stagger's response: first crossing, true first blind speed, dips; ``None`` for dwells."""
        plan = self.plan
        if not self.is_stagger:
            return None
        return stagger.staggered(
            plan.pri_counts,
            plan.clock_hz,
            plan.delays,
            plan.weights,
            float(plan.wavelength_m[0]),
            plan.response_min_db,
            plan.speed_m_s,
        )

    @cached_property
    def first_opening_m(self):
        """Range from which each PRF first receives enough, shape N. [m]"""
        return eclipsing.first_opening(self.plan.recovery_s, self.plan.received_min, self.plan.pulse_s)

    @cached_property
    def sight(self):
        """Clear spans, floor and coverage of the plan as a whole."""
        return self.sight_of(self.plan.range_m, self.plan.speed_m_s)

    def sight_of(self, range_m, speed_m_s):
        """Return the plan's sight of any region, inside its coverage or not.

        Parameters
        ----------
        range_m : pair of float
            Ranges. [m]
        speed_m_s : pair of float
            Radial speeds. [m/s]

        Returns
        -------
        sight : Sight
            Clear spans of every look, and those of the floor.
        """
        plan = self.plan
        if self.is_stagger:
            ranges = self._stagger_ranges(range_m)
            speeds = clear_speeds(self.response.response, plan.response_min_db, speed_m_s)
            opening, notch = self.first_opening_m.max(keepdims=True), np.array([self.response.notch_m_s])
        else:
            ranges = self._prf_ranges(range_m)
            speeds = stagger.notch_clear_speeds(self.blind_speed_m_s, plan.notch_m_s, speed_m_s)
            opening, notch = self.first_opening_m, plan.notch_m_s
        floor_ranges = floor.floor_ranges(opening, range_m, *self._near_opening)
        floor_speeds = floor.floor_speeds(notch, speed_m_s)
        return sight.Sight(ranges, speeds, floor_ranges, floor_speeds, self.looks, self.m, range_m, speed_m_s)

    def prf_spans(self, range_m, speed_m_s):
        """Return the clear ranges and speeds of each PRI on its own, on any axes.

        Parameters
        ----------
        range_m : pair of float
            Ranges. [m]
        speed_m_s : pair of float
            Radial speeds. [m/s]

        Returns
        -------
        ranges, speeds : Spans
            By the received share, and by the notch.
        """
        speeds = stagger.notch_clear_speeds(self.blind_speed_m_s, self.plan.notch_m_s, speed_m_s)
        return self._prf_ranges(range_m), speeds

    @property
    def _near_opening(self):
        """First opening of the near pulse and how far it serves; nothing without one."""
        plan = self.plan
        if plan.near is None:
            return ()
        opening = eclipsing.first_opening(plan.recovery_s, plan.received_min, plan.near.pulse_s)
        return float(opening), plan.near.to_range_m

    def _stagger_ranges(self, limits):
        """Ranges that are clear on every interval of the cycle and short of the smallest unambiguous range."""
        swept = patterns.sweep(self._prf_ranges(limits), limits)
        shortest = self.unambiguous_range_m.min()
        everywhere = (swept.pattern == (1 << self.plan.n) - 1) & (swept.edges[:-1] < shortest)
        start, stop = swept.edges[:-1][everywhere], np.minimum(swept.edges[1:][everywhere], shortest)
        return Spans(np.zeros(start.size, dtype=np.intp), start, stop)

    # --- what is seen --------------------------------------------------------------------------------------------

    @cached_property
    def range_sweep(self):
        """The range axis cut at every edge, with the pattern of clear looks."""
        return patterns.sweep(self.sight.ranges, self.plan.range_m)

    @cached_property
    def speed_sweep(self):
        """The speed axis cut at every edge, with the pattern of clear looks."""
        return patterns.sweep(self.sight.speeds, self.plan.speed_m_s)

    @cached_property
    def visible(self):
        """Visible share, shares by number of clear looks, share with the worst one lost."""
        shares = visibility.pattern_shares(self.range_sweep, self.speed_sweep, self.looks)
        return visibility.visible(shares, self.looks, self.m)

    @property
    def share(self):
        """Share of the coverage that is seen: eclipsing and notch only."""
        return self.visible.share

    @cached_property
    def floor_share(self):
        """Share of the coverage that no plan can see with this pulse and notch."""
        return sight.floor(self.sight)

    @property
    def excess_over_floor(self):
        """Blind share beyond the floor; what rounding leaves below zero is zero."""
        return max(0.0, 1.0 - self.share - self.floor_share)

    @cached_property
    def holes(self):
        """Holes of the coverage outside the floor."""
        wanted = self.plan.wanted
        return holes.holes(self.sight, wanted.hole_m, wanted.hole_m_s)

    @cached_property
    def must_see(self):
        """What is seen of each must-see region that lies in the coverage."""
        return tuple(self._must_see(region) for region in self.plan.must_see)

    def _must_see(self, region):
        part = self.sight_of(region.range_m, region.speed_m_s)
        found = holes.holes(part, 0.0, 0.0)
        return MustSeeSight(region.name, region.range_m, region.speed_m_s, sight.share(part), found, region.visible)

    @cached_property
    def inbound(self):
        """The longest time that a target flying along the beam stays unseen."""
        return unseen.inbound(self.sight)

    @cached_property
    def crossing_s(self):
        """Time that the crossing track stays inside the notch; ``inf`` for ever; ``None`` where none is asked. [s]"""
        crossing = self.plan.crossing
        if crossing is None:
            return None
        notch = [self.response.notch_m_s] if self.is_stagger else self.plan.notch_m_s
        return unseen.crossing(crossing.speed_m_s, crossing.range_m, notch, self.m, self.plan.range_m)

    def in_scans(self, time_s):
        """Return a time in turns of the antenna; ``None`` where it does not turn.

        Parameters
        ----------
        time_s : float
            A time out of sight. [s]

        Returns
        -------
        scans : float or None
            Turns of the antenna. [unitless]
        """
        period = self.plan.scan_period_s
        return None if period is None else float(unseen.scans(time_s, period))

    @cached_property
    def eclipsed_shares(self):
        """Part of the coverage's ranges that is not clear on each PRI, shape N."""
        return 1.0 - self._clear_shares(self.prf_ranges, self.plan.range_m)

    @cached_property
    def notched_shares(self):
        """Part of the coverage's speeds that is blind on each PRI, shape N; a stagger's is that of its response."""
        if self.is_stagger:
            return np.full(self.plan.n, 1.0 - self.response.share_above)
        return 1.0 - self._clear_shares(self.prf_speeds, self.plan.speed_m_s)

    def _clear_shares(self, spans, limits):
        length = np.bincount(spans.prf, spans.stop - spans.start, self.plan.n)
        return length / (limits[1] - limits[0])

    @cached_property
    def first_blind_m_s(self):
        """First interval of speeds above the notch on which fewer than M looks are clear; ``None`` if none. [m/s]"""
        return stagger.first_blind_interval(self.blind_speed_m_s, self.plan.notch_m_s, self.m, self.plan.speed_m_s)

    # --- decoding ------------------------------------------------------------------------------------------------

    @cached_property
    def decode_blur(self):
        """Blur of the decoder in gates, as given or by the rule, in an exact fraction. [gates]"""
        plan = self.plan
        if plan.decode_blur_gates is not None:
            return plan.decode_blur_gates
        return default_blur(plan.pri_counts, gate_counts(plan.clock_hz, plan.bandwidth_hz.tolist()))

    @cached_property
    def decode_range(self):
        """How far range decodes; a stagger's is its shortest unambiguous range."""
        plan = self.plan
        if self.is_stagger:
            shortest = float(self.unambiguous_range_m.min())
            return decoding.DecodeSpan(shortest, shortest, shortest)
        gates = gate_counts(plan.clock_hz, plan.bandwidth_hz.tolist())
        low, high = plan.speed_m_s
        motion = motion_counts(plan.pri_counts, plan.pulses, plan.fill_pulses, max(abs(low), abs(high)))
        widths = range_half_widths(self.decode_blur, gates, *([motion] if plan.decode_motion else []))
        return decoding.range_span(plan.pri_counts, plan.clock_hz, self.m, widths, plan.range_m[1])

    @cached_property
    def decode_speed(self):
        """Over how wide a span speed decodes; ``None`` for a stagger."""
        plan = self.plan
        if self.is_stagger:
            return None
        low, high = plan.speed_m_s
        return decoding.speed_span(
            plan.pri_counts, plan.clock_hz, plan.carrier_hz.tolist(), plan.pulses, self.decode_blur, self.m, high - low
        )

    # --- dwell ---------------------------------------------------------------------------------------------------

    @cached_property
    def time_used_s(self):
        """Time of one set of CPIs with their fill pulses. [s]"""
        plan = self.plan
        if self.is_stagger:
            return float((plan.pulses[0] + plan.fill_pulses[0]) * plan.pri_s.mean())
        return float(dwell.time_used(plan.pri_s, plan.pulses, plan.fill_pulses))

    @cached_property
    def duty_largest(self):
        """Largest duty of the set, near pulse included."""
        return float(self.duty.max())

    @cached_property
    def duty(self):
        """Duty of each PRI, near pulse included, shape N."""
        near = self.plan.near.pulse_s if self.plan.near else 0.0
        return (self.plan.pulse_s + near) / self.plan.pri_s

    @cached_property
    def duty_mean(self):
        """Mean duty over the set, fill pulses included."""
        plan = self.plan
        sent = np.ones(plan.n) if self.is_stagger else plan.pulses + plan.fill_pulses
        return dwell.mean_duty(self.duty * plan.pri_s, plan.pri_s, sent)

    @cached_property
    def range_walk_gates(self):
        """Gates that the fastest target crosses within each CPI, shape N. [gates]"""
        plan = self.plan
        fastest = max(abs(plan.speed_m_s[0]), abs(plan.speed_m_s[1]))
        time = plan.pulses * (plan.pri_s.mean() if self.is_stagger else plan.pri_s)
        return dwell.range_walk(fastest, time, plan.bandwidth_hz)

    @cached_property
    def range_walk_set_gates(self):
        """Gates that the fastest target crosses while one whole set is sent, in the finest gate. [gates]"""
        plan = self.plan
        fastest = max(abs(plan.speed_m_s[0]), abs(plan.speed_m_s[1]))
        return float(dwell.range_walk(fastest, self.time_used_s, plan.bandwidth_hz.max()))
