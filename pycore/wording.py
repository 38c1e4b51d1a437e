"""How numbers and small words stand in sentences: findings, captions and the command line share these.

Numbers on the page carry three significant figures; what is not nothing is
never shown as nothing, and a number never looks as if it met a limit that it
misses. All digits are in the data.
"""

import math

_COUNT_WORDS = ('no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve')
MINUS = '\N{MINUS SIGN}'
THIN_SPACE = '\N{NARROW NO-BREAK SPACE}'

KM_PER_NMI = 1.852
"""Kilometres in an international nautical mile, exact (common practice). [km]"""

DISTANCE = {'km': 1e3, 'nmi': 1e3 * KM_PER_NMI}
"""Metres in one shown unit of distance. [m]"""
SPEED = {'m/s': 1.0, 'km/h': 1.0 / 3.6, 'kt': 1e3 * KM_PER_NMI / 3600.0}
"""Metres per second in one shown unit of speed. [m/s]"""

_TYPED_DIGITS = 6
_TYPED_WITHIN = 1e-11
"""So near, relatively, to so many digits a number was typed as it is; a conversion comes there once in 100 000."""

SHOWN_UNITS = {'range': 'km', 'speed': 'm/s', 'pri': 'us'}
"""Units that the page shows unless the reader prefers others."""


def reader_units(preferred):
    """Return the units that a reader sees.

    Parameters
    ----------
    preferred : mapping or None
        Units that the reader prefers, by ``range``, ``speed``, ``pri``. [unitless]

    Returns
    -------
    units : dict
        One for each of them. [unitless]
    """
    return {**SHOWN_UNITS, **(preferred or {})}


def significant(value, figures=3):
    """Return a number rounded to some significant figures, whole digits never lost.

    Parameters
    ----------
    value : float
        What is shown. [any]
    figures : int
        Significant figures. [unitless]

    Returns
    -------
    text : str
        Such as ``'96.5'``, ``'1240'``, ``'0.00312'``, with a true minus sign and
        thin spaces from five whole digits on.
    """
    if not math.isfinite(value):
        return 'no end' if value > 0 else 'none'
    if value == 0:
        return '0'
    places = figures - 1 - math.floor(math.log10(abs(value)))
    rounded = round(value, places)
    places = figures - 1 - math.floor(math.log10(abs(rounded))) if rounded else places
    return _grouped(f'{rounded:.{max(places, 0)}f}')


def _grouped(text):
    """Put a true minus sign and thin spaces between thousands into plain digits."""
    sign = MINUS if text.startswith('-') else ''
    whole, point, part = text.lstrip('-').partition('.')
    if len(whole) > 4:
        whole = f'{int(whole):,}'.replace(',', THIN_SPACE)
    return f'{sign}{whole}{point}{part}'


def trimmed(value, figures=6):
    """Return a number as a person would type it: no trailing zeros.

    Parameters
    ----------
    value : float
        What is shown. [any]
    figures : int
        Most significant figures kept. [unitless]

    Returns
    -------
    text : str
        Such as ``'980'`` or ``'1.25'``.
    """
    text = f'{value:.{figures}g}'
    if 'e' in text:
        text = f'{float(text):f}'
    return _grouped(text.rstrip('0').rstrip('.') if '.' in text else text)


def converted(number, figures=3):
    """Return an input that was turned into another unit, rounded for showing.

    Parameters
    ----------
    number : float
        In the shown unit, not zero. [any]
    figures : int
        Significant figures; whole digits are never lost. [unitless]

    Returns
    -------
    number : float
        Unchanged where it is round in the shown unit: then it was typed in it, and stands as it was typed.
    """
    if number == 0:
        return number
    typed = float(f'{number:.{_TYPED_DIGITS}g}')
    if abs(number - typed) <= _TYPED_WITHIN * abs(number):
        return typed
    return float(f'{number:.{max(0, figures - 1 - math.floor(math.log10(abs(number))))}f}')


def against(value, limit, figures=3):
    """Return a number with as many figures as it takes to stand on its own side of a limit.

    Parameters
    ----------
    value : float
        What was reached. [any]
    limit : float or None
        What was wanted, in the same unit. [any]
    figures : int
        Fewest significant figures. [unitless]

    Returns
    -------
    text : str
        ``significant(value)`` unless that would look equal to the limit, or beyond it.
    """
    if limit is None or value == limit or not math.isfinite(value):
        return significant(value, figures)
    for digits in range(figures, 15):
        shown = float(f'{value:.{digits}g}')
        if (shown > limit) == (value > limit) and shown != limit:
            return significant(value, digits)
    return significant(value, 15)


