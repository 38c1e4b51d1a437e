"""The parts of others: only what was released gets in, and each failure ends in one sentence."""

import io
import subprocess
import sys
import zipfile

import pytest

from webapp.building import runtime
from webapp.building.places import ROOT
from webapp.building.stop import Stop


def carrier(contents):
    """Return an archive that holds every part, with the given bytes in each."""
    held = io.BytesIO()
    with zipfile.ZipFile(held, 'w') as archive:
        for name in runtime.FILES:
            archive.writestr(runtime.CARRIER_FOLDER + name, contents)
    return zipfile.ZipFile(held)


def test_a_part_that_arrives_changed_is_refused_and_not_kept(tmp_path):
    with pytest.raises(Stop, match='arrived changed'):
        runtime.extract(carrier(b'not what was released'), tmp_path)

    assert list(tmp_path.iterdir()) == []


def test_a_part_that_was_changed_on_disk_stops_the_build(tmp_path):
    for name in runtime.FILES:
        (tmp_path / name).write_bytes(b'changed')

    with pytest.raises(Stop, match='is not the released file'):
        runtime.parts(None, tmp_path)


def test_a_folder_without_the_parts_is_told_which_it_must_hold(tmp_path):
    with pytest.raises(Stop, match=runtime.NUMPY_WHEEL):
        runtime.parts(None, tmp_path)


def test_the_parts_that_were_released_are_taken_as_they_are(tmp_path, monkeypatch):
    empty = 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855'  # SHA-256 of nothing
    monkeypatch.setattr(runtime, 'FILES', dict.fromkeys(runtime.FILES, empty))

    runtime.extract(carrier(b''), tmp_path)

    assert runtime.checked(tmp_path) == tmp_path


def test_without_a_network_the_build_says_so(monkeypatch):
    monkeypatch.setenv('PIP_NO_INDEX', '1')  # pip finds nothing, as on a machine that is not connected
    monkeypatch.setenv('PIP_FIND_LINKS', '')

    with pytest.raises(Stop, match='connect this machine to the network') as stopped:
        runtime.address(sys.executable)

    assert '\n' not in str(stopped.value)


def test_numpy_is_the_wheel_that_pyodide_itself_names():
    assert runtime.FILES[runtime.NUMPY_WHEEL] == '0cad9c1b91f0082e4f959bc0e0bf5835a2efbba6ab3b1e9d1fe6e7e564cca98e'


def test_a_failed_build_ends_in_one_sentence_and_no_traceback(tmp_path):
    done = subprocess.run(
        [sys.executable, 'build.py', '--runtime', tmp_path / 'nowhere'], capture_output=True, text=True, cwd=ROOT
    )

    assert done.returncode == 1
    assert len(done.stderr.strip().splitlines()) == 1
    assert 'Traceback' not in done.stderr
