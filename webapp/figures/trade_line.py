"""Trade line: bands as strips, carriers as lines, PRFs as marks on them, what is asked for as a corner."""

from bokeh.models import Patches, Quad, Scatter, Segment

from pycore.columns import trade_line
from webapp.figures.marks import ring
from webapp.figures.names import write
from webapp.figures.style import draw, plot, source

NAME = trade_line.NAME

_ENDS = {end: end for end in ('x0', 'y0', 'x1', 'y1')}


def build(picture):
    """Return the figure.

    Parameters
    ----------
    picture : dict
        What the core gives. [shown units]

    Returns
    -------
    figure : bokeh figure
        Sources ``edges``, ``band``, ``band-names``, ``lines``, ``carrier-names``, ``asked``,
        ``regimes``, ``regime-names``, ``prfs``, ``prf-names``,
        ``kept-lines``, ``kept``, ``target``.
    """
    made = plot(NAME, picture, 'log', 'log')
    draw(made, source(NAME, picture, 'band'), Patches(xs='xs', ys='ys', line_alpha=0), fill_color='band')
    asked = Quad(left='left', bottom='bottom', right='right', top='top', line_alpha=0)
    draw(made, source(NAME, picture, 'asked'), asked, fill_color='asked')
    draw(made, source(NAME, picture, 'edges'), Segment(**_ENDS, line_width=1), line_color='hair')
    parted = Segment(**_ENDS, line_width=1, line_dash=[2, 4])
    draw(made, source(NAME, picture, 'regimes'), parted, line_color='text')
    draw(made, source(NAME, picture, 'lines'), Segment(**_ENDS, line_width=2.25), line_color='line')
    other = Segment(**_ENDS, line_width=1.5, line_dash=[6, 4])
    draw(made, source(NAME, picture, 'kept-lines'), other, line_color='line')
    write(made, NAME, picture, 'band-names', ground=0.0)
    write(made, NAME, picture, 'carrier-names', role='line', ground=0.0)
    write(made, NAME, picture, 'regime-names', style='italic', ground=0.0)
    write(made, NAME, picture, 'prf-names', role='strong-text', ground=0.6)
    hollow = Scatter(x='x', y='y', size=13, line_width=1.75)
    draw(made, source(NAME, picture, 'kept'), hollow, fill_color='paper', line_color='ink')
    mark = Scatter(x='x', y='y', size=10, line_width=1.5)
    draw(made, source(NAME, picture, 'prfs'), mark, fill_color='ink', line_color='paper')
    ring(made, NAME, picture)
    return made
