"""Margins in words: for each input the last number, fit to be typed, at which a verdict stands or is cured.

A number that is said was itself tried: it is rounded to the side on which it
holds, with as many digits as that takes.
"""

import math

from pycore.margins.called import called, is_asked, ways
from pycore.margins.steps import as_typed_value
from pycore.margins.walk import walk
from pycore.sentence import key_of
from pycore.shown import OTHER_UNITS, shown_unit, shown_value
from pycore.wording import capitalised, trimmed

_DIGITS = (3, 4, 5, 6, 8, 10)
NONE_FOUND = '–'
"""Stands where an input can move up to its limits. [unitless]"""
HEADS = {
    True: ['Input', 'now', 'still met down to', 'still met up to'],
    False: ['Input', 'now', 'met when down to', 'met when up to'],
}
"""Heads of the list, for a finding that is met and for one that is not."""


def told(document, entry, met, units):
    """Walk one input and find the words for it.

    Parameters
    ----------
    document : dict
        A filled plan. [plan's units]
    entry : Input
        The input. [unitless]
    met : bool
        The verdict where it stands. [unitless]
    units : mapping
        The reader's preferences. [unitless]

    Yields
    ------
    value : int or float
        One whose verdict is wanted, as for :func:`pycore.margins.walk.walk`. [unit of the key]

    Returns
    -------
    row : dict or None
        ``key``, ``cells`` (name, now, down, up), ``sentence``, ``order`` (what was asked comes last, then the
        tightest first); ``None`` where no flip was found.
    """
    margin = yield from walk(entry, met)
    if margin is None:
        return None
    low = yield from _fit(entry, margin.low, met, -1, units)
    high = yield from _fit(entry, margin.high, met, 1, units)
    name = called(document, entry.path, units)
    texts = [NONE_FOUND if end is None else _shown(entry, end, units) for end in (low, high)]
    return {
        'key': entry.path,
        'cells': [capitalised(name), _shown(entry, entry.value, units), *texts],
        'sentence': _sentence(entry, name, (margin.low, margin.high), (low, high), met, units),
        'order': [is_asked(entry.path), margin.tightness],
    }


def _fit(entry, end, met, way, units):
    """Return the number to say for one end of a margin."""
    if end is None or entry.quantum is not None:
        return end if met or end is None else as_typed_value(end + way * entry.quantum, entry)
    for candidate in _rounded(entry, end, way if not met else -way, units):
        beyond = (candidate - entry.value) * way > 0 and entry.lowest <= candidate <= entry.highest
        if beyond and (yield candidate) is True:
            return candidate
    return end


def _rounded(entry, end, way, units):
    """Yield an end rounded to one side, in the unit it is shown in, with more and more digits."""
    scale = _scale(entry, units)
    shown = end / scale
    for digits in _DIGITS if shown else ():
        place = 10.0 ** (math.floor(math.log10(abs(shown))) - digits + 1)
        whole = math.floor(shown / place) if way < 0 else math.ceil(shown / place)
        yield as_typed_value(float(f'{whole * place * scale:.12g}'), entry)


def _scale(entry, units):
    """Return how much of the plan's unit is one of the shown unit."""
    key = key_of(entry.path)
    return OTHER_UNITS.get(key.unit, {}).get(shown_unit(key, units), {}).get('divide', 1.0)


def _shown(entry, value, units):
    """Return a number with its unit, never with more digits than were found."""
    key = key_of(entry.path)
    if entry.quantum is not None or value == entry.value:
        return shown_value(key, value, units)
    unit = shown_unit(key, units)
    joint = '' if unit in ('', '°') else '\N{NARROW NO-BREAK SPACE}'
    small = 0 < abs(value / _scale(entry, units)) < 1e-4
    text = f'{value:.3g}' if small else trimmed(value / _scale(entry, units), _DIGITS[-1])
    return f'{text}{joint}{unit}'


def _sentence(entry, name, ends, said, met, units):
    """Say the nearer side."""
    gaps = [math.inf if end is None else abs(end - entry.value) for end in ends]
    side = 0 if gaps[0] <= gaps[1] else 1
    verb = ways(entry.path, units)[side]
    text = _shown(entry, said[side], units)
    if not met:
        return f'This is met when {name} {verb}s to {text}.'
    if ends[side] != entry.value:
        return f'{capitalised(name)} may {verb} to {text} before this is no longer met.'
    if entry.quantum is None:
        return f'{capitalised(name)} stands at its limit: if it {verb}s at all, this is no longer met.'
    beyond = as_typed_value(entry.value + (-1, 1)[side] * entry.quantum, entry)
    return f'{capitalised(name)} cannot {verb}: at {_shown(entry, beyond, units)} this is no longer met.'
