"""Columns of the figures: they fit the built documents by name, and show what was computed."""

import re

import numpy as np
import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from pycore import columns, zones
from pycore.columns import blind_zones, classes
from pycore.columns.axes import decade_ticks, interval_name, range_axis, speed_axis
from pycore.columns.blind_parts import avoidable, gaps
from pycore.columns.received import received_corners
from pycore.columns.view import View
from pycore.computed import Computed
from pycore.eclipsing import received_share
from pycore.patterns import sweep
from pycore.plan.reading import read
from pycore.spans import Spans
from pycore.wording import SHOWN_UNITS, THIN_SPACE

OPENING = {
    'radar': {'carrier_ghz': 2.8, 'pulse_us': 1.0, 'recovery_us': 1.0},
    'coverage': {'range_km': [2.0, 110.0], 'speed_mps': [0.0, 300.0]},
    'must_see': [{'name': 'final approach', 'range_km': [4.0, 30.0], 'speed_mps': [40.0, 110.0], 'visible_pct': 100.0}],
    'waveform': {'pri_us': [980.0, 860.0], 'pulses': 9, 'detect_m': 1},
    'doppler': {'notch_mps': 6.0},
}
STAGGER = {
    **OPENING,
    'coverage': {'range_km': [1.0, 180.0], 'speed_mps': [0.0, 1200.0]},
    'waveform': {'kind': 'stagger', 'pri_us': [950.0, 1140.0, 1026.0, 1178.0], 'pulses': 20},
}
FEW = settings(max_examples=30, deadline=None, suppress_health_check=[HealthCheck.too_slow])
ONE_MILLIMETRE = 1e-3
SIZE = {'width': 160, 'height': 90}
PARTED = ('received', 'ground', 'rain', 'clutter-edge', 'lobes', 'filter')
"""Sources whose courses are parted by nan."""
BROKEN = re.compile(rf'nan|\binf\b|None|  | ,|\.\.|[{{}}]|-|(?<![\d.])0\.0+[ {THIN_SPACE}]%')
"""What no sentence may hold: what was left out, set wrongly, a hyphen for a minus, nothing for something."""


def pictures(document, units=SHOWN_UNITS, size=SIZE, only=columns.FIGURES):
    computed = Computed(read(document))
    return {name: columns.picture(name, computed, units, size) for name in only}


def texts(value):
    """All text in a picture."""
    if isinstance(value, str):
        yield value
    for part in value.values() if isinstance(value, dict) else value if isinstance(value, list) else ():
        yield from texts(part)


@st.composite
def documents(draw):
    """Plans of both kinds, with everything from never to always blind."""
    n = draw(st.integers(1, 16))
    kind = draw(st.sampled_from(['dwells', 'dwells', 'stagger']))
    pri = draw(st.lists(st.integers(30, 1500), min_size=n, max_size=n))
    low, slow = draw(st.sampled_from([0.0, 0.3, 20.0])), draw(st.sampled_from([-300.0, 0.0, 25.0]))
    near = {'pulse_us': 0.5, 'bandwidth_mhz': 2.0, 'sent_at_us': 12.0, 'to_km': 9.0}
    return {
        'radar': {
            'carrier_ghz': draw(st.sampled_from([1.3, 2.8, 9.6])),
            'pulse_us': draw(st.sampled_from([0.5, 4.0, 9.5])),
            'recovery_us': draw(st.sampled_from([0.0, 1.0, 2000.0])),
            'guard_us': draw(st.sampled_from([0.0, 2.5])),
            'near_pulse': draw(st.sampled_from([None, None, near])),
        },
        'coverage': {'range_km': [low, low + draw(st.sampled_from([4.0, 150.0]))], 'speed_mps': [slow, slow + 500.0]},
        'must_see': [{'name': '', 'range_km': [low + 1, low + 3], 'speed_mps': [slow, slow + 90.0]}],
        'waveform': {
            'kind': kind,
            'pri_us': [float(value) for value in pri],
            'pulses': 24,
            'detect_m': draw(st.integers(1, n)) if kind == 'dwells' else 1,
            'received_min': draw(st.sampled_from([0.0, 0.5, 1.0])),
        },
        'doppler': {'notch_mps': draw(st.sampled_from([0.0, 8.0, 900.0]))},
    }


