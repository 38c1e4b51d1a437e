"""Detection after M of N: against enumeration, adaptive integration and the plainest forms."""

import itertools
import math

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy import integrate, special, stats

from pycore import bank, detection, detection_map, reach, speed_samples, swerling, target
from pycore.clutter import Clutter
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.cpi import cpis
from pycore.needed import needed_factor_log

HUNDREDTH_DB = 0.01
FLUCTUATING = swerling.CASES[1:]
SHAPE = {'swerling1': 1, 'swerling2': 1, 'swerling3': 2, 'swerling4': 2}
PROBABILITIES = st.lists(st.floats(0.0, 1.0), min_size=1, max_size=8)
SIGNALS = st.lists(st.floats(-10.0, 35.0), min_size=1, max_size=8)
LAMBDA = SPEED_OF_LIGHT_M_S / 2.8e9


def enumerated(probability, m):
    """Add up every way in which at least m of the events happen."""
    outcomes = itertools.product((0, 1), repeat=len(probability))
    return sum(
        math.prod(p if hit else 1 - p for p, hit in zip(probability, some, strict=True))
        for some in outcomes
        if sum(some) >= m
    )


def averaged(given_strength, shape):
    """Average over strength by scipy's adaptive quadrature, in pieces so that no step is missed."""
    density = stats.gamma(shape, scale=1 / shape).pdf
    ends = np.concatenate(([0.0], np.logspace(-7, math.log10(60.0), 14)))
    pieces = itertools.pairwise(ends)
    return sum(
        integrate.quad(lambda u: given_strength(u) * density(u), a, b, epsabs=1e-13, epsrel=1e-11)[0] for a, b in pieces
    )


def steady(signal, level, outputs=1):
    return 1.0 - special.chndtr(2 * level, 2 * outputs, 2 * np.asarray(signal))


@settings(deadline=None)
@given(PROBABILITIES, st.data())
def test_m_of_n_with_unequal_probabilities_is_what_enumeration_says(probability, data):
    m = data.draw(st.integers(1, len(probability)))
    assert swerling.at_least(np.array(probability), m) == pytest.approx(enumerated(probability, m), abs=1e-14)


def test_rare_events_keep_their_digits():
    rare = swerling.at_least(np.full(8, 1e-9), 3)
    assert rare == pytest.approx(56e-27, rel=1e-7)


@pytest.mark.parametrize('case', FLUCTUATING)
@pytest.mark.parametrize('outputs', [1, 8])
@pytest.mark.parametrize('false_alarm', [1e-12, 1e-6, 1e-2])
def test_a_fluctuating_cpi_is_the_average_of_a_steady_one(case, outputs, false_alarm):
    level = detection.set_threshold(false_alarm, 1, 1, outputs)
    for mean in (0.5, 5.0, 40.0, 3000.0):
        expected = averaged(lambda u, mean=mean: steady(u * mean, level, outputs), SHAPE[case])
        found = swerling.cpi_probability(mean, level, case, outputs)
        assert found == pytest.approx(expected, rel=1e-9, abs=1e-12)


@pytest.mark.parametrize('case', FLUCTUATING)
@pytest.mark.parametrize(('n', 'm'), [(2, 1), (3, 2), (8, 3)])
@pytest.mark.parametrize('false_alarm', [1e-12, 1e-2])
def test_m_of_n_is_averaged_over_the_strength_as_the_case_says(case, n, m, false_alarm):
    level = detection.set_threshold(false_alarm, n, m)
    mean = 10 ** np.linspace(0.4, 1.6, n)
    if case in ('swerling1', 'swerling3'):  # one strength for the dwell: M of N first, the average of it after
        expected = averaged(lambda u: float(swerling.at_least(steady(u * mean, level), m)), SHAPE[case])
    else:  # a new strength on each CPI: the averages first
        each = [averaged(lambda u, x=x: steady(u * x, level), SHAPE[case]) for x in mean]
        expected = float(swerling.at_least(np.array(each), m))
    assert swerling.set_probability(mean, m, level, case) == pytest.approx(expected, rel=1e-9, abs=1e-12)


def test_a_shared_strength_is_not_the_poisson_binomial_of_the_averages():
    mean, level = np.array([10.0, 14.0]), detection.set_threshold(1e-6, 2, 2)
    shared = swerling.set_probability(mean, 2, level, 'swerling1')
    renewed = swerling.set_probability(mean, 2, level, 'swerling2')
    assert shared > renewed + 0.05


