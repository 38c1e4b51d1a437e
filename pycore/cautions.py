"""Cautions: what a reader of this plan should be told, though nothing is judged by it; and those that always hold.

Each caution is one sentence with its number. All are cheap enough for every edit.
"""

import math
from collections import Counter
from functools import lru_cache

import numpy as np

from pycore import eclipsing, filters, motion
from pycore.eclipsing import near_echo_is_back
from pycore.windows import window
from pycore.wording import (
    as_typed,
    count_word,
    in_range_unit,
    in_speed_unit,
    listed,
    percent,
    plural,
    significant,
    trimmed,
)

ALWAYS = (
    'These are planning figures from idealised models: they replace neither measurement nor flight check, nor the '
    'approval that a service on which lives depend must have.',
    'Nothing may be transmitted without a licence and an assigned frequency from the authority of the place.',
    'Radiated power can injure, and average power rises with the duty: keep the distances that the site’s radiation '
    'protection and a qualified person set.',
)
"""Cautions that stand under every plan."""

_TIME_BANDWIDTH = 2.0
"""Above this time-bandwidth product a pulse is taken as coded. [unitless]"""
_TURNS = 0.25
"""From so many turns of phase within the pulse on a matched filter begins to miss it (common practice). [unitless]"""
_INDEPENDENT = 10.0
"""Fewer independent echoes than this make the first-order error of pulse pairs too small (our own choice)."""


def cautions(computed, units):
    """Return the cautions of a plan: those that it calls for, then those that always hold.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units, with keys ``range`` and ``speed``. [unitless]

    Returns
    -------
    cautions : list of str
        Sentences.
    """
    return [*called_for(computed, units), *ALWAYS]


def called_for(computed, units):
    """Return the cautions that a plan calls for.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    cautions : list of str
        Sentences, in a fixed order; none for a plan that calls for none.
    """
    said = (caution(computed, units) for caution in _CAUTIONS)
    return [sentence for sentence in said if sentence]


def _narrow_notch(computed, units):
    """A notch that is narrower than the window's own rejection."""
    plan = computed.plan
    if computed.is_stagger or plan.purpose == 'weather':
        return ''
    edges = np.array([_lobe_edge(plan.window, n, plan.sidelobe_db) for n in plan.pulses.tolist()])
    width = edges * computed.blind_speed_m_s / plan.pulses
    narrow = np.flatnonzero(plan.notch_m_s < width * (1.0 - 1e-9))
    if not narrow.size:
        return ''
    worst = narrow[np.argmax(width[narrow])]
    notch, unit = in_speed_unit(float(plan.notch_m_s[worst]), units)
    return (
        f'{_on(computed, narrow)} the notch is narrower than the Doppler filters reject: at '
        f'{as_typed(float(f"{notch:.4g}"), unit)} the window is not yet down to its sidelobe level, which it is '
        f'{_speed(width[worst], units)} from a filter’s middle.'
    )


@lru_cache(maxsize=64)
def _lobe_edge(name, pulses, sidelobe_db):
    """Remember a window's edge: it takes longer than all else here and does not change from edit to edit."""
    return filters.lobe_edge(window(name, pulses, sidelobe_db))


def _on(computed, places):
    """Say on which PRFs: all of them, or by their numbers."""
    n = computed.plan.n
    if len(places) == n:
        return {1: 'On its PRF', 2: 'On both PRFs'}.get(n, f'On all {count_word(n)} PRFs')
    return f'On {plural(len(places), "PRF")} {listed(str(int(place) + 1) for place in places)}'


def _speed(speed_m_s, units):
    value, unit = in_speed_unit(float(speed_m_s), units)
    return as_typed(float(f'{value:.3g}'), unit)


def _range(range_m, units):
    value, unit = in_range_unit(float(range_m), units)
    return as_typed(float(f'{value:.4g}'), unit)


def _equal_pris(computed, units):
    """PRIs of one set that do not differ."""
    plan = computed.plan
    counts = Counter(plan.pri_counts)
    twice = [count for count, often in counts.items() if often > 1]
    if not twice:
        return ''
    if computed.is_stagger:
        return 'All PRIs of the stagger are equal: it is a constant PRF.' if len(counts) == 1 else ''
    pris = listed(f'{trimmed(count / plan.clock_hz * 1e6)} µs' for count in twice)
    looks = Counter(zip(plan.pri_counts, plan.carrier_hz.tolist(), strict=True))
    alike = 'alike' if any(often > 1 for often in looks.values()) else 'alike in range, if not in speed'
    return f'Two or more PRIs are equal ({pris}): PRFs that do not differ are blind {alike}.'


def _never_open(computed, units):
    """Intervals in which the receiver never opens."""
    plan = computed.plan
    shut = np.flatnonzero(plan.pulse_s + plan.recovery_s + plan.guard_s >= plan.pri_s)
    if not shut.size:
        return ''
    return (
        f'{_on(computed, shut)} the receiver never opens: pulse, recovery of {trimmed(plan.recovery_s * 1e6)} µs and '
        'guard fill the interval.'
    )


def _near_pulse_late(computed, units):
    """A near pulse whose farthest echo is not back in time."""
    plan = computed.plan
    if plan.near is None:
        return ''
    late = np.flatnonzero(~near_echo_is_back(plan.near, plan.pri_s, plan.guard_s))
    if not late.size:
        return ''
    return (
        f'{_on(computed, late)} the near pulse’s echo from {_range(plan.near.to_range_m, units)} is not back before '
        'the next pulse and its guard.'
    )


