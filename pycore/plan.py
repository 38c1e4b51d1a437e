"""The plan in SI units, as the physics reads it; and the rules between keys.

``read`` is the one place where the plan's units become SI. Decimals are kept
exact where exactness counts: PRIs as whole counts of the timing clock, carriers
as fractions.
"""

from dataclasses import dataclass
from fractions import Fraction

import numpy as np

from pycore.clock import MOST_COUNTS_OFF
from pycore.clutter import Clutter
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.dwell import time_on_target
from pycore.eclipsing import NearPulse
from pycore.errors import InputError
from pycore.plan_document import filled, shown

__all__ = ['Clutter', 'Crossing', 'MustSee', 'Plan', 'Platform', 'Target', 'Wanted', 'filled', 'read']


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


def read(document):
    """Return a plan in SI units.

    Parameters
    ----------
    document : dict
        A plan; only ``waveform.pri_us`` is required. [plan's units]

    Returns
    -------
    plan : Plan
        Checked key by key, and by the few rules between keys.

    Raises
    ------
    InputError
        Where a value is out of its limits, or pulse ≥ PRI, an interval is backwards, M > N, a list is not
        as long as the PRIs, or a PRI is off the clock.
    """
    full = filled(document)
    waveform, radar, doppler = full['waveform'], full['radar'], full['doppler']
    n = len(waveform['pri_us'])
    per_prf = {path: _per_prf(full, path, n) for path in _PER_PRF}
    counts = _on_the_clock(waveform['pri_us'], radar['clock_mhz'])
    _check_rules(full, per_prf, n)
    carriers = tuple(Fraction(str(one)) * 10**9 for one in per_prf['radar.carrier_ghz'])
    carrier_hz = np.array([float(one) for one in carriers])
    near = radar['near_pulse']
    return Plan(
        document=full,
        kind=waveform['kind'],
        purpose=full['purpose'],
        n=n,
        m=waveform['detect_m'],
        pri_s=np.array(counts, dtype=float) / (radar['clock_mhz'] * 1e6),
        pri_counts=counts,
        clock_hz=float(Fraction(str(radar['clock_mhz'])) * 10**6),
        carrier_hz=carrier_hz,
        carrier_exact_hz=carriers,
        wavelength_m=SPEED_OF_LIGHT_M_S / carrier_hz,
        pulse_s=_scaled(per_prf['radar.pulse_us'], -6),
        bandwidth_hz=_scaled(per_prf['radar.bandwidth_mhz'], 6),
        notch_m_s=np.array(per_prf['doppler.notch_mps'], dtype=float),
        pulses=np.array(per_prf['waveform.pulses'], dtype=np.intp),
        fill_pulses=np.array(per_prf['waveform.fill_pulses'], dtype=np.intp),
        recovery_s=_si(radar['recovery_us'], -6),
        guard_s=_si(radar['guard_us'], -6),
        received_min=float(waveform['received_min']),
        near=None if near is None else _near(near),
        near_bandwidth_hz=None if near is None else _si(near['bandwidth_mhz'], 6),
        eclipsing_loss=radar['eclipsing_loss'],
        duty_limit=_si(radar['duty_limit_pct'], -2),
        beamwidth_deg=float(radar['beamwidth_deg']),
        scan_rpm=radar['scan_rpm'],
        dwell_s=_si(radar['dwell_ms'], -3),
        time_on_target_s=_time_on_target(radar),
        scan_period_s=None if radar['scan_rpm'] is None else 60.0 / radar['scan_rpm'],
        range_m=_ends(full['coverage']['range_km'], 3),
        speed_m_s=_ends(full['coverage']['speed_mps'], 0),
        must_see=tuple(_must_see(region) for region in full['must_see']),
        wanted=_wanted(full['wanted']),
        window=doppler['window'],
        sidelobe_db=float(doppler['sidelobe_db']),
        delays=doppler['delays'],
        weights=None if doppler['weights'] is None else tuple(doppler['weights']),
        response_min_db=float(doppler['response_min_db']),
        decode_blur_gates=_exact(waveform['decode_blur_gates']),
        decode_motion=waveform['decode_motion'],
        surface=_surface(full['surface']),
        patches=tuple(_patch(patch) for patch in _patches(full['rain'])),
        platform=_platform(full['platform']),
        target=_target(full['target']),
        crossing=_crossing(full['crossing']),
        holds_over=full['holds_over'],
        weather=full['weather'],
        remarks=full['remarks'],
        title=full['title'],
        marking=full['marking'],
    )


_PER_PRF = (
    *('radar.carrier_ghz', 'radar.pulse_us', 'radar.bandwidth_mhz', 'doppler.notch_mps'),
    *('waveform.pulses', 'waveform.fill_pulses'),
)


def _si(value, power):
    """Multiply a number as typed by a power of ten and round once, so that 2.8 GHz is 2 800 000 000 Hz exactly."""
    return None if value is None else float(Fraction(str(value)) * Fraction(10) ** power)


def _scaled(values, power):
    return np.array([_si(value, power) for value in values])


def _ends(pair, power):
    return tuple(_si(end, power) for end in pair)


