"""What a person types, as an exact number in the plan's unit: ``900 Hz``, ``1,02 µs``, ``60nmi``, ``+20%``.

Decimals are kept exact (fractions) until the last rounding, so that 2800 MHz is
2.8 GHz. A point or a comma is a decimal sign; a single comma followed by
exactly three digits could be either and is refused with both readings.
"""

import re
from dataclasses import dataclass
from fractions import Fraction

from pycore.errors import InputError
from pycore.plan.document import checked_number, limits_text, shown
from pycore.units import ALONE, FAMILIES, unit_of
from pycore.wording import MINUS, trimmed

_NUMBER = r'[+\-]?(?:[0-9]+(?:[.,][0-9]*)?|[.,][0-9]+)(?:[eE][+\-]?[0-9]+)?'
_ONE = re.compile(rf'\s*({_NUMBER})\s*(.*?)\s*', re.DOTALL)
_RELATIVE = re.compile(rf'\s*([+\-])\s*({_NUMBER.removeprefix("[+" + chr(92) + "-]?")})\s*%\s*')
_LONGEST = 4000
_MOST_DIGITS = 40


@dataclass(frozen=True, slots=True)
class Typed:
    """A number that was typed.

    Parameters
    ----------
    value : Fraction
        In the unit of the key. [unit of the key]
    unit : str
        Unit that was meant; a frequency where a PRI was typed as one. [unitless]
    """

    value: Fraction
    unit: str


def plain(text):
    """Return text with the page's own signs turned into plain ones.

    Parameters
    ----------
    text : str
        What was typed or pasted. [unitless]

    Returns
    -------
    text : str
        Minus signs are ``-``, thousands are not spaced.
    """
    return re.sub(r'(?<=\d)[\u202f\u00a0\u2009](?=\d{3})', '', text).replace(MINUS, '-').replace('\u202f', ' ')


def number(text):
    """Return a decimal exactly.

    Parameters
    ----------
    text : str
        Digits with a point or a comma. [unitless]

    Returns
    -------
    value : Fraction
        The number.

    Raises
    ------
    ValueError
        Where it is no number, or so long that it cannot be meant.
    """
    if len(text) > _MOST_DIGITS or not re.fullmatch(_NUMBER, text):
        raise ValueError(text)
    mantissa, _, exponent = text.lower().replace(',', '.').partition('e')
    if exponent and abs(int(exponent)) > _MOST_DIGITS:
        raise ValueError(text)
    return Fraction(mantissa) * Fraction(10) ** int(exponent or 0)


def typed(text, key, field, unit=None, current=None):
    """Return one number as it was typed for a key.

    Parameters
    ----------
    text : str
        What was typed. [unitless]
    key : Key
        The key; its family says which units are understood. [unitless]
    field : str
        Path for the error, with the part of a list. [unitless]
    unit : str or None
        Unit that is meant where none is typed; the key's own when not given. [unitless]
    current : float or None
        Present value, which ``+20%`` and ``-10%`` change. [unit of the key]

    Returns
    -------
    typed : Typed
        The number in the key's unit, not yet held against its limits.

    Raises
    ------
    InputError
        Where it is not a number with a unit of the family.
    """
    text = _unspaced(plain(text))
    relative = _RELATIVE.fullmatch(text)
    if relative and current is not None and key.family not in ('percent', 'share'):
        change = number(relative[2]) / 100
        return Typed(Fraction(str(current)) * (1 + change if relative[1] == '+' else 1 - change), key.unit)
    match = _ONE.fullmatch(text) if len(text) <= _LONGEST else None
    try:
        value = number(match[1]) if match else None
    except ValueError:
        value = None
    if value is None or re.match(r'[0-9.,+\-]', match[2]):
        raise InputError(field, f'{key.label} must be {_limits(key)}; got {shown(text.strip())}.')
    if re.fullmatch(r'[+\-]?[0-9]{1,3},[0-9]{3}', match[1]):
        raise InputError(field, _two_readings(key, match[1]))
    return _in_key_unit(value, match[2], key, field, unit)


def _unspaced(text):
    """Take the spaces out of a number whose thousands are spaced: ``10 000 µs``."""
    return re.sub(r'^\s*([+\-]?[0-9]{1,3}(?: [0-9]{3})+)(?![0-9])', lambda found: found[1].replace(' ', ''), text)


def _limits(key):
    return 'a number' if key.lowest is None else limits_text(key)


def _two_readings(key, text):
    """Offer both readings of a comma before three digits."""
    small, large = trimmed(float(number(text)), 9), trimmed(float(text.replace(',', '')), 9)
    return f'{key.label}: {text} could mean {small} or {large}; type one of the two.'


