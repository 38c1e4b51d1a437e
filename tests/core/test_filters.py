"""Windows against scipy's, and what they make of a bank of filters."""

import math
import warnings

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.signal import windows as scipy_windows

from pycore import bank, filters, windows
from pycore.cpi import Cpi, cpis
from pycore.errors import InputError

ROUNDING = 1e-9  # asked of windows: far below any quantisation of weights
PULSES = (3, 4, 5, 8, 9, 10, 16, 31, 64, 257, 1024, 4096)
SPEED = st.floats(-400.0, 400.0)


def scipy_window(name, pulses, sidelobe_db):
    with warnings.catch_warnings():
        warnings.simplefilter('ignore', UserWarning)  # scipy advises against low sidelobe levels for estimation
        if name == 'chebyshev':
            return scipy_windows.chebwin(pulses, sidelobe_db, sym=True)
        if name == 'taylor':
            terms = windows.taylor_terms(pulses, sidelobe_db)
            return scipy_windows.taylor(pulses, terms, sidelobe_db, norm=True, sym=True)
        return scipy_windows.get_window({'rectangular': 'boxcar'}.get(name, name), pulses, fftbins=False)


def a_cpi(pulses=9, name='chebyshev', sidelobe_db=40.0, pri_s=980e-6, notch_m_s=6.0):
    return cpis(pri_s, 0.107, 1e-6, 1e6, notch_m_s, pulses, 1, name, sidelobe_db)[0]


@pytest.mark.parametrize('sidelobe_db', [15.0, 30.0, 40.0, 60.0, 100.0])
@pytest.mark.parametrize('name', windows.WINDOWS)
def test_windows_agree_with_scipys_symmetric_ones(name, sidelobe_db):
    for pulses in PULSES:
        ours = windows.window(name, pulses, sidelobe_db)
        assert ours == pytest.approx(scipy_window(name, pulses, sidelobe_db), abs=ROUNDING), pulses


@pytest.mark.parametrize('name', windows.WINDOWS)
def test_one_and_two_pulses_are_weighted_alike(name):
    assert windows.window(name, 1).tolist() == [1.0]
    assert windows.window(name, 2).tolist() == [1.0, 1.0]


@pytest.mark.parametrize('name', windows.WINDOWS)
@settings(deadline=None)
@given(pulses=st.integers(1, 300), sidelobe_db=st.floats(10.0, 120.0))
def test_windows_are_symmetric(name, pulses, sidelobe_db):
    weights = windows.window(name, pulses, sidelobe_db)
    assert weights == pytest.approx(weights[::-1], abs=1e-12)
    assert len(weights) == pulses


def test_an_unknown_window_is_refused_by_name():
    with pytest.raises(InputError, match='hamming.*got welch') as refused:
        windows.window('welch', 9)
    assert refused.value.field == 'doppler.window'


@pytest.mark.parametrize(
    ('pulses', 'sidelobe_db', 'terms'),
    [(64, 40.0, 7), (64, 30.0, 4), (8, 40.0, 4), (9, 40.0, 4), (3, 40.0, 1), (64, 13.0, 1 + 1)],
)
def test_taylors_n_bar_is_the_smallest_that_keeps_the_zeros_in_order(pulses, sidelobe_db, terms):
    # 40 dB: A = 1.6865, 2A² + 1/2 = 6.19; 30 dB: A = 1.3200, 3.98; 13 dB: A = 0.6859, 1.44; at most n/2
    assert windows.taylor_terms(pulses, sidelobe_db) == terms


@pytest.mark.parametrize('sidelobe_db', [20.0, 40.0, 70.0])
@pytest.mark.parametrize('pulses', [5, 9, 64, 500])
def test_chebyshev_reaches_the_level_it_was_made_for(pulses, sidelobe_db):
    weights = windows.window('chebyshev', pulses, sidelobe_db)
    assert filters.sidelobe_level_db(weights) == pytest.approx(sidelobe_db, abs=1e-6)


def test_taylor_reaches_about_its_level_where_pulses_allow_its_terms():
    assert filters.sidelobe_level_db(windows.window('taylor', 64, 40.0)) == pytest.approx(40.0, abs=0.2)
    assert filters.sidelobe_level_db(windows.window('taylor', 8, 40.0)) < 37.0


def test_uniform_weights_gain_n_and_lose_nothing_at_the_centre():
    weights = windows.window('rectangular', 16)
    assert filters.processing_gain(weights) == pytest.approx(16.0)
    assert filters.processing_loss_db(weights) == pytest.approx(0.0, abs=1e-12)
    assert filters.half_power_width(windows.window('rectangular', 4096)) == pytest.approx(0.88589, abs=1e-5)


def test_a_target_between_two_filters_loses_the_straddle_loss_in_both():
    cpi = a_cpi(10, 'hamming')
    width = cpi.blind_speed_m_s / 10
    gain = bank.target_gain(cpi, 2.5 * width)
    loss_db = 10 * math.log10(filters.processing_gain(cpi.weights) / gain[2])
    assert loss_db == pytest.approx(filters.straddle_loss_db(cpi.weights), abs=1e-9)
    assert gain[2] == pytest.approx(gain[3], rel=1e-9)


def test_the_lobe_edge_is_one_filter_uniform_and_1_77_for_nine_pulses_at_40_db():
    assert filters.lobe_edge(windows.window('rectangular', 9)) == 1.0
    assert filters.lobe_edge(windows.window('chebyshev', 9, 40.0)) == pytest.approx(1.77, abs=0.005)


