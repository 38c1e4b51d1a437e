"""Sets that are printed somewhere: the search must do at least as well.

Sources, as named beside each check:
[DH02] P. G. Davies, E. J. Hughes, "Medium PRF set selection using evolutionary algorithms",
IEEE Trans. Aerospace and Electronic Systems 38(3), 2002, as reported in M. A. Richards, Fundamentals of Radar Signal
Processing, 2nd ed., McGraw-Hill 2014, p. 397, fig. 5.30: the set.
"Computed" marks what no source prints: shares of that set by the exact rule of this project, and sets found for it.
"""

import pytest

from pycore.finder import Search, run_slice
from pycore.finder.limits import Cycle, Limits, Place
from pycore.response import binomial_weights

# [DH02]: 10 GHz rounded to 0.03 m, pulse 1 us, ten cells blanked, clutter to ±17 m/s, 3 of 8, PRIs in whole us; every
# triple decodes exactly to 185.2 km.
PUBLISHED_SET = (51, 53, 60, 63, 67, 84, 89, 93)
PUBLISHED_EXCESS = 0.348e-2  # computed
LAST_FIGURE = 0.5e-5


def yardstick(lowest, highest, clock_hz=10**6, **more):
    return Limits(
        places=(Place(0.03, 1e-6, 17.0),) * 8,
        m=3,
        clock_hz=clock_hz,
        pri_counts=(lowest, highest),
        range_m=(0.0, 185_200.0),
        speed_m_s=(0.0, 1500.0),
        recovery_s=10e-6,
        **{'decode': 'exact', 'decode_m': 185_200.0, **more},
    )


def best_within(limits, slices, seed=1):
    return min(found.best[0] for found in (run_slice(limits, seed, number) for number in range(slices)) if found.best)


def test_the_published_set_decodes_and_leaves_what_was_computed_for_it():
    search = Search(yardstick(50, 95))
    assert search.judge.decoder.decodes(PUBLISHED_SET)
    assert search.better(PUBLISHED_SET).excess_over_floor == pytest.approx(PUBLISHED_EXCESS, abs=LAST_FIGURE)


@pytest.mark.parametrize('decode', ['exact', 'blur'])
def test_the_search_leaves_less_than_a_sixth_of_what_the_published_set_leaves(decode):
    excess, pris = best_within(yardstick(50, 95, decode=decode), slices=4)
    assert excess <= 0.06e-2
    search = Search(yardstick(50, 95, decode=decode))
    assert search.judge.decoder.decodes(pris)
    assert search.better(pris).excess_over_floor == pytest.approx(excess, abs=1e-9)


def test_with_longer_pris_it_leaves_less_than_a_tenth():
    excess, _ = best_within(yardstick(35, 150), slices=2)
    assert excess <= 0.035e-2


# Computed: 1000 1200 1080 1240 us dips to these, for 1, 2, 3 delays; 0.3 to 14 times the mean PRI's first blind speed.
KNOWN_STAGGER, KNOWN_DIPS_DB = (1000, 1200, 1080, 1240), (-8.70, -8.61, -9.73)
MEAN_BLIND_M_S = 0.1 / 2 / 1130e-6


def stagger(delays):
    weights = tuple(float(weight) for weight in binomial_weights(delays))
    cycle = Cycle(
        weights, spread=1.3, mean_counts=(1130.0, 1130.0), dip_m_s=(0.3 * MEAN_BLIND_M_S, 14 * MEAN_BLIND_M_S)
    )
    place = Place(0.1, 1e-6, 5.0)
    return Limits((place,) * 4, 1, 10**6, (900, 1400), (0.0, 100e3), (0.0, 600.0), decode='none', stagger=cycle)


@pytest.mark.parametrize(('delays', 'dip_db'), list(zip((1, 2, 3), KNOWN_DIPS_DB, strict=True)))
def test_the_known_stagger_dips_as_deep_as_was_computed(delays, dip_db):
    assert Search(stagger(delays)).judge.dip_db(KNOWN_STAGGER) == pytest.approx(dip_db, abs=0.005)


@pytest.mark.parametrize(('delays', 'dip_db', 'slices'), [(1, -6.6, 2), (2, -7.0, 2), (3, -7.6, 6)])
def test_the_search_finds_staggers_that_dip_less(delays, dip_db, slices):
    score, _ = best_within(stagger(delays), slices)
    assert -score >= dip_db
