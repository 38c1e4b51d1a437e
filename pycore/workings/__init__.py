"""How each finding comes about: formulas as text, the numbers put in, results and sources.

Each module works one group out once more, step by step, from the numbers that
it shows; a test holds the results to the findings.
"""

from pycore.errors import InputError
from pycore.margins import asked_for
from pycore.plan.document import shown
from pycore.workings.blind import blind_speed
from pycore.workings.decode import decode_range, decode_speed
from pycore.workings.detection import detection
from pycore.workings.dwell import duty, dwell, range_walk
from pycore.workings.seen import largest_hole, must_see, visible
from pycore.workings.unseen import unseen_crossing, unseen_inbound
from pycore.workings.weather import extended_nyquist, nyquist, second_trip, unfolding, velocity_error
from pycore.worst_over import POINTS

__all__ = ['working', 'workings']

_WORKINGS = {
    'visible': visible,
    'must-see': must_see,
    'largest-hole': largest_hole,
    'unseen-inbound': unseen_inbound,
    'unseen-crossing': unseen_crossing,
    'blind-speed': blind_speed,
    'decode-range': decode_range,
    'decode-speed': decode_speed,
    'dwell': dwell,
    'duty': duty,
    'detection': detection,
    'range-walk': range_walk,
    'nyquist': nyquist,
    'extended-nyquist': extended_nyquist,
    'unfolding': unfolding,
    'velocity-error': velocity_error,
    'second-trip': second_trip,
}
_HELD = (
    f'Over the intervals that the plan must hold over, the worst of {POINTS} points and of finer ones around it is '
    'taken; what is worst between two points can be missed where it is narrower.'
)


def working(computed, name):
    """Return how one finding comes about.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    working : Working
        Lines, value, notes; at the plan's own carrier.
    """
    if not isinstance(name, str) or name.partition('.')[0] not in _WORKINGS:
        raise InputError('finding', f'The plan has no finding {shown(name)}.')
    return _WORKINGS[name.partition('.')[0]](computed, name)


def workings(computed, name):
    """Return the workings of one finding as a page shows them.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    workings : dict
        ``finding``, ``lines`` (each ``formula``, ``numbers``, ``result``, ``source``), ``value``, ``notes``.

    Raises
    ------
    InputError
        Where the plan has no such finding.
    """
    asked_for(computed, name)
    worked = working(computed, name)
    notes = [*worked.notes]
    if computed.plan.holds_over is not None:
        notes.append(_HELD)
    return {'finding': name, 'lines': [line.row for line in worked.lines], 'value': worked.value, 'notes': notes}
