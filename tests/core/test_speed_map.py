"""The map of blind speeds: every row is the same plan, moved, through the ordinary path; the words are true of it."""

import json
from copy import deepcopy
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from pycore import api, columns
from pycore.columns import speed_map
from pycore.columns.classes import NAMES, classes
from pycore.columns.speed_rows import offered, up_axis
from pycore.columns.view import View, seen
from pycore.computed import Computed
from pycore.errors import InputError
from pycore.moved_plan import Moved
from pycore.plan.reading import read
from pycore.scaled_notches import blind_shares, clear_counts, common_blind_speed
from pycore.wording import SHOWN_UNITS, THIN_SPACE
from pycore.zones import centres, clear_marks

EXAMPLES = Path(__file__).parents[2] / 'webapp' / 'examples'
SIZE = {'width': 90, 'height': 40}
FINE_CLOCK_MHZ = 1000.0  # moved intervals then lie on the clock to a nanosecond


def example(name):
    return json.loads((EXAMPLES / f'{name}.json').read_text(encoding='utf-8'))['plan']


def picture(plan, up, units=None, **view):
    units = {**SHOWN_UNITS, **(units or {})}
    return columns.picture('blind-speeds', Computed(read(plan)), units, SIZE, View(up=up, **view))


def caption(plan, up, **units):
    return picture(plan, up, units)['caption'].replace(THIN_SPACE, ' ')


def moved_plan(plan, **moves):
    """The same plan with other intervals or carriers, on a clock that holds them."""
    plan = deepcopy(plan)
    plan['radar'] |= {'clock_mhz': FINE_CLOCK_MHZ, **moves.get('radar', {})}
    plan['waveform'] |= moves.get('waveform', {})
    return Computed(read(plan))


def rows_of(plan, up, count=5):
    """Values up the axis with which a plan can be read again, and the moved plans themselves."""
    moving = up_axis(Computed(read(plan)), SHOWN_UNITS, up)
    at = np.round(np.linspace(*moving.limits, count + 2)[1:-1], 3)
    pri = np.array(plan['waveform']['pri_us'])
    scale, spread, carrier = moving.moved(at)
    pris = np.round(scale[:, None] * (pri.mean() + spread[:, None] * (pri - pri.mean())), 3)
    carriers = np.multiply.outer(carrier, plan['radar']['carrier_ghz'])
    again = [
        moved_plan(plan, waveform={'pri_us': p.tolist()}, radar={'carrier_ghz': c.tolist()})
        for p, c in zip(pris, carriers, strict=True)
    ]
    return moving, at, again


@pytest.mark.parametrize('name', ['opening', 'eight-prfs', 'two-carriers', 'long-range', 'two-prf-weather'])
@pytest.mark.parametrize('up', ['pri', 'carrier'])
def test_a_row_of_dwells_is_the_count_of_the_moved_plan(name, up):
    plan = example(name)
    moving, at, again = rows_of(plan, up)
    speeds = centres(tuple(plan['coverage']['speed_mps']), 700)
    counts = Moved(read(plan)).clear_counts(moving.moved(at), speeds)
    for row, moved in zip(counts, again, strict=True):
        brute = np.bitwise_count(clear_marks(moved.sight.speeds, speeds))
        # Only a cell whose centre lies within a nanosecond's shift of an edge may differ.
        assert (row != brute).mean() < 0.005


@pytest.mark.parametrize(
    ('name', 'up'),
    [
        ('four-pulse-stagger', 'pri'),
        ('four-pulse-stagger', 'carrier'),
        ('four-pulse-stagger', 'stagger'),
        ('three-delay-stagger', 'stagger'),
    ],
)
def test_a_row_of_a_stagger_is_the_response_of_the_moved_plan(name, up):
    plan = example(name)
    moving, at, again = rows_of(plan, up)
    limits = tuple(plan['coverage']['speed_mps'])
    powers = Moved(read(plan)).powers(moving.moved(at), limits, 311)
    for row, moved in zip(powers, again, strict=True):
        np.testing.assert_allclose(row, moved.response.response.power(centres(limits, 311)), atol=2e-3)


def test_the_own_row_of_a_stagger_is_its_response_to_rounding():
    plan = example('four-pulse-stagger')
    found, one = Computed(read(plan)), np.ones(1)
    row = Moved(found.plan).powers((one, one, one), (0.0, 320.0), 500)[0]
    np.testing.assert_allclose(row, found.response.response.power(centres((0.0, 320.0), 500)), atol=1e-10)


