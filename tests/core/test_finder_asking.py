"""The limits of a search as a person changes them: typed, stepped, chosen, refused in one sentence, said in words."""

import copy
import json
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore.errors import InputError
from pycore.finder.asking import edited
from pycore.finder.keys import BY_PATH, table
from pycore.finder.limits import check
from pycore.finder.plan import limits_of
from pycore.finder.sentence import from_the_plan, pieces
from pycore.wording import SHOWN_UNITS

EXAMPLES = Path(__file__).parents[2] / 'webapp' / 'examples'


def example(name):
    return json.loads((EXAMPLES / f'{name}.json').read_text('utf-8'))['plan']


SKERRY, STAGGER = example('opening'), example('four-pulse-stagger')
IN_PRF = {**SHOWN_UNITS, 'pri': 'Hz'}


def asked_after(*edits, plan=SKERRY, asked=None, units=SHOWN_UNITS):
    asked = asked or {}
    for path, text in edits:
        how = 'text' if isinstance(text, str) and BY_PATH[path.rstrip('.01')].kind != 'choice' else 'value'
        asked = edited(plan, asked, {'key': path, how: text}, units)
    return asked


def said(plan=SKERRY, asked=None, units=SHOWN_UNITS):
    words = []
    for piece in pieces(limits_of(plan, asked or {}), asked or {}, units):
        options = dict(map(tuple, piece.get('options', ())))
        words.append(piece.get('shown') or options.get(piece.get('value')) if 'options' in piece else None)
        words[-1] = words[-1] or piece.get('shown') or ('' if 'set' in piece or 'do' in piece else piece.get('text'))
    return ''.join(words).replace('\N{NARROW NO-BREAK SPACE}', ' ').strip()


def test_the_opening_plan_gives_its_own_limits_in_words():
    assert said() == (
        'Look for 2 PRFs, 1 of which must see a target, at intervals from 430 to 1960 µs in whole clock counts, any '
        'two at least 0.1 µs apart. Ranges to 110 km must decode with blur. All CPIs must fit into 19.44 ms.'
    )
    assert from_the_plan(limits_of(SKERRY), SHOWN_UNITS).replace('\N{NARROW NO-BREAK SPACE}', ' ') == (
        'The plan asks for at least 95 % of the coverage from 2 to 110 km and from 0 to 300 m/s, final approach seen '
        'in full and a duty of at most 10 %.'
    )


def test_a_stagger_is_asked_for_its_mean_and_its_spread():
    text = said(STAGGER)
    assert 'intervals that repeat' in text
    assert 'with a mean from 1059.25 to 1170.75 µs, the longest at most 2 times the shortest' in text
    assert 'decode' not in text


@pytest.mark.parametrize(
    ('path', 'text', 'name', 'value'),
    [
        ('find.n', '3', 'n', 3),
        ('find.pri_us.0', '700', 'pri_us', [700, 1960]),
        ('find.pri_us.1', '1 kHz', 'pri_us', [430, 1000]),
        ('find.pri_us.1', '1.2 ms', 'pri_us', [430, 1200]),
        ('find.apart_us', '5', 'apart_us', 5),
        ('find.keep_us', '980, 860', 'keep_us', [980, 860]),
        ('find.keep_us', '1000 Hz', 'keep_us', [1000]),
        ('find.avoid_us', '800 to 820', 'avoid_us', [[800, 820]]),
        ('find.avoid_us', '820..800 and 900 to 910 µs', 'avoid_us', [[800, 820], [900, 910]]),
        ('find.hole_km', '2 nmi', 'hole_km', 3.704),
        ('find.hole_mps', '36 km/h', 'hole_mps', 10),
        ('find.cpi_ms', '8000 us', 'cpi_ms', 8),
        ('find.time_ms', '25', 'time_ms', 25),
        ('find.decode', 'exact', 'decode', 'exact'),
        ('find.grid', 'gates', 'whole_gates', True),
    ],
)
def test_what_is_typed_is_asked_for_in_the_units_of_its_name(path, text, name, value):
    assert asked_after((path, text))[name] == value


def test_a_relative_edit_moves_an_end_of_the_interval():
    assert asked_after(('find.pri_us.1', '-50%'))['pri_us'] == [430, 980]


def test_in_the_units_of_the_reader_a_plain_number_is_a_frequency():
    assert asked_after(('find.pri_us.1', '1000'), units=IN_PRF)['pri_us'] == [430, 1000]
    assert '1000 Hz' in said(asked={'pri_us': [430, 1000]}, units=IN_PRF)


