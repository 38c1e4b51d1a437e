"""The search in a worker: short steps, slices that any worker takes, lists that do not tell who did the work."""

import json
import subprocess
import sys
from pathlib import Path

import numpy as np
import pytest

from pycore import api
from pycore.finder import Search
from pycore.finder.plan import limits_of
from pycore.plan.reading import read
from webapp.engine import bridge, searching

ROOT = Path(__file__).parents[2]
SHARE_TOLERANCE = 1e-9


def example(name):
    return read(json.loads((ROOT / 'webapp' / 'examples' / f'{name}.json').read_text('utf-8'))['plan']).document


SKERRY, STAGGER = example('opening'), example('four-pulse-stagger')
FEW = {'pri_us': [700, 1000], 'step_us': 1}


@pytest.fixture
def ask():
    """Return a function that asks a worker over the wire; another `worker` is another one, as on the page."""
    workers = {}

    def answer(name, worker=0, **args):
        searching._now.clear()
        searching._now.update(workers.setdefault(worker, {}))
        text, _ = bridge.answer(json.dumps({'action': f'find {name}', 'args': args}))
        workers[worker] = dict(searching._now)
        reply = json.loads(text)
        if 'error' in reply:
            raise AssertionError(reply['error'])
        return reply['result']

    yield answer
    searching._now.clear()


def whole(ask, number, worker=0):
    """Run one slice to its end and return what it found."""
    while True:
        got = ask('run', worker, number=number, ms=10)
        if got['found']:
            return got['found']


def some(ask, count):
    """Run a slice until it has some sets that meet every limit, and return what it found."""
    while True:
        ask('run', number=0, ms=10)
        part = ask('part')
        if len(part['best']) >= count:
            return part


def rows(answer):
    return [(row['pris'], row['found']['visible_share']) for row in answer['rows']]


def test_one_worker_and_two_that_take_turns_give_the_same_list(ask):
    count = ask('begin', plan=SKERRY, asked=FEW, seed=1)['slices']
    alone = ask('list', parts=[whole(ask, number) for number in range(count)], taken=count)
    for worker in (1, 2):
        ask('begin', worker, plan=SKERRY, asked=FEW, seed=1)
    parts = [whole(ask, number, 1 + number % 2) for number in range(count)]
    together = ask('list', 2, parts=parts[::-1], taken=count)
    assert rows(alone) == rows(together)
    assert alone['proved']
    assert together['proved']
    assert alone['merged']['tried'] == together['merged']['tried']


def test_the_list_is_the_one_of_the_search_in_one_process(ask):
    ask('begin', plan=SKERRY, asked={}, seed=3)
    listed = ask('list', parts=[whole(ask, number) for number in range(2)], taken=2)
    search = Search(limits_of(SKERRY), 3)
    while search.next_slice < 2:
        search.step()
    assert listed['merged']['best'] == [[score, list(pris)] for score, pris in search.found.best]
    assert listed['rows'][0]['pris'] == list(search.ranked(1)[0].pri_counts)


def test_what_is_under_way_is_listed_too_and_goes_on_from_there(ask):
    ask('begin', plan=SKERRY, asked={}, seed=1)
    part = some(ask, 1)
    listed = ask('list', parts=[part], taken=0)
    assert part['tried'] > 0
    assert listed['rows']
    assert not listed['proved']
    assert ask('run', number=0, ms=1)['steps'] == part['steps'] + 1


@pytest.mark.parametrize('plan', [SKERRY, STAGGER], ids=['dwells', 'stagger'])
def test_every_listed_share_is_what_assessing_the_taken_plan_says(ask, plan):
    ask('begin', plan=plan, asked={}, seed=1)
    listed = ask('list', parts=[some(ask, 1)], taken=0)
    assert listed['rows']
    for row in [*listed['rows'], listed['own']]:
        taken = ask('use', plan=plan, pris=row['pris'])
        seen = api.assess(taken['plan'])['visible']
        assert seen['share'] == pytest.approx(row['found']['visible_share'], abs=SHARE_TOLERANCE)
        assert api.note(opened=taken['link'])['plan']['waveform']['pri_us'] == row['found']['pri_us']


