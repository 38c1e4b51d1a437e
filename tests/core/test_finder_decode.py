"""What the search takes for decoding is what the exact sweep says."""

from dataclasses import replace
from fractions import Fraction
from itertools import combinations
from math import lcm

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from pycore.finder.decode import Decoder
from pycore.finder.limits import Limits, Place

PLACE = Place(0.03, 1e-6, 17.0, carrier_hz=9.993e9, bandwidth_hz=2e6, pulses=8, fill_pulses=1)


def limits(n, m, **more):
    given_ = {'decode': 'blur', 'decode_m': 30_000.0, **more}
    return Limits((PLACE,) * n, m, 10**7, (200, 330), (0.0, 30e3), (0.0, 300.0), **given_)


@st.composite
def drawn(draw):
    n = draw(st.integers(2, 5))
    pris = draw(st.lists(st.integers(200, 330), min_size=n, max_size=n, unique=True))
    some = limits(
        n,
        draw(st.integers(1, n)),
        decode=draw(st.sampled_from(['blur', 'exact'])),
        decode_m=draw(st.sampled_from([None, 3_000.0, 20_000.0, 60_000.0])),
        decode_m_s=draw(st.sampled_from([None, 40.0, 200.0, 700.0])),
        blur_gates=draw(st.sampled_from([None, Fraction(1, 2), Fraction(3, 2)])),
        decode_motion=draw(st.booleans()),
    )
    return some, pris


@settings(max_examples=200, deadline=None)
@given(case=drawn())
def test_the_sieve_keeps_every_set_that_decodes(case):
    some, pris = case
    for remembered in (10, 10**9):
        decoder = Decoder(some, remembered)
        may = decoder.sieve([(0, pri) for pri in pris[:-1]], 0, np.array(pris[-1:]))[0]
        assert may or not decoder.decodes(tuple(pris))


@settings(max_examples=150, deadline=None)
@given(case=drawn())
def test_in_range_without_motion_the_sieve_is_the_rule_itself(case):
    some, pris = case
    decoder = Decoder(replace(some, decode_motion=False, decode_m_s=None), 10)
    held = [(0, pri) for pri in pris[:-1]]
    assert decoder.sieve(held, 0, np.arange(200, 331))[pris[-1] - 200] == decoder.decodes(tuple(pris))


@settings(max_examples=100, deadline=None)
@given(case=drawn())
def test_a_set_decodes_exactly_where_it_is_not_short_and_where_its_span_reaches(case):
    some, pris = case
    decoder, pris = Decoder(some, 10), tuple(pris)
    assert decoder.decodes(pris) == (decoder.short(pris) == 0.0)
    ranges, speeds = decoder.spans(pris)
    reach = (ranges.exact, speeds.exact) if some.decode == 'exact' else (ranges.blurred, speeds.blurred)
    wanted = (some.decode_m, some.decode_m_s)
    reached = [b is None or a is None or a >= b * (1 - 1e-12) for a, b in zip(reach, wanted, strict=True)]
    assert decoder.decodes(pris) == all(reached)


def test_every_triple_of_the_published_kind_is_asked_for_its_common_multiple():
    place = replace(PLACE, bandwidth_hz=1e6)
    some = Limits((place,) * 4, 3, 10**6, (50, 95), (0.0, 185_200.0), (0.0, 1500.0), decode='exact', decode_m=185_200.0)
    held = [(0, 54), (0, 60), (0, 90)]
    may = Decoder(some, 46).sieve(held, 0, np.arange(50, 96))
    expected = [
        min(lcm(*few) for few in combinations((54, 60, 90, last), 3)) >= 185_200.0 * 2e6 / 299_792_458.0
        for last in range(50, 96)
    ]
    assert may.tolist() == expected
    assert not any(expected)  # 54, 60 and 90 meet at 540 us themselves


def test_one_prf_alone_confuses_from_its_own_interval_on():
    # 1 of 2, whole gates of 5 counts, blur half a gate of 5 counts: T - 2.5 counts must reach 2 R/c = 200.138 counts.
    some = limits(2, 1, decode_m=3_000.0)
    may = Decoder(some, 131).sieve([], 0, np.array([200, 202, 203, 205, 206]))
    assert may.tolist() == [False, False, False, True, True]


@pytest.mark.parametrize('motion', [False, True])
def test_motion_only_ever_takes_away(motion):
    some = limits(4, 2, decode_m=20_000.0, decode_motion=motion)
    decoder, still = Decoder(some, 10), Decoder(replace(some, decode_motion=False), 10)
    for pris in ((201, 222, 257, 301), (200, 240, 280, 320), (211, 223, 227, 229)):
        assert still.decodes(pris) or not decoder.decodes(pris)
