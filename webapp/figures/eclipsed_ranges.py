"""Eclipsed ranges: a lane for each PRF with the received share under it, and on top the lane that counts."""

from bokeh.models import Line, Patch, Segment

from pycore.columns import eclipsed_ranges
from webapp.figures.lanes import lanes, thin_lanes
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
        Sources ``lanes``, ``eclipsed``, ``unseen``, ``received``, ``least``, ``kept-lanes``,
        ``kept-blind``, ``kept-unseen``, ``target``.
    """
    made = plot(NAME, picture)
    lanes(made, NAME, picture, 'eclipsed', height='height')
    thin_lanes(made, NAME, picture)
    received = source(NAME, picture, 'received')
    draw(made, received, Patch(x='x', y='area', line_alpha=0), fill_color='asked')
    draw(made, received, Line(x='x', y='edge', line_width=1.25), line_color='line')
    across = Segment(x0='x0', x1='x1', y0='y', y1='y', line_width=1, line_dash=[4, 4])
    draw(made, source(NAME, picture, 'least'), across, line_color='text')
    upright(made, NAME, picture)
    return made
