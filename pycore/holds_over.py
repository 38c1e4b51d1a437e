"""Each finding at its worst, over an interval of carriers and of rain speeds.

A carrier that is one for all PRFs runs over the interval; several carriers move
together, the first one over the interval and the others by as much. Rain runs
likewise: the first patch over the interval, the others by as much. The
interval is looked at in 65 points, then three times more finely around the worst.
What is worst between two points can be missed where it is narrower than that.
"""

from dataclasses import dataclass, replace
from fractions import Fraction

from pycore.computed import Computed
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.findings import findings, named
from pycore.findings.finding import Finding
from pycore.findings.rank import rank
from pycore.plan_keys import BY_PATH
from pycore.shown import digits
from pycore.wording import THIN_SPACE, trimmed

POINTS = 65
"""Points that an interval is first looked at in. [unitless]"""
_FINER = (17, 3)
"""Points of each finer look between the neighbours of the worst, and how often it is repeated. [unitless]"""
_ON_CARRIER = (
    *('visible', 'must-see', 'largest-hole', 'unseen-inbound', 'blind-speed', 'decode-speed', 'detection'),
    *('unseen-crossing', 'nyquist', 'extended-nyquist', 'unfolding', 'velocity-error'),
)
"""Findings that can depend on the carrier; the rest are the same all over the interval."""
WITH_CLUTTER = 'share-with-clutter'
"""What is said of the share seen with clutter counted too, which alone depends on the rain's speed."""


@dataclass(frozen=True, slots=True)
class Held:
    """A finding over the intervals that the plan must hold over.

    Parameters
    ----------
    finding : Finding
        At the plan's own carrier, judged by the worst. [unitless]
    worst : Finding
        At the carrier where it is worst. [unitless]
    carrier_ghz : float
        That carrier, the first one of several. [GHz]
    """

    finding: Finding
    worst: Finding
    carrier_ghz: float


def judged(computed, units):
    """Return the findings of a plan, judged by the worst where it must hold over an interval.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    findings : list of Finding
        As :func:`pycore.findings.findings` gives them, where nothing is to be held.
    """
    return [one.finding for one in held(computed, units)]


def held(computed, units):
    """Return each finding with its worst over the interval of carriers.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    held : list of Held
        Without an interval of carriers, each its own worst. Where only what is judged is to be worked out, what is
        not judged is its own worst too.
    """
    over = _carriers(computed.plan)
    own = float(computed.plan.carrier_exact_hz[0]) / 1e9
    found = findings(computed, units)
    if over is None:
        return [Held(one, one, own) for one in found]
    known = {}
    return [_held(computed, one, over, own, known, units) for one in found]


def _carriers(plan):
    return None if plan.holds_over is None else plan.holds_over['carrier_ghz']


def _held(computed, finding, over, own, known, units):
    """Find where one finding is worst, and judge it by that."""
    base = finding.name.partition('.')[0]
    if base not in _ON_CARRIER or (finding.met is None and not computed.with_echoes):
        return Held(finding, finding, own)

    def at(carrier_ghz):
        if carrier_ghz not in known:
            known[carrier_ghz] = Computed(on_carrier(computed.plan, carrier_ghz), computed.with_echoes)
        return named(known[carrier_ghz], finding.name, units)

    carrier, worst = _worst(at, over, lambda one: (one.met is not False, rank(one.name, one.value)), own)
    return Held(_judged_by(finding, worst, carrier, over), worst, carrier)


def _worst(at, over, order, own=None):
    """Return where a thing is worst over an interval, and what it is there: 65 points, and finer ones around it."""
    low, high = over
    points = _points(low, high, POINTS)
    if own is not None and low <= own <= high:
        points = sorted({*points, own})
    for _ in range(_FINER[1] + 1):
        best = min(range(len(points)), key=lambda place: order(at(points[place])))
        worst = points[best]
        points = _points(points[max(best - 1, 0)], points[min(best + 1, len(points) - 1)], _FINER[0])
        points = sorted({*points, worst})
    return worst, at(worst)


def _points(low, high, count):
    """Return points as short decimals, so that a carrier stays one that can be typed."""
    return [float(f'{low + (high - low) * place / (count - 1):.9g}') for place in range(count)]


def _judged_by(finding, worst, carrier_ghz, over):
    """Return a finding whose verdict is that of its worst, and say where that is."""
    unit = f'{THIN_SPACE}GHz'
    span = f'over {digits(over[0])} to {digits(over[1])}{unit}'
    if worst.value == finding.value:
        return replace(finding, met=worst.met, detail=_also(finding.detail, f'{span} it is nowhere worse'))
    where = f'at {trimmed(carrier_ghz, 5)}{unit}'
    said = f'{span} the worst is {worst.value_text}, {where}'
    if finding.met is not None:
        said += ', which it is judged by'
    return replace(
        finding,
        met=worst.met,
        detail=_also(finding.detail, said),
        fault=f'{where} {worst.fault}' if worst.fault else '',
        spare=worst.spare,
        spare_text=worst.spare_text,
    )


