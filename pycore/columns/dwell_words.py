"""The words of the dwell: how long a set takes, what is left of the time on target, and what fill pulses cost."""

from pycore.dwell import sets_that_fit
from pycore.wording import capitalised, count_word, percent, plural, significant

_FITS = 1e-9
"""Part of the time on target that is left to rounding. [unitless]"""


def words(computed, cpis, axis, names, mark=None, kept=None):
    """Return caption, short caption, summary and table of the dwell.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    cpis : Timeline
        When the CPIs are sent. [s]
    axis : Axis
        Of time. [s]
    names : sequence of str
        The CPIs' names. [unitless]
    mark : Mark or None
        The target that is followed. [m, m/s]
    kept : tuple or None
        What the kept plan gives, when its CPIs are sent, and their names. [SI, s, unitless]

    Returns
    -------
    words : dict
        caption, short, summary, table.
    """
    first, *rest = [_taken(computed, cpis, axis), _fill(cpis, axis), *_ringed(computed, mark), *_thin(cpis, axis, kept)]
    said = ' '.join([first, *rest])
    count = len(names)
    table = _table(computed, cpis, axis, names)
    if kept:
        table['rows'] += _table(kept[0], kept[1], axis, [f'kept: {name}' for name in kept[2]])['rows']
    return {
        'caption': said,
        'short': first,
        'summary': f'The {count_word(count)} {plural(count, "CPI")} of one set along the time from its first pulse. '
        f'{said}',
        'table': table,
    }


def _taken(computed, cpis, axis):
    """Say how long one set takes and what that leaves, or by how much it is too long."""
    used, given = float(cpis.stop_s[-1]), computed.plan.time_on_target_s
    what = 'The CPI' if computed.looks == 1 else 'One set'
    if given is None:
        return f'{what} takes {axis.text(used)}; no time on target is given.'
    if abs(used - given) <= _FITS * given:
        return f'{what} fills the {axis.text(given)} on target.'
    if used > given:
        return f'{what} takes {axis.text(used)}, {axis.text(used - given)} more than the {axis.text(given)} on target.'
    sets = sets_that_fit(given, used)
    left = f'{axis.text(given - sets * used)}, {percent(1.0 - sets * used / given)},'
    if given - sets * used <= _FITS * given:
        return capitalised(f'{count_word(sets)} sets of {axis.text(used)} each fill the {axis.text(given)} on target.')
    if sets > 1:
        many = f'{count_word(sets)} of them fit' if computed.looks > 1 else f'{count_word(sets)} fit'
        return f'{what} takes {axis.text(used)}; {many} into the {axis.text(given)} on target and leave {left} unused.'
    return f'{what} takes {axis.text(used)} of the {axis.text(given)} on target; {left} are unused.'


def _fill(cpis, axis):
    """Say what fill pulses cost, and which tone is which."""
    fill = float((cpis.counted_s - cpis.start_s).sum())
    if not fill:
        return 'No fill pulses are sent.'
    share = percent(fill / float(cpis.stop_s[-1]))
    return f'Fill pulses, dark, take {axis.text(fill)}, {share} of it; pale, the pulses that count.'


def _ringed(computed, mark):
    """Say which CPIs are marked because they see the followed target."""
    if mark is None:
        return []
    found = mark.followed
    count = int(found.seen) if computed.is_stagger else sum(not one.reasons for one in found.prfs)
    if not count:
        return ['No CPI sees the target.']
    return [f'Ringed: the {plural(count, "CPI")} that {plural(count, "sees", "see")} the target.']


def _thin(cpis, axis, kept):
    """Say what the thin lane is, and how much longer or shorter its set takes."""
    if kept is None:
        return []
    used, then = float(cpis.stop_s[-1]), float(kept[1].stop_s[-1])
    if abs(then - used) <= _FITS * used:
        return ['Thin, below: the kept plan, which takes as long.']
    much = axis.text(abs(then - used))
    return [f'Thin, below: the kept plan, {axis.text(then)}, {much} {"longer" if then > used else "shorter"}.']


def _table(computed, cpis, axis, names):
    """Return one row for each CPI: when its pulses are sent, and how many."""
    plan = computed.plan
    pulses = zip(plan.fill_pulses.tolist(), plan.pulses.tolist(), strict=True)
    ends = [axis.shown(edge).tolist() for edge in (cpis.start_s, cpis.counted_s, cpis.stop_s)]
    rows = [
        [name, str(fill), str(counted), *(significant(end, 4) for end in times)]
        for name, (fill, counted), *times in zip(names, pulses, *ends, strict=False)
    ]
    head = ['CPI', 'Fill pulses', 'Pulses that count']
    return {'head': [*head, *(f'{what} ({axis.unit})' for what in ('Begins', 'Counts from', 'Ends'))], 'rows': rows}
