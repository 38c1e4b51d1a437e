"""A stagger's response against the plain sum of complex pulses, and the speed that it repeats with."""

from fractions import Fraction
from math import gcd

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore.response import binomial_weights, repeat_counts, staggered_response

CLOCK_HZ, LAMBDA = 1e7, 0.1
ROUNDING = 1e-9  # of a power of order 1: some hundred cosines of arguments up to 1e6

cycles = st.lists(st.integers(900, 20_000), min_size=1, max_size=8)
weightings = st.one_of(
    st.sampled_from([1, 2, 3]).map(binomial_weights),
    st.lists(st.sampled_from([-2.0, -1.0, 0.0, 0.5, 1.0, 3.0]), min_size=2, max_size=16).filter(
        lambda weights: np.count_nonzero(weights) >= 2
    ),
)


def summed_pulses(pri_counts, weights, speed_m_s):
    """Mean over the phases of |Σ w exp(-j 4π v t/λ)|², over Σ w², pulse by pulse."""
    powers = []
    for phase in range(len(pri_counts)):
        time, total = 0, np.zeros(np.shape(speed_m_s), dtype=complex)
        for k, weight in enumerate(weights):
            total = total + weight * np.exp(-4j * np.pi * np.asarray(speed_m_s) * time / CLOCK_HZ / LAMBDA)
            time += pri_counts[(phase + k) % len(pri_counts)]
        powers.append(np.abs(total) ** 2)
    return np.mean(powers, axis=0) / np.dot(weights, weights)


@given(cycles, weightings, st.floats(-500.0, 500.0))
def test_the_response_is_the_mean_power_of_the_summed_pulses(pri_counts, weights, speed):
    found = staggered_response(pri_counts, CLOCK_HZ, weights, LAMBDA).power(speed)
    assert found == pytest.approx(summed_pulses(pri_counts, weights, speed), abs=ROUNDING)


@given(cycles, weightings)
def test_speeds_in_an_array_give_what_each_gives_alone(pri_counts, weights):
    response = staggered_response(pri_counts, CLOCK_HZ, weights, LAMBDA)
    speeds = np.linspace(-90.0, 250.0, 12).reshape(3, 4)
    alone = [[response.power(speed) for speed in row] for row in speeds.tolist()]
    np.testing.assert_allclose(response.power(speeds), alone, rtol=0, atol=1e-12)


@given(cycles, weightings, st.floats(0.0, 300.0))
def test_the_response_is_even_and_repeats_with_the_true_first_blind_speed(pri_counts, weights, speed):
    response = staggered_response(pri_counts, CLOCK_HZ, weights, LAMBDA)
    here = response.power(speed)
    assert response.power(-speed) == pytest.approx(here, abs=1e-12)
    # adding a large speed rounds it: no more than 2^-52 of it, turned by the longest time
    slack = ROUNDING + 1e-15 * response.repeats_m_s * 4 * np.pi * response.longest_counts / CLOCK_HZ / LAMBDA * 20
    assert response.power(speed + response.repeats_m_s) == pytest.approx(here, abs=slack)


@given(cycles, st.sampled_from([1, 2, 3]))
def test_a_binomial_canceller_repeats_with_the_common_divisor_of_the_intervals(pri_counts, delays):
    expected = gcd(*pri_counts)
    assert repeat_counts(pri_counts) == expected
    response = staggered_response(pri_counts, CLOCK_HZ, binomial_weights(delays), LAMBDA)
    assert response.repeats_m_s == pytest.approx(LAMBDA * CLOCK_HZ / (2 * expected), rel=1e-15)


@given(cycles, weightings)
def test_what_a_response_repeats_with_divides_every_time_between_weighted_pulses(pri_counts, weights):
    used = [k for k, weight in enumerate(weights) if weight]
    apart = set()
    for phase in range(len(pri_counts)):
        time = [sum(pri_counts[(phase + j) % len(pri_counts)] for j in range(k)) for k in used]
        apart |= {later - sooner for i, sooner in enumerate(time) for later in time[i + 1 :]}
    assert repeat_counts(pri_counts, weights) == gcd(*apart)


def test_weights_that_skip_pulses_repeat_sooner_than_the_intervals_do():
    # 1, 0, -1 over 1000 and 1500 counts: always 2500 apart
    assert repeat_counts((1000, 1500)) == 500
    assert repeat_counts((1000, 1500), (1.0, 0.0, -1.0)) == 2500


@given(cycles, weightings)
def test_the_mean_over_all_speeds_is_0_db(pri_counts, weights):
    # over one whole period every cosine averages to nothing; equal steps, more than the longest time asks for
    scale = gcd(*pri_counts)
    small = [count // scale % 40 + 1 for count in pri_counts]
    response = staggered_response(small, CLOCK_HZ, weights, LAMBDA)
    steps = 4 * (response.longest_counts + 1)
    speeds = np.arange(steps) / steps * LAMBDA * CLOCK_HZ / 2
    assert response.power(speeds).mean() == pytest.approx(1.0, abs=1e-9)


@pytest.mark.parametrize('delays', [1, 2, 3])
def test_equal_intervals_give_the_binomial_cancellers_power_of_a_sine(delays):
    response = staggered_response((10_000,), CLOCK_HZ, binomial_weights(delays), LAMBDA)
    speed = np.linspace(0.0, 300.0, 101)
    norm = np.dot(binomial_weights(delays), binomial_weights(delays))
    expected = (2 * np.sin(2 * np.pi * speed * 1e-3 / LAMBDA)) ** (2 * delays) / norm
    np.testing.assert_allclose(response.power(speed), np.abs(expected), atol=1e-12)


def test_the_order_of_turning_the_cycle_does_not_matter():
    here = staggered_response((1000, 1200, 1080, 1240), CLOCK_HZ, (1, -2, 1), LAMBDA)
    turned = staggered_response((1080, 1240, 1000, 1200), CLOCK_HZ, (1, -2, 1), LAMBDA)
    speed = np.linspace(0.0, 5000.0, 333)
    np.testing.assert_allclose(here.power(speed), turned.power(speed), atol=1e-12)


@given(cycles, weightings, st.floats(0.0, 200.0))
def test_the_response_nowhere_bends_more_than_its_bound(pri_counts, weights, speed):
    response = staggered_response(pri_counts, CLOCK_HZ, weights, LAMBDA)
    step = response.step_m_s / 8.0
    before, here, after = response.power(speed + step * np.array([-1.0, 0.0, 1.0]))
    assert abs(before - 2 * here + after) <= response.curvature * step**2 + ROUNDING


def test_the_bound_of_a_two_pulse_canceller_is_its_bend_at_rest():
    # 1 - cos(4π v T/λ): second derivative (4π T/λ)² at v = 0
    assert staggered_response((10_000,), CLOCK_HZ, (1, -1), LAMBDA).curvature == pytest.approx(
        (4e-3 * np.pi / LAMBDA) ** 2
    )


def test_long_intervals_of_a_fast_clock_keep_exact_differences():
    # 10 GHz clock, 16 intervals near 0.1 s and 16 weights: more counts than 32 bits hold, on any machine
    counts = [1_000_000_000 + 7 * k * k for k in range(16)]
    response = staggered_response(counts, 1e10, [1.0] * 8 + [-1.0] * 8, LAMBDA)
    assert response.longest_counts == sum(counts) - min(counts)
    assert response.counts.max() == response.longest_counts


def test_the_repeat_is_an_exact_fraction_of_the_mean():
    counts = (25, 30, 27, 31)
    assert Fraction(sum(counts), len(counts) * repeat_counts(counts)) == Fraction(113, 4)
