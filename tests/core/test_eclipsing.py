"""Clear ranges against the received share, and the received share against an echo chopped into small pieces."""

import numpy as np
import pytest
from hypothesis import example, given
from hypothesis import strategies as st

from pycore import eclipsing
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.eclipsing import NearPulse, clear_ranges, received_share

HALF_C = SPEED_OF_LIGHT_M_S / 2.0
PIECES = 4000
ONE_MICROMETRE = 1e-6
SURE = 1e-9  # of an echo: nearer to the least share than this, rounding may decide


@st.composite
def receivers(draw, with_near=None):
    """PRI, pulse, recovery, guard, least share and near pulse: also receivers that never open."""
    pri = draw(st.floats(2e-5, 1e-3))
    pulse = pri * draw(st.floats(0.01, 0.9))
    recovery = draw(st.sampled_from([0.0, 1e-6, 5e-6, pri / 2, 2 * pri]))
    guard = draw(st.sampled_from([0.0, 1e-6, pri / 10]))
    near = None
    if draw(st.booleans()) if with_near is None else with_near:
        sent_at = pulse + guard + draw(st.floats(0.0, 1.0)) * max(pri - pulse - guard, 0.0)
        near = NearPulse(pri * draw(st.floats(0.005, 0.3)), sent_at, HALF_C * pri * draw(st.floats(0.0, 2.5)))
    return pri, pulse, recovery, guard, draw(st.sampled_from([0.0, 0.25, 0.5, 0.9, 1.0])), near


axes = st.tuples(st.floats(0.0, 2.0), st.floats(0.1, 4.0))


def axis(pri, drawn):
    return drawn[0] * HALF_C * pri, (drawn[0] + drawn[1]) * HALF_C * pri


@given(receivers(), st.floats(0.0, 5.0))
@example((1e-4, 1e-5, 0.0, 1e-5, 0.5, NearPulse(1e-6, 5e-5, 0.0)), 0.42)  # within the guard before a near pulse
@example((1e-4, 4e-5, 0.0, 0.0, 0.5, None), 0.9)  # runs over into the next interval
def test_the_received_share_is_what_is_left_of_an_echo_piece_by_piece(receiver, part):
    pri, pulse, recovery, guard, _, near = receiver
    range_m = part * HALF_C * pri
    by_near = near is not None and range_m <= near.to_range_m
    length, sent = (near.pulse_s, near.sent_at_s) if by_near else (pulse, 0.0)
    at = np.mod(range_m / HALF_C + sent + (np.arange(PIECES) + 0.5) / PIECES * length, pri)
    is_open = (at >= pulse + recovery) & (at < pri - guard)
    if near is not None:
        is_open &= (at < near.sent_at_s - guard) | (at >= near.sent_at_s + near.pulse_s + recovery)
    if by_near and near.sent_at_s + near.pulse_s > pri - guard:
        is_open[:] = False  # no room in the interval: never sent
    # The echo meets at most six edges of windows, each of which cuts one piece.
    assert received_share(range_m, pri, pulse, recovery, guard, near) == pytest.approx(is_open.mean(), abs=6 / PIECES)


@given(receivers(), axes)
@example((1e-4, 1e-5, 0.0, 0.0, 1.0, NearPulse(1e-6, 2e-5, 3e3)), (0.0, 2.0))
@example((4e-4, 2e-4, 0.0, 0.0, 0.0, NearPulse(1e-4, 2e-4, HALF_C * 4e-4 * 0.125)), (0.125, 1.0))
@example((1e-4, 5e-5, 6e-6, 0.0, 0.9, None), (0.0, 2.0))  # a window that is open, but too short for the needed part
def test_a_range_is_clear_where_enough_of_the_echo_and_more_than_nothing_is_received(receiver, drawn):
    pri, pulse, recovery, guard, least, near = receiver
    limits = axis(pri, drawn)
    spans = clear_ranges(np.array([pri]), np.array([pulse]), recovery, guard, least, limits, near)
    range_m = np.linspace(*limits, 499)
    share = received_share(range_m, pri, pulse, recovery, guard, near)
    inside = ((range_m[:, None] >= spans.start) & (range_m[:, None] <= spans.stop)).any(axis=1)
    # Where the near pulse hands over, a single range belongs to it and nothing beside it does.
    edges = np.concatenate((spans.start, spans.stop, [near.to_range_m if near else -1.0]))
    sure = (np.abs(share - least) > SURE) | (least == share) & (least in (0.0, 1.0))
    sure &= (np.abs(range_m[:, None] - edges) > ONE_MICROMETRE * HALF_C * pri).all(axis=1)
    assert np.array_equal(inside[sure], ((share >= least) & (share > 0))[sure])


@given(receivers(), axes)
def test_clear_ranges_are_cut_to_the_axis_in_order_and_never_empty(receiver, drawn):
    pri, pulse, recovery, guard, least, near = receiver
    limits = axis(pri, drawn)
    spans = clear_ranges(np.array([pri]), np.array([pulse]), recovery, guard, least, limits, near)
    assert (spans.start < spans.stop).all()
    assert ((spans.start >= limits[0]) & (spans.stop <= limits[1])).all()
    assert (spans.start[1:] >= spans.stop[:-1] - ONE_MICROMETRE).all()


