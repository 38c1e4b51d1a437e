"""Blind zones of published medium-PRF sets.

Sources, as named beside each check:
[R14] M. A. Richards, Fundamentals of Radar Signal Processing, 2nd ed., McGraw-Hill 2014; pages of the e-book edition.
[DH02] P. G. Davies, E. J. Hughes, "Medium PRF set selection using evolutionary algorithms",
IEEE Trans. Aerospace and Electronic Systems 38(3), 2002, as reported in [R14] p. 397, fig. 5.30.
"Computed" marks what no source prints: worked out for this project once, kept against change.
"""

from fractions import Fraction

import numpy as np
import pytest

from pycore import floor, patterns, visibility, zones
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.eclipsing import clear_ranges
from pycore.spans import Spans
from pycore.stagger import notch_clear_speeds

WAVELENGTH_M = 0.03  # 10 GHz as the sources round it
EXACT = 1e-9
LAST_FIGURE = 0.5e-5  # half of the last figure of a percentage printed with three decimals


def seen_by_count(pri_s, pulse_s, recovery_s, notch_m_s, range_m, speed_m_s):
    """Share of the coverage by number of clear PRFs: least received share one half, no guard."""
    pri_s = np.array(pri_s)
    each = np.ones(pri_s.size)
    ranges = clear_ranges(pri_s, pulse_s * each, recovery_s, 0.0, 0.5, range_m)
    speeds = notch_clear_speeds(WAVELENGTH_M / (2 * pri_s), notch_m_s * each, speed_m_s)
    shares = visibility.pattern_shares(patterns.sweep(ranges, range_m), patterns.sweep(speeds, speed_m_s), pri_s.size)
    return visibility.share_by_count(shares, pri_s.size)


# [R14] p. 395-396, fig. 5.28-5.29: 10 GHz, pulse 10 us, PRI 100 and 120 us, clutter out to ±20 m/s.
BOTH_PERIODS = (0.0, 0.5 * SPEED_OF_LIGHT_M_S * 600e-6), (0.0, 750.0)


def textbook_pair(*pri_us):
    """Over the common period of both PRIs and both blind speeds, an echo counted where half of it is received."""
    return seen_by_count(np.array(pri_us) * 1e-6, 10e-6, 0.0, 20.0, *BOTH_PERIODS)


@pytest.mark.parametrize(('pri_us', 'blind'), [(100, Fraction(34, 100)), (120, Fraction(113, 300))])
def test_blind_share_of_each_prf_of_the_textbook_pair(pri_us, blind):
    # [R14] p. 396-397, inputs read; the fractions are exact: 1 - (1 - pulse/PRI)(1 - 2 notch/v_b), 113/300 = 37.6667 %.
    assert textbook_pair(pri_us)[0] == pytest.approx(float(blind), abs=EXACT)


def test_blind_share_of_the_textbook_pair_when_one_or_both_must_be_clear():
    # [R14] p. 396-397, rules "1 of 2" and "2 of 2" read; 5/36 and 26/45 computed, exact.
    by_count = textbook_pair(100, 120)
    assert by_count[0] == pytest.approx(5 / 36, abs=EXACT)
    assert by_count[:2].sum() == pytest.approx(26 / 45, abs=EXACT)


def test_a_target_blind_in_range_and_speed_on_one_prf_is_clear_on_the_other():
    # [R14] p. 395-396, fig. 5.28: 30 km (200 us with c = 3e8) and 300 m/s: blind in both at 100 us, clear at 120 us.
    pri_s, each, limits = np.array([100e-6, 120e-6]), np.ones(2), ((0.0, 60e3), (0.0, 400.0))
    ranges = clear_ranges(pri_s, 10e-6 * each, 0.0, 0.0, 0.5, limits[0])
    speeds = notch_clear_speeds(WAVELENGTH_M / (2 * pri_s), 20.0 * each, limits[1])
    first, second = zones.why(ranges, speeds, 2, *limits, 0.5 * SPEED_OF_LIGHT_M_S * 200e-6, 300.0)
    assert first.reasons == ('eclipsed', 'notch')
    assert second.clear


# [DH02]: 10 GHz, pulse 1 us, ten near-in cells blanked, clutter out to ±17 m/s, 3 of 8.
PUBLISHED_SET_S = np.array([51, 53, 60, 63, 67, 84, 89, 93]) * 1e-6
COVERAGE = (0.0, 185_200.0), (0.0, 1500.0)


@pytest.mark.parametrize(
    ('pri_us', 'blind_percent'),
    [
        ((51, 53, 60, 63, 67, 84, 89, 93), 2.321),  # the set: [DH02]; the share: computed, exact
        ((54, 59, 61, 67, 69, 78, 83, 87), 2.019),  # computed
        ((57, 69, 77, 82, 101, 109, 119, 146), 2.0003),  # computed
    ],
)
def test_blind_share_of_three_of_eight(pri_us, blind_percent):
    by_count = seen_by_count(np.array(pri_us) * 1e-6, 1e-6, 10e-6, 17.0, *COVERAGE)
    assert by_count[:3].sum() == pytest.approx(blind_percent / 100, abs=LAST_FIGURE)


