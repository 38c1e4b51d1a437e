"""Edits: what a person did to a number, a list or a choice, applied to a plan.

An edit is a plain dictionary: ``{'key': path, 'text': typed}``, ``{'key': path,
'value': value}`` (a step, a drag, a choice) or ``{'do': action, …}``. It gives a
new plan and what is to be said about it, or is refused as a whole.
"""

import copy
from dataclasses import dataclass, field
from fractions import Fraction

from pycore.clock import on_clock
from pycore.errors import InputError
from pycore.plan import filled, read
from pycore.plan_document import checked_number, shown
from pycore.plan_keys import BY_PATH, MOST_PATCHES, MOST_PRIS, MOST_REGIONS
from pycore.quantity import FAMILIES, as_number, read_number, typed, typed_list
from pycore.sentence import key_of, value_at
from pycore.shown import digits, shown_unit
from pycore.wording import SHOWN_UNITS, count_word

_FREQUENCIES = FAMILIES['frequency']
_NEXT_PRI = Fraction(115, 100)
"""A new PRI is so many times the last one (our own choice: far enough to differ, near enough to fit). [unitless]"""
_LISTS = (
    'radar.carrier_ghz',
    'radar.pulse_us',
    'radar.bandwidth_mhz',
    'doppler.notch_mps',
    'waveform.pulses',
    'waveform.fill_pulses',
)


@dataclass(frozen=True, slots=True)
class Edited:
    """A plan after an edit, and what there is to say about it.

    Parameters
    ----------
    document : dict
        The new plan, filled. [plan's units]
    said : list of str
        Sentences such as a rounding to the clock. [unitless]
    """

    document: dict
    said: list = field(default_factory=list)


def apply(document, edit, units=SHOWN_UNITS):
    """Return a plan after one edit.

    Parameters
    ----------
    document : dict
        The plan before. [plan's units]
    edit : dict
        What was done. [unitless]
    units : mapping
        Units that a number without one is meant in. [unitless]

    Returns
    -------
    edited : Edited
        The plan after, checked as a whole.

    Raises
    ------
    InputError
        Where the edit cannot be taken; the plan before stays as it is.
    """
    plan = copy.deepcopy(filled(document))
    if 'do' in edit:
        said = _action(edit)(plan, edit, units)
    elif 'text' in edit:
        said = _typed(plan, str(edit.get('key')), str(edit['text']), units)
    else:
        said = _set(plan, str(edit.get('key')), edit.get('value'))
    said = [*said, *_enough_prfs(plan)]
    return Edited(read(plan).document, said)


def _action(edit):
    action = _ACTIONS.get(edit['do']) if isinstance(edit['do'], str) else None
    if action is None:
        raise InputError('', f'There is no action {shown(edit["do"])}.')
    return action


def _key(path):
    key = key_of(path)
    if key is None:
        raise InputError(path[:80], f'There is no key {shown(path)}.')
    return key


def _put(plan, path, value):
    """Put a value at a path, making the records on the way that are not there."""
    *records, name = path.split('.')
    here = plan
    for part in records:
        step = here[int(part)] if isinstance(here, list) else here.get(part)
        if step is None:
            step = here[part] = {}
        here = step
    if isinstance(here, list):
        here[int(name)] = value
    else:
        here[name] = value


def _set(plan, path, value):
    key = _key(path)
    if isinstance(value, int | float) and not isinstance(value, bool) and key.kind in ('number', 'count', 'interval'):
        checked_number(key, value, path)
    if key.path == 'waveform.pri_us' and path != key.path:
        value, said = _on_clock(plan, Fraction(str(checked_number(key, value, path))), key.unit)
        _put(plan, path, value)
        return said
    if path == 'waveform.kind':
        return _as_kind(plan, value)
    _put(plan, path, value)
    return []


def _typed(plan, path, text, units):
    """Take what was typed for a key."""
    key = _key(path)
    if key.kind in ('text', 'choice'):
        _put(plan, path, text if text or not key.nullable else None)
        return []
    if key.nullable and text.strip().lower() in ('', 'none', '–', '-'):
        _put(plan, path, None)
        return []
    if key.kind == 'flag':
        _put(plan, path, _yes(key, text, path))
        return []
    if path == 'waveform.pri_us':
        return _pasted(plan, {'text': text}, units)
    if key.kind == 'numbers' and path == key.path:
        _put(plan, path, [as_number(one.value) for one in typed_list(text, key, path)])
        return []
    unit = shown_unit(key, units)
    if key.path == 'waveform.pri_us':
        return _typed_pri(plan, key, path, text, unit)
    if key.per_prf and path == key.path and len(text.split()) > 1 and _is_list(text, key, path):
        _put(plan, path, [as_number(one.value) for one in typed_list(text, key, path, unit)])
        return []
    _put(plan, path, read_number(text, key, path, unit, value_at(plan, path)))
    return []


