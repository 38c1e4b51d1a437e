"""Findings and the verdict line: their sentences, and numbers that never look better than they are."""

import copy
import json
import math
from dataclasses import replace
from pathlib import Path

import pytest
from hypothesis import example, given
from hypothesis import strategies as st

from pycore.computed import Computed
from pycore.findings import findings, named, verdict
from pycore.findings.finding import SIGNS, Finding, at_least, at_most
from pycore.plan.reading import read
from pycore.wording import MINUS, SHOWN_UNITS, THIN_SPACE, against, percent, plural, significant, with_unit

OPENING = json.loads((Path(__file__).parents[2] / 'webapp/examples/opening.json').read_text('utf-8'))['plan']


def plan(document=None, **changes):
    """A plan with some keys changed, given by their paths with double underscores."""
    document = copy.deepcopy(document or {'waveform': {'pri_us': [980, 860], 'pulses': 9}})
    for path, value in changes.items():
        *records, name = path.split('__')
        here = document
        for record in records:
            here = here.setdefault(record, {})
        here[name] = value
    return document


def finding(name, document=None, units=SHOWN_UNITS, **changes):
    return named(Computed(read(plan(document, **changes)), with_echoes=False), name, units)


def spoken(text):
    return text.replace(THIN_SPACE, ' ')


def as_number(text):
    """Read a shown number back."""
    return float(text.replace(THIN_SPACE, '').replace(MINUS, '-'))


# --- numbers -----------------------------------------------------------------------------------------------------

POSITIVE = st.floats(1e-6, 1e9)


@given(POSITIVE, st.floats(-12, 12), st.booleans())
@example(94.99, 0.0, True)
@example(95.0, -9.0, True)
@example(99.99999, -3.0, False)
def test_a_number_never_looks_as_if_it_met_a_limit_that_it_misses(limit, exponent, below):
    value = limit * (1.0 - 10.0 ** (exponent - 12) if below else 1.0 + 10.0 ** (exponent - 12))
    if value <= 0 or value == limit:
        return
    shown = as_number(against(value, limit))
    if abs(value - limit) > 1e-13 * limit:
        assert (shown < limit) == (value < limit)
        assert (shown > limit) == (value > limit)


@given(POSITIVE)
def test_three_figures_are_right_to_half_of_the_third(value):
    shown = as_number(significant(value))
    assert abs(shown - value) <= 0.5001 * 10.0 ** (math.floor(math.log10(value)) - 2)


@given(st.floats(0, 1))
@example(4e-4)
@example(5e-324)
@example(1 - 1e-9)
@example(0.99996)
def test_a_share_that_is_something_never_reads_as_nothing_or_as_all(share):
    text = spoken(percent(share))
    if share > 0:
        assert not text.startswith(('0 %', '0.0 %', '0.00 %', '0.000 %'))
    if share < 1 - 1e-12:
        assert not text.startswith(('100 %', '100.0 %'))
    assert text.endswith(' %')


@given(st.floats(0.001, 0.999), st.floats(-1e-3, 1e-3))
def test_a_share_stands_on_its_own_side_of_what_was_wanted(wanted, off):
    share = min(max(wanted + off, 1e-4), 0.9999)
    if abs(share - wanted) > 1e-12:
        shown = as_number(percent(share, wanted).removesuffix(f'{THIN_SPACE}%'))
        assert (shown > wanted * 100) == (share > wanted)


@pytest.mark.parametrize(
    ('share', 'text'),
    [
        (0, '0 %'),
        (3e-7, 'under 0.001 %'),
        (0.00123, '0.123 %'),
        (0.9654, '96.5 %'),
        (0.99997, '99.997 %'),
        (1 - 1e-7, 'over 99.999 %'),
        (1, '100 %'),
    ],
)
def test_shares_read_as_a_person_would_write_them(share, text):
    assert spoken(percent(share)) == text


@given(st.floats(-1e3, 1e3), st.floats(-1e3, 1e3))
def test_limits_are_met_to_within_a_billionth(value, limit):
    slack = 1e-9 * max(1.0, abs(limit))
    assert at_least(limit - slack / 2, limit)
    assert not at_least(limit - 2 * slack, limit)
    assert at_most(limit + slack / 2, limit)
    assert not at_most(limit + 2 * slack, limit)
    assert at_least(value, None) is at_most(value, None) is None


# --- sentences ---------------------------------------------------------------------------------------------------


def test_a_finding_is_one_sentence_with_its_number_and_what_was_wanted():
    text = finding('dwell', radar__dwell_ms=20).text
    assert spoken(text) == 'Time used of the 20.0 ms that the beam rests on a target: 16.6 ms, wanted at most 20.0 ms.'


