"""What all tests share: hypothesis without a clock, and with the same draws on every machine.

``HYPOTHESIS_PROFILE=explore`` draws anew each time, for whoever hunts counterexamples.
"""

import os

from hypothesis import HealthCheck, settings

# A busy machine is no counterexample; a run in continuous integration must not depend on its luck.
settings.register_profile(
    'steady', deadline=None, derandomize=True, database=None, suppress_health_check=[HealthCheck.too_slow]
)
settings.register_profile('explore', deadline=None)
settings.load_profile(os.environ.get('HYPOTHESIS_PROFILE', 'steady'))
