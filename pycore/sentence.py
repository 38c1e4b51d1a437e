"""The plan in words: the paragraph, its rail of PRIs, and the Also line, from the templates of ``clauses``.

Everything comes out as *pieces*: ``{'text': …}``, a live number ``{'key': path,
'shown': text}``, an action ``{'do': action, 'text': words}`` (with
``at``, a place in a list, and ``name``, where it needs them) or the rail
``{'rail': [cell, …]}``, so that a page can lay them out and plain text is the
pieces joined. The algorithm is kept simple enough to stand a second time on the
page; ``tests/core/sentences.json`` holds the two against each other.
"""

import re

from pycore.clauses import ALSO, CLAUSES, NOT_IN_ALSO, PATCH, RAIL, REGION, REGION_REPORTED
from pycore.plan.keys import BY_PATH, GROUPS, JUDGED, OPTIONAL_RECORDS
from pycore.plan.paths import key_of, value_at
from pycore.shown import shown_digits, shown_unit, shown_value
from pycore.wording import SHOWN_UNITS

_FEW = 4
_UNNAMED = 'what has no name'
_SLOT = re.compile(r'\{([^}]*)\}')
_PER_PRF = ('radar.carrier_ghz', 'radar.pulse_us', 'radar.bandwidth_mhz', 'doppler.notch_mps')
_PER_CPI = ('waveform.pulses', 'waveform.fill_pulses')


def facts(plan, units):
    """Return what decides between the clauses.

    Parameters
    ----------
    plan : dict
        A filled plan. [plan's units]
    units : mapping
        The reader's preferences. [unitless]

    Returns
    -------
    facts : dict of str
        By the names that ``clauses`` uses.
    """
    n, rain = len(plan['waveform']['pri_us']), plan['rain']
    many = {path: 'list' if isinstance(value_at(plan, path), list) else 'one' for path in (*_PER_PRF, *_PER_CPI)}
    return {
        'kind': plan['waveform']['kind'],
        'count': 'one' if n == 1 else 'few' if n <= _FEW else 'many',
        'differs': 'yes' if 'list' in many.values() else 'no',
        'carrier': many['radar.carrier_ghz'],
        'pulse': many['radar.pulse_us'],
        'notch': many['doppler.notch_mps'],
        'pulses': many['waveform.pulses'],
        'fill': many['waveform.fill_pulses'],
        'weights': 'none' if plan['doppler']['weights'] is None else 'given',
        'rain': 'none' if not rain else 'several' if isinstance(rain, list) else 'one',
        'as': 'prf' if shown_unit(BY_PATH['waveform.pri_us'], units) in ('Hz', 'kHz') else 'pri',
    }


def clauses(plan, units=SHOWN_UNITS):
    """Return the paragraph of a plan, clause by clause.

    Parameters
    ----------
    plan : dict
        A filled plan. [plan's units]
    units : mapping
        The reader's preferences. [unitless]

    Returns
    -------
    clauses : list of dict
        ``id``, ``short`` (whether it stays when the paragraph sticks to the top) and ``pieces``.
    """
    known, out, taken = facts(plan, units), [], set()
    for clause in CLAUSES:
        if clause['id'] in taken or any(known[fact] not in values for fact, values in clause['when'].items()):
            continue
        taken.add(clause['id'])
        out.append({'id': clause['id'], 'short': clause['short'], 'pieces': _pieces(clause['text'], plan, units)})
        if clause['id'] == 'sees':
            out.extend(_each('must-see', 'must_see', plan, units, _region))
    if known['rain'] == 'several':
        out.extend(_each('rain', 'rain', plan, units, lambda patch: PATCH))
    spoken = {key_of(piece['key']).path for clause in out for piece in clause['pieces'] if 'key' in piece}
    also = _also(plan, units, spoken)
    return [*out, {'id': 'also', 'short': False, 'pieces': also}] if also else out


