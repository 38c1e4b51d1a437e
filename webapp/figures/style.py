"""How every figure looks: quiet axes, the note's faces, colours by role, names that the page finds things by.

A model that has colours carries them for every scheme in its tags,
``{"paint": {property: [light, dark]}}``: the page repaints from there and needs no
palette of its own.
"""

import numpy as np
from bokeh.models import BasicTicker, ColumnDataSource, FixedTicker, Range1d, Title
from bokeh.plotting import figure

from webapp.figures.palette import PALETTE, SCHEMES

SANS = 'ui-sans-serif, system-ui, "Segoe UI", "Helvetica Neue", Arial, sans-serif'
SMALL, NORMAL = '11px', '12px'


def plot(name, picture, x_type='linear', y_type='linear'):
    """Return an empty figure with its axes.

    Parameters
    ----------
    name : str
        Name of the figure. [unitless]
    picture : dict
        What the core says of it: ranges, labels, ticks. [shown units]
    x_type, y_type : str
        ``'linear'`` or ``'log'``. [unitless]

    Returns
    -------
    plot : bokeh figure
        Without tools, as large as its place.
    """
    ranges = {axis: Range1d(*picture['ranges'][axis], name=f'{name}/{axis}') for axis in 'xy'}
    made = figure(
        name=name,
        x_range=ranges['x'],
        y_range=ranges['y'],
        x_axis_type=x_type,
        y_axis_type=y_type,
        sizing_mode='stretch_both',
        min_width=200,
        min_height=160,
        tools='',
        toolbar_location=None,
        output_backend='canvas',
        background_fill_alpha=0,
        border_fill_alpha=0,
        outline_line_alpha=0,
        min_border=0,
        min_border_right=10,
        min_border_top=2,
    )
    made.grid.visible = False
    _axis(made.xaxis[0], name, 'x', picture)
    _axis(made.yaxis[0], name, 'y', picture)
    _heading(made, name, picture)
    return made


def _axis(axis, name, side, picture):
    """Make an axis quiet: hair line, ticks outwards, no minor ticks."""
    axis.name = f'{name}/{side}-axis'
    ticks = picture['ticks'].get(side)
    axis.ticker = FixedTicker(ticks=ticks['at']) if ticks else BasicTicker(desired_num_ticks=6)
    axis.major_label_overrides = dict(zip(ticks['at'], ticks['text'], strict=True)) if ticks else {}
    axis.minor_tick_line_color = None
    axis.major_tick_in = 0
    axis.major_tick_out = 4
    axis.major_label_standoff = 4
    axis.axis_label_standoff = 4
    axis.major_label_text_font = axis.axis_label_text_font = SANS
    axis.major_label_text_font_size = axis.axis_label_text_font_size = NORMAL
    axis.axis_label_text_font_style = 'normal'
    axis.axis_label = picture['labels'][side] if side == 'x' else None
    paint(
        axis,
        axis_line_color='axis',
        major_tick_line_color='axis',
        major_label_text_color='text',
        axis_label_text_color='text',
    )


def _heading(made, name, picture):
    """Set what the y axis measures above it, where it reads without turning one's head and costs no width."""
    title = Title(
        text=picture['labels']['y'],
        name=f'{name}/y-label',
        align='left',
        text_font=SANS,
        text_font_size=NORMAL,
        text_font_style='normal',
        standoff=6,
    )
    made.add_layout(paint(title, text_color='text'), 'above')


def source(name, picture, label):
    """Return the named source of one part of a figure.

    Parameters
    ----------
    name : str
        Name of the figure. [unitless]
    picture : dict
        Its columns by source. [shown units]
    label : str
        Name of the source within it. [unitless]

    Returns
    -------
    source : ColumnDataSource
        Called ``<figure>/<source>``.
    """
    columns = picture['columns'][label]
    # An image glyph wants a column of images; the core gives the one it has.
    data = {
        key: [column] if np.ndim(column) == 2 and not isinstance(column, list) else column
        for key, column in columns.items()
    }
    return ColumnDataSource(data=data, name=f'{name}/{label}')


def draw(made, data, glyph, level=None, **roles):
    """Add a glyph, coloured by role.

    Parameters
    ----------
    made : bokeh figure
        The figure. [unitless]
    data : ColumnDataSource
        What it draws. [shown units]
    glyph : bokeh glyph
        How. [unitless]
    level : str or None
        Level that it is drawn on; the glyphs' own when None. [unitless]
    roles : str
        Role of each of its colours, by property. [unitless]

    Returns
    -------
    renderer : GlyphRenderer
        Its one look, whatever is selected.
    """
    renderer = made.add_glyph(
        data, paint(glyph, **roles), selection_glyph=None, nonselection_glyph=None, muted_glyph=None
    )
    if level:
        renderer.level = level
    return renderer


def paint(model, **roles):
    """Colour a model for the light scheme and write both schemes' colours into its tags.

    Parameters
    ----------
    model : bokeh model
        What is coloured. [unitless]
    roles : str or sequence of str
        Role, or list of roles for a palette, by property. [unitless]

    Returns
    -------
    model : bokeh model
        The same.
    """
    both = {key: [colours(role, scheme) for scheme in SCHEMES] for key, role in roles.items()}
    for key, (light, _) in both.items():
        setattr(model, key, light)
    model.tags = [{'paint': both}]
    return model


def colours(role, scheme):
    """Return the colour of a role, or the colours of several.

    Parameters
    ----------
    role : str or sequence of str
        Name in the palette. [unitless]
    scheme : str
        ``'light'`` or ``'dark'``. [unitless]

    Returns
    -------
    colour : str or list of str
        As ``#rrggbb``.
    """
    at = SCHEMES.index(scheme)
    return PALETTE[role][at] if isinstance(role, str) else [PALETTE[one][at] for one in role]
