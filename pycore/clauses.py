"""The grammar of the plan's paragraph, as data: templates and when each is used.

A clause is used where every fact in its ``when`` has one of the listed values
(:func:`pycore.sentence.facts`); of the clauses with one id the first that fits
is taken. In a template,

* ``{path}`` is a live number with its unit, ``{path|bare}`` the same without;
* ``{list path}`` is a list of live numbers, ``a, b and c`` with one unit at the end;
* ``{path?one|many}`` is a word in the number that the value asks for;
* ``{n}`` is the number of PRIs, ``{way}`` says which way the wanted speeds go, ``{goes path}`` which way one speed;
* ``{rail}`` is the list of PRIs, one cell each, under the text;
* ``{do action|words}`` is an action in words.

The page holds the same small interpreter, so that the sentence of an opened
link stands before Python has started.
"""

_FILL = 'after {waveform.fill_pulses} {waveform.fill_pulses?fill pulse|fill pulses}'
_ON_EACH = f'{{waveform.pulses}} on each {_FILL}'

CLAUSES = (
    {'id': 'carrier', 'short': True, 'when': {'carrier': ['one']}, 'text': 'A {radar.carrier_ghz} radar sends'},
    {'id': 'carrier', 'short': True, 'when': {}, 'text': 'A radar of several carriers sends'},
    {'id': 'pulse', 'short': True, 'when': {'pulse': ['one']}, 'text': '{radar.pulse_us} pulses'},
    {'id': 'pulse', 'short': True, 'when': {}, 'text': 'pulses'},
    {
        'id': 'intervals',
        'short': True,
        'when': {'kind': ['stagger'], 'count': ['one', 'few']},
        'text': 'at intervals that repeat {list waveform.pri_us}, {waveform.pulses} '
        '{waveform.pulses?pulse|pulses} to a CPI',
    },
    {
        'id': 'intervals',
        'short': True,
        'when': {'kind': ['stagger']},
        'text': 'at {n} intervals that repeat, {waveform.pulses} {waveform.pulses?pulse|pulses} to a CPI',
    },
    {
        'id': 'intervals',
        'short': True,
        'when': {'differs': ['yes'], 'pulses': ['one'], 'fill': ['one']},
        'text': f'as stands under it, {_ON_EACH}: {{rail}}',
    },
    {'id': 'intervals', 'short': True, 'when': {'differs': ['yes']}, 'text': 'as stands under it: {rail}'},
    {
        'id': 'intervals',
        'short': True,
        'when': {'count': ['one'], 'as': ['pri']},
        'text': f'every {{waveform.pri_us.0}}, {{waveform.pulses}} to a CPI {_FILL}.',
    },
    {
        'id': 'intervals',
        'short': True,
        'when': {'count': ['one']},
        'text': f'at a PRF of {{waveform.pri_us.0}}, {{waveform.pulses}} to a CPI {_FILL}.',
    },
    {
        'id': 'intervals',
        'short': True,
        'when': {'count': ['few'], 'as': ['pri']},
        'text': f'at intervals of {{list waveform.pri_us}}, {_ON_EACH}.',
    },
    {
        'id': 'intervals',
        'short': True,
        'when': {'count': ['few']},
        'text': f'at PRFs of {{list waveform.pri_us}}, {_ON_EACH}.',
    },
    {'id': 'intervals', 'short': True, 'when': {}, 'text': f'on {{n}} PRFs, {_ON_EACH}: {{rail}}'},
    {
        'id': 'canceller',
        'short': False,
        'when': {'kind': ['stagger'], 'weights': ['none'], 'count': ['one', 'few']},
        'text': f'{_FILL}, through a canceller of {{doppler.delays}} {{doppler.delays?delay|delays}}.',
    },
    {
        'id': 'canceller',
        'short': False,
        'when': {'kind': ['stagger'], 'weights': ['none']},
        'text': f'{_FILL}, through a canceller of {{doppler.delays}} {{doppler.delays?delay|delays}}: {{rail}}',
    },
    {
        'id': 'canceller',
        'short': False,
        'when': {'kind': ['stagger'], 'count': ['one', 'few']},
        'text': f'{_FILL}, through the weights {{list doppler.weights}}.',
    },
    {
        'id': 'canceller',
        'short': False,
        'when': {'kind': ['stagger']},
        'text': f'{_FILL}, through the weights {{list doppler.weights}}: {{rail}}',
    },
    {'id': 'listens', 'short': False, 'when': {}, 'text': 'It listens again {radar.recovery_us} after each pulse.'},
    {
        'id': 'sees',
        'short': True,
        'when': {},
        'text': 'It must see from {coverage.range_km.0|bare} to {coverage.range_km.1} and from '
        '{coverage.speed_mps.0|bare} to {coverage.speed_mps.1} ({way}).',
    },
    {
        'id': 'notch',
        'short': False,
        'when': {'kind': ['stagger']},
        'text': 'A speed counts as clear where the response is at least {doppler.response_min_db}.',
    },
    {
        'id': 'notch',
        'short': False,
        'when': {'notch': ['list']},
        'text': 'Echoes of {ground} are rejected as far as the notch of each PRF reaches.',
    },
    {'id': 'notch', 'short': False, 'when': {}, 'text': 'Echoes within {doppler.notch_mps} of {ground} are rejected.'},
    {
        'id': 'needs',
        'short': True,
        'when': {'kind': ['dwells'], 'count': ['few', 'many']},
        'text': 'A target is declared when {waveform.detect_m} of the {n} PRFs {waveform.detect_m?sees|see} it.',
    },
    {'id': 'rain', 'short': False, 'when': {'rain': ['none']}, 'text': 'No rain is assumed. {do add-rain|Add rain}'},
    {
        'id': 'rain',
        'short': False,
        'when': {'rain': ['one']},
        'text': 'It rains from {rain.range_km.0|bare} to {rain.range_km.1}: {rain.cnr_db} above noise at {rain.at_km}, '
        'moving at {rain.speed_mps} ({goes rain.speed_mps}). {do remove-rain|No rain}',
    },
)
"""Clauses in the order of the paragraph; ``short`` ones stay when it sticks to the top of the window."""

PATCH = (
    '{@.name} from {@.range_km.0|bare} to {@.range_km.1}: {@.cnr_db} above noise at {@.at_km}, '
    'moving at {@.speed_mps} ({goes @.speed_mps}).'
)
"""The sentence of each patch where rain is a list of them; ``@`` is the patch."""

ALSO = (
    {
        'record': 'surface',
        'text': 'ground clutter {surface.cnr_db} above noise at {surface.at_km}, out to {surface.to_km}',
    },
    {
        'record': 'radar.near_pulse',
        'text': 'a near pulse of {radar.near_pulse.pulse_us}, sent at '
        '{radar.near_pulse.sent_at_us}, for ranges up to {radar.near_pulse.to_km}',
    },
    {
        'record': 'platform',
        'text': 'a platform at {platform.speed_mps}, {platform.height_km} high, looking '
        '{platform.look_deg} off its track',
    },
    {
        'record': 'target.radar_equation',
        'text': 'a target of {target.radar_equation.rcs_m2} seen with {target.radar_equation.peak_kw}',
    },
)
"""How a record that is not there by default is named in the Also line."""

NOT_IN_ALSO = ('must_see', 'crossing', 'rain', 'waveform.kind', 'waveform.pri_us')
"""Keys, and records of keys, that the paragraph or the findings show in their own way."""
