"""A table of the reader's own is read as spreadsheets write it, and held against the plan cell by cell."""

import json
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore import api
from pycore.errors import InputError
from pycore.own_table import read_table

EXAMPLES = Path(__file__).parents[2] / 'webapp' / 'examples'
OPENING = json.loads((EXAMPLES / 'opening.json').read_text('utf-8'))['plan']
STAGGER = json.loads((EXAMPLES / 'four-pulse-stagger.json').read_text('utf-8'))['plan']
UNITS = {'range': 'km', 'speed': 'm/s'}
NAUTICAL_MILE_M = 1852.0


def read(text):
    return read_table(text, UNITS)


@pytest.mark.parametrize(
    'text',
    [
        '2.5,30,1\n40,58,0\n',
        '2.5;30;1\n40;58;0',
        '2,5;30;yes\r\n40;58;no\r\n',
        '2,5\t30,0\tseen\n40\t58\tblind',
        'range (km), speed (m/s), seen\n2.5, 30, 1\n40, 58, 0',
        '\ufeffrange_km,speed_mps,seen\n2.5,30,true\n40,58,false',
        'seen;speed km/h;range m\nyes;108;2500\nno;208,8;40000',
        '"2.5","30","1"\n\n"40","58","0"\n',
        '2.5 km, 30 m/s, x\n40 km, 58 m/s, -',
        '2.5 30 1\n40 58 0',
    ],
)
def test_the_same_two_cells_are_read_however_they_were_written(text):
    table = read(text)
    assert table.range_m == pytest.approx([2500, 40_000])
    assert table.speed_m_s == pytest.approx([30, 58])
    assert table.seen.tolist() == [True, False]


def test_without_a_heading_the_units_of_the_reader_are_meant():
    table = read_table('10,100,1', {'range': 'nmi', 'speed': 'kt'})
    assert table.range_m == pytest.approx([10 * NAUTICAL_MILE_M])
    assert table.speed_m_s == pytest.approx([100 * NAUTICAL_MILE_M / 3600])


@pytest.mark.parametrize(
    ('text', 'message'),
    [
        ('', 'The table is empty'),
        ('range,speed,seen', 'a heading and no lines'),
        ('2,30,1\n4,abc,1', 'Line 2: speed must be a number; got “abc”.'),
        ('2,30,1\n4,30', 'Line 2: range, speed and seen are wanted; got “4,30”.'),
        ('2,30,1\n4,30,maybe', 'Line 2: seen must be 1 or 0, yes or no; got “maybe”.'),
        ('2,30,0.7', 'Line 1: seen must be 1 or 0, yes or no; got “0.7”.'),
        ('-2,30,1', 'Line 1: range must be from 0 to 100000 km; got “-2”.'),
        ('2,nan,1', 'Line 1: speed must be a number; got “nan”.'),
        ('2,1e999,1', 'Line 1: speed must be a number'),
        ('2 furlongs,3,1', 'Line 1: range must be a number; got “2 furlongs”.'),
        ('range,height,seen\n2,3,1', 'Line 1: the heading names no column speed'),
        ('PK\x03\x04\x00\x00', 'This is not a table as text'),
        ('\ufffd' * 5000, 'This is not a table as text'),
        ('a' * 100_000, 'a heading and no lines'),
        ('1,2,1\n' * 200_001, 'The table may have 200000 lines at most; got 200001.'),
    ],
)
def test_what_cannot_be_read_is_answered_in_one_sentence_with_its_line(text, message):
    with pytest.raises(InputError) as refused:
        read(text)
    assert message in refused.value.message
    assert len(refused.value.message) < 140
    assert '\n' not in refused.value.message


@settings(max_examples=60, deadline=None)
@given(st.text(max_size=300))
def test_no_text_is_answered_with_a_fault_of_ours(text):
    try:
        said = f'{read(text).seen.size} cells'
    except InputError as refused:
        said = refused.message
    assert said.count('\n') == 0


def cells_of(plan, count, seed):
    """Random cells of the coverage and what the plan itself says of each, asked one target at a time."""
    draw = np.random.default_rng(seed)
    ranges = draw.uniform(*plan['coverage']['range_km'], count)
    speeds = draw.uniform(*plan['coverage']['speed_mps'], count)
    return [
        (r, v, api.follow_target(plan, r, v)['seen']) for r, v in zip(ranges.tolist(), speeds.tolist(), strict=True)
    ]


@pytest.mark.parametrize('plan', [OPENING, STAGGER], ids=['dwells', 'stagger'])
def test_a_table_made_by_following_one_target_after_the_other_agrees_in_every_cell(plan):
    plan = {**plan, 'surface': None, 'rain': None}  # of one target it is also said that clutter covers it
    cells = cells_of(plan, 40, 7)
    answer = api.agreement_with(plan, '\n'.join(f'{r!r},{v!r},{int(seen)}' for r, v, seen in cells))
    assert (answer['cells'], answer['agree']) == (40, 40)
    assert answer['sentences'][0] == 'All 40 cells agree with the plan.'
    assert answer['rows'] == []


def test_cells_that_disagree_are_listed_with_the_reason_on_each_prf():
    text = '10,57,1\n10,30,1\n50,3,yes\n10,200,no'
    answer = api.agreement_with(OPENING, text)
    assert answer['agree'] == 1
    assert answer['sentences'][0] == (
        'One of four cells agrees, 25.0\u202f%; two are seen in your table and not here and one is seen here and '
        'not in your table.'
    )
    rows = [[cell.replace('\u202f', ' ') for cell in row] for row in answer['rows']]
    assert rows[0] == ['1', '10', '57', 'seen', 'not seen', '980 and 860 µs in the notch']
    assert rows[1] == ['3', '50', '3', 'seen', 'not seen', '980 and 860 µs in the notch']
    assert rows[2][3:] == ['not seen', 'seen', '980 and 860 µs clear']


def test_an_eclipsed_range_is_called_so():
    text = '146.95,30,0'  # just beyond c/2 × 980 µs; 860 µs still sees it
    assert 'eclipsed' in api.agreement_with(OPENING, text)['rows'][0][5]


def test_cells_at_an_edge_are_counted_for_a_grid_cuts_edges_otherwise():
    edge = 299_792_458 / 2.8e9 / (2 * 980e-6) + 6  # where 980 µs is clear again
    answer = api.agreement_with(OPENING, f'10,{edge - 0.05!r},1\n10,58,1')
    assert any(sentence.startswith('One of these lies within half a gate') for sentence in answer['sentences'])


def test_only_the_first_twenty_disagreements_are_listed():
    answer = api.agreement_with(OPENING, '10,57,1\n' * 300)
    assert len(answer['rows']) == 20
    assert answer['cells'] == 300


def test_cells_beyond_the_coverage_are_compared_too():
    assert api.agreement_with(OPENING, '500,2000,1\n0,0,0')['cells'] == 2


def test_of_a_single_cell_it_is_spoken_in_the_singular():
    assert api.agreement_with(OPENING, '10,57,0')['sentences'][0] == 'The one cell agrees with the plan.'
    assert api.agreement_with(OPENING, '10,57,1')['sentences'][0].startswith('None of one cell agree, 0')
