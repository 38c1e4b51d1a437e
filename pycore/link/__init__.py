"""The link: a plan as the readable fragment of an address, so that no server ever sees it.

Only what differs from the defaults is written, in the order of the table of
keys; the last item is a checksum. Without it the link was cut: what can be read
is loaded and the rest stands at its defaults. With another one it was edited by
hand: it loads, and says so.

Records that are not there by default are named by one item (``surface=yes``,
``rain=yes``, or how many there are: ``must=1``); the keys of the elements of a
list carry its number (``must1-range``).
"""

import zlib
from dataclasses import dataclass, field

from pycore.errors import InputError
from pycore.link.items import value_text
from pycore.link.names import LISTS, RECORDS, REMARK, SEE, TEXTS
from pycore.link.reading import plan_of
from pycore.link.text import LONGEST, checksum, deflated, fragment_of, inflated
from pycore.link.view import choice_of, choices_view, page_items, target_of, target_text
from pycore.plan.document import filled, shown
from pycore.plan.keys import KEYS
from pycore.plan.paths import value_at
from pycore.speed_choices import CHOICES

__all__ = [
    'LISTS',
    'RECORDS',
    'Opened',
    'checksum',
    'choices_view',
    'fragment_of',
    'page_items',
    'read_link',
    'target_of',
    'target_text',
    'write',
    'written',
]

VERSION = '1'
"""Number of the link's format; the defaults belong to it and never change under it."""
LONGEST_READABLE = 1900
"""A longer readable text is deflated: some chats cut what is longer. [characters]"""
VIEW = ('view', 'edit', 'seen', 'present', 'theme', 'units', 'with', 'target', *CHOICES)
"""Items that say how the plan is shown, not what it is."""
_IGNORED = ('secret', 'end')
"""Items that others may add to an address, and an end that is not at the end."""
_ONLY_WITH_REMARKS = ('notes',)


@dataclass(slots=True)
class Opened:
    """What a link opened to.

    Parameters
    ----------
    document : dict
        The plan, filled. [plan's units]
    cut : bool
        Whether its end is missing. [unitless]
    edited : bool
        Whether it was changed by hand after it was made. [unitless]
    said : list of str
        What else there is to say. [unitless]
    refused : list of dict
        Items that could not be used: ``key``, ``text``, ``message``. [unitless]
    view : dict of str
        Items that say how the plan is shown, still encoded. [unitless]
    target : dict or None
        The target that is followed: ``range_km`` and ``speed_mps``. [km, m/s]
    choices : dict
        What is chosen for the figure of blind speeds, each of ``speed_choices.CHOICES``. [unitless]
    """

    document: dict
    cut: bool = False
    edited: bool = False
    said: list = field(default_factory=list)
    refused: list = field(default_factory=list)
    view: dict = field(default_factory=dict)
    target: dict | None = None
    choices: dict = field(default_factory=lambda: {name: values[0] for name, values in CHOICES.items()})

    def refuse(self, key, text, message):
        """Name an item that cannot be used.

        Parameters
        ----------
        key : str
            Path of the plan's key. [unitless]
        text : str
            What the link says. [unitless]
        message : str
            Why that cannot be used. [unitless]
        """
        self.refused.append({'key': key, 'text': text[:80], 'message': message})


def write(document, remarks=False, view=None):
    """Return the link of a plan, without the address it is appended to.

    Parameters
    ----------
    document : dict
        A plan. [plan's units]
    remarks : bool
        Whether remarks and notes travel with it, which makes it a deflated one. [unitless]
    view : mapping of str or None
        View items to carry, already encoded. [unitless]

    Returns
    -------
    fragment : str
        The same text whenever it is made of the same plan.
    """
    return written(filled(document), remarks, view)


def written(plan, remarks=False, view=None):
    """Return the link of a plan that is filled already; otherwise as :func:`write`.

    Parameters
    ----------
    plan : dict
        A filled plan. [plan's units]
    remarks : bool
        Whether remarks and notes travel with it. [unitless]
    view : mapping of str or None
        View items to carry, already encoded. [unitless]

    Returns
    -------
    fragment : str
        The link.
    """
    body = '&'.join(f'{name}={text}' for name, text in _items(plan, remarks))
    if remarks or len(body) > LONGEST_READABLE:
        body = f'z={deflated(body)}'
    shown_how = [f'{name}={view[name]}' for name in VIEW if view and name in view]
    text = '&'.join(part for part in (f'v={VERSION}', body, *shown_how) if part)
    return f'{text}&end={checksum(text)}'


