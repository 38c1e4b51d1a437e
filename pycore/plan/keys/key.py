"""What is known of one key of the plan, and short ways to write it down in the table."""

from dataclasses import dataclass, replace

SENT = 'What is sent and when it listens'
MUST_SEE = 'What it must see'
DOPPLER = 'Doppler filters and notch'
GROUND = 'Ground and rain'
TARGET = 'The target used for detection'
JUDGED = 'What it is judged by'


@dataclass(frozen=True, slots=True)
class Key:
    """One key of the plan.

    Parameters
    ----------
    path : str
        Dotted path in the document; ``[]`` stands for the elements of a list of records. [unitless]
    kind : str
        ``number``, ``count``, ``interval``, ``choice``, ``flag``, ``text`` or ``numbers``. [unitless]
    short : str
        Its name in a link. [unitless]
    label : str
        What it is called on the page and in messages. [unitless]
    help : str
        A sentence or two that say what it does. [unitless]
    unit : str
        Unit of the document, as shown; empty where it has none. [unitless]
    family : str
        Family of units that may be typed (:mod:`pycore.quantity`). [unitless]
    lowest, highest : float or None
        Limits, both allowed. [unit]
    default : object
        Value of an absent key. [unit]
    start : object
        Where a key without a value begins when it is given one. [unit]
    nullable : bool
        Whether ``null`` is allowed and means none. [unitless]
    per_prf : bool
        Whether it may be a list, one for each PRI. [unitless]
    step : float
        One step of an arrow key. [unit]
    decimals : int
        Fewest decimals shown. [unitless]
    group : str
        Heading it stands under; empty for what stands at the head of the note. [unitless]
    choices : tuple of str
        What a choice may be. [unitless]
    words : tuple of str
        How a choice is said, in the order of the choices; empty where they are words themselves. [unitless]
    longest : int
        Most characters of a text. [characters]
    """

    path: str
    kind: str
    short: str
    label: str
    help: str
    unit: str = ''
    family: str = ''
    lowest: float | None = None
    highest: float | None = None
    default: object = None
    start: object = None
    nullable: bool = False
    per_prf: bool = False
    step: float = 1.0
    decimals: int = 0
    group: str = ''
    choices: tuple[str, ...] = ()
    words: tuple[str, ...] = ()
    longest: int = 0

    def said(self, value):
        """Return how a choice is said.

        Parameters
        ----------
        value : str
            One of the choices. [unitless]

        Returns
        -------
        words : str
            As an engineer says it.
        """
        return self.words[self.choices.index(value)] if self.words and value in self.choices else value

    @property
    def record(self):
        """Path of the record that the key belongs to."""
        return self.path.rpartition('.')[0]

    @property
    def name(self):
        """Last part of the path."""
        return self.path.rpartition('.')[2]


def _measured(kind):
    """Make the short way to write down a key that has a unit and limits."""

    def key(path, short, label, help_text, unit, family, limits, **more):
        """Return a key that has a unit and limits.

        Parameters
        ----------
        path, short, label, help_text, unit, family : str
            As in :class:`Key`. [unitless]
        limits : tuple of two floats
            Lowest and highest, both allowed. [unit]
        more : dict
            Default, start, step and the like. [unitless]

        Returns
        -------
        key : Key
            Without a heading.
        """
        return Key(path, kind, short, label, help_text, unit, family, *limits, **more)

    return key


number = _measured('number')
count = _measured('count')
interval = _measured('interval')
numbers = _measured('numbers')


def choice(path, short, label, help_text, choices, default, words=()):
    """Return a key that is one of some words.

    Parameters
    ----------
    path, short, label, help_text : str
        As in :class:`Key`. [unitless]
    choices : tuple of str
        The words. [unitless]
    default : str
        One of them. [unitless]
    words : tuple of str
        How each of them is said, where that is not the word itself. [unitless]

    Returns
    -------
    key : Key
        Without a heading.
    """
    return Key(path, 'choice', short, label, help_text, default=default, choices=choices, words=words)


def flag(path, short, label, help_text):
    """Return a key that is yes or no, and no by default.

    Parameters
    ----------
    path, short, label, help_text : str
        As in :class:`Key`. [unitless]

    Returns
    -------
    key : Key
        Without a heading.
    """
    return Key(path, 'flag', short, label, help_text, default=False)


def text(path, short, label, help_text, longest, **more):
    """Return a key that is a text.

    Parameters
    ----------
    path, short, label, help_text : str
        As in :class:`Key`. [unitless]
    longest : int
        Most characters. [characters]
    more : dict
        Default, or that it may be none. [unitless]

    Returns
    -------
    key : Key
        Without a heading.
    """
    return Key(path, 'text', short, label, help_text, longest=longest, **more)


def under(group, *keys):
    """Return keys under a heading.

    Parameters
    ----------
    group : str
        The heading. [unitless]
    keys : Key
        Keys without one. [unitless]

    Returns
    -------
    keys : tuple of Key
        The same under it.
    """
    return tuple(replace(key, group=group) for key in keys)
