"""One target, followed through: what each PRF makes of it, and what the set makes of that.

Brings one range and one radial speed through folding, eclipsing, notch, clutter,
filters and detection, in the words of the page's table.
"""

from dataclasses import dataclass

import numpy as np

from pycore import ambiguity, detection, eclipsing, zones
from pycore.clutter import folded_clutter_to_noise, late_share
from pycore.cpi import Cpi
from pycore.detection_map import canceller_residue
from pycore.ghosts import ghosts
from pycore.one_target import every_pri
from pycore.scnr import filter_outputs
from pycore.swerling import cpi_probability, set_probability
from pycore.target import one_pulse_signal, received_power

STRIP_PRIS = 400
"""Most PRIs of the strip for one target. [unitless]"""
_HEARD = 1e-12
"""A patch counts as being at the target's gate above this power ratio. [unitless]"""


@dataclass(frozen=True, slots=True)
class Followed:
    """What one PRF makes of one target.

    Parameters
    ----------
    apparent_range_m, apparent_speed_m_s : float
        Where it appears. [m, m/s]
    later_pulses : int
        Pulses that have left before its echo returns. [unitless]
    received : float
        Received share of its echo. [unitless]
    in_notch : bool
        Whether its speed lies in the notch. [unitless]
    clutter_db : dict of float
        One-pulse clutter-to-noise at its gate, by the patch's name; patches that are not there are left out. [dB]
    snr_db, scnr_db : float
        Signal-to-noise, and to noise and clutter, in the best usable filter; -inf where there is none. [dB]
    probability : float
        Probability of detection in this CPI. [unitless]
    reasons : tuple of str
        ``eclipsed``, ``notch``, ``clutter``; empty where it is clear. [unitless]
    """

    apparent_range_m: float
    apparent_speed_m_s: float
    later_pulses: int
    received: float
    in_notch: bool
    clutter_db: dict
    snr_db: float
    scnr_db: float
    probability: float
    reasons: tuple


@dataclass(frozen=True, slots=True)
class FollowedSet:
    """What the whole set makes of one target.

    Parameters
    ----------
    prfs : tuple of Followed
        PRF by PRF. [unitless]
    clear : int
        On how many looks it is clear. [unitless]
    seen : bool
        Whether that is enough. [unitless]
    probability : float
        Probability of detection after M of N. [unitless]
    ghosts : tuple of Ghost or None
        Other places in the coverage that the PRFs which see it would take it for; ``None`` where it is not
        seen or the waveform is a stagger. [m, m/s]
    """

    prfs: tuple
    clear: int
    seen: bool
    probability: float
    ghosts: tuple | None


def strip(computed, range_m, speed_m_s):
    """Return what every PRI around the plan's own would make of one target.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    range_m : float
        True range. [m]
    speed_m_s : float
        True radial speed, positive closing. [m/s]

    Returns
    -------
    each : EveryPri
        For whole clock counts from half the shortest PRI to twice the longest, at most ``STRIP_PRIS`` of them, with
        the pulse, carrier and notch of the first PRF; none that is not longer than the pulse.
    """
    plan = computed.plan
    low, high = min(plan.pri_counts) // 2 + 1, 2 * max(plan.pri_counts)
    counts = np.unique(np.linspace(low, high, STRIP_PRIS).round())
    pri_s = counts / plan.clock_hz
    return each_of(computed, pri_s[pri_s > float(plan.pulse_s[0])], range_m, speed_m_s)


def each_of(computed, pri_s, range_m, speed_m_s):
    """Return what some PRIs would make of one target, each alone.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    pri_s : float array, shape C
        PRIs, each longer than the first PRF's pulse. [s]
    range_m : float
        True range. [m]
    speed_m_s : float
        True radial speed, positive closing. [m/s]

    Returns
    -------
    each : EveryPri
        With the pulse, carrier and notch of the first PRF.
    """
    plan, first = computed.plan, computed.echoes.parts[-1].cpis[0]
    return every_pri(pri_s, range_m, speed_m_s, first, plan.recovery_s, plan.guard_s, plan.received_min, plan.near)


