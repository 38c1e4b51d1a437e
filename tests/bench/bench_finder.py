"""How many sets the finder scores, against grids in the same process, and how good its plans are after a while.

Rates are of whole steps of a search, everything that belongs to them included, on one core; exact decoding and the
exact share of every set. X band, 3 of 8, 0 to 185.2 km, 0 to 1500 m/s, unless a row says otherwise.
"""

import importlib.util
import time
import timeit
from concurrent.futures import ProcessPoolExecutor
from dataclasses import replace
from fractions import Fraction
from pathlib import Path

import numpy as np
from playwright.sync_api import sync_playwright

from pycore import link
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.finder import Search, begun, run_slice
from pycore.finder.limits import Cycle, Limits, Place
from pycore.response import binomial_weights
from webapp.building.browser import OPTIONS, chromium
from webapp.building.places import DIST

PLACE = Place(0.03, 1e-6, 17.0, carrier_hz=SPEED_OF_LIGHT_M_S / 0.03)
COARSE = Limits(
    places=(PLACE,) * 8,
    m=3,
    clock_hz=10**6,
    pri_counts=(50, 95),
    range_m=(0.0, 185_200.0),
    speed_m_s=(0.0, 1500.0),
    recovery_s=10e-6,
    decode='exact',
    decode_m=185_200.0,
)
LONGER = replace(COARSE, pri_counts=(35, 150))
FINE = replace(COARSE, clock_hz=10**7, pri_counts=(350, 1500))
CELLS = 1000
WARM_STEPS, LAST_STEP = 50, 300


def rate(limits, seconds=3.0):
    """Return sets scored in a second of processor time, once a search is under way, the best of a few turns."""
    best, left = 0.0, seconds
    one, number = None, 0
    while left > 0:
        if one is None or one.ledger.steps > LAST_STEP:
            one, number = begun(limits, 1, number), number + 1
            while one.ledger.steps < WARM_STEPS:
                one.step()
        tried, start = one.ledger.tried, time.process_time()
        while time.process_time() - start < 0.25:
            one.step()
        took = time.process_time() - start
        best, left = max(best, (one.ledger.tried - tried) / took), left - took
    return best


def _clear_at_centres(limits, pris):
    """Clear cells along each axis, one row for each PRF."""
    pri_s = np.array(pris)[:, None] / limits.clock_hz
    place = limits.places[0]
    delay_s = 2 * limits.range_m[1] / SPEED_OF_LIGHT_M_S * (np.arange(CELLS) + 0.5) / CELLS
    since_pulse = np.mod(delay_s, pri_s)
    half = 0.5 * place.pulse_s
    on_range = (since_pulse >= limits.recovery_s + half) & (since_pulse <= pri_s - half)
    blind = place.wavelength_m / (2 * pri_s)
    folded = np.mod(limits.speed_m_s[1] * (np.arange(CELLS) + 0.5) / CELLS, blind)
    return on_range, (folded >= place.notch_m_s) & (folded <= blind - place.notch_m_s)


def grid_of_small_integers(limits, pris):
    """The best plain grid: counts of clear PRFs added up in eight-bit integers."""
    count = np.zeros((CELLS, CELLS), dtype=np.int8)
    for on_range, on_speed in zip(*_clear_at_centres(limits, pris), strict=True):
        count += on_range[:, None] & on_speed
    return np.count_nonzero(count >= limits.m) / count.size


def grid_of_booleans(limits, pris):
    """The grid as it is often written: one array of PRFs by ranges by speeds."""
    on_range, on_speed = _clear_at_centres(limits, pris)
    return ((on_range[:, :, None] & on_speed[:, None, :]).sum(axis=0) >= limits.m).mean()


def _grid_rate(grid, limits, pris):
    return 1.0 / min(timeit.repeat(lambda: grid(limits, pris), number=1, repeat=9, timer=time.process_time))


def after(limits, seconds, seed=1):
    """Return the best score and its PRIs after some seconds of processor time, and when it was there."""
    search, start, best, when = Search(limits, seed), time.process_time(), None, 0.0
    while time.process_time() - start < seconds:
        for _ in range(10):
            search.step()
        first = search.found.best[:1]
        if first and first[0] != best:
            best, when = first[0], time.process_time() - start
    return {'score': best[0], 'PRIs': best[1], 'after [s]': when} if best else {}


