"""What is at one point of a figure, in one line: for the map of blind zones, why it is blind.

Cheap enough to follow a pointer: nothing is asked for but the spans around the point.
"""

import math

from pycore import ambiguity, eclipsing
from pycore.columns.axes import interval_name, range_axis, speed_axis
from pycore.columns.looks import all_of
from pycore.columns.prf_names import prf_names
from pycore.columns.pri_axis import pri_axis
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.follow import why
from pycore.wording import THIN_SPACE, capitalised, count_word, listed, percent, trimmed, with_unit

FIGURES = 4
"""Figures that a point's place is given with: a pixel is less than three. [unitless]"""

_FEW = 3
"""PRFs up to which each is said on its own. [unitless]"""
_NAMED = 2
"""PRFs of one kind that are named; more are counted. [unitless]"""


def here_words(computed, figure, x, y, units):
    """Return what is at one point of a figure.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    figure : str
        Name of the figure. [unitless]
    x, y : float or None
        The point; ``None`` on an axis that does not hold there. [units on the axes]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    text : str
        Such as ``'84.2 km, 183 m/s: 1 of 2. 980 µs clear; 860 µs in the notch (−3.7 m/s).'``; empty where nothing is.
    """
    say = _SAID.get(figure)
    axes = range_axis(computed.plan.range_m, units), speed_axis(computed.plan.speed_m_s, units)
    return say(_Point(computed, units, *axes), x, y) if say else ''


class _Point:
    """A plan, the reader's units and both axes, as the sentences need them."""

    def __init__(self, computed, units, x, y):
        self.computed, self.x, self.y = computed, x, y
        self.units = units
        self.names = prf_names(computed.plan, units)

    def offset(self, prf, speed_m_s):
        """Return how far a speed lies from the nearest blind one, in words."""
        folded = float(ambiguity.fold_speed(speed_m_s, float(self.computed.blind_speed_m_s[prf])))
        return self.y.text(folded)


def _place(axis, shown):
    return f'{trimmed(shown, FIGURES)}{THIN_SPACE}{axis.unit}'


def _both(point, x, y):
    """Say at one range and speed which PRFs see a target, and what keeps it from the others."""
    if x is None or y is None:
        return ''
    computed, place = point.computed, f'{_place(point.x, x)}, {_place(point.y, y)}'
    range_m, speed_m_s = max(x * point.x.si, 0.0), y * point.y.si
    if computed.is_stagger:
        return f'{place}: {_stagger(point, range_m, speed_m_s)}.'
    found = why(computed, range_m, speed_m_s)
    states = [
        _state(one.reasons, point.offset(one.prf, speed_m_s) if one.reasons == ('notch',) else None) for one in found
    ]
    return f'{place}: {_each(point, states)}.'


def _state(reasons, offset):
    """Return a PRF's state and what only it can say of it."""
    if not reasons:
        return 'clear', None
    return listed(_REASONS[reason] for reason in reasons), offset


_REASONS = {'eclipsed': 'eclipsed', 'notch': 'in the notch', 'clutter': 'under clutter'}


def _each(point, states):
    """Say on how many it is clear; then each of a few PRFs, of many the blind ones by their kinds."""
    n, clear = len(states), sum(state == 'clear' for state, _ in states)
    if n == 1:
        return _with(*states[0])
    if clear == n:
        return f'clear on {all_of(n)}'
    if n <= _FEW and len({state for state, _ in states}) == 1:
        more = [with_it for _, with_it in states if with_it]
        return _with(f'{states[0][0]} on {all_of(n)}', listed(more) if more else None)
    return f'{clear} of {n}. {_few(point, states) if n <= _FEW else _many(point, states)}'


def _few(point, states):
    return '; '.join(f'{name} {_with(*state)}' for name, state in zip(point.names, states, strict=True))


def _many(point, states):
    kinds = {}
    for name, state in zip(point.names, states, strict=True):
        if state[0] != 'clear':
            kinds.setdefault(state[0], []).append((name, state[1]))
    return capitalised('; '.join(_kind(kind, members) for kind, members in kinds.items()))


def _kind(kind, members):
    if len(members) <= _NAMED:
        return f'{kind}: {listed(f"{name} ({more})" if more else name for name, more in members)}'
    return f'{kind}: {count_word(len(members))}'


def _with(state, more):
    return f'{state} ({more})' if more else state


