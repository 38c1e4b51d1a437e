"""Congruences: what one gate number on each PRF says about the true range, and how soon they repeat.

Everything is in whole gates or clock counts.
"""

import math
from fractions import Fraction

import numpy as np


def exact_span(periods, m, below=None):
    """Return the smallest least common multiple of any M of the periods: how far a set decodes without error.

    Published: D. J. Kinghorn and N. K. Williams, "The decodability of multiple-PRF radar waveforms", 1997 (from
    memory): the least common multiple of any M PRIs must reach the largest delay.

    Parameters
    ----------
    periods : sequence of int or Fraction, length N
        PRIs or blind speeds. [any]
    m : int
        How many PRFs must see the target. [unitless]
    below : int, Fraction or None
        Only multiples under this are looked for, which is what makes a limit cheap to check. [same as periods]

    Returns
    -------
    span : Fraction or None
        The smallest; None where none is under ``below``.
    """
    scale = math.lcm(*(Fraction(period).denominator for period in periods))
    whole = sorted(int(Fraction(period) * scale) for period in periods)
    best = None if below is None else math.ceil(Fraction(below) * scale)
    found = _smallest_multiple(whole, m, 1, best)
    return None if found is None or found == best else Fraction(found, scale)


def _smallest_multiple(periods, left, multiple, best):
    """Return the smallest multiple of ``multiple`` and ``left`` of the periods, or best where none is smaller."""
    if left == 0:
        return multiple
    for at in range(len(periods) - left + 1):
        longer = math.lcm(multiple, periods[at])
        if best is None or longer < best:
            best = _smallest_multiple(periods[at + 1 :], left - 1, longer, best)
    return best


def pairwise_coprime(moduli):
    """Return whether no two of the moduli share a factor, as the Chinese remainder theorem asks.

    Parameters
    ----------
    moduli : sequence of int, length N
        Gates in each PRI. [unitless]

    Returns
    -------
    coprime : bool
        True where the product of the moduli is their least common multiple.
    """
    return math.prod(moduli) == math.lcm(*moduli)


def remainder_weights(moduli):
    """Return the weights that turn one remainder for each modulus into the number that leaves them.

    Parameters
    ----------
    moduli : sequence of int, length N
        Pairwise without common factor. [unitless]

    Returns
    -------
    weights : tuple of int, length N
        The sum of weight times remainder, modulo the product of the moduli, is the number.

    References
    ----------
    M. A. Richards, *Fundamentals of Radar Signal Processing*, 2nd ed., McGraw-Hill 2014, eq. 5.129-5.132.
    """
    product = math.prod(moduli)
    others = [product // modulus for modulus in moduli]
    return tuple(other * pow(other, -1, modulus) for other, modulus in zip(others, moduli, strict=True))


def chinese_remainder(remainders, moduli):
    """Return the one number below the product of the moduli that leaves the given remainders.

    Parameters
    ----------
    remainders : sequence of int, length N
        Gate number on each PRF. [gates]
    moduli : sequence of int, length N
        Gates in each PRI, pairwise without common factor. [gates]

    Returns
    -------
    number : int
        In [0, product). There always is one, which is why one wrong remainder gives a wildly wrong number.
    """
    weights = remainder_weights(moduli)
    return sum(w * int(r) for w, r in zip(weights, remainders, strict=True)) % math.prod(moduli)


def consistent(remainders, moduli):
    """Return the numbers that leave the given remainders, whatever factors the moduli share.

    Two congruences agree only where their remainders do modulo the common factor; then they are one congruence modulo
    the least common multiple, and the next is joined to that (derived here).

    Parameters
    ----------
    remainders : sequence of int arrays, length N, each of shape S
        Gate numbers on each PRF, from 0 to one less than its modulus. [gates]
    moduli : sequence of int, length N
        Gates in each PRI. [gates]

    Returns
    -------
    number : int array, shape S
        Smallest number of 0 or above that leaves them; -1 where there is none. int64, or Python's own integers where
        the least common multiple calls for them. [gates]
    repeats : int
        Their least common multiple: the numbers after it are that far apart. [gates]
    """
    repeats = math.lcm(*moduli)
    kind = np.int64 if repeats * max(moduli) < 1 << 62 else object
    number, modulus = np.zeros((), dtype=kind), 1
    agrees = np.ones((), dtype=bool)
    for remainder, other in zip(remainders, moduli, strict=True):
        gap = np.asarray(remainder, dtype=kind) - number
        common = math.gcd(modulus, other)
        agrees = agrees & (gap % common == 0)
        steps = gap // common * pow(modulus // common, -1, other // common) % (other // common)
        number, modulus = number + modulus * steps, modulus * other // common
    return np.where(np.asarray(agrees, dtype=bool), np.asarray(number, dtype=kind), -1), repeats
