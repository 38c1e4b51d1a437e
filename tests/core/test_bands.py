"""Letter bands: no gaps, and one letter for every carrier."""

import math

import pytest

from pycore.bands import BANDS, band


def test_bands_follow_each_other_without_gaps():
    assert all(lower.high_hz == upper.low_hz for lower, upper in zip(BANDS, BANDS[1:], strict=False))


@pytest.mark.parametrize('one', BANDS, ids=lambda one: one.name)
def test_a_band_begins_at_its_lower_edge_and_ends_just_below_its_upper_one(one):
    assert band(one.low_hz) == one.name
    assert band(math.nextafter(one.high_hz, 0.0)) == one.name


def test_the_last_band_is_closed_and_nothing_lies_outside():
    assert band(300e9) == 'mm'
    assert band(math.nextafter(300e9, math.inf)) is None
    assert band(math.nextafter(3e6, 0.0)) is None
