"""The probability of detection of a plan's target over ranges and radial speeds, for the eye.

Brings a plan to :mod:`pycore.detection_map`, part by part where a near pulse
serves the near ranges. Holds no mathematics of its own.
"""

import math
from dataclasses import replace

import numpy as np

from pycore import detection, eclipsing
from pycore.detection_map import canceller_residue, probability_map, set_scnr, stagger_map
from pycore.speed_samples import best_gain
from pycore.swerling import cpi_probability
from pycore.target import one_pulse_signal, received_power

_NEAREST_M = 1.0


def probability_over(computed, range_m, speed_m_s):
    """Return the probability of detection in every cell of a map, with eclipsing, notch and clutter.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    range_m, speed_m_s : float arrays, shapes R and V
        Cells' centres, rising. [m, m/s]

    Returns
    -------
    probability : float array, shape R × V
        After M of N, to about a thousandth; 0 where a canceller gives no output.
    """
    found = np.zeros((len(range_m), len(speed_m_s)))
    parts = computed.echoes.parts
    # Up to and with its end a part serves; beyond the coverage the last one does.
    place = np.searchsorted([part.range_m[1] for part in parts[:-1]], range_m)
    for number, part in enumerate(parts):
        if (place == number).any():
            found[place == number] = _over_part(computed, part, range_m[place == number], speed_m_s)
    return found


def _over_part(computed, part, range_m, speed_m_s):
    if computed.is_stagger:
        return _over_stagger(computed, part, range_m, speed_m_s)
    received = received_power(received_shares(computed, range_m), computed.plan.eclipsing_loss)
    patches = computed.echoes.patches
    ratio = set_scnr(
        part.cpis, part.strength_m4, patches, part.factor, part.first_opening_m, received, range_m, speed_m_s
    )
    return probability_map(ratio, computed.m, _threshold(computed), computed.plan.target.fluctuation)


def received_shares(computed, range_m):
    """Return the received share on every PRI.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    range_m : float array, shape R
        Ranges. [m]

    Returns
    -------
    share : float array, shape N × R
        From 0 to 1.
    """
    plan = computed.plan
    return np.array(
        [
            eclipsing.received_share(range_m, pri, pulse, plan.recovery_s, plan.guard_s, plan.near)
            for pri, pulse in zip(plan.pri_s.tolist(), plan.pulse_s.tolist(), strict=True)
        ]
    )


def _threshold(computed):
    outputs = max(computed.echoes.outputs, 1)
    return detection.set_threshold(computed.plan.target.false_alarm, computed.looks, computed.m, outputs)


def _over_stagger(computed, part, range_m, speed_m_s):
    """Return the map of a stagger: the least of its received shares, none from the shortest unambiguous range on."""
    plan, echoes = computed.plan, computed.echoes
    if echoes.outputs < 1:
        return np.zeros((len(range_m), len(speed_m_s)))
    share = received_shares(computed, range_m).min(axis=0) * (range_m < computed.unambiguous_range_m.min())
    opening = float(part.first_opening_m[0])
    length = float(plan.wavelength_m[0])
    # The factor of a part's pulse stands in the patch's strength, as the map takes patches at their own ranges.
    patches = [_stronger(patch, scale) for patch, scale in zip(echoes.patches, part.factor[0].tolist(), strict=True)]
    return stagger_map(
        one_pulse_signal(part.strength_m4[0], range_m, opening),
        received_power(share, plan.eclipsing_loss),
        computed.response.response.power(speed_m_s),
        patches,
        [canceller_residue(plan.pri_s, echoes.weights, length, patch) for patch in patches],
        range_m,
        opening,
        _threshold(computed),
        plan.target.fluctuation,
        echoes.outputs,
    )


def _stronger(patch, factor):
    return replace(patch, cnr_db=patch.cnr_db + 10.0 * math.log10(factor))


def probability_along(computed, range_m, speed_m_s):
    """Return the probability of detection along the range by noise alone: nothing eclipsed, no clutter.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    range_m : float array, shape R
        Ranges. [m]
    speed_m_s : float array, shape V
        Radial speeds. [m/s]

    Returns
    -------
    probability : float array, shape R × V
        As :func:`pycore.reach.reach` takes it, to about a thousandth.
    """
    part, case = computed.echoes.parts[-1], computed.plan.target.fluctuation
    outputs = computed.echoes.outputs
    law = np.maximum(range_m, _NEAREST_M) ** -4.0
    if outputs < 1:
        return np.zeros((len(range_m), len(speed_m_s)))
    if computed.is_stagger:
        gain = computed.response.response.power(speed_m_s) * part.strength_m4[0] * outputs
        return cpi_probability(np.multiply.outer(law, gain), _threshold(computed), case, outputs)
    gains = [best_gain(cpi, speed_m_s) * strength for cpi, strength in zip(part.cpis, part.strength_m4, strict=True)]
    ratio = np.array([np.multiply.outer(law, gain) for gain in gains])
    return probability_map(ratio, computed.m, _threshold(computed), case)
