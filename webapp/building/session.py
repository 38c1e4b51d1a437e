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
        {'action': 'no such action', 'args': {}},
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