def test_user_weights_with_a_gap_have_the_response_of_the_plan():
    plan = example('four-pulse-stagger')
    plan['doppler'] = {**plan['doppler'], 'weights': [1.0, -1.5, 0.0, 0.5]}
    found, one = Computed(read(plan)), np.ones(1)
    row = Moved(found.plan).powers((one, one, one), (-50.0, 320.0), 500)[0]
    np.testing.assert_allclose(row, found.response.response.power(centres((-50.0, 320.0), 500)), atol=1e-10)


@given(
    blind=st.lists(st.floats(5.0, 300.0), min_size=1, max_size=6),
    notch=st.floats(0.0, 40.0),
    low=st.floats(-300.0, 100.0),
    data=st.data(),
)
def test_the_share_that_is_lost_is_that_of_a_fine_row_of_cells(blind, notch, low, data):
    m = data.draw(st.integers(1, len(blind)))
    blind, notches = np.array([blind]), np.full(len(blind), notch)
    limits, count = (low, low + 400.0), 40_000
    at = centres(limits, count)
    outside = np.abs(at) >= notch
    lost = (clear_counts(blind, notches, at)[0] < m) & outside
    share = float(blind_shares(blind, notches, m, limits)[0])
    edges = 2 * blind.size * (400.0 / blind.min() + 3)
    assert share == pytest.approx(lost.sum() / outside.sum(), abs=edges / outside.sum())


def test_where_the_notch_takes_every_wanted_speed_nothing_is_left_to_lose():
    assert np.isnan(blind_shares(np.array([[100.0]]), np.array([20.0]), 1, (-10.0, 15.0))).all()
    plan = example('opening')
    plan['coverage'] = {**plan['coverage'], 'speed_mps': [0.0, 5.0]}
    plan['must_see'], plan['waveform'] = [], {'pri_us': [980, 860], 'pulses': 9}
    assert caption(plan, 'pri').startswith('Outside the notch around zero, no wanted speed is left, whatever the')


def test_the_lost_share_of_a_stagger_is_that_of_its_finding():
    for name in ('four-pulse-stagger', 'three-delay-stagger'):
        plan = example(name)
        plan['doppler']['response_min_db'] = -6.0
        found = Computed(read(plan))
        low, high = found.plan.speed_m_s
        one = np.ones(1)
        outside = (high - low) - (found.response.notch_m_s - low)
        lost = 1.0 - found.response.share_above * (high - low) / outside
        assert Moved(found.plan).lost((one, one, one))[0] == pytest.approx(lost, abs=0.01)
        assert lost > 0.02


def test_common_blind_speeds_of_two_carriers_are_blind_on_both():
    plan = read(example('two-carriers'))
    speed = common_blind_speed(plan.pri_counts, plan.clock_hz, plan.carrier_exact_hz)
    turns = 2.0 * speed * plan.pri_s / plan.wavelength_m
    np.testing.assert_allclose(turns, np.rint(turns), atol=1e-6)
    assert common_blind_speed((9800, 8600), 1e7, plan.carrier_exact_hz[:1] * 2) == pytest.approx(
        plan.wavelength_m[0] / (2 * 20e-6)
    )


def test_true_blind_speeds_of_a_single_prf_lie_in_the_middle_of_its_notches():
    plan = example('opening')
    plan['waveform'] = {'pri_us': [980], 'pulses': 9}
    plan['must_see'] = []
    found = picture(plan, 'pri')
    line, drawn = found['columns']['true-blind'], found['columns']['map']
    at = ~np.isnan(line['x'])
    blind = 299_792_458.0 / 2.8e9 / (2e-6 * line['y'][at])
    turns = line['x'][at] / blind
    np.testing.assert_allclose(turns, np.rint(turns), atol=1e-9)
    assert at.sum() > 100
    assert drawn['image'].shape == (40, 90)
    assert 'The lines are its blind speeds.' in found['caption']


def test_no_line_is_drawn_where_the_set_has_no_common_blind_speed_on_the_map():
    found = picture(example('opening'), 'pri')
    assert found['columns']['true-blind']['x'].size == 0
    assert 'lines' not in found['caption']


