"""Edits: what is typed, stepped, added, moved and taken away, and what is said about it."""

import copy
import json
from pathlib import Path

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore.clock import on_clock
from pycore.edit import apply
from pycore.errors import InputError
from pycore.plan.keys import KEYS, OPTIONAL_RECORDS
from pycore.plan.reading import filled, read
from pycore.sentence import value_at
from pycore.wording import SHOWN_UNITS

OPENING = json.loads((Path(__file__).parents[2] / 'webapp/examples/opening.json').read_text('utf-8'))['plan']


def plan(pri_us=(980.0, 860.0), **records):
    return filled({'waveform': {'pri_us': list(pri_us), **records.pop('waveform', {})}, **records})


def typed(key, text, start=OPENING, **units):
    edited = apply(start, {'key': key, 'text': text}, {**SHOWN_UNITS, **units})
    return value_at(edited.document, key), edited.said


def done(start, action, **more):
    return apply(start, {'do': action, **more})


def refusal(start, edit):
    before = copy.deepcopy(start)
    with pytest.raises(InputError) as refused:
        apply(start, edit)
    assert start == before
    assert refused.value.message.endswith('.')
    return refused.value


@pytest.mark.parametrize(
    ('key', 'text', 'value'),
    [
        ('radar.pulse_us', '1.2', 1.2),
        ('radar.pulse_us', '+20%', 1.2),
        ('radar.carrier_ghz', '2800 MHz', 2.8),
        ('coverage.range_km.1', '60nmi', 111.12),
        ('coverage.speed_mps.0', '\N{MINUS SIGN}50', -50),
        ('waveform.pri_us.0', '735', 735),
        ('waveform.pulses', '12', 12),
        ('waveform.detect_m', '2', 2),
        ('doppler.notch_mps', '3 kt', 1.5433333333333332),
        ('must_see.0.range_km.1', '20', 20),
        ('must_see.0.name', 'the gate', 'the gate'),
        ('surface.cnr_db', '50 dB', 50),
        ('wanted.visible_pct', '', None),
        ('wanted.hole_km', '2', 2),
        ('radar.scan_rpm', 'none', None),
        ('radar.dwell_ms', '25', 25),
        ('title', 'A & <b>', 'A & <b>'),
        ('title', '', ''),
        ('marking', 'Draft only', 'Draft only'),
        ('doppler.weights', '1, -2, 1', [1, -2, 1]),
        ('waveform.decode_motion', 'yes', True),
        ('doppler.window', 'taylor', 'taylor'),
        ('radar.pulse_us', '1, 2 us', [1, 2]),
        ('waveform.pri_us', '900 800 700', [900, 800, 700]),
    ],
)
def test_what_is_typed_for_a_number_stands_in_the_plan(key, text, value):
    assert typed(key, text)[0] == value


def test_a_number_without_a_unit_is_meant_as_it_is_shown():
    assert typed('coverage.range_km.1', '60', range='nmi')[0] == 111.12
    assert typed('coverage.speed_mps.1', '360', speed='km/h')[0] == 100
    assert typed('waveform.pri_us.0', '1000', pri='Hz')[0] == 1000


def test_a_prf_is_rounded_to_the_clock_and_the_page_says_so():
    value, said = typed('waveform.pri_us.0', '900 Hz')
    assert value == 1111.1
    assert said == ['900 Hz is 1111.11 µs; on the 10 MHz clock 1111.1 µs, 900.009 Hz.']


def test_an_interval_off_the_clock_is_rounded_and_one_on_it_is_left_in_peace():
    assert typed('waveform.pri_us.0', '980.04') == (980, ['980.04 µs is off the clock; on the 10 MHz clock 980 µs.'])
    assert typed('waveform.pri_us.0', '980.1') == (980.1, [])
    assert typed('waveform.pri_us.0', '1 kHz') == (1000, [])


