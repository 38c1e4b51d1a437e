"""One coherent processing interval as the Doppler chapters need it: timing, wavelength, window, notch."""

from dataclasses import dataclass

import numpy as np

from pycore.windows import window


@dataclass(frozen=True, slots=True)
class Cpi:
    """The pulses sent at one PRF and the filters they are put through.

    Parameters
    ----------
    pri_s : float
        Time between pulse starts. [s]
    wavelength_m : float
        Wavelength of this PRF's carrier. [m]
    pulse_s : float
        Pulse length. [s]
    bandwidth_hz : float
        Bandwidth of the matched filter. [Hz]
    notch_m_s : float
        Half-width of the notch around each blind speed. [m/s]
    fill_pulses : int
        Pulses sent before the first one that counts. [unitless]
    weights : float array, shape n
        Window over the pulses that count. [unitless]
    """

    pri_s: float
    wavelength_m: float
    pulse_s: float
    bandwidth_hz: float
    notch_m_s: float
    fill_pulses: int
    weights: np.ndarray

    @property
    def pulses(self):
        """Pulses that count. [unitless]"""
        return len(self.weights)

    @property
    def blind_speed_m_s(self):
        """First blind speed, lambda/(2T), after which speeds repeat. [m/s]"""
        return self.wavelength_m / (2.0 * self.pri_s)


def cpis(
    pri_s, wavelength_m, pulse_s, bandwidth_hz, notch_m_s, pulses, fill_pulses, window_name='hamming', sidelobe_db=40.0
):
    """Return one :class:`Cpi` for each PRF.

    Parameters
    ----------
    pri_s : float array, shape N
        Times between pulse starts. [s]
    wavelength_m, pulse_s, bandwidth_hz, notch_m_s : float or array, shape N
        Wavelength, pulse length, bandwidth and half-width of the notch. [m, s, Hz, m/s]
    pulses, fill_pulses : int or array, shape N
        Pulses that count, and pulses sent before them. [unitless]
    window_name : str
        One of ``windows.WINDOWS``. [unitless]
    sidelobe_db : float
        Depth of Chebyshev's and Taylor's sidelobes. [dB]

    Returns
    -------
    cpis : tuple of Cpi, length N
        In the order of the PRIs.
    """
    rows = np.broadcast_arrays(np.atleast_1d(pri_s), wavelength_m, pulse_s, bandwidth_hz, notch_m_s, fill_pulses)
    counts = np.broadcast_to(pulses, rows[0].shape)
    made = {int(count): window(window_name, int(count), sidelobe_db) for count in set(counts.tolist())}
    return tuple(
        Cpi(*(float(value) for value in row[:5]), int(row[5]), made[int(count)])
        for row, count in zip(zip(*rows, strict=True), counts, strict=True)
    )
