"""What the PRFs of a plan are called in figures: by their interval, and by what else tells equal ones apart."""

from collections import Counter

from pycore.columns.axes import interval_name
from pycore.wording import THIN_SPACE, trimmed


def prf_names(plan, units):
    """Return a name for each PRF, no two alike.

    Parameters
    ----------
    plan : Plan
        The plan. [SI]
    units : mapping
        Units that the reader prefers, with key ``pri``. [unitless]

    Returns
    -------
    names : list of str
        Such as ``'980 µs'``; of equal intervals ``'800 µs at 2.7 GHz'``; where the carriers are equal too,
        ``'800 µs (2)'``, counted from the first of them.
    """
    names = [interval_name(pri, units) for pri in plan.pri_s.tolist()]
    carriers = [f'{trimmed(carrier / 1e9)}{THIN_SPACE}GHz' for carrier in plan.carrier_hz.tolist()]
    several = {name for name in names if len({at for one, at in zip(names, carriers, strict=True) if one == name}) > 1}
    names = [f'{name} at {at}' if name in several else name for name, at in zip(names, carriers, strict=True)]
    return _counted(names)


def _counted(names):
    """Return names in which those that come more than once are counted."""
    often, so_far, told = Counter(names), Counter(), []
    for name in names:
        so_far[name] += 1
        told.append(f'{name} ({so_far[name]})' if often[name] > 1 else name)
    return told
