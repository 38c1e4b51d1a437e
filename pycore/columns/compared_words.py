"""The words of the map of blind zones against a kept plan: what is lost, what is gained, and over which coverage."""

from pycore.columns.kept import difference, same_coverage
from pycore.wording import percent


def compared_words(computed, kept, x, y, also=()):
    """Return caption, short caption, summary and table of what is lost and gained.

    Parameters
    ----------
    computed, kept : Computed
        What the present plan gives, and what the kept one does. [SI]
    x, y : Axis
        Of range and of radial speed, over the whole coverage. [m, m/s]
    also : sequence of str
        Sentences that end the caption. [unitless]

    Returns
    -------
    words : dict
        caption, short, summary, table.
    """
    shares = difference(computed, kept)
    first = _first(shares, _coverage(computed, kept, x, y))
    key = 'Cross-hatched: lost, seen by the kept plan only; dotted: gained; tinted: seen by neither.'
    aside = [*_aside(computed, kept), *also]
    return {
        'caption': ' '.join([first, key, *aside]),
        'short': first,
        'summary': ' '.join([f'Map of what differs from the kept plan over range and radial speed. {first}', *aside]),
        'table': _table(shares),
    }


def _coverage(computed, kept, x, y):
    """Name the coverage where the two plans have not the same."""
    if same_coverage(computed, kept):
        return 'the coverage'
    return f"this plan's coverage, {x.span()} and {y.span()}"


def _first(shares, whole):
    if shares.lost == shares.gained == 0.0:
        return f'Against the kept plan nothing is lost and nothing gained: both see the same of {whole}.'
    return f'Against the kept plan: lost {percent(shares.lost)}, gained {percent(shares.gained)} of {whole}.'


def _aside(computed, kept):
    """Say that clutter is not counted, where either plan has any."""
    cluttered = any(not one.is_stagger and one.echoes.patches for one in (computed, kept))
    return ['Clutter is left aside.'] if cluttered else []


def _table(shares):
    """Return how the coverage is shared out between the two plans."""
    rows = [
        ['Seen by both', percent(shares.both)],
        ['Lost: seen by the kept plan only', percent(shares.lost)],
        ['Gained: seen by this plan only', percent(shares.gained)],
        ['Seen by neither', percent(shares.neither)],
    ]
    return {'head': ['Against the kept plan', 'Share of the coverage'], 'rows': rows}
