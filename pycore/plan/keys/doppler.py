"""Keys of the notch, the Doppler filters, and the canceller of a stagger."""

from pycore.plan.keys.key import DOPPLER, choice, count, number, numbers, under

# A table reads best as one: name and label, what it does, unit and limits.
# fmt: off
KEYS = under(
    DOPPLER,
    number('doppler.notch_mps', 'notch', 'Notch',
        'Echoes slower than this, about every multiple of the blind speed, are rejected.',
        'm/s', 'speed', (0.0, 20_000.0), default=6, per_prf=True),
    choice('doppler.window', 'window', 'Window',
        'Weighting of the pulses of a CPI ahead of the Doppler filters.',
        ('rectangular', 'hann', 'hamming', 'blackman', 'chebyshev', 'taylor'), default='hamming',
        words=('rectangular window', 'Hann window', 'Hamming window', 'Blackman window', 'Dolph-Chebyshev window',
            'Taylor window')),
    number('doppler.sidelobe_db', 'sidelobes', 'Sidelobe level',
        'How far below the main lobe the Chebyshev and Taylor windows keep their sidelobes.',
        'dB', 'level', (5.0, 150.0), default=40),
    count('doppler.delays', 'delays', 'Delays',
        'Delays of the binomial canceller of a stagger.',
        '', 'count', (1, 3), default=2),
    numbers('doppler.weights', 'weights', 'Weights',
        'Weights of successive pulses, used for a stagger instead of a binomial canceller.',
        '', 'plain', (-1_000_000.0, 1e6), start=[1.0, -2.0, 1.0], nullable=True),
    number('doppler.response_min_db', 'response', 'Least response',
        'Response of the canceller, against its mean over all speeds, from which on a speed counts as clear.',
        'dB', 'level', (-200.0, 20.0), default=-10),
)
# fmt: on
"""In the order of the page and of a link."""
