"""The built page in a Chromium: served with a log of what is asked for, a fresh browser context for each test.

A console error, an exception of the page, a violation of its policy or a request to anywhere else fails the test.
"""

import functools
import http.server
import threading

import pytest
from playwright.sync_api import expect, sync_playwright

from webapp.building.browser import MISSING, OPTIONS, chromium
from webapp.building.places import DIST

# Every test starts an engine of its own and ends it soon: compiling it a second time, better, costs more than it gives.
ONE_COMPILER = '--js-flags=--liftoff-only'
START_MS = 60_000  # the engine's start on a busy machine
STEP_MS = 15_000  # anything else

REPORT_VIOLATIONS = """
addEventListener('securitypolicyviolation', ({ violatedDirective, blockedURI }) => {
  console.error(`policy: ${violatedDirective} ${blockedURI}`);
});
"""


class Handler(http.server.SimpleHTTPRequestHandler):
    """Files of dist/ and the pages that a test adds, each request written down."""

    def __init__(self, site, *given):
        self.site = site
        super().__init__(*given, directory=DIST)

    def do_GET(self):  # noqa: N802 - the name that http.server calls
        """Answer with a page of the test's, else with a file."""
        self.site.asked.append(self.path)
        page = self.site.pages.get(self.path)
        if page is None:
            super().do_GET()
            return
        self.send_response(200)
        self.send_header('Content-Type', 'text/html; charset=utf-8')
        self.end_headers()
        self.wfile.write(page.encode())

    def guess_type(self, path):
        """Return the type to send: the usual one, or the one that a test wants for scripts."""
        return self.site.script_type if str(path).endswith('.js') else super().guess_type(path)

    def log_message(self, *_):
        """Say nothing."""


class Site:
    """A server of dist/ on this machine.

    Its `address` ends in a slash; `asked` holds the paths of all requests; `pages` are served besides the files.
    """

    def __init__(self):
        self.asked, self.pages, self.script_type = [], {}, 'text/javascript'
        self.server = http.server.ThreadingHTTPServer(('127.0.0.1', 0), functools.partial(Handler, self))
        self.address = f'http://127.0.0.1:{self.server.server_address[1]}/'
        threading.Thread(target=self.server.serve_forever, args=(0.05,), daemon=True).start()

    def close(self):
        """Stop serving."""
        self.server.shutdown()
        self.server.server_close()


class Note:
    """One opened note, driven in the words of its user.

    `frame` is where the note is (the page itself, or a frame in it), `root` its html element.
    """

    def __init__(self, page, address):
        self.page, self.address = page, address
        self.frame, self.root = page, page.locator('html')

    def open(self, fragment='', path=''):
        """Open the note, with a link's fragment or in another file; return self."""
        self.page.goto(f'{self.address}{path}{f"#{fragment}" if fragment else ""}')
        return self

    def inside(self, frame):
        """Go on in a frame of the page; return self."""
        self.frame, self.root = frame, frame.locator('html')
        return self

    def ready(self):
        """Wait until the engine is ready; return self."""
        expect(self.root).to_have_attribute('data-engine', 'ready', timeout=START_MS)
        return self

    def number(self, key):
        """Return the number with that key in the plan."""
        return self.frame.locator(f'[data-key="{key}"]').first

    def finding(self, name):
        """Return a finding by its name."""
        return self.frame.locator(f'[data-finding="{name}"]')

    def shown(self):
        """Return how many committed edits are painted."""
        return int(self.root.get_attribute('data-shown'))

    def commit(self, key, text):
        """Type a number, press Enter, and wait until what follows is painted; return self."""
        before = self.shown()
        number = self.number(key)
        number.click()
        number.fill(text)
        number.press('Enter')
        expect(self.root).to_have_attribute('data-shown', str(before + 1), timeout=STEP_MS)
        return self


@pytest.fixture(scope='session')
def engine():
    """Return the running Playwright."""
    if not (DIST / 'index.html').is_file():
        pytest.fail('dist/ is not built: run build.py first.')
    if not chromium():
        pytest.fail(MISSING)
    expect.set_options(timeout=STEP_MS)
    with sync_playwright() as playwright:
        yield playwright


@pytest.fixture(scope='session')
def launch(engine):
    """Return a function that starts a Chromium with further options."""
    running = []

    def start(*options):
        running.append(engine.chromium.launch(executable_path=chromium(), args=[*OPTIONS, ONE_COMPILER, *options]))
        return running[-1]

    yield start
    for browser in running:
        browser.close()


@pytest.fixture(scope='session')
def chrome(launch):
    """Return the Chromium that most tests use."""
    return launch()


@pytest.fixture
def site():
    """Return a server of dist/ with a log of its own."""
    server = Site()
    yield server
    server.close()


@pytest.fixture
def watched():
    """Return a function that makes a page in a fresh context and holds it to its promises when the test ends."""
    contexts, wrong = [], []

    def open_page(browser, allowed, **options):
        context = browser.new_context(**options)
        contexts.append(context)
        context.add_init_script(REPORT_VIOLATIONS)
        page = context.new_page()
        page.on('console', lambda said: wrong.append(said.text) if said.type == 'error' else None)
        page.on('pageerror', lambda error: wrong.append(str(error)))
        page.on(
            'request', lambda asked: None if asked.url.startswith(allowed) else wrong.append(f'asked {asked.url[:100]}')
        )
        return page

    yield open_page
    for context in contexts:
        context.close()
    assert wrong == []


@pytest.fixture
def note(chrome, site, watched):
    """Return the hosted note, not opened yet."""
    return Note(watched(chrome, (site.address, 'data:', 'blob:')), site.address)


@pytest.fixture
def single(chrome, watched):
    """Return the note in one file, on disk, not opened yet."""
    return Note(watched(chrome, ('file://', 'data:', 'blob:')), (DIST / 'pulsewright.html').as_uri())
