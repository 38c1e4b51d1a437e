"""Every key of a plan: limits, unit, label, help and default, written here and nowhere else.

The form, the link, the command line, the documentation and all error messages
read this table. Limits are those of physics, not of taste: a bad plan is
computed, and a finding says what follows. Limits without a source are our own,
wide enough for any radar from 3 MHz to 300 GHz.
"""

from dataclasses import asdict

from pycore.plan.keys import doppler, ground, head, judged, radar, seen, target, waveform
from pycore.plan.keys.key import DOPPLER, GROUND, JUDGED, MUST_SEE, SENT, TARGET, Key

__all__ = [
    'BY_PATH',
    'GROUPS',
    'JUDGED',
    'KEYS',
    'MOST_PATCHES',
    'MOST_PRIS',
    'MOST_REGIONS',
    'OPTIONAL_RECORDS',
    'Key',
]

GROUPS = (SENT, MUST_SEE, DOPPLER, GROUND, TARGET, JUDGED)
"""Headings of the table of quantities, in order; keys without one stand elsewhere on the page."""

MOST_PRIS = 16
MOST_PATCHES = 4
MOST_REGIONS = 4

KEYS = (
    *head.KEYS,
    *waveform.KEYS,
    *radar.KEYS,
    *seen.KEYS,
    *doppler.KEYS,
    *ground.KEYS,
    *target.KEYS,
    *judged.KEYS,
)
"""All keys, in the order of the page and of a link."""

BY_PATH = {key.path: key for key in KEYS}
"""The same by their paths."""

OPTIONAL_RECORDS = (
    'radar.near_pulse',
    'platform',
    'crossing',
    'surface',
    'target.radar_equation',
    'holds_over',
    'weather',
)
"""Records that are ``null`` unless they are given."""


def table():
    """Return the table of keys for the page and the documentation.

    Returns
    -------
    table : list of dict
        One for each key, ready for JSON.
    """
    rows = [asdict(key).items() for key in KEYS]
    return [{name: list(value) if isinstance(value, tuple) else value for name, value in row} for row in rows]
