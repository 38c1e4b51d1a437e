"""One target against every PRI that could be sent: would it be clear, how clearly, and for how long.

Nothing here belongs to a plan's own PRIs: pulse, notch and recovery are those of
one PRF of the plan, and its PRI runs through an interval.
"""

from dataclasses import dataclass

import numpy as np

from pycore.eclipsing import METRES_PER_SECOND_OF_DELAY, clear_ranges, received_share
from pycore.stagger import notch_clear_speeds

AT_REST_M_S = 1e-9
"""A target no faster than this stands still. [m/s]"""


@dataclass(frozen=True, slots=True)
class EveryPri:
    """What each PRI makes of one target.

    Parameters
    ----------
    pri_s : float array, shape C
        The PRIs. [s]
    received : float array, shape C
        Received share of the target's echo. [unitless]
    range_clear, speed_clear : bool array, shape C
        Whether enough of the echo is received, and whether the speed is out of the notch. [unitless]
    to_edge_m, to_edge_m_s : float array, shape C
        How far the target is from the nearest edge at which it would become blind, in range and in speed; where it is
        blind already, 0. [m, m/s]
    until_blind_s : float array, shape C
        How long until it flies into an eclipsed range; 0 where it is blind already, in range or in speed, ``inf``
        where it stands still. [s]
    """

    pri_s: np.ndarray
    received: np.ndarray
    range_clear: np.ndarray
    speed_clear: np.ndarray
    to_edge_m: np.ndarray
    to_edge_m_s: np.ndarray
    until_blind_s: np.ndarray

    @property
    def clear(self):
        """Whether the target is clear in both, shape C."""
        return self.range_clear & self.speed_clear

    @property
    def longest(self):
        """Number of the PRI that keeps the target clear longest; of equals the shortest; ``None`` where none does."""
        if not self.clear.any():
            return None
        return int(np.where(self.clear, self.until_blind_s, -1.0).argmax())


def every_pri(pri_s, range_m, speed_m_s, place, recovery_s, guard_s, received_min, near=None):
    """Return what every PRI of an interval makes of one target.

    Parameters
    ----------
    pri_s : float array, shape C
        PRIs, each longer than the pulse. [s]
    range_m : float
        The target's range, above 0. [m]
    speed_m_s : float
        Its radial speed, closing positive. [m/s]
    place : Place
        Wavelength, pulse and notch that go with the PRI. [mixed]
    recovery_s, guard_s : float
        Times that the receiver stays shut after and before a pulse. [s]
    received_min : float
        Least received share. [unitless]
    near : NearPulse or None
        A second pulse that serves the near ranges. [s, m]

    Returns
    -------
    each : EveryPri
        Edges exact; a closing target flies to shorter ranges, an opening one to longer.
    """
    pri_s = np.asarray(pri_s, dtype=float)
    each, shut = np.ones(pri_s.size), (recovery_s, guard_s, received_min)
    # Far enough that no clear interval about the target is cut by the end of the axis.
    far_m = range_m + 2.0 * METRES_PER_SECOND_OF_DELAY * pri_s.max(initial=0.0) + (near.to_range_m if near else 0.0)
    below, above = _around(clear_ranges(pri_s, place.pulse_s * each, *shut, (0.0, far_m), near), pri_s.size, range_m)
    blind_m_s = place.wavelength_m / (2.0 * pri_s)
    reach_m_s = 2.0 * blind_m_s.max(initial=0.0)
    axis = speed_m_s - reach_m_s, speed_m_s + reach_m_s
    slower, faster = _around(notch_clear_speeds(blind_m_s, place.notch_m_s * each, axis), pri_s.size, speed_m_s)
    range_clear, speed_clear = below >= 0.0, slower >= 0.0
    ahead = below if speed_m_s > 0 else above
    until = ahead / abs(speed_m_s) if abs(speed_m_s) > AT_REST_M_S else np.full(pri_s.size, np.inf)
    return EveryPri(
        pri_s,
        _received(pri_s, range_m, place.pulse_s, recovery_s, guard_s, near),
        range_clear,
        speed_clear,
        np.where(range_clear, np.minimum(below, above), 0.0),
        np.where(speed_clear, np.minimum(slower, faster), 0.0),
        np.where(range_clear & speed_clear, until, 0.0),
    )


def _around(spans, n, at):
    """Return how far it is, from one point, down and up to the ends of each PRF's clear interval; -1 outside one."""
    below, above = np.full(n, -1.0), np.full(n, -1.0)
    inside = (spans.start <= at) & (at <= spans.stop)
    below[spans.prf[inside]] = at - spans.start[inside]
    above[spans.prf[inside]] = spans.stop[inside] - at
    return below, above


def _received(pri_s, range_m, pulse_s, recovery_s, guard_s, near):
    """Return the received share of the echo on each PRI."""
    if near is not None:
        shares = [received_share(range_m, pri, pulse_s, recovery_s, guard_s, near) for pri in pri_s.tolist()]
        return np.array(shares, dtype=float)
    delay = np.mod(range_m / METRES_PER_SECOND_OF_DELAY, pri_s)
    # What of the echo comes after the next pulse has begun is not heard: that pulse is as long as the echo.
    heard = np.minimum(delay + pulse_s, pri_s - guard_s) - np.maximum(delay, pulse_s + recovery_s)
    return np.clip(heard / pulse_s, 0.0, 1.0)
