"""The timing clock: PRIs are whole counts of it, and what is said where one had to be rounded."""

from fractions import Fraction

from pycore.quantity import as_number
from pycore.shown import digits
from pycore.units import FAMILIES

MOST_COUNTS_OFF = Fraction(1, 10**6)
"""A PRI may stand so far off a whole count of the clock and be that count. [clock counts]"""


def on_clock(pri_us, clock_mhz, unit='µs'):
    """Return a PRI rounded to the nearest count of the clock, and the sentence that says so.

    Parameters
    ----------
    pri_us : int, float or Fraction
        PRI, in the decimals that were typed. [us]
    clock_mhz : int or float
        Timing clock. [MHz]
    unit : str
        Unit that it was typed in; a frequency is told again as a frequency. [unitless]

    Returns
    -------
    pri_us : int or float
        At least one count. [us]
    said : list of str
        One sentence where rounding changed what was typed; none where it is the count itself.
    """
    exact = pri_us if isinstance(pri_us, Fraction) else Fraction(str(pri_us))
    clock = Fraction(str(clock_mhz))
    count = max(1, round(exact * clock))
    rounded = as_number(Fraction(count) / clock)
    is_on_it = abs(exact * clock - count) <= MOST_COUNTS_OFF
    return rounded, [] if is_on_it else [_rounding(exact, unit, rounded, clock)]


def _rounding(pri_us, unit, rounded, clock):
    """Say what was typed, what it is in time, and what it became on the clock."""
    asked, became = f'{float(pri_us):.6g} µs', f'{float(rounded):.10g} µs'
    if unit in FAMILIES['frequency']:
        scale = float(FAMILIES['frequency'][unit])
        asked = f'{1e6 / float(pri_us) / scale:.10g} {unit} is {asked}'
        became = f'{became}, {1e6 / rounded / scale:.6g} {unit}'
    else:
        asked = f'{float(pri_us):.10g} µs is off the clock'
    return f'{asked}; on the {digits(as_number(clock))} MHz clock {became}.'
