"""The grammar of the plan's paragraph, as data: templates and when each is used.

A clause is used where every fact in its ``when`` has one of the listed values
(:func:`pycore.sentence.facts`); of the clauses with one id the first that fits
is taken. In a template,

* ``{path}`` is a live number with its unit, ``{path|bare}`` the same without, ``{path|no}`` a count that is *no* when
  it is nought; a text of the plan is alive too (``{path|name}`` as it was typed), and a choice is said in its words;
* ``{list path}`` is a list of live numbers, ``a, b and c`` with one unit at the end;
* ``{path?one|many}`` is a word in the number that the value asks for;
* ``{n}`` is the number of PRIs, ``{way}`` says which way the wanted speeds go, ``{goes path}`` which way one speed;
* ``{rail}`` is the list of PRIs, one cell each, under the text;
* ``{do action|words}`` is an action in words, ``{do action.2|words|name}`` one on the element of a list, with a name
  that says more than its words where several look alike.

The page holds the same small interpreter, so that the sentence of an opened
link stands before Python has started.
"""

_FILL = 'after {waveform.fill_pulses|no} {waveform.fill_pulses?fill pulse|fill pulses}'
_TO_A_CPI = '{waveform.pulses} {waveform.pulses?pulse|pulses} to a CPI'
_ON_EACH = f'{{waveform.pulses}} on each {_FILL}'

