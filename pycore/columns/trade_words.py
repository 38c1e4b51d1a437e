"""The words of the trade line: how far one PRF falls short, and what the plan's PRFs give."""

import numpy as np

from pycore import bands
from pycore.columns.looks import all_of
from pycore.constants import SPEED_OF_LIGHT_M_S
from pycore.wording import THIN_SPACE, capitalised, count_word, listed, plural, significant, trimmed


def words(computed, x, y, names, kept=None, kept_names=()):
    """Return caption, short caption, summary and table of the trade line.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    x, y : Axis
        Of unambiguous range and of first blind speed. [m, m/s]
    names : sequence of str
        The PRFs' names. [unitless]
    kept : Computed or None
        What the kept plan gives. [SI]
    kept_names : sequence of str
        Its PRFs' names. [unitless]

    Returns
    -------
    words : dict
        caption, short, summary, table.
    """
    first = _shortfall(computed, x, y)
    rest = [_given(computed, x, y, "The plan's"), _regimes(computed), *_hollow(computed, kept, x, y)]
    said = ' '.join([first, *rest])
    table = _table(computed, x, y, names)
    if kept is not None:
        table['rows'] += _table(kept, x, y, [f'kept: {name}' for name in kept_names])['rows']
    return {
        'caption': said,
        'short': first,
        'summary': f'Unambiguous range against first blind speed on logarithmic axes. {said}',
        'table': table,
    }


def _hollow(computed, kept, x, y):
    """Say what the hollow marks are."""
    if kept is None:
        return []
    given = _given(kept, x, y, "The kept plan's")
    if given.partition("plan's")[2] == _given(computed, x, y, "The plan's").partition("plan's")[2]:
        return ["Hollow: the kept plan's, which are the same."]
    return [f'Hollow: {given[:1].lower()}{given[1:].partition(" (Nyquist")[0]}.']


def _carrier(plan):
    """Say the carrier, or the lowest of several, and its band."""
    lowest = float(plan.carrier_hz.min())
    name = bands.band(lowest)
    shown = f'{trimmed(lowest / 1e9)}{THIN_SPACE}GHz'
    where = f'at {shown} ({name} band)' if name else f'at {shown}'
    return where if np.ptp(plan.carrier_hz) == 0 else f'even {where}'


def _shortfall(computed, x, y):
    """Say whether one PRF can be unambiguous over the coverage, and at which PRFs or how far it falls short."""
    plan, times = computed.plan, computed.shortfall
    span = plan.speed_m_s[1] - plan.speed_m_s[0]
    asked = f'{x.wanted(plan.range_m[1])} and over {y.wanted(span)}'
    if times > 1:
        short = f'it falls short {significant(times)} times over'
        return capitalised(f'{_carrier(plan)} no single PRF is unambiguous out to {asked}: {short}.')
    low = 2 * span / float(plan.wavelength_m.max())
    high = SPEED_OF_LIGHT_M_S / 2 / plan.range_m[1]
    prf = f'a single PRF from {significant(low)} to {significant(high)}{THIN_SPACE}Hz'
    return capitalised(f'{_carrier(plan)} {prf} is unambiguous out to {asked}.')


def _given(computed, x, y, whose):
    """Say what the PRFs give: each of up to three, the span of more."""
    reach, speed = x.shown(computed.unambiguous_range_m), y.shown(computed.blind_speed_m_s)
    nyquist = speed / 2
    _, first = np.unique(np.column_stack((reach, speed)), axis=0, return_index=True)
    order = np.sort(first)
    if order.size > 3:
        ends = [f'{significant(values.min())} to {significant(values.max())}' for values in (reach, speed)]
        ends.append(f'±{THIN_SPACE}{significant(nyquist.min())} to ±{THIN_SPACE}{significant(nyquist.max())}')
    else:
        shown = [list(dict.fromkeys(map(significant, values[order].tolist()))) for values in (reach, speed, nyquist)]
        ends = [listed(shown[0]), listed(shown[1]), listed(f'±{THIN_SPACE}{text}' for text in shown[2])]
    count, noun = computed.plan.n, 'interval' if computed.is_stagger else 'PRF'
    who = f'{whose} {count_word(count)} {noun + " gives" if count == 1 else noun + "s give"}'
    blind = f'{"a first blind speed" if count == 1 else "first blind speeds"} of {ends[1]}{THIN_SPACE}{y.unit}'
    return f'{who} {ends[0]}{THIN_SPACE}{x.unit} and {blind} (Nyquist {ends[2]}{THIN_SPACE}{y.unit}).'


def _regimes(computed):
    """Say of which regime the PRFs are for this coverage."""
    counts = {name: computed.regimes.count(name) for name in ('low', 'medium', 'high', 'clear')}
    kinds = {name: count for name, count in counts.items() if count}
    if len(kinds) > 1:
        parts = listed(f'{count_word(count)} {plural(count, "is", "are")} {name}' for name, count in kinds.items())
        return f'For this coverage {parts}.'
    (name, n), *_ = kinds.items()
    what = name if name == 'clear' else f'{name} PRF'
    who = 'It' if n == 1 else capitalised(all_of(n))
    return f'{who} {plural(n, "is", "are")} {what} for this coverage.'


def _table(computed, x, y, names):
    """Return one row for each PRF: what it gives in range and speed, and its regime."""
    triples = zip(
        names, x.shown(computed.unambiguous_range_m), y.shown(computed.blind_speed_m_s), computed.regimes, strict=True
    )
    rows = [
        [name, significant(reach), significant(speed), f'±{THIN_SPACE}{significant(speed / 2)}', regime]
        for name, reach, speed, regime in triples
    ]
    head = [
        'PRF',
        f'Unambiguous range ({x.unit})',
        f'First blind speed ({y.unit})',
        f'Nyquist speed ({y.unit})',
        'Regime',
    ]
    return {'head': head, 'rows': rows}
