"""Blind speeds: lanes with the notches of each PRF, the response of a stagger, or a map over what is moved."""

from bokeh.models import HBar, Image, Line, LinearColorMapper, Scatter, Segment

from pycore.columns import blind_speeds
from pycore.columns.classes import NAMES
from pycore.columns.speed_map import STEPS
from webapp.figures.lanes import lanes, thin_lanes
from webapp.figures.marks import upright
from webapp.figures.names import write
from webapp.figures.palette import CLASS_ROLES, STEP_ROLES
from webapp.figures.style import draw, paint, plot, source

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
        ``names``; ``kept-lanes``, ``kept-blind``, ``kept-unseen``, ``kept-response``, ``map``,
        ``own``, ``true-blind``, ``target``.
    """
    made = plot(NAME, picture)
    _map(made, picture)
    lanes(made, NAME, picture, 'notches')
    thin_lanes(made, NAME, picture)
    _response(made, picture)
    upright(made, NAME, picture)
    return made


def _map(made, picture):
    """Draw the map, and on it lines that show on dark and on pale: true blind speeds, and the plan's own row."""
    roles = [CLASS_ROLES[name] for name in NAMES] + [STEP_ROLES[name] for name in STEPS]
    mapper = paint(LinearColorMapper(low=0, high=len(roles)), palette=roles)
    image = Image(image='image', x='x', y='y', dw='dw', dh='dh', color_mapper=mapper)
    draw(made, source(NAME, picture, 'map'), image, level='image')
    blind, own = (source(NAME, picture, name) for name in ('true-blind', 'own'))
    draw(made, blind, Line(x='x', y='y', line_width=4, line_alpha=0.85), line_color='paper')
    draw(made, blind, Line(x='x', y='y', line_width=1.5), line_color='line')
    ends = {'x0': 'x0', 'x1': 'x1', 'y0': 'y', 'y1': 'y'}
    draw(made, own, Segment(**ends, line_width=4, line_alpha=0.85), line_color='paper')
    draw(made, own, Segment(**ends, line_width=1.5, line_dash=[7, 4]), line_color='strong-text')


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