@pytest.mark.parametrize('document', [OPENING, STAGGER], ids=['dwells', 'stagger'])
@pytest.mark.parametrize('name', columns.FIGURES)
def test_the_built_document_takes_every_column_that_the_core_gives_and_no_other(name, document):
    from bokeh.models import ColumnDataSource

    from webapp import figures

    picture = pictures(document)[name]
    drawn = figures.drawn(name, picture)
    built = {source.name: set(source.data) for source in drawn.select({'type': ColumnDataSource}) if source.name}
    assert built == {f'{name}/{source}': set(data) for source, data in picture['columns'].items()}


@pytest.mark.parametrize('name', columns.FIGURES)
def test_the_built_document_has_the_ranges_axes_and_heading_that_the_page_changes(name):
    from webapp import figures

    picture = pictures(OPENING)[name]
    drawn = figures.drawn(name, picture)
    assert (drawn.x_range.name, drawn.y_range.name) == (f'{name}/x', f'{name}/y')
    assert [drawn.x_range.start, drawn.x_range.end] == picture['ranges']['x']
    for part in ('x-axis', 'y-axis', 'y-label'):
        assert drawn.select_one({'name': f'{name}/{part}'}) is not None


def test_no_source_of_a_built_document_draws_without_a_name():
    from bokeh.models import ColumnDataSource

    from webapp import figures

    for name, picture in pictures(OPENING).items():
        used = {renderer.data_source for renderer in figures.drawn(name, picture).renderers}
        assert all(isinstance(source, ColumnDataSource) and source.name for source in used)


def test_a_stagger_has_its_blind_speeds_first_and_dwells_their_blind_zones():
    assert columns.order('dwells')[0] == 'blind-zones'
    assert columns.order('stagger')[0] == 'blind-speeds'
    assert sorted(columns.order('stagger')) == sorted(columns.FIGURES)


@FEW
@given(documents())
def test_every_figure_of_every_plan_has_columns_of_equal_length_and_no_number_that_is_none(document):
    for name, picture in pictures(document).items():
        for source, data in picture['columns'].items():
            lengths = {key: len(column) for key, column in data.items() if np.ndim(column) < 2 or key in ('xs', 'ys')}
            assert len(set(lengths.values())) <= 1, (name, source, lengths)
            for key, column in data.items():
                if isinstance(column, np.ndarray) and column.dtype.kind == 'f' and source not in PARTED:
                    assert np.isfinite(column).all(), (name, source, key)
        assert all(np.isfinite(picture['ranges'][side]).all() for side in 'xy')


@FEW
@given(documents())
def test_no_word_of_any_figure_is_broken(document):
    for name, picture in pictures(document).items():
        for text in texts({key: picture[key] for key in ('title', 'caption', 'short', 'summary', 'table')}):
            assert not BROKEN.search(text), (name, text)
        assert not picture['caption'][:1].islower()
        assert picture['caption'].endswith('.')
        assert picture['short'] in picture['caption']
        width = len(picture['table']['head'])
        assert all(len(row) == width for row in picture['table']['rows'])


@FEW
@given(documents())
def test_the_received_share_is_straight_between_its_corners(document):
    plan = read(document)
    for (corner, share), pri, pulse in zip(received_corners(plan), plan.pri_s, plan.pulse_s, strict=True):
        middle = (corner[1:] + corner[:-1]) / 2
        exact = received_share(middle, pri, pulse, plan.recovery_s, plan.guard_s, plan.near)
        # Where the near pulse stops serving, the share jumps from one float to the next.
        wide = np.diff(corner) > ONE_MILLIMETRE
        np.testing.assert_allclose(((share[1:] + share[:-1]) / 2)[wide], exact[wide], atol=1e-6)


def test_gaps_and_clear_spans_share_the_axis_between_them():
    clear = Spans(np.array([1, 0, 1]), np.array([0.0, 2.0, 6.0]), np.array([3.0, 5.0, 10.0]))
    blind = gaps(clear, 3, (0.0, 10.0))
    assert blind.prf.tolist() == [0, 0, 1, 2]
    assert list(zip(blind.start.tolist(), blind.stop.tolist(), strict=True)) == [(0, 2), (5, 10), (3, 6), (0, 10)]