def _stagger(point, range_m, speed_m_s):
    """Say how a stagger answers at one range and speed."""
    eclipsed = [
        name
        for name, one in zip(point.names, why(point.computed, range_m, speed_m_s), strict=True)
        if 'eclipsed' in one.reasons
    ]
    beyond = range_m >= float(point.computed.unambiguous_range_m.min())
    heard = 'beyond the shortest interval' if beyond else _lost(eclipsed) if eclipsed else 'received in every interval'
    return f'{heard}; {_response(point, speed_m_s)}'


def _lost(names):
    many = f'{count_word(len(names))} intervals'
    return f'eclipsed in {listed(names) if len(names) <= _FEW else many}'


def _response(point, speed_m_s):
    computed = point.computed
    level = 10.0 * math.log10(float(computed.response.response.power(speed_m_s)) + 1e-30)
    side = 'above' if level >= computed.plan.response_min_db else 'below'
    return f'response {with_unit(max(level, -150.0), "dB")}, {side} the least'


def _range(point, x, _):
    """Say at one range on which PRFs a target is eclipsed, and what is received of it."""
    if x is None:
        return ''
    plan, range_m = point.computed.plan, max(x * point.x.si, 0.0)
    states = []
    for pri, pulse in zip(plan.pri_s.tolist(), plan.pulse_s.tolist(), strict=True):
        share = float(eclipsing.received_share(range_m, pri, pulse, plan.recovery_s, plan.guard_s, plan.near))
        clear = share > 0.0 and share >= plan.received_min
        states.append(('clear' if clear else 'eclipsed', f'{percent(share)} received' if 0.0 < share < 1.0 else None))
    return f'{_place(point.x, x)}: {_each(point, states)}.'


def _speed(point, x, _):
    """Say at one speed in which notches a target is."""
    if x is None:
        return ''
    computed, speed_m_s = point.computed, x * point.y.si
    place = _place(point.y, x)
    if computed.is_stagger:
        return f'{place}: {_response(point, speed_m_s)}.'
    states = []
    for prf, half in enumerate(computed.plan.notch_m_s.tolist()):
        folded = float(ambiguity.fold_speed(speed_m_s, float(computed.blind_speed_m_s[prf])))
        inside = abs(folded) < half
        states.append(('in the notch', point.y.text(folded)) if inside else ('clear', None))
    return f'{place}: {_each(point, states)}.'


def _traded(point, x, y):
    """Say which PRI has this unambiguous range, and how far the point is from the trade line."""
    if x is None or y is None or x <= 0.0:
        return ''
    pri_s = 2.0 * x * point.x.si / SPEED_OF_LIGHT_M_S
    speeds = sorted(
        {float(ambiguity.first_blind_speed(pri_s, one)) for one in point.computed.plan.wavelength_m.tolist()}
    )
    reached = listed(point.y.text(speed) for speed in speeds[:_FEW])
    name = interval_name(float(f'{pri_s:.4g}'), point.units)
    return (
        f'{_place(point.x, x)}, {_place(point.y, y)}. A PRI of {name} reaches so far; it is first blind at {reached}.'
    )


def _folded(point, x, _):
    """Say where a target at one range appears on each PRF."""
    if x is None:
        return ''
    range_m = max(x * point.x.si, 0.0)
    folded = [float(ambiguity.fold_range(range_m, float(reach))) for reach in point.computed.unambiguous_range_m]
    if min(folded) == max(folded) == range_m:
        return f'{_place(point.x, x)}: not folded, on any PRF.'
    if len(folded) > _FEW:
        where = point.x.interval(min(folded), max(folded))
        return f'{_place(point.x, x)}: appears at {where} on the {count_word(len(folded))} PRFs.'
    each = (f'{point.x.text(at)} on {name}' for at, name in zip(folded, point.names, strict=True))
    return f'{_place(point.x, x)}: appears at {listed(each)}.'


def _detected(point, x, y):
    """Say at one range and speed what the map of detection counts there."""
    if x is None:
        return ''
    return _both(point, x, y) if y is not None else f'{_place(point.x, x)}.'


def _sent(point, x, _):
    """Say which PRI or PRF it is."""
    axis = pri_axis(point.units, (0.0, 0.0))
    return '' if x is None or x <= 0.0 else f'{axis.name(float(axis.plain(x)))}.'


_SAID = {
    'blind-zones': _both,
    'detection': _detected,
    'eclipsed-ranges': _range,
    'blind-speeds': _speed,
    'trade-line': _traded,
    'decoding': _folded,
    'every-pri': _sent,
}