def _is_list(text, key, path):
    """Say whether a text is several numbers and not one with its unit."""
    try:
        typed(text, key, path)
    except InputError:
        return True
    return False


def _yes(key, text, path):
    word = text.strip().lower()
    if word in ('yes', 'true', 'on'):
        return True
    if word in ('no', 'false', 'off', ''):
        return False
    raise InputError(path, f'{key.label} must be yes or no; got {shown(text.strip())}.')


def _typed_pri(plan, key, path, text, unit):
    if not text.strip():
        return _remove_pri(plan, {'index': int(path.rpartition('.')[2])}, {})
    current = value_at(plan, path)
    found = typed(text, key, path, unit, current)
    checked_number(key, float(found.value), path)
    value, said = _on_clock(plan, found.value, found.unit)
    _put(plan, path, value)
    return said


def _on_clock(plan, pri_us, unit):
    """Round a PRI to the nearest count of the plan's clock."""
    return on_clock(pri_us, plan['radar']['clock_mhz'], unit)


def _enough_prfs(plan):
    """Lower M where it exceeds the number of PRIs that are left, and say so."""
    waveform = plan['waveform']
    pris = waveform['pri_us']
    if waveform['kind'] != 'dwells' or not isinstance(pris, list) or not waveform.get('_shrunk'):
        waveform.pop('_shrunk', None)
        return []
    waveform.pop('_shrunk')
    if waveform['detect_m'] <= len(pris):
        return []
    waveform['detect_m'] = len(pris)
    return [f'{count_word(len(pris)).capitalize()} of the {len(pris)} PRFs must now see a target.']


def _add_pri(plan, edit, units):
    """Add a PRI, 1.15 times the last on the clock; lists grow by their last value."""
    pris = plan['waveform']['pri_us']
    if len(pris) >= MOST_PRIS:
        raise InputError('waveform.pri_us', f'PRI: there can be at most {MOST_PRIS}; got one more.')
    longest = Fraction(str(BY_PATH['waveform.pri_us'].highest))
    value, _ = _on_clock(plan, min(Fraction(str(pris[-1])) * _NEXT_PRI, longest), 'µs')
    pris.append(value)
    for values in _lists(plan):
        values.append(values[-1])
    return []


def _lists(plan):
    """Return the lists of a plan that hold one value for each PRI."""
    return [values for path in _LISTS if isinstance(values := value_at(plan, path), list)]


def _place(plan, edit, name):
    """Return the place of a PRI that an action is about."""
    count, index = len(plan['waveform']['pri_us']), edit.get(name)
    if isinstance(index, bool) or not isinstance(index, int) or not 0 <= index < count:
        raise InputError('waveform.pri_us', f'PRI {shown(index)} is not one of the {count} that there are.')
    return index


def _remove_pri(plan, edit, units):
    """Remove a PRI and its places in the lists; M follows where it would exceed N."""
    index = _place(plan, edit, 'index')
    if len(plan['waveform']['pri_us']) == 1:
        raise InputError('waveform.pri_us.0', 'PRI: at least one must stay; this is the last one.')
    for values in (plan['waveform']['pri_us'], *_lists(plan)):
        del values[index]
    plan['waveform']['_shrunk'] = True
    return []


def _move_pri(plan, edit, units):
    """Move a PRI, with all that belongs to it, to another place."""
    start, end = _place(plan, edit, 'index'), _place(plan, edit, 'to')
    for values in (plan['waveform']['pri_us'], *_lists(plan)):
        values.insert(end, values.pop(start))
    return []


def _sort_pris(plan, edit, units):
    """Sort the PRIs, shortest first, with all that belongs to them."""
    pris = plan['waveform']['pri_us']
    order = sorted(range(len(pris)), key=lambda index: (pris[index], index))
    for values in (pris, *_lists(plan)):
        values[:] = [values[index] for index in order]
    return []


def _pasted(plan, edit, units):
    """Take a list of PRIs or PRFs as it was typed or pasted."""
    key, path = BY_PATH['waveform.pri_us'], 'waveform.pri_us'
    unit = shown_unit(key, units)
    text = str(edit.get('text', ''))
    found = typed_list(text[:_LONGEST_PASTE], key, path, unit)
    if not 1 <= len(found) <= MOST_PRIS:
        many = f'more than {len(found)}' if len(text) > _LONGEST_PASTE else str(len(found))
        raise InputError(path, f'PRI: 1 to {MOST_PRIS} are understood; got {many if found else "none"}.')
    said, pris = [], []
    for index, one in enumerate(found):
        checked_number(key, float(one.value), f'{path}.{index}')
        value, rounding = _on_clock(plan, one.value, one.unit)
        pris.append(value)
        said.extend(rounding)
    _resize_lists(plan, len(pris))
    plan['waveform'].update(pri_us=pris, _shrunk=True)
    meant = 'PRFs' if found[0].unit in _FREQUENCIES else 'PRIs'
    return [f'{count_word(len(pris)).capitalize()} {meant} in {found[0].unit} taken.', *said]


