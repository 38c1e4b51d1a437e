"""The timing table of a plan: what the radar's timing unit is told, in exact counts of its clock.

Times come from the decimals that were typed, by way of fractions; what is a whole
number of counts is an integer here, and only what is not stays a fraction.
"""

import math
from dataclasses import dataclass
from fractions import Fraction

from pycore.dwell import filter_width
from pycore.receiver import NearPulse, open_windows


@dataclass(frozen=True, slots=True)
class TimingRow:
    """One PRI of a plan; times in clock counts are integers wherever they are whole.

    Parameters
    ----------
    pri_counts : int
        Interval. [clock counts]
    pri_s, prf_hz, carrier_hz : float
        The same in time, its inverse, the carrier. [s, Hz, Hz]
    pulse_counts : int or Fraction
        Pulse. [clock counts]
    near_counts : tuple of (int or Fraction, int or Fraction) or None
        When the near pulse starts, after the pulse's start, and its length. [clock counts]
    open_counts : tuple of (int or Fraction, int or Fraction)
        When the receiver opens and shuts, after the pulse's start; none where it never opens. [clock counts]
    fill_pulses, pulses : int
        Pulses of this interval sent ahead, and those that count. [unitless]
    start_counts, length_counts : int
        Start of the CPI, or of this interval in a stagger's cycle, and the length of all its pulses. [clock counts]
    duty : float
        Time sent over interval, near pulse included. [unitless]
    filter_width_m_s : float
        Width of a Doppler filter. [m/s]
    """

    pri_counts: int
    pri_s: float
    prf_hz: float
    carrier_hz: float
    pulse_counts: int | Fraction
    near_counts: tuple | None
    open_counts: tuple
    fill_pulses: int
    pulses: int
    start_counts: int
    length_counts: int
    duty: float
    filter_width_m_s: float


@dataclass(frozen=True, slots=True)
class Timing:
    """The timing table.

    Parameters
    ----------
    clock_hz : float
        Timing clock. [Hz]
    rows : tuple of TimingRow
        In sending order. [unitless]
    sum_counts : int
        Length of one set. [clock counts]
    rest_counts : int or None
        Whole counts of the time on target that are left, below 0 where the set does not fit; ``None`` where no time
        on target is given. [clock counts]
    checksum : str
        Of the plan. [unitless]
    """

    clock_hz: float
    rows: tuple[TimingRow, ...]
    sum_counts: int
    rest_counts: int | None
    checksum: str


def in_counts(time_s, clock_hz):
    """Return a time in counts of the clock, from its shortest decimals.

    Parameters
    ----------
    time_s : float
        A time. [s]
    clock_hz : float
        Timing clock. [Hz]

    Returns
    -------
    counts : int or Fraction
        An integer where it is whole. [clock counts]
    """
    return _whole(Fraction(str(float(time_s))) * Fraction(str(float(clock_hz))))


def _whole(counts):
    """Return a whole fraction as an integer, any other as it is."""
    return int(counts) if counts == int(counts) else counts


def timing_table(plan, checksum=''):
    """Return the timing table of a plan.

    Parameters
    ----------
    plan : Plan
        The plan. [SI]
    checksum : str
        Its checksum, to be printed with the table. [unitless]

    Returns
    -------
    timing : Timing
        A row for each PRI. In a stagger, one CPI, a row counts its interval as often as the cycle comes to it.
    """
    sent = _sent(plan)
    lengths = [(fill + counted) * int(count) for (fill, counted), count in zip(sent, plan.pri_counts, strict=True)]
    steps = [int(count) for count in plan.pri_counts] if plan.kind == 'stagger' else lengths
    starts = [sum(steps[:index]) for index in range(plan.n)]
    widths = _filter_widths(plan, sent)
    rows = tuple(
        _row(plan, index, sent[index], starts[index], lengths[index], widths[index]) for index in range(plan.n)
    )
    total, available = sum(lengths), plan.time_on_target_s
    rest = None if available is None else math.floor(in_counts(available, plan.clock_hz)) - total
    return Timing(plan.clock_hz, rows, total, rest, checksum)


