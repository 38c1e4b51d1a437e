"""Each finding at its worst, over an interval of carriers and of rain speeds.

A carrier that is one for all PRFs runs over the interval; several carriers move
together, the first one over the interval and the others by as much. Rain runs
likewise: the first patch over the interval, the others by as much. The
interval is looked at in 65 points, then three times more finely around the worst.
What is worst between two points can be missed where it is narrower than that.
"""

from dataclasses import dataclass, replace

from pycore.computed import Computed
from pycore.findings import findings, named
from pycore.findings.finding import Finding
from pycore.findings.rank import rank
from pycore.held_clutter import clutter_at_its_worst
from pycore.shown import digits
from pycore.wording import THIN_SPACE, trimmed
from pycore.worst_over import on_carrier, worst_over

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
        As :func:`pycore.findings.findings` gives them, where nothing is to be held or judged.
    """
    return [one.finding for one in held(computed, units, only_judged=True)]


def held(computed, units, only_judged=False):
    """Return each finding with its worst over the interval of carriers.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units. [unitless]
    only_judged : bool
        Whether findings that are not judged are left at the plan's own carrier. [unitless]

    Returns
    -------
    held : list of Held
        Without an interval of carriers, each its own worst.
    """
    over = _carriers(computed.plan)
    own = float(computed.plan.carrier_exact_hz[0]) / 1e9
    found = findings(computed, units)
    if over is None:
        return [Held(one, one, own) for one in found]
    known = {}
    return [
        _held(computed, one, over, own, known, units)
        if one.name.partition('.')[0] in _ON_CARRIER and (one.met is not None or not only_judged)
        else Held(one, one, own)
        for one in found
    ]


def _carriers(plan):
    return None if plan.holds_over is None else plan.holds_over['carrier_ghz']


def _held(computed, finding, over, own, known, units):
    """Find where one finding is worst, and judge it by that."""

    def at(carrier_ghz):
        if carrier_ghz not in known:
            known[carrier_ghz] = Computed(on_carrier(computed.plan, carrier_ghz), computed.with_echoes)
        return named(known[carrier_ghz], finding.name, units)

    carrier, worst = worst_over(at, over, lambda one: (one.met is not False, rank(one.name, one.value)), own)
    return Held(_judged_by(finding, worst, carrier, over), worst, carrier)


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
