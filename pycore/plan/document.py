"""The plan as a document: filled with its defaults, every value checked against the table of keys."""

import difflib
import math

from pycore.errors import InputError
from pycore.plan.keys import KEYS, MOST_PATCHES, MOST_PRIS, MOST_REGIONS, OPTIONAL_RECORDS
from pycore.wording import MINUS, trimmed

FORMAT = 1
"""Number of the plan's format."""

_LONGEST_SHOWN = 40
_LISTS_OF_RECORDS = {'must_see': MOST_REGIONS, 'rain': MOST_PATCHES}
_FEWEST_WEIGHTS, _MOST_WEIGHTS = 2, 16
_LONGEST_REMARK = 400
_REMARKS = (
    *('visible', 'largest-hole', 'unseen-inbound', 'unseen-crossing', 'blind-speed', 'decode-range', 'decode-speed'),
    *('dwell', 'duty', 'detection', 'range-walk'),
    *(f'must-see.{index}' for index in range(MOST_REGIONS)),
    *('nyquist', 'extended-nyquist', 'unfolding', 'velocity-error', 'second-trip'),
)


def _tree():
    """Arrange the keys by their records: a leaf is a Key, a branch a dict."""
    root = {}
    for key in KEYS:
        *records, name = key.path.replace('[]', '').split('.')
        branch = root
        for record in records:
            branch = branch.setdefault(record, {})
        branch[name] = key
    return root


TREE = _tree()
_IN_THE_HEAD = ('pulsewright', 'remarks')


def shown(value):
    """Return what came, short enough for a sentence.

    Parameters
    ----------
    value : object
        Anything that JSON can hold. [unitless]

    Returns
    -------
    text : str
        At most some forty characters, text in quotation marks.
    """
    if value is None:
        return 'none'
    if isinstance(value, bool):
        return 'true' if value else 'false'
    if isinstance(value, int | float):
        return _number_shown(value)
    if isinstance(value, str):
        cut = value[:_LONGEST_SHOWN] + ('…' if len(value) > _LONGEST_SHOWN else '')
        return f'“{" ".join(cut.split())}”' if cut else 'nothing'
    if isinstance(value, list | tuple):
        return f'a list of {len(value)}'
    return 'an object' if isinstance(value, dict) else type(value).__name__


def _number_shown(value):
    if isinstance(value, int) and abs(value) >= 10**15:
        return f'a number of {len(str(abs(value)))} digits' if abs(value) < 10**4000 else 'a huge number'
    value = float(value)
    if not math.isfinite(value):
        return 'not a number' if math.isnan(value) else 'infinity' if value > 0 else f'{MINUS}infinity'
    return trimmed(value, 12) if 1e-6 <= abs(value) < 1e15 or value == 0 else f'{value:g}'.replace('-', MINUS)


def limits_text(key):
    """Return the limits of a key in words.

    Parameters
    ----------
    key : Key
        A number, count, interval or list. [unitless]

    Returns
    -------
    text : str
        Such as ``'from 0.01 to 10 000 µs'``.
    """
    low, high = _number_shown(key.lowest), _number_shown(key.highest)
    return f'from {low} to {high}{" " + key.unit if key.unit else ""}'


def filled(document):
    """Return a plan with every default filled in, checked key by key.

    Parameters
    ----------
    document : dict
        A plan; only ``waveform.pri_us`` is required. [plan's units]

    Returns
    -------
    document : dict
        A new document with every key.

    Raises
    ------
    InputError
        At the first key that cannot be used.
    """
    if not isinstance(document, dict):
        raise InputError('', f'A plan must be an object with a waveform; got {shown(document)}.')
    version = document.get('pulsewright', FORMAT)
    if isinstance(version, bool) or version != FORMAT:
        raise InputError('pulsewright', f'The plan’s format must be {FORMAT}; got {shown(version)}.')
    body = {name: value for name, value in document.items() if name not in _IN_THE_HEAD}
    checked = _record(TREE, body, '')
    _unlisted(checked)
    if checked['purpose'] == 'weather' and checked['weather'] is None:
        checked['weather'] = _record(TREE['weather'], {}, 'weather')
    if checked['purpose'] == 'weather' and checked['weather'] is None:
        checked['weather'] = _record(TREE['weather'], {}, 'weather')
    return {'pulsewright': FORMAT, **checked, 'remarks': _remarks(document.get('remarks', {}))}


def _unlisted(plan):
    """Turn lists for each PRI into the one number they hold where there is a single PRI."""
    if len(plan['waveform']['pri_us']) == 1:
        for key in KEYS:
            record, _, name = key.path.partition('.')
            if key.per_prf and isinstance(plan[record][name], list) and len(plan[record][name]) == 1:
                plan[record][name] = plan[record][name][0]


def _record(branch, given, path):
    """Fill one record and check each of its keys."""
    given = {} if given is None else given
    if not isinstance(given, dict):
        raise InputError(path, f'{path} must be an object; got {shown(given)}.')
    _refuse_unknown(branch, given, path)
    out = {}
    for name, child in branch.items():
        here = f'{path}.{name}' if path else name
        out[name] = _branch(child, given.get(name), here) if isinstance(child, dict) else _leaf(child, given, here)
    return out


