"""One target followed through, as the page says it and as the figures mark it."""

import re

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore import api, columns
from pycore.columns import followed
from pycore.columns.mark import marked
from pycore.columns.view import View
from pycore.computed import Computed
from pycore.errors import InputError
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS, THIN_SPACE

PLAN = {
    'radar': {'carrier_ghz': 2.8, 'pulse_us': 1.0, 'recovery_us': 1.0},
    'coverage': {'range_km': [2.0, 110.0], 'speed_mps': [-50.0, 300.0]},
    'waveform': {'pri_us': [980.0, 860.0], 'pulses': 9, 'detect_m': 1},
    'doppler': {'notch_mps': 6.0},
    'rain': [{'cnr_db': 25.0, 'at_km': 20.0, 'range_km': [15.0, 45.0], 'speed_mps': -10.0, 'spread_mps': 2.0}],
}
STAGGER = {**PLAN, 'waveform': {'kind': 'stagger', 'pri_us': [980.0, 860.0], 'pulses': 20}}
WRONG = re.compile(rf'nan|\binf\b|None|  | ,|\.\.|[{{}}]|-|{THIN_SPACE}{THIN_SPACE}')


def said(document, range_km, speed_mps):
    mark = marked(Computed(read(document)), {'range_km': range_km, 'speed_mps': speed_mps})
    return followed.words(mark, SHOWN_UNITS)


def test_a_target_that_is_seen_has_its_apparent_place_on_every_prf():
    table = said(PLAN, 130.0, 80.0)
    at, speed, seen = (table['head'].index(name) for name in ('Appears at (km)', 'Apparent speed (m/s)', 'Seen'))
    # c/2 · 860 µs = 128.91 km; c/(2 · 2.8 GHz · 980 µs) = 54.63 m/s.
    assert [row[at] for row in table['rows']] == ['130', '1.09']
    assert [row[speed] for row in table['rows']] == ['25.4', '17.8']
    assert [row[seen] for row in table['rows']] == ['yes', 'yes']
    assert 'It lies outside the coverage.' in table['text']


def test_a_target_in_the_notch_of_both_is_not_seen_and_the_table_says_why():
    table = said(PLAN, 60.0, 0.0)
    assert table['seen'] is False
    assert 'without radial speed, is not seen: it is clear on no PRF and must be on one.' in table['text']
    assert {row[-1] for row in table['rows']} == {'no, in the notch'}


def test_what_is_all_but_certain_is_never_said_to_be_certain():
    near = {**PLAN, 'rain': [], 'coverage': {'range_km': [1.0, 110.0], 'speed_mps': [-50.0, 300.0]}}
    assert 'with probability above 0.9995.' in said(near, 1.5, 80.0)['text']


def test_a_target_under_rain_is_said_to_be_so():
    table = said(PLAN, 30.0, -10.0)
    assert [row[-1] for row in table['rows']] == ['no, under clutter'] * 2
    assert all('rain' in row[table['head'].index('Clutter at its gate')] for row in table['rows'])


def test_the_intervals_of_a_stagger_have_no_verdict_of_their_own():
    assert said(STAGGER, 60.0, 80.0)['head'] == ['PRF', 'Appears at (km)', 'Received']


@settings(max_examples=25, deadline=None)
@given(
    st.sampled_from([PLAN, STAGGER]),
    st.one_of(st.sampled_from([0.0, 2.0, 110.0, 0.3]), st.floats(0, 500)),
    st.one_of(st.sampled_from([0.0, -50.0, 54.63]), st.floats(-900, 900)),
)
def test_no_word_of_a_followed_target_is_broken(document, range_km, speed_mps):
    table = said(document, range_km, speed_mps)
    for text in (table['text'], *table['head'], *(cell for row in table['rows'] for cell in row)):
        assert not WRONG.search(text), text
    assert all(len(row) == len(table['head']) for row in table['rows'])


@pytest.mark.parametrize('name', columns.FIGURES)
@pytest.mark.parametrize('document', [PLAN, STAGGER], ids=['dwells', 'stagger'])
def test_every_figure_marks_the_target_and_none_without_one(name, document):
    computed = Computed(read(document))
    mark = marked(computed, {'range_km': 60.0, 'speed_mps': 80.0})
    size = {'width': 60, 'height': 40}
    with_it, without = (columns.picture(name, computed, SHOWN_UNITS, size, View(one)) for one in (mark, None))
    assert len(with_it['columns']['target']['x']) >= 1
    assert len(without['columns']['target']['x']) == 0
    shapes = ({source: set(data) for source, data in one['columns'].items()} for one in (with_it, without))
    assert next(shapes) == next(shapes)


def test_the_note_follows_a_target_only_where_one_is_given():
    assert api.note(plan=PLAN)['target'] is None
    assert api.note(plan=PLAN, view={'target': {'range_km': 60, 'speed_mps': 80}})['target']['range_km'] == 60


@pytest.mark.parametrize(
    ('target', 'field'),
    [
        ({'range_km': -1, 'speed_mps': 0}, 'target.range_km'),
        ({'range_km': 'x', 'speed_mps': 0}, 'target.range_km'),
        ({'range_km': 1, 'speed_mps': float('nan')}, 'target.speed_mps'),
        ({'range_km': 1}, 'target.speed_mps'),
    ],
)
def test_a_target_that_is_none_is_refused_by_name(target, field):
    with pytest.raises(InputError) as refused:
        api.note(plan=PLAN, view={'target': target})
    assert refused.value.field == field


def test_the_strip_agrees_with_the_plan_where_it_meets_its_own_pris():
    found = api.follow_target({'waveform': {'pri_us': [980]}}, 84.2, 56.0)
    each = found['every_pri']
    nearest = min(range(len(each['pri_us'])), key=lambda place: abs(each['pri_us'][place] - 980))
    assert each['clear'][nearest] == found['seen']
    assert each['received_share'][nearest] == pytest.approx(found['prfs'][0]['received_share'], abs=1e-9)
    assert each['clear'][each['longest']]
    assert len(each['pri_us']) == len(each['until_blind_s'])
