"""The command line: ``python -m pycore assess PLAN``, and its sisters.

Reads files and standard input, prints, and turns an ``InputError`` into one line
on standard error and exit status 2. Everything it says comes from :mod:`pycore.api`.
"""

import argparse
import contextlib
import csv
import json
import sys
from fractions import Fraction
from pathlib import Path

from pycore import api, document
from pycore.commands.find import find
from pycore.errors import InputError
from pycore.findings.finding import SIGNS
from pycore.wording import trimmed

BAD_INPUT = 2
"""Exit status where the input cannot be used."""

TIGHTEST = 3
"""So many inputs are printed under a finding with ``--margins``. [unitless]"""

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
    assess.add_argument(
        '--margins', action='store_true', help='how far each input can move before a verdict flips (takes seconds)'
    )
    _command(commands, 'link', _link, 'print the link of a plan, without the address it is appended to')
    timing = _command(commands, 'timing', _timing, 'print the timing table in counts of the clock')
    timing.add_argument('--csv', action='store_true', help='print it as CSV')
    vary = _command(commands, 'vary', _vary, 'print the findings against one input, or two, as CSV')
    vary.add_argument('inputs', nargs='+', metavar='KEY A..B', help='a key of the plan and the interval it runs over')
    vary.add_argument('--by', action='append', required=True, metavar='STEP', help='step of each input, in its unit')
    vary.add_argument('-o', dest='output', metavar='FILE', help='write there instead of standard output')
    _find_options(_command(commands, 'find', _find, 'search for plans that leave less of the coverage blind'))
    compare = _command(commands, 'compare', _compare, 'print how a plan differs from others')
    compare.add_argument('others', nargs='+', metavar='OTHER', help='plans to compare it with')
    compare.add_argument('--json', action='store_true', help='print the comparison as JSON')
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
        print(json.dumps(api.assess(plan, options.margins), ensure_ascii=False, allow_nan=False))
        return
    answer = api.note(plan)
    print(answer['plan']['title'] or 'Untitled plan')
    print(answer['verdict']['text'], end='\n\n')
    for finding in answer['findings']:
        print(f'{SIGNS[finding["verdict"]]} {finding["verdict"]:<15}  {finding["text"]}')
        if finding['remark_text'] and finding['remark']:
            print(f'{"":<19}{finding["remark_text"]}')
        if options.margins and finding['met'] is not None:
            _print_margins(api.margins_of(plan, finding['name'])['margins'])


def _print_margins(rows):
    """Print how far the tightest inputs of a finding can move."""
    for row in rows[:TIGHTEST]:
        ends = ' and '.join(
            f'{word} {trimmed(row[end])}{" " if row["unit"] else ""}{row["unit"]}'
            for word, end in (('down to', 'from'), ('up to', 'to'))
            if row[end] is not None
        )
        print(f'{"":<19}{row["label"]} {trimmed(row["value"])}: the same verdict {ends}')


def _link(options):
    print(api.note(plan_of(options.plan))['link'])


def _find_options(find):
    """Add the limits that a search can be asked for; those that are not named come from the plan."""
    find.add_argument('--n', type=int, help='number of PRIs')
    find.add_argument('--m', type=int, help='how many of them must see a target')
    find.add_argument('--pri-us', metavar='A..B', help='interval of PRIs')
    find.add_argument('--keep', action='append', metavar='US', help='a PRI to keep; more than once for several')
    find.add_argument('--avoid', action='append', metavar='A..B', help='an interval of PRIs to avoid')
    find.add_argument('--step-us', metavar='US', help='PRIs are whole steps of this')
    find.add_argument('--whole-gates', action='store_true', help='PRIs are whole range gates')
    find.add_argument('--apart-us', metavar='US', help='least difference between any two PRIs')
    find.add_argument('--decode', choices=('blur', 'exact', 'none'), default='blur', help='how decoding is judged')
    find.add_argument('--hole-km', metavar='KM', help='a longer hole is not tolerated')
    find.add_argument('--hole-mps', metavar='MPS', help='a wider hole is not tolerated')
    find.add_argument('--cpi-ms', metavar='MS', help='time of each CPI, instead of its pulses')
    find.add_argument('--seconds', metavar='S', help='time allowance (10 unless steps are given)')
    find.add_argument('--steps', type=int, metavar='K', help='steps to take; the same steps give the same list')
    find.add_argument('--seed', type=int, default=1, metavar='K', help='seed of the search')
    find.add_argument('--workers', type=int, default=1, metavar='W', help='processes')
    find.add_argument('--cluster', metavar='ADDRESS', help='a Dask scheduler that does the work')
    find.add_argument('--json', action='store_true', help='print JSON lines')


