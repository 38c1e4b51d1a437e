"""What the page asks while the plan stays: another target, a part of a map, what is at one point of a figure."""

import json
import re
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore import api, link
from pycore.columns.here import here_words
from pycore.computed import Computed
from pycore.errors import InputError
from pycore.follow import follow
from pycore.plan.reading import read
from pycore.wording import MINUS, SHOWN_UNITS, THIN_SPACE

PLAN = {
    'radar': {'carrier_ghz': 2.8, 'pulse_us': 1.0, 'recovery_us': 1.0},
    'coverage': {'range_km': [2.0, 110.0], 'speed_mps': [0.0, 300.0]},
    'waveform': {'pri_us': [980.0, 860.0], 'pulses': 9, 'detect_m': 1},
    'doppler': {'notch_mps': 6.0},
}
TARGET = {'range_km': 84.2, 'speed_mps': 183}
EXAMPLES = sorted((Path(__file__).parents[2] / 'webapp' / 'examples').glob('*.json'))
BOTH = ('blind-zones', 'detection')


def plain(text):
    return text.replace(THIN_SPACE, ' ').replace(MINUS, '-')


def at(figure, x, y=None, plan=PLAN, **units):
    return plain(api.here(plan, figure, x, y, units)['text'])


def test_the_line_under_the_map_says_which_prf_is_blind_and_how_deep_in_its_notch():
    # c/(2 · 2.8 GHz · 860 µs) = 62.2493 m/s; 183 − 3 · 62.2493 = −3.75 m/s.
    assert at('blind-zones', 84.2, 183.0) == (
        '84.2 km, 183 m/s: 1 of 2. 980 µs clear; 860 µs in the notch (-3.75 m/s).'
    )


def test_the_line_speaks_in_the_units_of_the_axes():
    said = at('blind-zones', 84.2 / 1.852, 183.0 * 3.6, range='nmi', speed='km/h')
    assert said.startswith('45.46 nmi, 658.8 km/h: 1 of 2.')


def test_an_eclipsed_range_says_what_is_still_received():
    # The 860 µs interval ends at 128.91 km; 0.2 µs (29.98 m) before it a fifth of the echo is heard.
    late = 128.9107 - 0.02998
    wide = {**PLAN, 'coverage': {'range_km': [2.0, 200.0], 'speed_mps': [0.0, 300.0]}}
    assert '860 µs eclipsed (20.0 % received)' in at('eclipsed-ranges', late, plan=wide)


def test_sixteen_prfs_are_counted_and_those_that_are_blind_named():
    plan = {**PLAN, 'waveform': {'pri_us': [900.0 + 7 * i for i in range(16)], 'pulses': 9, 'detect_m': 3}}
    said = at('blind-zones', 84.2, 183.0, plan)
    assert re.match(r'84\.2 km, 183 m/s: \d+ of 16\. In the notch: ', said)
    assert len(said) < 130


@pytest.mark.parametrize('path', EXAMPLES, ids=lambda path: path.stem)
@settings(max_examples=15)
@given(across=st.floats(0, 1), up=st.floats(0, 1))
def test_the_line_and_the_followed_target_agree_on_what_is_clear(path, across, up):
    computed = Computed(read(json.loads(path.read_text('utf-8'))['plan']))
    if computed.is_stagger or computed.plan.n < 2:
        return
    (near, far), (slow, fast) = computed.plan.range_m, computed.plan.speed_m_s
    range_m, speed_m_s = near + across * (far - near), slow + up * (fast - slow)
    said = here_words(computed, 'blind-zones', range_m / 1e3, speed_m_s, SHOWN_UNITS)
    clear = sum(not one.reasons for one in follow(computed, range_m / 1e3 * 1e3, speed_m_s).prfs)
    counted = re.search(r': (\d+) of', said)
    alike = computed.plan.n if 'clear on' in said else 0  # what is alike on all is said of all
    assert (int(counted[1]) if counted else alike) == clear


def test_a_figure_that_has_nothing_to_say_is_silent():
    assert at('dwell', 3.0) == ''
    assert at('blind-zones', 84.2) == ''


def test_a_moved_target_brings_the_marks_that_a_whole_note_would():
    names = ['blind-zones', 'eclipsed-ranges', 'decoding', 'detection']
    view = {'target': TARGET}
    whole = api.note(PLAN, figures=names, view=view)
    moved = api.look(PLAN, marked=names, view=view)
    assert moved['target'] == whole['target']
    assert moved['link'] == whole['link']
    for name in names:
        for source, columns in moved['figures'][name]['columns'].items():
            for column, values in columns.items():
                np.testing.assert_array_equal(values, whole['figures'][name]['columns'][source][column])
        assert moved['figures'][name].get('marked', '') == whole['figures'][name].get('marked', '')


