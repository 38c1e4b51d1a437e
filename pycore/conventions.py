"""The conventions that every number here follows, each with a check that a pocket calculator can make.

A check names its inputs and the result as the calculator gives it; ``compute``
is what the core makes of the same inputs, and a test holds the two together.
"""

from collections.abc import Callable
from dataclasses import dataclass
from fractions import Fraction

import numpy as np

from pycore import ambiguity, decoding, eclipsing, filters, floor, improvement, response, stagger, unseen, windows
from pycore.clutter import Clutter, clutter_to_noise, pulse_factor
from pycore.decoding.blur import default_blur, gate_counts
from pycore.detection import false_alarm_per_cpi
from pycore.dwell import time_on_target, time_used
from pycore.eclipsing_losses import eclipsing_loss
from pycore.plan.reading import read
from pycore.swerling import at_least
from pycore.target import one_pulse_signal, reference_strength
from pycore.visibility import visible_share


@dataclass(frozen=True, slots=True)
class Convention:
    """One convention and its check.

    Parameters
    ----------
    name : str
        What it is about. [unitless]
    text : str
        What is meant, in a sentence. [unitless]
    inputs : str
        What to put into a pocket calculator. [unitless]
    result : float
        What it shows. [unit]
    unit : str
        Unit of the result. [unitless]
    digits : int
        Significant figures to which the result is written. [unitless]
    compute : callable
        The same from the core. [unit]
    """

    name: str
    text: str
    inputs: str
    result: float
    unit: str
    digits: int
    compute: Callable

    @property
    def row(self):
        """The convention as a plain dictionary, ready for JSON."""
        return {'name': self.name, 'text': self.text, 'check': self.inputs, 'result': self.result, 'unit': self.unit}


def _spans(*ends):
    """Return clear spans of PRFs, one each."""
    start, stop = np.array(ends, dtype=float).T
    return stagger.Spans(np.arange(len(ends)), start, stop)


def _seen_by_one_of_two():
    """Two PRFs clear from 0 to 5 and from 4 to 10 of 10 km, at all speeds: one of them sees all."""
    return visible_share(_spans((0, 5), (4, 10)), _spans((0, 1), (0, 1)), 2, 1, (0.0, 10.0), (0.0, 1.0))


def _seen_by_both():
    return visible_share(_spans((0, 5), (4, 10)), _spans((0, 1), (0, 1)), 2, 2, (0.0, 10.0), (0.0, 1.0))


def _decodes(pris):
    gates = gate_counts(10**7, [10**6] * len(pris))
    widths = [default_blur(pris, gates) * gate for gate in gates]
    return decoding.range_span(pris, 10**7, 1, widths, 110_000).blurred / 1e3


_RAIN = Clutter('rain', 25.0, 20_000.0, (15_000.0, 45_000.0), -10.0, 2.0, 2.0)
_TEN_CM_M = 0.1

