"""Items of a link that say how a plan is looked at: the target, what is chosen in a figure, how the page is shown."""

from pycore.errors import InputError
from pycore.link.items import read_value, value_text
from pycore.plan.document import checked_number, shown
from pycore.plan.keys.followed import FOLLOWED
from pycore.speed_choices import CHOICES


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


def choices_view(looked):
    """Return the view items of what is chosen for the figure of blind speeds.

    Parameters
    ----------
    looked : mapping
        Each of ``speed_choices.CHOICES``. [unitless]

    Returns
    -------
    view : dict of str
        Such as ``{'axis': 'doppler', 'up': 'pri'}``; nothing for what stands there anyway.
    """
    return {name: looked[name] for name, values in CHOICES.items() if looked[name] != values[0]}


def choice_of(name, text):
    """Return what an item of a link chooses.

    Parameters
    ----------
    name : str
        One of ``speed_choices.CHOICES``. [unitless]
    text : str
        What stands after it. [unitless]

    Returns
    -------
    value : str
        One of its values.

    Raises
    ------
    InputError
        Where it is none of them.
    """
    if text not in CHOICES[name]:
        known = ', '.join(CHOICES[name])
        raise InputError(name, f'{name} in a link must be one of {known}; got {shown(text)}.')
    return text