def _branch(child, given, here):
    """Fill a record within a record: one, none, or a list of them."""
    if here in OPTIONAL_RECORDS and given is None:
        return None
    if here not in _LISTS_OF_RECORDS:
        return _record(child, given, here)
    if given is None:
        return [] if here == 'must_see' else None
    if isinstance(given, dict) and here == 'rain':
        return _record(child, given, here)
    most = _LISTS_OF_RECORDS[here]
    if not isinstance(given, list) or len(given) > most:
        raise InputError(here, f'{here} must be a list of at most {most}; got {shown(given)}.')
    return [_record(child, one, f'{here}.{index}') for index, one in enumerate(given)]


def _leaf(key, given, here):
    """Return the checked value of one key, or its default."""
    if key.name not in given:
        if here == 'waveform.pri_us':
            raise InputError(here, f'{key.label} must be given: {limits_text(key)}, 1 to {MOST_PRIS} of them.')
        return list(key.default) if isinstance(key.default, list) else key.default
    value = given[key.name]
    if value is None:
        if key.nullable:
            return None
        raise InputError(here, f'{key.label} must be given; got none.')
    return _CHECKS[key.kind](key, value, here)


def _refuse_unknown(branch, given, path):
    for name in given:
        if name not in branch:
            known = sorted([*branch, *(() if path else _IN_THE_HEAD)])
            near = difflib.get_close_matches(str(name)[:_LONGEST_SHOWN], known, 1, 0.0)
            where = f'{path}.' if path else ''
            nearest = f'; the nearest known one is {where}{near[0]}' if near else ''
            raise InputError(f'{where}{name}'[:80], f'There is no key {shown(f"{where}{name}")}{nearest}.')


def checked_number(key, value, here):
    """Return a number that lies within the limits of its key.

    Parameters
    ----------
    key : Key
        The key. [unitless]
    value : object
        What came. [unit of the key]
    here : str
        Path, with the part of a list. [unitless]

    Returns
    -------
    value : int or float
        As it came; a whole number as an integer, so that 980 and 980.0 are one and the same plan.
    """
    if isinstance(value, bool) or not isinstance(value, int | float) or not key.lowest <= value <= key.highest:
        raise InputError(here, f'{key.label} must be {limits_text(key)}; got {shown(value)}.')
    return int(value) if value == int(value) and abs(value) < 10**15 else value


def _number(key, value, here):
    if key.per_prf and isinstance(value, list):
        if not 1 <= len(value) <= MOST_PRIS:
            raise InputError(here, f'{key.label} must be one number or one for each PRI; got {shown(value)}.')
        return [checked_number(key, one, f'{here}.{index}') for index, one in enumerate(value)]
    return checked_number(key, value, here)


def _count(key, value, here):
    value = _number(key, value, here)
    for one in value if isinstance(value, list) else [value]:
        if one != int(one):
            raise InputError(here, f'{key.label} must be a whole number {limits_text(key)}; got {shown(one)}.')
    return [int(one) for one in value] if isinstance(value, list) else int(value)


def _interval(key, value, here):
    if not isinstance(value, list) or len(value) != 2:
        raise InputError(here, f'{key.label} must be two numbers, from and to; got {shown(value)}.')
    low, high = (checked_number(key, end, f'{here}.{index}') for index, end in enumerate(value))
    if not low < high:
        raise InputError(
            here,
            f'{key.label} must run from a lower to a higher end; got from {shown(low)} to {shown(high)} {key.unit}.',
        )
    return [low, high]


def _numbers(key, value, here):
    fewest, most = (1, MOST_PRIS) if here == 'waveform.pri_us' else (_FEWEST_WEIGHTS, _MOST_WEIGHTS)
    if not isinstance(value, list) or not fewest <= len(value) <= most:
        raise InputError(here, f'{key.label} must be a list of {fewest} to {most} numbers; got {shown(value)}.')
    checked = [checked_number(key, one, f'{here}.{index}') for index, one in enumerate(value)]
    if here == 'doppler.weights' and sum(one != 0 for one in checked) < _FEWEST_WEIGHTS:
        raise InputError(here, f'{key.label} must hold at least two that are not 0.')
    return checked


def _choice(key, value, here):
    if value not in key.choices:
        near = difflib.get_close_matches(value[:_LONGEST_SHOWN], key.choices, 1) if isinstance(value, str) else []
        hint = f' (nearest: {near[0]})' if near else ''
        raise InputError(here, f'{key.label} must be {" or ".join(key.choices)}{hint}; got {shown(value)}.')
    return value


def _flag(key, value, here):
    if not isinstance(value, bool):
        raise InputError(here, f'{key.label} must be true or false; got {shown(value)}.')
    return value


def _text(key, value, here):
    return _checked_text(key.label, value, here, key.longest)


def _checked_text(label, value, here, longest):
    if not isinstance(value, str):
        raise InputError(here, f'{label} must be text; got {shown(value)}.')
    if len(value) > longest:
        raise InputError(here, f'{label} must be at most {longest} characters; got {len(value)}.')
    return value


def _remarks(given):
    """Check the remarks: a sentence for a finding, by its name."""
    if given is None or not isinstance(given, dict):
        raise InputError('remarks', f'remarks must be an object of sentences by finding; got {shown(given)}.')
    for name, text in given.items():
        if name not in _REMARKS:
            near = difflib.get_close_matches(str(name)[:_LONGEST_SHOWN], _REMARKS, 1, 0.0)[0]
            raise InputError('remarks', f'There is no finding {shown(name)}; the nearest is {near}.')
        _checked_text(f'The remark on {name}', text, f'remarks.{name}', _LONGEST_REMARK)
    return dict(given)


_CHECKS = {
    'number': _number,
    'count': _count,
    'interval': _interval,
    'numbers': _numbers,
    'choice': _choice,
    'flag': _flag,
    'text': _text,
}
