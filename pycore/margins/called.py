"""What an input is called in a sentence about its margin, and whether it grows or rises."""

from pycore.plan.keys import BY_PATH
from pycore.sentence import key_of, value_at
from pycore.shown import shown_unit

_CALLED = {
    'radar.pulse_us': 'the pulse',
    'radar.recovery_us': 'the recovery',
    'radar.guard_us': 'the guard',
    'radar.carrier_ghz': 'the carrier',
    'radar.bandwidth_mhz': 'the bandwidth',
    'radar.beamwidth_deg': 'the beamwidth',
    'radar.scan_rpm': 'the antenna’s turning rate',
    'radar.dwell_ms': 'the given dwell',
    'radar.duty_limit_pct': 'the duty allowed',
    'radar.near_pulse.pulse_us': 'the near pulse',
    'radar.near_pulse.sent_at_us': 'the start of the near pulse',
    'radar.near_pulse.to_km': 'the range that the near pulse serves',
    'waveform.received_min': 'the least received share',
    'waveform.detect_m': 'the number of PRFs that must see a target',
    'waveform.pulses': 'the number of pulses',
    'waveform.fill_pulses': 'the number of fill pulses',
    'waveform.decode_blur_gates': 'the blur of the decoder',
    'doppler.notch_mps': 'the notch',
    'doppler.response_min_db': 'the least response',
    'doppler.sidelobe_db': 'the sidelobe level',
    'coverage.range_km': 'the {end} of the range',
    'coverage.speed_mps': 'the {end} of the speeds',
    'must_see[].range_km': 'the {end} of the range of “{region}”',
    'must_see[].speed_mps': 'the {end} of the speeds of “{region}”',
    'must_see[].visible_pct': 'the part asked for of “{region}”',
    'wanted.visible_pct': 'the share asked for',
    'wanted.hole_km': 'the hole length allowed',
    'wanted.hole_mps': 'the hole width allowed',
    'wanted.unseen_s': 'the time out of sight allowed',
    'wanted.blind_speed_mps': 'the first blind speed asked for',
    'wanted.detect_km': 'the detection range asked for',
    'wanted.range_walk_gates': 'the range walk allowed',
    'crossing.speed_mps': 'the speed of the crossing track',
    'crossing.at_km': 'the distance of the crossing track',
    'target.snr_db': 'the signal-to-noise',
    'target.at_km': 'the range that the signal-to-noise is given at',
    'target.at_pulse_us': 'the pulse that the signal-to-noise is given for',
    'target.pd_wanted': 'the probability of detection asked for',
    'target.false_alarm': 'the false alarm probability',
    'target.radar_equation.peak_kw': 'the peak power',
    'target.radar_equation.gain_dbi': 'the antenna gain',
    'target.radar_equation.rcs_m2': 'the radar cross-section',
    'target.radar_equation.noise_figure_db': 'the noise figure',
    'target.radar_equation.losses_db': 'the sum of the losses',
    'weather.wanted_mps': 'the extended Nyquist speed asked for',
    'weather.width_mps': 'the spectrum width',
    'weather.snr_db': 'the signal-to-noise of weather',
    'weather.error_mps': 'the velocity error allowed',
}
_ENDS = {'range': ('near end', 'far end'), 'speed': ('lower end', 'upper end')}
_GROWS = ('time', 'pri', 'dwell', 'seconds')
_ASKED = ('radar.duty_limit_pct', 'target.pd_wanted', 'target.false_alarm', 'weather.wanted_mps', 'weather.error_mps')


def called(document, path, units):
    """Return what one number of a plan is called in a sentence.

    Parameters
    ----------
    document : dict
        A filled plan. [plan's units]
    path : str
        Its path, places in lists included. [unitless]
    units : mapping
        The reader's preferences. [unitless]

    Returns
    -------
    name : str
        Such as ``'the pulse'``, ``'PRF 2'``, ``'the far end of the range'``.
    """
    key, last = key_of(path), path.rpartition('.')[2]
    if key.path == 'waveform.pri_us':
        word = 'PRF' if shown_unit(key, units).endswith('Hz') else 'PRI'
        return f'{word} {int(last) + 1}' if len(document['waveform']['pri_us']) > 1 else f'the {word}'
    place = int(last) if last.isdigit() else None
    end = _ENDS[key.family][place] if key.kind == 'interval' else ''
    name = _CALLED[key.path].format(end=end, region=_region(document, path))
    return name if place is None or key.kind == 'interval' else f'{name} on PRF {place + 1}'


def _region(document, path):
    if not path.startswith('must_see.'):
        return ''
    place = path.split('.')[1]
    return value_at(document, f'must_see.{place}.name') or f'region {int(place) + 1}'


def ways(path, units):
    """Return the words for going down and up.

    Parameters
    ----------
    path : str
        Path of an input. [unitless]
    units : mapping
        The reader's preferences. [unitless]

    Returns
    -------
    words : pair of str
        Of its value in the plan's unit; a PRI shown as a frequency rises where it shrinks.
    """
    key = key_of(path)
    if key.family == 'pri' and shown_unit(key, units).endswith('Hz'):
        return 'rise', 'fall'
    return ('shrink', 'grow') if key.family in _GROWS else ('fall', 'rise')


def is_asked(path):
    """Return whether an input is what a finding is judged by, not what the radar does.

    Parameters
    ----------
    path : str
        Path of an input. [unitless]

    Returns
    -------
    asked : bool
        Such margins come after the others: to want less cures everything.
    """
    return path.startswith('wanted.') or path.endswith('.visible_pct') or path in _ASKED


def unnamed(paths):
    """Return which keys have no name for a sentence.

    Parameters
    ----------
    paths : sequence of str
        Keys of the table. [unitless]

    Returns
    -------
    paths : list of str
        Those that are missing here, or are no keys of the table.
    """
    return [path for path in paths if path not in _CALLED and path != 'waveform.pri_us' or path not in BY_PATH]