def _clutter_beyond(computed, units):
    """Clutter that a stagger cannot cancel, because it comes from an earlier interval."""
    patches, shortest = computed.echoes.patches, float(computed.unambiguous_range_m.min())
    if not computed.is_stagger or not patches:
        return ''
    farthest = max(patch.range_m[1] for patch in patches)
    if farthest <= shortest:
        return ''
    return (
        f'Clutter out to {_range(farthest, units)} reaches beyond the smallest unambiguous range, '
        f'{_range(shortest, units)}: what comes from there changes from pulse to pulse, and the stagger does not '
        'cancel it.'
    )


def _sidelobe_clutter(computed, units):
    """A moving radar: clutter through the antenna's sidelobes."""
    if computed.plan.platform is None:
        return ''
    return (
        'Sidelobe clutter is not in the model: from a moving radar it can fill speeds and ranges that are shown clear.'
    )


def _platform_speeds(computed, units):
    """A moving radar: what its speeds are measured from."""
    if computed.plan.platform is None:
        return ''
    return 'Speeds are measured from the middle of the mainlobe clutter, which the radar is taken to hold at zero.'


def _cut_code(computed, units):
    """Coded pulses of which only a part is received."""
    plan = computed.plan
    product = plan.pulse_s * plan.bandwidth_hz
    coded = np.flatnonzero(product > _TIME_BANDWIDTH)
    if not coded.size or not _cut(computed)[coded].any():
        return ''
    return (
        f'Pulses of time-bandwidth product {significant(float(product.max()))} are partly eclipsed: the range shift '
        'and the sidelobes of a cut code are not in the model.'
    )


def _cut(computed):
    """Say on which PRFs some wanted range is received in part."""
    plan = computed.plan
    lengths = []
    for least in (0.0, 1.0):
        spans = eclipsing.clear_ranges(
            plan.pri_s, plan.pulse_s, plan.recovery_s, plan.guard_s, least, plan.range_m, plan.near
        )
        lengths.append(np.bincount(spans.prf, spans.stop - spans.start, plan.n))
    return lengths[0] - lengths[1] > 1e-9 * (plan.range_m[1] - plan.range_m[0])


def _doppler_in_the_pulse(computed, units):
    """Targets so fast that their Doppler shows within one pulse."""
    plan = computed.plan
    fastest = max(abs(end) for end in plan.speed_m_s)
    turns = motion.turns_in_a_pulse(fastest, plan.wavelength_m, plan.pulse_s)
    if turns.max() <= _TURNS:
        return ''
    place = int(np.argmax(turns))
    shift = motion.chirp_range_shift(fastest, plan.wavelength_m, plan.pulse_s, plan.bandwidth_hz)[place]
    return (
        f'At {_speed(fastest, units)} the phase turns by {significant(float(turns.max()))} of a cycle within the '
        f'pulse: a filter matched at rest loses, and a chirp’s echo moves by {significant(float(shift))} m.'
    )


def _pulse_pairs(computed, units):
    """Pulse-pair errors from too few independent echoes."""
    plan = computed.plan
    if plan.purpose != 'weather':
        return ''
    width = plan.document['weather']['width_mps']
    independent = 4.0 * math.sqrt(math.pi) * width * plan.pri_s / plan.wavelength_m * plan.pulses
    few = np.flatnonzero(independent < _INDEPENDENT)
    if not few.size:
        return ''
    return (
        f'{_on(computed, few)} a dwell holds about {significant(float(independent.min()), 2)} independent echoes: '
        'below ten the error of the mean speed is larger than is said here.'
    )


def _fill_for_clutter(computed, units):
    """Fill pulses that clutter asks for and the plan does not send."""
    if not computed.echoes.patches:
        return ''
    farthest = max(patch.range_m[1] for patch in computed.echoes.patches)
    return _fill(computed, computed.echoes.fill_needed, f'clutter out to {_range(farthest, units)}')


def _fill_for_target(computed, units):
    """Fill pulses that the farthest target asks for and the plan does not send."""
    farthest = computed.plan.range_m[1]
    return _fill(computed, computed.echoes.fill_for_target, f'a target at {_range(farthest, units)}')


def _fill(computed, needed, what):
    """Say how many fill pulses are needed where there are too few; a stagger has no CPI before its own."""
    plan = computed.plan
    few = np.flatnonzero(needed > plan.fill_pulses)
    if computed.is_stagger or not few.size:
        return ''
    counts = sorted(set(needed[few].tolist()))
    how_many = count_word(counts[0]) if len(counts) == 1 else f'up to {count_word(counts[-1])}'
    many = plural(counts[-1], 'is', 'are')
    return (
        f'{_on(computed, few)} there are too few fill pulses for {what} to be in every pulse that counts: '
        f'{how_many} {many} needed.'
    )


def _rotor(computed, units):
    """Rotor or propeller lines that fold onto the body."""
    spread, found = computed.plan.target.own_spread_m_s, computed.rotor_folds
    folds = np.flatnonzero(found) if found is not None else np.zeros(0)
    if not folds.size:
        return ''
    return (
        f'{_on(computed, folds)} lines of a rotor or propeller, {_speed(spread, units)} to either side, fold onto the '
        'body that carries it.'
    )


def _below_the_first_opening(computed, units):
    """Wanted ranges nearer than the first opening."""
    low, high = computed.plan.range_m
    lost = (min(float(computed.first_opening_m.min()), high) - low) / (high - low)
    if computed.plan.near is not None or lost <= 0:
        return ''
    return f'{percent(lost)} of the wanted ranges lie nearer than the first opening, and no PRF sees them.'


_CAUTIONS = (
    _never_open,
    _below_the_first_opening,
    _narrow_notch,
    _equal_pris,
    _near_pulse_late,
    _fill_for_clutter,
    _fill_for_target,
    _clutter_beyond,
    _cut_code,
    _doppler_in_the_pulse,
    _rotor,
    _pulse_pairs,
    _platform_speeds,
    _sidelobe_clutter,
)
