"""The link: every plan there and back exactly, the same text every time, and no cut that passes in silence."""

import copy
import json
import math
import re
from pathlib import Path

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore import link
from pycore.errors import InputError
from pycore.link.items import number_text
from pycore.link.text import deflated
from pycore.plan.keys import KEYS, OPTIONAL_RECORDS
from pycore.plan.reading import filled, read

HERE = Path(__file__).parent
OPENING = json.loads((HERE.parents[1] / 'webapp/examples/opening.json').read_text('utf-8'))['plan']
GOLDEN = json.loads((HERE / 'links_golden.json').read_text('utf-8'))
EXAMPLES = sorted((HERE.parents[1] / 'webapp/examples').glob('*.json'))
BARE = {'waveform': {'pri_us': [980.0, 860.0]}}


def drawn_value(draw, key, n):
    """Draw an allowed value of a key, near its limits as well as anywhere."""
    if key.nullable and draw(st.booleans()):
        return None
    if key.kind == 'flag':
        return draw(st.booleans())
    if key.kind == 'choice':
        return draw(st.sampled_from(key.choices))
    if key.kind == 'text':
        return draw(st.text(max_size=min(key.longest, 12)))
    if key.kind == 'count':
        one = st.integers(int(key.lowest), int(key.highest))
    else:
        one = st.floats(key.lowest, key.highest, allow_subnormal=False).map(lambda value: value or 0.0)
        one = st.one_of(
            one,
            st.sampled_from([key.lowest, key.highest]),
            one.map(lambda value: min(max(round(value, 3), key.lowest), key.highest)),
        )
    if key.kind == 'interval':
        low, high = draw(one), draw(one)
        return sorted((low, high)) if low != high else [key.lowest, key.highest]
    if key.kind == 'numbers':
        return [1.0, *draw(st.lists(one, min_size=1, max_size=4)), 2.5]
    return draw(st.lists(one, min_size=n, max_size=n)) if key.per_prf and draw(st.booleans()) else draw(one)


@st.composite
def plans(draw):
    """Plans in which any number of keys is off its default and any record may be there."""
    n = draw(st.integers(1, 16))
    counts = draw(st.lists(st.integers(150_000, 10_000_000), min_size=n, max_size=n))
    plan = filled({'waveform': {'pri_us': [count / 10 for count in counts]}})
    for path in OPTIONAL_RECORDS:
        if draw(st.booleans()):
            *records, name = path.split('.')
            record = plan
            for part in records:
                record = record[part]
            record[name] = {}
    plan['rain'] = draw(st.sampled_from([None, {}, [{}], [{}, {}]]))
    plan['must_see'] = [{}] * draw(st.integers(0, 3))
    plan = filled(plan)
    for key in draw(st.lists(st.sampled_from(KEYS), max_size=25, unique_by=lambda key: key.path)):
        *records, name = key.path.replace('[]', '').split('.')
        here = plan
        for part in records:
            here = here[-1] if isinstance(here, list) and here else here
            here = here.get(part) if isinstance(here, dict) else None
        here = here[-1] if isinstance(here, list) and here else here
        if isinstance(here, dict) and key.path not in ('waveform.pri_us', 'radar.clock_mhz', 'waveform.kind', 'notes'):
            here[name] = drawn_value(draw, key, n)
    plan['waveform']['detect_m'] = min(plan['waveform']['detect_m'], n)
    if plan['radar']['near_pulse']:
        plan['radar']['near_pulse']['sent_at_us'] = 1e6
        plan['radar']['guard_us'] = 0.0
    return read(plan).document


def without_remarks(plan):
    return {**plan, 'remarks': {}, 'notes': None}


@given(plans())
def test_a_plan_comes_back_from_its_link_exactly(plan):
    opened = link.read_link(link.write(plan))
    assert opened.document == without_remarks(plan)
    assert (opened.cut, opened.edited, opened.refused, opened.said) == (False, False, [], [])