def test_a_slow_clock_gives_one_count_at_least():
    assert on_clock(0.2, 1) == (1, ['0.2 µs is off the clock; on the 1 MHz clock 1 µs.'])
    assert on_clock(1e6 / 1020.408163265, 10, 'Hz') == (980, [])


def test_another_clock_rounds_the_intervals_and_says_which():
    edited = apply(plan([980.1, 860.0]), {'key': 'radar.clock_mhz', 'text': '1'})
    assert edited.document['waveform']['pri_us'] == [980, 860]
    assert edited.said == ['980.1 µs is off the clock; on the 1 MHz clock 980 µs.']
    assert apply(plan([980.1]), {'key': 'radar.clock_mhz', 'value': 20}).said == []


def test_a_stepped_value_is_taken_as_it_is():
    assert apply(OPENING, {'key': 'radar.pulse_us', 'value': 1.1}).document['radar']['pulse_us'] == 1.1
    assert apply(OPENING, {'key': 'waveform.pri_us.1', 'value': 861.0}).document['waveform']['pri_us'] == [980, 861]


@pytest.mark.parametrize(
    ('edit', 'field', 'words'),
    [
        ({'key': 'radar.pulse_us', 'text': 'abc'}, 'radar.pulse_us', 'Pulse length must be from 0.01 to 10'),
        ({'key': 'radar.pulse_us', 'text': ''}, 'radar.pulse_us', 'got nothing'),
        ({'key': 'radar.pulse_us', 'text': '860'}, 'radar.pulse_us', 'shorter'),
        ({'key': 'radar.pulse_us', 'value': 'abc'}, 'radar.pulse_us', 'abc'),
        ({'key': 'radar.pulse_us', 'value': True}, 'radar.pulse_us', 'true'),
        ({'key': 'radar.pulse_us', 'value': None}, 'radar.pulse_us', 'none'),
        ({'key': 'radar.pulse_us.1', 'text': '2'}, 'radar.pulse_us.1', 'Pulse length'),
        ({'key': 'waveform.pri_us.0', 'text': '0'}, 'waveform.pri_us.0', 'got 0'),
        ({'key': 'waveform.pri_us.0', 'text': '0.5'}, 'waveform.pri_us.0', 'longer than its pulse'),
        ({'key': 'waveform.pri_us.7', 'text': '900'}, 'waveform.pri_us.7', '2'),
        ({'key': 'waveform.pri_us.7', 'value': 900}, 'waveform.pri_us.7', '2'),
        ({'key': 'waveform.detect_m', 'text': '3'}, 'waveform.detect_m', 'got 3'),
        ({'key': 'coverage.range_km.0', 'text': '120'}, 'coverage.range_km.0', 'type the other end'),
        ({'key': 'coverage.range_km.1', 'text': '1'}, 'coverage.range_km.1', 'type the other end'),
        ({'key': 'coverage.range_km.2', 'text': '1'}, 'coverage.range_km.2', 'Range'),
        ({'key': 'coverage.range_km', 'value': [9, 3]}, 'coverage.range_km', '9'),
        ({'key': 'must_see.3.name', 'text': 'x'}, 'must_see.3.name', 'Region name'),
        ({'key': 'rain.cnr_db', 'text': '300'}, 'rain.cnr_db', '200'),
        ({'key': 'rada.pulse_us', 'text': '1'}, 'rada.pulse_us', 'rada.pulse_us'),
        ({'key': 'radar.puls_us', 'text': '1'}, 'radar.puls_us', 'radar.pulse_us'),
        ({'key': '<script>', 'text': '1'}, '<script>', '<script>'),
        ({'key': 'x' * 10_000, 'text': '1'}, 'x' * 80, 'xxx'),
        ({'key': 'title', 'text': 'x' * 121}, 'title', '120'),
        ({'key': 'waveform.pri_us', 'text': '9 ' * 17}, 'waveform.pri_us', '16'),
        ({'key': 'waveform.pri_us', 'text': ''}, 'waveform.pri_us', 'PRI'),
        ({'key': 'waveform.pri_us', 'text': '980 0'}, 'waveform.pri_us', 'got 0'),
        ({'key': 'waveform.kind', 'value': 'burst'}, 'waveform.kind', 'dwells or stagger'),
        ({'do': 'add-snow'}, '', 'add-snow'),
        ({'do': None}, '', 'none'),
        ({'do': 'remove-pri', 'index': 2}, 'waveform.pri_us', '2'),
        ({'do': 'remove-pri', 'index': True}, 'waveform.pri_us', 'true'),
        ({'do': 'move-pri', 'index': 0, 'to': 9}, 'waveform.pri_us', '9'),
        ({'do': 'remove-must-see', 'index': 1}, 'must_see', '1'),
        ({'do': 'remark', 'finding': 'visibel', 'text': 'x'}, 'remarks', 'visible'),
        ({'do': 'remark', 'finding': 'visible', 'text': 'x' * 401}, 'remarks.visible', '400'),
        ({'do': 'split', 'key': 'radar.clock_mhz'}, 'radar.clock_mhz', 'Timing clock'),
    ],
)
def test_a_refused_edit_changes_nothing_and_names_its_number(edit, field, words):
    refused = refusal(filled(OPENING), edit)
    assert refused.field == field
    assert words in refused.message


