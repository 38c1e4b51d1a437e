"""Plans drawn near their edges, and the clear spans of one worked out in the plainest way."""

from dataclasses import dataclass
from types import SimpleNamespace

import numpy as np
import pytest
from hypothesis import strategies as st

from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.floor import floor_ranges, floor_speeds
from pycore.sight import Sight
from pycore.spans import Spans


@dataclass(frozen=True)
class PlainPlan:
    """What decides where PRFs are clear; arrays have one value for each PRF, all in SI."""

    pri_s: np.ndarray
    pulse_s: np.ndarray
    wavelength_m: np.ndarray
    notch_m_s: np.ndarray
    recovery_s: float
    guard_s: float
    received_min: float
    m: int
    range_m: tuple[float, float]
    speed_m_s: tuple[float, float]

    @property
    def n(self):
        return self.pri_s.size

    @property
    def first_opening_m(self):
        return 0.5 * SPEED_OF_LIGHT_M_S * (self.recovery_s + self.received_min * self.pulse_s)

    @property
    def blind_speed_m_s(self):
        return self.wavelength_m / (2.0 * self.pri_s)


def _spans_of(each, limits):
    """Join the intervals of all PRFs, cut to the axis."""
    cut = [(i, max(a, limits[0]), min(b, limits[1])) for i, some in enumerate(each) for a, b in some]
    kept = [(i, a, b) for i, a, b in cut if a < b] or [(0, limits[0], limits[0])][:0]
    prf, start, stop = zip(*kept, strict=True) if kept else ((), (), ())
    return Spans(np.array(prf, dtype=int), np.array(start, dtype=float), np.array(stop, dtype=float))


def plain_range_spans(plan):
    """Clear ranges, from the definition: the part of the echo that falls between recovery and guard."""
    each = []
    for pri, pulse in zip(plan.pri_s, plan.pulse_s, strict=True):
        late = plan.received_min * pulse
        fits = pri - plan.guard_s - pulse - plan.recovery_s >= max(late, 1e-18)
        count = int(2 * plan.range_m[1] / (SPEED_OF_LIGHT_M_S * pri)) + 1 if fits else 0
        delays = [(k * pri + plan.recovery_s + late, (k + 1) * pri - plan.guard_s - late) for k in range(count)]
        each.append([(0.5 * SPEED_OF_LIGHT_M_S * a, 0.5 * SPEED_OF_LIGHT_M_S * b) for a, b in delays])
    return _spans_of(each, plan.range_m)


