"""A plan whose intervals, spread or carriers are moved by factors: what it gives over speed, row by row.

Knows which physics answers for dwells and which for a stagger; what a row means is the figure's.
"""

import numpy as np

from pycore.ambiguity import first_blind_speed
from pycore.response import binomial_weights, repeat_counts
from pycore.scaled_notches import blind_shares, clear_counts, common_blind_speed
from pycore.scaled_responses import below_shares, row_powers, spread_of


class Moved:
    """One plan to be moved; ``factors`` are those of intervals, of their spread and of carriers, each of shape R.

    Parameters
    ----------
    plan : Plan
        The plan, checked and in SI units. [unitless]
    """

    def __init__(self, plan):
        self.plan = plan
        self.weights = binomial_weights(plan.delays) if plan.weights is None else plan.weights
        self.spread = spread_of(plan.pri_s, self.weights) if plan.kind == 'stagger' else None

    def clear_counts(self, factors, speed_m_s):
        """Return how many PRFs of a set of dwells are clear, shape (R, V).

        Parameters
        ----------
        factors : tuple of three float arrays, shape R
            Of intervals, spread and carriers. [unitless]
        speed_m_s : float array, shape V
            Radial speeds. [m/s]
        """
        return clear_counts(self._blind_speeds(factors), self.plan.notch_m_s, speed_m_s)

    def powers(self, factors, limits_m_s, count):
        """Return a stagger's response at the centres of equal cells, shape (R, count), as a power ratio. [unitless]

        Parameters
        ----------
        factors : tuple of three float arrays, shape R
            Of intervals, spread and carriers. [unitless]
        limits_m_s : tuple of two floats
            Ends of the radial speeds. [m/s]
        count : int
            Number of cells. [unitless]
        """
        step = (limits_m_s[1] - limits_m_s[0]) / count
        first = limits_m_s[0] + 0.5 * step
        return row_powers(*self._turning(factors), first, step, count)

    def lost(self, factors):
        """Return the share of the wanted speeds outside the notch around zero that is lost, shape R. [unitless]

        Parameters
        ----------
        factors : tuple of three float arrays, shape R
            Of intervals, spread and carriers; nan where the notch takes all wanted speeds. [unitless]
        """
        plan = self.plan
        if self.spread is None:
            return blind_shares(self._blind_speeds(factors), plan.notch_m_s, plan.m, plan.speed_m_s)
        return below_shares(*self._turning(factors), plan.response_min_db, plan.speed_m_s)

    def true_blind_m_s(self, factors):
        """Return the first speed at which nothing is seen for good, shape R, or None where there is none. [m/s]

        Parameters
        ----------
        factors : tuple of three float arrays, shape R
            Of intervals, spread and carriers; a stagger whose spread is moved has none but by chance. [unitless]
        """
        plan, (scale, spread, carrier) = self.plan, factors
        if np.any(spread != 1.0):
            return None
        if self.spread is None:
            return common_blind_speed(plan.pri_counts, plan.clock_hz, plan.carrier_exact_hz) / (scale * carrier)
        if abs(sum(self.weights)) > 1e-12 * sum(abs(weight) for weight in self.weights):
            return None
        repeat = repeat_counts(plan.pri_counts, plan.weights) / plan.clock_hz
        return float(first_blind_speed(repeat, plan.wavelength_m[0])) / (scale * carrier)

    def _blind_speeds(self, factors):
        scale, _, carrier = factors
        return first_blind_speed(self.plan.pri_s, self.plan.wavelength_m) / (scale * carrier)[:, None]

    def _turning(self, factors):
        """Return time differences, amplitudes and wavelengths of each row of a stagger."""
        scale, spread, carrier = factors
        wavelength = float(self.plan.wavelength_m[0]) / carrier
        return self.spread.differences(scale, spread), self.spread.amplitude, wavelength