def stagger(delays):
    """The stagger yardstick: mean 1130 us, spread 1.3, 0.3 to 14 times the mean PRI's first blind speed."""
    blind = 0.1 / 2 / 1130e-6
    weights, wanted = tuple(map(float, binomial_weights(delays))), (0.3 * blind, 14 * blind)
    cycle = Cycle(weights, spread=1.3, mean_counts=(1130.0, 1130.0), dip_m_s=wanted)
    place = Place(0.1, 1e-6, 5.0)
    return Limits((place,) * 4, 1, 10**6, (900, 1400), (0.0, 1e5), (0.0, 600.0), decode='none', stagger=cycle)


def quality(seconds=10.0):
    """Return the excess over the floor in percent, or the least response, that the yardsticks reach."""
    one_gate = {'decode': 'blur', 'blur_gates': Fraction(1)}
    cases = {
        '50-95 us, exact (goal 0.06 %)': COARSE,
        '50-95 us, half a gate': replace(COARSE, decode='blur'),
        '50-95 us, one gate': replace(COARSE, **one_gate),
        '35-150 us, exact (goal 0.035 %)': LONGER,
        '35-150 us, half a gate': replace(LONGER, decode='blur'),
        '35-150 us, one gate': replace(LONGER, **one_gate),
        '35-150 us on 0.1 us, exact': FINE,
    }
    table = {}
    for name, limits in cases.items():
        found = after(limits, seconds)
        score = {'excess [%]': 100 * found['score']} if found else {}
        table[name] = {**score, **{key: value for key, value in found.items() if key != 'score'}}
    for delays, goal in ((1, -6.6), (2, -7.0), (3, -7.6)):
        found = after(stagger(delays), seconds)
        name = f'stagger, {delays} delay{"s" * (delays > 1)} (goal {goal} dB)'
        table[name] = {'dip [dB]': -found['score'], 'PRIs': found['PRIs'], 'after [s]': found['after [s]']}
    return table


def growth():
    """Return sets scored in a second as the problem grows."""
    sizes = ((2, 1), (3, 2), (4, 2), (6, 3), (8, 1), (8, 3), (8, 5), (10, 3), (12, 4), (16, 5))
    rows = {f'{m} of {n}': replace(FINE, places=(PLACE,) * n, m=m) for n, m in sizes}
    rows |= {f'out to {km} km': replace(FINE, range_m=(0.0, km * 1e3), decode_m=km * 1e3) for km in (50, 100, 400)}
    rows |= {f'up to {speed} m/s': replace(FINE, speed_m_s=(0.0, float(speed))) for speed in (300, 3000)}
    rows |= {f'{high - 500 + 1} candidates': replace(FINE, pri_counts=(500, high)) for high in (531, 627, 1011, 2035)}
    return {name: {'sets/s': rate(limits, 1.0)} for name, limits in rows.items()}


IN_THE_BROWSER = {
    'browser: sets/s, 50-95 us on 1 us (goal 20,000)': (1.0, 50, 95),
    'browser: sets/s, 35-150 us on 0.1 us (goal 40,000)': (10.0, 35, 150),
}
TRIED = '() => Number(document.querySelector(`[data-finder="progress"]`).dataset.tried)'
UNDER_WAY_MS, BROWSER_S = 6000, 6.0


def in_the_browser():
    """Return sets scored in a second by the note in a Chromium, from limits in words to the counted progress."""
    start = _bench_start()
    with sync_playwright() as playwright, start.address_of(DIST) as address:
        browser = playwright.chromium.launch(executable_path=chromium(), args=list(OPTIONS))
        table = {name: _page_rate(browser.new_page(), address, *case) for name, case in IN_THE_BROWSER.items()}
        browser.close()
    return table


def _bench_start():
    """Return the benchmark beside this one, which knows how to serve a folder."""
    spec = importlib.util.spec_from_file_location('bench_start', Path(__file__).with_name('bench_start.py'))
    module = importlib.util.module_from_spec(spec)
    spec.loader.exec_module(module)
    return module