CLAUSES = (
    {'id': 'carrier', 'short': True, 'when': {'carrier': ['one']}, 'text': 'A {radar.carrier_ghz} radar sends'},
    {'id': 'carrier', 'short': True, 'when': {}, 'text': 'A radar of several carriers sends'},
    {'id': 'pulse', 'short': True, 'when': {'pulse': ['one']}, 'text': '{radar.pulse_us} pulses'},
    {'id': 'pulse', 'short': True, 'when': {}, 'text': 'pulses'},
    {
        'id': 'intervals',
        'short': True,
        'when': {'kind': ['stagger'], 'count': ['one'], 'as': ['pri']},
        'text': f'every {{waveform.pri_us.0}}, {_TO_A_CPI}',
    },
    {
        'id': 'intervals',
        'short': True,
        'when': {'kind': ['stagger'], 'count': ['one']},
        'text': f'at a PRF of {{waveform.pri_us.0}}, {_TO_A_CPI}',
    },
    {
        'id': 'intervals',
        'short': True,
        'when': {'kind': ['stagger'], 'count': ['few'], 'as': ['pri']},
        'text': f'at intervals that repeat {{list waveform.pri_us}}, {_TO_A_CPI}',
    },
    {
        'id': 'intervals',
        'short': True,
        'when': {'kind': ['stagger'], 'count': ['few']},
        'text': f'at PRFs that change from pulse to pulse, {{list waveform.pri_us}}, {_TO_A_CPI}',
    },
    {
        'id': 'intervals',
        'short': True,
        'when': {'kind': ['stagger']},
        'text': f'at {{n}} intervals that repeat, {_TO_A_CPI}',
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
    {'id': 'rain', 'short': False, 'when': {'rain': ['none']}, 'text': 'No rain is assumed.{do add-rain|Add rain}'},
    {
        'id': 'rain',
        'short': False,
        'when': {'rain': ['one']},
        'text': 'It rains from {rain.range_km.0|bare} to {rain.range_km.1}: {rain.cnr_db} above noise at {rain.at_km}, '
        'moving at {rain.speed_mps} ({goes rain.speed_mps}).{do remove-rain|No rain}',
    },
)
"""Clauses in the order of the paragraph; ``short`` ones stay when it sticks to the top of the window."""

PATCH = (
    '{@.name} from {@.range_km.0|bare} to {@.range_km.1}: {@.cnr_db} above noise at {@.at_km}, '
    'moving at {@.speed_mps} ({goes @.speed_mps}).{do remove-rain.#|Remove|Remove this patch}'
)
"""The sentence of each patch where rain is a list of them; ``@`` is the patch, ``#`` its place in the list."""

_THERE = 'from {@.range_km.0|bare} to {@.range_km.1} and from {@.speed_mps.0|bare} to {@.speed_mps.1}'
_NOT_THE_REGION = '{do remove-must-see.#|Remove|Remove this region}'
REGION = f'At least {{@.visible_pct}} must be seen of {{@.name|name}}, {_THERE}.{_NOT_THE_REGION}'
REGION_REPORTED = f'{{@.name}}, {_THERE}, is reported only.{_NOT_THE_REGION}'
"""The sentence of each region that matters more than the rest, with a wanted share and without one."""

_SHAPED = ('chebyshev', 'taylor')

ALSO = (
    {
        'path': 'doppler.window',
        'is': _SHAPED,
        'text': '{doppler.window}, sidelobes {doppler.sidelobe_db} down',
    },
    {
        'path': 'surface',
        'text': 'ground clutter {surface.cnr_db} above noise at {surface.at_km}, out to {surface.to_km}'
        '{do remove-surface|Remove|Remove the ground clutter}',
    },
    {
        'path': 'radar.near_pulse',
        'text': 'a near pulse of {radar.near_pulse.pulse_us}, sent at '
        '{radar.near_pulse.sent_at_us}, for ranges up to {radar.near_pulse.to_km}'
        '{do remove-near-pulse|Remove|Remove the near pulse}',
    },
    {
        'path': 'platform',
        'text': 'a platform at {platform.speed_mps}, {platform.height_km} high, looking '
        '{platform.look_deg} off its track{do remove-platform|Remove|Remove the platform}',
    },
    {
        'path': 'crossing',
        'text': 'a target that crosses at {crossing.speed_mps}, {crossing.at_km} off'
        '{do remove-crossing|Remove|Remove the crossing target}',
    },
    {
        'path': 'target.radar_equation',
        'text': 'signal by the radar equation, from {target.radar_equation.peak_kw} of peak power, '
        '{target.radar_equation.gain_dbi} of antenna gain and a target of {target.radar_equation.rcs_m2}'
        '{do remove-radar-equation|Remove|Remove the radar equation}',
    },
    {
        'path': 'holds_over.carrier_ghz',
        'text': 'judged by the worst over carriers from {holds_over.carrier_ghz.0|bare} to {holds_over.carrier_ghz.1}'
        '{do remove-over-carrier|Remove|Remove the span of carriers}',
    },
    {
        'path': 'holds_over.rain_mps',
        'text': 'judged by the worst over rain that moves at {holds_over.rain_mps.0|bare} to {holds_over.rain_mps.1}'
        '{do remove-over-rain|Remove|Remove the span of rain speeds}',
    },
    {
        'path': 'weather',
        'text': 'weather is to be measured, {weather.snr_db} above noise and {weather.width_mps} wide in its spectrum'
        '{do remove-weather|Remove|Remove the weather}',
    },
    {'path': 'weather.wanted_mps', 'text': 'its speeds told apart up to ± {weather.wanted_mps}'},
    {'path': 'radar.scan_rpm', 'is': (None,), 'text': 'the antenna does not turn'},
    {'path': 'radar.dwell_ms', 'text': 'the beam rests on a target for {radar.dwell_ms}'},
    {'path': 'weather.error_mps', 'text': 'its mean speed to within {weather.error_mps}'},
)
"""What the Also line says in words of its own: where something stands at ``path``, or what stands there ``is`` one of
some. What is not there by default can be removed where it is named."""

NOT_IN_ALSO = ('must_see', 'crossing', 'rain', 'waveform.kind', 'waveform.pri_us')
"""Keys, and records of keys, that the paragraph or the findings show in their own way."""

RAIL = {
    'radar.pulse_us': ('', ' pulse', ' pulse'),
    'radar.bandwidth_mhz': ('', ' wide', ' wide'),
    'doppler.notch_mps': ('notch ', '', ''),
    'waveform.pulses': ('', ' pulse', ' pulses'),
    'waveform.fill_pulses': ('', ' fill', ' fill'),
}
"""Words before, and after one and many of, a number in a cell of the rail, which says what differs by PRF."""
