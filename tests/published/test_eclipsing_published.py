"""Eclipsing against published values, each with its source beside it.

[R14] M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., McGraw-Hill 2014; pages of the e-book.
"Derived" marks closed forms for a delay that is uniform over one interval, the receiver open whenever the radar does
not send; checked when they were derived by an average over 2e5 delays.
"""

import pytest

from pycore import eclipsing
from pycore.constants import SPEED_OF_LIGHT_M_S

HALF_C = SPEED_OF_LIGHT_M_S / 2
LAST_DIGIT_DB = 0.0006


@pytest.mark.parametrize(('delay_us', 'lost'), [(5.0, 0.5), (60.0, 0.0), (95.0, 0.5)])
def test_an_echo_after_the_pulse_one_in_the_clear_and_one_under_the_next_pulse(delay_us, lost):
    # [R14] p. 394: 50 %, 0 %, 50 % eclipsed, by linear overlap; here 10 us in 100 us.
    share = eclipsing.received_share(HALF_C * delay_us * 1e-6, 100e-6, 10e-6, 0.0, 0.0)
    assert 1 - share == pytest.approx(lost, abs=1e-9)


@pytest.mark.parametrize(
    ('duty', 'whole', 'adapted_db', 'fixed_db'),
    [
        (0.05, 0.9, 0.223, 0.300),
        (0.1, 0.8, 0.458, 0.621),
        (0.2, 0.6, 0.969, 1.347),
        (0.3, 0.4, 1.549, 2.218),
        (0.5, 0.0, 3.010, 4.771),
    ],
)
def test_means_over_all_delays(duty, whole, adapted_db, fixed_db):
    # Derived: uneclipsed 1 - 2d; mean share 1 - d (only the received part integrated); mean square 1 - 4d/3 (a filter
    # for the whole pulse). No source prints numbers.
    pri_s = 1e-4
    assert eclipsing.whole_share(pri_s, duty * pri_s) == pytest.approx(whole, abs=1e-12)
    assert eclipsing.mean_eclipsing_loss(pri_s, duty * pri_s, form='part') == pytest.approx(
        adapted_db, abs=LAST_DIGIT_DB
    )
    assert eclipsing.mean_eclipsing_loss(pri_s, duty * pri_s, form='whole') == pytest.approx(
        fixed_db, abs=LAST_DIGIT_DB
    )


def test_recovery_and_guard_take_their_share_of_the_mean():
    # Derived: the mean share over one interval is 1 - (τ + recovery + guard)/T.
    assert eclipsing.mean_received(100e-6, 10e-6, 7e-6, 3e-6) == pytest.approx(0.8, rel=1e-12)


def test_half_an_echo_costs_six_or_three_decibels():
    # Common practice: 20 log10 2 and 10 log10 2.
    assert eclipsing.eclipsing_loss(0.5, 'whole') == pytest.approx(6.02, abs=0.005)
    assert eclipsing.eclipsing_loss(0.5, 'part') == pytest.approx(3.01, abs=0.005)
