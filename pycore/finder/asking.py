"""What a person changes in the limits of a search: an edit is taken as a whole, or refused with its reason.

An edit is ``{'key': path, 'text': typed}``, ``{'key': path, 'value': value}`` (a
step, a choice; ``None`` is again what the plan says) or ``{'do': 'as-the-plan'}``.
"""

import re
from fractions import Fraction

from pycore.errors import InputError
from pycore.finder.keys import BY_PATH
from pycore.finder.limits import check
from pycore.finder.plan import limits_of
from pycore.plan.document import checked_number, shown
from pycore.quantity import as_number, plain, read_number, typed, typed_list
from pycore.shown import shown_unit

_NONE = ('', 'none', '–', '-')
_PAIR = re.compile(r'\s*(?:\.\.|\bto\b|–)\s*')
_APART = re.compile(r'\s*(?:;|\n|,(?=\s)|\band\b)\s*')


def edited(document, asked, edit, units):
    """Return the limits that are asked for after an edit.

    Parameters
    ----------
    document : dict
        The plan, from which what is not asked for comes. [plan's units]
    asked : dict
        What was asked for before, as in :data:`pycore.finder.plan.ASKED`. [unitless]
    edit : dict
        What was done. [unitless]
    units : mapping
        Units that a number without one is meant in. [unitless]

    Returns
    -------
    asked : dict
        After it; a search can start from it.

    Raises
    ------
    InputError
        Where the edit cannot be taken; its field is the edit's key.
    """
    if edit.get('do') == 'as-the-plan':
        return {}
    path = str(edit.get('key'))[:80]
    key = BY_PATH.get(re.sub(r'\.\d+$', '', path))
    if key is None:
        raise InputError(path, f'There is no limit {shown(path)}.')
    before = limits_of(document, asked)
    try:
        value = _typed(key, path, str(edit['text']), units, before) if 'text' in edit else _given(key, edit['value'])
        after = _put(asked, key, path, value, before)
        check(limits_of(document, after))
    except InputError as error:
        raise InputError(path, error.message) from None
    return after


def _given(key, value):
    if value is None or key.kind in ('choice', 'numbers'):
        if key.kind == 'choice' and value not in key.choices:
            raise InputError(key.path, f'{key.label} must be one of {", ".join(key.choices)}; got {shown(value)}.')
        return value
    return checked_number(key, value, key.path)


def _typed(key, path, text, units, before):
    if key.nullable and text.strip().lower() in _NONE:
        return None
    if key.name == 'avoid_us':
        return [_pair(part, key, path, units) for part in _APART.split(plain(text)) if part]
    unit = shown_unit(key, units)
    if key.kind == 'numbers':
        return [_checked(one.value, key, path) for one in typed_list(text, key, path, unit)]
    current = _ends(before, key.name)[int(path[-1])] if key.kind == 'interval' else None
    if key.family == 'pri':
        return _checked(typed(text, key, path, unit, current).value, key, path)
    return read_number(text, key, path, unit, current)


def _pair(text, key, path, units):
    """Return one interval to avoid, its ends in order."""
    ends = _PAIR.split(text)
    if len(ends) != 2:
        raise InputError(path, f'{key.label} must be intervals such as 800 to 820 µs; got {shown(text)}.')
    last = typed(ends[1], key, path, shown_unit(key, units))
    first = typed(ends[0], key, path, last.unit)  # one unit after the last end serves both
    return sorted(_checked(one.value, key, path) for one in (first, last))


def _checked(value, key, path):
    return checked_number(key, as_number(value), path)


def _ends(limits, name):
    """Return the ends of an interval as it is now."""
    counts = limits.pri_counts if name == 'pri_us' else limits.stagger.mean_counts
    return [as_number(Fraction(end) * 10**6 / limits.clock_hz) for end in counts]


def _put(asked, key, path, value, before):
    """Put one value; what hangs on it follows."""
    after, name = dict(asked), key.name
    if name == 'grid':
        step = as_number(Fraction(10**6) / before.clock_hz)
        after |= {'whole_gates': value == 'gates', 'step_us': max(1, step) if value == 'steps' else None}
    elif key.kind == 'interval' and value is not None:
        ends = _ends(before, name)
        ends[int(path[-1])] = value
        if ends[0] > ends[1]:
            raise InputError(
                path, f'{key.label} must run from a shorter to a longer end; got from {ends[0]} to {ends[1]} µs.'
            )
        after[name] = ends
    else:
        after[name] = value
    if name == 'n' and after.get('m') is not None:
        after['m'] = min(after['m'], value)
    return {name: value for name, value in after.items() if value not in (None, False, [])}
