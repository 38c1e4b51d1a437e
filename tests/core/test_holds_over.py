"""Findings at their worst over an interval of carriers and of rain speeds."""

import copy
import json
from pathlib import Path

import numpy as np
import pytest

from pycore import api
from pycore.computed import Computed
from pycore.findings import findings, named
from pycore.findings.rank import rank
from pycore.holds_over import as_rows, held, judged
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS
from pycore.worst_over import on_carrier, with_rain_at

OPENING = json.loads((Path(__file__).parents[2] / 'webapp/examples/opening.json').read_text('utf-8'))['plan']
CARRIERS = [2.2, 2.9]
NARROW_DIP = 1e-4  # what 65 points and their refinement may miss of a share that has kinks


def holding(carriers=CARRIERS, speeds=None, **more):
    return {**copy.deepcopy(OPENING), 'holds_over': {'carrier_ghz': carriers, 'rain_mps': speeds}, **more}


def at(plan, name, carrier_ghz):
    return named(Computed(on_carrier(plan, carrier_ghz)), name, SHOWN_UNITS)


@pytest.fixture(scope='module')
def found():
    computed = Computed(read(holding()), with_echoes=False)
    return {one.finding.name: one for one in held(computed, SHOWN_UNITS)}


@pytest.mark.parametrize('name', ['visible', 'must-see.0'])
def test_the_worst_is_no_better_than_any_carrier_of_a_fine_row(name, found):
    plan = read(holding())
    row = [rank(name, at(plan, name, round(float(ghz), 6)).value) for ghz in np.linspace(*CARRIERS, 201)]
    worst = found[name].worst
    assert rank(name, worst.value) <= min(row) + NARROW_DIP
    assert at(plan, name, found[name].carrier_ghz).value == worst.value
    assert CARRIERS[0] <= found[name].carrier_ghz <= CARRIERS[1]


def test_a_finding_is_judged_by_the_worst_and_says_so():
    document = holding()
    document['wanted']['visible_pct'] = 96.5
    own = named(Computed(read({**document, 'holds_over': None})), 'visible', SHOWN_UNITS)
    over = next(
        one for one in judged(Computed(read(document), with_echoes=False), SHOWN_UNITS) if one.name == 'visible'
    )
    assert (own.met, over.met, over.value) == (True, False, own.value)
    assert 'over 2.2 to 2.9 GHz the worst is' in over.text.replace('\N{NARROW NO-BREAK SPACE}', ' ')
    assert over.text.endswith('which it is judged by.')
    assert over.fault.startswith('at ')


def test_what_does_not_depend_on_the_carrier_is_left_as_it_is(found):
    for name in ('decode-range', 'dwell', 'duty', 'range-walk'):
        assert found[name].finding is found[name].worst
        assert 'GHz' not in found[name].finding.text


def test_every_finding_that_is_not_searched_is_the_same_on_another_carrier():
    plan = read(OPENING)
    for name in ('decode-range', 'dwell', 'duty', 'range-walk', 'unseen-crossing'):
        assert at(plan, name, 2.8).value == at(plan, name, 3.3).value


def test_a_plan_that_holds_over_nothing_has_the_findings_of_its_own_carrier():
    computed = Computed(read(OPENING), with_echoes=False)
    assert judged(computed, SHOWN_UNITS) == findings(computed, SHOWN_UNITS)
    assert as_rows(computed, held(computed, SHOWN_UNITS)) is None


def test_on_the_page_only_what_is_judged_is_searched():
    computed = Computed(read(holding([2.7, 2.9])), with_echoes=False)
    texts = {one.name: one.text for one in judged(computed, SHOWN_UNITS)}
    assert 'the worst is' in texts['visible']
    assert 'the worst is' not in texts['blind-speed']


def test_an_interval_that_is_nowhere_worse_is_said_to_be_so():
    document = holding([2.8, 2.8000001])
    document['wanted']['visible_pct'] = 1.0
    document['coverage'] = {'range_km': [5, 100], 'speed_mps': [10, 11]}
    document['must_see'] = []
    over = judged(Computed(read(document), with_echoes=False), SHOWN_UNITS)[0]
    assert (over.value, over.met) == (1.0, True)
    assert 'it is nowhere worse' in over.text


def test_several_carriers_move_together_and_stay_legal():
    plan = read({**OPENING, 'radar': {**OPENING['radar'], 'carrier_ghz': [2.8, 3.1]}})
    assert on_carrier(plan, 2.7).carrier_hz.tolist() == [2.7e9, 3.0e9]
    assert on_carrier(plan, 299.9).carrier_hz.tolist() == [299.9e9, 300e9]
    assert on_carrier(plan, 2.8).wavelength_m.tolist() == plan.wavelength_m.tolist()


def test_rain_moves_as_a_whole():
    plan = read({**OPENING, 'rain': [{'speed_mps': -10}, {'speed_mps': 4}]})
    assert [patch.speed_m_s for patch in with_rain_at(plan, 3.0).patches] == [3.0, 17.0]


def test_rain_lowers_the_share_seen_with_clutter_at_its_worst_speed():
    document = holding(None, [-15, 15], rain={})
    document['surface'] = None
    computed = Computed(read(document), with_echoes=False)
    rows = as_rows(computed, held(computed, SHOWN_UNITS))
    worst = rows['share-with-clutter']
    row = [Computed(with_rain_at(computed.plan, float(v))).echoes.share_with_clutter for v in np.linspace(-15, 15, 31)]
    assert worst['value'] <= min(row) + NARROW_DIP
    assert worst['value'] < computed.echoes.share_with_clutter
    assert rows['visible']['carrier_ghz'] is None  # without clutter, rain changes nothing


def test_a_stagger_holds_over_carriers_too():
    document = {
        'waveform': {'pri_us': [1000, 1200], 'kind': 'stagger'},
        'holds_over': {'carrier_ghz': [2.8, 5.6]},
        'wanted': {'blind_speed_mps': 100},
    }
    rows = api.assess(document)['holds_over']
    own = named(Computed(read({**document, 'holds_over': None})), 'blind-speed', SHOWN_UNITS).value
    assert rows['blind-speed']['value'] == pytest.approx(own / 2, rel=1e-9)  # speeds go with the wavelength
    assert rows['blind-speed']['carrier_ghz'] == 5.6
    assert 'share-with-clutter' not in rows


def test_the_verdict_of_the_assessment_is_that_of_the_worst():
    answer = api.assess(holding([2.7, 2.9]))
    for one in answer['findings']:
        assert answer['holds_over'][one['name']]['met'] == one['met']
    json.dumps(answer, allow_nan=False)
