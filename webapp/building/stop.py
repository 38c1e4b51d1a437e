"""The one way in which the build gives up: a sentence that says what went wrong and what to do."""


class Stop(Exception):  # noqa: N818 - no fault, but an end that is told
    """The build cannot go on; its text is the whole message for the person at the keyboard."""


NO_NETWORK = (
    'The package index could not be reached: connect this machine to the network (or set its proxy for pip) and '
    'try again; with no network at all, build with --runtime DIR from parts that another machine has fetched.'
)
NO_SPACE = 'The disk is full: free about 1 GB where {place} lies and try again.'


def no_space(place):
    """Return the end for a full disk.

    Parameters
    ----------
    place : path
        What was being written. [unitless]

    Returns
    -------
    stop : Stop
        To be raised.
    """
    return Stop(NO_SPACE.format(place=place))
