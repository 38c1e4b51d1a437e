"""The plan in words: its grammar case by case, nothing hidden, and every number of it alive once."""

import json
import math
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore import quantity, sentence
from pycore.plan.keys import GROUPS, JUDGED, KEYS
from pycore.plan.reading import filled
from pycore.shown import shown_unit, shown_value
from pycore.wording import SHOWN_UNITS

CASES = json.loads((Path(__file__).parent / 'sentences.json').read_text('utf-8'))
UNITS = st.fixed_dictionaries(
    {
        'range': st.sampled_from(['km', 'nmi']),
        'speed': st.sampled_from(['m/s', 'km/h', 'kt']),
        'pri': st.sampled_from(['us', 'ms', 'Hz', 'kHz']),
    }
)
PRIS = st.lists(st.integers(200, 20_000).map(lambda count: count / 10), min_size=1, max_size=16)


def pieces_of(plan, units=SHOWN_UNITS):
    """All pieces of the paragraph, the cells of the rail among them."""
    for clause in sentence.clauses(plan, units):
        for piece in clause['pieces']:
            yield from (line for cell in piece['rail'] for line in cell) if 'rail' in piece else [piece]


def keys_in(plan, units=SHOWN_UNITS):
    return [piece['key'] for piece in pieces_of(plan, units) if 'key' in piece]


@pytest.mark.parametrize('case', CASES, ids=lambda case: case['name'])
def test_the_paragraph_reads_as_it_was_agreed(case):
    assert sentence.text(filled(case['plan']), {**SHOWN_UNITS, **case['units']}) == case['text']


def test_the_table_of_sentences_has_every_form_of_every_clause():
    used = set()
    for case in CASES:
        known = sentence.facts(filled(case['plan']), {**SHOWN_UNITS, **case['units']})
        taken = set()
        for index, clause in enumerate(sentence.CLAUSES):
            if clause['id'] not in taken and all(known[fact] in values for fact, values in clause['when'].items()):
                taken.add(clause['id'])
                used.add(index)
    assert used == set(range(len(sentence.CLAUSES)))


@given(PRIS, UNITS, st.sampled_from(['dwells', 'stagger']))
def test_every_interval_is_alive_in_the_paragraph_exactly_once(pris, units, kind):
    keys = keys_in(filled({'waveform': {'pri_us': pris, 'kind': kind}}), units)
    assert len(set(keys)) == len(keys)
    assert [key for key in keys if key.startswith('waveform.pri_us')] == [
        f'waveform.pri_us.{i}' for i in range(len(pris))
    ]


@given(PRIS, UNITS)
def test_no_template_mark_is_left_in_the_text(pris, units):
    text = sentence.text(filled({'waveform': {'pri_us': pris}}), units)
    assert not set('{}|@') & set(text)
    assert '  ' not in text
    assert text.endswith('.')


@pytest.mark.parametrize(
    'key', [key for key in KEYS if key.lowest is not None and '[]' not in key.path], ids=lambda key: key.path
)
def test_what_is_shown_and_typed_again_means_the_same_number(key):
    for value in (key.lowest, key.highest, (key.lowest + key.highest) / 3):
        if key.kind == 'count':
            value = int(value)
        text = shown_value(key, value, SHOWN_UNITS)
        assert quantity.read_number(text, key, key.path) == value


@given(st.floats(0.5, 5000))
def test_a_range_from_another_unit_is_shown_to_three_figures_and_never_loses_a_whole_digit(range_km):
    key = next(key for key in KEYS if key.path == 'coverage.range_km')
    shown = shown_value(key, range_km, {**SHOWN_UNITS, 'range': 'nmi'})
    rounding_km = 0.5 * 1.852 * min(1.0, 10 ** (math.floor(math.log10(range_km / 1.852)) - 2)) * (1 + 1e-9)
    assert quantity.read_number(shown, key, key.path) == pytest.approx(range_km, abs=rounding_km)


@given(st.decimals('0.1', '2000', places=2), st.sampled_from(['km/h', 'kt']))
def test_a_speed_that_was_typed_in_a_unit_stands_as_it_was_typed(speed, unit):
    key = next(key for key in KEYS if key.path == 'crossing.speed_mps')
    speed_mps = quantity.read_number(f'{speed} {unit}', key, key.path)
    assert shown_value(key, speed_mps, {**SHOWN_UNITS, 'speed': unit}) == f'{speed.normalize():f}\u202f{unit}'


@pytest.mark.parametrize(
    'key',
    [key for key in KEYS if key.group in GROUPS and key.group != JUDGED and '[]' not in key.path],
    ids=lambda key: key.path,
)
def test_whatever_is_off_its_default_is_named_in_the_paragraph(key):
    if key.path.startswith('crossing.') or key.path == 'waveform.kind':
        return  # the findings and the grammar itself say these
    plan = filled(
        {
            'waveform': {'pri_us': [980, 860]},
            'surface': {},
            'platform': {},
            'target': {'radar_equation': {}},
            'radar': {'near_pulse': {}},
        }
    )
    before = sentence.text(plan)
    value = {'choice': key.choices and key.choices[-1], 'flag': not key.default}.get(key.kind)
    if value is None:
        value = (
            [1.0, -1.0]
            if key.kind == 'numbers'
            else [key.lowest, key.highest]
            if key.kind == 'interval'
            else key.highest
        )
    record, name = plan, key.path.split('.')[-1]
    for part in key.path.split('.')[:-1]:
        record = record[part]
    record[name] = [700.0, 500.0] if key.path == 'waveform.pri_us' else value
    assert sentence.text(plan) != before


def test_a_plan_at_its_defaults_has_no_also_line():
    assert 'Also' not in sentence.text(filled({'waveform': {'pri_us': [980]}}))


@pytest.mark.parametrize(
    ('speeds', 'way'),
    [([0, 300], '(closing)'), ([-300, 0], '(receding)'), ([-10, 300], '(closing above zero, receding below)')],
)
def test_the_way_of_the_wanted_speeds_is_said(speeds, way):
    plan = filled({'waveform': {'pri_us': [980]}, 'coverage': {'speed_mps': speeds}})
    assert f' {way}.' in sentence.text(plan)


def test_the_clauses_are_plain_json():
    assert json.loads(json.dumps(sentence.CLAUSES)) == [dict(clause) for clause in sentence.CLAUSES]


def test_a_preference_that_a_unit_does_not_know_shows_the_plans_own_unit():
    key = next(key for key in KEYS if key.path == 'coverage.range_km')
    assert shown_unit(key, {'range': 'furlong'}) == 'km'
