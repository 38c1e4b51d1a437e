"""Items of a link that say how a plan is looked at: the target that is followed, and how the page is shown."""

from pycore.errors import InputError
from pycore.link.items import read_value, value_text
from pycore.plan.document import checked_number
from pycore.plan.keys.followed import FOLLOWED


def target_text(target):
    """Return a followed target as a link spells it.

    Parameters
    ----------
    target : mapping
        ``range_km`` and ``speed_mps``. [km, m/s]

    Returns
    -------
    text : str
        Such as ``'84.2km,183mps'``.
    """
    return ','.join(value_text(key, target[name]) for name, key in FOLLOWED.items())


def target_of(text):
    """Return the target that an item of a link names.

    Parameters
    ----------
    text : str
        What stands after ``target=``. [unitless]

    Returns
    -------
    target : dict
        ``range_km`` and ``speed_mps``. [km, m/s]

    Raises
    ------
    InputError
        Where it is not a range and a speed within their limits.
    """
    parts = text.split(',')
    if len(parts) != len(FOLLOWED):
        raise InputError('target', 'The target in a link must be a range and a speed, such as 84.2km,183mps.')
    return {
        name: checked_number(key, read_value(key, part, f'target.{name}'), f'target.{name}')
        for part, (name, key) in zip(parts, FOLLOWED.items(), strict=True)
    }


THEMES = ('light', 'dark')
"""What a page may be shown in, other than what its reader's system prefers. [unitless]"""


def page_items(chosen, figures):
    """Return the items that say how the page is shown; what is no such choice is left out.

    Parameters
    ----------
    chosen : mapping
        ``theme``, one of ``THEMES``; ``present``, the figure of the meeting view. [unitless]
    figures : sequence of str
        Names of all figures. [unitless]

    Returns
    -------
    items : dict of str
        Ready for a link.
    """
    allowed = {'theme': THEMES, 'present': figures}
    return {name: chosen[name] for name, choices in allowed.items() if chosen.get(name) in choices}
