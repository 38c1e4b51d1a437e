"""How far sets decode: brute force over small numbers, laws, and the checks printed with the definition."""

import math
from fractions import Fraction
from itertools import combinations

import numpy as np
import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from pycore.congruence import exact_span
from pycore.decoding import blind_speeds, range_span, speed_span
from pycore.decoding.blur import default_blur, gate_counts, motion_counts, range_half_widths, typed_decimal
from pycore.decoding.limits import decodes, last_place, last_place_exactly
from pycore.decoding.sweep import first_confusion

HALF = Fraction(1, 2)
TEN_METRES = 10.0
"""The checks of the definition are printed to a tenth of a kilometre; the values themselves were made to the metre."""


def small_sets(longest=14):
    """Draw periods, half-widths on quarters and M, so that edges often meet and combs often close up."""
    prfs = st.lists(st.tuples(st.integers(2, longest), st.integers(1, 16)), min_size=1, max_size=5)
    return prfs.flatmap(
        lambda each: st.tuples(
            st.just([period for period, _ in each]),
            st.just([Fraction(quarters, 4) for _, quarters in each]),
            st.integers(1, len(each)),
        )
    )


def cannot_tell(separation, periods, half_widths):
    """Count the PRFs that cannot tell a separation from zero, straight from the definition."""
    count = 0
    for period, half_width in zip(periods, half_widths, strict=True):
        rest = separation % period
        count += min(rest, period - rest) < half_width
    return count


def brute_span(periods, half_widths, m, limit):
    """Walk on a grid of eighths, which holds every edge (quarters) and a point between any two."""
    away = False
    for eighths in range(8 * limit):
        many = cannot_tell(Fraction(eighths, 8), periods, half_widths) >= m
        if away and many:
            return Fraction(eighths - 1, 8)
        away = away or not many
    return None if away else Fraction(0)


