"""Structural edits by their names: records that are added and taken away, and all that is done to the list of PRIs."""

from pycore.edit import pris as edit_pris
from pycore.errors import InputError
from pycore.plan.document import shown
from pycore.plan.keys import BY_PATH, MOST_PATCHES, MOST_REGIONS, OPTIONAL_RECORDS
from pycore.plan.paths import put, value_at


def _add_record(path):
    """Make the action that adds a record with its defaults."""

    def add(plan, edit, units):
        if value_at(plan, path) is None:
            put(plan, path, {})
        return []

    return add


def _remove_record(path):
    """Make the action that takes a record away."""

    def remove(plan, edit, units):
        put(plan, path, None)
        if path == 'weather':
            plan['purpose'] = 'targets'
        return []

    return remove


def _add_near_pulse(plan, edit, units):
    """Add a near pulse, sent when the long one and the guard are over."""
    radar = plan['radar']
    if radar['near_pulse'] is None:
        longest = max(radar['pulse_us']) if isinstance(radar['pulse_us'], list) else radar['pulse_us']
        usual = BY_PATH['radar.near_pulse.sent_at_us'].default
        radar['near_pulse'] = {'sent_at_us': max(usual, longest + radar['guard_us'])}
    return []


def _add_weather(plan, edit, units):
    """Judge the plan by the speeds of weather that it measures."""
    plan['purpose'] = 'weather'
    if plan['weather'] is None:
        plan['weather'] = {}
    return []


def _add_over_carrier(plan, edit, units):
    """Judge by the worst over carriers: two per cent to either side until it is said otherwise."""
    carriers = plan['radar']['carrier_ghz']
    middle = carriers[0] if isinstance(carriers, list) else carriers
    key = BY_PATH['holds_over.carrier_ghz']
    ends = [min(max(float(f'{middle * share:.3g}'), key.lowest), key.highest) for share in (0.98, 1.02)]
    put(plan, key.path, ends if ends[0] < ends[1] else key.start)
    return []


def _add_over_rain(plan, edit, units):
    """Judge by the worst over speeds of the rain."""
    put(plan, 'holds_over.rain_mps', list(BY_PATH['holds_over.rain_mps'].start))
    return []


def _remove_over(name):
    """Make the action that takes one interval of *holds over* away, and the record with the last of them."""

    def remove(plan, edit, units):
        if plan['holds_over'] is not None:
            left = {**plan['holds_over'], name: None}
            plan['holds_over'] = left if any(value is not None for value in left.values()) else None
        return []

    return remove


def _patches(plan):
    rain = plan['rain']
    return [] if rain is None else rain if isinstance(rain, list) else [rain]


def _add_rain(plan, edit, units):
    """Add a patch of rain, or a further patch of moving clutter under a name of its own."""
    patches = _patches(plan)
    if len(patches) >= MOST_PATCHES:
        raise InputError('rain', f'Rain: there can be at most {MOST_PATCHES} patches; got one more.')
    names = {patch['name'] for patch in patches}
    new = next(f'patch {number}' for number in range(2, MOST_PATCHES + 3) if f'patch {number}' not in names)
    plan['rain'] = {} if not patches else [*patches, {'name': new}]
    return []


def _remove_rain(plan, edit, units):
    """Take all rain away, or the patch at ``index``."""
    patches, index = _patches(plan), edit.get('index')
    if index is None:
        plan['rain'] = None
        return []
    left = _without(patches, index, 'rain', 'Patch of rain')
    plan['rain'] = None if not left else left[0] if len(left) == 1 else left
    return []


def _without(records, index, field, label):
    """Return a list of records without the one at an index."""
    if isinstance(index, bool) or not isinstance(index, int) or not 0 <= index < len(records):
        raise InputError(field, f'{label} {shown(index)} is not one of the {len(records)} that there are.')
    return [record for place, record in enumerate(records) if place != index]


def _add_region(plan, edit, units):
    """Add a must-see region: the near quarter and the slow half of the coverage until it is said otherwise."""
    regions = plan['must_see']
    if len(regions) >= MOST_REGIONS:
        raise InputError('must_see', f'Must-see regions: there can be at most {MOST_REGIONS}; got one more.')
    near, far = plan['coverage']['range_km']
    slow, fast = plan['coverage']['speed_mps']
    names = {region['name'] for region in regions}
    name = next(f'region {number}' for number in range(1, MOST_REGIONS + 2) if f'region {number}' not in names)
    ranges, speeds = [near, _part_of_the_way(near, far, 4)], [slow, _part_of_the_way(slow, fast, 2)]
    plan['must_see'] = [*regions, {'name': name, 'range_km': ranges, 'speed_mps': speeds}]
    return []


def _part_of_the_way(low, high, parts):
    """Return a rounded point between two ends, never at the lower one."""
    point = low + (high - low) / parts
    rounded = round(point, 3)
    return rounded if low < rounded <= high else point if point > low else high


def _remove_region(plan, edit, units):
    """Take the must-see region at ``index`` away."""
    plan['must_see'] = _without(plan['must_see'], edit.get('index'), 'must_see', 'Must-see region')
    return []


def _remark(plan, edit, units):
    """Write, or take away, the engineer's own sentence under a finding."""
    name, text = str(edit.get('finding')), str(edit.get('text', '')).strip()
    plan['remarks'].pop(name, None)
    if text:
        plan['remarks'][name] = text
    return []


def _record_actions():
    for path in OPTIONAL_RECORDS:
        name = path.rpartition('.')[2].replace('_', '-')
        yield f'add-{name}', _add_record(path)
        yield f'remove-{name}', _remove_record(path)


ACTIONS = {
    'add-pri': edit_pris.add_pri,
    'remove-pri': edit_pris.remove_pri,
    'move-pri': edit_pris.move_pri,
    'sort-pris': edit_pris.sort_pris,
    'paste-pris': edit_pris.paste_pris,
    'split': edit_pris.split,
    'join': edit_pris.join,
    'set-kind': edit_pris.set_kind,
    **dict(_record_actions()),
    'add-near-pulse': _add_near_pulse,
    'add-weather': _add_weather,
    'add-over-carrier': _add_over_carrier,
    'add-over-rain': _add_over_rain,
    'remove-over-carrier': _remove_over('carrier_ghz'),
    'remove-over-rain': _remove_over('rain_mps'),
    'add-rain': _add_rain,
    'remove-rain': _remove_rain,
    'add-must-see': _add_region,
    'remove-must-see': _remove_region,
    'remark': _remark,
}
"""What an edit's ``do`` may be."""
