"""Two-PRF unfolding and pulse pairs, held against simulated echoes that share nothing with the formulas."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore.pulse_pair import coherence, correlation_exponent, pulse_pair_deviation
from pycore.weather import second_trip, two_prf, unfold, unfolding_failure

WAVELENGTH_M = 0.0533
CLOCK_HZ = 10_000_000
FOUR_DEVIATIONS = 4.0
"""Confidence 0.99994 that a right value lies within so many standard deviations."""

RATIOS = [(2, 3), (3, 4), (4, 5), (3, 5), (5, 7), (1, 3)]


def folded(speed_m_s, nyquist_m_s):
    """Fold by counting turns of phase, not by the core's formula."""
    return np.angle(np.exp(1j * np.pi * np.asarray(speed_m_s) / nyquist_m_s)) * nyquist_m_s / np.pi


def simulated_echoes(pulses, pri_s, speed_m_s, width_m_s, snr, trials, seed):
    """Complex samples of a Gaussian spectrum with noise.

    Each trial adds up 401 lines at even steps of speed out to five widths, of random strength and phase under the
    Gaussian, so that neither a covariance nor a folded spectrum is written down anywhere. (Speeds drawn at random
    would not do: the mean of so many scatters by 7 % of the width, as much as the errors to be measured.)
    """
    rng = np.random.default_rng(seed)
    offset = np.linspace(-5, 5, 401)[None, :, None]
    share = np.exp(-(offset**2) / 2) / np.exp(-(offset**2) / 2).sum()
    speed = speed_m_s + width_m_s * offset
    strength = rng.standard_normal((trials, 401, 1)) + 1j * rng.standard_normal((trials, 401, 1))
    turn = np.exp(4j * np.pi * speed * pri_s / WAVELENGTH_M)
    phase, echo = strength * np.sqrt(snr * share / 2), np.empty((trials, pulses), dtype=complex)
    for pulse in range(pulses):
        echo[:, pulse] = phase.sum(axis=(1, 2))
        phase = phase * turn
    noise = rng.standard_normal((trials, pulses)) + 1j * rng.standard_normal((trials, pulses))
    return echo + noise / math.sqrt(2)


def measured_speeds(echoes, pri_s):
    """Pulse-pair estimates."""
    pairs = (echoes[:, 1:] * echoes[:, :-1].conj()).sum(axis=1)
    return np.angle(pairs) * WAVELENGTH_M / (4 * np.pi * pri_s)


class TestTwoPrfs:
    """The shorter and the longer PRI stand in a ratio m : n."""

    @pytest.mark.parametrize(('m', 'n'), RATIOS)
    def test_the_extended_nyquist_speed_is_m_and_n_times_the_single_ones(self, m, n):
        pair = two_prf((n * 2000, m * 2000), CLOCK_HZ, WAVELENGTH_M)
        assert (pair.m, pair.n) == (m, n)
        assert pair.nyquist_m_s == pytest.approx(m * pair.nyquist_short_m_s, rel=1e-15)
        assert pair.nyquist_m_s == pytest.approx(n * pair.nyquist_long_m_s, rel=1e-15)

    def test_neighbouring_ratios_reach_what_the_difference_of_the_intervals_says(self):
        pair = two_prf((8000, 10_000), CLOCK_HZ, WAVELENGTH_M)
        assert pair.nyquist_m_s == pytest.approx(WAVELENGTH_M / (4 * 2000 / CLOCK_HZ), rel=1e-15)

    @pytest.mark.parametrize(('m', 'n'), RATIOS)
    def test_every_speed_is_unfolded_while_the_errors_differ_by_less_than_half_a_level(self, m, n):
        pair = two_prf((m * 2000, n * 2000), CLOCK_HZ, WAVELENGTH_M)
        true = np.linspace(-pair.nyquist_m_s, pair.nyquist_m_s, 997)[1:-1]
        for difference in (-0.999, 0.0, 0.999):
            error = difference * pair.nyquist_short_m_s / pair.n / 2
            short = folded(true + error, pair.nyquist_short_m_s)
            long = folded(true - error, pair.nyquist_long_m_s)
            off = folded(unfold(short, long, pair) - true - error, pair.nyquist_m_s)
            assert np.abs(off).max() < 1e-9

    def test_errors_just_over_half_a_level_apart_unfold_wrongly(self):
        pair = two_prf((6000, 8000), CLOCK_HZ, WAVELENGTH_M)
        error = 1.001 * pair.nyquist_short_m_s / pair.n
        wrong = unfold(folded(5.0 + error, pair.nyquist_short_m_s), folded(5.0, pair.nyquist_long_m_s), pair)
        assert abs(wrong - 5.0) > pair.nyquist_short_m_s

    @given(st.floats(-60, 60), st.floats(-60, 60), st.sampled_from(RATIOS))
    def test_the_result_lies_in_the_half_open_interval(self, short, long, ratio):
        pair = two_prf((ratio[0] * 2000, ratio[1] * 2000), CLOCK_HZ, WAVELENGTH_M)
        assert -pair.nyquist_m_s <= unfold(short, long, pair) < pair.nyquist_m_s

    def test_a_rounding_below_the_lower_end_does_not_become_the_upper_end(self):
        pair = two_prf((2000, 6000), CLOCK_HZ, WAVELENGTH_M)
        just_below = np.nextafter(-pair.nyquist_m_s, -np.inf)
        assert unfold(just_below, just_below, pair) < pair.nyquist_m_s

    def test_arrays_are_unfolded_as_each_alone(self):
        pair = two_prf((6000, 8000), CLOCK_HZ, WAVELENGTH_M)
        short, long = np.array([-13.0, 0.0, 7.5]), np.array([4.0, -9.0, 2.5])
        alone = [unfold(a, b, pair) for a, b in zip(short, long, strict=True)]
        assert unfold(short, long, pair).tolist() == alone


