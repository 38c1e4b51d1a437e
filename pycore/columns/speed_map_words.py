"""What the map of blind speeds shows, in words: where nothing is lost, what this plan loses, what is drawn."""

import numpy as np

from pycore.columns.looks import looks
from pycore.stagger import wanted_magnitudes
from pycore.wording import THIN_SPACE, between, capitalised, count_word, percent, significant, trimmed

_ROWS, _STEPS = 65, 12
_TABLE_ROWS = 13


def words(computed, moved, axis, moving, up, has_lines, has_kept):
    """Return caption, short form, summary and table of a map.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    moved : Moved
        The plan to be moved. [SI]
    axis : Axis
        Of radial speed. [m/s]
    moving : Up
        What goes up the axis. [shown unit]
    up : str
        Its name in a view. [unitless]
    has_lines : bool
        Whether true blind speeds are drawn. [unitless]
    has_kept : bool
        Whether a plan is kept to compare with. [unitless]

    Returns
    -------
    words : dict
        ``caption``, ``short``, ``summary``, ``table``.
    """
    said = _Said(computed)
    first = capitalised(f'{_where(computed)}{_clear_sentence(moved, moving, said)}')
    caption = [first, _own_sentence(moved, moving), said.ground]
    caption += [said.lines] if has_lines else []
    caption += [_HOW['carriers' if up == 'carrier' and np.ptp(computed.plan.carrier_hz) else up]] + (
        ['The kept plan is not drawn on the map.'] if has_kept else []
    )
    caption = ' '.join(sentence for sentence in caption if sentence)
    return {
        'caption': caption,
        'short': first,
        'summary': (
            f'Map: radial speed across, {axis.span()}; {moving.noun} upwards, {_interval(moving, *moving.limits)}. '
            f'{caption} Where nothing is lost was looked for at {_ROWS} values up the axis.'
        ),
        'table': _table(moved, moving),
    }


_HOW = {
    'pri': 'All intervals are scaled together; pulse and notch stay.',
    'carrier': 'Only the carrier is moved; the notch stays.',
    'carriers': 'The carriers are scaled together; the notch stays.',
    'stagger': 'The intervals are spread about the same mean; at 1 they are equal.',
}


class _Said:
    """What is said of speeds by the kind of plan: of those that are lost, of those that are not, of what is drawn."""

    def __init__(self, computed):
        plan = computed.plan
        if computed.is_stagger:
            least = f'{trimmed(plan.response_min_db)}{THIN_SPACE}dB'
            self.lost, self.clear = f'falls below {least}', f'stands at or above {least}'
            self.ground = f'Dark is below {least}, each step 10{THIN_SPACE}dB.'
            self.lines = 'The lines are the true blind speeds.'
            return
        said = looks(plan.n, plan.m, 'blind')
        self.lost, self.clear, self.ground = f'is {said.too_few}', f'is {said.enough}', ''
        self.lines = 'The lines are its blind speeds.' if plan.n == 1 else 'On the lines every PRF has a blind speed.'


def _where(computed):
    """Return what leaves the notch around zero out, where it reaches among the wanted speeds."""
    plan = computed.plan
    notch = computed.response.notch_m_s if computed.is_stagger else float(np.sort(plan.notch_m_s)[plan.m - 1])
    return 'outside the notch around zero, ' if notch > wanted_magnitudes(plan.speed_m_s)[0] else ''


def _clear_sentence(moved, moving, said):
    """Say where up the axis no wanted speed is lost: everywhere, in one stretch, two, many, or nowhere."""
    at = np.linspace(*moving.limits, _ROWS)
    lost = moved.lost(moving.moved(at))
    found = _stretches(moved, moving, at, lost == 0.0)
    if np.isnan(lost).all():
        return f'no wanted speed is left, whatever the {moving.noun}.'
    if not len(found):
        least = int(np.nanargmin(lost))
        return (
            f'some speed {said.lost} whatever the {moving.noun}, {_interval(moving, *moving.limits)}; '
            f'the fewest are lost at {moving.text(at[least])}, {percent(float(lost[least]))}.'
        )
    if (lost == 0.0).all():
        return f'every speed {said.clear} whatever the {moving.noun}, {_interval(moving, *moving.limits)}.'
    if len(found) <= 2:
        where = ' or '.join(_interval(moving, *ends) for ends in found)
        return f'every speed {said.clear} only at a {moving.noun} of {where}.'
    width = found[:, 1] - found[:, 0]
    return (
        f'every speed {said.clear} only in {count_word(len(found))} stretches of the {moving.noun}, '
        f'{moving.text(width.sum())} in all; the widest is {_interval(moving, *found[width.argmax()])}.'
    )


def _stretches(moved, moving, at, clear):
    """Return the ends of the stretches of the axis in which nothing is lost, by halving between two rows."""
    steps = np.diff(np.concatenate(([0], clear.astype(np.int8), [0])))
    first, last = np.flatnonzero(steps > 0), np.flatnonzero(steps < 0) - 1
    inside = np.concatenate((at[first], at[last]))
    outside = np.concatenate((at[np.maximum(first - 1, 0)], at[np.minimum(last + 1, at.size - 1)]))
    for _ in range(_STEPS if inside.size else 0):
        middle = 0.5 * (inside + outside)
        holds = moved.lost(moving.moved(middle)) == 0.0
        inside, outside = np.where(holds, middle, inside), np.where(holds, outside, middle)
    # At an end of the axis the stretch goes on as far as the axis does.
    return inside.reshape(2, -1).T


def _own_sentence(moved, moving):
    lost = float(moved.lost(moving.moved(np.array([moving.own])))[0])
    if np.isnan(lost):
        return ''
    return f'This plan, at {moving.own_text}, loses {percent(lost) if lost else "none"}.'


def _interval(moving, low, high):
    if not moving.unit:
        return between(low, high, '').rstrip(THIN_SPACE)
    return between(low, high, moving.unit)


def _table(moved, moving):
    """Return what is lost at some values up the axis, the plan's own among them."""
    at = np.unique(np.append(np.linspace(*moving.limits, _TABLE_ROWS), moving.own))
    lost = moved.lost(moving.moved(at))
    rows = [
        [
            moving.own_text.removesuffix(moving.unit).rstrip(THIN_SPACE)
            if value == moving.own
            else significant(value, 4),
            'all' if np.isnan(share) else percent(share) if share else 'none',
            'this plan' if value == moving.own else '',
        ]
        for value, share in zip(at.tolist(), lost.tolist(), strict=True)
    ]
    return {'head': [capitalised(moving.label), 'Lost outside the notch around zero', ''], 'rows': rows}
