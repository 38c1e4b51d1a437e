"""Findings on what is seen: the coverage and the must-see regions."""

from pycore.findings.finding import Finding, at_least
from pycore.findings.holes import blind_where
from pycore.wording import as_typed_percent, percent


def looks(computed):
    """Say what has to see a target: ``at least 1 of the 2 PRFs``.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]

    Returns
    -------
    text : str
        Empty where there is a single look.
    """
    if computed.looks == 1:
        return ''
    if computed.m == computed.looks:
        return f' by {"both" if computed.looks == 2 else f"all {computed.looks}"} PRFs'
    return f' by at least {computed.m} of the {computed.looks} PRFs'


def visible(computed, units):
    """Return the finding on the share of the coverage that is seen.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units, with keys ``range`` and ``speed``. [unitless]

    Returns
    -------
    finding : Finding
        Value, what was wanted, and the sentence.
    """
    wanted = computed.plan.wanted.visible
    share, floor = computed.share, computed.floor_share
    within_reach = max(0.0, computed.excess_over_floor)
    detail = f'{percent(floor)} is what no plan can see'
    if within_reach > 1e-12:
        detail += f', {percent(within_reach)} another plan could'
    return Finding(
        'visible',
        f'coverage seen{looks(computed)}',
        share,
        percent(share, wanted),
        'share',
        wanted,
        '' if wanted is None else f'at least {as_typed_percent(wanted)}',
        at_least(share, wanted),
        detail,
        fault=f'{_only(share, wanted)} of the coverage is seen',
        spare=float('inf') if wanted is None else _spare_share(share, wanted),
        spare_text='' if wanted is None else f'the coverage seen, {percent(max(0.0, share - wanted))} to spare',
    )


def _spare_share(share, wanted):
    """Return how much of the permitted blindness is left, as a fraction of it."""
    return (share - wanted) / (1 - wanted) if wanted < 1 else float('inf')


def _only(share, wanted):
    """Say how little is seen."""
    return f'only {percent(share, wanted)}' if share > 0 else 'nothing'


def must_see(computed, units):
    """Return one finding for each must-see region, judged by the share of it that is seen.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]
    units : mapping
        Shown units, with keys ``range`` and ``speed``. [unitless]

    Returns
    -------
    findings : list of Finding
        In the order of the plan.
    """
    return [_must_see(index, region, computed, units) for index, region in enumerate(computed.must_see)]


def _must_see(index, region, computed, units):
    name, wanted = region.name or f'region {index + 1}', region.wanted
    blind = blind_where(region.holes.listed, region.range_m, region.speed_m_s, computed, units)
    return Finding(
        f'must-see.{index}',
        f'part seen of the must-see region “{name}”',
        region.share,
        percent(region.share, wanted),
        'share',
        wanted,
        '' if wanted is None else 'all of it' if wanted == 1 else f'at least {as_typed_percent(wanted)}',
        at_least(region.share, wanted),
        blind,
        fault=f'{_only(region.share, wanted)} of “{name}” is seen' + (f' ({blind})' if blind else ''),
        spare=float('inf') if wanted is None else _spare_share(region.share, wanted),
        spare_text='' if wanted is None else f'“{name}”, {percent(max(0.0, region.share - wanted))} to spare',
    )
