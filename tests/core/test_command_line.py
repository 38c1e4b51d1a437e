"""The command line, called as a function: what it prints, its exit status, and its one line for bad input."""

import copy
import csv
import io
import json
from pathlib import Path

import pytest

from pycore import api, link
from pycore.__main__ import main

EXAMPLES = {
    path.stem: json.loads(path.read_text('utf-8'))['plan']
    for path in sorted((Path(__file__).parents[2] / 'webapp' / 'examples').glob('*.json'))
}
OPENING = EXAMPLES['opening']


class Bytes(io.StringIO):
    """Standard input with the bytes behind it."""

    def __init__(self, data):
        super().__init__()
        self.buffer = io.BytesIO(data)


@pytest.fixture
def saved(tmp_path):
    """Write a plan, or any text or bytes, to a file and give its path."""

    def write(content, name='plan.json'):
        path = tmp_path / name
        if isinstance(content, bytes):
            path.write_bytes(content)
        else:
            path.write_text(content if isinstance(content, str) else json.dumps(content), 'utf-8')
        return str(path)

    return write


def changed(**changes):
    """The opening plan with some keys changed."""
    document = copy.deepcopy(OPENING)
    for path, value in changes.items():
        *records, name = path.split('__')
        here = document
        for record in records:
            here = here[record]
        here[name] = value
    return document


# --- assess ------------------------------------------------------------------------------------------------------


@pytest.mark.parametrize('name', EXAMPLES)
def test_a_file_a_link_and_standard_input_give_the_same_json(name, saved, capsys, monkeypatch):
    printed = []
    for words in (saved(EXAMPLES[name]), link.write(EXAMPLES[name]), '-'):
        monkeypatch.setattr('sys.stdin', Bytes(json.dumps(EXAMPLES[name]).encode()))
        assert main(['assess', words, '--json']) == 0
        printed.append(json.loads(capsys.readouterr().out))
    assert printed[0] == printed[1] == printed[2] == api.assess(EXAMPLES[name])


def test_a_bare_list_of_pris_is_a_plan(capsys):
    assert main(['assess', '980 860 us', '--json']) == 0
    answer = json.loads(capsys.readouterr().out)
    assert [prf['pri_us'] for prf in answer['prfs']] == [980, 860]
    assert answer == api.assess({'waveform': {'pri_us': [980, 860]}})


def test_a_bare_list_of_prfs_is_a_plan_on_the_clock(capsys):
    assert main(['assess', '1020, 1163 Hz', '--json']) == 0
    assert [prf['pri_counts'] for prf in json.loads(capsys.readouterr().out)['prfs']] == [9804, 8598]


def test_assess_prints_the_verdict_and_a_line_for_each_finding(saved, capsys):
    assert main(['assess', saved(OPENING)]) == 0
    lines = capsys.readouterr().out.splitlines()
    assert lines[0] == 'Skerry approach radar, draft B'
    assert lines[1].startswith('1 of 5 findings is not met: only 93.7')
    assert len(lines) == 3 + len(api.assess(OPENING)['findings'])
    assert sum(line.startswith('✗ not met') for line in lines) == 1
    assert sum(line.startswith('○ for information') for line in lines) == 7


def test_a_reason_stands_under_the_finding_that_it_accepts(saved, capsys):
    main(['assess', saved(changed(remarks={'must-see.0': 'the tower sees it'}))])
    out = capsys.readouterr().out
    assert '✗ accepted' in out
    assert 'not met, accepted: the tower sees it' in out


def test_margins_come_where_they_are_asked_for(capsys):
    assert main(['assess', '1000 us', '--margins']) == 0
    out = capsys.readouterr().out
    assert 'Beamwidth 1.4: the same verdict down to 1.152 °' in out  # 16 ms × 6 × 12 rpm
    assert main(['assess', '1000 us', '--margins', '--json']) == 0
    assert list(json.loads(capsys.readouterr().out)['margins']) == ['dwell', 'duty']


