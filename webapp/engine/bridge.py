"""Between the worker and `pycore.api`: one request as JSON in, one answer as JSON and one buffer of arrays out.

Knows the wire, no mathematics. An array of the answer stands in the JSON as ``{"$": [dtype, shape, offset]}`` and its
bytes lie in the buffer at that offset, aligned for a typed array. Numbers that JSON has no word for become null.
"""

import json
import math
import traceback

import numpy as np

from pycore import api
from pycore.errors import InputError

ALIGNMENT = 8  # bytes; the largest item of any typed array that crosses

NARROWED = {'bool': 'uint8', 'int64': 'int32', 'uint64': 'uint32', 'float16': 'float32'}


def answer(request_text):
    """Return the answer to one request.

    Parameters
    ----------
    request_text : str
        JSON ``{"action": name, "args": {...}}``. [unitless]

    Returns
    -------
    pair : tuple of str and bytes
        JSON ``{"result": ...}`` or ``{"error": {"message", "field"?, "traceback"?}}``, and the arrays of the result.
    """
    request = json.loads(request_text)
    try:
        reply = {'result': action(request['action'])(**request['args'])}
    except InputError as refused:
        reply = {'error': {'message': str(refused), 'field': refused.field}}
    except Exception as fault:
        reply = {'error': {'message': f'{type(fault).__name__}: {fault}', 'traceback': traceback.format_exc()}}

    return packed(reply)


def action(name):
    """Return the action of a name: one of the core's, or one of the search, which is imported when first asked for."""
    if name.startswith('find '):
        from webapp.engine import searching

        return searching.ACTIONS[name]

    return api.ACTIONS[name]


def packed(value):
    """Return a plain value as JSON text and the bytes of the arrays in it.

    Parameters
    ----------
    value : dict, list, array, number, str, bool or None
        What an action returned. [unitless]

    Returns
    -------
    pair : tuple of str and bytes
        As in `answer`.
    """
    buffer = bytearray()
    text = json.dumps(_wired(value, buffer), allow_nan=False, separators=(',', ':'))

    return text, bytes(buffer)


def _wired(value, buffer):
    """Return the value in JSON's own types, its arrays moved into the buffer."""
    if isinstance(value, np.ndarray) and value.dtype.kind in 'biuf':
        return {'$': _stored(value, buffer)}
    if isinstance(value, np.ndarray):
        value = value.tolist()  # words have no typed array
    if isinstance(value, dict):
        return {str(key): _wired(item, buffer) for key, item in value.items()}
    if isinstance(value, list | tuple):
        return [_wired(item, buffer) for item in value]
    if isinstance(value, np.generic):
        value = value.item()
    if isinstance(value, float) and not math.isfinite(value):
        return None

    return value


def _stored(array, buffer):
    """Append an array to the buffer and return where it lies: dtype, shape, offset."""
    name = NARROWED.get(array.dtype.name, array.dtype.name)
    if np.issubdtype(name, np.integer) and not _fits(array, np.iinfo(name)):
        name = 'float64'
    buffer.extend(b'\0' * (-len(buffer) % ALIGNMENT))
    offset = len(buffer)
    buffer.extend(np.ascontiguousarray(array, dtype=name).tobytes())

    return [name, list(array.shape), offset]


def _fits(array, limits):
    """Return whether every count of the array lies within the limits of a type."""
    return not array.size or (limits.min <= int(array.min()) and int(array.max()) <= limits.max)
