"""Real weather radars: what their files and tables say of range and Nyquist speed (sources in the JSON)."""

import json
from pathlib import Path

import numpy as np
import pytest

from pycore import ambiguity, dwell
from pycore.constants import SPEED_OF_LIGHT_M_S

DATA = json.loads((Path(__file__).parent / 'weather_radars.json').read_text('utf-8'))
PRFS = {row['number']: row for row in DATA['wsr88d_prfs']['table']}
KATX = DATA['wsr88d_katx']
SINGLE_PRECISION = 1e-6  # the files hold 32-bit floats, and printed ones have seven or eight digits
LAST_DIGIT_M_S = 0.005001


def wavelength_m(header):
    return (
        header['wavelength_cm'] / 100
        if 'wavelength_cm' in header
        else ambiguity.wavelength(header['carrier_ghz'] * 1e9)
    )


def pri_s(header):
    return 1 / header['prf_hz'] if 'prf_hz' in header else header['prt_s']


def by_file(header):
    return header['file']


def test_the_data_are_all_there_and_say_where_they_come_from():
    assert (len(DATA['headers']), len(PRFS), len(KATX['cuts'])) == (8, 8, 4)
    assert 'arm_pyart' in DATA['provenance']
    assert all(row['status'] for row in PRFS.values())


@pytest.mark.parametrize('header', [one for one in DATA['headers'] if one['nyquist_m_s']], ids=by_file)
def test_the_nyquist_speed_of_a_file_follows_from_its_interval_and_wavelength(header):
    # The Ka-band file tells exact light from 3e8 m/s, which would give 10.5419. The UF file's words are coarse.
    found = ambiguity.nyquist_speed(pri_s(header), wavelength_m(header))
    assert found == pytest.approx(header['nyquist_m_s'], rel=header.get('coarse', SINGLE_PRECISION))


@pytest.mark.parametrize('header', [one for one in DATA['headers'] if not one['nyquist_m_s']], ids=by_file)
def test_the_nyquist_speed_of_a_file_that_holds_none(header):
    # Computed once and kept against change; no source prints it.
    found = ambiguity.nyquist_speed(pri_s(header), wavelength_m(header))
    assert found == pytest.approx(header['computed_nyquist_m_s'], abs=0.0005)


@pytest.mark.parametrize('header', [one for one in DATA['headers'] if 'range_c_m_s' in one], ids=by_file)
def test_the_unambiguous_range_of_a_file_is_ours_but_for_its_speed_of_light(header):
    # These files were made with 2.99793e8 m/s, 1.8e-6 above the exact value.
    found = ambiguity.unambiguous_range(pri_s(header))
    assert found == pytest.approx(header['range_m'], rel=5e-6)
    as_they_did = found * header['range_c_m_s'] / SPEED_OF_LIGHT_M_S
    assert as_they_did == pytest.approx(header['range_m'], rel=1e-7)


@pytest.mark.parametrize('header', [one for one in DATA['headers'] if not one.get('range_trusted', True)], ids=by_file)
def test_a_range_field_that_is_not_the_unambiguous_range_stays_below_it(header):
    # Gated or usable extent, not c T/2: kept so that nobody takes it for a published value.
    assert header['range_m'] < 0.98 * ambiguity.unambiguous_range(pri_s(header))


def test_a_millisecond_reaches_a_hundred_and_fifty_kilometres():
    header = next(one for one in DATA['headers'] if one['radar'] == 'CSU-CHILL')
    assert ambiguity.unambiguous_range(pri_s(header)) == pytest.approx(header['computed_range_m'], abs=10.0)


@pytest.mark.parametrize('row', PRFS.values(), ids=lambda row: f'{row["number"]}, {row["status"]}')
def test_a_table_of_eight_prfs_and_their_ranges_in_whole_kilometres(row):
    assert round(ambiguity.unambiguous_range(1 / row['prf_hz']) / 1e3) == row['range_km']


@pytest.mark.parametrize('row', PRFS.values(), ids=lambda row: str(row['number']))
def test_the_eight_intervals_are_whole_multiples_of_six_and_two_thirds_microseconds(row):
    # 20/3 us is a kilometre at 3e8 m/s: with that the printed kilometres are whole but for the PRF's last digit.
    textbook = 3e8 / SPEED_OF_LIGHT_M_S
    assert ambiguity.unambiguous_range(1 / row['prf_hz']) * textbook / 1e3 == pytest.approx(row['range_km'], rel=2e-5)


