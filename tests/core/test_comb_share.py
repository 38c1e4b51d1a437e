"""The quickest way to the visible share gives what the way through the spans gives."""

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore import eclipsing, sight, stagger
from pycore.comb_share import comb_lengths, visible_share_of_combs
from pycore.combs import Comb

# Sums of some hundred lengths, each rounded.
ROUNDING = 1e-12
ONE_EDGE = 1e-9


@settings(max_examples=80, deadline=None)
@given(data=st.data())
def test_the_share_from_combs_is_the_share_from_plain_spans(plain, data):
    plan = data.draw(plain.plans())
    ranges = eclipsing.clear_comb(plan.pri_s, plan.pulse_s, plan.recovery_s, plan.guard_s, plan.received_min)
    speeds = stagger.notch_comb(plan.blind_speed_m_s, plan.notch_m_s)
    quick = visible_share_of_combs(ranges, speeds, plan.m, plan.range_m, plan.speed_m_s)
    assert quick == pytest.approx(sight.share(plain.sight(plan)), abs=20 * ONE_EDGE)


def test_lengths_of_two_combs_by_hand():
    # Clear from 1 to 3 in every 4, and from 2 to 5 in every 6; looked at from 2 to 11.
    comb = Comb(np.array([1.0, 2.0]), np.array([3.0, 5.0]), np.array([4.0, 6.0]))
    # First: 2-3, 5-7, 9-11. Second: 2-5, 8-11. Both: 2-3, 9-11.
    assert comb_lengths(comb, (2.0, 11.0))[1:].tolist() == pytest.approx([2.0, 3.0, 3.0], abs=ROUNDING)


def test_a_comb_with_nothing_clear_adds_nothing():
    comb = Comb(np.array([1.0, 2.5]), np.array([3.0, 2.0]), np.array([4.0, 4.0]))
    assert comb_lengths(comb, (-4.0, 4.0))[1:].tolist() == pytest.approx([4.0, 0.0, 0.0], abs=ROUNDING)
