"""The axis of the blind speeds in other measures: the same places, said otherwise."""

import numpy as np
import pytest

from pycore import columns
from pycore.columns.view import View, seen
from pycore.computed import Computed
from pycore.errors import InputError
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS

WAVELENGTH_M = 299_792_458.0 / 2.8e9
PLAN = {
    'radar': {'carrier_ghz': 2.8},
    'coverage': {'speed_mps': [-100, 300]},
    'waveform': {'pri_us': [980, 860], 'pulses': 9},
}


def picture(axis, plan=PLAN, **units):
    return columns.picture('blind-speeds', Computed(read(plan)), {**SHOWN_UNITS, **units}, None, View(axis=axis))


def read_off(found):
    return {
        text.replace('−', '-'): at
        for at, text in zip(*(found['ticks']['x'][key] for key in ('at', 'text')), strict=True)
    }


def test_ticks_of_doppler_stand_at_half_a_wavelength_each():
    for text, at in read_off(picture('doppler')).items():
        assert at == pytest.approx(1e3 * float(text) * WAVELENGTH_M / 2, abs=1e-9)
    assert picture('doppler')['labels']['x'] == 'Doppler frequency (kHz)'


def test_doppler_in_knots_is_the_same_doppler():
    knots, metres = read_off(picture('doppler', speed='kt')), read_off(picture('doppler'))
    assert {text: at * 1852 / 3600 for text, at in knots.items()} == pytest.approx(metres)


def test_two_blind_speeds_of_the_mean_interval_stand_at_twice_its_first():
    assert read_off(picture('ratio'))['2'] == pytest.approx(2 * WAVELENGTH_M / (2 * 920e-6))


def test_with_several_carriers_the_doppler_says_of_which():
    plan = {**PLAN, 'radar': {'carrier_ghz': [2.7, 3.1]}}
    assert (
        picture('doppler', plan)['labels']['x'].replace('\N{NARROW NO-BREAK SPACE}', ' ')
        == 'Doppler frequency at 2.7 GHz (kHz)'
    )


@pytest.mark.parametrize('plan', [PLAN, {**PLAN, 'waveform': {'kind': 'stagger', 'pri_us': [980, 860], 'pulses': 9}}])
def test_what_is_drawn_and_said_is_the_same_on_every_axis(plan):
    speed, *others = (picture(axis, plan) for axis in ('speed', 'doppler', 'ratio'))
    for other in others:
        assert other['caption'] == speed['caption']
        assert other['ranges'] == speed['ranges']
        for source, data in speed['columns'].items():
            for key, column in data.items():
                np.testing.assert_array_equal(other['columns'][source][key], column)


def test_an_axis_that_is_none_is_refused_by_name():
    with pytest.raises(InputError) as refused:
        seen(Computed(read(PLAN)), {'axis': 'colour'})
    assert refused.value.field == 'axis'
