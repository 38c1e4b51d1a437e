"""Numbers as people type them: units, decimal signs, relative edits, pasted lists."""

from fractions import Fraction

import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore import quantity
from pycore.errors import InputError
from pycore.plan.keys import BY_PATH, KEYS

CARRIER, PULSE, PRI = BY_PATH['radar.carrier_ghz'], BY_PATH['radar.pulse_us'], BY_PATH['waveform.pri_us']
SPEED, RANGE, NOTCH = BY_PATH['coverage.speed_mps'], BY_PATH['coverage.range_km'], BY_PATH['doppler.notch_mps']
PULSES, RECEIVED, DUTY = BY_PATH['waveform.pulses'], BY_PATH['waveform.received_min'], BY_PATH['radar.duty_limit_pct']


def read(text, key, **more):
    return quantity.read_number(text, key, key.path, **more)


def pris(text, unit=None):
    return [float(one.value) for one in quantity.typed_list(text, PRI, PRI.path, unit)]


@pytest.mark.parametrize(
    ('text', 'key', 'value'),
    [
        ('2800 MHz', CARRIER, 2.8),
        ('2,8', CARRIER, 2.8),
        ('2.8GHz', CARRIER, 2.8),
        ('2800M', CARRIER, 2.8),
        ('9600000 kHz', CARRIER, 9.6),
        ('1.2 us', PULSE, 1.2),
        ('1.2 \N{MICRO SIGN}s', PULSE, 1.2),
        ('1.2 \N{GREEK SMALL LETTER MU}s', PULSE, 1.2),
        ('500 ns', PULSE, 0.5),
        ('0,1 ms', PULSE, 100),
        ('.5', PULSE, 0.5),
        ('5.', PULSE, 5),
        ('1e1', PULSE, 10),
        ('900 Hz', PRI, 10000 / 9),
        ('1.02k', PRI, 1e6 / 1020),
        ('1 kHz', PRI, 1000),
        ('1 ms', PRI, 1000),
        ('60nmi', RANGE, 111.12),
        ('60k', RANGE, 60),
        ('500 m', RANGE, 0.5),
        ('300 kt', SPEED, 300 * 1852 / 3600),
        ('1080 km/h', SPEED, 300),
        ('-10', SPEED, -10),
        ('\N{MINUS SIGN}10 m/s', SPEED, -10),
        ('+10', SPEED, 10),
        ('10\N{NARROW NO-BREAK SPACE}000', PULSE, 10_000),
        ('10 000 µs', PULSE, 10_000),
        ('16', PULSES, 16),
        ('50 %', RECEIVED, 0.5),
        ('10', DUTY, 10),
    ],
)
def test_a_number_is_understood_with_any_unit_of_its_family(text, key, value):
    assert read(text, key) == pytest.approx(value, rel=1e-15)


@pytest.mark.parametrize('text', ['2800 MHz', '2.8 GHz', '2800000000 Hz', '2,8e0', '28e-1'])
def test_decimals_are_converted_without_any_rounding(text):
    assert read(text, CARRIER) == 2.8


def test_a_number_without_a_unit_is_meant_in_the_unit_that_is_shown():
    assert read('60', RANGE, unit='nmi') == 111.12
    assert read('60 km', RANGE, unit='nmi') == 60


@pytest.mark.parametrize(
    ('text', 'current', 'value'),
    [('+20%', 1.0, 1.2), ('-10%', 1.5, 1.35), ('\N{MINUS SIGN}10 %', 110.0, 99), ('+0,5 %', 2, 2.01)],
)
def test_a_signed_percentage_changes_the_present_value(text, current, value):
    assert read(text, PULSE, current=current) == value


def test_a_signed_percentage_of_a_count_gives_a_whole_count():
    assert read('+20%', PULSES, current=16) == 19


@pytest.mark.parametrize(
    ('text', 'readings'), [('1,163', ('1.163', '1163')), ('0,125', ('0.125', '125')), ('-1,020', ('1.02', '1020'))]
)
def test_one_comma_before_three_digits_is_refused_with_both_readings(text, readings):
    with pytest.raises(InputError) as refused:
        read(text, SPEED)
    assert all(reading in refused.value.message for reading in readings)
    assert refused.value.field == 'coverage.speed_mps'


