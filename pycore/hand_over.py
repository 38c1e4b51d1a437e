"""The hand-over of a plan: its timing table in words, as CSV and as plain text, and what changed since another plan."""

from pycore.differences import differing_inputs
from pycore.timing import columns, timing_table
from pycore.wording import THIN_SPACE, trimmed

_HEADS = {
    'pri_counts': 'PRI, counts',
    'pri_us': 'PRI, µs',
    'prf_hz': 'PRF, Hz',
    'carrier_ghz': 'carrier, GHz',
    'pulse_counts': 'pulse, counts',
    'near_at_counts': 'near pulse at, counts',
    'near_pulse_counts': 'near pulse, counts',
    'fill_pulses': 'fill pulses',
    'pulses': 'pulses',
    'start_counts': 'starts at, counts',
    'length_counts': 'lasts, counts',
    'duty_pct': 'duty, %',
    'filter_width_mps': 'filter width, m/s',
}
NOTHING = '–'
_FIGURES = {'duty_pct': 4, 'filter_width_mps': 4, 'prf_hz': 9}
_PARTS = 'A time that is not a whole number of counts keeps its fraction here: the timing unit cannot make it.'


def hand_over(plan, checksum, opened, units):
    """Return what is handed over with a plan.

    Parameters
    ----------
    plan : Plan
        The plan. [SI]
    checksum : str
        Its checksum. [unitless]
    opened : dict or None
        The filled plan that was opened. [plan's units]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    shown : dict
        ``head`` and ``rows`` of words, ``sentences``, ``csv``, ``text``, and ``changed``: rows of label, before, now.
    """
    table = timing_table(plan, checksum)
    names, rows = columns(table)
    head = [_head(name) for name in names]
    words = [[_cell(name, cell) for name, cell in zip(names, row, strict=True)] for row in rows]
    said = _sentences(table, names, rows)
    changed = [] if opened is None else differing_inputs(plan.document, opened, units)
    return {
        'head': head,
        'rows': words,
        'sentences': said,
        'csv': _csv(names, rows),
        'text': _text(head, words, said),
        'changed': [[one['label'], one['other'], one['plan']] for one in changed],
    }


def _head(name):
    """Return a column's heading; a receiver that opens several times has several."""
    if name in _HEADS:
        return _HEADS[name]
    what = 'opens' if 'opens' in name else 'shuts'
    number = ''.join(letter for letter in name if letter.isdigit())
    return f'receiver {what}{" " + number if number else ""}, counts'


def _cell(name, value):
    return NOTHING if value is None else trimmed(float(value), _FIGURES.get(name, 15))


def _sentences(table, names, rows):
    """Say how long one set is, what is left of the time on target, and whose table this is."""
    clock = f'{trimmed(table.clock_hz / 1e6)}{THIN_SPACE}MHz'
    total_ms = trimmed(table.sum_counts / table.clock_hz * 1e3)
    said = [f'One set takes {_counts(table.sum_counts)} of the {clock} clock, {total_ms}{THIN_SPACE}ms.']
    if table.rest_counts is not None:
        left = f'{_counts(abs(table.rest_counts))} of the time on target'
        said.append(f'{left} are left.' if table.rest_counts >= 0 else f'{left} are missing: the set does not fit.')
    if any(
        isinstance(cell, float) and name.endswith('_counts')
        for row in rows
        for name, cell in zip(names, row, strict=True)
    ):
        said.append(_PARTS)
    return [*said, f'Checksum of the plan: {table.checksum}.']


def _counts(count):
    return f'{trimmed(float(count), 15)} counts'


def _csv(names, rows):
    """Return the table with all digits, as the command line writes it."""
    lines = [','.join(names), *(','.join('' if cell is None else repr(cell) for cell in row) for row in rows)]
    return '\n'.join(lines) + '\n'


def _text(head, words, said):
    """Return the table as plain text, one quantity a line, which fits into a mail."""
    plain = [[cell.replace(THIN_SPACE, '') for cell in row] for row in words]
    widths = [max(len(cell) for cell in row) for row in plain]
    label = max(len(one) for one in head)
    lines = [
        f'{name:<{label}}  ' + '  '.join(f'{row[place]:>{width}}' for row, width in zip(plain, widths, strict=True))
        for place, name in enumerate(head)
    ]
    return '\n'.join([*lines, '', *(sentence.replace(THIN_SPACE, ' ') for sentence in said), ''])
