"""Clutter in the gates and in the filters: by matrices, by plain sums, and by what must never happen."""

import math
from dataclasses import replace

import numpy as np
import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from pycore import bank, clutter, clutter_pieces, covered, scnr, visibility
from pycore.clutter import Clutter
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.cpi import cpis
from pycore.patterns import sweep
from pycore.spans import Spans

LAMBDA = SPEED_OF_LIGHT_M_S / 2.8e9
HUNDREDTH = 0.005  # half of the last digit that the conventions print [m/s]
ROUNDING = 1e-9
SURFACE = Clutter('surface', 45.0, 10e3, (0.0, 40e3), 0.0, 0.3, 3.0)
RAIN = Clutter('rain', 27.5, 20e3, (15e3, 45e3), -10.0, 2.0, 2.0)


def a_cpi(pri_s=980e-6, pulses=9, name='chebyshev', fill=1, notch_m_s=6.0):
    return cpis(pri_s, LAMBDA, 1e-6, 1e6, notch_m_s, pulses, fill, name, 40.0)[0]


def ratio_of(db):
    return 10 ** (db / 10)


@pytest.mark.parametrize(('pri_us', 'half_width_m_s'), [(980, 14.03), (860, 15.28)])
def test_rain_covers_what_the_conventions_print(pri_us, half_width_m_s):
    leak = covered.leakage(a_cpi(pri_us * 1e-6), 2.0)
    assert covered.covered_half_width(leak, ratio_of(27.5)) == pytest.approx(half_width_m_s, abs=HUNDREDTH)


def plain_half_width(cpi, spread, ratio, points=20_001):
    """The last offset of a dense grid where the residue, by the covariance matrix, is above the noise."""
    offset = np.linspace(0.0, cpi.blind_speed_m_s / 2, points)
    k = np.arange(cpi.pulses)
    lag = (k[:, None] - k) * cpi.pri_s
    cover = np.exp(-8 * (np.pi * spread * lag / LAMBDA) ** 2)
    steered = cpi.weights * np.exp(4j * np.pi * offset[:, None] * k * cpi.pri_s / LAMBDA)
    passed = np.einsum('oa,oa->o', steered.conj() @ cover, steered).real / (cpi.weights**2).sum()
    above = np.flatnonzero(ratio * passed > 1.0)
    return offset[above[-1]] if above.size else 0.0, offset[1]


@settings(max_examples=40, deadline=None)
@given(
    st.floats(-10.0, 70.0),
    st.one_of(st.just(0.0), st.floats(0.0, 8.0)),
    st.integers(1, 12),
    st.sampled_from(['rectangular', 'hamming', 'chebyshev']),
)
def test_the_covered_half_width_is_where_the_residue_last_falls_below_the_noise(db, spread, pulses, name):
    cpi = a_cpi(pulses=pulses, name=name)
    found = covered.covered_half_width(covered.leakage(cpi, spread), ratio_of(db))
    expected, step = plain_half_width(cpi, spread, ratio_of(db))
    assert expected - 1e-6 <= found <= expected + 1.01 * step


def test_a_sidelobe_that_just_rises_above_the_noise_is_covered_to_its_top():
    # 13 uniform pulses: the fourth sidelobe's top, between the points that are looked at first
    cpi = a_cpi(pulses=13, name='rectangular')
    leak = covered.leakage(cpi, 0.0)
    turn = np.linspace(4.3 / 13, 4.7 / 13, 40_001)
    height = (np.sin(13 * np.pi * turn) / np.sin(np.pi * turn)) ** 2 / 13
    top, place = height.max(), turn[height.argmax()] * cpi.blind_speed_m_s
    above, below = (covered.covered_half_width(leak, factor / top) for factor in (1 + 1e-7, 1 - 1e-7))
    assert above == pytest.approx(place, abs=0.01)
    assert below < place - 0.5 * cpi.blind_speed_m_s / 13