# --- link, timing, vary, compare ---------------------------------------------------------------------------------


def test_link_prints_a_link_that_opens_the_same_plan(saved, capsys):
    assert main(['link', saved(EXAMPLES['eight-prfs'])]) == 0
    text = capsys.readouterr().out.strip()
    assert link.read_link(text).document == api.assess(EXAMPLES['eight-prfs'])['plan']
    assert main(['link', text]) == 0
    assert capsys.readouterr().out.strip() == text


def test_vary_prints_a_row_for_each_value_and_says_where_a_plan_is_refused(saved, capsys):
    path = saved(OPENING)
    assert main(['vary', path, 'radar.pulse_us', '0.5..0.8', '--by', '0.1']) == 0
    rows = list(csv.DictReader(io.StringIO(capsys.readouterr().out)))
    assert [row['radar.pulse_us'] for row in rows] == ['0.5', '0.6', '0.7', '0.8']
    assert float(rows[1]['duty']) == pytest.approx(0.6 / 860, rel=1e-12)
    assert main(['vary', path, 'radar.pulse_us', '800..900', '--by', '100']) == 0
    rows = list(csv.DictReader(io.StringIO(capsys.readouterr().out)))
    assert rows[0]['refused'] == ''
    assert rows[1]['refused'].startswith('Pulse length must be shorter than every PRI')


def test_vary_of_two_inputs_writes_every_pair_to_a_file(saved, tmp_path):
    out = tmp_path / 'table.csv'
    words = ['radar.pulse_us', '1..2', 'doppler.notch_mps', '5..7', '--by', '1', '--by', '1', '-o', str(out)]
    assert main(['vary', saved(OPENING), *words]) == 0
    rows = list(csv.reader(out.read_text('utf-8').splitlines()))
    assert rows[0][:2] == ['radar.pulse_us', 'doppler.notch_mps']
    assert [row[:2] for row in rows[1:]] == [[a, b] for a in '12' for b in '567']


def test_compare_exits_with_0_where_no_verdict_differs_and_with_1_where_one_does(saved, capsys):
    plan, same = saved(OPENING), saved(changed(title='another name'), 'same.json')
    cured = saved(changed(waveform__pri_us=[735, 881]), 'cured.json')
    assert main(['compare', plan, same]) == 0
    assert 'Title: another name (was Skerry approach radar, draft B)' in capsys.readouterr().out
    assert main(['compare', plan, cured]) == 1
    assert 'better  Part seen of the must-see region' in capsys.readouterr().out.replace('part seen', 'Part seen')
    assert main(['compare', plan, same, cured, '--json']) == 1
    assert [one['differ'] for one in json.loads(capsys.readouterr().out)] == [False, True]


def test_timing_prints_whole_counts(saved, capsys):
    assert main(['timing', saved(OPENING), '--csv']) == 0
    assert '9800' in capsys.readouterr().out


# --- bad input ---------------------------------------------------------------------------------------------------