@given(plans())
def test_a_link_made_twice_is_the_same_text(plan):
    fragment = link.write(plan)
    assert link.write(copy.deepcopy(plan)) == fragment
    assert link.write(link.read_link(fragment).document) == fragment


@given(plans())
def test_a_link_holds_only_what_mail_and_chat_leave_alone(plan):
    fragment = link.write(plan)
    assert re.fullmatch(r'[A-Za-z0-9=&,.%~_-]+', fragment)
    assert fragment.startswith('v=1&')
    assert re.search(r'&end=[0-9a-f]{4}$', fragment)


@given(plans(), st.data())
def test_a_link_cut_anywhere_is_announced(plan, data):
    fragment = link.write(plan)
    cut = fragment[: data.draw(st.integers(0, len(fragment) - 1))]
    opened = link.read_link(cut)
    assert opened.cut
    assert read(opened.document)


def test_what_a_cut_link_opens_to_is_in_every_key_the_plan_or_its_default():
    changed = {'waveform': {**OPENING['waveform'], 'pulses': [128, 256], 'decode_blur_gates': 1.25}}
    changed['doppler'] = {'weights': [1, -21, 133], 'window': 'chebyshev', 'notch_mps': 12.5}
    plan, bare = filled({**OPENING, **changed, 'marking': 'Only for the review'}), filled(BARE)
    fragment = link.write(plan)
    for length in range(len(fragment)):
        document = link.read_link(fragment[:length]).document
        for key in (key for key in KEYS if '[]' not in key.path):
            value, whole, default = (value_at(one, key.path) for one in (document, plan, bare))
            assert value in (whole, default, key.default) or (key.path == 'waveform.pri_us' and value == [1000])


def value_at(plan, path):
    for part in path.split('.'):
        plan = None if plan is None else plan[part]
    return plan


@pytest.mark.parametrize('path', EXAMPLES, ids=lambda path: path.stem)
def test_every_worked_example_travels_in_a_readable_link(path):
    plan = filled(json.loads(path.read_text('utf-8'))['plan'])
    fragment = link.write(plan)
    assert link.read_link(fragment).document == plan
    assert '&z=' not in fragment
    assert len(fragment) < 900


def test_the_plan_can_be_read_out_of_the_link():
    fragment = link.write(
        {
            **BARE,
            'radar': {'carrier_ghz': [2.72, 2.88], 'pulse_us': 1.5},
            'coverage': {'range_km': [2, 140], 'speed_mps': [-50, 300]},
        }
    )
    for part in ('carrier=2.72,2.88GHz', 'pulse=1.5us', 'pri=980,860us', 'see=2..140km,-50..300mps'):
        assert f'&{part}&' in fragment


def test_values_equal_to_a_default_are_left_out():
    assert link.write(BARE) == link.write({**BARE, 'radar': {'pulse_us': 1.0}, 'wanted': {'decode_range': False}})
    assert link.write(BARE).count('&') == 2


@pytest.mark.parametrize('golden', GOLDEN, ids=lambda golden: golden['name'])
def test_links_that_were_once_given_away_keep_opening(golden):
    opened = link.read_link(golden['link'])
    assert opened.document == filled(golden['plan'])
    assert not opened.cut
    assert opened.edited == golden.get('edited', False)


def test_a_number_changed_by_hand_loads_and_is_said_to_be_edited():
    fragment = link.write(OPENING).replace('pri=980', 'pri=970')
    opened = link.read_link(fragment)
    assert opened.edited
    assert not opened.cut
    assert opened.document['waveform']['pri_us'] == [970, 860]


@pytest.mark.parametrize(
    ('text', 'carrier'), [('2800MHz', 2.8), ('2.8e0GHz', 2.8), ('9.6GHz', 9.6), ('0.0028e3GHz', 2.8)]
)
def test_units_are_converted_in_decimal(text, carrier):
    assert link.read_link(f'v=1&carrier={text}&pri=980us').document['radar']['carrier_ghz'] == carrier


