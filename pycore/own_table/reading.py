"""Read a table of range, speed and seen, as a spreadsheet or a script writes it.

Columns are parted by semicolons, tabs, commas or spaces. A comma is a decimal sign
wherever it does not part the columns. A heading may name the columns, in any
order, and their units; without one they are range, speed, seen.
"""

import math
import re
from dataclasses import dataclass

import numpy as np

from pycore.errors import InputError
from pycore.plan.keys import BY_PATH
from pycore.units import FAMILIES, unit_of
from pycore.wording import MINUS, THIN_SPACE

MOST_LINES = 200_000
"""Most lines of a table. [unitless]"""
_FIELD = 'table'
_COLUMNS = {
    'range': ('range', 'distance', 'r'),
    'speed': ('speed', 'velocity', 'doppler', 'v'),
    'seen': ('seen', 'visible', 'detected', 'clear', 'see'),
}
_SEEN = {'1': True, 'yes': True, 'true': True, 'y': True, 'seen': True, 'x': True, 'visible': True}
_BLIND = {'0': False, 'no': False, 'false': False, 'n': False, 'blind': False, '': False, '-': False}
_WORDS = {**_SEEN, **_BLIND, '1.0': True, '0.0': False}
_LIMITS = {'range': BY_PATH['coverage.range_km'], 'speed': BY_PATH['coverage.speed_mps']}
_JUNK = re.compile('[\x00-\x08\x0e-\x1f\x7f\ufffd]')
_NUMBER = re.compile(r'([+-]?[0-9.,]+(?:[eE][+-]?[0-9]+)?)\s*(\S*)')
_LONGEST_SHOWN = 24


@dataclass(frozen=True, slots=True)
class Table:
    """A table of range, speed and seen.

    Parameters
    ----------
    line : int array, shape R
        Line of the text that each row stands on. [unitless]
    range_m, speed_m_s : float array, shape R
        The cells. [m, m/s]
    seen : bool array, shape R
        What the table says of each. [unitless]
    units : pair of str
        Units that ranges and speeds were read in. [unitless]
    """

    line: np.ndarray
    range_m: np.ndarray
    speed_m_s: np.ndarray
    seen: np.ndarray
    units: tuple


def read_table(text, units):
    """Return a table from its text.

    Parameters
    ----------
    text : str
        What was pasted, or the contents of a file. [unitless]
    units : mapping
        Units that are meant where no heading names any, by ``range`` and ``speed``. [unitless]

    Returns
    -------
    table : Table
        At least one row.

    Raises
    ------
    InputError
        Where a line cannot be used: its number, what is wanted, what came.
    """
    text = _plain(text)
    lines = [(number, line) for number, line in enumerate(text.split('\n'), 1) if line.strip()]
    if not lines:
        raise InputError(_FIELD, 'The table is empty: it needs a line of range, speed and seen for each cell.')
    if len(lines) > MOST_LINES:
        raise InputError(_FIELD, f'The table may have {MOST_LINES} lines at most; got {len(lines)}.')
    heading = None if re.match(r'\s*["\']?[+-]?[0-9.,]', lines[0][1]) else lines.pop(0)
    if not lines:
        raise InputError(_FIELD, 'The table has a heading and no lines under it.')
    parts = _parts_at(lines[0][1])
    places, meant = _heading(heading, _parts_at(heading[1]) if heading else parts, units)
    return _rows(lines, parts, places, meant)


def _plain(text):
    """Turn the page's own signs into plain ones; refuse what is no text."""
    text = text.replace('\r\n', '\n').replace('\r', '\n').lstrip('\ufeff')
    if _JUNK.search(text):
        raise InputError(_FIELD, 'This is not a table as text: save it as CSV, range, speed and seen, and try again.')
    return text.replace(MINUS, '-').replace(THIN_SPACE, '').replace('\u00a0', ' ')


def _parts_at(line):
    """Return what parts the columns of a line; ``None`` for white space."""
    return next((mark for mark in (';', '\t') if mark in line), ',' if line.count(',') >= 2 else None)


def _cells(line, parts):
    return [cell.strip(' \t"\'') for cell in line.split(parts)]


def _heading(heading, parts, units):
    """Return where each column stands, and the units that are meant."""
    meant = {name: units[name] for name in ('range', 'speed')}
    if heading is None:
        return {'range': 0, 'speed': 1, 'seen': 2}, meant
    places = {}
    for place, cell in enumerate(_cells(heading[1], parts)):
        words = re.findall(r'[^\s()\[\],;:_]+', cell)
        name = next((one for one, known in _COLUMNS.items() if words and words[0].lower() in known), None)
        if name is None or name in places:
            continue
        places[name] = place
        if name in meant:
            found = (unit_of(word, FAMILIES[name]) for word in words[1:])
            meant[name] = next((unit for unit in found if unit), meant[name])
    missing = [name for name in _COLUMNS if name not in places]
    if missing:
        raise InputError(
            _FIELD, f'Line {heading[0]}: the heading names no column {missing[0]}; got {_short(heading[1])}.'
        )
    return places, meant


def _rows(lines, parts, places, meant):
    """Read all lines under the heading."""
    wanted = max(places.values()) + 1
    at = [places[name] for name in _COLUMNS]
    ranges, speeds, seen = [], [], []
    for number, line in lines:
        cells = _cells(line, parts)
        if len(cells) < wanted:
            raise InputError(_FIELD, f'Line {number}: range, speed and seen are wanted; got {_short(line)}.')
        ranges.append(_quantity(cells[at[0]], 'range', number, meant, parts))
        speeds.append(_quantity(cells[at[1]], 'speed', number, meant, parts))
        verdict = _WORDS.get(cells[at[2]].lower())
        if verdict is None:
            raise InputError(_FIELD, f'Line {number}: seen must be 1 or 0, yes or no; got {_short(cells[at[2]])}.')
        seen.append(verdict)
    numbers = np.array([number for number, _ in lines])
    return Table(numbers, np.array(ranges), np.array(speeds), np.array(seen), (meant['range'], meant['speed']))


def _quantity(cell, name, number, meant, parts):
    """Return one range or speed in metres, or metres per second."""
    value, unit = _number(cell, name, parts), meant[name]
    if value is None:
        found = _NUMBER.fullmatch(cell)
        value, unit = (_number(found[1], name, parts), unit_of(found[2], FAMILIES[name])) if found else (None, None)
    key = _LIMITS[name]
    if value is None or unit is None or not math.isfinite(value):
        raise InputError(_FIELD, f'Line {number}: {name} must be a number; got {_short(cell)}.')
    scale = float(FAMILIES[name][unit])
    value *= scale
    if not key.lowest <= value / float(FAMILIES[name][key.unit]) <= key.highest:
        limits = f'from {key.lowest:g} to {key.highest:g} {key.unit}'.replace('-', MINUS)
        raise InputError(_FIELD, f'Line {number}: {name} must be {limits}; got {_short(cell)}.')
    return value


def _number(cell, name, parts):
    try:
        return float(cell if parts == ',' else cell.replace(',', '.'))
    except ValueError:
        return None


def _short(text):
    """Return what came, cut short."""
    text = ' '.join(text.split())
    return f'“{text[:_LONGEST_SHOWN]}{"…" if len(text) > _LONGEST_SHOWN else ""}”'
