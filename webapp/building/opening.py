"""Compute what the page shows before its engine is there: the opening example's answer and its figures.

Run by the environment's Python: ``python -m webapp.building.opening``; prints the JSON that goes into the page.
"""

import json
import subprocess
import sys
from dataclasses import asdict
from pathlib import Path

from webapp.building.cached import made
from webapp.building.places import ROOT, WEBAPP, content_key
from webapp.building.stop import Stop

EXAMPLES = (
    'opening',
    'one-clear-prf',
    'long-range',
    'coastal',
    'two-carriers',
    'four-pulse-stagger',
    'three-delay-stagger',
    'heavy-rain',
    'two-prf-weather',
    'counter-drone',
    'eight-prfs',
    'high-prf',
    'sixteen-prfs',
)  # webapp/examples, from simple to special, as the page lists them; it opens with the first


def opening_json(python):
    """Return the opening answer as the JSON text for the page.

    Parameters
    ----------
    python : Path
        The interpreter that has numpy and bokeh. [unitless]

    Returns
    -------
    text : str
        One JSON object.
    """
    sources = [path for folder in ('pycore', 'webapp/figures') for path in sorted((ROOT / folder).rglob('*.py'))]
    sources += [
        *sorted((WEBAPP / 'examples').glob('*.json')),
        *sorted((WEBAPP / 'engine').glob('*.py')),
        Path(__file__),
    ]

    return made('opening.json', lambda place: compute(python, place), str(python), *sources).read_text(encoding='utf-8')


def compute(python, place):
    """Write the opening answer.

    Parameters
    ----------
    python : Path
        As in `opening_json`. [unitless]
    place : Path
        Gets opening.json. [unitless]
    """
    print('Computing the opening example')
    command = [python, '-m', 'webapp.building.opening']
    done = subprocess.run(command, cwd=ROOT, capture_output=True, text=True, encoding='utf-8')
    if done.returncode:
        raise Stop(f'The opening example could not be computed: {done.stderr.strip().splitlines()[-1][:300]}')
    (place / 'opening.json').write_text(done.stdout, encoding='utf-8')


def opening():
    """Return what the page starts with.

    Returns
    -------
    opening : dict
        answer, items (one Bokeh document for each figure) and their order, titles of the figures, keys, those of the
        followed target, grammar, units, finder, examples, version, checksum.
    """
    from pycore import __version__, api
    from pycore.columns import APART, FIGURES, order, trade_off
    from pycore.plan import keys as plan_keys
    from pycore.plan.keys import followed
    from pycore.wording import SHOWN_UNITS
    from webapp import figures

    plans = examples()
    answer = api.note(plan=plans[EXAMPLES[0]]['plan'], figures=[*FIGURES, *APART], deep=True)
    pictures = answer['figures']
    items = {name: figures.build(name, picture) for name, picture in pictures.items()}
    items[trade_off.NAME] = figures.build(trade_off.NAME, trade_off.picture([], None, 'time', SHOWN_UNITS))
    titles = {name: picture['title'] for name, picture in pictures.items()}
    for name in APART:
        del pictures[name]  # of a target, and none is followed yet
    for picture in pictures.values():
        del picture['columns']  # they are in the figure's own document

    return {
        'answer': answer,
        'items': items,
        'titles': titles,
        'order': {kind: list(order(kind)) for kind in ('dwells', 'stagger')},
        'keys': plan_keys.table(),
        'followed': [asdict(key) for key in followed.FOLLOWED.values()],
        'grammar': grammar(),
        'units': units(),
        'finder': finder(answer['plan']),
        'examples': [{'name': name, **shown(example, api)} for name, example in plans.items()],
        'version': __version__,
        'checksum': content_key(*sorted((ROOT / 'pycore').rglob('*.py'))),
    }


def finder(plan):
    """Return what the search for better plans says before the engine is there.

    Parameters
    ----------
    plan : dict
        The opening plan. [plan's units]

    Returns
    -------
    finder : dict
        Keys of its limits, their sentence, the colours of the small pictures.
    """
    from pycore.columns.classes import NAMES
    from pycore.finder import keys
    from webapp.engine import searching
    from webapp.figures.palette import CLASS_ROLES, PALETTE

    said = searching.limits(plan, {})
    return {'keys': keys.table(), 'said': said, 'colours': [PALETTE[CLASS_ROLES[name]] for name in NAMES]}


def grammar():
    """Return what the page needs to say a plan in words before the engine is there.

    Returns
    -------
    grammar : dict
        The core's own templates and lists, nothing of the page's.
    """
    from pycore import clauses, link, shown
    from pycore.link import items as link_items
    from pycore.plan import keys as plan_keys

    return {
        'clauses': clauses.CLAUSES,
        'patch': clauses.PATCH,
        'region': clauses.REGION,
        'region_reported': clauses.REGION_REPORTED,
        'rail': clauses.RAIL,
        'also': clauses.ALSO,
        'not_in_also': clauses.NOT_IN_ALSO,
        'judged': plan_keys.JUDGED,
        'optional_records': plan_keys.OPTIONAL_RECORDS,
        'other_units': shown.OTHER_UNITS,
        'family_choice': shown.FAMILY_CHOICE,
        'figures': shown.FIGURES,
        'link_records': link.RECORDS,
        'link_lists': {short: path for short, (path, _) in link.LISTS.items()},
        'link_units': {text: unit for unit, text in link_items.UNIT_TEXT.items()},
    }


def units():
    """Return the units that may be typed, for the page's list of them and its reader of links.

    Returns
    -------
    units : dict
        By family: what one of each unit is in the family's base unit; how else a unit may be spelt; and what the
        reader may prefer, how a link says it, and what is shown to begin with.
    """
    from pycore.link.reader_units import CHOICES, IN_LINK
    from pycore.units import ALONE, FAMILIES, SPELLINGS
    from pycore.wording import SHOWN_UNITS

    return {
        'families': {name: {unit: float(base) for unit, base in family.items()} for name, family in FAMILIES.items()},
        'spellings': SPELLINGS,
        'alone': ALONE,
        'shown': SHOWN_UNITS,
        'choices': CHOICES,
        'in_link': IN_LINK,
    }


def examples():
    """Return the worked examples in the order of the page.

    Returns
    -------
    examples : dict of str to dict
        By file name, as they are written.
    """
    folder = WEBAPP / 'examples'

    return {name: json.loads((folder / f'{name}.json').read_text(encoding='utf-8')) for name in EXAMPLES}


def shown(example, api):
    """Return what the page says of an example: its title, what it invites to, its link."""
    return {
        'title': example['plan']['title'],
        'invite': example.get('invite'),
        'link': api.note(plan=example['plan'])['link'],
    }


if __name__ == '__main__':
    sys.stdout.reconfigure(encoding='utf-8')
    # a bridge's own way with arrays and numbers that JSON has no word for, so that page and worker say the same
    from webapp.engine.bridge import packed

    text, arrays = packed(opening())
    if arrays:
        sys.exit('the opening answer holds arrays outside its figures')
    print(text)
