"""One line of workings: a formula as text, the numbers put in, what comes out, and where the formula is from."""

from dataclasses import dataclass

from pycore.wording import MINUS, THIN_SPACE, listed, trimmed

DERIVED = 'derived here'
DEFINITION = 'definition'
COMMON = 'common practice'
_FIGURES = 8
_SMALL = 1e-4


@dataclass(frozen=True, slots=True)
class Line:
    """One step from the inputs to a finding.

    Parameters
    ----------
    formula : str
        As text, in the trade's letters. [unitless]
    numbers : str
        What is put in, each with its unit. [unitless]
    result : str
        What comes out, with its unit. [unitless]
    source : str
        Where the formula is from, or that it is derived here. [unitless]
    """

    formula: str
    numbers: str
    result: str
    source: str = DERIVED

    @property
    def row(self):
        """The line as a plain dictionary, ready for JSON."""
        return {'formula': self.formula, 'numbers': self.numbers, 'result': self.result, 'source': self.source}


@dataclass(frozen=True, slots=True)
class Working:
    """How one finding comes about.

    Parameters
    ----------
    lines : tuple of Line
        Step by step. [unitless]
    value : float or None
        What the last step gives, in the finding's unit; worked out from the numbers shown. [unit of the finding]
    notes : tuple of str
        What is an approximation, what is left out. [unitless]
    """

    lines: tuple
    value: float | None
    notes: tuple = ()


def shown(value, unit=''):
    """Return a number with as many digits as a check by pocket calculator asks for, and its unit.

    Parameters
    ----------
    value : float
        A number. [unit]
    unit : str
        Its unit. [unitless]

    Returns
    -------
    text : str
        Eight significant figures at most, no trailing zeros; what is very small with a power of ten.
    """
    small = 0 < abs(value) < _SMALL
    text = f'{value:.{_FIGURES}g}'.replace('-', MINUS) if small else trimmed(float(value), _FIGURES)
    return f'{text}{"" if unit == "°" else THIN_SPACE if unit else ""}{unit}'


def each(symbol, values, unit=''):
    """Return the numbers that stand for one letter, said once where they are all the same.

    Parameters
    ----------
    symbol : str
        The letter. [unitless]
    values : sequence of float
        One for each PRF. [unit]
    unit : str
        Their unit. [unitless]

    Returns
    -------
    text : str
        Such as ``'T = 980 and 860 µs'``.
    """
    texts = [trimmed(float(one), _FIGURES) for one in values]
    if len(set(texts)) == 1:
        texts = texts[:1]
    return f'{symbol} = {listed(texts)}{THIN_SPACE if unit else ""}{unit}'


def put_in(*texts):
    """Return numbers one after another.

    Parameters
    ----------
    texts : sequence of str
        Of :func:`each`, or such as ``'c = 299 792 458 m/s'``. [unitless]

    Returns
    -------
    text : str
        Parted by semicolons; what is empty is left out.
    """
    return '; '.join(text for text in texts if text)


def interval(ends, scale, unit):
    """Return an interval in a shown unit.

    Parameters
    ----------
    ends : pair of float
        From and to. [any]
    scale : float
        What one shown unit is. [same]
    unit : str
        The shown unit. [unitless]

    Returns
    -------
    text : str
        Such as ``'2 to 110 km'``.
    """
    return f'{shown(ends[0] / scale)} to {shown(ends[1] / scale, unit)}'
