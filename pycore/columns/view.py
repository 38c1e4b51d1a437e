"""What a reader has chosen to look at: it changes figures and their words, never a finding."""

from dataclasses import dataclass

from pycore.columns.mark import Mark, marked


@dataclass(frozen=True, slots=True)
class View:
    """How a plan is looked at.

    Parameters
    ----------
    mark : Mark or None
        The target that is followed, which every figure marks. [m, m/s]
    """

    mark: Mark | None = None


WHOLE = View()
"""The whole plan, nothing marked."""


def seen(computed, chosen):
    """Return the view that a page asks for.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    chosen : mapping or None
        ``target``: ``range_km`` and ``speed_mps`` of the target that is followed. [km, m/s]

    Returns
    -------
    view : View
        Whole where nothing is chosen.

    Raises
    ------
    InputError
        Where what is chosen cannot be.
    """
    return View(mark=marked(computed, (chosen or {}).get('target')))