@pytest.mark.parametrize('name', ['rectangular', 'hamming', 'chebyshev'])
def test_many_ratios_at_once_cover_what_each_covers_alone(name):
    leak, ratios = covered.leakage(a_cpi(pulses=16, name=name), 0.3), 10 ** np.linspace(-3.0, 7.0, 40)
    each = [covered.covered_half_width(leak, ratio) for ratio in ratios.tolist()]
    assert covered.covered_half_width(leak, ratios) == pytest.approx(each, abs=1e-9)


@settings(deadline=None)
@given(st.floats(-20.0, 80.0), st.floats(0.0, 10.0), st.floats(0.0, 4.0))
def test_stronger_clutter_never_covers_less(db, more_db, spread):
    leak = covered.leakage(a_cpi(), spread)
    weak, strong = (covered.covered_half_width(leak, ratio_of(level)) for level in (db, db + more_db))
    assert strong >= weak - ROUNDING


def test_clutter_above_the_sidelobes_covers_every_filter_and_below_the_noise_none():
    cpi = a_cpi()
    leak = covered.leakage(cpi, 0.3)
    assert covered.covered_half_width(leak, ratio_of(60.0)) == cpi.blind_speed_m_s / 2
    assert covered.covered_half_width(leak, ratio_of(-10.0)) == 0.0
    assert covered.covered_half_width(leak, 0.0) == 0.0


def test_clutter_falls_with_its_power_of_range_inside_its_interval_only():
    found = clutter.clutter_to_noise(RAIN, np.array([14.9e3, 15e3, 40e3, 45.1e3]), 225.0)
    assert found == pytest.approx([0.0, ratio_of(27.5) * (20 / 15) ** 2, ratio_of(27.5) / 4, 0.0])


def test_clutter_is_held_constant_nearer_than_the_first_opening():
    found = clutter.clutter_to_noise(SURFACE, np.array([0.0, 100.0, 1e3]), 1e3, factor=2.0)
    assert found == pytest.approx(np.full(3, 2.0 * ratio_of(45.0) * 1e3))


def test_clutter_goes_with_the_energy_and_the_length_of_the_gate():
    assert clutter.pulse_factor(RAIN, np.array([1e-6, 4e-6]), np.array([1e6, 2e6]), 1e-6, 1e6).tolist() == [1.0, 2.0]
    fixed = replace(RAIN, at_pulse_s=2e-6)
    assert clutter.pulse_factor(fixed, 4e-6, 1e6, 1e-6, 1e6) == 2.0


@settings(deadline=None)
@given(st.floats(0.0, 200e3), st.floats(5e3, 160e3), st.floats(0.0, 50e3), st.floats(0.0, 90e3))
def test_a_gate_holds_clutter_from_every_whole_number_of_unambiguous_ranges_away(target_m, reach_m, near_m, long_m):
    patch = replace(RAIN, range_m=(near_m, near_m + long_m))
    source = target_m % reach_m + np.arange(0, 60) * reach_m
    expected = clutter.clutter_to_noise(patch, source, 300.0).sum()
    assert clutter.folded_clutter_to_noise(patch, target_m, reach_m, 300.0) == pytest.approx(expected, rel=1e-9)


def test_near_clutter_lies_under_a_target_beyond_the_unambiguous_range():
    reach_m = 0.5 * SPEED_OF_LIGHT_M_S * 200e-6  # 30 km: a target at 40 km shares its gate with 10 km
    found = clutter.folded_clutter_to_noise(SURFACE, reach_m + 10e3, reach_m, 225.0)
    beyond = clutter.clutter_to_noise(SURFACE, reach_m + 10e3, 225.0)
    assert found == pytest.approx(ratio_of(45.0) + beyond)