@pytest.mark.parametrize(
    ('item', 'field'),
    [
        ('pulse=1', 'radar.pulse_us'),
        ('pulse=1u', 'radar.pulse_us'),
        ('pulse=1km', 'radar.pulse_us'),
        ('pulse=1.us', 'radar.pulse_us'),
        ('pulse=.5us', 'radar.pulse_us'),
        ('pulse=+1us', 'radar.pulse_us'),
        ('pulse=nanus', 'radar.pulse_us'),
        ('pulse=1e999us', 'radar.pulse_us'),
        ('pulse=', 'radar.pulse_us'),
        ('pulse=0us', 'radar.pulse_us'),
        ('pulse=980us', 'radar.pulse_us'),
        ('pulse=none', 'radar.pulse_us'),
        ('needs=3', 'waveform.detect_m'),
        ('needs=1.5', 'waveform.detect_m'),
        ('see=2..110km', 'coverage.speed_mps'),
        ('see=110..2km,0..300mps', 'coverage.range_km'),
        ('motion=maybe', 'waveform.decode_motion'),
        ('window=kaiser', 'doppler.window'),
        ('puls=1us', 'puls'),
        ('rain=9', 'rain'),
        ('must1-range=1..2km', 'must_see'),
        ('remark-visibel=x', 'remarks'),
    ],
)
def test_an_item_that_cannot_be_used_is_named_and_the_rest_loads(item, field):
    opened = link.read_link(f'v=1&pri=980,860us&guard=0.5us&{item}&end=0000')
    assert [refused['key'] for refused in opened.refused] == [field]
    message = opened.refused[0]['message']
    assert message.endswith('.')
    assert '\n' not in message
    assert opened.document == filled({**BARE, 'radar': {'guard_us': 0.5}})


def test_markup_in_a_title_is_text_there_and_back():
    title = '<img src=x onerror=alert(1)> & "done" \N{MINUS SIGN} §=%26#'
    fragment = link.write({**BARE, 'title': title})
    assert link.read_link(fragment).document['title'] == title
    assert not set('<>"\' ') & set(fragment)


def test_a_text_that_says_none_is_not_taken_for_no_text():
    assert link.read_link(link.write({**BARE, 'marking': 'none'})).document['marking'] == 'none'
    assert link.read_link(link.write({**BARE, 'marking': None})).document['marking'] is None


def test_remarks_stay_behind_unless_they_are_asked_for():
    plan = filled(
        {**BARE, 'remarks': {'visible': 'Seen & agreed; "so be it"', 'must-see.0': 'later'}, 'notes': 'two\nlines'}
    )
    assert link.read_link(link.write(plan)).document == without_remarks(plan)
    with_them = link.write(plan, remarks=True)
    assert link.read_link(with_them).document == plan
    assert with_them.startswith('v=1&z=')


def test_a_long_plan_is_deflated_and_comes_back():
    names = [
        {'name': 'é' * 40, 'range_km': [1 + 1 / 3 + i, 20 + 1 / 7], 'speed_mps': [1 / 9, 100 / 3]} for i in range(4)
    ]
    plan = filled({**BARE, 'must_see': names, 'title': 'ß' * 120, 'marking': '§' * 80})
    fragment = link.write(plan)
    assert fragment.startswith('v=1&z=')
    assert link.read_link(fragment).document == plan


def test_every_cut_of_a_deflated_link_is_announced_and_gives_a_plan():
    fragment = link.write({**OPENING, 'remarks': {'visible': 'so be it'}}, remarks=True)
    for length in range(len(fragment)):
        opened = link.read_link(fragment[:length])
        assert opened.cut
        assert read(opened.document)


def test_how_the_plan_is_shown_rides_along_and_is_given_back():
    view = {
        'view': 'blind-zones',
        'theme': 'dark',
        'units': 'nmi,kt',
        'with': 'v%3D1%26pri%3D1000us',
        'target': '84km,183mps',
    }
    opened = link.read_link(link.write(BARE, view=view))
    assert opened.view == view
    assert opened.document == filled(BARE)


