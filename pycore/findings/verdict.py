"""The one line under the title: how many findings are not met, and why."""

from pycore.wording import plural


def verdict(findings):
    """Return the verdict line of a note.

    Parameters
    ----------
    findings : sequence of Finding
        All findings, in their fixed order. [unitless]

    Returns
    -------
    verdict : dict
        ``lead`` (the count, with a colon or full stop), ``rest`` (why), ``text`` (both) and
        ``met`` (``True``, ``False``, or ``None`` where nothing is judged).
    """
    judged = [finding for finding in findings if finding.met is not None]
    failed = [finding for finding in judged if not finding.met]
    if not judged:
        lead, rest, met = 'Nothing is judged:', 'no finding has a wanted value yet.', None
    elif failed:
        lead, rest, met = f'{_failed_count(failed, judged)}:', f'{"; ".join(_faults(failed))}.', False
    else:
        lead, rest, met = *_all_met(judged), True
    return {'lead': lead, 'rest': rest, 'text': f'{lead} {rest}'.strip(), 'met': met}


def _failed_count(failed, judged):
    """Say how many of the judged findings are not met, and how many of those are accepted."""
    accepted = sum(finding.accepted for finding in failed)
    count = f'{len(failed)} of {len(judged)} findings {plural(len(failed), "is", "are")} not met'
    if not accepted:
        return count
    return f'{count}, {"accepted" if accepted == len(failed) else f"{accepted} of them accepted"}'


def _faults(failed):
    """Return the clauses of the findings that are not met, those still open first, three at most."""
    ordered = sorted(failed, key=lambda finding: finding.accepted)
    clauses = [finding.fault or finding.label for finding in ordered[:3]]
    return clauses if len(ordered) <= 3 else [*clauses[:2], f'and {len(ordered) - 2} more below']


def _all_met(judged):
    """Say that all findings are met, and which is the tightest."""
    lead = 'The one judged finding is met' if len(judged) == 1 else f'All {len(judged)} judged findings are met'
    tightest = min(judged, key=lambda finding: finding.spare)
    if not tightest.spare_text:
        return f'{lead}.', ''
    return f'{lead};', f'the tightest is {tightest.spare_text}.'
