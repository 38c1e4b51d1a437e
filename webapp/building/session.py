"""What a page asks of the engine in an ordinary session: the build watches it to learn which modules are needed."""

import json

from webapp.building.places import WEBAPP

EDITS = (
    {'key': 'radar.pulse_us', 'text': '1.2'},
    {'key': 'waveform.pri_us.0', 'text': '900 Hz'},
    {'key': 'radar.carrier_ghz', 'text': 'abc'},
    {'do': 'add-pri'},
    {'do': 'set-kind', 'value': 'stagger'},
    {'do': 'add-rain'},
)


def requests():
    """Return the requests of a session: every example, some edits (one refused), a link, a bare list, a fault.

    Returns
    -------
    requests : list of dict
        As the worker passes them to the bridge.
    """
    plans = [json.loads(path.read_text(encoding='utf-8')) for path in sorted((WEBAPP / 'examples').glob('*.json'))]
    notes = [{'plan': plan, 'figures': figures(), 'edits': edits} for plan in plans for edits in ([], *([edit] for edit in EDITS))]
    links = [{'open': text} for text in ('v=1&pri=980,860us', 'v=1&pri=980,86', '980 860 us')]

    return [
        *({'action': 'note', 'args': args} for args in [*notes, *links]),
        *({'action': 'assess', 'args': {'document': plan}} for plan in plans),
        {'action': 'no such action', 'args': {}},
    ]


def figures():
    """Return the names of the figures.

    Returns
    -------
    names : list of str
        In the order of the page.
    """
    return [
        'trade-line',
        'eclipsed-ranges',
        'blind-speeds',
        'blind-zones',
        'decoding',
        'doppler-filters',
        'detection',
        'dwell',
    ]
