"""Lanes of bars along one axis: clear is a pale lane, blind a bar on it, blind for the whole set ink with hatching."""

from bokeh.models import HBar

from webapp.figures.style import draw, source

HEIGHT = 0.62
"""Height of a bar. [lanes]"""

THIN = 0.13
"""Height of a bar of the kept plan. [lanes]"""


def lanes(made, name, picture, blind, height=HEIGHT):
    """Draw the lanes of a figure.

    Parameters
    ----------
    made : bokeh figure
        The figure. [unitless]
    name : str
        Its name. [unitless]
    picture : dict
        Its columns. [shown units]
    blind : str
        The source of the bars of single PRFs. [unitless]
    height : float or str
        Height of a bar, or the column that has it. [lanes]
    """
    ends = {'y': 'y', 'left': 'left', 'right': 'right', 'height': height, 'line_alpha': 0}
    draw(made, source(name, picture, 'lanes'), HBar(**ends), fill_color='lane')
    # A line around a bar keeps the narrowest ones in sight.
    bar = HBar(**{**ends, 'line_alpha': 1}, line_width=0.75)
    draw(made, source(name, picture, blind), bar, fill_color='bar', line_color='bar')
    hatched = HBar(
        **{**ends, 'line_alpha': 1}, line_width=0.75, hatch_pattern='right_diagonal_line', hatch_scale=7, hatch_weight=1
    )
    draw(made, source(name, picture, 'unseen'), hatched, fill_color='ink', line_color='ink', hatch_color='hatch')


def thin_lanes(made, name, picture):
    """Draw the thin lanes of the kept plan.

    Parameters
    ----------
    made : bokeh figure
        The figure. [unitless]
    name : str
        Its name. [unitless]
    picture : dict
        Its columns. [shown units]
    """
    ends = {'y': 'y', 'left': 'left', 'right': 'right', 'height': THIN, 'line_width': 0.75}
    ground = HBar(**ends, fill_alpha=0, line_alpha=0.8)
    draw(made, source(name, picture, 'kept-lanes'), ground, line_color='hair')
    draw(made, source(name, picture, 'kept-blind'), HBar(**ends), fill_color='bar', line_color='bar')
    draw(made, source(name, picture, 'kept-unseen'), HBar(**ends), fill_color='ink', line_color='ink')