@settings(deadline=None)
@given(SIGNALS, st.sampled_from(swerling.CASES), st.data())
def test_a_target_without_signal_is_detected_with_the_false_alarm_probability(signals_db, case, data):
    n = len(signals_db)
    m = data.draw(st.integers(1, n))
    level = detection.set_threshold(1e-6, n, m)
    assert swerling.set_probability(np.zeros(n), m, level, case) == pytest.approx(1e-6, rel=1e-9)
    assert swerling.set_probability(10 ** (np.array(signals_db) / 10), m, level, case) >= 1e-6 * (1 - 1e-9)


@settings(max_examples=30, deadline=None)
@given(SIGNALS, st.sampled_from(swerling.CASES))
def test_arrays_of_cells_get_what_each_cell_gets_alone(signals_db, case):
    cells = 10 ** (np.array([signals_db, signals_db[::-1]]) / 10)
    together = swerling.set_probability(cells, 1, 12.0, case)
    apart = [float(swerling.set_probability(cell, 1, 12.0, case)) for cell in cells]
    assert together == pytest.approx(apart, rel=1e-12)


@settings(deadline=None)
@given(st.floats(1e-15, 0.3), st.integers(1, 16), st.data())
def test_the_false_alarm_of_a_cpi_gives_back_the_overall_one(overall, n, data):
    m = data.draw(st.integers(1, n))
    p = detection.false_alarm_per_cpi(overall, n, m)
    total = sum(math.comb(n, k) * p**k * (1 - p) ** (n - k) for k in range(m, n + 1))
    assert total == pytest.approx(overall, rel=1e-11)


@pytest.mark.parametrize(('n', 'm', 'needed_db'), [(2, 1, 17.06), (2, 2, 15.96), (8, 3, 12.54)])
def test_swerling_1_needs_what_the_conventions_print(n, m, needed_db):
    # equal CPIs, 10^-6 overall, P_d 0.8
    found = detection.signal_needed_db(0.8, n, m, 1e-6, 'swerling1')
    assert found == pytest.approx(needed_db, abs=0.5 * HUNDREDTH_DB)


def test_one_swerling_1_cpi_needs_what_the_closed_form_says():
    expected = 10 * math.log10(math.log(1e-6) / math.log(0.9) - 1)
    assert detection.signal_needed_db(0.9, 1, 1, 1e-6, 'swerling1') == pytest.approx(expected, abs=1e-9)


def test_strength_goes_with_energy_and_the_square_of_wavelength():
    strength = target.reference_strength(10.0, 60e3, [1e-6, 2e-6], [0.1, 0.05])
    assert strength / 60e3**4 == pytest.approx([10.0, 10.0 * 2 * 0.25])
    measured = target.reference_strength(10.0, 60e3, [1e-6, 2e-6], [0.1, 0.1], at_pulse_s=4e-6)
    assert measured / 60e3**4 == pytest.approx([2.5, 5.0])


def test_the_radar_equation_by_hand():
    # 1 MW, 1 us = 1 J; 30 dBi; 0.1 m; 1 m2; 3 dB and 5 dB: 1e6 0.01/(1984.4 x 4.0039e-21) 10^-0.8 = 1.9947e20 m4
    strength = target.radar_equation_strength(1e6, 30.0, 1.0, 3.0, 5.0, 1e-6, 0.1)
    assert strength == pytest.approx(1.9947e20, rel=1e-4)


def test_a_targets_law_is_held_constant_nearer_than_the_first_opening():
    signal = target.one_pulse_signal(1e16, np.array([0.0, 500.0, 1e3, 1e4]), 1e3)
    assert signal == pytest.approx([1e4, 1e4, 1e4, 1.0])


def test_a_cpi_half_a_beamwidth_off_axis_loses_six_decibels_both_ways():
    assert target.beam_loss_db(0.5) == pytest.approx(2 * 10 * math.log10(2))


def test_beam_offsets_of_two_cpis_by_hand():
    # 10 ms dwell; fill 1 + 9 of 0.5 ms, 1 + 9 of 0.4 ms: counted middles 2.75 and 7.2 ms, the set's 4.5 ms
    offset = target.beam_offsets([0.5e-3, 0.4e-3], 9, 1, 10e-3)
    assert offset == pytest.approx([-0.175, 0.27])


def test_cells_are_whole_gates_times_whole_filters():
    assert detection.coverage_cells((0.0, 15e3), (0.0, 60.0), 150.0, np.array([6.0, 7.0])) == 1000
    assert detection.coverage_cells((0.0, 15.1e3), (0.0, 60.0), 150.0, 6.0) == 101 * 10


def test_sets_in_a_scan_are_beamwidths_times_whole_sets():
    assert detection.sets_per_scan(5.0, 0.02, 0.0099) == pytest.approx(250 * 2)
    assert detection.sets_per_scan(5.0, 0.02, 0.03) == pytest.approx(250)


