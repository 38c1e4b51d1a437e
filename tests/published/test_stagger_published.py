"""Staggers and improvement factors against published values, each with its source beside it.

[R14] M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., McGraw-Hill 2014; pages of the e-book.
"Computed" marks what no source prints: worked out for this project once, kept against change.
"""

import math

import numpy as np
import pytest

from pycore import ambiguity, improvement
from pycore.response import binomial_weights, repeat_counts, staggered_response
from pycore.stagger import staggered

WAVELENGTH_M = 0.1
LAST_DIGIT_DB = 0.005
SHRADER = (25, 30, 27, 31)
FIVE = (51, 62, 53, 61, 58)


def found(counts, clock_hz, delays=1, times=(0.3, 14.0)):
    """A stagger over speeds in multiples of the mean interval's first blind speed."""
    mean = WAVELENGTH_M / 2 / (np.mean(counts) / clock_hz)
    limits = times[0] * mean, times[1] * mean
    return staggered(counts, clock_hz, delays, None, WAVELENGTH_M, -20.0, limits), mean


def test_four_thirds_and_one_millisecond():
    # [R14] p. 355, eq. 5.34-5.38: first blind Doppler 3000 Hz, unstaggered reference 857.14 Hz, factor 3.5.
    stagger, mean = found((4000, 3000), 3e6)
    assert 2 * stagger.true_first_blind_m_s / WAVELENGTH_M == pytest.approx(3000.0, rel=1e-12)
    assert 2 * mean / WAVELENGTH_M == pytest.approx(857.14, abs=0.005)
    assert stagger.ratio_to_mean == 3.5
    assert stagger.is_blind


def test_the_same_set_loses_a_seventh_of_the_range_and_triples_the_coverage():
    # [R14] p. 357, eq. 5.44-5.46: range 6/7 of the unstaggered, combined coverage 3 = min(k).
    shortest, mean = ambiguity.unambiguous_range(3000 / 3e6), ambiguity.unambiguous_range(3500 / 3e6)
    assert shortest / mean == pytest.approx(6 / 7, rel=1e-12)
    assert shortest / mean * found((4000, 3000), 3e6)[0].ratio_to_mean == pytest.approx(3.0, rel=1e-12)


def test_five_intervals_of_a_hundred_microseconds():
    # [R14] p. 357, fig. 5.13b: nulls every 175.4 Hz unstaggered, first blind 10 kHz, 57 times, range 10.5 % less, 51.
    stagger, mean = found(FIVE, 10e3)
    assert 2 * mean / WAVELENGTH_M == pytest.approx(175.4, abs=0.05)
    assert 2 * stagger.true_first_blind_m_s / WAVELENGTH_M == pytest.approx(10e3, rel=1e-12)
    assert stagger.ratio_to_mean == 57.0
    assert 1 - min(FIVE) / np.mean(FIVE) == pytest.approx(0.105, abs=0.0005)
    assert stagger.ratio_to_mean * min(FIVE) / np.mean(FIVE) == pytest.approx(51.0, rel=1e-12)


@pytest.mark.parametrize(('counts', 'ratio'), [(SHRADER, 28.25), ((63, 64), 63.5)])
def test_ratios_that_are_widely_printed(counts, ratio):
    # 25:30:27:31: Skolnik, Introduction to Radar Systems; Shrader, Radar Handbook, MTI chapter (from memory).
    # 63:64 widely printed (from memory).
    assert found(counts, 25e3)[0].ratio_to_mean == ratio
    assert repeat_counts(counts) == 1


@pytest.mark.parametrize(
    ('counts', 'delays', 'depth_db', 'at'),
    [
        (SHRADER, 1, -8.70, 0.992),
        (SHRADER, 2, -8.61, 0.910),
        (SHRADER, 3, -9.73, 0.856),
        ((1000, 1200, 1080, 1240), 1, -8.70, 0.992),
        ((1000, 1200, 1080, 1240), 2, -8.61, 0.910),
        ((1000, 1200, 1080, 1240), 3, -9.73, 0.856),
        ((4000, 3000), 1, -4.35, None),
        (FIVE, 1, -9.57, None),
    ],
)
def test_deepest_dips(counts, delays, depth_db, at):
    # Computed: power averaged over the phases, normalised to the mean gain; place in units of the mean PRF.
    # The speeds reach beyond the true first blind speed of 3:4, 3.5 times the mean PRF's, which is no dip.
    stagger, mean = found(counts, 25e3, delays, (0.3, 14.0))
    assert stagger.deepest_db == pytest.approx(depth_db, abs=LAST_DIGIT_DB)
    if at is not None:
        assert stagger.deepest_at_m_s / mean == pytest.approx(at, abs=0.0005)


def test_a_set_of_one_common_count_is_blind_far_before_its_true_first_blind_speed():
    # Computed: 1333.3 and 1000.0 us at 5.6 GHz: truly blind at 267,672 m/s, -74 dB at 80.3 m/s already (one delay).
    wavelength = float(ambiguity.wavelength(5.6e9))
    stagger = staggered((13333, 10000), 10e6, 1, None, wavelength, -20.0, (0.0, 120.0))
    assert stagger.true_first_blind_m_s == pytest.approx(267_672, abs=0.5)
    assert stagger.deepest_db == pytest.approx(-74.0, abs=0.5)
    assert stagger.deepest_at_m_s == pytest.approx(80.3, abs=0.05)
    assert stagger.first_below_m_s == pytest.approx(79.8, abs=0.05)
    assert stagger.response.decibels(stagger.first_below_m_s) == pytest.approx(-20.0, abs=1e-6)


