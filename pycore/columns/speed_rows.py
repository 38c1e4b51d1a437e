"""What goes up the axis of the blind speeds: the plan as it is, or one thing about it that is moved, row by row.

Along the mean PRI all intervals are scaled together, along the carrier all carriers; along the stagger
ratio, the longest interval over the shortest, each interval keeps its part in the spread about the same mean.
Nothing is rounded to the timing clock; pulse, notch and all else stay as the plan has them.
"""

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from pycore.bands import BANDS
from pycore.columns.axes import round_ticks
from pycore.plan.keys import BY_PATH
from pycore.wording import THIN_SPACE, significant, trimmed

_LEAST_RATIO = 1.1
_HARDLY_LONGER = 1.0 + 1e-9
"""How much longer than its pulse an interval must be, at the least. [unitless]"""


@dataclass(frozen=True, slots=True)
class Up:
    """One thing about a plan that is moved, as an axis.

    Parameters
    ----------
    noun : str
        What it is called in a sentence. [unitless]
    label : str
        What stands above the axis. [unitless]
    unit : str
        Unit that is shown; empty for a ratio. [unitless]
    limits : tuple of two floats
        Ends of the axis. [shown unit]
    own : float
        Where the plan itself lies. [shown unit]
    moved : callable
        From values, an array of shape R, to what intervals are multiplied by, what their distances from the mean are,
        and what carriers are, each of shape R. [unitless]
    """

    noun: str
    label: str
    unit: str
    limits: tuple[float, float]
    own: float
    moved: Callable

    @property
    def ticks(self):
        """Round numbers along it, and the words beside them."""
        at, text = round_ticks(*self.limits)
        return {'at': [float(value) for value in at], 'text': text}

    def centres(self, count):
        """Return the centres of equal rows."""
        low, high = self.limits
        return low + (high - low) * ((np.arange(count) + 0.5) / count)

    def text(self, value, digits=significant):
        """Return a value with its unit."""
        return f'{digits(float(value))}{THIN_SPACE if self.unit else ""}{self.unit}'

    @property
    def own_text(self):
        """The plan's own value with its unit, as a person would type it."""
        return self.text(self.own, lambda value: trimmed(value, 4))


def offered(computed, units):
    """Return what can be chosen for a plan.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    pairs : list of pairs of str
        Each of ``speed_choices.UP`` that means something for the plan, with the words that offer it.
    """
    one = computed.plan.n == 1
    own = 'the response' if computed.is_stagger else 'the PRF' if one else 'each PRF'
    pairs = [('own', own), ('pri', _noun(computed.plan, units)), ('carrier', 'carrier')]
    return pairs + ([('stagger', 'stagger ratio')] if _is_spread(computed) else [])


def _is_spread(computed):
    return computed.is_stagger and len(set(computed.plan.pri_counts)) > 1


def _noun(plan, units):
    what = 'PRF' if units['pri'] in ('Hz', 'kHz') else 'PRI'
    return what if plan.n == 1 else f'mean {what}'


def shown_up(computed, asked):
    """Return what is shown where something was asked for that the plan may not have.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    asked : str
        One of ``speed_choices.UP``. [unitless]

    Returns
    -------
    up : str
        The same, or ``'own'``: only a stagger of unequal intervals has a stagger ratio.
    """
    return 'own' if asked == 'stagger' and not _is_spread(computed) else asked


def up_axis(computed, units, up):
    """Return what is moved up the axis.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    up : str
        One of ``speed_choices.UP`` but ``'own'``, as :func:`shown_up` gives it. [unitless]

    Returns
    -------
    axis : Up
        Half to twice the plan's own mean PRI, the IEEE band of its carrier, or no stagger to twice its own.
    """
    return {'pri': _mean_pri, 'carrier': _carrier, 'stagger': _ratio}[up](computed.plan, units)


def _mean_pri(plan, units):
    legal = BY_PATH['waveform.pri_us']
    shortest, longest = plan.pri_s.min() * 1e6, plan.pri_s.max() * 1e6
    low = max(0.5, legal.lowest / shortest, float((plan.pulse_s / plan.pri_s).max()) * _HARDLY_LONGER)
    high = min(2.0, legal.highest / longest)
    mean, unit = float(plan.pri_s.mean()), units['pri']
    noun = _noun(plan, units)
    if unit in ('Hz', 'kHz'):
        own = 1.0 / mean / (1e3 if unit == 'kHz' else 1.0)
        label = noun if plan.n == 1 else 'PRF of the mean PRI'
        return Up(noun, f'{label} ({unit})', unit, (own / high, own / low), own, lambda at: _all(at, scale=own / at))
    own, shown = mean * (1e6 if unit == 'us' else 1e3), 'µs' if unit == 'us' else unit
    return Up(noun, f'{noun} ({shown})', shown, (own * low, own * high), own, lambda at: _all(at, scale=at / own))


def _carrier(plan, _):
    own = float(plan.carrier_hz[0])
    band = next((one for one in BANDS if one.low_hz <= own < one.high_hz), BANDS[-1])
    legal = [end * 1e9 for end in (BY_PATH['radar.carrier_ghz'].lowest, BY_PATH['radar.carrier_ghz'].highest)]
    # Where there are several carriers they keep their ratios, and all must stay what a carrier may be.
    low = max(band.low_hz, legal[0] * own / plan.carrier_hz.min())
    high = min(band.high_hz, legal[1] * own / plan.carrier_hz.max())
    noun = 'carrier' if np.ptp(plan.carrier_hz) == 0 else 'first carrier'
    ends = (low / 1e9, high / 1e9)
    return Up(noun, f'{noun} (GHz)', 'GHz', ends, own / 1e9, lambda at: _all(at, carrier=at * 1e9 / own))


def _ratio(plan, _):
    mean = float(plan.pri_s.mean())
    above, below = float(plan.pri_s.max()) - mean, mean - float(plan.pri_s.min())
    own = float(plan.pri_s.max() / plan.pri_s.min())

    def spread(ratio):
        # (mean + q above) = ratio (mean - q below)
        return mean * (ratio - 1.0) / (above + ratio * below)

    shortest = float(plan.pulse_s.max()) * _HARDLY_LONGER
    most = (mean + above * (mean - shortest) / below) / shortest
    high = min(max(2.0 * own - 1.0, _LEAST_RATIO), most)
    label = 'stagger ratio, longest interval to shortest'
    return Up('stagger ratio', label, '', (1.0, high), own, lambda at: _all(at, spread=spread(at)))


def _all(at, scale=1.0, spread=1.0, carrier=1.0):
    return tuple(np.broadcast_to(factor, np.shape(at)).astype(float) for factor in (scale, spread, carrier))