def _exact(value):
    return None if value is None else Fraction(str(value))


def _per_prf(full, path, n):
    """Return the values of a key as a list, one for each PRI."""
    record, name = path.split('.')
    value = full[record][name]
    if not isinstance(value, list):
        return [value] * n
    if len(value) != n:
        raise InputError(path, f'{path} must hold one value for each of the {n} PRIs; got {len(value)}.')
    if full['waveform']['kind'] == 'stagger' and len(set(value)) > 1:
        raise InputError(
            path, f'{path} must be one value for the whole CPI of a stagger; got {len(set(value))} values.'
        )
    return value


def _on_the_clock(pri_us, clock_mhz):
    """Return the PRIs in whole counts of the timing clock."""
    clock = Fraction(str(clock_mhz))
    counts = []
    for index, pri in enumerate(pri_us):
        exact = Fraction(str(pri)) * clock
        count = round(exact)
        if count < 1 or abs(exact - count) > MOST_COUNTS_OFF:
            below = max(1, int(exact))
            near = ' and '.join(f'{float(one / clock):.10g}' for one in (below, below + 1))
            raise InputError(
                f'waveform.pri_us.{index}',
                f'PRI must be a whole count of the {shown(clock_mhz)} MHz clock; got {shown(pri)} µs, the nearest are '
                f'{near} µs.',
            )
        counts.append(count)
    return tuple(counts)


def _check_rules(full, per_prf, n):
    """Check the rules between keys: pulse < PRI, M ≤ N, and a near pulse that is sent after the long one."""
    waveform, radar = full['waveform'], full['radar']
    for index, (pulse, pri) in enumerate(zip(per_prf['radar.pulse_us'], waveform['pri_us'], strict=True)):
        if not pulse < pri:
            field = f'radar.pulse_us.{index}' if isinstance(radar['pulse_us'], list) else 'radar.pulse_us'
            raise InputError(
                field, f'Pulse length must be shorter than every PRI, here {shown(pri)} µs; got {shown(pulse)} µs.'
            )
    if waveform['kind'] == 'dwells' and waveform['detect_m'] > n:
        raise InputError(
            'waveform.detect_m',
            f'PRFs that must see a target can be at most the {n} that there are; got {waveform["detect_m"]}.',
        )
    near = radar['near_pulse']
    earliest = max(per_prf['radar.pulse_us']) + radar['guard_us']
    if near is not None and near['sent_at_us'] < earliest:
        raise InputError(
            'radar.near_pulse.sent_at_us',
            f'Near pulse must be sent after the long pulse and the guard, {shown(earliest)} µs; '
            f'got {shown(near["sent_at_us"])} µs.',
        )


def _near(near):
    return NearPulse(_si(near['pulse_us'], -6), _si(near['sent_at_us'], -6), _si(near['to_km'], 3))


def _time_on_target(radar):
    if radar['dwell_ms'] is not None:
        return _si(radar['dwell_ms'], -3)
    return None if radar['scan_rpm'] is None else time_on_target(radar['beamwidth_deg'], radar['scan_rpm'])


def _must_see(region):
    return MustSee(
        region['name'], _ends(region['range_km'], 3), _ends(region['speed_mps'], 0), _si(region['visible_pct'], -2)
    )


def _wanted(wanted):
    return Wanted(
        _si(wanted['visible_pct'], -2),
        wanted['hole_mps'],
        _si(wanted['hole_km'], 3),
        wanted['unseen_s'],
        wanted['blind_speed_mps'],
        wanted['decode_range'],
        wanted['decode_speed'],
        _si(wanted['detect_km'], 3),
        wanted['range_walk_gates'],
    )


def _clutter(patch, name, range_km):
    return Clutter(
        name,
        float(patch['cnr_db']),
        _si(patch['at_km'], 3),
        _ends(range_km, 3),
        float(patch['speed_mps']),
        float(patch['spread_mps']),
        float(patch['range_power']),
        _si(patch['at_pulse_us'], -6),
    )


def _surface(surface):
    return None if surface is None else _clutter(surface, 'ground', (0, surface['to_km']))


def _patch(patch):
    return _clutter(patch, patch['name'], patch['range_km'])


def _patches(rain):
    return [] if rain is None else rain if isinstance(rain, list) else [rain]


def _platform(platform):
    if platform is None:
        return None
    return Platform(float(platform['speed_mps']), float(platform['look_deg']), _si(platform['height_km'], 3))


def _crossing(crossing):
    return None if crossing is None else Crossing(float(crossing['speed_mps']), _si(crossing['at_km'], 3))


def _target(target):
    given = target['radar_equation']
    equation = (
        None
        if given is None
        else RadarEquation(
            _si(given['peak_kw'], 3), *(float(given[k]) for k in ('gain_dbi', 'rcs_m2', 'noise_figure_db', 'losses_db'))
        )
    )
    return Target(
        target['snr_db'],
        _si(target['at_km'], 3),
        _si(target['at_pulse_us'], -6),
        equation,
        target['fluctuation'],
        float(target['pd_wanted']),
        float(target['false_alarm']),
        target['own_spread_mps'],
    )
