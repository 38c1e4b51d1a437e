"""The timing table: whole counts stay whole, and the sums are those of the pulses one by one."""

from fractions import Fraction

import pytest

from pycore.plan.reading import read
from pycore.timing import columns, in_counts, timing_table


def plan(**waveform):
    return read(
        {
            'radar': {'clock_mhz': 10.0, 'pulse_us': 1.0, 'recovery_us': 1.0, 'guard_us': 0.5},
            'waveform': {'pri_us': [980.0, 860.0], 'pulses': 9, 'fill_pulses': 1, **waveform},
        }
    )


def with_radar(document_plan, **radar):
    document = dict(document_plan.document)
    document['radar'] = {**document['radar'], **radar}
    return read(document)


def test_the_opening_set_in_counts_of_ten_megahertz():
    timing = timing_table(with_radar(plan(), beamwidth_deg=1.4, scan_rpm=12.0), 'ab12')
    assert [row.pri_counts for row in timing.rows] == [9800, 8600]
    assert [(row.start_counts, row.length_counts) for row in timing.rows] == [(0, 98000), (98000, 86000)]
    assert (timing.sum_counts, timing.rest_counts, timing.checksum) == (184000, 10444, 'ab12')
    assert all(row.open_counts == ((20, row.pri_counts - 5),) for row in timing.rows)
    assert all(isinstance(row.pulse_counts, int) and row.pulse_counts == 10 for row in timing.rows)


def test_a_set_longer_than_the_time_on_target_leaves_less_than_nothing():
    assert timing_table(with_radar(plan(), dwell_ms=18.0)).rest_counts == -4000
    assert timing_table(with_radar(plan(), dwell_ms=None, scan_rpm=None)).rest_counts is None


def test_a_pulse_off_the_clock_keeps_its_fraction():
    assert timing_table(with_radar(plan(), pulse_us=1.05)).rows[0].pulse_counts == Fraction(21, 2)


@pytest.mark.parametrize(('time_us', 'counts'), [(0.1, 1), (0.3, 3), (1.1, 11), (33.3, 333), (0.07, Fraction(7, 10))])
def test_times_are_counted_in_the_decimals_that_they_were_typed_in(time_us, counts):
    found = in_counts(float(f'{time_us}e-6'), 10e6)
    assert found == counts
    assert isinstance(found, type(counts))


def test_a_receiver_that_never_opens_has_no_window():
    assert timing_table(with_radar(plan(), recovery_us=2000.0)).rows[0].open_counts == ()


def test_a_near_pulse_shuts_the_receiver_a_second_time():
    near = {'pulse_us': 0.5, 'bandwidth_mhz': 2.0, 'sent_at_us': 70.0, 'to_km': 9.0}
    row = timing_table(with_radar(plan(), near_pulse=near)).rows[0]
    assert row.near_counts == (700, 5)
    assert row.open_counts == ((20, 695), (715, 9795))
    assert row.duty == pytest.approx(15 / 9800)


@pytest.mark.parametrize(('pulses', 'fill'), [(9, 1), (8, 4), (1, 0), (30, 3)])
def test_a_stagger_counts_every_interval_as_often_as_its_cycle_comes_to_it(pulses, fill):
    cycle = [1000.0, 1200.0, 1080.0, 1240.0]
    timing = timing_table(plan(kind='stagger', pri_us=cycle, pulses=pulses, fill_pulses=fill))
    one_by_one = [cycle[index % 4] for index in range(pulses + fill)]
    assert timing.sum_counts == round(sum(one_by_one) * 10)
    assert sum(row.pulses for row in timing.rows) == pulses
    assert sum(row.fill_pulses for row in timing.rows) == fill
    assert [row.start_counts for row in timing.rows] == [0, 10000, 22000, 32800]
    counted_s = sum(one_by_one[fill:]) * 1e-6
    wavelength = plan().wavelength_m[0]
    assert timing.rows[0].filter_width_m_s == pytest.approx(wavelength / 2 / counted_s)


def test_the_printed_table_has_a_cell_for_every_column():
    near = {'pulse_us': 0.5, 'bandwidth_mhz': 2.0, 'sent_at_us': 70.0, 'to_km': 9.0}
    for one in (plan(), with_radar(plan(), near_pulse=near), with_radar(plan(), recovery_us=2000.0)):
        head, rows = columns(timing_table(one))
        assert len(set(head)) == len(head)
        assert all(len(row) == len(head) for row in rows)
        assert [row[head.index('pri_us')] for row in rows] == [980.0, 860.0]