def test_what_no_plan_can_see_is_told_apart_from_what_another_plan_could():
    computed = Computed(read(OPENING))
    found, floor = avoidable(computed.sight, 1)
    assert floor.tolist() == [[0.0, 6.0]]
    # 2.8 GHz, 980 and 860 µs: 62.24 - 6 to 54.62 + 6 m/s is in both notches.
    np.testing.assert_allclose(found, [[56.245, 60.625]], atol=0.01)


@pytest.mark.parametrize(('n', 'm', 'expected'), [(2, 1, [0, 4, 6]), (2, 2, [0, 2, 6]), (1, 1, [0, 6])])
def test_classes_tell_too_few_from_enough_and_all(n, m, expected):
    # Each count fills a field of its own, too large to be all edge.
    count = np.repeat(np.arange(n + 1, dtype=np.uint8), 21)[None].repeat(21, axis=0)
    assert classes.classes(count, n, m)[10, 11::21].tolist() == expected


def test_classes_of_more_than_enough_lie_between_just_enough_and_all():
    count = np.array([[3, 4, 7, 8]], dtype=np.uint8)
    assert classes.classes(count, 8, 3).tolist() == [[classes.JUST_ENOUGH, classes.MORE, classes.MORE, classes.ALL]]


def test_hatching_runs_at_45_degrees_and_never_touches_the_edge_of_a_zone():
    count = np.full((30, 40), 2, dtype=np.uint8)
    count[5:25, 5:35] = 0
    code = classes.classes(count, 2, 1)
    rows, cols = np.nonzero(code == classes.NONE_HATCH)
    assert rows.size > 0
    assert set((rows - cols) % classes.PITCH) == {0}
    assert (rows.min(), rows.max(), cols.min(), cols.max()) == (6, 23, 6, 33)


def test_hatching_and_dots_on_paper_are_as_large_as_on_the_screen_and_finer_at_their_edges():
    count = np.zeros((70, 70), dtype=np.uint8)
    count[:, 35:] = 2
    plain = classes.classes(count, 2, 1, np.zeros_like(count))
    fine = classes.classes(count.repeat(2, axis=0).repeat(2, axis=1), 2, 1, np.zeros((140, 140), np.uint8), fine=2)
    for kind in (classes.NONE_HATCH, classes.DOT):
        assert np.mean(fine == kind) == pytest.approx(np.mean(plain == kind), rel=0.1)
        assert np.mean((fine[::2, ::2] == kind) == (plain == kind)) > 0.98  # all but the edges, which are finer


def test_a_map_for_paper_has_more_cells_and_its_numbers_where_they_were():
    size = {'width': 300, 'height': 100}
    plain, fine = (pictures(OPENING, size={**size, **more})['blind-zones']['columns'] for more in ({}, {'fine': 2}))
    assert fine['map']['image'].shape == (200, 600)
    assert str(fine['holes']) == str(plain['holes'])


def test_on_paper_the_map_of_detection_is_finer_and_its_words_are_those_of_the_screen():
    size = {'width': 600, 'height': 150}
    plain, fine = (pictures(OPENING, size={**size, **more})['detection'] for more in ({}, {'fine': 2}))
    assert fine['columns']['map']['image'].size == pytest.approx(4 * plain['columns']['map']['image'].size, rel=0.1)
    assert (fine['caption'], fine['summary']) == (plain['caption'], plain['summary'])


def test_the_blind_side_of_the_m_of_n_edge_is_a_line():
    count = np.full((20, 20), 3, dtype=np.uint8)
    count[:, :9] = 1
    code = classes.classes(count, 3, 2)
    assert (code[:, 8] == classes.TOO_FEW_EDGE).all()
    assert (code[:, :8] == classes.TOO_FEW).all()


