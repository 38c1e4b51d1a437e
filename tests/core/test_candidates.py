"""Candidates, coincidences and ghosts by counting, and both ways of decoding against each other."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore.candidates import agreement, comb, unfolded
from pycore.decoding.trials import coincidence_score, congruence_score, drawn_reports
from pycore.ghosts import ghosts

GATE_M = 150.0
NOWHERE = (np.empty(0), np.empty(0))


class TestUnfolding:
    """Every value within the axis that would look the same on one PRF."""

    @given(st.integers(-40, 80), st.integers(1, 30), st.integers(-50, 50), st.integers(0, 90))
    def test_the_candidates_are_all_values_with_that_remainder(self, apparent, period, low, length):
        expected = [value for value in range(low, low + length + 1) if (value - apparent) % period == 0]
        assert unfolded(apparent, period, (low, low + length)).tolist() == expected

    def test_ends_of_the_axis_belong_to_it(self):
        assert unfolded(3.0, 7.0, (3.0, 17.0)).tolist() == [3.0, 10.0, 17.0]

    def test_a_comb_is_cut_to_the_axis_and_has_teeth_whose_middle_lies_outside(self):
        start, stop = comb(1.0, 10.0, 2.0, (2.0, 20.0))
        assert start.tolist() == [2.0, 9.0, 19.0]
        assert stop.tolist() == [3.0, 13.0, 20.0]

    def test_teeth_of_two_echoes_that_overlap_are_joined(self):
        start, stop = comb([4.0, 5.0], 20.0, 1.0, (0.0, 30.0))
        assert (start.tolist(), stop.tolist()) == ([3.0, 23.0], [6.0, 26.0])


class TestCoincidence:
    """Places that M of the PRFs support."""

    @given(st.lists(st.tuples(st.integers(4, 15), st.integers(0, 14)), min_size=1, max_size=5), st.data())
    def test_whole_gates_agree_where_counting_says_so(self, prfs, data):
        m = data.draw(st.integers(1, len(prfs)))
        axis = (0, 60)
        combs = [comb(seen % period + 0.5, period, 0.5, axis) for period, seen in prfs]
        support = [sum((gate - seen) % period == 0 for period, seen in prfs) for gate in range(*axis)]
        enough = [gate for gate, count in enumerate(support) if count >= m]
        found = agreement(combs, m)
        covered = [g for a, b in zip(found.start, found.stop, strict=True) for g in range(round(a), round(b))]
        assert covered == enough
        for start, stop, best, many in zip(found.start, found.stop, found.best, found.support, strict=True):
            assert support[math.floor(best)] == many == max(support[round(start) : round(stop)])

    def test_gates_that_line_up_but_for_rounding_do_not_agree_with_their_neighbours(self):
        for clocks in range(1, 60):
            gate = 299_792_458 * clocks * 1e-8  # lengths without a short binary form
            combs = [comb((count // 2 + 0.5) * gate, count * gate, gate / 2, (0, 630 * gate)) for count in (7, 9)]
            both = agreement(combs, 2)
            assert both.start.size == 10
            assert (both.stop - both.start > gate / 2).all()

    def test_no_reports_agree_nowhere(self):
        assert agreement([NOWHERE, NOWHERE], 1).start.size == 0


class TestGhosts:
    """Other cells of the coverage that M PRFs take for the target."""

    COVERAGE = ((0.0, 400.0), (0.0, 90.0))
    PERIODS = ((70.0, 80.0, 90.0), (30.0, 27.0, 24.0))
    WIDTHS = ((0.5, 0.5, 0.5), (0.25, 0.25, 0.25))

    def brute(self, target, m, seen=(True, True, True)):
        """Cells of a grid finer than every width, away from the target, with the PRFs that support them."""
        r, v = np.meshgrid(np.arange(0.1, 400, 0.2), np.arange(0.05, 90, 0.1), indexing='ij')
        count = np.zeros(r.shape, dtype=int)
        for ru, vb, wr, wv, see in zip(*self.PERIODS, *self.WIDTHS, seen, strict=True):
            near_r = np.abs((r - target[0] + ru / 2) % ru - ru / 2) < wr
            near_v = np.abs((v - target[1] + vb / 2) % vb - vb / 2) < wv
            count += see & near_r & near_v
        own = (np.abs(r - target[0]) < 0.5) & (np.abs(v - target[1]) < 0.25)
        return r[(count >= m) & ~own], v[(count >= m) & ~own]

    @pytest.mark.parametrize('m', [1, 2, 3])
    @pytest.mark.parametrize('target', [(33.3, 12.1), (333.3, 80.2), (0.2, 0.1)])
    def test_ghosts_lie_where_a_fine_grid_finds_support(self, target, m):
        found = ghosts(target, self.COVERAGE, self.PERIODS, self.WIDTHS, m)
        r, v = self.brute(target, m)
        inside = np.zeros(r.shape, dtype=bool)
        for ghost in found:
            hit = (ghost.range_m[0] <= r) & (r <= ghost.range_m[1])
            hit &= (ghost.speed_m_s[0] <= v) & (v <= ghost.speed_m_s[1])
            assert len(ghost.prfs) >= m
            inside |= hit
        assert inside.all()
        assert bool(found) == bool(r.size)

    def test_a_ghost_needs_the_same_prfs_in_range_and_in_speed(self):
        # PRFs 0 and 1 repeat together every 560 m (outside); 0 alone repeats in range at 70 m, 1 alone at 80 m
        found = ghosts((10.0, 5.0), ((0.0, 100.0), (0.0, 20.0)), ((70.0, 80.0), (30.0, 27.0)), ((1, 1), (1, 1)), 1)
        assert [(round(sum(g.range_m) / 2), g.prfs) for g in found] == [(80, (0,)), (90, (1,))]
        assert ghosts((10.0, 5.0), ((0.0, 100.0), (0.0, 20.0)), ((70.0, 80.0), (30.0, 27.0)), ((1, 1), (1, 1)), 2) == ()

    def test_prfs_that_do_not_see_the_target_support_nothing(self):
        found = ghosts((10.0, 5.0), self.COVERAGE, self.PERIODS, self.WIDTHS, 1, seen=(False, True, False))
        assert {ghost.prfs for ghost in found} == {(1,)}

    def test_a_target_outside_the_coverage_shows_only_its_ghosts(self):
        found = ghosts((500.0, 5.0), self.COVERAGE, self.PERIODS, self.WIDTHS, 1)
        assert found
        assert all(ghost.range_m[1] <= 400.0 for ghost in found)


class TestTrials:
    """How often decoding is right, false or missed."""

    MODULI = (51, 53, 60, 63, 67, 84, 89, 93)
    AXIS = (2_000.0, 185_000.0)

    def reports(self, moduli=MODULI, **change):
        """Drawn reports of PRIs of whole gates."""
        settings = {'targets': 1, 'trials': 200, 'seed': 4, **change}
        return drawn_reports(self.AXIS, np.array(moduli) * GATE_M, GATE_M, **settings)

    def both(self, reports, moduli=MODULI, m=3, neighbours=0):
        """Scores by coincidence and by congruence."""
        by_coincidence = coincidence_score(reports, self.AXIS, np.array(moduli) * GATE_M, GATE_M, m, neighbours)
        return by_coincidence, congruence_score(reports, self.AXIS, moduli, GATE_M, m)

    def test_one_target_without_error_is_always_right_and_never_doubled(self):
        for score in self.both(self.reports()):
            assert (score.right, score.false, score.missed) == (200, 0, 0)

    def test_without_neighbours_both_ways_decode_the_same_places_right(self):
        for error in (0.0, 0.3 * GATE_M):
            by_coincidence, by_congruence = self.both(self.reports(targets=2, trials=100, error=error))
            assert by_coincidence.right == by_congruence.right
            assert by_coincidence.false == by_congruence.false

    def test_one_gate_of_error_breaks_congruences_where_coincidence_allows_for_it(self):
        moduli = (61, 67, 71)
        reports = self.reports(moduli, trials=400, error=0.4 * GATE_M)
        by_coincidence, by_congruence = self.both(reports, moduli, neighbours=1)
        assert by_coincidence.right > 0.97 * 400
        assert by_congruence.right < 0.7 * 400
        assert by_congruence.false + by_congruence.missed > 0.3 * 400

    def test_targets_that_too_few_prfs_see_are_missed(self):
        by_coincidence, by_congruence = self.both(self.reports(shut=np.array([1e6] * 6 + [0.0] * 2)))
        assert by_coincidence.missed == by_congruence.missed == 200

    def test_a_target_is_missed_as_often_as_fewer_than_m_see_it(self):
        # 3 of 3 at 0.8 each: 0.512; of 4000 targets four standard deviations are 127 (confidence 0.99994)
        moduli = (61, 67, 71)
        _, by_congruence = self.both(self.reports(moduli, trials=4000, seen=0.8), moduli)
        assert by_congruence.right == pytest.approx(0.8**3 * 4000, abs=4 * math.sqrt(4000 * 0.512 * 0.488))

    def test_two_targets_make_ghosts_within_the_span_of_one(self):
        by_coincidence, _ = self.both(self.reports(targets=2))
        assert by_coincidence.right == 400
        assert by_coincidence.false > 0

    def test_numbers_that_repeat_within_the_coverage_are_all_reported(self):
        # 5 and 7 gates repeat every 35: in gates 20 to 99 each target shows two or three times
        axis, moduli = (20 * GATE_M, 100 * GATE_M), (5, 7)
        reports = drawn_reports(axis, np.array(moduli) * GATE_M, GATE_M, 1, 200, 3)
        by_congruence = congruence_score(reports, axis, moduli, GATE_M, 2)
        assert by_congruence == coincidence_score(reports, axis, np.array(moduli) * GATE_M, GATE_M, 2)
        assert by_congruence.right == 200
        assert 200 <= by_congruence.false <= 400

    def test_a_remainder_that_rounds_up_to_the_interval_is_in_its_last_gate(self):
        reports = drawn_reports((-2e-18, -1e-18), [7 * GATE_M, 7.5 * GATE_M], GATE_M, 1, 1, 1)
        assert reports.cells.tolist() == [[[6, 7]]]

    def test_the_same_seed_gives_the_same_scores(self):
        assert self.both(self.reports(targets=2, trials=20)) == self.both(self.reports(targets=2, trials=20))

    def test_gates_that_do_not_divide_the_interval_are_decoded_by_coincidence(self):
        periods = np.array([61.3, 67.7, 71.1]) * GATE_M
        reports = drawn_reports(self.AXIS, periods, GATE_M, 1, 200, 9)
        score = coincidence_score(reports, self.AXIS, periods, GATE_M, 3)
        assert score.right == 200
