"""Blind speeds: of constant PRFs by their notches, and of a stagger by its response.

With a constant PRF a target is blind where its speed lies within the notch of a
whole multiple of the first blind speed; at equality it is clear. A stagger is
clear where the response of its canceller, averaged over the phases of the
cycle, is at least a given value.
"""

from dataclasses import dataclass
from fractions import Fraction

import numpy as np

from pycore.combs import Comb, repeated
from pycore.crossings import clear_speeds, deepest_dip, first_fall, first_notch, first_peak
from pycore.patterns import sweep
from pycore.response import Response, binomial_weights, repeat_counts, staggered_response
from pycore.spans import Spans

_MOST_COSINES = 4_000_000
_SUM_OF_NOTHING = 1e-12  # of the weights' sizes: what decimals that add up to 0 may leave in floating point


@dataclass(frozen=True, slots=True)
class Stagger:
    """What a stagger gives over the wanted speeds.

    Parameters
    ----------
    response : Response
        The response itself. [unitless]
    clear_speeds : Spans
        Wanted speeds at which it is at least the least response. [m/s]
    notch_m_s : float
        How far the notch around zero reaches; ``inf`` where the response nowhere reaches the least. [m/s]
    first_below_m_s : float or None
        First speed above that notch at which it falls below the least response; ``None`` where it never does. [m/s]
    true_first_blind_m_s : float
        Where the response repeats: the true first blind speed, where the weights reject what stands still. [m/s]
    is_blind : bool
        Whether the weights add up to 0, so that this is a blind speed. [unitless]
    ratio_to_mean : float
        The same over the first blind speed of the mean PRI; an exact fraction, rounded once. [unitless]
    deepest_db, deepest_at_m_s : float or None
        Deepest dip beyond the rise out of the notch, and the lowest wanted speed where it occurs. [dB, m/s]
    share_above : float
        Part of the wanted speeds at which the response is at least the least. [unitless]
    searched_to_m_s : float
        How far the first fall was looked for: all speeds, up to where the response repeats, or as far as four
        million cosines reach, but never less than the wanted speeds. [m/s]
    """

    response: Response
    clear_speeds: Spans
    notch_m_s: float
    first_below_m_s: float | None
    true_first_blind_m_s: float
    is_blind: bool
    ratio_to_mean: float
    deepest_db: float | None
    deepest_at_m_s: float | None
    share_above: float
    searched_to_m_s: float


def notch_comb(blind_speed_m_s, notch_m_s):
    """Return the clear speeds of each constant PRF as one interval that repeats with its blind speed.

    Parameters
    ----------
    blind_speed_m_s : float array, shape N
        First blind speeds. [m/s]
    notch_m_s : float array, shape N
        Half widths of the notches; half a blind speed or more leaves nothing. [m/s]

    Returns
    -------
    speeds : Comb
        From one notch to the next. [m/s]
    """
    return Comb(notch_m_s, blind_speed_m_s - notch_m_s, blind_speed_m_s)


def notch_clear_speeds(blind_speed_m_s, notch_m_s, speed_m_s):
    """Return the radial speeds at which each constant PRF is clear.

    Parameters
    ----------
    blind_speed_m_s : float array, shape N
        First blind speeds. [m/s]
    notch_m_s : float array, shape N
        Half widths of the notches; half a blind speed or more leaves nothing. [m/s]
    speed_m_s : pair of float
        Limits of the speed axis. [m/s]

    Returns
    -------
    speeds : Spans
        Exact edges, cut to the axis. [m/s]
    """
    comb = notch_comb(blind_speed_m_s, notch_m_s)
    return repeated(comb.start, comb.stop, comb.period, speed_m_s)


def wanted_magnitudes(speed_m_s):
    """Return the magnitudes that an interval of radial speeds takes.

    Parameters
    ----------
    speed_m_s : pair of float
        Limits of the speed axis. [m/s]

    Returns
    -------
    low, high : float
        Least and largest magnitude. [m/s]
    """
    low, high = speed_m_s
    ends = sorted((abs(low), abs(high)))
    return (0.0 if low <= 0 <= high else ends[0]), ends[1]


