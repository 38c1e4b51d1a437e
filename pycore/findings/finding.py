"""One finding: a sentence with its number, what was wanted, and the verdict in words."""

from dataclasses import dataclass, replace

from pycore.wording import capitalised

NOT_ASKED = 'not asked'
"""What stands for the number of a finding that the plan does not ask for."""
SIGNS = {'met': '✓', 'not met': '✗', 'accepted': '✗', 'for information': '○'}
"""The sign beside each verdict's words, so that nothing is told by colour alone."""


@dataclass(frozen=True, slots=True)
class Finding:
    """What a plan reaches in one respect, against what was wanted of it.

    Parameters
    ----------
    name : str
        Fixed name, such as ``visible`` or ``must-see.0``. [unitless]
    label : str
        What is measured, without its number. [unitless]
    value : float, list or None
        Full precision, in the plan's unit; shares as fractions. [unit]
    value_text : str
        The number as it stands in the sentence. [unitless]
    unit : str or None
        Unit of the value in the plan. [unitless]
    wanted : float, list or None
        What it is judged against, in the same unit. [unit]
    wanted_text : str
        Such as ``'at least 95 %'``; empty where nothing was asked. [unitless]
    met : bool or None
        Verdict; ``None`` where nothing was asked. [unitless]
    detail : str
        A second clause: where, when, or how much is out of reach. [unitless]
    fault : str
        The clause for the verdict line when it is not met. [unitless]
    spare : float
        How far inside the limit, as a fraction of the limit; ``inf`` where that means nothing. [unitless]
    spare_text : str
        The same in words, such as ``'the time on target, 1.04 ms to spare'``. [unitless]
    remark : str or None
        The engineer's own sentence. [unitless]
    """

    name: str
    label: str
    value: float | list | None
    value_text: str
    unit: str | None
    wanted: float | list | None = None
    wanted_text: str = ''
    met: bool | None = None
    detail: str = ''
    fault: str = ''
    spare: float = float('inf')
    spare_text: str = ''
    remark: str | None = None

    @property
    def accepted(self):
        """Whether it is not met and the engineer says why that is acceptable."""
        return self.met is False and bool(self.remark)

    @property
    def verdict(self):
        """The verdict in words: met, not met, accepted or for information."""
        if self.met is None:
            return 'for information'
        if self.met:
            return 'met'
        return 'accepted' if self.remark else 'not met'

    @property
    def text(self):
        """The whole finding as one sentence."""
        wanted = f', wanted {self.wanted_text}' if self.wanted_text else ''
        detail = f'; {self.detail}' if self.detail else ''
        return f'{capitalised(self.label)}: {self.value_text}{wanted}{detail}.'

    @property
    def remark_text(self):
        """The remark as it prints beneath the finding; empty where there is none and none is owed."""
        if self.met is False:
            return f'not met, accepted: {self.remark}' if self.remark else 'not met; no reason given'
        return self.remark or ''

    def reached(self, value, value_text, **more):
        """Return the finding with what the plan reaches.

        Parameters
        ----------
        value : float, list or None
            Full precision, in the plan's unit. [unit]
        value_text : str
            As it stands in the sentence. [unitless]
        more : mapping
            Verdict, detail, fault, spare. [unitless]

        Returns
        -------
        finding : Finding
            A copy with what was asked as it is.
        """
        return replace(self, value=value, value_text=value_text, **more)

    def with_remark(self, remarks):
        """Return the finding with the engineer's remark on it.

        Parameters
        ----------
        remarks : mapping of str to str
            Remarks by the findings' names. [unitless]

        Returns
        -------
        finding : Finding
            A copy that carries its remark.
        """
        return replace(self, remark=remarks.get(self.name) or None)


def at_least(value, limit):
    """Return whether a value reaches its lower limit, or ``None`` where there is no limit.

    Parameters
    ----------
    value : float or None
        What was reached; ``None`` means without end. [any]
    limit : float or None
        What was wanted. [same]

    Returns
    -------
    met : bool or None
        Counted as met within 1e-9 of the limit.
    """
    if limit is None:
        return None
    return value is None or value >= limit - 1e-9 * max(1.0, abs(limit))


def at_most(value, limit):
    """Return whether a value stays within its upper limit, or ``None`` where there is no limit.

    Parameters
    ----------
    value : float
        What was reached. [any]
    limit : float or None
        What is allowed. [same]

    Returns
    -------
    met : bool or None
        Counted as met within 1e-9 of the limit.
    """
    if limit is None:
        return None
    return value <= limit + 1e-9 * max(1.0, abs(limit))
