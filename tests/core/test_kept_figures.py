"""The figures while a plan is compared with a kept one: what is drawn of it, and what captions and tables say."""

import json
import re
from copy import deepcopy
from itertools import pairwise, product
from pathlib import Path

import numpy as np
import pytest

from pycore import api, columns
from pycore.columns.classes import GAINED, GAINED_DOT, LOST, LOST_HATCH, STILL_BLIND, changes
from pycore.columns.kept import difference
from pycore.columns.view import View
from pycore.computed import Computed
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS, THIN_SPACE, percent

ROOT = Path(__file__).parents[2]
FILES = sorted((ROOT / 'webapp/examples').glob('*.json'))
EXAMPLES = {path.stem: json.loads(path.read_text(encoding='utf-8'))['plan'] for path in FILES}
OPENING, STAGGER = EXAMPLES['opening'], EXAMPLES['four-pulse-stagger']
WRONG = re.compile(rf'nan|\binf\b|None|  | ,|\.\.|[{{}}]|{THIN_SPACE}{THIN_SPACE}')
FEW = ('opening', 'four-pulse-stagger', 'eight-prfs')
A_ROW = 1 / 500
"""A map of 500 rows misses a narrow zone by about one of them."""


def changed(plan, **parts):
    return {**deepcopy(plan), **{name: {**plan.get(name, {}), **keys} for name, keys in parts.items()}}


WIDER = changed(OPENING, doppler={'notch_mps': 9.0}, radar={'pulse_us': 4.0})
OTHER_PRIS = changed(OPENING, waveform={'pri_us': [1010.0, 790.0]})
THREE = changed(OPENING, waveform={'pri_us': [980.0, 860.0, 735.0]})


def pictured(name, plan, kept, **view):
    computed = Computed(read(plan))
    return columns.picture(
        name, computed, SHOWN_UNITS, {'width': 800, 'height': 500}, View(kept=kept and Computed(read(kept)), **view)
    )


def drawn(name, plan, kept):
    return pictured(name, plan, kept)['columns']


@pytest.mark.parametrize('name', columns.FIGURES)
def test_nothing_of_a_kept_plan_is_drawn_or_said_where_none_is_kept(name):
    for plan in EXAMPLES.values():
        figure = pictured(name, plan, None)
        kept = [source for source in figure['columns'] if source.startswith('kept')]
        assert all(np.size(column) == 0 for source in kept for column in figure['columns'][source].values())
        assert 'kept plan' not in figure['caption'] + figure['summary']


@pytest.mark.parametrize('name', columns.FIGURES)
def test_a_figure_has_the_same_sources_with_and_without_a_kept_plan(name):
    assert set(drawn(name, OPENING, None)) == set(drawn(name, OPENING, WIDER)) == set(drawn(name, STAGGER, OPENING))


@pytest.mark.parametrize('pair', [*pairwise([*EXAMPLES, *FEW]), *product(FEW, FEW)], ids='-'.join)
def test_captions_summaries_and_tables_of_any_two_plans_read_well(pair):
    for name in columns.FIGURES:
        figure = pictured(name, *(EXAMPLES[one] for one in pair))
        for text in (figure['caption'], figure['short'], figure['summary']):
            assert text.endswith('.')
            assert not WRONG.search(text), text
        assert all(len(row) == len(figure['table']['head']) for row in figure['table']['rows'])
        if name != 'decoding':
            assert 'kept plan' in figure['caption']


def test_the_map_says_exactly_what_is_lost_and_gained():
    one, other = (Computed(read(plan)) for plan in (OTHER_PRIS, OPENING))
    shares = difference(one, other)
    caption = pictured('blind-zones', OTHER_PRIS, OPENING)['caption']
    assert f'lost {percent(shares.lost)}, gained {percent(shares.gained)} of the coverage.' in caption
    assert shares.gained - shares.lost == pytest.approx(one.share - other.share, abs=1e-12)
    assert shares.lost > 0 < shares.gained


def test_the_map_marks_as_much_as_the_caption_says():
    shares = difference(Computed(read(OTHER_PRIS)), Computed(read(OPENING)))
    image = drawn('blind-zones', OTHER_PRIS, OPENING)['map']['image']
    assert np.isin(image, (LOST, LOST_HATCH)).mean() == pytest.approx(shares.lost, abs=A_ROW)
    assert np.isin(image, (GAINED, GAINED_DOT)).mean() == pytest.approx(shares.gained, abs=A_ROW)
    assert (image == STILL_BLIND).mean() == pytest.approx(shares.neither, abs=A_ROW)


def test_a_lost_zone_is_cross_hatched_and_a_gained_one_dotted():
    seen, kept = np.zeros((40, 80), dtype=bool), np.zeros((40, 80), dtype=bool)
    kept[:, :40], seen[:, 40:] = True, True
    image = changes(seen, kept)
    assert set(np.unique(image[:, :40])) == {LOST, LOST_HATCH}
    assert set(np.unique(image[:, 40:])) == {GAINED, GAINED_DOT}
    hatched = image[:, :40] == LOST_HATCH
    rising, falling = hatched[1:, 1:] & hatched[:-1, :-1], hatched[1:, :-1] & hatched[:-1, 1:]
    assert rising.mean() == pytest.approx(falling.mean(), abs=0.02)
    assert 0.1 < hatched.mean() < 0.4