def test_the_map_has_the_size_that_was_asked_for_and_its_own_where_none_was():
    asked = pictures(OPENING, size={'width': 311, 'height': 97})['blind-zones']['columns']['map']['image']
    own = pictures(OPENING, size=None)['blind-zones']['columns']['map']['image']
    assert asked.shape == (97, 311)
    assert own.shape == (blind_zones.SIZE['height'], blind_zones.SIZE['width'])
    assert asked.dtype == np.uint8


@pytest.mark.parametrize(
    ('width', 'height', 'shape'),
    [(620, 300, (300, 620)), (1300, 700, (350, 650)), (9000, 5000, (312, 562)), (3, 0, (16, 16))],
)
def test_a_large_plot_is_mapped_in_cells_of_two_pixels_or_more(width, height, shape):
    picture = pictures(OPENING, size={'width': width, 'height': height})['blind-zones']
    assert picture['columns']['map']['image'].shape == shape


@FEW
@given(documents())
def test_every_number_stands_at_a_cell_of_a_hole_or_moved_off_it(document):
    computed = Computed(read(document))
    names = columns.picture('blind-zones', computed, SHOWN_UNITS, {'width': 500, 'height': 300})['columns']['holes']
    seen = computed.sight
    for x, y, hole in zip(names['x'] * 1e3, names['y'], computed.holes.listed, strict=False):
        slack = np.array([np.ptp(seen.range_m) / 500, np.ptp(seen.speed_m_s) / 300])
        assert hole.range_m[0] - slack[0] <= x <= hole.range_m[1] + slack[0]
        assert hole.speed_m_s[0] - slack[1] <= y <= hole.speed_m_s[1] + slack[1]


def test_the_number_of_a_large_hole_stands_in_the_dark():
    document = {**OPENING, 'radar': {'carrier_ghz': 2.8, 'pulse_us': 60.0, 'recovery_us': 4.0}}
    computed = Computed(read({**document, 'coverage': {'range_km': [2.0, 300.0], 'speed_mps': [0.0, 300.0]}}))
    names = columns.picture('blind-zones', computed, SHOWN_UNITS, {'width': 600, 'height': 300})['columns']['holes']
    still = (names['dx'] == 0) & (names['dy'] == 0)
    assert still.any()
    seen = computed.sight
    for x, y in zip(names['x'][still] * 1e3, names['y'][still], strict=True):
        assert zones.count_map(seen.ranges, seen.speeds, np.array([x]), np.array([y])).item() < seen.m


def test_every_mark_of_the_trade_line_lies_on_its_line():
    picture = pictures(OPENING)['trade-line']['columns']
    product = picture['lines']['x0'] * picture['lines']['y0']
    np.testing.assert_allclose(picture['prfs']['x'] * picture['prfs']['y'], product[0])


def test_strips_of_the_bands_lie_between_their_edges():
    picture = pictures(OPENING)['trade-line']['columns']
    (left, *_), (inner, _, _, outer) = picture['band']['xs'][0], picture['band']['ys'][0]
    products = picture['edges']['x0'] * picture['edges']['y0']
    assert np.isclose(products, left * inner).any()
    assert np.isclose(products, left * outer).any()
    assert 'S' in picture['band-names']['text']


def test_figures_change_their_units_and_not_what_they_show():
    metric = pictures(OPENING)
    other = pictures(OPENING, {'range': 'nmi', 'speed': 'kt', 'pri': 'Hz'})
    for name in ('blind-zones', 'blind-speeds'):
        assert other[name]['units'] != metric[name]['units']
    nmi, km = other['blind-zones']['columns']['regions'], metric['blind-zones']['columns']['regions']
    np.testing.assert_allclose(nmi['left'] * 1.852, km['left'])
    np.testing.assert_allclose(nmi['top'] * 1.852 / 3.6, km['top'])
    assert other['eclipsed-ranges']['ticks']['y']['text'][:2] == [f'1162.8{THIN_SPACE}Hz', f'1020.4{THIN_SPACE}Hz']
    assert 'kt' in other['blind-speeds']['caption']


def test_lanes_stand_in_sending_order_from_the_top_and_the_one_that_counts_above_them():
    ticks = pictures(OPENING)['blind-speeds']['ticks']['y']
    assert ticks['text'] == [f'860{THIN_SPACE}µs', f'980{THIN_SPACE}µs', '1 of 2']
    assert ticks['at'] == sorted(ticks['at'])


