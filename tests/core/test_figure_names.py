"""Names inside figures: no two PRFs share one, and none lies on another."""

import numpy as np
import pytest

from pycore import columns
from pycore.columns.lanes import room_ticks
from pycore.columns.prf_names import prf_names
from pycore.computed import Computed
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS, THIN_SPACE


def names(pri_us, **radar):
    found = prf_names(read({'radar': radar, 'waveform': {'pri_us': pri_us}}), SHOWN_UNITS)
    return [name.replace(THIN_SPACE, ' ') for name in found]


def trade(**plan):
    return columns.picture('trade-line', Computed(read(plan)), SHOWN_UNITS)['columns']


@pytest.mark.parametrize(
    ('pri_us', 'carrier_ghz', 'said'),
    [
        ([980, 860], 2.8, ['980 µs', '860 µs']),
        ([800, 800], [2.7, 3.1], ['800 µs at 2.7 GHz', '800 µs at 3.1 GHz']),
        ([800, 860, 800], [2.7, 2.7, 3.1], ['800 µs at 2.7 GHz', '860 µs', '800 µs at 3.1 GHz']),
        ([800, 800], 2.8, ['800 µs (1)', '800 µs (2)']),
    ],
)
def test_equal_intervals_are_told_apart_by_their_carriers_or_by_counting(pri_us, carrier_ghz, said):
    assert names(pri_us, carrier_ghz=carrier_ghz) == said


def test_low_lanes_keep_every_second_name_and_the_one_that_counts():
    ticks = room_ticks(['a', 'b', 'c', 'd', 'e'], 'top', 10.0)
    assert ticks['text'] == ['e', 'c', 'a', 'top']
    assert room_ticks(['a', 'b'], 'top', 20.0)['text'] == ['b', 'a', 'top']


def test_regimes_part_at_what_is_asked_for():
    found = trade(coverage={'range_km': [2, 110], 'speed_mps': [0, 300]}, waveform={'pri_us': [980]})
    assert found['asked']['left'] == pytest.approx(110)
    assert found['asked']['bottom'] == pytest.approx(300)
    assert found['regime-names']['text'] == ['clear', 'low PRF', 'medium PRF', 'high PRF']
    np.testing.assert_allclose(found['regime-names']['y'], 300)


def test_regimes_are_named_at_the_edge_where_a_mark_stands_at_the_crossing():
    # 1/2000 s gives 75 km and 107 m/s at 2.8 GHz: where 70 km and 100 m/s are asked for
    found = trade(coverage={'range_km': [2, 70], 'speed_mps': [0, 100]}, waveform={'pri_us': [500]})
    assert len(set(found['regime-names']['y'].tolist())) == 2


def test_of_two_carriers_the_lower_is_named_above_its_line():
    found = trade(radar={'carrier_ghz': [2.7, 3.1]}, waveform={'pri_us': [800, 800]})['carrier-names']
    assert [text.replace(THIN_SPACE, ' ') for text in found['text']] == ['2.7 GHz', '3.1 GHz']
    assert found['anchor'] == ['bottom_left', 'top_right']