NO_NUMBERS = (
    '',
    '   ',
    'abc',
    'nan',
    'inf',
    '-inf',
    'NaN µs',
    '1..2',
    '1 2',
    '--1',
    '1.2.3',
    '1e',
    '\u0661',
    '<b>1</b>',
    '\0',
)
TOO_ODD = ('1e999999999', '9' * 5000, '0x10', '1_000', '1,234,567', '1,234.5', '1e-400', '5 parsecs', '5 km')
OUT_OF_LIMITS = ('-1', '0', '0.0099', '10000.1')


@pytest.mark.parametrize('text', [*NO_NUMBERS, *TOO_ODD, *OUT_OF_LIMITS])
def test_what_is_no_pulse_length_is_refused_in_one_sentence_with_the_limits(text):
    with pytest.raises(InputError) as refused:
        read(text, PULSE)
    message = refused.value.message
    assert message.startswith('Pulse length ')
    assert message.endswith('.')
    assert len(message) < 140
    assert '\n' not in message


@pytest.mark.parametrize('key', [key for key in KEYS if key.kind == 'number'], ids=lambda key: key.path)
def test_a_limit_itself_is_allowed_and_one_step_beyond_is_not(key):
    for limit, beyond in ((key.lowest, -key.step), (key.highest, key.step)):
        assert read(repr(limit), key) == limit
        outside = Fraction(str(limit)) + Fraction(str(beyond))
        with pytest.raises(InputError):
            read(f'{float(outside)!r}', key)


def test_a_zero_frequency_is_no_pri():
    with pytest.raises(InputError):
        read('0 Hz', PRI)


@pytest.mark.parametrize(
    ('text', 'values'),
    [
        ('980 860', [980, 860]),
        ('980 860 us', [980, 860]),
        ('980; 860', [980, 860]),
        ('980\n860\r\n735', [980, 860, 735]),
        ('980\t860', [980, 860]),
        ('980, 860', [980, 860]),
        ('980.5,860.25', [980.5, 860.25]),
        ('980,5 860,25', [980.5, 860.25]),
        ('980,5; 860,25', [980.5, 860.25]),
        ('PRI\n980\n860', [980, 860]),
        ('980,860,735', [980, 860, 735]),
        ('1 kHz 2 kHz', [1000, 500]),
        ('1, 2 kHz', [1000, 500]),
        ('0.98ms 860us', [980, 860]),
        ('980 860 ', [980, 860]),
        ('980 and 860 µs', [980, 860]),
    ],
)
def test_a_pasted_list_is_understood(text, values):
    assert pris(text) == pytest.approx(values, rel=1e-15)


def test_a_pasted_list_without_a_unit_is_meant_in_the_unit_that_is_shown():
    assert pris('1000 2000', 'Hz') == [1000, 500]


def test_the_heading_of_a_column_says_in_which_unit_it_is():
    assert pris('PRF (Hz)\n1000\n2000') == [1000, 500]


def test_a_comma_between_three_digits_and_three_digits_is_refused_in_a_list_too():
    with pytest.raises(InputError) as refused:
        pris('980,860')
    assert '980.86' in refused.value.message
    assert '860' in refused.value.message


@given(st.decimals(min_value='0.01', max_value=9, places=6), st.sampled_from([('µs', 0), ('ns', -3), ('ms', 3)]))
def test_every_decimal_in_every_unit_is_exactly_what_was_typed(value, unit):
    name, power = unit
    assert quantity.typed(f'{value:f}{name}', PULSE, PULSE.path).value == Fraction(value) * Fraction(10) ** power
    assert quantity.typed(f'{value:f}', PULSE, PULSE.path, name).value == Fraction(value) * Fraction(10) ** power


@given(st.text(max_size=60), st.sampled_from([PULSE, PRI, SPEED, PULSES, RECEIVED]))
def test_any_text_is_read_or_refused_in_one_line_and_never_breaks(text, key):
    try:
        value, message = read(text, key, current=key.lowest), ''
    except InputError as refused:
        value, message = key.lowest, refused.message
    assert key.lowest <= value <= key.highest
    assert message.count('\n') == 0
    assert len(message) < 200