def test_against_itself_a_plan_loses_nothing_and_gains_nothing():
    figure = pictured('blind-zones', OPENING, OPENING)
    assert 'nothing is lost and nothing gained' in figure['caption']
    assert not np.isin(figure['columns']['map']['image'], (LOST, GAINED)).any()


def test_another_coverage_is_named_and_it_is_the_present_plans():
    nearer = changed(OPENING, coverage={'range_km': [2.0, 80.0]})
    assert "this plan's coverage, 2 to 80 km" in pictured('blind-zones', nearer, OPENING)['caption'].replace(
        THIN_SPACE, ' '
    )
    assert "over this plan's coverage" in pictured('eclipsed-ranges', nearer, OPENING)['caption']
    assert "this plan's coverage" not in pictured('blind-zones', WIDER, OPENING)['caption']


def test_each_prf_has_a_thin_lane_of_the_kept_plan_below_it():
    for name, own in (('eclipsed-ranges', 'eclipsed'), ('blind-speeds', 'notches')):
        lanes = drawn(name, WIDER, OPENING)
        here, below = lanes['lanes']['y'], lanes['kept-lanes']['y']
        assert np.allclose(below - here, (below - here)[0])
        assert -0.5 < (below - here)[0] < 0
        # What is drawn thin of the kept plan is what is drawn of it when it is the present one.
        alone = drawn(name, OPENING, None)[own]
        assert lanes['kept-blind']['left'] == pytest.approx(alone['left'])
        assert lanes['kept-blind']['right'] == pytest.approx(alone['right'])


def test_where_prfs_differ_in_number_one_thin_lane_lies_below_all():
    for name in ('eclipsed-ranges', 'blind-speeds'):
        figure = pictured(name, THREE, OPENING)
        assert figure['columns']['kept-lanes']['y'].shape == (1,)
        assert figure['columns']['kept-lanes']['y'][0] < figure['columns']['lanes']['y'].min() - 0.5
        assert figure['ranges']['y'][0] < figure['columns']['kept-lanes']['y'][0] - 0.1
        assert figure['ticks']['y']['text'][0] == 'kept plan'


def test_the_kept_plans_prfs_are_on_the_trade_line():
    figure = pictured('trade-line', OTHER_PRIS, OPENING)
    alone = drawn('trade-line', OPENING, None)['prfs']
    assert figure['columns']['kept']['x'] == pytest.approx(alone['x'])
    assert figure['columns']['kept']['y'] == pytest.approx(alone['y'])
    low, high = figure['ranges']['x']
    assert low < figure['columns']['kept']['x'].min() <= figure['columns']['kept']['x'].max() < high


def test_a_kept_staggers_response_is_its_own():
    shorter = changed(STAGGER, waveform={'pri_us': [1000.0, 1150.0, 1070.0, 1230.0]})
    kept = drawn('blind-speeds', shorter, STAGGER)['kept-response']
    alone = drawn('blind-speeds', STAGGER, None)['response']
    assert kept['x'] == pytest.approx(alone['x'])
    assert kept['y'] == pytest.approx(alone['y'])
    assert drawn('blind-speeds', STAGGER, OPENING)['kept-response']['x'].size == 0


def test_the_kept_dwell_is_as_long_as_its_own_and_both_fit_on_the_axis():
    longer = changed(OPENING, waveform={'pulses': 30})
    figure = pictured('dwell', OPENING, longer)
    alone = drawn('dwell', longer, None)
    assert figure['columns']['kept-counted']['right'] == pytest.approx(alone['counted']['right'])
    assert figure['ranges']['x'][1] >= figure['columns']['kept-counted']['right'].max()
    assert figure['caption'].endswith('longer.')


def test_the_kept_plans_detection_is_its_own_median():
    stronger = changed(OPENING, target={'at_km': 90.0})
    figure, alone = pictured('detection', OPENING, stronger), drawn('detection', stronger, None)
    assert figure['columns']['kept']['y'] == pytest.approx(alone['median']['y'])
    assert 'Long dashes' in figure['caption']
    assert figure['table']['head'][2].startswith('Kept plan')


def test_the_kept_plans_filter_is_its_own():
    kept = drawn('doppler-filters', OTHER_PRIS, OPENING)['kept-filter']
    assert np.isfinite(kept['y']).sum() > 100
    assert drawn('doppler-filters', THREE, OPENING)['kept-filter']['x'].size == 0


def test_words_for_the_target_hold_while_comparing():
    view = {'kept': OPENING, 'target': {'range_km': 60.0, 'speed_mps': 100.0}}
    note = api.note(WIDER, view=view, figures=columns.FIGURES)
    assert note['target']
    assert note['figures']['blind-zones']['columns']['target']['x'] == pytest.approx([60.0])
