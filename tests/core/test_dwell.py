"""How the time on target is spent: sums by hand, and limits."""

import numpy as np
import pytest

from pycore import dwell
from pycore.constants import SPEED_OF_LIGHT_M_S

PRI_S, PULSES, FILL = np.array([980e-6, 860e-6]), np.array([9, 9]), np.array([1, 1])
ROUNDING = 1e-12


def test_a_beam_of_one_degree_four_at_twelve_turns_a_minute_rests_nineteen_milliseconds():
    assert dwell.time_on_target(1.4, 12.0) == pytest.approx(19.444e-3, abs=1e-6)


def test_the_opening_set_uses_its_pulses_and_fill_pulses_times_their_intervals():
    assert dwell.time_used(PRI_S, PULSES, FILL) == pytest.approx(18.40e-3, rel=ROUNDING)


def test_cpis_follow_each_other_and_leave_the_rest():
    line = dwell.timeline(PRI_S, PULSES, FILL, 19.444e-3)
    assert line.start_s.tolist() == pytest.approx([0.0, 9.80e-3])
    assert line.counted_s.tolist() == pytest.approx([0.98e-3, 10.66e-3])
    assert line.stop_s.tolist() == pytest.approx([9.80e-3, 18.40e-3])
    assert line.rest_s == pytest.approx(1.044e-3)
    assert line.stop_s[-1] == pytest.approx(dwell.time_used(PRI_S, PULSES, FILL), rel=ROUNDING)


def test_a_set_that_does_not_fit_leaves_less_than_nothing_and_none_is_left_of_no_time():
    assert dwell.timeline(PRI_S, PULSES, FILL, 15e-3).rest_s == pytest.approx(-3.4e-3)
    assert dwell.timeline(PRI_S, PULSES, FILL).rest_s is None


def test_a_set_that_takes_a_whole_part_of_the_time_fits_as_often():
    assert dwell.sets_that_fit(0.3, 0.1) == 3
    assert dwell.sets_that_fit(0.3, 0.1001) == 2
    assert dwell.sets_that_fit(0.05, 0.1) == 0


def test_filters_are_as_wide_as_the_blind_speed_over_their_number():
    width = dwell.filter_width(PRI_S, PULSES, np.array([0.107, 0.107]))
    assert (width * PULSES).tolist() == pytest.approx((0.107 / (2 * PRI_S)).tolist(), rel=ROUNDING)


def test_gates_are_whole_and_fill_only_the_open_receiver():
    # 980 - 1 - 1 us at 1 MHz: 978 gates; a whole number is not lost to the last bit of a product.
    assert dwell.gates(PRI_S, np.full(2, 1e-6), 1e-6, 0.0, np.full(2, 1e6)).tolist() == [978, 858]
    assert dwell.gates(np.array([1e-4]), np.array([1e-6]), 2e-4, 0.0, np.array([1e6])).tolist() == [0]
    assert dwell.gates(np.array([1e-4]), np.array([1e-6]), 0.5e-6, 0.0, np.array([1e6])).tolist() == [98]


def test_cells_are_gates_times_filters_over_the_time_used():
    assert dwell.cells_per_second(np.array([978, 858]), PULSES, 18.4e-3) == pytest.approx(9 * 1836 / 18.4e-3)


def test_cells_of_the_largest_plan_fit_the_short_whole_numbers_of_a_browser():
    gates, pulses = np.array([1_000_000], dtype=np.int32), np.array([4096], dtype=np.int32)
    assert dwell.cells_per_second(gates, pulses, 1.0) == 4.096e9


def test_the_mean_duty_lies_between_the_shares_of_the_intervals_and_below_the_largest():
    sent = np.array([1e-6, 3e-6])
    mean = dwell.mean_duty(sent, PRI_S, PULSES + FILL)
    assert mean == pytest.approx(4e-6 / 1840e-6)
    assert dwell.largest_duty(sent, PRI_S) == pytest.approx(3 / 860)
    assert dwell.mean_duty(sent[:1], PRI_S[:1], np.array([10])) == pytest.approx(1 / 980)


def test_a_target_walks_a_gate_in_the_time_that_its_speed_takes_for_one():
    gate_m = SPEED_OF_LIGHT_M_S / 2 / 1e6
    assert dwell.range_walk(300.0, gate_m / 300.0, 1e6) == pytest.approx(1.0, rel=ROUNDING)
    assert dwell.range_walk(-300.0, np.array([1e-2]), 1e6) == dwell.range_walk(300.0, np.array([1e-2]), 1e6)
