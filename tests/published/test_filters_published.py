"""Windows, filters and clutter spectra against published values, each with its source beside it.

[R14]   M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., McGraw-Hill 2014; pages of the e-book.
[H78]   F. J. Harris, Proc. IEEE 66(1), 51-83, 1978, Table 1: title and abstract read, the table from memory.
[SK]    Barlow 1949, Skolnik, *Introduction to Radar Systems*, and Shrader's table in the *Radar Handbook*: from memory.
"""

import math

import numpy as np
import pytest

from pycore import bank, clutter_spreads, covered, filters
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.cpi import cpis
from pycore.windows import window

PRINTED = 0.005  # two decimals
PRINTED_ONCE = 0.05  # one decimal


def test_hamming_loses_1_75_db_with_8_pulses_and_1_35_db_with_many():
    # [R14] p. 373; the figures come out with the symmetric window only
    assert filters.processing_loss_db(window('hamming', 8)) == pytest.approx(1.75, abs=PRINTED)
    assert filters.processing_loss_db(window('hamming', 4096)) == pytest.approx(1.35, abs=2 * PRINTED)


@pytest.mark.parametrize(('pulses', 'loss_db', 'printed'), [(8, 1.5, 0.05), (16, 1.6, 0.05), (512, 1.75, 0.01)])
def test_hammings_straddle_loss(pulses, loss_db, printed):
    # [R14] p. 376: 1.75 dB for more than 300 pulses, 1.5 dB for 8, 1.6 dB for 16
    assert filters.straddle_loss_db(window('hamming', pulses)) == pytest.approx(loss_db, abs=printed)


def test_uniform_weights_lose_3_9_db_between_filters():
    # [R14] p. 375-376: 2/pi, 3.92 dB; 3.9 dB for 16
    assert filters.straddle_loss_db(window('rectangular', 4096)) == pytest.approx(
        20 * math.log10(math.pi / 2), abs=1e-5
    )
    assert filters.straddle_loss_db(window('rectangular', 16)) == pytest.approx(3.9, abs=PRINTED_ONCE)


@pytest.mark.parametrize('name', ['hamming', 'blackman', 'chebyshev', 'taylor'])
def test_windows_cost_5_to_8_db_of_gain_as_amplitudes_are_summed(name):
    # [R14] p. 372: 5 to 8 dB typical of the peak of a line, 20 log10(n/sum w): Hamming long 5.35, 8 pulses 6.33
    weights = window(name, 64, 60.0)
    assert 5.0 <= 20 * math.log10(64 / weights.sum()) <= 8.0
    assert 20 * math.log10(8 / window('hamming', 8).sum()) == pytest.approx(6.33, abs=PRINTED)
    assert 20 * math.log10(4096 / window('hamming', 4096).sum()) == pytest.approx(5.35, abs=PRINTED)


HARRIS = [
    # window, depth [dB], noise bandwidth [filters], scallop loss [dB], worst loss [dB]
    ('rectangular', 0, 1.00, 3.92, 3.92),
    ('hann', 0, 1.50, 1.42, 3.18),
    ('hamming', 0, 1.36, 1.78, 3.10),
    ('blackman', 0, 1.73, 1.10, 3.47),
    ('chebyshev', 50, 1.39, 1.70, 3.12),
    ('chebyshev', 60, 1.51, 1.44, 3.23),
    ('chebyshev', 70, 1.62, 1.25, 3.35),
    ('chebyshev', 80, 1.73, 1.10, 3.48),
]


@pytest.mark.parametrize(('name', 'depth_db', 'bandwidth', 'scallop_db', 'worst_db'), HARRIS)
def test_the_classic_table_of_windows(name, depth_db, bandwidth, scallop_db, worst_db):
    # [H78], from memory, agreement to 0.03 as noted where it was collected. The cosine sums are taken long; the
    # table does not say how many points its Chebyshev windows have, and their figures drift with the number.
    weights = window(name, 256 if name == 'chebyshev' else 4096, float(depth_db))
    loss_db, straddle_db = filters.processing_loss_db(weights), filters.straddle_loss_db(weights)
    assert 10 ** (loss_db / 10) == pytest.approx(bandwidth, abs=0.03)
    assert straddle_db == pytest.approx(scallop_db, abs=0.04)
    assert loss_db + straddle_db == pytest.approx(worst_db, abs=0.03)


