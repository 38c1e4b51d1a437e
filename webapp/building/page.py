"""Assemble the two outputs from one template: a page with its scripts beside it, and the whole tool in one file.

The template (webapp/page/index.html) is plain HTML with four marks, which the policy, the styles, the opening data and
the scripts replace. Both outputs boot in the same way; they differ only in where the scripts are.
"""

import base64
import hashlib
import re
from dataclasses import dataclass

from webapp.building import payload
from webapp.building.stop import Stop

# Nothing is requested from anywhere and no text becomes code; the worker is a data: address, WebAssembly has a word.
POLICY = (
    "default-src 'none'; script-src {scripts} 'wasm-unsafe-eval'; worker-src data:; style-src 'unsafe-inline'; "
    "img-src data: blob:; connect-src 'none'; base-uri 'none'; form-action 'none'"
)
MARK = re.compile(r'<!-- build: (\w+) -->')
MARKS = ('policy', 'style', 'opening', 'scripts')  # <!-- build: policy --> and so on, each once
ICON = '<link rel="icon" href="data:'  # without one, the browser asks for favicon.ico


@dataclass(frozen=True, slots=True)
class Contents:
    """All that goes into a page.

    Parameters
    ----------
    template, style, opening, licences : str
        HTML, CSS, JSON and plain text. [unitless]
    library, app : str
        BokehJS, which the page unpacks and runs when it wants it, and the page's own script. [unitless]
    parts : dict of str to str
        The large parts by name, encoded, BokehJS among them. [unitless]
    """

    template: str
    style: str
    opening: str
    licences: str
    library: str
    app: str
    parts: dict


def hosted(contents):
    """Return the files of the page that has its scripts beside it.

    Parameters
    ----------
    contents : Contents
        What goes in. [unitless]

    Returns
    -------
    files : dict of str to str
        index.html and its scripts, whose names change with what is in them.
    """
    app = hashed('app', contents.app)
    parts = {name: payload.script(name, text) for name, text in contents.parts.items()}
    places = {name: hashed(name, text) for name, text in parts.items()}
    body = data('parts', json_of(places)) + f'<script defer src="{app}"></script>\n'
    index = assembled(contents, f"'self' {allowed(contents.library)}", body)

    return {
        'index.html': index,
        app: contents.app,
        **{places[name]: text for name, text in parts.items()},
        'licences.txt': contents.licences,
    }


def single(contents):
    """Return the page that is the whole tool in one file.

    Parameters
    ----------
    contents : Contents
        What goes in. [unitless]

    Returns
    -------
    page : str
        HTML.
    """
    app = f'\n{contents.app}\n'
    blocks = {name: payload.block(name, text) for name, text in contents.parts.items()}
    body = blocks.pop('bokeh') + f'<script>{app}</script>\n' + ''.join(blocks.values())
    body += f'<script type="text/plain" id="licences">\n{contents.licences}</script>\n'

    return assembled(contents, f'{allowed(app)} {allowed(contents.library)}', body)


def assembled(contents, scripts, body):
    """Return the template with its marks replaced.

    Parameters
    ----------
    contents : Contents
        What goes in. [unitless]
    scripts : str
        What the policy allows to run. [unitless]
    body : str
        The scripts, and the data that is theirs. [unitless]

    Returns
    -------
    page : str
        HTML.
    """
    filling = {
        'policy': f'<meta http-equiv="Content-Security-Policy" content="{POLICY.format(scripts=scripts)}">',
        'style': f'<style>\n{contents.style}</style>',
        'opening': data('opening', contents.opening),
        'scripts': body,
    }
    if ICON not in contents.template:
        raise Stop(f'The template webapp/page/index.html needs an icon of its own: {ICON}...">.')

    return MARK.sub(lambda found: filling.pop(found[1]), whole(contents.template))


def whole(template):
    """Return the template if it has each mark once; else stop.

    Parameters
    ----------
    template : str
        HTML. [unitless]

    Returns
    -------
    template : str
        The same.
    """
    if sorted(MARK.findall(template)) != sorted(MARKS):
        raise Stop(
            f'The template webapp/page/index.html must have {", ".join(MARKS)} each once as <!-- build: NAME -->.'
        )

    return template


def data(name, text):
    """Return a block of JSON that the page reads.

    Parameters
    ----------
    name : str
        The element's id. [unitless]
    text : str
        JSON. [unitless]

    Returns
    -------
    element : str
        HTML in which no text of the data can end the element.
    """
    return f'<script type="application/json" id="{name}">{text.replace("<", chr(92) + "u003c")}</script>\n'


def json_of(places):
    """Return a flat table of names as JSON, in its own order."""
    return '{' + ','.join(f'"{name}":"{place}"' for name, place in places.items()) + '}'


def hashed(name, text):
    """Return a file name that changes with what is in the file, so that it can be cached for ever.

    Parameters
    ----------
    name : str
        The script. [unitless]
    text : str
        What is in it. [unitless]

    Returns
    -------
    name : str
        With ten digits of the SHA-256.
    """
    return f'{name}-{hashlib.sha256(text.encode()).hexdigest()[:10]}.js'


def allowed(text):
    """Return the policy's word for exactly this script.

    Parameters
    ----------
    text : str
        What stands between the tags. [unitless]

    Returns
    -------
    source : str
        Its SHA-256, quoted.
    """
    return f"'sha256-{base64.b64encode(hashlib.sha256(text.encode()).digest()).decode()}'"
