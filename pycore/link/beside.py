"""The plan to compare with, as it rides in another plan's link: ``with=``, its whole link, percent-encoded once."""

from urllib.parse import quote, unquote

from pycore.link import read_link, written

NAME = 'with'
"""The item that holds it."""


def beside(document):
    """Return the view item that carries a plan to compare with.

    Parameters
    ----------
    document : dict or None
        A filled plan; none, no item. [plan's units]

    Returns
    -------
    view : dict of str
        For :func:`pycore.link.written`; without items of its own that say how it is shown.
    """
    return {} if document is None else {NAME: quote(written(document), safe='~')}


def read_beside(opened):
    """Return the plan to compare with that an opened link carries.

    Parameters
    ----------
    opened : Opened
        The link. [unitless]

    Returns
    -------
    document : dict or None
        Filled; none where it carries none, or none whose PRIs can be read. [plan's units]
    said : list of str
        What is not as it was made.
    """
    if NAME not in opened.view:
        return None, []
    found = read_link(unquote(opened.view[NAME], errors='replace'))
    if any(one['key'] == 'waveform.pri_us' for one in found.refused):
        return None, ['The plan to compare with could not be read from the link; nothing is compared.']
    said = [*found.said, *(one['message'] for one in found.refused)]
    if found.cut:
        said.insert(0, 'the link was cut inside it, and what could not be read stands at its default.')
    elif found.edited:
        said.insert(0, 'it was edited by hand after it was made.')
    return found.document, [f'Of the plan to compare with: {sentence}' for sentence in said]