def test_a_single_prf_has_no_lane_that_counts():
    one = {**OPENING, 'waveform': {'pri_us': [980.0], 'pulses': 9, 'detect_m': 1}}
    assert pictures(one)['eclipsed-ranges']['ticks']['y']['text'] == ['0', '1', f'980{THIN_SPACE}µs']


def test_the_response_of_a_stagger_is_drawn_with_its_marked_speeds():
    picture = pictures(STAGGER)['blind-speeds']
    assert picture['columns']['lanes']['y'].size == 0
    assert picture['columns']['response']['x'].size >= 480
    # 38 µs is the greatest common part of the four intervals: c / (2 · 2.8 GHz · 38 µs) = 1408.8 m/s.
    assert f'true first blind speed is 1410{THIN_SPACE}m/s' in picture['caption']


def test_the_curve_of_a_stagger_reaches_down_to_its_blind_speeds():
    even = {**STAGGER, 'waveform': {**STAGGER['waveform'], 'pri_us': [950.0, 950.0]}}
    picture = pictures(even)['blind-speeds']
    curve = picture['columns']['response']
    # c / (2 · 2.8 GHz · 950 µs) = 56.35 m/s, between the points of an even grid.
    at = np.abs(curve['x'] - 56.353).argmin()
    assert curve['y'][at] < picture['ranges']['y'][0]


@pytest.mark.parametrize(
    ('low', 'high', 'expected'), [(0.9, 210, [1, 2, 5, 10, 20, 50, 100, 200]), (45, 160, [50, 70, 100])]
)
def test_logarithmic_axes_have_round_ticks(low, high, expected):
    assert decade_ticks(low, high)[0] == pytest.approx(expected)


@pytest.mark.parametrize(
    ('unit', 'text'), [('us', '980 µs'), ('ms', '0.98 ms'), ('Hz', '1020.4 Hz'), ('kHz', '1.0204 kHz')]
)
def test_intervals_are_named_as_the_reader_prefers(unit, text):
    assert interval_name(980e-6, {'pri': unit}) == text.replace(' ', THIN_SPACE)


def test_an_axis_writes_its_own_ends_as_they_were_typed():
    axis = range_axis((2e3, 110e3), SHOWN_UNITS)
    assert axis.span() == f'2 to 110{THIN_SPACE}km'
    assert axis.label == 'range (km)'
    assert speed_axis((0.0, 300.0), {'speed': 'km/h'}).ends == pytest.approx([0, 1080])


def test_zones_of_an_axis_join_neighbouring_segments():
    from pycore.columns.blind_parts import runs

    swept = sweep(Spans(np.array([0, 1]), np.array([2.0, 4.0]), np.array([4.0, 6.0])), (0.0, 10.0))
    assert runs(swept, swept.pattern != 0).tolist() == [[2.0, 6.0]]


def test_the_cpis_of_a_dwell_follow_each_other_without_a_gap():
    document = {**OPENING, 'waveform': {'pri_us': [980.0, 860.0], 'pulses': 9, 'fill_pulses': 1, 'detect_m': 1}}
    lane = pictures(document, only=['dwell'])['dwell']['columns']
    # 980 µs, then nine of them; 860 µs, then nine.
    np.testing.assert_allclose(lane['fill']['left'], [0.0, 9.8])
    np.testing.assert_allclose(lane['fill']['right'], lane['counted']['left'])
    np.testing.assert_allclose(lane['counted']['right'], [9.8, 18.4])


def test_pulses_are_drawn_one_by_one_only_where_they_do_not_run_together():
    few, many = (
        pictures(OPENING, size={'width': width}, only=['dwell'])['dwell']['columns']['pulses']['x']
        for width in (600, 40)
    )
    np.testing.assert_allclose(few[[0, 1, 9, 10]], [0.0, 0.98, 8.82, 9.68])
    assert (few.size, many.size) == (18, 0)


def test_what_lies_beyond_the_time_on_target_is_marked():
    short = {**OPENING, 'radar': {**OPENING['radar'], 'dwell_ms': 12.0}}
    over = pictures(short, only=['dwell'])['dwell']['columns']['over']
    np.testing.assert_allclose([over['left'][0], over['right'][0]], [12.0, 16.56])


