"""The limits of a search in words, for the page: pieces of text, live numbers, choices, and words that do something.

A piece is ``{'text'}``, ``{'key', 'shown', 'value'}``, ``{'choice', 'value', 'options'}`` or
``{'set', 'value', 'text'}`` (a word that gives a limit a value, or takes it away again).
"""

from fractions import Fraction

from pycore.finder.keys import BY_PATH
from pycore.quantity import as_number
from pycore.shown import digits, shown_digits, shown_unit, shown_value
from pycore.wording import as_typed_percent, capitalised, in_range_unit, in_speed_unit, listed, trimmed, with_unit

_GRID_WORDS = (('clock', 'clock counts'), ('gates', 'range gates'), ('steps', 'steps'))
_DECODE_WORDS = (('blur', 'with blur'), ('exact', 'exactly'), ('none', 'not at all'))


def pieces(limits, asked, units):
    """Return the sentence.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]
    asked : mapping
        Which of it was asked for, as in :data:`pycore.finder.plan.ASKED`. [unitless]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    pieces : list of dict
        In reading order.
    """
    say = _Said(limits, asked, units)
    first = say.stagger() if limits.stagger else say.dwells()
    said = [*first, *say.decoding(), *say.time(), *say.holes(), *say.lists(), ' ', *say.offers()]
    return [{'text': piece} if isinstance(piece, str) else piece for piece in said if piece]


def from_the_plan(limits, units):
    """Return in one sentence what else binds: what the plan itself wants.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]
    units : mapping
        Units that the reader prefers. [unitless]

    Returns
    -------
    text : str
        A sentence.
    """
    (near, unit), (far, _) = (in_range_unit(end, units) for end in limits.range_m)
    (slow, speed_unit), (fast, _) = (in_speed_unit(end, units) for end in limits.speed_m_s)
    coverage = f'from {trimmed(near)} to {trimmed(far)} {unit} and from {digits(slow)} to {digits(fast)} {speed_unit}'
    part = 'the coverage' if limits.visible is None else f'at least {as_typed_percent(limits.visible)} of the coverage'
    wants = [f'{part} {coverage}']
    for one in limits.must_see:
        wants.append(f'{one.name} seen {"in full" if one.visible >= 1.0 else f"to {as_typed_percent(one.visible)}"}')
    if limits.duty_limit is not None:
        wants.append(f'a duty of at most {as_typed_percent(limits.duty_limit)}')
    if limits.unseen_s is not None:
        wants.append(f'no target out of sight for more than {with_unit(limits.unseen_s, "s")}')
    return f'{capitalised(f"the plan asks for {listed(wants)}")}.'


