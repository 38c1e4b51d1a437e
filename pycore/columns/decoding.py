"""Figure: where each PRF would place a target along the range, and where enough of them agree.

One lane for each PRF with its unfolded candidates, on top the lane of coincidence,
underneath how far range decodes without error and with blur. Sources: ``lanes``,
``candidates`` (of each PRF that sees the target), ``agree`` (the target's own place),
``ruled-out`` (places that the speed rules out), ``unseen`` (ghosts), ``spans``,
``span-names``, ``target``.
"""

from dataclasses import dataclass

import numpy as np

from pycore.candidates import agreement, comb
from pycore.columns.axes import range_axis
from pycore.columns.decoding_words import span_text, words
from pycore.columns.lanes import lane_bars, lane_range, middles, room_ticks
from pycore.columns.mark import across
from pycore.columns.named import names_at
from pycore.columns.prf_names import prf_names
from pycore.columns.view import WHOLE
from pycore.exact_spans import FARTHEST_M, exact_span_text
from pycore.follow import blur_half_widths, ghosts_of

NAME, TITLE = 'decoding', 'Decoding'

SIZE = {'width': 560, 'height': 270}
"""The plot where the page has not said how large it is. [px]"""

_SPANS_AT = np.array([-0.8, -1.7])
_SPANS_LOW = -2.2
_MANY = 9.0
_ALONE = -2.1, 0.5
_NO_BARS = np.zeros((0, 2))


@dataclass(frozen=True, slots=True)
class Subject:
    """The target whose decoding is shown: the followed one, or one in the middle of the coverage.

    Parameters
    ----------
    range_m, speed_m_s : float
        Where it is. [m, m/s]
    seen : list of bool
        PRFs that see it; all of them where none is followed. [unitless]
    followed : bool
        Whether it is the followed one. [unitless]
    """

    range_m: float
    speed_m_s: float
    seen: list
    followed: bool


@dataclass(frozen=True, slots=True)
class Decoded:
    """What the PRFs make of a subject.

    Parameters
    ----------
    subject : Subject
        The target. [m, m/s]
    own, ghosts, ruled_out : float array, shape (Z, 2)
        Ranges on which enough PRFs agree: its own, those that the speed allows too, those that it does not. [m]
    at_own : int
        Ghosts at its own range, with another speed. [unitless]
    """

    subject: Subject
    own: np.ndarray
    ghosts: np.ndarray
    ruled_out: np.ndarray
    at_own: int


def picture(computed, units, size=None, view=WHOLE):
    """Return the figure of decoding.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [SI]
    units : mapping
        Units that the reader prefers. [unitless]
    size : mapping or None
        Width and height of the plot, which say how many names there is room for. [px]
    view : View
        What the reader has chosen to look at. [unitless]

    Returns
    -------
    picture : dict
        Columns, ranges, labels, ticks and words.
    """
    plan, axis = computed.plan, range_axis(computed.plan.range_m, units)
    names = prf_names(plan, units)
    found = None if computed.is_stagger else decoded(computed, view.mark)
    n = 0 if computed.is_stagger else plan.n
    lane_ends = _ALONE if computed.is_stagger else (_SPANS_LOW * _apart(n), lane_range(n, n > 1)[1])
    lowest = lane_ends[0] if computed.is_stagger else 0.0
    return {
        'title': TITLE,
        **words(computed, found, axis, units, names),
        'columns': {
            **_lanes(computed, found, axis, n),
            **_spans(computed, axis),
            'target': across(view.mark and view.mark.range_m, axis, (lowest, lane_ends[1])),
        },
        'ranges': {'x': axis.ends, 'y': list(lane_ends)},
        'labels': {'x': axis.label, 'y': ''},
        'units': {'x': axis.unit},
        'ticks': {'y': _ticks(computed, names[:n], (size or SIZE)['height'] / (lane_ends[1] - lane_ends[0]))},
    }