DETECTED = {
    **OPENING,
    'waveform': {**OPENING['waveform'], 'pri_us': [980.0, 860.0, 735.0], 'detect_m': 2},
    'target': {'snr_db': 10.0, 'at_km': 60.0, 'fluctuation': 'swerling1', 'pd_wanted': 0.8},
}


def test_the_map_of_detection_agrees_with_the_followed_target_cell_by_cell():
    from pycore import detected
    from pycore.follow import follow

    strong = {'waveform': {**DETECTED['waveform'], 'detect_m': 3}, 'target': {**DETECTED['target'], 'snr_db': 30.0}}
    computed = Computed(read({**DETECTED, **strong, 'rain': [{'range_km': [15.0, 45.0], 'cnr_db': 30.0}]}))
    # c/2 · 860 µs = 128.91 km: at 128.85 km two fifths of the echo are received on that PRF.
    at_range, at_speed = np.array([3e3, 30e3, 61e3, 128.85e3]), np.array([0.0, 12.0, 58.0, 211.0])
    found = detected.probability_over(computed, at_range, at_speed)
    exact = [[follow(computed, r, v).probability for v in at_speed] for r in at_range]
    # The map averages over the strength in coarse steps, to about a thousandth.
    np.testing.assert_allclose(found, exact, atol=3e-3)


def test_the_map_of_a_stagger_agrees_with_the_followed_target_cell_by_cell():
    from pycore import detected
    from pycore.follow import follow

    computed = Computed(read({**STAGGER, 'rain': [{'range_km': [15.0, 45.0], 'cnr_db': 30.0}]}))
    at_range, at_speed = np.array([3e3, 30e3, 61e3, 143e3]), np.array([0.0, 12.0, 58.0, 211.0])
    found = detected.probability_over(computed, at_range, at_speed)
    exact = [[follow(computed, r, v).probability for v in at_speed] for r in at_range]
    np.testing.assert_allclose(found, exact, atol=3e-3)


@pytest.mark.parametrize('document', [DETECTED, STAGGER], ids=['dwells', 'stagger'])
def test_curves_of_detection_pass_the_wanted_probability_at_the_ranges_in_the_caption(document):
    from pycore.columns import detection

    computed = Computed(read(document))
    reached = computed.echoes.reached_km()
    for name in ('best', 'median'):
        curve = detection.curves_of(computed, np.array([reached[name] * 1e3]))[name]
        assert curve[0] == pytest.approx(0.8, abs=3e-3)


def test_the_strip_of_curves_lies_under_the_map_and_a_pointer_there_has_no_speed():
    picture = pictures(DETECTED, only=['detection'])['detection']
    assert picture['holds']['y'] == [0.0, 300.0]
    assert picture['ranges']['y'][0] < 0.0
    median = picture['columns']['median']['y']
    assert (median < 0).all()
    assert (np.diff(median) <= 1e-9).all()


def test_steps_of_the_probability_part_at_what_is_wanted():
    from pycore.columns import detection

    edges = detection.steps(0.8)
    assert edges.tolist() == pytest.approx([0.08, 0.4, 0.8, 0.9])
    assert len(detection.STEPS) == edges.size + 1
    assert detection.STEPS[np.searchsorted(edges, 0.8, side='right')] == 'enough'


@pytest.mark.parametrize(
    ('low', 'high', 'expected'),
    [
        (0, 300, [0, 50, 100, 150, 200, 250, 300]),
        (-100, 700, [0, 200, 400, 600]),
        (0.2, 0.5, [0.2, 0.25, 0.3, 0.35, 0.4, 0.45, 0.5]),
    ],
)
def test_linear_axes_have_round_ticks(low, high, expected):
    from pycore.columns.axes import round_ticks

    assert round_ticks(low, high)[0] == pytest.approx(expected)


GHOSTLY = {
    'radar': {'carrier_ghz': 10.0, 'pulse_us': 1.0, 'recovery_us': 1.0},
    'coverage': {'range_km': [5.0, 180.0], 'speed_mps': [-100.0, 500.0]},
    'waveform': {'pri_us': [51.0, 53.0, 60.0, 63.0, 67.0, 84.0, 89.0, 93.0], 'pulses': 64, 'detect_m': 2},
    'doppler': {'notch_mps': 6.0},
}


