"""The figures' colours by what they stand for, in the light scheme and in the dark one.

Blind is ink, seen is paper, in both: the dark scheme turns the paper and keeps the
blind zones the strongest mark. No red, amber and green, and no rainbow.
"""

SCHEMES = ('light', 'dark')
"""In the order of the pairs below. [unitless]"""

PALETTE = {
    'paper': ('#fdfcf9', '#14181e'),
    'ink': ('#1b2330', '#f0ebdf'),
    'hatch': ('#4b5668', '#b9b4a5'),
    'brown': ('#6f4526', '#cfa77c'),
    'brown-edge': ('#3a2211', '#efd6b6'),
    'pale': ('#c8dae3', '#283944'),
    'paler': ('#e3ecf0', '#1e2932'),
    'bar': ('#5b6675', '#a9b2bd'),
    'lane': ('#e8eef0', '#212a33'),
    'line': ('#14607c', '#86c9de'),
    'text': ('#55606f', '#a3adba'),
    'strong-text': ('#1b2330', '#e9e5db'),
    'axis': ('#9aa2ac', '#59626f'),
    'hair': ('#c9ccce', '#3a424d'),
    'band': ('#f0ede4', '#1f252d'),
    'hardly': ('#3a4454', '#d3cfc4'),
    'seldom': ('#657182', '#9aa0a5'),
    'often': ('#8b97a4', '#707a85'),
    'enough': ('#dbe5ea', '#29343f'),
    'dot': ('#6a7683', '#7d8894'),
    'asked': ('#dcebf0', '#1d323b'),
}
"""Each role's colour in every scheme. [unitless]"""

CLASS_ROLES = {
    'none': 'ink',
    'none-hatch': 'hatch',
    'too-few': 'brown',
    'too-few-edge': 'brown-edge',
    'just-enough': 'pale',
    'more': 'paler',
    'all': 'paper',
    'dot': 'dot',
    'lost': 'ink',
    'lost-hatch': 'paper',
    'gained': 'pale',
    'gained-dot': 'ink',
    'still-blind': 'lane',
}
"""The role that each class of the map of blind zones is drawn in. [unitless]"""

STEP_ROLES = {'hardly': 'hardly', 'seldom': 'seldom', 'often': 'often', 'enough': 'enough', 'surely': 'paper'}
"""The role that each step of the probability of detection is drawn in. [unitless]"""
