"""Every key of a plan: limits, unit, label, help and default, written here and nowhere else.

The form, the link, the command line, the documentation and all error messages
read this table. Limits are those of physics, not of taste: a bad plan is
computed, and a finding says what follows. Limits without a source are our own,
wide enough for any radar from 3 MHz to 300 GHz.
"""

from dataclasses import asdict, dataclass

SENT = 'What is sent and when it listens'
MUST_SEE = 'What it must see'
DOPPLER = 'Doppler filters and notch'
GROUND = 'Ground and rain'
TARGET = 'The target used for detection'
JUDGED = 'What it is judged by'
GROUPS = (SENT, MUST_SEE, DOPPLER, GROUND, TARGET, JUDGED)
"""Headings of the table of quantities, in order; keys without one stand elsewhere on the page."""

MOST_PRIS = 16
MOST_PATCHES = 4
MOST_REGIONS = 4
WINDOWS = ('rectangular', 'hann', 'hamming', 'blackman', 'chebyshev', 'taylor')
FLUCTUATIONS = ('steady', 'swerling1', 'swerling2', 'swerling3', 'swerling4')


@dataclass(frozen=True, slots=True)
class Key:
    """One key of the plan.

    Parameters
    ----------
    path : str
        Dotted path in the document; ``[]`` stands for the elements of a list of records. [unitless]
    kind : str
        ``number``, ``count``, ``interval``, ``choice``, ``flag``, ``text`` or ``numbers``. [unitless]
    short : str
        Its name in a link. [unitless]
    label : str
        What it is called on the page and in messages. [unitless]
    help : str
        One sentence that says what it does. [unitless]
    unit : str
        Unit of the document, as shown; empty where it has none. [unitless]
    family : str
        Family of units that may be typed (:mod:`pycore.quantity`). [unitless]
    lowest, highest : float or None
        Limits, both allowed. [unit]
    default : object
        Value of an absent key. [unit]
    nullable : bool
        Whether ``null`` is allowed and means none. [unitless]
    per_prf : bool
        Whether it may be a list, one for each PRI. [unitless]
    step : float
        One step of an arrow key. [unit]
    decimals : int
        Fewest decimals shown. [unitless]
    group : str
        Heading it stands under. [unitless]
    choices : tuple of str
        What a choice may be. [unitless]
    longest : int
        Most characters of a text. [characters]
    """

    path: str
    kind: str
    short: str
    label: str
    help: str
    unit: str = ''
    family: str = ''
    lowest: float | None = None
    highest: float | None = None
    default: object = None
    nullable: bool = False
    per_prf: bool = False
    step: float = 1.0
    decimals: int = 0
    group: str = ''
    choices: tuple[str, ...] = ()
    longest: int = 0

    @property
    def record(self):
        """Path of the record that the key belongs to."""
        return self.path.rpartition('.')[0]

    @property
    def name(self):
        """Last part of the path."""
        return self.path.rpartition('.')[2]


def _rows(group, record, *rows):
    """Make the keys of one record; a row is (name, kind, short, label, help, unit, family, limits, more)."""
    keys = []
    for name, kind, short, label, help_text, unit, family, limits, more in rows:
        path = f'{record}.{name}' if record else name
        plain = {**more, 'default': _whole(more['default'])} if 'default' in more else more
        keys.append(Key(path, kind, short, label, help_text, unit, family, *limits, group=group, **plain))
    return tuple(keys)


def _whole(value):
    """Keep a whole number as an integer, as a plan does."""
    if isinstance(value, list):
        return [_whole(one) for one in value]
    return int(value) if isinstance(value, float) and value.is_integer() else value


_ANY = (None, None)
_TIME = (0.0, 1e6)
_PULSE = (0.01, 10_000.0)
_RANGE = (0.0, 100_000.0)
_SPEED = (-20_000.0, 20_000.0)
_MAGNITUDE = (0.0, 20_000.0)
_DB = (-200.0, 200.0)

