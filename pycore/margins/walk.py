"""How one input is walked, outward and then in on the flip, with the verdicts asked of whoever drives the walk.

A walk is a generator: it yields each value whose verdict it wants to know and is
sent that verdict, so that it can be stopped between any two of them.
"""

from dataclasses import dataclass

from pycore.margins.steps import STEPS, as_typed_value, outward

_AS_CLOSE_AS = 1e-9
"""The bisection ends when it knows the flip to this part of the input. [unitless]"""


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


def walk(entry, met):
    """Walk one input down and up until the verdict flips.

    Parameters
    ----------
    entry : Input
        The input. [unitless]
    met : bool
        The verdict where the input stands. [unitless]

    Yields
    ------
    value : int or float
        One whose verdict is wanted; ``True``, ``False`` or ``'refused'`` is sent back. [unit of the key]

    Returns
    -------
    margin : Margin or None
        ``None`` where no flip was found on either side.
    """
    low = yield from _last_alike(entry, met, -1)
    high = yield from _last_alike(entry, met, 1)
    gaps = [abs(end - entry.value) for end in (low, high) if end is not None]
    if not gaps:
        return None
    return Margin(entry.path, entry.label, entry.unit, entry.value, low, high, min(gaps) / _scale(entry))


def driven(steps, verdict):
    """Return what a walk returns, with every verdict that it asks for.

    Parameters
    ----------
    steps : generator
        A walk. [unitless]
    verdict : callable
        The verdict at a value. [unitless]

    Returns
    -------
    result : object
        What the walk found.
    """
    answer = None
    while True:
        try:
            answer = verdict(steps.send(answer))
        except StopIteration as end:
            return end.value


def _scale(entry):
    """Return what a margin is measured against: the value, or one step where that is 0."""
    return abs(entry.value) or (entry.highest - entry.lowest) / STEPS


def _last_alike(entry, met, way):
    """Return the last value on one side at which the verdict is as it was; ``None`` if it never flips there."""
    alike = entry.value
    for value in outward(entry, way):
        verdict = yield value
        if verdict == 'refused':
            return None
        if verdict != met:
            return (yield from _bisected(entry, met, alike, value))
        alike = value
    return None


def _bisected(entry, met, alike, flipped):
    """Close in on the flip between two values; a plan that is refused counts as flipped."""
    while (middle := _between(entry, alike, flipped)) is not None:
        if (yield middle) == met:
            alike = middle
        else:
            flipped = middle
    return alike


def _between(entry, alike, flipped):
    """Return a value between two, ``None`` where they are as close as is asked."""
    if entry.quantum is not None:
        low, high = (round(end / entry.quantum) for end in (alike, flipped))
        return None if abs(high - low) <= 1 else as_typed_value((low + high) // 2 * entry.quantum, entry)
    if abs(alike - flipped) <= _AS_CLOSE_AS * max(abs(alike), abs(flipped), abs(entry.value)):
        return None
    middle = as_typed_value((alike + flipped) / 2, entry)
    return None if middle in (alike, flipped) else middle
