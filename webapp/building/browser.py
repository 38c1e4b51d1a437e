"""Find the Chromium that the tests and benchmarks run in."""

import os
import shutil

from webapp.building.environment import debian_packages
from webapp.building.stop import Stop

NAMES = ('chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable')
MISSING = (
    'No Chromium was found: install one (on Debian: apt-get install chromium) '
    'or name it in the variable CHROMIUM, and try again.'
)

# A browser of its own for each test, that asks nothing of any network.
OPTIONS = (
    '--no-sandbox',
    '--disable-gpu',
    '--disable-quic',
    '--no-first-run',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
)


def chromium():
    """Return the path of a Chromium, or None.

    Returns
    -------
    path : str or None
        The one that the variable CHROMIUM names, else the first that the system has.
    """
    named = os.environ.get('CHROMIUM')
    if named:
        return shutil.which(named)

    return next((path for path in map(shutil.which, NAMES) if path), None)


def chromium_or_stop():
    """Return the path of a Chromium, installed from Debian's packages where that is possible.

    Returns
    -------
    path : str
        Its executable.
    """
    if not chromium() and not os.environ.get('CHROMIUM'):
        debian_packages('chromium', otherwise=MISSING)
    if not chromium():
        raise Stop(MISSING)

    return chromium()
