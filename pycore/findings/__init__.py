"""What a plan reaches: one sentence for each thing that a review asks, in a fixed order."""

from pycore.findings.detection import detection
from pycore.findings.dwell import duty, dwell
from pycore.findings.seen import largest_hole, must_see, unseen_crossing, unseen_inbound, visible
from pycore.findings.speeds import blind_speed, decode_range, decode_speed, range_walk
from pycore.findings.verdict import verdict
from pycore.findings.weather import extended_nyquist, nyquist, second_trip, unfolding, velocity_error

__all__ = ['findings', 'verdict']

_OF_TARGETS = (
    visible,
    must_see,
    largest_hole,
    unseen_inbound,
    unseen_crossing,
    blind_speed,
    decode_range,
    decode_speed,
    dwell,
    duty,
    detection,
    range_walk,
)
_OF_WEATHER = (nyquist, extended_nyquist, unfolding, velocity_error, second_trip, dwell, duty)


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
        Each with the engineer's remark on it, where there is one.
    """
    found = []
    for find in _OF_WEATHER if computed.plan.purpose == 'weather' else _OF_TARGETS:
        answer = find(computed, units)
        found.extend(answer if isinstance(answer, list) else [answer])
    return [finding.with_remark(computed.plan.remarks) for finding in found]