def _sent(plan):
    """Return, for each PRI, its fill pulses and its pulses that count."""
    if plan.kind != 'stagger':
        return list(zip(plan.fill_pulses.tolist(), plan.pulses.tolist(), strict=True))
    fill, total = int(plan.fill_pulses[0]), int(plan.fill_pulses[0] + plan.pulses[0])
    ahead = [len(range(index, fill, plan.n)) for index in range(plan.n)]
    return [(some, len(range(index, total, plan.n)) - some) for index, some in enumerate(ahead)]


def _filter_widths(plan, sent):
    """Return the width of a Doppler filter for each PRI; a stagger has one, of its whole CPI."""
    if plan.kind != 'stagger':
        return filter_width(plan.pri_s, plan.pulses, plan.wavelength_m).tolist()
    counted_s = sum(counted * pri for (_, counted), pri in zip(sent, plan.pri_s.tolist(), strict=True))
    return (plan.wavelength_m / (2.0 * counted_s)).tolist()


def _row(plan, index, sent, start_counts, length_counts, width_m_s):
    """Return the row of one PRI."""
    count, clock = int(plan.pri_counts[index]), plan.clock_hz
    pulse, recovery, guard = (in_counts(time, clock) for time in (plan.pulse_s[index], plan.recovery_s, plan.guard_s))
    near = None
    if plan.near is not None:
        near = NearPulse(in_counts(plan.near.pulse_s, clock), in_counts(plan.near.sent_at_s, clock), 0)
    windows = open_windows(count, pulse, recovery, guard, near)
    return TimingRow(
        pri_counts=count,
        pri_s=float(plan.pri_s[index]),
        prf_hz=1.0 / float(plan.pri_s[index]),
        carrier_hz=float(plan.carrier_hz[index]),
        pulse_counts=pulse,
        near_counts=None if near is None else (near.sent_at_s, near.pulse_s),
        open_counts=tuple((_whole(Fraction(opens)), _whole(Fraction(shuts))) for opens, shuts in windows),
        fill_pulses=sent[0],
        pulses=sent[1],
        start_counts=start_counts,
        length_counts=length_counts,
        duty=float((pulse + (near.pulse_s if near else 0)) / Fraction(count)),
        filter_width_m_s=width_m_s,
    )


def columns(timing):
    """Return the timing table as plain rows, for printing.

    Parameters
    ----------
    timing : Timing
        The table. [unitless]

    Returns
    -------
    head : list of str
        Names of the columns, with units.
    rows : list of list
        Integers where whole, floats otherwise, ``None`` where there is nothing.
    """
    near = any(row.near_counts for row in timing.rows)
    windows = max([1, *(len(row.open_counts) for row in timing.rows)])
    opening = [f'receiver_{what}{_number(k, windows)}_counts' for k in range(windows) for what in ('opens', 'shuts')]
    head = ['pri_counts', 'pri_us', 'prf_hz', 'carrier_ghz', 'pulse_counts']
    head += ['near_at_counts', 'near_pulse_counts'] if near else []
    head += [*opening, 'fill_pulses', 'pulses', 'start_counts', 'length_counts', 'duty_pct', 'filter_width_mps']
    return head, [_plain(row, near, windows) for row in timing.rows]


def _number(index, of):
    return f'_{index + 1}' if of > 1 else ''


def _plain(row, near, windows):
    """Return one row as plain numbers."""
    opening = [end for window in row.open_counts for end in window]
    pri_us = float(Fraction(str(row.pri_s)) * 10**6)
    cells = [row.pri_counts, pri_us, row.prf_hz, row.carrier_hz / 1e9, row.pulse_counts]
    cells += list(row.near_counts or (None, None)) if near else []
    cells += opening + [None] * (2 * windows - len(opening))
    cells += [row.fill_pulses, row.pulses, row.start_counts, row.length_counts, row.duty * 100.0, row.filter_width_m_s]
    return [float(cell) if isinstance(cell, Fraction) else cell for cell in cells]
