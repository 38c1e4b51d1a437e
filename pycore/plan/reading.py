"""The plan in SI units, as the physics reads it.

``read`` is the one place where the plan's units become SI. Decimals are kept
exact where exactness counts: PRIs as whole counts of the timing clock, carriers
as fractions.
"""

from fractions import Fraction

import numpy as np

from pycore.clutter import Clutter
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.dwell import time_on_target
from pycore.eclipsing import NearPulse
from pycore.plan.document import filled
from pycore.plan.records import Crossing, MustSee, Plan, Platform, RadarEquation, Target, Wanted
from pycore.plan.rules import PER_PRF, check_rules, counts_of, per_prf

__all__ = ['Plan', 'filled', 'read']


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
    each = {path: per_prf(full, path) for path in PER_PRF}
    counts = counts_of(waveform['pri_us'], radar['clock_mhz'])
    check_rules(full, each['radar.pulse_us'])
    carriers = tuple(Fraction(str(one)) * 10**9 for one in each['radar.carrier_ghz'])
    carrier_hz = np.array([float(one) for one in carriers])
    near = radar['near_pulse']
    return Plan(
        document=full,
        kind=waveform['kind'],
        purpose=full['purpose'],
        n=len(counts),
        m=waveform['detect_m'],
        pri_s=np.array(counts, dtype=float) / (radar['clock_mhz'] * 1e6),
        pri_counts=counts,
        clock_hz=float(Fraction(str(radar['clock_mhz'])) * 10**6),
        carrier_hz=carrier_hz,
        carrier_exact_hz=carriers,
        wavelength_m=SPEED_OF_LIGHT_M_S / carrier_hz,
        pulse_s=_scaled(each['radar.pulse_us'], -6),
        bandwidth_hz=_scaled(each['radar.bandwidth_mhz'], 6),
        notch_m_s=np.array(each['doppler.notch_mps'], dtype=float),
        pulses=np.array(each['waveform.pulses'], dtype=np.intp),
        fill_pulses=np.array(each['waveform.fill_pulses'], dtype=np.intp),
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


def _si(value, power):
    """Multiply a number as typed by a power of ten and round once, so that 2.8 GHz is 2 800 000 000 Hz exactly."""
    return None if value is None else float(Fraction(str(value)) * Fraction(10) ** power)


def _scaled(values, power):
    return np.array([_si(value, power) for value in values])


def _ends(pair, power):
    return tuple(_si(end, power) for end in pair)


def _exact(value):
    return None if value is None else Fraction(str(value))


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