def test_cells_of_dwells_have_the_classes_of_the_map_of_blind_zones():
    plan = example('opening')
    found = picture(plan, 'carrier')
    moving, moved = up_axis(Computed(read(plan)), SHOWN_UNITS, 'carrier'), Moved(read(plan))
    counts = moved.clear_counts(moving.moved(moving.centres(40)), centres(tuple(plan['coverage']['speed_mps']), 90))
    np.testing.assert_array_equal(found['columns']['map']['image'], classes(counts, 2, 1))


def test_cells_of_a_stagger_are_steps_of_ten_decibels_about_the_least_response():
    plan = example('four-pulse-stagger')
    image = picture(plan, 'stagger')['columns']['map']['image']
    moving, moved = up_axis(Computed(read(plan)), SHOWN_UNITS, 'stagger'), Moved(read(plan))
    level = 10 * np.log10(np.maximum(moved.powers(moving.moved(moving.centres(40)), (0.0, 320.0), 90), 1e-30))
    expected = len(NAMES) + np.digitize(level, [-32.0, -22.0, -12.0, -2.0])
    np.testing.assert_array_equal(image, expected)
    assert set(np.unique(image)) == set(range(len(NAMES), len(NAMES) + len(speed_map.STEPS)))


def test_the_stagger_ratio_is_the_longest_interval_to_the_shortest_about_the_same_mean():
    plan = read(example('four-pulse-stagger'))
    moving = up_axis(Computed(plan), SHOWN_UNITS, 'stagger')
    ratios = np.array([1.0, 1.1, moving.own, 1.4])
    scale, spread, _ = moving.moved(ratios)
    mean = plan.pri_s.mean()
    pri = scale[:, None] * (mean + spread[:, None] * (plan.pri_s - mean))
    np.testing.assert_allclose(pri.max(axis=1) / pri.min(axis=1), ratios)
    np.testing.assert_allclose(pri.mean(axis=1), mean)
    assert moving.own == pytest.approx(1230 / 1010)
    assert moving.limits == pytest.approx((1.0, 2 * 1230 / 1010 - 1))


@pytest.mark.parametrize(
    ('pri', 'ends', 'label'),
    [
        ('us', (460.0, 1840.0), 'mean PRI (µs)'),
        ('ms', (0.46, 1.84), 'mean PRI (ms)'),
        ('Hz', (543.478, 2173.913), 'PRF of the mean PRI (Hz)'),
        ('kHz', (0.543478, 2.173913), 'PRF of the mean PRI (kHz)'),
    ],
)
def test_the_mean_interval_runs_from_half_to_twice_its_own_in_the_readers_unit(pri, ends, label):
    found = picture(example('opening'), 'pri', {'pri': pri})
    assert found['ranges']['y'] == pytest.approx(ends, rel=1e-5)
    assert found['labels']['y'] == label


def test_frequency_up_the_axis_shows_the_same_plan_upside_down():
    plan = Computed(read(example('opening')))
    us, hz = (up_axis(plan, {**SHOWN_UNITS, 'pri': unit}, 'pri') for unit in ('us', 'Hz'))
    np.testing.assert_allclose(us.moved(np.array([460.0, 920.0, 1500.0])), hz.moved(1e6 / np.array([460.0, 920, 1500])))


def test_no_interval_becomes_as_short_as_its_pulse_and_no_carrier_leaves_its_band():
    plan = example('opening')
    plan['radar'] = {**plan['radar'], 'pulse_us': 600.0}
    found = up_axis(Computed(read(plan)), SHOWN_UNITS, 'pri')
    assert found.limits[0] == pytest.approx(920 * 600 / 860)
    assert found.limits[0] > 920 * 600 / 860
    stagger = example('four-pulse-stagger')
    stagger['radar'] = {**stagger['radar'], 'pulse_us': 1000.0}
    ratio = up_axis(Computed(read(stagger)), SHOWN_UNITS, 'stagger')
    _, spread, _ = ratio.moved(np.array([ratio.limits[1]]))
    assert 1115 + spread[0] * (1010 - 1115) == pytest.approx(1000.0)
    for carrier, band in ((2.0, (2, 4)), (3.999, (2, 4)), (300.0, (110, 300)), (0.003, (0.003, 0.03))):
        plan = {**example('four-pulse-stagger'), 'radar': {'carrier_ghz': carrier}}
        assert up_axis(Computed(read(plan)), SHOWN_UNITS, 'carrier').limits == pytest.approx(band)


