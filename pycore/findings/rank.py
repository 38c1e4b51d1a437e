"""Which of two values of a finding is the better one."""

_MORE_IS_BETTER = {
    **dict.fromkeys(('visible', 'must-see', 'blind-speed', 'decode-range', 'decode-speed', 'detection'), True),
    **dict.fromkeys(('nyquist', 'extended-nyquist', 'second-trip'), True),
    **dict.fromkeys(('largest-hole', 'unseen-inbound', 'unseen-crossing', 'dwell', 'duty', 'range-walk'), False),
    **dict.fromkeys(('unfolding', 'velocity-error'), False),
}
_NONE_IS_BEST = ('blind-speed', 'decode-range', 'decode-speed')
"""Findings whose value is ``None`` where there is no end to it; elsewhere ``None`` is the worst."""


def rank(name, value):
    """Return a number that is larger for what is better.

    Parameters
    ----------
    name : str
        Name of the finding. [unitless]
    value : float or None
        Its value. [unit of the finding]

    Returns
    -------
    rank : float
        Only the order of two ranks of one finding means anything. [unitless]
    """
    base = name.partition('.')[0]
    if value is None:
        return 1e300 if base in _NONE_IS_BEST else -1e300
    return value if _MORE_IS_BETTER[base] else -value