class _Said:
    """Writes the parts of one sentence."""

    def __init__(self, limits, asked, units):
        self.limits, self.asked, self.units = limits, asked, units

    def dwells(self):
        many = self.limits.n
        number, needs = self._number('n', many), self._number('m', self.limits.m)
        who = [' of which must see a target,'] if many > 1 else [' of which must see it,']
        apart = [', any two at least ', self._number('apart_us', self._us(self.limits.apart_counts)), ' apart']
        return [
            *('Look for ', number, f' PRF{"s" * (many > 1)}, ', needs, *who, ' at intervals from '),
            *(*self._interval('pri_us', self.limits.pri_counts), *self._grid(), *(apart if many > 1 else []), '. '),
        ]

    def stagger(self):
        cycle, least = self.limits.stagger, self._number('spread', self.limits.stagger.spread)
        return [
            *('Look for ', self._number('n', self.limits.n), ' intervals that repeat, from '),
            *(*self._interval('pri_us', self.limits.pri_counts), *self._grid(), ', with a mean from '),
            *(*self._interval('mean_us', cycle.mean_counts), ', the longest at most ', least),
            ' times the shortest; best is the one whose response dips least. ',
        ]

    def decoding(self):
        limits = self.limits
        if limits.stagger:
            return []
        (far, unit) = in_range_unit(limits.decode_m or 0.0, self.units)
        (wide, speed_unit) = in_speed_unit(limits.decode_m_s or 0.0, self.units)
        wanted = [
            *([f'ranges to {trimmed(far)} {unit}'] if limits.decode_m else []),
            *([f'speeds over {trimmed(wide)} {speed_unit}'] if limits.decode_m_s else []),
        ]
        if not wanted:
            return ['The plan does not ask for decoding. ']
        return [
            f'{capitalised(listed(wanted))} must decode ',
            self._choice('decode', limits.decode, _DECODE_WORDS),
            '. ',
        ]

    def time(self):
        each = self.limits.places[0].cpi_s
        sent = []
        if each is not None and not self.limits.stagger:
            sent = ['Each CPI sends the pulses that fit into ', self._number('cpi_ms', each * 1e3), '. ']
        if self.limits.time_s is None:
            return sent
        time_ms = self.asked.get('time_ms') or float(f'{self.limits.time_s * 1e3:.4g}')
        what = 'The CPI must fit into ' if self.limits.stagger or self.limits.n == 1 else 'All CPIs must fit into '
        return [*sent, what, self._number('time_ms', time_ms), '. ']

    def holes(self):
        limits = self.limits
        if limits.hole_m is None and limits.hole_m_s is None:
            return []
        long = ['longer than ', self._number('hole_km', limits.hole_m / 1e3)] if limits.hole_m is not None else []
        wide = ['wider than ', self._number('hole_mps', limits.hole_m_s)] if limits.hole_m_s is not None else []
        return ['No hole may be ', *long, *([' and '] if long and wide else []), *wide, '. ']

    def lists(self):
        kept, avoided = self.asked.get('keep_us'), self.asked.get('avoid_us')
        keep = ['Every set keeps ', self._list('keep_us', kept), '. '] if kept else []
        pairs = [end for pair in avoided or () for end in pair]
        return [*keep, *(['No PRI lies from ', self._list('avoid_us', pairs, avoided), '. '] if avoided else [])]

    def offers(self):
        """Words that give what is not limited yet a limit, or leave it to the plan again."""
        limits, asked = self.limits, self.asked
        first = self._us(limits.pri_counts[0])
        stagger = limits.stagger is not None
        offers = [
            ('keep_us', [self._us(limits.pri_counts[1])], 'Keep a PRI', not asked.get('keep_us')),
            ('avoid_us', [[first, first]], 'Avoid an interval', not asked.get('avoid_us')),
            ('hole_km', 5.0, 'Limit holes', limits.hole_m is None),
            ('hole_mps', 10.0, 'and their width', limits.hole_m is not None and limits.hole_m_s is None),
            ('cpi_ms', self._own_cpi_ms(), 'Fix the time of a CPI', limits.places[0].cpi_s is None and not stagger),
            ('time_ms', 20.0, 'Limit the time', limits.time_s is None),
        ]
        words = [{'set': f'find.{name}', 'value': value, 'text': text} for name, value, text, given in offers if given]
        return [*words, {'do': 'as-the-plan', 'text': 'All as in the plan'}] if asked else words

    def _own_cpi_ms(self):
        """Return the time that the plan's pulses take in the middle of the interval."""
        mean = sum(self.limits.pri_counts) / 2
        return float(f'{self.limits.places[0].pulses * mean / float(self.limits.clock_hz) * 1e3:.2g}')

    def _grid(self):
        limits = self.limits
        grid = 'gates' if limits.whole_gates else 'steps' if self.asked.get('step_us') else 'clock'
        of = [' of ', self._number('step_us', self.asked['step_us'])] if grid == 'steps' else []
        return [' in whole ', self._choice('grid', grid, _GRID_WORDS), *of]

    def _interval(self, name, counts):
        key = BY_PATH[f'find.{name}']
        low, high = (as_number(Fraction(end) * 10**6 / self.limits.clock_hz) for end in counts)
        first = {'key': f'{key.path}.0', 'shown': shown_digits(key, low, self.units), 'value': low}
        return [first, ' to ', {'key': f'{key.path}.1', 'shown': shown_value(key, high, self.units), 'value': high}]

    def _number(self, name, value):
        key = BY_PATH[f'find.{name}']
        plain = as_number(Fraction(f'{value:.12g}'))
        return {'key': key.path, 'shown': shown_value(key, plain, self.units), 'value': plain}

    def _list(self, name, values, pairs=None):
        """A list is one text: typed anew as a whole."""
        key = BY_PATH[f'find.{name}']
        unit = shown_unit(key, self.units)
        each = [shown_digits(key, value, self.units) for value in values]
        if pairs:
            each = [f'{low} to {high}' for low, high in zip(each[::2], each[1::2], strict=True)]
        return {'key': key.path, 'shown': f'{listed(each)}\N{NARROW NO-BREAK SPACE}{unit}', 'value': None}

    def _choice(self, name, value, words):
        return {'choice': f'find.{name}', 'value': value, 'options': [list(pair) for pair in words]}

    def _us(self, counts):
        return as_number(Fraction(counts) * 10**6 / self.limits.clock_hz)
