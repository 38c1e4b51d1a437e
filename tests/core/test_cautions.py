"""Cautions: each on the plan that calls for it, and not on its neighbour that does not."""

import copy
import json
import re
from pathlib import Path

import pytest

from pycore import api
from pycore.cautions import ALWAYS, called_for, cautions
from pycore.computed import Computed
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS

OPENING = json.loads((Path(__file__).parents[2] / 'webapp/examples/opening.json').read_text('utf-8'))['plan']
BARE = {
    'radar': {'pulse_us': 1, 'recovery_us': 1},
    'waveform': {'pri_us': [1000, 900], 'pulses': 9, 'fill_pulses': 2},
    'doppler': {'notch_mps': 30},
    'coverage': {'range_km': [2, 110], 'speed_mps': [0, 300]},
}


def plan(**changes):
    """The bare plan with some keys changed, given by their paths with double underscores."""
    document = copy.deepcopy(BARE)
    for path, value in changes.items():
        *records, name = path.split('__')
        here = document
        for record in records:
            here = here.setdefault(record, {})
        here[name] = value
    return document


def said(document, units=SHOWN_UNITS):
    text = '\n'.join(called_for(Computed(read(document)), units))
    return text.replace('\N{NARROW NO-BREAK SPACE}', ' ')


STAGGER = {'waveform__kind': 'stagger', 'waveform__pulses': 20}
WEATHER = {'purpose': 'weather', 'weather': {'width_mps': 4}}
PAIRS = [
    ('narrower than the Doppler filters', {'doppler__notch_mps': 14.86}, {'doppler__notch_mps': 14.88}),
    ('are blind alike', {'waveform__pri_us': [900, 900]}, {'waveform__pri_us': [900, 900.1]}),
    (
        'alike in range, if not in speed',
        {'waveform__pri_us': [900, 900], 'radar__carrier_ghz': [2.8, 3]},
        {'waveform__pri_us': [900, 900]},
    ),
    ('it is a constant PRF', {**STAGGER, 'waveform__pri_us': [900, 900]}, STAGGER),
    ('never opens', {'radar__recovery_us': 899}, {'radar__recovery_us': 898.9}),
    ('nearer than the first opening', {'radar__recovery_us': 14}, {'radar__recovery_us': 12.5}),
    (
        'is not back before',
        {'radar__near_pulse': {'sent_at_us': 70, 'to_km': 124.3}},
        {'radar__near_pulse': {'sent_at_us': 70, 'to_km': 124.2}},
    ),
    ('fill pulses for clutter', {'surface': {'to_km': 405}}, {'surface': {'to_km': 404}}),
    ('fill pulses for a target', {'coverage__range_km': [2, 405]}, {'coverage__range_km': [2, 404]}),
    ('does not cancel it', {**STAGGER, 'surface': {'to_km': 135}}, {**STAGGER, 'surface': {'to_km': 134}}),
    ('sidelobes of a cut code', {'radar__pulse_us': 20}, {'radar__pulse_us': 2}),
    ('of a cycle within the pulse', {'coverage__speed_mps': [-13400, 0]}, {'coverage__speed_mps': [0, 13300]}),
    ('rotor or propeller', {'target__own_spread_mps': 51}, {'target__own_spread_mps': 50}),
    ('independent echoes', {**WEATHER, 'waveform__pulses': 34}, {**WEATHER, 'waveform__pulses': 42}),
    ('middle of the mainlobe clutter', {'platform': {}}, {}),
    ('Sidelobe clutter', {'platform': {}}, {}),
]


@pytest.mark.parametrize(('words', 'calls', 'does_not'), PAIRS, ids=[pair[0] for pair in PAIRS])
def test_a_caution_stands_where_the_plan_calls_for_it_and_not_beside_it(words, calls, does_not):
    assert words in said(plan(**calls))
    assert words not in said(plan(**does_not))


def test_a_plan_that_calls_for_nothing_has_only_what_always_holds():
    assert cautions(Computed(read(BARE)), SHOWN_UNITS) == list(ALWAYS)


def test_a_narrow_notch_names_the_width_where_the_window_is_down():
    # Hamming over nine: 9 pulses at 860 us and 2.8 GHz, 62.25 m/s; 2.25 filters of 6.92 m/s.
    assert 'On both PRFs the notch is narrower' in said(OPENING)
    assert '15.6 m/s from a filter’s middle' in said(OPENING)


def test_a_caution_names_the_prfs_it_is_about():
    assert 'On PRF 2 the receiver never opens' in said(plan(radar__recovery_us=950))
    assert 'On both PRFs the receiver never opens' in said(plan(radar__recovery_us=1000))


def test_cautions_follow_the_units_that_the_reader_prefers():
    text = said(plan(doppler__notch_mps=10), {**SHOWN_UNITS, 'speed': 'kt'})
    assert '19.44 kt' in text
    assert 'm/s' not in text


@pytest.mark.parametrize('calls', [pair[1] for pair in PAIRS], ids=[pair[0] for pair in PAIRS])
def test_every_caution_is_one_sentence_with_sound_numbers(calls):
    for sentence in called_for(Computed(read(plan(**calls))), SHOWN_UNITS):
        assert re.fullmatch(r'[A-Z0-9].*\.', sentence)
        assert not re.search(r'nan|inf\b|None|  ', sentence)


def test_the_note_carries_its_cautions():
    found = api.note(OPENING)['cautions']
    assert found == cautions(Computed(read(OPENING)), SHOWN_UNITS)
    assert tuple(found[-len(ALWAYS) :]) == ALWAYS


def test_what_always_holds_speaks_of_models_licence_and_exposure():
    text = ' '.join(ALWAYS)
    for word in ('planning figures', 'flight check', 'licence', 'frequency', 'injure', 'qualified person'):
        assert word in text
