"""Probability of detection over range and speed, with eclipsing, beam shape and clutter.

For the eye: where one strength is shared over the dwell the averages over it
are taken coarsely, to about a thousandth; everything else is as exact as in
:mod:`pycore.swerling`.
"""

import math
from functools import lru_cache

import numpy as np

from pycore.bank import outside_notch
from pycore.clutter import clutter_to_noise, folded_clutter_to_noise, late_share
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.scnr import best_scnr
from pycore.swerling import at_least, cpi_probability, set_probability, steady_curve
from pycore.target import one_pulse_signal

_PER_E_FOLD = 1024  # entries of the table in one e-fold of signal-to-noise
_STRENGTH_STEP = _PER_E_FOLD // 2
_WEAKEST, _STRONGEST = -8.0, 14.0  # logarithms of signal-to-noise; beyond them the probability no longer changes
_CELLS_AT_ONCE = 16_384


def set_scnr(cpis, strength_m4, patches, factor, first_opening_m, received, range_m, speed_m_s):
    """Return each PRF's signal-to-(noise + clutter) over ranges and speeds.

    Parameters
    ----------
    cpis : sequence of Cpi, length N
        The PRFs. [unitless]
    strength_m4 : float array, shape N or N × R
        The target's strength, beam shape taken off. [m⁴]
    patches : sequence of Clutter, length P
        Patches of clutter. [unitless]
    factor : float array, shape N × P (or N × P × R)
        Of :func:`pycore.clutter.pulse_factor`. [unitless]
    first_opening_m : float array, shape N or N × R
        Range nearer than which all laws are held constant. [m]
    received : float array, shape N × R
        Power that eclipsing leaves: the received share squared, or plain. [unitless]
    range_m, speed_m_s : float arrays, shapes R and V
        Cells' centres. [m, m/s]

    Returns
    -------
    scnr : float array, shape N × R × V
        Of the best usable filter; 0 at speeds inside a PRF's notch. An echo that is late by more intervals than
        there are fill pulses is in fewer of the pulses that count.
    """
    rows = []
    for prf, cpi in enumerate(cpis):
        reach_m = 0.5 * SPEED_OF_LIGHT_M_S * cpi.pri_s
        opening_m = first_opening_m[prf]
        ratio = [
            folded_clutter_to_noise(patch, range_m, reach_m, opening_m, scale)
            for patch, scale in zip(patches, factor[prf], strict=True)
        ]
        signal = one_pulse_signal(strength_m4[prf], range_m, opening_m) * late_share(cpi, range_m) ** 2
        ratio = np.reshape(ratio, (len(patches), len(range_m)))
        row = best_scnr(cpi, speed_m_s, signal, patches, ratio, received[prf])
        rows.append(row * outside_notch(cpi, speed_m_s))
    return np.array(rows)


def probability_map(scnr, m, threshold, case):
    """Return the probability of detection after M of N for a map.

    Parameters
    ----------
    scnr : float array, shape N × R × V
        Of :func:`set_scnr`. [unitless]
    m : int
        Number of CPIs that must detect the target. [unitless]
    threshold : float
        y of every CPI. [unitless]
    case : str
        One of ``swerling.CASES``. [unitless]

    Returns
    -------
    probability : float array, shape R × V
        To about 1e-3 for Swerling 1 and 3 with several CPIs, exact otherwise.
    """
    if len(scnr) == 1 or case not in ('swerling1', 'swerling3'):
        return set_probability(np.moveaxis(scnr, 0, -1), m, threshold, case)
    cells = scnr.reshape(len(scnr), -1)
    tables = _tables(threshold, 1 if case == 'swerling1' else 2)
    blocks = range(0, cells.shape[1], _CELLS_AT_ONCE)
    parts = [_shared_strength(cells[:, first : first + _CELLS_AT_ONCE], m, *tables) for first in blocks]
    return np.concatenate(parts).reshape(scnr.shape[1:])


