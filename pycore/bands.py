"""Radar bands by their letters.

Edges: IEEE Std 521-2002, *Standard Letter Designations for Radar-Frequency Bands*,
tables 1 and 2, read in a public transcription. The standard does not say which
letter an edge itself belongs to; here the upper band has it (8 GHz is X), and
300 GHz closes the last.
"""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Band:
    """One band.

    Parameters
    ----------
    name : str
        Its letter or letters. [unitless]
    low_hz, high_hz : float
        Nominal edges; the lower one is in it. [Hz]
    """

    name: str
    low_hz: float
    high_hz: float


_EDGES_GHZ = (
    ('HF', 0.003, 0.03),
    ('VHF', 0.03, 0.3),
    ('UHF', 0.3, 1.0),
    ('L', 1.0, 2.0),
    ('S', 2.0, 4.0),
    ('C', 4.0, 8.0),
    ('X', 8.0, 12.0),
    ('Ku', 12.0, 18.0),
    ('K', 18.0, 27.0),
    ('Ka', 27.0, 40.0),
    ('V', 40.0, 75.0),
    ('W', 75.0, 110.0),
    ('mm', 110.0, 300.0),
)

BANDS = tuple(Band(name, low * 1e9, high * 1e9) for name, low, high in _EDGES_GHZ)
"""All bands, rising in frequency, without gaps."""


def band(frequency_hz):
    """Return the letter of the band that a frequency lies in.

    Parameters
    ----------
    frequency_hz : float
        A carrier. [Hz]

    Returns
    -------
    name : str or None
        Such as ``'S'``; None below 3 MHz and above 300 GHz.
    """
    if frequency_hz == BANDS[-1].high_hz:
        return BANDS[-1].name
    return next((one.name for one in BANDS if one.low_hz <= frequency_hz < one.high_hz), None)
