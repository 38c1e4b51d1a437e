"""Edits of the list of PRIs, and of the lists that hold one value for each of them.

Each action takes the plan that is being changed, the edit, and the shown units;
it changes the plan and returns what there is to say.
"""

import copy
from fractions import Fraction

from pycore.clock import on_clock
from pycore.errors import InputError
from pycore.plan.document import checked_number, shown
from pycore.plan.keys import BY_PATH, KEYS, MOST_PRIS
from pycore.plan.paths import known_key, put, value_at
from pycore.quantity import typed_list, words
from pycore.shown import shown_unit, shown_value
from pycore.units import FAMILIES
from pycore.wording import count_word

_PRIS = 'waveform.pri_us'
_NEXT_PRI = Fraction(115, 100)
"""A new PRI is so many times the last one (our own choice: far enough to differ, near enough to fit). [unitless]"""
_LISTS = tuple(key.path for key in KEYS if key.per_prf)
_KEPT = (_PRIS, *_LISTS, 'waveform.detect_m', 'doppler.delays', 'doppler.weights')
"""What dwells and a stagger each keep for themselves."""
_LONGEST_PASTE = 200_000


def _lists(plan):
    """Return the lists of a plan that hold one value for each PRI."""
    return [values for path in _LISTS if isinstance(values := value_at(plan, path), list)]


def _place(plan, edit, name):
    """Return the place of a PRI that an action is about."""
    count, index = len(plan['waveform']['pri_us']), edit.get(name)
    if isinstance(index, bool) or not isinstance(index, int) or not 0 <= index < count:
        raise InputError(_PRIS, f'PRI {shown(index)} is not one of the {count} that there are.')
    return index


def _enough_prfs(plan):
    """Lower M where it exceeds the number of PRIs that are left, and say so."""
    waveform = plan['waveform']
    left = len(waveform['pri_us'])
    if waveform['kind'] != 'dwells' or waveform['detect_m'] <= left:
        return []
    waveform['detect_m'] = left
    if left == 1:
        return ['The one PRF that is left must now see a target.']
    return [f'All {left} PRFs that are left must now see a target.']


def add_pri(plan, edit, units):
    """Add a PRI, 1.15 times the last on the clock; lists grow by their last value.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    edit : dict
        The edit. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    said : list of str
        Nothing.
    """
    pris = plan['waveform']['pri_us']
    if len(pris) >= MOST_PRIS:
        raise InputError(_PRIS, f'PRI: there can be at most {MOST_PRIS}; got one more.')
    longest = Fraction(str(BY_PATH[_PRIS].highest))
    clock = Fraction(str(plan['radar']['clock_mhz']))
    # The last count within the limit, so that rounding to a slow clock does not pass it.
    most = Fraction(int(longest * clock)) / clock
    value, _ = on_clock(min(Fraction(str(pris[-1])) * _NEXT_PRI, most), plan['radar']['clock_mhz'])
    pris.append(value)
    for values in _lists(plan):
        values.append(values[-1])
    return []


def remove_pri(plan, edit, units):
    """Remove the PRI at ``index`` and its places in the lists; M follows where it would exceed N.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    edit : dict
        With ``index``. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    said : list of str
        That M was lowered.
    """
    index = _place(plan, edit, 'index')
    if len(plan['waveform']['pri_us']) == 1:
        raise InputError(f'{_PRIS}.0', 'PRI: at least one must stay; this is the last one.')
    for values in (plan['waveform']['pri_us'], *_lists(plan)):
        del values[index]
    return _enough_prfs(plan)


def move_pri(plan, edit, units):
    """Move the PRI at ``index``, with all that belongs to it, to the place ``to``.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    edit : dict
        With ``index`` and ``to``. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    said : list of str
        Nothing.
    """
    start, end = _place(plan, edit, 'index'), _place(plan, edit, 'to')
    for values in (plan['waveform']['pri_us'], *_lists(plan)):
        values.insert(end, values.pop(start))
    return []


def sort_pris(plan, edit, units):
    """Sort the PRIs, shortest first, with all that belongs to them.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    edit : dict
        The edit. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    said : list of str
        Nothing.
    """
    pris = plan['waveform']['pri_us']
    order = sorted(range(len(pris)), key=lambda index: (pris[index], index))
    for values in (pris, *_lists(plan)):
        values[:] = [values[index] for index in order]
    return []


def paste_pris(plan, edit, units):
    """Take the ``text`` of an edit as the list of PRIs or PRFs.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    edit : dict
        With ``text``. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    said : list of str
        How many were taken and in which unit, and what was rounded.
    """
    return taken_pris(plan, str(edit.get('text', '')), units)


