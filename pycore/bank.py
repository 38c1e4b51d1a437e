"""A CPI's bank of filters: where the filters lie, what a target and a patch of clutter put into each.

Gains are ratios to noise, wᴴ(…)w / wᴴw, so that a filter's noise is 1
whatever its window. Closing speeds are positive.
"""

import numpy as np


def centres(cpi):
    """Return the speeds that the filters are steered to, folded about zero.

    Parameters
    ----------
    cpi : Cpi
        Pulses and window, n pulses that count. [unitless]

    Returns
    -------
    speed_m_s : float array, shape n
        In [-v_b/2, v_b/2), filter 0 at zero. [m/s]
    """
    return np.fft.fftfreq(cpi.pulses) * cpi.blind_speed_m_s


def outside_notch(cpi, speed_m_s):
    """Return which speeds stand clear of the notch, around zero and around every blind speed.

    Parameters
    ----------
    cpi : Cpi
        Pulses, window and notch. [unitless]
    speed_m_s : float or array, shape S
        Closing speed. [m/s]

    Returns
    -------
    clear : bool array, shape S
        True where the distance to the nearest multiple of v_b is at least the notch.
    """
    blind = cpi.blind_speed_m_s
    speed = np.asarray(speed_m_s, dtype=float)
    return np.abs(speed - blind * np.round(speed / blind)) >= cpi.notch_m_s


def target_gain(cpi, speed_m_s):
    """Return what each filter makes of a steady target's one-pulse signal-to-noise.

    Parameters
    ----------
    cpi : Cpi
        Pulses and window, n pulses that count. [unitless]
    speed_m_s : float or array, shape V
        Target's closing speed. [m/s]

    Returns
    -------
    gain : float array, shape V × n
        |wᴴs|²/wᴴw, s_k = exp(j 4π v k T/λ): at most n, straddling included.
    """
    turns = np.multiply.outer(np.asarray(speed_m_s, dtype=float) / cpi.blind_speed_m_s, np.arange(cpi.pulses))
    seen = np.fft.fft(cpi.weights * np.exp(2j * np.pi * (turns % 1.0)), axis=-1)
    return (seen.real**2 + seen.imag**2) / (cpi.weights**2).sum()


def lag_weights(cpi, spread_m_s):
    """Return the Fourier coefficients of what a filter lets through of Gaussian clutter.

    Parameters
    ----------
    cpi : Cpi
        Pulses and window, n pulses that count. [unitless]
    spread_m_s : float
        Standard deviation of the clutter's speed. [m/s]

    Returns
    -------
    coefficients : float array, shape n
        c_m = Σ_k w_k w_{k+m} ρ(mT)/Σw², so that a filter steered an offset o away from the clutter passes
        c_0 + 2 Σ_{m>0} c_m cos(2π m o/v_b) of its one-pulse power. c_0 is 1.
    """
    pulses = cpi.pulses
    size = 2 * pulses
    spectrum = np.fft.rfft(cpi.weights, size)
    overlap = np.fft.irfft(spectrum.real**2 + spectrum.imag**2, size)[:pulses]
    lag_s = np.arange(pulses) * cpi.pri_s
    coherence = np.exp(-8.0 * (np.pi * spread_m_s * lag_s / cpi.wavelength_m) ** 2)
    return overlap / overlap[0] * coherence


def clutter_gain(cpi, speed_m_s, spread_m_s):
    """Return what each filter makes of a patch's one-pulse clutter-to-noise.

    Parameters
    ----------
    cpi : Cpi
        Pulses and window, n pulses that count. [unitless]
    speed_m_s : float
        The patch's mean closing speed. [m/s]
    spread_m_s : float
        Standard deviation of the patch's speed. [m/s]

    Returns
    -------
    gain : float array, shape n
        wᴴRw/wᴴw with R_kl = ρ((k - l)T) exp(j 4π v_p (k - l)T/λ). The sampling does the folding.
    """
    lags = np.arange(cpi.pulses)
    turn = np.exp(2j * np.pi * ((lags * speed_m_s / cpi.blind_speed_m_s) % 1.0))
    passed = lag_weights(cpi, spread_m_s) * turn
    passed[0] *= 0.5
    return np.maximum(2.0 * np.fft.fft(passed).real, 0.0)
