"""The note for everybody: automated rules, keyboard alone, the order that is heard, forced colours, reduced motion."""

import pytest
from axe_playwright_python.sync_playwright import Axe
from playwright.sync_api import expect

RULES = {
    'runOnly': ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'],
    'rules': {'skip-link': {'enabled': False}},  # takes the link of a worked example, which is a fragment, for one
}
LAPTOP = {'width': 1366, 'height': 768}
PHONE = {'width': 390, 'height': 844}
LANDSCAPE = {'width': 844, 'height': 390}
SMALLEST_PX = 24
ACTIVE = 'button, summary, select, input, a[href], [role="spinbutton"]'
TARGETS = """([active, smallest]) => {
  const shown = (node) => node.checkVisibility({ visibilityProperty: true }) && !node.disabled;
  const size = (node) => {
    const { width, height } = node.getBoundingClientRect();
    const hit = node.matches('.number') ? getComputedStyle(node, '::after') : {}; // a hand's own place around a number
    return [Math.max(width, parseFloat(hit.width) || 0), Math.max(height, parseFloat(hit.height) || 0)];
  };
  return [...document.querySelectorAll(active)].filter(shown)
    .map((node) => [node.textContent || node.id, ...size(node)])
    .filter(([, width, height]) => width > 1 && Math.min(width, height) < smallest - 0.5)
    .map(([text, width, height]) => `${text}: ${Math.round(width)} x ${Math.round(height)}`);
}"""
PARTS = '.masthead, .title, .verdict, .standing, .paragraph, .finding, figure .plot, figcaption, .cautions li'
OVERLAPS = """(parts) => {
  const shown = [...document.querySelectorAll(parts)].filter((node) => node.checkVisibility());
  const boxes = shown.map((node) => [node, node.getBoundingClientRect()]);
  const across = (a, b) => Math.min(a.right, b.right) - Math.max(a.left, b.left) > 1;
  const along = (a, b) => Math.min(a.bottom, b.bottom) - Math.max(a.top, b.top) > 1;
  return boxes.flatMap(([one, a], i) => boxes.slice(i + 1)
    .filter(([other, b]) => !one.contains(other) && !other.contains(one) && across(a, b) && along(a, b))
    .map(([other]) => `${one.className} over ${other.className}`));
}"""
FOCUSED = """() => {
  const node = document.activeElement;
  if (!node || node === document.body) return null;
  node.dataset.reached = '';
  const { outlineStyle, boxShadow } = getComputedStyle(node);
  const name = node.getAttribute('aria-label') || node.textContent || node.id;
  return { shown: outlineStyle !== 'none' || boxShadow !== 'none', name };
}"""
NOT_REACHED = """(active) => [...document.querySelectorAll(`${active}, h1`)]
  .filter((node) => node.checkVisibility({ visibilityProperty: true }) && !node.disabled)
  .filter((node) => !('reached' in node.dataset))
  .map((node) => node.getAttribute('aria-label') || node.textContent || node.id)"""
THUMBS = """() => [...document.querySelectorAll('#strip :is(button, input, select)')]
  .filter((node) => node.checkVisibility()).map((node) => node.getBoundingClientRect())
  .map(({ width, height }) => Math.min(width, height))"""
LISTEN = """() => {
  window.said = [];
  for (const region of document.querySelectorAll('[aria-live], [role="status"], [role="alert"]')) {
    const hear = () => { if (region.textContent) window.said.push([region.id, region.textContent]); };
    new MutationObserver(hear).observe(region, { childList: true, characterData: true, subtree: true });
  }
}"""


@pytest.fixture
def opened(note):
    """Return the note on a laptop, with its engine."""
    note.page.set_viewport_size(LAPTOP)

    return note.open().ready()


def violations(note):
    """Return the rules that are broken, each with the first element that breaks it."""
    found = Axe().run(note.page, options=RULES).response['violations']

    return [f'{rule["id"]}: {rule["nodes"][0]["html"][:200]}' for rule in found]


def everything_open(note):
    """Open all that opens in place, so that the rules see it."""
    for summary in note.page.locator('summary:visible').all():
        summary.click()


@pytest.mark.parametrize('scheme', ['light', 'dark'])
def test_no_rule_is_broken_on_the_opened_out_note(opened, scheme):
    opened.page.emulate_media(color_scheme=scheme)
    everything_open(opened)

    assert violations(opened) == []


@pytest.mark.parametrize('scheme', ['light', 'dark'])
def test_no_rule_is_broken_in_the_meeting_view(opened, scheme):
    opened.page.emulate_media(color_scheme=scheme)
    opened.page.get_by_role('button', name='Meeting view').click()

    assert violations(opened) == []


@pytest.mark.parametrize('size', [PHONE, LANDSCAPE])
def test_no_rule_is_broken_on_a_phone(opened, size):
    opened.page.set_viewport_size(size)

    assert violations(opened) == []


