"""What a plan reaches: one sentence for each thing that a review asks, in a fixed order."""

from pycore.findings.blind import blind_speed
from pycore.findings.decode import decode_range, decode_speed
from pycore.findings.detection import detection
from pycore.findings.dwell import duty, dwell, range_walk
from pycore.findings.holes import largest_hole
from pycore.findings.seen import must_see, visible
from pycore.findings.unseen import unseen_crossing, unseen_inbound
from pycore.findings.verdict import verdict
from pycore.findings.weather import extended_nyquist, nyquist, second_trip, unfolding, velocity_error

__all__ = ['findings', 'named', 'verdict']

_OF_TARGETS = {
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
}
_OF_WEATHER = {
    'nyquist': nyquist,
    'extended-nyquist': extended_nyquist,
    'unfolding': unfolding,
    'velocity-error': velocity_error,
    'second-trip': second_trip,
    'dwell': dwell,
    'duty': duty,
}
"""What makes each finding, by its name, in the order of the note; must-see regions make a list of them."""


def findings(computed, units):
    """Return all findings of a plan, always all of them and always in the same order.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units, with keys ``range`` and ``speed``. [unitless]

    Returns
    -------
    findings : list of Finding
        Each with the engineer's remark on it, where there is one; at the plan's own carrier and rain speed
        (:mod:`pycore.holds_over` judges by the worst of an interval).
    """
    found = []
    for find in _finders(computed.plan).values():
        answer = find(computed, units)
        found.extend(answer if isinstance(answer, list) else [answer])
    return [finding.with_remark(computed.plan.remarks) for finding in found]


def named(computed, name, units):
    """Return one finding of a plan by its name; no other is worked out.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    name : str
        Such as ``'visible'`` or ``'must-see.0'``. [unitless]
    units : mapping
        Shown units, with keys ``range`` and ``speed``. [unitless]

    Returns
    -------
    finding : Finding or None
        ``None`` where the plan has no finding of that name.
    """
    base = name.partition('.')[0]
    find = _finders(computed.plan).get(base)
    answer = None if find is None else find(computed, units)
    answers = answer if isinstance(answer, list) else [answer]
    found = next((one for one in answers if one is not None and one.name == name), None)
    return None if found is None else found.with_remark(computed.plan.remarks)


def _finders(plan):
    return _OF_WEATHER if plan.purpose == 'weather' else _OF_TARGETS
