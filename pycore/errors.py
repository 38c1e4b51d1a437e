"""The one error that is meant for the person who typed the plan."""


class InputError(ValueError):
    """An input that cannot be used, told in one sentence.

    Anything else that is raised is a fault of the program and keeps its traceback.

    Parameters
    ----------
    field : str
        Path of the plan's key, such as ``radar.pulse_us``; the page marks the number that carries it. [unitless]
    message : str
        One sentence with the field's name, the rule, the limit with its unit, and what came. [unitless]
    """

    def __init__(self, field, message):
        super().__init__(message)
        self.field = field
        self.message = message