def _each(name, path, plan, units, template):
    """Return one clause for each record of a list."""
    out = []
    for index, record in enumerate(value_at(plan, path)):
        text = template(record).replace('@', f'{path}.{index}').replace('#', str(index))
        out.append({'id': f'{name}-{index}', 'short': False, 'pieces': _pieces(text, plan, units)})
    return out


def _region(region):
    return REGION_REPORTED if region['visible_pct'] is None else REGION


def _pieces(template, plan, units):
    """Fill a template: text between slots, and what each slot asks for."""
    pieces, at = [], 0
    for slot in _SLOT.finditer(template):
        pieces.append({'text': template[at : slot.start()]})
        pieces.extend(_slot(slot[1], plan, units))
        at = slot.end()
    pieces.append({'text': template[at:]})
    return _joined(pieces)


def _joined(pieces):
    """Join neighbouring texts and leave out empty ones."""
    out = []
    for piece in pieces:
        if set(piece) == {'text'} and out and set(out[-1]) == {'text'}:
            out[-1] = {'text': out[-1]['text'] + piece['text']}
        elif piece.get('text') != '':
            out.append(piece)
    return out


def _slot(slot, plan, units):
    """Return the pieces of one slot of a template."""
    if slot.startswith('list '):
        return _list(slot.removeprefix('list '), plan, units)
    if slot.startswith('do '):
        return [_action(*slot.removeprefix('do ').split('|'))]
    if slot.startswith('goes '):
        return [{'text': _goes(value_at(plan, slot.removeprefix('goes ')))}]
    if slot == 'rail':
        return [{'rail': rail(plan, units)}]
    if slot in _WORDS:
        return [{'text': _WORDS[slot](plan)}]
    if '?' in slot:
        path, _, forms = slot.partition('?')
        one, _, many = forms.partition('|')
        return [{'text': one if value_at(plan, path) == 1 else many}]
    path, _, how = slot.partition('|')
    return [_number(path, plan, units, how)]


def _action(action, words, name=None):
    """Return an action in words; ``remove-rain.2`` is done to the third patch."""
    action, _, at = action.partition('.')
    return {'do': action, 'text': words, **({'at': int(at)} if at else {}), **({'name': name} if name else {})}


def _number(path, plan, units, how=''):
    key, value = key_of(path), value_at(plan, path)
    if key.kind == 'choice':
        return {'text': key.said(value)}
    if isinstance(value, str):
        named = value or _UNNAMED
        return {'key': path, 'shown': named if how == 'name' else named[:1].upper() + named[1:]}
    if how == 'no' and value == 0:
        return {'key': path, 'shown': 'no'}
    shown = shown_digits(key, value, units) if how == 'bare' and value is not None else shown_value(key, value, units)
    return {'key': path, 'shown': shown}


def _list(path, plan, units):
    """Return a list of live numbers: commas, ``and`` before the last, one unit at the end."""
    count, pieces = len(value_at(plan, path)), []
    for index in range(count):
        if index:
            pieces.append({'text': ' and ' if index == count - 1 else ', '})
        pieces.append(_number(f'{path}.{index}', plan, units, 'bare' if index < count - 1 else ''))
    return pieces


def _goes(speed):
    """Say which way something moves."""
    return 'closing' if speed > 0 else 'receding' if speed < 0 else 'standing still'


def _way(plan):
    """Say which way the wanted speeds go."""
    low, high = plan['coverage']['speed_mps']
    return 'closing' if low >= 0 else 'receding' if high <= 0 else 'closing above zero, receding below'


_WORDS = {
    'n': lambda plan: str(len(plan['waveform']['pri_us'])),
    'way': _way,
    'ground': lambda plan: 'the mainlobe clutter' if plan['platform'] else 'still ground',
}


