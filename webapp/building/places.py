"""Where the build reads and writes: the project, the output, and a cache elsewhere that can be deleted at any time."""

import hashlib
import os
import sys
from pathlib import Path

ROOT = Path(__file__).resolve().parents[2]
DIST = ROOT / 'dist'
WEBAPP = ROOT / 'webapp'


def cache():
    """Return the folder for everything that can be fetched or made again.

    Returns
    -------
    folder : Path
        Where this system keeps such things; it exists.
    """
    home = Path.home()
    usual = {'win32': os.environ.get('LOCALAPPDATA', home), 'darwin': home / 'Library' / 'Caches'}
    base = os.environ.get('XDG_CACHE_HOME') or usual.get(sys.platform, home / '.cache')
    folder = Path(base) / 'pulsewright'
    folder.mkdir(parents=True, exist_ok=True)

    return folder


def content_key(*contents):
    """Return a short name that changes whenever one of the contents does.

    Parameters
    ----------
    *contents : bytes, str or Path
        A path stands for its file's bytes. [unitless]

    Returns
    -------
    key : str
        16 hexadecimal digits.
    """
    digest = hashlib.sha256()
    for content in contents:
        data = content.read_bytes() if isinstance(content, Path) else content
        data = data.encode() if isinstance(data, str) else data
        digest.update(len(data).to_bytes(8, 'little') + data)

    return digest.hexdigest()[:16]
