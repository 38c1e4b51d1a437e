"""How wide a notch should be, in its parts: surface, scanning, platform and filter."""

import math
from dataclasses import dataclass

from pycore.improvement import scanning_spread

_GAUSSIAN_BEAM_TWICE = 4.0 * math.sqrt(math.log(2.0))


@dataclass(frozen=True, slots=True)
class SuggestedNotch:
    """A notch that leaves no clutter above the noise, and what it is made of.

    Parameters
    ----------
    surface_m_s, scanning_m_s, platform_m_s : float
        Standard deviations of speed: of the surface itself, by the turning beam, by the radar's own motion. [m/s]
    spread_m_s : float
        Root of the sum of their squares. [m/s]
    reach : float
        Standard deviations out to which the clutter stands above the noise, √(2 ln CNR). [unitless]
    filter_m_s : float
        From a filter's centre to where it is down to its own sidelobe level. [m/s]
    half_width_m_s : float
        reach × spread + filter. [m/s]
    """

    surface_m_s: float
    scanning_m_s: float
    platform_m_s: float
    spread_m_s: float
    reach: float
    filter_m_s: float
    half_width_m_s: float


def platform_spread(speed_m_s, look_deg, beamwidth_deg):
    """Return the spread of speed that a radar's own motion gives to surface clutter.

    Parameters
    ----------
    speed_m_s : float
        Speed over ground. [m/s]
    look_deg : float
        Angle of the beam off the track. [deg]
    beamwidth_deg : float
        One-way 3 dB beamwidth in azimuth. [deg]

    Returns
    -------
    spread_m_s : float
        V |sin(look)| beamwidth/(4 √ln 2). [m/s]

    Notes
    -----
    Derived here: across a narrow beam the closing speed changes by V sin(look) for each radian, and a Gaussian beam
    seen both ways, 2^(-8u²) in one-way beamwidths u, has the standard deviation 1/(4 √ln 2).
    """
    across = abs(math.sin(math.radians(look_deg)))
    return speed_m_s * across * math.radians(beamwidth_deg) / _GAUSSIAN_BEAM_TWICE


def suggested_notch(cpi, lobe_edge_filters, clutter_to_noise, surface_m_s, time_on_target_s=None, platform_m_s=0.0):
    """Return the notch that one PRF's surface clutter asks for.

    Parameters
    ----------
    cpi : Cpi
        The PRF: interval, wavelength, pulses that count. [unitless]
    lobe_edge_filters : float
        From a filter's centre to where it is down to its sidelobe level (``filters.lobe_edge``). [filters]
    clutter_to_noise : float
        One-pulse power ratio of the strongest clutter; up to 1 the clutter asks for nothing. [unitless]
    surface_m_s : float
        Standard deviation of the surface's own speed. [m/s]
    time_on_target_s : float or None
        Time between the one-way half-power points of a turning beam; ``None`` for one that does not turn. [s]
    platform_m_s : float
        Of :func:`platform_spread`. [m/s]

    Returns
    -------
    notch : SuggestedNotch
        In its parts.

    Notes
    -----
    Derived here: a Gaussian line of power C above the noise is down to the noise at √(2 ln C) standard deviations.
    """
    scanning = 0.0 if time_on_target_s is None else scanning_spread(cpi.wavelength_m, time_on_target_s)
    spread = math.hypot(surface_m_s, scanning, platform_m_s)
    reach = math.sqrt(2.0 * math.log(max(clutter_to_noise, 1.0)))
    edge = lobe_edge_filters * cpi.blind_speed_m_s / cpi.pulses
    return SuggestedNotch(
        surface_m_s, float(scanning), platform_m_s, spread, reach, float(edge), reach * spread + float(edge)
    )
