"""Captions as they stand under the figures, read aloud by a person: forms for none, one, two, many and everything.

The sentences come from our own run; their numbers are those of the core, which other tests hold against
published values and plain grids. Narrow spaces stand as plain ones in the table.
"""

import json
from pathlib import Path

import numpy as np
import pytest

from pycore import columns
from pycore.columns import decoding_words
from pycore.columns.decoding import Decoded
from pycore.columns.looks import looks
from pycore.columns.zone_words import key_sentence
from pycore.computed import Computed
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS, THIN_SPACE

EXAMPLES = Path(__file__).parents[2] / 'webapp' / 'examples'
SIZE = {'width': 560, 'height': 300}  # about a figure's on a laptop
CASES = json.loads((Path(__file__).parent / 'captions.json').read_text(encoding='utf-8'))


def plan_of(case):
    """The plan of a case: its own, or that of a worked example."""
    if 'plan' in case:
        return case['plan']
    return json.loads((EXAMPLES / f'{case["example"]}.json').read_text(encoding='utf-8'))['plan']


@pytest.mark.parametrize('case', CASES, ids=[case['name'] for case in CASES])
def test_captions_say_what_they_should(case):
    computed, units = Computed(read(plan_of(case))), {**SHOWN_UNITS, **case.get('units', {})}
    said = {
        name: columns.picture(name, computed, units, SIZE)['caption'].replace(THIN_SPACE, ' ')
        for name in columns.order(computed.plan.kind)
    }
    assert said == case['captions']


def test_the_table_of_captions_has_every_form():
    said = ' '.join(caption for case in CASES for caption in case['captions'].values())
    forms = (
        'Every range is clear on both',
        'is eclipsed on both',
        'are eclipsed on both',
        'the widest is',
        'every range is',
    )
    assert {case['example'] for case in CASES if 'example' in case} == {path.stem for path in EXAMPLES.glob('*.json')}
    assert len(CASES) == 20 + 13
    assert all(form in said for form in forms)


@pytest.mark.parametrize(
    ('n', 'm', 'enough', 'too_few'),
    [
        (1, 1, 'clear', 'eclipsed'),
        (2, 1, 'clear on at least one of the two PRFs', 'eclipsed on both PRFs'),
        (2, 2, 'clear on both PRFs', 'eclipsed on at least one of the two PRFs'),
        (8, 3, 'clear on at least three of the eight PRFs', 'clear on fewer than three of the eight PRFs'),
        (16, 16, 'clear on all 16 PRFs', 'eclipsed on at least one of the 16 PRFs'),
    ],
)
def test_enough_and_too_few_are_said_for_any_m_of_n(n, m, enough, too_few):
    said = looks(n, m, 'eclipsed')
    assert (said.enough, said.too_few) == (enough, too_few)


@pytest.mark.parametrize(
    ('n', 'm', 'text'),
    [
        (1, 1, 'Hatched: not seen; plain: seen.'),
        (2, 1, 'Hatched: seen by no PRF; pale: by one; plain: by both.'),
        (3, 3, 'Hatched: seen by no PRF; brown: by one or two, too few; plain: by all three.'),
        (3, 1, 'Hatched: seen by no PRF; pale: by one; paler: by two; plain: by all three.'),
    ],
)
def test_the_key_names_only_the_tones_that_the_map_can_have(n, m, text):
    assert key_sentence(n, m) == text


@pytest.mark.parametrize(
    ('dwell_ms', 'fill', 'text'),
    [
        (20.0, 1, 'One set takes 18.4 ms of the 20.0 ms on target; 1.60 ms, 8.00 %, are unused.'),
        (18.4, 1, 'One set fills the 18.4 ms on target.'),
        (12.0, 1, 'One set takes 18.4 ms, 6.40 ms more than the 12.0 ms on target.'),
        (36.8, 1, 'Two sets of 18.4 ms each fill the 36.8 ms on target.'),
        (
            60.0,
            1,
            'One set takes 18.4 ms; three of them fit into the 60.0 ms on target and leave 4.80 ms, 8.00 %, unused.',
        ),
        (None, 1, 'One set takes 18.4 ms; no time on target is given.'),
        (None, 0, 'No fill pulses are sent.'),
        (20.0, 1, 'Fill pulses, dark, take 1.84 ms, 10.0 % of it; pale, the pulses that count.'),
    ],
)
def test_the_dwell_says_what_a_set_takes_and_what_is_left(dwell_ms, fill, text):
    # (9 + 1) · (980 + 860) µs = 18.4 ms, of which the fill pulses are 1.84 ms.
    plan = {
        'radar': {'dwell_ms': dwell_ms, 'scan_rpm': None},
        'waveform': {'pri_us': [980, 860], 'pulses': 9, 'fill_pulses': fill},
    }
    caption = columns.picture('dwell', Computed(read(plan)), SHOWN_UNITS)['caption'].replace(THIN_SPACE, ' ')
    assert text in caption


@pytest.mark.parametrize(
    ('m', 'ghosts', 'ruled_out', 'text'),
    [
        (1, 0, 0, 'no other range agrees on one PRF.'),
        (3, 0, 1, 'one other range agrees on three PRFs; the speed rules it out.'),
        (3, 0, 2, 'two other ranges agree on three PRFs; the speed rules both out.'),
        (3, 0, 5, 'five other ranges agree on three PRFs; the speed rules all of them out.'),
        (2, 1, 0, 'one other range agrees on two PRFs, in speed too: a ghost, dark.'),
        (2, 2, 0, 'two other ranges agree on two PRFs, in speed too: ghosts, dark.'),
        (2, 1, 3, 'four other ranges agree on two PRFs, one of them in speed too: a ghost, dark.'),
        (2, 2, 3, 'five other ranges agree on two PRFs, two of them in speed too: ghosts, dark.'),
    ],
)
def test_other_places_of_agreement_are_said_in_every_form(m, ghosts, ruled_out, text):
    found = Decoded(None, np.zeros((1, 2)), np.zeros((ghosts, 2)), np.zeros((ruled_out, 2)), 0)
    assert decoding_words.other_ranges(found, m) == text