def test_places_of_agreement_are_the_ghosts_those_that_speed_rules_out_and_the_targets_own():
    from pycore.columns.decoding import decoded
    from pycore.columns.mark import marked

    computed = Computed(read(GHOSTLY))
    found = decoded(computed, marked(computed, {'range_km': 90.0, 'speed_mps': 100.0}))
    assert (found.own[:, 0] <= 90e3).all()
    assert (found.own[:, 1] >= 90e3).all()
    # 63 and 84 µs agree again after 252 µs, which is 37.77 km; 90 km is eclipsed on 60 µs.
    shifts = np.sort(np.concatenate((found.ghosts, found.ruled_out)).mean(axis=1)) - 90e3
    for expected in (75_548.0, 37_774.0, -75_548.0, -37_774.0):
        assert np.abs(shifts - expected).min() < 160.0
    places = np.concatenate((found.own, found.ghosts, found.ruled_out))
    assert np.unique(places[:, 0]).size == len(places)


def test_every_prf_that_sees_the_target_has_a_candidate_at_it_and_no_other_prf_has_any():
    from pycore.columns.mark import marked

    computed = Computed(read(GHOSTLY))
    mark = marked(computed, {'range_km': 76.5, 'speed_mps': 100.0})
    sees = [not one.reasons for one in mark.followed.prfs]
    bars = columns.picture('decoding', computed, SHOWN_UNITS, SIZE, View(mark))['columns']['candidates']
    assert 0 < sum(sees) < 8
    for lane, seen in zip(7.5 - np.arange(8), sees, strict=True):
        here = bars['y'] == lane
        assert here.any() == seen
        assert ((bars['left'][here] <= 76.5) & (bars['right'][here] >= 76.5)).any() == seen


def test_a_decode_span_short_of_the_coverage_ends_in_the_figure():
    bars = pictures(GHOSTLY, only=['decoding'])['decoding']['columns']['spans']
    # The smallest least common multiple of two: 63 and 84 µs, 252 µs, 37.77 km.
    assert bars['right'][0] == pytest.approx(37.774, abs=0.001)
    assert bars['right'][1] < bars['right'][0]


RAINY = {**OPENING, 'rain': [{'range_km': [15.0, 45.0], 'cnr_db': 25.0, 'at_km': 20.0, 'speed_mps': -10.0}]}


def test_what_clutter_covers_is_dotted_and_the_rest_of_the_map_stays_as_it_is():
    size = {'width': 400, 'height': 300}
    dry, wet = (
        pictures(document, size=size, only=['blind-zones'])['blind-zones']['columns']['map']['image']
        for document in (OPENING, RAINY)
    )
    dotted = wet == classes.DOT
    assert (wet[~dotted] == dry[~dotted]).all()
    assert (dry[dotted] >= classes.JUST_ENOUGH).all()
    # Cells 0.27 km wide: it rains from 15 to 45 km, and nothing folds onto ranges below 129 km.
    columns_with_dots = np.flatnonzero(dotted.any(axis=0)) * 0.27 + 2.0
    assert columns_with_dots.min() >= 14.7
    assert columns_with_dots.max() <= 45.0


def test_dots_fill_an_eighteenth_of_what_clutter_covers():
    count = np.full((80, 80), 2, dtype=np.uint8)
    code = classes.classes(count, 2, 1, np.zeros_like(count))
    assert (code == classes.DOT).mean() == pytest.approx(1 / 18, abs=0.01)


def test_the_caption_says_what_clutter_takes_and_only_where_there_is_some():
    dry, wet = (pictures(document, only=['blind-zones'])['blind-zones'] for document in (OPENING, RAINY))
    computed = Computed(read(RAINY))
    lost = 100 * (computed.share - computed.echoes.share_with_clutter)
    assert f'Dotted: another {lost:.2f}{THIN_SPACE}% where rain stands above the noise.' in wet['caption']
    assert 'Dotted' not in dry['caption']