def test_only_a_stagger_of_unequal_intervals_offers_a_stagger_ratio():
    def names(plan):
        return [name for name, _ in offered(Computed(read(plan)), SHOWN_UNITS)]

    equal = example('four-pulse-stagger')
    equal['waveform'] = {**equal['waveform'], 'pri_us': [1000.0, 1000.0]}
    assert names(example('four-pulse-stagger')) == ['own', 'pri', 'carrier', 'stagger']
    assert names(equal) == names(example('opening')) == ['own', 'pri', 'carrier']
    assert picture(equal, 'stagger')['choices'][1]['now'] == 'own'


def test_the_plans_own_row_is_marked_and_named():
    found = picture(example('opening'), 'pri')['columns']
    assert found['own'] == {'x0': [0.0], 'x1': [300.0], 'y': [920.0]}
    assert [text.replace(THIN_SPACE, ' ') for text in found['names']['text']] == ['this plan, 920 µs']


@pytest.mark.parametrize(
    ('plan', 'up', 'said'),
    [
        ('opening', 'pri', 'Outside the notch around zero, every speed is clear on at least one of the two PRFs only '
         'at a mean PRI of 460 to 584 µs. This plan, at 920 µs, loses 1.49 %. All intervals are scaled together; '
         'pulse and notch stay.'),
        ('opening', 'carrier', 'Outside the notch around zero, some speed is blind on both PRFs whatever the carrier, '
         '2.00 to 4.00 GHz; the fewest are lost at 2.00 GHz, 0.452 %. This plan, at 2.8 GHz, loses 1.49 %. Only the '
         'carrier is moved; the notch stays.'),
        ('eight-prfs', 'pri', 'Outside the notch around zero, every speed is clear on at least three of the eight PRFs '
         'whatever the mean PRI, 39.6 to 158 µs. This plan, at 79.21 µs, loses none. All intervals are scaled '
         'together; pulse and notch stay.'),
        ('four-pulse-stagger', 'stagger', 'Outside the notch around zero, every speed stands at or above −12 dB only '
         'at a stagger ratio of 1.16 to 1.44. This plan, at 1.218, loses none. Dark is below −12 dB, each step 10 dB. '
         'The intervals are spread about the same mean; at 1 they are equal.'),
    ],
)  # fmt: skip
def test_the_caption_says_where_nothing_is_lost_and_what_this_plan_loses(plan, up, said):
    assert caption(example(plan), up) == said


def test_stretches_that_are_named_lose_nothing_inside_and_something_outside():
    plan = example('opening')
    moving, moved = up_axis(Computed(read(plan)), SHOWN_UNITS, 'pri'), Moved(read(plan))
    assert moved.lost(moving.moved(np.array([461.0, 520.0, 583.0]))).tolist() == [0.0, 0.0, 0.0]
    assert moved.lost(moving.moved(np.array([586.0])))[0] > 0.0


def test_two_stretches_are_both_named_and_more_are_counted():
    two, many = example('opening'), example('long-range')
    for plan, speeds in ((two, [40.0, 60.0]), (many, [60.0, 80.0])):
        plan['coverage'], plan['must_see'] = {**plan['coverage'], 'speed_mps': speeds}, []
    assert 'only at a mean PRI of 460 to 868 µs or 1480 to 1740 µs.' in caption(two, 'pri')
    assert 'only in three stretches of the mean PRI, 3500 µs in all; the widest is 1950 to 3570 µs.' in caption(
        many, 'pri'
    )


def test_the_table_has_the_plans_own_row_with_what_it_loses():
    rows = picture(example('opening'), 'pri')['table']['rows']
    own = [row for row in rows if row[2]]
    assert own == [['920', f'1.49{THIN_SPACE}%', 'this plan']]
    assert len(rows) == 13


def test_a_kept_plan_is_left_out_of_the_map_and_the_caption_says_so():
    kept = Computed(read(example('coastal')))
    found = picture(example('opening'), 'pri', kept=kept)
    assert found['caption'].endswith('The kept plan is not drawn on the map.')
    assert all(np.size(column) == 0 for column in found['columns']['kept-blind'].values())
    assert 'kept' not in picture(example('opening'), 'pri')['caption']


def test_every_choice_fills_the_same_sources_and_only_the_map_has_an_image():
    for name in ('opening', 'four-pulse-stagger'):
        sources = {up: picture(example(name), up)['columns'] for up in ('own', 'pri', 'carrier')}
        assert len({tuple(sorted(found)) for found in sources.values()}) == 1
        assert [len(found['map']['image']) for found in sources.values()] == [0, 40, 40]


