"""What one whole assessment costs natively, against the naive way of the same numbers, and how it grows.

The naive way: 1000 by 1000 cells and loops over PRFs and rows, for the visible share, its floor, the share with
each PRF lost, the longest time out of sight, the holes, and the decode span stepped count by count.
"""

import json
import timeit

import numpy as np
from scipy import ndimage

from pycore import api
from pycore.computed import Computed
from pycore.eclipsing import received_share
from pycore.plan.reading import read
from pycore.zones import centres, count_map
from webapp.building.places import ROOT

EIGHT = json.loads((ROOT / 'webapp' / 'examples' / 'eight-prfs.json').read_text('utf-8'))['plan']
SIXTEEN_US = (51, 53, 54, 57, 59, 61, 63, 67, 69, 73, 78, 83, 84, 87, 89, 93)
CELLS = 1000


def cells_of(plan):
    """Which PRF is clear in which cell, as rows of PRFs along each axis."""
    range_m, speed_m_s = centres(plan.range_m, CELLS), centres(plan.speed_m_s, CELLS)
    on_range = []
    for pri, pulse in zip(plan.pri_s, plan.pulse_s, strict=True):
        share = received_share(range_m, pri, pulse, plan.recovery_s, plan.guard_s)
        on_range.append((share >= plan.received_min) & (share > 0))
    blind = plan.wavelength_m / (2 * plan.pri_s)
    apart = np.abs(speed_m_s - np.rint(speed_m_s / blind[:, None]) * blind[:, None])
    return np.array(on_range), apart >= plan.notch_m_s[:, None]


def naive(document):
    """The same numbers by cells and loops."""
    plan = read(document)
    on_range, on_speed = cells_of(plan)
    count = sum(np.outer(a, b).astype(int) for a, b in zip(on_range, on_speed, strict=True))
    seen = count >= plan.m
    lost = [(count - np.outer(a, b) >= plan.m).mean() for a, b in zip(on_range, on_speed, strict=True)]
    longest = 0
    for column in seen.T:
        run = 0
        for cell in column:
            run = 0 if cell else run + 1
            longest = max(longest, run)
    holes = ndimage.label(~seen)[1]
    return seen.mean(), min(lost), longest, holes, decode_by_steps(plan)


def decode_by_steps(plan):
    """The separation at which M PRFs first fail to tell it from zero, half a gate of blur, count by count."""
    gate = plan.clock_hz / plan.bandwidth_hz
    wanted = int(2 * plan.range_m[1] / 299_792_458 * plan.clock_hz)
    for separation in range(int(gate.max()) + 1, wanted):
        apart = [abs((separation + pri / 2) % pri - pri / 2) for pri in plan.pri_counts]
        if sum(a < g / 2 for a, g in zip(apart, gate, strict=True)) >= plan.m:
            return separation
    return None


def milliseconds(call):
    """Best of a few runs. [ms]"""
    return 1e3 * min(timeit.repeat(call, number=1, repeat=5))


def of_n(n):
    """The eight-PRF plan with N PRIs and no lists that would have to grow along."""
    plan = json.loads(json.dumps(EIGHT))
    plan['waveform'].update(pri_us=list(SIXTEEN_US[:n]), detect_m=min(3, n))
    plan['wanted']['detect_km'] = None
    return plan


def with_coverage(factor):
    """The eight-PRF plan out to so many times its range."""
    plan = json.loads(json.dumps(EIGHT))
    plan['coverage']['range_km'][1] *= factor
    return plan


def map_milliseconds(cells):
    """One map for the eye of so many cells a side. [ms]"""
    sight = Computed(read(EIGHT)).sight
    axes = centres(sight.range_m, cells), centres(sight.speed_m_s, cells)
    return milliseconds(lambda: count_map(sight.ranges, sight.speeds, *axes))


def measure():
    """Return the ratio to the naive way, and tables of growth."""
    whole, note = milliseconds(lambda: api.assess(EIGHT)), milliseconds(lambda: api.note(EIGHT))
    plainly = milliseconds(lambda: naive(EIGHT))
    growth = {f'N = {n}': {'note': milliseconds(lambda n=n: api.note(of_n(n)))} for n in (2, 4, 8, 12, 16)}
    reach = {f'{k} times': {'note': milliseconds(lambda k=k: api.note(with_coverage(k)))} for k in (1, 2, 4, 8)}
    maps = {f'{cells} a side': {'map': map_milliseconds(cells)} for cells in (100, 200, 400, 800)}
    return {
        'whole assessment of 8 PRFs, detection and clutter with it [ms]': whole,
        'what an edit asks for, without these [ms]': note,
        'the naive way over what an edit asks for': plainly / note,
        'the naive way over the whole assessment': plainly / whole,
        'growth with N [ms]': growth,
        'growth with the coverage [ms]': reach,
        'growth with the map [ms]': maps,
    }
