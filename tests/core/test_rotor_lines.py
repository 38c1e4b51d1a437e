"""Lines of a rotor among the Doppler filters: where they land on each PRF, and on which they fold onto the body."""

import json
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore import columns
from pycore.ambiguity import fold_speed
from pycore.cautions import cautions
from pycore.columns.mark import Mark
from pycore.columns.view import View
from pycore.computed import Computed
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS, THIN_SPACE

EXAMPLES = Path(__file__).parents[2] / 'webapp' / 'examples'


def drone(spread, speed_mps=None, name='counter-drone', **waveform):
    plan = json.loads((EXAMPLES / f'{name}.json').read_text(encoding='utf-8'))['plan']
    plan['target'] = {**plan['target'], 'own_spread_mps': spread}
    plan['waveform'] = {**plan['waveform'], **waveform}
    computed = Computed(read(plan))
    mark = None if speed_mps is None else Mark(computed, 5000.0, speed_mps)
    return computed, columns.picture('doppler-filters', computed, SHOWN_UNITS, None, View(mark=mark))


def covered(pieces, at):
    inside = (at >= pieces['left'][:, None] - 1e-9) & (at <= pieces['right'][:, None] + 1e-9)
    return inside.any(axis=0)


@given(spread=st.floats(1.0, 400.0), speed=st.floats(-60.0, 60.0))
def test_the_strips_cover_what_the_lines_fold_to_and_nothing_else(spread, speed):
    computed, found = drone(spread, speed)
    first = float(computed.blind_speed_m_s[0])
    lane = {
        side: np.concatenate([found['columns'][name][side] for name in ('rotor', 'rotor-folded')])
        for side in ('left', 'right', 'bottom')
    }
    top = lane['bottom'] > 1.0
    pieces = {side: lane[side][top] for side in ('left', 'right')}
    lines = fold_speed(speed + np.linspace(-spread, spread, 2001), first)
    assert covered(pieces, lines).all()
    away = np.linspace(-first / 2, first / 2, 501)
    offset = np.abs(fold_speed(away - speed, first))
    assert not covered(pieces, away[offset > spread + 1e-6]).any()


def test_lines_that_stay_within_the_unambiguous_speeds_do_not_fold():
    columns_of = drone(20.0)[1]['columns']
    assert columns_of['rotor-folded']['left'].size == 0
    np.testing.assert_allclose(columns_of['rotor']['left'], [-20.0, -20.0])
    np.testing.assert_allclose(columns_of['rotor']['right'], [20.0, 20.0])


@pytest.mark.parametrize(
    ('spread', 'said'),
    [
        (70.0, 'they do not fold onto the body.'),
        (90.0, 'they fold onto the body on 110 µs.'),
        (120.0, 'they fold onto the body on both PRFs.'),
    ],
)
def test_the_caption_says_on_which_prfs_they_fold_as_the_caution_does(spread, said):
    computed, found = drone(spread)
    assert found['caption'].replace(THIN_SPACE, ' ').endswith(said)
    warned = [one for one in cautions(computed, SHOWN_UNITS) if 'rotor' in one]
    assert bool(warned) == computed.rotor_folds.any()


def test_the_strips_lie_about_the_followed_target_else_about_a_body_that_stands_still():
    assert 'of a body that stands still;' in drone(20.0)[1]['caption']
    found = drone(20.0, 10.0)[1]
    assert 'of the target;' in found['caption']
    assert found['columns']['rotor']['left'][0] == pytest.approx(-10.0)
    assert found['columns']['rotor-name']['text'] == ['rotor lines']


def test_of_many_prfs_those_that_fold_are_counted():
    said = drone(270.0, name='eight-prfs')[1]['caption'].replace(THIN_SPACE, ' ')
    assert 'they fold onto the body on all eight PRFs.' in said
    said = drone(185.0, name='eight-prfs')[1]['caption']
    assert 'they fold onto the body on four of the eight PRFs.' in said


@pytest.mark.parametrize(
    ('name', 'spread'), [('counter-drone', None), ('counter-drone', 0.0), ('four-pulse-stagger', 70.0)]
)
def test_without_own_lines_or_in_a_stagger_nothing_is_drawn_or_said(name, spread):
    plan = json.loads((EXAMPLES / f'{name}.json').read_text(encoding='utf-8'))['plan']
    plan['target'] = {**plan.get('target', {}), 'own_spread_mps': spread}
    found = columns.picture('doppler-filters', Computed(read(plan)), SHOWN_UNITS)
    assert found['columns']['rotor']['left'].size == found['columns']['rotor-folded']['left'].size == 0
    assert 'rotor' not in found['caption']
