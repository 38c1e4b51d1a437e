"""What blurs a decoder: gates that do not line up, and a target that moves between its CPIs.

Everything is in exact fractions of clock counts, of the decimals that were typed.
"""

from fractions import Fraction

from pycore.constants import SPEED_OF_LIGHT_M_S

LIGHT_M_S = Fraction(int(SPEED_OF_LIGHT_M_S))
"""Speed of light as an exact fraction. [m/s]"""


def typed_decimal(value):
    """Return a number as the decimal that was typed, in an exact fraction.

    Parameters
    ----------
    value : int, float or Fraction
        Integers and fractions pass unchanged; a float becomes the decimal of 15 significant digits nearest to it,
        which undoes the one rounding of a change of unit. [any]

    Returns
    -------
    value : Fraction
        The decimal. [same]
    """
    return Fraction(f'{value:.15g}') if isinstance(value, float) else Fraction(value)


def gate_counts(clock_hz, bandwidth_hz):
    """Return the length of one range gate, 1/B, in clock counts.

    Parameters
    ----------
    clock_hz : int or Fraction
        Timing clock. [Hz]
    bandwidth_hz : sequence of int, float or Fraction, length N
        Bandwidth of each PRF's pulse. [Hz]

    Returns
    -------
    gates : tuple of Fraction, length N
        One gate in delay. [clock counts]
    """
    return tuple(typed_decimal(clock_hz) / typed_decimal(bandwidth) for bandwidth in bandwidth_hz)


def default_blur(pri_counts, gates):
    """Return the blur that holds unless one is given: half a gate where every PRI is whole gates, otherwise one.

    Derived here: the gates of each PRF start afresh with its pulses. Where every PRI is a whole number of gates all
    gates line up, an echo has one and the same gate number after unfolding, and the nearest other number is a whole
    gate away: only separations within half a gate of a multiple of every PRI are taken for it. Where the gates do not
    line up, each PRF says no more than which of its own gates, and two echoes up to one gate apart can share it.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        PRIs. [clock counts]
    gates : sequence of Fraction, length N
        One gate of each PRF. [clock counts]

    Returns
    -------
    blur_gates : Fraction
        1/2 or 1. [gates]
    """
    whole = all((int(pri) / gate).denominator == 1 for pri, gate in zip(pri_counts, gates, strict=True))
    return Fraction(1, 2) if whole else Fraction(1)


def motion_counts(pri_counts, pulses, fill_pulses, speed_max_m_s):
    """Return the delay that a target's echo moves by from the first CPI to the last.

    Parameters
    ----------
    pri_counts : sequence of int, length N
        PRIs in sending order. [clock counts]
    pulses : sequence of int, length N
        Pulses that count, on each PRF. [unitless]
    fill_pulses : sequence of int, length N
        Fill pulses ahead of them. [unitless]
    speed_max_m_s : int, float or Fraction
        Largest speed, either sign. [m/s]

    Returns
    -------
    motion : Fraction
        2 v/c times the time from the start of the first CPI to the start of the last. [clock counts]
    """
    cpis = list(zip(pri_counts, pulses, fill_pulses, strict=True))
    between = sum(int(pri) * (int(n) + int(fill)) for pri, n, fill in cpis[:-1])
    return 2 * abs(typed_decimal(speed_max_m_s)) * between / LIGHT_M_S


def range_half_widths(blur_gates, gates, motion=Fraction(0)):
    """Return how far from a multiple of its PRI each PRF still takes an echo for another.

    Parameters
    ----------
    blur_gates : int, float or Fraction
        Blur. [gates]
    gates : sequence of Fraction, length N
        One gate of each PRF. [clock counts]
    motion : Fraction
        Allowance for a moving target. [clock counts]

    Returns
    -------
    half_widths : tuple of Fraction, length N
        In delay. [clock counts]
    """
    return tuple(typed_decimal(blur_gates) * gate + motion for gate in gates)
