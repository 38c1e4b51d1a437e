"""The assessment of a plan as one plain dictionary: what ``assess --json`` prints.

Full precision, the plan's units in the key names, lists in the order of the
plan's PRIs, ``None`` for what has no value.
"""

import math

from pycore import dwell
from pycore.holds_over import as_rows, held
from pycore.wording import SHOWN_UNITS

FORMAT = 1
"""Number of the plan's and the assessment's format."""


def assessment(computed, with_margins=False):
    """Return all that a plan gives, as a plain dictionary.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    with_margins : bool
        Whether the margins of every judged finding are worked out too, which takes seconds; the key ``margins`` is
        there only then. [unitless]

    Returns
    -------
    assessment : dict
        Ready for JSON: dictionaries, lists, strings, floats, booleans and ``None``.
    """
    each = held(computed, SHOWN_UNITS)
    found = [one.finding for one in each]
    margins = {'margins': _margins(computed.plan, found)} if with_margins else {}
    return {
        'pulsewright': FORMAT,
        'plan': computed.plan.document,
        'shortfall': computed.shortfall,
        'prfs': prfs(computed),
        'visible': _visible(computed),
        'must_see': [
            {'name': region.name, 'share': region.share, 'holes': _holes(region.holes)} for region in computed.must_see
        ],
        'unseen': _unseen(computed),
        'blind_speed': _blind_speed(computed),
        'decode': _decode(computed),
        'dwell': _dwell(computed),
        'detection': _detection(computed),
        **margins,
        'holds_over': as_rows(computed, each),
        'findings': [as_dict(finding) for finding in found],
    }


def _margins(plan, found):
    """Return the margins; only who asks for them waits until they are imported."""
    from pycore.margins import all_margins

    return all_margins(plan, found)


def as_dict(finding):
    """Return one finding in the assessment's shape.

    Parameters
    ----------
    finding : Finding
        A finding. [unitless]

    Returns
    -------
    finding : dict
        With ``name``, ``met``, ``text``, ``value``, ``wanted``, ``unit``, ``remark``.
    """
    keys = ('name', 'met', 'text', 'value', 'wanted', 'unit', 'remark')
    return {key: getattr(finding, key) for key in keys}


def prfs(computed):
    """Return one dictionary for each PRI of the plan, in its order.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]

    Returns
    -------
    prfs : list of dict
        Ambiguities, duty, regime, shares lost, times, gates.
    """
    columns = _prf_columns(computed)
    return [dict(zip(columns, row, strict=True)) for row in zip(*columns.values(), strict=True)]


def _prf_columns(computed):
    plan = computed.plan
    return {
        'pri_us': (plan.pri_s * 1e6).tolist(),
        'pri_counts': [int(count) for count in plan.pri_counts],
        'prf_hz': (1.0 / plan.pri_s).tolist(),
        'unambiguous_range_km': (computed.unambiguous_range_m / 1e3).tolist(),
        'blind_speed_mps': computed.blind_speed_m_s.tolist(),
        'nyquist_mps': (computed.blind_speed_m_s / 2).tolist(),
        'duty_pct': (computed.duty * 100).tolist(),
        'regime': computed.regimes,
        'eclipsed_share': computed.eclipsed_shares.tolist(),
        'notched_share': computed.notched_shares.tolist(),
        'cpi_ms': (plan.pulses * plan.pri_s * 1e3).tolist(),
        'fill_ms': (plan.fill_pulses * plan.pri_s * 1e3).tolist(),
        'fill_needed': computed.echoes.fill_needed.tolist(),
        'filter_width_mps': dwell.filter_width(plan.pri_s, plan.pulses, plan.wavelength_m).tolist(),
        'notch_suggested_mps': _suggested(computed),
        'gates': dwell.gates(plan.pri_s, plan.pulse_s, plan.recovery_s, plan.guard_s, plan.bandwidth_hz).tolist(),
        'range_walk_gates': computed.range_walk_gates.tolist(),
        'improvement_db': computed.echoes.improvement_db,
    }


def _suggested(computed):
    suggested = computed.echoes.suggested_notch
    return [None] * computed.plan.n if suggested is None else suggested.notch_m_s.tolist()


def _visible(computed):
    return {
        'share': computed.share,
        'floor_share': computed.floor_share,
        'excess_over_floor': computed.excess_over_floor,
        'share_with_clutter': computed.echoes.share_with_clutter,
        'm': computed.m,
        'n': computed.looks,
        'share_by_count': computed.visible.by_count.tolist(),
        'share_if_one_lost': computed.visible.if_one_lost,
        'holes': _holes(computed.holes),
        'hole_count': computed.holes.count,
    }


def _holes(found):
    return [
        {'range_km': [end / 1e3 for end in hole.range_m], 'speed_mps': list(hole.speed_m_s), 'share': hole.share}
        for hole in found.listed
    ]


def _unseen(computed):
    inbound, crossing = computed.inbound, finite(computed.crossing_s)
    ends = [finite(end) for end in inbound.range_m]
    return {
        'inbound_s': finite(inbound.time_s),
        'at_mps': finite(inbound.at_m_s),
        'range_km': None if None in ends else [end / 1e3 for end in ends],
        'never': bool(inbound.never),
        'crossing_s': crossing,
        'crossing_scans': None if crossing is None else computed.in_scans(crossing),
    }


def finite(value):
    """Return a float as it is, ``None`` for what has no value or no end.

    Parameters
    ----------
    value : float or None
        Any number of an answer. [any]

    Returns
    -------
    value : float or None
        Ready for JSON.
    """
    return None if value is None or not math.isfinite(value) else float(value)


def _blind_speed(computed):
    if computed.is_stagger:
        response = computed.response
        return {
            'first_mps': [response.true_first_blind_m_s] * 2,
            'first_below_mps': response.first_below_m_s,
            'ratio_to_mean': response.ratio_to_mean,
            'deepest_db': response.deepest_db,
            'deepest_at_mps': response.deepest_at_m_s,
            'share_above': response.share_above,
        }
    first = computed.first_blind_m_s
    others = ('first_below_mps', 'ratio_to_mean', 'deepest_db', 'deepest_at_mps', 'share_above')
    return {'first_mps': None if first is None else list(first), **dict.fromkeys(others)}


def _decode(computed):
    ranges, speeds = computed.decode_range, computed.decode_speed
    return {
        'range_km': None if ranges.blurred is None else ranges.blurred / 1e3,
        'speed_mps': None if speeds is None else speeds.blurred,
        'exact_range_km': ranges.exact / 1e3,
        'exact_speed_mps': None if speeds is None else speeds.exact,
        'blur_gates': float(computed.decode_blur),
    }


def _dwell(computed):
    available = computed.plan.time_on_target_s
    return {'available_ms': None if available is None else available * 1e3, 'used_ms': computed.time_used_s * 1e3}


def _detection(computed):
    echoes = computed.echoes
    return {
        'false_alarm_per_cpi': echoes.false_alarm_per_cpi,
        'cells': echoes.cells,
        'false_per_scan': echoes.false_per_scan,
        'range_km_at_pd': echoes.reached_km(),
    }