def microseconds(pris_us, clock_hz=10_000_000):
    """PRIs in clock counts."""
    return [pri * clock_hz // 1_000_000 for pri in pris_us]


class TestTheSweepAgainstItsDefinition:
    """The span is the smallest separation beyond the first zone that M of the N cannot tell."""

    @given(small_sets())
    def test_the_sweep_finds_what_walking_the_definition_finds(self, drawn):
        periods, half_widths, m = drawn
        limit = 60
        assert first_confusion(periods, half_widths, m, limit) == brute_span(periods, half_widths, m, limit)

    def test_edges_that_meet_do_not_overlap(self):
        # 6 is left at 7, where 8 is entered: nobody holds 7 itself; likewise at 17; 4·6 - 1 = 3·8 - 1 is the first
        assert first_confusion([6, 8], [1, 1], 2, 100) == 23 == 3 * 8 - 1

    def test_zones_that_touch_are_two_and_the_span_is_where_they_touch(self):
        assert first_confusion([10], [5], 1, 100) == 5

    def test_a_comb_without_gaps_decodes_nothing(self):
        assert first_confusion([10], [Fraction(51, 10)], 1, 100) == 0

    def test_two_combs_that_fill_each_others_gaps_decode_nothing(self):
        assert first_confusion([4, 6], [Fraction(19, 10), Fraction(29, 10)], 1, 1000) == 0

    def test_a_first_zone_longer_than_what_is_asked_for_is_no_confusion(self):
        assert first_confusion([100], [20], 1, 10) is None

    def test_a_span_at_the_limit_is_found_and_just_beyond_it_is_not(self):
        assert first_confusion([10], [1], 1, 9) == 9
        assert first_confusion([10], [1], 1, Fraction(899, 100)) is None

    def test_differences_of_a_part_in_ten_to_the_thirty_are_seen(self):
        # enters of 2·7 and leaves of 13 that cross by 2e-30: integers of Python's own take over
        just_over = HALF + Fraction(1, 10**30)
        assert first_confusion([7, 13], [just_over, just_over], 2, 50) == 14 - just_over
        assert first_confusion([7, 13], [HALF, HALF], 2, 50) != 14 - HALF

    def test_sixty_four_bit_and_longer_integers_agree(self):
        periods, widths = [403, 467, 897, 945], [Fraction(16_571, 1000)] * 4
        tiny = Fraction(1, 10**25)  # changes the grid, not the answer's place
        plain = first_confusion(periods, widths, 3, 10**5)
        assert first_confusion(periods, [w + tiny for w in widths], 3, 10**5) == plain - tiny

    def test_the_answer_does_not_depend_on_the_window_it_falls_into(self):
        # 99 · 101 is far beyond the first windows of a few thousand edges
        assert first_confusion([1009, 1013], [HALF, HALF], 2, 10**7) == 1009 * 1013 - HALF


def zone_stands_apart(periods, half_widths):
    """Whether the zone around zero ends before any comb comes back; where not, more blur can grow the zone itself."""
    return min(p - w for p, w in zip(periods, half_widths, strict=True)) > max(half_widths)


class TestLaws:
    """What must hold for any set."""

    @given(small_sets(40), st.integers(1, 12))
    def test_more_blur_never_lengthens_a_span(self, drawn, quarters):
        periods, half_widths, m = drawn
        wider_widths = [w + Fraction(quarters, 4) for w in half_widths]
        assume(zone_stands_apart(periods, wider_widths))
        span = first_confusion(periods, half_widths, m, 300)
        wider = first_confusion(periods, wider_widths, m, 300)
        assert span is None or (wider is not None and wider < span)

    @given(small_sets(), st.fractions(Fraction(1, 50), 50))
    def test_scaling_all_intervals_scales_the_span(self, drawn, factor):
        periods, half_widths, m = drawn
        span = first_confusion(periods, half_widths, m, 200)
        scaled = first_confusion([p * factor for p in periods], [w * factor for w in half_widths], m, 200 * factor)
        assert scaled == (None if span is None else span * factor)

    @given(small_sets(), st.randoms(use_true_random=False))
    def test_the_order_of_the_prfs_does_not_matter(self, drawn, random):
        periods, half_widths, m = drawn
        prfs = list(zip(periods, half_widths, strict=True))
        random.shuffle(prfs)
        shuffled = first_confusion([p for p, _ in prfs], [w for _, w in prfs], m, 200)
        assert shuffled == first_confusion(periods, half_widths, m, 200)

    @given(small_sets(40))
    def test_asking_for_one_prf_more_never_shortens_a_span(self, drawn):
        periods, half_widths, m = drawn
        assume(m < len(periods) and zone_stands_apart(periods, half_widths))
        fewer = first_confusion(periods, half_widths, m, 200)
        more = first_confusion(periods, half_widths, m + 1, 200)
        assert more is None or more >= fewer

    @given(st.lists(st.integers(20, 60), min_size=2, max_size=6), st.integers(1, 9), st.data())
    def test_any_m_decode_as_far_as_the_span_says_and_some_m_no_further(self, periods, quarters, data):
        m = data.draw(st.integers(1, len(periods)))
        width = Fraction(quarters, 4)
        span = first_confusion(periods, [width] * len(periods), m, 5000)
        subsets = [first_confusion(few, [width] * m, m, 5000) for few in combinations(periods, m)]
        reached = [each for each in subsets if each is not None]
        assert span == min(reached, default=None)

    @given(st.lists(st.integers(1, 60), min_size=1, max_size=6), st.data())
    def test_the_exact_span_is_the_smallest_multiple_of_any_m(self, periods, data):
        m = data.draw(st.integers(1, len(periods)))
        smallest = min(math.lcm(*few) for few in combinations(periods, m))
        assert exact_span(periods, m) == smallest
        assert exact_span(periods, m, below=smallest) is None
        assert exact_span(periods, m, below=smallest + 1) == smallest

    @given(st.lists(st.integers(5, 40), min_size=1, max_size=5), st.data())
    def test_with_vanishing_blur_the_span_is_the_exact_one(self, periods, data):
        m = data.draw(st.integers(1, len(periods)))
        tiny = Fraction(1, 10**12)
        assert first_confusion(periods, [tiny] * len(periods), m, 10**4) in (
            None,
            exact_span(periods, m) - tiny,
        )


class TestBlur:
    """Half a gate where every PRI is whole gates, one where not."""

    def test_intervals_of_whole_gates_line_the_gates_up(self):
        gates = gate_counts(10_000_000, [1e6, 1e6])
        assert gates == (10, 10)
        assert default_blur([9800, 8600], gates) == HALF
        assert default_blur([9800, 8605], gates) == 1

    def test_a_typed_bandwidth_is_that_decimal_whatever_the_float_says(self):
        # 4.1 MHz in Hz is 4099999.9999999995 in floating point
        assert 4.1 * 1e6 != 4_100_000
        assert typed_decimal(4.1 * 1e6) == 4_100_000
        assert gate_counts(41_000_000, [4.1 * 1e6]) == (10,)

    def test_motion_widens_by_what_the_echo_moves_between_first_and_last_cpi(self):
        # 300 m/s for (9 + 1) · 980 µs is 2.94 m, 2·2.94/c in delay, times 10 MHz
        motion = motion_counts([9800, 8600], [9, 9], [1, 1], -300.0)
        assert float(motion) == pytest.approx(2 * 2.94 / 299_792_458 * 1e7, rel=1e-15)
        assert range_half_widths(HALF, (Fraction(10),), motion) == (5 + motion,)

    def test_one_cpi_has_no_motion_between(self):
        assert motion_counts([9800], [9], [1], 300) == 0


class TestPrintedChecks:
    """The values printed beside the definition."""

    PUBLISHED = (51, 53, 60, 63, 67, 84, 89, 93)
    FOUND = (54, 59, 61, 67, 69, 78, 83, 87)

    @pytest.mark.parametrize(
        ('pris_us', 'blur', 'm', 'span_km'),
        [(PUBLISHED, HALF, 3, 188.8), (PUBLISHED, 1, 3, 150.9), (FOUND, 1, 3, 210.3), ((980, 860), HALF, 1, 128.8)],
    )
    def test_spans_with_blur_come_out_as_printed(self, pris_us, blur, m, span_km):
        half_widths = range_half_widths(blur, gate_counts(10_000_000, [1e6] * len(pris_us)))
        span = range_span(microseconds(pris_us), 10_000_000, m, half_widths, 185_200.0)
        assert round(span.blurred / 1e3, 1) == span_km

    def test_the_exact_span_of_the_published_set_is_1260_microseconds(self):
        span = range_span(microseconds(self.PUBLISHED), 10_000_000, 3, [Fraction(5)] * 8, 185_200.0)
        assert span.exact == pytest.approx(299_792_458 * 1260e-6 / 2, abs=TEN_METRES * 1e-6)
        assert span.swept_to == 20 * 185_200.0

    def test_a_set_without_pattern_meets_where_three_edges_just_overlap(self):
        found = first_confusion([403, 467, 897, 945], [Fraction(16_571, 1000)] * 4, 3, 10**6)
        assert round(float(found), 1) == 2818.4

    def test_nothing_confused_up_to_the_end_of_the_sweep_is_none_and_the_end_is_said(self):
        span = range_span([50_023, 51_001, 52_003], 10_000_000, 3, [Fraction(5)] * 3, 110_000.0)
        assert span.blurred is None
        assert span.swept_to == 3e6

    def test_no_blur_at_all_gives_the_exact_span(self):
        span = range_span(microseconds(self.PUBLISHED), 10_000_000, 3, [Fraction(0)] * 8, 185_200.0)
        assert span.blurred == span.exact


class TestSpeeds:
    """The same for speed, in fractions of the carriers that were typed."""

    def test_three_speeds_that_share_a_factor_decode_to_their_common_multiple(self):
        # largest common factor of any 3 of the published PRIs is 3 µs: λ/(2 · 3 µs) at 10 GHz
        counts = microseconds(TestPrintedChecks.PUBLISHED)
        span = speed_span(counts, 10_000_000, [10e9] * 8, [64] * 8, HALF, 3, 1500.0)
        assert span.exact == pytest.approx(299_792_458 / 10e9 / 2 / 3e-6, rel=1e-15)

    @given(
        st.lists(st.integers(20, 200), min_size=1, max_size=4),
        st.sampled_from([2.8e9, 5.6e9, 9.41e9]),
        st.integers(2, 40),
        st.data(),
    )
    def test_speeds_in_plain_fractions_give_the_same_span(self, pris_us, carrier_hz, pulses, data):
        m = data.draw(st.integers(1, len(pris_us)))
        carriers = [carrier_hz + 1e6 * data.draw(st.integers(0, 3)) for _ in pris_us]
        counts = microseconds(pris_us)
        span = speed_span(counts, 10_000_000, carriers, [pulses] * len(counts), 1, m, 400.0)
        periods = blind_speeds(counts, 10_000_000, carriers)
        plain = first_confusion(periods, [p / pulses for p in periods], m, 8000)
        assert span.blurred == (None if plain is None else float(plain))

    def test_speed_spans_of_sixteen_prfs_and_an_odd_clock_are_exact(self):
        counts = [50_023 + 997 * step for step in range(16)]
        carriers = [2.8e9 + 1e6 * step for step in range(16)]
        span = speed_span(counts, 10_000_000, carriers, [64] * 16, HALF, 3, 600.0)
        periods = blind_speeds(counts, 10_000_000, carriers)
        assert cannot_tell(Fraction(span.blurred * (1 + 1e-9)), periods, [p / 128 for p in periods]) >= 3

    def test_one_pulse_has_no_filters_and_decodes_no_speed(self):
        span = speed_span([9800, 8600], 10_000_000, [2.8e9] * 2, [1, 1], 1, 1, 300.0)
        assert span.blurred == 0


class TestLimitsForASearch:
    """Many sets at a time give the answers of one set at a time."""

    @given(
        st.lists(st.tuples(st.integers(20, 90), st.integers(1, 90)), min_size=1, max_size=5),
        st.integers(1, 90),
        st.integers(40, 8000),
        st.data(),
    )
    def test_the_last_place_is_given_to_those_that_decode(self, held, quarters, wanted, data):
        m = data.draw(st.integers(1, len(held) + 1))
        periods, widths = [p for p, _ in held], [Fraction(w, 4) for _, w in held]
        last_width, candidates = Fraction(quarters, 4), np.arange(20, 91, 7)
        one_by_one = [
            decodes([*periods, int(last)], [*widths, last_width], m, Fraction(wanted, 3)) for last in candidates
        ]
        together = last_place(periods, widths, candidates, last_width, m, Fraction(wanted, 3))
        assert together.tolist() == one_by_one

    @given(st.lists(st.integers(20, 90), min_size=1, max_size=5), st.integers(40, 8000), st.data())
    def test_the_same_for_exact_spans(self, periods, wanted, data):
        m = data.draw(st.integers(1, len(periods) + 1))
        candidates = np.arange(20, 91, 3)
        one_by_one = [exact_span([*periods, int(last)], m) >= wanted for last in candidates]
        assert last_place_exactly(periods, candidates, m, wanted).tolist() == one_by_one