def _also(detail, said):
    return f'{detail}; {said}' if detail else said


def on_carrier(plan, carrier_ghz):
    """Return a plan on another carrier; several carriers move together.

    Parameters
    ----------
    plan : Plan
        The plan. [unitless]
    carrier_ghz : float
        The first PRF's new carrier. [GHz]

    Returns
    -------
    plan : Plan
        All else as it was; a carrier never leaves its legal limits. [unitless]
    """
    key = BY_PATH['radar.carrier_ghz']
    limits = [Fraction(str(end)) * 10**9 for end in (key.lowest, key.highest)]
    by = Fraction(str(carrier_ghz)) * 10**9 - plan.carrier_exact_hz[0]
    exact = tuple(min(max(one + by, limits[0]), limits[1]) for one in plan.carrier_exact_hz)
    carrier = plan.carrier_hz.copy()
    carrier[:] = [float(one) for one in exact]
    return replace(plan, carrier_exact_hz=exact, carrier_hz=carrier, wavelength_m=SPEED_OF_LIGHT_M_S / carrier)


def with_rain_at(plan, speed_m_s):
    """Return a plan whose rain moves at another speed; several patches move together.

    Parameters
    ----------
    plan : Plan
        The plan, with rain. [unitless]
    speed_m_s : float
        The first patch's new mean speed, positive closing. [m/s]

    Returns
    -------
    plan : Plan
        All else as it was. [unitless]
    """
    by = speed_m_s - plan.patches[0].speed_m_s
    return replace(plan, patches=tuple(replace(patch, speed_m_s=patch.speed_m_s + by) for patch in plan.patches))


def clutter_at_its_worst(computed):
    """Return the least share that is seen with clutter, over the intervals of carriers and of rain speeds.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]

    Returns
    -------
    worst : dict or None
        ``value``, ``carrier_ghz``, ``rain_mps``; ``None`` where nothing is to be held, where there is no clutter, or
        for a stagger.

    Notes
    -----
    Over both intervals together the worst is found in turns: over the rain's speed at the plan's carrier, over the
    carrier at that speed, and over the speed again.
    """
    plan = computed.plan
    if plan.holds_over is None or computed.is_stagger or not computed.echoes.patches:
        return None
    carriers = plan.holds_over['carrier_ghz']
    speeds = plan.holds_over['rain_mps'] if plan.patches else None
    here = float(plan.carrier_exact_hz[0]) / 1e9, plan.patches[0].speed_m_s if plan.patches else None
    seen = _SeenWithClutter(plan)
    for axis in (1, 0, 1):
        over = (carriers, speeds)[axis]
        if over is not None:
            here = seen.worst_along(axis, here, over)
    return {'value': seen.share(here), 'carrier_ghz': here[0], 'rain_mps': here[1]}


class _SeenWithClutter:
    """The share seen with clutter on other carriers and at other rain speeds, each worked out once."""

    def __init__(self, plan):
        self._plan, self._known = plan, {}

    def share(self, here):
        """Return the share at a carrier [GHz] and a rain speed [m/s]."""
        if here not in self._known:
            moved = on_carrier(self._plan, here[0])
            moved = moved if here[1] is None else with_rain_at(moved, here[1])
            self._known[here] = Computed(moved).echoes.share_with_clutter
        return self._known[here]

    def worst_along(self, axis, here, over):
        """Return where the share is least along one axis, the other being held."""

        def at(value):
            return self.share(_put(here, axis, value))

        return _put(here, axis, _worst(at, over, float)[0])


def _put(here, axis, value):
    return (value, here[1]) if axis == 0 else (here[0], value)


def as_rows(computed, each):
    """Return what ``assess`` says of the intervals that a plan must hold over.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    each : sequence of Held
        Of :func:`held`. [unitless]

    Returns
    -------
    rows : dict or None
        For each finding its worst ``value``, ``value_text``, ``met`` and ``carrier_ghz`` (``None`` where it is the
        same on every carrier), and ``share-with-clutter`` where there is clutter; ``None`` where nothing is held.
    """
    plan = computed.plan
    if plan.holds_over is None:
        return None
    rows = {one.finding.name: _row(one, plan) for one in each}
    clutter = clutter_at_its_worst(computed)
    return rows if clutter is None else {**rows, WITH_CLUTTER: clutter}


def _row(one, plan):
    varies = _carriers(plan) is not None and one.finding.name.partition('.')[0] in _ON_CARRIER
    return {
        'value': one.worst.value,
        'value_text': one.worst.value_text,
        'met': one.finding.met,
        'carrier_ghz': one.carrier_ghz if varies else None,
    }
