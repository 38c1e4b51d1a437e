"""The search from the command line: the same list whoever does the work, limits refused in one sentence."""

import io
import json
import os
import signal
from concurrent.futures import ThreadPoolExecutor
from pathlib import Path

import pytest

from pycore import api
from pycore.__main__ import main
from pycore.commands import find as command
from pycore.finder import Search
from pycore.finder.plan import limits_of, with_found

SKERRY = json.loads((Path(__file__).parents[2] / 'webapp' / 'examples' / 'opening.json').read_text('utf-8'))['plan']
FEW = {'pri_us': (700, 1000), 'step_us': 1}
SHARE_TOLERANCE = 1e-9


def found(**more):
    asked = {**FEW, **more.pop('asked', {})}
    settings = {'seconds': None, 'steps': 60, 'seed': 1, 'workers': 1, 'cluster': None, **more}
    return command.find(SKERRY, asked, out=io.StringIO(), err=io.StringIO(), **settings)


def test_two_prfs_that_meet_all_that_the_opening_plan_wants_are_found():
    best = found(steps=300)['plans'][0]
    assert best['must_see'] == [1.0]
    assert best['excess_over_floor'] == pytest.approx(0, abs=1e-12)
    assert best['decode_range_km'] >= 110


def test_every_reported_share_is_what_assessing_that_plan_says():
    limits = limits_of(SKERRY, FEW)
    search = Search(limits, 1)
    for _ in range(40):
        search.step()
    for better in search.ranked(5):
        plan = with_found(SKERRY, better, limits.m, limits.clock_hz)
        assert api.assess(plan)['visible']['share'] == pytest.approx(better.visible_share, abs=SHARE_TOLERANCE)


def test_the_same_limits_seed_and_steps_give_the_same_list_on_one_process_and_on_two():
    one, two = found(steps=700), found(steps=700, workers=2)
    assert one['plans'] == two['plans']
    assert one['tried'] == two['tried']


def test_a_worker_that_dies_costs_no_more_than_its_slice(monkeypatch):
    submitted = []
    real = command._Processes.submit

    def submit(pool, *call):
        future = real(pool, *call)
        submitted.append(future)
        if len(submitted) == 2:
            os.kill(next(iter(pool.pool._processes)), signal.SIGKILL)
        return future

    monkeypatch.setattr(command._Processes, 'submit', submit)
    broken = found(steps=700, workers=2)
    monkeypatch.undo()
    assert broken['plans'] == found(steps=700)['plans']


def test_any_executor_gives_the_same_list(monkeypatch):
    class Threads:
        def __init__(self, workers):
            self.pool = ThreadPoolExecutor(workers)

        def submit(self, *call):
            return self.pool.submit(*call)

        def stop(self):
            self.pool.shutdown(wait=False, cancel_futures=True)

    monkeypatch.setattr(command, '_Processes', Threads)
    by_threads = found(steps=400, workers=3)
    monkeypatch.undo()
    assert by_threads['plans'] == found(steps=400)['plans']


def test_a_coverage_that_no_two_prfs_decode_says_which_limit_stands_in_the_way_and_how_near_the_best_comes():
    wide = {**SKERRY, 'coverage': {'range_km': [2, 140], 'speed_mps': [0, 300]}}
    asked = {'pri_us': (700, 1000), 'step_us': 2}
    answer = command.find(wide, asked, None, 2000, 1, 1, None, out=io.StringIO(), err=io.StringIO())
    assert answer['plans'] == []
    assert answer['proved']
    assert 'decodes only to' in answer['verdict']
    assert 'of the 140' in answer['verdict']


@pytest.mark.parametrize(
    ('words', 'said'),
    [
        (['--n', '0'], 'n must be a whole number from 1 to 16; got 0'),
        (['--n', '2', '--m', '3'], 'M must be from 1 to the 2 PRIs; got 3'),
        (['--pri-us', '1000..700'], 'pri_us must run upwards'),
        (['--pri-us', 'abc'], 'pri-us must be an interval'),
        (['--pri-us', '1..x'], 'pri-us must be a number'),
        (['--seconds', 'soon'], 'seconds must be a number'),
        (['--workers', '0'], 'must be at least 1'),
        (['--pri-us', '1000000..2000000'], 'take a coarser clock'),
    ],
)
def test_absurd_limits_are_refused_in_one_sentence(words, said, capsys, tmp_path):
    plan = tmp_path / 'plan.json'
    plan.write_text(json.dumps(SKERRY), 'utf-8')
    assert main(['find', str(plan), *words]) == 2
    error = capsys.readouterr().err
    assert said in error
    assert error.count('\n') == 1
    assert 'Traceback' not in error


def test_stopping_by_hand_keeps_the_best(monkeypatch):
    class Hurried(Search):
        def step(self):
            if self.steps >= 50:
                raise KeyboardInterrupt
            return super().step()

    monkeypatch.setattr(command, 'Search', Hurried)
    assert found(steps=10_000)['plans']


def test_without_a_terminal_the_answer_is_one_line_of_json(capsys):
    assert main(['find', '980 860 us', '--pri-us', '900..1000', '--step-us', '5', '--steps', '20']) == 0
    last = json.loads(capsys.readouterr().out.splitlines()[-1])
    assert {'plans', 'tried', 'steps', 'seconds', 'seed'} <= last.keys()
