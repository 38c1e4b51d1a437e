"""Rotor lines that fold, and Doppler inside the pulse, against echoes made sample by sample."""

import numpy as np
import pytest

from pycore import motion
from pycore.constants import SPEED_OF_LIGHT_M_S

WAVELENGTH_M = 0.03


def test_rotor_lines_come_down_on_the_body_where_they_reach_a_blind_speed_away():
    blind = np.array([40.0, 60.0, 80.0])
    assert motion.rotor_folds_onto_body(60.0, blind).tolist() == [True, True, False]
    assert motion.rotor_folds_onto_body(59.0, blind, np.full(3, 2.0)).tolist() == [True, True, False]
    assert motion.rotor_folds_onto_body(58.9, blind, np.full(3, 2.0)).tolist() == [True, False, False]


def test_doppler_turns_a_quarter_within_a_pulse_of_the_right_length():
    # 300 m/s at 3 cm: 20 kHz, a quarter of a turn in 12.5 us.
    assert motion.turns_in_a_pulse(300.0, WAVELENGTH_M, 12.5e-6) == pytest.approx(0.25, rel=1e-12)
    assert motion.turns_in_a_pulse(np.array([-300.0]), WAVELENGTH_M, 12.5e-6)[0] == pytest.approx(0.25, rel=1e-12)


@pytest.mark.parametrize('speed', [-600.0, 300.0])
def test_a_rising_chirp_shows_a_closing_target_too_near(speed):
    # Matched filtering of a rising sweep of 2 MHz in 50 us, its echo shifted in frequency; sampled at 100 MHz.
    pulse, bandwidth, rate = 50e-6, 2e6, 100e6
    time = np.arange(int(pulse * rate)) / rate - pulse / 2
    sent = np.exp(1j * np.pi * bandwidth / pulse * time**2)
    echo = sent * np.exp(2j * np.pi * 2 * speed / WAVELENGTH_M * time)
    found = np.abs(np.correlate(echo, sent, 'full'))
    late_s = (found.argmax() - (time.size - 1)) / rate
    shift = motion.chirp_range_shift(speed, WAVELENGTH_M, pulse, bandwidth)
    assert -late_s * SPEED_OF_LIGHT_M_S / 2 == pytest.approx(shift, abs=SPEED_OF_LIGHT_M_S / 2 / rate)
    assert abs(shift) > 50.0
