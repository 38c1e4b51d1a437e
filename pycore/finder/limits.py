"""What a search for better plans has to keep to, in SI units and whole clock counts.

A plan has N places, one for each PRI. A place fixes what goes with its PRI: the
carrier, the pulse, the notch, the pulses sent. Places that are alike can change
their PRIs without changing the plan, so their PRIs are always given in rising order.
"""

from dataclasses import dataclass, field
from fractions import Fraction

from pycore.eclipsing import NearPulse
from pycore.errors import InputError

MOST_COUNTS = 10_000_000
"""Longest PRI. [clock counts]"""

MOST_PRIS = 16
"""Most PRIs in one plan. [unitless]"""


@dataclass(frozen=True, slots=True)
class Place:
    """What belongs to one PRI of the plan, whatever its length.

    Parameters
    ----------
    wavelength_m : float
        Wavelength. [m]
    pulse_s : float
        Pulse length. [s]
    notch_m_s : float
        Half width of the notch. [m/s]
    carrier_hz : float
        Carrier, the decimal that was typed; only the speed decoding looks at it. [Hz]
    bandwidth_hz : float
        Bandwidth; a range gate is 1/B. [Hz]
    pulses : int
        Pulses that count. [unitless]
    fill_pulses : int
        Fill pulses ahead of them. [unitless]
    cpi_s : float or None
        Time for the pulses that count: as many as fit are sent, at least one, instead of ``pulses``. [s]
    """

    wavelength_m: float
    pulse_s: float
    notch_m_s: float
    carrier_hz: float = 10e9
    bandwidth_hz: float = 1e6
    pulses: int = 1
    fill_pulses: int = 0
    cpi_s: float | None = None


@dataclass(frozen=True, slots=True)
class Region:
    """A part of the coverage that must be seen.

    Parameters
    ----------
    name : str
        What the plan calls it. [unitless]
    range_m, speed_m_s : pair of float
        Its ranges and radial speeds, inside the coverage. [m, m/s]
    visible : float
        Least share of it that must be seen. [unitless]
    """

    name: str
    range_m: tuple[float, float]
    speed_m_s: tuple[float, float]
    visible: float = 1.0


@dataclass(frozen=True, slots=True)
class Limits:
    """Everything that binds a search. ``check`` refuses what cannot be searched.

    Parameters
    ----------
    places : tuple of Place, length N
        One for each PRI; of a stagger, all alike. [mixed]
    m : int
        How many PRFs must be clear; 1 for a stagger. [unitless]
    clock_hz : int or Fraction
        Timing clock. [Hz]
    pri_counts : pair of int
        Shortest and longest PRI, both allowed. [clock counts]
    range_m, speed_m_s : pair of float
        The coverage. [m, m/s]
    step_counts : int
        PRIs are the shortest plus a multiple of this. [clock counts]
    whole_gates : bool
        Whether every PRI must be a whole number of its place's range gates. [unitless]
    keep : tuple of (int, int)
        Places (from 0) and the PRIs that stay in them. [unitless, clock counts]
    avoid : tuple of (int, int)
        Intervals of PRIs that are not allowed, ends included. [clock counts]
    apart_counts : int
        Least difference between any two PRIs; of different places, 0 lets them be equal. [clock counts]
    recovery_s, guard_s : float
        Times that the receiver stays shut after and before a pulse. [s]
    received_min : float
        Least received share. [unitless]
    near : NearPulse or None
        A second, short pulse in every interval. [s, m]
    duty_limit : float or None
        Largest duty of any PRI. [unitless]
    time_s : float or None
        Time on target, which all CPIs with their fill pulses must fit into. [s]
    decode : str
        ``'blur'``, ``'exact'`` or ``'none'``: by which span decoding is judged. [unitless]
    decode_m : float or None
        How far ranges must decode. [m]
    decode_m_s : float or None
        Over how wide a span speeds must decode. [m/s]
    blur_gates : Fraction or None
        Blur; ``None`` for the rule (half a gate where all PRIs are whole gates, otherwise one). [gates]
    decode_motion : bool
        Whether the target's motion from the first CPI to the last counts as blur. [unitless]
    visible : float or None
        Least share of the coverage that must be seen. [unitless]
    must_see : tuple of Region
        Regions that bind. [m, m/s]
    hole_m, hole_m_s : float or None
        A hole longer than the one and wider than the other is not tolerated; ``None`` for both: any is. [m, m/s]
    unseen_s : float or None
        Longest time that a target flying along the beam may stay out of sight. [s]
    stagger : Cycle or None
        Limits of a stagger's cycle; ``None`` where each PRI is a CPI of its own. [mixed]
    """

    places: tuple[Place, ...]
    m: int
    clock_hz: int | Fraction
    pri_counts: tuple[int, int]
    range_m: tuple[float, float]
    speed_m_s: tuple[float, float]
    step_counts: int = 1
    whole_gates: bool = False
    keep: tuple[tuple[int, int], ...] = ()
    avoid: tuple[tuple[int, int], ...] = ()
    apart_counts: int = 1
    recovery_s: float = 0.0
    guard_s: float = 0.0
    received_min: float = 0.5
    near: NearPulse | None = None
    duty_limit: float | None = None
    time_s: float | None = None
    decode: str = 'blur'
    decode_m: float | None = None
    decode_m_s: float | None = None
    blur_gates: Fraction | None = None
    decode_motion: bool = False
    visible: float | None = None
    must_see: tuple[Region, ...] = ()
    hole_m: float | None = None
    hole_m_s: float | None = None
    unseen_s: float | None = None
    stagger: 'Cycle | None' = None

    @property
    def n(self):
        """Number of PRIs."""
        return len(self.places)

    @property
    def kinds(self):
        """For each place, the first place that is like it."""
        return tuple(self.places.index(place) for place in self.places)