CONVENTIONS = (
    Convention(
        'Speed of light',
        'Exactly 299 792 458 m/s; no refraction.',
        '299 792.458 × 1e-3/2, from km/s, for an interval of 1 ms',
        149.896229,
        'km',
        9,
        lambda: ambiguity.unambiguous_range(1e-3) / 1e3,
    ),
    Convention(
        'PRI and PRF',
        'The PRI runs from pulse start to pulse start, and the PRF is its inverse.',
        '1/980e-6',
        1020.4082,
        'Hz',
        8,
        lambda: 1.0 / float(read({'waveform': {'pri_us': [980]}}).pri_s[0]),
    ),
    Convention(
        'Radial speed',
        'Positive when closing; Doppler is then positive, 2v/λ. A speed appears between minus and plus half of the '
        'first blind speed.',
        '60 − 54.6, closing at 60 m/s with a first blind speed of 54.6 m/s',
        5.4,
        'm/s',
        6,
        lambda: ambiguity.fold_speed(60.0, 54.6),
    ),
    Convention(
        'First blind speed',
        'λ/(2T), the whole unambiguous span of radial speed, as surveillance practice quotes it.',
        '299 792 458/2.8e9/(2 × 980e-6)',
        54.626906,
        'm/s',
        8,
        lambda: ambiguity.first_blind_speed(980e-6, ambiguity.wavelength(2.8e9)),
    ),
    Convention(
        'Nyquist speed',
        '± λ/(4T), half the first blind speed, as weather practice quotes it.',
        '299 792 458/2.8e9/(4 × 980e-6)',
        27.313453,
        'm/s',
        8,
        lambda: ambiguity.nyquist_speed(980e-6, ambiguity.wavelength(2.8e9)),
    ),
    Convention(
        'Notch',
        'Its half-width: blind where |v − k v_b| is below the notch; at equality clear.',
        '(2 × 6)/60, the part of a blind speed of 60 m/s that a notch of 6 m/s takes',
        0.2,
        '',
        6,
        lambda: 1.0 - _length(stagger.notch_clear_speeds(np.array([60.0]), np.array([6.0]), (0.0, 60.0))) / 60.0,
    ),
    Convention(
        'Received share',
        'The part of an echo, by time, that falls into the open receiver; clear where it is at least the least '
        'received share.',
        '(240/149.896229 + 1 − (1 + 1))/1, from 240 m with a pulse of 1 µs and a recovery of 1 µs',
        0.60110766,
        '',
        8,
        lambda: float(eclipsing.received_share(240.0, 980e-6, 1e-6, 1e-6, 0.0)),
    ),
    Convention(
        'First opening',
        'The nearest range that is received enough of: c (recovery + q τ)/2.',
        '149.896229 × (1 + 0.5 × 1), microseconds to metres',
        224.84434,
        'm',
        8,
        lambda: float(eclipsing.first_opening(1e-6, 0.5, 1e-6)),
    ),
    Convention(
        'Eclipsing loss',
        'Whole: 20 log10(1/ε), the filter spans the whole pulse. Part: 10 log10(1/ε), only what is received is '
        'integrated.',
        '20 × log(2), whole, at half received',
        6.0205999,
        'dB',
        8,
        lambda: float(eclipsing_loss(0.5, 'whole')),
    ),
    Convention(
        'M of N',
        'A target is seen where at least M of the N PRFs are clear at its range and speed.',
        '10/10, two PRFs clear from 0 to 5 and from 4 to 10 of 10 km, M = 1',
        1.0,
        '',
        6,
        _seen_by_one_of_two,
    ),
    Convention(
        'M of N, both',
        'The same two PRFs, where both must be clear.',
        '(5 − 4)/10',
        0.1,
        '',
        6,
        _seen_by_both,
    ),
    Convention(
        'Floor',
        'What no plan can see with this pulse and notch: nearer than the first opening, slower than the notch.',
        '1 − (110 − 2)/(110 − 2) × (300 − 6)/300, first opening nearer than 2 km',
        0.02,
        '',
        6,
        lambda: float(floor.floor_share([225.0], [6.0], 1, (2e3, 110e3), (0.0, 300.0))),
    ),
    Convention(
        'Hole',
        'A blind region outside the floor, connected across edges, not across corners; its share is of the whole '
        'coverage.',
        '(60.626906 − 56.249265)/300, a band through all ranges',
        0.014592137,
        '',
        8,
        lambda: _band(56.249265, 60.626906),
    ),
    Convention(
        'Time out of sight',
        'Of a straight crossing track in the notch around zero: 2 n d/(V √(V² − n²)).',
        '2 × 8 × 20 000/(80 × √(80² − 8²))',
        50.251890762960605,
        's',
        8,
        lambda: unseen.crossing(80.0, 20_000.0, [8.0], 1, (2e3, 110e3)),
    ),
    Convention(
        'Decode span',
        'A separation of two hypotheses about one target, with blur; where PRIs are whole gates the blur is half a '
        'gate.',
        '149.896229 × (860 − 0.5)/1000, one PRF of 980 and 860 µs sees the target, gates of 1 µs',
        128.83581,
        'km',
        8,
        lambda: _decodes([9800, 8600]),
    ),
    Convention(
        'Decode span in speed',
        'Likewise a separation: twice what a figure of ± so many metres per second says.',
        '54.626906 − 0.5 × 54.626906/9, nine pulses',
        51.592078,
        'm/s',
        8,
        lambda: decoding.speed_span([9800], 10**7, [2.8e9], [9], Fraction(1, 2), 1, 300).blurred,
    ),
    Convention(
        'Stagger response',
        '0 dB is the mean over all speeds: the power is divided by the sum of the squared weights.',
        '10 × log(4²/6), two delays at half the blind speed',
        4.2596873,
        'dB',
        8,
        lambda: float(_two_delays().decibels(_two_delays().repeats_m_s / 2.0)),
    ),
    Convention(
        'True first blind speed',
        'λ/(2g), g the greatest common divisor of the PRIs in clock counts.',
        '0.1/(2 × 20e-6), PRIs of 980 and 860 µs share 20 µs, λ = 10 cm',
        2500.0,
        'm/s',
        6,
        lambda: _TEN_CM_M / (2.0 * response.repeat_counts([9800, 8600]) * 1e-7),
    ),
    Convention(
        'Improvement factor',
        'Signal over clutter after the canceller against before, averaged over target speeds: Σw²/(wᵀ ρ w).',
        '1/(1 − exp(−8 × π² × 0.3² × 0.001²/0.1²)), one delay, σ = 0.3 m/s, T = 1 ms, λ = 10 cm',
        1407.7387,
        '',
        7,
        lambda: improvement.improvement_factor([10_000], 1e7, (1, -1), 0.1, 0.3),
    ),
    Convention(
        'Windows',
        'Symmetric: the first and the last weight are the same. Hamming of three: 0.08, 1, 0.08.',
        '(1 + 2 × 0.08)²/(1 + 2 × 0.08²), the gain at a filter’s centre',
        1.328594,
        '',
        7,
        lambda: filters.processing_gain(windows.window('hamming', 3)),
    ),
    Convention(
        'Filter width',
        'λ/(2nT), the spacing of the filters; not their half-power width.',
        '54.626906/9',
        6.0696562,
        'm/s',
        8,
        lambda: float(_filter_width()),
    ),
    Convention(
        'Signal-to-noise',
        'Of one pulse, at the output of a filter matched to it, on the beam’s axis, not eclipsed; it goes by energy, '
        'never by bandwidth, and falls as R⁻⁴.',
        '10 − 40 × log(90/60), given as 10 dB at 60 km',
        2.9563496,
        'dB',
        8,
        lambda: 10.0 * float(np.log10(one_pulse_signal(reference_strength(10.0, 6e4, [1e-6], [0.1])[0], 9e4, 0.0))),
    ),
    Convention(
        'Clutter-to-noise',
        'Likewise of one pulse, where the clutter is; rain falls as R⁻², a surface as R⁻³.',
        '25 − 20 × log(40/20), given as 25 dB at 20 km',
        18.9794,
        'dB',
        7,
        lambda: 10.0 * float(np.log10(clutter_to_noise(_RAIN, 4e4, 0.0))),
    ),
    Convention(
        'Clutter and the pulse',
        'Clutter goes with the pulse’s length and with the length of the gate.',
        '(2/1) × (1/4), a pulse twice as long of four times the bandwidth',
        0.5,
        '',
        6,
        lambda: float(pulse_factor(_RAIN, 2e-6, 4e6, 1e-6, 1e6)),
    ),
    Convention(
        'False alarm',
        'For one cell of range and speed after M of N, all CPIs alike.',
        '1 − √(1 − 1e-6), one of two',
        5.000001e-7,
        '',
        7,
        lambda: false_alarm_per_cpi(1e-6, 2, 1),
    ),
    Convention(
        'Detection of a set',
        'M of N with unequal probabilities is the Poisson binomial.',
        '1 − (1 − 0.9) × (1 − 0.5), one of two',
        0.95,
        '',
        6,
        lambda: float(at_least(np.array([0.9, 0.5]), 1)),
    ),
    Convention(
        'Time on target',
        'Between the one-way 3 dB points of the beam: beamwidth over six times the turns a minute.',
        '1.4/(6 × 12)',
        0.019444444,
        's',
        8,
        lambda: time_on_target(1.4, 12.0),
    ),
    Convention(
        'Time used',
        'Counted and fill pulses of every CPI: Σ (n + fill) T.',
        '(9 + 1) × 980 + (9 + 1) × 860, in µs',
        18_400.0,
        'µs',
        6,
        lambda: 1e6 * time_used(np.array([980e-6, 860e-6]), np.array([9, 9]), np.array([1, 1])),
    ),
)
"""All conventions, in the order of the page."""


def _length(spans):
    return float((spans.stop - spans.start).sum())


def _band(low, high):
    """Return the blind share beyond the floor of one band of speeds."""
    speeds = stagger.Spans(np.zeros(2, dtype=int), np.array([6.0, high]), np.array([low, 300.0]))
    seen = visible_share(_spans((0, 1)), speeds, 1, 1, (0.0, 1.0), (0.0, 300.0))
    return 1.0 - 0.02 - seen


def _two_delays():
    return response.staggered_response([10_000], 1e7, response.binomial_weights(2), 0.1)


def _filter_width():
    return ambiguity.first_blind_speed(980e-6, ambiguity.wavelength(2.8e9)) / 9


def conventions():
    """Return the table of conventions.

    Returns
    -------
    rows : list of dict
        ``name``, ``text``, ``check``, ``result``, ``unit``.
    """
    return [one.row for one in CONVENTIONS]
