"""Workings of how far the target is detected."""

import math

import numpy as np

from pycore import detection as needs
from pycore import filters
from pycore.speed_samples import best_gain
from pycore.swerling import set_probability
from pycore.workings.line import DEFINITION, Line, Working, each, put_in, shown

_NOTES = (
    'By noise alone: nothing eclipsed, no clutter. Straddling is exact: at each speed the best filter outside the '
    'notch is taken.',
    'Range-gate straddling, CFAR loss and beam shape inside a CPI are left out.',
)
_STAGGER_NOTE = 'The outputs of the canceller are taken as independent, which is an approximation.'


def detection(computed, name):
    """Return the workings of the range at which the target is detected.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        Strength, losses, false alarms, need, and the median range with its check.
    """
    echoes = computed.echoes
    notes = (*_NOTES, _STAGGER_NOTE) if computed.is_stagger else _NOTES
    if echoes.outputs < 1:
        return Working((), None, ('There are not enough pulses for one output of the canceller.',))
    found = echoes.reach
    value = None if math.isnan(found.median) else found.median / 1e3
    lines = [_strength(computed), *_losses(computed), _false_alarm(computed), _need(computed)]
    ends = put_in(
        f'best {_km(found.best)}', f'worst {_km(found.worst)}', f'{len(found.speed_m_s)} speeds outside the floor'
    )
    lines.append(
        Line(
            'median over the wanted speeds, by length of speed',
            ends,
            'not reached' if value is None else shown(value, 'km'),
        )
    )
    if value is not None:
        lines.append(_check(computed, found))
    return Working(tuple(lines), value, notes)


def _km(range_m):
    return 'not reached' if math.isnan(range_m) else shown(range_m / 1e3, 'km')


def _strength(computed):
    """Say what the one-pulse signal-to-noise comes from."""
    target, plan = computed.plan.target, computed.plan
    strength = computed.echoes.parts[-1].strength_m4 * 10.0 ** (computed.echoes.beam_loss_db / 10.0)
    at_1_km = each('S/N at 1 km', 10.0 * np.log10(strength / 1e12), 'dB')
    if target.radar_equation is None:
        numbers = put_in(
            f'{shown(target.snr_db, "dB")} at {shown(target.at_m / 1e3, "km")}',
            each('τ', plan.pulse_s * 1e6, 'µs'),
            each('λ', plan.wavelength_m * 100, 'cm'),
        )
        return Line('one-pulse S/N = reference × (τ/τ_1)(λ/λ_1)²(R_1/R)⁴', numbers, at_1_km)
    given = target.radar_equation
    numbers = put_in(
        f'P = {shown(given.peak_w / 1e3, "kW")}',
        f'G = {shown(given.gain_dbi, "dBi")}',
        f'σ = {shown(given.rcs_m2, "m²")}',
        f'F = {shown(given.noise_figure_db, "dB")}',
        f'L = {shown(given.losses_db, "dB")}',
        each('τ', plan.pulse_s * 1e6, 'µs'),
    )
    return Line('one-pulse S/N = P τ G² λ² σ/((4π)³ k 290 K F L R⁴)', numbers, at_1_km, 'radar equation, by energy')


def _losses(computed):
    """Say what the beam's shape costs each CPI, and what its filters gain."""
    echoes = computed.echoes
    if echoes.beam_loss_db.any():
        yield Line(
            'beam shape: 24.08 u² dB, u one-way 3 dB beamwidths from the axis, the set centred on the target',
            each('u', np.sqrt(echoes.beam_loss_db / (80.0 * math.log10(2.0)))),
            each('loss', echoes.beam_loss_db, 'dB'),
        )
    if computed.is_stagger:
        numbers = f'{echoes.outputs} outputs'
        yield Line('S/N of one output = one-pulse S/N × averaged response(v)', numbers, 'powers added', DEFINITION)
        return
    gains = [10.0 * math.log10(filters.processing_gain(cpi.weights)) for cpi in echoes.parts[-1].cpis]
    numbers = put_in(computed.plan.window, each('n', computed.plan.pulses))
    yield Line('gain at a filter’s centre = (Σw)²/Σw²', numbers, each('gain', gains, 'dB'), 'Richards, P. 372-373')


def _false_alarm(computed):
    per_cpi = computed.echoes.false_alarm_per_cpi
    numbers = put_in(f'overall {computed.plan.target.false_alarm:g}', f'M = {computed.m}', f'N = {computed.looks}')
    return Line('Σ_{k≥M} C(N,k) p^k (1−p)^(N−k) = overall', numbers, f'p = {per_cpi:.6g} for each CPI', DEFINITION)


def _need(computed):
    target = computed.plan.target
    need = needs.signal_needed_db(
        *(target.pd_wanted, computed.looks, computed.m, target.false_alarm, target.fluctuation, computed.echoes.outputs)
    )
    numbers = put_in(target.fluctuation, f'wanted {shown(target.pd_wanted)}')
    return Line('S/N that equal CPIs would need', numbers, shown(need, 'dB'), 'Marcum; Swerling')


def _check(computed, found):
    """Put the median range back in: the probability there is the one that is wanted."""
    echoes, target, part = computed.echoes, computed.plan.target, computed.echoes.parts[-1]
    speed = float(found.speed_m_s[found.places[1]])
    if computed.is_stagger:
        gain = np.array([float(computed.response.response.power(speed)) * echoes.outputs])
    else:
        gain = np.array([float(best_gain(cpi, np.array([speed]))[0]) for cpi in part.cpis])
    ratio = gain * part.strength_m4[: gain.size] / found.median**4
    level = needs.set_threshold(target.false_alarm, computed.looks, computed.m, echoes.outputs)
    reached = float(set_probability(ratio, computed.m, level, target.fluctuation, echoes.outputs))
    decibels = [10.0 * math.log10(one) if one > 0 else -math.inf for one in ratio.tolist()]
    numbers = put_in(
        f'v = {shown(speed, "m/s")}',
        'S/N ' + ', '.join('none' if math.isinf(one) else shown(one, 'dB') for one in decibels),
    )
    if found.median >= 4.0 * computed.plan.range_m[1] * (1.0 - 1e-12):
        return Line(
            'the search ends at four times the coverage', numbers, f'probability {reached:.4f} there', DEFINITION
        )
    return Line('probability of detection there, after M of N', numbers, f'{reached:.4f}', 'Marcum; Swerling')
