"""What can be chosen in a figure, chosen as a person does it."""

import pytest
from playwright.sync_api import expect


@pytest.fixture
def live(note):
    """Return the note with its engine ready."""
    return note.open().ready()


def test_the_axis_of_the_blind_speeds_can_be_read_in_doppler_and_back(live):
    figure = live.page.locator('figure[data-figure="blind-speeds"]')
    figure.scroll_into_view_if_needed()
    choices = figure.get_by_role('group', name='Along the axis')
    doppler, speed = (choices.get_by_role('button', name=name) for name in ('Doppler frequency', 'radial speed'))
    expect(speed).to_have_attribute('aria-pressed', 'true')
    doppler.click()
    expect(doppler).to_have_attribute('aria-pressed', 'true')
    expect(speed).to_have_attribute('aria-pressed', 'false')
    expect(doppler).to_be_focused()
    live.page.keyboard.press('Shift+Tab')
    live.page.keyboard.press('Enter')
    expect(speed).to_have_attribute('aria-pressed', 'true')
