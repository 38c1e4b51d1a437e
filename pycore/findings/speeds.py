"""Findings on blind speeds, on decoding range and speed, and on range walk."""

from pycore.findings.finding import Finding, at_least, at_most
from pycore.wording import as_typed, between, in_range_unit, in_speed_unit, percent, significant, trimmed, with_unit


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
    return _stagger_blind_speed(computed, units) if computed.is_stagger else _dwells_blind_speed(computed, units)


def _wanted_speed(computed, units):
    wanted = computed.plan.wanted.blind_speed_m_s
    if wanted is None:
        return None, ''
    speed, unit = in_speed_unit(wanted, units)
    return wanted, f'at least {as_typed(speed, unit)}'


def _dwells_blind_speed(computed, units):
    wanted, wanted_text = _wanted_speed(computed, units)
    looks = computed.looks
    if looks == 1:
        who = 'the PRF is blind'
    elif computed.m == 1:
        who = 'neither PRF is clear' if looks == 2 else f'none of the {looks} PRFs is clear'
    else:
        who = f'fewer than {computed.m} of the {looks} PRFs are clear'
    label = f'first speeds above the notch at which {who}'
    if computed.first_blind_m_s is None:
        return Finding(
            'blind-speed',
            label,
            None,
            'none within the coverage',
            'm/s',
            wanted,
            wanted_text,
            at_least(None, wanted),
        )
    low, high = computed.first_blind_m_s
    shown, unit = in_speed_unit(low, units)
    return Finding(
        'blind-speed',
        label,
        low,
        between(shown, in_speed_unit(high, units)[0], unit),
        'm/s',
        wanted,
        wanted_text,
        at_least(low, wanted),
        fault=f'the first blind speed is {with_unit(shown, unit)}',
    )


def _stagger_blind_speed(computed, units):
    wanted, wanted_text = _wanted_speed(computed, units)
    response = computed.response
    threshold = trimmed(computed.plan.response_min_db)
    true, unit = in_speed_unit(response.true_first_blind_m_s, units)
    repeats = 'first blind speed' if response.is_blind else 'speed at which the response repeats'
    detail = '; '.join(
        (
            f'the true {repeats} is {significant(true)} {unit}, '
            f'{significant(response.ratio_to_mean)} times that of the mean PRI',
            *_dip(response, units),
            f'{percent(response.share_above)} of the wanted speeds stand above {threshold} dB',
        )
    )
    label = f'first speed above the notch at which the response falls below {threshold} dB'
    found = response.first_below_m_s
    if found is None:
        return Finding(
            'blind-speed',
            label,
            None,
            'none',
            'm/s',
            wanted,
            wanted_text,
            at_least(None, wanted),
            detail,
        )
    shown, unit = in_speed_unit(found, units)
    return Finding(
        'blind-speed',
        label,
        found,
        with_unit(shown, unit, None if wanted is None else in_speed_unit(wanted, units)[0]),
        'm/s',
        wanted,
        wanted_text,
        at_least(found, wanted),
        detail,
        fault=f'the response falls below {threshold} dB at {with_unit(shown, unit)}',
    )


def _dip(response, units):
    """Say how deep the deepest dip is, and where; nothing where no wanted speed lies beyond the rise."""
    if response.deepest_db is None:
        return ()
    at, unit = in_speed_unit(response.deepest_at_m_s, units)
    return (f'the deepest dip is {significant(response.deepest_db)} dB at {significant(at)} {unit}',)


def decode_range(computed, units):
    """Return the finding on how far range decodes without ambiguity.

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
    wanted_m = computed.plan.range_m[1] if computed.plan.wanted.decode_range else None
    span = computed.decode_range
    wanted, unit = (None, units['range']) if wanted_m is None else in_range_unit(wanted_m, units)
    if span.blurred is None:
        shown = f'no end up to {with_unit(in_range_unit(span.swept_to, units)[0], unit)}'
    else:
        shown = with_unit(in_range_unit(span.blurred, units)[0], unit, wanted)
    spare = float('inf') if wanted_m is None or span.blurred is None else (span.blurred - wanted_m) / wanted_m
    return Finding(
        'decode-range',
        'range decodes without ambiguity out to',
        None if span.blurred is None else span.blurred / 1e3,
        shown,
        'km',
        None if wanted_m is None else wanted_m / 1e3,
        '' if wanted_m is None else f'at least {as_typed(wanted, unit)}',
        at_least(span.blurred, wanted_m),
        _blur_text(span, units, 'range', computed),
        fault=f'range decodes only to {shown}',
        spare=spare,
        spare_text=''
        if spare == float('inf')
        else f'the decoding of range, {with_unit(spare * wanted, unit)} to spare',
    )


def decode_speed(computed, units):
    """Return the finding on the span of speeds that decodes without ambiguity.

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
    low, high = computed.plan.speed_m_s
    wanted_m_s = high - low if computed.plan.wanted.decode_speed else None
    span = computed.decode_speed
    if span is None:
        return Finding('decode-speed', 'span of speeds that decodes', None, 'not decoded by a stagger', 'm/s')
    wanted, unit = (None, units['speed']) if wanted_m_s is None else in_speed_unit(wanted_m_s, units)
    if span.blurred is None:
        shown = f'no end up to {with_unit(in_speed_unit(span.swept_to, units)[0], unit)}'
    else:
        shown = with_unit(in_speed_unit(span.blurred, units)[0], unit, wanted)
    return Finding(
        'decode-speed',
        'span of speeds that decodes without ambiguity',
        span.blurred,
        shown,
        'm/s',
        wanted_m_s,
        '' if wanted_m_s is None else f'at least {as_typed(wanted, unit)}',
        at_least(span.blurred, wanted_m_s),
        _blur_text(span, units, 'speed', computed),
        fault=f'speed decodes only over {shown}',
    )


def _blur_text(span, units, axis, computed):
    """Say which PRFs must be able to decode, with what blur, and what the span would be without any error."""
    if computed.is_stagger:
        return 'the shortest unambiguous range of its intervals'
    exact = (in_range_unit if axis == 'range' else in_speed_unit)(span.exact, units)[0]
    cell = 'gate' if axis == 'range' else 'filter'
    blur = f'{_gates(computed.decode_blur)} {cell}{"s" if computed.decode_blur > 1 else ""} of blur'
    return f'{_whichever(computed)}with {blur}; without any error {with_unit(exact, units[axis])}'


def _whichever(computed):
    if computed.looks == computed.m:
        return ''
    return 'whichever PRF saw the target, ' if computed.m == 1 else f'whichever {computed.m} PRFs saw the target, '


def _gates(blur):
    """Say a blur of half a gate, one gate, or so many gates."""
    return {0: 'no', 0.5: 'half a', 1: 'one'}.get(blur) or significant(float(blur))


def range_walk(computed, units):
    """Return the finding on how many gates the fastest target crosses within one CPI.

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
    wanted = computed.plan.wanted.range_walk_gates
    worst = float(max(computed.range_walk_gates))
    return Finding(
        'range-walk',
        'range walk of the fastest target within one CPI',
        worst,
        with_unit(worst, 'gates', wanted),
        'gates',
        wanted,
        '' if wanted is None else f'at most {as_typed(wanted, "gates")}',
        at_most(worst, wanted),
        f'{significant(computed.range_walk_set_gates)} gates over the whole set' if computed.plan.n > 1 else '',
        fault=f'the fastest target walks through {with_unit(worst, "gates", wanted)}',
    )