def follow(computed, range_m, speed_m_s):
    """Return what a plan makes of one target.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    range_m : float
        True range. [m]
    speed_m_s : float
        True radial speed, positive closing. [m/s]

    Returns
    -------
    followed : FollowedSet
        PRF by PRF, and over all.
    """
    level = detection.set_threshold(computed.plan.target.false_alarm, computed.looks, computed.m)
    prfs = tuple(
        _followed(computed, index, range_m, speed_m_s, level, one.reasons)
        for index, one in enumerate(why(computed, range_m, speed_m_s))
    )
    if computed.is_stagger:
        return _followed_stagger(computed, prfs, range_m, speed_m_s)
    clear = sum(not prf.reasons for prf in prfs)
    ratio = np.array([10.0 ** (prf.scnr_db / 10.0) for prf in prfs])
    probability = float(set_probability(ratio, computed.m, level, computed.plan.target.fluctuation))
    seen = clear >= computed.m
    sees = [not prf.reasons for prf in prfs]
    others = ghosts_of(computed, range_m, speed_m_s, sees) if seen else None
    return FollowedSet(prfs, clear, seen, probability, others)


def _part(computed, range_m):
    """Return the part of the range axis that serves a range; beyond the coverage the nearest one."""
    parts = computed.echoes.parts
    return next((part for part in parts if range_m <= part.range_m[1]), parts[-1])


@dataclass(frozen=True, slots=True)
class Gate:
    """What one PRF has in the gate of one target.

    Parameters
    ----------
    cpi : Cpi
        Pulses, window and notch of the CPI. [unitless]
    received, power : float
        Received share of an echo, and the power that eclipsing leaves of it. [unitless]
    signal : float
        The target's one-pulse signal-to-noise ratio, not eclipsed, less what a late echo loses. [unitless]
    clutter : float array, shape P
        One-pulse clutter-to-noise ratio of each patch, folded. [unitless]
    """

    cpi: Cpi
    received: float
    power: float
    signal: float
    clutter: np.ndarray


def gate(computed, index, range_m):
    """Return what one PRF has in the gate of a target.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    index : int
        The PRF. [unitless]
    range_m : float
        True range of the target. [m]

    Returns
    -------
    gate : Gate
        Target, eclipsing and clutter.
    """
    plan, part, patches = computed.plan, _part(computed, range_m), computed.echoes.patches
    cpi, opening = part.cpis[index], float(part.first_opening_m[index])
    reach = float(computed.unambiguous_range_m[index])
    pri, pulse = float(plan.pri_s[index]), float(plan.pulse_s[index])
    share = float(eclipsing.received_share(range_m, pri, pulse, plan.recovery_s, plan.guard_s, plan.near))
    ratio = [
        float(folded_clutter_to_noise(patch, range_m, reach, opening, scale))
        for patch, scale in zip(patches, part.factor[index], strict=True)
    ]
    signal = float(one_pulse_signal(part.strength_m4[index], range_m, opening)) * float(late_share(cpi, range_m)) ** 2
    return Gate(cpi, share, float(received_power(share, plan.eclipsing_loss)), signal, np.array(ratio))


def _followed(computed, index, range_m, speed_m_s, level, reasons):
    plan, patches = computed.plan, computed.echoes.patches
    reach, blind = float(computed.unambiguous_range_m[index]), float(computed.blind_speed_m_s[index])
    here = gate(computed, index, range_m)
    share, ratio = here.received, here.clutter
    outputs = filter_outputs(here.cpi, speed_m_s, here.signal, patches, ratio, here.power)
    best = outputs.best if 'notch' not in reasons else -1
    snr, scnr = (float(outputs.target[best]), float(outputs.scnr[best])) if best >= 0 else (0.0, 0.0)
    names = [patch.name or f'patch {place + 1}' for place, patch in enumerate(patches)]
    return Followed(
        float(ambiguity.fold_range(range_m, reach)),
        float(ambiguity.fold_speed(speed_m_s, blind)),
        int(ambiguity.pulses_since(range_m, reach)),
        share,
        'notch' in reasons,
        {name: float(10.0 * np.log10(one)) for name, one in zip(names, ratio.tolist(), strict=True) if one > _HEARD},
        _decibels(snr),
        _decibels(scnr),
        float(cpi_probability(scnr, level, plan.target.fluctuation)) if scnr > 0 else 0.0,
        reasons,
    )


