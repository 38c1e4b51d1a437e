"""Edits: what a person did to a number, a list or a choice, applied to a plan.

An edit is a plain dictionary: ``{'key': path, 'text': typed}``, ``{'key': path,
'value': value}`` (a step, a drag, a choice) or ``{'do': action, …}``
(:mod:`pycore.edit.actions`). It gives a new plan and what is to be said about
it, or is refused as a whole; a refused edit of a key names that key, so that
what was typed stays where it was typed.
"""

from dataclasses import dataclass, field
from fractions import Fraction

from pycore.clock import on_clock
from pycore.edit.actions import ACTIONS
from pycore.edit.pris import remove_pri, rounded_pris, switched_kind, taken_pris
from pycore.errors import InputError
from pycore.plan.document import checked_number, shown
from pycore.plan.keys import MOST_PRIS
from pycore.plan.paths import known_key, put, value_at
from pycore.plan.reading import filled, read
from pycore.plan.records import Plan
from pycore.quantity import as_number, read_number, typed, typed_list
from pycore.shown import shown_unit
from pycore.wording import SHOWN_UNITS

_NONE = ('', 'none', '–', '-')
_YES, _NO = ('yes', 'true', 'on'), ('no', 'false', 'off', '')
_LONGEST_FIELD = 80


@dataclass(frozen=True, slots=True)
class Edited:
    """A plan after an edit, and what there is to say about it.

    Parameters
    ----------
    plan : Plan
        The new plan, read and checked. [SI]
    said : list of str
        Sentences such as a rounding to the clock. [unitless]
    """

    plan: Plan
    said: list = field(default_factory=list)

    @property
    def document(self):
        """The new plan in its own units, every default filled in."""
        return self.plan.document


def apply(document, edit, units=SHOWN_UNITS):
    """Return a plan after one edit.

    Parameters
    ----------
    document : dict
        The plan before. [plan's units]
    edit : dict
        What was done. [unitless]
    units : mapping
        Units that a number without one is meant in. [unitless]

    Returns
    -------
    edited : Edited
        The plan after, checked as a whole.

    Raises
    ------
    InputError
        Where the edit cannot be taken; the plan before stays as it is.
    """
    plan = filled(document)
    if 'do' in edit:
        said = _action(edit)(plan, edit, units)
        return Edited(read(plan), said)
    path = str(edit.get('key'))
    try:
        said = _typed(plan, path, str(edit['text']), units) if 'text' in edit else _set(plan, path, edit.get('value'))
        return Edited(read(plan), said)
    except InputError as error:
        raise InputError(path[:_LONGEST_FIELD], error.message) from None


def _action(edit):
    action = ACTIONS.get(edit['do']) if isinstance(edit['do'], str) else None
    if action is None:
        raise InputError('', f'There is no action {shown(edit["do"])}.')
    return action


def _set(plan, path, value):
    """Take a value as it is: a step, a drag, a choice."""
    key = known_key(path)
    if path == 'waveform.kind':
        return switched_kind(plan, value)
    if isinstance(value, int | float) and key.lowest is not None:
        checked_number(key, value, path)
    if key.path == 'waveform.pri_us' and path != key.path:
        return _put_pri(plan, path, Fraction(str(checked_number(key, value, path))), key.unit)
    return _put(plan, key, path, value)


def _typed(plan, path, text, units):
    """Take what was typed for a key."""
    key = known_key(path)
    if path == 'waveform.kind':
        return switched_kind(plan, text)
    if key.nullable and text.strip().lower() in _NONE and not (key.kind == 'text' and text.strip()):
        return _put(plan, key, path, None)
    if key.kind in ('text', 'choice'):
        return _put(plan, key, path, text)
    if key.kind == 'flag':
        return _put(plan, key, path, _yes(key, text, path))
    if path == 'waveform.pri_us':
        return taken_pris(plan, text, units)
    unit = shown_unit(key, units)
    if key.path == 'waveform.pri_us':
        return _typed_pri(plan, key, path, text, unit)
    if path == key.path and (key.kind == 'numbers' or key.per_prf and _is_list(text, key, path)):
        return _put(plan, key, path, [as_number(one.value) for one in typed_list(text, key, path, unit)])
    return _put(plan, key, path, read_number(text, key, path, unit, value_at(plan, path)))


def _is_list(text, key, path):
    """Say whether a text is several numbers and not one with its unit."""
    if not 2 <= len(text.split()) <= 4 * MOST_PRIS:
        return False
    try:
        typed(text, key, path)
    except InputError:
        return len(typed_list(text, key, path)) > 1
    return False


def _yes(key, text, path):
    word = text.strip().lower()
    if word not in (*_YES, *_NO):
        raise InputError(path, f'{key.label} must be yes or no; got {shown(text.strip())}.')
    return word in _YES


def _typed_pri(plan, key, path, text, unit):
    if not text.strip():
        return remove_pri(plan, {'index': int(path.rpartition('.')[2])}, {})
    found = typed(text, key, path, unit, value_at(plan, path))
    checked_number(key, float(found.value), path)
    return _put_pri(plan, path, found.value, found.unit)


def _put_pri(plan, path, pri_us, unit):
    """Put one PRI, on the clock and longer than its pulse."""
    value, said = on_clock(pri_us, plan['radar']['clock_mhz'], unit)
    put(plan, path, value)
    pulses = plan['radar']['pulse_us']
    pulse = pulses[int(path.rpartition('.')[2])] if isinstance(pulses, list) else pulses
    if not value > pulse:
        raise InputError(path, f'PRI must be longer than its pulse of {shown(pulse)} µs; got {shown(value)} µs.')
    return said


def _put(plan, key, path, value):
    """Put a value; what hangs on it follows: the PRIs on another clock, the record that a purpose needs."""
    put(plan, path, value)
    if key.kind == 'interval' and path != key.path:
        _in_order(plan, key, path)
    if path == 'radar.clock_mhz':
        return rounded_pris(plan, checked_number(key, value, path))
    return []


def _in_order(plan, key, path):
    """Refuse an end that has crossed the other one, which may be on its way."""
    ends = value_at(plan, path.rpartition('.')[0])
    if all(isinstance(end, int | float) for end in ends) and not ends[0] < ends[1]:
        low, high = (shown(end) for end in ends)
        got = f'from {low} to {high}{" " + key.unit if key.unit else ""}'
        raise InputError(path, f'{key.label} must run from a lower to a higher end; got {got}: type the other end.')
