"""Letter bands of radar carriers."""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Band:
    """One letter band.

    Parameters
    ----------
    name : str
        Its letter or letters. [unitless]
    low_hz, high_hz : float
        Edges; a carrier on an edge is counted to the band above it. [Hz]
    """

    name: str
    low_hz: float
    high_hz: float


_NAMES = ('HF', 'VHF', 'UHF', 'L', 'S', 'C', 'X', 'Ku', 'K', 'Ka', 'V', 'W', 'mm')
_EDGES_GHZ = (0.003, 0.03, 0.3, 1.0, 2.0, 4.0, 8.0, 12.0, 18.0, 27.0, 40.0, 75.0, 110.0, 300.0)

BANDS = tuple(
    Band(name, low * 1e9, high * 1e9) for name, low, high in zip(_NAMES, _EDGES_GHZ, _EDGES_GHZ[1:], strict=True)
)
"""Bands without gaps, in rising order (IEEE Std 521-2002, tables 1 and 2, as transcribed on a public page)."""


def band(carrier_hz):
    """Return the letters of the band that a carrier lies in.

    Parameters
    ----------
    carrier_hz : float
        Carrier frequency. [Hz]

    Returns
    -------
    name : str or None
        ``None`` below 3 MHz and above 300 GHz. The standard leaves open which band an edge belongs to; here it is
        the one above, and 300 GHz closes the last.

    References
    ----------
    IEEE Std 521-2002, *Letter Designations for Radar-Frequency Bands*, tables 1 and 2 (secondary transcription).
    """
    if carrier_hz == BANDS[-1].high_hz:
        return BANDS[-1].name
    return next((one.name for one in BANDS if one.low_hz <= carrier_hz < one.high_hz), None)
