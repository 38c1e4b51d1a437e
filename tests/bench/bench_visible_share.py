"""How much faster the exact visible share is than plain grids, in one process, and how it grows with N.

From the plan's arrays to the number, on both sides: X band, 3 of 8, 0 to 185.2 km, 0 to 1500 m/s.
"""

import timeit

import numpy as np

from pycore.comb_share import visible_share_of_combs
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.eclipsing import clear_comb, clear_ranges
from pycore.stagger import notch_clear_speeds, notch_comb
from pycore.visibility import visible_share

RANGE_M, SPEED_M_S = (0.0, 185_200.0), (0.0, 1500.0)
WAVELENGTH_M, RECOVERY_S, M = 0.03, 10e-6, 3
PULSE_S, NOTCH_M_S = np.full(16, 1e-6), np.full(16, 17.0)
EIGHT_US = (54, 59, 61, 67, 69, 78, 83, 87)
SIXTEEN_US = (51, 53, 54, 57, 59, 61, 63, 67, 69, 73, 78, 83, 84, 87, 89, 93)
CELLS = 1000


def exact(pri_s):
    """The project's own way: lengths of the patterns on both axes, sums over sets of PRFs."""
    n = pri_s.size
    ranges = clear_comb(pri_s, PULSE_S[:n], RECOVERY_S, 0.0, 0.5)
    speeds = notch_comb(WAVELENGTH_M / (2 * pri_s), NOTCH_M_S[:n])
    return visible_share_of_combs(ranges, speeds, min(M, n), RANGE_M, SPEED_M_S)


def exact_by_spans(pri_s):
    """The way that the note takes, which needs the spans for its figures too."""
    n = pri_s.size
    ranges = clear_ranges(pri_s, PULSE_S[:n], RECOVERY_S, 0.0, 0.5, RANGE_M)
    speeds = notch_clear_speeds(WAVELENGTH_M / (2 * pri_s), NOTCH_M_S[:n], SPEED_M_S)
    return visible_share(ranges, speeds, n, min(M, n), RANGE_M, SPEED_M_S)


def _clear_at_centres(pri_s):
    """Clear cells along each axis, one row for each PRF."""
    delay_s = 2 * RANGE_M[1] / SPEED_OF_LIGHT_M_S * (np.arange(CELLS) + 0.5) / CELLS
    since_pulse = np.mod(delay_s, pri_s[:, None])
    on_range = (since_pulse >= RECOVERY_S + 0.5 * PULSE_S[0]) & (since_pulse <= pri_s[:, None] - 0.5 * PULSE_S[0])
    blind = WAVELENGTH_M / (2 * pri_s[:, None])
    folded = np.mod(SPEED_M_S[1] * (np.arange(CELLS) + 0.5) / CELLS, blind)
    return on_range, (folded >= NOTCH_M_S[0]) & (folded <= blind - NOTCH_M_S[0])


def grid_of_small_integers(pri_s):
    """The best plain grid: counts of clear PRFs added up in eight-bit integers."""
    count = np.zeros((CELLS, CELLS), dtype=np.int8)
    for on_range, on_speed in zip(*_clear_at_centres(pri_s), strict=True):
        count += on_range[:, None] & on_speed
    return np.count_nonzero(count >= min(M, pri_s.size)) / count.size


def grid_of_booleans(pri_s):
    """The grid as it is often written: one array of PRFs by ranges by speeds."""
    on_range, on_speed = _clear_at_centres(pri_s)
    return ((on_range[:, :, None] & on_speed[:, None, :]).sum(axis=0) >= min(M, pri_s.size)).mean()


def _seconds(pri_s, rounds, **ways):
    """Best time of each way, the ways taken in turns so that a busy machine slows all of them alike."""
    took = dict.fromkeys(ways, float('inf'))
    for _ in range(rounds):
        for way, times in ways.items():
            once = timeit.timeit(lambda way=way: globals()[way](pri_s), number=times) / times
            took[way] = min(took[way], once)
    return took


def measure():
    """Return ratios, times faster than each grid, the time itself, and a table over N."""
    eight = np.array(EIGHT_US) * 1e-6
    took = _seconds(eight, 25, exact=50, exact_by_spans=50, grid_of_small_integers=1, grid_of_booleans=1)
    table = {}
    for n in (2, 3, 4, 6, 8, 10, 12, 14, 16):
        pri_s = np.array(SIXTEEN_US[:n]) * 1e-6
        row = _seconds(pri_s, 10, exact=10, grid_of_small_integers=1)
        table[f'N = {n}'] = {
            'exact [us]': 1e6 * row['exact'],
            'times faster than int8 grid': row['grid_of_small_integers'] / row['exact'],
        }
    return {
        'exact share, 3 of 8 [us]': 1e6 * took['exact'],
        'the same by way of the spans [us]': 1e6 * took['exact_by_spans'],
        'times faster than int8 grid (goal 20)': took['grid_of_small_integers'] / took['exact'],
        'times faster than boolean array (goal 40)': took['grid_of_booleans'] / took['exact'],
        'differs from the grid by': abs(exact(eight) - grid_of_small_integers(eight)),
        'growth with N': table,
    }


if __name__ == '__main__':
    for name, value in measure().items():
        print(name, value if not isinstance(value, dict) else '')
        for row, columns in value.items() if isinstance(value, dict) else ():
            print('   ', row, {column: round(number, 1) for column, number in columns.items()})