def test_fill_pulses_by_hand():
    # 860 us then 980 us, clutter to 140 km comes back after 934 us: the 980 us CPI waits one interval for the
    # echoes of 860 us pulses, and the 860 us CPI one for its own
    delay_s = 2 * 140e3 / SPEED_OF_LIGHT_M_S
    assert clutter.fill_needed(delay_s, np.array([860e-6, 980e-6]), 1e-6).tolist() == [1, 1]
    assert clutter.fill_needed(2 * 100e3 / SPEED_OF_LIGHT_M_S, np.array([860e-6, 980e-6]), 1e-6).tolist() == [0, 0]
    assert clutter.fill_needed(2.5e-3, np.array([1e-3]), 1e-6).tolist() == [2]


def test_a_late_echo_misses_the_first_pulses_that_fill_pulses_do_not_cover():
    cpi = a_cpi(100e-6, pulses=10, fill=2)  # R_u 14.99 km
    share = clutter.late_share(cpi, np.array([10e3, 40e3, 50e3, 1000e3]))
    assert share.tolist() == [1.0, 1.0, 0.9, 0.0]


def test_the_altitude_return_stands_at_the_height_and_recedes_with_the_speed_along_the_beam():
    range_m, speed_m_s = clutter.altitude_return(3e3, 200.0, 60.0)
    assert (range_m, speed_m_s) == (3e3, pytest.approx(-100.0))


def plain_scnr(cpi, speed, signal, patches, ratio, received):
    """The best filter's ratio, by matrices as they are written."""
    k = np.arange(cpi.pulses)
    lag = (k[:, None] - k) * cpi.pri_s
    noise = np.eye(cpi.pulses, dtype=complex)
    for patch, level in zip(patches, ratio, strict=True):
        width = np.exp(-8 * (np.pi * patch.spread_m_s * lag / LAMBDA) ** 2)
        noise += received * level * width * np.exp(4j * np.pi * patch.speed_m_s * lag / LAMBDA)
    target = np.exp(4j * np.pi * speed * k * cpi.pri_s / LAMBDA)
    best = 0.0
    for number, centre in enumerate(bank.centres(cpi)):
        if abs(centre) >= cpi.notch_m_s:
            steered = cpi.weights * np.exp(2j * np.pi * number * k / cpi.pulses)
            power = (steered.conj() @ noise @ steered).real
            best = max(best, received * signal * abs(steered.conj() @ target) ** 2 / power)
    return best


@settings(max_examples=40, deadline=None)
@given(
    st.integers(1, 40), st.floats(-100.0, 300.0), st.floats(-10.0, 60.0), st.floats(-10.0, 60.0), st.floats(0.0, 1.0)
)
def test_the_best_filter_is_the_best_of_all_by_matrices(pulses, speed, surface_db, rain_db, received):
    cpi, patches = a_cpi(pulses=pulses, name='hamming'), (SURFACE, RAIN)
    ratio = np.array([ratio_of(surface_db), ratio_of(rain_db)])
    expected = plain_scnr(cpi, speed, 3.0, patches, ratio, received)
    found = scnr.best_scnr(cpi, [speed], np.array([3.0]), patches, ratio[:, None], np.array([received]))
    outputs = scnr.filter_outputs(cpi, speed, 3.0, patches, ratio, received)
    assert found[0, 0] == pytest.approx(expected, rel=1e-6, abs=1e-12)
    assert expected == pytest.approx(outputs.scnr[outputs.best] if outputs.best >= 0 else 0.0, rel=1e-6, abs=1e-12)


def test_maps_of_ranges_and_speeds_get_what_each_cell_gets_alone():
    cpi, speeds = a_cpi(pulses=64), np.linspace(0.0, 90.0, 7)
    signal, received = np.array([1.0, 5.0, 2.0]), np.array([1.0, 0.3, 0.0])
    ratio = np.array([[1e4, 0.0, 10.0], [1e2, 1e5, 0.0]])
    together = scnr.best_scnr(cpi, speeds, signal, (SURFACE, RAIN), ratio, received)
    for row in range(3):
        for column, speed in enumerate(speeds):
            outputs = scnr.filter_outputs(cpi, speed, signal[row], (SURFACE, RAIN), ratio[:, row], received[row])
            assert together[row, column] == pytest.approx(outputs.scnr[outputs.best], rel=1e-9, abs=1e-15)


