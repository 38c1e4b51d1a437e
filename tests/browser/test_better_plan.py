"""A better plan, as a person looks for it: limits typed, a search started and stopped, a plan taken and given back."""

import re

import pytest
from playwright.sync_api import expect

FIND_MS = 60_000  # a search on a busy machine
LISTED = """() => {
  const tried = (name) => document.querySelector(`[data-finder="${name}"]`).dataset.tried;
  return tried('plans') === tried('progress');
}"""  # the list is of all that was tried


class Finder:
    """The part of the note that looks for a better plan, in the words of its user."""

    def __init__(self, note):
        self.note = note
        self.part = note.frame.get_by_role('region', name='A better plan')
        self.start = self.part.get_by_role('button', name=re.compile('^(Find plans|Go on)$'))
        self.stop = self.part.get_by_role('button', name='Stop')
        self.plans = self.part.locator('[data-finder="plans"] tbody tr:not(.own)')
        self.progress = self.part.locator('[data-finder="progress"]')

    def limit(self, key, text):
        """Type a limit and press Enter."""
        number = self.part.locator(f'[data-key="find.{key}"]')
        number.click()
        number.fill(text)
        number.press('Enter')
        return number

    def found(self):
        """Search until plans are listed, and stop."""
        self.start.click()
        expect(self.plans.first).to_be_visible(timeout=FIND_MS)
        if self.stop.is_visible():
            self.stop.click()
        expect(self.start).to_be_visible()
        self.note.page.wait_for_function(LISTED)
        return self


@pytest.fixture
def finder(note):
    """Return the part, its engine ready."""
    return Finder(note.open().ready())


@pytest.fixture
def alone(single):
    """Return the part in the one file, where no further worker is started."""
    return Finder(single.open().ready())


def pris_of(note):
    return [
        note.number(f'waveform.pri_us.{i}').inner_text().replace('\N{NARROW NO-BREAK SPACE}µs', '') for i in range(2)
    ]


def test_two_prfs_that_see_the_whole_approach_are_found_taken_and_given_back(finder):
    note = finder.note
    finder.found()
    share = float(finder.plans.first.locator('[data-label="seen"]').get_attribute('data-value'))
    before = note.shown()
    finder.plans.first.get_by_role('button', name='Use this plan').click()
    expect(note.root).to_have_attribute('data-shown', str(before + 1))
    expect(note.finding('must-see.0')).to_have_attribute('data-met', 'true')
    assert float(note.finding('visible').get_attribute('data-value')) == pytest.approx(share, abs=1e-9)
    assert pris_of(note) != ['980', '860']
    finder.part.get_by_role('button', name='Back to mine').click()
    expect(note.number('waveform.pri_us.0')).to_have_text('980')
    assert pris_of(note) == ['980', '860']


def test_a_taken_plan_is_one_step_of_undo_and_one_entry_of_the_history(finder):
    note = finder.note
    finder.found().plans.first.get_by_role('button', name='Use this plan').click()
    expect(note.number('waveform.pri_us.0')).not_to_have_text('980')
    note.page.get_by_role('button', name='Undo', exact=True).click()
    expect(note.number('waveform.pri_us.0')).to_have_text('980')


def test_progress_counts_up_and_stop_keeps_the_best(finder):
    finder.start.click()
    expect(finder.progress).to_have_attribute('data-best', re.compile(r'^0\.9'), timeout=FIND_MS)
    first = int(finder.progress.get_attribute('data-tried'))
    finder.stop.click()
    expect(finder.start).to_have_text('Go on')
    stopped = int(finder.progress.get_attribute('data-tried'))
    assert stopped >= first
    assert int(finder.progress.get_attribute('data-rate')) >= 0
    expect(finder.plans.first).to_be_visible(timeout=FIND_MS)
    finder.start.click()
    expect(finder.stop).to_be_visible()
    finder.note.page.wait_for_function(
        'count => Number(document.querySelector(\'[data-finder="progress"]\').dataset.tried) > count', arg=stopped
    )


def test_the_plan_is_edited_while_the_search_runs_and_the_list_says_what_it_is_for(alone):
    note = alone.note
    alone.start.click()
    expect(alone.plans.first).to_be_visible(timeout=FIND_MS)
    note.commit('radar.pulse_us', '1.2')
    assert alone.stop.is_visible()
    expect(alone.part.get_by_text('These are for the limits and the plan as they were')).to_be_visible()
    expect(alone.plans.first).to_be_visible()


def test_few_sets_are_gone_through_and_the_best_is_the_best_there_is(finder):
    finder.limit('pri_us.0', '720')
    finder.limit('pri_us.1', '900')
    finder.part.get_by_label('PRIs are whole').select_option('steps')
    finder.limit('step_us', '5')
    finder.start.click()
    expect(finder.part.get_by_text('All sets have been gone through')).to_be_visible(timeout=FIND_MS)
    expect(finder.start).to_have_text('Find plans')


@pytest.mark.parametrize(
    ('key', 'text', 'reason'),
    [
        ('n', '0', 'Number of PRFs must be from 1 to 16; got 0.'),
        ('m', '3', 'M must be from 1 to the 2 PRIs; got 3.'),
        ('pri_us.0', '5000', 'must run from a shorter to a longer end'),
        ('apart_us', 'abc', 'Least difference must be'),
    ],
)
def test_an_absurd_limit_is_refused_where_it_was_typed_and_can_be_put_back(finder, key, text, reason):
    number = finder.limit(key, text)
    expect(finder.part.get_by_role('group', name='Limits that were refused')).to_contain_text(reason)
    expect(number).to_have_attribute('aria-invalid', 'true')
    expect(finder.start).to_be_disabled()
    finder.part.get_by_role('button', name='Put back').click()
    expect(finder.start).to_be_enabled()


def test_a_limit_that_no_set_meets_says_which_it_is_and_how_near_the_best_comes(finder):
    finder.limit('pri_us.0', '700')
    finder.limit('pri_us.1', '800')
    finder.part.get_by_label('PRIs are whole').select_option('steps')
    finder.limit('step_us', '10')
    finder.limit('time_ms', '10')
    finder.start.click()
    expect(finder.part.get_by_text(re.compile('No two PRFs meet all limits'))).to_be_visible(timeout=FIND_MS)
    assert finder.plans.count() == 0


def test_a_point_of_the_trade_off_is_picked_with_the_keyboard_and_selects_its_row(finder):
    finder.found()
    plot = finder.part.get_by_role('group', name='Found plans as points')
    plot.scroll_into_view_if_needed()
    plot.focus()
    plot.press('ArrowRight')
    chosen = finder.part.locator('tr[aria-current="true"]')
    expect(chosen).to_have_count(1)
    plot.press('Enter')
    expect(chosen).to_be_focused()


def test_a_limit_is_stepped_with_the_arrow_keys_and_the_plan_stays_as_it_is(finder):
    note, number = finder.note, finder.part.locator('[data-key="find.n"]')
    number.focus()
    number.press('ArrowUp')
    expect(number).to_have_text('3')
    expect(finder.part).to_contain_text('Look for 3 PRFs')
    assert note.shown() == 0
    assert pris_of(note) == ['980', '860']
