"""The words of detection: how far the wanted probability reaches, and what the tones of the map stand for."""

import numpy as np

from pycore.wording import capitalised, percent, significant, trimmed

_LEAST = 0.0005
_SPEEDS = {'best': 'Best speed', 'median': 'Half of the speeds', 'worst': 'Worst speed'}


def words(computed, x, y, found, also=(), kept=None):
    """Return caption, short caption, summary and table of detection.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    x, y : Axis
        Of range and of radial speed. [m, m/s]
    found : float array, shape V × R
        Probability in every cell that is shown of the map. [unitless]
    also : sequence of str
        Sentences that end the caption: which part of the map is shown. [unitless]
    kept : Computed or None
        What the kept plan gives. [SI]

    Returns
    -------
    words : dict
        caption, short, summary, table.
    """
    first = _reached(computed, x)
    against = _against(kept, x)
    rest = [_curves(computed), _key(computed), *against, *also]
    return {
        'caption': ' '.join([first, *rest]),
        'short': first,
        'summary': ' '.join([_shares(computed, x, y, found, bool(also)), first, *against, *also]),
        'table': _table(computed, x, kept),
    }


def _against(kept, x):
    """Say what the long dashes are, and how far the kept plan reaches at half of its speeds."""
    if kept is None:
        return []
    reached = kept.echoes.reached_km()['median']
    lead = 'Long dashes: the kept plan at its median speed'
    if reached is None:
        return [f'{lead}, which does not reach probability {_wanted(kept)}.']
    return [f'{lead}, with probability {_wanted(kept)} to {x.text(reached * 1e3)}.']


def _wanted(computed):
    return trimmed(computed.plan.target.pd_wanted)


def _reached(computed, x):
    """Say to which ranges the wanted probability holds."""
    reached = {
        name: None if value is None else x.text(value * 1e3) for name, value in computed.echoes.reached_km().items()
    }
    lead = f'Detected with probability {_wanted(computed)}'
    best, median, worst = (reached[name] for name in ('best', 'median', 'worst'))
    if best is None:
        return f'The target is detected with probability {_wanted(computed)} at no wanted speed.'
    if best == worst:
        return f'{lead} to {best} at every speed.'
    if median is None:
        return f'{lead} to {best} at the best speed, and at less than half of the speeds at all.'
    if worst is None:
        return f'{lead} to {median} at half of the speeds, to {best} at the best and not at the worst.'
    return f'{lead} to {median} at half of the speeds, to {best} at the best and {worst} at the worst.'


def _curves(computed):
    lead = 'The curves' if computed.echoes.reached_km()['best'] is None else 'Ranges and curves'
    return f'{lead} (median heavy, worst dashed) are by noise alone.'


def _key(computed):
    """Say what the map counts besides the noise, and its tones."""
    cleared = "the canceller's response" if computed.is_stagger else 'notch'
    what = f'eclipsing, {cleared} and clutter' if computed.echoes.patches else f'eclipsing and {cleared}'
    return f'In the map {what} count too; plain and the tone next to it are at least {_wanted(computed)}.'


def marked(mark):
    """Say how probable it is to detect the followed target.

    Parameters
    ----------
    mark : Mark or None
        The target. [m, m/s]

    Returns
    -------
    sentence : str
        Empty where none is followed.
    """
    if mark is None:
        return ''
    chance = mark.followed.probability
    if _LEAST <= chance <= 1.0 - _LEAST:
        return f'The target, ringed, has {significant(chance)}.'
    return f'The target, ringed, has {f"below {_LEAST}" if chance < _LEAST else f"above {1.0 - _LEAST}"}.'


def _shares(computed, x, y, found, cut):
    """Say how much of the map reaches what is wanted, for someone who does not see it."""
    enough = float(np.mean(found >= computed.plan.target.pd_wanted))
    part = f'About {percent(enough)}' if 0.0 < enough < 1.0 else 'All' if enough else 'No part'
    return capitalised(
        f'map of the probability of detection over range, {x.span()}, and radial speed, {y.span()}, with curves along '
        f'the range under it. {part} of {"what is shown" if cut else "it"} has at least the wanted probability.'
    )


def _table(computed, x, kept):
    """Return the ranges of the best, the median and the worst speed, and those of the kept plan beside them."""
    plans = [computed] if kept is None else [computed, kept]
    reached = [one.echoes.reached_km() for one in plans]
    rows = [[text, *(_range(x, one[name]) for one in reached)] for name, text in _SPEEDS.items()]
    wanted = [f'Range at probability {_wanted(one)} ({x.unit})' for one in plans]
    if kept is not None:
        wanted[1] = f'Kept plan: {wanted[1][:1].lower()}{wanted[1][1:]}'
    return {'head': ['Speed', *wanted], 'rows': rows}


def _range(x, reached_km):
    return 'not reached' if reached_km is None else significant(x.shown(reached_km * 1e3))
