"""Run inside Pyodide: compile the modules named in /job/compile.json to byte code that only this Python reads.

The job: a list of {"archive": "zip" or "pack", "out": name, "optimize": level, "bare": bool, "blank": [paths],
"files": {path in the archive: source}}, where a source is /folder/file or /folder/file.zip::member.
"""

import ast
import importlib.util
import json
import marshal
import struct
import zipfile

FIXED_DATE = (1980, 1, 1, 0, 0, 0)
UNCHECKED = 1  # the header's flag: found by hash, never checked against a source


def bare(code):
    """Return a code object in which each function is one line: a tenth smaller, and tracebacks still name it."""
    parts = tuple(bare(part) if hasattr(part, 'co_code') else part for part in code.co_consts)
    return code.replace(co_consts=parts, co_linetable=one_line(len(code.co_code) // 2))


def one_line(units):
    """Return a table of line numbers that gives all of these code units to the function's first line.

    The format is CPython's own: an entry of kind 13, a line without columns, covers up to 8 units and is followed by
    the step in lines. Without a table, the traceback module fails on the frame.
    """
    entries = [min(8, units - start) for start in range(0, units, 8)]
    return b''.join(bytes([0x80 | 13 << 3 | length - 1, 0]) for length in entries)


def content(source):
    """Return the bytes of a file, or of a member of an archive."""
    path, _, member = source.partition('::')
    if member:
        with zipfile.ZipFile(path) as archive:
            return archive.read(member)
    with open(path, 'rb') as file:
        return file.read()


def quick(tree):
    """Return a module of ours whose records are made in half the time: every one of them is made while the page waits.

    Where a class has no word for a docstring, dataclass writes one; and for slots it makes each class twice. The tests,
    which run outside the browser, keep both.
    """
    for node in ast.walk(tree):
        if isinstance(node, ast.ClassDef):
            node.body.insert(0, ast.parse('__doc__ = " "').body[0])
            for call in (mark for mark in node.decorator_list if isinstance(mark, ast.Call)):
                call.keywords = [keyword for keyword in call.keywords if keyword.arg != 'slots']
    return ast.fix_missing_locations(tree)


def compiled(path, data, job):
    """Return one file as it goes into the archive: its path and its bytes."""
    if not path.endswith('.py'):
        return path, data
    text = b'' if path in job['blank'] else data
    tree = ast.parse(text, path, optimize=job['optimize'])
    tree = tree if job['bare'] else quick(tree)
    code = compile(tree, path, 'exec', dont_inherit=True, optimize=job['optimize'])
    code = bare(code) if job['bare'] else code
    header = importlib.util.MAGIC_NUMBER + struct.pack('<I', UNCHECKED) + importlib.util.source_hash(data)
    return path + 'c', header + marshal.dumps(code)


def write_zip(out, members):
    """Write a zip archive without compression: it is compressed as a whole, which is smaller and quicker to read."""
    with zipfile.ZipFile(out, 'w', zipfile.ZIP_STORED) as archive:
        for path, data in members:
            archive.writestr(zipfile.ZipInfo(path, FIXED_DATE), data)


def write_pack(out, members):
    """Write a pack: a length, a JSON list of [path, length], and the files one after the other."""
    index = json.dumps([[path, len(data)] for path, data in members], separators=(',', ':')).encode()
    with open(out, 'wb') as file:
        file.write(struct.pack('<I', len(index)) + index + b''.join(data for _, data in members))


for job in json.loads(content('/job/compile.json')):
    members = [compiled(path, content(source), job) for path, source in sorted(job['files'].items())]
    {'zip': write_zip, 'pack': write_pack}[job['archive']](f'/job/{job["out"]}', members)
