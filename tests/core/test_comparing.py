"""Two plans side by side in words: what an edit changed, what is better and worse, and the link that carries both."""

import json
from copy import deepcopy
from pathlib import Path
from urllib.parse import unquote

import pytest

from pycore import api, link
from pycore.comparing import from_to
from pycore.plan.document import filled
from pycore.wording import THIN_SPACE

ROOT = Path(__file__).parents[2]
FILES = sorted((ROOT / 'webapp/examples').glob('*.json'))
EXAMPLES = {path.stem: json.loads(path.read_text(encoding='utf-8'))['plan'] for path in FILES}
OPENING = EXAMPLES['opening']
SIGNS = {'better': '+', 'worse': '−', 'same': '='}


def changed(**radar):
    return {**deepcopy(OPENING), 'radar': {**OPENING['radar'], **radar}}


LONGER = changed(pulse_us=1.2)
FAST = changed(carrier_ghz=9.4)


def plain(text):
    return text.replace(THIN_SPACE, ' ')


def by_name(found):
    return {one['name']: one for one in found['findings']}


def test_a_longer_pulse_is_one_line_of_the_minutes():
    line = api.moved_between(LONGER, OPENING)
    assert plain(line['what']) == 'pulse length 1.0 → 1.2 µs'
    assert [(one['name'], plain(one['text']), one['word']) for one in line['findings']] == [
        # The duty of the shorter PRI: 1.0 and 1.2 of 860 µs.
        ('duty', '0.116 → 0.140 %', 'worse')
    ]


def test_a_verdict_that_flips_is_told_in_words():
    raised = deepcopy(OPENING)
    raised['wanted'] = {**OPENING.get('wanted', {}), 'visible_pct': 99.0}
    assert by_name(api.moved_between(raised, OPENING))['visible']['flipped'] == 'no longer met'
    assert by_name(api.moved_between(OPENING, raised))['visible']['flipped'] == 'now met'


def test_a_line_has_the_link_that_opens_its_plan():
    line = api.moved_between(LONGER, OPENING)
    assert link.read_link(line['link']).document == filled(LONGER)


def test_a_line_of_many_inputs_names_the_first_three():
    line = api.moved_between(EXAMPLES['eight-prfs'], OPENING)
    assert line['what'].count('→') == 3
    assert line['what'].endswith('more inputs')


# Each with its neighbour and with itself: all pairs take long and show nothing more.
@pytest.mark.parametrize(('one', 'other'), [*zip(EXAMPLES, list(EXAMPLES)[1:], strict=False), ('opening', 'opening')])
def test_each_finding_of_two_plans_has_a_sign_and_a_word(one, other):
    found = api.compare(EXAMPLES[one], EXAMPLES[other])
    for finding in found['findings']:
        assert finding['sign'] == SIGNS.get(finding['change'], '·')
        assert finding['word'].startswith(('better', 'worse', 'the same', 'only in'))
    assert bool(found['inputs']) is (one != other)
    assert found['summary'].startswith('No inputs differ') is (one == other)
    assert found['summary'].endswith('.')


def test_what_is_better_one_way_is_worse_the_other_way():
    there, back = by_name(api.compare(FAST, OPENING)), by_name(api.compare(OPENING, FAST))
    opposite = {'better': 'worse', 'worse': 'better', 'same': 'same', 'new': 'gone', 'gone': 'new'}
    assert {name: one['change'] for name, one in back.items()} == {
        name: opposite[one['change']] for name, one in there.items()
    }
    assert {'better', 'worse'} & {one['change'] for one in there.values()}


def test_a_difference_too_small_to_show_says_so():
    hair = changed(pulse_us=1.000001)
    duty = by_name(api.compare(hair, OPENING))['duty']
    assert duty['value_text'] == duty['other_text']
    assert duty['word'] == 'worse, by less than is shown'


@pytest.mark.parametrize(
    ('before', 'after', 'text'),
    [
        ('1.0_µs', '1.2_µs', '1.0 → 1.2_µs'),
        ('none', '1920_s', 'none → 1920_s'),
        ('900_µs', '1.2_ms', '900_µs → 1.2_ms'),
        ('10_000_km', '12_000_km', '10_000_km → 12_000_km'),
        ('9', '10', '9 → 10'),
    ],
)
def test_a_unit_that_two_values_share_is_written_once(before, after, text):
    told = from_to(before.replace('_', THIN_SPACE), after.replace('_', THIN_SPACE))
    assert told.replace(THIN_SPACE, '_') == text


def test_the_note_of_a_plan_with_a_kept_one_says_how_they_differ():
    note = api.note(LONGER, view={'kept': OPENING})
    assert note['kept']['plan'] == filled(OPENING)
    assert [one['key'] for one in note['kept']['inputs']] == ['radar.pulse_us']
    assert api.note(LONGER)['kept'] is None


def test_a_link_carries_the_plan_to_compare_with_encoded_once():
    note = api.note(LONGER, view={'kept': OPENING})
    carried = dict(part.partition('=')[::2] for part in note['link'].split('&'))['with']
    assert unquote(carried) == link.write(OPENING)
    again = api.note(opened=note['link'])
    assert (again['plan'], again['kept']['plan'], again['link']) == (note['plan'], note['kept']['plan'], note['link'])
    assert again['opened']['said'] == []


def test_the_plan_that_a_link_carries_goes_before_the_one_kept_on_the_page():
    opened = api.note(LONGER, view={'kept': OPENING})['link']
    assert api.note(opened=opened, view={'kept': FAST})['kept']['plan'] == filled(OPENING)
    assert api.note(opened=link.write(LONGER), view={'kept': FAST})['kept']['plan'] == filled(FAST)


def test_what_a_carried_plan_itself_was_compared_with_is_left_out():
    inner = api.note(FAST, view={'kept': LONGER})['link']
    outer = link.write(OPENING, view={'with': inner.replace('%', '%25').replace('&', '%26').replace('=', '%3D')})
    note = api.note(opened=outer)
    assert note['kept']['plan'] == filled(FAST)
    assert 'with' not in unquote(note['link'].partition('with=')[2])


def test_a_link_that_is_cut_inside_the_carried_plan_says_so():
    whole = api.note(LONGER, view={'kept': OPENING})['link']
    end = whole.index('with=')
    for cut in range(end + 60, len(whole) - 1, 11):
        note = api.note(opened=whole[:cut])
        assert note['opened']['cut']
        assert note['plan']['radar']['pulse_us'] == 1.2
        assert note['kept'] or any('nothing is compared' in said for said in note['opened']['said'])


@pytest.mark.parametrize('carried', ['', '%', 'v%3D1', '%00%ff', 'z%3D!!', 'v%3D1%26pri%3Dabc'])
def test_a_carried_plan_that_cannot_be_read_is_one_sentence(carried):
    note = api.note(opened=link.write(OPENING, view={'with': carried}))
    assert note['kept'] is None
    (said,) = note['opened']['said']
    assert said == 'The plan to compare with could not be read from the link; nothing is compared.'


def test_a_plan_that_is_looked_at_again_gives_the_same_answer():
    first = api.note(OPENING, view={'kept': FAST}, figures=('trade-line',))
    api.note(FAST, view={'kept': OPENING})
    again = api.note(OPENING, view={'kept': FAST}, figures=('trade-line',))
    assert first['findings'] == again['findings']
    assert first['kept'] == again['kept']
