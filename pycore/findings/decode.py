"""Findings on how far range and speed decode without ambiguity."""

from pycore.exact_spans import FARTHEST_M, FASTEST_M_S, exact_span_text
from pycore.findings.finding import Finding, at_least
from pycore.wording import DISTANCE, SPEED, as_typed, in_range_unit, in_speed_unit, significant, with_unit


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
    span, wanted_m = computed.decode_range, computed.plan.range_m[1] if computed.plan.wanted.decode_range else None
    wanted, text = _wanted(wanted_m, in_range_unit, units)
    asked = Finding(
        'decode-range', 'range decodes without ambiguity out to', None, '', 'km', wanted_m and wanted_m / 1e3, text
    )
    shown = _shown(span, wanted, in_range_unit, units)
    return asked.reached(
        *(None if span.blurred is None else span.blurred / 1e3, shown),
        met=at_least(span.blurred, wanted_m),
        detail=_blur_text(span, units, 'range', computed),
        fault=f'range decodes only to {shown}',
        **_spare(span, wanted_m, units),
    )


def _spare(span, wanted_m, units):
    """Say how much farther than is wanted range decodes."""
    if not wanted_m or span.blurred is None:
        return {}
    spare, unit = in_range_unit(span.blurred - wanted_m, units)
    text = f'the decoding of range, {with_unit(spare, unit)} to spare'
    return {'spare': (span.blurred - wanted_m) / wanted_m, 'spare_text': text}


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
    (low, high), span = computed.plan.speed_m_s, computed.decode_speed
    if span is None:
        return Finding('decode-speed', 'span of speeds that decodes', None, 'not decoded by a stagger', 'm/s')
    wanted_m_s = high - low if computed.plan.wanted.decode_speed else None
    wanted, text = _wanted(wanted_m_s, in_speed_unit, units)
    label = 'span of speeds that decodes without ambiguity'
    shown = _shown(span, wanted, in_speed_unit, units)
    return Finding('decode-speed', label, None, '', 'm/s', wanted_m_s, text).reached(
        *(span.blurred, shown),
        met=at_least(span.blurred, wanted_m_s),
        detail=_blur_text(span, units, 'speed', computed),
        fault=f'speed decodes only over {shown}',
    )


def _wanted(wanted, in_unit, units):
    """Return what is wanted in the shown unit, and in words; nothing where nothing is."""
    if wanted is None:
        return None, ''
    shown, unit = in_unit(wanted, units)
    return shown, f'at least {as_typed(shown, unit)}'


def _shown(span, wanted, in_unit, units):
    """Say how far a span reaches, or that it has no end as far as was looked."""
    if span.blurred is None:
        return f'no end up to {with_unit(*in_unit(span.swept_to, units))}'
    return with_unit(*in_unit(span.blurred, units), wanted)


def _blur_text(span, units, axis, computed):
    """Say which PRFs must be able to decode, with what blur, and what the span would be without any error."""
    if computed.is_stagger:
        return 'the shortest unambiguous range of its intervals'
    sizes, most = (DISTANCE, FARTHEST_M) if axis == 'range' else (SPEED, FASTEST_M_S)
    exact = exact_span_text(span.exact, most, sizes[units[axis]], units[axis])
    cell = 'gate' if axis == 'range' else 'filter'
    blur = f'{_gates(computed.decode_blur)} {cell}{"s" if computed.decode_blur > 1 else ""} of blur'
    return f'{_whichever(computed)}with {blur}; without any error {exact}'


def _whichever(computed):
    if computed.looks == computed.m:
        return ''
    return 'whichever PRF saw the target, ' if computed.m == 1 else f'whichever {computed.m} PRFs saw the target, '


def _gates(blur):
    """Say a blur of half a gate, one gate, or so many gates."""
    return {0: 'no', 0.5: 'half a', 1: 'one'}.get(blur) or significant(float(blur))
