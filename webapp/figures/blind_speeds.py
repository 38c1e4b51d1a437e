"""Blind speeds: lanes with the notches of each PRF, or the response of a stagger."""

from bokeh.models import HBar, Line, Scatter, Segment

from pycore.columns import blind_speeds
from webapp.figures.lanes import lanes, thin_lanes
from webapp.figures.marks import upright
from webapp.figures.names import write
from webapp.figures.style import draw, plot, source

NAME = blind_speeds.NAME


def build(picture):
    """Return the figure.

    Parameters
    ----------
    picture : dict
        What the core gives. [shown units]

    Returns
    -------
    figure : bokeh figure
        Sources ``lanes``, ``notches``, ``unseen``; ``response``, ``threshold``, ``below``, ``speeds``, ``dip``,
        ``names``; ``kept-lanes``, ``kept-blind``, ``kept-unseen``, ``kept-response``, ``target``.
    """
    made = plot(NAME, picture)
    lanes(made, NAME, picture, 'notches')
    thin_lanes(made, NAME, picture)
    _response(made, picture)
    upright(made, NAME, picture)
    return made


def _response(made, picture):
    """Draw a stagger's response, its least value, the speeds it loses and those that are marked."""
    across = Segment(x0='x0', x1='x1', y0='y', y1='y', line_width=1, line_dash=[5, 4])
    draw(made, source(NAME, picture, 'threshold'), across, line_color='text')
    upright = Segment(x0='x', x1='x', y0='y0', y1='y1', line_width=1)
    draw(made, source(NAME, picture, 'speeds'), upright, line_color='text')
    kept = Line(x='x', y='y', line_width=1.5, line_dash=[7, 4])
    draw(made, source(NAME, picture, 'kept-response'), kept, line_color='strong-text')
    draw(made, source(NAME, picture, 'response'), Line(x='x', y='y', line_width=1.75), line_color='line')
    bar = HBar(y='y', left='left', right='right', height='height', line_alpha=0)
    bar.update(hatch_pattern='right_diagonal_line', hatch_scale=7, hatch_weight=1)
    draw(made, source(NAME, picture, 'below'), bar, fill_color='ink', hatch_color='hatch')
    dip = Scatter(x='x', y='y', size=9, line_width=1.75)
    draw(made, source(NAME, picture, 'dip'), dip, fill_color='paper', line_color='line')
    write(made, NAME, picture, 'names')
