"""All candidates for the last place are scored exactly, whatever else differs from place to place."""

from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore.eclipsing import NearPulse
from pycore.finder import tables as finder_tables
from pycore.finder.judge import Judge
from pycore.finder.limits import Limits, Place, Region
from pycore.finder.scores import Scorer
from pycore.finder.sight import sight_of
from pycore.sight import share, within

EXACT = 1e-9

KINDS = st.builds(
    Place,
    wavelength_m=st.sampled_from([0.03, 0.032, 0.107]),
    pulse_s=st.sampled_from([0.3e-6, 1e-6, 6e-6]),
    notch_m_s=st.sampled_from([0.0, 5.0, 17.0, 80.0, 400.0]),
)


@st.composite
def drawn_limits(draw, most=7):
    n = draw(st.integers(1, most))
    kinds = draw(st.lists(KINDS, min_size=1, max_size=2))
    low = draw(st.integers(200, 400))
    slow = draw(st.sampled_from([-900.0, -20.0, 0.0, 40.0]))
    near = draw(st.sampled_from([None, None, NearPulse(0.2e-6, 9e-6, 3_000.0)]))
    return Limits(
        places=tuple(draw(st.sampled_from(kinds)) for _ in range(n)),
        m=draw(st.integers(1, n)),
        clock_hz=10**7,
        pri_counts=(low, low + draw(st.integers(0, 200))),
        range_m=(draw(st.sampled_from([0.0, 700.0, 12_345.0])), draw(st.sampled_from([20_000.0, 33_333.3]))),
        speed_m_s=(slow, slow + draw(st.sampled_from([60.0, 1400.0]))),
        recovery_s=draw(st.sampled_from([0.0, 1e-6, 1e-5, 1e-4])),
        guard_s=draw(st.sampled_from([0.0, 1e-6])),
        received_min=draw(st.sampled_from([0.0, 0.5, 1.0])),
        near=near,
        decode='none',
    )


def drawn_set(data, limits):
    """Any PRIs of the interval, ends more often than not, and the same one several times over as well."""
    pri = st.one_of(st.sampled_from(limits.pri_counts), st.integers(*limits.pri_counts))
    return data.draw(st.lists(pri, min_size=limits.n, max_size=limits.n))


@settings(max_examples=120, deadline=None)
@given(limits=drawn_limits(), data=st.data())
def test_every_candidates_share_is_that_of_the_plan_it_makes(limits, data):
    pris = drawn_set(data, limits)
    place = data.draw(st.integers(0, limits.n - 1))
    held = [(limits.kinds[other], pri) for other, pri in enumerate(pris) if other != place]
    candidates = np.unique([*limits.pri_counts, pris[place]])
    scorer = Scorer(limits, limits.range_m, limits.speed_m_s)
    scored = scorer.shares(held, scorer.tables(limits.kinds[place], candidates))
    for candidate, got in zip(candidates.tolist(), scored, strict=True):
        plan = [*pris[:place], candidate, *pris[place + 1 :]]
        assert got == pytest.approx(share(sight_of(limits, plan)), abs=EXACT)


def test_wide_blocks_are_added_up_as_narrow_ones_are():
    limits = Limits((Place(0.03, 1e-6, 17.0),) * 4, 2, 10**7, (300, 900), (0.0, 50e3), (0.0, 900.0))
    scorer, held = Scorer(limits, limits.range_m, limits.speed_m_s), [(0, 411), (0, 523), (0, 777)]
    every = np.arange(300, 901)
    wide = scorer.shares(held, scorer.tables(0, every))
    narrow = [scorer.shares(held, scorer.tables(0, every[i : i + 50])) for i in range(0, every.size, 50)]
    assert wide == pytest.approx(np.concatenate(narrow), abs=1e-13)


def test_a_table_that_is_full_starts_again_and_says_the_same(monkeypatch):
    limits = Limits((Place(0.03, 1e-6, 17.0),) * 3, 2, 10**7, (300, 400), (0.0, 50e3), (0.0, 900.0))
    scorer, every = Scorer(limits, limits.range_m, limits.speed_m_s), np.arange(300, 401)
    roomy = scorer.tables(0, every)
    monkeypatch.setattr(finder_tables, '_MOST_TABLE_BYTES', 1)
    tight = scorer.tables(0, every)
    for held in ([(0, 311), (0, 323)], [(0, 399), (0, 350)], [(0, 311), (0, 377)], [(0, 305), (0, 306)]):
        assert scorer.shares(held, tight) == pytest.approx(scorer.shares(held, roomy), abs=0)


@settings(max_examples=40, deadline=None)
@given(limits=drawn_limits(most=4), data=st.data())
def test_a_must_see_region_is_scored_as_a_coverage_of_its_own(limits, data):
    region = Region(
        'near', (limits.range_m[0] + 100.0, 15_000.0), (limits.speed_m_s[0] + 7.0, limits.speed_m_s[1] - 13.0)
    )
    limits = replace(limits, must_see=(region,))
    judge, pris = Judge(limits), drawn_set(data, limits)
    kind = limits.kinds[-1]
    weighed = judge.weigh(list(zip(limits.kinds, pris[:-1], strict=False)), judge.block(kind, np.array(pris[-1:])))
    seen = share(within(sight_of(limits, pris), region.range_m, region.speed_m_s))
    missing = 0.0 if seen >= 1.0 - EXACT else 1.0 - seen
    assert weighed.short[2, 0] == pytest.approx(missing, abs=2 * EXACT)


@settings(max_examples=40, deadline=None)
@given(limits=drawn_limits(most=4), data=st.data())
def test_blind_share_is_floor_and_score_together(limits, data):
    judge, pris = Judge(limits), drawn_set(data, limits)
    held = list(zip(limits.kinds, pris[:-1], strict=False))
    weighed = judge.weigh(held, judge.block(limits.kinds[-1], np.array(pris[-1:])))
    assert weighed.score[0] + judge.floor_share + share(sight_of(limits, pris)) == pytest.approx(1.0, abs=EXACT)
    assert weighed.score[0] > -EXACT
