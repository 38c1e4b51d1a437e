"""The licences of all that is shipped, as one text beside the hosted page and inside the single file."""

import subprocess
import zipfile

from webapp.building.places import ROOT, WEBAPP
from webapp.building.pyodide import CHANGES
from webapp.building.runtime import NUMPY_WHEEL, PYODIDE_VERSION

RULE = '=' * 100
PYODIDE = f"""Pyodide {PYODIDE_VERSION} (with CPython for WebAssembly), Mozilla Public License 2.0, below.
The files pyodide.asm.wasm, pyodide.asm.mjs and pyodide.mjs are used as released; their source is that of the release of
this version in Pyodide's public repository. The two modules were joined by replacing these pieces, and nothing else:
{{changes}}
The standard library was compiled to byte code, without docstrings and line tables, and reduced to the modules in use.
Pyodide's core holds further libraries under licences of their own, among them Emscripten and musl (MIT), libffi (MIT),
zlib, bzip2, xz (0BSD), Zstandard (BSD), mpdecimal (BSD), Expat (MIT), SQLite (public domain)."""
NUMPY = """numpy for WebAssembly, BSD 3-Clause, and what it contains, below.
Its Python files were compiled to byte code, without docstrings and line tables, and reduced to the modules in use."""


def licences(python, runtime):
    """Return the licences of all shipped parts.

    Parameters
    ----------
    python : Path
        The interpreter that has bokeh. [unitless]
    runtime : Path
        The folder of Pyodide's files and numpy's wheel. [unitless]

    Returns
    -------
    text : str
        One section for each part.
    """
    sections = [
        PYODIDE.format(changes=changes()) + '\n\n' + stored('MPL-2.0.txt'),
        'CPython, Python Software Foundation License, below.\n\n' + stored('Python.txt'),
        NUMPY + '\n\n' + numpy_licences(runtime / NUMPY_WHEEL),
        'BokehJS, BSD 3-Clause, below.\n\n' + bokeh_licence(python),
    ]

    return f'\n\n{RULE}\n'.join(['This page contains the following parts of others.', *sections]) + '\n'


def changes():
    """Return what joining changes in Pyodide's files, one line for each piece.

    Returns
    -------
    text : str
        Straight from what the build does.
    """
    return '\n'.join(
        f'  {file}: {piece} -> {instead or "(nothing)"}'
        for file, pieces in CHANGES.items()
        for piece, _, instead in pieces
    )


def stored(name):
    """Return a licence text that lies in the project.

    Parameters
    ----------
    name : str
        Its file name. [unitless]

    Returns
    -------
    text : str
        As published.
    """
    return (WEBAPP / 'licences' / name).read_text(encoding='utf-8')


def numpy_licences(wheel):
    """Return numpy's licence and those of the libraries in it.

    Parameters
    ----------
    wheel : Path
        numpy's wheel. [unitless]

    Returns
    -------
    text : str
        Each under the name it has in the wheel.
    """
    with zipfile.ZipFile(wheel) as archive:
        names = sorted(name for name in archive.namelist() if '.dist-info/licenses/' in name)
        return '\n\n'.join(f'{name.split("/licenses/")[1]}\n\n{archive.read(name).decode()}' for name in names)


def bokeh_licence(python):
    """Return Bokeh's licence.

    Parameters
    ----------
    python : Path
        The interpreter that has bokeh. [unitless]

    Returns
    -------
    text : str
        As installed.
    """
    ask = 'from importlib.metadata import distribution as d; print(d("bokeh").read_text("licenses/LICENSE.txt"))'

    return subprocess.run([python, '-c', ask], cwd=ROOT, capture_output=True, text=True, check=True).stdout
