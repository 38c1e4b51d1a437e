"""What is given up for what: the sets that no other set beats in everything."""

import numpy as np


def front(values):
    """Return which of some sets no other beats.

    Parameters
    ----------
    values : float array, shape (K, V)
        What each set is judged by, all better when lower. [any]

    Returns
    -------
    on_front : bool array, shape K
        False where another set is at least as good in everything and better in something.
    """
    values = np.asarray(values, dtype=float)
    if values.size == 0:
        return np.zeros(values.shape[0], dtype=bool)
    no_worse = (values[:, None] <= values).all(axis=2)
    better = (values[:, None] < values).any(axis=2)
    return ~(no_worse & better).any(axis=0)
