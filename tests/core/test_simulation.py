"""A seeded simulation of pulses in gates, made without the closed forms, against what the closed forms say.

Complex samples are drawn pulse by pulse: noise of power 1, clutter as a cloud of
scatterers with Gaussian speeds, a target with a random phase in every CPI and a
strength drawn once for a dwell (Swerling 1, 3) or once for a CPI (2, 4).

Every comparison states its number of trials and asks for agreement within
``SIGMAS`` standard errors of the simulated mean: four, which chance alone breaks
once in 16 000 comparisons (confidence 99.994 %). The seeds are fixed, so that a
failure is never chance the second time.
"""

import math

import numpy as np
import pytest

from pycore import bank, clutter, detection, detection_map, eclipsing, scnr, swerling, target
from pycore.clutter import Clutter
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.cpi import cpis
from pycore.improvement import improvement_factor

SIGMAS = 4.0
TRIALS = 20_000
LAMBDA = SPEED_OF_LIGHT_M_S / 2.8e9
SCATTERERS = 24


def complex_noise(draw, *shape):
    return (draw.standard_normal(shape) + 1j * draw.standard_normal(shape)) / math.sqrt(2)


def cloud(draw, trials, time_s, speed_m_s, spread_m_s):
    """Clutter of power 1 at given pulse times: scatterers of one amplitude, own speeds, own phases."""
    speeds = speed_m_s + spread_m_s * draw.standard_normal((trials, SCATTERERS, 1))
    phases = 2 * np.pi * draw.random((trials, SCATTERERS, 1))
    turns = 4 * np.pi / LAMBDA * speeds * time_s + phases
    return np.exp(1j * turns).sum(axis=1) / math.sqrt(SCATTERERS)


def echo(draw, trials, time_s, speed_m_s):
    """A target of power 1 with a random phase in each trial."""
    return np.exp(4j * np.pi * speed_m_s * time_s / LAMBDA + 2j * np.pi * draw.random((trials, 1)))


def bank_outputs(samples, weights):
    """Weight the pulses and turn them against every filter's own phase ramp."""
    pulses = np.arange(len(weights))
    return (samples * weights) @ np.exp(-2j * np.pi * np.outer(pulses, pulses) / len(weights))


def agree(values, expected):
    """Whether the mean of trials is within its standard error of what is expected."""
    error = values.std(axis=0, ddof=1) / math.sqrt(len(values))
    return np.all(np.abs(values.mean(axis=0) - expected) <= SIGMAS * error + 1e-12)


def a_cpi(name='hamming', pulses=9, pri_s=980e-6, fill=1, notch_m_s=6.0):
    return cpis(pri_s, LAMBDA, 1e-6, 1e6, notch_m_s, pulses, fill, name, 40.0)[0]


@pytest.mark.parametrize('name', ['rectangular', 'hann', 'hamming', 'chebyshev', 'taylor'])
@pytest.mark.parametrize('offset', [0.0, 0.37, 0.5])
def test_filters_gain_and_lose_what_noise_and_a_target_give(name, offset):
    # 20 000 trials of noise and of the target in it
    draw, cpi = np.random.default_rng(1), a_cpi(name)
    noise = complex_noise(draw, TRIALS, cpi.pulses)
    moving = 2.0 * echo(draw, TRIALS, np.arange(9) * cpi.pri_s, (3 + offset) * cpi.blind_speed_m_s / 9)
    power = (cpi.weights**2).sum()
    quiet = np.abs(bank_outputs(noise, cpi.weights)) ** 2 / power
    heard = np.abs(bank_outputs(noise + moving, cpi.weights)) ** 2 / power
    gain = bank.target_gain(cpi, (3 + offset) * cpi.blind_speed_m_s / 9)
    assert agree(quiet, np.ones(9))
    assert agree(heard, 1.0 + 4.0 * gain)


