"""One item of a link: a key's short name and its value, written and read.

Numbers are decimals with digits on both sides of the point, so that ``..``
between the ends of an interval is never ambiguous; every number that has a unit
carries it, so that a number cut short never reads. Text is percent-encoded.
"""

import re
from fractions import Fraction
from urllib.parse import quote, unquote

from pycore.errors import InputError
from pycore.plan.document import limits_text, shown
from pycore.plan.keys import MOST_PRIS
from pycore.quantity import as_number
from pycore.units import FAMILIES

UNIT_TEXT = {'µs': 'us', 'm/s': 'mps', 'km/h': 'kmh', '%': 'pct', '°': 'deg', 'm²': 'm2'}
"""Units whose own spelling mail and chat might spoil, and what stands for them in a link."""

_FROM_TEXT = {text: unit for unit, text in UNIT_TEXT.items()}
_NUMBER = re.compile(r'-?[0-9]{1,40}(?:\.[0-9]{1,40})?(?:e-?[0-9]{1,3})?')


def number_text(value):
    """Return a number as a link spells it.

    Parameters
    ----------
    value : int or float
        The number. [any]

    Returns
    -------
    text : str
        ``[-] digits [. digits] [e [-] digits]``, the shortest that reads back the same.
    """
    mantissa, _, exponent = repr(value).partition('e')
    mantissa = mantissa.removesuffix('.0')
    return f'{mantissa}e{int(exponent)}' if exponent else mantissa


def value_text(key, value):
    """Return a value as a link spells it.

    Parameters
    ----------
    key : Key
        The key. [unitless]
    value : object
        Its value. [unit of the key]

    Returns
    -------
    text : str
        One unit serves a list or both ends of an interval.
    """
    if value is None:
        return 'none'
    if isinstance(value, bool):
        return 'yes' if value else 'no'
    if isinstance(value, str):
        # A text that is itself "none" must not read as no text at all.
        return 'n%6Fne' if value == 'none' else quote(value, safe='~')
    unit = UNIT_TEXT.get(key.unit, key.unit)
    if isinstance(value, list):
        return ('..' if key.kind == 'interval' else ',').join(number_text(one) for one in value) + unit
    return number_text(value) + unit


def read_value(key, text, field):
    """Return what an item of a link says, in the unit of its key.

    Parameters
    ----------
    key : Key
        The key. [unitless]
    text : str
        The item after its ``=``. [unitless]
    field : str
        Path for the error. [unitless]

    Returns
    -------
    value : object
        Not yet held against the limits.

    Raises
    ------
    InputError
        Where it cannot be read.
    """
    if text == 'none':
        return None
    if key.kind == 'flag':
        if text not in ('yes', 'no'):
            raise InputError(field, f'{key.label} must be yes or no; got {shown(text)}.')
        return text == 'yes'
    if key.kind in ('text', 'choice'):
        return _decoded(text)
    if key.kind == 'interval':
        return _read_list(key, text.split('..'), field, text)
    if key.kind == 'numbers' or ',' in text:
        return _read_list(key, text.split(','), field, text)
    return _read_list(key, [text], field, text)[0]


def _decoded(text):
    return unquote(text, errors='replace')


def _read_list(key, parts, field, text):
    """Read numbers; those without a unit share the next one that has one."""
    if len(parts) > MOST_PRIS:
        raise InputError(field, f'{key.label} must be at most {MOST_PRIS} numbers; got {len(parts)}.')
    values, unit = [], None
    for part in reversed(parts):
        match = _NUMBER.match(part)
        spelled = part[match.end() :] if match else ''
        unit = _FROM_TEXT.get(spelled, spelled) or unit or ('' if not key.unit else None)
        if match is None or unit not in FAMILIES[key.family]:
            raise InputError(field, _unreadable(key, text))
        values.append(_in_key_unit(key, match[0], unit, field))
    return values[::-1]


def _unreadable(key, text):
    unit = f' with its unit, such as {UNIT_TEXT.get(key.unit, key.unit)}' if key.unit else ''
    return f'{key.label} must be {limits_text(key)}{unit}; got {shown(text)}.'


def _in_key_unit(key, digits, unit, field):
    """Convert in decimal: 2800 MHz is 2.8 GHz exactly."""
    units = FAMILIES[key.family]
    exact = Fraction(digits)
    if key.family == 'pri' and unit in FAMILIES['frequency']:
        if exact <= 0:
            raise InputError(field, f'{key.label} must be {limits_text(key)}; got {shown(digits + unit)}.')
        return as_number(1 / (exact * units[unit]) / units[key.unit])
    try:
        return as_number(exact * units[unit] / units[key.unit])
    except OverflowError:
        raise InputError(field, _unreadable(key, digits + unit)) from None
