"""The house rules that a reader relies on: documented parameters with units, and imports that point one way."""

import ast
import importlib
import inspect
import pkgutil
import re
import sys
from pathlib import Path

import pytest

import pycore

ROOT = Path(pycore.__file__).parent
MODULES = sorted(
    module.name
    for module in pkgutil.walk_packages([str(ROOT)], 'pycore.')
    if '__main__' not in module.name and not module.name.startswith('pycore.commands')
)
NOT_IN_THE_CORE = {'scipy', 'bokeh', 'os', 'time', 'datetime', 'random', 'socket', 'subprocess', 'js', 'pyodide'}
ONLY_THE_COMMAND_LINE = {'sys', 'pathlib', 'argparse'}


def public_functions():
    for name in MODULES:
        module = importlib.import_module(name)
        for label, function in inspect.getmembers(module, inspect.isfunction):
            if function.__module__ == name and not label.startswith('_'):
                yield pytest.param(function, id=f'{name}.{label}')


@pytest.mark.parametrize('function', list(public_functions()))
def test_every_public_function_says_what_its_parameters_are_and_in_which_unit(function):
    text = inspect.getdoc(function) or ''
    assert text, 'no docstring'
    for name in inspect.signature(function).parameters:
        entry = re.search(rf'^(\w+, )*\*{{0,2}}{name}(, \w+)*( :|$).*?(?=^\S|\Z)', text, re.MULTILINE | re.DOTALL)
        assert entry, f'{name} is not documented'
        assert re.search(r'\[[^\]]+\]', entry.group()), f'{name} has no [unit]'


@pytest.mark.parametrize('path', sorted(ROOT.rglob('*.py')), ids=lambda path: str(path.relative_to(ROOT)))
def test_the_core_imports_nothing_that_touches_the_world(path):
    imported = {name.split('.')[0] for name in _imports(path)}
    if path.name == '__main__.py' or path.parent.name == 'commands':
        pytest.skip('the command line is where the core meets the world')
    forbidden = NOT_IN_THE_CORE | ONLY_THE_COMMAND_LINE
    assert not imported & forbidden
    assert imported <= set(sys.stdlib_module_names) | {'numpy', 'pycore'}


def test_no_two_modules_of_the_core_import_each_other_in_a_circle():
    arrows = {
        _dotted(path): {name for one in _imports(path) for name in _with_packages(one, _dotted(path))}
        for path in ROOT.rglob('*.py')
    }
    done, walking = set(), []

    def walk(name):
        assert name not in walking, f'circle: {" -> ".join([*walking, name])}'
        if name in done or name not in arrows:
            return
        walking.append(name)
        for other in sorted(arrows[name]):
            walk(other)
        walking.pop()
        done.add(name)

    for name in sorted(arrows):
        walk(name)
    assert len(done) >= 30


def _dotted(path):
    parts = path.relative_to(ROOT.parent).with_suffix('').parts
    return '.'.join(parts[:-1] if parts[-1] == '__init__' else parts)


def _with_packages(name, importer):
    """Return a module and the packages that are imported on the way to it, from outside of them."""
    parts = name.split('.')
    packages = ('.'.join(parts[:length]) for length in range(2, len(parts) + 1))
    return {one for one in packages if parts[0] == 'pycore' and not f'{importer}.'.startswith(f'{one}.')}


def _imports(path):
    """Return the dotted names that a file imports; ``from package import module`` counts as that module."""
    names = []
    for node in ast.walk(ast.parse(path.read_text('utf-8'))):
        if isinstance(node, ast.Import):
            names.extend(alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom):
            names.extend(_module(node.module, alias.name) for alias in node.names)
    return names


def _module(package, name):
    """Return which module ``from package import name`` reads, by the files there are."""
    inner = ROOT.parent.joinpath(*package.split('.'), name)
    return f'{package}.{name}' if inner.with_suffix('.py').is_file() or inner.is_dir() else package