def rail(plan, units=SHOWN_UNITS):
    """Return the list of PRIs, a cell each: the interval, the other way of saying it, and what differs by PRF.

    Parameters
    ----------
    plan : dict
        A filled plan. [plan's units]
    units : mapping
        The reader's preferences. [unitless]

    Returns
    -------
    cells : list of list of dict
        Pieces of each cell, one a line.
    """
    key = BY_PATH['waveform.pri_us']
    as_frequency = shown_unit(key, units) in ('Hz', 'kHz')
    other = {**units, 'pri': 'us' if as_frequency else 'Hz'}
    lists = [path for path in (*_PER_PRF, *_PER_CPI) if isinstance(value_at(plan, path), list)]
    cells = []
    for index, pri in enumerate(plan['waveform']['pri_us']):
        lines = [_number(f'waveform.pri_us.{index}', plan, units), {'text': shown_value(key, pri, other)}]
        cells.append([*lines, *(_differing(path, index, plan, units) for path in lists)])
    return cells


def _differing(path, index, plan, units):
    """Return the line of a cell for what differs by PRF, with the words that say what it is."""
    before, one, many = RAIL.get(path, ('', '', ''))
    number = _number(f'{path}.{index}', plan, units)
    return {**number, 'before': before, 'after': one if value_at(plan, number['key']) == 1 else many}


def _also(plan, units, spoken):
    """Return the Also line: what is off its default and stands nowhere else in the paragraph."""
    own = [one for one in ALSO if _is_said(value_at(plan, one['path']), one)]
    items = [_pieces(one['text'], plan, units) for one in own]
    spoken = spoken | {key_of(piece['key']).path for item in items for piece in item if 'key' in piece}
    spoken = spoken | {one['path'] for one in own}
    for key in BY_PATH.values():
        if key.path not in spoken and _off_default(key, plan):
            items.append(_item(key, plan, units))
    if not items:
        return []
    pieces = [{'text': 'Also: '}]
    for index, item in enumerate(items):
        pieces.extend([{'text': '; '}] if index else [])
        pieces.extend(item)
    return _joined([*pieces, {'text': '.'}])


def _is_said(value, one):
    return value in one['is'] if 'is' in one else value is not None


def _off_default(key, plan):
    """Say whether a key has a value of its own that the Also line must name."""
    if key.group not in GROUPS or key.group == JUDGED or '[]' in key.path:
        return False
    if any(key.path == name or key.path.startswith(f'{name}.') for name in NOT_IN_ALSO):
        return False
    if any(key.path.startswith(f'{name}.') and value_at(plan, name) is None for name in OPTIONAL_RECORDS):
        return False
    value = value_at(plan, key.path)
    return value != key.default and not (key.per_prf and isinstance(value, list))


def _item(key, plan, units):
    """Name one key and its value: a live number where it is one."""
    label, value = key.label[:1].lower() + key.label[1:], value_at(plan, key.path)
    if value is True:
        return [{'text': label}]
    if key.kind == 'choice':
        return [{'text': key.said(value)}]
    if key.kind in ('number', 'count') and value is not None:
        return [{'text': f'{label} '}, _number(key.path, plan, units)]
    return [{'text': f'{label} {shown_value(key, value, units)}'}]


def text(plan, units=SHOWN_UNITS):
    """Return the paragraph as plain text, as it reads when it is copied.

    Parameters
    ----------
    plan : dict
        A filled plan. [plan's units]
    units : mapping
        The reader's preferences. [unitless]

    Returns
    -------
    text : str
        One paragraph; actions are left out, the rail is a list.
    """
    return ' '.join(_plain(clause['pieces']) for clause in clauses(plan, units))


def _plain(pieces):
    parts = []
    for piece in pieces:
        if 'rail' in piece:
            parts.append('; '.join(', '.join(map(_line, cell)) for cell in piece['rail']) + '.')
        elif 'do' not in piece:
            parts.append(piece.get('shown', piece.get('text')))
    return ''.join(parts).strip()


def _line(line):
    """Return one line of a cell as plain text."""
    return f'{line.get("before", "")}{line.get("shown", line.get("text"))}{line.get("after", "")}'
