"""Write the engine's parts as the page carries them: gzip, then base64, in a classic script or in a data block."""

import base64
import gzip

from webapp.building.cached import made


def encoded(data):
    """Return bytes as the text that the page unpacks.

    Parameters
    ----------
    data : bytes
        One part. [unitless]

    Returns
    -------
    text : str
        base64 of gzip, without a clock in it.
    """

    def write(place):
        (place / 'part.txt').write_text(base64.b64encode(gzip.compress(data, 9, mtime=0)).decode())

    return made('part.txt', write, data).read_text()


def script(name, text):
    """Return the classic script that hands a part to the page.

    Parameters
    ----------
    name : str
        The part. [unitless]
    text : str
        As `encoded` gives it. [unitless]

    Returns
    -------
    script : str
        One call.
    """
    return f'PULSEWRIGHT.deliver("{name}","{text}");\n'


def block(name, text):
    """Return the data block that holds a part inside the page; no policy touches it, since it is never run.

    Parameters
    ----------
    name : str
        The part. [unitless]
    text : str
        As `encoded` gives it. [unitless]

    Returns
    -------
    element : str
        HTML.
    """
    return f'<script type="application/octet-stream" id="part-{name}">{text}</script>\n'
