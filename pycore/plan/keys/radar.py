"""Keys of what is sent and when the receiver listens."""

from pycore.plan.keys.key import SENT, choice, number, under

# A table reads best as one: name and label, what it does, unit and limits.
# fmt: off
KEYS = under(
    SENT,
    number('radar.carrier_ghz', 'carrier', 'Carrier',
        'Carrier frequency; one for all PRFs, or one for each.',
        'GHz', 'frequency', (0.003, 300.0), default=2.8, per_prf=True, step=0.01),
    number('radar.pulse_us', 'pulse', 'Pulse length',
        'Length of the transmitted pulse; shorter than the PRI it is sent at.',
        'µs', 'time', (0.01, 10_000.0), default=1, per_prf=True, step=0.1, decimals=1),
    number('radar.bandwidth_mhz', 'bandwidth', 'Bandwidth',
        'Bandwidth of the pulse; a range gate is one over it, in delay.',
        'MHz', 'frequency', (0.0001, 10_000.0), default=1, per_prf=True, step=0.1),
    number('radar.recovery_us', 'recovery', 'Recovery',
        'Time that the receiver stays shut after a pulse.',
        'µs', 'time', (0.0, 1e6), default=1, step=0.1, decimals=1),
    number('radar.guard_us', 'guard', 'Guard',
        'Time that the receiver is shut ahead of the next pulse.',
        'µs', 'time', (0.0, 1e6), default=0, step=0.1),
    number('radar.near_pulse.pulse_us', 'near-pulse', 'Near pulse length',
        'Length of the second, short pulse that serves the near ranges.',
        'µs', 'time', (0.01, 10_000.0), default=1, step=0.1, decimals=1),
    number('radar.near_pulse.bandwidth_mhz', 'near-bandwidth', 'Near pulse bandwidth',
        'Bandwidth of the short pulse.',
        'MHz', 'frequency', (0.0001, 10_000.0), default=1, step=0.1),
    number('radar.near_pulse.sent_at_us', 'near-at', 'Near pulse sent at',
        'When the short pulse starts, after the start of the long one and not before that and the guard are over.',
        'µs', 'time', (0.0, 1e6), default=70, step=0.1),
    number('radar.near_pulse.to_km', 'near-to', 'Near pulse serves up to',
        'Ranges up to here are seen with the short pulse, those beyond with the long one.',
        'km', 'range', (0.0, 100_000.0), default=10),
    choice('radar.eclipsing_loss', 'eclipsing', 'Eclipsing loss',
        'Whole: the filter spans the whole pulse, whatever comes in of it. Part: only what comes in is integrated.',
        ('whole', 'part'), default='whole',
        words=('filter over the whole pulse', 'only what comes in of a pulse is integrated')),
    number('radar.clock_mhz', 'clock', 'Timing clock',
        'Clock that times the pulses; every PRI is a whole number of its counts.',
        'MHz', 'frequency', (0.001, 10_000.0), default=10),
    number('radar.beamwidth_deg', 'beamwidth', 'Beamwidth',
        'One-way 3 dB beamwidth in the plane of the scan; with the turns it gives the time on target.',
        '°', 'angle', (0.001, 360.0), default=1.4, step=0.1),
    number('radar.scan_rpm', 'scan', 'Antenna turns',
        'Turns of the antenna in a minute; none where it does not turn.',
        'rpm', 'turns', (0.001, 1000.0), default=12, nullable=True),
    number('radar.dwell_ms', 'dwell', 'Given dwell',
        'Time on target, where it does not follow from beamwidth and turns.',
        'ms', 'dwell', (0.001, 1e7), start=20.0, nullable=True),
)
# fmt: on
"""In the order of the page and of a link."""
