"""The records of a checked plan, in SI units."""

from dataclasses import dataclass
from fractions import Fraction

import numpy as np

from pycore.clutter import Clutter
from pycore.eclipsing import NearPulse


@dataclass(frozen=True, slots=True)
class MustSee:
    """A region that matters more than the rest: name, ranges [m], radial speeds [m/s], wanted share or ``None``."""

    name: str
    range_m: tuple[float, float]
    speed_m_s: tuple[float, float]
    visible: float | None


@dataclass(frozen=True, slots=True)
class Wanted:
    """What findings are judged against; ``None`` or ``False`` where nothing was asked. Shares are fractions."""

    visible: float | None
    hole_m_s: float | None
    hole_m: float | None
    unseen_s: float | None
    blind_speed_m_s: float | None
    decode_range: bool
    decode_speed: bool
    detect_m: float | None
    range_walk_gates: float | None


@dataclass(frozen=True, slots=True)
class Crossing:
    """A straight crossing track: speed [m/s] and the distance at which it passes [m]."""

    speed_m_s: float
    range_m: float


@dataclass(frozen=True, slots=True)
class Platform:
    """A moving radar: speed over ground [m/s], look angle off the track [deg], height [m]."""

    speed_m_s: float
    look_deg: float
    height_m: float


@dataclass(frozen=True, slots=True)
class RadarEquation:
    """Peak power [W], gain [dBi], cross-section [m²], noise figure and losses [dB] instead of a reference."""

    peak_w: float
    gain_dbi: float
    rcs_m2: float
    noise_figure_db: float
    losses_db: float


@dataclass(frozen=True, slots=True)
class Target:
    """The target used for detection: reference signal-to-noise or radar equation, fluctuation, wanted probabilities."""

    snr_db: float | None
    at_m: float | None
    at_pulse_s: float | None
    radar_equation: RadarEquation | None
    fluctuation: str
    pd_wanted: float
    false_alarm: float
    own_spread_m_s: float | None


@dataclass(frozen=True, slots=True)
class Plan:
    """A checked plan in SI units; arrays have one element for each PRI, in sending order.

    ``document`` is the whole plan in its own units, every default filled in. ``carrier_exact_hz``
    holds the carriers as the decimals that were typed; ``pri_counts`` are whole counts of the timing
    clock and ``pri_s`` exactly those. ``time_on_target_s`` and ``scan_period_s`` are ``None`` where
    the plan gives none.
    """

    document: dict
    kind: str
    purpose: str
    n: int
    m: int
    pri_s: np.ndarray
    pri_counts: tuple[int, ...]
    clock_hz: float
    carrier_hz: np.ndarray
    carrier_exact_hz: tuple[Fraction, ...]
    wavelength_m: np.ndarray
    pulse_s: np.ndarray
    bandwidth_hz: np.ndarray
    notch_m_s: np.ndarray
    pulses: np.ndarray
    fill_pulses: np.ndarray
    recovery_s: float
    guard_s: float
    received_min: float
    near: NearPulse | None
    near_bandwidth_hz: float | None
    eclipsing_loss: str
    duty_limit: float | None
    beamwidth_deg: float
    scan_rpm: float | None
    dwell_s: float | None
    time_on_target_s: float | None
    scan_period_s: float | None
    range_m: tuple[float, float]
    speed_m_s: tuple[float, float]
    must_see: tuple[MustSee, ...]
    wanted: Wanted
    window: str
    sidelobe_db: float
    delays: int
    weights: tuple[float, ...] | None
    response_min_db: float
    decode_blur_gates: Fraction | None
    decode_motion: bool
    surface: Clutter | None
    patches: tuple[Clutter, ...]
    platform: Platform | None
    target: Target
    crossing: Crossing | None
    holds_over: dict | None
    weather: dict | None
    remarks: dict
    title: str
    marking: str | None
