"""How far each input can move, alone, before the verdict of a finding flips.

Each input is stepped outward from its value (:mod:`pycore.margins.steps`), and the
first change of the verdict is bisected. A walk ends where the plan is refused, or
where the key's limits are. A flip that is narrower than the step can be missed.
"""

from functools import partial

from pycore.computed import Computed
from pycore.errors import InputError
from pycore.findings import named
from pycore.margins.inputs import inputs_of
from pycore.margins.plans import Tried
from pycore.margins.walk import driven, walk
from pycore.plan.document import shown
from pycore.wording import SHOWN_UNITS

NOTE = (
    'Each input is moved alone, in steps of 1/64 of its legal range (single counts for PRIs and pulses near their '
    'value), and the first change of the verdict is bisected; a flip narrower than a step can be missed.'
)
"""What stands under margins wherever they are shown."""


def margins(plan, name, tried=None):
    """Return how far each input that matters to a finding can move before its verdict flips, tightest first.

    Parameters
    ----------
    plan : Plan
        The plan. [unitless]
    name : str
        Name of the finding. [unitless]
    tried : Tried or None
        Plans that were worked out before, to share between findings. [unitless]

    Returns
    -------
    margins : list of Margin
        Only inputs for which a flip was found; none for a finding that is not judged.
    """
    document = plan.document
    tried = tried or Tried(document)
    found = named(Computed(plan, with_echoes=False), name, SHOWN_UNITS)
    if found is None or found.met is None:
        return []
    each = [driven(walk(one, found.met), partial(tried.verdict, name, one.path)) for one in inputs_of(document, name)]
    return sorted((one for one in each if one is not None), key=lambda one: one.tightness)


def all_margins(plan, findings):
    """Return the margins of every judged finding.

    Parameters
    ----------
    plan : Plan
        The plan. [unitless]
    findings : sequence of Finding
        Its findings. [unitless]

    Returns
    -------
    margins : dict
        For each finding that is judged, by its name, the rows of :func:`margins`, ready for JSON.
    """
    tried = Tried(plan.document)
    judged = (finding.name for finding in findings if finding.met is not None)
    return {name: [one.row for one in margins(plan, name, tried)] for name in judged}


def margins_shown(plan, name):
    """Return the margins of one finding as a page shows them.

    Parameters
    ----------
    plan : Plan
        The plan. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    shown : dict
        ``finding``, ``met``, ``margins`` (rows, tightest first), ``note``.

    Raises
    ------
    InputError
        Where the plan has no such finding.
    """
    found = asked_for(Computed(plan, with_echoes=False), name)
    rows = [one.row for one in margins(plan, found.name)]
    return {'finding': found.name, 'met': found.met, 'margins': rows, 'note': NOTE}


def asked_for(computed, name):
    """Return the finding that was asked for by its name.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    finding : Finding
        At the plan's own carrier.

    Raises
    ------
    InputError
        Where the plan has no such finding.
    """
    found = named(computed, name, SHOWN_UNITS) if isinstance(name, str) else None
    if found is None:
        raise InputError('finding', f'The plan has no finding {shown(name)}.')
    return found
