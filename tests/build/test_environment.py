"""The environment of the build, and the ends that its failures come to."""

import errno
import socket
import subprocess
import sys

import pytest

from webapp.building import browser, environment, places, serve
from webapp.building.stop import Stop


def test_each_requirement_is_pinned_and_the_tests_have_all_that_the_build_has():
    build, test = environment.pins('build'), environment.pins('test')

    assert all('==' in requirement for requirement in test)
    assert set(build) <= set(test)


def test_other_pins_make_another_environment(monkeypatch):
    before = environment.folder_of('build')
    monkeypatch.setattr(environment, 'pins', lambda kind: ['numpy==2.4.4'])

    assert environment.folder_of('build') != before


@pytest.mark.parametrize(
    ('line', 'sentence'),
    [
        ('ERROR: Could not install: [Errno 28] No space left on device\n', 'The disk is full'),
        ('WARNING: Retrying (Retry(total=1)) after connection broken\n', 'could not be reached'),
        ('ERROR: No matching distribution found for numpy==9\n', 'No matching distribution found for numpy==9'),
    ],
)
def test_what_stopped_pip_is_told_in_one_sentence(tmp_path, line, sentence):
    stop = environment.why_pip_failed(['Collecting numpy\n', line], tmp_path)

    assert sentence in str(stop)
    assert '\n' not in str(stop)


def test_a_full_disk_is_told_in_one_sentence(tmp_path, monkeypatch):
    def full(folder):
        raise OSError(errno.ENOSPC, 'No space left on device')

    monkeypatch.setattr(environment, 'create', full)

    with pytest.raises(Stop, match='The disk is full: free about 1 GB'):
        environment.make(tmp_path / 'new', [])


def test_an_environment_that_was_left_half_made_is_made_anew(tmp_path, monkeypatch):
    (tmp_path / 'rubbish').touch()
    monkeypatch.setattr(environment, 'create', lambda folder: folder.mkdir(exist_ok=True))
    monkeypatch.setattr(environment, 'install', lambda *given: None)

    environment.make(tmp_path, [])

    assert [path.name for path in tmp_path.iterdir()] == [environment.FINISHED]


def test_without_a_chromium_the_tests_say_how_to_get_one(monkeypatch):
    monkeypatch.setenv('CHROMIUM', '/nowhere/chromium')

    with pytest.raises(Stop, match='apt-get install chromium'):
        browser.chromium_or_stop()


def test_a_port_that_is_taken_is_told_with_the_way_out(tmp_path):
    with socket.create_server(('127.0.0.1', 0)) as taken, pytest.raises(Stop, match='choose another with --port'):
        serve.server(tmp_path, taken.getsockname()[1])


def test_a_python_that_is_too_old_is_told_before_anything_else():
    pretend = 'import sys, runpy; sys.version_info = (3, 10); runpy.run_path("build.py", run_name="__main__")'
    done = subprocess.run([sys.executable, '-c', pretend], capture_output=True, text=True, cwd=places.ROOT)

    assert done.stderr.startswith('Python 3.11 or newer is needed')
    assert len(done.stderr.strip().splitlines()) == 1


def test_the_cache_is_where_the_system_keeps_such_things(tmp_path, monkeypatch):
    monkeypatch.setenv('XDG_CACHE_HOME', str(tmp_path))

    assert places.cache() == tmp_path / 'pulsewright'