def test_one_wavelength_explains_range_and_speed_of_every_cut_of_a_volume():
    cut = KATX['cuts'][-1]
    fitted = cut['nyquist_m_s'] / ambiguity.nyquist_speed(1 / PRFS[cut['prf_number']]['prf_hz'], 1.0)
    assert ambiguity.wavelength(2.7383e9) == pytest.approx(fitted, rel=2e-4)
    for one in KATX['cuts']:
        interval = 1 / PRFS[one['prf_number']]['prf_hz']
        assert ambiguity.nyquist_speed(interval, fitted) == pytest.approx(one['nyquist_m_s'], abs=LAST_DIGIT_M_S)
        assert round(ambiguity.unambiguous_range(interval) / 1e3) == one['range_km']


def test_another_radar_of_the_kind_has_its_own_wavelength():
    one = DATA['wsr88d_vcp32']
    fitted = one['nyquist_m_s'] / ambiguity.nyquist_speed(1 / PRFS[one['prf_number']]['prf_hz'], 1.0)
    assert fitted * 100 == pytest.approx(one['computed_wavelength_cm'], abs=0.002)


@pytest.mark.parametrize(('number', 'carrier_hz', 'bound_m_s'), [(1, 3.0e9, 8.0), (8, 2.7e9, 35.61)])
def test_the_legal_nyquist_field_spans_the_prfs_and_the_band(number, carrier_hz, bound_m_s):
    # NEXRAD ROC RDA/RPG ICD 2620002G, base-data message table: 8 to 35.61 m/s; PRF 1 at 3.0, PRF 8 at 2.7 GHz.
    found = ambiguity.nyquist_speed(1 / PRFS[number]['prf_hz'], ambiguity.wavelength(carrier_hz))
    assert found == pytest.approx(bound_m_s, rel=0.006)


def test_the_longest_and_the_shortest_reach():
    # AMS Glossary of Meteorology, "WSR-88D": PRF 318 to 1304 Hz, 115 km Doppler, 460 km reflectivity (a display limit).
    assert ambiguity.unambiguous_range(1 / 1304) / 1e3 == pytest.approx(115.0, abs=0.5)
    assert ambiguity.unambiguous_range(1 / 318) / 1e3 > 460.0


@pytest.mark.parametrize(('number', 'pulses'), [(1, 28), (4, 75), (5, 88), (6, 95), (7, 103), (8, 111)])
def test_pulses_of_a_radial_keep_its_dwell(number, pulses):
    # NOAA/NWS Warning Decision Training Branch, DLOC Topic 3 Lesson 1, section 6-7: VCP 21 at 1.45 degrees.
    used = dwell.time_used(np.array([1 / PRFS[number]['prf_hz']]), np.array([pulses]), np.array([0]))
    assert used == pytest.approx(87e-3, abs=0.6e-3)


@pytest.mark.parametrize('cut', KATX['pulses'], ids=lambda cut: str(cut['prf_number']))
def test_pulses_of_a_radial_fill_a_degree_of_the_scan(cut):
    # 17 and 66 pulses read twice (the same lesson, section 6-6, and the file); degrees computed.
    swept = cut['pulses'] / PRFS[cut['prf_number']]['prf_hz'] * cut['rate_deg_s']
    assert swept == pytest.approx(cut['degrees'], abs=0.0006)
    assert dwell.time_on_target(cut['degrees'], cut['rate_deg_s'] / 6) == pytest.approx(
        swept / cut['rate_deg_s'], rel=1e-3
    )


def test_a_uniform_weather_radar_that_is_right_only_to_148_kilometres():
    # D. Zrnic, NSSL 40th-anniversary talk, slide 12: 148 km and 25.4 m/s: PRF 5 and a legal S-band wavelength.
    interval = 2 * 148e3 / SPEED_OF_LIGHT_M_S
    assert 1 / interval == pytest.approx(PRFS[5]['prf_hz'], rel=1e-3)
    assert 0.0999 < 25.4 / ambiguity.nyquist_speed(interval, 1.0) < 0.1111
