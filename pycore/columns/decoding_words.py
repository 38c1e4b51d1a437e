"""The words of decoding: how far range and speed decode, and what else a target would be taken for."""

from pycore.columns.axes import speed_axis
from pycore.exact_spans import FARTHEST_M, exact_span_text
from pycore.wording import capitalised, count_word, plural, significant


def words(computed, found, axis, units, names):
    """Return caption, short caption, summary and table of decoding.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    found : Decoded or None
        What the PRFs make of a target; none for a stagger. [m]
    axis : Axis
        Of range. [m]
    units : mapping
        Units that the reader prefers. [unitless]
    names : sequence of str
        The PRFs' names. [unitless]

    Returns
    -------
    words : dict
        caption, short, summary, table.
    """
    first = _range_span(computed, axis)
    rest = [] if found is None else [_speed_span(computed, units), *_target(computed, found, axis)]
    lanes = (
        'How far range is unambiguous'
        if found is None
        else 'One lane for each PRF with the ranges it takes a target for'
    )
    return {
        'caption': ' '.join([first, *rest]),
        'short': first,
        'summary': f'{lanes}, {axis.span()}. {" ".join([first, *rest])}',
        'table': _table(found, axis),
    }


def span_text(value, span, axis):
    """Return a decode span in words.

    Parameters
    ----------
    value : float or None
        The span; none where nothing was confused as far as was looked. [m or m/s]
    span : DecodeSpan
        Where it was looked to. [m or m/s]
    axis : Axis
        Of range or of speed. [m or m/s]

    Returns
    -------
    text : str
        Such as ``'to 210 km'``.
    """
    return f'beyond {axis.text(span.swept_to)}' if value is None else f'to {axis.text(value)}'


def _range_span(computed, axis):
    """Say how far range decodes with blur and without error, against the coverage."""
    span, wanted = computed.decode_range, axis.limits[1]
    far = axis.wanted(wanted)
    if computed.is_stagger:
        beyond = 'beyond' if span.blurred >= wanted else 'short of'
        reach = axis.text(span.blurred)
        return f'The shortest interval of the stagger is unambiguous to {reach}, {beyond} the {far} of the coverage.'
    if span.blurred is None:
        return f'With blur range decodes beyond {axis.text(span.swept_to)}; the coverage ends at {far}.'
    if span.blurred == 0:
        return 'With this blur range does not decode at all.'
    side = 'beyond' if span.blurred >= wanted else 'short of'
    exact = exact_span_text(span.exact, FARTHEST_M, axis.si, axis.unit)
    exact = '' if exact == axis.text(span.blurred) else f' ({exact} without error)'
    return f'With blur range decodes to {axis.text(span.blurred)}{exact}, {side} the {far} of the coverage.'


def _speed_span(computed, units):
    """Say the same of speed."""
    low, high = computed.plan.speed_m_s
    axis, span = speed_axis((0.0, high - low), units), computed.decode_speed
    wide = axis.wanted(high - low)
    if span.blurred is None:
        return f'Speed decodes over more than {axis.text(span.swept_to)}; the coverage spans {wide}.'
    if span.blurred == 0:
        return 'Speed does not decode at all.'
    side = 'enough for' if span.blurred >= high - low else 'less than'
    return f'Speed decodes over {axis.text(span.blurred)}, {side} the {wide} of the coverage.'


def _target(computed, found, axis):
    """Say what else in the coverage enough PRFs would take the target for."""
    subject, m = found.subject, computed.m
    where = axis.text(subject.range_m)
    if sum(subject.seen) < m:
        return [f'The target at {where} is seen by too few PRFs to be decoded.']
    lead = 'For the target at' if subject.followed else 'For a target in the middle of the coverage, at'
    return [f'{lead} {where}, {other_ranges(found, m)}', *_speeds(found)]


def other_ranges(found, m):
    """Say at how many other ranges enough PRFs agree, and what the speed makes of those.

    Parameters
    ----------
    found : Decoded
        What the PRFs make of a target. [m]
    m : int
        How many PRFs must agree. [unitless]

    Returns
    -------
    text : str
        The end of a sentence.
    """
    ghosts, ruled_out = len(found.ghosts), len(found.ruled_out)
    count = ghosts + ruled_out
    on = f'{count_word(m)} {plural(m, "PRF")}'
    if not count:
        return f'no other range agrees on {on}.'
    agree = f'{count_word(count)} other {plural(count, "range agrees", "ranges agree")} on {on}'
    if not ghosts:
        return f'{agree}; the speed rules {plural(count, "it", "both" if count == 2 else "all of them")} out.'
    if not ruled_out:
        return f'{agree}, in speed too: {plural(count, "a ghost, dark", "ghosts, dark")}.'
    return f'{agree}, {count_word(ghosts)} of them in speed too: {plural(ghosts, "a ghost", "ghosts")}, dark.'


def _speeds(found):
    """Say how many other speeds fit at the target's own range."""
    if not found.at_own:
        return []
    count = count_word(found.at_own)
    return [capitalised(f'{count} other {plural(found.at_own, "speed fits", "speeds fit")} at its own range.')]


def _table(found, axis):
    """Return one row for each place of agreement, in rising order."""
    if found is None:
        return {'head': [f'From ({axis.unit})', f'to ({axis.unit})', 'What it is'], 'rows': []}
    kinds = (('the target', found.own), ('a ghost', found.ghosts), ('ruled out by speed', found.ruled_out))
    places = sorted((*ends, kind) for kind, found_here in kinds for ends in found_here.tolist())
    rows = [
        [significant(float(axis.shown(start)), 5), significant(float(axis.shown(stop)), 5), kind]
        for start, stop, kind in places
    ]
    return {'head': [f'From ({axis.unit})', f'to ({axis.unit})', 'What it is'], 'rows': rows}