def test_two_ends_that_cross_wait_for_each_other():
    start = filled(OPENING)
    refusal(start, {'key': 'coverage.range_km.0', 'text': '120'})
    wider = apply(start, {'key': 'coverage.range_km.1', 'text': '150'}).document
    assert apply(wider, {'key': 'coverage.range_km.0', 'text': '120'}).document['coverage']['range_km'] == [120, 150]


def test_a_new_interval_is_fifteen_per_cent_longer_than_the_last_and_on_the_clock():
    assert done(plan(), 'add-pri').document['waveform']['pri_us'] == [980, 860, 989]
    assert done(plan([861.3]), 'add-pri').document['waveform']['pri_us'][1] == 990.5
    assert done(plan([1e6]), 'add-pri').document['waveform']['pri_us'] == [1e6, 1e6]


def test_sixteen_intervals_are_the_most_and_one_the_fewest():
    assert refusal(plan([900.0] * 16), {'do': 'add-pri'}).field == 'waveform.pri_us'
    assert refusal(plan([900.0]), {'do': 'remove-pri', 'index': 0}).field.startswith('waveform.pri_us')


def test_lists_for_each_prf_grow_move_sort_and_shrink_with_the_intervals():
    start = plan([980.0, 860.0, 735.0], waveform={'pulses': [9, 10, 11]}, radar={'pulse_us': [1.0, 2.0, 3.0]})
    assert done(start, 'add-pri').document['waveform']['pulses'] == [9, 10, 11, 11]
    assert done(start, 'remove-pri', index=1).document['radar']['pulse_us'] == [1, 3]
    moved = done(start, 'move-pri', index=0, to=2).document
    assert moved['waveform']['pri_us'] == [860, 735, 980]
    assert moved['waveform']['pulses'] == [10, 11, 9]
    ordered = done(start, 'sort-pris').document
    assert ordered['waveform']['pri_us'] == [735, 860, 980]
    assert ordered['radar']['pulse_us'] == [3, 2, 1]


def test_removing_an_interval_lowers_m_and_says_so():
    edited = done(plan(waveform={'detect_m': 2}), 'remove-pri', index=0)
    assert edited.document['waveform']['detect_m'] == 1
    assert len(edited.said) == 1
    assert done(plan(waveform={'detect_m': 1}), 'remove-pri', index=0).said == []


def test_an_emptied_cell_is_a_removed_one():
    assert apply(plan(), {'key': 'waveform.pri_us.0', 'text': ''}).document['waveform']['pri_us'] == [860]


