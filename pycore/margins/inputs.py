"""Which inputs can matter to a finding: the table that margins walk, and no more.

An input that is not listed under a finding does not enter its formula. Choices
and flags are not walked; neither is the timing clock, of which PRIs are whole
counts, nor a canceller's own weights, which mean nothing one by one.
"""

from dataclasses import dataclass

from pycore.sentence import key_of, value_at

_NEAR = ('radar.near_pulse.pulse_us', 'radar.near_pulse.sent_at_us', 'radar.near_pulse.to_km')
_PRIS = ('waveform.pri_us',)
_RECEIVER = (
    *('radar.pulse_us', 'radar.recovery_us', 'radar.guard_us', 'waveform.received_min'),
    *_NEAR,
)
_NOTCH = ('radar.carrier_ghz', 'doppler.notch_mps', 'doppler.response_min_db')
_COVERAGE = ('coverage.range_km', 'coverage.speed_mps')
_M = ('waveform.detect_m',)
_TIME = ('waveform.pulses', 'waveform.fill_pulses', 'radar.beamwidth_deg', 'radar.scan_rpm', 'radar.dwell_ms')
_SEEN = (*_PRIS, *_RECEIVER, *_NOTCH, *_COVERAGE, *_M)
_TARGET = (
    *('target.snr_db', 'target.at_km', 'target.at_pulse_us', 'target.pd_wanted', 'target.false_alarm'),
    *(f'target.radar_equation.{name}' for name in ('peak_kw', 'gain_dbi', 'rcs_m2', 'noise_figure_db', 'losses_db')),
)

MATTERS = {
    'visible': (*_SEEN, 'wanted.visible_pct'),
    'must-see': (
        *_PRIS,
        *_RECEIVER,
        *_NOTCH,
        *_M,
        'must_see[].range_km',
        'must_see[].speed_mps',
        'must_see[].visible_pct',
    ),
    'largest-hole': (*_SEEN, 'wanted.hole_km', 'wanted.hole_mps'),
    'unseen-inbound': (*_SEEN, 'wanted.unseen_s'),
    'unseen-crossing': (
        *_PRIS,
        *_NOTCH,
        *_M,
        *('coverage.range_km', 'crossing.speed_mps', 'crossing.at_km', 'wanted.unseen_s'),
    ),
    'blind-speed': (*_PRIS, *_NOTCH, 'coverage.speed_mps', *_M, 'wanted.blind_speed_mps'),
    'decode-range': (
        *_PRIS,
        *('radar.bandwidth_mhz', 'waveform.decode_blur_gates', 'coverage.range_km'),
        *_M,
        *('waveform.pulses', 'waveform.fill_pulses', 'coverage.speed_mps'),
    ),
    'decode-speed': (
        *_PRIS,
        *('radar.carrier_ghz', 'waveform.pulses', 'waveform.decode_blur_gates', 'radar.bandwidth_mhz'),
        *('coverage.speed_mps', *_M),
    ),
    'dwell': (*_PRIS, *_TIME),
    'duty': (*_PRIS, 'radar.pulse_us', 'radar.near_pulse.pulse_us', 'radar.duty_limit_pct'),
    'detection': (
        *_PRIS,
        *('radar.carrier_ghz', 'radar.pulse_us', 'radar.recovery_us', 'waveform.received_min'),
        *('doppler.notch_mps', 'doppler.response_min_db', 'doppler.sidelobe_db', 'coverage.speed_mps'),
        *_M,
        *_TIME,
        *_TARGET,
        'wanted.detect_km',
    ),
    'range-walk': (
        *_PRIS,
        *('waveform.pulses', 'radar.bandwidth_mhz', 'coverage.speed_mps', 'wanted.range_walk_gates'),
    ),
    'nyquist': (*_PRIS, 'radar.carrier_ghz'),
    'extended-nyquist': (*_PRIS, 'radar.carrier_ghz', 'weather.wanted_mps'),
    'unfolding': (*_PRIS, 'radar.carrier_ghz', 'waveform.pulses', 'weather.width_mps', 'weather.snr_db'),
    'velocity-error': (
        *_PRIS,
        *('radar.carrier_ghz', 'waveform.pulses', 'weather.width_mps', 'weather.snr_db', 'weather.error_mps'),
    ),
    'second-trip': (*_PRIS, 'coverage.range_km'),
}
"""For each finding, without the place of a must-see region, the keys that can matter to it."""