# --- improvement factor -----------------------------------------------------------------------------------------------

CLOCK_HZ = 1e6


def improvement_db(delays, spread_s):
    """Improvement of a binomial canceller at a constant PRF for a phase spread from pulse to pulse."""
    speed = spread_s * WAVELENGTH_M / (4 * math.pi * 1e-3)
    return 10 * math.log10(
        improvement.improvement_factor((1000,), CLOCK_HZ, binomial_weights(delays), WAVELENGTH_M, speed)
    )


def rho(k, spread_s):
    return math.exp(-((k * spread_s) ** 2) / 2)


@pytest.mark.parametrize('spread_s', [0.1, 0.5, 1.5])
def test_closed_forms_of_the_two_three_and_four_pulse_cancellers(spread_s):
    # [R14] p. 359-361, eq. 5.47-5.60: text read, equations from memory; four pulses derived.
    one, two, three = (rho(k, spread_s) for k in (1, 2, 3))
    forms = (1 / (1 - one), 1 / (1 - 4 / 3 * one + two / 3), 1 / (1 - 1.5 * one + 0.6 * two - 0.1 * three))
    for delays, form in enumerate(forms, start=1):
        # The closed forms cancel: at s = 0.1 three delays leave one part in a million of the terms.
        assert improvement_db(delays, spread_s) == pytest.approx(10 * math.log10(form), abs=1e-8)


@pytest.mark.parametrize(
    ('part_of_prf', 'decibels'),
    [
        (0.01, (27.05, 51.10, 73.39)),
        (0.02, (21.04, 39.10, 55.42)),
        (0.05, (13.17, 23.48, 32.16)),
        (0.1, (7.47, 12.45, 16.16)),
        (0.2, (2.63, 3.89, 4.63)),
        (0.3, (0.81, 1.11, 1.27)),
    ],
)
def test_improvement_by_spread_over_prf(part_of_prf, decibels):
    # Computed; the row 0.05 agrees with "13 dB or more" for a narrow spectrum and two pulses, [R14] p. 361 (read).
    values = [improvement_db(delays, 2 * math.pi * part_of_prf) for delays in (1, 2, 3)]
    assert values == pytest.approx(decibels, abs=LAST_DIGIT_DB)


def test_small_spread_limits():
    # Skolnik, Barton, Nathanson (from memory): 2/s², 2/s⁴, (4/3)/s⁶; at s = 0.1 (computed) exact and limit in dB.
    exact, limit = (23.021, 43.047, 61.325), (23.010, 43.010, 61.249)
    assert [improvement_db(delays, 0.1) for delays in (1, 2, 3)] == pytest.approx(exact, abs=0.0006)
    found_limit = [10 * math.log10(improvement.small_spread_limit(delays, 0.1)) for delays in (1, 2, 3)]
    assert found_limit == pytest.approx(limit, abs=0.0006)


def test_a_scanning_beam_spreads_by_a_quarter_of_the_prf_over_the_hits():
    # Skolnik, Barton (from memory): σ_f = 0.265 f_r/n, a Gaussian beam; n/f_r is the time on target.
    assert 2 * improvement.scanning_spread(WAVELENGTH_M, 20e-3) / WAVELENGTH_M == pytest.approx(0.265 / 20e-3, rel=1e-4)


@pytest.mark.parametrize(('delays', 'divisor'), [(1, 1.388), (2, 3.853)])
def test_scanning_limits_of_one_and_two_delays(delays, divisor):
    # Shrader, Radar Handbook (from memory): n²/1.388, n⁴/3.853; derived: 1.3863, 3.8436. Three delays are not trusted.
    assert improvement.scanning_limit(delays, 20.0) == pytest.approx(20.0 ** (2 * delays) / divisor, rel=3e-3)


def test_the_rule_for_the_staggering_limit_as_a_rule():
    # Shrader, Radar Handbook (from memory): 20 log10(2.5 n/(γ - 1)); 25:30:27:31 with 20 hits, 46.4 dB.
    rule = improvement.stagger_limit(20, 31 / 25)
    assert 10 * math.log10(rule) == pytest.approx(46.4, abs=0.05)
    # Its other form, 20 log10(0.33/(γ - 1) λ f/σ_v), for what 20 hits spread.
    mean_prf = 25e3 / np.mean(SHRADER)
    spread = improvement.scanning_spread(WAVELENGTH_M, 20 / mean_prf)
    other = improvement.stagger_limit_of_spread(WAVELENGTH_M, mean_prf, spread, 31 / 25)
    assert 10 * math.log10(other / rule) == pytest.approx(0.0, abs=0.05)


@pytest.mark.parametrize(('delays', 'decibels'), [(1, 24.6), (2, 42.6), (3, 44.4)])
def test_what_the_rule_is_worth_for_binomial_weights(delays, decibels):
    # Computed: 25:30:27:31, 20 hits, weights kept from pulse to pulse.
    spread = improvement.scanning_spread(WAVELENGTH_M, 20 * np.mean(SHRADER) / 25e3)
    exact = improvement.improvement_factor(SHRADER, 25e3, binomial_weights(delays), WAVELENGTH_M, spread)
    assert 10 * math.log10(exact) == pytest.approx(decibels, abs=0.05)


def test_the_mean_gain_of_a_two_pulse_canceller_is_two():
    # [R14] p. 359-361: average target gain Σw² = 2; here the response is normalised by it, so that the mean is 1.
    response = staggered_response((1000,), 1e6, (1, -1), WAVELENGTH_M)
    assert response.power(25.0) == pytest.approx(4 / 2)
