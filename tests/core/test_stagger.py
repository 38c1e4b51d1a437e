"""Notches of constant PRFs against folding, and a stagger's response against sums over its pulses."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore import ambiguity
from pycore.crossings import clear_speeds, deepest_dip, first_fall, first_notch
from pycore.response import binomial_weights, repeat_counts, staggered_response
from pycore.stagger import first_blind_interval, notch_clear_speeds, staggered

WAVELENGTH_M = 0.1
ONE_MICROMETRE_A_SECOND = 1e-6
ROUNDING = 1e-9  # of a power ratio summed over some hundred cosines

CYCLES = st.lists(st.integers(20, 60), min_size=1, max_size=5)
WEIGHTS = st.one_of(
    st.sampled_from([1, 2, 3]).map(binomial_weights),
    st.lists(st.sampled_from([-2.0, -1.0, 0.0, 0.5, 1.0]), min_size=2, max_size=6).filter(
        lambda weights: sum(one != 0 for one in weights) >= 2
    ),
)


@given(
    st.lists(st.tuples(st.floats(20.0, 200.0), st.floats(0.0, 0.7)), min_size=1, max_size=8),
    st.floats(-500.0, 400.0),
    st.floats(1.0, 900.0),
)
def test_a_speed_is_clear_where_it_folds_at_least_a_notch_away_from_zero(prfs, low, wide):
    blind, part = np.array(prfs).T
    notch, limits = blind * part, (low, low + wide)
    spans = notch_clear_speeds(blind, notch, limits)
    assert (spans.start < spans.stop).all()
    assert ((spans.start >= low) & (spans.stop <= low + wide)).all()
    speed = np.linspace(*limits, 301)
    for index in range(blind.size):
        start, stop = spans.of(index)
        inside = ((speed[:, None] >= start) & (speed[:, None] <= stop)).any(axis=1)
        away = np.abs(ambiguity.fold_speed(speed, blind[index])) - notch[index]
        sure = np.abs(away) > ONE_MICROMETRE_A_SECOND
        if notch[index] >= blind[index] / 2:
            assert start.size == 0
        else:
            assert np.array_equal(inside[sure], (away > 0)[sure])


def test_a_notch_of_half_the_blind_speed_leaves_nothing_and_one_just_narrower_a_sliver():
    blind = np.array([60.0, 60.0])
    spans = notch_clear_speeds(blind, np.array([30.0, 29.9]), (0.0, 60.0))
    assert spans.prf.tolist() == [1]
    assert (spans.start[0], spans.stop[0]) == pytest.approx((29.9, 30.1))


def by_sums(pri_counts, clock_hz, weights, speed):
    """Response by the definition: one sum over pulses for each phase of the cycle."""
    total, n = 0.0, len(pri_counts)
    for phase in range(n):
        times = np.cumsum([0, *(pri_counts[(phase + k) % n] for k in range(len(weights) - 1))]) / clock_hz
        total += abs(np.dot(weights, np.exp(-4j * np.pi * speed * times / WAVELENGTH_M))) ** 2 / n
    return total / np.dot(weights, weights)


@given(CYCLES, WEIGHTS, st.floats(-300.0, 300.0))
def test_the_response_is_the_sum_over_pulses_averaged_over_the_phases(cycle, weights, speed):
    response = staggered_response(cycle, 1e5, weights, WAVELENGTH_M)
    assert response.power(speed) == pytest.approx(by_sums(cycle, 1e5, weights, speed), abs=ROUNDING)


@given(CYCLES, WEIGHTS, st.floats(0.0, 1.0))
def test_the_response_is_even_and_repeats_with_the_true_first_blind_speed(cycle, weights, part):
    response = staggered_response(cycle, 1e5, weights, WAVELENGTH_M)
    binomial = tuple(weights) in {binomial_weights(delays) for delays in (1, 2, 3)}
    repeat = WAVELENGTH_M * 1e5 / (2 * repeat_counts(cycle, None if binomial else weights))
    speed = part * repeat
    assert response.repeats_m_s == pytest.approx(repeat, rel=1e-12)
    at = response.power(np.array([speed, -speed, speed + repeat, 3 * repeat - speed]))
    np.testing.assert_allclose(at, at[0], atol=ROUNDING)


@given(CYCLES, WEIGHTS)
def test_the_response_is_nought_decibels_in_the_mean_over_all_speeds(cycle, weights):
    response = staggered_response(cycle, 1e5, weights, WAVELENGTH_M)
    places = 2 * response.longest_counts + 3  # more than there are cosines: their mean is then exactly nothing
    speed = np.arange(places) / places * WAVELENGTH_M * 1e5 / 2
    assert response.power(speed).mean() == pytest.approx(1.0, abs=ROUNDING)


def test_the_response_of_arrays_is_that_of_their_elements():
    response = staggered_response((25, 30, 27, 31), 25e3, (1, -2, 1), WAVELENGTH_M)
    speed = np.linspace(-90.0, 90.0, 31)
    np.testing.assert_allclose(response.power(speed), [response.power(one) for one in speed], rtol=0, atol=1e-14)


def test_weights_that_skip_a_pulse_see_only_the_times_between_those_they_use():
    assert repeat_counts((30, 20), (1.0, 0.0, -1.0)) == 50
    assert repeat_counts((30, 20), (1.0, -1.0)) == 10
    assert repeat_counts((30, 20)) == 10


@given(CYCLES, st.sampled_from([1, 2, 3]), st.floats(-25.0, -1.0), st.floats(-1.5, 1.0), st.floats(0.1, 2.5))
def test_speeds_are_clear_where_the_response_is_high_enough(cycle, delays, least_db, low, wide):
    response = staggered_response(cycle, 1e5, binomial_weights(delays), WAVELENGTH_M)
    limits = low * response.repeats_m_s, (low + wide) * response.repeats_m_s
    if (limits[1] - limits[0]) / response.step_m_s > 2e5:
        return
    spans = clear_speeds(response, least_db, limits)
    assert (spans.start < spans.stop).all()
    assert (spans.start[1:] >= spans.stop[:-1] - ONE_MICROMETRE_A_SECOND).all()
    speed = np.linspace(*limits, 601)
    inside = ((speed[:, None] >= spans.start) & (speed[:, None] <= spans.stop)).any(axis=1)
    edges = np.concatenate((spans.start, spans.stop, [limits[0] - 1.0]))
    near = (np.abs(speed[:, None] - edges) < 1e-6 * response.step_m_s).any(axis=1)
    high = response.power(speed) >= 10 ** (least_db / 10)
    # A dip, or a peak, that comes and goes within one step can be missed: its depth is then bounded by the curvature.
    slack = response.curvature * response.step_m_s**2 / 8
    doubtful = np.abs(response.power(speed) - 10 ** (least_db / 10)) <= slack
    assert np.array_equal(inside[~near & ~doubtful], high[~near & ~doubtful])


def test_the_notch_ends_and_the_first_fall_begins_where_the_response_crosses_the_least():
    response = staggered_response((4000, 3000), 3e6, (1, -1), WAVELENGTH_M)
    notch = first_notch(response, -5.0, np.inf)
    fall = first_fall(response, -3.0, first_notch(response, -3.0, np.inf), np.inf)
    assert response.decibels(notch) == pytest.approx(-5.0, abs=1e-6)
    assert response.decibels(fall) == pytest.approx(-3.0, abs=1e-6)
    assert (response.decibels(np.linspace(0.0, notch, 99)[:-1]) < -5.0).all()
    assert (response.decibels(np.linspace(first_notch(response, -3.0, np.inf), fall, 999)[1:-1]) >= -3.0).all()


def test_a_response_that_never_falls_before_does_so_at_the_image_of_the_notch():
    # One PRI: the first blind speed is its own, and the response falls a notch short of it.
    response = staggered_response((1000,), 1e6, (1, -1), WAVELENGTH_M)
    notch = first_notch(response, -10.0, np.inf)
    assert notch == pytest.approx(50.0 / math.pi * math.asin(math.sqrt(0.05)))  # 2 sin²(π v/50) = 0.1
    assert first_fall(response, -10.0, notch, np.inf) == pytest.approx(50.0 - notch)
    assert first_fall(response, -10.0, notch, 20.0) == np.inf


def test_a_response_out_of_reach_is_nowhere_high_enough():
    response = staggered_response((1000, 1200), 1e6, (1, -1), WAVELENGTH_M)
    assert first_notch(response, 3.02, np.inf) == np.inf
    assert clear_speeds(response, 3.02, (0.0, 100.0)).prf.size == 0


@given(CYCLES, st.sampled_from([1, 2, 3]), st.floats(0.5, 3.0), st.floats(1.0, 12.0))
def test_no_sampled_speed_dips_deeper_than_the_deepest(cycle, delays, low, wide):
    response = staggered_response(cycle, 1e5, binomial_weights(delays), WAVELENGTH_M)
    mean = WAVELENGTH_M * 1e5 / (2 * np.mean(cycle))
    limits = low * mean, (low + wide) * mean
    depth, at = deepest_dip(response, *limits)
    assert limits[0] <= at <= limits[1]
    assert 10 ** (depth / 10) <= response.power(np.linspace(*limits, 4001)).min() + ROUNDING
    assert response.power(at) == pytest.approx(10 ** (depth / 10), abs=ROUNDING)


def test_a_narrow_null_beside_a_broad_shallow_valley_is_found():
    # Seen on a grid of whole steps the null at 80.3 m/s looks no deeper than its neighbours.
    response = staggered_response((13333, 10000), 10e6, (1, -1), 299_792_458.0 / 5.6e9)
    depth, at = deepest_dip(response, 10.0, 150.0)
    assert (depth, at) == pytest.approx((-74.49, 80.30), abs=0.01)


def test_the_deepest_dip_is_found_where_the_steps_pass_it_by():
    # At whole steps the valley at 645 m/s looks deeper than the one at 758 m/s, which is.
    response = staggered_response((39, 32, 53, 47), 1e5, (1, -1), WAVELENGTH_M)
    depth, at = deepest_dip(response, 58.47953216374269, 818.7134502923976)
    fine = np.linspace(740.0, 780.0, 40001)
    assert depth == pytest.approx(response.decibels(fine).min(), abs=1e-4)
    assert at == pytest.approx(758.18, abs=0.01)


@pytest.mark.parametrize(('cycle', 'at'), [((4, 3), 0.24557), ((9, 7), 0.44761), ((11, 8, 9), 0.1)])
def test_of_equal_dips_the_slowest_is_named(cycle, at):
    # Two delays; a period is a mirror image of itself, so that every dip in it comes twice.
    response = staggered_response(cycle, 1e5, (1, -2, 1), WAVELENGTH_M)
    found = deepest_dip(response, 0.1 * response.repeats_m_s, 0.9 * response.repeats_m_s)
    assert found[1] / response.repeats_m_s == pytest.approx(at, abs=1e-4)


def test_crossings_are_looked_for_at_a_sixteenth_of_what_the_longest_time_folds():
    # 1080 + 1240 counts of 1 us: λ/2 over 2.32 ms.
    response = staggered_response((1000, 1200, 1080, 1240), 1e6, (1, -2, 1), WAVELENGTH_M)
    assert response.step_m_s == pytest.approx(WAVELENGTH_M / 2 / 2.32e-3 / 16, rel=1e-12)


def test_what_cancels_but_for_rounding_is_nothing():
    response = staggered_response((1000, 1200, 1080, 1240), 1e6, (1, -2, 1), WAVELENGTH_M)
    assert response.power(response.repeats_m_s * np.arange(4)).tolist() == [0.0] * 4
    assert response.decibels(0.0) == -300.0


def test_a_coverage_inside_the_notch_has_no_dip():
    stagger = staggered((1000, 1200), 1e6, 2, None, WAVELENGTH_M, -10.0, (-1.0, 1.0))
    assert (stagger.deepest_db, stagger.deepest_at_m_s, stagger.share_above) == (None, None, 0.0)


def test_approaching_and_receding_speeds_are_judged_alike():
    both = staggered((25, 30, 27, 31), 25e3, 2, None, WAVELENGTH_M, -8.0, (-150.0, 150.0))
    one = staggered((25, 30, 27, 31), 25e3, 2, None, WAVELENGTH_M, -8.0, (0.0, 150.0))
    assert both.share_above == pytest.approx(one.share_above, abs=1e-12)
    assert both.deepest_db == pytest.approx(one.deepest_db, abs=1e-9)


def test_user_weights_that_do_not_add_up_to_nothing_repeat_but_have_no_blind_speed():
    found = staggered((25, 30), 25e3, 2, (1.0, 0.5), WAVELENGTH_M, -10.0, (0.0, 150.0))
    assert not found.is_blind
    assert found.notch_m_s == 0.0
    assert found.true_first_blind_m_s == pytest.approx(WAVELENGTH_M / 2 * 25e3 / 5)


def test_binomial_weights_given_by_hand_answer_as_the_canceller_does():
    named = staggered((25, 30, 27, 31), 25e3, 2, None, WAVELENGTH_M, -8.0, (0.0, 150.0))
    typed = staggered((25, 30, 27, 31), 25e3, 1, (1.0, -2.0, 1.0), WAVELENGTH_M, -8.0, (0.0, 150.0))
    assert named.share_above == typed.share_above
    assert named.true_first_blind_m_s == typed.true_first_blind_m_s


def test_the_first_blind_interval_of_a_set_lies_where_too_few_prfs_are_clear():
    # 62.24 and 54.62 m/s with a notch of 6: both are blind from 56.24 to 60.62 m/s.
    blind = np.array([62.245, 54.623])
    found = first_blind_interval(blind, np.array([6.0, 6.0]), 1, (0.0, 300.0))
    assert found == pytest.approx((56.245, 60.623))
    assert first_blind_interval(blind, np.array([6.0, 6.0]), 1, (0.0, 50.0)) is None
    assert first_blind_interval(blind, np.array([6.0, 6.0]), 2, (0.0, 50.0)) == pytest.approx((48.623, 50.0))


@pytest.mark.parametrize(
    ('weights', 'is_blind'),
    [((0.1, 0.2, -0.3), True), ((1e-9, -1e-9), True), ((1e-13, 1e-13), False), ((1, -0.999), False)],
)
def test_weights_reject_what_stands_still_where_they_add_up_to_nothing_whatever_their_size(weights, is_blind):
    found = staggered((1000, 1200), 1e6, 1, weights, 0.1, -10.0, (0.0, 100.0))
    assert found.is_blind == is_blind
