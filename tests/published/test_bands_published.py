"""Band letters against IEEE Std 521-2002, tables 1 and 2, as transcribed on a public web page (read there)."""

import pytest

from pycore.bands import BANDS, band

NOMINAL_GHZ = {
    'HF': (0.003, 0.030),
    'VHF': (0.030, 0.300),
    'UHF': (0.300, 1.0),
    'L': (1, 2),
    'S': (2, 4),
    'C': (4, 8),
    'X': (8, 12),
    'Ku': (12, 18),
    'K': (18, 27),
    'Ka': (27, 40),
    'V': (40, 75),
    'W': (75, 110),
    'mm': (110, 300),
}
# Wavelength edges printed beside them: HF 100 to 10 m, C 7.5 to 3.75 cm, Ku 2.50 to 1.67 cm, V 7.5 to 4.0 mm, W 4.0 to
# 2.7 mm; printed with c = 3e8 m/s and rounded to the digits shown.
PRINTED_WAVELENGTHS_M = {
    'HF': (100, 10),
    'C': (0.075, 0.0375),
    'Ku': (0.0250, 0.0167),
    'V': (0.0075, 0.0040),
    'W': (0.0040, 0.0027),
}
ROUNDED = 0.02
"""Relative size of half a unit in the last digit of the coarsest printed wavelength (2.7 mm)."""


def test_all_thirteen_bands_have_their_printed_edges():
    assert len(NOMINAL_GHZ) == 13
    found = {one.name: (one.low_hz, one.high_hz) for one in BANDS}
    assert list(found) == list(NOMINAL_GHZ)
    for name, (low, high) in NOMINAL_GHZ.items():
        assert found[name] == pytest.approx((low * 1e9, high * 1e9), rel=1e-12)


@pytest.mark.parametrize('name', PRINTED_WAVELENGTHS_M)
def test_wavelengths_of_the_edges_are_the_printed_ones(name):
    one = next(each for each in BANDS if each.name == name)
    assert (3e8 / one.low_hz, 3e8 / one.high_hz) == pytest.approx(PRINTED_WAVELENGTHS_M[name], rel=ROUNDED)


def test_an_edge_belongs_to_the_upper_band_and_nothing_lies_outside_all():
    assert [band(value) for value in (8e9, 7.999e9, 12e9)] == ['X', 'C', 'Ku']
    assert band(2.999e6) is None
    assert band(300e9) == 'mm'
    assert band(300.001e9) is None


def test_bands_follow_each_other_without_gaps():
    assert [one.high_hz for one in BANDS[:-1]] == [one.low_hz for one in BANDS[1:]]
