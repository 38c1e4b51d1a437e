"""What eclipsing costs in signal-to-noise: at one received share, and on average over all delays.

Two forms, to be told apart wherever a loss is printed. *whole*: the filter
spans the whole pulse, noise and threshold are those of an open receiver, so that
the shut time weakens the echo twice: 20 log10(1/ε). *part*: only the received part
is integrated, or noise and echo are blanked alike ahead of the filter: 10 log10(1/ε).
"""

import numpy as np

FORMS = {'whole': 2, 'part': 1}
"""Power of the received share that signal-to-noise goes with, by the form's name."""


def eclipsing_loss(share, form='whole'):
    """Return the loss in signal-to-noise of a partly received echo.

    Parameters
    ----------
    share : float or array, shape S
        Received share. [unitless]
    form : str
        ``'whole'`` or ``'part'``. [unitless]

    Returns
    -------
    loss_db : float or array, shape S
        20 or 10 log10(1/ε); infinite where nothing is received. [dB]

    References
    ----------
    Derived here: a matched filter over the whole pulse gathers ε of the amplitude, hence ε² of the power, and all of
    the noise; one over the received part gathers ε of the energy.
    """
    share = np.asarray(share, dtype=float)
    heard = share > 0
    return np.where(heard, -10.0 * FORMS[form] * np.log10(np.where(heard, share, 1.0)), np.inf)[()]


def mean_received(pri_s, pulse_s, recovery_s=0.0, guard_s=0.0, form='part'):
    """Return the mean over all delays of the received share, or of its square.

    Parameters
    ----------
    pri_s, pulse_s : float or array, shape S
        Interval and pulse. [s]
    recovery_s, guard_s : float or array, shape S
        Times that the receiver stays shut after and before a pulse. [s]
    form : str
        ``'part'`` for the share, ``'whole'`` for its square. [unitless]

    Returns
    -------
    mean : float or array, shape S
        Without recovery and guard, d the duty up to 1/2: 1 - d, and 1 - 4d/3. [unitless]

    Notes
    -----
    Derived here: while an echo of length τ slides over a window of length w the overlap rises to h = min(τ, w) over a
    time h, stays there for |w - τ|, and falls likewise; so ∫ overlap dt = τ w and ∫ overlap² dt = h² (|w - τ| + 2h/3).
    It never meets two windows at once, as the receiver is shut for at least τ between them.
    """
    window = np.maximum(np.asarray(pri_s, dtype=float) - pulse_s - recovery_s - guard_s, 0.0)
    held = np.minimum(pulse_s, window)
    overlap = {1: pulse_s * window, 2: held**2 * (np.abs(window - pulse_s) + 2.0 * held / 3.0)}[FORMS[form]]
    return (overlap / (np.asarray(pulse_s) ** FORMS[form] * pri_s))[()]


def mean_eclipsing_loss(pri_s, pulse_s, recovery_s=0.0, guard_s=0.0, form='whole'):
    """Return the eclipsing loss averaged over all delays of an interval, as a power ratio and then in dB.

    Parameters
    ----------
    pri_s, pulse_s : float or array, shape S
        Interval and pulse. [s]
    recovery_s, guard_s : float or array, shape S
        Times that the receiver stays shut after and before a pulse. [s]
    form : str
        ``'whole'`` averages ε², ``'part'`` averages ε. [unitless]

    Returns
    -------
    loss_db : float or array, shape S
        Infinite where the receiver never opens. [dB]
    """
    mean = np.asarray(mean_received(pri_s, pulse_s, recovery_s, guard_s, form))
    heard = mean > 0
    return np.where(heard, -10.0 * np.log10(np.where(heard, mean, 1.0)), np.inf)[()]


def whole_share(pri_s, pulse_s, recovery_s=0.0, guard_s=0.0):
    """Return the part of all delays at which an echo is received whole.

    Parameters
    ----------
    pri_s, pulse_s : float or array, shape S
        Interval and pulse. [s]
    recovery_s, guard_s : float or array, shape S
        Times that the receiver stays shut after and before a pulse. [s]

    Returns
    -------
    share : float or array, shape S
        Window less pulse, over the interval; 1 - 2d without recovery and guard. Derived here. [unitless]
    """
    window = np.asarray(pri_s, dtype=float) - pulse_s - recovery_s - guard_s
    return (np.maximum(window - pulse_s, 0.0) / pri_s)[()]
