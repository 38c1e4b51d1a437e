"""The actions: plain dictionaries in, plain dictionaries and arrays out.

The command line, the worker in the browser and notebooks all go through these.
No mathematics lives here. What a page does not need before somebody opens it is
imported when it is first asked for: a page is usable the sooner.
"""

from pycore import edit, link
from pycore.assessment import assessment, finite
from pycore.cautions import cautions
from pycore.columns import FIGURES, blind_speeds, followed, marking, picture, speed_map
from pycore.columns.here import here_words
from pycore.columns.here_moved import here_moved_words
from pycore.columns.view import seen
from pycore.comparing import comparison, moved
from pycore.computed import Computed
from pycore.errors import InputError
from pycore.findings import verdict
from pycore.follow import follow, strip
from pycore.hand_over import hand_over
from pycore.holds_over import judged
from pycore.link.beside import beside, read_beside
from pycore.link.reader_units import units_text, unknown_units
from pycore.plan.keys.followed import FOLLOWED
from pycore.plan.reading import read
from pycore.quantity import read_number
from pycore.remembered import computed_of, computed_of_document, findings_of
from pycore.shown import shown_unit
from pycore.timing import columns, timing_table
from pycore.wording import SHOWN_UNITS, reader_units


def assess(plan, margins=False):
    """Return the assessment of a plan: all its numbers and findings.

    Parameters
    ----------
    plan : dict
        A plan; only ``waveform.pri_us`` is required. [plan's units]
    margins : bool
        Whether the margins of every judged finding are worked out too, which takes seconds; the key ``margins`` is
        there only then. [unitless]

    Returns
    -------
    assessment : dict
        Ready for JSON.

    Raises
    ------
    InputError
        Where a key of the plan cannot be used: field, rule, limit, and what came.
    """
    return assessment(Computed(read(plan)), margins)


def note(plan=None, opened=None, edits=(), figures=(), size=None, units=None, deep=False, view=None):
    """Return all that a page shows of a plan, after the edits that were made to it.

    Parameters
    ----------
    plan : dict or None
        The plan that the edits start from. [plan's units]
    opened : str or None
        Text of a link to start from instead. [unitless]
    edits : sequence of dict
        Edits in the order they were made, each with the ``units`` it was typed in where they are no longer those that
        are shown; one that is refused leaves the plan as it was. [unitless]
    figures : sequence of str
        Names of the figures that are on the screen; no other is computed. [unitless]
    size : mapping or None
        Width and height of the figures' maps, by figure. [cells]
    units : mapping or None
        Units that the reader prefers, by ``range``, ``speed``, ``pri``. [unitless]
    deep : bool
        Whether findings that take long are worked out where nothing is judged by them. [unitless]
    view : mapping or None
        What the reader has chosen to look at: ``target``, with ``range_km`` and ``speed_mps``, is followed and marked
        in all figures; ``kept`` is a plan to compare with, for which one that an opened link carries goes before.
        [km, m/s]

    Returns
    -------
    note : dict
        The plan, its link, what was said and refused, verdict, findings, cautions, figures, what becomes of the
        target, and how the plan differs from the kept one.
    """
    units = reader_units(units)
    start = None if opened is None else link.read_link(opened)
    if start is not None:
        view = {**(view or {}), 'target': start.target, **start.choices}
    edited, said, refused = _edited(plan if start is None else start.document, edits, units)
    computed = computed_of(edited, with_echoes=deep)
    found = findings_of(computed, units)
    if start is not None:
        view = _with_kept(start, view)
    looked = seen(computed, view)
    kept = None if looked.kept is None else looked.kept.plan.document
    return {
        'plan': computed.plan.document,
        'link': _link(computed, looked, units, view),
        'opened': None if start is None else _as_opened(start),
        'said': said,
        'refused': refused,
        'verdict': verdict(found),
        'findings': [_shown(finding) for finding in found],
        'cautions': cautions(computed, units),
        'figures': {name: picture(name, computed, units, (size or {}).get(name), looked) for name in figures},
        'target': None if looked.mark is None else followed.words(looked.mark, units),
        'kept': None if kept is None else {'plan': kept, **comparison(computed, looked.kept, units)},
    }


