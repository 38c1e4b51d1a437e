"""From an edit to its repainted figures in Chromium, engine warm (goals: median 80 ms, 95th percentile 150 ms).

At 1366 × 768. Of every worked example each number that can be stepped is stepped up and down with the arrow keys, and
one is dragged. The time runs in the page from the key, or the move, until the page says that its answer is painted; a
step that changes nothing (at a limit) is not counted. Then: the longest task of the page's own thread; figures that
were off the screen, from being scrolled to until they show the present plan; and what 500 edits leave in its memory.
"""

import importlib.util
import statistics
from pathlib import Path

from playwright.sync_api import sync_playwright

from webapp.building.browser import OPTIONS, chromium
from webapp.building.places import DIST

BUDGET_MS = {'median': 80.0, '95th percentile': 150.0}
SCROLLED_MS, LONGEST_TASK_MS = 200.0, 200.0
WARM, DRAGGED, KEPT_UP = 10, 30, 500
EACH_WAY = 2  # steps of each key
SCREEN = {'width': 1366, 'height': 768}

LISTEN = """() => {
  const root = document.documentElement;
  const bench = { tasks: [], times: [] };
  window.bench = bench;
  const tasks = new PerformanceObserver((list) => bench.tasks.push(...list.getEntries().map((task) => task.duration)));
  tasks.observe({ type: 'longtask' });
  // Ends with the time until the deed is painted; with null where it changed nothing.
  bench.until = (deed) => new Promise((resolve) => {
    const before = Number(root.dataset.shown);
    const began = performance.now();
    const end = (result) => { watch.disconnect(); clearTimeout(patience); resolve(result); };
    const watch = new MutationObserver(() => {
      if (Number(root.dataset.shown) > before) end(performance.now() - began);
    });
    const patience = setTimeout(end, 3000, null);
    watch.observe(root, { attributes: true, attributeFilter: ['data-shown'] });
    deed();
  });
  bench.step = (key, arrow) => bench.until(() => {
    const number = document.querySelector(`.number[data-key="${CSS.escape(key)}"]`);
    number.dispatchEvent(new KeyboardEvent('keydown', { key: arrow, bubbles: true }));
  });
  bench.move = (key, x) => bench.until(() => {
    const number = document.querySelector(`.number[data-key="${CSS.escape(key)}"]`);
    const how = { clientX: x, pointerId: 1, pointerType: 'mouse', bubbles: true };
    number.dispatchEvent(new PointerEvent('pointermove', how));
  });
  bench.scrolledTo = (figure) => new Promise((resolve) => {
    const began = performance.now();
    figure.scrollIntoView({ block: 'center', behavior: 'instant' });
    const look = () => {
      if (figure.matches('.pending, .outdated')) requestAnimationFrame(look);
      else resolve(performance.now() - began);
    };
    requestAnimationFrame(() => setTimeout(look)); // by then the page has seen that it was scrolled
  });
}"""
KEYS = """async () => {
  document.getElementById('quantities').open = true;
  await new Promise((resolve) => { setTimeout(resolve, 500); }); // the table is filled when it has been opened
  const numbers = [...document.querySelectorAll(':is(#plan, #quantities) .number[role="spinbutton"]')];
  return [...new Set(numbers.map((number) => number.dataset.key))];
}"""
PRESS = """([key, x, type]) => document.querySelector(`.number[data-key="${CSS.escape(key)}"]`).dispatchEvent(
  new PointerEvent(type, { clientX: x, button: 0, pointerId: 1, pointerType: 'mouse', bubbles: true }))"""
LATER_FIGURES = (
    """() => [...document.querySelectorAll('#figures [data-figure]')].map(({ dataset }) => dataset.figure)"""
)
SCROLL = """(name) => window.bench.scrolledTo(document.querySelector(`[data-figure="${name}"]`))"""
EXAMPLES = """() => JSON.parse(document.getElementById('opening').textContent)
  .examples.map(({ name, link }) => [name, link])"""


def start_bench():
    """Return the benchmark beside this one, which knows how to serve a folder."""
    spec = importlib.util.spec_from_file_location('bench_start', Path(__file__).with_name('bench_start.py'))
    module = importlib.util.module_from_spec(spec)
    spec.loader.exec_module(module)

    return module


def opened(browser, address, patience_ms, fragment=''):
    """Return a page with a note on it whose engine is warm."""
    page = browser.new_page(viewport=SCREEN)
    page.goto(f'{address}#{fragment}' if fragment else address)
    page.locator('html[data-engine="ready"]').wait_for(state='attached', timeout=patience_ms)
    page.wait_for_timeout(1500)  # what is worked out in a pause is done
    page.evaluate(LISTEN)
    for turn in range(WARM):
        page.evaluate('(arrow) => window.bench.step("radar.pulse_us", arrow)', ['ArrowUp', 'ArrowDown'][turn % 2])

    return page


