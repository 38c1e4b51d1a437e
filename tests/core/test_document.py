"""A plan handed over in words: JSON, a link, or a bare list; and one sentence for everything else."""

import json

import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore import link
from pycore.document import understood
from pycore.errors import InputError
from pycore.plan.reading import filled, read

PLAN = {'waveform': {'pri_us': [980.0, 860.0], 'pulses': 9}, 'title': 'Ähre'}


def refusal(text):
    with pytest.raises(InputError) as refused:
        read(understood(text))
    message = refused.value.message
    assert message.endswith('.')
    assert '\n' not in message
    assert len(message) < 260
    return refused.value


def test_json_a_link_and_an_address_are_the_same_plan():
    fragment = link.write(PLAN)
    for text in (
        json.dumps(PLAN),
        f'\n {json.dumps(PLAN, indent=2)}\n',
        fragment,
        f'https://example.org/note#{fragment}',
    ):
        assert filled(understood(text)) == filled(PLAN)


@pytest.mark.parametrize(
    ('text', 'pri_us'),
    [
        ('980 860 us', [980, 860]),
        ('980 860', [980, 860]),
        ('1020, 1163 Hz', [980.4, 859.8]),
        ('980,860 us'.replace(',', '; '), [980, 860]),
        ('0.98 ms', [980]),
        ('PRF (kHz)\n1\n2', [1000, 500]),
        ('1 kHz', [1000]),
    ],
)
def test_a_bare_list_of_prfs_or_pris_is_a_plan(text, pri_us):
    assert understood(text)['waveform']['pri_us'] == pri_us


@pytest.mark.parametrize(
    ('text', 'words'),
    [
        ('', 'nothing'),
        ('   \n', 'nothing'),
        ('no-such-file.json', 'no-such-file.json'),
        ('abc', 'abc'),
        ('[980, 860]', 'object'),
        ('"plan"', 'object'),
        ('null', 'null'),
        ('{', 'line 1'),
        ('{"waveform": {"pri_us": [980,]}}', 'line 1'),
        ('{"waveform": {"pri_us": [NaN]}}', 'not a number'),
        ('{"waveform": {"pri_us": [1e400]}}', 'infinity'),
        ('{"waveform": {"pri_us": [' + '9' * 5000 + ']}}', 'digits'),
        ('{"waveform": {"pri_us": [980]}, "waveform": {"pri_us": [860]}}', 'waveform'),
        ('{"a":' * 10_000 + '1' + '}' * 10_000, 'deep'),
        ('[[],' * 10_000 + '1' + ']' * 10_000, 'deep'),
        ('{"<script>alert(1)</script>": 1}', '<script>'),
        ('980 abc us', 'PRI'),
        ('980,860', '980.86'),
        ('1 ' * 100_000, 'PRI'),
        ('-980', 'PRI'),
        ('0 Hz', 'PRI'),
        (link.write(PLAN)[:-5], 'cut'),
        (link.write(PLAN)[:20], 'cut'),
        ('v=1&pri=980us&pulse=1us', 'cut'),
        ('v=1&pri=980us&pulse=1&end=0000', 'Pulse length'),
        ('v=1&puls=1us&pri=980us&end=0000', 'puls'),
        ('v=1&carrier=2.9GHz&end=0000', 'PRI'),
        ('v=2&pri=980us&end=0000', 'version'),
        ('\0\1\2', 'list of PRIs'),
    ],
)
def test_what_is_no_plan_is_answered_in_one_sentence(text, words):
    assert words in refusal(text).message


def test_a_plan_with_very_many_keys_is_answered_at_once():
    text = '{' + ','.join(f'"k{i}":1' for i in range(60_000)) + '}'
    assert 'k0' in refusal(text).message


def test_a_link_edited_by_hand_is_taken_from_the_command_line():
    assert understood(link.write(PLAN).replace('980', '970'))['waveform']['pri_us'] == [970, 860]


@given(st.text(max_size=60))
def test_any_text_is_a_plan_or_refused_in_one_sentence(text):
    try:
        read(understood(text))
        message = 'A plan.'
    except InputError as refused:
        message = refused.message
    assert message.endswith('.')
    assert '\n' not in message
