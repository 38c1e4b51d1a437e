"""From an edit to its repainted figures in Chromium, engine warm (goals: median 80 ms, 95th percentile 150 ms).

The pulse length is stepped with the arrow key; the time runs in the page from the key to `data-shown` and two frames.
"""

import importlib.util
import statistics
from pathlib import Path

from playwright.sync_api import sync_playwright

from webapp.building.browser import OPTIONS, chromium
from webapp.building.places import DIST

EDITS = 60
WARM = 10  # edits before counting: the browser compiles what is used often

ONE_EDIT = """(key) => new Promise((resolve) => {
  const root = document.documentElement;
  const before = Number(root.dataset.shown);
  const began = performance.now();
  const watch = new MutationObserver(() => {
    if (Number(root.dataset.shown) <= before) return;
    watch.disconnect();
    requestAnimationFrame(() => requestAnimationFrame(() => resolve(performance.now() - began)));
  });
  watch.observe(root, { attributes: true, attributeFilter: ['data-shown'] });
  const number = document.querySelector('[data-key="radar.pulse_us"]');
  number.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true }));
})"""


def start_bench():
    """Return the benchmark beside this one, which knows how to serve a folder."""
    spec = importlib.util.spec_from_file_location('bench_start', Path(__file__).with_name('bench_start.py'))
    module = importlib.util.module_from_spec(spec)
    spec.loader.exec_module(module)

    return module


def times(page):
    """Return the time of each edit, the warming ones left out. [ms]"""
    page.locator('[data-key="radar.pulse_us"]').first.focus()
    keys = ['ArrowUp', 'ArrowUp', 'ArrowDown', 'ArrowDown']

    return [page.evaluate(ONE_EDIT, keys[turn % len(keys)]) for turn in range(WARM + EDITS)][WARM:]


def measure():
    """Return the median and the 95th percentile, in milliseconds."""
    start = start_bench()
    with sync_playwright() as playwright, start.address_of(DIST) as address:
        browser = playwright.chromium.launch(executable_path=chromium(), args=list(OPTIONS))
        page = browser.new_page(viewport={'width': 1366, 'height': 768})
        page.goto(address)
        page.locator('html[data-engine="ready"]').wait_for(state='attached', timeout=start.LONGEST_MS)
        took = times(page)
        browser.close()

    return {
        'edit to repaint, median [ms] (goal 80)': statistics.median(took),
        'edit to repaint, 95th percentile [ms] (goal 150)': statistics.quantiles(took, n=20)[-1],
    }
