"""The search on a Dask cluster of this machine: the same list as one process; a plain sentence where there is none."""

import io
import json
from pathlib import Path

import pytest

from pycore.commands import find as command
from pycore.errors import InputError

distributed = pytest.importorskip('distributed', reason='the optional extra "cluster" is not installed')

SKERRY = json.loads((Path(__file__).parents[2] / 'webapp' / 'examples' / 'opening.json').read_text('utf-8'))['plan']
FEW = {'pri_us': (700, 1000), 'step_us': 1}
pytestmark = pytest.mark.filterwarnings('ignore')  # what a scheduler of others warns of is not ours to mend


def found(address=None, workers=1):
    out = io.StringIO()
    return command.find(SKERRY, FEW, None, 700, 1, workers, address, out=out, err=io.StringIO())


@pytest.fixture(scope='module')
def cluster():
    """Return the address of a cluster of two processes on this machine."""
    with distributed.LocalCluster(
        n_workers=2, threads_per_worker=1, processes=True, dashboard_address=None, host='127.0.0.1'
    ) as local:
        yield local.scheduler_address


def test_a_cluster_gives_the_same_list_as_one_process(cluster):
    alone, together = found(), found(cluster, workers=2)
    assert together['plans'] == alone['plans']
    assert together['tried'] == alone['tried']
    assert together['steps'] == alone['steps']


def test_where_no_scheduler_answers_one_sentence_says_so():
    with pytest.raises(InputError, match='There is no Dask scheduler at 127.0.0.1:9'):
        found('127.0.0.1:9', workers=2)
