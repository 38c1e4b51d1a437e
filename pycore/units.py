"""Units that may be typed and shown, by families; factors are exact."""

from fractions import Fraction

_K, _M, _G = 10**3, 10**6, 10**9
_FREQUENCY = {'Hz': Fraction(1), 'kHz': Fraction(_K), 'MHz': Fraction(_M), 'GHz': Fraction(_G)}
_TIME = {'ns': Fraction(1, _G), 'µs': Fraction(1, _M), 'ms': Fraction(1, _K), 's': Fraction(1)}

FAMILIES = {
    'frequency': _FREQUENCY,
    'time': _TIME,
    'pri': {**_TIME, **_FREQUENCY},
    'dwell': _TIME,
    'seconds': {**_TIME, 'min': Fraction(60)},
    'range': {'m': Fraction(1), 'km': Fraction(_K), 'nmi': Fraction(1852)},
    'speed': {'m/s': Fraction(1), 'km/h': Fraction(1000, 3600), 'kt': Fraction(1852, 3600)},
    'percent': {'%': Fraction(1)},
    'share': {'': Fraction(1), '%': Fraction(1, 100)},
    'level': {'dB': Fraction(1), 'dBi': Fraction(1)},
    'angle': {'°': Fraction(1)},
    'turns': {'rpm': Fraction(1)},
    'power': {'W': Fraction(1), 'kW': Fraction(_K), 'MW': Fraction(_M)},
    'area': {'m²': Fraction(1)},
    'gates': {'gates': Fraction(1)},
    'count': {'': Fraction(1)},
    'plain': {'': Fraction(1)},
}
"""For each family of units, what one of each is in the family's own base unit."""

SPELLINGS = {
    **{'us': 'µs', 'μs': 'µs', 'usec': 'µs', 'msec': 'ms', 'sec': 's', 'mps': 'm/s', 'kmh': 'km/h', 'kph': 'km/h'},
    **{'kn': 'kt', 'kts': 'kt', 'knots': 'kt', 'nm': 'nmi', 'deg': '°', 'm2': 'm²', 'gate': 'gates', 'pct': '%'},
    **{'k': 'kHz', 'M': 'MHz', 'G': 'GHz', '/min': 'rpm'},
}
"""Other ways of writing a unit; k, M and G alone are meant of hertz."""

ALONE = {'range': {'k': 'km'}, 'power': {'k': 'kW', 'M': 'MW'}}
"""What k and M alone are meant of in families without hertz."""


def unit_of(text, units):
    """Return the unit that a text means.

    Parameters
    ----------
    text : str
        As typed. [unitless]
    units : mapping
        Units of the family. [unitless]

    Returns
    -------
    unit : str or None
        ``None`` where it is not one of them.
    """
    text = text.strip()
    for candidate in (text, SPELLINGS.get(text), SPELLINGS.get(text.lower())):
        if candidate in units:
            return candidate
    folded = {name.lower(): name for name in units}
    return folded.get(text.lower())
