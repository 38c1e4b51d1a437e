"""Keys of the PRIs: how many pulses on each, how many must see a target, how they are decoded."""

from pycore.plan.keys.key import SENT, choice, count, flag, number, numbers, under

# A table reads best as one: name and label, what it does, unit and limits.
# fmt: off
KEYS = under(
    SENT,
    choice('waveform.kind', 'kind', 'Kind',
        'Dwells: each PRI is a CPI of its own. Stagger: the PRIs follow each other pulse by pulse in one CPI.',
        ('dwells', 'stagger'), default='dwells'),
    numbers('waveform.pri_us', 'pri', 'PRI',
        'Time between successive pulse starts, one for each PRF; whole counts of the timing clock.',
        'µs', 'pri', (0.1, 1e6)),
    count('waveform.pulses', 'pulses', 'Pulses',
        'Pulses of a CPI that are processed; fill pulses come on top.',
        '', 'count', (1, 4096), default=16, per_prf=True),
    count('waveform.fill_pulses', 'fill', 'Fill pulses',
        'Pulses sent ahead of a CPI, so that far clutter is there before its first pulse counts.',
        '', 'count', (0, 4096), default=0, per_prf=True),
    count('waveform.detect_m', 'needs', 'PRFs that must see a target',
        'How many of the PRFs must be clear for a target to be declared: the M of M of N.',
        '', 'count', (1, 16), default=1),
    number('waveform.received_min', 'received', 'Least received share',
        'Part of the echo that must fall into the open receiver for a range to count as clear.',
        '', 'share', (0.0, 1.0), default=0.5, step=0.1),
    number('waveform.decode_blur_gates', 'blur', 'Blur of the decoder',
        'Error that decoding allows for, in gates; where none is given, half where every PRI is whole gates, else one.',
        'gates', 'gates', (0.0, 1000.0), start=1.0, nullable=True, step=0.5),
    flag('waveform.decode_motion', 'motion', 'Decoder allows for motion',
        'Adds to the blur what the fastest target moves by from the first CPI to the last.'),
)
# fmt: on
"""In the order of the page and of a link."""