def _items(plan, remarks):
    """Return the items of a plan that differ from the defaults, in canonical order."""
    items = []
    for key in KEYS:
        if '[]' in key.path or key.path in SEE[1:] or (key.path in _ONLY_WITH_REMARKS and not remarks):
            continue
        items.extend(_see(plan) if key.path == SEE[0] else _item(key, plan))
    for short, path in RECORDS.items():
        if value_at(plan, path) is not None:
            items.append((short, 'yes'))
    for short, (path, _) in LISTS.items():
        items.extend(_list_items(short, path, plan))
    if remarks:
        items.extend((f'{REMARK}{name}', value_text(None, text)) for name, text in sorted(plan['remarks'].items()))
    return items


def _see(plan):
    """Write both intervals of the coverage as one item."""
    keys = [key for key in KEYS if key.path in SEE]
    if all(value_at(plan, key.path) == key.default for key in keys):
        return []
    return [('see', ','.join(value_text(key, value_at(plan, key.path)) for key in keys))]


def _item(key, plan):
    """Write one key where it differs: from its default, and inside a record from the record's own."""
    value = value_at(plan, key.path)
    record = value_at(plan, key.record) if key.record else plan
    if record is None or (key.path != 'waveform.pri_us' and value == key.default):
        return []
    return [(key.short, value_text(key, value))]


def _list_items(short, path, plan):
    """Write a list of records: how many there are, and what differs in each from a new one."""
    records = value_at(plan, path)
    if not records:
        return []
    single = isinstance(records, dict)
    items = [(short, 'yes' if single else str(len(records)))]
    for index, record in enumerate([records] if single else records):
        prefix = f'{short}-' if single else f'{short}{index + 1}-'
        for key in KEYS:
            if key.record == f'{path}[]' and record[key.name] != key.default:
                items.append((prefix + key.short, value_text(key, record[key.name])))
    return items


def read_link(text):
    """Return the plan that a link opens to.

    Parameters
    ----------
    text : str
        An address, or only its fragment. [unitless]

    Returns
    -------
    opened : Opened
        Always a plan that can be used; what could not be read is named.
    """
    whole = fragment_of(text)[:LONGEST]
    body, found, end = whole.rpartition('&end=')
    cut = not found or len(end) < 4 or '&' in end
    opened = Opened({}, cut=cut, edited=not cut and end != checksum(body))
    items = _split(whole if not found else body, opened)
    if cut and items and _may_be_short(items[-1]):
        items.pop()
    opened.document, said = plan_of(items, opened.refuse)
    opened.said.extend(said)
    _follow(opened)
    return opened


def _follow(opened):
    """Take the target that the link follows and what it chooses in figures, or name them as refused."""
    for name in ('target', *CHOICES):
        text = opened.view.get(name)
        try:
            if text is None:
                continue
            if name == 'target':
                opened.target = target_of(text)
            else:
                opened.choices[name] = choice_of(name, text)
        except InputError as error:
            opened.refuse(error.field, text, error.message)


def _may_be_short(item):
    """Say whether the last item of a cut link could be longer than it reads: all that do not end in a unit."""
    return not item[1] or item[1][-1].isdigit() or item[0] in TEXTS or item[0].startswith(REMARK)


def _split(text, opened, packed=True):
    """Split a link into its items, those of its one deflated item among them."""
    items = []
    for part in text.split('&'):
        name, _, value = part.partition('=')
        if name == 'z' and packed:
            items.extend(_unpacked(value, opened))
            packed = False
        elif name in VIEW:
            opened.view[name] = value
        elif name == 'v':
            _check_version(value, opened)
        elif name and name not in _IGNORED:
            items.append((name, value))
    return items


def _unpacked(value, opened):
    try:
        return _split(inflated(value), opened, packed=False)
    except (ValueError, zlib.error):
        opened.refuse('', value, 'The deflated part of the link must be as it was made; it cannot be read.')
        return []


def _check_version(value, opened):
    if value != VERSION:
        message = (
            f'The link must be of version {VERSION}; it is of version {shown(value)}, read as if it were {VERSION}.'
        )
        opened.refuse('pulsewright', value, message)
