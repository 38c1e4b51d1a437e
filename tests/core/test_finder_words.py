"""Limits that cannot be met: which one stands in the way, and how far off the best is."""

from dataclasses import replace

import pytest

from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.finder import Search
from pycore.finder.limits import Cycle, Limits, Place, Region
from pycore.finder.words import obstacles, verdict

APPROACH = Region('final approach', (4e3, 30e3), (40.0, 110.0), 1.0)
PLACE = Place(SPEED_OF_LIGHT_M_S / 2.8e9, 1e-6, 6.0, 2.8e9, 1e6, 9, 1)


def opening(range_max_m=110e3, step_counts=20, **more):
    """The plan that the page opens with, two PRIs wanted from 700 to 1200 us."""
    return Limits(
        m=1,
        clock_hz=10**7,
        pri_counts=(7000, 12000),
        range_m=(2e3, range_max_m),
        **{
            'places': (PLACE, PLACE),
            'speed_m_s': (0.0, 300.0),
            'step_counts': step_counts,
            'recovery_s': 1e-6,
            'duty_limit': 0.1,
            'time_s': 1.4 / 72,
            'decode_m': range_max_m,
            'visible': 0.95,
            'must_see': (APPROACH,),
            **more,
        },
    )


def searched(limits, steps=10**6):
    search = Search(limits, 1)
    while search.steps < steps and search.step():
        pass
    return search


def test_two_prfs_meet_all_that_the_opening_plan_wants():
    search = searched(opening(step_counts=10))
    assert search.proved
    assert verdict(search) == ''
    assert obstacles(search) == []
    found = {pris: score for score, pris in search.found.best}
    assert found[7350, 8810] == 0.0
    assert search.found.best[0][0] == 0.0


def test_out_to_140_km_no_two_prfs_do_and_the_sentence_says_why():
    search = searched(opening(140e3))
    assert search.proved
    assert verdict(search).startswith(
        'No two PRFs meet all limits: with everything else met, the nearest decodes only to 12'
    )
    (nearest,) = obstacles(search)
    assert nearest.name == 'decode'
    assert search.better(nearest.pris).must_see == (1.0,)
    assert 120e3 < search.better(nearest.pris).decode_m < 140e3


def test_before_all_sets_are_gone_through_it_says_how_many_were_tried():
    search = searched(opening(140e3), steps=20)
    assert not search.proved
    assert verdict(search).startswith(f'None of the {search.tried // 1000}')


IN_AND_OUT = {'speed_m_s': (4.0, 300.0), 'must_see': (), 'visible': None, 'unseen_s': 1e-3}
WIDE_NOTCH = (replace(PLACE, notch_m_s=40.0),) * 2


@pytest.mark.parametrize(
    ('change', 'name', 'words'),
    [
        ({'time_s': 0.012}, 'time', 'takes 16.2'),
        ({'visible': 0.99}, 'visible', 'sees 98'),
        ({'duty_limit': 1e-4}, 'pri', 'The duty limit leaves no PRI from 700 to 1200'),
        ({'avoid': ((0, 20_000),)}, 'pri', 'The intervals to avoid leave no PRI'),
        ({'apart_counts': 6000}, 'apart', 'No more than one PRI fits from 700 to 1200'),
        ({'decode_m': 150e3}, 'decode', 'decodes only to'),
        ({'decode_m_s': 290.0, 'step_counts': 200}, 'decode', 'decodes speeds over only'),
        ({'places': WIDE_NOTCH, 'step_counts': 200, **IN_AND_OUT}, 'unseen', 'loses sight'),
    ],
)
def test_the_limit_that_stands_in_the_way_is_named(change, name, words):
    search = searched(opening(**change), steps=200)
    assert search.found.best == ()
    assert obstacles(search)[0].name == name
    assert words in verdict(search)


def test_where_every_set_misses_several_limits_all_of_them_are_named():
    search = searched(opening(140e3, decode_m_s=290.0, visible=0.999, time_s=0.01), steps=100)
    (together,) = obstacles(search)
    assert together.name.count('+') >= 2
    assert 'misses more than one' in verdict(search)


def test_a_stagger_that_dips_too_deep_says_how_deep():
    stagger = Cycle(spread=1.2, mean_counts=(1130.0, 1130.0), dip_m_s=(20.0, 500.0), dip_db=-3.0)
    limits = Limits((Place(0.1, 1e-6, 5.0),) * 3, 1, 10**6, (900, 1400), (0.0, 100e3), (0.0, 500.0), stagger=stagger)
    search = searched(limits, steps=200)
    assert obstacles(search)[0].name == 'dip'
    assert 'dB are wanted' in verdict(search)


def test_a_stagger_too_short_for_its_range_is_refused_by_name():
    limits = Limits(
        (Place(0.1, 1e-6, 5.0),) * 3, 1, 10**6, (300, 500), (0.0, 100e3), (0.0, 500.0), stagger=Cycle(), decode_m=100e3
    )
    assert obstacles(Search(limits))[0].text.startswith('The range that a stagger must reach without ambiguity leaves')
