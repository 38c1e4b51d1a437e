"""The words of the Doppler filters: what covers how much of the speeds, and how the target fares on each PRF."""

import math

from pycore.columns.rotor_lines import rotor_words
from pycore.wording import THIN_SPACE, capitalised, count_word, listed, percent, plural, significant, with_unit


def words(computed, heard, axis, every, mark=None, kept=None):
    """Return caption, short caption, summary and table of the Doppler filters.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    heard : sequence of Lane
        What the lanes show. [unitless]
    axis : Axis
        Of apparent speed. [m/s]
    every : sequence of str, length N
        Names of all PRFs. [unitless]
    mark : Mark or None
        The target that is followed. [m, m/s]
    kept : int or None
        How many lanes show a filter of the kept plan; none where nothing is kept. [unitless]

    Returns
    -------
    words : dict
        caption, short, summary, table.
    """
    names = [every[lane.prf] for lane in heard]
    first = ' '.join(_clutter(computed, heard, names, mark))
    rest = [*_target(computed, heard, names, mark), *_bank(computed, heard, axis, names), _key(computed, mark)]
    rest += rotor_words(computed, every, axis, mark)
    rest += _dashed(computed, kept, mark)
    what = 'the canceller' if computed.is_stagger else 'the filters of each PRF'
    return {
        'caption': ' '.join([first, *rest]),
        'short': first,
        'summary': f'Level in {what} above its noise along the {axis.name}, {axis.span()}. {" ".join([first, *rest])}',
        'table': _table(computed, heard, axis, names),
    }


def _dashed(computed, kept, mark):
    """Say what the dashed curves are."""
    if kept is None:
        return []
    if not kept:
        return ["The kept plan's filters have no PRF here to stand beside."]
    if computed.is_stagger:
        return ["Dashed: the kept plan's canceller."]
    return [
        f"Dashed: the kept plan's filter {'that hears the target best' if mark is not None else 'of the same kind'}."
    ]


def _on(names, computed):
    """Return ``on 980 µs`` for a PRF among several, nothing for the only one."""
    return [''] * len(names) if computed.plan.n == 1 or computed.is_stagger else [f' on {name}' for name in names]


def _clutter(computed, heard, names, mark):
    """Say of each patch how much of the speeds it covers on each PRF that is shown."""
    patches = computed.echoes.patches
    if not patches:
        return ['No ground clutter and no rain is assumed.']
    where = "at the target's gate" if mark is not None else 'where strongest'
    shares = {
        patch.name or f'patch {i + 1}': [float(lane.covered[i]) for lane in heard] for i, patch in enumerate(patches)
    }
    quiet = [name for name, share in shares.items() if max(share) == 0]
    loud = [_covers(computed, name, share, names, where) for name, share in shares.items() if name not in quiet]
    return [*loud, *_below(computed, quiet, where)]


def _below(computed, quiet, where):
    """Say which patches stay below the noise."""
    if not quiet:
        return []
    behind = 'behind the canceller' if computed.is_stagger else 'in every filter'
    return [f'{capitalised(listed(quiet))}, {where}, {plural(len(quiet), "stays", "stay")} below the noise {behind}.']


def _covers(computed, name, shares, names, where):
    lead = capitalised(name)
    if computed.is_stagger:
        return f'{lead}, {where}, stands above the noise behind the canceller.'
    if min(shares) >= 1.0:
        return f'{lead}, {where}, stands above the noise in every filter.'
    parts = [
        f'{percent(share) if share else "none"}{"" if i else " of the speeds"}{on}'
        for i, (share, on) in enumerate(zip(shares, _on(names, computed), strict=True))
    ]
    return f'{lead}, {where}, covers {listed(parts)}.'


def _target(computed, heard, names, mark):
    """Say how the target stands against noise and clutter on each PRF that is shown."""
    if mark is None:
        return []
    if computed.is_stagger:
        return []
    parts = []
    for lane, on in zip(heard, _on(names, computed), strict=True):
        one = mark.followed.prfs[lane.prf]
        parts.append(f'{with_unit(one.scnr_db, "dB")}{on}' if math.isfinite(one.scnr_db) else f'no usable filter{on}')
    against = 'noise and clutter' if computed.echoes.patches else 'noise'
    return [f'In its best filter the target has, over {against}, {listed(parts)}.']


def _bank(computed, heard, axis, names):
    """Say which bank is shown."""
    plan = computed.plan
    if computed.is_stagger:
        return []
    counts = {lane.cpi.pulses for lane in heard}
    filters = count_word(counts.pop()) if len(counts) == 1 else f'{min(counts)} to {max(counts)}'
    widths = [float(axis.shown(lane.cpi.blind_speed_m_s / lane.cpi.pulses)) for lane in heard]
    apart = listed(dict.fromkeys(significant(width) for width in widths))
    each = 'on each PRF' if plan.n > 1 and len(heard) == plan.n else f'on {names[0]}' if plan.n > 1 else 'in the bank'
    return [capitalised(f'{filters} filters {each}, {apart}{THIN_SPACE}{axis.unit} apart.')]


def _key(computed, mark):
    strength = "at the target's strength" if mark is not None else 'for a signal as strong as the noise in one pulse'
    if computed.is_stagger:
        return f'The curve: what the canceller makes of a target, {strength}.'
    kept = 'the filters outside the notch'
    dotted = 'Dotted: what a filter steered there hears of clutter; c' if computed.echoes.patches else 'C'
    return f'{dotted}urves: {kept}, {strength}.'


def _table(computed, heard, axis, names):
    """Return one row for each lane: width, target, and what each patch covers."""
    patches = [patch.name or f'patch {i + 1}' for i, patch in enumerate(computed.echoes.patches)]
    rows = []
    for lane, name in zip(heard, names, strict=True):
        width = (
            'none' if lane.cpi is None else significant(float(axis.shown(lane.cpi.blind_speed_m_s / lane.cpi.pulses)))
        )
        usable = 'none' if lane.cpi is None else str(lane.centre_m_s.size)
        level = 'none'
        if lane.target and lane.target[1] > 0:
            level = significant(10.0 * math.log10(lane.target[1]))
        rows.append([name, usable, width, level, *(percent(float(share)) for share in lane.covered)])
    head = ['PRF', 'Filters outside the notch', f'Width of a filter ({axis.unit})', 'Target in the best filter (dB)']
    return {'head': [*head, *(f'Covered by {name}' for name in patches)], 'rows': rows}
