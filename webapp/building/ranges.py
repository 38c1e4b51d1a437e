"""Read a few files out of a large zip archive on a server, fetching only the bytes that are needed.

Where the server answers a range request with the whole file, that file is kept on disk and read from there.
"""

import contextlib
import io
import os
import shutil
import ssl
import tempfile
import urllib.request
import zipfile
from http import HTTPStatus

READ_AHEAD = 1 << 20  # bytes; one request brings the archive's whole directory


class Remote(io.RawIOBase):
    """A file on a server that is read by range requests; seekable, read only."""

    def __init__(self, address, size):
        super().__init__()
        self._address, self._size, self._at = address, size, 0

    def readable(self):
        """Return True: that is what it is for."""
        return True

    def seekable(self):
        """Return True: a zip archive is read from its end."""
        return True

    def tell(self):
        """Return the offset of the next byte. [byte]"""
        return self._at

    def seek(self, offset, whence=os.SEEK_SET):
        """Move to an offset and return it. [byte]"""
        self._at = (0, self._at, self._size)[whence] + offset
        return self._at

    def readinto(self, target):
        """Fill the target from the server and return how many bytes came. [byte]"""
        stop = min(self._size, self._at + len(target))
        if stop <= self._at:
            return 0
        with _answer(self._address, f'bytes={self._at}-{stop - 1}') as answer:
            data = answer.read()
        target[: len(data)] = data
        self._at += len(data)
        return len(data)


@contextlib.contextmanager
def remote_zip(address):
    """Give a zip archive that lies at an address, for as long as it is used.

    Parameters
    ----------
    address : str
        Where it is, http or file. [unitless]

    Yields
    ------
    archive : zipfile.ZipFile
        Read piece by piece where the server allows it, else from a copy that goes away afterwards.

    Raises
    ------
    OSError
        When the address does not answer.
    """
    with contextlib.ExitStack() as held:
        with _answer(address, 'bytes=0-0') as answer:
            if getattr(answer, 'status', None) == HTTPStatus.PARTIAL_CONTENT:
                size = int(answer.headers['Content-Range'].rsplit('/', 1)[1])
                file = held.enter_context(io.BufferedReader(Remote(address, size), READ_AHEAD))
            else:
                file = held.enter_context(tempfile.TemporaryFile())
                shutil.copyfileobj(answer, file, READ_AHEAD)
        yield held.enter_context(zipfile.ZipFile(file))


def _answer(address, byte_range):
    """Open an address, asking for a part of it; whoever sets certificates for pip means them for this too."""
    request = urllib.request.Request(address, headers={'Range': byte_range})
    trusted = ssl.create_default_context(cafile=os.environ.get('PIP_CERT') or None)

    return urllib.request.urlopen(request, timeout=60, context=trusted)