_ONLY_FOR_DWELLS = ('doppler.notch_mps', 'waveform.detect_m')
_ONLY_FOR_STAGGER = ('doppler.response_min_db',)
_ONLY_WITH_MOTION = ('waveform.pulses', 'waveform.fill_pulses', 'coverage.speed_mps')


@dataclass(frozen=True, slots=True)
class Input:
    """One number of a plan that can be moved.

    Parameters
    ----------
    path : str
        Its path, places in lists included. [unitless]
    label : str
        What it is called. [unitless]
    unit : str
        Unit of the plan. [unitless]
    value : int or float
        Where it stands. [unit]
    lowest, highest : float
        Legal limits. [unit]
    quantum : float or None
        What it moves in: one clock count for a PRI, 1 for a count; ``None`` where it moves freely. [unit]
    is_count : bool
        Whether it is a whole number. [unitless]
    """

    path: str
    label: str
    unit: str
    value: float
    lowest: float
    highest: float
    quantum: float | None
    is_count: bool


def inputs_of(document, name):
    """Return the inputs of a plan that can matter to a finding.

    Parameters
    ----------
    document : dict
        A filled plan. [plan's units]
    name : str
        Name of the finding. [unitless]

    Returns
    -------
    inputs : list of Input
        Numbers that the plan gives, lists one by one, in the order of the table.
    """
    base, _, place = name.partition('.')
    paths = (path.replace('[]', f'.{place}') for path in MATTERS[base] if _counts(document, base, path))
    return [_input(document, whole, part) for whole in paths for part in _places(value_at(document, whole), whole)]


def _counts(document, base, path):
    """Say whether a key can matter for this kind of plan."""
    stagger = document['waveform']['kind'] == 'stagger'
    if path in (_ONLY_FOR_DWELLS if stagger else _ONLY_FOR_STAGGER):
        return False
    if base == 'decode-range' and stagger:
        return path in ('waveform.pri_us', 'coverage.range_km')
    if base == 'decode-range' and path in _ONLY_WITH_MOTION:
        return document['waveform']['decode_motion']
    if path.startswith('target.') and document['target']['radar_equation'] is not None:
        return path not in ('target.snr_db', 'target.at_km', 'target.at_pulse_us')
    return True


def _places(value, path):
    """Return the paths of a key's numbers: itself, or one for each place of a list; none where it is not given."""
    if value is None:
        return []
    return [f'{path}.{place}' for place in range(len(value))] if isinstance(value, list) else [path]


def _input(document, whole, path):
    key, clock = key_of(path), document['radar']['clock_mhz']
    quantum = 1.0 / clock if key.path == 'waveform.pri_us' else 1 if key.kind == 'count' else None
    label = label_of(document, path)
    value = value_at(document, path)
    lowest, highest = key.lowest, key.highest
    if key.path == 'waveform.detect_m':
        highest = len(document['waveform']['pri_us'])
    return Input(path, label, key.unit, value, lowest, highest, quantum, key.kind == 'count')


def label_of(document, path):
    """Return what one number of a plan is called, where a key has several.

    Parameters
    ----------
    document : dict
        A filled plan. [plan's units]
    path : str
        Its path, places in lists included. [unitless]

    Returns
    -------
    label : str
        Such as ``'PRI 2'``, ``'Range, far end'``, ``'Region range, near end, “final approach”'``.
    """
    key, last = key_of(path), path.rpartition('.')[2]
    label = key.label
    if key.kind == 'interval' and last.isdigit():
        label += f', {"lower" if last == "0" else "upper"} end'
    elif last.isdigit():
        label += f' {int(last) + 1}'
    if path.startswith('must_see.'):
        place = path.split('.')[1]
        label += f', “{value_at(document, f"must_see.{place}.name") or f"region {int(place) + 1}"}”'
    return label
