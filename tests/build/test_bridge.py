"""Between worker and core: what goes over the wire."""

import json

import numpy as np
import pytest

from pycore.errors import InputError
from webapp.engine import bridge


@pytest.fixture
def action(monkeypatch):
    """Return a function that makes an action of a function and gives the reply to a request of it."""

    def ask(function, **args):
        monkeypatch.setitem(bridge.api.ACTIONS, 'asked', function)
        text, arrays = bridge.answer(json.dumps({'action': 'asked', 'args': args}))
        return json.loads(text), arrays

    return ask


def test_an_array_lies_in_the_buffer_where_its_place_says(action):
    sent = np.arange(6.0).reshape(2, 3)

    reply, arrays = action(lambda: {'flag': np.array([True, False, True]), 'grid': sent})
    dtype, shape, offset = reply['result']['grid']['$']

    assert (dtype, shape) == ('float64', [2, 3])
    assert offset % 8 == 0
    assert np.array_equal(np.frombuffer(arrays, dtype, 6, offset).reshape(shape), sent)
    assert reply['result']['flag']['$'] == ['uint8', [3], 0]


@pytest.mark.parametrize(
    ('array', 'dtype'),
    [
        (np.array([2**31 - 1, -(2**31)]), 'int32'),
        (np.array([2**31]), 'float64'),
        (np.array([-(2**31) - 1]), 'float64'),
        (np.array([2**63], dtype=np.uint64), 'float64'),
        (np.array([], dtype=np.int64), 'int32'),
        (np.array([1.5], dtype=np.float16), 'float32'),
    ],
)
def test_a_count_that_a_typed_array_cannot_hold_is_sent_wider(action, array, dtype):
    reply, arrays = action(lambda: array)

    assert reply['result']['$'][0] == dtype
    assert np.array_equal(np.frombuffer(arrays, dtype), array)


def test_an_array_in_another_order_of_memory_arrives_row_after_row(action):
    _, arrays = action(lambda: np.asfortranarray([[1.0, 2.0], [3.0, 4.0]]))

    assert np.frombuffer(arrays).tolist() == [1.0, 2.0, 3.0, 4.0]


def test_numbers_that_json_has_no_word_for_become_null(action):
    reply, _ = action(
        lambda: {'nan': float('nan'), 'inf': np.float64('inf'), 'count': np.int64(3), 'words': np.array(['a'])}
    )

    assert reply['result'] == {'nan': None, 'inf': None, 'count': 3, 'words': ['a']}


def test_a_refused_input_names_its_field_and_has_no_traceback(action):
    def refuse():
        raise InputError('radar.pulse_us', 'must be above 0 us')

    reply, _ = action(refuse)

    assert reply['error']['field'] == 'radar.pulse_us'
    assert set(reply['error']) == {'message', 'field'}


def test_a_fault_of_ours_keeps_its_traceback(action):
    reply, _ = action(lambda: 1 / 0)

    assert reply['error']['message'].startswith('ZeroDivisionError')
    assert 'in <lambda>' in reply['error']['traceback']


def test_an_action_that_does_not_exist_is_an_error_not_a_silence():
    text, arrays = bridge.answer('{"action": "gone", "args": {}}')

    assert 'traceback' in json.loads(text)['error']
    assert arrays == b''
