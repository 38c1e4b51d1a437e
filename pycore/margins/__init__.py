"""How far each input can move, alone, before the verdict of a finding flips.

Each input is stepped outward from its value (:mod:`pycore.margins.steps`), and the
first change of the verdict is bisected. A walk ends where the plan is refused, or
where the key's limits are. A flip that is narrower than the step can be missed.
"""

from dataclasses import dataclass

from pycore.computed import Computed
from pycore.errors import InputError
from pycore.findings import named
from pycore.margins.inputs import inputs_of
from pycore.margins.plans import Tried
from pycore.margins.steps import STEPS, as_typed_value, outward
from pycore.plan.document import shown
from pycore.wording import SHOWN_UNITS

_AS_CLOSE_AS = 1e-9
"""The bisection ends when it knows the flip to this part of the input. [unitless]"""
NOTE = (
    'Each input is moved alone, in steps of 1/64 of its legal range (single counts for PRIs and pulses near their '
    'value), and the first change of the verdict is bisected; a flip narrower than a step can be missed.'
)
"""What stands under margins wherever they are shown."""


@dataclass(frozen=True, slots=True)
class Margin:
    """How far one input can move before a verdict flips.

    Parameters
    ----------
    key : str
        Path of the input in the plan. [unitless]
    label : str
        What it is called. [unitless]
    unit : str
        Unit of the plan. [unitless]
    value : int or float
        Where it stands. [unit]
    low, high : int, float or None
        Last values on either side at which the verdict still is as it was; ``None`` where no flip was found up to the
        key's limits or to where the plan is refused. [unit]
    tightness : float
        The nearer of the two as a part of the value. [unitless]
    """

    key: str
    label: str
    unit: str
    value: float
    low: float | None
    high: float | None
    tightness: float

    @property
    def row(self):
        """The margin as a plain dictionary, ready for JSON."""
        return {
            'key': self.key,
            'label': self.label,
            'unit': self.unit,
            'value': self.value,
            'from': self.low,
            'to': self.high,
        }


def margins(plan, name, tried=None):
    """Return how far each input that matters to a finding can move before its verdict flips, tightest first.

    Parameters
    ----------
    plan : Plan
        The plan. [unitless]
    name : str
        Name of the finding. [unitless]
    tried : Tried or None
        Plans that were worked out before, to share between findings. [unitless]

    Returns
    -------
    margins : list of Margin
        Only inputs for which a flip was found; none for a finding that is not judged.
    """
    document = plan.document
    tried = tried or Tried(document)
    found = named(Computed(plan, with_echoes=False), name, SHOWN_UNITS)
    if found is None or found.met is None:
        return []
    each = [_margin(tried, name, one, found.met) for one in inputs_of(document, name)]
    return sorted((one for one in each if one is not None), key=lambda one: one.tightness)


def all_margins(plan, findings):
    """Return the margins of every judged finding.

    Parameters
    ----------
    plan : Plan
        The plan. [unitless]
    findings : sequence of Finding
        Its findings. [unitless]

    Returns
    -------
    margins : dict
        For each finding that is judged, by its name, the rows of :func:`margins`, ready for JSON.
    """
    tried = Tried(plan.document)
    judged = (finding.name for finding in findings if finding.met is not None)
    return {name: [one.row for one in margins(plan, name, tried)] for name in judged}


def margins_shown(plan, name):
    """Return the margins of one finding as a page shows them.

    Parameters
    ----------
    plan : Plan
        The plan. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    shown : dict
        ``finding``, ``met``, ``margins`` (rows, tightest first), ``note``.

    Raises
    ------
    InputError
        Where the plan has no such finding.
    """
    found = asked_for(Computed(plan, with_echoes=False), name)
    rows = [one.row for one in margins(plan, found.name)]
    return {'finding': found.name, 'met': found.met, 'margins': rows, 'note': NOTE}


def asked_for(computed, name):
    """Return the finding that was asked for by its name.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    finding : Finding
        At the plan's own carrier.

    Raises
    ------
    InputError
        Where the plan has no such finding.
    """
    found = named(computed, name, SHOWN_UNITS) if isinstance(name, str) else None
    if found is None:
        raise InputError('finding', f'The plan has no finding {shown(name)}.')
    return found


def _margin(tried, name, entry, met):
    """Walk one input down and up."""
    low, high = (_last_alike(tried, name, entry, met, way) for way in (-1, 1))
    gaps = [abs(end - entry.value) for end in (low, high) if end is not None]
    if not gaps:
        return None
    return Margin(entry.path, entry.label, entry.unit, entry.value, low, high, min(gaps) / _scale(entry))


def _scale(entry):
    """Return what a margin is measured against: the value, or one step where that is 0."""
    return abs(entry.value) or (entry.highest - entry.lowest) / STEPS


def _last_alike(tried, name, entry, met, way):
    """Return the last value on one side at which the verdict is as it was; ``None`` if it never flips there."""
    alike = entry.value
    for value in outward(entry, way):
        verdict = tried.verdict(name, entry.path, value)
        if verdict == 'refused':
            return None
        if verdict != met:
            return _bisected(tried, name, entry, met, alike, value)
        alike = value
    return None


def _bisected(tried, name, entry, met, alike, flipped):
    """Close in on the flip between two values; a plan that is refused counts as flipped."""
    while True:
        middle = _between(entry, alike, flipped)
        if middle is None:
            return alike
        if tried.verdict(name, entry.path, middle) == met:
            alike = middle
        else:
            flipped = middle


def _between(entry, alike, flipped):
    """Return a value between two, ``None`` where they are as close as is asked."""
    if entry.quantum is not None:
        low, high = (round(end / entry.quantum) for end in (alike, flipped))
        return None if abs(high - low) <= 1 else as_typed_value((low + high) // 2 * entry.quantum, entry)
    if abs(alike - flipped) <= _AS_CLOSE_AS * max(abs(alike), abs(flipped), abs(entry.value)):
        return None
    middle = as_typed_value((alike + flipped) / 2, entry)
    return None if middle in (alike, flipped) else middle
