"""Map of blind zones: the classes as an image, must-see regions outlined, holes numbered."""

from bokeh.core.properties import value
from bokeh.models import Image, LinearColorMapper, Quad, Text

from pycore.columns import blind_zones
from pycore.columns.classes import NAMES
from webapp.figures.marks import ring
from webapp.figures.names import write
from webapp.figures.palette import CLASS_ROLES
from webapp.figures.style import SANS, SMALL, draw, paint, plot, source

NAME = blind_zones.NAME


def build(picture):
    """Return the figure.

    Parameters
    ----------
    picture : dict
        What the core gives. [shown units]

    Returns
    -------
    figure : bokeh figure
        Sources ``map``, ``regions``, ``region-names``, ``holes``, ``target``.
    """
    made = paint(plot(NAME, picture), outline_line_color='hair')
    made.outline_line_alpha = 1
    mapper = paint(LinearColorMapper(low=0, high=len(NAMES)), palette=[CLASS_ROLES[name] for name in NAMES])
    image = Image(image='image', x='x', y='y', dw='dw', dh='dh', color_mapper=mapper)
    draw(made, source(NAME, picture, 'map'), image, level='image')
    _regions(made, picture)
    _holes(made, picture)
    ring(made, NAME, picture)
    return made


def _regions(made, picture):
    """Outline the must-see regions: a line that shows on dark and on pale, and a name."""
    regions = source(NAME, picture, 'regions')
    box = {side: side for side in ('left', 'right', 'bottom', 'top')}
    draw(
        made, regions, Quad(**box, fill_alpha=0, line_width=4.5, line_alpha=0.9, line_join='miter'), line_color='paper'
    )
    draw(made, regions, Quad(**box, fill_alpha=0, line_width=1.75, line_join='miter'), line_color='line')
    write(made, NAME, picture, 'region-names', role='line', ground=0.88)


def _holes(made, picture):
    """Set each hole's number on a small disc of paper."""
    number = Text(x='x', y='y', text='text', anchor='anchor', x_offset='dx', y_offset='dy')
    number.update(
        text_font=value(SANS), text_font_size=SMALL, text_font_style='bold', outline_shape='circle', padding=2
    )
    draw(
        made,
        source(NAME, picture, 'holes'),
        number,
        text_color='strong-text',
        background_fill_color='paper',
        border_line_color='ink',
    )