BAD = {
    'a key out of its limits': (
        changed(radar__pulse_us=-1),
        ['radar.pulse_us', 'from 0.01 to 10', '10 000 µs; got −1'],
    ),
    'a pulse longer than a PRI': (changed(radar__pulse_us=900), ['radar.pulse_us', 'shorter than every PRI', '900']),
    'a PRI off the clock': (changed(waveform__pri_us=[980.05]), ['waveform.pri_us.0', '980.05', '980 and 980.1']),
    'an interval backwards': (changed(coverage__range_km=[50, 10]), ['coverage.range_km', 'from 50 to 10']),
    'more to see it than there are': (changed(waveform__detect_m=3), ['waveform.detect_m', 'at most the 2', 'got 3']),
    'a list of the wrong length': (changed(radar__pulse_us=[1, 1, 1]), ['radar.pulse_us', 'each of the 2', 'got 3']),
    'an unknown key': ({'waveform': {'pri_us': [980]}, 'rador': {}}, ['rador', 'nearest known one is radar']),
    'no PRI': ({}, ['waveform.pri_us', 'must be given']),
    'a key given twice': ('{"waveform": {"pri_us": [980], "pri_us": [860]}}', ['pri_us', 'twice']),
    'not JSON': ('{"waveform": ', ['must be JSON', 'line 1']),
    'a list instead of a plan': ([1, 2], ['must be an object', 'a list of 2']),
    'nothing': ('', ['got nothing']),
    'other bytes': (b'{"title": "\xff"}', ['UTF-8']),
    'far too long': (b' ' * 1_000_001, ['at most 1,000,000 bytes']),
}
WORDS = {
    'a bare list without sense': ('980 abc us', ['“abc”']),
    'a bare list of nothing known': ('hello', ['a JSON file, a link or a list of PRIs', '“hello”']),
    'a link that was cut': ('#v=1&pri=980,860us', ['must end in its checksum']),
    'a link with an unknown key': ('#v=1&pri=980us&pluse=2us&end=0000', ['pluse']),
    'a PRI of nothing': ('0 us', ['waveform.pri_us']),
}


def one_line(captured):
    """The one line on standard error; nothing on standard output, no traceback."""
    assert captured.out == ''
    lines = captured.err.splitlines()
    assert len(lines) == 1
    assert lines[0].startswith('pycore: ')
    assert 'Traceback' not in captured.err
    return lines[0].replace('\N{NARROW NO-BREAK SPACE}', ' ')


@pytest.mark.parametrize(('content', 'words'), BAD.values(), ids=BAD)
def test_bad_input_in_a_file_is_one_line_with_field_rule_limit_and_what_came(content, words, saved, capsys):
    assert main(['assess', saved(content)]) == 2
    line = one_line(capsys.readouterr())
    for word in words:
        assert word in line


@pytest.mark.parametrize('content', [bad[0] for bad in BAD.values()], ids=BAD)
def test_bad_input_on_standard_input_says_the_same(content, saved, capsys, monkeypatch):
    path = saved(content)
    monkeypatch.setattr('sys.stdin', Bytes(Path(path).read_bytes()))
    assert main(['assess', '-', '--json']) == 2
    by_input = one_line(capsys.readouterr())
    assert main(['assess', path, '--json']) == 2
    assert by_input.replace('standard input', path) == one_line(capsys.readouterr())


@pytest.mark.parametrize(('text', 'words'), WORDS.values(), ids=WORDS)
def test_bad_links_and_bare_lists_are_one_line_too(text, words, capsys):
    assert main(['assess', text]) == 2
    line = one_line(capsys.readouterr())
    for word in words:
        assert word in line


@pytest.mark.parametrize(
    ('words', 'said'),
    [
        (['vary', '980 us', 'radar.pulse_us', '3..1', '--by', '1'], 'must run upwards'),
        (['vary', '980 us', 'radar.pulse_us', '1..3', '--by', '0'], 'step above 0'),
        (['vary', '980 us', 'radar.pulse_us', 'one..3', '--by', '1'], 'interval such as 0.5..3'),
        (['vary', '980 us', 'radar.pulze_us', '1..3', '--by', '1'], 'no key “radar.pulze_us”'),
        (['vary', '980 us', 'radar.pulse_us', '0..1', '--by', '1e-6'], 'at most 10000 steps'),
        (['vary', '980 us', 'radar.pulse_us', '--by', '1'], 'a key and an interval'),
        (['compare', '980 us', 'hello'], '“hello”'),
        (['timing', 'hello'], '“hello”'),
        (['link', '0 us'], 'waveform.pri_us'),
    ],
)
def test_the_other_commands_refuse_in_one_line_as_well(words, said, capsys):
    assert main(words) == 2
    assert said in one_line(capsys.readouterr())


def test_a_command_that_does_not_exist_is_status_2(capsys):
    with pytest.raises(SystemExit) as left:
        main(['asess', '980 us'])
    assert left.value.code == 2
    assert 'asess' in capsys.readouterr().err
