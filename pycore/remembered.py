"""What was computed for the last few plans, so that a plan that is looked at again is not computed again.

While a plan is compared with a kept one, every edit asks for the kept one too; when
only the view changes, the plan is the same as before. Plans are told apart by their documents.
"""

import json
from copy import copy
from functools import lru_cache

from pycore.computed import Computed
from pycore.holds_over import judged
from pycore.plan.reading import read

_MOST = 6
"""Plans that are remembered: the present one, the kept one, and those just left. [unitless]"""


class _Told:
    """A plan that equals every other one of the same document."""

    __slots__ = ('plan', 'text')

    def __init__(self, plan):
        self.plan = plan
        self.text = json.dumps(plan.document, sort_keys=True)

    def __hash__(self):
        return hash(self.text)

    def __eq__(self, other):
        return self.text == other.text


def computed_of(plan, with_echoes=True):
    """Return what a plan gives, the same object whenever it is asked for again soon.

    Parameters
    ----------
    plan : Plan
        The plan, checked and in SI units. [unitless]
    with_echoes : bool
        Whether findings may ask for clutter and detection even where nothing is judged by them. [unitless]

    Returns
    -------
    computed : Computed
        What it gives.
    """
    return _computed(_Told(plan), bool(with_echoes))


def computed_of_document(document, with_echoes=True):
    """Return what the plan of a document gives; otherwise as :func:`computed_of`.

    Parameters
    ----------
    document : dict
        A plan. [plan's units]
    with_echoes : bool
        Whether findings may ask for clutter and detection even where nothing is judged by them. [unitless]

    Returns
    -------
    computed : Computed
        What it gives.

    Raises
    ------
    InputError
        Where a key of the plan cannot be used.
    """
    return computed_of(_read(json.dumps(document)), with_echoes)


@lru_cache(maxsize=_MOST)
def _read(text):
    return read(json.loads(text))


@lru_cache(maxsize=2 * _MOST)
def _computed(told, with_echoes):
    if not with_echoes:
        return Computed(told.plan, with_echoes=False)
    # Whatever was worked out without the echoes holds with them as well.
    deep = copy(_computed(told, False))
    deep.with_echoes = True
    return deep


def findings_of(computed, units):
    """Return the judged findings of a plan, worked out once for each choice of units.

    Parameters
    ----------
    computed : Computed
        What :func:`computed_of` gave. [SI]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    findings : tuple of Finding
        As :func:`pycore.holds_over.judged` gives them.
    """
    return _findings(computed, tuple(sorted(units.items())))


@lru_cache(maxsize=2 * _MOST)
def _findings(computed, units):
    return tuple(judged(computed, dict(units)))