def test_where_only_the_target_moves_no_map_is_computed():
    moved = api.look(PLAN, marked=BOTH, view={'target': TARGET})
    assert all(set(moved['figures'][name]['columns']) == {'target'} for name in BOTH)


@pytest.mark.parametrize('name', BOTH)
def test_a_part_of_a_map_is_computed_at_the_size_of_the_plot_and_the_caption_says_so(name):
    zoom = {name: {'x': [60.0, 87.0], 'y': [100.0, 175.0]}}
    size = {name: {'width': 400, 'height': 200}}
    part = api.look(PLAN, figures=[name], size=size, view={'zoom': zoom})['figures'][name]
    whole = api.look(PLAN, figures=[name], size=size)['figures'][name]
    assert part['ranges']['x'] == [60.0, 87.0]
    assert part['columns']['map']['image'].shape == whole['columns']['map']['image'].shape
    assert plain(part['caption']).endswith('The map shows 60.0 to 87.0 km and 100 to 175 m/s of it.')
    assert (part['zoomed'], whole['zoomed']) == (True, False)
    assert 'The map shows' not in whole['caption']


def test_holes_keep_their_numbers_in_a_part_of_the_map_and_others_are_not_numbered():
    plan = {**PLAN, 'waveform': {'pri_us': [980.0, 860.0], 'pulses': 9, 'detect_m': 2}}
    whole = api.look(plan, figures=['blind-zones'])['figures']['blind-zones']
    second = whole['holes'][1]
    zoom = {'blind-zones': {side: second[side] for side in 'xy'}}
    part = api.look(plan, figures=['blind-zones'], view={'zoom': zoom})['figures']['blind-zones']
    assert second in part['holes']
    assert part['columns']['holes']['text'] == [str(hole['number']) for hole in part['holes']]
    (left, right), (bottom, top) = part['ranges']['x'], part['ranges']['y']
    holes = part['columns']['holes']
    assert all(left <= x <= right and bottom <= y <= top for x, y in zip(holes['x'], holes['y'], strict=True))


def test_a_part_that_an_edit_has_left_outside_the_coverage_is_forgotten():
    zoom = {'blind-zones': {'x': [120.0, 150.0], 'y': [0.0, 90.0]}}
    assert api.look(PLAN, figures=['blind-zones'], view={'zoom': zoom})['figures']['blind-zones']['ranges']['x'] == [
        2,
        110,
    ]


@pytest.mark.parametrize('ends', [[60.0, 'x'], [float('nan'), 90.0], [True, 90.0]])
def test_a_part_whose_ends_are_no_numbers_is_refused(ends):
    with pytest.raises(InputError, match='must be two numbers'):
        api.look(PLAN, view={'zoom': {'detection': {'x': ends, 'y': [0, 90]}}})


@given(range_km=st.floats(0, 1e5), speed=st.floats(-2e4, 2e4))
def test_the_followed_target_comes_back_from_a_link_as_it_was(range_km, speed):
    target = {'range_km': range_km, 'speed_mps': speed}
    assert link.target_of(link.target_text(target)) == target


def test_a_link_opens_with_the_target_it_was_copied_with():
    fragment = api.note(PLAN, view={'target': TARGET})['link']
    assert '&target=84.2km,183mps&' in fragment
    answer = api.note(opened=fragment)
    assert answer['link'] == fragment
    assert answer['opened']['target'] == TARGET
    assert answer['target']['text'].startswith('A target at ')


@pytest.mark.parametrize(
    'text', ['84.2km', '84.2,183mps', '-3km,10mps', '84.2km,1e9mps', 'none,none', '', '84km,183mps,1km']
)
def test_a_target_that_cannot_be_read_is_named_and_the_plan_opens_without(text):
    answer = api.note(opened=f'v=1&pri=980,860us&target={text}')
    assert answer['target'] is None
    assert len(answer['opened']['refused']) == 1


@pytest.mark.parametrize(
    ('name', 'text', 'value'),
    [
        ('range_km', '60nmi', 111.12),
        ('range_km', '84,2', 84.2),
        ('speed_mps', f'{MINUS}30', -30),
        ('speed_mps', '90 km/h', 25),
    ],
)
def test_a_typed_target_understands_units(name, text, value):
    assert api.typed_target(name, text)['value'] == value


def test_a_typed_target_is_meant_in_the_readers_unit():
    assert api.typed_target('range_km', '10', units={'range': 'nmi'})['value'] == 18.52


@pytest.mark.parametrize('text', ['abc', '-4', '', '1e9 km'])
def test_a_target_that_cannot_be_meant_is_refused_in_one_sentence(text):
    with pytest.raises(InputError, match=r'^Range of the target must be from 0 to 100.000 km; got .*\.$'):
        api.typed_target('range_km', text)