def _yardstick(clock_mhz):
    """Return the yardstick as a plan."""
    return {
        'radar': {'carrier_ghz': SPEED_OF_LIGHT_M_S / 0.03 / 1e9, 'recovery_us': 10.0, 'clock_mhz': clock_mhz},
        'coverage': {'range_km': [0.0, 185.2], 'speed_mps': [0.0, 1500.0]},
        'wanted': {'decode_range': True},
        'waveform': {'pri_us': [51, 53, 60, 63, 67, 84, 89, 93], 'pulses': 10, 'detect_m': 3},
        'doppler': {'notch_mps': 17.0},
    }


def _page_rate(page, address, clock_mhz, low, high):
    """Type the yardstick's limits, find plans, and count for some seconds once the search is under way."""
    page.goto(f'{address}#{link.write(_yardstick(clock_mhz))}')
    page.locator('html[data-engine="ready"]').wait_for(state='attached', timeout=180_000)
    part = page.locator('#finder')
    part.scroll_into_view_if_needed()
    for key, value in (('pri_us.0', low), ('pri_us.1', high)):
        number = part.locator(f'[data-key="find.{key}"]')
        number.click()
        number.fill(str(value))
        number.press('Enter')
    part.get_by_label('Decoding').select_option('exact')
    page.wait_for_timeout(2000)
    part.locator('[data-finder="start"]').click()
    page.wait_for_timeout(UNDER_WAY_MS)  # a further worker is ready by then
    first, began = page.evaluate(TRIED), time.perf_counter()
    page.wait_for_timeout(1000 * BROWSER_S)
    scored = (page.evaluate(TRIED) - first) / (time.perf_counter() - began)
    page.close()
    return scored


def of_two_workers(seconds=6.0):
    """Return how much more two processes do than one in the same time."""
    done = []
    for workers in (1, 2):
        with ProcessPoolExecutor(workers) as pool:
            list(pool.map(_slice, range(workers)))  # processes and tables are there before the clock runs
            start, tried, waiting, number = time.perf_counter(), 0, [], workers
            while time.perf_counter() - start < seconds:
                while len(waiting) < 2 * workers:
                    waiting.append(pool.submit(_slice, number))
                    number += 1
                tried += waiting.pop(0).result()
            done.append(tried / (time.perf_counter() - start))
            pool.shutdown(cancel_futures=True)
    return done[1] / done[0]


def _slice(number):
    return run_slice(COARSE, 1, number).tried


def measure():
    """Return rates, ratios to the grids in the same process, quality after some seconds, and how the rate grows."""
    coarse, fine = rate(COARSE), rate(FINE)
    pris, fine_pris = (54, 59, 61, 67, 69, 78, 83, 87), (570, 690, 770, 820, 1010, 1090, 1190, 1460)
    small, boolean = (_grid_rate(grid, COARSE, pris) for grid in (grid_of_small_integers, grid_of_booleans))
    search = Search(COARSE)
    return {
        'sets/s, 50-95 us on 1 us (goal 40,000)': coarse,
        'sets/s, 35-150 us on 0.1 us (goal 60,000)': fine,
        '50-95 us: times the int8 grid (goal 150)': coarse / small,
        '50-95 us: times the boolean array (goal 400)': coarse / boolean,
        '35-150 us: times the int8 grid (goal 150)': fine / _grid_rate(grid_of_small_integers, FINE, fine_pris),
        '35-150 us: times the boolean array (goal 400)': fine / _grid_rate(grid_of_booleans, FINE, fine_pris),
        'differs from the grid by': abs(search.better(pris).visible_share - grid_of_small_integers(COARSE, pris)),
        'two processes do, times one (goal 1.7 on two idle cores)': of_two_workers(),
        **in_the_browser(),
        'quality': quality(),
        'growth': growth(),
    }


if __name__ == '__main__':
    for name, value in measure().items():
        print(name, value if not isinstance(value, dict) else '')
        for row, columns in value.items() if isinstance(value, dict) else ():
            print('   ', row, columns)