def look(plan, figures=(), marked=(), size=None, units=None, view=None):
    """Return what a page shows anew where the plan stays and only the way of looking at it changes.

    Parameters
    ----------
    plan : dict
        A plan. [plan's units]
    figures : sequence of str
        Names of the figures that are looked at in another way. [unitless]
    marked : sequence of str
        Names of those in which only the followed target moves. [unitless]
    size, units, view : mapping or None
        As for :func:`note`. [cells, unitless, km and m/s]

    Returns
    -------
    looked : dict
        ``link``, ``figures`` (of the marked ones only what moves), ``target``.
    """
    units = reader_units(units)
    computed = computed_of_document(plan)
    looked = seen(computed, view)
    sizes = size or {}
    return {
        'link': _link(computed, looked, units, view),
        'figures': {
            **{name: picture(name, computed, units, sizes.get(name), looked) for name in figures},
            **{name: marking(name, computed, units, sizes.get(name), looked) for name in marked if name not in figures},
        },
        'target': None if looked.mark is None else followed.words(looked.mark, units),
    }


def here(plan, figure, x=None, y=None, units=None, up=None):
    """Return in one line what is at one point of a figure: for the map of blind zones, why it is blind.

    Parameters
    ----------
    plan : dict
        A plan. [plan's units]
    figure : str
        Name of the figure. [unitless]
    x, y : float or None
        The point; ``None`` on an axis that does not hold there. [units on the axes]
    units : mapping or None
        Units that the reader prefers. [unitless]
    up : str or None
        What goes up the axis of the blind speeds. [unitless]

    Returns
    -------
    here : dict
        ``text``, empty where there is nothing to say.
    """
    units, computed = reader_units(units), computed_of_document(plan)
    looked = seen(computed, {'up': up})
    if figure == blind_speeds.NAME and speed_map.is_map(computed, looked):
        return {'text': here_moved_words(computed, looked.up, x, y, units)}
    return {'text': here_words(computed, figure, x, y, units)}


def typed_target(name, text, current=None, units=None):
    """Return what was typed for the followed target.

    Parameters
    ----------
    name : str
        ``range_km`` or ``speed_mps``. [unitless]
    text : str
        What was typed. [unitless]
    current : float or None
        Present value, which ``+20%`` changes. [km or m/s]
    units : mapping or None
        Units that the reader prefers: a number without a unit is meant in them. [unitless]

    Returns
    -------
    typed : dict
        ``value``. [km or m/s]

    Raises
    ------
    InputError
        Where it is no such number.
    """
    key = FOLLOWED[name]
    unit = shown_unit(key, reader_units(units))
    return {'value': read_number(text, key, f'followed.{name}', unit, current)}


def _link(computed, looked, units, view):
    """Write the link: with the followed target, the reader's units, the kept plan and how the page is shown."""
    mark, text = looked.mark, units_text(units)
    items = link.page_items(view or {}, FIGURES)
    items |= {} if mark is None else {'target': link.target_text(mark.target)}
    items |= {'units': text} if text else {}
    items |= link.choices_view({'axis': looked.axis, 'up': looked.up})
    items |= {} if looked.kept is None else beside(looked.kept.plan.document)
    return link.written(computed.plan.document, view=items)


def _with_kept(start, view):
    """Return the view with the plan to compare with that an opened link carries; what is wrong with it is said."""
    carried, said = read_beside(start)
    start.said.extend(said)
    return view if carried is None else {**(view or {}), 'kept': carried}


def _edited(document, edits, units):
    """Apply edits one after another; a refused one is kept with its reason and changes nothing."""
    plan, said, refused = None, [], []
    for one in edits:
        try:
            result = edit.apply(document, one, {**units, **(one.get('units') or {})})
        except InputError as error:
            refused.append({'edit': one, 'key': error.field, 'message': error.message})
        else:
            plan, document = result.plan, result.document
            said.extend(result.said)
    return plan or read(document), said, refused


def _as_opened(start):
    said = [*start.said, *unknown_units(start.view.get('units', ''))]
    kept = {name: getattr(start, name) for name in ('cut', 'edited', 'refused', 'view', 'target', 'choices')}
    return {**kept, 'said': said}


def _shown(finding):
    """Return a finding as a page shows it: the sentence in its parts, besides the assessment's keys."""
    keys = (
        *('name', 'met', 'accepted', 'verdict', 'text', 'label', 'value', 'value_text', 'unit'),
        *('wanted', 'wanted_text', 'detail', 'remark', 'remark_text'),
    )
    return {key: getattr(finding, key) for key in keys}


def compare(plan, other, units=None):
    """Return how a plan differs from another one: inputs first, then findings.

    Parameters
    ----------
    plan, other : dict
        Two plans; words such as better are said of the first. [plan's units]
    units : mapping or None
        Units that the reader prefers. [unitless]

    Returns
    -------
    comparison : dict
        ``inputs``, ``findings``, ``differ`` (whether any verdict does), and ``summary``, one sentence.
    """
    units = reader_units(units)
    return comparison(computed_of_document(plan), computed_of_document(other), units)


