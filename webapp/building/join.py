"""Join ES modules into one classic script, which loads from a file, in a sandboxed frame and under any type.

Each module becomes a function of its own, so names cannot meet. Only the syntax that our modules use is known; anything
else stops the build, because a joiner that guesses breaks pages.
"""

import re

from webapp.building.stop import Stop

IMPORT = re.compile(r"^import\s*\{([^}]*)\}\s*from\s*'\./([\w-]+\.js)';[ \t]*$", re.MULTILINE)
EXPORT = re.compile(r'^export\s+((?:async\s+)?function\*?|const|class)\s+([A-Za-z_$][\w$]*)', re.MULTILINE)
UNKNOWN = (
    (
        re.compile(r'^\s*(import\b(?!\s*\().*)$', re.MULTILINE),
        'an import that is not "import { a, b } from \'./x.js\';"',
    ),
    (
        re.compile(r'^\s*(export\b.*)$', re.MULTILINE),
        'an export that is not "export function|async function|const|class NAME"',
    ),
    (re.compile(r'(?<![\w.$])(import\s*[(.].*)$', re.MULTILINE), 'a dynamic import or import.meta'),
    (re.compile(r'^(await\b.*)$', re.MULTILINE), 'a top-level await'),
    (re.compile(r'(</script.*|<!--.*)$', re.MULTILINE | re.IGNORECASE), 'text that ends or hides a script in a page'),
)


def joined(folder, first):
    """Return one classic script that does what a module and all that it imports do.

    Parameters
    ----------
    folder : Path
        Where the modules lie. [unitless]
    first : str
        The name of the module that nothing imports. [unitless]

    Returns
    -------
    script : str
        The modules in the order in which they must run, the given one last.
    """
    texts = {}
    for name in ordered(folder, first):
        texts[name] = (folder / name).read_text(encoding='utf-8')
    exports = {name: {found[1] for found in EXPORT.findall(text)} for name, text in texts.items()}
    bodies = '\n'.join(wrapped(name, text, exports) for name, text in texts.items())

    return f"(() => {{\n'use strict';\n{bodies}\n}})();\n"


def ordered(folder, first):
    """Return the names of a module and of all it imports, each after what it needs.

    Parameters
    ----------
    folder : Path
        Where the modules lie. [unitless]
    first : str
        Where to begin. [unitless]

    Returns
    -------
    names : list of str
        The given one last.
    """
    done = []

    def visit(name, path):
        if name in done:
            return
        if name in path:
            raise Stop(f'The modules {" -> ".join([*path, name])} import each other in a ring: move what they share.')
        if not (folder / name).is_file():
            raise Stop(f'{path[-1] if path else folder} needs {name}, and there is no such file in {folder}.')
        for _, needed in IMPORT.findall((folder / name).read_text(encoding='utf-8')):
            visit(needed, [*path, name])
        done.append(name)

    visit(first, [])

    return done


def wrapped(name, text, exports):
    """Return a module as a function that runs at once and gives what it exports.

    Parameters
    ----------
    name : str
        The module. [unitless]
    text : str
        Its source. [unitless]
    exports : dict of str to set of str
        What each module gives. [unitless]

    Returns
    -------
    statement : str
        One declaration.
    """

    def taken(found):
        pairs = [re.split(r'\s+as\s+', item.strip()) for item in found[1].split(',') if item.strip()]
        for pair in pairs:
            if pair[0] not in exports[found[2]]:
                raise Stop(f'{name} imports {pair[0]} from {found[2]}, which does not export it.')
        names = ', '.join(': '.join(pair) for pair in pairs)
        return f'const {{ {names} }} = {variable(found[2])};'

    body = EXPORT.sub(r'\1 \2', IMPORT.sub(taken, text))
    refuse_unknown(name, body)
    given = ', '.join(sorted(exports[name]))

    return f'// {name}\nconst {variable(name)} = (() => {{\n{body.rstrip()}\nreturn {{ {given} }};\n}})();'


def refuse_unknown(name, body):
    """Stop at syntax that this joiner does not know.

    Parameters
    ----------
    name : str
        The module. [unitless]
    body : str
        Its source after all known imports and exports are gone. [unitless]
    """
    for pattern, meaning in UNKNOWN:
        found = pattern.search(body)
        if found:
            raise Stop(f'{name} has {meaning}, which the build does not join: {found[1].strip()[:80]}')


def variable(name):
    """Return the name under which a module's exports are kept.

    Parameters
    ----------
    name : str
        The module's file name. [unitless]

    Returns
    -------
    variable : str
        Different for different modules.
    """
    return '$' + name.removesuffix('.js').replace('-', '$')
