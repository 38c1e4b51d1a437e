"""Drawing by chance that comes out the same on every machine: a small seeded generator of our own.

SplitMix64: a counter that goes on by an odd constant, each of its states mixed
until every bit depends on every other. Whole numbers only up to the last step, so
no processor, library or version can change a search's list; and any stretch of the
sequence is one array operation, since the counter's later states are known.

References
----------
G. L. Steele, D. Lea, C. H. Flood, "Fast splittable pseudorandom number generators",
*OOPSLA '14*, ACM, 2014, pp. 453-472, doi:10.1145/2660193.2660195 (cited, not at hand). Constants and the outputs that
a test holds this against: Rosetta Code, task "Pseudo-random numbers/Splitmix64".
"""

import numpy as np

_WORD = (1 << 64) - 1
_GOLDEN = 0x9E3779B97F4A7C15
_MIX = ((30, 0xBF58476D1CE4E5B9), (27, 0x94D049BB133111EB))
_LAST_SHIFT = 31
_UNIT = 2.0**-53


class Chance:
    """A sequence of draws that a seed and the number of a slice fix.

    Parameters
    ----------
    seed : int
        Of the whole search; any whole number. [unitless]
    number : int
        Of the slice; each has a sequence of its own. [unitless]
    """

    def __init__(self, seed, number=0):
        # Each is mixed by itself, so that neighbouring seeds and slices start far apart in the one long cycle.
        self._state = mixed((mixed(seed & _WORD) + _GOLDEN * (number + 1)) & _WORD)

    def words(self, count):
        """Return the next 64-bit words of the sequence.

        Parameters
        ----------
        count : int
            How many. [unitless]

        Returns
        -------
        words : uint64 array, length count
            Every value as likely as any other.
        """
        state = np.uint64(self._state) + np.arange(1, count + 1, dtype=np.uint64) * np.uint64(_GOLDEN)
        for shift, factor in _MIX:
            state = (state ^ (state >> np.uint64(shift))) * np.uint64(factor)
        self._state = (self._state + count * _GOLDEN) & _WORD
        return state ^ (state >> np.uint64(_LAST_SHIFT))

    def parts(self, count):
        """Return numbers from 0 up to, not reaching, 1.

        Parameters
        ----------
        count : int
            How many. [unitless]

        Returns
        -------
        parts : float array, length count
            Multiples of 2**-53. [unitless]
        """
        return (self.words(count) >> np.uint64(11)).astype(np.float64) * _UNIT

    def part(self):
        """Return one number from 0 up to, not reaching, 1.

        Returns
        -------
        part : float
            A multiple of 2**-53. [unitless]
        """
        self._state = (self._state + _GOLDEN) & _WORD
        return (mixed(self._state, advance=0) >> 11) * _UNIT

    def below(self, count):
        """Return a whole number from 0 to one less than a count.

        Parameters
        ----------
        count : int
            How many there are to choose from; at most 2**32, so that none is favoured by more than 2**-21. [unitless]

        Returns
        -------
        number : int
            One of them. [unitless]
        """
        return int(self.part() * count)

    def shuffled(self, items):
        """Return things in an order drawn by chance.

        Parameters
        ----------
        items : sequence
            Whatever is to be shuffled. [any]

        Returns
        -------
        items : list
            The same in another order, each order as likely as any other.
        """
        out = list(items)
        for last in range(len(out) - 1, 0, -1):
            other = self.below(last + 1)
            out[last], out[other] = out[other], out[last]
        return out


def mixed(word, advance=1):
    """Return the output of the generator for one state.

    Parameters
    ----------
    word : int
        State, of 64 bits. [unitless]
    advance : int
        Steps of the counter to take before. [unitless]

    Returns
    -------
    word : int
        Of 64 bits; another one for every state. [unitless]
    """
    word = (word + advance * _GOLDEN) & _WORD
    for shift, factor in _MIX:
        word = ((word ^ (word >> shift)) * factor) & _WORD
    return word ^ (word >> _LAST_SHIFT)
