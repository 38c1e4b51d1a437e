"""Findings against one input or two: a table with a row for each step."""

from fractions import Fraction

from pycore.edit import apply
from pycore.errors import InputError
from pycore.plan.document import shown
from pycore.quantity import as_number
from pycore.sentence import key_of

MOST_ROWS = 10_000
"""Most rows of a table. [unitless]"""


def steps(path, low, high, by):
    """Return the values that an input takes from one end to the other.

    Parameters
    ----------
    path : str
        Path of the input. [unitless]
    low, high : int, float or Fraction
        Ends, both taken. [unit of the key]
    by : int, float or Fraction
        Step, above 0. [unit of the key]

    Returns
    -------
    values : list of int or float
        In decimal steps, so that 0.5 to 3 by 0.1 meets 0.6 exactly; the upper end comes last even where it is
        not a whole number of steps away.
    """
    low, high, by = (value if isinstance(value, Fraction) else Fraction(str(value)) for value in (low, high, by))
    if not low <= high or by <= 0:
        raise InputError(path, f'{path} must run upwards by a step above 0; got {float(low):g}..{float(high):g}.')
    count = int((high - low) / by)
    if count >= MOST_ROWS:
        raise InputError(path, f'{path} must take at most {MOST_ROWS} steps; got {count + 1}.')
    values = [low + index * by for index in range(count + 1)]
    return [as_number(value) for value in (values if values[-1] == high else [*values, high])]


def varied(plan, inputs):
    """Return a plan for each combination of the values that one or two inputs take.

    Parameters
    ----------
    plan : dict
        The plan that they start from. [plan's units]
    inputs : sequence of (str, list)
        Paths and their values. [unit of each key]

    Yields
    ------
    values, plan : tuple of float, dict or InputError
        The values, and the plan with them; what is refused comes as the error that says why.
    """
    (path, values), *rest = inputs
    if key_of(path) is None:
        raise InputError(path[:80], f'There is no key {shown(path)}.')
    for value in values:
        try:
            changed = apply(plan, {'key': path, 'value': value}).document
        except InputError as error:
            changed = error
        if not rest:
            yield (value,), changed
        elif isinstance(changed, InputError):
            yield from (((value, other), changed) for other in rest[0][1])
        else:
            yield from (((value, *others), result) for others, result in varied(changed, rest))