@dataclass(frozen=True, slots=True)
class Cycle:
    """Limits of a stagger: PRIs that follow each other pulse by pulse.

    Parameters
    ----------
    weights : tuple of float
        The canceller's weights. [unitless]
    user_weights : bool
        Whether they are the reader's own, and not a binomial canceller's. [unitless]
    response_min_db : float
        Response from which on a speed counts as clear. [dB]
    spread : float
        Largest ratio of the longest to the shortest PRI. [unitless]
    mean_counts : pair of float
        Least and largest mean PRI. [clock counts]
    dip_m_s : pair of float or None
        Speeds over which the least response is judged; ``None`` for the wanted speeds beyond the rise out of the
        first notch, as a finding judges them. [m/s]
    dip_db : float or None
        Least response that is wanted there. [dB]
    """

    weights: tuple[float, ...] = (1.0, -2.0, 1.0)
    user_weights: bool = False
    response_min_db: float = -10.0
    spread: float = 2.0
    mean_counts: tuple[float, float] = field(default=(0.0, float(MOST_COUNTS)))
    dip_m_s: tuple[float, float] | None = None
    dip_db: float | None = None


def check(limits):
    """Refuse, in one sentence, limits that no search can start from.

    Parameters
    ----------
    limits : Limits
        What binds the search. [mixed]

    Returns
    -------
    limits : Limits
        The same.
    """
    low, high = limits.pri_counts
    _refuse(not 1 <= limits.n <= MOST_PRIS, 'n', f'A plan has 1 to {MOST_PRIS} PRIs; got {limits.n}.')
    _refuse(not 1 <= limits.m <= limits.n, 'm', f'M must be from 1 to the {limits.n} PRIs; got {limits.m}.')
    _refuse(not limits.clock_hz > 0, 'clock', f'The timing clock must be above 0 Hz; got {limits.clock_hz}.')
    _refuse(
        high > MOST_COUNTS,
        'pri',
        f'The longest PRI must be at most {MOST_COUNTS} clock counts; got {high}: take a coarser clock.',
    )
    _refuse(not 1 <= low <= high, 'pri', f'The PRI interval is empty: from {low} to {high} clock counts.')
    _refuse(limits.step_counts < 1, 'step', f'PRIs must step by at least one clock count; got {limits.step_counts}.')
    _refuse(limits.apart_counts < 0, 'apart', f'The least difference must not be negative; got {limits.apart_counts}.')
    for name, (a, b) in (('range', limits.range_m), ('speed', limits.speed_m_s)):
        _refuse(not a < b, name, f'The coverage in {name} is empty: from {a} to {b}.')
    _refuse(
        limits.decode not in ('blur', 'exact', 'none'),
        'decode',
        f'Decoding is judged by blur, exact or none; got {limits.decode}.',
    )
    places = [place for place, _ in limits.keep]
    _refuse(len(set(places)) < len(places), 'keep', 'Two PRIs to keep have the same place.')
    _refuse(
        any(not 0 <= place < limits.n for place in places),
        'keep',
        f'More PRIs to keep than the {limits.n} of the plan.',
    )
    _refuse(
        limits.stagger is not None and (limits.m != 1 or len(set(limits.places)) > 1),
        'm',
        'A stagger is one CPI: its pulses are alike and it gives one verdict.',
    )
    return limits


def _refuse(wrong, name, message):
    if wrong:
        raise InputError(name, message)