def test_fewer_prfs_bring_the_needed_ones_down_with_them():
    asked = asked_after(('find.n', '4'), ('find.m', '4'), ('find.n', '2'))
    assert (asked['n'], asked['m']) == (2, 2)


def test_none_and_as_the_plan_take_a_limit_back():
    asked = asked_after(('find.hole_km', '5'), ('find.hole_km', 'none'))
    assert 'hole_km' not in asked
    assert edited(SKERRY, {'n': 5, 'm': 2}, {'do': 'as-the-plan'}, SHOWN_UNITS) == {}


def test_what_was_asked_for_stands_in_the_sentence():
    asked = asked_after(
        ('find.grid', 'steps'),
        ('find.step_us', '2'),
        ('find.keep_us', '980 860'),
        ('find.avoid_us', '800 to 820'),
        ('find.hole_km', '5'),
        ('find.hole_mps', '10'),
        ('find.cpi_ms', '8'),
    )
    text = said(asked=asked)
    for part in (
        'in whole steps of 2 µs',
        'Every set keeps 980 and 860 µs.',
        'No PRI lies from 800 to 820 µs.',
        'No hole may be longer than 5 km and wider than 10 m/s.',
        'Each CPI sends the pulses that fit into 8 ms.',
    ):
        assert part in text


@pytest.mark.parametrize(
    ('path', 'text', 'message'),
    [
        ('find.n', '0', 'Number of PRFs must be from 1 to 16; got 0.'),
        ('find.n', '1.5', 'Number of PRFs must be a whole number from 1 to 16; got “1.5”.'),
        ('find.n', 'abc', 'Number of PRFs must be from 1 to 16; got “abc”.'),
        ('find.m', '3', 'M must be from 1 to the 2 PRIs; got 3.'),
        ('find.pri_us.0', '5000', 'must run from a shorter to a longer end; got from 5000 to 1960 µs.'),
        ('find.keep_us', '900 910 920', 'More PRIs to keep than the 2 of the plan.'),
        ('find.avoid_us', '800', 'must be intervals such as 800 to 820 µs'),
        ('find.time_ms', '-1', 'Time on target must be'),
        ('find.grid', 'x', 'must be one of clock, gates, steps'),
        ('find.apart_us', '', 'Least difference must be from 0 to 100\N{NARROW NO-BREAK SPACE}000 µs; got nothing.'),
    ],
)
def test_what_cannot_be_searched_is_refused_in_one_sentence_that_names_its_number(path, text, message):
    with pytest.raises(InputError) as refused:
        asked_after((path, text))
    assert message in refused.value.message
    assert refused.value.field == path
    assert '\n' not in refused.value.message


def test_a_clock_finer_than_ten_million_counts_in_a_pri_is_refused():
    plan = copy.deepcopy(SKERRY)
    plan['radar']['clock_mhz'] = 1000
    with pytest.raises(InputError, match='take a coarser clock'):
        edited(plan, {}, {'key': 'find.pri_us.1', 'text': '1 s'}, SHOWN_UNITS)


@given(st.sampled_from(sorted(BY_PATH)), st.sampled_from(['', '.0', '.1']), st.text(max_size=12))
def test_whatever_is_typed_is_taken_whole_or_refused_with_a_sentence(path, end, text):
    kind = BY_PATH[path].kind
    path = f'{path}{(end or ".0") if kind == "interval" else ""}'
    plan = STAGGER if path.startswith(('find.mean', 'find.spread')) else SKERRY
    try:
        asked = edited(plan, {}, {'key': path, 'value' if kind == 'choice' else 'text': text}, SHOWN_UNITS)
        check(limits_of(plan, asked))
    except InputError as refused:
        message = refused.message
    else:
        message = '.'
    assert message.endswith('.')


@pytest.mark.parametrize('plan', [SKERRY, STAGGER])
def test_every_live_number_of_the_sentence_has_a_key_and_every_offer_can_be_taken(plan):
    for piece in pieces(limits_of(plan), {}, SHOWN_UNITS):
        if 'key' in piece:
            assert piece['key'].rstrip('.01') in BY_PATH
        if 'set' in piece:
            assert edited(plan, {}, {'key': piece['set'], 'value': piece['value']}, SHOWN_UNITS) != {}


def test_every_number_that_can_be_stepped_has_ends():
    for key in table():
        assert key['kind'] == 'choice' or key['lowest'] < key['highest']