def two_cpis(notch_m_s=6.0):
    return cpis([980e-6, 860e-6], LAMBDA, 1e-6, 1e6, notch_m_s, 9, 1, 'hamming')


@pytest.mark.parametrize('case', swerling.CASES)
def test_at_the_reach_the_probability_is_the_wanted_one(case):
    pair, strength = two_cpis(), target.reference_strength(10.0, 60e3, [1e-6] * 2, [LAMBDA] * 2)
    level = detection.set_threshold(1e-6, 2, 1)
    far = reach.reach(pair, strength, 1, level, case, 0.8, np.full(2, 225.0), 110e3, (0.0, 50.0))
    speed, range_m = far.speed_m_s[list(far.places)], np.array([far.best, far.median, far.worst])
    gain = np.stack([speed_samples.best_gain(cpi, speed) for cpi in pair], axis=1)
    found = swerling.set_probability(gain * strength / range_m[:, None] ** 4, 1, level, case)
    assert found == pytest.approx(0.8, abs=1e-6)
    assert far.worst <= far.median <= far.best


def test_a_speed_that_all_prfs_notch_is_not_reached():
    pair, level = two_cpis(), detection.set_threshold(1e-6, 2, 1)
    strength = target.reference_strength(10.0, 60e3, [1e-6] * 2, [LAMBDA] * 2)
    far = reach.reach(pair, strength, 1, level, 'swerling1', 0.8, np.full(2, 225.0), 110e3, (0.0, 300.0))
    gain = np.stack([speed_samples.best_gain(cpi, far.speed_m_s) for cpi in pair], axis=1)
    unseen = far.speed_m_s[np.isinf(needed_factor_log(gain, 1, level, 'swerling1', 0.8))]
    assert math.isnan(far.worst)
    assert far.speed_m_s[far.places[2]] in unseen
    assert 56.25 < unseen.min() < unseen[unseen < 100].max() < 60.63
    assert far.length_m_s.sum() == pytest.approx(294.0)


def test_reach_stops_at_four_coverages_and_at_the_first_opening():
    pair, level = two_cpis(), detection.set_threshold(1e-6, 2, 1)
    arguments = 1, level, 'steady', 0.8, np.full(2, 225.0), 1e3, (10.0, 40.0)
    assert reach.reach(pair, np.full(2, 1e30), *arguments).worst == 4e3
    assert math.isnan(reach.reach(pair, np.full(2, 1.0), *arguments).best)
    assert len(reach.reach(pair, np.full(2, 1.0), *arguments[:-1], (0.0, 5.0)).speed_m_s) == 0


def test_a_stronger_target_reaches_farther_by_the_fourth_root():
    pair, level = two_cpis(), detection.set_threshold(1e-6, 2, 1)
    arguments = 1, level, 'swerling3', 0.8, np.zeros(2), 1e6, (10.0, 40.0)
    one, ten = (reach.reach(pair, np.full(2, k), *arguments) for k in (1e20, 1e21))
    for rank in ('best', 'median', 'worst'):
        assert getattr(ten, rank) / getattr(one, rank) == pytest.approx(10**0.25, rel=1e-8)


DETECTIONS = {
    'case': st.sampled_from(swerling.CASES),
    'wanted': st.sampled_from((0.05, 0.3, 0.5, 0.8, 0.9, 0.99)),
    'false_alarm': st.sampled_from((1e-3, 1e-6, 1e-10)),
    'strength_db': st.floats(140.0, 260.0),
    'pri_us': st.lists(st.integers(590, 970), min_size=1, max_size=6, unique=True),
    'm': st.integers(1, 6),
}


@settings(max_examples=40, deadline=None)
@given(**DETECTIONS)
def test_best_median_and_worst_are_those_of_every_speed_worked_out(case, wanted, false_alarm, strength_db, pri_us, m):
    m = min(m, len(pri_us))
    some = cpis([pri * 1e-7 for pri in pri_us], 0.0312, 6e-6, 1e6, 12.0, 12, 4, 'chebyshev', 50.0)
    speed, length = speed_samples.sampled_speeds(some, m, (-100.0, 200.0))
    strength = np.stack([speed_samples.best_gain(cpi, speed) for cpi in some], axis=1) * 10 ** (strength_db / 10)
    law = m, detection.set_threshold(false_alarm, len(some), m), case, wanted
    far = reach.reach_over(speed, length, strength, *law, (900.0, 480e3))
    every = np.minimum(np.exp(-0.25 * needed_factor_log(strength, *law)), 480e3)
    ranked = sorted(zip(np.where(every < 900.0, 0.0, every), length, strict=True), reverse=True)
    share = np.cumsum([part for _, part in ranked]) / length.sum()
    median = ranked[int(np.argmax(share >= 0.5 * (1.0 - 1e-12)))][0]
    found = np.nan_to_num([far.best, far.median, far.worst])
    assert found == pytest.approx([ranked[0][0], median, ranked[-1][0]], rel=1e-7)


