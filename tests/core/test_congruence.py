"""Congruences against sympy's and against plain counting."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from sympy.ntheory.modular import crt as sympy_crt
from sympy.ntheory.modular import solve_congruence as sympy_solve

from pycore.congruence import chinese_remainder, consistent, exact_span, pairwise_coprime, remainder_weights

PRIMES = (2, 3, 5, 7, 11, 13, 17, 19, 23, 29)


def systems(largest):
    """Draw moduli and a remainder for each, sharing factors or not, answerable or not."""
    one = st.integers(1, largest).flatmap(lambda modulus: st.tuples(st.just(modulus), st.integers(0, modulus - 1)))
    return st.lists(one, min_size=1, max_size=5)


class TestOneNumberForTheRemainders:
    """Without common factor there is always exactly one number below the product."""

    @given(st.lists(st.sampled_from(PRIMES), min_size=1, max_size=6, unique=True), st.integers(0, 10**9))
    def test_the_number_is_the_one_sympy_finds(self, moduli, number):
        remainders = [number % modulus for modulus in moduli]
        expected, product = sympy_crt(moduli, remainders)
        assert chinese_remainder(remainders, moduli) == expected == number % math.prod(moduli)
        assert product == math.prod(moduli)

    @given(st.lists(st.sampled_from(PRIMES), min_size=2, max_size=6, unique=True))
    def test_each_weight_leaves_one_on_its_own_modulus_and_nothing_on_the_others(self, moduli):
        for at, weight in enumerate(remainder_weights(moduli)):
            assert [weight % modulus for modulus in moduli] == [int(at == other) for other in range(len(moduli))]

    def test_moduli_that_share_a_factor_are_told_from_those_that_do_not(self):
        assert pairwise_coprime([11, 12, 13])
        assert not pairwise_coprime([12, 13, 15])


class TestConsistentCongruences:
    """With common factors there may be no number at all."""

    @given(systems(40))
    def test_the_number_is_the_one_sympy_finds_or_none(self, system):
        moduli, remainders = [m for m, _ in system], [r for _, r in system]
        number, repeats = consistent(remainders, moduli)
        expected = sympy_solve(*zip(remainders, moduli, strict=True))
        assert (None if number < 0 else (int(number), repeats)) == expected

    @given(systems(12))
    def test_the_number_is_the_first_that_counting_finds(self, system):
        moduli, remainders = [m for m, _ in system], [r for _, r in system]
        fits = (x for x in range(math.lcm(*moduli)) if all(x % m == r for m, r in system))
        assert int(consistent(remainders, moduli)[0]) == next(fits, -1)

    def test_an_array_of_remainders_is_solved_as_each_alone(self):
        moduli = [12, 18, 30]
        grid = np.stack([each.ravel() for each in np.meshgrid(*(np.arange(m) for m in moduli), indexing='ij')])
        together, _ = consistent(list(grid), moduli)
        alone = [int(consistent(column.tolist(), moduli)[0]) for column in grid.T]
        assert together.tolist() == alone
        assert together.dtype == np.int64

    def test_moduli_beyond_sixty_four_bits_are_solved_in_long_integers(self):
        moduli, number = [10**9, 10**9 + 1, 10**9 + 3], 10**26 + 7
        found, repeats = consistent([number % m for m in moduli], moduli)
        assert int(found) == number
        assert repeats == math.lcm(*moduli)

    def test_moduli_whose_multiple_is_just_beyond_sixty_four_bits_are_solved_too(self):
        moduli, number = [4_194_301, 4_194_287, 4_194_277], 2**65 + 12_345
        found, repeats = consistent([number % m for m in moduli], moduli)
        assert int(found) == number % repeats


@pytest.mark.parametrize(('periods', 'm', 'span'), [([7], 1, 7), ([6, 4], 2, 12), ([6, 4], 1, 4), ([8, 8, 3], 2, 8)])
def test_the_exact_span_is_the_least_of_the_least_common_multiples(periods, m, span):
    assert exact_span(periods, m) == span
