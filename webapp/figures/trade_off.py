"""What found plans give up for what: points, a line through those that no other beats, the plan as it is."""

from bokeh.models import Line, Scatter

from pycore.columns import trade_off
from webapp.figures.marks import ring_of
from webapp.figures.names import write
from webapp.figures.style import draw, plot, source

NAME = trade_off.NAME


def build(picture):
    """Return the figure.

    Parameters
    ----------
    picture : dict
        What the core gives. [shown units]

    Returns
    -------
    figure : bokeh figure
        Sources ``front``, ``others``, ``best``, ``own``, ``own-name``, ``chosen``.
    """
    made = plot(NAME, picture)
    draw(made, source(NAME, picture, 'front'), Line(x='x', y='y', line_width=1.5), line_color='line')
    draw(made, source(NAME, picture, 'others'), Scatter(x='x', y='y', size=8), fill_color='bar', line_color='paper')
    draw(made, source(NAME, picture, 'best'), Scatter(x='x', y='y', size=10), fill_color='ink', line_color='paper')
    own = Scatter(x='x', y='y', size=9, marker='square', line_width=1.75)
    draw(made, source(NAME, picture, 'own'), own, fill_color='paper', line_color='ink')
    write(made, NAME, picture, 'own-name', role='strong-text', ground=0.6)
    ring_of(made, source(NAME, picture, 'chosen'))
    return made
