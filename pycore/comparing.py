"""Two plans side by side in words: how many inputs differ, each finding as better or worse, verdicts that flipped."""

from pycore.differences import differing_inputs, judged_changes, verdicts_differ
from pycore.remembered import findings_of
from pycore.wording import THIN_SPACE, capitalised, count_word, listed, plural

SIGNS = {'better': '+', 'worse': '\N{MINUS SIGN}', 'same': '=', 'new': '·', 'gone': '·'}
"""The sign beside each word, so that nothing is told by colour alone."""

_WORDS = {'same': 'the same', 'new': 'only in the present plan', 'gone': 'only in the kept plan'}
_MOST_NAMED = 3


def comparison(computed, other, units):
    """Return how a plan differs from another one: inputs first, then findings.

    Parameters
    ----------
    computed, other : Computed
        What the plan gives, and what the other one does; words such as better are said of the first. [SI]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    comparison : dict
        ``inputs``, ``findings`` (each with ``sign``, ``word`` and ``flipped``), ``differ`` (whether any verdict
        does), and ``summary``, one sentence.
    """
    inputs = differing_inputs(computed.plan.document, other.plan.document, units)
    changes = judged_changes(findings_of(computed, units), findings_of(other, units))
    return {
        'inputs': inputs,
        'findings': [_worded(change) for change in changes],
        'differ': verdicts_differ(changes),
        'summary': _summary(inputs, changes),
    }


def _worded(change):
    """Return a change with its sign, its word, and what became of the verdict."""
    word = _WORDS.get(change['change'], change['change'])
    if change['change'] in ('better', 'worse') and change['value_text'] == change['other_text']:
        word = f'{word}, by less than is shown'
    return {**change, 'sign': SIGNS[change['change']], 'word': word, 'flipped': _flipped(change)}


def _flipped(change):
    """Say that a verdict is another one; nothing where it is the same, or where only one plan is judged."""
    if change['met'] is None or change['other_met'] is None or change['met'] == change['other_met']:
        return ''
    return 'now met' if change['met'] else 'no longer met'


def _summary(inputs, changes):
    """Say how many inputs differ, and how many findings are better, worse and the same."""
    count = len(inputs)
    lead = f'{capitalised(count_word(count))} {plural(count, "input differs", "inputs differ")}'
    said = [(sum(one['change'] == which for one in changes), word) for which, word in _COUNTED]
    some = [f'{count_word(number)} {word}' for number, word in said if number]
    noun = plural(next((number for number, _ in said if number), 0), 'finding is', 'findings are')
    if not some:
        return f'{lead}.'
    first, *rest = some
    number, _, word = first.partition(' ')
    return f'{lead}; {listed([f"{number} {noun} {word}", *rest])}.'


_COUNTED = (
    *(('better', 'better'), ('worse', 'worse'), ('same', 'the same')),
    *(('new', 'only in the present plan'), ('gone', 'only in the kept plan')),
)


def moved(computed, before, units):
    """Return what one edit did, as a line of the minutes.

    Parameters
    ----------
    computed, before : Computed
        What the plan gives after it, and what it gave before. [SI]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    moved : dict
        ``what`` changed; ``findings`` that moved, each ``name``, ``label``, ``text`` (before and after), ``change``,
        ``sign``, ``word`` and ``flipped``.
    """
    found = comparison(computed, before, units)
    return {
        'what': _what(found['inputs']),
        'findings': [
            {
                **{key: one[key] for key in ('name', 'label', 'change', 'sign', 'word', 'flipped')},
                'text': from_to(one['other_text'] or 'not judged', one['value_text'] or 'not judged'),
            }
            for one in found['findings']
            if one['flipped'] or one['other_text'] != one['value_text']
        ],
    }


def _what(inputs):
    """Name the first inputs that changed, each from what to what."""
    if not inputs:
        return 'nothing differs'
    ends = [(one['label'], one['other'] or 'none', one['plan'] or 'none') for one in inputs[:_MOST_NAMED]]
    named = [f'{_small(label)} {from_to(before, after)}' for label, before, after in ends]
    more = len(inputs) - _MOST_NAMED
    return '; '.join([*named, *([f'{count_word(more)} more {plural(more, "input")}'] if more > 0 else [])])


def _small(label):
    """Return a label as it stands inside a line: an abbreviation keeps its capitals."""
    return label[:1].lower() + label[1:] if label[1:2].islower() or label[1:2] == ' ' else label


def from_to(before, after):
    """Return two values with an arrow between them, a unit that they share written once.

    Parameters
    ----------
    before, after : str
        As they are shown. [unitless]

    Returns
    -------
    text : str
        Such as ``1.0 → 1.2 µs``.
    """
    number, space, unit = before.rpartition(THIN_SPACE)
    shared = space and THIN_SPACE not in number and after.endswith(f'{THIN_SPACE}{unit}') and not unit[:1].isdigit()
    return f'{number if shared else before} → {after}'
