"""How long the engine takes to start in Chromium, against a stock start of the same Pyodide and numpy in the same run.

Stock: the files as released, from the same server, in a module worker: loadPyodide, loadPackage, import numpy. Ours:
the built page, until the engine is ready for its first question. Both from the page's being asked for, taken in turns;
ours also from the moment at which the painted page starts its worker.
"""

import contextlib
import functools
import shutil
import statistics
import tempfile
import threading
import time
from pathlib import Path

from playwright.sync_api import sync_playwright

from webapp.building import runtime, serve
from webapp.building.browser import OPTIONS, chromium
from webapp.building.places import DIST

ROUNDS = 5
LONGEST_MS = 120_000

STOCK_PAGE = """<!doctype html><html data-engine="starting"><meta charset="utf-8"><link rel="icon" href="data:,">
<script>
const worker = new Worker('stock.mjs', { type: 'module' });
worker.onmessage = () => { document.documentElement.dataset.engine = 'ready'; };
</script></html>"""
STOCK_WORKER = """import { loadPyodide } from './pyodide.mjs';
const python = await loadPyodide();
await python.loadPackage('numpy');
python.runPython('import numpy');
postMessage('ready');"""
ENGINE_ALONE = """() => {
  const at = (name) => performance.getEntriesByName(name)[0]?.startTime;
  return (at('engine is ready') - at('engine starts')) / 1000;
}"""


@contextlib.contextmanager
def stock():
    """Give a folder with the stock start in it."""
    with tempfile.TemporaryDirectory() as place:
        folder = Path(place)
        for name in runtime.FILES:
            shutil.copy(runtime.parts(None) / name, folder)
        (folder / 'index.html').write_text(STOCK_PAGE)
        (folder / 'stock.mjs').write_text(STOCK_WORKER)
        yield folder


@contextlib.contextmanager
def address_of(folder):
    """Give the address at which a folder is served."""
    with serve.server(folder, 0) as server:
        threading.Thread(target=functools.partial(server.serve_forever, 0.05), daemon=True).start()
        yield f'http://127.0.0.1:{server.server_address[1]}/'
        server.shutdown()


def seconds(browser, address):
    """Return how long a page takes from being asked for to being ready, and its engine alone, if it says. [s]"""
    context = browser.new_context()
    page = context.new_page()
    began = time.perf_counter()
    page.goto(address, wait_until='commit')
    page.locator('html[data-engine="ready"]').wait_for(state='attached', timeout=LONGEST_MS)
    took = time.perf_counter() - began
    alone = page.evaluate(ENGINE_ALONE)
    context.close()

    return took, alone


def measure():
    """Return both times, medians and best of the rounds, and their ratios."""
    took = {'stock': [], 'hosted': [], 'one file': []}
    with sync_playwright() as playwright, stock() as folder, address_of(folder) as old, address_of(DIST) as new:
        browser = playwright.chromium.launch(executable_path=chromium(), args=list(OPTIONS))
        places = {'stock': old, 'hosted': new, 'one file': new + 'pulsewright.html'}
        for _ in range(ROUNDS):
            for name, address in places.items():
                took[name].append(seconds(browser, address))
        browser.close()
    took['hosted, engine alone'] = [(alone, alone) for _, alone in took['hosted']]
    rows = {name: column([whole for whole, _ in times]) for name, times in took.items()}
    stock_row = rows['stock']

    return {
        'page asked for to engine ready (goal 0.35 of stock)': {
            name: {
                **row,
                'median / stock': row['median [s]'] / stock_row['median [s]'],
                'best / stock': row['best [s]'] / stock_row['best [s]'],
            }
            for name, row in rows.items()
        }
    }


def column(times):
    """Return the median and the best of some times. [s]"""
    return {'median [s]': statistics.median(times), 'best [s]': min(times)}
