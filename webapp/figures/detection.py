"""Detection: a map in five quiet steps, and under it the curves along the range."""

from bokeh.models import Image, Line, LinearColorMapper, Quad, Segment

from pycore.columns import detection
from webapp.figures.marks import ring
from webapp.figures.names import write
from webapp.figures.palette import STEP_ROLES
from webapp.figures.style import draw, paint, plot, source

NAME = detection.NAME


def build(picture):
    """Return the figure.

    Parameters
    ----------
    picture : dict
        What the core gives. [shown units]

    Returns
    -------
    figure : bokeh figure
        Sources ``map``, ``frame``, ``wanted``, ``best``, ``median``, ``worst``, ``kept``, ``names``,
        ``heading``, ``target``.
    """
    made = plot(NAME, picture)
    made.yaxis[0].axis_line_alpha = 0
    mapper = LinearColorMapper(low=0, high=len(detection.STEPS))
    paint(mapper, palette=[STEP_ROLES[name] for name in detection.STEPS])
    image = Image(image='image', x='x', y='y', dw='dw', dh='dh', color_mapper=mapper)
    draw(made, source(NAME, picture, 'map'), image, level='image')
    box = {side: side for side in ('left', 'right', 'bottom', 'top')}
    draw(made, source(NAME, picture, 'frame'), Quad(**box, fill_alpha=0, line_width=1), line_color='hair')
    _curves(made, picture)
    ring(made, NAME, picture)
    return made


def _curves(made, picture):
    """Draw the wanted probability and the three curves, told apart by weight and dashes."""
    across = Segment(x0='x0', x1='x1', y0='y', y1='y', line_width=1, line_dash=[5, 4])
    draw(made, source(NAME, picture, 'wanted'), across, line_color='text')
    kept = Line(x='x', y='y', line_width=1.75, line_dash=[14, 5])
    draw(made, source(NAME, picture, 'kept'), kept, line_color='strong-text')
    for name, width, dashes in (('best', 1.25, []), ('worst', 1.5, [6, 3]), ('median', 2.5, [])):
        line = Line(x='x', y='y', line_width=width, line_dash=dashes)
        draw(made, source(NAME, picture, name), line, line_color='line')
    write(made, NAME, picture, 'names', ground=0.7)
    write(made, NAME, picture, 'heading', ground=0.0)