@pytest.mark.parametrize(('speed', 'spread'), [(0.0, 0.3), (-10.0, 2.0), (41.0, 4.0)])
@pytest.mark.parametrize('name', ['hamming', 'chebyshev'])
def test_clutter_leaves_in_each_filter_what_its_gain_says(name, speed, spread):
    # 20 000 clouds of 24 scatterers
    draw, cpi = np.random.default_rng(2), a_cpi(name)
    samples = cloud(draw, TRIALS, np.arange(9) * cpi.pri_s, speed, spread)
    residue = np.abs(bank_outputs(samples, cpi.weights)) ** 2 / (cpi.weights**2).sum()
    assert agree(residue, bank.clutter_gain(cpi, speed, spread))


@pytest.mark.parametrize('weights', [(1, -1), (1, -2, 1), (1, -3, 3, -1), (0.3, -1, 0.7, 0.4)])
@pytest.mark.parametrize('pri_us', [(1000,), (1000, 1200, 1080, 1240)])
@pytest.mark.parametrize('speed', [0.0, 7.0])
def test_a_canceller_passes_of_clutter_what_its_residue_says(weights, pri_us, speed):
    # 20 000 clouds of 24 scatterers, each seen from every phase of the cycle
    draw = np.random.default_rng(9)
    pri_s, length = np.array(pri_us) * 1e-6, len(weights)
    time_s = np.concatenate(([0.0], np.cumsum(np.resize(pri_s, len(pri_us) + length - 2))))
    samples = cloud(draw, TRIALS, time_s, speed, 0.8)
    windows = np.lib.stride_tricks.sliding_window_view(samples, length, axis=1)
    passed = (np.abs(windows @ np.array(weights, dtype=float)) ** 2).mean(axis=1) / np.dot(weights, weights)
    patch = Clutter('rain', 0.0, 1e4, (0.0, 1e5), speed, 0.8, 2.0)
    assert agree(passed, detection_map.canceller_residue(pri_s, weights, LAMBDA, patch))


@pytest.mark.parametrize('weights', [(1, -1), (1, -2, 1), (1, -3, 3, -1)])
@pytest.mark.parametrize('pri_us', [(1000,), (1000, 1200, 1080, 1240)])
def test_a_canceller_improves_on_clutter_as_its_factor_says(weights, pri_us):
    # 20 000 clouds of 24 scatterers; clutter out of the canceller over its mean gain for targets, Σw²
    draw, spread = np.random.default_rng(10), 1.5
    pri_s, length = np.array(pri_us) * 1e-6, len(weights)
    time_s = np.concatenate(([0.0], np.cumsum(np.resize(pri_s, len(pri_us) + length - 2))))
    samples = cloud(draw, TRIALS, time_s, 0.0, spread)
    windows = np.lib.stride_tricks.sliding_window_view(samples, length, axis=1)
    passed = (np.abs(windows @ np.array(weights, dtype=float)) ** 2).mean(axis=1) / np.dot(weights, weights)
    assert agree(passed, 1.0 / improvement_factor(pri_us, 1e6, weights, LAMBDA, spread))


def received_matrix(draw, trials, cpi, ranges_m, amplitudes, gate_m, speeds_m_s):
    """One gate of fill + counted pulses, interval by interval: an echo is there once its own pulse has been sent."""
    reach_m = 0.5 * SPEED_OF_LIGHT_M_S * cpi.pri_s
    sent = cpi.fill_pulses + cpi.pulses
    samples = np.zeros((trials, sent), dtype=complex)
    for range_m, amplitude, speed in zip(ranges_m, amplitudes, speeds_m_s, strict=True):
        late = round((range_m - gate_m) / reach_m)
        phase = 2 * np.pi * draw.random((trials, 1))
        for interval in range(late, sent):
            turn = 4 * np.pi * speed * interval * cpi.pri_s / LAMBDA
            samples[:, interval] += (amplitude * np.exp(1j * (turn + phase)))[:, 0]
    return samples


