"""Dwell: one lane of CPIs along the time, what counts pale, fill pulses dark, beyond the time on target hatched."""

from bokeh.models import Quad, Scatter, Segment

from pycore.columns import dwell
from webapp.figures.names import write
from webapp.figures.style import draw, plot, source

NAME = dwell.NAME

_LOW, _HIGH = dwell.LANE
_KEPT_LOW, _KEPT_HIGH = dwell.KEPT_LANE


def build(picture):
    """Return the figure.

    Parameters
    ----------
    picture : dict
        What the core gives. [shown units]

    Returns
    -------
    figure : bokeh figure
        Sources ``time``, ``fill``, ``counted``, ``over``, ``again``, ``pulses``, ``names``, ``end``, ``end-name``,
        ``kept-fill``, ``kept-counted``, ``target``.
    """
    made = plot(NAME, picture)
    made.yaxis[0].visible = False
    made.min_border_left = 16
    bar = {'left': 'left', 'right': 'right', 'bottom': _LOW, 'top': _HIGH}
    draw(made, source(NAME, picture, 'time'), Quad(**bar, line_width=1), fill_color='lane', line_color='axis')
    draw(made, source(NAME, picture, 'again'), Quad(**bar, fill_alpha=0, line_width=1), line_color='axis')
    edged = {'line_width': 1, 'line_join': 'miter'}
    draw(made, source(NAME, picture, 'counted'), Quad(**bar, **edged), fill_color='pale', line_color='paper')
    draw(made, source(NAME, picture, 'fill'), Quad(**bar, **edged), fill_color='bar', line_color='paper')
    thin = {**bar, **edged, 'bottom': _KEPT_LOW, 'top': _KEPT_HIGH}
    draw(made, source(NAME, picture, 'kept-counted'), Quad(**thin), fill_color='pale', line_color='paper')
    draw(made, source(NAME, picture, 'kept-fill'), Quad(**thin), fill_color='bar', line_color='paper')
    beyond = Quad(**{**bar, 'top': _LOW, 'bottom': _LOW - 0.06}, line_alpha=0)
    beyond.update(hatch_pattern='right_diagonal_line', hatch_scale=7, hatch_weight=1)
    draw(made, source(NAME, picture, 'over'), beyond, fill_color='ink', hatch_color='hatch')
    upright = Segment(x0='x', x1='x', y0='y0', y1='y1', line_width=1)
    draw(made, source(NAME, picture, 'pulses'), upright, line_color='bar')
    end = Segment(x0='x', x1='x', y0='y0', y1='y1', line_width=1.5)
    draw(made, source(NAME, picture, 'end'), end, line_color='strong-text')
    write(made, NAME, picture, 'end-name', role='strong-text', ground=0.0)
    write(made, NAME, picture, 'names', role='strong-text', ground=0.0)
    mark = Scatter(x='x', y='y', size=11, line_width=2.25)
    draw(made, source(NAME, picture, 'target'), mark, line_color='line', fill_color='paper')
    return made