@settings(max_examples=30, deadline=None)
@given(st.floats(0.0, 90.0), st.floats(0.2, 6.0), st.sampled_from(['rectangular', 'hamming']))
def test_a_filter_far_from_the_target_is_taken_where_rain_drowns_the_near_ones(rain_db, spread, name):
    cpi, speeds, rain = a_cpi(pulses=64, name=name), np.linspace(-40.0, 10.0, 60), replace(RAIN, spread_m_s=spread)
    ratio = np.array([[ratio_of(rain_db)]])
    found = scnr.best_scnr(cpi, speeds, np.ones(1), (rain,), ratio, np.ones(1))[0]
    usable = bank.outside_notch(cpi, bank.centres(cpi))
    quiet = 1.0 / (1.0 + ratio[0] * bank.clutter_gain(cpi, rain.speed_m_s, spread))
    assert found == pytest.approx((bank.target_gain(cpi, speeds) * quiet)[:, usable].max(axis=1), rel=1e-9)


def test_what_a_target_is_lost_to_is_named():
    cpi, names = a_cpi(), ('surface', 'rain')
    at = {'rain': -9.0 + cpi.blind_speed_m_s, 'clear': 22.0}
    ratio = np.array([0.0, ratio_of(27.5)])
    lost = {
        where: scnr.lost_to(scnr.filter_outputs(cpi, v, 20.0, (SURFACE, RAIN), ratio), 40.0, names)
        for where, v in at.items()
    }
    assert lost == {'rain': 'rain', 'clear': None}
    assert scnr.lost_to(scnr.filter_outputs(cpi, 22.0, 1.0, (SURFACE, RAIN), ratio), 40.0, names) == 'noise'
    shut = a_cpi(notch_m_s=40.0)
    assert scnr.lost_to(scnr.filter_outputs(shut, 22.0, 9.0, (SURFACE, RAIN), ratio), 40.0, names) == 'notch'


def test_inside_the_loudest_range_ground_clutter_is_above_the_noise_in_every_filter():
    cpi = a_cpi(notch_m_s=0.0)
    edge = scnr.loudest_range(cpi, SURFACE, 225.0)
    for range_m, is_above in ((0.999 * edge, True), (1.001 * edge, False)):
        level = clutter.clutter_to_noise(SURFACE, range_m, 225.0)
        assert (level * bank.clutter_gain(cpi, 0.0, 0.3).min() > 1.0) == is_above
    assert math.isnan(scnr.loudest_range(cpi, replace(SURFACE, cnr_db=-60.0), 225.0))
    assert scnr.loudest_range(cpi, replace(SURFACE, cnr_db=200.0), 225.0) == 40e3


def test_rain_that_recedes_looks_like_a_fast_closing_target():
    # common practice: at an unambiguous span of 60 m/s, -12 and +48 m/s share one apparent speed
    cpi = cpis(LAMBDA / 120.0, LAMBDA, 1e-6, 1e6, 6.0, 9, 1, 'hamming')[0]
    assert bank.target_gain(cpi, -12.0) == pytest.approx(bank.target_gain(cpi, 48.0), rel=1e-9, abs=1e-9)


# The visible share with clutter

RANGES, SPEEDS = (2e3, 110e3), (0.0, 300.0)
PRI_S = np.array([980e-6, 860e-6])
OPENING_M = np.array([225.0, 225.0])


def notch_clear(prfs, axis=SPEEDS):
    """Speeds clear of the notches by remainders of the definition."""
    rows = []
    for prf, cpi in enumerate(prfs):
        for turn in range(math.floor(axis[0] / cpi.blind_speed_m_s) - 1, math.ceil(axis[1] / cpi.blind_speed_m_s) + 1):
            start = max(turn * cpi.blind_speed_m_s + cpi.notch_m_s, axis[0])
            stop = min((turn + 1) * cpi.blind_speed_m_s - cpi.notch_m_s, axis[1])
            if start < stop:
                rows.append((prf, start, stop))
    return Spans(*(np.array(column) for column in zip(*rows, strict=True)))