def test_pasted_prfs_are_a_plan_and_their_kind_is_said():
    edited = done(plan(waveform={'detect_m': 2}), 'paste-pris', text='PRI\n1020\n1163\n1300')
    assert edited.document['waveform']['pri_us'] == [1020, 1163, 1300]
    assert edited.said[0] == 'Three PRIs in µs taken.'
    edited = done(plan(), 'paste-pris', text='1000, 1250 Hz')
    assert edited.document['waveform']['pri_us'] == [1000, 800]
    assert edited.said == ['Two PRFs in Hz taken.']


@pytest.mark.parametrize('text', ['1 ' * 10_000, '\x00\x01\x02', 'PRF', 'a b c', '1e999 2', ';;;', '9' * 100_000])
def test_a_paste_of_junk_is_answered_in_one_sentence(text):
    refused = refusal(plan(), {'do': 'paste-pris', 'text': text})
    assert refused.message.count('\n') == 0
    assert len(refused.message) < 160


def test_a_key_is_split_by_prf_and_joined_again():
    apart = done(plan(), 'split', key='radar.pulse_us').document
    assert apart['radar']['pulse_us'] == [1, 1]
    longer = apply(apart, {'key': 'radar.pulse_us.1', 'text': '2'}).document
    assert longer['radar']['pulse_us'] == [1, 2]
    joined = done(longer, 'join', key='radar.pulse_us')
    assert joined.document['radar']['pulse_us'] == 1
    assert len(joined.said) == 1


def test_one_number_typed_for_a_list_makes_it_one_number_again():
    apart = plan(radar={'pulse_us': [1.0, 2.0]})
    assert apply(apart, {'key': 'radar.pulse_us', 'text': '3'}).document['radar']['pulse_us'] == 3


def test_a_stagger_has_one_value_of_everything():
    start = plan(radar={'pulse_us': [1.0, 2.0]}, waveform={'pulses': [9, 10]})
    stagger = apply(start, {'key': 'waveform.kind', 'value': 'stagger'}).document
    assert stagger['radar']['pulse_us'] == 1
    assert stagger['waveform']['pulses'] == 9
    assert read(stagger).kind == 'stagger'


def test_dwells_and_stagger_each_come_back_as_they_were_left():
    start = plan(waveform={'pulses': [9, 10], 'detect_m': 2}, radar={'pulse_us': [1.0, 2.0]})
    kept = {'waveform': {'pri_us': [950, 1140, 1026], 'pulses': 20, 'fill_pulses': 2}, 'doppler': {'delays': 3}}
    first = done(start, 'set-kind', kind='stagger')
    assert 'kept' in first.said[0]
    second = done(start, 'set-kind', kind='stagger', kept=kept)
    assert second.document['waveform']['pri_us'] == [950, 1140, 1026]
    assert second.document['doppler']['delays'] == 3
    assert second.said == []
    back = done(second.document, 'set-kind', kind='dwells', kept=start)
    assert back.document == start


@pytest.mark.parametrize('path', OPTIONAL_RECORDS)
def test_every_optional_record_is_added_with_its_defaults_and_taken_away_again(path):
    name = path.rpartition('.')[2].replace('_', '-')
    added = done(plan(), f'add-{name}').document
    assert isinstance(value_at(added, path), dict)
    assert done(added, f'remove-{name}').document == plan()


def test_rain_starts_as_one_patch_and_goes_up_to_four():
    one = done(plan(), 'add-rain').document
    assert one['rain']['cnr_db'] == 25
    four = one
    for _ in range(3):
        four = done(four, 'add-rain').document
    assert len(four['rain']) == 4
    assert len({patch['name'] for patch in four['rain']}) == 4
    assert refusal(four, {'do': 'add-rain'}).field == 'rain'
    assert len(done(four, 'remove-rain', index=1).document['rain']) == 3
    assert done(four, 'remove-rain').document['rain'] is None
    assert apply(one, {'key': 'rain.speed_mps', 'text': '5'}).document['rain']['speed_mps'] == 5
    assert apply(four, {'key': 'rain.2.speed_mps', 'text': '5'}).document['rain'][2]['speed_mps'] == 5


