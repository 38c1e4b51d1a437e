"""What a set of PRFs does, in words: clear on all of them, on enough of them, on too few."""

from dataclasses import dataclass

from pycore.wording import count_word


@dataclass(frozen=True, slots=True)
class Looks:
    """The three things that can be said of a point of an axis; each follows ``is`` or ``are``.

    Parameters
    ----------
    all_clear : str
        Clear on every one. [unitless]
    enough : str
        Clear on at least M of them. [unitless]
    too_few : str
        Clear on fewer than M of them. [unitless]
    """

    all_clear: str
    enough: str
    too_few: str


def looks(n, m, blind):
    """Return what is said of M of N PRFs.

    Parameters
    ----------
    n : int
        Number of PRFs. [unitless]
    m : int
        Number that must be clear. [unitless]
    blind : str
        The word for a PRF that is not clear: ``'eclipsed'`` or ``'blind'``. [unitless]

    Returns
    -------
    looks : Looks
        Such as ``'clear on both PRFs'``, ``'eclipsed on both PRFs'``.
    """
    if n == 1:
        return Looks('clear', 'clear', blind)
    every = f'on {all_of(n)} PRFs'
    one = f'on at least one of the {count_word(n)} PRFs'
    some = one if m == 1 else f'on at least {count_word(m)} of the {count_word(n)} PRFs'
    too_few = f'{blind} {every if m == 1 else one}'
    if 1 < m < n:
        too_few = f'clear on fewer than {count_word(m)} of the {count_word(n)} PRFs'
    return Looks(f'clear {every}', f'clear {every if m == n else some}', too_few)


def all_of(n):
    """Return ``both`` or ``all eight``.

    Parameters
    ----------
    n : int
        How many, above one. [unitless]

    Returns
    -------
    text : str
        The words before the noun.
    """
    return 'both' if n == 2 else f'all {count_word(n)}'


def cycle_looks():
    """Return the same for the ranges of a stagger, whose intervals must all be clear.

    Returns
    -------
    looks : Looks
        In the words of a cycle.
    """
    everywhere = 'clear in every interval of the cycle'
    return Looks(everywhere, everywhere, 'lost in at least one interval of the cycle')