def all_ranges(n):
    return Spans(np.arange(n), np.full(n, RANGES[0]), np.full(n, RANGES[1]))


def share_with(patches, pri_s=PRI_S, ranges=None, factor=1.0, m=1, opening_m=225.0):
    prfs = cpis(pri_s, LAMBDA, 1e-6, 1e6, 6.0, 9, 1, 'chebyshev', 40.0)
    n = len(prfs)
    scale = np.full((n, len(patches)), factor)
    pieces = clutter_pieces.clear_pieces(prfs, patches, np.full(n, opening_m), scale, notch_clear(prfs), RANGES, SPEEDS)
    ranges = ranges if ranges is not None else all_ranges(n)
    shares = visibility.pattern_shares_of_pieces(sweep(ranges, RANGES), pieces, SPEEDS, n)
    return float(shares[[bin(pattern).count('1') >= m for pattern in range(1 << n)]].sum()), pieces


def covered_at(prfs, patches, range_m, speed_m_s):
    """For each PRF whether clutter covers a cell: the definition, image by image."""
    answer = []
    for cpi in prfs:
        reach_m = 0.5 * SPEED_OF_LIGHT_M_S * cpi.pri_s
        hit = False
        for patch in patches:
            total = 0.0
            for trip in range(-200, 200):
                source = range_m + trip * reach_m
                if patch.range_m[0] <= source <= patch.range_m[1]:
                    near = max(patch.range_m[0], RANGES[0] + trip * reach_m)
                    total += float(clutter.clutter_to_noise(patch, near, 225.0))
            half = covered.covered_half_width(covered.leakage(cpi, patch.spread_m_s), total)
            off = (speed_m_s - patch.speed_m_s) % cpi.blind_speed_m_s
            hit |= min(off, cpi.blind_speed_m_s - off) < half
        answer.append(hit)
    return answer


@settings(max_examples=25, deadline=None)
@given(st.integers(100, 1200), st.integers(100, 1200), st.data())
def test_pieces_are_clear_of_clutter_exactly_where_the_definition_says(first, second, data):
    prfs = cpis(np.array([first, second]) * 1e-6, LAMBDA, 1e-6, 1e6, 6.0, 9, 1, 'chebyshev', 40.0)
    patches = (replace(SURFACE, cnr_db=20.0), RAIN)
    _, pieces = share_with(patches, np.array([first, second]) * 1e-6)
    range_m, speed_m_s = data.draw(st.floats(*RANGES)), data.draw(st.floats(*SPEEDS))
    piece = next(p for p in pieces if p.range_m[0] <= range_m <= p.range_m[1])
    assume(min(abs(range_m - end) for end in piece.range_m) > 1.0)
    hidden = covered_at(prfs, patches, range_m, speed_m_s)
    for prf in range(2):
        start, stop = piece.speeds.of(prf)
        ends = np.concatenate((start, stop, [-1.0]))
        assume(np.abs(ends - speed_m_s).min() > 1e-6)
        clear = bool(np.any((start < speed_m_s) & (speed_m_s < stop)))
        in_notch = not bank.outside_notch(prfs[prf], speed_m_s)
        assert clear == (not hidden[prf] and not in_notch)


def test_pieces_make_the_whole_range_axis_without_gaps():
    _, pieces = share_with((SURFACE, RAIN), np.array([200e-6, 170e-6, 150e-6]))
    ends = [end for piece in pieces for end in piece.range_m]
    assert ends[0] == RANGES[0]
    assert ends[-1] == RANGES[1]
    assert ends[1:-1:2] == ends[2:-1:2]


def test_without_clutter_the_share_is_that_of_the_notches():
    prfs = cpis(PRI_S, LAMBDA, 1e-6, 1e6, 6.0, 9, 1, 'chebyshev', 40.0)
    plain = visibility.visible_share(all_ranges(2), notch_clear(prfs), 2, 1, RANGES, SPEEDS)
    share, pieces = share_with(())
    assert share == pytest.approx(plain, abs=1e-12)
    assert len(pieces) == 1