@given(st.lists(receivers(with_near=False), min_size=2, max_size=8), st.data())
def test_all_prfs_at_once_are_as_each_alone(several, data):
    pri, pulse = (np.array([receiver[field] for receiver in several]) for field in (0, 1))
    _, _, recovery, guard, least, _ = several[0]
    limits = axis(pri.max(), data.draw(axes))
    together = clear_ranges(pri, pulse, recovery, guard, least, limits)
    for index in range(pri.size):
        alone = clear_ranges(pri[[index]], pulse[[index]], recovery, guard, least, limits)
        np.testing.assert_array_equal(together.of(index), alone.of(0))


def test_a_recovery_longer_than_the_interval_is_legal_and_never_clear():
    spans = clear_ranges(np.array([1e-4, 1e-3]), np.array([1e-6, 1e-6]), 2e-4, 0.0, 0.5, (0.0, 300e3))
    assert set(spans.prf.tolist()) == {1}


def test_edges_of_the_opening_plan():
    # 980 us, pulse 1 us, recovery 1 us, half received: c/2 times 1.5, 979.5 and 981.5 us (149.896229 m each).
    spans = clear_ranges(np.array([980e-6]), np.array([1e-6]), 1e-6, 0.0, 0.5, (0.0, 200e3))
    assert spans.start.tolist() == pytest.approx([224.844, 147123.149], abs=1e-3)
    assert spans.stop[0] == pytest.approx(146823.356, abs=1e-3)
    assert eclipsing.first_opening(1e-6, 0.5, np.array([1e-6]))[0] == spans.start[0]


def test_an_echo_received_whole_counts_as_exactly_one_and_a_lost_one_as_nothing():
    pri, pulse = 980e-6, 1e-6
    delay = np.linspace(2e-6, pri - pulse - 1e-9, 999) + 2000 * pri
    assert (received_share(HALF_C * delay, pri, pulse, 1e-6, 0.0) == 1.0).all()
    assert received_share(0.0, pri, pulse, 1e-6, 0.0) == 0.0


def test_a_long_echo_that_straddles_the_near_pulse_counts_on_both_sides():
    # Shut from 40 to 50 us; an echo from 35 to 55 us has 5 us before and 5 us after, of 20.
    near = NearPulse(10e-6, 40e-6, 100.0)
    assert received_share(HALF_C * 35e-6, 100e-6, 20e-6, 0.0, 0.0, near) == pytest.approx(0.5, rel=1e-9)


def test_a_near_echo_longer_than_the_pulse_is_heard_on_both_sides_of_it():
    # Sent at 70 us for 20 us, back from 95 to 115 us: the long pulse of 1 us at 100 us cuts one part in twenty.
    near = NearPulse(20e-6, 70e-6, 10e3)
    assert received_share(HALF_C * 25e-6, 100e-6, 1e-6, 0.0, 0.0, near) == pytest.approx(0.95, rel=1e-9)


def test_the_near_pulse_sees_what_the_long_one_hides():
    near = NearPulse(1e-6, 70e-6, 10e3)
    pri, pulse = np.array([1e-3]), np.array([60e-6])
    spans = clear_ranges(pri, pulse, 1e-6, 0.0, 0.5, (0.0, 20e3), near)
    # Near pulse: 1.5 us; it serves up to 10 km, beyond which the long echo's first half is still too early at 10.6 km.
    assert spans.start[0] == pytest.approx(HALF_C * 1.5e-6, rel=1e-9)
    assert eclipsing.first_opening(1e-6, 0.5, pulse, near)[0] == pytest.approx(spans.start[0])


def test_an_interval_without_room_for_the_near_pulse_does_not_see_near():
    near = NearPulse(1e-6, 70e-6, 5e3)
    pri = np.array([60e-6, 70.5e-6, 72e-6])
    spans = clear_ranges(pri, np.full(3, 1e-6), 1e-6, 0.0, 0.5, (0.0, 5e3), near)
    assert set(spans.prf.tolist()) == {2}
    assert received_share(3e3, 60e-6, 1e-6, 1e-6, 0.0, near) == 0.0


def test_the_near_echo_must_be_back_before_the_guard():
    near = NearPulse(1e-6, 70e-6, HALF_C * 100e-6)
    back = eclipsing.near_echo_is_back(near, np.array([171e-6, 172e-6, 173e-6]), 1e-6)
    assert back.tolist() == [False, True, True]


@given(receivers(with_near=False))
def test_mean_losses_are_those_of_an_average_over_delay(receiver):
    pri, pulse, recovery, guard, _, _ = receiver
    delay = (np.arange(2 * PIECES) + 0.5) / (2 * PIECES) * pri
    share = received_share(HALF_C * delay, pri, pulse, recovery, guard)
    for form, power in (('part', 1), ('whole', 2)):
        mean = eclipsing.mean_received(pri, pulse, recovery, guard, form)
        assert mean == pytest.approx((share**power).mean(), abs=3e-4)
    whole = eclipsing.whole_share(pri, pulse, recovery, guard)
    assert whole == pytest.approx((share >= 1 - SURE).mean(), abs=2e-3)


def test_a_half_received_echo_loses_six_or_three_decibels():
    assert eclipsing.eclipsing_loss(0.5) == pytest.approx(6.0206, abs=1e-4)
    assert eclipsing.eclipsing_loss(0.5, 'part') == pytest.approx(3.0103, abs=1e-4)


def test_losses_of_arrays_are_those_of_their_elements_and_endless_where_nothing_is_received():
    share = np.array([0.0, 0.25, 1.0])
    assert eclipsing.eclipsing_loss(share).tolist() == [eclipsing.eclipsing_loss(one) for one in share.tolist()]
    assert eclipsing.eclipsing_loss(0.0) == np.inf
    assert eclipsing.mean_eclipsing_loss(1e-4, 1e-6, 2e-4) == np.inf
