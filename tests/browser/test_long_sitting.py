"""A long sitting: hundreds of edits leave the page no larger; every quantity is reached and changed by keys alone."""

import pytest
from playwright.sync_api import expect

FAR = 'coverage.range_km.1'
WARMED_UP, EDITS = 30, 500
MOST_GROWTH_MB = 3.0  # 500 edits keep 200 steps of undo, each a plan of some kilobytes
FEW_LISTENERS = 5  # of some 500: what is shown once may bring one, an edit none
MOST_LINES = 200  # of what was tried
NODES_OF_LINES = """() => {
  const walk = document.createTreeWalker(document.getElementById('sitting-lines'), NodeFilter.SHOW_ALL);
  let count = 0;
  while (walk.nextNode()) count += 1;
  return count;
}"""
MOST_NODES = 40  # of some 6500: a caption's or a finding's second form


@pytest.fixture
def live(note):
    """Return the note with its engine ready."""
    return note.open().ready()


def step(note, count):
    """Step a number up and down so many times, and wait until all is painted."""
    before = note.shown()
    note.number(FAR).focus()
    for i in range(count):
        note.page.keyboard.press('ArrowUp' if i // 10 % 2 == 0 else 'ArrowDown')
        if i % 10 == 9:
            expect(note.root).to_have_attribute('data-shown', str(before + i + 1))


def used(live, session):
    """Return the heap in use after a collection [MB], and how many nodes and listeners there are."""
    # Lines of what was tried are there to stay, up to so many; how many there are depends on the pauses between steps.
    session.send('HeapProfiler.collectGarbage')
    metrics = {one['name']: one['value'] for one in session.send('Performance.getMetrics')['metrics']}

    lines = live.page.evaluate(NODES_OF_LINES)

    return metrics['JSHeapUsedSize'] / 1e6, metrics['Nodes'] - lines, metrics['JSEventListeners']


def test_five_hundred_edits_leave_the_page_as_large_as_it_was(live):
    session = live.page.context.new_cdp_session(live.page)
    session.send('Performance.enable')
    step(live, WARMED_UP)
    heap, nodes, listeners = used(live, session)
    step(live, EDITS)
    heap_after, nodes_after, listeners_after = used(live, session)

    expect(live.number(FAR)).to_be_focused()
    assert heap_after - heap < MOST_GROWTH_MB
    assert nodes_after - nodes < MOST_NODES
    assert listeners_after - listeners < FEW_LISTENERS


def test_a_sitting_keeps_its_last_lines_and_says_so(live):
    lines = live.page.locator('#sitting-lines').get_by_role('row')
    for i in range(MOST_LINES + 3):
        live.commit(FAR, str(100 + i % 7))
    expect(lines).to_have_count(MOST_LINES)
    expect(live.page.get_by_text(f'Only the last {MOST_LINES} lines are kept')).to_be_visible()


def test_every_number_of_the_table_is_changed_by_keys_alone(live):
    live.page.locator('#quantities > summary').press('Enter')
    table = live.page.locator('#quantities-tables')
    keys = table.get_by_role('spinbutton').evaluate_all('(numbers) => numbers.map(({ dataset }) => dataset.key)')
    assert len(keys) > 20
    for key in keys:
        number, before = live.number(key), live.number(key).text_content()
        live.page.keyboard.press('Tab')
        number.focus()
        highest, now = (number.get_attribute(f'aria-value{end}') for end in ('max', 'now'))
        live.page.keyboard.press('ArrowDown' if highest == now else 'ArrowUp')
        expect(number).not_to_have_text(before)
        expect(number).to_be_focused()
        live.page.keyboard.press('Control+z')
        expect(number).to_have_text(before)
