"""The share seen with clutter counted too, at its worst over intervals of carriers and of rain speeds."""

from pycore.computed import Computed
from pycore.worst_over import on_carrier, with_rain_at, worst_over


def clutter_at_its_worst(computed):
    """Return the least share that is seen with clutter, over the intervals of carriers and of rain speeds.

    Parameters
    ----------
    computed : Computed
        What the plan gives. [unitless]

    Returns
    -------
    worst : dict or None
        ``value``, ``carrier_ghz``, ``rain_mps``; ``None`` where nothing is to be held, where there is no clutter, or
        for a stagger.

    Notes
    -----
    Over both intervals together the worst is found in turns: over the rain's speed at the plan's carrier, over the
    carrier at that speed, and over the speed again.
    """
    plan = computed.plan
    if plan.holds_over is None or computed.is_stagger or not computed.echoes.patches:
        return None
    carriers = plan.holds_over['carrier_ghz']
    speeds = plan.holds_over['rain_mps'] if plan.patches else None
    here = float(plan.carrier_exact_hz[0]) / 1e9, plan.patches[0].speed_m_s if plan.patches else None
    seen = _SeenWithClutter(plan)
    for axis in (1, 0, 1):
        over = (carriers, speeds)[axis]
        if over is not None:
            here = seen.worst_along(axis, here, over)
    return {'value': seen.share(here), 'carrier_ghz': here[0], 'rain_mps': here[1]}


class _SeenWithClutter:
    """The share seen with clutter on other carriers and at other rain speeds, each worked out once."""

    def __init__(self, plan):
        self._plan, self._known = plan, {}

    def share(self, here):
        """Return the share at a carrier [GHz] and a rain speed [m/s]."""
        if here not in self._known:
            moved = on_carrier(self._plan, here[0])
            moved = moved if here[1] is None else with_rain_at(moved, here[1])
            self._known[here] = Computed(moved).echoes.share_with_clutter
        return self._known[here]

    def worst_along(self, axis, here, over):
        """Return where the share is least along one axis, the other being held."""

        def at(value):
            return self.share(_put(here, axis, value))

        return _put(here, axis, worst_over(at, over, float)[0])


def _put(here, axis, value):
    return (value, here[1]) if axis == 0 else (here[0], value)