def test_the_last_patch_that_is_left_stands_alone_again():
    two = done(done(plan(), 'add-rain').document, 'add-rain').document
    assert done(two, 'remove-rain', index=1).document == done(plan(), 'add-rain').document


def test_taking_the_weather_away_asks_about_targets_again():
    weather = apply(plan(), {'key': 'purpose', 'value': 'weather'}).document
    assert weather['weather']['width_mps'] == 2
    assert done(weather, 'remove-weather').document == plan()


def test_must_see_regions_are_added_inside_the_coverage_and_taken_away():
    start = plan(coverage={'range_km': [50, 60], 'speed_mps': [-20, 20]})
    more = done(start, 'add-must-see').document
    region = more['must_see'][0]
    assert 50 <= region['range_km'][0] < region['range_km'][1] <= 60
    assert -20 <= region['speed_mps'][0] < region['speed_mps'][1] <= 20
    assert done(more, 'remove-must-see', index=0).document == start


def test_a_remark_is_written_and_taken_back():
    with_remark = done(plan(), 'remark', finding='visible', text='  agreed  ').document
    assert with_remark['remarks'] == {'visible': 'agreed'}
    assert done(with_remark, 'remark', finding='visible', text='').document == plan()


PATHS = [key.path.replace('[]', '') for key in KEYS]
PLACES = [key.path.replace('[]', '.0') for key in KEYS]
ACTIONS = ['add-pri', 'remove-pri', 'move-pri', 'sort-pris', 'paste-pris', 'split', 'join', 'set-kind', 'add-rain']
ACTIONS += ['remove-rain', 'add-must-see', 'remove-must-see', 'add-near-pulse', 'add-radar-equation', 'remark', 'x']
TEXTS = ['1', '2', '900 Hz', '+10%', 'none', '', '1, 2', '-5']
ANY_KEY = st.one_of(
    st.sampled_from([*PATHS, *PLACES, 'remarks', 'rain', 'must_see.0', 'radar', '']),
    st.builds('{}.{}'.format, st.sampled_from(PLACES), st.integers(0, 20)),
    st.text(max_size=12),
)
ANY_VALUE = st.one_of(
    st.none(), st.booleans(), st.integers(-5, 5000), st.floats(), st.lists(st.integers(1, 9), max_size=3), st.text()
)
EDITS = st.one_of(
    st.fixed_dictionaries({'key': ANY_KEY, 'text': st.one_of(st.text(max_size=12), st.sampled_from(TEXTS))}),
    st.fixed_dictionaries({'key': ANY_KEY, 'value': ANY_VALUE}),
    st.fixed_dictionaries(
        {'do': st.sampled_from(ACTIONS)},
        optional={
            'index': st.one_of(st.integers(-1, 17), st.none()),
            'to': st.integers(-1, 17),
            'text': st.text(max_size=8),
            'key': st.sampled_from(['radar.pulse_us', 'waveform.pulses', 'title', '']),
            'kind': st.sampled_from(['dwells', 'stagger', 'x', None]),
            'finding': st.sampled_from(['visible', 'x', None]),
        },
    ),
)


@settings(max_examples=300)
@given(st.lists(EDITS, max_size=6), st.integers(1, 16))
def test_any_run_of_edits_leaves_a_plan_and_refusals_in_one_sentence(edits, n):
    document = plan([900.0 + 10 * i for i in range(n)])
    for one in edits:
        try:
            document = apply(document, one).document
            message = '.'
        except InputError as refused:
            message = refused.message
        assert message.endswith('.')
        assert '\n' not in message
        assert read(document).document == document