def percent(share, limit=None):
    """Return a share as a percentage that never turns something into nothing.

    Parameters
    ----------
    share : float
        Fraction between 0 and 1. [unitless]
    limit : float or None
        Fraction that was wanted. [unitless]

    Returns
    -------
    text : str
        Such as ``'96.5 %'``, ``'under 0.001 %'``, ``'100 %'``.
    """
    if 0 < share < 1e-5:
        return f'under 0.001{THIN_SPACE}%'
    if 1 - 1e-5 < share < 1 - 1e-12:
        return f'over 99.999{THIN_SPACE}%'
    if share >= 1 - 1e-12:
        return f'100{THIN_SPACE}%'
    shown = against(share * 100, None if limit is None else limit * 100)
    return f'{_not_whole(share, shown)}{THIN_SPACE}%'


def _not_whole(share, shown):
    """Keep 99.97 % from being shown as 100 %."""
    if shown in ('100', '100.0') and share < 1:
        return f'{math.floor(share * 1e5) / 1e3:.3f}'.rstrip('0')
    return shown


def between(low, high, unit, figures=3):
    """Return an interval in words, never with a dash.

    Parameters
    ----------
    low, high : float
        Ends, in the shown unit. [any]
    unit : str
        Unit that both ends share. [unitless]
    figures : int
        Fewest significant figures; more are taken until the ends differ. [unitless]

    Returns
    -------
    text : str
        Such as ``'56.3 to 60.6 m/s'``.
    """
    for digits in range(figures, 9):
        ends = significant(low, digits), significant(high, digits)
        if ends[0] != ends[1] or low == high:
            break
    return f'{ends[0]} to {ends[1]}{THIN_SPACE}{unit}'


def with_unit(value, unit, limit=None):
    """Return a number and its unit, kept on one line.

    Parameters
    ----------
    value : float
        What is shown, in the unit. [any]
    unit : str
        Unit. [unitless]
    limit : float or None
        What was wanted, in the same unit. [any]

    Returns
    -------
    text : str
        Such as ``'128.8 km'``.
    """
    return f'{against(value, limit)}{THIN_SPACE}{unit}'


def as_typed(value, unit):
    """Return an input with its unit, as a person would type it.

    Parameters
    ----------
    value : float
        What was typed, in the unit. [any]
    unit : str
        Unit. [unitless]

    Returns
    -------
    text : str
        Such as ``'110 km'``.
    """
    return f'{trimmed(value)}{THIN_SPACE}{unit}'


def as_typed_percent(share):
    """Return a share that was typed as a percentage.

    Parameters
    ----------
    share : float
        Fraction. [unitless]

    Returns
    -------
    text : str
        Such as ``'95 %'``.
    """
    return as_typed(round(share * 100, 9), '%')


def count_word(count):
    """Return a small count as a word, a larger one in digits.

    Parameters
    ----------
    count : int
        How many. [unitless]

    Returns
    -------
    text : str
        ``'no'``, ``'one'`` … ``'twelve'``, ``'13'``.
    """
    return _COUNT_WORDS[count] if 0 <= count < len(_COUNT_WORDS) else _grouped(str(count))


def plural(count, one, many=None):
    """Return a noun in the number that a count asks for.

    Parameters
    ----------
    count : int
        How many. [unitless]
    one : str
        The noun for one. [unitless]
    many : str or None
        The noun for any other count; the singular and ``s`` when not given. [unitless]

    Returns
    -------
    text : str
        One of the two nouns.
    """
    return one if count == 1 else (many or one + 's')


def listed(words):
    """Return words as a list in a sentence: commas, and ``and`` before the last.

    Parameters
    ----------
    words : sequence of str
        What is listed. [unitless]

    Returns
    -------
    text : str
        Such as ``'980, 860 and 735'``.
    """
    words = list(words)
    return words[0] if len(words) == 1 else f'{", ".join(words[:-1])} and {words[-1]}' if words else ''


def capitalised(sentence):
    """Return a sentence with its first letter raised, the rest as it is.

    Parameters
    ----------
    sentence : str
        Text. [unitless]

    Returns
    -------
    text : str
        The sentence.
    """
    return sentence[:1].upper() + sentence[1:]


def in_range_unit(range_m, units):
    """Return a range in the unit that the reader prefers, and that unit.

    Parameters
    ----------
    range_m : float or array
        Range. [m]
    units : mapping
        Shown units, with key ``range``. [unitless]

    Returns
    -------
    value : float or array
        Range in the shown unit.
    unit : str
        ``'km'`` or ``'nmi'``.
    """
    unit = units['range']
    return range_m / DISTANCE[unit], unit


def in_speed_unit(speed_m_s, units):
    """Return a speed in the unit that the reader prefers, and that unit.

    Parameters
    ----------
    speed_m_s : float or array
        Speed. [m/s]
    units : mapping
        Shown units, with key ``speed``. [unitless]

    Returns
    -------
    value : float or array
        Speed in the shown unit.
    unit : str
        ``'m/s'``, ``'km/h'`` or ``'kt'``.
    """
    unit = units['speed']
    return speed_m_s / SPEED[unit], unit