def moved_between(plan, before, units=None):
    """Return what an edit did: what changed, and every finding that moved.

    Parameters
    ----------
    plan, before : dict
        The plan after the edit, and before it. [plan's units]
    units : mapping or None
        Units that the reader prefers. [unitless]

    Returns
    -------
    moved : dict
        ``what``, ``findings``, and ``link``, which opens the plan after it.
    """
    units = reader_units(units)
    now, then = (computed_of_document(one) for one in (plan, before))
    return {**moved(now, then, units), 'link': link.written(now.plan.document)}


def vary(plan, inputs):
    """Return the findings of a plan while one input or two take other values.

    Parameters
    ----------
    plan : dict
        The plan they start from. [plan's units]
    inputs : sequence of dict
        One or two of ``key``, ``from``, ``to``, ``by``. [unit of each key]

    Returns
    -------
    table : dict
        ``head`` and ``rows``: the inputs, then value and verdict of each finding; where a plan is refused, only
        the reason.
    """
    from pycore.variation import steps, varied

    axes = [(one['key'], steps(one['key'], one['from'], one['to'], one['by'])) for one in inputs]
    if not 1 <= len(axes) <= 2:
        raise InputError('', f'One input or two can be varied; got {len(axes)}.')
    head, rows = [path for path, _ in axes], []
    for values, result in varied(plan, axes):
        if isinstance(result, InputError):
            rows.append({**dict(zip(head, values, strict=True)), 'refused': result.message})
            continue
        found = {}
        for finding in judged(Computed(read(result)), SHOWN_UNITS):
            found[finding.name], found[f'{finding.name} met'] = finding.value, finding.met
        rows.append({**dict(zip(head, values, strict=True)), **found})
    columns = list(dict.fromkeys(column for row in rows for column in row))
    return {'head': columns, 'rows': [[row.get(column) for column in columns] for row in rows]}


def follow_target(plan, range_km, speed_mps):
    """Return what a plan makes of one target.

    Parameters
    ----------
    plan : dict
        A plan. [plan's units]
    range_km : float
        True range, not negative. [km]
    speed_mps : float
        True radial speed, positive closing. [m/s]

    Returns
    -------
    followed : dict
        ``prfs`` (one for each PRI), ``clear``, ``seen``, ``probability``, ``ghosts``, and ``every_pri``: what each
        PRI from half the plan's shortest to twice its longest would make of it, as lists.
    """
    computed = Computed(read(plan))
    found = follow(computed, float(range_km) * 1e3, float(speed_mps))
    return {
        'range_km': range_km,
        'speed_mps': speed_mps,
        'prfs': [_followed(one) for one in found.prfs],
        'clear': found.clear,
        'seen': found.seen,
        'probability': found.probability,
        'ghosts': None
        if found.ghosts is None
        else [
            {
                'range_km': [end / 1e3 for end in ghost.range_m],
                'speed_mps': list(ghost.speed_m_s),
                'prfs': list(ghost.prfs),
            }
            for ghost in found.ghosts
        ],
        'every_pri': _every_pri(strip(computed, float(range_km) * 1e3, float(speed_mps))),
    }


def _every_pri(each):
    return {
        'pri_us': (each.pri_s * 1e6).tolist(),
        'received_share': each.received.tolist(),
        'clear': each.clear.tolist(),
        'to_edge_km': (each.to_edge_m / 1e3).tolist(),
        'to_edge_mps': each.to_edge_m_s.tolist(),
        'until_blind_s': [finite(time) for time in each.until_blind_s.tolist()],
        'longest': each.longest,
    }


def timing(plan):
    """Return the timing table of a plan, for those who program it.

    Parameters
    ----------
    plan : dict
        A plan. [plan's units]

    Returns
    -------
    timing : dict
        ``head`` and ``rows`` in sending order, ``sum_counts``, ``rest_counts``, ``clock_mhz``, ``checksum``.
    """
    checked = read(plan)
    table = timing_table(checked, link.write(plan).rpartition('=')[2])
    head, rows = columns(table)
    return {
        'head': head,
        'rows': rows,
        'sum_counts': table.sum_counts,
        'rest_counts': table.rest_counts,
        'clock_mhz': table.clock_hz / 1e6,
        'checksum': table.checksum,
    }


