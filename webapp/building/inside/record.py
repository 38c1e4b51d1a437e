"""Run inside Pyodide: use the engine as a page would, and write down which modules of the library and of numpy it took.

Reads /project (our sources, by the names in the session), /runtime (numpy's wheel) and /job/session.json;
writes /job/kept.json.
"""

import ast
import glob
import importlib
import json
import sys
import zipfile

LIBRARY = '/lib/python314.zip/'
PACKAGES = '/lib/python3.14/site-packages/'

# Wanted only where something goes wrong or an odd text comes in, so a session does not show them.
SELDOM = ('encodings.ascii', 'encodings.cp437', 'encodings.latin_1', 'traceback', 'linecache', 'tokenize')


def text_of(path):
    """Return what is written in a file."""
    with open(path, encoding='utf-8') as file:
        return file.read()


def named_imports(text):
    """Yield each module that a source imports, in a function or not, and each part of numpy that it reaches into."""
    for node in ast.walk(ast.parse(text)):
        if isinstance(node, ast.Import):
            yield from (alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom) and node.level == 0:
            yield node.module
        elif isinstance(node, ast.Attribute) and isinstance(node.value, ast.Name) and node.value.id in ('np', 'numpy'):
            yield f'numpy.{node.attr}'


def take(name):
    """Import a module if there is one of that name."""
    try:
        importlib.import_module(name)
    except ModuleNotFoundError:
        return


def kept():
    """Return the files of the library and of numpy that have been imported, and the names of the library's modules."""
    files = {'library': set(), 'numpy': set()}
    names = []
    for name, module in sorted(sys.modules.items()):
        path = getattr(module, '__file__', None) or ''
        if path.startswith(LIBRARY):
            files['library'].add(path.removeprefix(LIBRARY))
        elif path.startswith(PACKAGES + 'numpy/'):
            files['numpy'].add(path.removeprefix(PACKAGES))
        if path.startswith(LIBRARY) or name in sys.builtin_module_names:
            names.append(name)
    return {**{kind: sorted(found) for kind, found in files.items()}, 'modules': names}


zipfile.ZipFile(glob.glob('/runtime/numpy-*.whl')[0]).extractall(PACKAGES)
sys.path.insert(0, '/project')
session = json.loads(text_of('/job/session.json'))
for path in session['sources']:
    for name in sorted(set(named_imports(text_of(f'/project/{path}')))):
        take(name)
for name in SELDOM:
    importlib.import_module(name)

bridge = importlib.import_module('webapp.engine.bridge')
columns = importlib.import_module('pycore.columns')
for request in session['requests']:
    if request['args'].get('figures') == 'all':
        request['args']['figures'] = columns.FIGURES
    reply = json.loads(bridge.answer(json.dumps(request))[0])
    if 'traceback' in reply.get('error', {}) and request['action'] in bridge.api.ACTIONS:
        print(f'  {request["action"]} failed while the session was recorded: {reply["error"]["message"]}')

with open('/job/kept.json', 'w') as file:
    json.dump(kept(), file, indent=1)
