"""The text of a link: what stands around it, its checksum, and its deflated form."""

import base64
import re
import zlib

LONGEST = 500_000
"""Nobody sends a longer link; what is beyond is not read. [characters]"""
_AFTER_THE_END = re.compile(r'(&end=[0-9a-f]{4})[\s.,;:!?)>\]}"\'&]+$')
"""What a sentence or a mail may put behind a link."""


def checksum(text):
    """Return the four characters that end a link.

    Parameters
    ----------
    text : str
        The link before ``&end=``. [unitless]

    Returns
    -------
    checksum : str
        The low 16 bits of its CRC-32, in hexadecimal.
    """
    return f'{zlib.crc32(text.encode()) & 0xFFFF:04x}'


def fragment_of(text):
    """Return the part of an address that holds the plan.

    Parameters
    ----------
    text : str
        An address, or only its fragment. [unitless]

    Returns
    -------
    fragment : str
        What follows ``#``, or ``?`` where there is no ``#``.
    """
    text = text.strip().replace('&amp;', '&')
    for mark in ('#', '?'):
        before, found, after = text.partition(mark)
        if found and '=' in after and 'v=' not in before:
            text = after
    return _AFTER_THE_END.sub(r'\1', text.lstrip('#?'))


def deflated(text):
    """Return a text in its deflated form.

    Parameters
    ----------
    text : str
        Items of a link. [unitless]

    Returns
    -------
    packed : str
        Raw deflate in base64url, without padding.
    """
    packer = zlib.compressobj(9, zlib.DEFLATED, -15)
    return base64.urlsafe_b64encode(packer.compress(text.encode()) + packer.flush()).decode().rstrip('=')


def inflated(packed):
    """Return the text of a deflated form, and of a cut one what it still holds.

    Parameters
    ----------
    packed : str
        Base64url. [unitless]

    Returns
    -------
    text : str
        At most ``LONGEST`` bytes of it.

    Raises
    ------
    ValueError
        Where it is no base64url.
    zlib.error
        Where it is not deflated.
    """
    rest = len(packed) % 4
    whole = packed[: len(packed) - rest] + (packed[len(packed) - rest :] + '=' * (4 - rest) if rest > 1 else '')
    return zlib.decompressobj(-15).decompress(base64.urlsafe_b64decode(whole), LONGEST).decode('utf-8', 'ignore')
