"""Every PRI for one target: how long it stays clear, where it is blind, how much of it is received, over the PRI."""

from bokeh.models import HBar, Line, Scatter, Segment, VArea

from pycore.columns import every_pri
from webapp.figures.names import write
from webapp.figures.style import draw, plot, source

NAME = every_pri.NAME


def build(picture):
    """Return the figure.

    Parameters
    ----------
    picture : dict
        What the core gives. [shown units]

    Returns
    -------
    figure : bokeh figure
        Sources ``until``, ``received``, ``lanes``, ``blind``, ``own``, ``longest``, ``names``.
    """
    made = plot(NAME, picture)
    made.yaxis[0].axis_line_alpha = 0
    for strip in ('until', 'received'):
        columns = source(NAME, picture, strip)
        draw(made, columns, VArea(x='x', y1='base', y2='top'), fill_color='asked')
        draw(made, columns, Line(x='x', y='top', line_width=1.25), line_color='line')
    bar = {'y': 'y', 'left': 'left', 'right': 'right', 'height': 0.3, 'line_alpha': 0}
    draw(made, source(NAME, picture, 'lanes'), HBar(**bar), fill_color='lane')
    draw(made, source(NAME, picture, 'blind'), HBar(**bar), fill_color='bar')
    _own(made, picture)
    return made


def _own(made, picture):
    """Draw the plan's own PRIs as lines that show on dark and on pale, and the one that lasts longest."""
    own = source(NAME, picture, 'own')
    ends = {'x0': 'x', 'x1': 'x', 'y0': 'y0', 'y1': 'y1'}
    draw(made, own, Segment(**ends, line_width=4, line_alpha=0.9), line_color='paper')
    draw(made, own, Segment(**ends, line_width=1.5), line_color='strong-text')
    dot = Scatter(x='x', y='y', size=8, line_width=1.5)
    draw(made, source(NAME, picture, 'longest'), dot, fill_color='paper', line_color='line')
    write(made, NAME, picture, 'names', ground=0.7)
