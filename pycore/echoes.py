"""What a plan hears: clutter in its gates and filters, and how far it detects its target.

Lies beside :mod:`pycore.computed` and is asked only by what shows clutter or
detection. Holds no mathematics of its own: it brings the plan to the functions
of clutter and detection, part by part where a near pulse serves the near ranges.
"""

import math
from dataclasses import dataclass
from functools import cached_property

import numpy as np

from pycore import clutter, clutter_pieces, detection, filters, improvement, notch, target, visibility
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.cpi import cpis
from pycore.reach import enough_over_half, reach_over
from pycore.response import binomial_weights
from pycore.speed_samples import best_gain, sampled_speeds

_STAGGER_SPEEDS = 512
"""Speeds at which a stagger's reach is looked at. [unitless]"""


@dataclass(frozen=True, slots=True)
class Part:
    """A part of the range axis that one kind of pulse serves, with all that belongs to that pulse.

    Parameters
    ----------
    range_m : pair of float
        Its ends. [m]
    cpis : tuple of Cpi, length N
        The CPIs with that pulse. [unitless]
    first_opening_m : float array, shape N
        Range nearer than which the laws are held constant. [m]
    factor : float array, shape N × P
        Clutter-to-noise against that of the reference pulse. [unitless]
    strength_m4 : float array, shape N
        The target's strength, beam shape taken off. [m⁴]
    """

    range_m: tuple[float, float]
    cpis: tuple
    first_opening_m: np.ndarray
    factor: np.ndarray
    strength_m4: np.ndarray