def test_the_plan_as_it_is_stands_beside_what_was_found(ask):
    ask('begin', plan=SKERRY, asked={}, seed=1)
    own = ask('list', parts=[], taken=0)['own']
    assert sorted(own['found']['pri_us']) == [860, 980]
    assert own['found']['visible_share'] == pytest.approx(0.9654, abs=1e-4)


def test_a_plan_that_is_taken_keeps_what_was_edited_since(ask):
    ask('begin', plan=SKERRY, asked={}, seed=1)
    edited = api.note(plan=SKERRY, edits=[{'key': 'radar.pulse_us', 'text': '1.2'}])['plan']
    taken = ask('use', plan=edited, pris=[7350, 8810])['plan']
    assert taken['radar']['pulse_us'] == 1.2
    assert taken['waveform']['pri_us'] == [735, 881]


def test_small_pictures_show_blind_where_the_map_is_blind(ask):
    ask('begin', plan=SKERRY, asked={}, seed=1)
    image = searching.row(searching._now['search'].better((8600, 9800)), limits_of(SKERRY), api.SHOWN_UNITS)['image']
    height = image.shape[0]
    speeds = 300 * (np.arange(height) + 0.5) / height
    blind = (image <= 3).all(axis=1)
    assert blind[(speeds > 57) & (speeds < 60)].all()
    assert not blind[(speeds > 80) & (speeds < 100)].any()


def test_limits_that_cannot_be_met_say_what_stands_in_the_way(ask):
    wide = {**SKERRY, 'coverage': {'range_km': [2, 140], 'speed_mps': [0, 300]}}
    count = ask('begin', plan=wide, asked={'pri_us': [700, 1000], 'step_us': 5}, seed=1)['slices']
    listed = ask('list', parts=[whole(ask, number) for number in range(count)], taken=count)
    assert listed['rows'] == []
    assert listed['verdict'].startswith('No two PRFs meet all limits')
    assert 'of the 140' in listed['verdict']


def test_limits_that_the_plan_no_longer_allows_say_why_no_search_can_start(ask):
    said = ask('limits', plan=SKERRY, asked={'m': 2, 'n': 1}, edits=[])
    assert said['blocked'] == 'M must be from 1 to the 1 PRIs; got 2.'
    assert said['pieces']


def test_edits_are_taken_one_by_one_and_the_refused_ones_named(ask):
    edits = [{'key': 'find.n', 'text': '3'}, {'key': 'find.m', 'text': '9'}, {'do': 'nothing'}]
    said = ask('limits', plan=SKERRY, asked={}, edits=edits)
    assert said['asked'] == {'n': 3}
    assert [refused['message'][:1] for refused in said['refused']] == ['M', 'T']


def test_a_trade_off_has_a_point_for_every_row_and_marks_the_chosen_one(ask):
    ask('begin', plan=SKERRY, asked={}, seed=1)
    parts = [whole(ask, 0)]
    for against in ('time', 'decode', 'lost', 'hole'):
        listed = ask('list', parts=parts, taken=1, against=against, chosen=1)
        columns = listed['trade']['columns']
        _, shape, _ = listed['trade']['points']['x']['$']
        assert shape == [len(listed['rows'])]
        assert columns['chosen']['x']['$'][1] == [1]


@pytest.mark.parametrize('plan', [SKERRY, STAGGER], ids=['dwells', 'stagger'])
def test_a_list_of_nothing_yet_has_the_plan_alone_in_its_figure(ask, plan):
    ask('begin', plan=plan, asked={}, seed=1)
    listed = ask('list', parts=[], taken=0)
    assert listed['rows'] == []
    assert listed['trade']['columns']['own']['x']['$'][1] == [1]
    for low, high in listed['trade']['ranges'].values():
        assert low < high


def test_the_engine_starts_without_the_finder():
    code = 'import sys; import webapp.engine.bridge; print([n for n in sys.modules if n.startswith("pycore.finder")])'
    done = subprocess.run([sys.executable, '-c', code], cwd=ROOT, capture_output=True, text=True, check=True)
    assert done.stdout.strip() == '[]'
