"""Two plans side by side: inputs that differ first, then each finding as better, worse or the same."""

from pycore.findings.finding import NOT_ASKED
from pycore.findings.rank import rank
from pycore.plan.document import TREE
from pycore.sentence import key_of
from pycore.shown import shown_value

_SAME = 1e-9


def differing_inputs(plan, other, units):
    """Return the inputs in which two plans differ.

    Parameters
    ----------
    plan, other : dict
        Two filled plans. [plan's units]
    units : mapping
        Shown units. [unitless]

    Returns
    -------
    inputs : list of dict
        ``key``, ``label``, and what stands in ``plan`` and in ``other``, as shown; records that only one of them
        has are one difference.
    """
    found = []
    _walk(TREE, plan, other, '', found)
    return [
        {'key': path, 'label': _label(path), 'plan': _shown(path, a, units), 'other': _shown(path, b, units)}
        for path, a, b in found
    ]


def _walk(branch, plan, other, path, found):
    """Collect the paths at which two filled plans differ, record by record."""
    for name, child in branch.items():
        here = f'{path}.{name}' if path else name
        a, b = plan.get(name), other.get(name)
        if a == b:
            continue
        if isinstance(child, dict) and isinstance(a, dict) and isinstance(b, dict):
            _walk(child, a, b, here, found)
        elif isinstance(child, dict) and isinstance(a, list) and isinstance(b, list) and len(a) == len(b):
            for index, (one, two) in enumerate(zip(a, b, strict=True)):
                _walk(child, one, two, f'{here}.{index}', found)
        else:
            found.append((here, a, b))


def _label(path):
    key = key_of(path)
    return key.label if key else path.rpartition('.')[2].replace('_', ' ').capitalize()


def _shown(path, value, units):
    """Return a value as it is shown; a whole record is there or not, a list of records by its length."""
    key = key_of(path)
    if key is not None:
        return shown_value(key, value, units)
    if isinstance(value, list):
        return str(len(value)) if value else 'none'
    return 'none' if value is None else 'given'


def judged_changes(findings, others):
    """Return each finding of two plans, and whether the first plan's is better, worse or the same.

    Parameters
    ----------
    findings, others : sequence of Finding
        Findings of the plan, and of the other one. [unitless]

    Returns
    -------
    changes : list of dict
        ``name``, ``label``, both values and verdicts, ``change``; a finding that only one plan has is ``new`` or
        ``gone``.
    """
    ours, theirs = ({one.name: one for one in group if one.value_text != NOT_ASKED} for group in (findings, others))
    names = list(dict.fromkeys([*ours, *theirs]))
    return [_change(name, ours.get(name), theirs.get(name)) for name in names]


def _change(name, one, other):
    present = one or other
    return {
        'name': name,
        'label': present.label,
        'value': one.value if one else None,
        'value_text': one.value_text if one else '',
        'met': one.met if one else None,
        'other_value': other.value if other else None,
        'other_text': other.value_text if other else '',
        'other_met': other.met if other else None,
        'change': 'gone' if one is None else 'new' if other is None else change_word(name, one.value, other.value),
    }


def change_word(name, value, other):
    """Return whether one value of a finding is better or worse than another.

    Parameters
    ----------
    name : str
        Name of the finding. [unitless]
    value, other : float or None
        Its value in the plan and in the other one. [same]

    Returns
    -------
    word : str
        ``'better'``, ``'worse'`` or ``'same'``.
    """
    ranks = [rank(name, one) for one in (value, other)]
    if ranks[0] == ranks[1] or abs(ranks[0] - ranks[1]) <= _SAME * max(abs(ranks[0]), abs(ranks[1])):
        return 'same'
    return 'better' if ranks[0] > ranks[1] else 'worse'


def verdicts_differ(changes):
    """Return whether any verdict differs between two plans.

    Parameters
    ----------
    changes : sequence of dict
        Of :func:`judged_changes`. [unitless]

    Returns
    -------
    differ : bool
        A finding that only one of the two is judged by counts.
    """
    return any(change['met'] != change['other_met'] for change in changes)
