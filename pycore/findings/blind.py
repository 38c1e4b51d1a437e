"""The finding on the first blind speed of the whole plan."""

from pycore.findings.finding import Finding, at_least
from pycore.wording import as_typed, between, in_speed_unit, percent, significant, trimmed, with_unit


def blind_speed(computed, units):
    """Return the finding on the first blind speed of the whole plan.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units, with keys ``range`` and ``speed``. [unitless]

    Returns
    -------
    finding : Finding
        Value, what was wanted, and the sentence.
    """
    return _of_stagger(computed, units) if computed.is_stagger else _of_dwells(computed, units)


def _asked(computed, label, units):
    """Return the finding with what was wanted, before it is known what is reached."""
    wanted = computed.plan.wanted.blind_speed_m_s
    text = '' if wanted is None else f'at least {as_typed(*in_speed_unit(wanted, units))}'
    return Finding('blind-speed', label, None, '', 'm/s', wanted, text)


def _of_dwells(computed, units):
    asked = _asked(computed, f'first speeds above the notch at which {_who(computed)}', units)
    first = computed.first_blind_m_s
    if first is None:
        return asked.reached(None, 'none within the coverage', met=at_least(None, asked.wanted))
    low, high = (in_speed_unit(end, units)[0] for end in first)
    return asked.reached(
        *(first[0], between(low, high, units['speed'])),
        met=at_least(first[0], asked.wanted),
        fault=f'the first blind speed is {with_unit(low, units["speed"])}',
    )


def _who(computed):
    """Say how many PRFs are clear where the plan is blind."""
    looks = computed.looks
    if looks == 1:
        return 'the PRF is blind'
    if computed.m == 1:
        return 'neither PRF is clear' if looks == 2 else f'none of the {looks} PRFs is clear'
    return f'fewer than {computed.m} of the {looks} PRFs are clear'


def _of_stagger(computed, units):
    least, found = trimmed(computed.plan.response_min_db), computed.response
    asked = _asked(computed, f'first speed above the notch at which the response falls below {least} dB', units)
    asked = asked.reached(None, 'none', detail=_response(found, least, units))
    at = found.first_below_m_s
    if at is None:
        return asked.reached(None, 'none', met=at_least(None, asked.wanted))
    shown, unit = in_speed_unit(at, units)
    limit = None if asked.wanted is None else in_speed_unit(asked.wanted, units)[0]
    return asked.reached(
        *(at, with_unit(shown, unit, limit)),
        met=at_least(at, asked.wanted),
        fault=f'the response falls below {least} dB at {with_unit(shown, unit)}',
    )


def _response(found, least, units):
    """Say where the response repeats, how deep it dips, and how much of the speeds stands above the least."""
    true, unit = in_speed_unit(found.true_first_blind_m_s, units)
    repeats = 'first blind speed' if found.is_blind else 'speed at which the response repeats'
    times = f'{significant(found.ratio_to_mean)} times that of the mean PRI'
    above = f'{percent(found.share_above)} of the wanted speeds stand above {least} dB'
    return '; '.join((f'the true {repeats} is {significant(true)} {unit}, {times}', *_dip(found, units), above))


def _dip(response, units):
    """Say how deep the deepest dip is, and where; nothing where no wanted speed lies beyond the rise."""
    if response.deepest_db is None:
        return ()
    at, unit = in_speed_unit(response.deepest_at_m_s, units)
    return (f'the deepest dip is {significant(response.deepest_db)} dB at {significant(at)} {unit}',)
