"""Keys of the target that detection is worked out for."""

from pycore.plan.keys.key import TARGET, choice, number, under

# A table reads best as one: name and label, what it does, unit and limits.
# fmt: off
KEYS = under(
    TARGET,
    number('target.snr_db', 'snr', 'Signal-to-noise',
        'Ratio in one pulse at the range given, on the axis of the beam and not eclipsed.',
        'dB', 'level', (-200.0, 200.0), default=10, nullable=True),
    number('target.at_km', 'snr-at', 'Signal-to-noise given at',
        'Range at which the signal-to-noise ratio holds.',
        'km', 'range', (0.001, 100_000.0), default=60, nullable=True),
    number('target.at_pulse_us', 'snr-pulse', 'Signal-to-noise given for pulse',
        'Pulse length that the ratio was measured with; none for that of the first PRF.',
        'µs', 'time', (0.01, 10_000.0), start=1.0, nullable=True),
    number('target.radar_equation.peak_kw', 'peak', 'Peak power',
        'Peak power of the transmitter.',
        'kW', 'power', (1e-09, 1e6), default=20),
    number('target.radar_equation.gain_dbi', 'gain', 'Antenna gain',
        'Gain of the antenna, the same both ways.',
        'dBi', 'level', (-50.0, 100.0), default=34),
    number('target.radar_equation.rcs_m2', 'rcs', 'Radar cross-section',
        'Mean radar cross-section of the target.',
        'm²', 'area', (1e-09, 1e9), default=1),
    number('target.radar_equation.noise_figure_db', 'noise-figure', 'Noise figure',
        'Noise figure of the receiver, referred to 290 K.',
        'dB', 'level', (0.0, 100.0), default=3),
    number('target.radar_equation.losses_db', 'losses', 'Losses',
        'All losses that the note does not count itself.',
        'dB', 'level', (-20.0, 200.0), default=4),
    choice('target.fluctuation', 'fluctuation', 'Fluctuation',
        'How the strength of the target changes from CPI to CPI and from scan to scan.',
        ('steady', 'swerling1', 'swerling2', 'swerling3', 'swerling4'), default='swerling1',
        words=('steady target', 'Swerling case 1 target', 'Swerling case 2 target', 'Swerling case 3 target',
            'Swerling case 4 target')),
    number('target.pd_wanted', 'pd', 'Probability of detection',
        'Probability at which the detection range is quoted.',
        '', 'share', (0.001, 0.9999), default=0.8, step=0.01),
    number('target.false_alarm', 'pfa', 'False alarm probability',
        'Probability of a false alarm in one cell of range and speed, after M of N.',
        '', 'share', (1e-15, 0.5), default=1e-06),
    number('target.own_spread_mps', 'own-spread', 'Own spread',
        'How far lines of a rotor or propeller reach to either side of the body.',
        'm/s', 'speed', (0.0, 20_000.0), start=20.0, nullable=True),
)
# fmt: on
"""In the order of the page and of a link."""
