"""The search for better plans in a worker: short steps of one slice after another, and lists of what was found.

Holds the one search that this worker is busy with; what slices have found goes to the page and comes back with the
request for a list, so that any worker can list what others have found.
"""

import time

from pycore.columns import found as found_columns
from pycore.columns import trade_off
from pycore.errors import InputError
from pycore.finder import Search, begun, goes_on, slices
from pycore.finder.asking import edited
from pycore.finder.found import Found, Miss, merged
from pycore.finder.limits import check
from pycore.finder.plan import limits_of, with_found
from pycore.finder.report import marked
from pycore.finder.sentence import from_the_plan, pieces
from pycore.finder.sight import floor_of
from pycore.finder.words import verdict
from pycore.link import written
from pycore.wording import percent, reader_units, with_unit

LISTED = 10
MOST_LISTED = 20  # with those that give up some of it for something else
UNLIKE = 0.004  # listed sets differ by this part of the shortest PRI at least

_now = {}  # the search of this worker: limits, search, slice and what is known of sets


def limits(plan, asked, edits=(), units=None):
    """Return the limits in words after some edits, what was refused, and why no search can start, if so."""
    units, refused = reader_units(units), []
    for edit in edits:
        try:
            asked = edited(plan, asked, edit, units)
        except InputError as error:
            refused.append({'edit': edit, 'key': error.field, 'message': error.message})
    try:
        given, blocked = check(limits_of(plan, asked)), None
    except InputError as error:
        given, blocked = limits_of(plan), error.message
    said = {'pieces': pieces(given, asked, units), 'wants': from_the_plan(given, units)}
    return {'asked': asked, 'refused': refused, 'blocked': blocked, **said}


def begin(plan, asked, seed):
    """Begin a search; nothing is tried yet."""
    bound = limits_of(plan, asked)
    search = Search(bound, seed)
    _now.clear()
    _now.update(plan=plan, limits=bound, search=search, number=None, slice=None)
    return {'slices': search_slices(search), 'floor': floor(bound)}


def search_slices(search):
    """Return how many slices there are; None for no end."""
    return 0 if search.ended else slices(search.limits)


def floor(bound):
    """Return the blind share that no set can avoid; none is said of a stagger."""
    return None if bound.stagger else floor_of(bound)


def run(number, ms):
    """Take steps of one slice for some milliseconds; the last step may take longer."""
    if _now['number'] != number:
        _now.update(number=number, slice=begun(_now['limits'], _now['search'].seed, number))
    one, end, more = _now['slice'], time.perf_counter() + ms / 1e3, True
    while more and time.perf_counter() < end:
        more = goes_on(one)
    found = one.ledger.found()
    best = {'best': found.best[0][0], **said(found.best[0][0])} if found.best else {}
    if not more:
        _now.update(number=None, slice=None)
    return {'tried': found.tried, 'steps': found.steps, **best, 'found': None if more else plain(found)}


def part():
    """Return what the slice under way has found so far."""
    return None if _now.get('slice') is None else plain(_now['slice'].ledger.found())


def said(score):
    """Return the best so far as a number and in words: the share seen, or the least response."""
    bound = _now['limits']
    if bound.stagger:
        return {'value': -score, 'text': f'dips to {with_unit(-score, "dB")}'}
    seen = 1.0 - _now.setdefault('floor', floor_of(bound)) - score
    return {'value': seen, 'text': f'{percent(seen, bound.visible)} seen, {percent(max(score, 0.0))} above the floor'}


def listed(parts, taken, units=None, against='time', chosen=None, most=MOST_LISTED):
    """Return the ranked list with its pictures, the trade-off, and what stands in the way where nothing was found.

    `taken` is the number of slices that are done, which decides whether all sets have been gone through.
    """
    units = reader_units(units)
    together = merged([found_of(one) for one in parts])
    search = _now['search'].with_parts([together], taken)
    some, mine = chosen_sets(search, most), own(search)
    return {
        'rows': [row(one, search.limits, units) for one in some],
        'own': None if mine is None else row(mine, search.limits, units),
        'heads': found_columns.heads(search.limits),
        'trade': trade_off.picture(some, mine, against, units, chosen),
        'verdict': verdict(search, units),
        'proved': search.proved,
        'merged': plain(together),
    }


def row(one, bound, units):
    """Return one plan of the list with the small picture of its blind zones."""
    sight = _now['search'].judge.sight(one.pri_counts) if bound.stagger else None
    return {**found_columns.row(one, bound, units), 'image': found_columns.image(bound, one.pri_counts, sight)}


def chosen_sets(search, most):
    """Return the best sets that are not all alike, and the best for less time, in the order of their scores."""
    found = search.found
    best = [one.pri_counts for one in search.ranked(LISTED, int(UNLIKE * search.limits.pri_counts[0]))]
    by_time = [pris for _, pris in sorted(found.by_time.values())]
    score = {pris: score for score, pris in (*found.best, *found.ends, *found.by_time.values())}
    pris = sorted(list(dict.fromkeys([*best, *by_time]))[:most], key=lambda one: (score[one], one))
    return marked([search.better(one) for one in pris])


def own(search):
    """Return what the plan itself gives, where sets are made like it."""
    mine = limits_of(_now['plan'])
    if (mine.n, mine.m) != (search.limits.n, search.limits.m):
        return None
    counts = own_counts(_now['plan'], search.limits)
    return search.better(search.judge.in_order(counts))


def own_counts(plan, bound):
    """Return the plan's own PRIs. [clock counts]"""
    return [round(pri * float(bound.clock_hz) / 1e6) for pri in plan['waveform']['pri_us']]


def use(plan, pris):
    """Return a plan that takes a found set, and its link."""
    bound = _now['limits']
    document = with_found(plan, _now['search'].better(tuple(pris)), bound.m, bound.clock_hz)
    return {'plan': document, 'link': written(document)}


def plain(found):
    """Return what was found as plain lists, for the page to keep."""
    near = found.nearest
    return {
        'best': [[score, list(pris)] for score, pris in found.best],
        'ends': [[score, list(pris)] for score, pris in found.ends],
        'by_time': [[step, score, list(pris)] for step, (score, pris) in found.by_time.items()],
        'misses': [[name, one.short, one.score, list(one.pris)] for name, one in found.misses.items()],
        'nearest': None if near is None else [near.short, near.score, list(near.pris)],
        'tried': int(found.tried),
        'steps': int(found.steps),
    }


def found_of(lists):
    """Return what was found, from its plain lists."""
    near = lists['nearest']
    return Found(
        tuple((score, tuple(pris)) for score, pris in lists['best']),
        tuple((score, tuple(pris)) for score, pris in lists['ends']),
        {step: (score, tuple(pris)) for step, score, pris in lists['by_time']},
        {name: Miss(short, score, tuple(pris)) for name, short, score, pris in lists['misses']},
        None if near is None else Miss(near[0], near[1], tuple(near[2])),
        lists['tried'],
        lists['steps'],
    )


ACTIONS = {
    'find limits': limits,
    'find begin': begin,
    'find run': run,
    'find part': part,
    'find list': listed,
    'find use': use,
}
