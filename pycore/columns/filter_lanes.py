"""What the lanes of the Doppler filters show: for each PRF its filters, the clutter in one gate, and the target."""

from dataclasses import dataclass

import numpy as np

from pycore import ambiguity, spectra
from pycore.bank import centres, outside_notch, target_gain
from pycore.clutter_pieces import range_pieces
from pycore.covered import covered_half_width, leakage
from pycore.cpi import Cpi
from pycore.detection_map import canceller_residue
from pycore.filters import lobe_edge
from pycore.follow import gate

MOST_LANES = 4
"""PRFs up to which each has a lane; of more, one does. [unitless]"""


@dataclass(frozen=True, slots=True)
class Lane:
    """What one PRF, or a stagger, hears along the apparent speed.

    Parameters
    ----------
    prf : int
        Which PRF. [unitless]
    cpi : Cpi or None
        Its CPI; none for a stagger. [unitless]
    speed_m_s : float array, shape V
        Apparent speeds of a dwell, from one end to the other; true ones of a stagger. [m/s]
    clutter : float array, shape P × V
        Power of each patch, against the noise, in a filter steered to each speed. [unitless]
    covered : float array, shape P
        Part of the speeds on which it stands above the noise. [unitless]
    filter : float array, shape V
        Course of the filter that hears the target best, or of the first outside the notch; nan where none. [unitless]
    lobe : tuple of float arrays or None
        Offsets and powers of the main lobe of every filter. [m/s, unitless]
    centre_m_s : float array, shape F
        Centres of the filters outside the notch. [m/s]
    target : tuple of float or None
        Apparent speed of the followed target, and its power in the best filter. [m/s, unitless]
    """

    prf: int
    cpi: Cpi | None
    speed_m_s: np.ndarray
    clutter: np.ndarray
    covered: np.ndarray
    filter: np.ndarray
    lobe: tuple | None
    centre_m_s: np.ndarray
    target: tuple | None


def shown(computed, mark):
    """Return the PRFs that have a lane.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    mark : Mark or None
        The target that is followed. [m, m/s]

    Returns
    -------
    prfs : list of int
        All of up to four; of more the one that hears the target best, or the first.
    """
    n = computed.plan.n
    if n <= MOST_LANES:
        return list(range(n))
    return [0 if mark is None else int(np.argmax([one.scnr_db for one in mark.followed.prfs]))]


def lanes(computed, mark):
    """Return the lanes of the figure.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    mark : Mark or None
        The target that is followed. [m, m/s]

    Returns
    -------
    lanes : list of Lane
        From the top down.
    """
    if computed.is_stagger:
        return [_of_stagger(computed, mark)]
    return [_of_prf(computed, prf, mark) for prf in shown(computed, mark)]


def _heard(computed, prf, mark):
    """Return the CPI, the one-pulse signal and the patches' one-pulse clutter, as eclipsing leaves them."""
    if mark is not None:
        here = gate(computed, prf, mark.range_m)
        return here.cpi, here.signal * here.power, here.clutter * here.power
    return computed.echoes.parts[-1].cpis[prf], 1.0, _strongest(computed)[prf]


def _strongest(computed):
    """Return the strongest one-pulse clutter-to-noise ratio of each patch in any gate, shape N × P."""
    echoes = computed.echoes
    found = [
        range_pieces(echoes.patches, computed.unambiguous_range_m, part.first_opening_m, part.factor, part.range_m)[1]
        for part in echoes.parts
    ]
    return np.max([ratio.max(axis=0) for ratio in found], axis=0)


def _of_prf(computed, prf, mark):
    cpi, signal, ratio = _heard(computed, prf, mark)
    blind = cpi.blind_speed_m_s
    along = spectra.offsets(cpi)
    speed = np.concatenate((-along[:0:-1], along))
    patches = computed.echoes.patches
    leaks = [(patch, leakage(cpi, patch.spread_m_s), power) for patch, power in zip(patches, ratio, strict=True)]
    clutter = [
        power * spectra.around(cpi, spectra.passed(cpi, patch.spread_m_s), patch.speed_m_s, speed)
        for patch, _, power in leaks
    ]
    covered = [min(2.0 * covered_half_width(leak, power) / blind, 1.0) for _, leak, power in leaks]
    centre = centres(cpi)
    usable = centre[outside_notch(cpi, centre)]
    place, best = _target(computed, cpi, prf, signal, mark, usable)
    course = signal * spectra.around(cpi, spectra.shape(cpi), best, speed)
    return Lane(
        prf,
        cpi,
        speed,
        np.reshape(clutter, (len(patches), speed.size)),
        np.array(covered),
        course if usable.size else np.full(speed.size, np.nan),
        _lobe(cpi, signal),
        usable,
        place,
    )


def _target(computed, cpi, prf, signal, mark, usable):
    """Return where the target stands and the centre of its best filter; without one, of the first filter."""
    if not usable.size:
        return None, 0.0
    if mark is None:
        return None, float(usable[np.argmin(np.abs(usable - 0.25 * cpi.blind_speed_m_s))])
    followed = mark.followed.prfs[prf]
    speed = float(ambiguity.fold_speed(mark.speed_m_s, cpi.blind_speed_m_s))
    centre = centres(cpi)
    gain = np.where(outside_notch(cpi, centre), target_gain(cpi, speed), -1.0)
    power = 10.0 ** (followed.snr_db / 10.0) if followed.snr_db > -np.inf else 0.0
    return (speed, power), float(centre[int(np.argmax(gain))])


def _lobe(cpi, signal):
    """Return the main lobe of a filter: offsets from its centre and powers."""
    edge = lobe_edge(cpi.weights) * cpi.blind_speed_m_s / cpi.pulses
    offset = np.linspace(-edge, edge, 25)
    return offset, signal * spectra.around(cpi, spectra.shape(cpi), 0.0, offset)


def _of_stagger(computed, mark):
    """Return the lane of a stagger, whose canceller is one filter for all speeds."""
    plan, echoes = computed.plan, computed.echoes
    _, signal, ratio = _heard(computed, 0, mark)
    speed = np.linspace(*plan.speed_m_s, 601)
    left = [
        canceller_residue(plan.pri_s, echoes.weights, float(plan.wavelength_m[0]), patch) for patch in echoes.patches
    ]
    clutter = np.reshape(ratio * np.array(left), (-1, 1)) * np.ones(speed.size)
    response = computed.response.response
    place = None if mark is None else (mark.speed_m_s, signal * float(response.power(mark.speed_m_s)))
    covered = (clutter > 1.0).mean(axis=1) if len(clutter) else np.zeros(0)
    return Lane(0, None, speed, clutter, covered, signal * response.power(speed), None, np.zeros(0), place)
