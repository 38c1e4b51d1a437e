"""The values that an input is stepped through, outward from where it stands.

First small parts of a step, then whole ones, each 1/64 of the key's legal range.
Keys that cannot be negative are stepped by factors (over six decades where they
begin at 0), signed ones evenly, counts and PRIs by single ones at first.
"""

import math
from itertools import count, takewhile

STEPS = 64
"""A step is so many parts of a key's legal range. [unitless]"""
_DECADES = 6
"""A key that begins at 0 is stepped by factors over so many decades below its highest value. [unitless]"""
_FIRST_PARTS = (1 / 64, 1 / 32, 1 / 16, 1 / 8, 1 / 4, 1 / 2)
_SINGLE = 64
"""So many single counts are tried before the steps grow. [unitless]"""


def as_typed_value(value, entry):
    """Return a value as it would be typed: a whole count, or twelve digits.

    Parameters
    ----------
    value : float
        What was worked out. [unit of the key]
    entry : Input
        The input. [unitless]

    Returns
    -------
    value : int or float
        Near enough to it that no margin changes.
    """
    return round(value) if entry.is_count else float(f'{value:.12g}')


def outward(entry, way):
    """Yield the values that an input is stepped through on one side, up to its legal limit.

    Parameters
    ----------
    entry : Input
        The input. [unitless]
    way : int
        -1 for down, 1 for up. [unitless]

    Yields
    ------
    value : int or float
        Moving away from the input's own value, each once; the limit last. [unit of the key]
    """
    limit = entry.lowest if way < 0 else entry.highest
    if entry.quantum is not None:
        walk = _counted(entry, way)
    elif entry.lowest < 0:
        walk = _evenly(entry, way)
    else:
        walk = _by_factors(entry, way)
    last = entry.value
    for value in takewhile(lambda one: (one - limit) * way < 0, walk):
        if value != last:
            yield (last := value)
    if last != limit:
        yield limit


def _parts():
    """Yield how many steps out each value lies: parts of the first one, then whole ones."""
    yield from _FIRST_PARTS
    yield from count(1)


def _evenly(entry, way):
    step = (entry.highest - entry.lowest) / STEPS
    return (as_typed_value(entry.value + way * part * step, entry) for part in _parts())


def _by_factors(entry, way):
    lowest = entry.lowest or entry.highest * 10.0**-_DECADES
    if way < 0 and entry.value <= lowest:
        return iter(())
    start = max(entry.value, lowest)
    factor = math.log(entry.highest / lowest) / STEPS
    ends = (start * math.exp(min(way * part * factor, 700.0)) for part in _parts())
    # Below the last decade of a key that begins at 0 there is only 0.
    return (as_typed_value(value, entry) for value in takewhile(lambda one: way > 0 or one >= lowest, ends))


def _counted(entry, way):
    """Step by single counts, then by factors of the legal range, never less than one count."""
    here = round(entry.value / entry.quantum)
    lowest = max(entry.lowest, entry.quantum)
    growth = math.exp(math.log(entry.highest / lowest) / STEPS)
    for single in range(1, _SINGLE + 1):
        yield as_typed_value((here + way * single) * entry.quantum, entry)
    at = here + way * _SINGLE
    while 0 < at < 1e15:
        at = max(at + 1, math.floor(at * growth)) if way > 0 else min(at - 1, math.ceil(at / growth))
        yield as_typed_value(at * entry.quantum, entry)