_HEAD = _rows(
    '',
    '',
    (
        'title',
        'text',
        'title',
        'Title',
        'Stands at the head of the note.',
        '',
        '',
        _ANY,
        {'default': '', 'longest': 120},
    ),
    (
        'marking',
        'text',
        'marking',
        'Handling mark',
        'Printed at the head and foot of every page and picture.',
        '',
        '',
        _ANY,
        {'nullable': True, 'longest': 80},
    ),
    (
        'notes',
        'text',
        'notes',
        'Notes',
        'Anything that a reader of the note should know.',
        '',
        '',
        _ANY,
        {'nullable': True, 'longest': 4000},
    ),
    (
        'purpose',
        'choice',
        'purpose',
        'Purpose',
        'Whether the plan is judged by targets or by weather.',
        '',
        '',
        _ANY,
        {'default': 'targets', 'choices': ('targets', 'weather')},
    ),
    (
        'decided.by',
        'text',
        'by',
        'Decided by',
        'Who settled the plan.',
        '',
        '',
        _ANY,
        {'nullable': True, 'longest': 80},
    ),
    ('decided.on', 'text', 'on', 'Decided on', 'When it was settled.', '', '', _ANY, {'nullable': True, 'longest': 40}),
    (
        'decided.as',
        'text',
        'as',
        'Decided as',
        'What it was settled as.',
        '',
        '',
        _ANY,
        {'nullable': True, 'longest': 120},
    ),
)

_SENT = _rows(
    SENT,
    'radar',
    (
        'carrier_ghz',
        'number',
        'carrier',
        'Carrier',
        'Carrier frequency; one for all PRFs or one for each.',
        'GHz',
        'frequency',
        (0.003, 300.0),
        {'default': 2.8, 'per_prf': True, 'step': 0.01},
    ),
    (
        'pulse_us',
        'number',
        'pulse',
        'Pulse length',
        'Length of the transmitted pulse; it must be shorter than its PRI.',
        'µs',
        'time',
        _PULSE,
        {'default': 1.0, 'per_prf': True, 'step': 0.1, 'decimals': 1},
    ),
    (
        'bandwidth_mhz',
        'number',
        'bandwidth',
        'Bandwidth',
        'Bandwidth of the pulse; one range gate is its inverse.',
        'MHz',
        'frequency',
        (1e-4, 10_000.0),
        {'default': 1.0, 'per_prf': True, 'step': 0.1},
    ),
    (
        'recovery_us',
        'number',
        'recovery',
        'Recovery',
        'Time after the pulse until the receiver is open.',
        'µs',
        'time',
        _TIME,
        {'default': 1.0, 'step': 0.1, 'decimals': 1},
    ),
    (
        'guard_us',
        'number',
        'guard',
        'Guard',
        'Time before the next pulse from which the receiver is shut.',
        'µs',
        'time',
        _TIME,
        {'default': 0.0, 'step': 0.1},
    ),
    (
        'near_pulse.pulse_us',
        'number',
        'near-pulse',
        'Near pulse length',
        'Length of the second, short pulse.',
        'µs',
        'time',
        _PULSE,
        {'default': 1.0, 'step': 0.1, 'decimals': 1},
    ),
    (
        'near_pulse.bandwidth_mhz',
        'number',
        'near-bandwidth',
        'Near pulse bandwidth',
        'Bandwidth of the short pulse.',
        'MHz',
        'frequency',
        (1e-4, 10_000.0),
        {'default': 1.0, 'step': 0.1},
    ),
    (
        'near_pulse.sent_at_us',
        'number',
        'near-at',
        'Near pulse sent at',
        'When the short pulse starts, counted from the long one, which must be over by then.',
        'µs',
        'time',
        _TIME,
        {'default': 70.0, 'step': 0.1},
    ),
    (
        'near_pulse.to_km',
        'number',
        'near-to',
        'Near pulse serves up to',
        'Ranges up to this use the short pulse.',
        'km',
        'range',
        _RANGE,
        {'default': 10.0},
    ),
    (
        'eclipsing_loss',
        'choice',
        'eclipsing',
        'Eclipsing loss',
        'Whole: the filter spans the whole pulse. Part: only the received part is integrated.',
        '',
        '',
        _ANY,
        {'default': 'whole', 'choices': ('whole', 'part')},
    ),
    (
        'clock_mhz',
        'number',
        'clock',
        'Timing clock',
        'PRIs are whole counts of this clock.',
        'MHz',
        'frequency',
        (0.001, 10_000.0),
        {'default': 10.0},
    ),
    (
        'beamwidth_deg',
        'number',
        'beamwidth',
        'Beamwidth',
        'One-way 3 dB beamwidth in azimuth.',
        '°',
        'angle',
        (0.001, 360.0),
        {'default': 1.4, 'step': 0.1},
    ),
    (
        'scan_rpm',
        'number',
        'scan',
        'Antenna turns',
        'Turns of the antenna a minute; none where it does not turn.',
        'rpm',
        'turns',
        (0.001, 1000.0),
        {'default': 12.0, 'nullable': True},
    ),
    (
        'dwell_ms',
        'number',
        'dwell',
        'Given dwell',
        'Time on target where it does not follow from beam and scan.',
        'ms',
        'dwell',
        (1e-3, 1e7),
        {'nullable': True},
    ),
)

