"""Keys that name a plan and say what it is for."""

from pycore.plan.keys.key import choice, text, under

# A table reads best as one: name and label, what it does, unit and limits.
# fmt: off
KEYS = under(
    '',
    text('title', 'title', 'Title',
        'Stands at the head of the note and names it in the list of links.',
        120, default=''),
    text('marking', 'marking', 'Handling mark',
        'Stands on every page, print and picture, and travels in every link.',
        80, nullable=True),
    text('notes', 'notes', 'Notes',
        'Whatever else a reader of the plan should know; it stays out of links unless they carry remarks.',
        4000, nullable=True),
    choice('purpose', 'purpose', 'Purpose',
        'Targets: the plan is judged by what it sees. Weather: by the speeds it measures.',
        ('targets', 'weather'), default='targets'),
    text('decided.by', 'by', 'Decided by',
        'Who settled the plan.',
        80, nullable=True),
    text('decided.on', 'on', 'Decided on',
        'The day on which it was settled.',
        40, nullable=True),
    text('decided.as', 'as', 'Decided as',
        'What it counts as: a draft, a baseline, a decision.',
        120, nullable=True),
)
# fmt: on
"""In the order of the page and of a link."""
