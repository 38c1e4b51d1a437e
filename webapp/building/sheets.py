"""The page's template and its style, each put together from small files of one concern."""

import re

from webapp.building.stop import Stop

PART = re.compile(r'^( *)<!-- part: ([\w-]+) -->$', re.MULTILINE)
FIRST, LAST = 'base.css', 'print.css'  # what the others build on, and what wins over them


def template(folder):
    """Return the template with its parts in their places.

    Parameters
    ----------
    folder : Path
        Holds ``index.html`` and ``parts/``; every part is named in ``index.html`` once. [unitless]

    Returns
    -------
    html : str
        The whole template.
    """
    text = (folder / 'index.html').read_text(encoding='utf-8')
    named = sorted(found[2] for found in PART.finditer(text))
    there = sorted(path.stem for path in (folder / 'parts').glob('*.html'))
    if named != there:
        unmatched = ', '.join(set(named) ^ set(there)) or 'one is named twice'
        raise Stop(f'index.html must name every file of {folder / "parts"} once: {unmatched}.')

    return PART.sub(lambda found: _indented(folder / 'parts' / f'{found[2]}.html', found[1]), text)


def _indented(path, indent):
    """Return a part as deep as the place where it is named."""
    lines = path.read_text(encoding='utf-8').rstrip('\n').split('\n')

    return '\n'.join(f'{indent}{line}' if line else line for line in lines)


def style(folder):
    """Return all styles as one text.

    Parameters
    ----------
    folder : Path
        Holds the style sheets, one for each part of the page. [unitless]

    Returns
    -------
    css : str
        The base first, print last, the others by name between them: they must not depend on each other's order.
    """
    sheets = sorted(folder.glob('*.css'), key=lambda path: (path.name == LAST, path.name != FIRST, path.name))

    return '\n'.join(path.read_text(encoding='utf-8') for path in sheets)