_PLATFORM = _rows(
    GROUND,
    'platform',
    (
        'speed_mps',
        'number',
        'platform-speed',
        'Platform speed',
        'Speed of the radar over ground.',
        'm/s',
        'speed',
        _MAGNITUDE,
        {'default': 200.0},
    ),
    (
        'look_deg',
        'number',
        'platform-look',
        'Look angle',
        'Angle between the track and the beam.',
        '°',
        'angle',
        (0.0, 180.0),
        {'default': 30.0},
    ),
    (
        'height_km',
        'number',
        'platform-height',
        'Platform height',
        'Height of the radar over ground.',
        'km',
        'range',
        _RANGE,
        {'default': 3.0},
    ),
)

_COVERAGE = _rows(
    MUST_SEE,
    'coverage',
    (
        'range_km',
        'interval',
        'see-range',
        'Range',
        'Ranges that must be seen.',
        'km',
        'range',
        _RANGE,
        {'default': [2.0, 110.0]},
    ),
    (
        'speed_mps',
        'interval',
        'see-speed',
        'Radial speed',
        'Radial speeds that must be seen, closing positive.',
        'm/s',
        'speed',
        _SPEED,
        {'default': [0.0, 300.0]},
    ),
)

_REGION = _rows(
    MUST_SEE,
    'must_see[]',
    (
        'name',
        'text',
        'name',
        'Region name',
        'What the must-see region is called.',
        '',
        '',
        _ANY,
        {'default': '', 'longest': 40},
    ),
    (
        'range_km',
        'interval',
        'range',
        'Region range',
        'Ranges of the must-see region.',
        'km',
        'range',
        _RANGE,
        {'default': [4.0, 30.0]},
    ),
    (
        'speed_mps',
        'interval',
        'speed',
        'Region speed',
        'Radial speeds of the must-see region.',
        'm/s',
        'speed',
        _SPEED,
        {'default': [40.0, 110.0]},
    ),
    (
        'visible_pct',
        'number',
        'visible',
        'Region seen',
        'Share of the region that must be seen.',
        '%',
        'percent',
        (0.0, 100.0),
        {'default': 100.0, 'nullable': True},
    ),
)

_CROSSING = _rows(
    MUST_SEE,
    'crossing',
    (
        'speed_mps',
        'number',
        'crossing-speed',
        'Crossing speed',
        'Speed of a target on a straight crossing track.',
        'm/s',
        'speed',
        (0.01, 20_000.0),
        {'default': 80.0},
    ),
    (
        'at_km',
        'number',
        'crossing-at',
        'Crossing distance',
        'Distance at which the track passes.',
        'km',
        'range',
        (0.001, 100_000.0),
        {'default': 20.0},
    ),
)

