"""Keys of the target that is followed through the page: no part of a plan, but typed and stepped as its numbers are."""

from pycore.plan.keys.key import number

RANGE = number(
    'followed.range_km',
    'target-range',
    'Range of the target',
    'True range of the target that is followed.',
    'km',
    'range',
    (0.0, 100_000.0),
)
"""True range. [km]"""

SPEED = number(
    'followed.speed_mps',
    'target-speed',
    'Radial speed of the target',
    'True radial speed of the target that is followed; closing is positive.',
    'm/s',
    'speed',
    (-20_000.0, 20_000.0),
)
"""True radial speed, positive closing. [m/s]"""

FOLLOWED = {key.name: key for key in (RANGE, SPEED)}
"""Both by the names that a view gives them."""
