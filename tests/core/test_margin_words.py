"""The words of a margin: what is said was tried, whichever unit it is said in, and however the work was cut up."""

import functools
import json
import re
from fractions import Fraction
from pathlib import Path

import pytest

from pycore import api
from pycore.computed import Computed
from pycore.findings import named
from pycore.margins.called import unnamed
from pycore.margins.inputs import MATTERS
from pycore.margins.plans import moved
from pycore.plan.reading import read
from pycore.wording import MINUS, SHOWN_UNITS

EXAMPLES = Path(__file__).parents[2] / 'webapp' / 'examples'
OPENING = json.loads((EXAMPLES / 'opening.json').read_text('utf-8'))['plan']
STAGGER = json.loads((EXAMPLES / 'four-pulse-stagger.json').read_text('utf-8'))['plan']
MARINE = {'range': 'nmi', 'speed': 'kt', 'pri': 'Hz'}
ALL_AT_ONCE = 10**6


def told(plan, name, units=None):
    if plan is OPENING:
        return of_the_opening(name, units is MARINE)
    return api.margins_told(plan, name, tries=ALL_AT_ONCE, units=units)


@functools.cache
def of_the_opening(name, marine):
    """The opening example's margins, which several tests read."""
    return api.margins_told(OPENING, name, tries=ALL_AT_ONCE, units=MARINE if marine else None)


def number(text):
    return float(re.match(r'[-\d.]+', text.replace(MINUS, '-').replace('\u202f', '').replace('\u00a0', ''))[0])


def met(plan, name, path, value):
    return named(Computed(read(moved(read(plan).document, path, value))), name, SHOWN_UNITS).met


def plain(text):
    return text.replace('\u202f', ' ')


def test_the_tightest_input_of_a_met_finding_is_said_with_the_last_number_that_holds():
    assert plain(told(OPENING, 'decode-range')['sentence']) == (
        'PRI 2 may shrink to 734.9 µs before this is no longer met.'
    )


def test_a_finding_that_is_not_met_is_told_its_cure():
    assert plain(told(OPENING, 'must-see.0')['sentence']) == 'This is met when PRI 2 shrinks to 803.4 µs.'


def test_an_input_that_has_no_room_is_told_with_the_next_count():
    assert told(OPENING, 'dwell')['sentence'] == 'The number of pulses cannot rise: at 10 this is no longer met.'


def test_an_interval_shown_as_a_frequency_rises_where_it_shrinks():
    sentence = plain(told(OPENING, 'decode-range', MARINE)['sentence'])
    assert sentence == 'PRF 2 may rise to 1360.7 Hz before this is no longer met.'


def test_ranges_and_speeds_are_said_in_the_units_of_the_reader():
    rows = {row[0]: [plain(cell) for cell in row] for row in told(OPENING, 'decode-range', MARINE)['rows']}
    assert rows['The far end of the range'][1:] == ['59.4 nmi', '–', '69.5 nmi']  # 128.84 km are 69.57 nmi


@pytest.mark.parametrize(
    ('name', 'path', 'label', 'sides'),
    [
        ('visible', 'doppler.notch_mps', 'The notch', (None, True)),
        ('must-see.0', 'doppler.notch_mps', 'The notch', (True, None)),
        ('must-see.0', 'radar.carrier_ghz', 'The carrier', (True, None)),
        ('must-see.0', 'waveform.pri_us.0', 'PRI 1', (True, True)),
        ('dwell', 'radar.beamwidth_deg', 'The beamwidth', (True, None)),
        ('duty', 'radar.pulse_us', 'The pulse', (None, True)),
    ],
)
def test_the_numbers_that_are_said_hold_when_they_are_typed(name, path, label, sides):
    row = next(row for row in told(OPENING, name)['rows'] if row[0] == label)
    for cell, wanted in zip(row[2:], sides, strict=True):
        if wanted is not None:
            assert met(OPENING, name, path, number(cell)) is True


def test_what_was_asked_for_comes_last_for_to_want_less_cures_everything():
    assert [row[0] for row in told(OPENING, 'must-see.0')['rows']][-1] == 'The part asked for of “final approach”'


def test_a_finding_for_information_says_that_nothing_is_judged():
    answer = told(OPENING, 'largest-hole')
    assert answer['done']
    assert answer['rows'] == []
    assert 'nothing is judged' in answer['sentence']


@pytest.mark.parametrize(('is_met', 'word'), [(True, 'no longer met'), (False, 'this met')])
def test_where_no_single_input_helps_it_is_said(is_met, word):
    walked = {'met': is_met, 'at': 10**3, 'log': '', 'found': []}
    answer = api.margins_told(OPENING, 'dwell', walked)
    assert answer['sentence'].startswith('No input was found')
    assert word in answer['sentence']
    assert answer['rows'] == answer['notes'] == []


@pytest.mark.parametrize(('plan', 'name'), [(OPENING, 'decode-range'), (STAGGER, 'dwell')])
@pytest.mark.parametrize('tries', [9, 40])
def test_cut_into_slices_the_work_comes_to_the_same_words(plan, name, tries):
    answer, slices = {'done': False, 'so_far': None}, 0
    while not answer['done']:
        sent = json.loads(json.dumps(answer['so_far']))  # it travels to the page and back
        answer, slices = api.margins_told(plan, name, sent, tries), slices + 1
    assert slices > 3
    assert answer == told(plan, name)


def test_a_flip_that_can_be_missed_is_said_wherever_margins_are():
    assert any('narrower than a step can be missed' in note for note in told(OPENING, 'dwell')['notes'])


def test_over_an_interval_of_carriers_the_note_says_which_margins_these_are():
    held = {**OPENING, 'holds_over': {'carrier_ghz': [2.7, 2.9]}}
    assert any('own carrier' in note for note in told(held, 'dwell')['notes'])
    assert not any('own carrier' in note for note in told(OPENING, 'dwell')['notes'])


def test_every_input_that_can_matter_has_a_name_for_a_sentence():
    assert unnamed({path for paths in MATTERS.values() for path in paths}) == []


def test_a_list_of_pulses_is_said_by_prf():
    split = {**OPENING, 'radar': {**OPENING['radar'], 'pulse_us': [1.0, 1.5]}}
    assert 'The pulse on PRF 2' in [row[0] for row in told(split, 'duty')['rows']]


def test_a_margin_of_less_than_three_figures_keeps_the_digits_that_tell_it_from_now():
    tight = {**OPENING, 'radar': {**OPENING['radar'], 'beamwidth_deg': float(Fraction('1.3248000001'))}}
    row = next(row for row in told(tight, 'dwell')['rows'] if row[0] == 'The beamwidth')
    assert row[2] != row[1]
    assert number(row[2]) < 1.3248000001