class Echoes:
    """Clutter and detection of one plan.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    """

    def __init__(self, computed):
        self.computed = computed
        self.plan = computed.plan

    @cached_property
    def patches(self):
        """Surface first, then rain and other moving patches."""
        surface = () if self.plan.surface is None else (self.plan.surface,)
        return (*surface, *self.plan.patches)

    @cached_property
    def parts(self):
        """The range axis by the pulse that serves it: one part, or two with a near pulse."""
        plan, (low, high) = self.plan, self.plan.range_m
        if plan.near is None:
            return (self._part((low, high), plan.pulse_s, plan.bandwidth_hz),)
        change = min(max(plan.near.to_range_m, low), high)
        near = np.full(plan.n, plan.near.pulse_s), np.full(plan.n, plan.near_bandwidth_hz)
        parts = ((low, change), *near), ((change, high), plan.pulse_s, plan.bandwidth_hz)
        return tuple(self._part(*part) for part in parts if part[0][0] < part[0][1])

    def _part(self, range_m, pulse_s, bandwidth_hz):
        plan = self.plan
        made = cpis(
            plan.pri_s,
            plan.wavelength_m,
            pulse_s,
            bandwidth_hz,
            plan.notch_m_s,
            plan.pulses,
            plan.fill_pulses,
            plan.window,
            plan.sidelobe_db,
        )
        opening = SPEED_OF_LIGHT_M_S / 2.0 * (plan.recovery_s + plan.received_min * pulse_s)
        reference = float(plan.pulse_s[0]), float(plan.bandwidth_hz[0])
        factor = [clutter.pulse_factor(patch, pulse_s, bandwidth_hz, *reference) for patch in self.patches]
        return Part(range_m, made, opening, np.reshape(factor, (len(self.patches), plan.n)).T, self._strength(pulse_s))

    def _strength(self, pulse_s):
        """The target's strength on each PRF with a pulse of this length, less what the beam's shape costs."""
        plan, wanted = self.plan, self.plan.target
        if wanted.radar_equation is not None:
            given = wanted.radar_equation
            strength = target.radar_equation_strength(
                given.peak_w,
                given.gain_dbi,
                given.rcs_m2,
                given.noise_figure_db,
                given.losses_db,
                pulse_s,
                plan.wavelength_m,
            )
        else:
            measured = wanted.at_pulse_s or float(plan.pulse_s[0])
            strength = target.reference_strength(wanted.snr_db, wanted.at_m, pulse_s, plan.wavelength_m, measured)
        return strength * 10.0 ** (-self.beam_loss_db / 10.0)

    @cached_property
    def beam_loss_db(self):
        """What each CPI loses because the beam has moved on, shape N; none for a given dwell. [dB]"""
        plan = self.plan
        if plan.dwell_s is not None or plan.time_on_target_s is None or self.computed.is_stagger:
            return np.zeros(plan.n)
        offsets = target.beam_offsets(plan.pri_s, plan.pulses, plan.fill_pulses, plan.time_on_target_s)
        return target.beam_loss_db(offsets)

    # --- clutter -------------------------------------------------------------------------------------------------

    @cached_property
    def pieces(self):
        """The coverage in pieces of range, each with the speeds that notch and clutter leave clear."""
        plan, clear = self.plan, self.computed.prf_speeds
        return tuple(
            piece
            for part in self.parts
            for piece in clutter_pieces.clear_pieces(
                part.cpis, self.patches, part.first_opening_m, part.factor, clear, part.range_m, plan.speed_m_s
            )
        )

    def piece_at(self, range_m):
        """Return the piece of the range axis that a range lies in.

        Parameters
        ----------
        range_m : float
            A range. [m]

        Returns
        -------
        piece : Piece or None
            ``None`` outside the coverage.
        """
        return next((piece for piece in self.pieces if piece.range_m[0] <= range_m <= piece.range_m[1]), None)

    @cached_property
    def share_with_clutter(self):
        """Visible share with clutter counted too; ``None`` for a stagger, whose canceller has no such pieces."""
        computed = self.computed
        if computed.is_stagger:
            return None
        if not self.patches:
            return computed.share
        shares = visibility.pattern_shares_of_pieces(
            computed.range_sweep, self.pieces, self.plan.speed_m_s, computed.looks
        )
        return visibility.visible(shares, computed.looks, computed.m).share

    @cached_property
    def fill_needed(self):
        """Fill pulses that clutter asks for on each PRF, shape N; those that its farthest range keeps busy."""
        farthest = max((patch.range_m[1] for patch in self.patches), default=0.0)
        return self._fill_for(farthest) if farthest else np.zeros(self.plan.n, dtype=int)

    @cached_property
    def fill_for_target(self):
        """Fill pulses that a target at the far end of the coverage asks for on each PRF, shape N."""
        return self._fill_for(self.plan.range_m[1])

    def _fill_for(self, range_m):
        return clutter.fill_needed(2.0 * range_m / SPEED_OF_LIGHT_M_S, self.plan.pri_s, self.plan.pulse_s)

    @cached_property
    def suggested_notch(self):
        """A notch for the ground clutter, in its parts, each of shape N; ``None`` without ground clutter."""
        plan, part = self.plan, self.parts[-1]
        if plan.surface is None:
            return None
        # Beyond R_u a wanted range shares its gate with the nearest clutter that there is.
        shares = self.computed.unambiguous_range_m < plan.range_m[1]
        nearest = np.where(shares, part.first_opening_m, np.maximum(part.first_opening_m, plan.range_m[0]))
        ratio = clutter.clutter_to_noise(plan.surface, nearest, part.first_opening_m, part.factor[:, 0])
        lobes = np.array([filters.lobe_edge(cpi.weights) for cpi in part.cpis])
        width = plan.wavelength_m / (2.0 * plan.pulses * plan.pri_s)
        spreads = plan.surface.spread_m_s, self._platform_spread_m_s, self._scanning_spread_m_s
        return notch.suggested_notch(ratio, *spreads, lobes, width)

    @property
    def _platform_spread_m_s(self):
        plan = self.plan
        if plan.platform is None:
            return 0.0
        return notch.platform_spread(plan.platform.speed_m_s, plan.platform.look_deg, plan.beamwidth_deg)

    @property
    def _scanning_spread_m_s(self):
        """Spread that scanning adds on each PRF; none for a given dwell or a beam that stands still."""
        plan = self.plan
        if plan.dwell_s is not None or plan.time_on_target_s is None:
            return 0.0
        return improvement.scanning_spread(plan.wavelength_m, plan.time_on_target_s)

    @cached_property
    def improvement_db(self):
        """Improvement factor of the plan's canceller at each PRI alone; ``None`` without ground clutter. [dB]"""
        plan, suggested = self.plan, self.suggested_notch
        if suggested is None:
            return [None] * plan.n
        spread = np.broadcast_to(suggested.spread_m_s, plan.n)
        rows = zip(plan.pri_counts, plan.wavelength_m.tolist(), spread.tolist(), strict=True)
        factors = [
            improvement.improvement_factor((count,), plan.clock_hz, self.weights, length, one)
            for count, length, one in rows
        ]
        return [10.0 * math.log10(factor) if math.isfinite(factor) else None for factor in factors]

    # --- detection -----------------------------------------------------------------------------------------------

    @cached_property
    def outputs(self):
        """Outputs of each CPI whose powers are added: one of a filter bank, pulses less delays of a canceller."""
        if not self.computed.is_stagger:
            return 1
        return int(self.plan.pulses[0]) - len(self.weights) + 1

    @cached_property
    def weights(self):
        """Weights of the canceller of a stagger."""
        return binomial_weights(self.plan.delays) if self.plan.weights is None else self.plan.weights

    @cached_property
    def false_alarm_per_cpi(self):
        """False-alarm probability of one CPI, worked back from the overall one."""
        return detection.false_alarm_per_cpi(self.plan.target.false_alarm, self.computed.looks, self.computed.m)

    @cached_property
    def cells(self):
        """Gates × filters of the coverage; a canceller has gates only."""
        plan = self.plan
        gate = SPEED_OF_LIGHT_M_S / 2.0 / plan.bandwidth_hz
        width = np.inf if self.computed.is_stagger else plan.wavelength_m / (2.0 * plan.pulses * plan.pri_s)
        return detection.coverage_cells(plan.range_m, plan.speed_m_s, gate, width)

    @property
    def false_per_set(self):
        """Expected false reports of one set of CPIs."""
        return self.cells * self.plan.target.false_alarm

    @cached_property
    def false_per_scan(self):
        """Expected false reports of one turn of the antenna; ``None`` where it does not turn."""
        plan = self.plan
        if plan.scan_period_s is None or plan.time_on_target_s is None:
            return None
        sets = detection.sets_per_scan(plan.scan_period_s, plan.time_on_target_s, self.computed.time_used_s)
        return self.false_per_set * sets

    @cached_property
    def reach(self):
        """How far the target is detected with the wanted probability; ``None`` where a canceller gives no output."""
        if self.outputs < 1:
            return None
        asked = self.plan.target
        return reach_over(
            *self._processed, self._set_m, self._level, asked.fluctuation, asked.pd_wanted, self._limits_m, self.outputs
        )

    def half_reach(self, range_m):
        """Return whether the target is detected with the wanted probability at a range over half of the speeds.

        Parameters
        ----------
        range_m : float
            A range. [m]

        Returns
        -------
        reached : bool
            Whether the median of :attr:`reach` is at least that range, without looking for it.
        """
        nearest, farthest = self._limits_m
        if self.outputs < 1 or range_m > farthest:
            return False
        _, length, strength = self._processed
        asked = self.plan.target
        ratio = strength / max(range_m, nearest) ** 4
        return enough_over_half(
            length, ratio, self._set_m, self._level, asked.fluctuation, asked.pd_wanted, self.outputs
        )

    @property
    def _set_m(self):
        return 1 if self.computed.is_stagger else self.computed.m

    @cached_property
    def _level(self):
        computed = self.computed
        return detection.set_threshold(self.plan.target.false_alarm, computed.looks, computed.m, self.outputs)

    @property
    def _limits_m(self):
        """The nearest and the farthest range that a reach is looked for at. [m]"""
        return float(np.sort(self.parts[-1].first_opening_m)[self.computed.m - 1]), 4.0 * self.plan.range_m[1]

    @cached_property
    def _processed(self):
        """Speeds, the length that each stands for, and the strength behind the processing on each look."""
        part = self.parts[-1]
        if not self.computed.is_stagger:
            speed, length = sampled_speeds(part.cpis, self.computed.m, self.plan.speed_m_s)
            gain = np.stack([best_gain(cpi, speed) for cpi in part.cpis], axis=1)
            return speed, length, gain * part.strength_m4
        speed, length = self._stagger_speeds()
        gain = self.computed.response.response.power(speed) * part.strength_m4[0] * self.outputs
        return speed, length, gain[:, None]

    def _stagger_speeds(self):
        """Middles of equal steps of the wanted speeds, those in the notch around zero left out."""
        low, high = self.plan.speed_m_s
        edges = np.linspace(low, high, _STAGGER_SPEEDS + 1)
        speed = (edges[:-1] + edges[1:]) / 2.0
        notch = self.computed.response.notch_m_s
        outside = np.abs(speed) >= notch
        return speed[outside], np.full(int(outside.sum()), (high - low) / _STAGGER_SPEEDS)

    def reached_km(self):
        """Return best, median and worst reach over the wanted speeds outside the floor.

        Returns
        -------
        reached : dict of float or None
            ``None`` where the wanted probability is not reached. [km]
        """
        found = self.reach
        names = ('best', 'median', 'worst')
        if found is None:
            return dict.fromkeys(names)
        values = {name: getattr(found, name) for name in names}
        return {name: None if math.isnan(value) else value / 1e3 for name, value in values.items()}