_LONGEST_PASTE = 20_000


def _resize_lists(plan, count):
    """Fit the lists for each PRF to a new number of PRIs: cut, or repeat the last value."""
    for values in _lists(plan):
        values[:] = (values + [values[-1]] * count)[:count]


def _split(plan, edit, units):
    """Let a key have one value for each PRI."""
    key = _key(str(edit.get('key')))
    if not key.per_prf:
        raise InputError(key.path, f'{key.label} is one for the whole plan.')
    value = value_at(plan, key.path)
    if not isinstance(value, list):
        _put(plan, key.path, [value] * len(plan['waveform']['pri_us']))
    return []


def _join(plan, edit, units):
    """Let a key have one value for all PRIs: the first one's."""
    key = _key(str(edit.get('key')))
    value = value_at(plan, key.path)
    if isinstance(value, list):
        _put(plan, key.path, value[0])
        if len(set(value)) > 1:
            return [f'{key.label} is now {digits(value[0])} {key.unit} on every PRF.']
    return []


def _as_kind(plan, value):
    """Switch between dwells and stagger; a stagger has one value of everything."""
    if value == 'stagger':
        for path in _LISTS:
            values = value_at(plan, path)
            if isinstance(values, list):
                _put(plan, path, values[0])
    elif value == 'dwells':
        plan['waveform']['_shrunk'] = True
    plan['waveform']['kind'] = value
    return []


def _add_record(path):
    """Make the action that adds a record with its defaults."""

    def add(plan, edit, units):
        if value_at(plan, path) is None:
            _put(plan, path, {})
        return []

    return add


def _remove_record(path):
    """Make the action that takes a record away."""

    def remove(plan, edit, units):
        _put(plan, path, None)
        return []

    return remove


def _add_rain(plan, edit, units):
    """Add a patch of rain, or a further patch of moving clutter."""
    rain = plan['rain']
    patches = [] if rain is None else rain if isinstance(rain, list) else [rain]
    if len(patches) >= MOST_PATCHES:
        raise InputError('rain', f'Rain: there can be at most {MOST_PATCHES} patches; got one more.')
    plan['rain'] = {} if not patches else [*patches, {'name': f'patch {len(patches) + 1}'}]
    return []


def _add_region(plan, edit, units):
    """Add a must-see region: the middle of the coverage until it is said otherwise."""
    if len(plan['must_see']) >= MOST_REGIONS:
        raise InputError('must_see', f'Must-see regions: there can be at most {MOST_REGIONS}; got one more.')
    near, far = plan['coverage']['range_km']
    slow, fast = plan['coverage']['speed_mps']
    quarter, half = (far - near) / 4, (fast - slow) / 2
    plan['must_see'].append(
        {
            'name': f'region {len(plan["must_see"]) + 1}',
            'range_km': [near, round(near + quarter, 6)],
            'speed_mps': [slow, round(slow + half, 6)],
        }
    )
    return []


def _remove_region(plan, edit, units):
    """Take one must-see region away."""
    index, count = edit.get('index'), len(plan['must_see'])
    if not isinstance(index, int) or not 0 <= index < count:
        raise InputError('must_see', f'Must-see region {shown(index)} is not one of the {count} that there are.')
    del plan['must_see'][index]
    return []


def _remark(plan, edit, units):
    """Write, or take away, the engineer's own sentence under a finding."""
    name, text = str(edit.get('finding')), str(edit.get('text', '')).strip()
    plan['remarks'].pop(name, None)
    if text:
        plan['remarks'][name] = text
    return []


_ACTIONS = {
    'add-pri': _add_pri,
    'remove-pri': _remove_pri,
    'move-pri': _move_pri,
    'sort-pris': _sort_pris,
    'paste-pris': _pasted,
    'split': _split,
    'join': _join,
    'add-rain': _add_rain,
    'remove-rain': _remove_record('rain'),
    'add-near-pulse': _add_record('radar.near_pulse'),
    'remove-near-pulse': _remove_record('radar.near_pulse'),
    'add-platform': _add_record('platform'),
    'remove-platform': _remove_record('platform'),
    'add-surface': _add_record('surface'),
    'remove-surface': _remove_record('surface'),
    'add-crossing': _add_record('crossing'),
    'remove-crossing': _remove_record('crossing'),
    'add-weather': _add_record('weather'),
    'remove-weather': _remove_record('weather'),
    'add-radar-equation': _add_record('target.radar_equation'),
    'remove-radar-equation': _remove_record('target.radar_equation'),
    'add-must-see': _add_region,
    'remove-must-see': _remove_region,
    'remark': _remark,
}