def stepped(page, keys):
    """Return the time of each step, by key. [ms]"""
    times = {}
    for key in keys:
        arrows = ['ArrowUp', 'ArrowDown'] * EACH_WAY
        took = [page.evaluate('([key, arrow]) => window.bench.step(key, arrow)', [key, arrow]) for arrow in arrows]
        times[key] = [one for one in took if one is not None]

    return times


def dragged(page, key='radar.pulse_us'):
    """Return the time of each step of a drag, there and back. [ms]"""
    page.evaluate(PRESS, [key, 100, 'pointerdown'])
    there = [104 + 4 * step for step in range(1, DRAGGED // 2)]
    took = [page.evaluate('([key, x]) => window.bench.move(key, x)', [key, x]) for x in [104, *there, *there[::-1]]]
    page.evaluate(PRESS, [key, 104, 'pointerup'])

    return [one for one in took if one is not None]


def scrolled(page):
    """Return the time from being scrolled to until it shows the edited plan, for each later figure. [ms]"""
    times = {}
    for turn in ('first', 'again'):  # the first time it is put on the page as well
        for name in page.evaluate(LATER_FIGURES):
            page.evaluate('scrollTo(0, 0)')
            page.wait_for_timeout(50)
            page.evaluate('(arrow) => window.bench.step("radar.pulse_us", arrow)', 'ArrowUp')
            times.setdefault(name, {})[turn] = page.evaluate(SCROLL, name)

    return times


def left_in_memory(page):
    """Return by how much 500 edits have made the page's heap grow. [MB]"""
    session = page.context.new_cdp_session(page)
    session.send('Performance.enable')

    def used():
        session.send('HeapProfiler.collectGarbage')
        return {one['name']: one['value'] for one in session.send('Performance.getMetrics')['metrics']}[
            'JSHeapUsedSize'
        ]

    before = used()
    for turn in range(KEPT_UP):
        page.evaluate('(arrow) => window.bench.step("radar.pulse_us", arrow)', ['ArrowUp', 'ArrowDown'][turn % 2])

    return (used() - before) / 1e6


def told(times):
    """Return median, 95th percentile and their ratios to the budgets, as a row of a table."""
    found = {'median': statistics.median(times), '95th percentile': statistics.quantiles(times, n=20)[-1]}
    ratios = {f'{name} / budget': value / BUDGET_MS[name] for name, value in found.items()}

    return {**found, **ratios}


def slowest(times):
    """Return the key whose steps take longest in the median, and that. [ms]"""
    medians = {key: statistics.median(took) for key, took in times.items() if took}
    key = max(medians, key=medians.get)

    return key, medians[key]


def of_a_plan(page, name, results):
    """Measure the edits of one plan; add its rows to the tables."""
    by_key = stepped(page, page.evaluate(KEYS))
    key, longest = slowest(by_key)
    edits, drags, tasks = results
    all_steps = [one for took in by_key.values() for one in took]
    edits[name] = {**told(all_steps), 'keys': len(by_key), 'slowest': longest, 'which is': key}
    drags[name] = told(dragged(page))
    tasks[name] = {'longest [ms]': max(page.evaluate('window.bench.tasks'), default=0.0)}


def measure():
    """Return tables of times in milliseconds, by plan and by figure."""
    start = start_bench()
    edits, drags, tasks = {}, {}, {}
    with sync_playwright() as playwright, start.address_of(DIST) as address:
        browser = playwright.chromium.launch(executable_path=chromium(), args=list(OPTIONS))
        page = opened(browser, address, start.LONGEST_MS)
        (first, _), *others = page.evaluate(EXAMPLES)
        of_a_plan(page, first, (edits, drags, tasks))
        scrolls, grown = scrolled(page), left_in_memory(page)
        page.close()
        for name, link in others:
            page = opened(browser, address, start.LONGEST_MS, link)
            of_a_plan(page, name, (edits, drags, tasks))
            page.close()
        browser.close()

    return {
        'every key, stepped': edits,
        'dragged': drags,
        f'long tasks (goal: none over {LONGEST_TASK_MS:g} ms)': tasks,
        f'figures scrolled to (goal {SCROLLED_MS:g} ms)': scrolls,
        f'grown by {KEPT_UP} edits [MB]': grown,
    }
