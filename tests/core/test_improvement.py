"""The improvement factor against the quadratic form in many digits, and against its limits."""

import math
from fractions import Fraction

import mpmath
import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore.improvement import improvement_factor, residue, scanning_limit, scanning_spread, small_spread_limit
from pycore.response import binomial_weights

ROUNDING = 1e-12  # of a ratio; sums of some hundred terms in double precision
CLOCK_HZ, LAMBDA = 1e6, 0.1


def in_many_digits(pri_counts, weights, decay):
    """Residue by the plain double sum over pulses and phases, with 200 digits."""
    with mpmath.workdps(200):
        w, total = [mpmath.mpf(str(weight)) for weight in weights], mpmath.mpf(0)
        for phase in range(len(pri_counts)):
            times = [sum((pri_counts[(phase + k) % len(pri_counts)] for k in range(j)), 0) for j in range(len(w))]
            for a, s in zip(w, times, strict=True):
                total += sum(
                    a * b * mpmath.exp(-mpmath.mpf(decay) * (s - t) ** 2) for b, t in zip(w, times, strict=True)
                )
        return total / len(pri_counts)


def spread_of(phase_spread, pri_s):
    """Spread of speed that turns the phase by so much from pulse to pulse."""
    return phase_spread * LAMBDA / (4.0 * math.pi * pri_s)


CYCLES = [(1000,), (25, 30, 27, 31), (13333, 10000), (7, 7, 7)]
WEIGHTS = [
    (1.0, -1.0),
    (1.0, -2.0, 1.0),
    (1.0, -3.0, 3.0, -1.0),
    (0.1, 0.2, -0.3),
    (1.0, 0.5, 0.2),
    (2.5, 0.0, -2.5),
    binomial_weights(7),
]


@pytest.mark.parametrize('pri_counts', CYCLES)
@pytest.mark.parametrize('weights', WEIGHTS)
@pytest.mark.parametrize('phase_spread', [1e-8, 1e-4, 1e-2, 0.3, 0.9, 2.0, 20.0])
def test_residue_is_the_quadratic_form_however_small_it_is(pri_counts, weights, phase_spread):
    decay = phase_spread**2 / 2.0 / np.mean(pri_counts) ** 2
    exact = in_many_digits(pri_counts, weights, decay)
    found = residue(pri_counts, [Fraction(str(weight)) for weight in weights], decay)
    assert abs(found / exact - 1) < ROUNDING


@given(
    st.lists(st.integers(50, 2000), min_size=1, max_size=5),
    st.lists(st.integers(-40, 40).map(lambda k: k / 8), min_size=2, max_size=6).filter(any),
    st.floats(-6.0, 1.0).map(lambda power: 10.0**power),
)
def test_residue_of_any_weights_over_any_cycle(pri_counts, weights, phase_spread):
    decay = phase_spread**2 / 2.0 / np.mean(pri_counts) ** 2
    exact = in_many_digits(pri_counts, weights, decay)
    found = residue(pri_counts, [Fraction(str(weight)) for weight in weights], decay)
    assert abs(found - exact) <= ROUNDING * 1e3 * abs(exact) + 1e-300


@pytest.mark.parametrize('delays', [1, 2, 3])
def test_improvement_tends_to_its_small_spread_limit(delays):
    weights = binomial_weights(delays)
    for phase_spread in (1e-3, 1e-6):
        found = improvement_factor((1000,), CLOCK_HZ, weights, LAMBDA, spread_of(phase_spread, 1e-3))
        assert found == pytest.approx(small_spread_limit(delays, phase_spread), rel=2 * phase_spread**2 + ROUNDING)


@pytest.mark.parametrize('delays', [1, 2, 3])
def test_clutter_spread_over_all_speeds_is_not_improved_on(delays):
    weights = binomial_weights(delays)
    assert improvement_factor((1000, 1200), CLOCK_HZ, weights, LAMBDA, 500.0) == pytest.approx(1.0, rel=ROUNDING)


def test_clutter_that_does_not_move_is_removed_altogether_where_the_weights_add_up_to_nothing():
    assert improvement_factor((1000,), CLOCK_HZ, (0.1, 0.2, -0.3), LAMBDA, 0.0) == math.inf
    assert improvement_factor((1000,), CLOCK_HZ, (1.0, 0.5), LAMBDA, 0.0) == pytest.approx(1.25 / 2.25)


def test_a_cycle_of_equal_intervals_is_a_constant_prf():
    alone = improvement_factor((1000,), CLOCK_HZ, (1, -2, 1), LAMBDA, 0.4)
    assert improvement_factor((1000, 1000, 1000), CLOCK_HZ, (1, -2, 1), LAMBDA, 0.4) == pytest.approx(alone, rel=1e-14)


def test_a_cycle_may_start_anywhere():
    here = improvement_factor((1000, 1200, 1080), CLOCK_HZ, (1, -3, 3, -1), LAMBDA, 0.4)
    assert improvement_factor((1080, 1000, 1200), CLOCK_HZ, (1, -3, 3, -1), LAMBDA, 0.4) == pytest.approx(
        here, rel=1e-14
    )


@pytest.mark.parametrize('delays', [1, 2, 3])
def test_the_scanning_limit_is_the_improvement_on_clutter_that_only_scanning_spreads(delays):
    hits, pri_s = 2000, 1e-3
    spread = scanning_spread(LAMBDA, hits * pri_s)
    found = improvement_factor((1000,), CLOCK_HZ, binomial_weights(delays), LAMBDA, spread)
    assert found == pytest.approx(scanning_limit(delays, hits), rel=1e-5)


def test_a_scanning_beam_spreads_still_clutter_by_its_own_spectrum():
    # the two-way voltage of a Gaussian beam, 1 s between its one-way half-power points, sampled finely
    time_s = np.arange(-6.0, 6.0, 1e-3)
    spectrum = np.abs(np.fft.fft(np.exp(-4.0 * math.log(2.0) * time_s**2))) ** 2
    frequency = np.fft.fftfreq(time_s.size, 1e-3)
    spread_hz = math.sqrt((spectrum * frequency**2).sum() / spectrum.sum())
    assert scanning_spread(LAMBDA, 1.0) == pytest.approx(spread_hz * LAMBDA / 2.0, rel=1e-9)
