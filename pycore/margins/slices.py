"""The margins of one finding in words, worked out in slices of a few verdicts each.

What was found so far goes out with each slice and comes back with the next one,
so that whoever asks can do something else in between, or never come back.
"""

from pycore.computed import Computed
from pycore.margins import NOTE, asked_for
from pycore.margins.inputs import inputs_of
from pycore.margins.plans import Tried
from pycore.margins.words import HEADS, NONE_FOUND, told

_NOT_JUDGED = 'Nothing is asked of this, so nothing is judged, and there is no margin to it.'
_NOTHING_FOUND = {
    True: 'No input was found that, moved alone, would make this no longer met.',
    False: 'No input was found that, moved alone, would make this met.',
}
_UP_TO_THE_LIMITS = f'“{NONE_FOUND}”: no change was found up to the input’s limits, or to where there is no such plan.'
_OWN_CARRIER = 'Margins are found at the plan’s own carrier and rain, not over the intervals it must hold over.'
_LETTERS = {True: 'm', False: 'n', 'refused': 'r', None: '-'}
_VERDICTS = {letter: verdict for verdict, letter in _LETTERS.items()}


def margins_in_words(plan, name, so_far, tries, units):
    """Return the margins of one finding in words, or what was found of them so far.

    Parameters
    ----------
    plan : Plan
        The plan. [unitless]
    name : str
        Name of the finding. [unitless]
    so_far : mapping or None
        What the slice before gave under that name; ``None`` to begin. [unitless]
    tries : int
        Most verdicts that this slice works out, at least one. [unitless]
    units : mapping
        The reader's preferences. [unitless]

    Returns
    -------
    margins : dict
        ``done``; until then ``so_far`` and ``part`` (of the inputs that were walked); at the end ``sentence``,
        ``head``, ``rows`` and ``notes``.
    """
    document = plan.document
    state = so_far or _begun(plan, name)
    if state['met'] is None:
        return {'done': True, 'sentence': _NOT_JUDGED, 'head': [], 'rows': [], 'notes': []}
    entries = inputs_of(document, name)
    state, tried, left = dict(state), Tried(document), max(1, tries)
    while state['at'] < len(entries) and left > 0:
        entry = entries[state['at']]
        row, log, is_over = _go_on(told(document, entry, state['met'], units), state['log'], tried, name, entry, left)
        left -= len(log) - len(state['log'])
        state['log'] = log
        if is_over:
            state = {**state, 'at': state['at'] + 1, 'log': '', 'found': [*state['found'], *([row] if row else [])]}
    if state['at'] < len(entries):
        return {'done': False, 'so_far': state, 'part': state['at'] / len(entries)}
    return _ended(document, state)


def _begun(plan, name):
    found = asked_for(Computed(plan, with_echoes=False), name)
    return {'met': found.met, 'at': 0, 'log': '', 'found': []}


def _go_on(steps, log, tried, name, entry, most):
    """Repeat a walk with the verdicts that are known, then work out some more."""
    answer, known = None, len(log)
    while True:
        try:
            value = steps.send(answer)
        except StopIteration as end:
            return end.value, log, True
        if known:
            answer, known = _VERDICTS[log[-known]], known - 1
        elif most:
            answer, most = tried.verdict(name, entry.path, value), most - 1
            answer = answer if isinstance(answer, str) or answer is None else bool(answer)
            log += _LETTERS[answer]
        else:
            return None, log, False


def _ended(document, state):
    """Put the words together, tightest first, what was asked last."""
    met, found = state['met'], sorted(state['found'], key=lambda row: row['order'])
    sentence = found[0]['sentence'] if found else _NOTHING_FOUND[met]
    rows = [row['cells'] for row in found]
    notes = [NOTE] if rows else []
    notes += [_UP_TO_THE_LIMITS] if any(NONE_FOUND in row for row in rows) else []
    notes += [_OWN_CARRIER] if document['holds_over'] is not None else []
    return {'done': True, 'sentence': sentence, 'head': HEADS[met] if rows else [], 'rows': rows, 'notes': notes}