_WANTED = _rows(
    JUDGED,
    '',
    (
        'wanted.visible_pct',
        'number',
        'want-visible',
        'Coverage seen, at least',
        'Share of the coverage to be seen.',
        '%',
        'percent',
        (0.0, 100.0),
        {'nullable': True},
    ),
    (
        'wanted.hole_mps',
        'number',
        'want-hole-speed',
        'Hole width, at most',
        'A hole wider than this is too large.',
        'm/s',
        'speed',
        _MAGNITUDE,
        {'nullable': True},
    ),
    (
        'wanted.hole_km',
        'number',
        'want-hole-range',
        'Hole length, at most',
        'A hole longer than this is too large.',
        'km',
        'range',
        _RANGE,
        {'nullable': True},
    ),
    (
        'wanted.unseen_s',
        'number',
        'want-unseen',
        'Time out of sight, at most',
        'Longest time that a target may stay out of sight.',
        's',
        'seconds',
        (0.0, 1e6),
        {'nullable': True},
    ),
    (
        'wanted.blind_speed_mps',
        'number',
        'want-blind-speed',
        'First blind speed, at least',
        'Speed below which none may be blind.',
        'm/s',
        'speed',
        _MAGNITUDE,
        {'nullable': True},
    ),
    (
        'wanted.decode_range',
        'flag',
        'want-decode-range',
        'Range decodes over the coverage',
        'Whether range must decode out to the farthest range.',
        '',
        '',
        _ANY,
        {'default': False},
    ),
    (
        'wanted.decode_speed',
        'flag',
        'want-decode-speed',
        'Speed decodes over the coverage',
        'Whether speed must decode over the span of speeds.',
        '',
        '',
        _ANY,
        {'default': False},
    ),
    (
        'wanted.detect_km',
        'number',
        'want-detect',
        'Detection range, at least',
        'Range at which the target must be detected.',
        'km',
        'range',
        _RANGE,
        {'nullable': True},
    ),
    (
        'wanted.range_walk_gates',
        'number',
        'want-range-walk',
        'Range walk, at most',
        'Gates that the fastest target may cross within one CPI.',
        'gates',
        'gates',
        (0.0, 1e6),
        {'nullable': True, 'step': 0.1},
    ),
    (
        'radar.duty_limit_pct',
        'number',
        'duty-limit',
        'Duty, at most',
        'Largest duty that the transmitter stands.',
        '%',
        'percent',
        (0.0, 100.0),
        {'default': 10.0, 'nullable': True},
    ),
    (
        'holds_over.carrier_ghz',
        'interval',
        'over-carrier',
        'Holds over carriers',
        'Each finding is judged by its worst value over these carriers.',
        'GHz',
        'frequency',
        (0.003, 300.0),
        {'nullable': True, 'step': 0.01},
    ),
    (
        'holds_over.rain_mps',
        'interval',
        'over-rain',
        'Holds over rain speeds',
        'Each finding is judged by its worst value over these speeds of the rain.',
        'm/s',
        'speed',
        (-200.0, 200.0),
        {'nullable': True},
    ),
)

_WAVEFORM = _rows(
    SENT,
    'waveform',
    (
        'kind',
        'choice',
        'kind',
        'Kind',
        'Dwells: a CPI on each PRI. Stagger: the PRIs follow each other pulse by pulse.',
        '',
        '',
        _ANY,
        {'default': 'dwells', 'choices': ('dwells', 'stagger')},
    ),
    (
        'pri_us',
        'numbers',
        'pri',
        'PRI',
        'Time between successive pulse starts, 1 to 16 of them.',
        'µs',
        'pri',
        (0.1, 1e6),
        {},
    ),
    (
        'pulses',
        'count',
        'pulses',
        'Pulses',
        'Pulses that count, on each PRF.',
        '',
        'count',
        (1, 4096),
        {'default': 16, 'per_prf': True},
    ),
    (
        'fill_pulses',
        'count',
        'fill',
        'Fill pulses',
        'Pulses sent ahead of those that count.',
        '',
        'count',
        (0, 4096),
        {'default': 0, 'per_prf': True},
    ),
    (
        'detect_m',
        'count',
        'needs',
        'PRFs that must see a target',
        'M of M of N.',
        '',
        'count',
        (1, MOST_PRIS),
        {'default': 1},
    ),
    (
        'received_min',
        'number',
        'received',
        'Least received share',
        'Part of an echo that must fall into the open receiver.',
        '',
        'share',
        (0.0, 1.0),
        {'default': 0.5, 'step': 0.1},
    ),
    (
        'decode_blur_gates',
        'number',
        'blur',
        'Blur of the decoder',
        'Error that decoding allows for; half a gate where every PRI is whole gates, otherwise one, unless given.',
        'gates',
        'gates',
        (0.0, 1000.0),
        {'nullable': True, 'step': 0.5},
    ),
    (
        'decode_motion',
        'flag',
        'motion',
        'Decoder allows for motion',
        'Adds what the fastest target moves by during the set.',
        '',
        '',
        _ANY,
        {'default': False},
    ),
)