def test_floor_of_the_published_set_and_what_it_leaves_above_it():
    # Computed: 1.974 %, before 10.5 us or slower than 17 m/s; 0.348 % of the set's blind share lies above.
    opening = np.full(8, 0.5 * SPEED_OF_LIGHT_M_S * 10.5e-6)
    unseen = floor.floor_share(opening, np.full(8, 17.0), 3, *COVERAGE)
    assert unseen == pytest.approx(1.974e-2, abs=LAST_FIGURE)
    by_count = seen_by_count(PUBLISHED_SET_S, 1e-6, 10e-6, 17.0, *COVERAGE)
    assert by_count[:3].sum() - unseen == pytest.approx(0.348e-2, abs=LAST_FIGURE)


def cells_seen(range_max_m, blanked_s=11e-6):
    """Count clear PRFs by the cell rule of the regression: c = 3e8, cells of 150 m by 1 m/s sampled at their centres.

    Blind in range where the delay after the last pulse is below 11 us (the pulse and ten cells),
    blind in speed where the folded speed is within 17 m/s, the edge included.
    """
    pri = PUBLISHED_SET_S[:, None]
    k = np.arange(30)
    prf = np.repeat(np.arange(8), k.size)
    starts, stops = pri * k + blanked_s, pri * (k + 1) - 1e-13
    ranges = Spans(prf, 1.5e8 * starts.ravel(), 1.5e8 * stops.ravel())
    blind = WAVELENGTH_M / (2 * pri)
    speeds = Spans(prf, (blind * k + 17 + 1e-9).ravel(), (blind * (k + 1) - 17 - 1e-9).ravel())
    cells = int(range_max_m // 150)
    at = zones.centres((0.0, 150.0 * cells), cells), zones.centres((0.0, 1500.0), 1500)
    return zones.count_map(ranges, speeds, *at), at


@pytest.mark.parametrize(
    ('range_max_m', 'blind_percent', 'beyond_percent'), [(185_200, 2.356, 0.348), (150_000, 2.428, 0.212)]
)
def test_blind_cells_of_the_published_set(range_max_m, blind_percent, beyond_percent):
    # Computed, regression only: no source prints a share for this set.
    count, (range_m, speed_m_s) = cells_seen(range_max_m)
    assert (count < 3).mean() == pytest.approx(blind_percent / 100, abs=LAST_FIGURE)
    first = (range_m < 1.5e8 * 11e-6) | (speed_m_s <= 17)[:, None]
    # Of the cells outside the first range and Doppler blind zones.
    assert (count < 3)[~first].mean() == pytest.approx(beyond_percent / 100, abs=LAST_FIGURE)


def test_blind_cells_of_the_published_set_for_one_to_five_of_eight():
    # Computed, regression only; out to 150 km.
    count, _ = cells_seen(150_000)
    blind = [(count < m).mean() * 100 for m in range(1, 6)]
    assert blind == pytest.approx([2.221, 2.222, 2.428, 4.965, 17.049], abs=0.5e-3)


def test_without_blanking_the_published_set_has_no_blind_cell_outside_the_first_zones():
    # Computed, regression only: 1.21 to 1.33 % in all.
    count, (range_m, speed_m_s) = cells_seen(185_200, blanked_s=1e-6)
    assert 0.0121 <= (count < 3).mean() <= 0.0133
    first = (range_m < 1.5e8 * 1e-6) | (speed_m_s <= 17)[:, None]
    assert not ((count < 3) & ~first).any()


@pytest.mark.parametrize(('n', 'm'), [(8, 3), (9, 3), (4, 2), (2, 1)])
def test_prfs_stepped_by_the_clutter_width_over_n_less_m_leave_m_of_them_clear_of_the_first_blind_zone(n, m):
    # [R14] p. 413: steps of at least β/(N - M) Hz, β the width of the mainlobe clutter: here 2 kHz about 15 kHz
    width_hz = 2000.0
    prf_hz = 15e3 + width_hz / (n - m) * np.arange(n)
    notch = np.full(n, width_hz * WAVELENGTH_M / 4)
    limits = (7000.0 * WAVELENGTH_M / 2, prf_hz[-1] * 1.2 * WAVELENGTH_M / 2)
    swept = patterns.sweep(notch_clear_speeds(prf_hz * WAVELENGTH_M / 2, notch, limits), limits)
    clear = np.bitwise_count(swept.pattern)[np.diff(swept.edges) > EXACT]
    assert clear.min() == m