def test_the_share_with_rain_by_hand():
    # 980 us alone: v_b 54.626, notch 6; rain at -10 covers 14.03 each side at the near edge (27.5 dB at 15 km),
    # so within 15 to 45 km a period loses (-24.03 … 4.03) and the notch (-6 … 6): 30.03 of 54.63, elsewhere 12
    rain = replace(RAIN, at_m=15e3)
    blind = LAMBDA / (2 * 980e-6)
    half = covered.covered_half_width(covered.leakage(a_cpi(), 2.0), ratio_of(27.5))
    speed = np.arange(0, 300, 0.001) + 0.0005
    off = np.abs(speed - blind * np.round(speed / blind))
    wet = np.abs(speed + 10 - blind * np.round((speed + 10) / blind)) < half
    expected = np.mean(off >= 6) * 78 / 108 + np.mean((off >= 6) & ~wet) * 30 / 108
    assert share_with((rain,), PRI_S[:1])[0] == pytest.approx(expected, abs=2e-5)


rains = st.builds(
    lambda near, long, db, speed, spread: Clutter('rain', db, 20e3, (near, near + long), speed, spread, 2.0),
    st.floats(0.0, 90e3),
    st.floats(100.0, 120e3),
    st.floats(-5.0, 45.0),
    st.floats(-40.0, 40.0),
    st.floats(0.1, 5.0),
)
sets_of_pris = st.lists(st.integers(120, 1200), min_size=1, max_size=3).map(lambda us: np.array(us) * 1e-6)
surfaces = st.sampled_from([(), (replace(SURFACE, cnr_db=5.0),), (SURFACE,)])


@settings(max_examples=50, deadline=None)
@given(rains, surfaces, sets_of_pris, st.floats(0.0, 15.0), st.floats(0.0, 60e3), st.floats(0.0, 1.0))
def test_a_stronger_or_longer_rain_never_raises_the_visible_share(rain, surface, pri_s, more_db, more_m, nearer):
    near, far = rain.range_m
    worse = replace(rain, cnr_db=rain.cnr_db + more_db, range_m=(near * nearer, far + more_m))
    before, after = (share_with((*surface, patch), pri_s)[0] for patch in (rain, worse))
    assert after <= before + ROUNDING


@settings(max_examples=30, deadline=None)
@given(sets_of_pris, st.floats(1.0, 30.0), st.floats(1.0, 3.0))
def test_a_longer_pulse_never_raises_the_visible_share_with_clutter(plain, pri_s, pulse_us, longer):
    # the bandwidth is kept and the patches start beyond both first openings, so that nothing is held constant
    patches = (replace(SURFACE, cnr_db=0.0, range_m=(20e3, 40e3)), RAIN)
    shares = []
    for length_s in (pulse_us * 1e-6, pulse_us * longer * 1e-6):
        spans = clear_ranges(plain, pri_s, length_s)
        opening_m = 0.5 * SPEED_OF_LIGHT_M_S * 0.5 * length_s
        factor = clutter.pulse_factor(replace(RAIN, at_pulse_s=1e-6), length_s, 1e6, length_s, 1e6)
        shares.append(share_with(patches, pri_s, spans, float(factor), opening_m=opening_m)[0])
    assert shares[1] <= shares[0] + ROUNDING


def clear_ranges(plain, pri_s, pulse_s):
    """Ranges where at least half of the echo is received, no recovery and no guard."""
    each = [
        [
            (
                0.5 * SPEED_OF_LIGHT_M_S * (k * pri + 0.5 * pulse_s),
                0.5 * SPEED_OF_LIGHT_M_S * ((k + 1) * pri - 0.5 * pulse_s),
            )
            for k in range(int(2 * RANGES[1] / SPEED_OF_LIGHT_M_S / pri) + 1)
        ]
        for pri in pri_s
    ]
    return plain.spans_of(each, RANGES)
