"""Marcum's Q against scipy's noncentral chi-square."""

import math

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy import special, stats

from pycore import marcum

RELATIVE = 1e-9  # asked over P_d 0.01 to 0.999
FALSE_ALARMS = (1e-12, 1e-10, 1e-8, 1e-6, 1e-4, 1e-2)
OUTPUTS = (1, 2, 7, 62, 1000)


def by_scipy(signal, level, outputs):
    """Twice the sum of m unit-power outputs is noncentral chi-square with 2m degrees of freedom."""
    return stats.ncx2.sf(2 * level, 2 * outputs, 2 * np.maximum(signal, 1e-300))


@pytest.mark.parametrize('outputs', OUTPUTS)
@pytest.mark.parametrize('false_alarm', FALSE_ALARMS)
def test_a_steady_signal_is_detected_as_scipys_noncentral_chi_square_says(false_alarm, outputs):
    level = marcum.threshold(false_alarm, outputs)
    signal = np.linspace(0.0, (math.sqrt(level) + 3.0) ** 2, 1500)
    expected = by_scipy(signal, level, outputs)
    asked = (expected >= 0.01) & (expected <= 0.999)
    assert asked.sum() > 50
    found = marcum.detection_probability(signal, level, outputs)
    assert found[asked] == pytest.approx(expected[asked], rel=RELATIVE, abs=0)


@pytest.mark.parametrize('outputs', OUTPUTS)
@pytest.mark.parametrize('false_alarm', FALSE_ALARMS)
def test_noise_alone_passes_the_threshold_with_the_false_alarm_probability(false_alarm, outputs):
    level = marcum.threshold(false_alarm, outputs)
    assert special.gammaincc(outputs, level) == pytest.approx(false_alarm, rel=RELATIVE, abs=0)
    assert marcum.detection_probability(0.0, level, outputs) == pytest.approx(false_alarm, rel=RELATIVE, abs=0)


def test_one_output_has_the_threshold_minus_the_logarithm_of_the_false_alarm():
    assert marcum.threshold(1e-6) == pytest.approx(13.815510557964274, rel=1e-15)


@settings(deadline=None)
@given(st.lists(st.floats(0.0, 1e12), min_size=2, max_size=20), st.floats(1e-12, 0.5), st.integers(1, 40))
def test_more_signal_is_never_detected_less(signals, false_alarm, outputs):
    level = marcum.threshold(false_alarm, outputs)
    found = marcum.detection_probability(np.sort(signals), level, outputs)
    assert np.all(np.diff(found) >= -1e-12)
    assert found.max() <= 1.0


def test_a_signal_of_any_strength_is_certain_without_a_warning():
    assert marcum.detection_probability(np.array([1e3, 1e30, 1e300]), 13.8) == pytest.approx(1.0, abs=1e-12)


def test_an_array_of_signals_gets_what_each_gets_alone():
    signals = np.array([[0.0, 1e-12, 1.0], [14.0, 60.0, 1e9]])
    together = marcum.detection_probability(signals, 13.8)
    apart = [float(marcum.detection_probability(x, 13.8)) for x in signals.ravel()]
    assert together.ravel() == pytest.approx(apart, rel=1e-13)
    assert together.shape == (2, 3)
    assert marcum.detection_probability(np.empty(0), 13.8).shape == (0,)


@pytest.mark.parametrize('mean', [0.3, 5.0, 300.0, 5000.0])
def test_sums_of_poisson_terms_are_scipys(mean):
    counts = np.unique(np.linspace(0, 2 * mean + 10, 30).astype(int))
    assert marcum.poisson_below(mean, counts) == pytest.approx(
        stats.poisson.cdf(counts - 1, mean), rel=1e-9, abs=1e-300
    )
