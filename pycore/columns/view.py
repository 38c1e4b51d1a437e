"""What a reader has chosen to look at: it changes figures and their words, never a finding."""

import math
from collections.abc import Mapping
from dataclasses import dataclass, field, replace

from pycore.columns.mark import Mark, marked
from pycore.computed import Computed
from pycore.errors import InputError
from pycore.remembered import computed_of_document
from pycore.speed_choices import CHOICES


@dataclass(frozen=True, slots=True)
class View:
    """How a plan is looked at.

    Parameters
    ----------
    mark : Mark or None
        The target that is followed, which every figure marks. [m, m/s]
    zoom : mapping
        For each figure of which only a part is shown: its ends in range and in radial speed. [m, m/s]
    kept : Computed or None
        What the plan gives that was kept to compare with. [SI]
    axis : str
        What the axis of the blind speeds is read in, as ``speed_choices.ALONG`` has it. [unitless]
    up : str
        What goes up the axis of the blind speeds, as ``speed_choices.UP`` has it. [unitless]
    """

    mark: Mark | None = None
    zoom: Mapping = field(default_factory=dict)
    kept: Computed | None = None
    axis: str = 'speed'
    up: str = 'own'

    def part(self, name, x, y):
        """Return the axes that one figure is drawn on.

        Parameters
        ----------
        name : str
            The figure. [unitless]
        x, y : Axis
            Of range and radial speed, over the whole coverage. [m, m/s]

        Returns
        -------
        x, y : Axis
            The same, or cut to the part that is looked at.
        """
        if name not in self.zoom:
            return x, y
        return tuple(replace(axis, limits=ends) for axis, ends in zip((x, y), self.zoom[name], strict=True))


WHOLE = View()
"""The whole plan, nothing marked, nothing beside it."""


def seen(computed, chosen):
    """Return the view that a page asks for.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    chosen : mapping or None
        ``target``: ``range_km`` and ``speed_mps`` of the target that is followed; ``zoom``: for each figure of which
        a part is looked at, its ends ``x`` and ``y``; ``kept``: the plan to compare
        with; ``axis`` of the blind speeds, and what goes ``up`` theirs. [km, m/s]

    Returns
    -------
    view : View
        Whole where nothing is chosen.

    Raises
    ------
    InputError
        Where what is chosen cannot be.
    """
    chosen = chosen or {}
    kept = chosen.get('kept')
    return View(
        mark=marked(computed, chosen.get('target')),
        zoom=_zoomed(computed.plan, chosen.get('zoom') or {}),
        kept=None if kept is None else computed_of_document(kept, computed.with_echoes),
        **{name: _one_of(name, chosen.get(name) or values[0], values) for name, values in CHOICES.items()},
    )


def _one_of(field_name, value, names):
    if value not in names:
        raise InputError(field_name, f'{field_name} must be one of {", ".join(names)}; got {value!r}.')
    return value


def _zoomed(plan, zoom):
    """Return the parts in SI, each cut to the coverage; what an edit has left outside it is forgotten."""
    parts = {
        name: (_cut(name, ends, 'x', 1e3, plan.range_m), _cut(name, ends, 'y', 1.0, plan.speed_m_s))
        for name, ends in zoom.items()
        if ends is not None
    }
    return {name: part for name, part in parts.items() if all(part)}


def _cut(name, ends, side, si, limits):
    low, high = (_finite(f'zoom.{name}.{side}', end) * si for end in ends[side])
    low, high = max(low, limits[0]), min(high, limits[1])
    return (low, high) if low < high else None


def _finite(field_name, value):
    if isinstance(value, bool) or not isinstance(value, int | float) or not math.isfinite(value):
        raise InputError(field_name, f'{field_name} must be two numbers; got {value!r}.')
    return value


def shown_part(x, y, part):
    """Say which part of a map is shown, where that is not all of it.

    Parameters
    ----------
    x, y : Axis
        Of the whole coverage. [m, m/s]
    part : pair of Axis
        Those that are drawn. [m, m/s]

    Returns
    -------
    sentences : list of str
        One or none.
    """
    if part == (x, y):
        return []
    here = (axis.interval(*cut.limits) for axis, cut in zip((x, y), part, strict=True))
    return [f'The map shows {" and ".join(here)} of it.']
