"""Decoding and weather unfolding against published values, each with its source beside it.

[R14]   M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., McGraw-Hill 2014; pages of the e-book.
[ME04]  B. R. Mahafza and A. Z. Elsherbeni, radar systems design textbook, Chapman & Hall/CRC 2004, Appendix 1A.
The textbooks take light as 3e8 m/s; where that enters, so do the checks.
"""

import math
from fractions import Fraction
from itertools import combinations

import numpy as np
import pytest

from pycore.candidates import agreement, comb, unfolded
from pycore.congruence import chinese_remainder, consistent, exact_span, pairwise_coprime, remainder_weights
from pycore.decoding import range_span, speed_span
from pycore.weather import two_prf

C_TEXTBOOK_M_S = 3e8
PUBLISHED_SET_US = (51, 53, 60, 63, 67, 84, 89, 93)
"""P. G. Davies and E. J. Hughes, IEEE Trans. AES 38(3), 933-939, 2002, as reported in [R14] p. 397, Fig. 5.30."""


def gates_agreeing(bins, numbers, highest, m):
    """Gates below ``highest`` on which M of the PRFs, each with its reported gate numbers, agree."""
    combs = [comb(np.array(each) + 0.5, count, 0.5, (0, highest)) for count, each in zip(bins, numbers, strict=True)]
    return np.floor(agreement(combs, m).best).astype(int).tolist()


