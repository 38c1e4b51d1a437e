"""Eclipsed ranges: a lane for each PRF with the received share under it, and on top the lane that counts."""

from bokeh.models import Line, Patch

from pycore.columns import eclipsed_ranges
from webapp.figures.lanes import lanes
from webapp.figures.marks import upright
from webapp.figures.style import draw, plot, source

NAME = eclipsed_ranges.NAME


def build(picture):
    """Return the figure.

    Parameters
    ----------
    picture : dict
        What the core gives. [shown units]

    Returns
    -------
    figure : bokeh figure
        Sources ``lanes``, ``eclipsed``, ``unseen``, ``received``, ``target``.
    """
    made = plot(NAME, picture)
    lanes(made, NAME, picture, 'eclipsed', height=0.5)
    received = source(NAME, picture, 'received')
    draw(made, received, Patch(x='x', y='area', line_alpha=0), fill_color='asked')
    draw(made, received, Line(x='x', y='edge', line_width=1.25), line_color='line')
    upright(made, NAME, picture)
    return made
