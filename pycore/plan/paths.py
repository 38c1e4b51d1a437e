"""Where things stand in a plan: dotted paths, with places in lists as numbers (``must_see.0.range_km.1``)."""

import difflib
import re

from pycore.errors import InputError
from pycore.plan.document import shown
from pycore.plan.keys import BY_PATH

_LONGEST_FIELD = 80


def value_at(plan, path):
    """Return what stands at a path of a plan.

    Parameters
    ----------
    plan : dict
        A filled plan. [plan's units]
    path : str
        Dotted path; a number is a place in a list. [unitless]

    Returns
    -------
    value : object
        ``None`` where nothing stands there.
    """
    value = plan
    for part in path.split('.'):
        if isinstance(value, list):
            value = value[int(part)] if _is_place(part, value) else None
        else:
            value = value.get(part) if isinstance(value, dict) else None
    return value


def _is_place(part, values):
    return part.isascii() and part.isdigit() and len(part) < 4 and int(part) < len(values)


def key_of(path):
    """Return the key that a path belongs to.

    Parameters
    ----------
    path : str
        Dotted path, with or without places in lists. [unitless]

    Returns
    -------
    key : Key or None
        ``None`` where there is no such key.
    """
    whole = re.sub(r'\.[0-9]+(?=\.)', '[]', path)
    whole = re.sub(r'\.[0-9]+$', '', whole)
    return BY_PATH.get(whole) or BY_PATH.get(whole.replace('.', '[].', 1))


def known_key(path):
    """Return the key that a path belongs to, or refuse the path with the nearest known one.

    Parameters
    ----------
    path : str
        Dotted path. [unitless]

    Returns
    -------
    key : Key
        The key.
    """
    key = key_of(path)
    if key is None:
        near = difflib.get_close_matches(path[:_LONGEST_FIELD], list(BY_PATH), 1, 0.0)
        nearest = f'; the nearest known one is {near[0]}' if near else ''
        raise InputError(path[:_LONGEST_FIELD], f'There is no key {shown(path)}{nearest}.')
    return key


def put(plan, path, value):
    """Put a value at a path of a plan that is being changed, making an optional record on the way that is not there.

    Parameters
    ----------
    plan : dict
        A filled plan of the caller's own; it is changed. [plan's units]
    path : str
        Dotted path of a key, or of a place in its list. [unitless]
    value : object
        What shall stand there. [unit of the key]

    Raises
    ------
    InputError
        Where the plan has no such place.
    """
    *records, name = path.split('.')
    here = plan
    for part in records:
        if isinstance(here, list):
            here = here[int(part)] if _is_place(part, here) else None
        elif isinstance(here, dict) and here.get(part) is None and part in here:
            here[part] = {}
            here = here[part]
        else:
            here = here.get(part) if isinstance(here, dict) else None
    if isinstance(here, list) and _is_place(name, here):
        here[int(name)] = value
    elif isinstance(here, dict) and not name.isdigit():
        here[name] = value
    else:
        label = key_of(path).label if key_of(path) else shown(path)
        has = f'; it has {len(here)}' if isinstance(here, list) else ''
        raise InputError(path[:_LONGEST_FIELD], f'{label}: this plan has no {shown(path)}{has}.')
