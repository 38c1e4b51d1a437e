"""The axis of the pulse repetition interval, shown as an interval or as a frequency, as the reader prefers."""

from dataclasses import dataclass

from pycore.columns.axes import interval_name
from pycore.wording import THIN_SPACE

_PER_SECOND = {'us': 1e6, 'ms': 1e3, 'Hz': 1.0, 'kHz': 1e-3}


@dataclass(frozen=True, slots=True)
class PriAxis:
    """An axis of PRIs.

    Parameters
    ----------
    key : str
        The reader's choice: ``us``, ``ms``, ``Hz`` or ``kHz``. [unitless]
    limits : tuple of two floats
        Shortest and longest PRI. [s]
    """

    key: str
    limits: tuple[float, float]

    @property
    def is_frequency(self):
        """Whether a PRF is shown."""
        return self.key in ('Hz', 'kHz')

    @property
    def unit(self):
        """Unit as it is shown."""
        return 'µs' if self.key == 'us' else self.key

    @property
    def label(self):
        """What stands beside the axis."""
        return f'{"PRF" if self.is_frequency else "PRI"} ({self.unit})'

    @property
    def ends(self):
        """Its ends in the shown unit, rising."""
        return sorted(float(self.shown(end)) for end in self.limits)

    def shown(self, pri_s):
        """Return one PRI or an array in the shown unit."""
        return _PER_SECOND[self.key] / pri_s if self.is_frequency else pri_s * _PER_SECOND[self.key]

    def plain(self, shown):
        """Return the PRI of a shown number, in seconds."""
        return _PER_SECOND[self.key] / shown if self.is_frequency else shown / _PER_SECOND[self.key]

    def name(self, pri_s):
        """Return what one PRI is called, to four figures."""
        return interval_name(
            float(f'{pri_s:.4g}') if not self.is_frequency else 1 / float(f'{1 / pri_s:.4g}'), {'pri': self.key}
        )

    def digits(self, pri_s):
        """Return one PRI of the plan without its unit."""
        return interval_name(float(pri_s), {'pri': self.key}).partition(THIN_SPACE)[0]

    def span(self):
        """Return the whole axis in words."""
        low, high = sorted(self.limits, reverse=self.is_frequency)
        return f'{self.name(low).partition(THIN_SPACE)[0]} to {self.name(high)}'


def pri_axis(units, limits_s):
    """Return an axis of PRIs.

    Parameters
    ----------
    units : mapping
        Units that the reader prefers, with key ``pri``. [unitless]
    limits_s : tuple of two floats
        Shortest and longest. [s]

    Returns
    -------
    axis : PriAxis
        In µs, ms, Hz or kHz.
    """
    return PriAxis(units['pri'], limits_s)