def test_a_gate_holds_the_clutter_of_all_the_intervals_it_is_shared_with():
    # 20 000 trials; 300 us, R_u 44.97 km; surface at 8, 53 and 98 km in the gate of 8 km; two fill pulses
    draw, cpi = np.random.default_rng(3), a_cpi(pri_s=300e-6, fill=2)
    surface = Clutter('surface', 20.0, 10e3, (0.0, 120e3), 0.0, 0.0, 3.0)
    reach_m = 0.5 * SPEED_OF_LIGHT_M_S * cpi.pri_s
    sources = 8e3 + reach_m * np.arange(3)
    amplitude = np.sqrt(10**2.0 * (10e3 / sources) ** 3)
    samples = received_matrix(draw, TRIALS, cpi, sources, amplitude, 8e3, np.zeros(3))[:, cpi.fill_pulses :]
    power = np.abs(samples) ** 2
    assert agree(power[:, 4], clutter.folded_clutter_to_noise(surface, 8e3 + reach_m, reach_m, 225.0))


def test_a_late_target_loses_the_pulses_that_fill_pulses_do_not_cover():
    # 20 000 trials of noise; the target is 4 intervals late, 2 fill pulses: in 7 of 9 counted pulses
    draw, cpi = np.random.default_rng(4), a_cpi('rectangular', pri_s=100e-6, fill=2)
    reach_m, speed = 0.5 * SPEED_OF_LIGHT_M_S * cpi.pri_s, 2 * cpi.blind_speed_m_s / 9
    late = received_matrix(draw, TRIALS, cpi, [5e3 + 4 * reach_m], [1.5], 5e3, [speed])[:, 2:]
    heard = np.abs(bank_outputs(late + complex_noise(draw, TRIALS, 9), cpi.weights))[:, 2] ** 2 / 9
    share = clutter.late_share(cpi, 5e3 + 4 * reach_m)
    assert share == pytest.approx(7 / 9)
    assert agree(heard, 1.0 + 1.5**2 * 9 * share**2)


@pytest.mark.parametrize('form', ['whole', 'part'])
@pytest.mark.parametrize('delay_us', [1.5, 5.0, 30.0, 93.0, 96.5, 103.25])
def test_an_echo_keeps_the_share_that_falls_into_the_open_receiver(form, delay_us):
    # 20 000 trials; 100 us interval, pulse 8 us, recovery 2 us, guard 1 us, four samples in a microsecond
    draw, rate = np.random.default_rng(5), 4
    clock = (np.arange(32) + 0.5) / rate + delay_us  # middle of each sample of the echo, in us
    is_open = (clock % 100 >= 10) & (clock % 100 < 99)
    noise = complex_noise(draw, TRIALS, 32)
    signal = np.exp(2j * np.pi * draw.random((TRIALS, 1))) * is_open * 3.0
    blanked = noise * (is_open if form == 'part' else 1.0)  # the shut receiver takes the noise too, or does not
    heard = np.abs((signal + blanked).sum(axis=1)) ** 2 / 32
    quiet = np.abs(blanked.sum(axis=1)) ** 2 / 32
    share = eclipsing.received_share(0.5 * SPEED_OF_LIGHT_M_S * delay_us * 1e-6, 100e-6, 8e-6, 2e-6, 1e-6)
    assert is_open.mean() == pytest.approx(share, abs=1e-9)
    level = 1.0 if form == 'whole' else share
    assert agree(quiet, level)
    assert agree(heard, level * (1.0 + 9.0 * 32 * target.received_power(share, form)))


DWELL = cpis([980e-6, 860e-6, 790e-6], LAMBDA, 1e-6, 1e6, 6.0, [9, 9, 12], 1, 'hamming')
SPEED_M_S, CELL_DB = 43.0, (-2.0, 1.0, -4.0)
OVERALL = 1e-2
DWELLS = 40_000


def simulated_strengths(draw, case, n):
    """Strength of each CPI: one for a dwell or one for each CPI, of two or four Gaussian squares, mean 1."""
    squares = {'steady': 0, 'swerling1': 2, 'swerling2': 2, 'swerling3': 4, 'swerling4': 4}[case]
    if not squares:
        return np.ones((DWELLS, n))
    alike = case in ('swerling1', 'swerling3')
    parts = draw.standard_normal((DWELLS, 1 if alike else n, squares))
    return np.broadcast_to((parts**2).mean(axis=2), (DWELLS, n))