_DOPPLER = _rows(
    DOPPLER,
    'doppler',
    (
        'notch_mps',
        'number',
        'notch',
        'Notch',
        'Echoes of this radial speed or less are rejected.',
        'm/s',
        'speed',
        _MAGNITUDE,
        {'default': 6.0, 'per_prf': True},
    ),
    (
        'window',
        'choice',
        'window',
        'Window',
        'Weighting of the pulses of a CPI.',
        '',
        '',
        _ANY,
        {'default': 'hamming', 'choices': WINDOWS},
    ),
    (
        'sidelobe_db',
        'number',
        'sidelobes',
        'Sidelobe level',
        'Of the Dolph-Chebyshev and Taylor windows, below the peak.',
        'dB',
        'level',
        (5.0, 150.0),
        {'default': 40.0},
    ),
    (
        'delays',
        'count',
        'delays',
        'Delays',
        'Delays of the binomial canceller of a stagger.',
        '',
        'count',
        (1, 3),
        {'default': 2},
    ),
    (
        'weights',
        'numbers',
        'weights',
        'Weights',
        'Weights of successive pulses instead of a binomial canceller.',
        '',
        'plain',
        (-1e6, 1e6),
        {'nullable': True},
    ),
    (
        'response_min_db',
        'number',
        'response',
        'Least response',
        'Response, against its mean over all speeds, from which on a stagger counts as clear.',
        'dB',
        'level',
        (-200.0, 20.0),
        {'default': -10.0},
    ),
)

_CLUTTER = (
    ('cnr_db', 'number', 'cnr', 'Clutter-to-noise', 'Of one pulse, at the range given.', 'dB', 'level', _DB),
    (
        'at_km',
        'number',
        'at',
        'given at',
        'Range that the clutter-to-noise belongs to.',
        'km',
        'range',
        (0.001, 100_000.0),
    ),
    ('speed_mps', 'number', 'speed', 'mean speed', 'Mean radial speed, closing positive.', 'm/s', 'speed', _SPEED),
    (
        'spread_mps',
        'number',
        'spread',
        'spread',
        'Standard deviation of its radial speeds.',
        'm/s',
        'speed',
        (0.0, 1000.0),
    ),
    ('range_power', 'number', 'law', 'range law', 'Power of the range with which it falls.', '', 'plain', (0.0, 8.0)),
    (
        'at_pulse_us',
        'number',
        'at-pulse',
        'given for pulse',
        'Pulse length that it was measured with.',
        'µs',
        'time',
        _PULSE,
    ),
)


def _clutter(record, prefix, name, defaults):
    """Make the keys of one kind of clutter, whose values when it is added are given."""
    rows = []
    for (key, kind, short, label, help_text, unit, family, limits), value in zip(_CLUTTER, defaults, strict=True):
        more = {'default': value, 'nullable': key == 'at_pulse_us', 'step': 0.1 if key == 'spread_mps' else 1.0}
        rows.append((key, kind, f'{prefix}{short}', f'{name}: {label}', help_text, unit, family, limits, more))
    return _rows(GROUND, record, *rows)


_SURFACE = (
    *_clutter('surface', 'surface-', 'Ground', (45.0, 10.0, 0.0, 0.3, 3.0, None)),
    *_rows(
        GROUND,
        'surface',
        (
            'to_km',
            'number',
            'surface-to',
            'Ground: seen up to',
            'Its horizon.',
            'km',
            'range',
            _RANGE,
            {'default': 40.0},
        ),
    ),
)
_RAIN = (
    *_rows(
        GROUND,
        'rain[]',
        (
            'name',
            'text',
            'name',
            'Patch name',
            'What the moving clutter is.',
            '',
            '',
            _ANY,
            {'default': 'rain', 'longest': 40},
        ),
    ),
    *_clutter('rain[]', '', 'Rain', (25.0, 20.0, -10.0, 2.0, 2.0, None)),
    *_rows(
        GROUND,
        'rain[]',
        (
            'range_km',
            'interval',
            'range',
            'Rain: ranges',
            'Where it rains.',
            'km',
            'range',
            _RANGE,
            {'default': [15.0, 45.0]},
        ),
    ),
)

