"""The followed target in a figure: a ring, or a line, that shows on dark and on pale."""

from bokeh.models import Scatter, Segment

from webapp.figures.style import draw, source


def ring(made, name, picture):
    """Draw the target as a ring.

    Parameters
    ----------
    made : bokeh figure
        The figure. [unitless]
    name : str
        Its name. [unitless]
    picture : dict
        Its columns, ``target`` among them with x, y. [shown units]
    """
    ring_of(made, source(name, picture, 'target'))


def ring_of(made, place):
    """Draw a ring around points.

    Parameters
    ----------
    made : bokeh figure
        The figure. [unitless]
    place : ColumnDataSource
        x, y. [shown units]
    """
    draw(made, place, Scatter(x='x', y='y', size=17, fill_alpha=0, line_width=6, line_alpha=0.95), line_color='paper')
    draw(made, place, Scatter(x='x', y='y', size=17, fill_alpha=0, line_width=2.5), line_color='line')


def upright(made, name, picture):
    """Draw the target as a line across.

    Parameters
    ----------
    made : bokeh figure
        The figure. [unitless]
    name : str
        Its name. [unitless]
    picture : dict
        Its columns, ``target`` among them with x, y0, y1. [shown units]
    """
    target = source(name, picture, 'target')
    ends = {'x0': 'x', 'x1': 'x', 'y0': 'y0', 'y1': 'y1'}
    draw(made, target, Segment(**ends, line_width=5, line_alpha=0.9), line_color='paper')
    draw(made, target, Segment(**ends, line_width=2), line_color='line')
