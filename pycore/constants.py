"""Constants of nature that the computation uses, in SI units."""

SPEED_OF_LIGHT_M_S = 299_792_458.0
"""Speed of light in vacuum, exact by the definition of the metre. [m/s]"""

BOLTZMANN_J_K = 1.380649e-23
"""Boltzmann constant, exact by the definition of the kelvin. [J/K]"""

REFERENCE_TEMPERATURE_K = 290.0
"""Temperature to which noise figures are referred (IEEE definition; common practice). [K]"""
