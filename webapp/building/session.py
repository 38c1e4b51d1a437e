"""What a page asks of the engine in an ordinary session: the build watches it to learn which modules are needed."""

import json

from webapp.building.places import WEBAPP

EDITS = (
    {'key': 'radar.pulse_us', 'text': '1.2'},
    {'key': 'waveform.pri_us.0', 'text': '900 Hz'},
    {'key': 'radar.carrier_ghz', 'text': 'abc'},
    {'do': 'add-pri'},
    {'do': 'add-rain'},
)


def requests():
    """Return the requests of a session: every example, some edits (one refused), links, a fault.

    Returns
    -------
    requests : list of dict
        As the worker passes them to the bridge; the figures "all" stand for every one that there is.
    """
    plans = [example_plan(path) for path in sorted((WEBAPP / 'examples').glob('*.json'))]
    notes = [{'plan': plan, 'figures': 'all', 'edits': edits} for plan in plans for edits in ([], EDITS)]
    links = [{'opened': text} for text in ('v=1&pri=980,860us', 'v=1&pri=980,86')]

    return [
        *({'action': 'note', 'args': args} for args in [*notes, *links]),
        *({'action': 'assess', 'args': {'plan': plan}} for plan in plans),
        *(request for plan in plans for request in search(plan)),
        {'action': 'no such action', 'args': {}},
    ]


def search(plan):
    """Return the requests of a short search for better plans.

    Parameters
    ----------
    plan : dict
        What is to be bettered. [plan's units]

    Returns
    -------
    requests : list of dict
        Limits in words, some steps, what they found, a list of nothing.
    """
    nothing = {'best': [], 'ends': [], 'by_time': [], 'misses': [], 'nearest': None, 'tried': 0, 'steps': 0}
    edit = {'key': 'find.n', 'text': '2'}

    return [
        {'action': 'find limits', 'args': {'plan': plan, 'asked': {}, 'edits': [edit]}},
        {'action': 'find begin', 'args': {'plan': plan, 'asked': {}, 'seed': 1}},
        {'action': 'find run', 'args': {'number': 0, 'ms': 500}},
        {'action': 'find part', 'args': {}},
        {'action': 'find list', 'args': {'parts': [nothing], 'taken': 0}},
    ]


def example_plan(path):
    """Return the plan of a worked example.

    Parameters
    ----------
    path : Path
        A file of webapp/examples. [unitless]

    Returns
    -------
    plan : dict
        As it is written there.
    """
    return json.loads(path.read_text(encoding='utf-8'))['plan']