def test_three_prfs_and_the_chinese_remainder_theorem():
    # [R14] p. 416, eq. 5.129-5.132: bins 11, 12, 13, true bin 19
    moduli = (11, 12, 13)
    assert pairwise_coprime(moduli)
    assert remainder_weights(moduli) == (936, 1573, 924)
    assert [weight // (1716 // m) for weight, m in zip((936, 1573, 924), moduli, strict=True)] == [6, 11, 7]
    assert [19 % m for m in moduli] == [8, 7, 6]
    assert chinese_remainder((8, 7, 6), moduli) == 19
    assert consistent((8, 7, 6), moduli) == (19, 1716)


def test_one_remainder_one_bin_off_gives_a_wildly_wrong_range():
    # [R14] p. 416: says so; its value is lost in the text read, 943 is computed
    assert chinese_remainder((8, 7, 7), (11, 12, 13)) == 943


def test_two_targets_on_three_prfs_by_coincidence():
    # [R14] p. 417, Fig. 5.37-5.38: bins 7, 8, 9 with targets at 6 and 11
    bins = (7, 8, 9)
    numbers = [(6 % count, 11 % count) for count in bins]
    assert numbers == [(6, 4), (6, 3), (6, 2)]
    assert gates_agreeing(bins, numbers, 83, 3) == [6, 11]
    # computed: further on they appear again, so that a largest range is needed
    assert gates_agreeing(bins, numbers, 130, 3) == [6, 11, 83, 123]


def test_two_of_those_prfs_show_a_ghost():
    # [R14] p. 418, Fig. 5.39: a ghost at bin 20, which only 7 and 9 bins give
    assert gates_agreeing((7, 9), [(6, 4), (6, 2)], 30, 2) == [6, 11, 20]
    # computed: the other two pairs
    assert gates_agreeing((7, 8), [(6, 4), (6, 3)], 30, 2) == [6, 11, 27]
    assert gates_agreeing((8, 9), [(6, 3), (6, 2)], 30, 2) == [6, 11]


def test_apparent_dopplers_of_one_target_on_three_prfs():
    # [ME04] App. 1A: 15, 18, 21 kHz, 9 GHz, 550 m/s: 33 kHz shows as 3, 15, 12 kHz with n = 2, 1, 1
    doppler_hz = 2 * 550 * 9e9 / C_TEXTBOOK_M_S
    assert doppler_hz == pytest.approx(33_000, rel=1e-12)
    for prf_hz, apparent_hz, n in ((15e3, 3e3, 2), (18e3, 15e3, 1), (21e3, 12e3, 1)):
        candidates = unfolded(apparent_hz, prf_hz, (0.0, 60e3))
        assert candidates[n] == pytest.approx(doppler_hz, rel=1e-12)


def test_true_doppler_from_three_apparent_ones():
    # [ME04] App. 1A: 8, 2, 17 kHz on the same PRFs (equations and inputs read; 38 kHz and 632.7 m/s from memory)
    assert consistent((8, 2, 17), (15, 18, 21)) == (38, 630)
    combs = [comb(a, prf, 0.01, (0, 630)) for a, prf in ((8, 15), (2, 18), (17, 21))]
    assert agreement(combs, 3).best.tolist() == pytest.approx([38.0])
    speed_m_s = 38e3 * 0.0333 / 2  # its 632.7 m/s takes the wavelength as 0.0333 m
    assert speed_m_s == pytest.approx(632.7, abs=0.05)


def test_two_prf_doppler_rule_gives_what_the_candidates_give():
    # [ME04] eq. 1A.12-1A.14: M = (f_d2 - f_d1)/(f_r1 - f_r2), with f_r2 added where f_d1 > f_d2, is the number of folds
    # where it is the same on both; here f_r1 = 90 kHz, f_r2 = 88.5 kHz and 100 kHz true
    f_r1, f_r2, true = 90.0, 88.5, 100.0
    folds = ((true % f_r2) - (true % f_r1)) / (f_r1 - f_r2)
    assert folds == pytest.approx(1.0)
    combs = [comb(true % f_r, f_r, 0.01, (0.0, 200.0)) for f_r in (f_r1, f_r2)]
    assert agreement(combs, 2).best.tolist() == pytest.approx([true])


def test_high_prfs_a_step_apart_decode_to_the_range_of_the_step():
    # [ME04] App. 1A example: 100 km and N = 59: step 1.5 kHz, PRFs 88.5 and 90 kHz, R_u 1.695 and 1.667 km
    clock_hz = 59 * 60 * 1500  # holds both PRIs in whole counts: 60 and 59
    counts = (clock_hz // 88_500, clock_hz // 90_000)
    assert counts == (60, 59)
    r_u_m = [C_TEXTBOOK_M_S * count / clock_hz / 2 for count in counts]
    assert r_u_m == pytest.approx([1695, 1667], abs=0.5)
    span = range_span(counts, clock_hz, 2, [Fraction(1, 100)] * 2, 100e3)
    assert span.exact == pytest.approx(100e3, rel=1e-3)  # exact speed of light against 3e8


def test_n_prfs_resolve_one_target_fewer():
    # [R14] p. 418: N PRFs resolve N - 1 targets. Three PRFs hold two targets without a ghost in the first 83 bins
    # (above); three targets on them make one
    numbers = [tuple(target % count for target in (6, 11, 30)) for count in (7, 8, 9)]
    found = gates_agreeing((7, 8, 9), numbers, 83, 3)
    assert {6, 11, 30} <= set(found)
    assert len(found) > 3


class TestPublishedMediumPrfSet:
    """The set of eight, 3 of 8."""

    def test_every_three_decode_to_a_hundred_nautical_miles(self):
        # computed (not in the source): the smallest least common multiple of any 3 is 1260 µs (60, 63, 84), 189.0 km
        # with c = 3e8, just above 100 nmi. Criterion: Kinghorn and Williams 1997 (from memory)
        triples = {math.lcm(*three): three for three in combinations(PUBLISHED_SET_US, 3)}
        assert min(triples) == exact_span(PUBLISHED_SET_US, 3) == 1260
        assert triples[1260] == (60, 63, 84)
        span = range_span(PUBLISHED_SET_US, 1_000_000, 3, [Fraction(1, 2)] * 8, 185_200.0)
        assert span.exact == pytest.approx(189.0e3, rel=1e-3)
        assert span.blurred > 100 * 1852

    def test_speed_is_unambiguous_to_a_third_of_a_megahertz(self):
        # computed: the largest common factor of any 3 PRIs is 3 µs: 333 kHz of Doppler, 5000 m/s at 10 GHz with c = 3e8
        assert max(math.gcd(*three) for three in combinations(PUBLISHED_SET_US, 3)) == 3
        span = speed_span(PUBLISHED_SET_US, 1_000_000, [10_000_000_000] * 8, [64] * 8, Fraction(1, 2), 3, 1500.0)
        assert span.exact == pytest.approx(5000.0, rel=1e-3)


def test_the_first_speed_blind_on_all_prfs_is_the_common_multiple_of_the_blind_speeds():
    # [R14] p. 392. Its Fig. 5.28 (p. 395): 10 GHz, PRI 100 and 120 µs, blind speeds 150 and 125 m/s
    span = speed_span((100, 120), 1_000_000, [10_000_000_000] * 2, [64, 64], Fraction(1, 2), 2, 1000.0)
    assert span.exact == pytest.approx(math.lcm(150, 125), rel=1e-3)


class TestStaggeredPrtAndDualPrf:
    """Weather practice on two PRFs."""

    @pytest.mark.parametrize(('m', 'n'), [(2, 3), (3, 4), (4, 5), (3, 5)])
    def test_the_common_nyquist_speed_is_m_and_n_times_the_single_ones(self, m, n):
        # NSSL slides (Torres et al.); Torres, Dubel, Zrnic, J. Atmos. Oceanic Technol. 21(9), 1389, 2004, abstract
        pair = two_prf((m * 600, n * 600), 1_000_000, 0.1)
        assert pair.nyquist_m_s == pytest.approx(m * 0.1 / (4 * m * 600e-6), rel=1e-14)
        assert pair.nyquist_m_s == pytest.approx(m * pair.nyquist_short_m_s, rel=1e-14)
        assert pair.nyquist_m_s == pytest.approx(n * pair.nyquist_long_m_s, rel=1e-14)

    @pytest.mark.parametrize(('short', 'long'), [(1200, 1800), (1000, 1250), (780, 975)])
    def test_the_difference_of_the_intervals_sets_the_common_nyquist_speed(self, short, long):
        # Zrnic and Mahapatra 1985, as reported in Moisseev et al., J. Atmos. Oceanic Technol. 25(12), 2008
        pair = two_prf((short, long), 1_000_000, 0.1)
        assert pair.n == pair.m + 1
        assert pair.nyquist_m_s == pytest.approx(0.1 / (4 * (long - short) * 1e-6), rel=1e-14)

    def test_a_research_radar_reaches_184_km_and_45_metres_per_second(self):
        # D. Zrnic, NSSL 40th-anniversary talk, slide 12 (184 km, 45.2 m/s); ratio 2/3 and 11.10 cm are inferred
        short = round(2 * 184e3 / 299_792_458 * 1e7 / 2) * 2
        pair = two_prf((short, short * 3 // 2), 10_000_000, 0.1110)
        assert pair.nyquist_m_s == pytest.approx(45.2, abs=0.05)

    @pytest.mark.parametrize(('low_hz', 'factor', 'extended_m_s'), [(800, 2, 31.98), (900, 3, 47.97), (960, 4, 63.96)])
    def test_dual_prf_ratios_extend_by_two_three_and_four(self, low_hz, factor, extended_m_s):
        # Jorgensen 2000; Dazhang 1984 (from memory): 3:2, 4:3, 5:4; λ 5.33 cm, 1200 Hz against 800, 900, 960 (computed)
        clock_hz = 1200 * 900 * 960
        pair = two_prf((clock_hz // 1200, clock_hz // low_hz), clock_hz, 0.0533)
        assert pair.m == factor
        assert pair.nyquist_m_s == pytest.approx(extended_m_s, abs=0.005)
        assert pair.nyquist_m_s == pytest.approx(0.0533 / 4 / (1 / low_hz - 1 / 1200), rel=1e-12)

    def test_a_c_band_weather_radar_extends_13_to_40_metres_per_second(self):
        # Holleman and Beekhuis, J. Atmos. Oceanic Technol. 20(4), 443-453, 2003 (numbers from memory): 13.3, 10.0, 39.9
        pair = two_prf((3000, 4000), 3_000_000, 0.0533)
        assert pair.nyquist_short_m_s == pytest.approx(13.3, abs=0.05)
        assert pair.nyquist_long_m_s == pytest.approx(10.0, abs=0.05)
        assert pair.nyquist_m_s == pytest.approx(39.9, abs=0.1)
