"""From a plan and what is asked to the limits of a search, and back to a plan that can be used.

Limits that are not named come from the plan: its coverage, must-see regions,
wanted values, dwell and duty.
"""

import copy
from fractions import Fraction

from pycore.errors import InputError
from pycore.finder.limits import Cycle, Limits, Place, Region
from pycore.plan.document import shown
from pycore.plan.keys import BY_PATH, MOST_PRIS
from pycore.plan.reading import read
from pycore.quantity import as_number
from pycore.response import binomial_weights

ASKED = {
    'n': None,
    'm': None,
    'pri_us': None,
    'keep_us': (),
    'avoid_us': (),
    'step_us': None,
    'whole_gates': False,
    'apart_us': None,
    'decode': 'blur',
    'hole_km': None,
    'hole_mps': None,
    'cpi_ms': None,
    'time_ms': None,
    'spread': 2.0,
    'mean_us': None,
}
"""What may be asked besides the plan, and what holds where it is not."""

_AROUND = (Fraction(1, 2), Fraction(2))
"""Without an interval of PRIs the search looks from half the shortest to twice the longest of the plan. [unitless]"""


def limits_of(document, asked=None):
    """Return the limits of a search for plans better than one plan.

    Parameters
    ----------
    document : dict
        The plan; limits that are not asked for come from it. [plan's units]
    asked : mapping or None
        Any of ``ASKED``: numbers in the unit of the name, intervals as pairs. [unitless]

    Returns
    -------
    limits : Limits
        Checked when a search is made of it.

    Raises
    ------
    InputError
        Where something is asked that is no limit, or no number.
    """
    plan, asked = read(document), _understood(asked or {})
    clock = Fraction(str(plan.clock_hz))
    n = plan.n if asked['n'] is None else _whole('n', asked['n'], 1, MOST_PRIS)
    m = min(plan.m, n) if asked['m'] is None else _whole('m', asked['m'], 1, MOST_PRIS)
    stagger = plan.kind == 'stagger'
    wanted = plan.wanted
    low, high = plan.speed_m_s
    return Limits(
        places=tuple(_place(plan, index, asked) for index in range(n)),
        m=1 if stagger else m,
        clock_hz=clock,
        pri_counts=_interval(plan, asked['pri_us'], clock),
        range_m=plan.range_m,
        speed_m_s=plan.speed_m_s,
        step_counts=1 if asked['step_us'] is None else _counts('step_us', asked['step_us'], clock, least=1),
        whole_gates=bool(asked['whole_gates']),
        keep=tuple((index, _counts('keep_us', pri, clock)) for index, pri in enumerate(asked['keep_us'])),
        avoid=tuple(_ends('avoid_us', pair, clock) for pair in asked['avoid_us']),
        apart_counts=1 if asked['apart_us'] is None else _counts('apart_us', asked['apart_us'], clock),
        recovery_s=plan.recovery_s,
        guard_s=plan.guard_s,
        received_min=plan.received_min,
        near=plan.near,
        duty_limit=plan.duty_limit,
        time_s=plan.time_on_target_s if asked['time_ms'] is None else _number('time_ms', asked['time_ms']) / 1e3,
        decode=asked['decode'],
        decode_m=plan.range_m[1] if wanted.decode_range else None,
        decode_m_s=high - low if wanted.decode_speed else None,
        blur_gates=plan.decode_blur_gates,
        decode_motion=plan.decode_motion,
        visible=wanted.visible,
        must_see=tuple(
            Region(one.name, one.range_m, one.speed_m_s, one.visible)
            for one in plan.must_see
            if one.visible is not None
        ),
        hole_m=_metres(asked['hole_km'], wanted.hole_m),
        hole_m_s=wanted.hole_m_s if asked['hole_mps'] is None else _number('hole_mps', asked['hole_mps']),
        unseen_s=wanted.unseen_s,
        stagger=_cycle(plan, asked, clock) if stagger else None,
    )


def _understood(asked):
    """Fill in what is not asked, and refuse what is no limit."""
    for name in asked:
        if name not in ASKED:
            raise InputError(str(name)[:80], f'There is no limit {shown(name)}; there are {", ".join(ASKED)}.')
    return {**ASKED, **{name: value for name, value in asked.items() if value is not None}}


def _place(plan, index, asked):
    """Return what belongs to one place; places beyond the plan's own are like its last."""
    own = min(index, plan.n - 1)
    cpi = asked['cpi_ms']
    return Place(
        wavelength_m=float(plan.wavelength_m[own]),
        pulse_s=float(plan.pulse_s[own]),
        notch_m_s=float(plan.notch_m_s[own]),
        carrier_hz=float(plan.carrier_hz[own]),
        bandwidth_hz=float(plan.bandwidth_hz[own]),
        pulses=int(plan.pulses[own]),
        fill_pulses=int(plan.fill_pulses[own]),
        cpi_s=None if cpi is None else _number('cpi_ms', cpi) / 1e3,
    )