def taken_pris(plan, text, units):
    """Take a list of PRIs or PRFs as it was typed or pasted.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    text : str
        The list. [unitless]
    units : mapping
        Shown units, one of which is meant where none is typed. [unitless]

    Returns
    -------
    said : list of str
        How many were taken and in which unit, what was rounded, that M was lowered.
    """
    key = BY_PATH[_PRIS]
    count = sum(word[:1].isdigit() for word in words(text[:_LONGEST_PASTE]))
    if count > MOST_PRIS:  # ten thousand numbers are counted, not read
        many = f'more than {count}' if len(text) > _LONGEST_PASTE else str(count)
        raise InputError(_PRIS, f'PRI: 1 to {MOST_PRIS} are understood; got {many}.')
    found = typed_list(text[:_LONGEST_PASTE], key, _PRIS, shown_unit(key, units))
    if not found:
        raise InputError(_PRIS, f'PRI: 1 to {MOST_PRIS} are understood; got none.')
    said, pris = [], []
    for index, one in enumerate(found):
        checked_number(key, float(one.value), f'{_PRIS}.{index}')
        value, rounding = on_clock(one.value, plan['radar']['clock_mhz'], one.unit)
        pris.append(value)
        said.extend(rounding)
    for values in _lists(plan):
        values[:] = (values + [values[-1]] * len(pris))[: len(pris)]
    plan['waveform']['pri_us'] = pris
    meant = 'PRF' if found[0].unit in FAMILIES['frequency'] else 'PRI'
    taken = f'{count_word(len(pris)).capitalize()} {meant}{"" if len(pris) == 1 else "s"} in {found[0].unit} taken.'
    return [taken, *said, *_enough_prfs(plan)]


def rounded_pris(plan, clock_mhz):
    """Round all PRIs to another clock.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    clock_mhz : int or float
        The clock. [MHz]

    Returns
    -------
    said : list of str
        One sentence for each PRI that was rounded.
    """
    rounded = [on_clock(pri, clock_mhz) for pri in plan['waveform']['pri_us']]
    plan['waveform']['pri_us'] = [value for value, _ in rounded]
    return [sentence for _, said in rounded for sentence in said]


def split(plan, edit, units):
    """Let the ``key`` of an edit have one value for each PRI.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    edit : dict
        With ``key``. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    said : list of str
        Nothing.
    """
    key = known_key(str(edit.get('key')))
    if not key.per_prf or plan['waveform']['kind'] == 'stagger':
        raise InputError(key.path, f'{key.label} is one for the whole plan.')
    value = value_at(plan, key.path)
    if not isinstance(value, list):
        put(plan, key.path, [value] * len(plan['waveform']['pri_us']))
    return []


def join(plan, edit, units):
    """Let the ``key`` of an edit have one value for all PRIs: the first one's.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    edit : dict
        With ``key``. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    said : list of str
        The value that is left, where they differed.
    """
    key = known_key(str(edit.get('key')))
    value = value_at(plan, key.path)
    if not key.per_prf or not isinstance(value, list):
        return []
    put(plan, key.path, value[0])
    return [f'{key.label} is now {shown_value(key, value[0], units)} on every PRF.'] if len(set(value)) > 1 else []


def set_kind(plan, edit, units):
    """Switch between dwells and a stagger; ``kept`` brings back what the other kind was left with.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    edit : dict
        With ``kind``, and ``kept``: a plan of the other kind, or a part of one. [unitless]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    said : list of str
        At the first switch, when nothing is kept yet: where the present numbers go.
    """
    kept, before = edit.get('kept'), plan['waveform']['kind']
    said = switched_kind(plan, edit.get('kind'))
    if isinstance(kept, dict):
        for path in _KEPT:
            value = value_at(kept, path)
            if value is not None or path == 'doppler.weights' and 'weights' in (kept.get('doppler') or {}):
                put(plan, path, copy.deepcopy(value))
        return rounded_pris(plan, plan['radar']['clock_mhz'])
    name = {'dwells': 'dwells', 'stagger': 'stagger'}[before]
    other = 'stagger' if before == 'dwells' else 'dwells'
    if before == plan['waveform']['kind']:
        return said
    return [f'The numbers of the {name} are kept while this page is open; link and file carry the {other} only.', *said]


def switched_kind(plan, kind):
    """Put another kind in force; a stagger has one value of everything.

    Parameters
    ----------
    plan : dict
        The plan, which is changed. [plan's units]
    kind : object
        ``'dwells'`` or ``'stagger'``; anything else is refused when the plan is read. [unitless]

    Returns
    -------
    said : list of str
        That M was lowered.
    """
    plan['waveform']['kind'] = kind
    if kind != 'stagger':
        return _enough_prfs(plan)
    for path in _LISTS:
        values = value_at(plan, path)
        if isinstance(values, list):
            put(plan, path, values[0])
    return []
