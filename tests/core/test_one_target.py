"""One target against every PRI: clear or not, and how far from the nearest edge."""

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore.eclipsing import NearPulse, received_share
from pycore.finder.limits import Place
from pycore.one_target import AT_REST_M_S, every_pri

MICROMETRE = 1e-6
PLACE = Place(0.03, 1e-6, 17.0)

CASES = st.fixed_dictionaries(
    {
        'range_m': st.one_of(st.sampled_from([1.0, 1649.0, 7494.81145]), st.floats(1.0, 60e3)),
        'speed_m_s': st.one_of(st.sampled_from([0.0, -200.0]), st.floats(-900.0, 900.0)),
        'recovery_s': st.sampled_from([0.0, 1e-5, 4.9e-5, 2e-4]),
        'guard_s': st.sampled_from([0.0, 1e-6]),
        'received_min': st.sampled_from([0.25, 0.5, 1.0]),
        'near': st.sampled_from([None, NearPulse(0.3e-6, 25e-6, 4000.0)]),
    }
)
PRI_S = np.arange(50, 96, 5) * 1e-6


def every(case, **changed):
    case = {**case, **changed}
    return every_pri(PRI_S, place=PLACE, **case)


def at(case, range_m):
    shut = case['recovery_s'], case['guard_s']
    return np.array([received_share(range_m, pri, PLACE.pulse_s, *shut, case['near']) for pri in PRI_S])


@settings(max_examples=50, deadline=None)
@given(case=CASES)
def test_received_and_clear_are_what_each_pri_alone_says(case):
    each = every(case)
    received = at(case, case['range_m'])
    assert each.received == pytest.approx(received, abs=1e-9)
    sure = np.abs(received - case['received_min']) > 1e-6
    assert (each.range_clear == ((received >= case['received_min']) & (received > 0)))[sure].all()
    folded = np.mod(case['speed_m_s'], 0.015 / PRI_S)
    near_notch = np.minimum(folded, 0.015 / PRI_S - folded)
    sure = np.abs(near_notch - 17.0) > 1e-9
    assert (each.speed_clear == (near_notch >= 17.0))[sure].all()


@settings(max_examples=50, deadline=None)
@given(case=CASES)
def test_just_short_of_the_edge_it_is_clear_and_just_beyond_it_is_not(case):
    each = every(case)

    def clear(range_m):
        return every(case, range_m=range_m).range_clear

    for pri in np.flatnonzero(each.range_clear)[:4]:
        far = each.to_edge_m[pri]
        sides = [clear(max(case['range_m'] + side * (far + 1e-3), 0.0))[pri] for side in (-1, 1)]
        assert not all(sides)
        assert far < 2e-3 or all(clear(max(case['range_m'] + side * (far - 1e-3), 0.0))[pri] for side in (-1, 1))
    assert (each.to_edge_m[~each.range_clear] == 0.0).all()


@settings(max_examples=50, deadline=None)
@given(case=CASES)
def test_the_time_until_it_is_blind_is_the_flight_to_the_edge_ahead(case):
    each = every(case)
    v = case['speed_m_s']
    assert (each.until_blind_s[~each.clear] == 0.0).all()
    some = each.until_blind_s[each.clear]
    if abs(v) <= AT_REST_M_S:
        assert np.isinf(some).all()
    else:
        assert np.isfinite(some).all()
        assert (some * abs(v) >= each.to_edge_m[each.clear] - MICROMETRE).all()


def test_of_all_pris_the_one_that_keeps_it_clear_longest_is_found():
    # Closing at 100 m/s from 15 km; recovery 10 us. The edge ahead is the opening after the last pulse before it.
    each = every_pri(PRI_S, 15e3, 100.0, PLACE, 1e-5, 0.0, 0.5)
    best = each.longest
    assert each.clear[best]
    assert each.until_blind_s[best] == each.until_blind_s.max()
    delay = 2 * 15e3 / 299_792_458.0
    into = np.mod(delay, PRI_S[best]) - 10.5e-6
    assert each.until_blind_s[best] == pytest.approx(into * 299_792_458.0 / 2 / 100.0)


def test_a_target_that_no_pri_sees_has_no_best_one():
    assert every_pri(PRI_S, 15e3, 5.0, PLACE, 1e-5, 0.0, 0.5).longest is None
