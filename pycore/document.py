"""A plan as it is handed over in words: JSON text, a link, or just a list of PRIs or PRFs."""

import json
import re

from pycore import link
from pycore.edit import apply
from pycore.errors import InputError
from pycore.plan.document import shown

_DEEPEST = 40
_MOST_DIGITS = 400


def understood(text):
    """Return the plan that a text means.

    Parameters
    ----------
    text : str
        JSON, a link, or a list such as ``980 860 us`` or ``1020, 1163 Hz``. [unitless]

    Returns
    -------
    plan : dict
        Not yet checked key by key. [plan's units]

    Raises
    ------
    InputError
        Where it is none of these, or a link that was cut or holds what cannot be used.
    """
    stripped = text.strip()
    if not stripped:
        raise InputError('', 'A plan must be JSON, a link or a list of PRIs; got nothing.')
    if stripped[0] in '{["':
        return _json(stripped)
    if 'v=' in stripped and '=' in stripped:
        return _linked(stripped)
    if any(re.match(r'\s*[+\-]?[.,]?[0-9]', line) for line in stripped.split('\n', 2)[:2]):
        bare = {'waveform': {'pri_us': [1000]}}
        return apply(bare, {'do': 'paste-pris', 'text': stripped}).document
    raise InputError('', f'A plan must be a JSON file, a link or a list of PRIs; got {shown(stripped)}.')


def _json(text):
    """Read JSON; a key given twice is refused, because one of the two would be lost."""
    if re.search(rf'[\[{{]{{{_DEEPEST}}}', re.sub(r'[^\[\]{}]', '', text)):
        raise InputError('', f'A plan must not nest deeper than {_DEEPEST}.')
    try:
        return json.loads(text, object_pairs_hook=_once, parse_int=_integer)
    except json.JSONDecodeError as error:
        raise InputError(
            '', f'The plan must be JSON; at line {error.lineno}, column {error.colno}: {error.msg}.'
        ) from None
    except RecursionError:
        raise InputError('', f'A plan must not nest deeper than {_DEEPEST}.') from None


def _once(pairs):
    taken = {}
    for name, value in pairs:
        if name in taken:
            raise InputError(name[:80], f'The key {shown(name)} must be given once; it is given twice.')
        taken[name] = value
    return taken


def _integer(digits):
    """Read a whole number; one so long that no key can want it is refused before it is worked out."""
    if len(digits) > _MOST_DIGITS:
        raise InputError('', f'A plan must not hold a number of {len(digits)} digits.')
    return int(digits)


def _linked(text):
    """Open a link on the command line, where nothing may pass in silence."""
    opened = link.read_link(text)
    if opened.cut:
        raise InputError('', 'The link must end in its checksum, end=; it was cut.')
    if opened.refused:
        raise InputError(opened.refused[0]['key'], opened.refused[0]['message'])
    return opened.document
