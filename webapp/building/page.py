"""Assemble the two outputs from one template: a page with its scripts beside it, and the whole tool in one file.

The template (webapp/page/index.html) is plain HTML. The policy, icon and styles go in after its charset, the data and the
scripts before the end of its body. Both outputs boot in the same way; they differ only in where the scripts are.
"""

import base64
import hashlib
import re
from dataclasses import dataclass

from webapp.building import payload
from webapp.building.stop import Stop

# Nothing is requested from anywhere, and no text becomes code. The worker is a data: address, WebAssembly needs its own word.
POLICY = (
    "default-src 'none'; script-src {scripts} 'wasm-unsafe-eval'; worker-src data:; style-src 'unsafe-inline'; "
    "img-src data: blob:; connect-src 'none'; base-uri 'none'; form-action 'none'"
)
CHARSET = '<meta charset="utf-8">'
END_OF_BODY = '</body>'
DEVELOPING = re.compile(r'[ \t]*<(?:link rel="stylesheet"[^>]*>|script type="module"[^>]*></script>)\n?')

# A pulse train with its second pulse missing: a blind interval.
ICON = (
    '<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 16 16"><path d="M1 13h2V4h2v9h6V4h2v9h2" fill="none" '
    'stroke="#7a3b12" stroke-width="1.6"/><path d="M6.5 13h3" stroke="#fff" stroke-width="2" stroke-dasharray="1 1"/></svg>'
)


@dataclass(frozen=True, slots=True)
class Contents:
    """All that goes into a page.

    Parameters
    ----------
    template, style, opening, licences : str
        HTML, CSS, JSON and plain text. [unitless]
    scripts : dict of str to str
        Classic scripts by name, in the order in which they run. [unitless]
    parts : dict of str to str
        The engine's parts by name, encoded. [unitless]
    """

    template: str
    style: str
    opening: str
    licences: str
    scripts: dict
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
    scripts = {hashed(name, text): text for name, text in contents.scripts.items()}
    parts = {name: payload.script(name, text) for name, text in contents.parts.items()}
    places = {name: hashed(name, text) for name, text in parts.items()}
    body = data('parts', json_of(places)) + data('opening', contents.opening)
    body += ''.join(f'<script defer src="{name}"></script>\n' for name in scripts)
    index = assembled(contents, "'self'", body)

    return {'index.html': index, **scripts, **{places[name]: text for name, text in parts.items()}, 'licences.txt': contents.licences}


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
    inline = [f'\n{text}\n' for text in contents.scripts.values()]
    body = data('opening', contents.opening)
    body += ''.join(f'<script>{text}</script>\n' for text in inline)
    body += ''.join(payload.block(name, text) for name, text in contents.parts.items())
    body += f'<script type="text/plain" id="licences">\n{contents.licences}</script>\n'

    return assembled(contents, ' '.join(map(allowed, inline)), body)


def assembled(contents, scripts, body):
    """Return the template with its head and body filled.

    Parameters
    ----------
    contents : Contents
        What goes in. [unitless]
    scripts : str
        What the policy allows to run. [unitless]
    body : str
        What goes at the end of the body. [unitless]

    Returns
    -------
    page : str
        HTML.
    """
    for mark in (CHARSET, END_OF_BODY):
        if contents.template.count(mark) != 1:
            raise Stop(f'The template webapp/page/index.html must have {mark} once; it has it {contents.template.count(mark)} times.')
    policy = f'<meta http-equiv="Content-Security-Policy" content="{POLICY.format(scripts=scripts)}">'
    icon = f'<link rel="icon" href="data:image/svg+xml;base64,{base64.b64encode(ICON.encode()).decode()}">'
    head = f'{CHARSET}\n{policy}\n{icon}\n<style>\n{contents.style}</style>'
    page = DEVELOPING.sub('', contents.template)

    return page.replace(CHARSET, head).replace(END_OF_BODY, body + END_OF_BODY)


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
