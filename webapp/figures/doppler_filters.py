"""Doppler filters: lanes of levels along the apparent speed, clutter dotted, filters as curves, the target a line."""

from bokeh.models import Line, Patch, Quad, Scatter, Segment

from pycore.columns import doppler_filters
from webapp.figures.marks import upright
from webapp.figures.names import write
from webapp.figures.style import draw, plot, source

NAME = doppler_filters.NAME

_BOX = {side: side for side in ('left', 'right', 'bottom', 'top')}


def build(picture):
    """Return the figure.

    Parameters
    ----------
    picture : dict
        What the core gives. [shown units]

    Returns
    -------
    figure : bokeh figure
        Sources ``lanes``, ``notch``, ``noise``, ``ground``, ``rain``, ``clutter-edge``, ``lobes``, ``filter``,
        ``kept-filter``, ``rotor``, ``rotor-folded``, ``rotor-name``, ``names``, ``target``, ``level``.
    """
    made = plot(NAME, picture)
    made.yaxis[0].axis_line_alpha = 0
    draw(made, source(NAME, picture, 'lanes'), Quad(**_BOX, line_alpha=0), fill_color='band')
    _clutter(made, picture)
    across = Segment(x0='x0', x1='x1', y0='y', y1='y', line_width=1, line_dash=[5, 4])
    draw(made, source(NAME, picture, 'noise'), across, line_color='text')
    draw(made, source(NAME, picture, 'lobes'), Line(x='x', y='y', line_width=1), line_color='axis')
    _rotor(made, picture)
    upright(made, NAME, picture)
    kept = Line(x='x', y='y', line_width=1.5, line_dash=[7, 4])
    draw(made, source(NAME, picture, 'kept-filter'), kept, line_color='strong-text')
    draw(made, source(NAME, picture, 'filter'), Line(x='x', y='y', line_width=1.75), line_color='line')
    notch = Quad(**_BOX, line_alpha=0, hatch_pattern='right_diagonal_line', hatch_scale=7, hatch_weight=1)
    draw(made, source(NAME, picture, 'notch'), notch, fill_color='ink', hatch_color='hatch')
    level = Scatter(x='x', y='y', size=11, line_width=2.25)
    draw(made, source(NAME, picture, 'level'), level, fill_color='paper', line_color='line')
    write(made, NAME, picture, 'rotor-name', ground=0.6)
    write(made, NAME, picture, 'names', role='strong-text', ground=0.6)
    return made


def _rotor(made, picture):
    """Draw the target's own lines as quiet stripes: upright where they are, leaning where they have folded."""
    for label, pattern, ground in (('rotor', 'vertical_line', 1.0), ('rotor-folded', 'left_diagonal_line', 0.0)):
        strip = Quad(
            **_BOX, fill_alpha=ground, line_width=0.75, hatch_pattern=pattern, hatch_scale=6, hatch_weight=0.75
        )
        draw(made, source(NAME, picture, label), strip, fill_color='paper', hatch_color='line', line_color='axis')


def _clutter(made, picture):
    """Draw ground and rain dotted, the ground more densely, each up to its edge."""
    for kind, scale, weight in (('ground', 5, 1.6), ('rain', 8, 2.2)):
        area = Patch(x='x', y='y', line_alpha=0, fill_alpha=0)
        area.update(hatch_pattern='dot', hatch_scale=scale, hatch_weight=weight)
        draw(made, source(NAME, picture, kind), area, hatch_color='bar')
    edge = Line(x='x', y='y', line_width=1.25)
    draw(made, source(NAME, picture, 'clutter-edge'), edge, line_color='bar')