@pytest.mark.parametrize('window', ['rectangular', 'hann', 'blackman', 'chebyshev', 'taylor'])
@pytest.mark.parametrize('pulses', [1, 2, 3, 9, 64])
@pytest.mark.parametrize('sidelobe_db', [5.0, 40.0])
@pytest.mark.parametrize('notch_m_s', [0.0, 6.0, 40.0])
def test_the_best_filter_is_the_best_of_all_filters(window, pulses, sidelobe_db, notch_m_s):
    cpi = cpis([980e-6], LAMBDA, 1e-6, 1e6, notch_m_s, pulses, 1, window, sidelobe_db)[0]
    half_a_filter = cpi.blind_speed_m_s / pulses / 2.0
    speed = np.concatenate((np.linspace(-90.0, 90.0, 151), np.arange(-5, 6) * half_a_filter))
    usable = bank.outside_notch(cpi, bank.centres(cpi))
    every = np.where(usable, bank.target_gain(cpi, speed), 0.0).max(axis=1) * bank.outside_notch(cpi, speed)
    assert speed_samples.best_gain(cpi, speed) == pytest.approx(every, rel=1e-9, abs=1e-12)


@pytest.mark.parametrize('case', swerling.CASES)
def test_the_map_is_the_probability_of_each_cell(case):
    draw = np.random.default_rng(7)
    scnr = 10 ** draw.uniform(-2, 5, (5, 12, 9)) * (draw.random((5, 12, 9)) > 0.2)
    level = detection.set_threshold(1e-6, 5, 2)
    exact = swerling.set_probability(np.moveaxis(scnr, 0, -1), 2, level, case)
    assert detection_map.probability_map(scnr, 2, level, case) == pytest.approx(exact, abs=1e-3)


def test_the_map_follows_eclipsing_clutter_and_the_notch():
    pair, rain = two_cpis(), Clutter('rain', 30.0, 20e3, (15e3, 45e3), -10.0, 2.0, 2.0)
    strength, received = np.full(2, 1e20), np.array([[1.0, 1.0, 0.0], [1.0, 1.0, 0.25]])
    speeds, ranges = np.array([0.0, 25.0, 44.5]), np.array([10e3, 30e3, 60e3])
    arguments = strength, (rain,), np.ones((2, 1)), np.full(2, 225.0), received, ranges, speeds
    scnr = detection_map.set_scnr(pair, *arguments)
    assert np.all(scnr[:, :, 0] == 0.0)  # in the notch around zero
    assert scnr[0, 2].max() == 0.0  # eclipsed on the first PRF
    clean = detection_map.set_scnr(pair, strength, (), np.ones((2, 0)), *arguments[3:])
    assert scnr[:, 0] == pytest.approx(clean[:, 0])  # no rain at 10 km
    assert scnr[0, 1, 2] < 0.05 * clean[0, 1, 2]  # 44.5 m/s looks like -10.1 m/s at 980 us, where the rain is


def test_a_stagger_map_is_one_cpi_of_outputs_added_without_phase():
    level = detection.set_threshold(1e-6, 1, 1, 7)
    signal, gain = np.array([1.0, 4.0]), np.array([0.0, 0.5, 2.0])
    found = detection_map.stagger_map(
        signal, np.array([1.0, 1.0]), gain, (), np.empty(0), np.array([1e4, 2e4]), 225.0, level, 'swerling1', 7
    )
    exact = swerling.cpi_probability(7 * np.multiply.outer(signal, gain), level, 'swerling1', 7)
    assert found == pytest.approx(exact, abs=1e-5)


def test_a_stagger_leaves_of_clutter_what_its_response_lets_through():
    still = Clutter('ground', 40.0, 1e4, (0.0, 4e4), 0.0, 0.0, 3.0)
    moving = Clutter('rain', 40.0, 1e4, (0.0, 4e4), 25.0, 0.0, 2.0)
    pri = np.array([1.0e-3, 1.2e-3])
    assert detection_map.canceller_residue(pri, [1, -1], 0.1, still) == pytest.approx(0.0, abs=1e-15)
    expected = np.mean(4 * np.sin(2 * np.pi * 25.0 * pri / 0.1) ** 2) / 2
    assert detection_map.canceller_residue(pri, [1, -1], 0.1, moving) == pytest.approx(expected)