def decoded(computed, mark):
    """Return what the PRFs make of the followed target, or of one in the middle of the coverage.

    Parameters
    ----------
    computed : Computed
        What the plan gives; not a stagger. [SI]
    mark : Mark or None
        The target that is followed. [m, m/s]

    Returns
    -------
    decoded : Decoded
        Places of agreement. [m]
    """
    subject = _subject(computed, mark)
    if sum(subject.seen) < computed.m:
        return Decoded(subject, _NO_BARS, _NO_BARS, _NO_BARS, 0)
    places = agreement(_combs(computed, subject), computed.m)
    ends = np.column_stack((places.start, places.stop))
    others = ghosts_of(computed, subject.range_m, subject.speed_m_s, subject.seen)
    own = (ends[:, 0] <= subject.range_m) & (subject.range_m <= ends[:, 1])
    ranges = np.array([ghost.range_m for ghost in others]).reshape(-1, 2)
    at = ranges.mean(axis=1)[:, None]
    holds = (ends[:, 0] <= at) & (at <= ends[:, 1])
    ghost = holds.any(axis=0) & ~own
    return Decoded(subject, ends[own], ends[ghost], ends[~own & ~ghost], int(holds[:, own].any(axis=1).sum()))


def _subject(computed, mark):
    if mark is not None:
        return Subject(mark.range_m, mark.speed_m_s, [not one.reasons for one in mark.followed.prfs], True)
    plan = computed.plan
    return Subject(float(np.mean(plan.range_m)), float(np.mean(plan.speed_m_s)), [True] * plan.n, False)


def _combs(computed, subject):
    """Return the candidates of each PRF that sees the target, as wide as the blur."""
    parts = zip(computed.unambiguous_range_m.tolist(), blur_half_widths(computed)[0], subject.seen, strict=True)
    nothing = np.zeros(0), np.zeros(0)
    return [
        comb(subject.range_m, reach, half, computed.plan.range_m) if seen else nothing for reach, half, seen in parts
    ]


def _lanes(computed, found, axis, n):
    """Return the candidates lane by lane, and the places of agreement in the top one."""
    if found is None:
        bars = lane_bars(np.zeros(0), axis)
        return dict.fromkeys(('lanes', 'candidates', 'agree', 'ruled-out', 'unseen'), bars)
    middle, top = middles(n)
    combs = _combs(computed, found.subject)
    prf = np.repeat(np.arange(n), [start.size for start, _ in combs])
    start, stop = (np.concatenate([np.zeros(0), *(ends[i] for ends in combs)]) for i in (0, 1))
    kinds = {'agree': found.own, 'ruled-out': found.ruled_out, 'unseen': found.ghosts}
    return {
        'lanes': lane_bars(np.append(middle, top) if n > 1 else middle, axis),
        'candidates': lane_bars(middle, axis, prf, start, stop),
        **{kind: _on_top(ends if n > 1 else _NO_BARS, top, axis) for kind, ends in kinds.items()},
    }


def _on_top(ends, top, axis):
    return lane_bars(np.array([top]), axis, np.zeros(len(ends), dtype=int), ends[:, 0], ends[:, 1])


def _spans(computed, axis):
    """Return how far range decodes from the radar on, as bars cut to the axis, with the figure in words."""
    span, (low, high) = computed.decode_range, axis.limits
    values = [span.exact, np.inf if span.blurred is None else span.blurred]
    reach = np.clip(values, low, high)
    exact = exact_span_text(span.exact, FARTHEST_M, axis.si, axis.unit)
    text = [f'to {exact}', span_text(span.blurred, span, axis)]
    if computed.is_stagger:
        values, reach, text = values[1:], reach[1:], text[1:]
    at = _SPANS_AT[: len(reach)] * (1.0 if computed.is_stagger else _apart(computed.plan.n))
    return {
        'spans': lane_bars(at, axis, np.arange(at.size), np.full(at.size, low), reach),
        'span-names': names_at(np.full(at.size, axis.ends[0]), at, text, ['center_left'] * at.size, 2.0),
    }


def _apart(n):
    """Return how much farther apart the spans stand among many lanes, which are low."""
    return max(1.0, n / _MANY)


def _ticks(computed, names, px_per_lane):
    """Return the names of the lanes: spans at the bottom, PRFs, the lane that counts."""
    if computed.is_stagger:
        return {'at': [float(_SPANS_AT[0])], 'text': ['unambiguous']}
    counted = f'{computed.m} of {computed.plan.n}' if computed.plan.n > 1 else None
    lanes = room_ticks(names, counted, px_per_lane)
    at = _SPANS_AT[::-1] * _apart(computed.plan.n)
    return {'at': [*at.tolist(), *lanes['at']], 'text': ['with blur', 'no error', *lanes['text']]}
