"""``find``: drive a search with a clock, on one process, several, or a cluster.

What is found depends on limits, seed and steps alone; the clock only decides
where it stops. Slices go to any executor of ``concurrent.futures`` and are taken
in by their number, so that the list is the same whoever did the work.
"""

import contextlib
import json
import sys
import time
from collections import deque
from concurrent.futures import ProcessPoolExecutor
from concurrent.futures.process import BrokenProcessPool

from pycore.errors import InputError
from pycore.finder import SLICE_STEPS, Search, run_slice, slices
from pycore.finder.plan import as_found, limits_of
from pycore.finder.words import verdict

PROGRESS_EVERY_S = 0.5
"""Time between two lines of progress. [s]"""


def find(plan, asked, seconds, steps, seed, workers, cluster, most=10, out=sys.stdout, err=sys.stderr):
    """Search for better plans until the time or the steps are over, or it is stopped by hand.

    Parameters
    ----------
    plan : dict
        The plan whose limits hold where none is asked. [plan's units]
    asked : mapping
        Limits, as in :data:`pycore.finder.plan.ASKED`. [unitless]
    seconds : float or None
        Time allowance. [s]
    steps : int or None
        Steps to take. [unitless]
    seed : int
        Same limits, seed and steps: same list. [unitless]
    workers : int
        Processes. [unitless]
    cluster : str or None
        Address of a Dask scheduler that does the work instead. [unitless]
    most : int
        Sets to list. [unitless]
    out, err : text files
        Where answers and progress go. [unitless]

    Returns
    -------
    answer : dict
        ``plans``, ``tried``, ``steps``, ``seconds``, ``seed``, ``proved`` and ``verdict``.
    """
    limits = limits_of(plan, asked)
    search, watch = Search(limits, seed), _Watch(limits, seconds, out, err)
    with contextlib.suppress(KeyboardInterrupt):
        if workers > 1 or cluster:
            _by_slices(search, watch, steps, workers, cluster)
        else:
            _by_steps(search, watch, steps)
    watch.clear()
    return {
        'plans': [as_found(one, limits.clock_hz) for one in search.ranked(most)],
        'tried': int(search.tried),
        'steps': int(search.steps),
        'seconds': watch.elapsed,
        'seed': seed,
        'proved': search.proved,
        'verdict': verdict(search),
    }


class _Watch:
    """The clock, the line of progress, and the improvements told so far."""

    def __init__(self, limits, seconds, out, err):
        self.limits, self.seconds, self.out, self.err = limits, seconds, out, err
        self.began = self.told = time.monotonic()
        self.best = None

    @property
    def elapsed(self):
        return time.monotonic() - self.began

    @property
    def over(self):
        return self.seconds is not None and self.elapsed >= self.seconds

    def look(self, search):
        """Tell an improvement, and now and then how far the search is."""
        now = time.monotonic()
        if now - self.told < PROGRESS_EVERY_S:
            return
        self.told = now
        best = next(iter(search.ranked(1)), None)
        if best is not None and best.pri_counts != self.best:
            self.best = best.pri_counts
            if not self.out.isatty():
                print(json.dumps(as_found(best, self.limits.clock_hz)), file=self.out, flush=True)
        if self.err.isatty():
            rate = search.tried / self.elapsed
            share = '' if best is None else f', best {best.visible_share:.4%} seen'
            print(f'\r{search.tried} sets tried, {rate:.0f} a second{share}', end='', file=self.err, flush=True)

    def clear(self):
        if self.err.isatty():
            print('\r\x1b[K', end='', file=self.err, flush=True)


def _by_steps(search, watch, steps):
    """Take one step after the other in this process."""
    while not watch.over and (steps is None or search.steps < steps) and search.step():
        watch.look(search)


def _by_slices(search, watch, steps, workers, cluster):
    """Hand whole slices to an executor and take them in by their number."""
    last = slices(search.limits)
    waiting, handed, left = deque(), 0, steps
    with _executor(workers, cluster) as pool:
        while not watch.over:
            while len(waiting) < 2 * workers and (last is None or handed < last) and (left is None or left > 0):
                size = SLICE_STEPS if left is None else min(left, SLICE_STEPS)
                waiting.append((handed, size, pool.submit(run_slice, search.limits, search.seed, handed, size)))
                handed, left = handed + 1, None if left is None else left - size
            if not waiting:
                return
            _take_in(search, pool, waiting)
            watch.look(search)
        pool.stop()


def _take_in(search, pool, waiting):
    """Wait for the next slice; where its worker died, all that is waiting is done again."""
    number, size, future = waiting[0]
    try:
        found = future.result()
    except BrokenProcessPool:
        pool.renew()
        for index, (number, size, _) in enumerate(waiting):
            waiting[index] = number, size, pool.submit(run_slice, search.limits, search.seed, number, size)
        return
    waiting.popleft()
    search.add(found)


class _Processes:
    """A pool of processes that can be replaced when one of them dies."""

    def __init__(self, workers):
        self.workers = workers
        self.pool = ProcessPoolExecutor(workers)

    def submit(self, *call):
        return self.pool.submit(*call)

    def renew(self):
        self.pool.shutdown(wait=False, cancel_futures=True)
        self.pool = ProcessPoolExecutor(self.workers)

    def stop(self):
        self.pool.shutdown(wait=False, cancel_futures=True)


class _Cluster:
    """A Dask cluster, which does again by itself what a lost worker had."""

    def __init__(self, client):
        self.client, self.pool = client, client.get_executor()

    def submit(self, *call):
        return self.pool.submit(*call)

    def stop(self):
        self.client.close()


@contextlib.contextmanager
def _executor(workers, cluster):
    pool = _connected(cluster) if cluster else _Processes(workers)
    try:
        yield pool
    finally:
        pool.stop()


def _connected(address):
    try:
        from distributed import Client
    except ImportError:
        raise InputError(
            'cluster', 'A cluster needs the package distributed: pip install pulsewright[cluster].'
        ) from None
    try:
        return _Cluster(Client(address, timeout='10s'))
    except (OSError, ValueError) as error:
        raise InputError('cluster', f'There is no Dask scheduler at {address}: {error}.') from None
