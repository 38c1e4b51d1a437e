"""A small static server for the built page, on this machine only."""

import errno
import functools
import http.server
import webbrowser

from webapp.building.stop import Stop

USUAL_PORT = 8137
HOST = '127.0.0.1'


class Handler(http.server.SimpleHTTPRequestHandler):
    """Files of one folder; scripts, whose names change with their contents, are kept by the browser for ever."""

    def end_headers(self):
        """Send the headers, one on caching with them."""
        kept = self.path.endswith('.js')
        self.send_header('Cache-Control', 'public, max-age=31536000, immutable' if kept else 'no-cache')
        super().end_headers()

    def log_message(self, *_):
        """Say nothing about each request."""


def server(folder, port):
    """Return a server for a folder, not yet running.

    Parameters
    ----------
    folder : Path
        What it serves. [unitless]
    port : int
        Where it listens; 0 takes any free one. [unitless]

    Returns
    -------
    server : http.server.ThreadingHTTPServer
        Bound; `serve_forever` runs it.
    """
    try:
        return http.server.ThreadingHTTPServer((HOST, port), functools.partial(Handler, directory=folder))
    except OSError as fault:
        if fault.errno in (errno.EADDRINUSE, errno.EACCES):
            raise Stop(
                f'Port {port} is taken or not allowed: choose another with --port N (0 takes any free one).'
            ) from fault
        raise


def serve(folder, port, open_page=True):
    """Serve a folder until interrupted, and open it in the browser.

    Parameters
    ----------
    folder : Path
        What it serves. [unitless]
    port : int
        Where it listens. [unitless]
    open_page : bool
        Whether a browser is asked to open it. [unitless]
    """
    with server(folder, port) as running:
        address = f'http://{HOST}:{running.server_address[1]}/'
        print(f'Pulsewright is at {address}  (Ctrl+C ends it)', flush=True)
        if open_page:
            webbrowser.open(address)
        try:
            running.serve_forever()
        except KeyboardInterrupt:
            print()
