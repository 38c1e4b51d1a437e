"""The limits of a search as keys: label, unit, ends and step of each, as the plan's own keys have them.

Their values are those of :data:`pycore.finder.plan.ASKED`; one that is not given comes from the plan.
"""

from dataclasses import asdict

from pycore.plan.keys.key import choice, count, interval, number, numbers

GRIDS = ('clock', 'gates', 'steps')
"""What PRIs may be whole numbers of: counts of the clock, range gates, steps of one's own. [unitless]"""

DECODE = ('blur', 'exact', 'none')
"""How decoding is judged. [unitless]"""

# A table reads best as one: name and label, what it does, unit and limits.
# fmt: off
KEYS = (
    count('find.n', '', 'Number of PRFs', 'How many PRIs a set has.', '', 'count', (1, 16)),
    count('find.m', '', 'PRFs that must see a target', 'The M of M of N.', '', 'count', (1, 16)),
    interval('find.pri_us', '', 'Interval of PRIs', 'Where PRIs are looked for, ends included.',
        'µs', 'pri', (0.1, 1e6), step=1.0),
    choice('find.grid', '', 'PRIs are whole', 'Clock counts, range gates, or steps of your own.', GRIDS, 'clock'),
    number('find.step_us', '', 'Step of PRIs', 'PRIs are the shortest plus whole steps of this.',
        'µs', 'time', (1e-4, 1e5), start=1.0, nullable=True),
    numbers('find.keep_us', '', 'PRIs to keep', 'They stay in every set.', 'µs', 'pri', (0.1, 1e6), nullable=True),
    numbers('find.avoid_us', '', 'PRIs to avoid', 'Intervals in which no PRI may lie, such as 800 to 820.',
        'µs', 'pri', (0.1, 1e6), nullable=True),
    number('find.apart_us', '', 'Least difference', 'Any two PRIs of a set differ by at least this.',
        'µs', 'time', (0.0, 1e5), step=0.1),
    choice('find.decode', '', 'Decoding', 'Held against the coverage with the decoder’s blur, exactly, or not at all.',
        DECODE, 'blur'),
    number('find.hole_km', '', 'Longest hole', 'A hole longer than this and wider than the other is not tolerated.',
        'km', 'range', (0.0, 1e5), start=5.0, nullable=True),
    number('find.hole_mps', '', 'Widest hole', 'A hole wider than this and longer than the other is not tolerated.',
        'm/s', 'speed', (0.0, 1e5), start=10.0, nullable=True),
    number('find.cpi_ms', '', 'Time of a CPI', 'As many pulses as fit are sent, instead of the plan’s number.',
        'ms', 'dwell', (1e-3, 1e5), start=8.0, nullable=True, step=0.1),
    number('find.time_ms', '', 'Time on target', 'All CPIs with their fill pulses must fit into it.',
        'ms', 'dwell', (1e-3, 1e6), start=20.0, nullable=True, step=0.1),
    number('find.spread', '', 'Longest to shortest PRI', 'Largest ratio of the two within a stagger.',
        '', 'plain', (1.0, 100.0), step=0.05),
    interval('find.mean_us', '', 'Mean PRI', 'Between which ends the mean PRI of a stagger lies.',
        'µs', 'pri', (0.1, 1e6), step=1.0),
)
# fmt: on
"""In the order of the sentence."""

BY_PATH = {key.path: key for key in KEYS}
"""The same by their paths."""


def table():
    """Return the keys as plain records, for the page.

    Returns
    -------
    keys : list of dict
        One for each key.
    """
    return [{name: value for name, value in asdict(key).items() if value not in (None, '')} for key in KEYS]