def test_what_is_not_asked_is_for_information():
    found = finding('visible')
    assert (found.met, found.verdict, found.wanted_text) == (None, 'for information', '')
    assert 'wanted' not in found.text


@pytest.mark.parametrize(
    ('changes', 'words'),
    [
        ({'waveform__pri_us': [980]}, 'it is blind'),
        ({}, 'both PRFs are blind'),
        ({'waveform__pri_us': [980, 980, 980]}, 'all 3 PRFs are blind'),
        ({'waveform__pri_us': [980, 980, 980], 'waveform__detect_m': 2}, 'fewer than 2 PRFs see'),
    ],
)
def test_who_is_blind_is_said_for_one_for_two_and_for_many_prfs(changes, words):
    region = [{'name': 'a', 'range_km': [4, 30], 'speed_mps': [40, 100]}]
    assert words in finding('must-see.0', must_see=region, **changes).detail


@pytest.mark.parametrize(
    ('changes', 'words'),
    [
        ({'waveform__pri_us': [980]}, 'Coverage seen: '),
        ({'waveform__pri_us': [980, 860]}, 'by at least 1 of the 2 PRFs: '),
        ({'waveform__pri_us': [980, 860], 'waveform__detect_m': 2}, 'by both PRFs: '),
        ({'waveform__pri_us': [980, 860, 900], 'waveform__detect_m': 3}, 'by all 3 PRFs: '),
        ({'waveform__pri_us': [980, 860, 900], 'waveform__detect_m': 2}, 'by at least 2 of the 3 PRFs: '),
    ],
)
def test_the_coverage_names_how_many_prfs_must_see(changes, words):
    assert words in finding('visible', **changes).text


@pytest.mark.parametrize(
    ('speeds', 'value', 'rest'),
    [
        ([10, 46], 'none', ''),
        ([10, 100], '54.2 to 62.6 m/s', 'of the coverage.'),
        ([10, 170], None, 'of the coverage, the largest of two.'),
    ],
)
def test_holes_are_told_for_none_one_and_two(speeds, value, rest):
    # Notches of 8 m/s about 54.63 and 62.25 m/s meet, and so do those about 109.25 and 124.50 m/s.
    found = finding('largest-hole', coverage__speed_mps=speeds, coverage__range_km=[2, 110], doppler__notch_mps=8)
    if value is not None:
        assert spoken(found.value_text) == value
    assert found.text.endswith(rest or 'none.')


def test_a_hole_that_is_not_allowed_is_named_in_the_fault():
    found = finding('largest-hole', wanted__hole_mps=2, wanted__hole_km=10)
    assert found.met is False
    assert spoken(found.fault).startswith('one hole is too large') or ' holes are too large' in found.fault
    assert spoken(found.wanted_text) == 'nowhere more than 10 km long and 2 m/s wide'


@pytest.mark.parametrize(
    ('changes', 'text'),
    [
        ({}, 'not asked'),
        ({'crossing': {'speed_mps': 80, 'at_km': 20}, 'doppler__notch_mps': 8}, '50.3 s'),
        ({'crossing': {'speed_mps': 5, 'at_km': 20}, 'doppler__notch_mps': 8}, 'for ever'),
    ],
)
def test_a_crossing_track_is_told_with_and_without_an_end(changes, text):
    assert spoken(finding('unseen-crossing', **changes).value_text) == text


def test_an_inbound_target_that_is_never_seen_is_said_to_be_so():
    assert 'not seen at any range' in finding('unseen-inbound').detail
    assert finding('unseen-inbound', coverage__speed_mps=[10, 50]).value_text == 'none'
    rest = finding('unseen-inbound', doppler__notch_mps=0, waveform__pri_us=[500], wanted__unseen_s=9)
    assert (rest.value_text, rest.met, rest.fault) == ('for ever', False, 'a target at rest is never seen')


@pytest.mark.parametrize(
    ('pris', 'm', 'words'),
    [
        ([980], 1, 'the PRF is blind'),
        ([980, 860], 1, 'neither PRF is clear'),
        ([980, 860, 900], 1, 'none of the 3 PRFs is clear'),
        ([980, 860, 900], 2, 'fewer than 2 of the 3 PRFs are clear'),
    ],
)
def test_the_first_blind_speed_says_who_is_blind_there(pris, m, words):
    assert finding('blind-speed', waveform__pri_us=pris, waveform__detect_m=m).label.endswith(words)


