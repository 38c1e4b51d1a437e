"""Plans with one input moved, and the verdicts of their findings."""

from pycore.computed import Computed
from pycore.errors import InputError
from pycore.findings import named
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS


class Tried:
    """Plans with one input moved, each worked out once for all findings that ask for it.

    Parameters
    ----------
    document : dict
        The plan they start from, filled. [plan's units]
    """

    def __init__(self, document):
        self._document = document
        self._known = {}

    def verdict(self, name, path, value):
        """Return the verdict of a finding with one input moved.

        Parameters
        ----------
        name : str
            Name of the finding. [unitless]
        path : str
            Path of the input. [unitless]
        value : int or float
            Its value. [unit of the key]

        Returns
        -------
        met : bool or str
            ``'refused'`` where there is no such plan.
        """
        if (path, value) not in self._known:
            self._known[path, value] = self._computed(path, value)
        computed = self._known[path, value]
        if computed is None:
            return 'refused'
        if name == 'detection':
            # The verdict alone: to look for the range itself would take fifty times as long.
            return computed.echoes.half_reach(computed.plan.wanted.detect_m)
        return named(computed, name, SHOWN_UNITS).met

    def _computed(self, path, value):
        try:
            return Computed(read(moved(self._document, path, value)), with_echoes=False)
        except InputError:
            return None


def moved(document, path, value):
    """Return a plan with one number changed.

    Parameters
    ----------
    document : dict
        A filled plan. [plan's units]
    path : str
        Dotted path, places in lists included. [unitless]
    value : object
        New value. [unit of the key]

    Returns
    -------
    document : dict
        A new document that shares all else with the old one.
    """
    first, _, rest = path.partition('.')
    inner = value if not rest else moved(document[int(first) if isinstance(document, list) else first], rest, value)
    if isinstance(document, list):
        return [inner if place == int(first) else one for place, one in enumerate(document)]
    return {**document, first: inner}