class TestFailuresInSimulation:
    """Wrong folds of simulated echoes against the closed form."""

    @pytest.mark.parametrize(
        ('pulses', 'width_m_s', 'snr', 'counts'),
        [
            (33, 4.0, 20.0, (10_000, 11_000)),
            (65, 3.0, 10.0, (10_000, 11_000)),
            (129, 3.0, 3.0, (10_000, 11_000)),
            (65, 3.0, 10.0, (10_000, 12_000)),
        ],
    )
    def test_echoes_are_unfolded_wrongly_as_often_as_the_closed_form_says(self, pulses, width_m_s, snr, counts):
        trials, true = 4000, 21.0
        pair = two_prf(counts, CLOCK_HZ, WAVELENGTH_M)
        pris_s = [count / CLOCK_HZ for count in counts]
        short, long = (
            measured_speeds(simulated_echoes(pulses, pri_s, true, width_m_s, snr, trials, seed), pri_s)
            for seed, pri_s in enumerate(pris_s)
        )
        off = folded(unfold(short, long, pair) - true, pair.nyquist_m_s)
        wrong = np.mean(np.abs(off) > pair.nyquist_short_m_s)
        deviations = [pulse_pair_deviation(pulses, pri_s, width_m_s, snr, WAVELENGTH_M) for pri_s in pris_s]
        expected = unfolding_failure(pair, *deviations)
        # 4000 trials, and 3 % of the probability because the deviations are of first order
        allowed = FOUR_DEVIATIONS * math.sqrt(expected * (1 - expected) / trials) + 0.03 * expected
        assert wrong == pytest.approx(expected, abs=allowed)
        assert expected > 5 / trials

    def test_gaussian_errors_fail_as_often_as_the_closed_form_says(self):
        trials, rng = 200_000, np.random.default_rng(11)
        pair = two_prf((6000, 8000), CLOCK_HZ, WAVELENGTH_M)
        short = folded(9.0 + rng.normal(0, 1.5, trials), pair.nyquist_short_m_s)
        long = folded(9.0 + rng.normal(0, 1.0, trials), pair.nyquist_long_m_s)
        wrong = np.mean(np.abs(folded(unfold(short, long, pair) - 9.0, pair.nyquist_m_s)) > pair.nyquist_short_m_s)
        expected = unfolding_failure(pair, 1.5, 1.0)
        assert wrong == pytest.approx(expected, abs=FOUR_DEVIATIONS * math.sqrt(expected / trials))

    def test_no_noise_never_fails(self):
        assert unfolding_failure(two_prf((6000, 8000), CLOCK_HZ, WAVELENGTH_M), 0.0, 0.0) == 0.0


