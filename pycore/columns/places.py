"""What the axes of each figure measure: where a target can be set by pointing, and which figures take one."""

MEASURES = {
    'blind-zones': {'x': 'range', 'y': 'speed'},
    'trade-line': {'x': 'range', 'y': 'speed'},
    'eclipsed-ranges': {'x': 'range'},
    'blind-speeds': {'x': 'speed'},
    'decoding': {'x': 'range'},
    'doppler-filters': {'x': 'speed'},
    'detection': {'x': 'range', 'y': 'speed'},
}
"""For each figure that a target can be set in: what its axes measure of it. [unitless]"""

ZOOMED = ('blind-zones', 'detection')
"""Figures of which a part can be looked at. [unitless]"""
