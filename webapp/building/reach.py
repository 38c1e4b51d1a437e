"""Which of our own modules the engine can reach from the bridge, by reading their imports, those in functions too."""

import ast

from webapp.building.places import ROOT

FIRST = 'webapp.engine.bridge'


def engine_sources():
    """Return the files of our own that go to the browser's Python.

    Returns
    -------
    paths : list of Path
        Sorted; a module that only the command line or the tests use is not among them.
    """
    found, waiting = set(), [FIRST]
    while waiting:
        name = waiting.pop()
        path = file_of(name)
        if path and path not in found:
            found.add(path)
            waiting += [*imports(path), *packages_of(name)]

    return sorted(found)


def file_of(name):
    """Return the file of a module of ours, or None.

    Parameters
    ----------
    name : str
        With its dots. [unitless]

    Returns
    -------
    path : Path or None
        The module, or its package's __init__.
    """
    stem = ROOT.joinpath(*name.split('.'))
    candidates = (stem.with_suffix('.py'), stem / '__init__.py')

    return next((path for path in candidates if path.is_file()), None)


def imports(path):
    """Return all that a file may import: modules, and names that may be modules.

    Parameters
    ----------
    path : Path
        Its source. [unitless]

    Returns
    -------
    names : list of str
        With their dots.
    """
    names = []
    for node in ast.walk(ast.parse(path.read_text(encoding='utf-8'))):
        if isinstance(node, ast.Import):
            names += [alias.name for alias in node.names]
        elif isinstance(node, ast.ImportFrom) and node.level == 0:
            names += [node.module, *(f'{node.module}.{alias.name}' for alias in node.names)]

    return names


def packages_of(name):
    """Return the packages around a module, which are imported before it.

    Parameters
    ----------
    name : str
        With its dots. [unitless]

    Returns
    -------
    names : list of str
        The outermost first.
    """
    parts = name.split('.')

    return ['.'.join(parts[:count]) for count in range(1, len(parts))]
