"""Keys of the coverage, of the regions that matter more than the rest, and of a crossing track."""

from pycore.plan.keys.key import MUST_SEE, interval, number, text, under

# A table reads best as one: name and label, what it does, unit and limits.
# fmt: off
KEYS = under(
    MUST_SEE,
    interval('coverage.range_km', 'see-range', 'Range',
        'Ranges from and to which targets must be seen.',
        'km', 'range', (0.0, 100_000.0), default=[2, 110]),
    interval('coverage.speed_mps', 'see-speed', 'Radial speed',
        'Radial speeds from and to which targets must be seen; closing is positive.',
        'm/s', 'speed', (-20_000.0, 20_000.0), default=[0, 300]),
    text('must_see[].name', 'name', 'Region name',
        'What this region is called in its finding.',
        40, default=''),
    interval('must_see[].range_km', 'range', 'Region range',
        'Ranges of a region that matters more than the rest.',
        'km', 'range', (0.0, 100_000.0), default=[4, 30]),
    interval('must_see[].speed_mps', 'speed', 'Region speed',
        'Radial speeds of that region; closing is positive.',
        'm/s', 'speed', (-20_000.0, 20_000.0), default=[40, 110]),
    number('must_see[].visible_pct', 'visible', 'Region seen, at least',
        'Share of the region that must be seen; none to report it only.',
        '%', 'percent', (0.0, 100.0), default=100, nullable=True),
    number('crossing.speed_mps', 'crossing-speed', 'Crossing speed',
        'Speed of a target that crosses on a straight track.',
        'm/s', 'speed', (0.01, 20_000.0), default=80),
    number('crossing.at_km', 'crossing-at', 'Crossing distance',
        'Distance at which that track passes the radar.',
        'km', 'range', (0.001, 100_000.0), default=20),
)
# fmt: on
"""In the order of the page and of a link."""
