"""Decoding: a lane of candidates for each PRF, the lane of coincidence on top, the decode spans at the foot."""

from bokeh.models import HBar

from pycore.columns import decoding
from webapp.figures.lanes import HEIGHT, lanes
from webapp.figures.marks import upright
from webapp.figures.names import write
from webapp.figures.style import draw, plot, source

NAME = decoding.NAME


def build(picture):
    """Return the figure.

    Parameters
    ----------
    picture : dict
        What the core gives. [shown units]

    Returns
    -------
    figure : bokeh figure
        Sources ``lanes``, ``candidates``, ``agree``, ``ruled-out``, ``unseen``, ``spans``, ``span-names``, ``target``.
    """
    made = plot(NAME, picture)
    ends = {'y': 'y', 'left': 'left', 'right': 'right', 'height': HEIGHT, 'line_width': 1.25}
    draw(made, source(NAME, picture, 'spans'), HBar(**{**ends, 'line_alpha': 0}), fill_color='asked')
    upright(made, NAME, picture)
    lanes(made, NAME, picture, 'candidates')
    draw(made, source(NAME, picture, 'ruled-out'), HBar(**ends), fill_color='lane', line_color='bar')
    draw(
        made, source(NAME, picture, 'agree'), HBar(**{**ends, 'line_width': 2.5}), fill_color='line', line_color='line'
    )
    write(made, NAME, picture, 'span-names', role='strong-text', ground=0.0)
    return made
