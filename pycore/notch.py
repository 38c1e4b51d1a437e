"""How wide the notch should be: what spreads the clutter, and what the Doppler filters need beyond it.

The spread that scanning adds is ``improvement.scanning_spread``.
"""

import math
from dataclasses import dataclass

import numpy as np


@dataclass(frozen=True, slots=True)
class SuggestedNotch:
    """A suggested half-width of the notch, in its parts; each is a number or one for each PRF.

    Parameters
    ----------
    surface_m_s : float or array, shape N
        Spread of the surface's own motion. [m/s]
    platform_m_s : float or array, shape N
        Spread that the platform's motion adds over the beam. [m/s]
    scanning_m_s : float or array, shape N
        Spread that the beam's scanning adds. [m/s]
    spread_m_s : float or array, shape N
        The three together, as a root of the sum of squares. [m/s]
    clutter_m_s : float or array, shape N
        How far from its middle the clutter stands above the noise. [m/s]
    filter_m_s : float or array, shape N
        From a filter's middle to where it is first down to its sidelobes. [m/s]
    notch_m_s : float or array, shape N
        Clutter part and filter part added: the suggestion. [m/s]
    """

    surface_m_s: np.ndarray
    platform_m_s: np.ndarray
    scanning_m_s: np.ndarray
    spread_m_s: np.ndarray
    clutter_m_s: np.ndarray
    filter_m_s: np.ndarray
    notch_m_s: np.ndarray


def platform_spread(speed_m_s, look_deg, beamwidth_deg):
    """Return the spread that a moving platform gives to clutter across the beam.

    Parameters
    ----------
    speed_m_s : float
        Speed of the platform. [m/s]
    look_deg : float
        Angle of the beam from the track. [deg]
    beamwidth_deg : float
        One-way 3 dB beamwidth. [deg]

    Returns
    -------
    spread_m_s : float
        V sin(look) · beamwidth/(4 √ln2). [m/s]

    Notes
    -----
    Derived here: across a narrow beam the radial speed changes by V sin(look) for each radian, and a Gaussian beam of
    one-way 3 dB width θ has, two ways, the standard deviation θ/(4 √ln2). Looking along the track leaves nothing in
    this approximation.
    """
    sideways = abs(speed_m_s * math.sin(math.radians(look_deg)))
    return sideways * math.radians(beamwidth_deg) / (4.0 * math.sqrt(math.log(2.0)))


def suggested_notch(clutter_to_noise, surface_m_s, platform_m_s, scanning_m_s, lobe_filters, filter_width_m_s):
    """Return a suggested half-width of the notch with its parts.

    Parameters
    ----------
    clutter_to_noise : float or array, shape N
        Power ratio; up to 1 the clutter needs no room of its own. [unitless]
    surface_m_s, platform_m_s, scanning_m_s : float or array, shape N
        Spreads of the surface itself, by the platform, by scanning. [m/s]
    lobe_filters : float or array, shape N
        Filters from a filter's middle to where its window is first down to its sidelobes. [unitless]
    filter_width_m_s : float or array, shape N
        Width of a filter. [m/s]

    Returns
    -------
    notch : SuggestedNotch
        σ √(2 ln CNR) + x λ/(2 n T).

    Notes
    -----
    Derived here: a Gaussian spectrum that is CNR above the noise at its middle has fallen to the noise at
    σ √(2 ln CNR).
    """
    spread = np.sqrt(np.square(surface_m_s) + np.square(platform_m_s) + np.square(scanning_m_s))
    clutter = spread * np.sqrt(2.0 * np.log(np.maximum(clutter_to_noise, 1.0)))
    filters = np.multiply(lobe_filters, filter_width_m_s)
    return SuggestedNotch(surface_m_s, platform_m_s, scanning_m_s, spread, clutter, filters, clutter + filters)
