"""Run the benchmarks: `measure()` of every tests/bench/bench_*.py returns names and numbers, or tables of numbers.

``python -m webapp.building.bench [NAME ...]`` prints them; nothing is judged here, and no test depends on a time.
"""

import importlib.util
import sys

from webapp.building.places import ROOT

FOLDER = ROOT / 'tests' / 'bench'


def measured(path):
    """Return what one benchmark measures.

    Parameters
    ----------
    path : Path
        Its file. [unitless]

    Returns
    -------
    title, results : str, dict
        The first line of its docstring; a number or a table (row, column, number) for each name.
    """
    spec = importlib.util.spec_from_file_location(path.stem, path)
    module = importlib.util.module_from_spec(spec)
    spec.loader.exec_module(module)

    return module.__doc__.splitlines()[0], module.measure()


def lines(results):
    """Return results as lines of text.

    Parameters
    ----------
    results : dict
        As `measured` gives them. [unitless]

    Returns
    -------
    lines : list of str
        One for each number, and a table for each table.
    """
    width = max((len(name) for name, value in results.items() if not isinstance(value, dict)), default=0)
    text = []
    for name, value in results.items():
        text += table(name, value) if isinstance(value, dict) else [f'  {name:<{width}}  {shown(value):>10}']

    return text


def table(title, rows):
    """Return a table as lines of text.

    Parameters
    ----------
    title : str
        What it is about. [unitless]
    rows : dict of str to dict of str to float
        Columns by row; all rows have the same. [unitless]

    Returns
    -------
    lines : list of str
        Title, head, rows.
    """
    heads = list(next(iter(rows.values())))
    first = max(map(len, rows))
    head = f'    {"":<{first}}  ' + '  '.join(heads)
    body = [
        f'    {row:<{first}}  ' + '  '.join(f'{shown(columns[name]):>{len(name)}}' for name in heads)
        for row, columns in rows.items()
    ]

    return [f'  {title}', head, *body]


def shown(value):
    """Return a number with three figures, words as they are.

    Parameters
    ----------
    value : float, int or str
        What was measured. [unitless]

    Returns
    -------
    text : str
        For a table.
    """
    if isinstance(value, str):
        return value
    if value and not 1e-3 <= abs(value) < 1e6:
        return f'{value:.2e}'

    return f'{value:.0f}' if abs(value) >= 100 else f'{value:.3g}'


def main(names):
    """Run the benchmarks whose names are given, or all.

    Parameters
    ----------
    names : list of str
        As in bench_NAME.py. [unitless]
    """
    paths = [
        path for path in sorted(FOLDER.glob('bench_*.py')) if not names or path.stem.removeprefix('bench_') in names
    ]
    for path in paths:
        title, results = measured(path)
        print(f'\n{title}', *lines(results), sep='\n', flush=True)


if __name__ == '__main__':
    main(sys.argv[1:])
