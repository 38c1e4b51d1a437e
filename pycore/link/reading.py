"""From the items of a link to a plan: every item that can be read is taken, every other one is named."""

from pycore.clock import on_clock
from pycore.errors import InputError
from pycore.link.items import read_value
from pycore.link.names import BY_SHORT, LISTS, RECORDS, REMARK, SEE
from pycore.plan.document import filled, shown
from pycore.plan.keys import BY_PATH, KEYS
from pycore.plan.paths import value_at
from pycore.plan.reading import read

_STAND_IN_PRI_US = 1000


def plan_of(items, refuse):
    """Return the plan that the items of a link make.

    Parameters
    ----------
    items : list of (str, str)
        Names and values. [unitless]
    refuse : callable
        Told the path, text and message of every item that cannot be used. [unitless]

    Returns
    -------
    plan : dict
        Filled; a key whose item was refused stands at its default. [plan's units]
    said : list of str
        What was rounded to the clock.
    """
    document = _document(items, refuse)
    said = _put_on_clock(document, next((text for name, text in items if name == 'pri'), ''))
    return _usable(document, refuse), said


def _document(items, refuse):
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
            refuse(error.field, text, error.message)
    return document


def _put_on_clock(document, typed):
    """Round PRIs that were written by hand to the clock, and say so, as the page does where they are typed."""
    waveform, key = document.get('waveform', {}), BY_PATH['radar.clock_mhz']
    clock = document.get('radar', {}).get('clock_mhz', key.default)
    if not isinstance(clock, int | float) or not key.lowest <= clock <= key.highest:
        clock = key.default
    unit = 'Hz' if typed.endswith('Hz') else 'µs'
    rounded = [on_clock(pri, clock, unit) for pri in waveform.get('pri_us') or []]
    if rounded:
        waveform['pri_us'] = [pri for pri, _ in rounded]
    return [sentence for _, said in rounded for sentence in said]


def _take(document, name, text):
    """Put one item into the document."""
    if name in RECORDS:
        _put(document, RECORDS[name], {} if text == 'yes' else None)
    elif name in LISTS:
        _put(document, LISTS[name][0], _records(name, text))
    elif name == 'see':
        parts = text.split(',')
        for key, part in zip((key for key in KEYS if key.path in SEE), [*parts, ''], strict=False):
            _put(document, key.path, read_value(key, part, key.path))
    elif name.startswith(REMARK):
        document.setdefault('remarks', {})[name.removeprefix(REMARK)] = read_value(
            BY_SHORT['title'][1], text, 'remarks'
        )
    elif name in BY_SHORT:
        path, key = BY_SHORT[name]
        _put(document, path, read_value(key, text, path))
    else:
        raise InputError(name[:80], f'There is no item {shown(name)} in a link; it is left out.')


def _records(name, text):
    """Return so many empty records, or one for rain that stands alone."""
    most = LISTS[name][1]
    if name == 'rain' and text == 'yes':
        return {}
    if not (text.isascii() and text.isdigit()) or not 1 <= int(text[:3]) <= most:
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


def _usable(document, refuse):
    """Return the filled plan; a key that cannot be used is put back to its default, and named."""
    waveform = document.setdefault('waveform', {})
    if not waveform.get('pri_us'):
        waveform['pri_us'] = [_STAND_IN_PRI_US]
        message = f'PRI must be given; none could be read from the link, and {_STAND_IN_PRI_US} µs stands in.'
        refuse('waveform.pri_us', '', message)
    for _ in range(len(KEYS) + 1):
        try:
            return read(document).document
        except InputError as error:
            refuse(error.field, shown(value_at(document, error.field)), error.message)
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