def _decibels(ratio):
    return 10.0 * float(np.log10(ratio)) if ratio > 0 else -np.inf


def why(computed, range_m, speed_m_s):
    """Return for each PRF why it sees a target or not: eclipsed, in the notch, or under clutter.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    range_m : float
        True range. [m]
    speed_m_s : float
        True radial speed, positive closing. [m/s]

    Returns
    -------
    why : tuple of Why
        One for each PRI; inside the coverage or beyond it.
    """
    plan = computed.plan
    region = (min(range_m, plan.range_m[0]), max(range_m, plan.range_m[1]))
    speeds = (min(speed_m_s, plan.speed_m_s[0]), max(speed_m_s, plan.speed_m_s[1]))
    ranges, clear = computed.prf_spans(region, speeds)
    piece = computed.echoes.piece_at(range_m) if computed.echoes.patches and not computed.is_stagger else None
    covered = None if piece is None else piece.speeds
    return zones.why(ranges, clear, plan.n, region, speeds, range_m, speed_m_s, covered)


def blur_half_widths(computed):
    """Return how far from a candidate the true value may lie on each PRF.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]

    Returns
    -------
    range_m, speed_m_s : float arrays, shape N
        The decoder's blur times a gate, and times a filter. [m, m/s]
    """
    plan, blur = computed.plan, float(computed.decode_blur)
    gate_m = eclipsing.METRES_PER_SECOND_OF_DELAY / plan.bandwidth_hz
    return blur * gate_m, blur * plan.wavelength_m / (2.0 * plan.pulses * plan.pri_s)


def ghosts_of(computed, range_m, speed_m_s, seen):
    """Return what else the PRFs that see a target would take it for.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    range_m, speed_m_s : float
        The target. [m, m/s]
    seen : sequence of bool, length N
        PRFs that see it. [unitless]

    Returns
    -------
    ghosts : tuple of Ghost
        In the coverage. [m, m/s]
    """
    plan = computed.plan
    periods = computed.unambiguous_range_m, computed.blind_speed_m_s
    axes = plan.range_m, plan.speed_m_s
    return ghosts((range_m, speed_m_s), axes, periods, blur_half_widths(computed), computed.m, seen)


def _followed_stagger(computed, prfs, range_m, speed_m_s):
    """Return one verdict for the whole cycle: the averaged response, and clear on every interval."""
    plan, echoes, found = computed.plan, computed.echoes, computed.response
    share = min(prf.received for prf in prfs)
    inside = range_m < computed.unambiguous_range_m.min()
    gain = float(found.response.power(speed_m_s))
    seen = inside and share > 0 and share >= plan.received_min and 10.0 * np.log10(gain + 1e-30) >= plan.response_min_db
    part = _part(computed, range_m)
    noise = 1.0 + sum(
        canceller_residue(plan.pri_s, echoes.weights, float(plan.wavelength_m[0]), patch)
        * float(folded_clutter_to_noise(patch, range_m, 1e12, float(part.first_opening_m[0]), scale))
        for patch, scale in zip(echoes.patches, part.factor[0], strict=True)
    )
    power = float(received_power(share, plan.eclipsing_loss)) * inside
    signal = float(one_pulse_signal(part.strength_m4[0], range_m, float(part.first_opening_m[0])))
    ratio = power * signal * gain * max(echoes.outputs, 0) / noise
    level = detection.set_threshold(plan.target.false_alarm, 1, 1, max(echoes.outputs, 1))
    case = plan.target.fluctuation
    probability = float(cpi_probability(ratio, level, case, echoes.outputs)) if ratio > 0 else 0.0
    return FollowedSet(prfs, int(seen), bool(seen), probability, None)