_TARGET = _rows(
    TARGET,
    'target',
    (
        'snr_db',
        'number',
        'snr',
        'Signal-to-noise',
        'Of one pulse on the axis of the beam, at the range given.',
        'dB',
        'level',
        _DB,
        {'default': 10.0, 'nullable': True},
    ),
    (
        'at_km',
        'number',
        'snr-at',
        'Signal-to-noise given at',
        'Range that the signal-to-noise belongs to.',
        'km',
        'range',
        (0.001, 100_000.0),
        {'default': 60.0, 'nullable': True},
    ),
    (
        'at_pulse_us',
        'number',
        'snr-pulse',
        'Signal-to-noise given for pulse',
        'Pulse length it was measured with.',
        'µs',
        'time',
        _PULSE,
        {'nullable': True},
    ),
    (
        'radar_equation.peak_kw',
        'number',
        'peak',
        'Peak power',
        'Transmitted peak power.',
        'kW',
        'power',
        (1e-9, 1e6),
        {'default': 20.0},
    ),
    (
        'radar_equation.gain_dbi',
        'number',
        'gain',
        'Antenna gain',
        'Gain of the antenna, both ways alike.',
        'dBi',
        'level',
        (-50.0, 100.0),
        {'default': 34.0},
    ),
    (
        'radar_equation.rcs_m2',
        'number',
        'rcs',
        'Radar cross-section',
        'Of the target.',
        'm²',
        'area',
        (1e-9, 1e9),
        {'default': 1.0},
    ),
    (
        'radar_equation.noise_figure_db',
        'number',
        'noise-figure',
        'Noise figure',
        'Of the receiver, to 290 K.',
        'dB',
        'level',
        (0.0, 100.0),
        {'default': 3.0},
    ),
    (
        'radar_equation.losses_db',
        'number',
        'losses',
        'Losses',
        'Losses that are not counted elsewhere.',
        'dB',
        'level',
        (-20.0, 200.0),
        {'default': 4.0},
    ),
    (
        'fluctuation',
        'choice',
        'fluctuation',
        'Fluctuation',
        'How the strength of the target changes.',
        '',
        '',
        _ANY,
        {'default': 'swerling1', 'choices': FLUCTUATIONS},
    ),
    (
        'pd_wanted',
        'number',
        'pd',
        'Probability of detection',
        'Probability at which the range is quoted.',
        '',
        'share',
        (0.001, 0.9999),
        {'default': 0.8, 'step': 0.01},
    ),
    (
        'false_alarm',
        'number',
        'pfa',
        'False alarm probability',
        'For one cell, after M of N.',
        '',
        'share',
        (1e-15, 0.5),
        {'default': 1e-6},
    ),
    (
        'own_spread_mps',
        'number',
        'own-spread',
        'Own spread',
        'Lines of rotor or propeller, either side of the body.',
        'm/s',
        'speed',
        _MAGNITUDE,
        {'nullable': True},
    ),
)

_WEATHER = _rows(
    JUDGED,
    'weather',
    (
        'width_mps',
        'number',
        'weather-width',
        'Spectrum width',
        'Of the precipitation that is measured.',
        'm/s',
        'speed',
        (0.01, 100.0),
        {'default': 2.0, 'step': 0.1},
    ),
    (
        'snr_db',
        'number',
        'weather-snr',
        'Signal-to-noise of weather',
        'Of the precipitation that is measured.',
        'dB',
        'level',
        _DB,
        {'default': 20.0},
    ),
    (
        'wanted_mps',
        'number',
        'weather-wanted',
        'Extended Nyquist speed, at least',
        'Speeds to be told apart.',
        'm/s',
        'speed',
        _MAGNITUDE,
        {'default': 40.0, 'nullable': True},
    ),
    (
        'error_mps',
        'number',
        'weather-error',
        'Velocity error, at most',
        'Standard error of the mean speed.',
        'm/s',
        'speed',
        (0.001, 1000.0),
        {'default': 1.0, 'nullable': True, 'step': 0.1},
    ),
)

KEYS = (
    *_HEAD,
    *_WAVEFORM,
    *_SENT,
    *_COVERAGE,
    *_REGION,
    *_CROSSING,
    *_DOPPLER,
    *_SURFACE,
    *_RAIN,
    *_PLATFORM,
    *_TARGET,
    *_WANTED,
    *_WEATHER,
)
"""All keys, in the order of the page."""

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
    return [asdict(key) for key in KEYS]
