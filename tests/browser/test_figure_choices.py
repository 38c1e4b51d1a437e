"""What can be chosen in a figure, chosen as a person does it."""

import re

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


def test_the_mean_interval_goes_up_the_axis_of_the_blind_speeds_and_the_caption_follows(live):
    figure = live.page.locator('figure[data-figure="blind-speeds"]')
    figure.scroll_into_view_if_needed()
    up = figure.get_by_role('group', name='Up the axis')
    expect(up.get_by_role('button')).to_have_text(['each PRF', 'mean PRI', 'carrier'])
    expect(up.get_by_role('button', name='each PRF')).to_have_attribute('aria-pressed', 'true')
    up.get_by_role('button', name='mean PRI').click()
    caption = figure.locator('.figure-caption')
    expect(caption).to_contain_text('All intervals are scaled together')
    expect(up.get_by_role('button', name='mean PRI')).to_have_attribute('aria-pressed', 'true')
    up.get_by_role('button', name='carrier').click()
    expect(caption).to_contain_text('Only the carrier is moved')
    expect(live.page).to_have_url(re.compile('up=carrier'))
    live.page.reload()
    live.ready()
    figure.scroll_into_view_if_needed()
    expect(up.get_by_role('button', name='carrier')).to_have_attribute('aria-pressed', 'true')
    expect(caption).to_contain_text('Only the carrier is moved')
    up.get_by_role('button', name='each PRF').click()
    expect(caption).to_contain_text('first blind speeds')
