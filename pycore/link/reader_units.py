"""The reader's units as the ``units`` item of a link: ``nmi,kt,Hz``, only those that are not the page's own.

They say how a plan is shown, never what it is: every number of a link carries
its own unit.
"""

from pycore.link.items import UNIT_TEXT
from pycore.plan.document import shown
from pycore.wording import DISTANCE, SHOWN_UNITS, SPEED

CHOICES = {'range': tuple(DISTANCE), 'speed': tuple(SPEED), 'pri': ('us', 'ms', 'Hz', 'kHz')}
"""What the reader may prefer, by what is measured."""

IN_LINK = {UNIT_TEXT.get(unit, unit): (name, unit) for name, units in CHOICES.items() for unit in units}
"""How each of them stands in a link, with what it measures and its name here."""


def units_text(units):
    """Return the reader's units as a link carries them.

    Parameters
    ----------
    units : mapping
        By ``range``, ``speed``, ``pri``. [unitless]

    Returns
    -------
    text : str
        Empty where all are the page's own.
    """
    return ','.join(text for text, (name, unit) in IN_LINK.items() if units[name] == unit != SHOWN_UNITS[name])


def unknown_units(text):
    """Return what is to be said of units in a link that the page does not know.

    Parameters
    ----------
    text : str
        The item's value. [unitless]

    Returns
    -------
    said : list of str
        One sentence, or none.
    """
    unknown = [word for word in text.split(',') if word and word not in IN_LINK]
    return [f'The link asks for units that this page does not show: {shown(",".join(unknown))}.'] if unknown else []