@pytest.mark.parametrize(('pulses', 'residue_db'), [(10, -1.4), (64, 6.8)])
def test_a_strong_line_stands_behind_low_sidelobes(pulses, residue_db):
    # common practice, numbers ours: 35 dB behind 45 dB sidelobes leaves 35 - 45 + 10 log10(n/loss)
    cpi = cpis(1e-3, 0.1, 1e-6, 1e6, 0.0, pulses, 0, 'chebyshev', 45.0)[0]
    passed = covered.leakage(cpi, 0.0).passed
    edge = math.ceil(filters.lobe_edge(cpi.weights) / (0.5 * pulses) * (len(passed) - 1))
    assert 35.0 + 10 * math.log10(passed[edge:].max()) == pytest.approx(residue_db, abs=PRINTED_ONCE)


def test_a_target_moving_by_whole_blind_speeds_looks_still():
    # common practice: the target folds onto zero
    cpi = cpis(1e-3, 0.1, 1e-6, 1e6, 0.0, 16, 0, 'hamming')[0]
    assert bank.target_gain(cpi, 3 * cpi.blind_speed_m_s) == pytest.approx(bank.target_gain(cpi, 0.0), abs=1e-9)
    assert bank.target_gain(cpi, 0.0).argmax() == 0


BARLOW = [
    # kind, a of exp(-a (f/f0)^2), spread [m/s], half of the last digit
    ('sparsely wooded hills, calm', 3.9e19, 0.017, 0.0005),
    ('heavily wooded hills, 20 mph', 2.3e17, 0.22, 0.005),
    ('sea, windy', 1.41e16, 0.89, 0.005),
    ('rain clouds', 2.8e15, 2.0, 0.05),
    ('chaff', 1e16, 1.1, 0.05),
]


@pytest.mark.parametrize(('kind', 'decay', 'spread_m_s', 'printed'), BARLOW)
def test_spreads_and_decays_of_clutter_spectra_agree(kind, decay, spread_m_s, printed):
    # [SK], both columns from memory: recalled apart, they agree by c/(2 sqrt(2a))
    assert clutter_spreads.spread_of_decay(decay) == pytest.approx(spread_m_s, abs=printed), kind


@pytest.mark.parametrize('decay', [row[1] for row in BARLOW])
def test_a_patch_of_that_spread_has_that_spectrum(decay):
    # [SK]: the transform of exp(-a (f/f0)^2), summed numerically, is the coherence that the filters use
    carrier_hz, lag_s = 3e9, 1e-3
    spread = clutter_spreads.spread_of_decay(decay)
    cpi = cpis(lag_s, SPEED_OF_LIGHT_M_S / carrier_hz, 1e-6, 1e6, 0.0, 2, 0, 'rectangular')[0]
    f = np.linspace(-8, 8, 4001) * carrier_hz / math.sqrt(2 * decay)
    power = np.exp(-decay * (f / carrier_hz) ** 2)
    coherence = (power * np.cos(2 * np.pi * f * lag_s)).sum() / power.sum()
    assert bank.lag_weights(cpi, spread)[1] == pytest.approx(coherence / 2, abs=1e-9)


def test_rain_50_km_away_spreads_by_shear():
    # Nathanson, *Radar Design Principles*, from memory: 0.42 k R theta, k 5.7 m/s per km, 50 km, 1 degree
    assert clutter_spreads.rain_spread(50e3, 1.0, turbulence_m_s=0.0) == pytest.approx(2.09, abs=0.03)
    assert 1 / math.sqrt(8 * math.log(2)) == pytest.approx(0.42, abs=PRINTED)


def test_rains_spreads_add_as_squares():
    # Nathanson, as above: turbulence 1.0, fall 1.0 sin(elevation)
    all_of_it = clutter_spreads.rain_spread(50e3, 1.0, 5.7e-3, 1.0, 20.0, 30.0)
    beam = math.radians(1.0) / math.sqrt(8 * math.log(2))
    assert all_of_it**2 == pytest.approx((285 * beam) ** 2 + 1.0 + (20 * beam) ** 2 + 0.25)