def test_no_rule_is_broken_while_a_number_is_refused_and_while_a_sheet_is_open(opened):
    opened.number('radar.pulse_us').click()
    opened.page.keyboard.type('abc')
    opened.page.keyboard.press('Enter')
    expect(opened.page.get_by_role('group', name='Numbers that were refused')).to_be_visible()
    assert violations(opened) == []

    opened.page.get_by_role('button', name='Examples').click()
    assert violations(opened) == []


@pytest.mark.parametrize('size', [PHONE, LANDSCAPE])
def test_on_a_phone_nothing_is_cut_nothing_overlaps_and_all_can_be_hit(opened, size):
    opened.page.set_viewport_size(size)
    opened.page.wait_for_timeout(300)

    assert opened.page.evaluate('document.documentElement.scrollWidth') <= size['width']
    assert opened.page.evaluate(OVERLAPS, PARTS) == []
    assert opened.page.evaluate(TARGETS, [ACTIVE, SMALLEST_PX]) == []


def test_on_a_laptop_all_can_be_hit(opened):
    assert opened.page.evaluate(TARGETS, [ACTIVE, SMALLEST_PX]) == []


def test_the_strip_of_a_phone_is_for_thumbs(chrome, site, watched, note):
    page = watched(chrome, (site.address, 'data:', 'blob:'), viewport=PHONE, has_touch=True, is_mobile=True)
    phone = type(note)(page, site.address).open().ready()
    phone.number('radar.pulse_us').tap()

    sizes = page.evaluate(THUMBS)
    assert len(sizes) >= 5
    assert min(sizes) >= 44
    assert page.evaluate('document.documentElement.scrollWidth') <= PHONE['width']


def test_tab_reaches_every_action_shows_where_it_is_and_leaves_the_page(opened):
    dark = []
    for _ in range(400):
        opened.page.keyboard.press('Tab')
        reached = opened.page.evaluate(FOCUSED)
        if reached is None:
            break
        if not reached['shown']:
            dark.append(reached['name'])
    else:
        pytest.fail('the focus does not leave the page')

    assert dark == []
    assert opened.page.evaluate(NOT_REACHED, ACTIVE) == []


def test_headings_follow_each_other_and_the_parts_have_names(opened):
    levels = [
        int(level)
        for level in opened.page.evaluate("""() => [...document.querySelectorAll('h1, h2, h3, h4')]
      .filter((node) => node.checkVisibility()).map((node) => node.tagName[1])""")
    ]

    assert levels[0] == 1
    assert levels.count(1) == 1
    assert all(after - before <= 1 for before, after in zip(levels, levels[1:], strict=False))
    expect(opened.page.get_by_role('main')).to_have_count(1)
    for name in ('The plan, in words', 'What it can do', 'The figures', 'Cautions'):
        expect(opened.page.get_by_role('region', name=name)).to_have_count(1)


def test_one_region_speaks_politely_after_a_run_and_says_only_what_flipped(opened):
    live = opened.page.locator('#status')
    expect(live).to_have_attribute('aria-live', 'polite')
    expect(opened.page.locator('[aria-live="assertive"], [role="alert"]')).to_have_count(0)
    opened.page.evaluate(LISTEN)
    opened.number('waveform.pulses').focus()
    for _ in range(3):
        opened.page.keyboard.press('ArrowUp')

    expect(live).to_contain_text('Time used', timeout=15_000)
    assert [region for region, _ in opened.page.evaluate('window.said')] == ['status']


def test_in_forced_colours_numbers_verdicts_and_focus_are_told_without_our_colours(opened):
    opened.page.emulate_media(forced_colors='active')
    number = opened.number('radar.pulse_us')
    number.focus()

    assert 'underline' in number.evaluate('(node) => getComputedStyle(node).textDecorationLine')
    assert number.evaluate('(node) => getComputedStyle(node).outlineStyle') == 'solid'
    expect(opened.finding('must-see.0')).to_contain_text('not met')


def test_verdicts_and_classes_are_told_in_words(opened):
    for line in opened.page.locator('[data-finding]').all():
        words = {'true': 'met', 'false': 'not met', 'accepted': 'accepted', 'none': 'for information'}
        expect(line).to_contain_text(words[line.get_attribute('data-met')])
    expect(opened.page.get_by_role('figure', name='Fig. 1')).to_contain_text('Hatched: seen by no PRF')


def test_with_reduced_motion_nothing_moves(opened):
    opened.page.emulate_media(reduced_motion='reduce')

    assert (
        opened.page.evaluate("""() => {
      const line = document.getElementById('running');
      line.hidden = false;
      return document.getAnimations({ subtree: true }).length;
    }""")
        == 0
    )
