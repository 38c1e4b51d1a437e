"""Plans at the ends of what is legal: an answer for each, ready for JSON, and no warning (warnings are errors here)."""

import copy
import json
from pathlib import Path

import pytest

from pycore import api

OPENING = json.loads((Path(__file__).parents[2] / 'webapp' / 'examples' / 'opening.json').read_text('utf-8'))['plan']
CYCLE_US = [950, 1140, 1026, 1178]
EXTREMES = {
    'one pulse': {'waveform': {'pulses': 1}},
    'two pulses': {'waveform': {'pulses': 2}},
    '4096 pulses': {'waveform': {'pulses': 4096}},
    'one PRF': {'waveform': {'pri_us': [980]}},
    'sixteen PRFs': {'waveform': {'pri_us': [900 + 7 * place for place in range(16)]}},
    'a carrier of 3 MHz': {'radar': {'carrier_ghz': 0.003}},
    'a carrier of 110 GHz': {'radar': {'carrier_ghz': 110}},
    'a coverage nearer than any echo': {'coverage': {'range_km': [0, 0.1]}},
    'a coverage beyond every ambiguity': {'coverage': {'range_km': [5000, 9000]}},
    'speeds beyond every ambiguity': {'coverage': {'speed_mps': [-19_000, 19_000]}},
    'a stagger of one pulse': {'waveform': {'kind': 'stagger', 'pri_us': CYCLE_US, 'pulses': 1}},
    'a stagger at 3 MHz': {'waveform': {'kind': 'stagger', 'pri_us': CYCLE_US}, 'radar': {'carrier_ghz': 0.003}},
    'a stagger at 110 GHz': {'waveform': {'kind': 'stagger', 'pri_us': CYCLE_US}, 'radar': {'carrier_ghz': 110}},
    'a recovery longer than the interval': {'radar': {'recovery_us': 5000}},
    'a notch wider than the blind speed': {'doppler': {'notch_mps': 500}},
    'no notch': {'doppler': {'notch_mps': 0}},
    'any part of an echo is enough': {'waveform': {'received_min': 0}},
    'only a whole echo is enough': {'waveform': {'received_min': 1}},
}


def changed(change, rain):
    plan = copy.deepcopy(OPENING)
    for record, keys in change.items():
        plan[record].update(keys)
    return {**plan, 'rain': rain}


@pytest.mark.parametrize('rain', [None, {}], ids=['dry', 'in rain'])
@pytest.mark.parametrize('change', EXTREMES.values(), ids=EXTREMES)
def test_what_is_legal_is_answered(change, rain):
    answer = api.assess(changed(change, rain))
    json.dumps(answer, allow_nan=False)
    visible = answer['visible']
    assert -1e-12 <= visible['share'] <= 1 + 1e-12
    assert visible['share'] + visible['floor_share'] + visible['excess_over_floor'] == pytest.approx(1, abs=1e-9)
    assert sum(visible['share_by_count']) == pytest.approx(1, abs=1e-9)


@pytest.mark.parametrize('name', ['a recovery longer than the interval', 'a notch wider than the blind speed'])
def test_a_bad_plan_is_a_bad_plan_and_not_a_bad_number(name):
    assert api.assess(changed(EXTREMES[name], None))['visible']['share'] == 0
