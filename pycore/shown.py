"""How an input stands in the sentence and the table: as it was typed, in the unit that the reader prefers.

Rounding is for showing only; the plan keeps what was typed. The page shows the
same before Python has started: it divides (or, for a PRI shown as a frequency,
turns over) by the numbers of ``OTHER_UNITS``. What is round in the other unit was
typed in it and stands as it was typed; the rest keeps as many significant
figures as ``FIGURES`` says, whole digits never lost.
"""

from pycore.wording import KM_PER_NMI, MINUS, THIN_SPACE, converted

OTHER_UNITS = {
    'km': {'nmi': {'divide': KM_PER_NMI}},
    'm/s': {'km/h': {'divide': 1 / 3.6}, 'kt': {'divide': KM_PER_NMI / 3.6}},
    'µs': {'ms': {'divide': 1e3}, 'Hz': {'over': 1e6}, 'kHz': {'over': 1e3}},
}
"""For a unit of the plan: the units it may be shown in, and how."""

FAMILY_CHOICE = {'range': 'range', 'speed': 'speed', 'pri': 'pri'}
"""Which of the reader's preferences a family of units follows."""

_PREFERRED = {'us': 'µs'}

FIGURES = {'range': 3, 'speed': 3, 'pri': 5}
"""Significant figures of what is shown in another unit than the plan's: neighbouring PRFs differ in the fourth."""


def digits(value, decimals=0):
    """Return a number as it was typed: the shortest decimal that reads back the same.

    Parameters
    ----------
    value : int or float
        The number. [any]
    decimals : int
        Fewest decimals shown. [unitless]

    Returns
    -------
    text : str
        With a true minus sign.
    """
    text = repr(abs(value))
    text = text.removesuffix('.0')
    places = len(text.partition('.')[2])
    if places < decimals and 'e' not in text:
        text = f'{abs(value):.{decimals}f}'
    return f'{MINUS}{text}' if value < 0 else text


def shown_unit(key, units):
    """Return the unit that the values of a key are shown in.

    Parameters
    ----------
    key : Key
        The key. [unitless]
    units : mapping
        The reader's preferences, by ``range``, ``speed``, ``pri``. [unitless]

    Returns
    -------
    unit : str
        One of the family's.
    """
    wanted = units.get(FAMILY_CHOICE.get(key.family))
    wanted = _PREFERRED.get(wanted, wanted)
    return wanted if wanted in OTHER_UNITS.get(key.unit, ()) else key.unit


def shown_digits(key, value, units):
    """Return a value of a key in the unit it is shown in, without that unit.

    Parameters
    ----------
    key : Key
        The key. [unitless]
    value : int or float
        Value in the plan's unit. [unit of the key]
    units : mapping
        The reader's preferences. [unitless]

    Returns
    -------
    text : str
        Digits.
    """
    unit = shown_unit(key, units)
    if unit == key.unit:
        return digits(value, key.decimals)
    how = OTHER_UNITS[key.unit][unit]
    number = how['over'] / value if 'over' in how else value / how['divide']
    return digits(converted(number, FIGURES[FAMILY_CHOICE[key.family]]))


def shown_value(key, value, units):
    """Return a value of a key as it is shown.

    Parameters
    ----------
    key : Key
        The key. [unitless]
    value : object
        Value in the plan's unit. [unit of the key]
    units : mapping
        The reader's preferences. [unitless]

    Returns
    -------
    text : str
        With its unit; ``'none'`` for no value, ``'yes'`` and ``'no'`` for a flag.
    """
    if value is None:
        return 'none'
    if isinstance(value, bool):
        return 'yes' if value else 'no'
    if isinstance(value, str):
        return key.said(value)
    if isinstance(value, list):
        unit = shown_unit(key, units)
        joint = ' to ' if key.kind == 'interval' else ', '
        listed = joint.join(shown_digits(key, one, units) for one in value)
        return _with_unit(listed, unit)
    return _with_unit(shown_digits(key, value, units), shown_unit(key, units))


def _with_unit(text, unit):
    """Put the unit behind digits: kept on one line, degrees close up."""
    return f'{text}{"" if unit in ("", "°") else THIN_SPACE}{unit}'
