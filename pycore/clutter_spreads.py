"""What spread of speed to expect of clutter: values and a rule to choose a plan's numbers by.

All of it is from memory (Barlow 1949; Skolnik, *Introduction to Radar Systems*;
Nathanson, *Radar Design Principles*), and is nowhere used unless a plan says so.
"""

import math

from pycore.constants import SPEED_OF_LIGHT_M_S

SPREADS_M_S = {
    'sparsely wooded hills, calm': (0.017, 0.017),
    'heavily wooded hills, 20 mph of wind': (0.22, 0.22),
    'sea, windy': (0.89, 0.89),
    'rain': (1.8, 4.0),
    'chaff': (0.37, 1.1),
}
"""Lowest and highest usual standard deviation of speed by kind of clutter. [m/s]"""


def spread_of_decay(decay):
    """Return the spread of a spectrum that is printed as exp(-a (f/f0)²).

    Parameters
    ----------
    decay : float or array, shape S
        a, f the Doppler frequency and f0 the carrier. [unitless]

    Returns
    -------
    spread_m_s : float or array, shape S
        c/(2 √(2a)). Derived here: σ_f = f0/√(2a) and v = c f/(2 f0). [m/s]
    """
    return SPEED_OF_LIGHT_M_S / (2.0 * (2.0 * decay) ** 0.5)


def rain_spread(range_m, beamwidth_deg, shear_per_s=5.7e-3, turbulence_m_s=1.0, cross_wind_m_s=0.0, elevation_deg=0.0):
    """Return the spread of rain's speed from wind shear, turbulence, cross wind and fall.

    Parameters
    ----------
    range_m : float
        Range. [m]
    beamwidth_deg : float
        One-way half-power beamwidth, the same both ways across. [deg]
    shear_per_s : float
        Change of wind with height: 5.7 m/s per km along the wind, 4.0 in the mean over azimuth. [1/s]
    turbulence_m_s : float
        Spread by turbulence. [m/s]
    cross_wind_m_s : float
        Wind across the beam. [m/s]
    elevation_deg : float
        Elevation of the beam. [deg]

    Returns
    -------
    spread_m_s : float
        Root of the sum of squares; a beam's standard deviation is 1/√(8 ln 2) of its half-power width. [m/s]
    """
    sigma_rad = math.radians(beamwidth_deg) / math.sqrt(8.0 * math.log(2.0))
    shear_m_s = shear_per_s * range_m * sigma_rad
    fall_m_s = math.sin(math.radians(elevation_deg))
    return math.hypot(shear_m_s, turbulence_m_s, cross_wind_m_s * sigma_rad, fall_m_s)
