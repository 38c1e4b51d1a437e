"""Build, serve, test and measure Pulsewright. Needs Python 3.11 or newer and nothing else.

python3 build.py            builds dist/ (a page with its scripts, and the whole tool in one file)
python3 build.py serve      builds, serves on this machine only, prints the address and opens it
python3 build.py test       builds, checks style, runs every test in an environment and a Chromium of its own
python3 build.py bench      builds, prints how fast things are, as ratios
"""

import sys

if sys.version_info < (3, 11):  # noqa: UP036 - this file alone must run on any Python, to say so
    sys.exit(
        f'Python 3.11 or newer is needed, and this is {sys.version.split()[0]}: run build.py with a newer python3.'
    )

import argparse  # noqa: E402 - after the check
import os  # noqa: E402
import shutil  # noqa: E402
import subprocess  # noqa: E402
from pathlib import Path  # noqa: E402

from webapp.building import (  # noqa: E402, E501
    browser,
    bytecode,
    environment,
    join,
    licences,
    opening,
    page,
    payload,
    runtime,
    serve,
    sheets,
)
from webapp.building.places import DIST, ROOT, WEBAPP  # noqa: E402
from webapp.building.pyodide import worker_module  # noqa: E402
from webapp.building.stop import Stop, no_space  # noqa: E402


def build(given=None, kind='build', snapshot=True):
    """Make dist/ and return the interpreter of the environment that made it."""
    # Python with numpy and bokeh, and Node; Pyodide and numpy for WebAssembly
    given = given and runtime.checked(given)
    python = environment.interpreter(kind, wheels_in(given))
    parts_of_others = runtime.parts(python, given)

    # the engine: only what it imports, compiled, and the memory of a started Python
    node = environment.node(python)
    parts = bytecode.engine_parts(node, parts_of_others, snapshot)
    parts = {name: payload.encoded(path.read_bytes()) for name, path in parts.items()}
    worker = worker_module(parts_of_others, WEBAPP / 'engine' / 'worker.js')
    library = bokeh_script(python)
    parts = {'bokeh': payload.encoded(library.encode()), 'worker': payload.encoded(worker.encode()), **parts}

    # the page, with what it shows before the engine is there
    contents = page.Contents(
        template=sheets.template(WEBAPP / 'page'),
        style=sheets.style(WEBAPP / 'page' / 'styles'),
        opening=opening.opening_json(python),
        licences=licences.licences(python, parts_of_others),
        library=library,
        app=checked(node, join.joined(WEBAPP / 'app', 'main.js')),
        parts=parts,
    )

    # both outputs, from an empty folder
    write({**page.hosted(contents), 'pulsewright.html': page.single(contents)})

    return python


def wheels_in(given):
    """Return the folder given with --runtime if it also holds the wheels of the environment, else None."""
    return given if given and list(given.glob('bokeh-*.whl')) else None


def bokeh_script(python):
    """Return BokehJS as Bokeh's own package brings it."""
    ask = 'import bokeh; print(bokeh.__path__[0])'
    folder = subprocess.run([python, '-c', ask], cwd=ROOT, capture_output=True, text=True, check=True).stdout.strip()

    return (Path(folder) / 'server' / 'static' / 'js' / 'bokeh.min.js').read_text(encoding='utf-8')


def checked(node, script):
    """Return a classic script if it is one; stop where it does not parse."""
    done = subprocess.run([node, '--check', '-'], input=script, capture_output=True, text=True)
    if done.returncode:
        raise Stop(f'The joined script of the page does not parse: {" ".join(done.stderr.split())[:300]}')

    return script


def write(files):
    """Write the files into an empty dist/ and print each with its size."""
    shutil.rmtree(DIST, ignore_errors=True)
    DIST.mkdir()
    for name, text in files.items():
        data = text.encode()
        (DIST / name).write_bytes(data)
        print(f'  dist/{name}  {len(data) / 1e6:.2f} MB')


def test(python, selected):
    """Check the style of the sources and run the tests; return the exit status. pytest has the last word."""
    status = 0
    for verb in (['check'], ['format', '--check']):
        if subprocess.run([python, '-m', 'ruff', *verb, '--quiet', '.'], cwd=ROOT).returncode:
            print(f'The style check failed: ruff {" ".join(verb)}')
            status = 1

    # Most of the time goes into browsers that start an engine each: as many tests at once as there are processors.
    at_once = ['-n', str(min(4, os.cpu_count() or 1)), '--dist', 'worksteal']

    return subprocess.run([python, '-m', 'pytest', *at_once, *selected], cwd=ROOT).returncode or status


def main():
    """Do what the command line asks for."""
    options = arguments()
    if options.verb == 'serve':
        build(options.runtime)
        serve.serve(DIST, options.port, options.open)
    elif options.verb == 'test':
        browser.chromium_or_stop()
        return test(build(options.runtime, 'test'), options.selected)
    elif options.verb == 'bench':
        browser.chromium_or_stop()
        python = build(options.runtime, 'test')
        return subprocess.run([python, '-m', 'webapp.building.bench', *options.selected], cwd=ROOT).returncode
    else:
        build(options.runtime, snapshot=options.snapshot)

    return 0


def arguments():
    """Return what was asked for on the command line."""
    parser = argparse.ArgumentParser(
        description=__doc__,
        formatter_class=argparse.RawDescriptionHelpFormatter,
        epilog='What else stands after test goes to pytest; after bench, it names the benchmarks.',
    )
    parser.add_argument('verb', nargs='?', default='build', choices=['build', 'serve', 'test', 'bench'])
    parser.add_argument('--runtime', type=Path, metavar='DIR', help="take Pyodide's files and numpy's wheel from there")
    parser.add_argument(
        '--port', type=int, default=serve.USUAL_PORT, help='for serve (default %(default)s; 0: any free one)'
    )
    parser.add_argument('--no-open', dest='open', action='store_false', help='for serve: open no browser')
    parser.add_argument(
        '--no-snapshot', dest='snapshot', action='store_false', help='leave the started memory out: 5 MB less'
    )
    options, options.selected = parser.parse_known_args(namespace=argparse.Namespace())
    if options.selected and options.verb in ('build', 'serve'):
        parser.error(f'{options.verb} takes no {" ".join(options.selected)}')

    return options


if __name__ == '__main__':
    sys.stdout.reconfigure(line_buffering=True)
    try:
        sys.exit(main())
    except Stop as stop:
        sys.exit(f'{stop}')
    except KeyboardInterrupt:
        sys.exit('\nstopped')
    except OSError as fault:
        if fault.errno != 28:
            raise
        sys.exit(f'{no_space(fault.filename or ROOT)}')