def test_a_stagger_without_a_wanted_speed_beyond_its_rise_has_no_dip():
    found = finding('blind-speed', waveform__kind='stagger', coverage__speed_mps=[0, 5])
    assert 'deepest dip' not in found.text
    assert 'true first blind speed' in found.text


def test_sentences_follow_the_units_of_the_reader():
    found = finding('decode-range', wanted__decode_range=True, units={**SHOWN_UNITS, 'range': 'nmi'})
    assert spoken(found.wanted_text) == 'at least 59.3952 nmi'
    assert found.unit == 'km'  # the value itself stays in the plan's unit


WHOLE = [
    {'waveform': {'pri_us': [1000]}},
    OPENING,
    {'waveform': {'pri_us': [1000, 1100], 'kind': 'stagger'}, 'crossing': {}, 'doppler': {'response_min_db': 20}},
    {'waveform': {'pri_us': [10, 12]}, 'radar': {'recovery_us': 50}},
    {'waveform': {'pri_us': [800, 1000], 'pulses': 32}, 'purpose': 'weather'},
    {'waveform': {'pri_us': [800], 'pulses': 1}, 'purpose': 'weather'},
]


@pytest.mark.parametrize('document', WHOLE, ids=['bare', 'opening', 'stagger', 'shut', 'weather', 'one PRI'])
def test_every_sentence_is_whole_and_every_finding_has_a_name_of_its_own(document):
    found = findings(Computed(read(document), with_echoes=False), SHOWN_UNITS)
    names = [one.name for one in found]
    assert len(set(names)) == len(names)
    for one in found:
        assert one.text[0].isupper() or one.text[0].isdigit()
        assert one.text.endswith('.')
        assert not any(bad in one.text for bad in ('nan', 'None', '  ', ' ,', '..', ' inf'))
        assert one.verdict in SIGNS
        assert (one.met is None) == (one.verdict == 'for information')
        assert named(Computed(read(document), with_echoes=False), one.name, SHOWN_UNITS) == one


# --- verdicts ----------------------------------------------------------------------------------------------------


def judged(met, name='dwell', **more):
    return Finding(name, 'the label', 1.0, '1', 's', met=met, fault='the fault', **more)


def test_where_nothing_is_judged_the_line_says_so():
    line = verdict([judged(None)])
    assert line['met'] is None
    assert line['text'] == 'Nothing is judged: no finding has a wanted value yet.'


def test_where_all_are_met_the_tightest_is_named():
    slack = judged(True, spare=0.5, spare_text='this, much to spare')
    tight = judged(True, spare=0.1, spare_text='that, 1.0 ms to spare')
    assert verdict([slack, tight])['text'] == 'All 2 judged findings are met; the tightest is that, 1.0 ms to spare.'
    assert verdict([tight])['text'].startswith('The one judged finding is met;')
    assert verdict([judged(True)])['text'] == 'The one judged finding is met.'


def test_where_some_are_not_met_they_are_counted_and_said():
    assert verdict([judged(True), judged(False)])['text'] == '1 of 2 findings is not met: the fault.'
    assert verdict([judged(False), judged(False)])['text'] == '2 of 2 findings are not met: the fault; the fault.'


def test_more_than_three_faults_are_cut_short():
    line = verdict([judged(False)] * 5)
    assert line['text'] == '5 of 5 findings are not met: the fault; the fault; and 3 more below.'


def test_a_fault_that_is_accepted_is_counted_and_comes_last():
    accepted = replace(judged(False), remark='the tower looks there', fault='the accepted one')
    line = verdict([accepted, judged(False)])
    assert line['text'] == '2 of 2 findings are not met, 1 of them accepted: the fault; the accepted one.'
    assert verdict([accepted])['lead'] == '1 of 1 findings is not met, accepted:'
    assert verdict([accepted])['met'] is False


def test_a_remark_accepts_what_is_not_met_and_only_that():
    document = plan(OPENING, remarks={'must-see.0': 'the second radar covers it', 'dwell': 'room for one pulse'})
    missed, kept = finding('must-see.0', document), finding('dwell', document)
    assert (missed.accepted, missed.verdict) == (True, 'accepted')
    assert missed.remark_text == 'not met, accepted: the second radar covers it'
    assert (kept.accepted, kept.verdict, kept.remark_text) == (False, 'met', 'room for one pulse')
    assert finding('must-see.0', OPENING).remark_text == 'not met; no reason given'


def test_small_words_agree_with_their_count():
    assert [plural(count, 'hole') for count in (0, 1, 2)] == ['holes', 'hole', 'holes']
    assert with_unit(0.0, 'ms') == f'0{THIN_SPACE}ms'
