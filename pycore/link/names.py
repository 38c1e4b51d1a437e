"""What the items of a link are called, and what each stands for."""

from pycore.plan.keys import KEYS, MOST_PATCHES, MOST_REGIONS

RECORDS = {
    'surface': 'surface',
    'near': 'radar.near_pulse',
    'platform': 'platform',
    'crossing': 'crossing',
    'equation': 'target.radar_equation',
    'holds': 'holds_over',
    'weather': 'weather',
}
"""Items that announce a record, and its path."""
LISTS = {'must': ('must_see', MOST_REGIONS), 'rain': ('rain', MOST_PATCHES)}
"""Items that announce a list of records: its path and the most it may hold."""
SEE = ('coverage.range_km', 'coverage.speed_mps')
"""Keys that share one item, ``see``, which needs both."""
REMARK = 'remark-'
"""What stands before a finding's name where its remark travels in a link."""


def _short_names():
    """Yield each item that a plan can have: its name in a link, the path it stands for, and the key."""
    lists = {f'{path}[]': (short, path, most) for short, (path, most) in LISTS.items()}
    for key in KEYS:
        if key.record in lists:
            short, path, most = lists[key.record]
            yield f'{short}-{key.short}', f'{path}.{key.name}', key
            for index in range(most):
                yield f'{short}{index + 1}-{key.short}', f'{path}.{index}.{key.name}', key
        elif key.path not in SEE:
            yield key.short, key.path, key


BY_SHORT = {short: (path, key) for short, path, key in _short_names()}
"""For each item of one key: the path it stands for, and the key."""
TEXTS = {short for short, (_, key) in BY_SHORT.items() if key.kind in ('text', 'choice')}
"""Items whose value is a word or a text, which reads however short it was cut."""
