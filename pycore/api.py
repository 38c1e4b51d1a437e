"""The actions: plain dictionaries in, plain dictionaries and arrays out.

The command line, the worker in the browser and notebooks all go through these.
No mathematics lives here.
"""

from pycore import edit, link
from pycore.assessment import assessment
from pycore.columns import picture
from pycore.computed import Computed
from pycore.errors import InputError
from pycore.findings import findings, verdict
from pycore.plan import filled, read
from pycore.wording import SHOWN_UNITS


def assess(plan):
    """Return the assessment of a plan: all its numbers and findings.

    Parameters
    ----------
    plan : dict
        A plan; only ``waveform.pri_us`` is required. [plan's units]

    Returns
    -------
    assessment : dict
        Ready for JSON.

    Raises
    ------
    InputError
        Where a key of the plan cannot be used: field, rule, limit, and what came.
    """
    return assessment(Computed(read(plan)))


def note(plan=None, opened=None, edits=(), figures=(), size=None, units=None, deep=False):
    """Return all that a page shows of a plan, after the edits that were made to it.

    Parameters
    ----------
    plan : dict or None
        The plan that the edits start from. [plan's units]
    opened : str or None
        Text of a link to start from instead. [unitless]
    edits : sequence of dict
        Edits in the order they were made; one that is refused leaves the plan as it was. [unitless]
    figures : sequence of str
        Names of the figures that are on the screen; no other is computed. [unitless]
    size : mapping or None
        Width and height of the figures' maps, by figure. [cells]
    units : mapping or None
        Units that the reader prefers, by ``range``, ``speed``, ``pri``. [unitless]

    deep : bool
        Whether findings that take long are worked out where nothing is judged by them. [unitless]

    Returns
    -------
    note : dict
        The plan, its link, what was said and refused, verdict, findings, figures.
    """
    units = {**SHOWN_UNITS, **(units or {})}
    start = None if opened is None else link.read_link(opened)
    document, said, refused = _edited(plan if start is None else start.document, edits, units)
    computed = Computed(read(document), with_echoes=deep)
    found = findings(computed, units)
    return {
        'plan': filled(document),
        'link': link.write(document),
        'opened': None if start is None else _as_opened(start),
        'said': said,
        'refused': refused,
        'verdict': verdict(found),
        'findings': [_shown(finding) for finding in found],
        'figures': {name: picture(name, computed, units, (size or {}).get(name)) for name in figures},
    }


def _edited(document, edits, units):
    """Apply edits one after another; a refused one is kept with its reason and changes nothing."""
    said, refused = [], []
    for one in edits:
        try:
            result = edit.apply(document, one, units)
        except InputError as error:
            refused.append({'edit': one, 'key': error.field, 'message': error.message})
        else:
            document = result.document
            said.extend(result.said)
    return document, said, refused


def _as_opened(start):
    return {name: getattr(start, name) for name in ('cut', 'edited', 'said', 'refused', 'view')}


def _shown(finding):
    """Return a finding as a page shows it: the sentence in its parts, besides the assessment's keys."""
    keys = (
        *('name', 'met', 'accepted', 'verdict', 'text', 'label', 'value', 'value_text', 'unit'),
        *('wanted', 'wanted_text', 'detail', 'remark', 'remark_text'),
    )
    return {key: getattr(finding, key) for key in keys}


ACTIONS = {'assess': assess, 'note': note}
"""What the worker in the browser may be asked for, by name."""
