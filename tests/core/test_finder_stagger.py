"""Staggers: many cycles scored together, and the search for the one that dips least."""

from dataclasses import replace
from itertools import permutations

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore.finder import Search, judge_of, merged, run_slice
from pycore.finder.limits import Cycle, Limits, Place, Region
from pycore.response import binomial_weights
from pycore.stagger import staggered

PLACE = Place(0.1, 1e-6, 5.0, pulses=10, fill_pulses=2)
MEAN_BLIND_M_S = 0.1 / 2 / 1130e-6
WANTED_M_S = (0.3 * MEAN_BLIND_M_S, 14 * MEAN_BLIND_M_S)
HUNDREDTH_DB = 0.01


def limits(n=4, delays=2, pri_counts=(900, 1400), **cycle):
    given_ = {'spread': 1.3, 'mean_counts': (1130.0, 1130.0), 'dip_m_s': WANTED_M_S, **cycle}
    weights = tuple(float(weight) for weight in binomial_weights(delays))
    stagger = Cycle(weights, **given_)
    return Limits((PLACE,) * n, 1, 10**6, pri_counts, (0.0, 100e3), (0.0, 600.0), decode='none', stagger=stagger)


@settings(max_examples=60, deadline=None)
@given(
    cycles=st.lists(st.lists(st.integers(900, 1400), min_size=4, max_size=4), min_size=1, max_size=5),
    delays=st.integers(1, 3),
)
def test_many_cycles_together_have_the_dips_each_has_alone(cycles, delays):
    judge = judge_of(limits(delays=delays))
    together = judge.dips(np.array(cycles))
    for cycle, power in zip(cycles, together, strict=True):
        alone = 10.0 ** (judge.dip_db(tuple(cycle)) / 10.0)
        # Between grid points a parabola stands for the response: near its deepest valleys, to some thousandths.
        assert power == pytest.approx(alone, abs=0.02)


def test_without_room_for_a_table_the_dips_are_the_same(monkeypatch):
    some = np.array([[1000, 1200, 1080, 1240], [990, 1030, 1220, 1280]])
    tabled = judge_of(limits(delays=3)).dips(some)
    monkeypatch.setattr('pycore.finder.cycle._MOST_TABLED', 0)
    assert judge_of(limits(delays=3, spread=1.29)).dips(some) == pytest.approx(tabled, abs=1e-12)


@given(cycle=st.lists(st.integers(900, 1400), min_size=2, max_size=6), turn=st.integers(0, 5))
def test_turned_or_sent_backwards_a_cycle_is_the_same_cycle(cycle, turn):
    judge = judge_of(limits(n=len(cycle)))
    turned = cycle[turn % len(cycle) :] + cycle[: turn % len(cycle)]
    assert judge.in_order(np.array(turned[::-1])) == judge.in_order(np.array(cycle))
    assert judge.dip_db(tuple(turned[::-1])) == pytest.approx(judge.dip_db(tuple(cycle)), abs=1e-6)


@pytest.mark.parametrize('delays', [1, 2])
def test_of_a_small_problem_the_search_finds_the_best_cycle(delays):
    some = limits(n=3, delays=delays, pri_counts=(1084, 1180), mean_counts=(1130.0, 1130.0))
    some = replace(some, step_counts=6)
    judge = judge_of(some)
    every = range(1084, 1181, 6)
    legal = [pris for pris in permutations(every, 3) if sum(pris) == 3390 and pris == judge.in_order(np.array(pris))]
    assert len(legal) > 20
    best = max(judge.dip_db(pris) for pris in legal)
    assert run_slice(some, 1, 0).best[0][0] == pytest.approx(-best, abs=1e-8)


def test_what_is_found_keeps_to_spread_mean_and_kept_intervals():
    some = replace(limits(mean_counts=(1100.0, 1140.0)), keep=((1, 1111),), avoid=((1000, 1050),), apart_counts=7)
    found = run_slice(some, 2, 0).best
    assert len(found) > 5
    for _, pris in found:
        rising = np.sort(pris)
        assert 1111 in pris
        assert rising[-1] <= 1.3 * rising[0]
        assert 1100.0 <= np.mean(pris) <= 1140.0
        assert np.diff(rising).min() >= 7
        assert not any(1000 <= pri <= 1050 for pri in pris)


def test_a_listed_stagger_gives_what_its_plan_gives():
    some = limits(dip_m_s=None, mean_counts=(1000.0, 1200.0))
    one = Search(some, 1)
    while one.steps < 200:
        one.step()
    best = one.ranked(1)[0]
    plan = staggered(best.pri_counts, 10**6, 2, None, 0.1, -10.0, some.speed_m_s)
    assert best.dip_db == pytest.approx(plan.deepest_db, abs=HUNDREDTH_DB)
    assert best.decode_m == pytest.approx(min(best.pri_s) * 299_792_458.0 / 2)
    assert best.time_s == pytest.approx(12 * np.mean(best.pri_s))
    assert best.visible_share + best.floor_share + best.excess_over_floor == pytest.approx(1.0, abs=1e-9)


def test_a_region_that_must_be_seen_binds_a_stagger_too():
    region = Region('near', (10e3, 60e3), (30.0, 200.0), 1.0)
    some = replace(limits(), must_see=(region,))
    for _, pris in run_slice(some, 1, 0).best:
        assert judge_of(some).settle(pris, 0.0)['must-see.0'] == 0.0
    blind = replace(some, must_see=(replace(region, range_m=(10e3, 99e3), speed_m_s=(0.0, 200.0)),))
    found = run_slice(blind, 1, 0)
    assert not found.best
    assert found.misses['must-see.0'].short > 0.0


def test_slices_of_a_stagger_search_merge_to_what_one_process_finds():
    some, alone = limits(delays=1), Search(limits(delays=1), 4)
    while alone.steps < 700:
        alone.step()
    parts = [run_slice(some, 4, 2, 100), run_slice(some, 4, 1), run_slice(some, 4, 0)]
    assert merged(parts) == alone.found