@pytest.mark.parametrize(
    'before',
    ['#', 'https://example.org/note/index.html#', 'file:///C:/pulsewright.html#', 'https://example.org/?x=1#', '  '],
)
def test_the_address_before_the_fragment_does_not_matter(before):
    fragment = link.write(OPENING)
    opened = link.read_link(before + fragment)
    assert opened.document == filled(OPENING)
    assert not opened.edited


@pytest.mark.parametrize('after', ['.', ',', ')', '>', '"', ' ', '\n', ').', '&'])
def test_a_full_stop_or_bracket_after_a_link_in_a_mail_is_not_an_edit(after):
    opened = link.read_link(link.write(OPENING) + after)
    assert (opened.cut, opened.edited) == (False, False)


def test_ampersands_that_a_mail_has_escaped_are_understood():
    opened = link.read_link(link.write(OPENING).replace('&', '&amp;'))
    assert opened.document == filled(OPENING)
    assert (opened.cut, opened.edited, opened.refused) == (False, False, [])


def test_a_link_of_a_later_version_says_so():
    assert 'version' in link.read_link('v=2&pri=980us&end=0000').refused[0]['message']


def test_a_link_without_intervals_never_passes_for_a_plan():
    opened = link.read_link('v=1&carrier=2.9GHz&end=0000')
    assert [refused['key'] for refused in opened.refused] == ['waveform.pri_us']


def test_a_frequency_written_by_hand_is_put_on_the_clock_and_said():
    opened = link.read_link('v=1&pri=900,1000Hz&end=0000')
    assert opened.document['waveform']['pri_us'] == [1111.1, 1000]
    assert '900 Hz' in ' '.join(opened.said)


def test_an_item_given_twice_is_said():
    opened = link.read_link('v=1&pri=980us&pulse=1us&pulse=2us&end=0000')
    assert 'pulse' in ' '.join(refused['message'] for refused in opened.refused)


@settings(max_examples=300)
@given(st.text(alphabet='v=1&pri,980us.<z#%-e' + chr(0x20AC), max_size=80))
def test_any_text_at_all_opens_to_a_plan_or_is_refused(text):
    try:
        document = link.read_link(text).document
    except InputError as refused:
        document, message = BARE, refused.message
        assert message.endswith('.')
    assert read(document)


def test_a_link_packed_within_a_link_is_not_unpacked_again():
    packed = deflated('pri=980us&z=' + deflated('pulse=2us'))
    opened = link.read_link(f'v=1&z={packed}&z={packed}&end=0000')
    assert opened.document['radar']['pulse_us'] == 1
    assert {refused['key'] for refused in opened.refused} == {'z'}


@pytest.mark.parametrize(
    'text',
    [
        '',
        '#',
        'v=1',
        '%',
        'z=',
        'z=%%%',
        'z=AAAA',
        '&' * 1000,
        '=' * 1000,
        'v=1&pri=' + '9,' * 100_000,
        'v=1&pri=' + '900,' * 100_000 + '900us',
        'v=1&rain=²&must=٣',
        'pri=' + '9' * 10**6 + 'us',
    ],
)
def test_rubbish_is_answered_quickly_and_in_words(text):
    opened = link.read_link(text)
    assert read(opened.document)
    assert opened.cut


@given(st.floats(-1e300, 1e300, allow_nan=False))
def test_a_number_is_spelt_with_digits_on_both_sides_of_its_point(value):
    text = number_text(value)
    assert re.fullmatch(r'-?\d+(\.\d+)?(e-?\d+)?', text)
    assert float(text) == value or math.isclose(float(text), value, rel_tol=0)


def test_a_link_carries_how_the_page_is_shown_and_nothing_that_is_no_such_choice():
    chosen = {'theme': 'dark', 'present': 'dwell', 'target': None, 'zoom': {}}
    assert link.page_items(chosen, ('dwell',)) == {'theme': 'dark', 'present': 'dwell'}
    assert link.page_items({'theme': 'sepia', 'present': '<b>'}, ('dwell',)) == {}