def simulated_detections(draw, case, patch, ratio, level):
    """How many CPIs of each dwell pass the threshold in the filter that is best for the target."""
    strength = simulated_strengths(draw, case, len(DWELL))
    count = np.zeros(DWELLS, dtype=int)
    for prf, (cpi, signal_db) in enumerate(zip(DWELL, CELL_DB, strict=True)):
        time_s = np.arange(cpi.pulses) * cpi.pri_s
        amplitude = np.sqrt(strength[:, prf] * 10 ** (signal_db / 10))[:, None]
        samples = amplitude * echo(draw, DWELLS, time_s, SPEED_M_S) + complex_noise(draw, DWELLS, cpi.pulses)
        floor = np.ones(cpi.pulses)
        if ratio:
            wave = np.outer(time_s, np.ones(cpi.pulses))
            cover = ratio * np.exp(-0.5 * (4 * np.pi * patch.spread_m_s * (wave - wave.T) / LAMBDA) ** 2)
            root = np.linalg.cholesky(cover + 1e-9 * ratio * np.eye(cpi.pulses))
            mean = np.exp(4j * np.pi * patch.speed_m_s * time_s / LAMBDA)
            samples = samples + (complex_noise(draw, DWELLS, cpi.pulses) @ root.T) * mean
            floor = 1.0 + ratio * bank.clutter_gain(cpi, patch.speed_m_s, patch.spread_m_s)
        found = scnr.filter_outputs(cpi, SPEED_M_S, 1.0, (patch,), [ratio]).best
        power = np.abs(bank_outputs(samples, cpi.weights)[:, found]) ** 2 / (cpi.weights**2).sum()
        count += power / floor[found] > level
    return count


@pytest.mark.parametrize('ratio_db', [None, 15.0])
@pytest.mark.parametrize('m', [1, 2, 3])
@pytest.mark.parametrize('case', swerling.CASES)
def test_m_of_n_detects_as_often_as_simulated_dwells(case, m, ratio_db):
    # 40 000 dwells of three CPIs with unequal signal, with and without rain that folds onto the target
    draw, ratio = np.random.default_rng(6), 0.0 if ratio_db is None else 10 ** (ratio_db / 10)
    rain = Clutter('rain', 0.0, 1e4, (0.0, 1e5), -10.0, 2.0, 2.0)
    level = detection.set_threshold(OVERALL, 3, m)
    hits = simulated_detections(draw, case, rain, ratio, level) >= m
    each = [
        scnr.best_scnr(cpi, [SPEED_M_S], np.array([10 ** (db / 10)]), (rain,), np.array([[ratio]]), np.ones(1))[0, 0]
        for cpi, db in zip(DWELL, CELL_DB, strict=True)
    ]
    expected = float(swerling.set_probability(np.array(each), m, level, case))
    assert 0.015 < expected < 0.999
    error = math.sqrt(expected * (1 - expected) / DWELLS)
    assert hits.mean() == pytest.approx(expected, abs=SIGMAS * error)


@pytest.mark.parametrize('m', [1, 2, 3])
def test_noise_alone_is_reported_as_often_as_the_overall_false_alarm_says(m):
    # 40 000 dwells of noise in one filter
    draw = np.random.default_rng(8)
    level = detection.set_threshold(OVERALL, 3, m)
    count = np.zeros(DWELLS, dtype=int)
    for cpi in DWELL:
        noise = bank_outputs(complex_noise(draw, DWELLS, cpi.pulses), cpi.weights)[:, 3]
        count += np.abs(noise) ** 2 / (cpi.weights**2).sum() > level
    error = math.sqrt(OVERALL * (1 - OVERALL) / DWELLS)
    assert (count >= m).mean() == pytest.approx(OVERALL, abs=SIGMAS * error)