@pytest.mark.parametrize('name', ['hann', 'hamming', 'blackman', 'chebyshev', 'taylor'])
@pytest.mark.parametrize('pulses', [8, 9, 33, 128])
def test_beyond_the_lobe_edge_nothing_is_above_the_sidelobe_level(name, pulses):
    weights = windows.window(name, pulses, 40.0)
    edge = filters.lobe_edge(weights)
    level = 10 ** (-filters.sidelobe_level_db(weights) / 20)
    beyond = np.abs(filters.response(weights, np.linspace(edge, pulses / 2, 4001)))
    inside = np.abs(filters.response(weights, np.linspace(0.0, edge * (1 - 1e-6), 1001)))
    assert beyond.max() <= max(level * (1 + 1e-6), 1e-9)
    assert inside.min() > level


def test_a_window_without_sidelobes_rejects_from_half_the_blind_speed_on():
    weights = windows.window('hamming', 5)  # falls all the way
    assert filters.sidelobe_level_db(weights) == math.inf
    assert filters.lobe_edge(weights) == 2.5


@pytest.mark.parametrize('name', windows.WINDOWS)
@pytest.mark.parametrize('pulses', [1, 2, 3])
def test_few_pulses_have_an_edge_no_farther_than_half_the_blind_speed(name, pulses):
    weights = windows.window(name, pulses)
    assert 0.0 < filters.lobe_edge(weights) <= pulses / 2
    assert filters.straddle_loss_db(weights) >= 0.0
    assert 0.0 < filters.half_power_width(weights) <= pulses


def matrix_gains(cpi, speed, spread):
    """wᴴ(ss^H)w/wᴴw and wᴴRw/wᴴw for every filter, by matrices as they are written."""
    k = np.arange(cpi.pulses)
    turn = np.exp(4j * np.pi * speed * k * cpi.pri_s / cpi.wavelength_m)
    lag = (k[:, None] - k) * cpi.pri_s
    cover = np.exp(-8 * (np.pi * spread * lag / cpi.wavelength_m) ** 2) * np.outer(turn, turn.conj())
    steered = cpi.weights * np.exp(2j * np.pi * np.outer(k, k) / cpi.pulses)
    noise = (np.abs(steered) ** 2).sum(axis=1)
    target = np.abs(steered.conj() @ turn) ** 2 / noise
    return target, np.einsum('fa,ab,fb->f', steered.conj(), cover, steered).real / noise


@settings(deadline=None)
@given(SPEED, st.floats(0.0, 20.0), st.integers(1, 40), st.sampled_from(windows.WINDOWS))
def test_the_banks_gains_are_those_of_the_matrices(speed, spread, pulses, name):
    cpi = a_cpi(pulses, name)
    target, clutter = matrix_gains(cpi, speed, spread)
    assert bank.target_gain(cpi, speed) == pytest.approx(target, abs=1e-9)
    assert bank.clutter_gain(cpi, speed, spread) == pytest.approx(clutter, abs=1e-9)


@settings(deadline=None)
@given(SPEED, st.integers(-5, 5))
def test_a_bank_cannot_tell_speeds_a_blind_speed_apart(speed, turns):
    cpi = a_cpi()
    moved = speed + turns * cpi.blind_speed_m_s
    assert bank.target_gain(cpi, moved) == pytest.approx(bank.target_gain(cpi, speed), abs=1e-9)


def test_a_bank_gives_arrays_of_speeds_what_it_gives_each():
    cpi, speeds = a_cpi(), np.linspace(-100, 200, 7)
    together = bank.target_gain(cpi, speeds)
    assert np.array_equal(together, np.stack([bank.target_gain(cpi, float(v)) for v in speeds]))
    weights = cpi.weights
    offsets = np.linspace(0, 4, 5)
    apart = [filters.response(weights, x) for x in offsets]
    assert filters.response(weights, offsets) == pytest.approx(apart, abs=1e-15)


def test_noise_alone_passes_every_filter_with_its_own_power():
    assert bank.clutter_gain(a_cpi(), 12.0, 1e6) == pytest.approx(np.ones(9), abs=1e-12)


def test_filters_inside_the_notch_and_around_the_blind_speed_are_not_used():
    cpi = a_cpi(9, notch_m_s=7.0)  # v_b 54.59 m/s, filters 6.07 m/s apart
    assert bank.outside_notch(cpi, bank.centres(cpi)).tolist() == [
        False,
        False,
        True,
        True,
        True,
        True,
        True,
        True,
        False,
    ]
    assert not bank.outside_notch(cpi, cpi.blind_speed_m_s + 6.9)
    assert bank.outside_notch(cpi, 7.0)


def test_lists_of_equal_values_make_the_same_cpis_as_one_value():
    one = cpis([1e-3, 8e-4], 0.1, 1e-6, 1e6, 5.0, 9, 1, 'hann')
    each = cpis([1e-3, 8e-4], [0.1] * 2, [1e-6] * 2, [1e6] * 2, [5.0] * 2, [9] * 2, [1] * 2, 'hann')
    for ours, theirs in zip(one, each, strict=True):
        assert all(np.array_equal(getattr(ours, f), getattr(theirs, f)) for f in Cpi.__slots__)
