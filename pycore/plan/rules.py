"""The rules between the keys of a plan, and values for each PRF."""

from fractions import Fraction

from pycore.clock import MOST_COUNTS_OFF
from pycore.errors import InputError
from pycore.plan.document import shown
from pycore.plan.keys import BY_PATH, KEYS

PER_PRF = tuple(key.path for key in KEYS if key.per_prf)
"""Keys that may hold one value for each PRI."""


def per_prf(plan, path):
    """Return the values of a key as a list, one for each PRI.

    Parameters
    ----------
    plan : dict
        A filled plan. [plan's units]
    path : str
        Path of a key that may be a list. [unitless]

    Returns
    -------
    values : list
        As long as the PRIs. [unit of the key]

    Raises
    ------
    InputError
        Where a list has another length, or a stagger has several values.
    """
    record, name = path.split('.')
    value, n, label = plan[record][name], len(plan['waveform']['pri_us']), BY_PATH[path].label
    if not isinstance(value, list):
        return [value] * n
    if len(value) != n:
        raise InputError(path, f'{label} must be one number or one for each of the {n} PRIs; got {len(value)}.')
    if plan['waveform']['kind'] == 'stagger' and len(set(value)) > 1:
        raise InputError(path, f'{label} must be one for the whole CPI of a stagger; got {len(set(value))} values.')
    return value


def counts_of(pri_us, clock_mhz):
    """Return PRIs in whole counts of the timing clock.

    Parameters
    ----------
    pri_us : list of int or float
        PRIs. [us]
    clock_mhz : int or float
        Timing clock. [MHz]

    Returns
    -------
    counts : tuple of int
        One for each PRI. [clock counts]

    Raises
    ------
    InputError
        Where a PRI is off the clock: with the two nearest that are on it.
    """
    clock = Fraction(str(clock_mhz))
    counts = []
    for index, pri in enumerate(pri_us):
        exact = Fraction(str(pri)) * clock
        count = round(exact)
        if count < 1 or abs(exact - count) > MOST_COUNTS_OFF:
            below = max(1, int(exact))
            near = ' and '.join(f'{float(one / clock):.10g}' for one in (below, below + 1))
            raise InputError(
                f'waveform.pri_us.{index}',
                f'PRI must be a whole count of the {shown(clock_mhz)} MHz clock; got {shown(pri)} µs, the nearest are '
                f'{near} µs.',
            )
        counts.append(count)
    return tuple(counts)


def check_rules(plan, pulses_us):
    """Check the rules between keys: pulse < PRI, M ≤ N, and a near pulse that is sent after the long one.

    Parameters
    ----------
    plan : dict
        A filled plan. [plan's units]
    pulses_us : list of int or float
        Pulse length for each PRI. [us]

    Raises
    ------
    InputError
        At the first rule that is broken.
    """
    waveform, radar = plan['waveform'], plan['radar']
    n = len(waveform['pri_us'])
    for index, (pulse, pri) in enumerate(zip(pulses_us, waveform['pri_us'], strict=True)):
        if not pulse < pri:
            field = f'radar.pulse_us.{index}' if isinstance(radar['pulse_us'], list) else 'radar.pulse_us'
            raise InputError(
                field, f'Pulse length must be shorter than every PRI, here {shown(pri)} µs; got {shown(pulse)} µs.'
            )
    if waveform['kind'] == 'dwells' and waveform['detect_m'] > n:
        raise InputError(
            'waveform.detect_m',
            f'PRFs that must see a target can be at most the {n} that there are; got {waveform["detect_m"]}.',
        )
    near = radar['near_pulse']
    earliest = max(pulses_us) + radar['guard_us']
    if near is not None and near['sent_at_us'] < earliest:
        raise InputError(
            'radar.near_pulse.sent_at_us',
            f'Near pulse must be sent after the long pulse and the guard, {shown(earliest)} µs; '
            f'got {shown(near["sent_at_us"])} µs.',
        )
