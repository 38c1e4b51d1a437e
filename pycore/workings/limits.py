"""What surface clutter asks of a notch, in its parts; and what limits a canceller, approximations named."""

import math

import numpy as np

from pycore import improvement
from pycore.workings.line import Line, put_in, shown

_HANDBOOK = 'Shrader, Radar Handbook, MTI chapter (from memory); an approximation'


def notch_parts(computed):
    """Return the lines that lead to the widest notch that surface clutter asks for.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]

    Returns
    -------
    lines : tuple of Line
        None without surface clutter.
    notes : tuple of str
        What the parts leave out.
    """
    found = computed.echoes.suggested_notch
    if found is None:
        return (), ()
    rows = np.broadcast_arrays(
        *(found.surface_m_s, found.platform_m_s, found.scanning_m_s, found.spread_m_s),
        *(found.clutter_m_s, found.filter_m_s, found.notch_m_s),
    )
    place = int(np.argmax(rows[-1]))
    surface, platform, scanning, spread, clutter, edge, notch = (float(row[place]) for row in rows)
    lines = (
        Line(
            'spread of ground clutter σ = √(σ_surface² + σ_scanning² + σ_platform²)',
            put_in(
                f'surface {shown(surface, "m/s")}',
                f'scanning 0.265 λ/(2 × time on target) {shown(scanning, "m/s")}',
                f'platform V sin(look) beamwidth/(4 √ln 2) {shown(platform, "m/s")}',
            ),
            shown(spread, 'm/s'),
        ),
        Line(
            'suggested notch = σ √(2 ln CNR) + x λ/(2nT), x filters to the window’s own sidelobe level',
            put_in(f'PRF {place + 1}', f'σ √(2 ln CNR) = {shown(clutter, "m/s")}', f'x λ/(2nT) = {shown(edge, "m/s")}'),
            shown(notch, 'm/s'),
        ),
    )
    return lines, ('The suggested notch is that of the PRF that needs the widest one; nothing is judged by it.',)


def canceller_limits(computed):
    """Return the lines on how much a stagger's canceller improves against surface clutter, and the handbook's limits.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]

    Returns
    -------
    lines : tuple of Line
        None without surface clutter.
    notes : tuple of str
        Which of them are approximations.
    """
    plan = computed.plan
    if plan.surface is None:
        return (), ()
    echoes, wavelength = computed.echoes, float(plan.wavelength_m[0])
    time_s = None if plan.dwell_s is not None else plan.time_on_target_s
    found = echoes.suggested_notch
    spread = float(np.broadcast_to(found.spread_m_s, plan.n)[0])
    parts = [
        float(np.broadcast_to(one, plan.n)[0]) for one in (found.surface_m_s, found.scanning_m_s, found.platform_m_s)
    ]
    weights = echoes.weights
    factor = improvement.improvement_factor(plan.pri_counts, plan.clock_hz, weights, wavelength, spread)
    own = Line(
        'improvement factor = Σw²/(wᵀ ρ w), ρ(t) = exp(−8π² σ² t²/λ²), averaged over the phases',
        put_in(
            f'σ = √({" + ".join(f"{shown(one)}²" for one in parts)}) = {shown(spread, "m/s")}',
            f'w = {", ".join(shown(weight) for weight in weights)}',
        ),
        'no end' if math.isinf(factor) else _decibels(factor),
        'Richards, Fundamentals of Radar Signal Processing, 2nd ed., for the gain Σw²; the rest derived here',
    )
    rules = () if time_s is None else tuple(_rules(plan, len(weights) - 1, time_s / float(plan.pri_s.mean())))
    notes = ('Limits by scanning and by staggering are approximations, beside the value from wᵀ ρ w.',) if rules else ()
    return (own, *rules), notes


def _rules(plan, delays, hits):
    """Yield the handbook's limits: by scanning for binomial cancellers, and by staggering."""
    if plan.weights is None:
        yield Line(
            'limit by scanning, for small spreads: 2/s², 2/s⁴ or (4/3)/s⁶ for 1, 2 or 3 delays, s = 2√(ln 2)/hits',
            put_in(f'{delays} delays', f'hits = {shown(hits)}'),
            _decibels(improvement.scanning_limit(delays, hits)),
            _HANDBOOK,
        )
    ratio = max(plan.pri_counts) / min(plan.pri_counts)
    if ratio > 1:
        yield Line(
            'limit by staggering: (2.5 × hits/(γ − 1))², γ the longest interval over the shortest',
            put_in(f'hits = {shown(hits)}', f'γ = {shown(ratio)}'),
            _decibels(improvement.stagger_limit(hits, ratio)),
            _HANDBOOK,
        )


def _decibels(ratio):
    return shown(10.0 * math.log10(ratio), 'dB')