def _in_key_unit(value, unit_text, key, field, unit):
    """Turn a number with its unit into the unit of the key; a frequency turns a PRI over."""
    units = FAMILIES[key.family]
    alone = ALONE.get(key.family, {})
    meant = unit_of(alone.get(unit_text, unit_text), units) if unit_text else (unit or key.unit)
    if meant is None:
        known = ', '.join(name for name in units if name) or 'no unit'
        raise InputError(field, f'{key.label} is given in {known}; got {shown(unit_text)}.')
    if key.family == 'pri' and meant in FAMILIES['frequency']:
        if value <= 0:
            raise InputError(field, f'{key.label} must be {limits_text(key)}; got {shown(float(value))} {meant}.')
        return Typed(1 / (value * units[meant]) / units[key.unit], meant)
    return Typed(value * units[meant] / units[key.unit], meant)


def as_number(value):
    """Return an exact number as the plan keeps it: an integer where it is one, else the nearest float.

    Parameters
    ----------
    value : Fraction
        Exact. [any]

    Returns
    -------
    value : int or float
        Rounded once.
    """
    return int(value) if value.denominator == 1 and abs(value) < 10**15 else float(value)


def read_number(text, key, field, unit=None, current=None):
    """Return one typed number, held against the limits of its key.

    Parameters
    ----------
    text : str
        What was typed. [unitless]
    key : Key
        A number or a count. [unitless]
    field : str
        Path for the error. [unitless]
    unit : str or None
        Unit that is meant where none is typed. [unitless]
    current : float or None
        Present value. [unit of the key]

    Returns
    -------
    value : int or float
        In the unit of the key.
    """
    if not text.strip():
        raise InputError(field, f'{key.label} must be {_limits(key)}; got nothing.')
    exact = typed(text, key, field, unit, current).value
    if key.kind == 'count':
        exact = _whole(exact, key, field, text)
    value = as_number(exact)
    if '%' in text and key.family not in ('percent', 'share'):
        value = as_number(Fraction(f'{float(exact):.12g}'))
    return checked_number(key, value, field)


def _whole(exact, key, field, text):
    """Round a relative edit of a count; refuse a typed part of one."""
    if exact.denominator != 1 and '%' not in text:
        raise InputError(field, f'{key.label} must be a whole number {limits_text(key)}; got {shown(text.strip())}.')
    return Fraction(round(exact))


_SEPARATORS = re.compile(r'[;\s]+')


def words(text):
    """Split a pasted list into its words: white space, semicolons, line ends; commas where they separate.

    Parameters
    ----------
    text : str
        What was typed or pasted, such as a spreadsheet's column. [unitless]

    Returns
    -------
    words : list of str
        Numbers and units; a first line without any number is a heading and is left out.
    """
    _, body = _heading(plain(text))
    joined = re.sub(r',(?=\s|$)|\band\b', ' ', body)
    separates = '.' in joined
    split = [word.replace(',', ' ') if separates or word.count(',') > 1 else word for word in _SEPARATORS.split(joined)]
    return ' '.join(split).split()


def _heading(text):
    """Part the heading of a column, a first line that does not begin with a number, from the lines under it."""
    first, _, rest = text.strip().partition('\n')
    return (first, rest) if rest and not re.match(rf'\s*{_NUMBER}', first) else ('', text)


def _unit_in(heading, units):
    """Return the unit that a heading such as ``PRF (Hz)`` names, or ``None``."""
    found = [unit_of(word, units) for word in re.findall(r'[^\s()\[\]/,;:]+', heading)]
    return next((unit for unit in found if unit), None)


def typed_list(text, key, field, unit=None):
    """Return a list of numbers as it was typed for a key.

    Parameters
    ----------
    text : str
        Numbers, each with a unit or one unit for all that stand before it, or one in the column's heading. [unitless]
    key : Key
        The key. [unitless]
    field : str
        Path for the error. [unitless]
    unit : str or None
        Unit that is meant where none is typed. [unitless]

    Returns
    -------
    typed : list of Typed
        In the key's unit, not yet held against its limits.
    """
    unit = _unit_in(_heading(plain(text))[0], FAMILIES[key.family]) or unit
    parts = []
    for word in words(text):
        if parts and not re.match(r'[+\-]?[.,]?[0-9]', word):
            parts = [[value, given or word] for value, given in parts]
            continue
        match = re.match(_NUMBER, word)
        parts.append([word[: match.end()], word[match.end() :]] if match else [word, ''])
    return [typed(f'{value} {given}', key, field, unit) for value, given in parts]
