"""The command line: ``python -m pycore assess PLAN``, and its sisters.

Reads files and standard input, prints, and turns an ``InputError`` into one line
on standard error and exit status 2. Everything it says comes from :mod:`pycore.api`.
"""

import argparse
import json
import sys
from pathlib import Path

from pycore import api, document
from pycore.errors import InputError
from pycore.findings.finding import SIGNS

BAD_INPUT = 2
"""Exit status where the input cannot be used."""

LARGEST_PLAN_BYTES = 1_000_000
"""A file longer than this is no plan. [bytes]"""


def main(arguments=None):
    """Run one command and return its exit status.

    Parameters
    ----------
    arguments : sequence of str or None
        Words after the program's name; those of the process when not given. [unitless]

    Returns
    -------
    status : int
        0, or 2 for bad input.
    """
    options = _parser().parse_args(arguments)
    try:
        return options.run(options) or 0
    except InputError as error:
        print(f'pycore: {error.field}: {error.message}' if error.field else f'pycore: {error.message}', file=sys.stderr)
        return BAD_INPUT
    except BrokenPipeError:
        sys.stderr.close()
        return 0


def _parser():
    parser = argparse.ArgumentParser(
        prog='python -m pycore', description='What a PRF plan sees, and where it is blind.'
    )
    commands = parser.add_subparsers(required=True, metavar='COMMAND')
    assess = _command(commands, 'assess', _assess, 'print the findings of a plan')
    assess.add_argument('--json', action='store_true', help='print every number as JSON')
    _command(commands, 'link', _link, 'print the link of a plan, without the address it is appended to')
    return parser


def _command(commands, name, run, help_text):
    """Add a command that takes one plan."""
    command = commands.add_parser(name, help=help_text, description=help_text)
    command.add_argument('plan', metavar='PLAN', help='a JSON file, a link, "-" for standard input, or a list of PRIs')
    command.set_defaults(run=run)
    return command


def plan_of(words):
    """Return the plan that a command's argument means.

    Parameters
    ----------
    words : str
        Path of a JSON file, ``-``, a link, or a list of PRIs or PRFs. [unitless]

    Returns
    -------
    plan : dict
        The plan, not yet checked. [plan's units]
    """
    if words == '-':
        return document.understood(_limited(sys.stdin.buffer.read(LARGEST_PLAN_BYTES + 1), 'standard input'))
    if _is_file(words):
        with Path(words).open('rb') as file:
            return document.understood(_limited(file.read(LARGEST_PLAN_BYTES + 1), words))
    return document.understood(words)


def _is_file(words):
    try:
        return Path(words).is_file()
    except (OSError, ValueError):
        return False


def _limited(data, name):
    if len(data) > LARGEST_PLAN_BYTES:
        raise InputError('', f'{name} must be a plan of at most {LARGEST_PLAN_BYTES:,} bytes; it is longer.')
    try:
        return data.decode('utf-8')
    except UnicodeDecodeError:
        raise InputError('', f'{name} must be text in UTF-8; it holds other bytes.') from None


def _assess(options):
    plan = plan_of(options.plan)
    if options.json:
        print(json.dumps(api.assess(plan), ensure_ascii=False, allow_nan=False))
        return
    answer = api.note(plan)
    print(answer['plan']['title'] or 'Untitled plan')
    print(answer['verdict']['text'], end='\n\n')
    for finding in answer['findings']:
        print(f'{SIGNS[finding["verdict"]]} {finding["verdict"]:<15}  {finding["text"]}')
        if finding['remark_text'] and finding['remark']:
            print(f'{"":<19}{finding["remark_text"]}')


def _link(options):
    print(api.note(plan_of(options.plan))['link'])


if __name__ == '__main__':
    sys.exit(main())
