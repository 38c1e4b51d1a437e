"""The link: a plan as the readable fragment of an address, so that no server ever sees it.

Only what differs from the defaults is written, in the order of the table of
keys; the last item is a checksum. Without it the link was cut: what can be read
is loaded and the rest stands at its defaults. With another one it was edited by
hand: it loads, and says so.

Records that are not there by default are named by one item (``surface=yes``,
``rain=yes``, or how many there are: ``must=1``); the keys of the elements of a
list carry its number (``must1-range``).
"""

import base64
import re
import zlib
from dataclasses import dataclass, field

from pycore.clock import on_clock
from pycore.errors import InputError
from pycore.link_items import read_value, value_text
from pycore.plan import read
from pycore.plan_document import filled, shown
from pycore.plan_keys import KEYS, MOST_PATCHES, MOST_REGIONS
from pycore.plan_paths import value_at

VERSION = '1'
"""Number of the link's format; the defaults belong to it and never change under it."""
LONGEST_READABLE = 1900
"""A longer readable text is deflated: some chats cut what is longer. [characters]"""
VIEW = ('view', 'edit', 'seen', 'present', 'theme', 'units', 'with', 'target')
"""Items that say how the plan is shown, not what it is."""
_IGNORED = ('secret',)
_LONGEST = 500_000
_STAND_IN_PRI_US = 1000
_REMARK = 'remark-'
RECORDS = {
    'surface': 'surface',
    'near': 'radar.near_pulse',
    'platform': 'platform',
    'crossing': 'crossing',
    'equation': 'target.radar_equation',
    'holds': 'holds_over',
    'weather': 'weather',
}
"""Items that announce a record, and its path."""
LISTS = {'must': ('must_see', MOST_REGIONS), 'rain': ('rain', MOST_PATCHES)}
"""Items that announce a list of records: its path and the most it may hold."""
_LEFT_OUT = ('notes',)
_SEE = ('coverage.range_km', 'coverage.speed_mps')
_AFTER_THE_END = re.compile(r'(&end=[0-9a-f]{4})[\s.,;:!?)>\]}"\'&]+$')
"""What a sentence or a mail may put behind a link."""


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
    """

    document: dict
    cut: bool = False
    edited: bool = False
    said: list = field(default_factory=list)
    refused: list = field(default_factory=list)
    view: dict = field(default_factory=dict)


def checksum(text):
    """Return the four characters that end a link.

    Parameters
    ----------
    text : str
        The link before ``&end=``. [unitless]

    Returns
    -------
    checksum : str
        The low 16 bits of its CRC-32, in hexadecimal.
    """
    return f'{zlib.crc32(text.encode()) & 0xFFFF:04x}'


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
        body = f'z={_deflated(body)}'
    shown_how = [f'{name}={view[name]}' for name in VIEW if view and name in view]
    text = '&'.join(part for part in (f'v={VERSION}', body, *shown_how) if part)
    return f'{text}&end={checksum(text)}'


def _items(plan, remarks):
    """Return the items of a plan that differ from the defaults, in canonical order."""
    items = []
    for key in KEYS:
        if '[]' in key.path or key.path in _SEE[1:] or (key.path in _LEFT_OUT and not remarks):
            continue
        items.extend(_see(plan) if key.path == _SEE[0] else _item(key, plan))
    for short, path in RECORDS.items():
        if value_at(plan, path) is not None:
            items.append((short, 'yes'))
    for short, (path, _) in LISTS.items():
        items.extend(_list_items(short, path, plan))
    if remarks:
        items.extend((f'{_REMARK}{name}', value_text(None, text)) for name, text in sorted(plan['remarks'].items()))
    return items


def _see(plan):
    """Write both intervals of the coverage as one item."""
    keys = [key for key in KEYS if key.path in _SEE]
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


def _deflated(text):
    packer = zlib.compressobj(9, zlib.DEFLATED, -15)
    return base64.urlsafe_b64encode(packer.compress(text.encode()) + packer.flush()).decode().rstrip('=')


def _inflated(text):
    """Return the readable items of a deflated link; what a cut one still holds."""
    data = base64.urlsafe_b64decode(text[: len(text) - len(text) % 4] + _padding(text))
    reader = zlib.decompressobj(-15)
    return reader.decompress(data, _LONGEST).decode('utf-8', 'ignore')


def _padding(text):
    rest = len(text) % 4
    return text[len(text) - rest :] + '=' * (4 - rest) if rest > 1 else ''


def fragment_of(text):
    """Return the part of an address that holds the plan.

    Parameters
    ----------
    text : str
        An address, or only its fragment. [unitless]

    Returns
    -------
    fragment : str
        What follows ``#``, or ``?`` where there is no ``#``.
    """
    text = text.strip().replace('&amp;', '&')
    for mark in ('#', '?'):
        before, found, after = text.partition(mark)
        if found and '=' in after and 'v=' not in before:
            text = after
    return _AFTER_THE_END.sub(r'\1', text.lstrip('#?'))


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
    whole = fragment_of(text)[:_LONGEST]
    body, found, end = whole.rpartition('&end=')
    cut = not found or len(end) < 4 or '&' in end
    opened = Opened({}, cut=cut, edited=not cut and end != checksum(body))
    items = _split(whole if not found else body, opened)
    if cut and items and _may_be_short(items[-1]):
        items.pop()
    document = _document(items, opened)
    opened.document = _usable(document, opened)
    return opened


def _may_be_short(item):
    """Say whether the last item of a cut link could be longer than it reads: all that do not end in a unit."""
    return not item[1] or item[1][-1].isdigit() or item[0] in _TEXTS or item[0].startswith(_REMARK)


def _split(text, opened):
    """Split a link into its items, the deflated ones among them."""
    items = []
    for part in text.split('&'):
        name, _, value = part.partition('=')
        if name == 'z':
            try:
                items.extend(_split(_inflated(value), opened))
            except (ValueError, zlib.error):
                opened.refused.append({'key': '', 'text': value[:40], 'message': 'The deflated part cannot be read.'})
        elif name in VIEW:
            opened.view[name] = value
        elif name == 'v':
            _check_version(value, opened)
        elif name and name not in (*_IGNORED, 'end'):
            items.append((name, value))
    return items


def _check_version(value, opened):
    if value != VERSION:
        message = (
            f'The link must be of version {VERSION}; it is of version {shown(value)}, read as if it were {VERSION}.'
        )
        _refuse(opened, 'pulsewright', value, message)


def _short_names():
    """Yield each item that a plan can have: its name in a link, the path it stands for, and the key."""
    lists = {f'{path}[]': (short, path, most) for short, (path, most) in LISTS.items()}
    for key in KEYS:
        if key.record in lists:
            short, path, most = lists[key.record]
            yield f'{short}-{key.short}', f'{path}.{key.name}', key
            for index in range(most):
                yield f'{short}{index + 1}-{key.short}', f'{path}.{index}.{key.name}', key
        elif key.path not in _SEE:
            yield key.short, key.path, key


_BY_SHORT = {short: (path, key) for short, path, key in _short_names()}
_TEXTS = {short for short, (_, key) in _BY_SHORT.items() if key.kind in ('text', 'choice')}


def _document(items, opened):
    """Build a document of all items that can be read; the others are refused one by one."""
    document, taken = {}, set()
    order = sorted(items, key=lambda item: item[0] not in RECORDS and item[0] not in LISTS)
    for name, text in order:
        try:
            if name in taken:
                raise InputError(name[:80], f'{shown(name)} must stand once in a link; the first is taken.')
            taken.add(name)
            _take(document, name, text)
        except InputError as error:
            _refuse(opened, error.field, text, error.message)
    pris = next((text for name, text in items if name == 'pri'), '')
    _put_on_clock(document, 'Hz' if pris.endswith('Hz') else 'µs', opened)
    return document


def _put_on_clock(document, unit, opened):
    """Round PRIs that were written by hand to the clock, and say so, as the page does where they are typed."""
    waveform, key = document.get('waveform', {}), _BY_SHORT['clock'][1]
    clock = document.get('radar', {}).get('clock_mhz', key.default)
    if not isinstance(clock, int | float) or not key.lowest <= clock <= key.highest:
        clock = key.default
    rounded = [on_clock(pri, clock, unit) for pri in waveform.get('pri_us') or []]
    if rounded:
        waveform['pri_us'] = [pri for pri, _ in rounded]
        opened.said.extend(sentence for _, said in rounded for sentence in said)


def _refuse(opened, field_name, text, message):
    opened.refused.append({'key': field_name, 'text': text[:80], 'message': message})


def _take(document, name, text):
    """Put one item into the document."""
    if name in RECORDS:
        _put(document, RECORDS[name], {} if text == 'yes' else None)
    elif name in LISTS:
        _put(document, LISTS[name][0], _records(name, text))
    elif name == 'see':
        parts = text.split(',')
        for key, part in zip((key for key in KEYS if key.path in _SEE), [*parts, ''], strict=False):
            _put(document, key.path, read_value(key, part, key.path))
    elif name.startswith(_REMARK):
        document.setdefault('remarks', {})[name.removeprefix(_REMARK)] = read_value(
            _BY_SHORT['title'][1], text, 'remarks'
        )
    elif name in _BY_SHORT:
        path, key = _BY_SHORT[name]
        _put(document, path, read_value(key, text, path))
    else:
        raise InputError(name[:80], f'There is no item {shown(name)} in a link; it is left out.')


def _records(name, text):
    """Return so many empty records, or one for rain that stands alone."""
    most = LISTS[name][1]
    if name == 'rain' and text == 'yes':
        return {}
    if not text.isdigit() or not 1 <= int(text[:3]) <= most:
        raise InputError(LISTS[name][0], f'{name} must be how many there are, 1 to {most}; got {shown(text)}.')
    return [{} for _ in range(int(text))]


def _put(document, path, value):
    """Put a value where its path says; a place in a list or a record that was not announced is refused."""
    *records, name = path.split('.')
    here = document
    for part in records:
        if isinstance(here, list):
            if int(part) >= len(here):
                raise InputError(path, f'There is no {path.rpartition(".")[0]} in this link.')
            here = here[int(part)]
        else:
            here = here.setdefault(part, {}) if here.get(part, {}) is not None else {}
    here[name] = value


def _usable(document, opened):
    """Return the filled plan; a key that cannot be used is put back to its default, and named."""
    waveform = document.setdefault('waveform', {})
    if not waveform.get('pri_us'):
        waveform['pri_us'] = [_STAND_IN_PRI_US]
        message = f'PRI must be given; none could be read from the link, and {_STAND_IN_PRI_US} µs stands in.'
        _refuse(opened, 'waveform.pri_us', '', message)
    for _ in range(len(KEYS) + 1):
        try:
            return read(document).document
        except InputError as error:
            _refuse(opened, error.field, shown(value_at(document, error.field)), error.message)
            _drop(document, error.field)
    return filled({'waveform': {'pri_us': [_STAND_IN_PRI_US]}})


def _drop(document, path):
    """Take the value that cannot be used out of the document."""
    parts = path.split('.')
    if parts[:2] == ['waveform', 'pri_us']:
        document['waveform']['pri_us'] = [_STAND_IN_PRI_US]
        return
    here, trail = document, []
    for part in parts:
        trail.append((here, part))
        here = (
            here[int(part)]
            if isinstance(here, list) and part.isdigit() and int(part) < len(here)
            else (here.get(part) if isinstance(here, dict) else None)
        )
    for holder, part in reversed(trail):
        if isinstance(holder, dict) and part in holder:
            del holder[part]
            return
    document.clear()
