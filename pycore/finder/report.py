"""What each set that was found gives, in full, by the same functions that assess a plan."""

from dataclasses import dataclass, replace

import numpy as np

from pycore.finder.front import front
from pycore.finder.sight import sight_of
from pycore.holes import Hole, holes
from pycore.patterns import sweep
from pycore.sight import floor, share, within
from pycore.unseen import inbound
from pycore.visibility import pattern_shares, visible


@dataclass(frozen=True, slots=True)
class Better:
    """One set that meets the limits, and what it gives.

    Parameters
    ----------
    pri_counts : tuple of int, length N
        In the order of the places. [clock counts]
    pri_s : tuple of float, length N
        The same. [s]
    pulses : tuple of int, length N
        Pulses that count. [unitless]
    visible_share, floor_share, excess_over_floor : float
        Of the coverage. [unitless]
    share_if_one_lost : float
        Visible share when the PRF that costs most is lost. [unitless]
    must_see : tuple of float
        Visible share of each region. [unitless]
    largest_hole : Hole or None
        The one with the largest area outside the floor. [m, m/s]
    unseen_s : float or None
        Longest time out of sight for a target flying along the beam; ``None`` where every speed is in the floor. [s]
    decode_m, decode_m_s : float or None
        How far range and speed decode, with blur; ``None`` where nothing was confused as far as was looked. [m, m/s]
    exact_m, exact_m_s : float or None
        Without any error. [m, m/s]
    time_s : float
        Time used. [s]
    duty : float
        Largest of the set. [unitless]
    tightest : (str, float) or None
        The limit with the least to spare, and how much of it is to spare. [unitless]
    dip_db : float or None
        Least response of a stagger over the wanted speeds. [dB]
    on_front : bool
        Whether no other listed set is at least as good in blind share, decoding, time and with one PRF lost. [unitless]
    """

    pri_counts: tuple[int, ...]
    pri_s: tuple[float, ...]
    pulses: tuple[int, ...]
    visible_share: float
    floor_share: float
    excess_over_floor: float
    share_if_one_lost: float
    must_see: tuple[float, ...]
    largest_hole: Hole | None
    unseen_s: float | None
    decode_m: float | None
    decode_m_s: float | None
    exact_m: float | None
    exact_m_s: float | None
    time_s: float
    duty: float
    tightest: tuple[str, float] | None
    dip_db: float | None = None
    on_front: bool = False


def better(judge, pris):
    """Return what one set of dwells gives.

    Parameters
    ----------
    judge : Judge
        Holds sets against the limits. [mixed]
    pris : tuple of int, length N
        PRIs in the order of the places. [clock counts]

    Returns
    -------
    better : Better
        In full; takes some milliseconds.
    """
    limits, seen = judge.limits, sight_of(judge.limits, pris)
    shares = pattern_shares(sweep(seen.ranges, seen.range_m), sweep(seen.speeds, seen.speed_m_s), limits.n)
    got, unseen_floor = visible(shares, limits.n, limits.m), floor(seen)
    regions = tuple(share(within(seen, part.range_m, part.speed_m_s)) for part in limits.must_see)
    ranges, speeds = judge.decoder.spans(pris)
    hole, hidden = holes(seen, limits.hole_m, limits.hole_m_s), inbound(seen)
    pri_s = tuple(pri / float(limits.clock_hz) for pri in pris)
    near_s = limits.near.pulse_s if limits.near else 0.0
    duty = max((place.pulse_s + near_s) / pri for place, pri in zip(limits.places, pri_s, strict=True))
    unseen_s = None if np.isnan(hidden.time_s) else float(hidden.time_s)
    values = Better(
        pris,
        pri_s,
        judge.decoder.pulses(pris),
        got.share,
        unseen_floor,
        max(0.0, 1.0 - got.share - unseen_floor),
        got.if_one_lost,
        regions,
        hole.listed[0] if hole.listed else None,
        unseen_s,
        ranges.blurred,
        speeds.blurred,
        ranges.exact,
        speeds.exact,
        judge.time_of(pris),
        duty,
        None,
    )
    return replace(values, tightest=tightest(limits, values))


def tightest(limits, values):
    """Return the limit that a set has the least to spare on.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]
    values : Better
        One set. [mixed]

    Returns
    -------
    tightest : (str, float) or None
        Its name and the part of it that is to spare; ``None`` where nothing with a margin binds. [unitless]
    """
    exact = limits.decode == 'exact'
    reach = values.exact_m if exact else values.decode_m
    reach_m_s = values.exact_m_s if exact else values.decode_m_s
    judged = limits.decode != 'none'
    spare = {
        'time': _spare(limits.time_s, values.time_s),
        'duty': _spare(limits.duty_limit, values.duty),
        'visible': _spare(1.0 - limits.visible, 1.0 - values.visible_share) if limits.visible else None,
        'unseen': _spare(limits.unseen_s, values.unseen_s),
        'decode-range': _beyond(limits.decode_m, reach) if judged else None,
        'decode-speed': _beyond(limits.decode_m_s, reach_m_s) if judged else None,
        **{
            f'must-see.{i}': _spare(1.0 - part.visible, 1.0 - got) if part.visible < 1.0 else None
            for i, (part, got) in enumerate(zip(limits.must_see, values.must_see, strict=True))
        },
    }
    given = [(part, name) for name, part in spare.items() if part is not None]
    return min(given)[::-1] if given else None


def _spare(most, used):
    """Return the part of an upper limit that is not used."""
    return None if most is None or used is None or most <= 0.0 else (most - used) / most


def _beyond(least, reached):
    """Return how far a lower limit is exceeded, as a part of it."""
    return None if least is None or reached is None else (reached - least) / least


def marked(some):
    """Return listed sets with those marked that no other beats.

    Parameters
    ----------
    some : sequence of Better
        Listed sets. [mixed]

    Returns
    -------
    some : list of Better
        In the same order, ``on_front`` set.
    """
    return [
        replace(one, on_front=bool(on)) for one, on in zip(some, front([_judged_by(one) for one in some]), strict=True)
    ]


def _judged_by(one):
    """Return blind share, decoding, time used and blind share with one PRF lost, all better when lower."""
    reach = np.inf if one.decode_m is None else one.decode_m
    worth = -one.dip_db if one.dip_db is not None else round(one.excess_over_floor, 12)
    return worth, -reach, round(one.time_s, 12), round(1.0 - one.share_if_one_lost, 12)