def _find(options):
    """Search until the allowance is over, then print what was found."""
    numbers = ('step_us', 'apart_us', 'hole_km', 'hole_mps', 'cpi_ms')
    asked = {
        **{name: _exact(name, getattr(options, name)) for name in numbers},
        'n': options.n,
        'm': options.m,
        'pri_us': options.pri_us and _pair('pri-us', options.pri_us),
        'keep_us': [_exact('keep', one) for one in options.keep or ()],
        'avoid_us': [_pair('avoid', one) for one in options.avoid or ()],
        'whole_gates': options.whole_gates,
        'decode': options.decode,
    }
    seconds = None if options.seconds is None else float(_exact('seconds', options.seconds))
    seconds = 10.0 if seconds is None and options.steps is None else seconds
    if options.workers < 1 or (options.steps is not None and options.steps < 1):
        raise InputError('', '--workers and --steps must be at least 1.')
    answer = find(plan_of(options.plan), asked, seconds, options.steps, options.seed, options.workers, options.cluster)
    if options.json or not sys.stdout.isatty():
        print(json.dumps(answer, allow_nan=False))
        return
    for one in answer['plans']:
        pris = ' '.join(f'{pri:g}' for pri in one['pri_us'])
        print(f'{one["visible_share"]:.3%} seen, {one["excess_over_floor"]:.4%} above the floor: {pris} us')
    print(answer['verdict'] or f'{answer["tried"]} sets tried in {answer["seconds"]:.1f} s, seed {answer["seed"]}')


def _exact(name, text):
    """Return a decimal exactly; ``None`` stays."""
    try:
        return None if text is None else Fraction(text)
    except (ValueError, ZeroDivisionError):
        raise InputError(name, f'{name} must be a number; got {text[:40]}.') from None


def _pair(name, text):
    low, found, high = text.partition('..')
    if not found:
        raise InputError(name, f'{name} must be an interval such as 35..150; got {text[:40]}.')
    return _exact(name, low), _exact(name, high)


def _timing(options):
    """Print the timing table, as CSV or laid out for reading."""
    table = api.timing(plan_of(options.plan))
    if options.csv:
        writer = csv.writer(sys.stdout, lineterminator='\n')
        writer.writerow(table['head'])
        writer.writerows(table['rows'])
        return
    cells = [table['head'], *([_cell(one) for one in row] for row in table['rows'])]
    widths = [max(len(row[column]) for row in cells) for column in range(len(table['head']))]
    for row in cells:
        print('  '.join(cell.rjust(width) for cell, width in zip(row, widths, strict=True)))
    rest = '' if table['rest_counts'] is None else f', rest {table["rest_counts"]} counts'
    clock, checksum = f'{table["clock_mhz"]:g} MHz', table['checksum']
    print(f'one set {table["sum_counts"]} counts{rest}; clock {clock}; plan {checksum.upper()}')


def _cell(value):
    return '' if value is None else str(value) if isinstance(value, int) else f'{value:.6g}'


def _vary(options):
    """Print a table of findings; a pair of a key and an interval for each input."""
    keys, ranges = options.inputs[::2], options.inputs[1::2]
    if len(keys) != len(ranges) or len(keys) != len(options.by):
        raise InputError('', 'vary takes a key and an interval A..B for each input, and --by for each.')
    inputs = [_axis(*one) for one in zip(keys, ranges, options.by, strict=True)]
    table = api.vary(plan_of(options.plan), inputs)
    with _opened(options.output) as file:
        writer = csv.writer(file, lineterminator='\n')
        writer.writerow(table['head'])
        writer.writerows(table['rows'])


def _axis(key, interval, step):
    low, found, high = interval.partition('..')
    try:
        ends = [Fraction(text) for text in (low, high, step)]
    except (ValueError, ZeroDivisionError):
        ends = None
    if not found or ends is None:
        raise InputError(key[:80], f'{key[:80]} must run over an interval such as 0.5..3; got {interval[:40]}.')
    return {'key': key, 'from': ends[0], 'to': ends[1], 'by': ends[2]}


def _opened(path):
    if path is None:
        return contextlib.nullcontext(sys.stdout)
    try:
        return Path(path).open('w', encoding='utf-8', newline='')
    except OSError as error:
        raise InputError('', f'The table cannot be written to {path}: {error.strerror}.') from None


def _compare(options):
    """Print inputs that differ, then findings; exit with 1 where a verdict differs."""
    plan = plan_of(options.plan)
    answers = [api.compare(plan_of(words), plan) for words in options.others]
    if options.json:
        print(json.dumps(answers, ensure_ascii=False, allow_nan=False))
    else:
        for words, answer in zip(options.others, answers, strict=True):
            _print_comparison(words, answer)
    return int(any(answer['differ'] for answer in answers))


def _print_comparison(words, answer):
    print(f'{words} against the first plan:')
    for one in answer['inputs']:
        print(f'  {one["label"]}: {one["plan"]} (was {one["other"]})')
    if not answer['inputs']:
        print('  no input differs')
    for one in answer['findings']:
        print(f'  {one["change"]:<7} {one["label"]}: {one["value_text"]} (was {one["other_text"]})')


if __name__ == '__main__':
    sys.exit(main())
