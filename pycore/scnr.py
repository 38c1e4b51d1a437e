"""Signal-to-(noise + clutter) in the filters of a CPI, and what a target is lost to.

SCNR in filter w at speed v = ε S |wᴴs|² / (wᴴ(I + ε Σ C_p R_p)w), where ε is the
power that eclipsing leaves: all that shares a gate shares it. Ratios are power
ratios against one pulse's noise.
"""

from dataclasses import dataclass

import numpy as np

from pycore.bank import centres, clutter_gain, outside_notch, target_gain
from pycore.clutter import clutter_to_noise

_FILTERS_AT_ONCE = 8


@dataclass(frozen=True, slots=True)
class FilterOutputs:
    """What stands in each filter of one CPI, in the gate of one target.

    Parameters
    ----------
    centre_m_s : float array, shape n
        Speeds that the filters are steered to, folded about zero. [m/s]
    usable : bool array, shape n
        False where a filter's centre lies inside the notch. [unitless]
    target : float array, shape n
        Signal-to-noise. [unitless]
    clutter : float array, shape P × n
        Clutter-to-noise of each patch. [unitless]
    """

    centre_m_s: np.ndarray
    usable: np.ndarray
    target: np.ndarray
    clutter: np.ndarray

    @property
    def scnr(self):
        """Signal-to-(noise + clutter) of each filter, shape n. [unitless]"""
        return self.target / (1.0 + self.clutter.sum(axis=0))

    @property
    def best(self):
        """Index of the usable filter with the largest SCNR; -1 where none is usable. [unitless]"""
        return int(np.argmax(np.where(self.usable, self.scnr, -1.0))) if self.usable.any() else -1


def filter_outputs(cpi, speed_m_s, signal, patches, ratio, received=1.0):
    """Return what a target and the clutter in its gate put into each filter.

    Parameters
    ----------
    cpi : Cpi
        Pulses, window and notch. [unitless]
    speed_m_s : float
        The target's closing speed. [m/s]
    signal : float
        Its one-pulse signal-to-noise ratio. [unitless]
    patches : sequence of Clutter, length P
        Patches of clutter. [unitless]
    ratio : float array, shape P
        One-pulse clutter-to-noise ratio of each in the gate, folded. [unitless]
    received : float
        Power that eclipsing leaves, of target and clutter alike. [unitless]

    Returns
    -------
    outputs : FilterOutputs
        Filter by filter.
    """
    centre = centres(cpi)
    clutter = _residues(cpi, patches) * (received * np.reshape(ratio, (-1, 1)))
    return FilterOutputs(centre, outside_notch(cpi, centre), received * signal * target_gain(cpi, speed_m_s), clutter)


def _residues(cpi, patches):
    """Return the gain of each filter for each patch, shape P × n."""
    gains = [clutter_gain(cpi, patch.speed_m_s, patch.spread_m_s) for patch in patches]
    return np.array(gains).reshape(len(patches), cpi.pulses)


def lost_to(outputs, needed, names):
    """Return what keeps a target from being detected on a PRF.

    Parameters
    ----------
    outputs : FilterOutputs
        Of the PRF. [unitless]
    needed : float
        Signal-to-noise ratio that detection needs. [unitless]
    names : sequence of str, length P
        Names of the patches. [unitless]

    Returns
    -------
    cause : str or None
        None where the best filter has enough; ``'notch'`` where no filter is usable; ``'noise'`` where the target
        would be too weak without clutter; otherwise the name of the patch that is strongest in the best filter.
    """
    if outputs.best < 0:
        return 'notch'
    if outputs.scnr[outputs.best] >= needed:
        return None
    if outputs.target[outputs.usable].max() < needed:
        return 'noise'
    return names[int(np.argmax(outputs.clutter[:, outputs.best]))]


def best_scnr(cpi, speed_m_s, signal, patches, ratio, received):
    """Return the SCNR of the best usable filter over ranges and speeds.

    Parameters
    ----------
    cpi : Cpi
        Pulses, window and notch. [unitless]
    speed_m_s : float array, shape V
        Closing speeds. [m/s]
    signal : float array, shape R
        One-pulse signal-to-noise ratio at each range. [unitless]
    patches : sequence of Clutter, length P
        Patches of clutter. [unitless]
    ratio : float array, shape P × R
        One-pulse clutter-to-noise ratio of each in the gate, folded. [unitless]
    received : float array, shape R
        Power that eclipsing leaves. [unitless]

    Returns
    -------
    scnr : float array, shape R × V
        0 where no filter's centre is outside the notch.
    """
    usable = outside_notch(cpi, centres(cpi))
    gain = target_gain(cpi, speed_m_s)[:, usable]
    if not gain.shape[1]:
        return np.zeros((len(signal), len(gain)))
    if not len(patches):
        return np.multiply.outer(received * signal, gain.max(axis=1))
    quiet = 1.0 / (1.0 + received[:, None] * (np.transpose(ratio) @ _residues(cpi, patches)[:, usable]))
    best = np.stack([_best_of(row, quiet) for row in gain], axis=1)
    return (received * signal)[:, None] * best


def _best_of(gain, quiet):
    """Return, for each range, the largest product of gain and quietness; strongest filters are tried first."""
    order = np.argsort(-gain)
    ceiling = quiet.max(axis=1)
    best = np.zeros(len(quiet))
    for first in range(0, len(order), _FILTERS_AT_ONCE):
        some = order[first : first + _FILTERS_AT_ONCE]
        if np.all(gain[some[0]] * ceiling <= best):
            break
        best = np.maximum(best, (quiet[:, some] * gain[some]).max(axis=1))
    return best


def loudest_range(cpi, clutter, first_opening_m, factor=1.0):
    """Return the range inside which a patch stands above the noise in every usable filter.

    Parameters
    ----------
    cpi : Cpi
        Pulses, window and notch. [unitless]
    clutter : Clutter
        The patch, at its own ranges. [unitless]
    first_opening_m : float
        Range nearer than which its law is held constant. [m]
    factor : float
        Of :func:`pycore.clutter.pulse_factor`. [unitless]

    Returns
    -------
    range_m : float
        The farthest such range; nan where there is none. [m]
    """
    gain = clutter_gain(cpi, clutter.speed_m_s, clutter.spread_m_s)[outside_notch(cpi, centres(cpi))]
    low, high = clutter.range_m
    start = min(max(low, first_opening_m), high)
    quietest = gain.min() if gain.size else 0.0
    above = quietest * float(clutter_to_noise(clutter, start, first_opening_m, factor))
    if above <= 1.0:
        return np.nan
    if clutter.range_power <= 0.0:
        return high
    return min(max(start, first_opening_m) * above ** (1.0 / clutter.range_power), high)
