"""How often decoding is right, false or missed: many drawn sets of targets, decoded in two ways from the same cells.

Each PRF reports the number of the cell (range gate or Doppler filter) in which
it finds a target, after folding and with an error of measurement.
*Coincidence* unfolds every report and looks for places on which M PRFs agree.
*Congruence* solves for the number that leaves the reported remainders, which
needs cells that divide every period; a report that is one cell off gives a
wildly wrong number or none, where coincidence can allow for a neighbour.
"""

import math
from dataclasses import dataclass
from itertools import combinations, product

import numpy as np

from pycore.candidates import agreement, comb
from pycore.congruence import consistent

_MOST_SYSTEMS = 20_000
"""Systems of congruences solved for one set of targets; above it only neighbouring PRFs are combined. [unitless]"""


@dataclass(frozen=True, slots=True)
class DecodeScore:
    """What became of the targets of many trials.

    Parameters
    ----------
    targets : int
        Targets drawn. [unitless]
    right : int
        Targets with a decoded place within one and a half cells, and the neighbours allowed, of them. [unitless]
    false : int
        Decoded places with no target there. [unitless]
    missed : int
        Targets without a decoded place. [unitless]
    trials : int
        Sets of targets drawn. [unitless]
    """

    targets: int
    right: int
    false: int
    missed: int
    trials: int


@dataclass(frozen=True, slots=True)
class Reports:
    """Drawn targets and what each PRF reports of them.

    Parameters
    ----------
    true : float array, shape (trials, K)
        True range or speed. [m or m/s]
    cells : int array, shape (trials, K, N)
        Number of the cell on each PRF, -1 where it does not see the target. [cells]
    """

    true: np.ndarray
    cells: np.ndarray


def drawn_reports(axis, periods, cell, targets, trials, seed, error=0.0, seen=1.0, shut=0.0):
    """Return targets drawn evenly over the axis and the cells in which the PRFs report them.

    Parameters
    ----------
    axis : tuple of float, length 2
        Lowest and highest value. [m or m/s]
    periods : sequence of float, length N
        Unambiguous ranges or first blind speeds. [m or m/s]
    cell : float or sequence of float, length N
        One gate or filter. [m or m/s]
    targets : int
        K, targets at a time. [unitless]
    trials : int
        Sets of targets. [unitless]
    seed : int
        The same seed gives the same draws. [unitless]
    error : float or sequence of float, length N
        Standard deviation of the measurement, Gaussian. [m or m/s]
    seen : float or sequence of float, length N
        Probability that a PRF sees a target. [unitless]
    shut : float or sequence of float, length N
        Targets that fold to less than this are not seen: the eclipsed start of the interval. [m or m/s]

    Returns
    -------
    reports : Reports
        What there is to decode. [unitless]
    """
    periods, cell = np.asarray(periods, dtype=float), np.asarray(cell, dtype=float)
    rng = np.random.default_rng(seed)
    true = rng.uniform(*axis, (trials, targets))
    noise = rng.standard_normal((trials, targets, periods.size)) * error
    visible = rng.random((trials, targets, periods.size)) < seen
    visible &= np.mod(true[..., None], periods) >= shut
    numbers = np.floor(np.mod(true[..., None] + noise, periods) / cell)
    # a remainder that rounds up to the period itself belongs to the last cell
    last = np.ceil(periods / cell * (1 - 1e-12)) - 1
    return Reports(true, np.where(visible, np.minimum(numbers, last), -1).astype(np.int64))


def coincidence_score(reports, axis, periods, cell, m, neighbours=0):
    """Return how decoding by coincidence fares.

    Parameters
    ----------
    reports : Reports
        What there is to decode. [unitless]
    axis : tuple of float, length 2
        Lowest and highest value. [m or m/s]
    periods : sequence of float, length N
        Unambiguous ranges or first blind speeds. [m or m/s]
    cell : float or sequence of float, length N
        One gate or filter. [m or m/s]
    m : int
        How many PRFs must agree. [unitless]
    neighbours : int
        Cells on either side that are accepted too. [cells]

    Returns
    -------
    score : DecodeScore
        Totals over all trials.
    """
    periods = np.asarray(periods, dtype=float)
    cell = np.broadcast_to(np.asarray(cell, dtype=float), periods.shape)
    decoded = []
    for trial in reports.cells:
        combs = [
            comb((numbers[numbers >= 0] + 0.5) * width, period, (0.5 + neighbours) * width, axis)
            for numbers, width, period in zip(trial.T, cell, periods, strict=True)
        ]
        decoded.append(agreement(combs, m).best)
    which = np.repeat(np.arange(len(decoded)), [each.size for each in decoded])
    return _score(reports.true, which, np.concatenate([*decoded, np.empty(0)]), (1.5 + neighbours) * cell.max())


def congruence_score(reports, axis, moduli, cell, m):
    """Return how decoding by congruences fares: the Chinese remainder theorem where the moduli share no factor.

    Parameters
    ----------
    reports : Reports
        What there is to decode. [unitless]
    axis : tuple of float, length 2
        Lowest and highest value, not below 0. [m or m/s]
    moduli : sequence of int, length N
        Cells in each period, whole. [cells]
    cell : float
        One gate or filter, the same on every PRF. [m or m/s]
    m : int
        How many PRFs must agree. [unitless]

    Returns
    -------
    score : DecodeScore
        Totals over all trials. Every M of the PRFs are solved; where that would be more than 20 000 systems for one
        set of targets, every M that follow each other.
    """
    low, high = math.floor(axis[0] / cell), math.ceil(axis[1] / cell)
    trials, targets, n = reports.cells.shape
    picks = np.array(list(product(range(targets), repeat=m)))
    found = [np.empty(0, dtype=np.int64)]
    for few in _subsets(n, m, len(picks)):
        chosen = [reports.cells[:, picks[:, at], prf] for at, prf in enumerate(few)]
        number, repeats = consistent(chosen, [int(moduli[prf]) for prf in few])
        good = (number >= 0) & (number < high) & np.logical_and.reduce([each >= 0 for each in chosen])
        trial, _ = np.nonzero(good)
        first = number[good].astype(np.int64)
        for extra in range(0, high, repeats):
            found.append((trial * high + first + extra)[(first + extra < high) & (first + extra >= low)])
    which, number = np.divmod(np.unique(np.concatenate(found)), high)
    return _score(reports.true, which, (number + 0.5) * cell, 1.5 * cell)


def _subsets(n, m, picks):
    """Return which PRFs are combined."""
    if math.comb(n, m) * picks <= _MOST_SYSTEMS:
        return list(combinations(range(n), m))
    return [tuple((first + step) % n for step in range(m)) for first in range(n)]


def _score(true, which, value, within):
    """Return the totals for places ``value`` decoded in the trials ``which``."""
    trials, targets = true.shape
    near = np.abs(value[:, None] - true[which]) <= within
    hit = np.zeros(true.shape, dtype=bool)
    row, column = np.nonzero(near)
    hit[which[row], column] = True
    right = int(hit.sum())
    return DecodeScore(trials * targets, right, int((~near.any(axis=1)).sum()), trials * targets - right, trials)