def first_blind_interval(blind_speed_m_s, notch_m_s, m, speed_m_s):
    """Return the first interval of speeds, above the notch around zero, on which fewer than M PRFs are clear.

    Parameters
    ----------
    blind_speed_m_s : float array, shape N
        First blind speeds. [m/s]
    notch_m_s : float array, shape N
        Half widths of the notches. [m/s]
    m : int
        Number of PRFs that must be clear. [unitless]
    speed_m_s : pair of float
        Limits of the wanted speeds; magnitudes are what counts. [m/s]

    Returns
    -------
    interval : (float, float) or None
        Its ends, cut to the wanted speeds; ``None`` where there is none. [m/s]
    """
    low, high = wanted_magnitudes(speed_m_s)
    notch = float(np.sort(notch_m_s)[m - 1])
    if not high > 0:
        return None
    swept = sweep(notch_clear_speeds(blind_speed_m_s, notch_m_s, (0.0, high)), (0.0, high))
    blind = np.bitwise_count(swept.pattern) < m
    first = np.flatnonzero(blind & ~np.append(False, blind[:-1]))
    last = np.flatnonzero(blind & ~np.append(blind[1:], False))
    for start, stop in zip(swept.edges[first].tolist(), swept.edges[last + 1].tolist(), strict=True):
        # The interval that starts at rest is the notch around zero, even where other notches join it.
        if stop > max(low, notch) and (start > 0 or notch == 0):
            return max(start, low), stop
    return None


def staggered(pri_counts, clock_hz, delays, weights, wavelength_m, least_db, speed_m_s):
    """Return what a stagger gives over the wanted speeds.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        Intervals of the cycle in sending order. [clock counts]
    clock_hz : float
        Timing clock. [Hz]
    delays : int
        Delays of a binomial canceller, 1 to 3; not used where weights are given. [unitless]
    weights : sequence of float or None
        User weights instead. [unitless]
    wavelength_m : float
        Wavelength. [m]
    least_db : float
        Response from which on a speed counts as clear. [dB]
    speed_m_s : pair of float
        Limits of the wanted speeds. [m/s]

    Returns
    -------
    stagger : Stagger
        Response, notch, first fall, true first blind speed, deepest dip, share above.
    """
    used = binomial_weights(delays) if weights is None else weights
    response = staggered_response(pri_counts, clock_hz, used, wavelength_m)
    repeat = repeat_counts(pri_counts, weights)
    true_first = wavelength_m * float(clock_hz) / (2.0 * repeat)
    searched = max(wanted_magnitudes(speed_m_s)[1], _MOST_COSINES / response.counts.size * response.step_m_s)
    notch = first_notch(response, least_db, searched)
    below = first_fall(response, least_db, notch, searched) if np.isfinite(notch) else np.inf
    clear = clear_speeds(response, least_db, speed_m_s)
    depth, at = _dip(response, notch, true_first, speed_m_s)
    return Stagger(
        response,
        clear,
        float(notch),
        float(below) if np.isfinite(below) else None,
        true_first,
        abs(sum(used)) <= _SUM_OF_NOTHING * sum(abs(weight) for weight in used),
        float(Fraction(sum(int(count) for count in pri_counts), len(pri_counts) * repeat)),
        depth,
        at,
        float((clear.stop - clear.start).sum() / (speed_m_s[1] - speed_m_s[0])),
        float(min(searched, true_first)),
    )


def _dip(response, notch_m_s, true_first_m_s, speed_m_s):
    """Return the deepest dip among the wanted magnitudes: beyond the rise out of the notch, short of its image."""
    low, high = wanted_magnitudes(speed_m_s)
    if not np.isfinite(notch_m_s):
        return None, None
    risen = first_peak(response, notch_m_s, true_first_m_s)
    depth, at = deepest_dip(response, max(low, risen), min(high, true_first_m_s - risen))
    return (None, None) if np.isnan(depth) else (depth, at)