@lru_cache(maxsize=16)
def _tables(threshold, shape):
    """Return steady probabilities against the logarithm of signal-to-noise, and (shift, weight) of strengths."""
    lowest = round(-_PER_E_FOLD * math.log(1e4) / shape)
    shift = np.arange(lowest, _PER_E_FOLD * math.log(45.0), _STRENGTH_STEP).astype(np.intp)
    strength = shift / _PER_E_FOLD
    weight = np.exp(shape * (strength + math.log(shape) - np.exp(strength))) * (_STRENGTH_STEP / _PER_E_FOLD)
    weight[0] += 1.0 - weight.sum()
    size = round((_STRONGEST - _WEAKEST) * _PER_E_FOLD) + shift[-1] - shift[0] + 1
    level = _WEAKEST + (np.arange(size) + shift[0]) / _PER_E_FOLD
    return steady_curve(threshold)(np.exp(level)), shift - shift[0], weight


def _shared_strength(cells, m, table, shift, weight):
    """Return M of N averaged over one strength for all CPIs; cells has shape N × cells."""
    level = np.log(np.maximum(cells, math.exp(_WEAKEST)))
    place = np.rint((np.minimum(level, _STRONGEST) - _WEAKEST) * _PER_E_FOLD).astype(np.intp)
    total = np.zeros(cells.shape[1])
    for step, share in zip(shift, weight, strict=True):
        total += share * at_least(np.moveaxis(table.take(place + step), 0, -1), m)
    return total


def canceller_residue(pri_s, weights, wavelength_m, clutter):
    """Return what a canceller over a staggered sequence passes of a patch's one-pulse clutter-to-noise.

    Parameters
    ----------
    pri_s : float array, shape K
        The cycle of intervals, in sending order. [s]
    weights : float array, shape W
        Canceller's weights. [unitless]
    wavelength_m : float
        Wavelength. [m]
    clutter : Clutter
        The patch. [unitless]

    Returns
    -------
    gain : float
        wᴴRw/wᴴw averaged over the phases of the cycle, R as for a filter bank.
    """
    pri_s, weights = np.asarray(pri_s, dtype=float), np.asarray(weights, dtype=float)
    place = np.arange(len(pri_s))[:, None] + np.arange(len(weights) - 1)
    time_s = np.concatenate((np.zeros((len(pri_s), 1)), np.cumsum(pri_s[place % len(pri_s)], axis=1)), axis=1)
    apart_s = time_s[:, :, None] - time_s[:, None, :]
    turn = 4.0 * np.pi * apart_s / wavelength_m
    coherence = np.exp(-0.5 * (turn * clutter.spread_m_s) ** 2) * np.cos(turn * clutter.speed_m_s)
    passed = np.einsum('kab,a,b->k', coherence, weights, weights).mean() / (weights**2).sum()
    return max(float(passed), 0.0)


def stagger_map(signal, received, gain, patches, residue, range_m, first_opening_m, threshold, case, outputs):
    """Return the probability of detection of a staggered sequence over ranges and speeds.

    Parameters
    ----------
    signal : float array, shape R
        One-pulse signal-to-noise ratio. [unitless]
    received : float array, shape R
        Power that eclipsing leaves; 0 from the shortest unambiguous range on. [unitless]
    gain : float array, shape V
        The canceller's averaged power response, 1 in the mean over all speeds. [unitless]
    patches : sequence of Clutter, length P
        Patches of clutter at their own ranges, their strength that of this pulse. [unitless]
    residue : float array, shape P
        Of :func:`canceller_residue`. [unitless]
    range_m : float array, shape R
        Cells' centres. [m]
    first_opening_m : float
        Range nearer than which the laws are held constant. [m]
    threshold : float
        y for the sum of the outputs. [unitless]
    case : str
        One of ``swerling.CASES``. [unitless]
    outputs : int
        Pulses less delays: outputs whose powers are added, taken as independent (an approximation). [unitless]

    Returns
    -------
    probability : float array, shape R × V
        Of the one CPI.
    """
    noise = np.ones(len(range_m))
    for patch, left in zip(patches, residue, strict=True):
        noise = noise + received * left * clutter_to_noise(patch, range_m, first_opening_m)
    level = np.linspace(_WEAKEST, _STRONGEST, 2201)
    curve = cpi_probability(outputs * np.exp(level), threshold, case, outputs)
    scnr = np.multiply.outer(received * signal / noise, gain)
    return np.interp(np.log(np.maximum(scnr, math.exp(_WEAKEST))), level, curve)