def plain_speed_spans(plan):
    """Clear speeds, from the definition: at least the notch away from every multiple of the blind speed."""
    each = []
    for blind, notch in zip(plan.blind_speed_m_s, plan.notch_m_s, strict=True):
        first, last = int(plan.speed_m_s[0] // blind), int(plan.speed_m_s[1] // blind)
        each.append([(k * blind + notch, (k + 1) * blind - notch) for k in range(first, last + 1)])
    return _spans_of(each, plan.speed_m_s)


def plain_sight(plan):
    """The sight of a plan by plain loops, independent of the project's own span makers."""
    return Sight(
        plain_range_spans(plan),
        plain_speed_spans(plan),
        floor_ranges(plan.first_opening_m, plan.range_m),
        floor_speeds(plan.notch_m_s, plan.speed_m_s),
        plan.n,
        plan.m,
        plan.range_m,
        plan.speed_m_s,
    )


def plain_clear_at(plan, range_m, speed_m_s):
    """Which PRFs are clear, by remainders of delay and speed: two bool arrays (N, R) and (N, V)."""
    delay = np.mod(2.0 * range_m / SPEED_OF_LIGHT_M_S, plan.pri_s[:, None])
    pulse, late = plan.pulse_s[:, None], plan.received_min * plan.pulse_s[:, None]
    opens, shuts = pulse + plan.recovery_s, plan.pri_s[:, None] - plan.guard_s
    received = np.minimum(delay + pulse, shuts) - np.maximum(delay, opens)
    folded = np.mod(speed_m_s, plan.blind_speed_m_s[:, None])
    notch = plan.notch_m_s[:, None]
    on_speed = (folded >= notch) & (folded <= plan.blind_speed_m_s[:, None] - notch)
    # A billionth of the pulse for rounding: an echo received whole is received whole.
    return (received >= late - 1e-9 * pulse) & (received > 0), on_speed


def _one_or_each(draw, n, values):
    """One value for all PRFs, or a list of them, as a plan allows."""
    return np.array(draw(st.lists(values, min_size=n, max_size=n)) if draw(st.booleans()) else [draw(values)] * n)


@st.composite
def drawn_plans(draw, most_prfs=16, most_intervals=4.0):
    """Plans of all kinds: odd edges, lists of carriers and pulses, everything from never to always blind."""
    n = draw(st.integers(1, most_prfs))
    pri_s = np.array(draw(st.lists(st.integers(300, 1500), min_size=n, max_size=n))) * 1e-7
    pulse_s = pri_s * _one_or_each(draw, n, st.floats(0.002, 0.45))
    wavelength_m = SPEED_OF_LIGHT_M_S / (_one_or_each(draw, n, st.sampled_from([2.8, 3.1, 9.0, 9.37, 10.0])) * 1e9)
    blind = wavelength_m / (2.0 * pri_s)
    notch_m_s = blind.min() * _one_or_each(draw, n, st.one_of(st.just(0.0), st.floats(0.01, 0.3), st.floats(0.4, 1.6)))
    reach_m = 0.5 * SPEED_OF_LIGHT_M_S * pri_s.max()
    low, long = draw(st.floats(0.0, 1.5)), draw(st.floats(0.1, most_intervals))
    slow, wide = draw(st.floats(-2.0, 1.0)), draw(st.floats(0.1, most_intervals))
    return PlainPlan(
        pri_s,
        pulse_s,
        wavelength_m,
        notch_m_s,
        draw(st.one_of(st.just(0.0), st.floats(1e-7, 3e-5), st.just(2e-4))),
        draw(st.sampled_from([0.0, 0.0, 1e-6, 7.3e-6])),
        draw(st.sampled_from([0.0, 0.25, 0.5, 0.8, 1.0])),
        draw(st.integers(1, n)),
        (low * reach_m, (low + long) * reach_m),
        (slow * blind.max(), (slow + wide) * blind.max()),
    )


@pytest.fixture(scope='session')
def plain():
    """Drawn plans and what the plainest reading of the definitions says about them."""
    return SimpleNamespace(
        Plan=PlainPlan, plans=drawn_plans, sight=plain_sight, clear_at=plain_clear_at, spans_of=_spans_of
    )


@pytest.fixture(scope='session')
def polygons():
    """Areas seen by at least M of N, by shapely's unions and intersections of boxes on a unit square."""
    shapely = pytest.importorskip('shapely')

    def one_prf(ranges, speeds, prf, range_m, speed_m_s):
        across = (np.stack(ranges.of(prf)) - range_m[0]) / (range_m[1] - range_m[0])
        up = (np.stack(speeds.of(prf)) - speed_m_s[0]) / (speed_m_s[1] - speed_m_s[0])
        boxes = [shapely.box(a, c, b, d) for a, b in across.T for c, d in up.T]
        return shapely.unary_union(boxes)

    def at_least(ranges, speeds, n, m, range_m, speed_m_s):
        """Grow 'seen by at least k' one PRF at a time: what was seen by k - 1 and is clear on it comes in."""
        seen = [shapely.box(0, 0, 1, 1)] + [shapely.Polygon()] * m
        for prf in range(n):
            clear = one_prf(ranges, speeds, prf, range_m, speed_m_s)
            seen = seen[:1] + [seen[k].union(seen[k - 1].intersection(clear)) for k in range(1, m + 1)]
        return seen[m]

    def seen(sight):
        return at_least(sight.ranges, sight.speeds, sight.n, sight.m, sight.range_m, sight.speed_m_s)

    def seen_by_any_plan(sight):
        return at_least(sight.floor_ranges, sight.floor_speeds, sight.n, sight.m, sight.range_m, sight.speed_m_s)

    return SimpleNamespace(seen=seen, seen_by_any_plan=seen_by_any_plan)