def test_with_the_carrier_up_the_axis_the_doppler_scale_is_this_plans():
    found = picture(example('opening'), 'carrier', axis='doppler')
    assert found['labels']['x'].replace(THIN_SPACE, ' ') == 'Doppler frequency at 2.8 GHz (kHz)'
    assert 'this plan’s' in picture(example('opening'), 'pri', axis='ratio')['labels']['x']


def test_where_only_the_target_moves_the_map_stays():
    target = {'range_km': 60.0, 'speed_mps': 120.0}
    looked = api.look(example('opening'), marked=['blind-speeds'], view={'up': 'pri', 'target': target})
    assert list(looked['figures']['blind-speeds']['columns']) == ['target']
    assert looked['figures']['blind-speeds']['columns']['target']['x'].tolist() == [120.0]
    assert looked['figures']['blind-speeds']['columns']['target']['y1'].tolist() == [1840.0]


@pytest.mark.parametrize('value', ['colour', 7, ['pri']])
def test_what_cannot_go_up_the_axis_is_refused_by_name(value):
    with pytest.raises(InputError) as refused:
        seen(Computed(read(example('opening'))), {'up': value})
    assert refused.value.field == 'up'


def test_what_is_chosen_for_the_blind_speeds_travels_in_the_link():
    fragment = api.note(example('opening'), view={'axis': 'doppler', 'up': 'carrier'})['link']
    assert '&axis=doppler&up=carrier&end=' in fragment
    answer = api.note(opened=fragment, figures=['blind-speeds'])
    assert answer['link'] == fragment
    assert answer['opened']['choices'] == {'axis': 'doppler', 'up': 'carrier'}
    assert [choice['now'] for choice in answer['figures']['blind-speeds']['choices']] == ['doppler', 'carrier']


def test_a_link_that_chooses_nothing_opens_to_what_stands_there_anyway():
    fragment = api.note(example('opening'))['link']
    assert 'axis=' not in fragment
    assert 'up=' not in fragment
    answer = api.note(opened=fragment, figures=['blind-speeds'], view={'axis': 'ratio', 'up': 'pri'})
    assert [choice['now'] for choice in answer['figures']['blind-speeds']['choices']] == ['speed', 'own']


@pytest.mark.parametrize(('name', 'text'), [('up', 'colour'), ('axis', ''), ('up', 'PRI')])
def test_a_choice_in_a_link_that_is_none_is_named_and_the_plan_opens_without(name, text):
    opened = api.note(opened=f'v=1&pri=980,860us&{name}={text}')['opened']
    assert [(one['key'], one['text']) for one in opened['refused']] == [(name, text)]
    assert opened['refused'][0]['message'].startswith(f'{name} in a link must be one of ')
    assert opened['choices'] == {'axis': 'speed', 'up': 'own'}


@pytest.mark.parametrize(
    ('name', 'up', 'x', 'y', 'said'),
    [
        ('opening', 'pri', 70.0, 700.0, '70 m/s at a mean PRI of 700 µs: clear on one of two.'),
        ('opening', 'pri', 29.0, 1840.0, '29 m/s at a mean PRI of 1840 µs: in the notch on both.'),
        ('opening', 'carrier', 25.0, 2.0, '25 m/s at a carrier of 2 GHz: clear on both.'),
        ('opening', 'carrier', 0.0, None, '0 m/s at a carrier of 2.8 GHz: in the notch on both.'),
        (
            'four-pulse-stagger',
            'stagger',
            45.0,
            1.0,
            '45 m/s at a stagger ratio of 1: response −51.9 dB, below the least.',
        ),
        ('opening', 'pri', None, 700.0, ''),
    ],
)
def test_the_line_under_the_map_speaks_of_the_row_that_is_pointed_at(name, up, x, y, said):
    assert api.here(example(name), 'blind-speeds', x, y, up=up)['text'].replace(THIN_SPACE, ' ') == said


def test_without_a_map_the_line_speaks_of_the_plan_itself():
    plain = api.here(example('opening'), 'blind-speeds', 70.0, 2.0)
    assert api.here(example('opening'), 'blind-speeds', 70.0, 2.0, up='stagger') == plain
    assert plain['text'].endswith('clear on both.')