def _followed(one):
    return {
        'apparent_range_km': one.apparent_range_m / 1e3,
        'apparent_speed_mps': one.apparent_speed_m_s,
        'later_pulses': one.later_pulses,
        'received_share': one.received,
        'in_notch': one.in_notch,
        'clutter_db': one.clutter_db,
        'snr_db': finite(one.snr_db),
        'scnr_db': finite(one.scnr_db),
        'probability': one.probability,
        'reasons': list(one.reasons),
    }


def margins_of(plan, finding):
    """Return how far each input can move, alone, before the verdict of a finding flips.

    Parameters
    ----------
    plan : dict
        A plan. [plan's units]
    finding : str
        Name of the finding. [unitless]

    Returns
    -------
    margins : dict
        ``finding``, ``met``, ``margins`` (``key``, ``label``, ``unit``, ``value``, ``from``, ``to``; tightest first;
        ``None`` where no flip was found), ``note``.
    """
    from pycore.margins import margins_shown

    return margins_shown(read(plan), finding)


def margins_told(plan, finding, so_far=None, tries=1, units=None):
    """Return the margins of a finding in words, or how far this slice of the work has come.

    Parameters
    ----------
    plan : dict
        A plan. [plan's units]
    finding : str
        Name of the finding. [unitless]
    so_far : mapping or None
        What the slice before gave under that name; ``None`` to begin. [unitless]
    tries : int
        Most verdicts that this slice works out. [unitless]
    units : mapping or None
        Units that the reader prefers. [unitless]

    Returns
    -------
    margins : dict
        ``done``; until then ``so_far`` and ``part``; at the end ``sentence``, ``head``, ``rows``, ``notes``.
    """
    from pycore.margins.slices import margins_in_words

    return margins_in_words(read(plan), finding, so_far, tries, reader_units(units))


def workings_of(plan, finding):
    """Return how one finding of a plan comes about.

    Parameters
    ----------
    plan : dict
        A plan. [plan's units]
    finding : str
        Name of the finding. [unitless]

    Returns
    -------
    workings : dict
        ``finding``, ``lines`` (each ``formula``, ``numbers``, ``result``, ``source``), ``value``, ``notes``.
    """
    from pycore.workings import workings

    return workings(Computed(read(plan)), finding)


def hand_over_of(plan, opened=None, units=None):
    """Return what is handed over with a plan: the timing table in words, and what changed.

    Parameters
    ----------
    plan : dict
        A plan. [plan's units]
    opened : dict or None
        The plan that was opened. [plan's units]
    units : mapping or None
        Units that the reader prefers. [unitless]

    Returns
    -------
    shown : dict
        ``head``, ``rows``, ``sentences``, ``csv``, ``text``, ``changed``.
    """
    before = None if opened is None else read(opened).document
    checksum = link.write(plan).rpartition('=')[2]
    return hand_over(read(plan), checksum, before, reader_units(units))


def conventions():
    """Return the conventions, each with a check by pocket calculator.

    Returns
    -------
    rows : list of dict
        ``name``, ``text``, ``check``, ``result``, ``unit``.
    """
    from pycore import conventions as table

    return table.conventions()


def conventions_of(plan):
    """Return what the models leave out, and the conventions with checks by the plan's own numbers.

    Parameters
    ----------
    plan : dict
        A plan. [plan's units]

    Returns
    -------
    shown : dict
        ``left_out`` and ``rows`` (``name``, ``text``, ``check``, ``result``, ``here``).
    """
    from pycore.checks_here import conventions_here

    return conventions_here(Computed(read(plan)))


def agreement_with(plan, text, units=None):
    """Return how far a plan agrees with a table of the reader's own.

    Parameters
    ----------
    plan : dict
        A plan. [plan's units]
    text : str
        Lines of range, speed, seen, as a spreadsheet writes them. [unitless]
    units : mapping or None
        Units that are meant where the table names none. [unitless]

    Returns
    -------
    agreement : dict
        ``cells``, ``agree``, ``sentences``, and the first cells that disagree as ``head`` and ``rows``.
    """
    from pycore.own_table import agreement, read_table

    return agreement(Computed(read(plan)), read_table(text, reader_units(units)))


ACTIONS = {
    'assess': assess,
    'note': note,
    'compare': compare,
    'moved': moved_between,
    'vary': vary,
    'look': look,
    'here': here,
    'typed-target': typed_target,
    'follow': follow_target,
    'timing': timing,
    'hand_over': hand_over_of,
    'margins': margins_of,
    'margins_in_words': margins_told,
    'workings': workings_of,
    'conventions': conventions,
    'conventions_here': conventions_of,
    'agreement': agreement_with,
}
"""What the worker in the browser may be asked for, by name."""
