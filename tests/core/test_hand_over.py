"""What is handed over with a plan: the timing table, its sums, and what changed since the plan that was opened."""

import csv
import io
import json
from pathlib import Path

from pycore import api, link

EXAMPLES = Path(__file__).parents[2] / 'webapp' / 'examples'
OPENING = json.loads((EXAMPLES / 'opening.json').read_text('utf-8'))['plan']


def handed(plan, opened=None):
    return api.hand_over_of(plan, opened)


def column(answer, name):
    return [row[answer['head'].index(name)].replace('\u202f', '') for row in answer['rows']]


def test_intervals_are_told_in_whole_counts_of_the_clock():
    answer = handed(OPENING)
    assert column(answer, 'PRI, counts') == ['9800', '8600']
    assert column(answer, 'starts at, counts') == ['0', '98000']
    assert column(answer, 'lasts, counts') == ['98000', '86000']


def test_the_sums_say_how_long_a_set_is_and_what_is_left():
    said = [sentence.replace('\u202f', ' ') for sentence in handed(OPENING)['sentences']]
    assert said[0] == 'One set takes 184 000 counts of the 10 MHz clock, 18.4 ms.'
    assert said[1] == '10 444 counts of the time on target are left.'  # 1.4/(6 × 12) s are 194 444.4 counts
    assert said[2] == f'Checksum of the plan: {link.write(OPENING).rpartition("=")[2]}.'


def test_a_set_that_does_not_fit_is_said_to_be_missing_counts():
    plan = {**OPENING, 'waveform': {**OPENING['waveform'], 'pulses': 12}}
    assert 'are missing: the set does not fit' in handed(plan)['sentences'][1]


def test_a_pulse_off_the_clock_is_named():
    plan = {**OPENING, 'radar': {**OPENING['radar'], 'pulse_us': 1.05}}
    assert any('fraction' in sentence for sentence in handed(plan)['sentences'])
    assert not any('fraction' in sentence for sentence in handed(OPENING)['sentences'])


def test_the_csv_holds_the_table_with_all_digits():
    answer, table = handed(OPENING), api.timing(OPENING)
    head, *rows = csv.reader(io.StringIO(answer['csv']))
    assert head == table['head']
    assert [[float(cell) for cell in row] for row in rows] == table['rows']


def test_the_plain_text_has_a_line_for_each_quantity_in_even_columns():
    lines = handed(OPENING)['text'].split('\n\n')[0].split('\n')
    assert len(lines) == len(handed(OPENING)['head'])
    assert len({len(line) for line in lines}) == 1
    assert lines[0].split() == ['PRI,', 'counts', '9800', '8600']


def test_what_changed_since_the_plan_that_was_opened_is_listed_before_and_now():
    now = {**OPENING, 'radar': {**OPENING['radar'], 'pulse_us': 1.2}}
    opened = api.note(OPENING)['plan']
    assert handed(now, opened)['changed'] == [['Pulse length', '1.0\u202fµs', '1.2\u202fµs']]
    assert handed(OPENING, opened)['changed'] == []


def test_a_near_pulse_has_its_own_columns():
    near = {'pulse_us': 1, 'sent_at_us': 60, 'to_km': 8}
    plan = {**OPENING, 'radar': {**OPENING['radar'], 'near_pulse': near}}
    assert column(handed(plan), 'near pulse at, counts') == ['600', '600']
    assert any(name.startswith('receiver opens 2') for name in handed(plan)['head'])
