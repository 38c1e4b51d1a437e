"""Where a thing is worst over an interval, and a plan on other carriers and at other rain speeds."""

from dataclasses import replace
from fractions import Fraction

from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.plan.keys import BY_PATH

POINTS = 65
"""Points that an interval is first looked at in. [unitless]"""
_FINER = (17, 3)
"""Points of each finer look between the neighbours of the worst, and how often it is repeated. [unitless]"""


def worst_over(at, over, order, own=None):
    """Return where a thing is worst over an interval, and what it is there: 65 points, and finer ones around it.

    Parameters
    ----------
    at : callable
        What the thing is at a point. [any]
    over : pair of float
        The interval. [any]
    order : callable
        A number, or several in order, that is the smaller the worse the thing is. [unitless]
    own : float or None
        A point that is looked at too. [same as the interval]

    Returns
    -------
    point : float
        Where it is worst. [same]
    worst : object
        What it is there.
    """
    low, high = over
    points = _points(low, high, POINTS)
    if own is not None and low <= own <= high:
        points = sorted({*points, own})
    for _ in range(_FINER[1] + 1):
        best = min(range(len(points)), key=lambda place: order(at(points[place])))
        worst = points[best]
        points = _points(points[max(best - 1, 0)], points[min(best + 1, len(points) - 1)], _FINER[0])
        points = sorted({*points, worst})
    return worst, at(worst)


def _points(low, high, count):
    """Return points as short decimals, so that a carrier stays one that can be typed."""
    return [float(f'{low + (high - low) * place / (count - 1):.9g}') for place in range(count)]


def on_carrier(plan, carrier_ghz):
    """Return a plan on another carrier; several carriers move together.

    Parameters
    ----------
    plan : Plan
        The plan. [unitless]
    carrier_ghz : float
        The first PRF's new carrier. [GHz]

    Returns
    -------
    plan : Plan
        All else as it was; a carrier never leaves its legal limits. [unitless]
    """
    key = BY_PATH['radar.carrier_ghz']
    limits = [Fraction(str(end)) * 10**9 for end in (key.lowest, key.highest)]
    by = Fraction(str(carrier_ghz)) * 10**9 - plan.carrier_exact_hz[0]
    exact = tuple(min(max(one + by, limits[0]), limits[1]) for one in plan.carrier_exact_hz)
    carrier = plan.carrier_hz.copy()
    carrier[:] = [float(one) for one in exact]
    return replace(plan, carrier_exact_hz=exact, carrier_hz=carrier, wavelength_m=SPEED_OF_LIGHT_M_S / carrier)


def with_rain_at(plan, speed_m_s):
    """Return a plan whose rain moves at another speed; several patches move together.

    Parameters
    ----------
    plan : Plan
        The plan, with rain. [unitless]
    speed_m_s : float
        The first patch's new mean speed, positive closing. [m/s]

    Returns
    -------
    plan : Plan
        All else as it was. [unitless]
    """
    by = speed_m_s - plan.patches[0].speed_m_s
    return replace(plan, patches=tuple(replace(patch, speed_m_s=patch.speed_m_s + by) for patch in plan.patches))
