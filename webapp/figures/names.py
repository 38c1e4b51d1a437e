"""Text inside a figure, readable on whatever lies under it."""

from bokeh.core.properties import value
from bokeh.models import Text

from webapp.figures.style import NORMAL, SANS, draw, source


def write(made, name, picture, label, role='text', style='normal', ground=0.8):
    """Draw the names of one source.

    Parameters
    ----------
    made : bokeh figure
        The figure. [unitless]
    name : str
        Its name. [unitless]
    picture : dict
        Its columns. [shown units]
    label : str
        The source, with x, y, text, anchor, dx, dy. [unitless]
    role : str
        Role of the text's colour. [unitless]
    style : str
        Of the face. [unitless]
    ground : float
        How much the paper under the text covers. [unitless]

    Returns
    -------
    renderer : GlyphRenderer
        The text.
    """
    glyph = Text(
        x='x',
        y='y',
        text='text',
        anchor='anchor',
        x_offset='dx',
        y_offset='dy',
        text_font=value(SANS),
        text_font_size=NORMAL,
        text_font_style=style,
        background_fill_alpha=ground,
        padding=(1, 3),
        border_radius=2,
    )
    return draw(made, source(name, picture, label), glyph, text_color=role, background_fill_color='paper')
