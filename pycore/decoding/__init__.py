"""How far a set of PRFs decodes: the separations in range and in speed that it can tell from nothing.

PRIs are whole counts of the timing clock, bandwidths and carriers the decimals
that were typed, and everything here is in exact fractions of them. Range is
handled as delay in clock counts (its blur: :mod:`pycore.decoding.blur`). A span is a *separation* of two hypotheses
about one target; two targets can make ghosts at any range. For speeds it is
twice what a figure of ± so many metres per second says.
"""

import math
from dataclasses import dataclass
from fractions import Fraction

from pycore.congruence import exact_span
from pycore.decoding.blur import LIGHT_M_S, typed_decimal
from pycore.decoding.sweep import first_confusion

SWEPT_AT_LEAST_M = 3_000_000
"""The sweep in range goes at least so far. [m]"""
SWEPT_TIMES_WANTED = 20
"""The sweep goes at least so many times as far as is wanted. [unitless]"""


@dataclass(frozen=True, slots=True)
class DecodeSpan:
    """How far a set decodes on one axis.

    Parameters
    ----------
    blurred : float or None
        Span with blur; None where nothing was confused up to ``swept_to``, 0 where the set cannot decode at all.
        [m or m/s]
    exact : float
        Span without any error. [m or m/s]
    swept_to : float
        Where the sweep ended. [m or m/s]
    """

    blurred: float | None
    exact: float
    swept_to: float


def blind_speeds(pri_counts, clock_hz, carrier_hz):
    """Return the speeds that each PRF takes for standing still, λ/(2T), as exact fractions.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        PRIs. [clock counts]
    clock_hz : int or Fraction
        Timing clock. [Hz]
    carrier_hz : sequence of int, float or Fraction, length N
        Carrier of each PRF, as typed. [Hz]

    Returns
    -------
    blind_speeds : tuple of Fraction, length N
        First blind speeds. [m/s]
    """
    per_count = LIGHT_M_S * typed_decimal(clock_hz) / 2
    pairs = zip(pri_counts, carrier_hz, strict=True)
    return tuple(per_count / (typed_decimal(carrier) * int(pri)) for pri, carrier in pairs)


def blurred_span(periods, half_widths, m, limit):
    """Return the span with blur, which where there is no blur at all is the exact span.

    Parameters
    ----------
    periods : sequence of int or Fraction, length N
        PRIs or blind speeds. [any]
    half_widths : sequence of int or Fraction, length N
        Blur of each; all 0 or all above 0. [same as periods]
    m : int
        How many PRFs must see the target. [unitless]
    limit : int or Fraction
        Where the sweep ends. [same as periods]

    Returns
    -------
    span : Fraction or None
        See :func:`pycore.decoding.sweep.first_confusion`.
    """
    if not any(half_widths):
        span = exact_span(periods, m)
        return span if span <= limit else None
    return first_confusion(periods, half_widths, m, limit)


def range_span(pri_counts, clock_hz, m, half_widths, range_max_m):
    """Return how far in range a set decodes.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        PRIs. [clock counts]
    clock_hz : int or Fraction
        Timing clock. [Hz]
    m : int
        How many PRFs must see the target. [unitless]
    half_widths : sequence of Fraction, length N
        From :func:`range_half_widths`. [clock counts]
    range_max_m : int, float or Fraction
        Range that is wanted; settles how far the sweep goes. [m]

    Returns
    -------
    span : DecodeSpan
        In range. [m]
    """
    pri_counts = [int(pri) for pri in pri_counts]
    m_per_count = LIGHT_M_S / (2 * typed_decimal(clock_hz))
    swept_to_m = max(Fraction(SWEPT_AT_LEAST_M), SWEPT_TIMES_WANTED * typed_decimal(range_max_m))
    found = blurred_span(pri_counts, half_widths, m, swept_to_m / m_per_count)
    return _in_unit(found, exact_span(pri_counts, m), m_per_count, swept_to_m)


def speed_span(pri_counts, clock_hz, carrier_hz, pulses, blur_gates, m, speed_span_m_s):
    """Return how far in speed a set decodes.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        PRIs. [clock counts]
    clock_hz : int or Fraction
        Timing clock. [Hz]
    carrier_hz : sequence of int, float or Fraction, length N
        Carrier of each PRF, as typed. [Hz]
    pulses : sequence of int, length N
        Pulses that count, on each PRF; one Doppler filter is λ/(2nT) wide. [unitless]
    blur_gates : int, float or Fraction
        Blur. [filters]
    m : int
        How many PRFs must see the target. [unitless]
    speed_span_m_s : int, float or Fraction
        Width of the speeds that are wanted; the sweep goes to 20 times that. [m/s]

    Returns
    -------
    span : DecodeSpan
        In speed. [m/s]
    """
    # Speeds are counted in the speed that turns one clock count at the carriers' common measure: 1/(f_i T_i) remains.
    carriers = [typed_decimal(carrier) for carrier in carrier_hz]
    measure_hz = Fraction(math.gcd(*(f.numerator for f in carriers)), math.lcm(*(f.denominator for f in carriers)))
    m_s_per_unit = LIGHT_M_S * typed_decimal(clock_hz) / (2 * measure_hz)
    periods = [1 / (f / measure_hz * int(pri)) for f, pri in zip(carriers, pri_counts, strict=True)]
    half_widths = [typed_decimal(blur_gates) * period / int(n) for period, n in zip(periods, pulses, strict=True)]
    swept_to_m_s = SWEPT_TIMES_WANTED * typed_decimal(speed_span_m_s)
    found = blurred_span(periods, half_widths, m, swept_to_m_s / m_s_per_unit)
    return _in_unit(found, exact_span(periods, m), m_s_per_unit, swept_to_m_s)


def _in_unit(found, exact, unit, swept_to):
    """Return a span in metres or metres per second."""
    return DecodeSpan(None if found is None else float(found * unit), float(exact * unit), float(swept_to))
