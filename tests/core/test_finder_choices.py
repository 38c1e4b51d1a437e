"""Which PRIs may take a place."""

from fractions import Fraction

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore.finder.choices import choices
from pycore.finder.limits import Limits, Place


def limits(pri_counts, place=None, **more):
    place = place or Place(0.03, 1e-6, 17.0)
    return Limits((place,) * 2, 1, 10**7, pri_counts, (0.0, 1e4), (0.0, 100.0), **more)


def listed(some):
    return some.counts(np.arange(len(some))).tolist()


@settings(max_examples=200, deadline=None)
@given(
    low=st.integers(1, 60),
    long=st.integers(0, 80),
    step=st.integers(1, 9),
    avoid=st.lists(st.tuples(st.integers(0, 150), st.integers(0, 40)), max_size=3),
    bandwidth=st.sampled_from([None, 1e6, 2.5e6, 4e6, 3e6, 0.7e6]),
)
def test_the_choices_are_those_that_pass_every_test_one_by_one(low, long, step, avoid, bandwidth):
    place = Place(0.03, 1e-9, 17.0, bandwidth_hz=bandwidth or 1e6)
    avoided = tuple((a, a + more) for a, more in avoid)
    some = choices(
        limits((low, low + long), place, step_counts=step, avoid=avoided, whole_gates=bandwidth is not None), 0
    )
    gate = Fraction(10**7) / Fraction(bandwidth or 1)
    expected = [
        pri
        for pri in range(low, low + long + 1, step)
        if not any(a <= pri <= b for a, b in avoided) and (bandwidth is None or (pri / gate).denominator == 1)
    ]
    assert listed(some) == expected
    assert some.hold(np.arange(0, 250)).tolist() == [pri in expected for pri in range(250)] if expected else True
    assert [some.below(pri) for pri in range(160)] == [sum(other < pri for other in expected) for pri in range(160)]


def test_a_pri_is_longer_than_its_pulse_and_its_duty_may_be_the_limit_itself():
    assert listed(choices(limits((5, 12)), 0)) == [11, 12]
    assert listed(choices(limits((95, 102), duty_limit=0.1), 0)) == [100, 101, 102]


def test_a_stagger_that_must_decode_is_long_enough_for_the_range():
    from pycore.finder.limits import Cycle

    some = choices(limits((1, 1000), decode='exact', decode_m=14_989.6229, stagger=Cycle()), 0)
    assert listed(some)[0] == 1000


@pytest.mark.parametrize('wide', [10**6, 9_999_000])
def test_millions_of_choices_take_no_list(wide):
    some = choices(limits((1000, 1000 + wide), avoid=((2000, 3000),)), 0)
    assert len(some) == wide + 1 - 1001
    assert some.counts(np.array([999, 1000])).tolist() == [1999, 3001]
