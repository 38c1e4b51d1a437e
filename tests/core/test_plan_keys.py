"""The table of keys: complete, documented, and each key within its own limits."""

import json
from pathlib import Path

import pytest

from pycore import link
from pycore.plan import keys as plan_keys
from pycore.plan.keys import GROUPS, KEYS, OPTIONAL_RECORDS
from pycore.plan.reading import filled, read
from pycore.units import FAMILIES

OPENING = json.loads((Path(__file__).parents[2] / 'webapp/examples/opening.json').read_text('utf-8'))['plan']
BARE = {'waveform': {'pri_us': [980.0, 860.0]}}
IN_THE_HEAD = ('pulsewright', 'remarks')

each_key = pytest.mark.parametrize('key', KEYS, ids=lambda key: key.path)
each_number = pytest.mark.parametrize('key', [key for key in KEYS if key.lowest is not None], ids=lambda key: key.path)


def with_everything():
    """A plan in which every record is there."""
    plan = filled(BARE)
    for path in OPTIONAL_RECORDS:
        *records, name = path.split('.')
        record = plan
        for part in records:
            record = record[part]
        record[name] = {}
    return filled({**plan, 'rain': {}, 'must_see': [{}]})


def leaves(value, path=''):
    """Yield the path of everything that is not a record."""
    if not isinstance(value, dict):
        yield path
    else:
        for name, one in value.items():
            yield from leaves(one, f'{path}.{name}' if path else name)


def at(plan, path):
    """Return what a key's path means in a plan; the first of a list of records."""
    for part in path.replace('[]', '').split('.'):
        plan = plan[0][part] if isinstance(plan, list) else plan[part]
    return plan


def put(plan, path, value):
    *records, name = path.replace('[]', '').split('.')
    for part in records:
        plan = plan[0][part] if isinstance(plan, list) else plan[part]
    (plan[0] if isinstance(plan, list) else plan)[name] = value


def another_value(key):
    """Return an allowed value of a key that is not its default."""
    if key.kind == 'flag':
        return not key.default
    if key.kind == 'text':
        return 'none' if key.nullable else 'Ähre & <b>1</b>'
    if key.kind == 'choice':
        return next(choice for choice in key.choices if choice != key.default)
    if key.kind == 'interval':
        return [key.lowest, key.highest]
    if key.kind == 'numbers':
        return [900.0, 970.0] if key.path == 'waveform.pri_us' else [1.0, -2.0, 1.0]
    within_the_others = {
        'waveform.detect_m': 2,
        'radar.clock_mhz': 20.0,
        'radar.pulse_us': 5.0,
        'radar.guard_us': 5.0,
        'radar.near_pulse.sent_at_us': 50.0,
    }
    return within_the_others.get(key.path, key.highest if key.highest != key.default else key.lowest)


@each_key
def test_every_key_is_named_and_explained(key):
    assert key.label[0].isupper()
    assert len(key.help) > 5
    assert key.help.endswith('.')
    assert key.short == key.short.lower()
    assert set(key.short) <= set('abcdefghijklmnopqrstuvwxyz-')
    assert key.group in (*GROUPS, '')


def test_no_two_keys_share_a_label_or_a_path():
    assert len({key.path for key in KEYS}) == len(KEYS)
    assert len({key.label for key in KEYS}) == len(KEYS)


def test_no_two_keys_of_one_record_share_a_short_form():
    alone = [key.short for key in KEYS if '[]' not in key.path]
    assert len(set(alone)) == len(alone)
    for record in ('must_see[]', 'rain[]'):
        inside = [key.short for key in KEYS if key.record == record]
        assert len(set(inside)) == len(inside)


@each_number
def test_every_number_has_limits_in_order_and_a_family_that_knows_its_unit(key):
    assert key.lowest < key.highest
    assert key.unit in FAMILIES[key.family]
    assert key.step > 0


@each_number
def test_a_default_lies_within_its_own_limits(key):
    values = key.default if isinstance(key.default, list) else [key.default]
    assert all(value is None or key.lowest <= value <= key.highest for value in values)
    assert key.nullable or key.default is not None or key.path == 'waveform.pri_us'


@pytest.mark.parametrize(
    'key', [key for key in KEYS if key.nullable and key.lowest is not None], ids=lambda key: key.path
)
def test_a_number_that_may_be_none_has_a_value_to_begin_with(key):
    start = key.default if key.default is not None else key.start
    assert all(key.lowest <= one <= key.highest for one in (start if isinstance(start, list) else [start]))
    plan = with_everything()
    put(plan, key.path, start)
    assert at(read(plan).document, key.path) == start


def test_the_table_holds_every_key_of_a_plan_written_out_in_full():
    known = {key.path.replace('[]', '') for key in KEYS}
    records = set(OPTIONAL_RECORDS) | {'rain', 'must_see', *IN_THE_HEAD}
    assert set(leaves(OPENING)) <= known | records
    assert len(KEYS) >= 85


def test_a_plan_written_out_in_full_is_what_its_defaults_fill_it_to():
    assert filled(OPENING) == OPENING


def test_the_defaults_of_a_bare_plan_ask_for_nothing_and_assume_no_clutter():
    plan = filled(BARE)
    assert [name for name in ('rain', 'surface', 'crossing', 'platform', 'holds_over', 'weather') if plan[name]] == []
    assert plan['must_see'] == []
    assert plan['radar']['near_pulse'] is None
    assert set(plan['wanted'].values()) == {None, False}
    assert plan['title'] == ''
    assert plan['remarks'] == {}


@each_key
def test_every_key_can_be_set_and_travels_in_a_link_under_its_short_form(key):
    plan, value = with_everything(), another_value(key)
    put(plan, key.path, value)
    fragment = link.write(read(plan).document, remarks=key.path == 'notes')
    assert at(link.read_link(fragment).document, key.path) == value
    if key.path != 'notes':
        short = 'see' if key.record == 'coverage' else key.short
        assert f'{short}=' in fragment


def test_the_table_for_the_page_is_plain_json_and_loses_nothing():
    table = plan_keys.table()
    assert json.loads(json.dumps(table)) == [{**row, 'choices': list(row['choices'])} for row in table]
    assert [row['path'] for row in table] == [key.path for key in KEYS]