def _cycle(plan, asked, clock):
    weights = binomial_weights(plan.delays) if plan.weights is None else plan.weights
    mean = sum(plan.pri_counts) / plan.n
    return Cycle(
        weights=tuple(float(weight) for weight in weights),
        user_weights=plan.weights is not None,
        response_min_db=plan.response_min_db,
        spread=_number('spread', asked['spread']),
        mean_counts=(0.95 * mean, 1.05 * mean)
        if asked['mean_us'] is None
        else _ends('mean_us', asked['mean_us'], clock),
    )


def _interval(plan, pair, clock):
    """Return the shortest and the longest PRI in counts."""
    if pair is not None:
        return _ends('pri_us', pair, clock)
    key = BY_PATH['waveform.pri_us']
    low, high = (Fraction(min(plan.pri_counts)) * _AROUND[0], Fraction(max(plan.pri_counts)) * _AROUND[1])
    return max(1, -(-low // 1)), min(int(high), int(Fraction(str(key.highest)) * clock / 10**6))


def _number(name, value):
    if isinstance(value, bool) or not isinstance(value, int | float | Fraction) or not 0 <= value < 1e12:
        raise InputError(name, f'{name} must be a number of at least 0; got {shown(value)}.')
    return float(value)


def _metres(value_km, otherwise_m):
    return otherwise_m if value_km is None else _number('hole_km', value_km) * 1e3


def _whole(name, value, low, high):
    if isinstance(value, bool) or not isinstance(value, int) or not low <= value <= high:
        raise InputError(name, f'{name} must be a whole number from {low} to {high}; got {shown(value)}.')
    return value


def _counts(name, value_us, clock, least=0):
    """Return a time in whole counts of the clock."""
    _number(name, value_us)
    exact = Fraction(str(value_us)) if not isinstance(value_us, Fraction) else value_us
    return max(least, round(exact * clock / 10**6))


def _ends(name, pair, clock):
    if not isinstance(pair, list | tuple) or len(pair) != 2:
        raise InputError(name, f'{name} must be an interval of two times; got {shown(pair)}.')
    low, high = (_counts(name, end, clock) for end in pair)
    if low > high:
        raise InputError(name, f'{name} must run upwards; got from {shown(pair[0])} to {shown(pair[1])} µs.')
    return low, high


def with_found(document, better, m, clock_hz):
    """Return a plan that takes a found set.

    Parameters
    ----------
    document : dict
        The plan that the search started from. [plan's units]
    better : Better
        A found set. [unitless]
    m : int
        How many PRFs must be clear. [unitless]
    clock_hz : Fraction
        Timing clock. [Hz]

    Returns
    -------
    document : dict
        The plan with the found PRIs, and the pulses that belong to them.
    """
    plan = copy.deepcopy(read(document).document)
    waveform, count = plan['waveform'], len(better.pri_counts)
    waveform['pri_us'] = [as_number(Fraction(pri) * 10**6 / clock_hz) for pri in better.pri_counts]
    waveform['detect_m'] = m
    pulses = list(better.pulses)
    waveform['pulses'] = pulses[0] if len(set(pulses)) == 1 else pulses
    for record, name in (
        ('waveform', 'fill_pulses'),
        ('radar', 'carrier_ghz'),
        ('radar', 'pulse_us'),
        ('radar', 'bandwidth_mhz'),
        ('doppler', 'notch_mps'),
    ):
        value = plan[record][name]
        if isinstance(value, list):
            plan[record][name] = (value + [value[-1]] * count)[:count]
    return plan


def as_found(better, clock_hz):
    """Return one found set as a plain dictionary.

    Parameters
    ----------
    better : Better
        A found set. [unitless]
    clock_hz : Fraction
        Timing clock. [Hz]

    Returns
    -------
    found : dict
        In the plan's units, ready for JSON.
    """
    hole = better.largest_hole
    return {
        'pri_us': [as_number(Fraction(pri) * 10**6 / clock_hz) for pri in better.pri_counts],
        'pulses': list(better.pulses),
        'visible_share': better.visible_share,
        'floor_share': better.floor_share,
        'excess_over_floor': better.excess_over_floor,
        'decode_range_km': None if better.decode_m is None else better.decode_m / 1e3,
        'decode_speed_mps': better.decode_m_s,
        'exact_range_km': None if better.exact_m is None else better.exact_m / 1e3,
        'used_ms': better.time_s * 1e3,
        'largest_hole': None
        if hole is None
        else {'range_km': [end / 1e3 for end in hole.range_m], 'speed_mps': list(hole.speed_m_s), 'share': hole.share},
        'share_if_one_lost': better.share_if_one_lost,
        'must_see': list(better.must_see),
        'dip_db': better.dip_db,
        'tightest': None if better.tightest is None else list(better.tightest),
        'on_front': better.on_front,
    }
