"""Reading a few files out of a large archive on a server."""

import functools
import http.server
import io
import threading
import zipfile

import pytest

from webapp.building.ranges import remote_zip

SMALL, LARGE = b'seven files of interest', bytes(range(256)) * 16384  # 4 MB that does not compress


class Handler(http.server.BaseHTTPRequestHandler):
    """Serves one archive, in parts if it may, and counts the bytes that it sends."""

    def __init__(self, archive, ranges, sent, *given):
        self.archive, self.ranges, self.sent = archive, ranges, sent
        super().__init__(*given)

    def do_GET(self):  # noqa: N802 - the name that http.server calls
        """Answer with the part that was asked for, or with everything."""
        first, last = (int(end) for end in self.headers['Range'].removeprefix('bytes=').split('-'))
        body = self.archive[first : last + 1] if self.ranges else self.archive
        self.send_response(206 if self.ranges else 200)
        self.send_header('Content-Range', f'bytes {first}-{last}/{len(self.archive)}')
        self.send_header('Content-Length', str(len(body)))
        self.end_headers()
        self.wfile.write(body)
        self.sent.append(len(body))

    def log_message(self, *_):
        """Say nothing."""


@pytest.fixture
def served():
    """Return a function that serves an archive with or without ranges: its address, and the list of sizes sent."""
    running = []

    def start(ranges):
        held = io.BytesIO()
        with zipfile.ZipFile(held, 'w') as archive:
            archive.writestr('carrier/large.bin', LARGE)
            archive.writestr('carrier/small.txt', SMALL)
        sent = []
        server = http.server.ThreadingHTTPServer(
            ('127.0.0.1', 0), functools.partial(Handler, held.getvalue(), ranges, sent)
        )
        threading.Thread(target=server.serve_forever, daemon=True).start()
        running.append(server)
        return f'http://127.0.0.1:{server.server_address[1]}/carrier.whl', sent

    yield start
    for server in running:
        server.shutdown()
        server.server_close()


def test_one_small_file_is_read_without_fetching_the_large_one(served):
    address, sent = served(ranges=True)

    with remote_zip(address) as archive:
        assert archive.read('carrier/small.txt') == SMALL

    assert sum(sent) < len(LARGE) / 2


def test_a_file_larger_than_one_request_arrives_whole(served):
    address, _ = served(ranges=True)

    with remote_zip(address) as archive:
        assert archive.read('carrier/large.bin') == LARGE


def test_where_ranges_are_refused_the_archive_is_fetched_once_and_whole(served):
    address, sent = served(ranges=False)

    with remote_zip(address) as archive:
        assert archive.read('carrier/small.txt') == SMALL
        assert archive.read('carrier/large.bin') == LARGE

    assert len(sent) == 1


def test_an_archive_on_this_machine_is_read_too(tmp_path):
    with zipfile.ZipFile(tmp_path / 'carrier.whl', 'w') as archive:
        archive.writestr('small.txt', SMALL)

    with remote_zip((tmp_path / 'carrier.whl').as_uri()) as archive:
        assert archive.read('small.txt') == SMALL