class TestPulsePairs:
    """Standard deviation of a pulse-pair speed."""

    @pytest.mark.parametrize(
        ('pulses', 'width_m_s', 'snr'), [(33, 2.0, 10.0), (64, 2.0, 1000.0), (65, 3.0, 10.0), (129, 3.0, 3.0)]
    )
    def test_it_is_what_simulated_echoes_scatter_by(self, pulses, width_m_s, snr):
        trials, pri_s = 4000, 0.8e-3
        speeds = measured_speeds(simulated_echoes(pulses, pri_s, 3.0, width_m_s, snr, trials, pulses), pri_s)
        expected = pulse_pair_deviation(pulses, pri_s, width_m_s, snr, WAVELENGTH_M)
        # a deviation of 4000 samples scatters by 1/√8000, four of which are 4.5 %; 1.5 % more for first order
        assert speeds.std() == pytest.approx(expected, rel=FOUR_DEVIATIONS / math.sqrt(2 * trials) + 0.015)

    def test_with_few_independent_echoes_the_true_scatter_is_wider(self):
        # 64 pulses of 0.5 m/s hold 3 independent echoes: first order understates, as its description says
        speeds = measured_speeds(simulated_echoes(64, 0.8e-3, 3.0, 0.5, 3.0, 2000, 1), 0.8e-3)
        assert speeds.std() > 1.05 * pulse_pair_deviation(64, 0.8e-3, 0.5, 3.0, WAVELENGTH_M)

    def test_it_is_the_sum_printed_with_its_derivation(self):
        pulses, pri_s, width_m_s, snr = 20, 1e-3, 1.7, 6.0
        a = float(correlation_exponent(pri_s, width_m_s, WAVELENGTH_M))
        pairs = pulses - 1

        def r(m):
            return snr * math.exp(-a * m * m) + (m == 0)

        total = sum((pairs - abs(m)) * (r(m) ** 2 - r(m + 1) * r(m - 1)) for m in range(1 - pairs, pairs))
        variance = (WAVELENGTH_M / (4 * math.pi * pri_s)) ** 2 * total / (2 * pairs**2 * snr**2 * math.exp(-2 * a))
        assert pulse_pair_deviation(pulses, pri_s, width_m_s, snr, WAVELENGTH_M) == pytest.approx(
            variance**0.5, rel=1e-12
        )

    def test_a_line_without_width_is_limited_by_noise_alone(self):
        # ρ = 1: M (2S + 1)/S² - 2 (M - 1)/S over 2 M² leaves (1/(M² S) + 1/(2 M S²)) λ/(4πT) squared
        pairs, snr = 31, 10.0
        expected = WAVELENGTH_M / (4 * math.pi * 1e-3) * math.sqrt(1 / (pairs**2 * snr) + 1 / (2 * pairs * snr**2))
        assert pulse_pair_deviation(pairs + 1, 1e-3, 0.0, snr, WAVELENGTH_M) == pytest.approx(expected, rel=1e-12)

    def test_lost_correlation_is_an_infinite_error_without_a_warning(self):
        assert pulse_pair_deviation(4096, 0.1, 30.0, 10.0, WAVELENGTH_M) == math.inf
        assert math.isfinite(pulse_pair_deviation(4096, 1e-3, 10.0, 10.0, WAVELENGTH_M))

    @given(st.floats(0.1, 4.0), st.floats(0.5, 1e4), st.integers(2, 200))
    def test_more_pulses_or_more_signal_never_measure_worse(self, width_m_s, snr, pulses):
        here = pulse_pair_deviation(pulses, 1e-3, width_m_s, snr, WAVELENGTH_M)
        assert pulse_pair_deviation(pulses + 1, 1e-3, width_m_s, snr, WAVELENGTH_M) <= here * (1 + 1e-12)
        assert pulse_pair_deviation(pulses, 1e-3, width_m_s, 2 * snr, WAVELENGTH_M) <= here * (1 + 1e-12)


class TestCoherenceAndSecondTrip:
    """Width against Nyquist speed; what overlays the coverage."""

    def test_at_the_limit_the_correlation_of_neighbours_is_one_over_root_e(self):
        nyquist_m_s = WAVELENGTH_M / (4 * 1e-3)
        assert coherence(1e-3, nyquist_m_s / math.pi, WAVELENGTH_M) == pytest.approx(1.0, rel=1e-12)
        assert correlation_exponent(1e-3, nyquist_m_s / math.pi, WAVELENGTH_M) == pytest.approx(0.5, rel=1e-12)

    def test_the_second_trip_is_the_coverage_one_unambiguous_range_further(self):
        overlays = second_trip((2e3, 100e3), np.array([150e3, 120e3]), trips=3)
        assert overlays.tolist() == [
            [[152e3, 250e3], [302e3, 400e3]],
            [[122e3, 220e3], [242e3, 340e3]],
        ]

    def test_a_coverage_beyond_the_interval_is_overlaid_up_to_its_end(self):
        assert second_trip((2e3, 200e3), np.array([150e3])).tolist() == [[[152e3, 300e3]]]

    def test_a_coverage_wholly_beyond_the_interval_has_no_second_trip(self):
        assert np.isnan(second_trip((200e3, 300e3), np.array([150e3]))).all()
