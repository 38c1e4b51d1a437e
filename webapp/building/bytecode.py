"""Make Python start quickly in the browser: only what the engine imports, compiled, and the memory of a started one.

All of it is made by the pinned Pyodide itself under Node, so that the byte code is exactly what that Pyodide reads.
Each product is kept in the cache under the contents that it was made of.
"""

import json
import subprocess
from pathlib import Path

from webapp.building import memory
from webapp.building.cached import made
from webapp.building.places import ROOT
from webapp.building.reach import engine_sources
from webapp.building.runtime import FILES, NUMPY_WHEEL
from webapp.building.session import requests
from webapp.building.stop import Stop

INSIDE = Path(__file__).parent / 'inside'
WORKSHOP = Path(__file__).parent / 'workshop.mjs'

# numpy's docstrings for its compiled functions: a twentieth of its size and of the time to import it.
DOCSTRINGS_ONLY = ['numpy/_core/_add_newdocs.py', 'numpy/_core/_add_newdocs_scalars.py']


def engine_parts(node, runtime, with_snapshot=True):
    """Return the files that the engine starts from.

    Parameters
    ----------
    node : Path
        The Node that runs Pyodide here. [unitless]
    runtime : Path
        The folder of Pyodide's files and numpy's wheel. [unitless]
    with_snapshot : bool
        Whether a started Python's memory is among them. [unitless]

    Returns
    -------
    parts : dict of str to Path
        wasm, stdlib, numpy, core and, if wanted, snapshot.
    """
    kept = json.loads(
        made('kept.json', lambda place: record(node, runtime, place), *engine_sources(), *_tools()).read_text()
    )
    stdlib = made(
        'stdlib.zip', lambda place: compile_library(node, runtime, kept, place), json.dumps(kept['library']), *_tools()
    )
    numpy = made(
        'numpy.pack', lambda place: compile_numpy(node, runtime, kept, place), json.dumps(kept['numpy']), *_tools()
    )
    core = made('core.pack', lambda place: compile_core(node, runtime, place), *engine_sources(), *_tools())
    wasm = Path(runtime) / 'pyodide.asm.wasm'
    parts = {'wasm': wasm, 'stdlib': stdlib, 'numpy': numpy, 'core': core}
    if with_snapshot:
        modules = json.dumps(kept['modules'])
        started = (modules, stdlib, *_tools())
        parts['snapshot'] = made(
            'snapshot.bin', lambda place: remember(node, runtime, stdlib, kept['modules'], place), *started
        )
        parts['stdlib'] = made('emptied.zip', lambda place: empty(stdlib, kept['modules'], place), *started)

    return parts


def record(node, runtime, place):
    """Use the engine as a page would and note which modules it takes.

    Parameters
    ----------
    node, runtime : Path
        As in `engine_parts`. [unitless]
    place : Path
        Gets kept.json. [unitless]
    """
    print('Recording which modules the engine uses')
    (place / 'session.json').write_text(json.dumps({'sources': source_names(), 'requests': requests()}))
    run(node, runtime, runtime / 'python_stdlib.zip', 'record.py', place)


def compile_library(node, runtime, kept, place):
    """Compile the standard library's modules that are used.

    Parameters
    ----------
    node, runtime, place : Path
        As in `record`. [unitless]
    kept : dict
        What `record` found. [unitless]
    """
    print(f'Compiling {len(kept["library"])} modules of the standard library')
    files = {path: f'/runtime/python_stdlib.zip::{path}' for path in kept['library']}
    compile_archive(node, runtime, place, archive='zip', out='stdlib.zip', optimize=2, bare=True, files=files)


def compile_numpy(node, runtime, kept, place):
    """Compile numpy's modules that are used.

    Parameters
    ----------
    node, runtime, place : Path
        As in `record`. [unitless]
    kept : dict
        What `record` found. [unitless]
    """
    print(f'Compiling {len(kept["numpy"])} modules of numpy')
    files = {path: f'/runtime/{NUMPY_WHEEL}::{path}' for path in kept['numpy']}
    compile_archive(node, runtime, place, archive='pack', out='numpy.pack', optimize=2, bare=True, files=files)


def compile_core(node, runtime, place):
    """Compile our own modules that run in the browser; they keep their line numbers.

    Parameters
    ----------
    node, runtime, place : Path
        As in `record`. [unitless]
    """
    files = {name: f'/project/{name}' for name in source_names()}
    print(f'Compiling {len(files)} modules of the engine')
    compile_archive(node, runtime, place, archive='pack', out='core.pack', optimize=2, bare=False, files=files)


def compile_archive(node, runtime, place, **job):
    """Compile files into one archive.

    Parameters
    ----------
    node, runtime, place : Path
        As in `record`. [unitless]
    **job : dict
        As inside/compile.py says. [unitless]
    """
    (place / 'compile.json').write_text(json.dumps([{'blank': DOCSTRINGS_ONLY, **job}]))
    run(node, runtime, runtime / 'python_stdlib.zip', 'compile.py', place)


def remember(node, runtime, stdlib, modules, place):
    """Keep the memory of a Python that has started and imported the library's modules.

    Parameters
    ----------
    node, runtime, place : Path
        As in `record`. [unitless]
    stdlib : Path
        The archive that the page starts from, or one with every file in the same place. [unitless]
    modules : list of str
        What to import. [unitless]
    """
    print('Keeping the memory of a started Python')
    whole = place / 'whole.bin'
    run(node, runtime, stdlib, 'preload.py', place, words=modules, snapshot=str(whole), folders={})
    sent = memory.difference(whole.read_bytes(), (runtime / 'pyodide.asm.wasm').read_bytes())
    (place / 'snapshot.bin').write_bytes(sent)


def empty(stdlib, modules, place):
    """Write the library's archive without the contents of what the kept memory has imported.

    Parameters
    ----------
    stdlib, place : Path
        As in `remember`. [unitless]
    modules : list of str
        What has been imported. [unitless]
    """
    stems = {module.replace('.', '/') for module in modules}
    names = {stem + ending for stem in stems for ending in ('.pyc', '/__init__.pyc')}
    (place / 'emptied.zip').write_bytes(memory.emptied(stdlib.read_bytes(), names))


def run(node, runtime, stdlib, script, place, **more):
    """Run a file of inside/ in Pyodide; stop with its own last words when it fails.

    Parameters
    ----------
    node, runtime, stdlib, place : Path
        As above. [unitless]
    script : str
        The file's name. [unitless]
    **more : dict
        What else the job says, as in workshop.mjs. [unitless]
    """
    job = {
        'runtime': f'{runtime}/',
        'stdlib': str(stdlib),
        'script': str(INSIDE / script),
        'folders': {'project': str(ROOT), 'runtime': str(runtime), 'job': str(place)},
        'words': [],
        **more,
    }
    path = place / 'job.json'
    path.write_text(json.dumps(job))
    done = subprocess.run([node, WORKSHOP, path], capture_output=True, text=True)
    print(done.stdout, end='')
    if done.returncode:
        last = (done.stderr.strip().splitlines() or ['no reason given'])[-1]
        raise Stop(f'Pyodide could not run {script} while building ({last[:300]}): the sources have an error there.')


def source_names():
    """Return our modules that run in the browser, as paths in the project.

    Returns
    -------
    names : list of str
        With slashes.
    """
    return [path.relative_to(ROOT).as_posix() for path in engine_sources()]


def _tools():
    """Return all that decides how the products are made."""
    return [*sorted(INSIDE.glob('*.py')), WORKSHOP, json.dumps(FILES)]
