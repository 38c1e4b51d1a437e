"""What the models leave out, in sentences for the reader of a note."""

LEFT_OUT = (
    'Clutter comes in through the main beam only: what sidelobes pick up, and the spread of the altitude line under '
    'an aircraft, are left out.',
    'Transmitter and oscillators are perfectly steady. Real ones set a ceiling to every improvement factor.',
    'The transmitter is coherent from pulse to pulse. With one that is not, clutter from beyond the first interval '
    'never cancels.',
    'There is no sensitivity-time control and no elevation pattern, so that close clutter is overstated.',
    'A compressed pulse has no range sidelobes, and one that is cut by eclipsing compresses as well as a whole one.',
    'A target stands in the middle of its range gate, the false-alarm threshold costs nothing, and the beam keeps its '
    'gain throughout a CPI.',
    'Rain and air do not attenuate; the horizon hides nothing; there is one path to the target.',
    'Nobody interferes, and intervals are not jittered on purpose.',
    'A target keeps its radial speed while the beam rests on it, and there is one target in a cell.',
)
"""In the order of their weight for a surveillance radar. [unitless]"""
