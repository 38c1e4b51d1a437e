"""The figures' colours: blind against seen, in light and dark, in grey and on a projector."""

import re
from itertools import pairwise
from pathlib import Path

import pytest

from pycore.columns.classes import NAMES
from pycore.columns.detection import STEPS
from webapp.figures.palette import CLASS_ROLES, PALETTE, SCHEMES, STEP_ROLES
from webapp.figures.style import colours

STYLE = Path(__file__).parents[2] / 'webapp' / 'page' / 'styles' / 'base.css'
DARK_CLASSES = ('none', 'none-hatch', 'too-few', 'too-few-edge')
LIGHT_CLASSES = ('just-enough', 'more', 'all')
AGAINST_KEPT = ('lost', 'lost-hatch', 'gained', 'gained-dot', 'still-blind')


def luminance(colour):
    """Relative luminance of an sRGB colour: WCAG 2.2, definition of relative luminance."""
    parts = [int(colour[i : i + 2], 16) / 255 for i in (1, 3, 5)]
    linear = [part / 12.92 if part <= 0.04045 else ((part + 0.055) / 1.055) ** 2.4 for part in parts]
    return 0.2126 * linear[0] + 0.7152 * linear[1] + 0.0722 * linear[2]


def contrast(one, other):
    """Contrast ratio of two colours: WCAG 2.2, definition of contrast ratio."""
    darker, lighter = sorted((luminance(one), luminance(other)))
    return (lighter + 0.05) / (darker + 0.05)


def test_contrast_is_that_of_the_standard_at_its_ends():
    assert contrast('#ffffff', '#000000') == pytest.approx(21)
    assert contrast('#777777', '#ffffff') == pytest.approx(4.48, abs=0.01)


def test_every_class_of_the_map_has_a_colour():
    assert set(CLASS_ROLES) == set(NAMES) == {*DARK_CLASSES, *LIGHT_CLASSES, 'dot', *AGAINST_KEPT}
    assert set(CLASS_ROLES.values()) <= set(PALETTE)


@pytest.mark.parametrize('scheme', SCHEMES)
@pytest.mark.parametrize('blind', DARK_CLASSES)
@pytest.mark.parametrize('seen', LIGHT_CLASSES)
def test_blind_stands_five_to_one_against_seen(scheme, blind, seen):
    assert contrast(*(colours(CLASS_ROLES[name], scheme) for name in (blind, seen))) >= 5


@pytest.mark.parametrize('scheme', SCHEMES)
def test_dots_of_clutter_are_plain_on_what_is_seen_and_quieter_than_what_is_blind(scheme):
    dot, none, *seen = (colours(CLASS_ROLES[name], scheme) for name in ('dot', 'none', *LIGHT_CLASSES))
    assert min(contrast(dot, ground) for ground in seen) >= 3
    assert contrast(dot, none) >= 3


@pytest.mark.parametrize('scheme', SCHEMES)
def test_seen_rises_to_the_page_in_at_most_three_steps(scheme):
    levels = [contrast(colours(CLASS_ROLES[name], scheme), colours('paper', scheme)) for name in LIGHT_CLASSES]
    assert levels == sorted(levels, reverse=True)
    assert levels[-1] == 1
    assert all(above / below > 1.08 for above, below in pairwise(levels))


@pytest.mark.parametrize('scheme', SCHEMES)
def test_steps_of_detection_rise_evenly_to_the_page_and_part_most_at_what_is_wanted(scheme):
    levels = [contrast(colours(STEP_ROLES[name], scheme), colours('paper', scheme)) for name in STEPS]
    ratios = [above / below for above, below in pairwise(levels)]
    assert levels[-1] == 1
    assert min(ratios) > 1.2
    assert max(ratios) == ratios[2]


@pytest.mark.parametrize('scheme', SCHEMES)
def test_no_mark_is_stronger_than_what_none_sees(scheme):
    paper = colours('paper', scheme)
    strongest = contrast(colours('ink', scheme), paper)
    assert all(contrast(colours(role, scheme), paper) <= strongest for role in PALETTE)


@pytest.mark.parametrize('scheme', SCHEMES)
@pytest.mark.parametrize('ground', ['paper', 'band', 'asked', 'pale'])
def test_words_in_a_figure_can_be_read(scheme, ground):
    roles = ('strong-text',) if ground == 'pale' else ('text', 'strong-text', 'line')
    assert all(contrast(colours(role, scheme), colours(ground, scheme)) >= 4.5 for role in roles)


@pytest.mark.parametrize('scheme', SCHEMES)
@pytest.mark.parametrize(('mark', 'ground'), [('bar', 'lane'), ('line', 'paper'), ('ink', 'line'), ('line', 'pale')])
def test_marks_stand_three_to_one_against_what_they_lie_on(scheme, mark, ground):
    least = 1.4 if (mark, ground) == ('ink', 'line') else 3
    assert contrast(colours(mark, scheme), colours(ground, scheme)) >= least


@pytest.mark.parametrize(('scheme', 'place'), [('light', 0), ('dark', -1)])
def test_plain_is_the_page_s_own_colour(scheme, place):
    papers = re.findall(r'--paper:\s*(#[0-9a-f]{6})', STYLE.read_text(encoding='utf-8'))
    assert colours('paper', scheme) == papers[place]


@pytest.mark.parametrize('scheme', SCHEMES)
def test_lost_gained_and_the_rest_are_told_apart_in_grey(scheme):
    shade = {name: colours(CLASS_ROLES[name], scheme) for name in NAMES}
    assert contrast(shade['lost'], shade['gained']) >= 5
    assert contrast(shade['lost'], shade['lost-hatch']) >= 5
    assert contrast(shade['gained'], shade['gained-dot']) >= 5
    assert contrast(shade['gained'], shade['all']) > 1.08
    assert contrast(shade['still-blind'], shade['all']) < contrast(shade['gained'], shade['all'])
